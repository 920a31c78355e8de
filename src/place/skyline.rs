//! What blocks the view, per azimuth, from one spot.

use super::Feature;
use super::blocker::{Blocker, Source};
use super::features;
use super::stack::{Band, Layer, Stack};
use super::stretch::{Piece, Shape, highest_of, line_pieces, open_pieces};
use crate::measure::Angle;
use std::f64::consts::TAU;
use std::sync::Arc;

/// The altitude of everything that blocks the view, per azimuth, as seen from one spot.
///
/// It has a floor, the highest of all that stands on the ground (trunks, the measured skyline
/// and terrain among it), and over it what hangs: crowns with open sky beneath them. Both are
/// kept as smooth edges around the whole horizon, so that nothing narrow is lost and a look-up
/// is one binary search. Nothing lies below 0: what is lower does not hide the horizon.
#[derive(Clone, Debug)]
pub struct Skyline {
    stack: Stack,
    names: Arc<[Arc<str>]>,
    breaks: Vec<Angle>,
    highest: Angle,
}

impl Skyline {
    /// Nothing in the way: the level horizon all round.
    pub fn open() -> Self {
        Self::from_parts(&open_pieces(), &mut [], [].into())
    }

    /// Straight between measured points of (azimuth, altitude), and from the last on to the
    /// first; below 0 it counts as 0.
    ///
    /// Azimuths are taken to [0°, 360°) and sorted; of points at one azimuth the first counts,
    /// and points that are no numbers are passed over. One point is a level skyline, none an
    /// open one. Site files and tables are held to stricter rules when they are read.
    pub fn measured(points: &[(Angle, Angle)]) -> Self {
        let pieces = line_pieces(points, Source::Measured);
        Self::from_parts(&highest_of(&open_pieces(), &pieces), &mut [], [].into())
    }

    /// A floor, nowhere below 0, with bands hung over it, and the names that their sources
    /// number.
    pub(super) fn from_parts(floor: &[Piece], bands: &mut [Band], names: Arc<[Arc<str>]>) -> Self {
        let stack = Stack::new(floor, bands);
        let is_smooth_at_north = stack.is_smooth_at_north();
        let breaks = stack
            .columns
            .iter()
            .skip(usize::from(is_smooth_at_north))
            .map(|column| Angle::from_radians(column.from))
            .collect();
        let highest = (0..stack.columns.len())
            .map(|index| {
                stack
                    .top(index)
                    .highest(stack.columns[index].from, stack.end(index))
            })
            .fold(0.0, f64::max);
        Self {
            stack,
            names,
            breaks,
            highest: Angle::from_radians(highest),
        }
    }

    pub(super) fn stack(&self) -> &Stack {
        &self.stack
    }

    pub(super) fn blocker_of(&self, source: Source) -> Blocker {
        match source {
            Source::Horizon => Blocker::Horizon,
            Source::Measured => Blocker::Measured,
            Source::Terrain => Blocker::Terrain,
            Source::Obstacle(number) => Blocker::Obstacle(self.names[number as usize].clone()),
        }
    }

    fn name_of(&self, source: Source) -> Option<&str> {
        match source {
            Source::Obstacle(number) => Some(&self.names[number as usize]),
            Source::Horizon | Source::Measured | Source::Terrain => None,
        }
    }

    /// Azimuth in radians, [0, 2π), and the column there.
    fn column_at(&self, azimuth: Angle) -> (f64, usize) {
        let at = azimuth.wrapped().radians();
        let after = self
            .stack
            .columns
            .partition_point(|column| column.from <= at);
        (at, after.saturating_sub(1))
    }

    /// Altitude of the skyline at an azimuth, the top of all that blocks there; never below 0.
    /// Exactly at a jump, the altitude clockwise of it.
    pub fn altitude(&self, azimuth: Angle) -> Angle {
        let (at, index) = self.column_at(azimuth);
        seen(&self.stack.top(index), at)
    }

    /// Altitude of what stands on the ground at an azimuth; never below 0.
    pub fn floor(&self, azimuth: Angle) -> Angle {
        let (at, index) = self.column_at(azimuth);
        seen(&self.stack.columns[index].floor, at)
    }

    /// How far a point of the sky stands from what blocks: its altitude above the skyline, or in
    /// an opening beneath a crown the lesser distance to the opening's floor and ceiling;
    /// negative where it is blocked, by how far it is from the nearest open sky above or below.
    /// Continuous in altitude, and in azimuth between [`Skyline::breaks`].
    pub fn clearance(&self, azimuth: Angle, altitude: Angle) -> Angle {
        let (at, index) = self.column_at(azimuth);
        let over_top = altitude - seen(&self.stack.top(index), at);
        let mut best = over_top.radians();
        self.each_opening(at, index, |floor, ceiling| {
            let within = (altitude - floor)
                .radians()
                .min((ceiling - altitude).radians());
            best = best.max(within);
        });
        Angle::from_radians(best)
    }

    /// The open sky beneath crowns at an azimuth: (floor, ceiling) from low to high.
    pub fn openings(&self, azimuth: Angle) -> Vec<(Angle, Angle)> {
        let (at, index) = self.column_at(azimuth);
        let mut openings = Vec::new();
        self.each_opening(at, index, |floor, ceiling| openings.push((floor, ceiling)));
        openings
    }

    fn each_opening(&self, at: f64, index: usize, mut call: impl FnMut(Angle, Angle)) {
        let mut below = self.stack.columns[index].floor;
        for layer in self.stack.layers(index) {
            if layer.bottom != below {
                let (floor, ceiling) = (seen(&below, at), seen(&layer.bottom, at));
                if floor < ceiling {
                    call(floor, ceiling);
                }
            }
            below = layer.top;
        }
    }

    /// What blocks a point of the sky, by its label: `None` where nothing does; the inner `None`
    /// where it is the measured skyline, terrain or the level horizon. Behind the floor it is what
    /// makes the floor.
    pub fn blocked_by(&self, azimuth: Angle, altitude: Angle) -> Option<Option<&str>> {
        self.source_at(azimuth, altitude)
            .map(|source| self.name_of(source))
    }

    fn source_at(&self, azimuth: Angle, altitude: Angle) -> Option<Source> {
        let (at, index) = self.column_at(azimuth);
        let column = &self.stack.columns[index];
        if altitude <= seen(&column.floor, at) {
            return Some(column.source);
        }
        let layers = self.stack.layers(index).iter();
        let mut holding = layers.filter(|layer| {
            seen(&layer.bottom, at) <= altitude && altitude <= seen(&layer.top, at)
        });
        holding.next().map(|layer| layer.source)
    }

    /// The altitude of the edge that [`Skyline::clearance`] counts from: that of an opening's
    /// floor or ceiling, or the top of all that blocks.
    pub fn nearest_edge(&self, azimuth: Angle, altitude: Angle) -> Angle {
        let (at, index) = self.column_at(azimuth);
        let top = seen(&self.stack.top(index), at);
        let mut best = ((altitude - top).radians(), top);
        self.each_opening(at, index, |floor, ceiling| {
            let over_floor = ((altitude - floor).radians(), floor);
            let under_ceiling = ((ceiling - altitude).radians(), ceiling);
            let nearer = if over_floor.0 <= under_ceiling.0 {
                over_floor
            } else {
                under_ceiling
            };
            if nearer.0 > best.0 {
                best = nearer;
            }
        });
        best.1
    }

    /// The label of what hides a point of the sky, or would hide it an arcsecond further on in
    /// any direction (it stands at an edge), or else of what is topmost there; `None` where that
    /// is no obstacle.
    pub fn hides(&self, azimuth: Angle, altitude: Angle) -> Option<&str> {
        let (none, little) = (Angle::ZERO, Angle::from_arcsec(1.0));
        let beside = [
            (none, none),
            (none, -little),
            (none, little),
            (little, none),
            (-little, none),
        ];
        let found = beside
            .iter()
            .find_map(|(across, up)| self.source_at(azimuth + *across, altitude + *up));
        let source = found.unwrap_or_else(|| self.stack.top_source(self.column_at(azimuth).1));
        self.name_of(source)
    }

    /// The highest altitude that it reaches anywhere.
    pub fn highest(&self) -> Angle {
        self.highest
    }

    /// The topmost of what blocks at an azimuth.
    pub fn blocker(&self, azimuth: Angle) -> Blocker {
        self.blocker_of(self.stack.top_source(self.column_at(azimuth).1))
    }

    /// The topmost of what blocks there, by its label: an obstacle, or `None` for the measured
    /// skyline, terrain and the level horizon.
    pub fn label(&self, azimuth: Angle) -> Option<&str> {
        self.name_of(self.stack.top_source(self.column_at(azimuth).1))
    }

    /// The highest that obstacles of a label reach at an azimuth, as far as they are seen there.
    pub fn top_of(&self, label: &str, azimuth: Angle) -> Option<Angle> {
        let (at, index) = self.column_at(azimuth);
        let column = &self.stack.columns[index];
        let layers = self.stack.layers(index).iter().rev();
        layers
            .map(|layer| (layer.top, layer.source))
            .chain([(column.floor, column.source)])
            .find(|(_, source)| self.name_of(*source) == Some(label))
            .map(|(top, _)| seen(&top, at))
    }

    /// Azimuths in [0°, 360°), ascending, where an edge of what blocks jumps or bends or meets
    /// another: between neighbours the floor, the tops and the openings' edges are smooth and
    /// none begins or ends, so a search that looks at these misses nothing narrow.
    pub fn breaks(&self) -> &[Angle] {
        &self.breaks
    }

    /// The top of all that blocks, for drawing: (azimuth, altitude) from 0° to 360° inclusive in
    /// ascending azimuth, at most `step` apart, with both sides of every jump.
    pub fn outline(&self, step: Angle) -> Vec<(Angle, Angle)> {
        features::line(self, step, |index| self.stack.top(index))
    }

    /// The same of what stands on the ground: the shapes that reach down to it.
    pub fn floor_outline(&self, step: Angle) -> Vec<(Angle, Angle)> {
        features::line(self, step, |index| self.stack.columns[index].floor)
    }

    /// What hangs over the floor, for drawing: closed outlines, each cut at north. The first half
    /// of an outline's points lead along its upper edge in ascending azimuth, at most `step`
    /// apart, the second half back along its lower edge through the same azimuths, so that the
    /// k-th point from the start stands over the k-th from the end.
    pub fn crowns(&self, step: Angle) -> Vec<Vec<(Angle, Angle)>> {
        features::crowns(self, step)
    }

    /// The labelled stretches in ascending azimuth, those that show beneath a crown among them;
    /// an obstacle behind another can have several.
    pub fn features(&self) -> Vec<Feature> {
        features::features(self)
    }
}

/// What lies lower than the level does not hide the horizon.
fn seen(shape: &Shape, at: f64) -> Angle {
    Angle::from_radians(shape.altitude(at).max(0.0))
}

impl Default for Skyline {
    fn default() -> Self {
        Self::open()
    }
}

/// The same edges of what bears the same names.
impl PartialEq for Skyline {
    fn eq(&self, other: &Self) -> bool {
        let edge = |skyline: &Self, layer: &Layer| {
            (layer.bottom, layer.top, skyline.blocker_of(layer.source))
        };
        let count = self.stack.columns.len();
        count == other.stack.columns.len()
            && (0..count).all(|index| {
                let (a, b) = (&self.stack.columns[index], &other.stack.columns[index]);
                let layers = self
                    .stack
                    .layers(index)
                    .iter()
                    .map(|layer| edge(self, layer));
                let others = other
                    .stack
                    .layers(index)
                    .iter()
                    .map(|layer| edge(other, layer));
                (a.from, a.floor) == (b.from, b.floor)
                    && self.blocker_of(a.source) == other.blocker_of(b.source)
                    && layers.eq(others)
            })
    }
}

impl Stack {
    /// The topmost edge of a column.
    fn top(&self, index: usize) -> Shape {
        let top = self.layers(index).last().map(|layer| layer.top);
        top.unwrap_or(self.columns[index].floor)
    }

    fn top_source(&self, index: usize) -> Source {
        let top = self.layers(index).last().map(|layer| layer.source);
        top.unwrap_or(self.columns[index].source)
    }

    /// Whether every edge goes on across north without a jump or a bend.
    fn is_smooth_at_north(&self) -> bool {
        let last = self.columns.len() - 1;
        let goes_on = |one: &Shape, other: &Shape| {
            (one.altitude(0.0) - other.altitude(TAU)).abs() < 1e-12
                && (one.slope(0.0) - other.slope(TAU)).abs() < 1e-9
        };
        let (first_layers, last_layers) = (self.layers(0), self.layers(last));
        goes_on(&self.columns[0].floor, &self.columns[last].floor)
            && first_layers.len() == last_layers.len()
            && first_layers.iter().zip(last_layers).all(|(one, other)| {
                goes_on(&one.bottom, &other.bottom) && goes_on(&one.top, &other.top)
            })
    }
}
