//! Who looks: a place on the Earth and the air there.

use crate::measure::Angle;

/// The air at a place, for refraction.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Air {
    /// Pressure at the place itself (not reduced to sea level), hPa.
    pub pressure_hpa: f64,
    /// Temperature, °C.
    pub temperature_c: f64,
}

impl Default for Air {
    /// The air that Sæmundsson's refraction is printed for: 1010 hPa, 10 °C.
    fn default() -> Self {
        Self {
            pressure_hpa: 1010.0,
            temperature_c: 10.0,
        }
    }
}

/// A place on the Earth and the air there.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Observer {
    /// Geodetic latitude (WGS84), north positive.
    pub latitude: Angle,
    /// Longitude, east positive.
    pub longitude: Angle,
    /// Height above the WGS84 ellipsoid, metres.
    pub elevation_m: f64,
    /// The air there.
    pub air: Air,
}
