//! What blocks the view, per azimuth, from one spot.

use super::silhouette;
use crate::measure::{Angle, search};
use std::f64::consts::{PI, TAU};
use std::sync::Arc;

/// The altitude of everything that blocks the view, per azimuth, as seen from one spot.
///
/// Kept as smooth pieces around the whole horizon, so that nothing narrow is lost and a look-up
/// is one binary search. No altitude is below 0: what lies lower does not hide the horizon.
#[derive(Clone, Debug, PartialEq)]
pub struct Skyline {
    /// Ascending; the first begins at 0 and the last ends at a whole turn.
    pieces: Vec<Piece>,
    breaks: Vec<Angle>,
    highest: Angle,
}

/// A visible stretch of one labelled obstacle, for naming it in a view.
#[derive(Clone, Debug, PartialEq)]
pub struct Feature {
    /// The obstacle's label.
    pub label: Arc<str>,
    /// Azimuth of the stretch's middle, [0°, 360°).
    pub azimuth: Angle,
    /// How much azimuth it takes.
    pub width: Angle,
    /// Its highest altitude.
    pub top: Angle,
}

#[derive(Clone, Debug, PartialEq)]
struct Piece {
    /// Radians, in [0, 2π).
    from: f64,
    shape: Shape,
    label: Option<Arc<str>>,
}

/// Altitude as a function of azimuth, radians.
#[derive(Clone, Copy, Debug, PartialEq)]
enum Shape {
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
    fn altitude(&self, at: f64) -> f64 {
        match *self {
            Self::Line {
                azimuth,
                altitude,
                slope,
            } => altitude + slope * (at - azimuth),
            Self::Edge { east, north } => (east * at.sin() + north * at.cos()).atan(),
        }
    }

    fn slope(&self, at: f64) -> f64 {
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
    fn highest(&self, from: f64, to: f64) -> f64 {
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

impl Skyline {
    /// Nothing in the way: the level horizon all round.
    pub fn open() -> Self {
        Self::from_pieces(open_pieces())
    }

    /// Straight between measured points of (azimuth, altitude), and from the last on to the
    /// first; below 0 it counts as 0.
    ///
    /// Azimuths are taken to [0°, 360°) and sorted; of points at one azimuth the first counts,
    /// and points that are no numbers are passed over. One point is a level skyline, none an
    /// open one. Site files and tables are held to stricter rules when they are read.
    pub fn measured(points: &[(Angle, Angle)]) -> Self {
        Self::from_pieces(highest_of(&measured_pieces(points), &open_pieces()))
    }

    /// The highest of a measured skyline and of obstacles' edges with their labels.
    pub(super) fn with_edges(
        points: &[(Angle, Angle)],
        edges: &[(silhouette::Edge, Arc<str>)],
    ) -> Self {
        let mut layers: Vec<Vec<Piece>> = edges
            .iter()
            .filter_map(|(edge, label)| Some(edge_pieces(edge.arc()?, label)))
            .collect();
        layers.push(open_pieces());
        layers.push(measured_pieces(points));
        // In pairs, so that the work grows as n log n.
        while layers.len() > 1 {
            layers = layers
                .chunks(2)
                .map(|pair| match pair {
                    [one, other] => highest_of(one, other),
                    rest => rest.concat(),
                })
                .collect();
        }
        Self::from_pieces(layers.pop().unwrap_or_else(open_pieces))
    }

    fn from_pieces(pieces: Vec<Piece>) -> Self {
        let is_smooth_at_north = {
            let (first, last) = (&pieces[0].shape, &pieces[pieces.len() - 1].shape);
            (first.altitude(0.0) - last.altitude(TAU)).abs() < 1e-12
                && (first.slope(0.0) - last.slope(TAU)).abs() < 1e-9
        };
        let breaks = pieces
            .iter()
            .skip(usize::from(is_smooth_at_north))
            .map(|piece| Angle::from_radians(piece.from))
            .collect();
        let mut skyline = Self {
            pieces,
            breaks,
            highest: Angle::ZERO,
        };
        let tops = skyline
            .stretches()
            .map(|(piece, to)| piece.shape.highest(piece.from, to));
        skyline.highest = Angle::from_radians(tops.fold(0.0, f64::max));
        skyline
    }

    /// Each piece with the azimuth that it ends at, radians.
    fn stretches(&self) -> impl Iterator<Item = (&Piece, f64)> {
        let ends = self.pieces.iter().skip(1).map(|next| next.from);
        self.pieces.iter().zip(ends.chain([TAU]))
    }

    fn piece(&self, azimuth: f64) -> &Piece {
        let after = self.pieces.partition_point(|piece| piece.from <= azimuth);
        &self.pieces[after.saturating_sub(1)]
    }

    /// Altitude of the skyline at an azimuth; never below 0. Exactly at a jump, the altitude
    /// clockwise of it.
    pub fn altitude(&self, azimuth: Angle) -> Angle {
        let at = azimuth.wrapped().radians();
        Angle::from_radians(self.piece(at).shape.altitude(at).max(0.0))
    }

    /// The highest altitude that it reaches anywhere.
    pub fn highest(&self) -> Angle {
        self.highest
    }

    /// What blocks there, by its label: an obstacle, or `None` for the measured skyline.
    pub fn label(&self, azimuth: Angle) -> Option<&str> {
        self.piece(azimuth.wrapped().radians()).label.as_deref()
    }

    /// Azimuths in [0°, 360°), ascending, where the skyline jumps or bends: between neighbours
    /// it is smooth, so a search that looks at these misses nothing narrow.
    pub fn breaks(&self) -> &[Angle] {
        &self.breaks
    }

    /// The outline for drawing: (azimuth, altitude) from 0° to 360° inclusive in ascending
    /// azimuth, at most `step` apart, with both sides of every jump.
    pub fn outline(&self, step: Angle) -> Vec<(Angle, Angle)> {
        const FINEST_RAD: f64 = 1e-4;
        let step = step.radians().max(FINEST_RAD);
        let mut points = Vec::new();
        for (piece, to) in self.stretches() {
            for at in search::grid(piece.from, to, step) {
                let altitude = piece.shape.altitude(at).max(0.0);
                let point = (Angle::from_radians(at), Angle::from_radians(altitude));
                if points.last() != Some(&point) {
                    points.push(point);
                }
            }
        }
        points
    }

    /// The labelled stretches in ascending azimuth; an obstacle behind another can have several.
    pub fn features(&self) -> Vec<Feature> {
        let mut runs: Vec<Run> = Vec::new();
        for (piece, to) in self.stretches() {
            let top = piece.shape.highest(piece.from, to);
            match runs.last_mut() {
                Some(run) if run.label == piece.label => {
                    run.to = to;
                    run.top = run.top.max(top);
                }
                _ => runs.push(Run {
                    from: piece.from,
                    to,
                    top,
                    label: piece.label.clone(),
                }),
            }
        }
        // A run across north was cut there.
        if runs.len() > 1 && runs[0].label == runs[runs.len() - 1].label {
            let first = runs.remove(0);
            if let Some(last) = runs.last_mut() {
                last.to += first.to;
                last.top = last.top.max(first.top);
            }
        }
        let mut features: Vec<Feature> = runs.into_iter().filter_map(Run::feature).collect();
        features.sort_by(|a, b| a.azimuth.radians().total_cmp(&b.azimuth.radians()));
        features
    }
}

impl Default for Skyline {
    fn default() -> Self {
        Self::open()
    }
}

/// Neighbouring pieces of one label.
struct Run {
    from: f64,
    to: f64,
    top: f64,
    label: Option<Arc<str>>,
}

impl Run {
    fn feature(self) -> Option<Feature> {
        Some(Feature {
            label: self.label?,
            azimuth: Angle::from_radians(0.5 * (self.from + self.to)).wrapped(),
            width: Angle::from_radians(self.to - self.from),
            top: Angle::from_radians(self.top),
        })
    }
}

fn open_pieces() -> Vec<Piece> {
    vec![Piece {
        from: 0.0,
        shape: LEVEL,
        label: None,
    }]
}

fn measured_pieces(points: &[(Angle, Angle)]) -> Vec<Piece> {
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
fn edge_pieces(arc: silhouette::Arc, label: &Arc<str>) -> Vec<Piece> {
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
fn highest_of(one: &[Piece], other: &[Piece]) -> Vec<Piece> {
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
