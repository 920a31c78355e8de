//! Close approaches of planets to each other and to the bright stars of their road.

use super::search::{self, Lost, Stretch};
use super::sight::{Pair, Sight};
use super::{Event, Kind, Lookout, PhenomenaError, Target, Value};
use crate::measure::{Angle, TimeScales, Tt, Vector};
use crate::sky::{Body, Ephemeris, Span, stars};
use std::sync::OnceLock;

/// Days between looks at the whole sky. Two planets part and meet again only with the seasons of
/// their loops, and the Moon comes to a planet once in four weeks.
const STEP_DAYS: f64 = 1.0;
/// What is listed: least separations of the centres below this.
const LARGEST: Angle = Angle::from_degrees(1.5);
/// How far two planets, or a planet and a star, can come nearer from one look to the next
/// (Mercury at its fastest goes 2.3° a day), with room.
const APPROACH: Angle = Angle::from_degrees(4.0);
/// First-magnitude stars that planets pass, and the brightest of the Pleiades. Only their meetings
/// with planets that the unaided eye sees are listed.
const STARS: [&str; 5] = ["Regulus", "Spica", "Antares", "Aldebaran", "Alcyone"];

/// The planets, in the order in which pairs name them.
pub const PLANETS: [Body; 7] = [
    Body::Mercury,
    Body::Venus,
    Body::Mars,
    Body::Jupiter,
    Body::Saturn,
    Body::Uranus,
    Body::Neptune,
];

/// What planets are listed with.
fn star_targets() -> &'static [Target] {
    static TARGETS: OnceLock<Vec<Target>> = OnceLock::new();
    TARGETS.get_or_init(|| {
        STARS
            .iter()
            .filter_map(|name| stars::star_named(name))
            .map(Target::Star)
            .collect()
    })
}

/// Everything that appulses are looked for between, at even steps through a stretch, from the
/// Earth's centre.
pub struct Sweep {
    span: Span,
    scales: TimeScales,
    /// The stretch itself.
    pub stretch: Stretch,
    /// When was looked.
    pub ticks: Vec<f64>,
}

impl Sweep {
    /// Covers a stretch and a little around it.
    ///
    /// # Errors
    /// The stretch leaves the ephemeris.
    pub fn new(
        ephemeris: &Ephemeris,
        scales: TimeScales,
        stretch: Stretch,
        bodies: &[Body],
    ) -> Result<Self, PhenomenaError> {
        let (from, to) = stretch.with_room(STEP_DAYS);
        let tt = Tt::from_days_since_j2000;
        Ok(Self {
            span: ephemeris.cover(tt(from), tt(to), bodies)?,
            scales,
            stretch,
            ticks: stretch.ticks(STEP_DAYS),
        })
    }

    /// The sky from the Earth's centre, or from a lookout.
    pub fn sight<'a>(&'a self, lookout: Option<Lookout<'a>>) -> Sight<'a> {
        Sight {
            span: &self.span,
            scales: self.scales,
            lookout,
        }
    }

    /// The apparent geocentric directions of some targets, look by look.
    pub fn looks(&self, targets: &[Target]) -> Vec<Vec<Vector>> {
        let sight = self.sight(None);
        let look = |at: &f64| {
            sight.at(*at, |epoch| {
                let direction = |target: &Target| target.geocentric(epoch).direction;
                targets.iter().map(direction).collect()
            })
        };
        self.ticks.iter().map(look).collect()
    }

    /// The ticks at which two of the looked-at are nearer than at those before and after, and
    /// nearer than a limit.
    pub fn nearest(
        &self,
        looks: &[Vec<Vector>],
        (first, second): (usize, usize),
        limit: Angle,
    ) -> Vec<usize> {
        let apart: Vec<f64> = looks
            .iter()
            .map(|look| look[first].angle_to(look[second]).radians())
            .collect();
        (1..apart.len().saturating_sub(1))
            .filter(|k| apart[*k] <= apart[k - 1] && apart[*k] < apart[k + 1])
            .filter(|k| apart[*k] < limit.radians())
            .collect()
    }
}

/// Appulses of the stretch in which one of `bodies` takes part, seen from the Earth's centre.
pub fn appulses(
    ephemeris: &Ephemeris,
    scales: TimeScales,
    stretch: Stretch,
    bodies: &[Body],
    lookout: Option<Lookout<'_>>,
) -> Result<Vec<Event>, PhenomenaError> {
    let sweep = Sweep::new(ephemeris, scales, stretch, &PLANETS)?;
    let planets = PLANETS.map(Target::Body);
    let targets = [&planets[..], star_targets()].concat();
    let looks = sweep.looks(&targets);
    let mut found = Vec::new();
    for (first, body) in PLANETS.iter().enumerate() {
        for (second, other) in targets.iter().enumerate().skip(first + 1) {
            let (is_listed, is_asked) = match other {
                Target::Star(_) => (Body::BRIGHT.contains(body), false),
                Target::Body(other) => (true, bodies.contains(other)),
            };
            if !is_listed || !(is_asked || bodies.contains(body)) {
                continue;
            }
            let ticks = sweep.nearest(&looks, (first, second), LARGEST + APPROACH);
            for tick in ticks {
                let events = meetings(&sweep, tick, (*body, *other), lookout);
                found.extend(events.map_err(|lost| PhenomenaError::lost(*body, lost))?);
            }
        }
    }
    Ok(found)
}

/// Appulses of a planet with another target around a tick at which they are near.
fn meetings(
    sweep: &Sweep,
    tick: usize,
    (body, other): (Body, Target),
    lookout: Option<Lookout<'_>>,
) -> Result<Vec<Event>, Lost> {
    let sight = sweep.sight(None);
    let pair = |at: f64| sight.pair(at, Target::Body(body), other);
    let change = |a: f64, b: f64| pair(b).chord_squared() - pair(a).chord_squared();
    let bracket = (sweep.ticks[tick - 1], sweep.ticks[tick + 1]);
    let mut minima = search::minima_between(change, bracket)?;
    minima.retain(|at| sweep.stretch.has(*at) && pair(*at).separation() < LARGEST);
    Ok(minima
        .into_iter()
        .map(|at| {
            let mut event = appulse(&sight, at, body, (other, pair(at)));
            event.local = sweep.sight(lookout).circumstances(at, body);
            event
        })
        .collect())
}

/// The event of a body's least separation from another.
pub fn appulse(sight: &Sight<'_>, days: f64, body: Body, (other, pair): (Target, Pair)) -> Event {
    let value = Value::SeparationArcmin(pair.separation());
    let mut event = Event::new(Kind::Appulse, body, sight.moment(days), value);
    event.other = Some(other);
    event.position_angle = Some(pair.position_angle());
    event.elongation = Some(sight.elongation(days, body));
    event.local = sight.circumstances(days, body);
    event
}
