//! Transits of Mercury and Venus over the Sun.

use super::course::Course;
use super::search::{self, Lost, Turn};
use super::sight::{Pair, Sight, semidiameter};
use super::{Contact, ContactName, Event, Kind, Lookout, Target, Value};
use crate::measure::Angle;
use crate::sky::{Apparent, Body};

/// The Sun's semidiameter at 1 au (Auwers 1891), arcsec: what transits and eclipses are computed
/// with by custom.
pub const SUN_SEMIDIAMETER_ARCSEC: f64 = 959.63;

/// No conjunction farther from the Sun's centre than this has a transit: the Sun's and Venus's
/// semidiameters (17 arcmin together, at most) and the parallax (half an arcminute), with room
/// for the way from the conjunction to the least separation.
const FARTHEST: Angle = Angle::from_arcmin(24.0);
/// The least separation and every contact lie within this of the conjunction in longitude, days:
/// the longest transits last eight hours, and the planet's path leans on the ecliptic by 9° at
/// most.
const AROUND_DAYS: f64 = 0.4;

/// The planet before the Sun's disc, as seen from one place.
#[derive(Clone, Copy)]
struct Passage<'a> {
    sight: Sight<'a>,
    planet: Body,
}

/// Transits that are seen from the Earth's centre or, if one is given, from the lookout, with the
/// contacts of both. The values are the least geocentric separations of the centres.
pub fn transits(course: &Course, lookout: Option<Lookout<'_>>) -> Result<Vec<Event>, Lost> {
    let mut found = Vec::new();
    for crossing in course.zeros_around(|look| look.longitude_from_sun.sin())? {
        let look = course.look(crossing.at);
        let is_inferior = look.appearance.distance_au < look.sun_distance_au;
        if !is_inferior || look.appearance.elongation > FARTHEST {
            continue;
        }
        let passage = Passage {
            sight: course.sight(),
            planet: course.body,
        };
        let greatest = passage.greatest(crossing.at)?;
        if course.holds(greatest.at) {
            found.extend(passage.event(course, greatest, lookout)?);
        }
    }
    Ok(found)
}

impl<'a> Passage<'a> {
    fn pair(&self, days: f64) -> Pair {
        let sun = Target::Body(Body::Sun);
        self.sight.pair(days, Target::Body(self.planet), sun)
    }

    /// The least separation near a conjunction.
    fn greatest(&self, conjunction: f64) -> Result<Turn, Lost> {
        let chord_squared = |at: f64| self.pair(at).chord_squared();
        let bracket = (conjunction - AROUND_DAYS, conjunction + AROUND_DAYS);
        search::turn_of_smooth(chord_squared, bracket, false)
    }

    fn event(
        &self,
        course: &Course,
        greatest: Turn,
        lookout: Option<Lookout<'a>>,
    ) -> Result<Option<Event>, Lost> {
        let contacts = self.contacts(greatest.at)?;
        let local = match lookout {
            None => None,
            Some(lookout) => {
                let passage = Passage {
                    sight: Sight {
                        lookout: Some(lookout),
                        ..self.sight
                    },
                    ..*self
                };
                Some(passage.contacts(passage.greatest(greatest.at)?.at)?)
            }
        };
        let is_seen = |contacts: &[Contact]| contacts.len() > 1;
        if !is_seen(&contacts) && !local.as_deref().is_some_and(is_seen) {
            return Ok(None);
        }
        let value = Value::SeparationArcsec(self.pair(greatest.at).separation());
        let mut event = course.event(Kind::Transit, greatest.at, value);
        event.other = Some(Target::Body(Body::Sun));
        event.position_angle = Some(self.pair(greatest.at).position_angle());
        event.contacts = contacts;
        event.local_contacts = local.unwrap_or_default();
        Ok(Some(event))
    }

    /// The contacts that occur, and the least separation, in order of time.
    fn contacts(&self, greatest: f64) -> Result<Vec<Contact>, Lost> {
        use ContactName::{First, Fourth, Greatest, Second, Third};
        let (before, after) = (greatest - AROUND_DAYS, greatest + AROUND_DAYS);
        let outer = |at: f64| self.beyond_limb(at, 1.0);
        let inner = |at: f64| self.beyond_limb(at, -1.0);
        let mut found = vec![(Greatest, greatest)];
        if inner(greatest) < 0.0 {
            found.push((Second, search::zero_between(inner, (before, greatest))?));
            found.push((Third, search::zero_between(inner, (greatest, after))?));
        }
        if outer(greatest) < 0.0 {
            found.push((First, search::zero_between(outer, (before, greatest))?));
            found.push((Fourth, search::zero_between(outer, (greatest, after))?));
        }
        found.sort_by(|a, b| a.1.total_cmp(&b.1));
        Ok(found
            .into_iter()
            .map(|(name, at)| self.contact(name, at))
            .collect())
    }

    /// Separation of the centres less the Sun's semidiameter and `side` times the planet's,
    /// radians: zero at the outer contacts (side 1) and at the inner ones (side -1).
    fn beyond_limb(&self, days: f64, side: f64) -> f64 {
        let pair = self.pair(days);
        let planet = semidiameter(self.planet.equatorial_radius_km(), &pair.first);
        let limb = sun_semidiameter(&pair.second).radians() + side * planet.radians();
        pair.separation().radians() - limb
    }

    fn contact(&self, name: ContactName, days: f64) -> Contact {
        let pair = self.pair(days);
        Contact {
            name,
            moment: self.sight.moment(days),
            separation: pair.separation(),
            position_angle: pair.position_angle(),
            local: self.sight.circumstances(days, self.planet),
        }
    }
}

fn sun_semidiameter(sun: &Apparent) -> Angle {
    let sine_at_1_au = Angle::from_arcsec(SUN_SEMIDIAMETER_ARCSEC).sin();
    Angle::from_radians((sine_at_1_au / sun.distance_au).asin())
}
