//! The air and the night sky of a site.

use super::LightError;
use super::moonlight::airmass;
use crate::place::{Extinction, Site};

/// Luminance of 0 mag per square arcsecond, cd/m² (common practice).
const ZERO_MAG_CD_M2: f64 = 1.08e5;

/// A sky as dark as nature makes it, mag per square arcsecond: what is brighter is lamps.
const NATURAL_MAG: f64 = 21.8;

/// Luminance in cd/m² of a surface brightness in mag per square arcsecond.
pub fn luminance_from_mag_arcsec2(mag_arcsec2: f64) -> f64 {
    ZERO_MAG_CD_M2 * 10f64.powf(-0.4 * mag_arcsec2)
}

/// Surface brightness in mag per square arcsecond of a luminance in cd/m².
pub fn mag_arcsec2_from_luminance(luminance: f64) -> f64 {
    -2.5 * (luminance / ZERO_MAG_CD_M2).log10()
}

/// The air and the night sky of a site.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Conditions {
    extinction: Extinction,
    elevation_m: f64,
    dark_mag_arcsec2: f64,
}

impl Conditions {
    /// The air over a site at an elevation, and the brightness of its zenith on a moonless
    /// night, magnitudes per square arcsecond.
    ///
    /// # Errors
    /// A part of the extinction outside 0 to 3 mag, an elevation outside -450 to 9000 m, a
    /// surface brightness outside 14 to 22.5, or a figure that is not finite.
    pub fn new(
        extinction: Extinction,
        elevation_m: f64,
        dark_mag_arcsec2: f64,
    ) -> Result<Self, LightError> {
        let Extinction {
            rayleigh_mag,
            ozone_mag,
            aerosol_mag,
        } = extinction;
        for part in [rayleigh_mag, ozone_mag, aerosol_mag] {
            LightError::check("extinction in magnitudes at the zenith", part, 0.0, 3.0)?;
        }
        LightError::check("elevation in metres", elevation_m, -450.0, 9000.0)?;
        let what = "dark sky in magnitudes per square arcsecond";
        LightError::check(what, dark_mag_arcsec2, 14.0, 22.5)?;
        Ok(Self {
            extinction,
            elevation_m,
            dark_mag_arcsec2,
        })
    }
    /// The conditions that a site file states.
    ///
    /// # Errors
    /// As [`Conditions::new`]; a site that was read from a file has none.
    pub fn of_site(site: &Site) -> Result<Self, LightError> {
        Self::new(
            site.extinction(),
            site.elevation_m,
            site.sky.dark_mag_arcsec2,
        )
    }
    /// The extinction's parts at the zenith.
    pub fn extinction(&self) -> &Extinction {
        &self.extinction
    }
    /// Elevation of the site, metres.
    pub fn elevation_m(&self) -> f64 {
        self.elevation_m
    }
    /// The same site with its haze multiplied.
    #[must_use]
    pub fn with_haze_times(mut self, factor: f64) -> Self {
        self.extinction.aerosol_mag = (self.extinction.aerosol_mag * factor).clamp(0.0, 3.0);
        self
    }
    /// Luminance of the night sky without Sun and Moon at an altitude (radians), cd/m²: airglow
    /// brightens towards the horizon as its layer is seen more and more edge-on, and lamps are
    /// taken to do the same.
    ///
    /// Source: Krisciunas and Schaefer 1991 (PASP 103, 1033), eq. 1.
    pub fn night_luminance(&self, altitude: f64) -> f64 {
        let x = airmass(altitude);
        let dimming = 10f64.powf(-0.4 * self.extinction.total_mag() * (x - 1.0));
        luminance_from_mag_arcsec2(self.dark_mag_arcsec2) * x * dimming
    }
    /// Part of that light that comes from lamps.
    pub(super) fn part_from_lamps(&self) -> f64 {
        (1.0 - 10f64.powf(-0.4 * (NATURAL_MAG - self.dark_mag_arcsec2))).max(0.0)
    }
}
