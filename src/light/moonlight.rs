//! The sky lit by the Moon.

use super::twilight::cos;
use crate::place::Extinction;

/// The Moon as a lamp.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Moonlight {
    /// Refracted altitude of its centre, radians.
    pub altitude: f64,
    /// Azimuth, radians.
    pub azimuth: f64,
    /// V, outside the atmosphere.
    pub magnitude: f64,
}

/// cd/m² in a nanolambert.
pub(super) const CD_M2_PER_NL: f64 = 1e-5 / std::f64::consts::PI;

/// Krisciunas and Schaefer's airmass, which stays finite at the horizon (5).
pub(super) fn airmass(altitude: f64) -> f64 {
    let cos = altitude.max(0.0).cos();
    1.0 / (1.0 - 0.96 * cos * cos).sqrt()
}

impl Moonlight {
    /// Moonlight in the sky along an altitude (radians).
    ///
    /// Source: Krisciunas and Schaefer 1991 (PASP 103, 1033), eqs 3, 15, 18 to 21; their accuracy
    /// is 8 to 23 %. Two departures, both to avoid a step: within 10 deg of the Moon the larger
    /// of their two haze terms is taken, and the light comes up smoothly while the Moon rises
    /// from -4 to +4 deg, where the paper says nothing.
    pub(super) fn along(&self, extinction: &Extinction, altitude: f64) -> MoonRow {
        let illuminance = 10f64.powf(-0.4 * (self.magnitude + 16.57));
        let k = extinction.total_mag();
        let passed = |altitude: f64| 10f64.powf(-0.4 * k * airmass(altitude));
        let nanolamberts = illuminance * passed(self.altitude) * (1.0 - passed(altitude));
        MoonRow {
            azimuth: self.azimuth,
            along: altitude.sin() * self.altitude.sin(),
            across: altitude.cos() * self.altitude.cos(),
            scale: nanolamberts * CD_M2_PER_NL * self.part_up(),
        }
    }
    /// 0 below -4 deg, 1 above 4, smooth between.
    fn part_up(&self) -> f64 {
        let x = ((self.altitude.to_degrees() + 4.0) / 8.0).clamp(0.0, 1.0);
        x * x * (3.0 - 2.0 * x)
    }
}

/// Moonlight in the sky along one altitude.
#[derive(Clone, Copy, Debug)]
pub(super) struct MoonRow {
    azimuth: f64,
    along: f64,
    across: f64,
    scale: f64,
}

impl MoonRow {
    /// Luminance towards an azimuth (radians), cd/m².
    pub fn luminance(&self, azimuth: f64) -> f64 {
        if self.scale == 0.0 {
            return 0.0;
        }
        let cos_angle = (self.along + self.across * cos(azimuth - self.azimuth)).clamp(-1.0, 1.0);
        let angle_deg = cos_angle.acos().to_degrees();
        // 10^5.36 for air; for haze 10^(6.15 - angle / 40).
        let by_air = 229_086.8 * (1.06 + cos_angle * cos_angle);
        let mut by_haze = 1_412_537.5 * (-std::f64::consts::LN_10 / 40.0 * angle_deg).exp();
        if angle_deg < 10.0 {
            // No nearer than the Moon's own edge.
            by_haze = by_haze.max(6.2e7 / angle_deg.max(0.25).powi(2));
        }
        (by_air + by_haze) * self.scale
    }
}
