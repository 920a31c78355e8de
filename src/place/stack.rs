//! What hangs over the floor of a skyline: crowns with open sky beneath them.

use super::blocker::Source;
use super::envelope::bounds;
use super::stretch::{Piece, Ray, SLIVER, Shape};
use std::f64::consts::TAU;

/// A crown, or a part of one, over an interval of azimuth, radians, `0 <= from < to <= 2π`.
#[derive(Clone, Copy, Debug)]
pub(super) struct Band {
    pub from: f64,
    pub to: f64,
    pub bottom: Shape,
    pub top: Shape,
    pub source: Source,
}

/// A part of what blocks over the floor. Where it is not the lowest and its bottom is the top of
/// what is below it, there is no sky between them.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Layer {
    pub bottom: Shape,
    pub top: Shape,
    pub source: Source,
}

/// An interval of azimuth in which no two edges cross, from `from` to where the next begins.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Column {
    /// Radians, in [0, 2π).
    pub from: f64,
    pub floor: Shape,
    pub source: Source,
    /// Index of its first layer.
    pub first: usize,
}

/// All round: columns in ascending azimuth, the first from 0, and their layers from low to high.
#[derive(Clone, Debug, Default)]
pub(super) struct Stack {
    pub columns: Vec<Column>,
    pub layers: Vec<Layer>,
}

impl Stack {
    /// What stands on the ground, with bands hung over it.
    pub(super) fn new(floor: &[Piece], bands: &mut [Band]) -> Self {
        let mut stack = Self::default();
        if bands.is_empty() {
            stack.columns = floor.iter().map(|piece| column(piece, 0)).collect();
            return stack;
        }
        bands.sort_unstable_by(|a, b| a.from.total_cmp(&b.from));
        let starts = floor.iter().map(|piece| piece.from);
        let bounds = bounds(starts.chain(bands.iter().flat_map(|band| [band.from, band.to])));
        let mut coming = bands.iter().peekable();
        let mut active: Vec<Band> = Vec::new();
        let mut here = 0;
        for ends in bounds.windows(2) {
            let (from, to) = (ends[0], ends[1]);
            active.retain(|band| band.to > from + SLIVER);
            while let Some(band) = coming.next_if(|band| band.from <= from + SLIVER) {
                active.push(*band);
            }
            while floor
                .get(here + 1)
                .is_some_and(|next| next.from <= from + SLIVER)
            {
                here += 1;
            }
            let piece = Piece {
                from,
                ..floor[here]
            };
            stack.hang(&piece, &active, to);
        }
        stack
    }

    /// The layers of a column, and the azimuth that it ends at.
    pub(super) fn layers(&self, index: usize) -> &[Layer] {
        let end = self
            .columns
            .get(index + 1)
            .map_or(self.layers.len(), |next| next.first);
        &self.layers[self.columns[index].first..end]
    }

    /// Where a column ends, radians.
    pub(super) fn end(&self, index: usize) -> f64 {
        self.columns.get(index + 1).map_or(TAU, |next| next.from)
    }

    /// Adds the columns of an interval of azimuth from the piece's start to `to`.
    fn hang(&mut self, floor: &Piece, active: &[Band], to: f64) {
        if active.is_empty() {
            return self.push(floor, &[]);
        }
        let mut cuts = cuts(floor, active, to);
        cuts.sort_unstable_by(f64::total_cmp);
        let mut from = floor.from;
        for at in cuts.into_iter().chain([to]) {
            if at - from > SLIVER {
                let layers = piled(floor, active, &Ray::new(0.5 * (from + at)));
                self.push(&Piece { from, ..*floor }, &layers);
                from = at;
            }
        }
    }

    /// Adds a column, unless it only goes on with the last one.
    fn push(&mut self, floor: &Piece, layers: &[Layer]) {
        let goes_on = self.columns.last().is_some_and(|last| {
            last.floor == floor.shape
                && last.source == floor.source
                && self.layers[last.first..] == *layers
        });
        if !goes_on {
            self.columns.push(column(floor, self.layers.len()));
            self.layers.extend_from_slice(layers);
        }
    }
}

fn column(floor: &Piece, first: usize) -> Column {
    Column {
        from: floor.from,
        floor: floor.shape,
        source: floor.source,
        first,
    }
}

/// Where edges of the bands cross one another or the floor.
fn cuts(floor: &Piece, active: &[Band], to: f64) -> Vec<f64> {
    let (left, right) = (Ray::new(floor.from), Ray::new(to));
    let with_ends = |shape: Shape| (shape, shape.tangent(&left), shape.tangent(&right));
    let mut curves = vec![with_ends(floor.shape)];
    for band in active {
        curves.extend([with_ends(band.bottom), with_ends(band.top)]);
    }
    // What stays below an edge of the floor is never seen.
    let (shape, left, right) = curves[0];
    let is_edge = |shape: &Shape| matches!(shape, Shape::Edge { .. });
    if is_edge(&shape) {
        curves.retain(|curve| curve.1 >= left || curve.2 >= right);
    }
    let middle = 0.5 * (floor.from + to);
    let mut cuts = Vec::new();
    for (k, (one, one_left, one_right)) in curves.iter().enumerate() {
        for (other, other_left, other_right) in &curves[k + 1..] {
            if !(is_edge(one) && is_edge(other)) {
                cuts.extend(one.crossings(other, floor.from, to));
            } else if (one_left - other_left) * (one_right - other_right) <= 0.0 && one != other {
                // On one side of each other at both ends they would not cross between.
                let at = one.edge_crossing(other, middle);
                cuts.extend(at.filter(|at| *at > floor.from && *at < to));
            }
        }
    }
    cuts
}

/// The bands over the floor in one direction from low to high, each from the top of what is
/// below it where they overlap.
fn piled(floor: &Piece, active: &[Band], ray: &Ray) -> Vec<Layer> {
    let mut bands: Vec<(&Band, f64, f64)> = active
        .iter()
        .map(|band| (band, band.bottom.tangent(ray), band.top.tangent(ray)))
        .collect();
    bands.sort_unstable_by(|a, b| a.1.total_cmp(&b.1));
    let mut layers = Vec::with_capacity(bands.len());
    let mut below = (floor.shape, floor.shape.tangent(ray));
    for (band, bottom, top) in bands {
        if top <= below.1 {
            continue;
        }
        layers.push(Layer {
            bottom: if bottom > below.1 {
                band.bottom
            } else {
                below.0
            },
            top: band.top,
            source: band.source,
        });
        below = (band.top, top);
    }
    layers
}
