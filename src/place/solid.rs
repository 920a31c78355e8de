//! What of an obstacle does not depend on the eye: its edges in space, its height, its reach.

use super::plan_point::{footprint_flaw, sides, touches_itself};
use super::roof::ridge_crossings;
use super::{Obstacle, PlanPoint, Site};
use chrono::NaiveDate;

/// A point in space, its height over the ground at the mark.
#[derive(Clone, Copy, Debug)]
pub(super) struct Peak {
    pub plan: PlanPoint,
    pub height_m: f64,
}

/// A straight edge in space.
#[derive(Clone, Copy, Debug)]
pub(super) struct Rim {
    pub start: Peak,
    pub end: Peak,
    /// Whether it can only be highest from the left of its way: the level top of a footprint that
    /// is listed clockwise, whose far side lies behind its near one.
    pub is_one_sided: bool,
}

/// A flat crown through an axis, turned to the eye; heights over the ground at the mark.
#[derive(Clone, Copy, Debug)]
pub(super) struct Crown {
    pub half_width_m: f64,
    pub top_m: f64,
    /// Where the shoulders begin.
    pub shoulder_m: f64,
    /// Its underside; `None` where it reaches the ground.
    pub underside_m: Option<f64>,
}

/// A flat upright strip through an axis, turned to the eye.
#[derive(Clone, Copy, Debug)]
pub(super) struct Strip {
    pub half_width_m: f64,
    /// Over the ground at the mark.
    pub top_m: f64,
}

/// What it is made of.
#[derive(Clone, Debug)]
pub(super) enum Form {
    /// Edges; the highest of them is the outline, since a vertical plane through the eye cuts a
    /// solid of flat faces in polygons whose highest point from the eye is a corner, and a
    /// corner lies on an edge.
    Edges(Vec<Rim>),
    /// A pole, or a tree.
    Upright {
        crown: Option<Crown>,
        stem: Option<Strip>,
    },
}

/// An obstacle, prepared.
#[derive(Clone, Debug)]
pub(super) struct Solid {
    pub form: Form,
    /// A circle of its plan around which it does not reach.
    pub centre: PlanPoint,
    pub reach_m: f64,
    /// The highest of it, over the ground at the mark.
    pub top_m: f64,
}

impl Solid {
    /// An obstacle of a site as it stands on a date; without one it has its leaves.
    pub(super) fn new(obstacle: &Obstacle, site: &Site, date: Option<NaiveDate>) -> Self {
        let points = obstacle.points();
        let centre = mean(&points);
        let ground_m = |base_m: &Option<f64>, at| base_m.unwrap_or_else(|| site.slope.height_m(at));
        let form = match obstacle {
            Obstacle::Tree { base_m, .. } => tree(obstacle, ground_m(base_m, centre), site, date),
            Obstacle::Pole {
                base_m,
                height_m,
                width_m,
                ..
            } => Form::Upright {
                crown: None,
                stem: Some(Strip {
                    half_width_m: 0.5 * width_m,
                    top_m: ground_m(base_m, centre) + height_m,
                }),
            },
            Obstacle::Shape {
                corners_m,
                base_m,
                height_m,
                ..
            } => Form::Edges(level_rims(corners_m, ground_m(base_m, centre) + height_m)),
            Obstacle::Wall {
                line_m,
                base_m,
                height_m,
                ..
            } => {
                let top = |plan| Peak {
                    plan,
                    height_m: ground_m(base_m, plan) + height_m,
                };
                let rims = line_m
                    .windows(2)
                    .map(|ends| rim(top(ends[0]), top(ends[1])));
                Form::Edges(rims.collect())
            }
            Obstacle::Building {
                corners_m,
                base_m,
                eaves_m,
                ridge_m,
                ..
            } => {
                let base_m = ground_m(base_m, centre);
                let mut rims = level_rims(corners_m, base_m + eaves_m);
                if let Some(ridge_m) = ridge_m {
                    rims.extend(roof(corners_m, base_m + eaves_m, base_m + ridge_m));
                }
                Form::Edges(rims)
            }
        };
        Self {
            reach_m: match obstacle {
                Obstacle::Tree { width_m, .. } | Obstacle::Pole { width_m, .. } => 0.5 * width_m,
                _ => points
                    .iter()
                    .map(|point| point.distance_m(centre))
                    .fold(0.0, f64::max),
            },
            top_m: form.top_m(),
            form,
            centre,
        }
    }
}

impl Form {
    fn top_m(&self) -> f64 {
        match self {
            Self::Edges(rims) => rims
                .iter()
                .flat_map(|rim| [rim.start.height_m, rim.end.height_m])
                .fold(f64::NEG_INFINITY, f64::max),
            Self::Upright { crown, stem } => {
                let crown = crown.iter().map(|crown| crown.top_m);
                let stem = stem.iter().map(|stem| stem.top_m);
                crown.chain(stem).fold(f64::NEG_INFINITY, f64::max)
            }
        }
    }
}

/// Where a crown's shoulders begin, and where a trunk without a stated gap goes over into
/// branches, of the height.
const SHOULDER: f64 = 0.6;
/// Width of a trunk that nobody measured, of the crown's.
const USUAL_TRUNK: f64 = 0.05;

fn tree(tree: &Obstacle, ground_m: f64, site: &Site, date: Option<NaiveDate>) -> Form {
    let Obstacle::Tree {
        height_m,
        width_m,
        gap_m,
        trunk_m,
        leafless,
        ..
    } = tree
    else {
        return Form::Edges(Vec::new());
    };
    let is_see_through = leafless.as_ref().zip(date).is_some_and(|(leafless, date)| {
        leafless.holds(date) && 1.0 - leafless.see_through <= site.blocking_density
    });
    let shoulder_m = SHOULDER * height_m;
    let crown = (!is_see_through).then(|| Crown {
        half_width_m: 0.5 * width_m,
        top_m: ground_m + height_m,
        shoulder_m: ground_m + shoulder_m,
        underside_m: gap_m.map(|gap_m| ground_m + gap_m),
    });
    let stem = (is_see_through || gap_m.is_some()).then(|| Strip {
        half_width_m: 0.5 * trunk_m.unwrap_or(USUAL_TRUNK * width_m),
        top_m: ground_m + gap_m.unwrap_or(shoulder_m),
    });
    Form::Upright { crown, stem }
}

/// The level top of a footprint, listed clockwise.
fn level_rims(corners: &[PlanPoint], height_m: f64) -> Vec<Rim> {
    let doubled_area: f64 = sides(corners).map(|(a, b)| a.cross(b)).sum();
    // Where sides meet in more than their corners, a part of it may be listed the other way.
    let is_one_sided = footprint_flaw(corners).is_none() && !touches_itself(corners);
    let peak = |plan| Peak { plan, height_m };
    sides(corners)
        .map(|(a, b)| if doubled_area > 0.0 { (a, b) } else { (b, a) })
        .map(|(a, b)| Rim {
            is_one_sided,
            ..rim(peak(a), peak(b))
        })
        .collect()
}

/// Ridge and verges: from each end of the ridge to both corners of the wall it ends over.
fn roof(corners: &[PlanPoint], eaves_m: f64, ridge_m: f64) -> Vec<Rim> {
    let peak = |plan, height_m| Peak { plan, height_m };
    let crossings = ridge_crossings(corners);
    let ridges = crossings
        .chunks_exact(2)
        .map(|ends| rim(peak(ends[0].at, ridge_m), peak(ends[1].at, ridge_m)));
    let verges = crossings.iter().flat_map(|end| {
        [end.wall.0, end.wall.1].map(|corner| rim(peak(end.at, ridge_m), peak(corner, eaves_m)))
    });
    ridges.chain(verges).collect()
}

fn rim(start: Peak, end: Peak) -> Rim {
    Rim {
        start,
        end,
        is_one_sided: false,
    }
}

fn mean(points: &[PlanPoint]) -> PlanPoint {
    let share = 1.0 / points.len() as f64;
    let origin = PlanPoint::new(0.0, 0.0);
    points
        .iter()
        .fold(origin, |sum, point| sum.plus(*point, share))
}
