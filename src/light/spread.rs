//! How far a sighting may stray from the figure given.

use super::{Conditions, Gaze};

/// How much haze and eyes differ from what is assumed, to either side.
///
/// A window is found three times: as assumed, at its kindest and at its harshest.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Spread {
    /// Haze may be so many times thicker or thinner.
    pub haze_factor: f64,
    /// Eyes, and the sky's brightness, may differ by so many magnitudes together.
    pub eye_mag: f64,
}

impl Default for Spread {
    /// Half as much haze again, as between one good evening and the next, and 0.5 mag, the
    /// spread between practised observers (common practice; half-widths).
    fn default() -> Self {
        Self {
            haze_factor: 1.5,
            eye_mag: 0.5,
        }
    }
}

impl Spread {
    /// The clearer air and the sharper eye.
    pub fn kindest(&self, conditions: &Conditions, gaze: &Gaze) -> (Conditions, Gaze) {
        let conditions = conditions.with_haze_times(1.0 / self.haze_factor);
        (conditions, gaze.sharper_by(self.eye_mag))
    }
    /// The thicker air and the duller eye.
    pub fn harshest(&self, conditions: &Conditions, gaze: &Gaze) -> (Conditions, Gaze) {
        let conditions = conditions.with_haze_times(self.haze_factor);
        (conditions, gaze.sharper_by(-self.eye_mag))
    }
}
