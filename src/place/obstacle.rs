//! Trees, buildings, walls, poles and other shapes in metres.

use super::plan_point::{PlanPoint, distance_to_side_m, footprint_flaw, is_within, sides};
use super::{Leafless, limits};
use serde::{Deserialize, Serialize};

/// Something that blocks the view. Lengths in metres; heights count from its own ground, which
/// is `base_m` over the ground at the site's mark, or, where that is left out, the ground there as
/// the site slopes ([`super::Slope`]). A building's and a shape's ground is that at the mean of its
/// corners; a wall follows the slope from point to point.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub enum Obstacle {
    /// A crown, drawn as a flat shape through the trunk's axis that always faces the spot: full
    /// width up to 0.6 of the height, then straight shoulders up to a flat top half as wide. With
    /// a gap beneath it is cut off level at `gap_m`, and the trunk below is a flat strip.
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
        /// Height of its ground over the mark's, m; left out, the ground as the site slopes.
        #[serde(
            default,
            deserialize_with = "limits::optional::base_m",
            skip_serializing_if = "Option::is_none"
        )]
        base_m: Option<f64>,
        /// Height of its top over its ground, m.
        #[serde(deserialize_with = "limits::height_m")]
        height_m: f64,
        /// Diameter of the crown, m.
        #[serde(deserialize_with = "limits::width_m")]
        width_m: f64,
        /// Height of the crown's underside over its ground, m, where one can look through beneath
        /// it on both sides of the trunk; left out, the crown reaches the ground.
        #[serde(
            default,
            deserialize_with = "limits::optional::gap_m",
            skip_serializing_if = "Option::is_none"
        )]
        gap_m: Option<f64>,
        /// Diameter of the trunk under the crown, m; left out, a twentieth of the crown's.
        #[serde(
            default,
            deserialize_with = "limits::optional::trunk_m",
            skip_serializing_if = "Option::is_none"
        )]
        trunk_m: Option<f64>,
        /// When it stands without leaves, and how much shows through it then. A bare crown that
        /// shows enough of the sky ([`super::Site::blocking_density`]) does not block; its trunk
        /// still does, up to `gap_m` or else to 0.6 of the height, where it goes over into
        /// branches.
        #[serde(default, skip_serializing_if = "Option::is_none")]
        leafless: Option<Leafless>,
    },
    /// A lamp post, a flagpole, a mast: upright, of one width from the ground to its top.
    Pole {
        /// What people call it.
        #[serde(deserialize_with = "limits::name")]
        label: String,
        /// Its axis east of the mark, m.
        #[serde(deserialize_with = "limits::east_m")]
        east_m: f64,
        /// Its axis north of the mark, m.
        #[serde(deserialize_with = "limits::north_m")]
        north_m: f64,
        /// Height of its ground over the mark's, m; left out, the ground as the site slopes.
        #[serde(
            default,
            deserialize_with = "limits::optional::base_m",
            skip_serializing_if = "Option::is_none"
        )]
        base_m: Option<f64>,
        /// Height of its top over its ground, m.
        #[serde(deserialize_with = "limits::height_m")]
        height_m: f64,
        /// Its diameter, m.
        #[serde(deserialize_with = "limits::width_m")]
        width_m: f64,
    },
    /// Anything else upright with a level top: a footprint and its height.
    Shape {
        /// What people call it.
        #[serde(deserialize_with = "limits::name")]
        label: String,
        /// Corners of the footprint in order, either way round.
        corners_m: Vec<PlanPoint>,
        /// Height of its ground over the mark's, m; left out, the ground as the site slopes, at
        /// the mean of its corners.
        #[serde(
            default,
            deserialize_with = "limits::optional::base_m",
            skip_serializing_if = "Option::is_none"
        )]
        base_m: Option<f64>,
        /// Height of its top over its ground, m.
        #[serde(deserialize_with = "limits::height_m")]
        height_m: f64,
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
        /// Height of its ground over the mark's, m; left out, the ground as the site slopes.
        #[serde(
            default,
            deserialize_with = "limits::optional::base_m",
            skip_serializing_if = "Option::is_none"
        )]
        base_m: Option<f64>,
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
        /// Height of its ground over the mark's, m; left out, the ground as the site slopes.
        #[serde(
            default,
            deserialize_with = "limits::optional::base_m",
            skip_serializing_if = "Option::is_none"
        )]
        base_m: Option<f64>,
        /// Height of its top over its ground, m.
        #[serde(deserialize_with = "limits::height_m")]
        height_m: f64,
    },
}

/// Nearer than this to a wall's line, nobody stands in front of it or behind it.
const WALL_REACH_M: f64 = 0.1;
/// A hedge around a large park has fewer.
const MOST_LINE_POINTS: usize = 1000;

impl Obstacle {
    /// What people call it.
    pub fn label(&self) -> &str {
        match self {
            Self::Tree { label, .. }
            | Self::Building { label, .. }
            | Self::Wall { label, .. }
            | Self::Pole { label, .. }
            | Self::Shape { label, .. } => label,
        }
    }

    /// The same, to be changed.
    pub fn label_mut(&mut self) -> &mut String {
        match self {
            Self::Tree { label, .. }
            | Self::Building { label, .. }
            | Self::Wall { label, .. }
            | Self::Pole { label, .. }
            | Self::Shape { label, .. } => label,
        }
    }

    /// Height of its ground over the mark's as stated, m.
    pub fn base_mut(&mut self) -> &mut Option<f64> {
        match self {
            Self::Tree { base_m, .. }
            | Self::Building { base_m, .. }
            | Self::Wall { base_m, .. }
            | Self::Pole { base_m, .. }
            | Self::Shape { base_m, .. } => base_m,
        }
    }

    /// The points that it stands on: the axis of a tree or a pole, the corners of a footprint, a
    /// wall's line.
    pub fn points(&self) -> Vec<PlanPoint> {
        match self {
            Self::Tree {
                east_m, north_m, ..
            }
            | Self::Pole {
                east_m, north_m, ..
            } => vec![PlanPoint::new(*east_m, *north_m)],
            Self::Building { corners_m, .. } | Self::Shape { corners_m, .. } => corners_m.clone(),
            Self::Wall { line_m, .. } => line_m.clone(),
        }
    }

    /// Puts its points anew; of a tree or a pole the first counts, and none changes nothing.
    pub fn set_points(&mut self, points: &[PlanPoint]) {
        match self {
            Self::Tree {
                east_m, north_m, ..
            }
            | Self::Pole {
                east_m, north_m, ..
            } => {
                if let Some(axis) = points.first() {
                    (*east_m, *north_m) = (axis.east_m, axis.north_m);
                }
            }
            Self::Building { corners_m, .. } | Self::Shape { corners_m, .. } => {
                *corners_m = points.to_vec();
            }
            Self::Wall { line_m, .. } => *line_m = points.to_vec(),
        }
    }

    /// Whether a point lies within its plan, where nothing can be said of the view: inside a
    /// footprint, under a crown, nearer than 0.1 m to a wall.
    pub fn surrounds(&self, at: PlanPoint) -> bool {
        match self {
            Self::Tree { width_m, .. } | Self::Pole { width_m, .. } => self
                .points()
                .iter()
                .any(|axis| axis.distance_m(at) <= 0.5 * width_m),
            Self::Building { corners_m, .. } | Self::Shape { corners_m, .. } => {
                is_within(at, corners_m)
                    || sides(corners_m).any(|(a, b)| distance_to_side_m(at, a, b) < WALL_REACH_M)
            }
            Self::Wall { line_m, .. } => line_m
                .windows(2)
                .any(|ends| distance_to_side_m(at, ends[0], ends[1]) < WALL_REACH_M),
        }
    }

    /// Why its shape cannot be, if it cannot.
    pub(super) fn flaw(&self) -> Option<String> {
        match self {
            Self::Tree {
                height_m,
                width_m,
                gap_m,
                trunk_m,
                ..
            } => {
                if let Some(gap_m) = gap_m.filter(|gap_m| gap_m >= height_m) {
                    return Some(format!("its gap_m {gap_m} reaches its height_m {height_m}"));
                }
                let trunk_m = trunk_m.filter(|trunk_m| trunk_m > width_m)?;
                Some(format!(
                    "its trunk_m {trunk_m} exceeds its width_m {width_m}"
                ))
            }
            Self::Pole { .. } => None,
            Self::Wall { line_m, .. } => {
                let length_m: f64 = line_m
                    .windows(2)
                    .map(|ends| ends[1].distance_m(ends[0]))
                    .sum();
                if line_m.len() > MOST_LINE_POINTS {
                    return Some(format!(
                        "its line_m has {} points, but may have at most {MOST_LINE_POINTS}",
                        line_m.len()
                    ));
                }
                (length_m < 0.01).then(|| "its line_m needs at least two points apart".into())
            }
            Self::Shape { corners_m, .. } => footprint_flaw(corners_m),
            Self::Building {
                corners_m,
                eaves_m,
                ridge_m,
                ..
            } => match ridge_m.filter(|ridge_m| ridge_m < eaves_m) {
                Some(ridge_m) => Some(format!(
                    "its ridge_m {ridge_m} lies below its eaves_m {eaves_m}"
                )),
                None => footprint_flaw(corners_m),
            },
        }
    }
}
