//! Where a gable roof's ridge runs.

use super::plan_point::sides;
use super::{Obstacle, PlanPoint};

impl Obstacle {
    /// The ridges of a building's roof in its plan, each by its two ends; none without a roof.
    pub fn ridges(&self) -> Vec<[PlanPoint; 2]> {
        match self {
            Self::Building {
                corners_m,
                ridge_m: Some(_),
                ..
            } => ridge_crossings(corners_m)
                .chunks_exact(2)
                .map(|ends| [ends[0].at, ends[1].at])
                .collect(),
            _ => Vec::new(),
        }
    }
}

/// Where the ridge's line crosses a wall.
pub(super) struct RidgeEnd {
    along_m: f64,
    /// Where.
    pub at: PlanPoint,
    /// That wall.
    pub wall: (PlanPoint, PlanPoint),
}

/// The ridge's ends, in order along its line: an even number, each pair with plan between.
pub(super) fn ridge_crossings(corners: &[PlanPoint]) -> Vec<RidgeEnd> {
    let (middle, along) = longer_axis(corners);
    let across_of = |point: PlanPoint| along.cross(point.minus(middle));
    let mut found: Vec<RidgeEnd> = sides(corners)
        .filter_map(|wall| {
            let (from, to) = (across_of(wall.0), across_of(wall.1));
            ((from <= 0.0) != (to <= 0.0)).then(|| {
                let at = wall.0.plus(wall.1.minus(wall.0), from / (from - to));
                RidgeEnd {
                    along_m: along.dot(at.minus(middle)),
                    at,
                    wall,
                }
            })
        })
        .collect();
    found.sort_by(|a, b| a.along_m.total_cmp(&b.along_m));
    found
}

/// Middle and longer direction (length one) of the smallest rectangle around the corners, which
/// has a side along one of the walls.
fn longer_axis(corners: &[PlanPoint]) -> (PlanPoint, PlanPoint) {
    let origin = PlanPoint {
        east_m: 0.0,
        north_m: 0.0,
    };
    let mut best = (f64::INFINITY, origin, origin);
    for (a, b) in sides(corners) {
        let side = b.minus(a);
        let length_m = side.length_m();
        if length_m == 0.0 {
            continue;
        }
        let along = origin.plus(side, 1.0 / length_m);
        let across = PlanPoint {
            east_m: along.north_m,
            north_m: -along.east_m,
        };
        let (low, high) = extent(corners, along);
        let (near, far) = extent(corners, across);
        let area = (high - low) * (far - near);
        // A later wall must be smaller by more than rounding, so that a rectangle's first wall
        // decides and a square's ridge does not depend on the last bit.
        if area < best.0 * (1.0 - 1e-9) {
            let middle = origin
                .plus(along, 0.5 * (low + high))
                .plus(across, 0.5 * (near + far));
            let longer = if high - low >= far - near {
                along
            } else {
                across
            };
            best = (area, middle, longer);
        }
    }
    (best.1, best.2)
}

fn extent(corners: &[PlanPoint], direction: PlanPoint) -> (f64, f64) {
    let reach = corners.iter().map(|corner| corner.dot(direction));
    reach.fold((f64::INFINITY, f64::NEG_INFINITY), |(low, high), at| {
        (low.min(at), high.max(at))
    })
}
