//! What blocks the view, per azimuth, from one spot.

use crate::measure::Angle;

/// The altitude of everything that blocks the view, per azimuth, as seen from one spot.
#[derive(Clone, Debug, Default)]
pub struct Skyline {}

impl Skyline {
    /// Altitude of the skyline at an azimuth; never below 0.
    pub fn altitude(&self, _azimuth: Angle) -> Angle {
        todo!()
    }
    /// The highest altitude that it reaches anywhere.
    pub fn highest(&self) -> Angle {
        todo!()
    }
    /// What blocks there, by its label: an obstacle, or `None` for the measured skyline.
    pub fn label(&self, _azimuth: Angle) -> Option<&str> {
        todo!()
    }
    /// Azimuths in [0°, 360°), ascending, where the skyline jumps or bends: between neighbours
    /// it is smooth, so a search that looks at these misses nothing narrow.
    pub fn breaks(&self) -> &[Angle] {
        todo!()
    }
}
