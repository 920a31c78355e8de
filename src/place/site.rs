//! A site and its spots.

use super::{
    Backdrop, Exclusion, Extinction, Haze, Instrument, Obstacle, People, PlanPoint, Sector,
    SiteAir, SiteEyes, SiteSky, SkylinePoint, Slope,
};
use super::{FarSkyline, TerrainRequest, far_skyline_cached, terrain_path};
use super::{limits, measured, zone};
use crate::measure::{Angle, Progress};
use crate::sky::Observer;
use chrono_tz::Tz;
use serde::de::Error;
use serde::{Deserialize, Deserializer, Serialize};
use std::fmt;
use std::path::{Path, PathBuf};
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
    /// How the ground rises away from the mark.
    #[serde(default, skip_serializing_if = "Slope::is_level")]
    pub slope: Slope,
    /// How high the eyes of different people are.
    #[serde(default, skip_serializing_if = "People::is_usual")]
    pub people: People,
    /// The skyline as measured from the mark, in ascending azimuth. It holds for the mark; other
    /// spots use only those parts of it that are marked far.
    #[serde(
        default,
        deserialize_with = "measured::ascending",
        skip_serializing_if = "Vec::is_empty"
    )]
    pub skyline: Vec<SkylinePoint>,
    /// Where the measured skyline is far away (a ridge, a church a mile off), and so is the same
    /// from every spot.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub skyline_far: Vec<Sector>,
    /// What stands on and around the grounds.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub obstacles: Vec<Obstacle>,
    /// A bare crown counts as blocking when more than this part of it is opaque.
    #[serde(
        default = "usual_blocking_density",
        deserialize_with = "limits::blocking_density",
        skip_serializing_if = "is_usual_blocking_density"
    )]
    pub blocking_density: f64,
    /// Parts of the grounds where nobody is to stand.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub excluded: Vec<Exclusion>,
    /// Corners of the grounds that people may stand on; left out, a square around the mark.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub outline_m: Vec<PlanPoint>,
    /// Path of an elevation tile, or of a folder of them; a relative path counts from the site
    /// file's folder.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub terrain: Option<PathBuf>,
    /// Terrestrial refraction for the terrain, as a part of the Earth's curvature.
    #[serde(
        default = "usual_terrain_k",
        deserialize_with = "limits::terrain_k",
        skip_serializing_if = "is_usual_terrain_k"
    )]
    pub terrain_k: f64,
    /// A picture of the site under its plan.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub backdrop: Option<Backdrop>,
    /// What the terrain makes of the skyline, once it is worked out ([`Site::find_far`]); not in
    /// the file.
    #[serde(skip)]
    pub far: Option<Arc<FarSkyline>>,
    /// How much light the people here need, where that is known to differ.
    #[serde(default, skip_serializing_if = "SiteEyes::is_usual")]
    pub eyes: SiteEyes,
    /// Instruments that visitors look through.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub kit: Vec<Instrument>,
}

/// A named standing position.
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
    /// Height of its ground over the mark's, m; left out, the ground as the site slopes.
    #[serde(
        default,
        deserialize_with = "limits::optional::base_m",
        skip_serializing_if = "Option::is_none"
    )]
    pub base_m: Option<f64>,
    /// Height of a standing adult's eye over the ground, m, a terrace counted in; left out in the
    /// file, as high as the site's adults have it ([`People::adult_m`]).
    #[serde(
        default = "unstated_eye_height_m",
        deserialize_with = "limits::eye_height_m"
    )]
    pub eye_height_m: f64,
    /// Radius of the patch that a crowd takes, m; left out, one person stands there.
    #[serde(
        default,
        deserialize_with = "limits::optional::radius_m",
        skip_serializing_if = "Option::is_none"
    )]
    pub radius_m: Option<f64>,
    /// The skyline as measured from here, in ascending azimuth; used in place of the mark's.
    #[serde(
        default,
        deserialize_with = "measured::ascending",
        skip_serializing_if = "Vec::is_empty"
    )]
    pub skyline: Vec<SkylinePoint>,
    /// Where that skyline is far away, and so is the same from every spot.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub skyline_far: Vec<Sector>,
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
        Self::at("mark", PlanPoint::new(0.0, 0.0))
    }

    /// A spot on the ground at a point, at a standing adult's eye height.
    pub fn at(name: &str, at: PlanPoint) -> Self {
        Self {
            name: name.into(),
            east_m: at.east_m,
            north_m: at.north_m,
            base_m: None,
            eye_height_m: usual_eye_height_m(),
            radius_m: None,
            skyline: Vec::new(),
            skyline_far: Vec::new(),
        }
    }

    /// Gives a spot that was read without a height of the eye that of the site's adults.
    pub(super) fn stand(&mut self, people: &People) {
        if self.eye_height_m.is_nan() {
            self.eye_height_m = people.adult_m;
        }
    }

    /// Where it lies in the plan.
    pub fn plan_point(&self) -> PlanPoint {
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
            slope: Slope::default(),
            people: People::default(),
            skyline: Vec::new(),
            skyline_far: Vec::new(),
            obstacles: Vec::new(),
            blocking_density: usual_blocking_density(),
            excluded: Vec::new(),
            outline_m: Vec::new(),
            terrain: None,
            terrain_k: usual_terrain_k(),
            backdrop: None,
            far: None,
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

    /// Looks along the terrain that the site names, or takes what was kept beside its file from
    /// the last time; `None` where it names none, or when cancelled. [`Site::far`] is where the
    /// result belongs.
    ///
    /// # Errors
    /// A tile is missing or cannot be used, or does not hold the site: one sentence naming it.
    pub fn find_far(
        &self,
        site_file: Option<&Path>,
        progress: &Progress,
        on_coarse: &mut dyn FnMut(FarSkyline),
    ) -> Result<Option<FarSkyline>, SiteError> {
        let Some(terrain) = &self.terrain else {
            return Ok(None);
        };
        let mark = Spot::mark();
        let request = TerrainRequest {
            eye_height_m: mark.eye_height_m,
            refraction_k: self.terrain_k,
            ..TerrainRequest::at(self.latitude_deg, self.longitude_deg)
        };
        let path = terrain_path(terrain, site_file);
        far_skyline_cached(&path, site_file, request, progress, on_coarse)
    }
}

fn usual_eye_height_m() -> f64 {
    1.6
}

/// Until the site's people are read too ([`Spot::stand`]); nobody can write it, since no number
/// of a file may be none.
fn unstated_eye_height_m() -> f64 {
    f64::NAN
}

fn usual_blocking_density() -> f64 {
    0.5
}

fn is_usual_blocking_density(density: &f64) -> bool {
    *density == usual_blocking_density()
}

fn usual_terrain_k() -> f64 {
    0.13
}

fn is_usual_terrain_k(k: &f64) -> bool {
    *k == usual_terrain_k()
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
