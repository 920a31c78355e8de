//! How air and haze turn light aside.

use std::f64::consts::PI;

/// Part of the light taken from the beam by haze that is scattered and not absorbed (common
/// practice for continental haze).
pub const HAZE_ALBEDO: f64 = 0.93;

/// Part of the light scattered by haze that goes almost straight on and is left in the beam
/// while light is followed: the second moment of [`haze`], as in the delta-Eddington method
/// (Joseph, Wiscombe and Weinman 1976, J. Atmos. Sci. 33, 2452). The first scattering seen by
/// the eye keeps the whole function (Nakajima and Tanaka 1988, J. Quant. Spectrosc. Radiat.
/// Transfer 40, 51).
pub const HAZE_STRAIGHT_ON: f64 =
    FORWARD * G_FORWARD * G_FORWARD + (1.0 - FORWARD) * G_BACK * G_BACK;

const FORWARD: f64 = 0.90;
const G_FORWARD: f64 = 0.80;
const G_BACK: f64 = -0.20;

/// Chance per steradian of scattering by air through an angle of given cosine (Rayleigh).
pub fn air(cos_angle: f64) -> f64 {
    3.0 / (16.0 * PI) * (1.0 + cos_angle * cos_angle)
}

/// The same for haze: a forward and a weak backward lobe, asymmetry 0.70 (from memory of
/// two-term fits to continental haze, Kattawar 1975, J. Quant. Spectrosc. Radiat. Transfer 15,
/// 839).
pub fn haze(cos_angle: f64) -> f64 {
    FORWARD * lobe(cos_angle, G_FORWARD) + (1.0 - FORWARD) * lobe(cos_angle, G_BACK)
}

/// The same for haze with the light that goes straight on taken out: one broad lobe.
pub fn haze_aside(cos_angle: f64) -> f64 {
    let g = FORWARD * G_FORWARD + (1.0 - FORWARD) * G_BACK;
    lobe(cos_angle, (g - HAZE_STRAIGHT_ON) / (1.0 - HAZE_STRAIGHT_ON))
}

/// Henyey and Greenstein 1941 (Astrophys. J. 93, 70).
fn lobe(cos_angle: f64, g: f64) -> f64 {
    let d = 1.0 + g * g - 2.0 * g * cos_angle;
    (1.0 - g * g) / (4.0 * PI * d * d.sqrt())
}
