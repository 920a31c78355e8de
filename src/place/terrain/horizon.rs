//! The search for what stands highest, along lines in all directions.

use super::far_skyline::{Crest, FarSkyline};
use super::raster::Sample;
use super::relief::{Ray, Relief};
use crate::measure::{Angle, Progress};
use std::f64::consts::{SQRT_2, TAU};

/// Directions of the first, quick pass: one every 2 deg.
pub(super) const COARSE_AZIMUTHS: usize = 180;
/// Directions of the full pass: one every 0.1 deg. Between two of them a peak with flanks of
/// 45 deg stands at most 0.05 deg above the skyline.
pub(super) const FINE_AZIMUTHS: usize = 3600;

/// Steps along a line grow with this share of the distance. A crest with flanks of 45 deg that
/// two samples leave between them stands at most half a step over the higher of the two: 0.02 deg.
/// Where that would be shorter than half the spacing of the postings, half the spacing is enough,
/// since between postings the ground is taken as smooth; the highest sample is then refined.
const STEP_SHARE: f64 = 7e-4;

/// Terrain nearer than this is left to the obstacles, m; more where postings are far apart.
const NEAREST_M: f64 = 200.0;

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
    /// the one before.
    fn edges_m(&self, relief: &Relief) -> Vec<f64> {
        let mut ray = Ray::new(relief);
        ray.aim(Angle::ZERO, 1.0);
        let spacing_m = ray.spacing_m(0.0);
        let nearest_m = NEAREST_M.max(if spacing_m.is_finite() {
            2.0 * spacing_m
        } else {
            0.0
        });
        let mut edges_m = vec![nearest_m.min(0.5 * self.radius_m)];
        while let Some(last) = edges_m.last().filter(|last| **last < self.radius_m) {
            edges_m.push((last * SQRT_2).min(self.radius_m));
        }
        edges_m
    }

    /// Tangent of the altitude of ground at a distance, seen from the eye over the mark.
    fn tangent(&self, distance_m: f64, elevation_m: f64) -> f64 {
        let rise_m = elevation_m - self.ground_m - self.eye_height_m;
        rise_m / distance_m - distance_m * self.drop_per_m
    }

    /// Finds the highest of each band along one line.
    fn trace(&self, ray: &Ray, edges_m: &[f64], crests: &mut [Option<Crest>], tally: &mut Tally) {
        for ([begin_m, end_m], crest) in edges_m.array_windows().zip(crests) {
            let mut highest: Option<Seen> = None;
            let mut distance_m = *begin_m;
            loop {
                let next_m = (distance_m + step_m(ray, distance_m)).min(*end_m);
                let ahead_m = next_m - distance_m;
                tally.all_m += ahead_m;
                match ray.at(distance_m) {
                    Sample::Ground(elevation_m) => {
                        self.keep_higher(&mut highest, distance_m, elevation_m);
                    }
                    Sample::Void => tally.void_m += ahead_m,
                    Sample::Outside => tally.outside_m += ahead_m,
                }
                if distance_m >= *end_m {
                    break;
                }
                distance_m = next_m;
            }
            if let Some(seen) = &mut highest {
                self.refine(ray, seen, *begin_m, *end_m);
                *crest = Some(Crest {
                    distance_m: seen.distance_m as f32,
                    rise_m: (seen.elevation_m - self.ground_m) as f32,
                });
            }
        }
    }

    fn keep_higher(&self, highest: &mut Option<Seen>, distance_m: f64, elevation_m: f64) {
        let tangent = self.tangent(distance_m, elevation_m);
        if highest.as_ref().is_none_or(|seen| tangent > seen.tangent) {
            *highest = Some(Seen {
                distance_m,
                elevation_m,
                tangent,
            });
        }
    }

    /// Looks for still higher ground around the highest sample, each time with an eighth of the
    /// step; in the end a few centimetres.
    fn refine(&self, ray: &Ray, seen: &mut Seen, begin_m: f64, end_m: f64) {
        const PARTS: i32 = 8;
        let mut step_m = step_m(ray, seen.distance_m);
        for _ in 0..3 {
            let middle_m = seen.distance_m;
            step_m /= f64::from(PARTS);
            for k in -PARTS..=PARTS {
                let distance_m = (middle_m + f64::from(k) * step_m).clamp(begin_m, end_m);
                if let Sample::Ground(elevation_m) = ray.at(distance_m) {
                    let tangent = self.tangent(distance_m, elevation_m);
                    if tangent > seen.tangent {
                        *seen = Seen {
                            distance_m,
                            elevation_m,
                            tangent,
                        };
                    }
                }
            }
        }
    }
}

/// The highest ground of a band so far.
struct Seen {
    distance_m: f64,
    elevation_m: f64,
    tangent: f64,
}

fn step_m(ray: &Ray, distance_m: f64) -> f64 {
    // Where there is no grid, strides that cannot jump over the begin of one by much.
    const ACROSS_NOTHING_M: f64 = 100.0;
    let half_m = (0.5 * ray.spacing_m(distance_m)).min(ACROSS_NOTHING_M);
    half_m.max(STEP_SHARE * distance_m)
}
