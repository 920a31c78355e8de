//! Terrain: the far skyline, from elevation tiles that the user supplies.
//!
//! [`far_skyline_cached`] does everything for a saved site. [`Terrain::open`] finds the tiles
//! around a place (SRTM `.hgt` and GeoTIFF); [`Terrain::far_skyline`] reads them and looks along
//! straight lines for what stands highest. A piece of ground at distance `d` whose elevation is
//! `h` above the eye's has the altitude
//!
//! `atan(h/d - (1 - k) d / 2R)`,
//!
//! with Earth's radius of curvature `R` and the coefficient of terrestrial refraction `k`: the
//! surveyor's correction for curvature and refraction, `(1 - k) d² / 2R` (W. Torge, *Geodesy*;
//! C. D. Ghilani, *Elementary Surveying*). It is within 0.001 deg of the exact triangle for
//! ground up to 3000 m over the eye within 60 km; `k` itself varies with the weather, from about
//! -0.1 to 0.3 near the ground, which moves a ridge at 30 km by 0.03 deg either way.

mod cache;
mod far_skyline;
mod geodesy;
mod geokeys;
mod geotiff;
mod hgt;
mod horizon;
mod raster;
mod relief;
mod tiles;
mod utm;

pub use cache::{cache_path, far_skyline_cached, terrain_path};
pub use far_skyline::FarSkyline;
pub use relief::Relief;

use super::SiteError;
use crate::measure::{Angle, Progress};
use geodesy::Position;
use horizon::{COARSE_AZIMUTHS, FINE_AZIMUTHS, Sweep};
use serde::Serialize;
use std::ops::RangeInclusive;
use std::path::{Path, PathBuf};
use tiles::{Circle, Tile};

/// What a far skyline is wanted for.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct TerrainRequest {
    /// Geodetic latitude of the mark (WGS84), degrees, north positive.
    pub latitude_deg: f64,
    /// Longitude of the mark, degrees, east positive.
    pub longitude_deg: f64,
    /// How far to look, m: 1000 to 60,000.
    pub radius_m: f64,
    /// Height of the eye over the ground, m, 0 to 200: the highest ground is sought as seen from
    /// there.
    pub eye_height_m: f64,
    /// Coefficient of terrestrial refraction, -1 to 0.9: the ray's curvature over the Earth's.
    pub refraction_k: f64,
}

/// The usual coefficient of terrestrial refraction, from Gauss's survey of Hannover; by day, well
/// above the ground.
pub const USUAL_REFRACTION_K: f64 = 0.13;
/// The farthest that terrain is looked at, m.
pub const LARGEST_RADIUS_M: f64 = 60_000.0;

impl TerrainRequest {
    /// As far as can be, for a standing adult in usual air.
    pub fn at(latitude_deg: f64, longitude_deg: f64) -> Self {
        Self {
            latitude_deg,
            longitude_deg,
            radius_m: LARGEST_RADIUS_M,
            eye_height_m: 1.6,
            refraction_k: USUAL_REFRACTION_K,
        }
    }

    fn centre(&self) -> Position {
        Position {
            latitude: Angle::from_degrees(self.latitude_deg).radians(),
            longitude: Angle::from_degrees(self.longitude_deg).radians(),
        }
    }

    fn check(&self) -> Result<(), SiteError> {
        let limits: [(&str, f64, RangeInclusive<f64>, &str); 5] = [
            ("latitude", self.latitude_deg, -89.0..=89.0, "degrees"),
            ("longitude", self.longitude_deg, -180.0..=180.0, "degrees"),
            ("radius", self.radius_m, 1000.0..=LARGEST_RADIUS_M, "metres"),
            ("eye height", self.eye_height_m, 0.0..=200.0, "metres"),
            (
                "coefficient of refraction",
                self.refraction_k,
                -1.0..=0.9,
                "",
            ),
        ];
        for (what, value, range, unit) in limits {
            if !range.contains(&value) {
                let (low, high) = range.into_inner();
                let sentence = format!(
                    "for a skyline from terrain the {what} must lie between {low} and {high} \
                     {unit}"
                );
                return Err(SiteError(format!(
                    "{}, but it is {value}",
                    sentence.trim_end()
                )));
            }
        }
        Ok(())
    }
}

/// The elevation tiles around a place. Only their heads have been read.
pub struct Terrain {
    path: PathBuf,
    request: TerrainRequest,
    tiles: Vec<Tile>,
}

impl Terrain {
    /// Finds the tiles at a path that matter for a place: one `.hgt` or GeoTIFF file, or a folder
    /// of them. Where several know a place, the finest counts.
    ///
    /// # Errors
    /// A number of the request is out of its range; or the path cannot be read, holds no tile,
    /// holds one that cannot be placed, does not hold the site, or holds more than is read at
    /// once: one sentence naming the file and what to do.
    pub fn open(path: &Path, request: TerrainRequest) -> Result<Self, SiteError> {
        request.check()?;
        let circle = Circle::new(request.centre(), request.radius_m);
        Ok(Self {
            path: path.to_owned(),
            request,
            tiles: tiles::find(path, &circle)?,
        })
    }

    /// Reads the elevations within the radius; `None` when cancelled.
    ///
    /// # Errors
    /// A tile is damaged or cut short, or can no longer be read: one sentence naming it.
    pub fn relief(&self, progress: &Progress) -> Result<Option<Relief>, SiteError> {
        progress.set_total(self.reading_steps());
        self.read(progress)
    }

    /// The skyline that the terrain makes; `None` when cancelled.
    ///
    /// A first result in directions 2 deg apart is handed to `on_coarse` as soon as it is there,
    /// long before the full one.
    ///
    /// # Errors
    /// As [`Terrain::relief`]; or the ground at the mark itself is unknown.
    pub fn far_skyline(
        &self,
        progress: &Progress,
        on_coarse: &mut dyn FnMut(FarSkyline),
    ) -> Result<Option<FarSkyline>, SiteError> {
        progress.set_total(self.reading_steps() + (COARSE_AZIMUTHS + FINE_AZIMUTHS) as u64);
        let Some(relief) = self.read(progress)? else {
            return Ok(None);
        };
        let request = &self.request;
        let ground_m = relief.elevation_m(
            Angle::from_degrees(request.latitude_deg),
            Angle::from_degrees(request.longitude_deg),
        );
        let sweep = Sweep {
            ground_m: ground_m.ok_or_else(|| {
                SiteError(format!(
                    "{} does not know the elevation at the site itself (it has a void there); \
                     choose a file with its voids filled",
                    self.path.display()
                ))
            })?,
            eye_height_m: request.eye_height_m,
            drop_per_m: (1.0 - request.refraction_k) / (2.0 * relief.origin.mean_radius_m()),
            radius_m: request.radius_m,
        };
        let Some(coarse) = sweep.run(&relief, COARSE_AZIMUTHS, progress) else {
            return Ok(None);
        };
        on_coarse(coarse);
        Ok(sweep.run(&relief, FINE_AZIMUTHS, progress))
    }

    fn reading_steps(&self) -> u64 {
        self.tiles.len() as u64 * Tile::STEPS
    }

    fn read(&self, progress: &Progress) -> Result<Option<Relief>, SiteError> {
        let mut rasters = Vec::with_capacity(self.tiles.len());
        for tile in &self.tiles {
            match tile.read(progress)? {
                Some(raster) => rasters.push(raster),
                None => return Ok(None),
            }
        }
        Ok(Some(Relief::new(self.request.centre(), rasters)))
    }
}
