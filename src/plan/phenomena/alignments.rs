//! Conjunctions with the Sun and oppositions, in ecliptic longitude and in right ascension.

use super::course::{Course, Look};
use super::search::Lost;
use super::{Circle, Event, Kind, Value};
use crate::measure::Angle;
use crate::sky::Body;

/// Those along one circle: where the sine of the angle from the Sun vanishes. The values are
/// elongations.
pub fn alignments(course: &Course, circle: Circle) -> Result<Vec<Event>, Lost> {
    let from_sun = |look: &Look| -> Angle {
        match circle {
            Circle::Longitude => look.longitude_from_sun,
            Circle::RightAscension => look.right_ascension_from_sun,
        }
    };
    let found = course.zeros(|look| from_sun(look).sin())?;
    Ok(found
        .iter()
        .map(|crossing| {
            let look = course.look(crossing.at);
            let is_nearer_than_sun = look.appearance.distance_au < look.sun_distance_au;
            let kind = match course.body {
                Body::Mercury | Body::Venus if is_nearer_than_sun => {
                    Kind::InferiorConjunction(circle)
                }
                Body::Mercury | Body::Venus => Kind::SuperiorConjunction(circle),
                _ if from_sun(&look).cos() < 0.0 => Kind::Opposition(circle),
                _ => Kind::Conjunction(circle),
            };
            let value = Value::Elongation(look.appearance.elongation);
            course.event(kind, crossing.at, value)
        })
        .collect())
}
