//! Elevations in memory: looked up at a place, and along straight lines from the site.

use super::geodesy::{Origin, Position};
use super::raster::{Raster, Sample, System};
use crate::measure::Angle;

/// The elevations around a site, read from its tiles.
pub struct Relief {
    pub(super) origin: Origin,
    /// Finest first: a finer one is asked before a coarser one.
    rasters: Vec<Placed>,
    /// The systems that they are laid out in, each once.
    systems: Vec<System>,
}

struct Placed {
    raster: Raster,
    /// Which of the systems.
    system: usize,
    spacing_m: f64,
}

impl Relief {
    /// Of rasters in the order in which they are asked.
    pub(super) fn new(centre: Position, rasters: Vec<Raster>) -> Self {
        let mut systems: Vec<System> = Vec::new();
        let placed = rasters
            .into_iter()
            .map(|raster| {
                let placement = raster.placement;
                let known = systems.iter().position(|s| *s == placement.system);
                Placed {
                    system: known.unwrap_or_else(|| {
                        systems.push(placement.system);
                        systems.len() - 1
                    }),
                    spacing_m: placement.spacing_m(centre.latitude),
                    raster,
                }
            })
            .collect();
        Self {
            origin: Origin::new(centre),
            rasters: placed,
            systems,
        }
    }

    /// Elevation of the ground at a place (WGS84), m, bilinear between the postings of the
    /// finest tile that knows it. `None` outside the part that was read, and in voids.
    pub fn elevation_m(&self, latitude: Angle, longitude: Angle) -> Option<f64> {
        let position = Position {
            latitude: latitude.radians(),
            longitude: longitude.radians(),
        };
        match self.sample(position) {
            Sample::Ground(elevation_m) => Some(elevation_m),
            Sample::Void | Sample::Outside => None,
        }
    }

    fn sample(&self, position: Position) -> Sample {
        let projected: Vec<_> = self.systems.iter().map(|s| s.project(position)).collect();
        first_known(self.rasters.iter().filter_map(|placed| {
            let (column, row) = placed.raster.placement.cell(projected[placed.system]?);
            Some(placed.raster.at(column, row))
        }))
    }
}

/// The first ground known between postings, else that just beyond a grid's edge, else whether
/// any grid has a void there.
fn first_known(samples: impl Iterator<Item = (Sample, bool)>) -> Sample {
    let mut fallback = Sample::Outside;
    for (sample, is_between) in samples {
        match (sample, fallback) {
            (Sample::Ground(_), _) if is_between => return sample,
            (Sample::Ground(_), Sample::Void | Sample::Outside)
            | (Sample::Void, Sample::Outside) => fallback = sample,
            _ => {}
        }
    }
    fallback
}

/// A straight line over the ground from the site, ready to be looked up along.
///
/// Places are exact every kilometre; between these, columns and rows go straight, which is
/// within 0.1 m up to latitude 75.
pub(super) struct Ray<'a> {
    relief: &'a Relief,
    /// Of all kilometres in turn.
    tracks: Vec<Track>,
    /// The first track of each kilometre, and at last their number.
    firsts: Vec<usize>,
    /// Places at the ends of a kilometre in each system: kept to spare allocation.
    ends: [Vec<Option<(f64, f64)>>; 2],
}

/// The line through one raster within one kilometre.
struct Track {
    raster: usize,
    /// Column and row at the kilometre's begin.
    from: (f64, f64),
    /// Their change in a metre.
    by: (f64, f64),
}

const NODE_M: f64 = 1000.0;

impl<'a> Ray<'a> {
    pub(super) fn new(relief: &'a Relief) -> Self {
        Self {
            relief,
            tracks: Vec::new(),
            firsts: Vec::new(),
            ends: [Vec::new(), Vec::new()],
        }
    }

    /// Turns the line to an azimuth, as far as a radius.
    pub(super) fn aim(&mut self, azimuth: Angle, radius_m: f64) {
        let relief = self.relief;
        let project = |distance_m: f64, into: &mut Vec<Option<(f64, f64)>>| {
            let position = relief.origin.ahead(azimuth, distance_m);
            into.clear();
            into.extend(relief.systems.iter().map(|s| s.project(position)));
        };
        self.tracks.clear();
        self.firsts.clear();
        project(0.0, &mut self.ends[1]);
        for kilometre in 0..(radius_m / NODE_M).ceil() as usize {
            self.firsts.push(self.tracks.len());
            self.ends.swap(0, 1);
            let [begin, end] = &mut self.ends;
            project((kilometre + 1) as f64 * NODE_M, end);
            for (raster, placed) in relief.rasters.iter().enumerate() {
                let (Some(from), Some(to)) = (begin[placed.system], end[placed.system]) else {
                    continue;
                };
                let placement = &placed.raster.placement;
                let (from, to) = (placement.cell(from), placement.cell(to));
                if placed.raster.meets(from, to) {
                    let by = ((to.0 - from.0) / NODE_M, (to.1 - from.1) / NODE_M);
                    self.tracks.push(Track { raster, from, by });
                }
            }
        }
        self.firsts.push(self.tracks.len());
    }

    fn tracks(&self, kilometre: usize) -> &[Track] {
        let last = self.firsts.len().saturating_sub(2);
        let kilometre = kilometre.min(last);
        &self.tracks[self.firsts[kilometre]..self.firsts[kilometre + 1]]
    }

    /// The ground at a distance.
    pub(super) fn at(&self, distance_m: f64) -> Sample {
        let kilometre = (distance_m / NODE_M) as usize;
        let beyond_m = distance_m - kilometre as f64 * NODE_M;
        first_known(self.tracks(kilometre).iter().map(|track| {
            self.relief.rasters[track.raster].raster.at(
                track.from.0 + track.by.0 * beyond_m,
                track.from.1 + track.by.1 * beyond_m,
            )
        }))
    }

    /// Distance between postings of the finest grid around the site; infinite without one.
    pub(super) fn spacing_m(&self) -> f64 {
        self.tracks(0)
            .iter()
            .map(|track| self.relief.rasters[track.raster].spacing_m)
            .fold(f64::INFINITY, f64::min)
    }

    /// Distance at which the line next crosses from one cell of the finest grid there into
    /// another, beyond a distance; at most a kilometre's end, or 100 m on where there is no grid.
    pub(super) fn next_cell_m(&self, distance_m: f64) -> f64 {
        const ACROSS_NOTHING_M: f64 = 100.0;
        let kilometre = (distance_m / NODE_M) as usize;
        let begin_m = kilometre as f64 * NODE_M;
        let beyond_m = distance_m - begin_m;
        let ahead_m = self
            .tracks(kilometre)
            .first()
            .map_or(ACROSS_NOTHING_M, |track| {
                let to_line_m = |from: f64, by: f64| {
                    if by == 0.0 {
                        return f64::INFINITY;
                    }
                    let at = from + by * beyond_m;
                    let line = if by > 0.0 {
                        at.floor() + 1.0
                    } else {
                        at.ceil() - 1.0
                    };
                    (line - at) / by
                };
                let columns_m = to_line_m(track.from.0, track.by.0);
                columns_m.min(to_line_m(track.from.1, track.by.1))
            });
        (distance_m + ahead_m).min(begin_m + NODE_M)
    }
}
