//! The shape of an orbit about the Sun, for drawing.

use crate::measure::{Angle, Vector};
use std::f64::consts::TAU;

/// The Sun's attraction, au³/day²: the square of the Gaussian constant.
const SUN_ATTRACTION: f64 = 0.017_202_098_95 * 0.017_202_098_95;

/// Points of the ellipse that a body at `place` (au from the Sun) with `velocity` (au/day)
/// runs round, evenly in eccentric anomaly from perihelion on; the osculating orbit.
///
/// Source: the two-body problem (vis-viva and the eccentricity vector), common practice. The
/// planets' masses are left out: at most 0.1 % of the axis.
pub(super) fn ellipse(place: Vector, velocity: Vector, points: usize) -> Vec<Vector> {
    let distance = place.length();
    let axis = 1.0 / (2.0 / distance - velocity.dot(velocity) / SUN_ATTRACTION);
    let pole = place.cross(velocity);
    let eccentricity = velocity.cross(pole) / SUN_ATTRACTION - place / distance;
    let e = eccentricity.length();
    let to_perihelion = eccentricity / e;
    let across = pole.unit().cross(to_perihelion);
    let minor_axis = axis * (1.0 - e * e).sqrt();
    (0..points)
        .map(|k| {
            let anomaly = Angle::from_radians(TAU * k as f64 / points as f64);
            let (sin, cos) = anomaly.sin_cos();
            to_perihelion * (axis * (cos - e)) + across * (minor_axis * sin)
        })
        .collect()
}
