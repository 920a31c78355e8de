//! Going over the grounds, coarse to fine, with several threads.

use super::{Raster, Standing, Stay};
use crate::measure::Progress;
use crate::place::{PlanPoint, TerrainView};
use std::num::NonZeroUsize;
use std::sync::atomic::{AtomicUsize, Ordering};
use std::sync::mpsc;

/// Every eighth square of every eighth row comes first, then every fourth, and so on.
const COARSEST: usize = 8;

/// One square of a standing map.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Cell {
    /// Not looked at yet.
    Waiting,
    /// Nobody is to stand at its centre.
    LeftOut(WhyLeftOut),
    /// What somebody at its centre has.
    Stay(Stay),
}

/// Why nobody is to stand somewhere.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum WhyLeftOut {
    /// Off the grounds.
    Outside,
    /// In an excluded part.
    Excluded,
    /// In an obstacle.
    InObstacle,
}

/// How many minutes each square of the grounds gives.
#[derive(Clone, Debug, PartialEq)]
pub struct StandingMap {
    /// Where the squares lie.
    pub raster: Raster,
    /// What the same eye would have with nothing in the way.
    pub open: Stay,
    pub(super) cells: Vec<Cell>,
}

impl Standing<'_> {
    /// Goes over the grounds with so many threads.
    ///
    /// The squares come coarse to fine, and `share` is called after each pass and several times
    /// during it with what is known so far; [`StandingMap::shown`] fills the gaps. `progress`
    /// counts squares; once it is cancelled, nothing more is looked at and the answer is `None`, as it is for no nights.
    pub fn map(
        &self,
        raster: Raster,
        threads: NonZeroUsize,
        progress: &Progress,
        mut share: impl FnMut(&StandingMap),
    ) -> Option<StandingMap> {
        /// Rows between two reports within a pass.
        const ROWS_PER_REPORT: usize = 16;
        let mut map = StandingMap {
            raster,
            open: self.stay_in_the_open(),
            cells: vec![Cell::Waiting; raster.len()],
        };
        progress.set_total(raster.len() as u64);
        // Terrain is far: from the middle of the grounds it stands as from their edges to within
        // what a person could measure.
        let middle = raster.centre(raster.columns / 2, raster.rows / 2);
        let viewpoint = self.request.site.viewpoint_at(middle, self.request.stature);
        let terrain = self.grounds()?.terrain_from(viewpoint);
        let jobs = jobs(&raster);
        let next = AtomicUsize::new(0);
        let (send, receive) = mpsc::channel();
        std::thread::scope(|scope| {
            for _ in 0..threads.get() {
                let (send, next, jobs, terrain) = (send.clone(), &next, &jobs, &terrain);
                scope.spawn(move || {
                    while let Some(job) = jobs.get(next.fetch_add(1, Ordering::Relaxed)) {
                        if progress.is_cancelled()
                            || send.send(self.row(&raster, job, terrain)).is_err()
                        {
                            return;
                        }
                    }
                });
            }
            drop(send);
            let mut rows = 0;
            for row in receive {
                progress.advance(row.len() as u64);
                for (index, cell) in row {
                    map.cells[index] = cell;
                }
                rows += 1;
                if rows % ROWS_PER_REPORT == 0 && !progress.is_cancelled() {
                    share(&map);
                }
            }
        });
        if progress.is_cancelled() {
            return None;
        }
        share(&map);
        Some(map)
    }

    fn row(&self, raster: &Raster, job: &Job, terrain: &TerrainView) -> Vec<(usize, Cell)> {
        let columns = (job.first..raster.columns).step_by(job.step);
        columns
            .map(|column| {
                let cell = self.cell(raster.centre(column, job.row), terrain);
                (job.row * raster.columns + column, cell)
            })
            .collect()
    }

    fn cell(&self, at: PlanPoint, terrain: &TerrainView) -> Cell {
        match self.left_out(at) {
            Some(why) => Cell::LeftOut(why),
            None => {
                let viewpoint = self.request.site.viewpoint_at(at, self.request.stature);
                Cell::Stay(self.stay_near(viewpoint, terrain))
            }
        }
    }

    /// Why nobody is to stand at a place, if so.
    pub fn left_out(&self, at: PlanPoint) -> Option<WhyLeftOut> {
        let site = self.request.site;
        if !site.outline_holds(at) {
            Some(WhyLeftOut::Outside)
        } else if site.exclusion_at(at).is_some() {
            Some(WhyLeftOut::Excluded)
        } else if self.grounds()?.around(at).is_some() {
            Some(WhyLeftOut::InObstacle)
        } else {
            None
        }
    }
}

/// Some squares of one row: every `step`th from `first` on.
struct Job {
    row: usize,
    first: usize,
    step: usize,
}

/// Every square once, coarse to fine.
fn jobs(raster: &Raster) -> Vec<Job> {
    let mut jobs = Vec::new();
    let mut step = COARSEST;
    while step >= 1 {
        let coarser = 2 * step;
        for row in (0..raster.rows).step_by(step) {
            // Of a row of the pass before, every other square is known.
            let is_known = step < COARSEST && row % coarser == 0;
            jobs.push(Job {
                row,
                first: if is_known { step } else { 0 },
                step: if is_known { coarser } else { step },
            });
        }
        step /= 2;
    }
    jobs
}

impl StandingMap {
    /// A square as far as it is known.
    pub fn cell(&self, column: usize, row: usize) -> Cell {
        let index = row * self.raster.columns + column;
        self.cells.get(index).copied().unwrap_or(Cell::Waiting)
    }

    /// A square, or while it waits the coarser one that stands for it.
    pub fn shown(&self, column: usize, row: usize) -> Cell {
        let mut step = 1;
        while step <= COARSEST {
            let cell = self.cell(column - column % step, row - row % step);
            if cell != Cell::Waiting {
                return cell;
            }
            step *= 2;
        }
        Cell::Waiting
    }

    /// The same map by the least that one of the nights gives, in place of the sum over them.
    #[must_use]
    pub fn by_least(&self) -> Self {
        let cells = self.cells.iter().map(|cell| match cell {
            Cell::Stay(stay) => Cell::Stay(stay.by_least()),
            other => *other,
        });
        Self {
            open: self.open.by_least(),
            cells: cells.collect(),
            ..*self
        }
    }

    /// Every square that is known and can be stood on, with its centre.
    pub fn stays(&self) -> impl Iterator<Item = (PlanPoint, Stay)> + '_ {
        self.cells.iter().enumerate().filter_map(|(index, cell)| {
            let (column, row) = (index % self.raster.columns, index / self.raster.columns);
            Some((self.raster.centre(column, row), cell.stay()?))
        })
    }
}

impl Cell {
    /// What it gives, if it is known and can be stood on.
    pub fn stay(&self) -> Option<Stay> {
        match self {
            Self::Stay(stay) => Some(*stay),
            Self::Waiting | Self::LeftOut(_) => None,
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_square_comes_once_and_the_coarse_ones_first() {
        let raster = Raster {
            origin: PlanPoint::new(0.0, 0.0),
            step_m: 1.0,
            columns: 21,
            rows: 13,
        };
        let mut order = Vec::new();
        for job in jobs(&raster) {
            for column in (job.first..raster.columns).step_by(job.step) {
                order.push((column, job.row));
            }
        }
        assert_eq!(
            order[..6],
            [(0, 0), (8, 0), (16, 0), (0, 8), (8, 8), (16, 8)]
        );
        let mut once = order.clone();
        once.sort_unstable();
        once.dedup();
        assert_eq!((once.len(), order.len()), (raster.len(), raster.len()));
    }
}
