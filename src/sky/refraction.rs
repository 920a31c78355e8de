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

/// How far a sea horizon lies below the level one, seen from a height above the sea.
pub fn dip(_height_m: f64) -> Angle {
    todo!()
}
