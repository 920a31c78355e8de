//! The events around a moment: the last and the next conjunction, greatest elongation or
//! opposition of a body.

use crate::measure::{Angle, Moment, TimeScales, Tt, search};
use crate::sky::{Body, Ephemeris, Epoch, Span};

/// How far an event can lie from a moment, days, and the step to look for it with: the synodic
/// period and a quarter more (Mars' spacing runs from 764 to 811 days), and a step in which
/// neither the longitude from the Sun nor the elongation turns twice.
fn reach_and_step_days(body: Body) -> (f64, f64) {
    match body {
        Body::Moon => (32.0, 1.0),
        Body::Mercury => (145.0, 2.0),
        Body::Venus => (730.0, 6.0),
        Body::Mars => (975.0, 6.0),
        _ => (430.0, 6.0),
    }
}

/// A minute, in days: what an event's time is found to.
const TOLERANCE_DAYS: f64 = 1.0 / 1440.0;

/// What happens between a body, the Sun and the Earth.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Aspect {
    /// At the Sun's ecliptic longitude, on the near side (Mercury, Venus).
    InferiorConjunction,
    /// At the Sun's ecliptic longitude, beyond it (Mercury, Venus).
    SuperiorConjunction,
    /// At the Sun's ecliptic longitude (outer planets; for the Moon: new moon).
    Conjunction,
    /// Opposite to the Sun in ecliptic longitude (outer planets; for the Moon: full moon).
    Opposition,
    /// Farthest from the Sun in the evening sky (Mercury, Venus).
    GreatestElongationEast,
    /// Farthest from the Sun in the morning sky (Mercury, Venus).
    GreatestElongationWest,
}

/// One event. Geocentric, in apparent ecliptic longitude of date; greatest elongations in the
/// apparent angle from the Sun's centre.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Neighbour {
    /// What.
    pub aspect: Aspect,
    /// When, to a minute.
    pub moment: Moment,
    /// Elongation from the Sun then.
    pub elongation: Angle,
}

/// The events on either side of a moment. `None`: beyond the supported years.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Neighbours {
    /// The last conjunction with the Sun at or before the moment.
    pub last_conjunction: Option<Neighbour>,
    /// The first one after it.
    pub next_conjunction: Option<Neighbour>,
    /// The last greatest elongation (Mercury, Venus) or opposition (the others).
    pub last_height: Option<Neighbour>,
    /// The first one after it.
    pub next_height: Option<Neighbour>,
}

/// The events around `moment`. The Sun has none.
pub fn neighbours(
    ephemeris: &Ephemeris,
    scales: TimeScales,
    body: Body,
    moment: Moment,
) -> Neighbours {
    if body == Body::Sun {
        return Neighbours::default();
    }
    let is_conjunction = |event: &&Neighbour| event.aspect.is_conjunction();
    let is_height = |event: &&Neighbour| !event.aspect.is_conjunction();
    let before = events(ephemeris, scales, body, moment, Side::Before);
    let after = events(ephemeris, scales, body, moment, Side::After);
    Neighbours {
        last_conjunction: before.iter().rfind(is_conjunction).copied(),
        next_conjunction: after.iter().find(is_conjunction).copied(),
        last_height: before.iter().rfind(is_height).copied(),
        next_height: after.iter().find(is_height).copied(),
    }
}

impl Aspect {
    /// Whether it is a conjunction with the Sun of any kind.
    pub const fn is_conjunction(self) -> bool {
        matches!(
            self,
            Self::InferiorConjunction | Self::SuperiorConjunction | Self::Conjunction
        )
    }
}

#[derive(Clone, Copy, PartialEq)]
enum Side {
    Before,
    After,
}

/// All events within reach on one side of a moment, in time order; none where the theories end.
fn events(
    ephemeris: &Ephemeris,
    scales: TimeScales,
    body: Body,
    moment: Moment,
    side: Side,
) -> Vec<Neighbour> {
    let (reach, step) = reach_and_step_days(body);
    let now = moment.tt().days_since_j2000();
    // A turning point needs a sample on either side of it, also where it falls on the moment.
    let (from, to) = match side {
        Side::Before => (now - reach, now + step),
        Side::After => (now - step, now + reach),
    };
    let tt = Tt::from_days_since_j2000;
    let Ok(span) = ephemeris.cover(tt(from), tt(to), &[Body::Sun, body]) else {
        return Vec::new();
    };
    let course = Course { span, scales, body };
    let samples = search::grid(from, to, step);
    let mut found = course.alignments(&samples);
    if matches!(body, Body::Mercury | Body::Venus) {
        found.extend(course.greatest_elongations(&samples));
    }
    found.retain(|event| (event.moment > moment) == (side == Side::After));
    found.sort_by(|a, b| a.moment.seconds_since(b.moment).total_cmp(&0.0));
    found
}

/// A body's way around the Sun in the Earth's sky.
struct Course {
    span: Span,
    scales: TimeScales,
    body: Body,
}

impl Course {
    fn at<T>(&self, days: f64, read: impl FnOnce(&Epoch<'_>) -> T) -> T {
        let moment = self.scales.moment_from_tt(Tt::from_days_since_j2000(days));
        read(&self.span.at(moment))
    }

    /// Ecliptic longitude east of the Sun's.
    fn longitude_from_sun(&self, days: f64) -> Angle {
        self.at(days, |epoch| {
            let longitude = |body| epoch.ecliptic(epoch.geocentric(body).direction).0;
            longitude(self.body) - longitude(Body::Sun)
        })
    }

    fn elongation(&self, days: f64) -> Angle {
        self.at(days, |epoch| {
            let direction = |body| epoch.geocentric(body).direction;
            direction(self.body).angle_to(direction(Body::Sun))
        })
    }

    /// Conjunctions and oppositions: where the sine of the longitude from the Sun vanishes.
    fn alignments(&self, samples: &[f64]) -> Vec<Neighbour> {
        let sine = |days: f64| self.longitude_from_sun(days).sin();
        search::crossings(sine, samples, TOLERANCE_DAYS)
            .iter()
            .map(|crossing| {
                let is_opposite = self.longitude_from_sun(crossing.at).cos() < 0.0;
                let is_nearer_than_sun = self.at(crossing.at, |epoch| {
                    let distance_au = |body| epoch.geocentric(body).distance_au;
                    distance_au(self.body) < distance_au(Body::Sun)
                });
                let aspect = match self.body {
                    Body::Mercury | Body::Venus if is_nearer_than_sun => {
                        Aspect::InferiorConjunction
                    }
                    Body::Mercury | Body::Venus => Aspect::SuperiorConjunction,
                    _ if is_opposite => Aspect::Opposition,
                    _ => Aspect::Conjunction,
                };
                self.neighbour(crossing.at, aspect)
            })
            .collect()
    }

    fn greatest_elongations(&self, samples: &[f64]) -> Vec<Neighbour> {
        let elongation = |days: f64| self.elongation(days).radians();
        search::extrema(elongation, samples, TOLERANCE_DAYS)
            .iter()
            .filter(|turn| turn.is_maximum)
            .map(|turn| {
                let aspect = if self.longitude_from_sun(turn.at).signed() > Angle::ZERO {
                    Aspect::GreatestElongationEast
                } else {
                    Aspect::GreatestElongationWest
                };
                self.neighbour(turn.at, aspect)
            })
            .collect()
    }

    fn neighbour(&self, days: f64, aspect: Aspect) -> Neighbour {
        Neighbour {
            aspect,
            moment: self.scales.moment_from_tt(Tt::from_days_since_j2000(days)),
            elongation: self.elongation(days),
        }
    }
}
