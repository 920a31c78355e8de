//! Refraction of starlight near the horizon, and the dip of a sea horizon.

use super::Air;
use crate::measure::Angle;

/// How much refraction lifts a body above its airless altitude.
///
/// Source: Sæmundsson 1986 (Sky & Telescope 72, 70; Meeus, *Astronomical Algorithms*, 2nd ed.,
/// eq. 16.4), scaled by pressure and temperature (p. 107). Below -1° the value at -1° is held.
pub fn refraction(airless_altitude: Angle, air: &Air) -> Angle {
    let h = airless_altitude.degrees().max(-1.0);
    let arcmin = 1.02 / Angle::from_degrees(h + 10.3 / (h + 5.11)).tan();
    let density = air.pressure_hpa / 1010.0 * 283.0 / (273.0 + air.temperature_c);
    // The cotangent crosses zero just below the zenith.
    Angle::from_arcmin(arcmin.max(0.0) * density)
}

/// The refracted altitude of an airless one.
pub fn refracted(airless_altitude: Angle, air: &Air) -> Angle {
    airless_altitude + refraction(airless_altitude, air)
}

/// The airless altitude whose refracted altitude is the given one: the inverse of [`refracted`].
///
/// Solved from that formula itself, so that going there and back gives the same altitude; a
/// separate formula for apparent altitudes (Bennett 1982) would differ by 0.1 arcmin.
pub fn airless(refracted_altitude: Angle, air: &Air) -> Angle {
    // Refraction falls with altitude by less than half as fast as altitude grows, so each step
    // at least halves the error.
    let mut altitude = refracted_altitude;
    for _ in 0..60 {
        let next = refracted_altitude - refraction(altitude, air);
        if (next - altitude).abs().radians() < 1e-14 {
            return next;
        }
        altitude = next;
    }
    altitude
}

/// How far a sea horizon lies below the level of an eye so high above the water, refraction
/// along the line of sight included. Nothing for an eye at or below the water.
///
/// Source: the dip table of the *Nautical Almanac*, 1.76 arcmin times the root of the height
/// in metres.
pub fn dip(eye_height_m: f64) -> Angle {
    Angle::from_arcmin(1.76 * eye_height_m.max(0.0).sqrt())
}
