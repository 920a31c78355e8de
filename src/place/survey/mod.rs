//! Ways to measure what stands around a spot, each with the error that it makes.
//!
//! [`compass`]: readings of compass and clinometer. [`height`]: pacing or tape, with a stick or a
//! shadow. [`timed`]: the minute at which a body went behind something, and the Sun's shadow as
//! a compass. [`photo`]: an outline traced over a photograph. They end in [`SkylinePoint`]s, in
//! metres or in a bearing, and may be mixed freely: [`compass::merged`] puts points from any of
//! them into a measured skyline.
//!
//! Bearings are azimuths from true north unless their name says otherwise.

pub mod compass;
pub mod height;
pub mod photo;
pub mod timed;

use super::SkylinePoint;
use crate::measure::Angle;
use std::fmt;

/// Why a measurement is refused: one sentence.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct SurveyError(pub String);

impl fmt::Display for SurveyError {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(&self.0)
    }
}

impl std::error::Error for SurveyError {}

/// A number between two limits, both allowed.
///
/// # Errors
/// It lies outside or is not a number; `what` begins the sentence, `unit` ends it.
fn within(what: &str, value: f64, low: f64, high: f64, unit: &str) -> Result<f64, SurveyError> {
    if (low..=high).contains(&value) {
        Ok(value)
    } else {
        Err(SurveyError(format!(
            "{what} is {value}, but must lie between {low} and {high} {unit}"
        )))
    }
}

/// A direction as a skyline's point.
///
/// # Errors
/// The altitude lies outside what a skyline can hold, [-10°, 90°], or is not a number.
fn skyline_point(azimuth: Angle, altitude: Angle) -> Result<SkylinePoint, SurveyError> {
    let azimuth_deg = azimuth.wrapped().degrees();
    Ok(SkylinePoint {
        // A hair below a whole turn may round up to it in degrees.
        azimuth_deg: if azimuth_deg >= 360.0 {
            0.0
        } else {
            azimuth_deg
        },
        altitude_deg: within("the altitude", altitude.degrees(), -10.0, 90.0, "degrees")?,
    })
}
