//! Parts of the grounds: where nobody shall stand, and the picture under the plan.

use super::{PlanPoint, Site, limits};
use serde::{Deserialize, Serialize};
use std::path::PathBuf;

/// A part of the grounds where nobody is to stand: a car park, a pond, a flower bed.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Exclusion {
    /// What people call it.
    #[serde(deserialize_with = "limits::name")]
    pub label: String,
    /// Its corners in order, either way round.
    pub corners_m: Vec<PlanPoint>,
}

impl Exclusion {
    /// Whether a point lies in it.
    pub fn holds(&self, at: PlanPoint) -> bool {
        super::plan_point::is_within(at, &self.corners_m)
    }
}

impl Site {
    /// Whether a point lies on the grounds that people may stand on, as far as their outline
    /// says; without one, every point does. Excluded parts are not looked at.
    pub fn outline_holds(&self, at: PlanPoint) -> bool {
        self.outline_m.is_empty() || super::plan_point::is_within(at, &self.outline_m)
    }

    /// The excluded part that a point lies in, if it does.
    pub fn exclusion_at(&self, at: PlanPoint) -> Option<&Exclusion> {
        self.excluded.iter().find(|part| part.holds(at))
    }
}

/// A picture of the site under its plan, placed by two points that are known in both.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Backdrop {
    /// The picture's file (PNG or JPEG); a relative path counts from the site file's folder.
    pub picture: PathBuf,
    /// One point.
    pub first: PicturePoint,
    /// The other; the farther off, the better the scale.
    pub second: PicturePoint,
}

/// A point of a picture and where it lies in the plan.
#[derive(Clone, Copy, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct PicturePoint {
    /// Pixels from the picture's left edge.
    #[serde(deserialize_with = "limits::backdrop_pixel")]
    pub right_px: f64,
    /// Pixels from its upper edge.
    #[serde(deserialize_with = "limits::backdrop_pixel")]
    pub down_px: f64,
    /// The point of the plan.
    pub at: PlanPoint,
}

/// An interval of azimuth, clockwise from its first to its second; the file writes
/// `(from, to)` in degrees.
#[derive(Clone, Copy, Debug, PartialEq, Serialize, Deserialize)]
#[serde(from = "SectorInFile", into = "(f64, f64)")]
pub struct Sector {
    /// Where it begins, degrees, [0, 360).
    pub from_deg: f64,
    /// Where it ends, degrees, [0, 360); at `from_deg` it is the whole circle.
    pub to_deg: f64,
}

#[derive(Deserialize)]
struct SectorInFile(
    #[serde(deserialize_with = "limits::azimuth_deg")] f64,
    #[serde(deserialize_with = "limits::azimuth_deg")] f64,
);

impl From<SectorInFile> for Sector {
    fn from(SectorInFile(from_deg, to_deg): SectorInFile) -> Self {
        Self { from_deg, to_deg }
    }
}

impl From<Sector> for (f64, f64) {
    fn from(sector: Sector) -> Self {
        (sector.from_deg, sector.to_deg)
    }
}

impl Sector {
    /// Whether an azimuth, degrees, lies in it, its ends included.
    pub fn holds(&self, azimuth_deg: f64) -> bool {
        let along = (azimuth_deg - self.from_deg).rem_euclid(360.0);
        let width = (self.to_deg - self.from_deg).rem_euclid(360.0);
        width == 0.0 || along <= width
    }
}
