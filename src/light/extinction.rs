//! How much of a body's light the air takes, in V.

use super::LightError;
use serde::{Deserialize, Serialize};

/// Extinction by air at sea level, magnitudes at the zenith, and its scale height.
///
/// Source: Schaefer 1998 (Sky & Telescope 95, 5, 57), V band, cone vision. (Green 1992 prints
/// 0.1451 for the same law at 0.51 µm, where the dark-adapted eye works.)
const GAS_MAG: f64 = 0.1066;
const GAS_SCALE_M: f64 = 8200.0;

/// Extinction by ozone (Schaefer 1998).
const OZONE_MAG: f64 = 0.031;

/// Height above which there is no ozone to speak of below it, km: the shell that it fills.
const OZONE_SHELL_KM: f64 = 20.0;
const EARTH_KM: f64 = 6378.0;

/// Scale height of haze, metres (Schaefer 1998).
const HAZE_SCALE_M: f64 = 1500.0;

/// The most that is accepted, magnitudes at the zenith: the Moon itself is hard to see through.
const MOST_MAG: f64 = 2.0;

/// How hazy the air is, in words that a host can choose.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, Serialize, Deserialize)]
pub enum Haze {
    /// A washed sky after rain, far hills sharp.
    VeryClear,
    /// A good evening in the country.
    Clear,
    /// White near the horizon, far hills pale.
    Hazy,
    /// The Sun sets before it reaches the horizon.
    Murky,
}

impl Haze {
    /// All of them, from the clearest.
    pub const ALL: [Self; 4] = [Self::VeryClear, Self::Clear, Self::Hazy, Self::Murky];

    /// Extinction by haze alone at sea level, magnitudes at the zenith; it falls with elevation
    /// by e every 1.5 km.
    ///
    /// Chosen so that totals at sea level are 0.18, 0.25, 0.40 and 0.65: clear country air 0.20,
    /// an average lowland 0.25 to 0.30, hazy 0.4 and murky 0.6 are common practice; Schaefer 1998
    /// takes 0.1 for haze in dry air.
    pub const fn sea_level_mag(self) -> f64 {
        match self {
            Self::VeryClear => 0.04,
            Self::Clear => 0.11,
            Self::Hazy => 0.26,
            Self::Murky => 0.51,
        }
    }
}

/// Extinction at a site: the parts at the zenith, and their sum towards any altitude.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Extinction {
    elevation_m: f64,
    gas_mag: f64,
    ozone_mag: f64,
    aerosol_mag: f64,
}

impl Extinction {
    /// Air with no haze at all: the least possible at that elevation.
    ///
    /// # Errors
    /// An elevation outside -500 to 6000 m.
    pub fn cleanest(elevation_m: f64) -> Result<Self, LightError> {
        LightError::check("elevation in metres", elevation_m, -500.0, 6000.0)?;
        Ok(Self {
            elevation_m,
            gas_mag: GAS_MAG * (-elevation_m / GAS_SCALE_M).exp(),
            ozone_mag: OZONE_MAG,
            aerosol_mag: 0.0,
        })
    }
    /// The extinction that a word for the haze stands for.
    ///
    /// # Errors
    /// An elevation outside -500 to 6000 m.
    pub fn from_haze(haze: Haze, elevation_m: f64) -> Result<Self, LightError> {
        let mut extinction = Self::cleanest(elevation_m)?;
        extinction.aerosol_mag = haze.sea_level_mag() * (-elevation_m / HAZE_SCALE_M).exp();
        Ok(extinction)
    }
    /// The extinction with a given total at the zenith (V); haze is what air and ozone leave.
    ///
    /// # Errors
    /// An elevation outside -500 to 6000 m, or a total that is below what air and ozone take
    /// there, above 2 or not finite.
    pub fn from_total(total_mag: f64, elevation_m: f64) -> Result<Self, LightError> {
        let mut extinction = Self::cleanest(elevation_m)?;
        let least_mag = extinction.total_mag();
        if !(least_mag..=MOST_MAG).contains(&total_mag) {
            return Err(LightError::ImpossibleExtinction {
                total_mag,
                elevation_m,
                least_mag,
                most_mag: MOST_MAG,
            });
        }
        extinction.aerosol_mag = total_mag - least_mag;
        Ok(extinction)
    }
    /// The same air with its haze multiplied, for the spread of a sighting. The total stays
    /// within what is accepted.
    #[must_use]
    pub fn with_haze_times(mut self, factor: f64) -> Self {
        let most = MOST_MAG - self.gas_mag - self.ozone_mag;
        self.aerosol_mag = (self.aerosol_mag * factor).clamp(0.0, most);
        self
    }
    /// Elevation of the site, metres.
    pub fn elevation_m(&self) -> f64 {
        self.elevation_m
    }
    /// The part by haze, magnitudes at the zenith.
    pub fn aerosol_mag(&self) -> f64 {
        self.aerosol_mag
    }
    /// All of it, magnitudes at the zenith.
    pub fn total_mag(&self) -> f64 {
        self.gas_mag + self.ozone_mag + self.aerosol_mag
    }
    /// Extinction towards a refracted altitude (radians), magnitudes. Below the horizon it stays
    /// as at the horizon.
    ///
    /// Source: Schaefer 1998, an airmass formula for each part.
    pub fn towards(&self, altitude: f64) -> f64 {
        let c = altitude.max(0.0).sin();
        let gas = 1.0 / (c + 0.0286 * (-10.5 * c).exp());
        let aerosol = 1.0 / (c + 0.0123 * (-24.5 * c).exp());
        let sin_in_shell = altitude.max(0.0).cos() / (1.0 + OZONE_SHELL_KM / EARTH_KM);
        let ozone = 1.0 / (1.0 - sin_in_shell * sin_in_shell).sqrt();
        self.gas_mag * gas + self.aerosol_mag * aerosol + self.ozone_mag * ozone
    }
}
