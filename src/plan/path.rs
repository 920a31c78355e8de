//! One body's way across a site's sky, kept so that any instant of it costs next to nothing.

use super::passage::Way;
use super::track::{Sample, Track};
use crate::measure::{Angle, Vector};
use crate::sky::{Air, refraction};

/// Where a body is seen at one instant.
#[derive(Clone, Copy, Debug)]
pub(super) struct Seen {
    /// Azimuth of the centre.
    pub azimuth: Angle,
    /// Refracted altitude of the point that counts: planets' centres, the Moon's upper limb.
    pub altitude: Angle,
}

/// A body's way through a night, between samples by the cubic through the nearest four.
///
/// What is kept are directions, which turn evenly wherever the body stands, the zenith included.
/// In the 300 s between samples the sky turns by 0.022 rad, and a cubic strays from a circle by
/// at most (3/128) of that to the fourth power: 5e-9 rad, a thousandth of an arcsecond.
#[derive(Clone, Debug)]
pub(super) struct Path {
    step_s: f64,
    directions: Vec<Vector>,
    /// Half the apparent diameter where the upper limb counts, at each sample, radians.
    limbs: Vec<f64>,
    air: Air,
}

impl Path {
    /// The samples of a track, which stand at even steps from the night's start.
    pub fn of(track: &Track<'_>) -> Self {
        let samples = &track.samples;
        let length_s = samples.last().map_or(0.0, |last| last.at_s);
        let direction = |sample: &Sample| Vector::from_spherical(sample.azimuth, sample.airless);
        let has_limb = samples.iter().any(|sample| sample.limb > Angle::ZERO);
        Self {
            step_s: length_s / (samples.len() - 1) as f64,
            directions: samples.iter().map(direction).collect(),
            limbs: if has_limb {
                samples.iter().map(|s| s.limb.radians()).collect()
            } else {
                Vec::new()
            },
            air: track.watch.observer.air,
        }
    }
}

impl Way for Path {
    fn times_s(&self) -> impl Iterator<Item = f64> {
        (0..self.directions.len()).map(|k| k as f64 * self.step_s)
    }

    fn at(&self, at_s: f64) -> Seen {
        let weights = Cubic::at(at_s / self.step_s, self.directions.len());
        let direction = weights.of(|k| self.directions[k]);
        let limb = if self.limbs.is_empty() {
            Angle::ZERO
        } else {
            Angle::from_radians(weights.of(|k| self.limbs[k]))
        };
        Seen {
            azimuth: direction.longitude(),
            altitude: refraction::refracted(direction.latitude() + limb, &self.air),
        }
    }
}

/// The cubic through four neighbours of a row of even steps (Lagrange's form).
pub(super) struct Cubic {
    first: usize,
    weights: [f64; 4],
}

impl Cubic {
    /// At a place counted in steps, of a row of so many values, four at least; at the row's ends
    /// the four outermost count.
    pub fn at(place: f64, count: usize) -> Self {
        let last_first = count.saturating_sub(4);
        let first = (place.floor() - 1.0).clamp(0.0, last_first as f64) as usize;
        let x = place - first as f64;
        let (a, b, c) = (x - 1.0, x - 2.0, x - 3.0);
        Self {
            first,
            weights: [
                a * b * c / -6.0,
                x * b * c / 2.0,
                x * a * c / -2.0,
                x * a * b / 6.0,
            ],
        }
    }

    /// The four that count.
    pub fn nodes(&self) -> std::ops::Range<usize> {
        self.first..self.first + 4
    }

    /// The value there.
    pub fn of<T>(&self, value: impl Fn(usize) -> T) -> T
    where
        T: std::ops::Mul<f64, Output = T> + std::ops::Add<Output = T>,
    {
        let [a, b, c, d] = self.weights;
        let k = self.first;
        value(k) * a + value(k + 1) * b + value(k + 2) * c + value(k + 3) * d
    }
}
