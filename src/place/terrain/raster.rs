//! Elevations on a grid, and where the grid lies.

use super::geodesy::Position;
use super::utm::UtmZone;
use crate::place::SiteError;
use std::f64::consts::{PI, TAU};

/// The coordinates that a grid is laid out in.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) enum System {
    /// Longitude and latitude, degrees; longitude counted within half a turn of `about_deg`.
    Geographic { about_deg: f64 },
    /// Easting and northing, m.
    Utm(UtmZone),
}

impl System {
    /// The coordinates of a place; `None` where the system does not reach.
    pub(super) fn project(self, position: Position) -> Option<(f64, f64)> {
        match self {
            Self::Geographic { about_deg } => {
                let about = about_deg.to_radians();
                let turned = (position.longitude - about + PI).rem_euclid(TAU) - PI;
                Some((
                    (about + turned).to_degrees(),
                    position.latitude.to_degrees(),
                ))
            }
            Self::Utm(zone) => zone.project(position),
        }
    }
}

/// Where a file's grid lies: column and row of a place, counted between the postings.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Placement {
    pub system: System,
    /// `column = c[0] + c[1] x + c[2] y`, and `row` likewise, in the system's coordinates.
    pub column: [f64; 3],
    pub row: [f64; 3],
    /// Columns and rows of the whole file.
    pub size: (usize, usize),
}

impl Placement {
    /// Column and row of the system's coordinates; whole numbers at the postings.
    pub(super) fn cell(&self, (x, y): (f64, f64)) -> (f64, f64) {
        let at = |[constant, by_x, by_y]: [f64; 3]| constant + by_x * x + by_y * y;
        (at(self.column), at(self.row))
    }

    /// Distance between neighbouring postings at a latitude, m: the smaller of both directions.
    pub(super) fn spacing_m(&self, latitude: f64) -> f64 {
        const DEGREE_M: f64 = 111_195.0;
        let (x_m, y_m) = match self.system {
            System::Geographic { .. } => (DEGREE_M * latitude.cos().max(0.01), DEGREE_M),
            System::Utm(_) => (1.0, 1.0),
        };
        // Cells a metre along x and along y; where they are most, postings are closest.
        let along_x = (self.column[1].hypot(self.row[1])) / x_m;
        let along_y = (self.column[2].hypot(self.row[2])) / y_m;
        1.0 / along_x.max(along_y)
    }

    /// The part of the grid that holds all `places`, with a margin of two postings.
    pub(super) fn window(&self, places: &[Position]) -> Option<Window> {
        let mut low = (f64::INFINITY, f64::INFINITY);
        let mut high = (f64::NEG_INFINITY, f64::NEG_INFINITY);
        for place in places {
            let (column, row) = self.cell(self.system.project(*place)?);
            low = (low.0.min(column), low.1.min(row));
            high = (high.0.max(column), high.1.max(row));
        }
        let (first_column, columns) = stretch(low.0, high.0, self.size.0)?;
        let (first_row, rows) = stretch(low.1, high.1, self.size.1)?;
        Some(Window {
            first_column,
            first_row,
            columns,
            rows,
        })
    }
}

/// First and number of the postings from `low` to `high` among `size`; `None` if there are none.
fn stretch(low: f64, high: f64, size: usize) -> Option<(usize, usize)> {
    const MARGIN: f64 = 2.0;
    let last = size.checked_sub(1)? as f64;
    if !(high >= -0.5 && low <= last + 0.5) {
        return None;
    }
    let first = (low - MARGIN).floor().clamp(0.0, last) as usize;
    let end = (high + MARGIN).ceil().clamp(0.0, last) as usize;
    Some((first, end - first + 1))
}

/// A rectangle of a file's postings.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) struct Window {
    pub first_column: usize,
    pub first_row: usize,
    pub columns: usize,
    pub rows: usize,
}

impl Window {
    pub(super) fn postings(&self) -> usize {
        self.columns * self.rows
    }
}

/// What a grid says of one place.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) enum Sample {
    /// Elevation, m.
    Ground(f64),
    /// Within the grid, but unknown.
    Void,
    /// Not within the grid.
    Outside,
}

/// The elevations of a window.
pub(super) struct Raster {
    pub placement: Placement,
    window: Window,
    /// m, by rows; not a number where unknown.
    elevations_m: Vec<f32>,
}

impl Raster {
    /// A window with nothing known in it.
    ///
    /// # Errors
    /// There is no room for it.
    pub(super) fn unknown(placement: Placement, window: Window) -> Result<Self, SiteError> {
        let mut elevations_m = Vec::new();
        elevations_m
            .try_reserve_exact(window.postings())
            .map_err(|_| {
                SiteError(
                    "there is not enough memory for its elevations; use a smaller radius".into(),
                )
            })?;
        elevations_m.resize(window.postings(), f32::NAN);
        Ok(Self {
            placement,
            window,
            elevations_m,
        })
    }

    /// Sets elevations along a row of the whole file, from a column on; what lies outside the
    /// window is passed over. Heights that no ground on Earth has count as unknown.
    pub(super) fn set_row(&mut self, row: usize, first_column: usize, elevations_m: &[f32]) {
        const ON_EARTH_M: std::ops::RangeInclusive<f32> = -500.0..=9000.0;
        let Window { columns, rows, .. } = self.window;
        let Some(row) = row
            .checked_sub(self.window.first_row)
            .filter(|row| *row < rows)
        else {
            return;
        };
        let skipped = self.window.first_column.saturating_sub(first_column);
        let start = first_column.saturating_sub(self.window.first_column);
        let kept = elevations_m.iter().skip(skipped);
        if start < columns {
            let line = &mut self.elevations_m[row * columns..(row + 1) * columns];
            for (cell, elevation_m) in line[start..].iter_mut().zip(kept) {
                if ON_EARTH_M.contains(elevation_m) {
                    *cell = *elevation_m;
                }
            }
        }
    }

    /// Whether a stretch between two cells can touch the window.
    pub(super) fn meets(&self, from: (f64, f64), to: (f64, f64)) -> bool {
        let overlaps = |a: f64, b: f64, first: usize, count: usize| {
            a.max(b) >= first as f64 - 0.5 && a.min(b) <= (first + count) as f64 - 0.5
        };
        let window = &self.window;
        overlaps(from.0, to.0, window.first_column, window.columns)
            && overlaps(from.1, to.1, window.first_row, window.rows)
    }

    /// Elevation between the postings, bilinear. One or two unknown corners of four take the
    /// mean of the others; with more the place is unknown.
    ///
    /// The second value says whether the place lies between postings; up to half a posting
    /// beyond the outermost ones their own elevation holds, as grids of cells that meet without
    /// overlapping have it.
    pub(super) fn at(&self, column: f64, row: f64) -> (Sample, bool) {
        let column = column - self.window.first_column as f64;
        let row = row - self.window.first_row as f64;
        let last = (
            (self.window.columns - 1) as f64,
            (self.window.rows - 1) as f64,
        );
        let is_near =
            column >= -0.5 && row >= -0.5 && column <= last.0 + 0.5 && row <= last.1 + 0.5;
        if !is_near {
            return (Sample::Outside, false);
        }
        let is_between = column >= 0.0 && row >= 0.0 && column <= last.0 && row <= last.1;
        let (column, row) = (column.clamp(0.0, last.0), row.clamp(0.0, last.1));
        (self.bilinear(column, row), is_between)
    }

    fn bilinear(&self, column: f64, row: f64) -> Sample {
        let columns = self.window.columns;
        let (left, top) = (column as usize, row as usize);
        let right = (left + 1).min(columns - 1);
        let bottom = (top + 1).min(self.window.rows - 1);
        let known = |column: usize, row: usize| self.elevations_m[row * columns + column];
        let mut corners = [
            known(left, top),
            known(right, top),
            known(left, bottom),
            known(right, bottom),
        ];
        let sum: f32 = corners.iter().sum();
        if sum.is_nan() && !fill(&mut corners) {
            return Sample::Void;
        }
        let [nw, ne, sw, se] = corners.map(f64::from);
        let (x, y) = (column - left as f64, row - top as f64);
        let north = nw + (ne - nw) * x;
        let south = sw + (se - sw) * x;
        Sample::Ground(north + (south - north) * y)
    }
}

/// Gives one or two unknown corners the mean of the others; otherwise says that it cannot.
fn fill(corners: &mut [f32; 4]) -> bool {
    let known: Vec<f32> = corners.iter().copied().filter(|m| !m.is_nan()).collect();
    if known.len() < 2 {
        return false;
    }
    let mean = known.iter().sum::<f32>() / known.len() as f32;
    for corner in corners {
        if corner.is_nan() {
            *corner = mean;
        }
    }
    true
}
