//! What a pointed position is drawn to: corners, lines, right angles, the grid.

use super::camera::Camera;
use super::geometry::{crossing, dot, minus, nearest_on, plus, rounded, sides};
use super::things::{self, Form};
use crate::app::grounds::Selection;
use crate::place::{PlanPoint, Site};

/// Within so many points of the screen a position is drawn to something.
const REACH: f32 = 8.0;

/// To what a position was drawn.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Sign {
    /// A corner or an axis of something.
    Corner,
    /// A side of something.
    Line,
    /// A right angle, or straight on.
    RightAngle,
    /// A line of the grid.
    Grid,
}

/// A position and to what it was drawn.
#[derive(Clone, Debug, PartialEq)]
pub struct Snapped {
    /// The position.
    pub at: PlanPoint,
    /// To what it was drawn, if it was.
    pub sign: Option<Sign>,
    /// Where the right angle's line comes from.
    pub from: Vec<PlanPoint>,
}

/// Everything that a position may be drawn to.
#[derive(Clone, Debug, Default)]
pub struct Snap {
    corners: Vec<PlanPoint>,
    sides: Vec<(PlanPoint, PlanPoint)>,
    /// Lines on which the angle is right: a point and a direction of length one.
    rays: Vec<(PlanPoint, PlanPoint)>,
    grid_m: f64,
    reach_m: f64,
    step_m: f64,
    is_on: bool,
}

impl Snap {
    /// Drawn to everything of a site but what is being changed itself; a spot only to the grid,
    /// since nobody stands on a corner.
    pub fn new(site: &Site, changed: Option<Selection>, camera: Camera, is_on: bool) -> Self {
        let mut snap = Self {
            grid_m: camera.grid_m(),
            reach_m: f64::from(REACH) / camera.view.points_per_m,
            step_m: camera.step_m(),
            is_on,
            ..Self::default()
        };
        if matches!(changed, Some(Selection::Spot(_))) {
            return snap;
        }
        for thing in things::all(site) {
            if Some(thing) == changed {
                continue;
            }
            let points = thing.points(site);
            let is_closed = thing.form(site) == Form::Corners;
            snap.sides.extend(sides(&points, is_closed));
            snap.corners.extend(points);
        }
        snap
    }

    /// The same, drawn also to lines on which an angle is right.
    pub fn with_rays(mut self, rays: Vec<(PlanPoint, PlanPoint)>) -> Self {
        self.rays = rays;
        self
    }

    /// The same, drawn also to some corners.
    pub fn with_corners(mut self, corners: &[PlanPoint]) -> Self {
        self.corners.extend(corners);
        self
    }

    /// Where a pointed position is drawn to.
    pub fn at(&self, raw: PlanPoint) -> Snapped {
        let plain = |at, sign| Snapped {
            at,
            sign,
            from: Vec::new(),
        };
        if !self.is_on {
            return plain(rounded(raw, self.step_m), None);
        }
        let is_near = |point: &PlanPoint| point.distance_m(raw) <= self.reach_m;
        let nearest = |points: &mut dyn Iterator<Item = PlanPoint>| {
            points
                .filter(is_near)
                .min_by(|a, b| a.distance_m(raw).total_cmp(&b.distance_m(raw)))
        };
        if let Some(corner) = nearest(&mut self.corners.iter().copied()) {
            return plain(corner, Some(Sign::Corner));
        }
        if let Some(right) = self.right_angle(raw) {
            return right;
        }
        if let Some(on_side) = nearest(&mut self.sides.iter().map(|side| nearest_on(raw, *side))) {
            return plain(rounded(on_side, 0.001), Some(Sign::Line));
        }
        let (at, is_on_grid) = self.grid(raw);
        plain(rounded(at, self.step_m), is_on_grid.then_some(Sign::Grid))
    }

    /// On the nearest line of a right angle; where another crosses it near, on both.
    fn right_angle(&self, raw: PlanPoint) -> Option<Snapped> {
        let on_ray =
            |(from, along): (PlanPoint, PlanPoint)| plus(from, along, dot(minus(raw, from), along));
        let mut near: Vec<_> = self
            .rays
            .iter()
            .filter(|ray| on_ray(**ray).distance_m(raw) <= self.reach_m)
            .collect();
        near.sort_by(|a, b| {
            let off_m = |ray| on_ray(ray).distance_m(raw);
            off_m(**a).total_cmp(&off_m(**b))
        });
        let first = **near.first()?;
        let both = near[1..].iter().find_map(|ray| {
            let at = crossing(first, **ray)?;
            (at.distance_m(raw) <= 2.0 * self.reach_m).then_some((at, ray.0))
        });
        let (at, from) = match both {
            Some((at, other)) => (at, vec![first.0, other]),
            None => {
                // Along the line by whole steps, so that lengths are round.
                let (from, along) = first;
                let length_m = dot(minus(raw, from), along);
                let per_m = 1.0 / self.step_m;
                let at = plus(from, along, (length_m * per_m).round() / per_m);
                (at, vec![from])
            }
        };
        Some(Snapped {
            at: rounded(at, 0.001),
            sign: Some(Sign::RightAngle),
            from,
        })
    }

    /// On the grid's lines, where they are near.
    fn grid(&self, raw: PlanPoint) -> (PlanPoint, bool) {
        let on_line = |value: f64| {
            let line = (value / self.grid_m).round() * self.grid_m;
            ((line - value).abs() <= self.reach_m).then_some(line)
        };
        let (east, north) = (on_line(raw.east_m), on_line(raw.north_m));
        let at = PlanPoint::new(east.unwrap_or(raw.east_m), north.unwrap_or(raw.north_m));
        (at, east.is_some() || north.is_some())
    }
}
