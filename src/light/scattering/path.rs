//! Straight paths through the spherical atmosphere, cut into steps.

use super::atmosphere::{EARTH_KM, TOP_KM};

/// One step of a path.
#[derive(Clone, Copy, Debug)]
pub struct Step {
    /// Height of its middle, km.
    pub height_km: f64,
    /// Distance of its middle from the start, km.
    pub distance_km: f64,
    /// Its length, km.
    pub length_km: f64,
}

/// A straight path from a height: in to its lowest point or the ground, where it has one, and
/// from there out to the top of the atmosphere. Steps crowd where the air is densest.
#[derive(Clone, Copy, Debug)]
pub struct Path {
    radius_km: f64,
    cos_zenith: f64,
    inward_km: f64,
    outward_km: f64,
    steps: usize,
    meets_ground: bool,
}

/// The cosine of the zenith distance of the Earth's edge seen from a height.
pub fn cos_edge(height_km: f64) -> f64 {
    let ratio = EARTH_KM / (EARTH_KM + height_km);
    -(1.0 - ratio * ratio).max(0.0).sqrt()
}

impl Path {
    /// The path that leaves at a zenith distance of given cosine; `steps` is the number on each
    /// of its legs.
    pub fn new(height_km: f64, cos_zenith: f64, steps: usize) -> Self {
        Self::with_ground(
            height_km,
            cos_zenith,
            steps,
            cos_zenith < cos_edge(height_km),
        )
    }
    /// The same for a direction known to miss the Earth, if only just.
    pub fn clear(height_km: f64, cos_zenith: f64, steps: usize) -> Self {
        Self::with_ground(height_km, cos_zenith, steps, false)
    }
    fn with_ground(height_km: f64, cos_zenith: f64, steps: usize, meets_ground: bool) -> Self {
        let radius_km = EARTH_KM + height_km;
        let to_lowest = -radius_km * cos_zenith;
        let across = radius_km * radius_km * (1.0 - cos_zenith * cos_zenith);
        let half_chord = |radius: f64| (radius * radius - across).max(0.0).sqrt();
        let (inward_km, outward_km) = if meets_ground {
            (to_lowest - half_chord(EARTH_KM), 0.0)
        } else {
            let inward = to_lowest.max(0.0);
            (inward, half_chord(EARTH_KM + TOP_KM) + to_lowest - inward)
        };
        Self {
            radius_km,
            cos_zenith,
            inward_km,
            outward_km,
            steps,
            meets_ground,
        }
    }
    /// Where it meets the ground, if it does: the distance from the start, km.
    pub fn ground_km(&self) -> Option<f64> {
        self.meets_ground.then_some(self.inward_km)
    }
    /// Its steps, in order from the start.
    pub fn steps(&self) -> impl Iterator<Item = Step> {
        let path = *self;
        let count = |length_km: f64| if length_km > 0.0 { path.steps } else { 0 };
        let inward = (0..count(path.inward_km))
            .rev()
            .map(move |k| path.step(k, path.inward_km, -1.0));
        let outward = (0..count(path.outward_km)).map(move |k| path.step(k, path.outward_km, 1.0));
        inward.chain(outward)
    }
    /// Step `k` of a leg, counted from the lowest point.
    fn step(&self, k: usize, leg_km: f64, sign: f64) -> Step {
        let part = |k: usize| leg_km * (k as f64 / self.steps as f64).powi(2);
        let (near, far) = (part(k), part(k + 1));
        let distance_km = self.inward_km + sign * (near + far) / 2.0;
        let (r, d) = (self.radius_km, distance_km);
        let radius = (r * r + d * d + 2.0 * r * d * self.cos_zenith).sqrt();
        Step {
            height_km: (radius - EARTH_KM).max(0.0),
            distance_km,
            length_km: far - near,
        }
    }
}
