//! How much of a body's light the air takes, in V, by the altitude it is seen at.

use crate::place::Extinction;

/// Height of the ozone layer and the Earth's radius, km, as Schaefer has them.
const OZONE_KM: f64 = 20.0;
const EARTH_KM: f64 = 6378.0;

/// Magnitudes that the air takes from a body at a refracted altitude (radians). Below the
/// horizon it stays as at the horizon.
///
/// Source: Schaefer 1998 (Sky & Telescope 95, 5, 57), an airmass formula for each part.
pub fn extinction_mag(zenith: &Extinction, altitude: f64) -> f64 {
    let (c, cos_altitude) = altitude.max(0.0).sin_cos();
    let air = 1.0 / (c + 0.0286 * (-10.5 * c).exp());
    let haze = 1.0 / (c + 0.0123 * (-24.5 * c).exp());
    let sine_at_ozone = cos_altitude / (1.0 + OZONE_KM / EARTH_KM);
    let ozone = 1.0 / (1.0 - sine_at_ozone * sine_at_ozone).sqrt();
    zenith.rayleigh_mag * air + zenith.aerosol_mag * haze + zenith.ozone_mag * ozone
}
