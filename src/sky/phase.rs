//! Elongation, phase, apparent size and orientation.

use super::magnitude::Magnitude;
use crate::measure::Angle;

/// What a body looks like from a place.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Appearance {
    /// Angle from the Sun's centre, [0°, 180°].
    pub elongation: Angle,
    /// Whether the body stands east of the Sun by ecliptic longitude (sets after it).
    pub is_east_of_sun: bool,
    /// Sun-body-observer angle when the light left, [0°, 180°].
    pub phase_angle: Angle,
    /// Illuminated fraction of the disc, [0, 1].
    pub illuminated_fraction: f64,
    /// Equatorial angular diameter.
    pub diameter: Angle,
    /// Position angle of the middle of the bright limb, north through east, [0°, 360°).
    pub bright_limb: Angle,
    /// Distance when the light left, au.
    pub distance_au: f64,
    /// Visual magnitude.
    pub magnitude: Magnitude,
}
