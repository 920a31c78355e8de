//! What blocks the view, per azimuth, from one spot.

use super::silhouette;
use super::stretch::{Piece, edge_pieces, highest_of, measured_pieces, open_pieces};
use crate::measure::{Angle, search};
use std::f64::consts::TAU;
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

    /// How far a point of the sky stands from what blocks: its altitude above the skyline, or in
    /// an opening beneath a crown the lesser distance to the opening's floor and ceiling;
    /// negative where it is blocked, by how far it is from the nearest open sky above or below.
    pub fn clearance(&self, azimuth: Angle, altitude: Angle) -> Angle {
        altitude - self.altitude(azimuth)
    }

    /// What blocks a point of the sky, by its label: `None` where nothing does; the inner `None`
    /// where it is the measured skyline, terrain or the level horizon.
    pub fn blocked_by(&self, azimuth: Angle, altitude: Angle) -> Option<Option<&str>> {
        (self.clearance(azimuth, altitude) <= Angle::ZERO).then(|| self.label(azimuth))
    }

    /// The open sky beneath crowns at an azimuth: (floor, ceiling) from low to high.
    pub fn openings(&self, _azimuth: Angle) -> Vec<(Angle, Angle)> {
        Vec::new()
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
                // The last of a grid may overshoot its end by rounding.
                let at = at.min(to);
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
