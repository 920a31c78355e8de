//! Trees, buildings and walls in metres.

use super::{Spot, limits};
use serde::{Deserialize, Serialize};

/// Something that blocks the view. Lengths in metres; heights count from `base_m`, which is the
/// height of its own ground over the ground at the site's mark.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub enum Obstacle {
    /// A crown, drawn as a flat shape through the trunk's axis that always faces the spot: full
    /// width up to 0.6 of the height, then straight shoulders up to a flat top half as wide.
    Tree {
        /// What people call it.
        #[serde(deserialize_with = "limits::name")]
        label: String,
        /// Its axis east of the mark, m.
        #[serde(deserialize_with = "limits::east_m")]
        east_m: f64,
        /// Its axis north of the mark, m.
        #[serde(deserialize_with = "limits::north_m")]
        north_m: f64,
        /// Height of its ground over the mark's, m.
        #[serde(default, deserialize_with = "limits::base_m")]
        base_m: f64,
        /// Height of its top over its ground, m.
        #[serde(deserialize_with = "limits::height_m")]
        height_m: f64,
        /// Diameter of the crown, m.
        #[serde(deserialize_with = "limits::width_m")]
        width_m: f64,
    },
    /// Upright walls over a plan up to the eaves, under a gable roof: one straight ridge along
    /// the longer axis of the smallest rectangle around the plan, cut off where it leaves the
    /// plan, with a gable where it meets a wall. True to a rectangular plan; a winged house is
    /// better entered as two buildings.
    Building {
        /// What people call it.
        #[serde(deserialize_with = "limits::name")]
        label: String,
        /// Corners of the plan in order, either way round.
        corners_m: Vec<PlanPoint>,
        /// Height of its ground over the mark's, m.
        #[serde(default, deserialize_with = "limits::base_m")]
        base_m: f64,
        /// Height of the eaves over its ground, m.
        #[serde(deserialize_with = "limits::eaves_m")]
        eaves_m: f64,
        /// Height of the ridge over its ground, m; left out, the roof is flat.
        #[serde(
            default,
            deserialize_with = "limits::optional::ridge_m",
            skip_serializing_if = "Option::is_none"
        )]
        ridge_m: Option<f64>,
    },
    /// An upright strip of one height without thickness: a wall, a hedge, a fence.
    Wall {
        /// What people call it.
        #[serde(deserialize_with = "limits::name")]
        label: String,
        /// The line that it follows.
        line_m: Vec<PlanPoint>,
        /// Height of its ground over the mark's, m.
        #[serde(default, deserialize_with = "limits::base_m")]
        base_m: f64,
        /// Height of its top over its ground, m.
        #[serde(deserialize_with = "limits::height_m")]
        height_m: f64,
    },
}

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

/// Nearer than this to a wall's line, nobody stands in front of it or behind it.
const WALL_REACH_M: f64 = 0.1;

impl Obstacle {
    /// What people call it.
    pub fn label(&self) -> &str {
        match self {
            Self::Tree { label, .. } | Self::Building { label, .. } | Self::Wall { label, .. } => {
                label
            }
        }
    }

    /// Whether a spot lies within its plan, where nothing can be said of the view.
    pub fn surrounds(&self, spot: &Spot) -> bool {
        let at = spot.plan_point();
        match self {
            Self::Tree {
                east_m,
                north_m,
                width_m,
                ..
            } => {
                let axis = PlanPoint {
                    east_m: *east_m,
                    north_m: *north_m,
                };
                axis.minus(at).length_m() <= 0.5 * width_m
            }
            Self::Building { corners_m, .. } => {
                is_within(at, corners_m)
                    || sides(corners_m).any(|(a, b)| distance_m(at, a, b) < WALL_REACH_M)
            }
            Self::Wall { line_m, .. } => line_m
                .windows(2)
                .any(|ends| distance_m(at, ends[0], ends[1]) < WALL_REACH_M),
        }
    }

    /// Why its shape cannot be, if it cannot.
    pub(super) fn flaw(&self) -> Option<String> {
        match self {
            Self::Tree { .. } => None,
            Self::Wall { line_m, .. } => {
                let length_m: f64 = line_m
                    .windows(2)
                    .map(|ends| ends[1].minus(ends[0]).length_m())
                    .sum();
                (length_m < 0.01).then(|| "its line_m needs at least two points apart".into())
            }
            Self::Building {
                corners_m,
                eaves_m,
                ridge_m,
                ..
            } => building_flaw(corners_m, *eaves_m, *ridge_m),
        }
    }
}

fn building_flaw(corners_m: &[PlanPoint], eaves_m: f64, ridge_m: Option<f64>) -> Option<String> {
    const MOST_CORNERS: usize = 100;
    if let Some(ridge_m) = ridge_m.filter(|ridge_m| *ridge_m < eaves_m) {
        return Some(format!(
            "its ridge_m {ridge_m} lies below its eaves_m {eaves_m}"
        ));
    }
    if corners_m.len() > MOST_CORNERS {
        return Some(format!(
            "it has {} corners, but may have at most {MOST_CORNERS}",
            corners_m.len()
        ));
    }
    let doubled_area: f64 = sides(corners_m).map(|(a, b)| a.cross(b)).sum();
    if corners_m.len() < 3 || doubled_area.abs() < 0.02 {
        return Some("its corners_m need at least three corners that enclose an area".into());
    }
    let walls: Vec<_> = sides(corners_m).collect();
    let crosses = |k: usize| {
        walls[k + 1..]
            .iter()
            .any(|wall| is_crossing(walls[k], *wall))
    };
    (0..walls.len())
        .any(crosses)
        .then(|| "its walls cross each other: list the corners in order".into())
}

/// The sides of a closed plan.
pub(super) fn sides(corners: &[PlanPoint]) -> impl Iterator<Item = (PlanPoint, PlanPoint)> + '_ {
    let next = corners.iter().cycle().skip(1);
    corners.iter().zip(next).map(|(a, b)| (*a, *b))
}

/// Even-odd rule on a ray to the north.
fn is_within(at: PlanPoint, corners: &[PlanPoint]) -> bool {
    let crossed = sides(corners).filter(|(a, b)| {
        (a.east_m <= at.east_m) != (b.east_m <= at.east_m) && {
            let share = (at.east_m - a.east_m) / (b.east_m - a.east_m);
            a.north_m + share * (b.north_m - a.north_m) > at.north_m
        }
    });
    crossed.count() % 2 == 1
}

fn distance_m(at: PlanPoint, a: PlanPoint, b: PlanPoint) -> f64 {
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
