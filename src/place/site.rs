//! A site and its spots.

use super::obstacle::PlanPoint;
use super::{
    Extinction, Haze, Instrument, Obstacle, SiteAir, SiteEyes, SiteSky, Skyline, SkylinePoint,
};
use super::{limits, measured, silhouette, zone};
use crate::measure::Angle;
use crate::sky::Observer;
use chrono_tz::Tz;
use serde::de::Error;
use serde::{Deserialize, Deserializer, Serialize};
use std::fmt;
use std::path::PathBuf;
use std::sync::Arc;

/// A place with coordinates, elevation, time zone, sky quality and haze. Its fields are those of
/// the site file; name, coordinates and time zone must be given, the rest may be left out there.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Site {
    /// Version of the file's form; 1 is today's and is meant where it is left out.
    #[serde(
        default,
        deserialize_with = "known_version",
        skip_serializing_if = "Option::is_none"
    )]
    pub version: Option<u32>,
    /// Its name.
    #[serde(deserialize_with = "limits::name")]
    pub name: String,
    /// Geodetic latitude (WGS84), degrees, north positive.
    #[serde(deserialize_with = "limits::latitude_deg")]
    pub latitude_deg: f64,
    /// Longitude, degrees, east positive, [-180, 180].
    #[serde(deserialize_with = "limits::longitude_deg")]
    pub longitude_deg: f64,
    /// Elevation, m. Above sea level or the ellipsoid: they differ by at most 110 m, which no
    /// time or altitude here can show.
    #[serde(default, deserialize_with = "limits::elevation_m")]
    pub elevation_m: f64,
    /// Civil zone by its IANA name.
    #[serde(deserialize_with = "zone_by_name")]
    pub time_zone: Tz,
    /// The air.
    #[serde(default)]
    pub air: SiteAir,
    /// The night sky.
    #[serde(default)]
    pub sky: SiteSky,
    /// Standing positions; never empty, the first is the mark unless the file says otherwise.
    #[serde(default)]
    pub spots: Vec<Spot>,
    /// The skyline as measured from the mark, in ascending azimuth. The other spots use it
    /// unchanged, so it should hold what is far away; what is near belongs to `obstacles`.
    #[serde(
        default,
        deserialize_with = "measured::ascending",
        skip_serializing_if = "Vec::is_empty"
    )]
    pub skyline: Vec<SkylinePoint>,
    /// What stands on and around the grounds.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub obstacles: Vec<Obstacle>,
    /// Path of an elevation tile. Kept when a file is read and written, but **not used**: the
    /// skyline does not look at terrain yet ([`Site::ignores_terrain`]).
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub terrain: Option<PathBuf>,
    /// How much light the people here need, where that is known to differ.
    #[serde(default, skip_serializing_if = "SiteEyes::is_usual")]
    pub eyes: SiteEyes,
    /// Instruments that visitors look through.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub kit: Vec<Instrument>,
}

/// A named standing position. Its ground is level with the mark's.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Spot {
    /// Its name.
    #[serde(deserialize_with = "limits::name")]
    pub name: String,
    /// East of the mark, m.
    #[serde(default, deserialize_with = "limits::east_m")]
    pub east_m: f64,
    /// North of the mark, m.
    #[serde(default, deserialize_with = "limits::north_m")]
    pub north_m: f64,
    /// Height of the eye over the ground, m; 1.6 where it is left out.
    #[serde(
        default = "usual_eye_height_m",
        deserialize_with = "limits::eye_height_m"
    )]
    pub eye_height_m: f64,
}

/// Why a site, its file or a table is refused: one sentence with the file, line and column where
/// they are known.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct SiteError(pub String);

impl fmt::Display for SiteError {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(&self.0)
    }
}

impl std::error::Error for SiteError {}

impl Spot {
    /// The site's mark, at a standing adult's eye height.
    pub fn mark() -> Self {
        Self {
            name: "mark".into(),
            east_m: 0.0,
            north_m: 0.0,
            eye_height_m: usual_eye_height_m(),
        }
    }

    pub(super) fn plan_point(&self) -> PlanPoint {
        PlanPoint {
            east_m: self.east_m,
            north_m: self.north_m,
        }
    }
}

impl Site {
    /// A site with nothing but what must be given: level horizon, one spot, clear air.
    ///
    /// # Errors
    /// The name is empty, or a coordinate is not a number or out of range.
    pub fn new(
        name: &str,
        latitude_deg: f64,
        longitude_deg: f64,
        time_zone: Tz,
    ) -> Result<Self, SiteError> {
        let site = Self {
            version: Some(1),
            name: name.into(),
            latitude_deg,
            longitude_deg,
            elevation_m: 0.0,
            time_zone,
            air: SiteAir::default(),
            sky: SiteSky::default(),
            spots: vec![Spot::mark()],
            skyline: Vec::new(),
            obstacles: Vec::new(),
            terrain: None,
            eyes: SiteEyes::default(),
            kit: Vec::new(),
        };
        site.check()?;
        Ok(site)
    }

    /// Where and in what air the observer stands.
    pub fn observer(&self) -> Observer {
        Observer {
            latitude: Angle::from_degrees(self.latitude_deg),
            longitude: Angle::from_degrees(self.longitude_deg),
            elevation_m: self.elevation_m,
            air: self.air.at_elevation(self.elevation_m),
        }
    }

    /// The same site with its haze in a word, in place of what its file says of the extinction.
    #[must_use]
    pub fn with_haze(&self, haze: Haze) -> Self {
        let mut site = self.clone();
        site.air.extinction_mag = None;
        site.air.haze = Some(haze);
        site
    }

    /// The civil zone.
    pub fn zone(&self) -> Tz {
        self.time_zone
    }

    /// What the air takes at the zenith, by its parts.
    pub fn extinction(&self) -> Extinction {
        self.air.extinction(self.elevation_m)
    }

    /// The spot of a name, or the first spot where none is named.
    ///
    /// # Errors
    /// There is no such spot; the error lists those there are.
    pub fn resolve_spot(&self, name: Option<&str>) -> Result<&Spot, SiteError> {
        let found = match name {
            None => self.spots.first(),
            Some(name) => self.spots.iter().find(|spot| spot.name == name),
        };
        found.ok_or_else(|| {
            let known: Vec<String> = self
                .spots
                .iter()
                .map(|spot| format!("{:?}", spot.name))
                .collect();
            SiteError(format!(
                "{} has no spot {:?}; its spots are {}",
                self.name,
                name.unwrap_or_default(),
                known.join(", ")
            ))
        })
    }

    /// The skyline seen from a spot: the highest of the measured skyline and the obstacles.
    ///
    /// The measured skyline is used as it is from every spot. An obstacle that the spot stands
    /// in is left out; [`Site::check`] refuses such spots of the site's own, and
    /// [`Obstacle::surrounds`] asks for any other.
    pub fn skyline(&self, spot: &Spot) -> Skyline {
        let points: Vec<(Angle, Angle)> = self
            .skyline
            .iter()
            .map(|point| {
                (
                    Angle::from_degrees(point.azimuth_deg),
                    Angle::from_degrees(point.altitude_deg),
                )
            })
            .collect();
        let mut edges = Vec::new();
        for obstacle in self
            .obstacles
            .iter()
            .filter(|obstacle| !obstacle.surrounds(spot))
        {
            let label: Arc<str> = obstacle.label().into();
            let outline = silhouette::edges(obstacle, spot);
            edges.extend(outline.into_iter().map(|edge| (edge, label.clone())));
        }
        Skyline::with_edges(&points, &edges)
    }

    /// Whether the file names an elevation tile, which is not used yet and should be said.
    pub fn ignores_terrain(&self) -> bool {
        self.terrain.is_some()
    }
}

fn usual_eye_height_m() -> f64 {
    1.6
}

fn known_version<'de, D: Deserializer<'de>>(from: D) -> Result<Option<u32>, D::Error> {
    match Option::<u32>::deserialize(from)? {
        None => Ok(None),
        Some(1) => Ok(Some(1)),
        Some(other) => Err(D::Error::custom(format_args!(
            "version is {other}, but this program knows version 1 only"
        ))),
    }
}

fn zone_by_name<'de, D: Deserializer<'de>>(from: D) -> Result<Tz, D::Error> {
    zone::parse(&String::deserialize(from)?).map_err(D::Error::custom)
}
