//! The smooth pieces that a skyline is made of, and the highest of two of them all round.

use super::blocker::Source;
use crate::measure::{Angle, search};
use std::f64::consts::{PI, TAU};

/// A smooth stretch of a skyline; it ends where the next begins, or at a whole turn.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Piece {
    /// Radians, in [0, 2π).
    pub from: f64,
    pub shape: Shape,
    pub source: Source,
}

/// Altitude as a function of azimuth, radians.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) enum Shape {
    /// Straight in azimuth and altitude.
    Line {
        azimuth: f64,
        altitude: f64,
        slope: f64,
    },
    /// A straight edge in space: tan(altitude) = east sin(azimuth) + north cos(azimuth).
    Edge { east: f64, north: f64 },
}

/// The level through the eye; it is straight in both senses.
pub(super) const LEVEL: Shape = Shape::Edge {
    east: 0.0,
    north: 0.0,
};

/// Radians; narrower stretches are rounding.
pub(super) const SLIVER: f64 = 1e-13;

/// A direction of azimuth, radians, with its sine and cosine.
#[derive(Clone, Copy, Debug)]
pub(super) struct Ray {
    pub at: f64,
    pub sin: f64,
    pub cos: f64,
}

impl Ray {
    pub(super) fn new(at: f64) -> Self {
        let (sin, cos) = at.sin_cos();
        Self { at, sin, cos }
    }
}

impl Shape {
    pub(super) fn altitude(&self, at: f64) -> f64 {
        match *self {
            Self::Line {
                azimuth,
                altitude,
                slope,
            } => altitude + slope * (at - azimuth),
            Self::Edge { east, north } => {
                let (sin, cos) = at.sin_cos();
                (east * sin + north * cos).atan()
            }
        }
    }

    /// Tangent of the altitude.
    pub(super) fn tangent(&self, ray: &Ray) -> f64 {
        match *self {
            Self::Line { .. } => self.altitude(ray.at).tan(),
            Self::Edge { east, north } => east * ray.sin + north * ray.cos,
        }
    }

    pub(super) fn slope(&self, at: f64) -> f64 {
        match *self {
            Self::Line { slope, .. } => slope,
            Self::Edge { east, north } => {
                let (sin, cos) = at.sin_cos();
                let tangent = east * sin + north * cos;
                (east * cos - north * sin) / (1.0 + tangent * tangent)
            }
        }
    }

    /// Where two shapes cross strictly between two azimuths less than half a turn apart.
    pub(super) fn crossings(&self, other: &Self, from: f64, to: f64) -> Vec<f64> {
        let is_between = |at: &f64| *at > from && *at < to;
        if let (Self::Edge { .. }, Self::Edge { .. }) = (self, other) {
            let at = self.edge_crossing(other, 0.5 * (from + to));
            return at.filter(is_between).into_iter().collect();
        }
        match (self.line_slope(), other.line_slope()) {
            (Some(a), Some(b)) => {
                let gap = self.altitude(from) - other.altitude(from);
                let at = from + gap / (b - a);
                Some(at).filter(is_between).into_iter().collect()
            }
            (Some(_), None) => other.line_crossings(self, from, to),
            _ => self.line_crossings(other, from, to),
        }
    }

    /// The slope of what is straight in azimuth and altitude.
    fn line_slope(&self) -> Option<f64> {
        match *self {
            Self::Line { slope, .. } => Some(slope),
            _ if *self == LEVEL => Some(0.0),
            Self::Edge { .. } => None,
        }
    }

    /// Where two edges' planes cross, within a quarter turn of an azimuth.
    pub(super) fn edge_crossing(&self, other: &Self, near: f64) -> Option<f64> {
        let (Self::Edge { east: a, north: b }, Self::Edge { east: c, north: d }) = (*self, *other)
        else {
            return None;
        };
        let at = (d - b).atan2(a - c);
        Some(at + PI * ((near - at) / PI).round())
    }

    /// Where an edge crosses a line. Where both are above 0 the edge is concave and the line
    /// straight, so there are two crossings at most and one turn between them; below 0 neither
    /// is ever seen.
    fn line_crossings(&self, line: &Self, from: f64, to: f64) -> Vec<f64> {
        let (edge_from, edge_to) = (self.altitude(from), self.altitude(to));
        let (line_from, line_to) = (line.altitude(from), line.altitude(to));
        let is_above = edge_from.min(edge_to) > line_from.max(line_to).max(0.0);
        if is_above || self.highest(from, to) < line_from.min(line_to) {
            return Vec::new();
        }
        let gap = |at: f64| self.altitude(at) - line.altitude(at);
        let samples = search::grid(from, to, (to - from) / 8.0);
        let found = search::crossings(gap, &samples, 1e-12);
        found
            .iter()
            .map(|crossing| crossing.at)
            .filter(|at| *at > from && *at < to)
            .collect()
    }

    /// The highest altitude over an interval.
    pub(super) fn highest(&self, from: f64, to: f64) -> f64 {
        let ends = self.altitude(from).max(self.altitude(to));
        match *self {
            Self::Edge { east, north } => {
                // The crest lies inside only where the shape rises at the start and falls at the
                // end.
                if self.slope(from) > 0.0 && self.slope(to) < 0.0 {
                    east.hypot(north).atan()
                } else {
                    ends
                }
            }
            Self::Line { .. } => ends,
        }
    }
}

pub(super) fn open_pieces() -> Vec<Piece> {
    vec![Piece {
        from: 0.0,
        shape: LEVEL,
        source: Source::Horizon,
    }]
}

/// Straight between points of (azimuth, altitude) all round; level where there is none.
pub(super) fn line_pieces(points: &[(Angle, Angle)], source: Source) -> Vec<Piece> {
    let mut points: Vec<(f64, f64)> = points
        .iter()
        .filter(|(azimuth, altitude)| azimuth.is_finite() && altitude.is_finite())
        .map(|(azimuth, altitude)| (azimuth.wrapped().radians(), altitude.radians()))
        .collect();
    points.sort_by(|a, b| a.0.total_cmp(&b.0));
    points.dedup_by(|later, earlier| later.0 == earlier.0);
    let (Some(&first), Some(&last)) = (points.first(), points.last()) else {
        return open_pieces();
    };
    let line = |from: f64, start: (f64, f64), end: (f64, f64)| Piece {
        from,
        shape: Shape::Line {
            azimuth: start.0,
            altitude: start.1,
            slope: (end.1 - start.1) / (end.0 - start.0),
        },
        source,
    };
    let mut pieces = Vec::with_capacity(points.len() + 1);
    if first.0 > 0.0 {
        pieces.push(line(0.0, (last.0 - TAU, last.1), first));
    }
    pieces.extend(
        points
            .windows(2)
            .map(|ends| line(ends[0].0, ends[0], ends[1])),
    );
    pieces.push(line(last.0, last, (first.0 + TAU, first.1)));
    pieces
}

/// Adds a piece, unless it only goes on with the last one.
pub(super) fn push_piece(pieces: &mut Vec<Piece>, piece: Piece) {
    let goes_on = pieces
        .last()
        .is_some_and(|last| last.shape == piece.shape && last.source == piece.source);
    if !goes_on {
        let from = if pieces.is_empty() { 0.0 } else { piece.from };
        pieces.push(Piece { from, ..piece });
    }
}

/// The highest of two whole horizons; where they agree, the first.
pub(super) fn highest_of(one: &[Piece], other: &[Piece]) -> Vec<Piece> {
    let mut highest: Vec<Piece> = Vec::with_capacity(one.len() + other.len());
    let (mut i, mut k) = (0, 0);
    let mut from = 0.0;
    let start_of =
        |pieces: &[Piece], index: usize| pieces.get(index).map_or(TAU, |piece| piece.from);
    while from < TAU {
        let to = start_of(one, i + 1).min(start_of(other, k + 1));
        let (a, b) = (&one[i], &other[k]);
        let mut keep = |from: f64, to: f64| {
            if to - from > SLIVER {
                let middle = 0.5 * (from + to);
                let is_other = b.shape.altitude(middle) > a.shape.altitude(middle);
                let piece = if is_other { b } else { a };
                push_piece(&mut highest, Piece { from, ..*piece });
            }
        };
        let mut start = from;
        if a.shape != b.shape {
            for at in a.shape.crossings(&b.shape, from, to) {
                keep(start, at);
                start = at;
            }
        }
        keep(start, to);
        i += usize::from(start_of(one, i + 1) <= to);
        k += usize::from(start_of(other, k + 1) <= to);
        from = to;
    }
    highest
}
