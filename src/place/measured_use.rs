//! Which measured skyline holds where.

use super::blocker::Source;
use super::stretch::{LEVEL, Piece, highest_of, line_pieces, open_pieces, push_piece};
use super::{PlanPoint, Sector, Site, SkylinePoint, Spot};
use crate::measure::Angle;
use std::f64::consts::TAU;

/// Which measured skyline counts at a spot.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum MeasuredUse {
    /// The one that was measured from there, all round.
    Own,
    /// The site's, all round: the spot is the mark.
    Mark,
    /// Of those measured elsewhere, the parts that are marked far.
    FarPartsOnly {
        /// Whether anything measured is not marked far, and so does not count here.
        is_any_left_out: bool,
    },
    /// Nothing of what was measured elsewhere, since no part of it is marked far.
    LeftOut,
    /// Nothing was measured anywhere.
    Nothing,
}

/// A spot this close to the origin of the plan is the mark: nobody sets up a tripod twice more
/// exactly, and a hedge at 20 m is seen a degree elsewhere from there.
const MARK_REACH_M: f64 = 0.5;

impl Site {
    /// Which measured skyline counts at a spot.
    pub fn measured_use(&self, spot: &Spot) -> MeasuredUse {
        if !spot.skyline.is_empty() {
            return MeasuredUse::Own;
        }
        if spot.is_mark() && !self.skyline.is_empty() {
            return MeasuredUse::Mark;
        }
        let mut is_any_far = false;
        let mut is_any_left_out = false;
        for (points, far) in measured(self) {
            is_any_far |= !points.is_empty() && !far.is_empty();
            is_any_left_out |= !points.is_empty() && !is_whole_circle(far);
        }
        match (is_any_far, is_any_left_out) {
            (true, _) => MeasuredUse::FarPartsOnly { is_any_left_out },
            (false, true) => MeasuredUse::LeftOut,
            (false, false) => MeasuredUse::Nothing,
        }
    }
}

impl Site {
    /// The parts that are marked far, as points of a measured skyline, in ascending azimuth: what
    /// to begin with where a spot gets a skyline of its own, which then counts in their place.
    /// None where nothing is marked far.
    pub fn far_points(&self) -> Vec<SkylinePoint> {
        /// The lower side of a jump stands so far beside it.
        const BESIDE: f64 = 1e-4;
        let pieces = far_pieces(self);
        if pieces.iter().all(|piece| piece.shape == LEVEL) {
            return Vec::new();
        }
        let ends = pieces.iter().skip(1).map(|next| next.from).chain([TAU]);
        let mut points: Vec<SkylinePoint> = Vec::with_capacity(2 * pieces.len());
        for (piece, to) in pieces.iter().zip(ends) {
            for at in [piece.from, to - BESIDE] {
                let point = SkylinePoint {
                    azimuth_deg: at.to_degrees(),
                    altitude_deg: piece.shape.altitude(at).to_degrees(),
                };
                if points
                    .last()
                    .is_none_or(|last| last.azimuth_deg < point.azimuth_deg)
                {
                    points.push(point);
                }
            }
        }
        points
    }
}

impl Spot {
    /// Whether it is the site's mark, or so near that what was measured from the mark holds.
    pub fn is_mark(&self) -> bool {
        self.plan_point().distance_m(PlanPoint::new(0.0, 0.0)) <= MARK_REACH_M
    }
}

/// All measured skylines of a site, each with its far sectors.
fn measured(site: &Site) -> impl Iterator<Item = (&[SkylinePoint], &[Sector])> {
    let of_spots = site
        .spots
        .iter()
        .map(|spot| (spot.skyline.as_slice(), spot.skyline_far.as_slice()));
    std::iter::once((site.skyline.as_slice(), site.skyline_far.as_slice())).chain(of_spots)
}

/// What counts at a spot, all round.
pub(super) fn pieces_at(site: &Site, spot: &Spot) -> Vec<Piece> {
    match site.measured_use(spot) {
        MeasuredUse::Own => pieces_of(&spot.skyline),
        MeasuredUse::Mark => pieces_of(&site.skyline),
        _ => far_pieces(site),
    }
}

/// What is marked far: it counts everywhere. Where several were measured, the highest.
pub(super) fn far_pieces(site: &Site) -> Vec<Piece> {
    measured(site)
        .filter(|(points, far)| !points.is_empty() && !far.is_empty())
        .map(|(points, far)| within(&pieces_of(points), far))
        .reduce(|one, other| highest_of(&one, &other))
        .unwrap_or_else(open_pieces)
}

fn pieces_of(points: &[SkylinePoint]) -> Vec<Piece> {
    let points: Vec<(Angle, Angle)> = points
        .iter()
        .map(|point| {
            (
                Angle::from_degrees(point.azimuth_deg),
                Angle::from_degrees(point.altitude_deg),
            )
        })
        .collect();
    line_pieces(&points, Source::Measured)
}

fn is_whole_circle(sectors: &[Sector]) -> bool {
    let edges = || {
        sectors
            .iter()
            .flat_map(|sector| [sector.from_deg, sector.to_deg])
    };
    let is_held = |azimuth_deg: f64| sectors.iter().any(|sector| sector.holds(azimuth_deg));
    // Just clockwise of each edge; anywhere else nothing begins or ends.
    !sectors.is_empty() && edges().all(|edge_deg| is_held((edge_deg + 1e-9).rem_euclid(360.0)))
}

/// Pieces within sectors, cut exactly at their edges; level elsewhere.
fn within(pieces: &[Piece], sectors: &[Sector]) -> Vec<Piece> {
    let edges = sectors
        .iter()
        .flat_map(|sector| [sector.from_deg, sector.to_deg])
        .map(f64::to_radians);
    let mut bounds: Vec<f64> = edges
        .chain(pieces.iter().map(|piece| piece.from))
        .chain([0.0, TAU])
        .collect();
    bounds.sort_by(f64::total_cmp);
    bounds.dedup();
    let mut kept = Vec::with_capacity(bounds.len());
    for ends in bounds.windows(2) {
        let (from, middle) = (ends[0], 0.5 * (ends[0] + ends[1]));
        let is_far = sectors
            .iter()
            .any(|sector| sector.holds(middle.to_degrees()));
        let after = pieces.partition_point(|piece| piece.from <= middle);
        let piece = pieces[after.saturating_sub(1)];
        let level = Piece {
            from,
            shape: LEVEL,
            source: Source::Horizon,
        };
        push_piece(
            &mut kept,
            if is_far {
                Piece { from, ..piece }
            } else {
                level
            },
        );
    }
    kept
}
