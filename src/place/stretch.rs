//! The smooth pieces that a skyline is made of, and the highest of two of them all round.

use super::silhouette;
use crate::measure::{Angle, search};
use std::f64::consts::{PI, TAU};
use std::sync::Arc;

/// A smooth stretch of a skyline; it ends where the next begins, or at a whole turn.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Piece {
    /// Radians, in [0, 2π).
    pub from: f64,
    pub shape: Shape,
    pub label: Option<Arc<str>>,
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

const LEVEL: Shape = Shape::Line {
    azimuth: 0.0,
    altitude: 0.0,
    slope: 0.0,
};

impl Shape {
    pub(super) fn altitude(&self, at: f64) -> f64 {
        match *self {
            Self::Line {
                azimuth,
                altitude,
                slope,
            } => altitude + slope * (at - azimuth),
            Self::Edge { east, north } => (east * at.sin() + north * at.cos()).atan(),
        }
    }

    pub(super) fn slope(&self, at: f64) -> f64 {
        match *self {
            Self::Line { slope, .. } => slope,
            Self::Edge { east, north } => {
                let tangent = east * at.sin() + north * at.cos();
                (east * at.cos() - north * at.sin()) / (1.0 + tangent * tangent)
            }
        }
    }

    /// Where two shapes cross strictly between two azimuths less than half a turn apart.
    fn crossings(&self, other: &Self, from: f64, to: f64) -> Vec<f64> {
        let is_between = |at: &f64| *at > from && *at < to;
        match (*self, *other) {
            (Self::Line { slope: a, .. }, Self::Line { slope: b, .. }) => {
                let gap = self.altitude(from) - other.altitude(from);
                let at = from + gap / (b - a);
                Some(at).filter(is_between).into_iter().collect()
            }
            (Self::Edge { east: a, north: b }, Self::Edge { east: c, north: d }) => {
                let at = (d - b).atan2(a - c);
                (-1..=2)
                    .map(|half_turns| at + PI * f64::from(half_turns))
                    .filter(is_between)
                    .collect()
            }
            // Where both are above 0 the edge is concave and the line straight, so there are two
            // crossings at most and one turn between them; below 0 neither is ever seen.
            _ => {
                let gap = |at: f64| self.altitude(at) - other.altitude(at);
                let samples = search::grid(from, to, (to - from) / 8.0);
                let found = search::crossings(gap, &samples, 1e-12);
                found
                    .iter()
                    .map(|crossing| crossing.at)
                    .filter(is_between)
                    .collect()
            }
        }
    }

    /// The highest altitude over an interval.
    pub(super) fn highest(&self, from: f64, to: f64) -> f64 {
        let ends = self.altitude(from).max(self.altitude(to));
        match *self {
            Self::Edge { east, north } => {
                let crest = east.atan2(north).rem_euclid(TAU);
                let is_within = crest > from && crest < to;
                if is_within {
                    self.altitude(crest)
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
        label: None,
    }]
}

pub(super) fn measured_pieces(points: &[(Angle, Angle)]) -> Vec<Piece> {
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
        label: None,
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

/// One edge, with the level horizon everywhere else.
pub(super) fn edge_pieces(arc: silhouette::Arc, label: &Arc<str>) -> Vec<Piece> {
    let shape = Shape::Edge {
        east: arc.east,
        north: arc.north,
    };
    let edge = |from| Piece {
        from,
        shape,
        label: Some(label.clone()),
    };
    let level = |from| Piece {
        from,
        shape: LEVEL,
        label: None,
    };
    let from = Angle::from_radians(arc.from).wrapped().radians();
    let to = from + arc.width;
    if to < TAU {
        let mut pieces = vec![level(0.0), edge(from), level(to)];
        if from == 0.0 {
            pieces.remove(0);
        }
        pieces
    } else if to > TAU {
        vec![edge(0.0), level(to - TAU), edge(from)]
    } else {
        vec![level(0.0), edge(from)]
    }
}

/// The highest of two whole horizons; where they agree, the first.
pub(super) fn highest_of(one: &[Piece], other: &[Piece]) -> Vec<Piece> {
    /// Radians; narrower stretches are rounding.
    const SLIVER: f64 = 1e-13;
    let mut highest: Vec<Piece> = Vec::with_capacity(one.len() + other.len());
    let (mut i, mut k) = (0, 0);
    let mut from = 0.0;
    let start_of =
        |pieces: &[Piece], index: usize| pieces.get(index).map_or(TAU, |piece| piece.from);
    while from < TAU {
        let to = start_of(one, i + 1).min(start_of(other, k + 1));
        let (a, b) = (&one[i], &other[k]);
        let mut cuts = vec![from];
        if a.shape != b.shape {
            cuts.extend(a.shape.crossings(&b.shape, from, to));
        }
        cuts.push(to);
        for ends in cuts.windows(2).filter(|ends| ends[1] - ends[0] > SLIVER) {
            let middle = 0.5 * (ends[0] + ends[1]);
            let higher = if b.shape.altitude(middle) > a.shape.altitude(middle) {
                b
            } else {
                a
            };
            let is_same = highest
                .last()
                .is_some_and(|last| last.shape == higher.shape && last.label == higher.label);
            if !is_same {
                highest.push(Piece {
                    from: if highest.is_empty() { 0.0 } else { ends[0] },
                    ..higher.clone()
                });
            }
        }
        i += usize::from(start_of(one, i + 1) <= to);
        k += usize::from(start_of(other, k + 1) <= to);
        from = to;
    }
    highest
}
