//! The places of a crowd.

use super::{PlanPoint, Site, Spot};
use std::f64::consts::TAU;

/// How far apart people of a crowd are looked at, m; in a large patch farther, so that there are
/// not too many.
const LEAST_APART_M: f64 = 1.0;
/// Rings around the middle of a large patch: 1 + 6 + 12 + 18 + 24 places.
const MOST_RINGS: f64 = 4.0;

impl Site {
    /// Places that stand for a spot's patch: its middle, and rings around it out to its radius,
    /// at least 1 m apart, at most 61 in all. Those in an obstacle or an excluded area are left
    /// out; of a spot without a radius, and where nothing else is left, the middle remains.
    pub fn patch(&self, spot: &Spot) -> Vec<PlanPoint> {
        let middle = spot.plan_point();
        let radius_m = spot.radius_m.unwrap_or(0.0);
        let rings = (radius_m / LEAST_APART_M).ceil().clamp(0.0, MOST_RINGS) as usize;
        let around = (1..=rings).flat_map(|ring| {
            let distance_m = radius_m * ring as f64 / rings as f64;
            // Six times as many as rings: as far apart along a ring as from ring to ring.
            let count = 6 * ring;
            (0..count).map(move |k| {
                let (sin, cos) = (TAU * k as f64 / count as f64).sin_cos();
                middle.plus(PlanPoint::new(sin, cos), distance_m)
            })
        });
        let mut places: Vec<PlanPoint> = std::iter::once(middle)
            .chain(around)
            .filter(|at| self.can_stand_at(*at))
            .collect();
        if places.is_empty() {
            places.push(middle);
        }
        places
    }

    /// Whether somebody can stand at a point: it lies in no obstacle and no excluded area.
    pub fn can_stand_at(&self, at: PlanPoint) -> bool {
        let is_in_obstacle = self.obstacles.iter().any(|obstacle| obstacle.surrounds(at));
        !is_in_obstacle && !self.excluded.iter().any(|area| area.holds(at))
    }
}
