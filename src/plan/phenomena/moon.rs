//! The Moon with planets as a place on the Earth sees it: appulses and occultations.

use super::appulses::{Sweep, appulse};
use super::search::{self, Lost, Stretch};
use super::sight::{Pair, Sight, semidiameter};
use super::{Contact, ContactName, Event, Kind, Lookout, PhenomenaError, Target, Value};
use crate::measure::{Angle, TimeScales};
use crate::sky::{Body, Ephemeris};

/// The Moon's mean radius for occultations: k = 0.2725076 (IAU 1982) of 6378.137 km.
pub const MOON_RADIUS_KM: f64 = 0.272_507_6 * 6378.137;

/// The planets whose meetings with the Moon are worth a visit: those that the unaided eye sees.
const PLANETS: [Body; 5] = [
    Body::Mercury,
    Body::Venus,
    Body::Mars,
    Body::Jupiter,
    Body::Saturn,
];

/// What is listed as an appulse: least topocentric separations of the centres below this, with
/// the Moon higher than [`LEAST_ALTITUDE`].
const LARGEST: Angle = Angle::from_degrees(3.0);
const LEAST_ALTITUDE: Angle = Angle::from_degrees(3.0);
/// How much farther the two can be at the nearest daily look, from the Earth's centre: half a
/// day of the Moon's way (15.4° a day at most) and a degree of parallax, with room.
const APPROACH: Angle = Angle::from_degrees(9.5);
/// How far around the nearest daily look the least separation is looked for, days.
const AROUND_DAYS: f64 = 1.5;
/// Days between those looks. The place turns with the Earth, and its parallax can make the
/// separation turn up to three times in a day; within two hours it turns once at most.
const FINE_STEP_DAYS: f64 = 1.0 / 12.0;
/// Within this of the least separation an occultation begins and ends, days: the Moon covers its
/// own breadth in an hour, two at most with the place's own motion.
const LONGEST_HALF_DAYS: f64 = 0.1;

/// Appulses and occultations of the stretch that the lookout has, of those of `bodies` that are
/// bright planets, or of all those if the Moon is among them.
pub fn with_planets(
    ephemeris: &Ephemeris,
    scales: TimeScales,
    stretch: Stretch,
    bodies: &[Body],
    lookout: Lookout<'_>,
) -> Result<Vec<Event>, PhenomenaError> {
    let all = [&[Body::Moon][..], &PLANETS].concat();
    let sweep = Sweep::new(ephemeris, scales, stretch, &all)?;
    let targets: Vec<Target> = all.iter().copied().map(Target::Body).collect();
    let looks = sweep.looks(&targets);
    let sight = sweep.sight(Some(lookout));
    let is_asked = |planet: &Body| bodies.contains(planet) || bodies.contains(&Body::Moon);
    let mut found = Vec::new();
    for (number, planet) in all.iter().enumerate().skip(1) {
        if !is_asked(planet) {
            continue;
        }
        for tick in sweep.nearest(&looks, (0, number), LARGEST + APPROACH) {
            let events = Meeting {
                sight,
                planet: *planet,
            }
            .events(sweep.ticks[tick], stretch)
            .map_err(|lost| PhenomenaError::lost(*planet, lost))?;
            found.extend(events);
        }
    }
    Ok(found)
}

/// The Moon near a planet, as a place sees them.
struct Meeting<'a> {
    sight: Sight<'a>,
    planet: Body,
}

impl Meeting<'_> {
    fn pair(&self, days: f64) -> Pair {
        let moon = Target::Body(Body::Moon);
        self.sight.pair(days, Target::Body(self.planet), moon)
    }

    fn events(&self, near: f64, stretch: Stretch) -> Result<Vec<Event>, Lost> {
        let Some(least) = self.least(near)? else {
            return Ok(Vec::new());
        };
        if !stretch.has(least) {
            return Ok(Vec::new());
        }
        Ok([self.appulse(least), self.occultation(least)?]
            .into_iter()
            .flatten()
            .collect())
    }

    /// When they are nearest, within the time around a look.
    fn least(&self, near: f64) -> Result<Option<f64>, Lost> {
        let chord_squared = |at: f64| self.pair(at).chord_squared();
        let count = (2.0 * AROUND_DAYS / FINE_STEP_DAYS).round() as usize;
        let tick = |k: usize| near - AROUND_DAYS + k as f64 * FINE_STEP_DAYS;
        let values: Vec<f64> = (0..=count).map(|k| chord_squared(tick(k))).collect();
        let mut best: Option<(f64, f64)> = None;
        for k in 1..count {
            if values[k] <= values[k - 1] && values[k] < values[k + 1] {
                let bracket = (tick(k - 1), tick(k + 1));
                let at = search::turn_of_smooth(chord_squared, bracket, false)?.at;
                let value = chord_squared(at);
                if best.is_none_or(|(_, least)| value < least) {
                    best = Some((at, value));
                }
            }
        }
        Ok(best.map(|(at, _)| at))
    }

    fn appulse(&self, at: f64) -> Option<Event> {
        let (planet, moon) = (Target::Body(self.planet), Target::Body(Body::Moon));
        let pair = self.sight.pair(at, moon, planet);
        let event = appulse(&self.sight, at, Body::Moon, (planet, pair));
        let altitude = event.local?.place.altitude;
        (pair.separation() < LARGEST && altitude > LEAST_ALTITUDE).then_some(event)
    }

    /// An occultation of which at least one moment has the Moon above the horizon.
    fn occultation(&self, at: f64) -> Result<Option<Event>, Lost> {
        use ContactName::{Disappearance, FirstTouch, LastTouch, Reappearance};
        let mut contacts = Vec::new();
        for (names, side) in [
            ((FirstTouch, LastTouch), 1.0),
            ((Disappearance, Reappearance), 0.0),
        ] {
            let beyond_limb = |at: f64| self.beyond_limb(at, side);
            if beyond_limb(at) < 0.0 {
                for (name, end) in [(names.0, -LONGEST_HALF_DAYS), (names.1, LONGEST_HALF_DAYS)] {
                    let bracket = (at.min(at + end), at.max(at + end));
                    contacts.push(self.contact(name, search::zero_between(beyond_limb, bracket)?));
                }
            }
        }
        contacts.sort_by(|a, b| a.moment.seconds_since(b.moment).total_cmp(&0.0));
        let is_up = |contact: &Contact| {
            contact
                .local
                .is_some_and(|local| local.place.altitude > Angle::ZERO)
        };
        if !contacts.iter().any(is_up) {
            return Ok(None);
        }
        let pair = self.pair(at);
        let value = Value::SeparationArcmin(pair.separation());
        let moment = self.sight.moment(at);
        let mut event = Event::new(Kind::LunarOccultation, self.planet, moment, value);
        event.other = Some(Target::Body(Body::Moon));
        event.position_angle = Some(pair.position_angle());
        event.elongation = Some(self.sight.elongation(at, self.planet));
        event.local = self.sight.circumstances(at, self.planet);
        event.local_contacts = contacts;
        Ok(Some(event))
    }

    /// Separation of the centres less the Moon's semidiameter and `side` times the planet's,
    /// radians: side 1 as the discs touch, 0 as the planet's centre passes the limb.
    fn beyond_limb(&self, days: f64, side: f64) -> f64 {
        let pair = self.pair(days);
        let planet = semidiameter(self.planet.equatorial_radius_km(), &pair.first);
        let moon = semidiameter(MOON_RADIUS_KM, &pair.second);
        pair.separation().radians() - moon.radians() - side * planet.radians()
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
