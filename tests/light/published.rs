//! Published measurements that several checks use, and the skies to compare them with.

use dimmet::light::{Conditions, Glow, SkyLight, mag_arcsec2_from_luminance};
use dimmet::place::Extinction;
use std::f64::consts::FRAC_PI_2;

/// Sun altitudes of [`MOUNTAIN`], [`LOWLAND`] and [`PARANAL`], degrees.
pub const SUN_ALTITUDES_DEG: [f64; 6] = [0.0, -3.0, -6.0, -9.0, -12.0, -15.0];

/// Zenith luminance, cd/m²: Koomen et al. 1952 (J. Opt. Soc. Am. 42, 353), Sacramento Peak,
/// 2800 m; 8.0 to 2.0e-5 cd/ft².
pub const MOUNTAIN: [f64; 6] = [86.0, 10.8, 0.237, 8.1e-3, 8.2e-4, 2.2e-4];

/// The same, Maryland, 30 m; 15 to 4e-5 cd/ft².
pub const LOWLAND: [f64; 6] = [161.0, 21.5, 0.65, 1.6e-2, 1.3e-3, 4.3e-4];

/// Zenith surface brightness in V, mag/arcsec²: Patat et al. 2006 (A&A 455, 385), Paranal,
/// 2600 m, from their fit for Sun zenith distances 95 to 105.
pub const PARANAL: [Option<f64>; 6] = [
    None,
    None,
    Some(13.30),
    Some(17.00),
    Some(19.67),
    Some(21.32),
];

/// Darkness of the zenith that the twilight checks assume, mag/arcsec².
pub const NATURAL_DARK: f64 = 21.7;

/// Haze at sea level, magnitudes at the zenith, at half of the humidity that air can hold:
/// Schaefer 1998, 0.1 (1 - 0.32 / ln 0.5)^1.33. It falls by e every 1.5 km.
const USUAL_HAZE_MAG: f64 = 0.166;

fn usual(elevation_m: f64) -> SkyLight {
    sky(
        USUAL_HAZE_MAG * (-elevation_m / 1500.0).exp(),
        elevation_m,
        NATURAL_DARK,
    )
}

/// Usual air at the height of Koomen's Maryland.
pub fn lowland() -> SkyLight {
    usual(30.0)
}

/// Usual air at the height of Sacramento Peak.
pub fn mountain() -> SkyLight {
    usual(2800.0)
}

pub fn sky(aerosol_mag: f64, elevation_m: f64, dark_mag_arcsec2: f64) -> SkyLight {
    let extinction = Extinction {
        aerosol_mag,
        ..Extinction::of_clean_air(elevation_m)
    };
    SkyLight::new(Conditions::new(extinction, elevation_m, dark_mag_arcsec2).unwrap())
}

/// The sky at a Sun altitude in degrees, the Sun due north, without the Moon.
pub fn moonless(site: &SkyLight, sun_altitude_deg: f64) -> Glow<'_> {
    site.at(sun_altitude_deg.to_radians(), 0.0, None)
}

/// Luminance at the zenith, cd/m².
pub fn zenith(glow: &Glow<'_>) -> f64 {
    glow.luminance(FRAC_PI_2, 0.0).total()
}

/// Surface brightness of the zenith at a Sun altitude in degrees, mag/arcsec².
pub fn zenith_mag(site: &SkyLight, sun_altitude_deg: f64) -> f64 {
    mag_arcsec2_from_luminance(zenith(&moonless(site, sun_altitude_deg)))
}
