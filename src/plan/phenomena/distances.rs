//! Perigee and apogee.

use super::course::Course;
use super::search::Lost;
use super::{Event, Kind, Value};

/// Where the distance from the Earth (when the light left) turns.
pub fn distances(course: &Course) -> Result<Vec<Event>, Lost> {
    let turns = course.turns(|look| look.appearance.distance_au)?;
    Ok(turns
        .iter()
        .map(|turn| {
            let kind = if turn.is_maximum {
                Kind::Apogee
            } else {
                Kind::Perigee
            };
            let value = Value::DistanceAu(course.look(turn.at).appearance.distance_au);
            course.event(kind, turn.at, value)
        })
        .collect())
}
