//! The site file.
use super::Skyline;
use crate::sky::Observer;
use chrono_tz::Tz;

/// A place with coordinates, elevation, time zone, sky quality and haze.
#[derive(Clone, Debug, PartialEq)]
pub struct Site {
    /// Its name.
    pub name: String,
    /// Standing positions; never empty, the first is the mark unless the file says otherwise.
    pub spots: Vec<Spot>,
}
/// A named standing position.
#[derive(Clone, Debug, PartialEq)]
pub struct Spot {
    /// Its name.
    pub name: String,
}
/// Why a site file is refused: one sentence.
#[derive(Clone, Debug, PartialEq)]
pub struct SiteError(pub String);
impl Site {
    /// Where and in what air the observer stands.
    pub fn observer(&self) -> Observer {
        todo!()
    }
    /// The civil zone.
    pub fn zone(&self) -> Tz {
        todo!()
    }
    /// The skyline seen from a spot: the highest of the measured skyline and the obstacles.
    pub fn skyline(&self, _spot: &Spot) -> Skyline {
        todo!()
    }
}
