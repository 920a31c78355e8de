//! Points of a site's plan, and what a few of them enclose.

use super::limits;
use crate::measure::Angle;
use serde::{Deserialize, Serialize};

/// A point of a site's plan; the file writes it `(east, north)`, metres from the mark.
#[derive(Clone, Copy, Debug, PartialEq, Serialize, Deserialize)]
#[serde(from = "PlanPointInFile", into = "(f64, f64)")]
pub struct PlanPoint {
    /// East of the mark, m.
    pub east_m: f64,
    /// North of the mark, m.
    pub north_m: f64,
}

#[derive(Deserialize)]
struct PlanPointInFile(
    #[serde(deserialize_with = "limits::east_m")] f64,
    #[serde(deserialize_with = "limits::north_m")] f64,
);

impl From<PlanPointInFile> for PlanPoint {
    fn from(PlanPointInFile(east_m, north_m): PlanPointInFile) -> Self {
        Self { east_m, north_m }
    }
}

impl From<PlanPoint> for (f64, f64) {
    fn from(point: PlanPoint) -> Self {
        (point.east_m, point.north_m)
    }
}

impl PlanPoint {
    /// So many metres east and north of the mark.
    pub const fn new(east_m: f64, north_m: f64) -> Self {
        Self { east_m, north_m }
    }
    /// How far apart two points are, m.
    pub fn distance_m(self, other: Self) -> f64 {
        self.minus(other).length_m()
    }
    /// Azimuth in which `other` lies from here, [0°, 360°); 0 where they are one.
    pub fn bearing(self, other: Self) -> Angle {
        let towards = other.minus(self);
        Angle::from_radians(towards.east_m.atan2(towards.north_m)).wrapped()
    }
    pub(super) fn minus(self, other: Self) -> Self {
        Self {
            east_m: self.east_m - other.east_m,
            north_m: self.north_m - other.north_m,
        }
    }
    pub(super) fn plus(self, other: Self, factor: f64) -> Self {
        Self {
            east_m: self.east_m + factor * other.east_m,
            north_m: self.north_m + factor * other.north_m,
        }
    }
    pub(super) fn dot(self, other: Self) -> f64 {
        self.east_m * other.east_m + self.north_m * other.north_m
    }
    /// Positive where `other` lies clockwise of this one, seen from above (azimuth grows).
    pub(super) fn cross(self, other: Self) -> f64 {
        self.north_m * other.east_m - self.east_m * other.north_m
    }
    pub(super) fn length_m(self) -> f64 {
        self.east_m.hypot(self.north_m)
    }
}

/// The sides of a closed plan.
pub(super) fn sides(corners: &[PlanPoint]) -> impl Iterator<Item = (PlanPoint, PlanPoint)> + '_ {
    let next = corners.iter().cycle().skip(1);
    corners.iter().zip(next).map(|(a, b)| (*a, *b))
}

/// Even-odd rule on a ray to the north.
pub(super) fn is_within(at: PlanPoint, corners: &[PlanPoint]) -> bool {
    let crossed = sides(corners).filter(|(a, b)| {
        (a.east_m <= at.east_m) != (b.east_m <= at.east_m) && {
            let share = (at.east_m - a.east_m) / (b.east_m - a.east_m);
            a.north_m + share * (b.north_m - a.north_m) > at.north_m
        }
    });
    crossed.count() % 2 == 1
}

pub(super) fn distance_to_side_m(at: PlanPoint, a: PlanPoint, b: PlanPoint) -> f64 {
    let (along, from_a) = (b.minus(a), at.minus(a));
    let length_squared = along.dot(along);
    let share = if length_squared > 0.0 {
        (from_a.dot(along) / length_squared).clamp(0.0, 1.0)
    } else {
        0.0
    };
    from_a.plus(along, -share).length_m()
}

/// Whether two sides cross within both; sides that share a corner do not.
fn is_crossing((a, b): (PlanPoint, PlanPoint), (c, d): (PlanPoint, PlanPoint)) -> bool {
    let (ab, cd) = (b.minus(a), d.minus(c));
    let on_both_sides_of_ab = ab.cross(c.minus(a)) * ab.cross(d.minus(a)) < 0.0;
    let on_both_sides_of_cd = cd.cross(a.minus(c)) * cd.cross(b.minus(c)) < 0.0;
    on_both_sides_of_ab && on_both_sides_of_cd
}

/// Whether a corner stands on a side that is not one of its own two.
pub(super) fn touches_itself(corners: &[PlanPoint]) -> bool {
    const TOUCHING_M: f64 = 1e-6;
    let count = corners.len();
    corners.iter().enumerate().any(|(k, corner)| {
        sides(corners).enumerate().any(|(side, (a, b))| {
            let is_own = side == k || (side + 1) % count == k;
            !is_own && distance_to_side_m(*corner, a, b) < TOUCHING_M
        })
    })
}

/// Why corners enclose nothing that could stand somewhere, if they do not.
pub(super) fn footprint_flaw(corners_m: &[PlanPoint]) -> Option<String> {
    const MOST_CORNERS: usize = 100;
    if corners_m.len() > MOST_CORNERS {
        return Some(format!(
            "it has {} corners, but may have at most {MOST_CORNERS}",
            corners_m.len()
        ));
    }
    if corners_m.len() < 3 {
        return Some("its corners_m need at least three corners that enclose an area".into());
    }
    // Before the area: a bow-tie encloses two that cancel.
    let walls: Vec<_> = sides(corners_m).collect();
    let crosses = |k: usize| {
        walls[k + 1..]
            .iter()
            .any(|wall| is_crossing(walls[k], *wall))
    };
    if (0..walls.len()).any(crosses) {
        return Some("its sides cross each other: list the corners in order".into());
    }
    let doubled_area: f64 = sides(corners_m).map(|(a, b)| a.cross(b)).sum();
    (doubled_area.abs() < 0.02)
        .then(|| "its corners_m need at least three corners that enclose an area".into())
}
