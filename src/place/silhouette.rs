//! An obstacle's outline against the sky from one spot: the straight edges that can be its
//! highest point at some azimuth.
//!
//! A vertical plane through the eye cuts a solid of flat faces in polygons whose highest point
//! from the eye is a corner, and a corner lies on one of the solid's edges. The highest of all
//! edges is therefore the exact outline; none of it is sampled.

use super::plan_point::sides;
use super::{Obstacle, PlanPoint, Slope, Viewpoint};
use std::f64::consts::PI;

/// A straight edge in space, seen from the eye.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Edge {
    start: Point,
    end: Point,
}

/// A point from the eye, metres.
#[derive(Clone, Copy, Debug, PartialEq)]
struct Point {
    plan: PlanPoint,
    up_m: f64,
}

/// Where an edge stands against the sky: over azimuths from `from` for `width` radians,
/// tan(altitude) = east sin(azimuth) + north cos(azimuth), since the edge and the eye span a
/// plane.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Arc {
    /// Radians, in (-π, π].
    pub from: f64,
    /// Radians, in (0, π).
    pub width: f64,
    pub east: f64,
    pub north: f64,
}

impl Edge {
    /// `None` for an edge seen end-on or from inside its own vertical plane, which covers no
    /// azimuth.
    pub(super) fn arc(&self) -> Option<Arc> {
        /// Radians; at a kilometre, a hundredth of a millimetre.
        const NARROWEST: f64 = 1e-8;
        let turn = self.start.plan.cross(self.end.plan);
        let (a, b) = if turn > 0.0 {
            (self.start, self.end)
        } else {
            (self.end, self.start)
        };
        let width = turn.abs().atan2(a.plan.dot(b.plan));
        if !(NARROWEST..=PI - NARROWEST).contains(&width) {
            return None;
        }
        let area = a.plan.cross(b.plan);
        Some(Arc {
            from: a.plan.east_m.atan2(a.plan.north_m),
            width,
            east: (a.plan.north_m * b.up_m - b.plan.north_m * a.up_m) / area,
            north: (b.plan.east_m * a.up_m - a.plan.east_m * b.up_m) / area,
        })
    }
}

/// The edges of an obstacle that the eye does not stand in.
pub(super) fn edges(obstacle: &Obstacle, slope: &Slope, viewpoint: &Viewpoint) -> Vec<Edge> {
    let eye = Eye {
        plan: viewpoint.at,
        height_m: viewpoint.height_m,
    };
    match obstacle {
        Obstacle::Tree {
            east_m,
            north_m,
            base_m,
            height_m,
            width_m,
            ..
        } => {
            let axis = PlanPoint::new(*east_m, *north_m);
            let base_m = base_m.unwrap_or_else(|| slope.height_m(axis));
            eye.crown(axis, base_m, *height_m, *width_m)
        }
        Obstacle::Pole {
            east_m,
            north_m,
            base_m,
            height_m,
            width_m,
            ..
        } => {
            let axis = PlanPoint::new(*east_m, *north_m);
            let base_m = base_m.unwrap_or_else(|| slope.height_m(axis));
            eye.pole(axis, base_m + height_m, *width_m)
        }
        Obstacle::Shape {
            corners_m,
            base_m,
            height_m,
            ..
        } => {
            let base_m = base_m.unwrap_or_else(|| slope.height_m(mean(corners_m)));
            sides(corners_m)
                .map(|(a, b)| eye.level_edge(a, b, base_m + height_m))
                .collect()
        }
        Obstacle::Wall {
            line_m,
            base_m,
            height_m,
            ..
        } => line_m
            .windows(2)
            .map(|ends| {
                let top = |at: PlanPoint| {
                    eye.point(at, base_m.unwrap_or_else(|| slope.height_m(at)) + height_m)
                };
                Edge {
                    start: top(ends[0]),
                    end: top(ends[1]),
                }
            })
            .collect(),
        Obstacle::Building {
            corners_m,
            base_m,
            eaves_m,
            ridge_m,
            ..
        } => {
            let base_m = base_m.unwrap_or_else(|| slope.height_m(mean(corners_m)));
            let eaves = sides(corners_m).map(|(a, b)| eye.level_edge(a, b, base_m + eaves_m));
            let roof = ridge_m.map_or_else(Vec::new, |ridge_m| {
                eye.roof(corners_m, base_m + eaves_m, base_m + ridge_m)
            });
            eaves.chain(roof).collect()
        }
    }
}

fn mean(corners: &[PlanPoint]) -> PlanPoint {
    let share = 1.0 / corners.len() as f64;
    let origin = PlanPoint::new(0.0, 0.0);
    corners
        .iter()
        .fold(origin, |sum, corner| sum.plus(*corner, share))
}

/// The eye, with heights over the mark's ground.
struct Eye {
    plan: PlanPoint,
    height_m: f64,
}

impl Eye {
    fn point(&self, plan: PlanPoint, height_m: f64) -> Point {
        Point {
            plan: plan.minus(self.plan),
            up_m: height_m - self.height_m,
        }
    }

    fn level_edge(&self, a: PlanPoint, b: PlanPoint, height_m: f64) -> Edge {
        Edge {
            start: self.point(a, height_m),
            end: self.point(b, height_m),
        }
    }

    /// A flat strip through the axis, turned to the eye.
    fn pole(&self, axis: PlanPoint, top_m: f64, width_m: f64) -> Vec<Edge> {
        let across = self.across(axis);
        vec![self.level_edge(
            axis.plus(across, -0.5 * width_m),
            axis.plus(across, 0.5 * width_m),
            top_m,
        )]
    }

    /// Across the line of sight to an axis, clockwise as azimuth grows; of length one.
    fn across(&self, axis: PlanPoint) -> PlanPoint {
        let towards = axis.minus(self.plan);
        let distance_m = towards.length_m();
        PlanPoint::new(towards.north_m / distance_m, -towards.east_m / distance_m)
    }

    /// The flat crown through a trunk's axis, turned to the eye.
    fn crown(&self, axis: PlanPoint, base_m: f64, height_m: f64, width_m: f64) -> Vec<Edge> {
        /// Where the shoulders begin, of the height.
        const SHOULDER: f64 = 0.6;
        /// How wide the top is, of the width.
        const TOP: f64 = 0.5;
        let across = self.across(axis);
        let half_m = 0.5 * width_m;
        let outline = [
            (-half_m, SHOULDER),
            (-TOP * half_m, 1.0),
            (TOP * half_m, 1.0),
            (half_m, SHOULDER),
        ];
        let points = outline.map(|(aside_m, share)| {
            self.point(axis.plus(across, aside_m), base_m + share * height_m)
        });
        points
            .windows(2)
            .map(|ends| Edge {
                start: ends[0],
                end: ends[1],
            })
            .collect()
    }

    /// Ridge and verges: from each end of the ridge to both corners of the wall it ends over.
    fn roof(&self, corners: &[PlanPoint], eaves_m: f64, ridge_m: f64) -> Vec<Edge> {
        let crossings = ridge_crossings(corners);
        let ridges = crossings
            .chunks_exact(2)
            .map(|ends| self.level_edge(ends[0].at, ends[1].at, ridge_m));
        let verges = crossings.iter().flat_map(|end| {
            let top = self.point(end.at, ridge_m);
            [end.wall.0, end.wall.1].map(|corner| Edge {
                start: top,
                end: self.point(corner, eaves_m),
            })
        });
        ridges.chain(verges).collect()
    }
}

/// Where the ridge's line crosses a wall.
struct RidgeEnd {
    along_m: f64,
    at: PlanPoint,
    wall: (PlanPoint, PlanPoint),
}

/// The ridge's ends, in order along its line: an even number, each pair with plan between.
fn ridge_crossings(corners: &[PlanPoint]) -> Vec<RidgeEnd> {
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
