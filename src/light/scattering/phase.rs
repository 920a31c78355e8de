//! How air and haze turn light aside.

use std::f64::consts::PI;

/// Part of the light taken from the beam by haze that is scattered and not absorbed (common
/// practice for continental haze).
pub const HAZE_ALBEDO: f64 = 0.93;

/// Asymmetry of haze: the mean cosine of the angle that it turns light through.
///
/// 0.7 is the usual figure for continental haze. The lobe then gives 13.7, 7.0, 3.5, 0.73 and
/// 0.28 times the mean at 10, 20, 30, 60 and 90 deg, close to what Sun photometers measure in
/// country air (about 11, 6, 3.4, 0.8 and 0.3; from memory of AERONET climatologies).
const ASYMMETRY: f64 = 0.70;

/// Part of the light scattered by haze that counts as going straight on, and is left in the
/// beam while light is followed: the fourth moment of [`haze`], as in the delta-M method with
/// four streams (Wiscombe 1977, J. Atmos. Sci. 34, 1408). As much light is turned by less than
/// 15 deg, the height of the glow at dusk. (The second moment, of two streams, would carry along
/// light that in truth is turned into the ground, and make the horizon too bright.) The first
/// scattering seen by the eye keeps the whole function (Nakajima and Tanaka 1988, J. Quant.
/// Spectrosc. Radiat. Transfer 40, 51).
pub const HAZE_STRAIGHT_ON: f64 = ASYMMETRY * ASYMMETRY * ASYMMETRY * ASYMMETRY;

/// Chance per steradian of scattering by air through an angle of given cosine (Rayleigh).
pub fn air(cos_angle: f64) -> f64 {
    3.0 / (16.0 * PI) * (1.0 + cos_angle * cos_angle)
}

/// The same for haze: one forward lobe.
pub fn haze(cos_angle: f64) -> f64 {
    lobe(cos_angle, ASYMMETRY)
}

/// [`haze`] in units of its mean over all directions.
#[inline]
pub fn haze_of_mean(cos_angle: f32) -> f32 {
    const G: f32 = ASYMMETRY as f32;
    let d = 1.0 + G * G - 2.0 * G * cos_angle;
    (1.0 - G * G) / (d * d.sqrt())
}

/// The same for haze with the light that goes straight on taken out.
pub fn haze_aside(cos_angle: f64) -> f64 {
    lobe(
        cos_angle,
        (ASYMMETRY - HAZE_STRAIGHT_ON) / (1.0 - HAZE_STRAIGHT_ON),
    )
}

/// Henyey and Greenstein 1941 (Astrophys. J. 93, 70).
fn lobe(cos_angle: f64, g: f64) -> f64 {
    let d = 1.0 + g * g - 2.0 * g * cos_angle;
    (1.0 - g * g) / (4.0 * PI * d * d.sqrt())
}
