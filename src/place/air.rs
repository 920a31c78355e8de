//! The air and the night sky of a site, as its file states them.

use super::limits;
use crate::sky::Air;
use serde::{Deserialize, Serialize};

/// The air over a site. Everything may be left out.
#[derive(Clone, Copy, Debug, PartialEq, Serialize, Deserialize)]
#[serde(rename = "Air", deny_unknown_fields)]
pub struct SiteAir {
    /// Pressure at the site itself, hPa; left out, the standard atmosphere's at its elevation.
    #[serde(
        default,
        deserialize_with = "limits::optional::pressure_hpa",
        skip_serializing_if = "Option::is_none"
    )]
    pub pressure_hpa: Option<f64>,
    /// Temperature, °C; 10 where it is left out.
    #[serde(
        default = "usual_temperature_c",
        deserialize_with = "limits::temperature_c"
    )]
    pub temperature_c: f64,
    /// What the whole air takes at the zenith in the V band, magnitudes. Not with `haze`.
    #[serde(
        default,
        deserialize_with = "limits::optional::extinction_mag",
        skip_serializing_if = "Option::is_none"
    )]
    pub extinction_mag: Option<f64>,
    /// The same in a word; `Clear` where both are left out.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub haze: Option<Haze>,
}

/// How hazy the air is, in a word.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, Serialize, Deserialize)]
pub enum Haze {
    /// Distant hills are sharp.
    VeryClear,
    /// A usual good night.
    Clear,
    /// Distant hills are pale.
    Hazy,
    /// Distant hills are gone.
    Murky,
}

impl Haze {
    /// All of them, from clear to thick.
    pub const ALL: [Self; 4] = [Self::VeryClear, Self::Clear, Self::Hazy, Self::Murky];
}

/// What each part of the air takes at the zenith in the V band, magnitudes.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Extinction {
    /// Scattering by the air's molecules.
    pub rayleigh_mag: f64,
    /// Absorption by ozone.
    pub ozone_mag: f64,
    /// Dust and haze.
    pub aerosol_mag: f64,
}

impl Haze {
    /// What this haze takes at the zenith in the V band, magnitudes.
    ///
    /// Common practice: with clean air at sea level the totals are about 0.20, 0.25, 0.40 and
    /// 0.60. A word describes the air that people see around them, so it is not thinned out
    /// with elevation.
    pub const fn aerosol_mag(self) -> f64 {
        match self {
            Self::VeryClear => 0.06,
            Self::Clear => 0.11,
            Self::Hazy => 0.26,
            Self::Murky => 0.46,
        }
    }
}

impl Extinction {
    /// Clean air at an elevation: 0.1066 exp(-elevation / 8.2 km) by scattering and 0.031 by
    /// ozone.
    ///
    /// Source: Schaefer, Sky & Telescope, May 1998, V band, with ozone at its mean over the
    /// seasons and latitudes.
    pub fn of_clean_air(elevation_m: f64) -> Self {
        Self {
            rayleigh_mag: 0.1066 * (-elevation_m / 8200.0).exp(),
            ozone_mag: 0.031,
            aerosol_mag: 0.0,
        }
    }

    /// All of it, magnitudes.
    pub fn total_mag(&self) -> f64 {
        self.rayleigh_mag + self.ozone_mag + self.aerosol_mag
    }
}

impl SiteAir {
    /// What refraction is worked out with.
    pub(super) fn at_elevation(&self, elevation_m: f64) -> Air {
        Air {
            pressure_hpa: self
                .pressure_hpa
                .unwrap_or_else(|| standard_pressure_hpa(elevation_m)),
            temperature_c: self.temperature_c,
        }
    }

    /// The extinction's parts: a stated total less clean air's share, or the haze word's.
    pub(super) fn extinction(&self, elevation_m: f64) -> Extinction {
        let clean = Extinction::of_clean_air(elevation_m);
        let aerosol_mag = match self.extinction_mag {
            Some(total_mag) => total_mag - clean.total_mag(),
            None => self.haze.unwrap_or(Haze::Clear).aerosol_mag(),
        };
        Extinction {
            aerosol_mag,
            ..clean
        }
    }
}

impl Default for SiteAir {
    fn default() -> Self {
        Self {
            pressure_hpa: None,
            temperature_c: usual_temperature_c(),
            extinction_mag: None,
            haze: None,
        }
    }
}

fn usual_temperature_c() -> f64 {
    10.0
}

/// Pressure of the standard atmosphere, hPa, below 11 km.
///
/// Source: ISO 2533:1975, 1013.25 hPa and 288.15 K at sea level, falling 6.5 K a kilometre.
pub fn standard_pressure_hpa(elevation_m: f64) -> f64 {
    1013.25 * (1.0 - 0.0065 / 288.15 * elevation_m).powf(5.25588)
}

/// The night sky over a site.
#[derive(Clone, Copy, Debug, PartialEq, Serialize, Deserialize)]
#[serde(rename = "Sky", deny_unknown_fields)]
pub struct SiteSky {
    /// Its brightness at the zenith without Moon or twilight, V mag/arcsec².
    #[serde(
        default = "usual_dark_mag_arcsec2",
        deserialize_with = "limits::dark_mag_arcsec2"
    )]
    pub dark_mag_arcsec2: f64,
}

impl Default for SiteSky {
    fn default() -> Self {
        Self {
            dark_mag_arcsec2: usual_dark_mag_arcsec2(),
        }
    }
}

/// The edge of a town (common practice).
fn usual_dark_mag_arcsec2() -> f64 {
    20.5
}
