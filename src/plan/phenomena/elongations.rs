//! Greatest elongations of Mercury and Venus.

use super::course::Course;
use super::search::Lost;
use super::{Event, Kind, Value};

/// Where the apparent angle from the Sun's centre is at a maximum.
///
/// Its minima are left alone: near a conjunction the angle can turn as sharply as the Sun's centre
/// is passed closely.
pub fn greatest_elongations(course: &Course) -> Result<Vec<Event>, Lost> {
    Ok(course
        .maxima(|look| look.appearance.elongation.radians(), |_| true)?
        .iter()
        .map(|at| {
            let look = course.look(*at);
            let value = Value::Elongation(look.appearance.elongation);
            course.event(Kind::GreatestElongation(look.side()), *at, value)
        })
        .collect())
}
