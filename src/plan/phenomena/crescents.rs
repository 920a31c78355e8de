//! Half phase, largest lit area and greatest brightness of the inner planets.

use super::course::{Course, Look};
use super::search::Lost;
use super::{Event, Kind, Value};
use crate::measure::Angle;

/// Phase angles between which Venus's greatest brightness as a crescent is looked for: its
/// brightness has turns of no account near superior conjunction, and beyond the second angle the
/// magnitude formula (Mallama & Hilton 2018) is another one, fitted to the thinnest crescents.
const CRESCENT_PHASE_ANGLES_DEG: std::ops::Range<f64> = 90.0..163.7;

/// Where the phase angle is 90°. The values are elongations.
pub fn dichotomies(course: &Course) -> Result<Vec<Event>, Lost> {
    const HALF: Angle = Angle::from_degrees(90.0);
    let found = course.zeros(|look| (look.appearance.phase_angle - HALF).radians())?;
    Ok(found
        .iter()
        .map(|crossing| {
            let look = course.look(crossing.at);
            let value = Value::Elongation(look.appearance.elongation);
            course.event(Kind::Dichotomy(look.side()), crossing.at, value)
        })
        .collect())
}

/// Where the lit area in the sky is at a maximum.
pub fn greatest_illuminated_extents(course: &Course) -> Result<Vec<Event>, Lost> {
    Ok(course
        .maxima(Look::lit_area_arcsec2, |_| true)?
        .iter()
        .map(|at| {
            let look = course.look(*at);
            let value = Value::LitAreaArcsec2(look.lit_area_arcsec2());
            course.event(Kind::GreatestIlluminatedExtent(look.side()), *at, value)
        })
        .collect())
}

/// Where the magnitude of the crescent is at a minimum.
pub fn magnitude_minima(course: &Course) -> Result<Vec<Event>, Lost> {
    // Venus's formula gives a number at every phase angle.
    let magnitude = |look: &Look| look.appearance.magnitude.value().unwrap_or(f64::NAN);
    let is_crescent =
        |look: &Look| CRESCENT_PHASE_ANGLES_DEG.contains(&look.appearance.phase_angle.degrees());
    Ok(course
        .maxima(|look| -magnitude(look), is_crescent)?
        .iter()
        .map(|at| {
            let look = course.look(*at);
            let value = Value::Magnitude(magnitude(&look));
            course.event(Kind::MagnitudeMinimum(look.side()), *at, value)
        })
        .collect())
}
