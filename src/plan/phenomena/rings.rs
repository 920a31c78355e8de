//! Saturn's rings: how far they open, and when they are seen edge-on.

use super::course::Course;
use super::search::Lost;
use super::{Event, Kind, Value};

/// Turns of the ring opening and its passages through zero. The values carry the sign of the
/// latitude: positive while the north face is seen.
pub fn rings(course: &Course) -> Result<Vec<Event>, Lost> {
    let value = |at: f64| Value::RingOpening(course.look(at).ring_opening);
    let mut found: Vec<Event> = course
        .turns(|look| look.ring_opening.radians())?
        .iter()
        .map(|turn| {
            let is_north = course.look(turn.at).ring_opening.radians() > 0.0;
            let kind = if turn.is_maximum == is_north {
                Kind::RingOpeningGreatest
            } else {
                Kind::RingOpeningLeast
            };
            course.event(kind, turn.at, value(turn.at))
        })
        .collect();
    let crossings = course.zeros(|look| look.ring_opening.radians())?;
    found.extend(
        crossings
            .iter()
            .map(|crossing| course.event(Kind::RingPlaneCrossing, crossing.at, value(crossing.at))),
    );
    Ok(found)
}
