//! Stationary points in right ascension.

use super::course::Course;
use super::search::Lost;
use super::{Event, Kind, Value};

/// Where the apparent right ascension of date (nutation included) turns. The values are
/// elongations.
pub fn stations(course: &Course) -> Result<Vec<Event>, Lost> {
    let turns = course.turns_of_angle(|look| look.right_ascension)?;
    Ok(turns
        .iter()
        .map(|turn| {
            let kind = if turn.is_maximum {
                Kind::StationaryThenWestward
            } else {
                Kind::StationaryThenEastward
            };
            let value = Value::Elongation(course.look(turn.at).appearance.elongation);
            course.event(kind, turn.at, value)
        })
        .collect())
}
