//! The search for what stands highest, along lines in all directions.

use super::far_skyline::{Crest, FarSkyline};
use super::raster::Sample;
use super::relief::{Ray, Relief};
use crate::measure::{Angle, Progress};
use std::f64::consts::{SQRT_2, TAU};
use std::ops::RangeInclusive;

/// Directions of the first, quick pass: one every 2 deg.
pub(super) const COARSE_AZIMUTHS: usize = 180;
/// Directions of the full pass: one every 0.1 deg. Between two of them a peak with flanks of
/// 45 deg stands at most 0.05 deg above the skyline.
pub(super) const FINE_AZIMUTHS: usize = 3600;

/// Lines are sampled where they cross from cell to cell, for there alone has the ground a crest:
/// within a cell, between four postings, it is smooth. Crossings closer together than this share
/// of the distance are passed over. A crest between two samples so close has, with flanks of
/// 45 deg, half their distance over the higher of them: 0.02 deg.
const STEP_SHARE: f64 = 7e-4;

/// Terrain nearer than this is left to the obstacles, m; more where postings are far apart.
const NEAREST_M: f64 = 200.0;

/// From here on bands of distance are wider, m.
const FAR_M: f64 = 3000.0;

/// What a search looks for, and how the ground falls away.
pub(super) struct Sweep {
    /// Elevation of the ground at the mark, m.
    pub ground_m: f64,
    /// Height of the eye above that, m.
    pub eye_height_m: f64,
    /// Drop of the surface below the horizontal for the square of a distance, 1/m.
    pub drop_per_m: f64,
    /// The farthest that matters, m.
    pub radius_m: f64,
}

/// How far lines were followed, m, and what they met.
#[derive(Clone, Copy, Default)]
struct Tally {
    all_m: f64,
    void_m: f64,
    outside_m: f64,
}

impl Sweep {
    /// Searches in so many directions; `None` when cancelled. Each direction is one step of
    /// progress.
    pub(super) fn run(
        &self,
        relief: &Relief,
        azimuths: usize,
        progress: &Progress,
    ) -> Option<FarSkyline> {
        let edges_m = self.edges_m(relief);
        let bands = edges_m.len() - 1;
        let threads = std::thread::available_parallelism().map_or(1, usize::from);
        let in_sector = azimuths.div_ceil(threads);
        let mut crests: Vec<Option<Crest>> = vec![None; azimuths * bands];
        let mut tallies = vec![Tally::default(); threads];
        std::thread::scope(|scope| {
            let sectors = crests.chunks_mut(in_sector * bands).zip(&mut tallies);
            for (sector, (crests, tally)) in sectors.enumerate() {
                let edges_m = &edges_m;
                scope.spawn(move || {
                    let mut ray = Ray::new(relief);
                    for (k, crests) in crests.chunks_mut(bands).enumerate() {
                        if progress.is_cancelled() {
                            return;
                        }
                        let turn = (sector * in_sector + k) as f64 / azimuths as f64;
                        ray.aim(Angle::from_radians(turn * TAU), self.radius_m);
                        self.trace(&ray, edges_m, crests, tally);
                        progress.advance(1);
                    }
                });
            }
        });
        if progress.is_cancelled() {
            return None;
        }
        let sum = |part: fn(&Tally) -> f64| tallies.iter().map(part).sum::<f64>();
        let (all_m, outside_m) = (sum(|tally| tally.all_m), sum(|tally| tally.outside_m));
        // By bands, as it is looked at from other spots.
        let by_band = (0..bands)
            .flat_map(|band| crests.iter().skip(band).step_by(bands).copied())
            .collect();
        Some(FarSkyline {
            azimuths,
            crests: by_band,
            ground_m: self.ground_m,
            drop_per_m: self.drop_per_m,
            nearest_m: edges_m[0],
            void_share: sum(|tally| tally.void_m) / (all_m - outside_m).max(1.0),
            uncovered_share: outside_m / all_m.max(1.0),
        })
    }

    /// Limits of the bands of distance, m: each reaches the square root of two times as far as
    /// the one before; far away, where steps on the grounds matter less, twice as far.
    fn edges_m(&self, relief: &Relief) -> Vec<f64> {
        let mut ray = Ray::new(relief);
        ray.aim(Angle::ZERO, 1.0);
        let spacing_m = ray.spacing_m();
        let nearest_m = NEAREST_M.max(if spacing_m.is_finite() {
            2.0 * spacing_m
        } else {
            0.0
        });
        let mut edges_m = vec![nearest_m.min(0.5 * self.radius_m)];
        while let Some(last) = edges_m.last().filter(|last| **last < self.radius_m) {
            let growth = if *last < FAR_M { SQRT_2 } else { 2.0 };
            edges_m.push((last * growth).min(self.radius_m));
        }
        edges_m
    }

    /// Finds the highest of each band along one line.
    fn trace(&self, ray: &Ray, edges_m: &[f64], crests: &mut [Option<Crest>], tally: &mut Tally) {
        let mut samples = Vec::new();
        for (&[begin_m, end_m], crest) in edges_m.array_windows().zip(crests) {
            let band = begin_m..=end_m;
            self.follow(ray, &band, &mut samples, tally);
            *crest = self.highest(ray, &band, &samples).map(|seen| Crest {
                distance_m: seen.distance_m as f32,
                rise_m: (seen.elevation_m - self.ground_m) as f32,
            });
        }
    }

    /// Samples a band along a line, both its ends included.
    fn follow(&self, ray: &Ray, band: &Band, samples: &mut Vec<Seen>, tally: &mut Tally) {
        let end_m = *band.end();
        let mut distance_m = *band.start();
        samples.clear();
        loop {
            let next_m = next_m(ray, distance_m).min(end_m);
            let ahead_m = next_m - distance_m;
            tally.all_m += ahead_m;
            match ray.at(distance_m) {
                Sample::Ground(elevation_m) => samples.push(self.seen(distance_m, elevation_m)),
                Sample::Void => tally.void_m += ahead_m,
                Sample::Outside => tally.outside_m += ahead_m,
            }
            if distance_m >= end_m {
                return;
            }
            distance_m = next_m;
        }
    }

    /// The highest ground of a band, from its samples in order. Every sample that is higher than
    /// its neighbours is refined if the ground beside it may win.
    fn highest(&self, ray: &Ray, band: &Band, samples: &[Seen]) -> Option<Seen> {
        let mut highest = *samples
            .iter()
            .max_by(|a, b| a.tangent.total_cmp(&b.tangent))?;
        let best_sample = highest.tangent;
        for (k, seen) in samples.iter().enumerate() {
            let before = k.checked_sub(1).and_then(|k| samples.get(k));
            let after = samples.get(k + 1);
            let is_peak = before.is_none_or(|before| seen.tangent > before.tangent)
                && after.is_none_or(|after| seen.tangent >= after.tangent);
            let gap_m = |other: Option<&Seen>| {
                other.map_or(0.0, |other| (other.distance_m - seen.distance_m).abs())
            };
            let width_m = gap_m(before).max(gap_m(after));
            // Flanks of 45 deg, as for the samples.
            let room = 0.5 * width_m / seen.distance_m;
            if is_peak && seen.tangent + room >= best_sample {
                let refined = self.refine(ray, band, *seen, width_m);
                if refined.tangent > highest.tangent {
                    highest = refined;
                }
            }
        }
        Some(highest)
    }

    /// Looks for still higher ground so far to both sides of a sample, three times and each time
    /// in steps of an eighth; in the end some centimetres.
    fn refine(&self, ray: &Ray, band: &Band, mut seen: Seen, width_m: f64) -> Seen {
        const PARTS: i32 = 8;
        let mut step_m = width_m;
        for _ in 0..3 {
            let middle_m = seen.distance_m;
            step_m /= f64::from(PARTS);
            for k in -PARTS..=PARTS {
                let beside_m = middle_m + f64::from(k) * step_m;
                let distance_m = beside_m.clamp(*band.start(), *band.end());
                if let Sample::Ground(elevation_m) = ray.at(distance_m) {
                    let beside = self.seen(distance_m, elevation_m);
                    if beside.tangent > seen.tangent {
                        seen = beside;
                    }
                }
            }
        }
        seen
    }

    /// Ground at a distance, seen from the eye over the mark.
    fn seen(&self, distance_m: f64, elevation_m: f64) -> Seen {
        let rise_m = elevation_m - self.ground_m - self.eye_height_m;
        Seen {
            distance_m,
            elevation_m,
            tangent: rise_m / distance_m - distance_m * self.drop_per_m,
        }
    }
}

/// A band of distance, m.
type Band = RangeInclusive<f64>;

/// Ground on a line.
#[derive(Clone, Copy)]
struct Seen {
    distance_m: f64,
    elevation_m: f64,
    /// Of its altitude.
    tangent: f64,
}

/// Where to sample after a distance.
fn next_m(ray: &Ray, distance_m: f64) -> f64 {
    ray.next_cell_m(distance_m)
        .max(distance_m * (1.0 + STEP_SHARE))
}
