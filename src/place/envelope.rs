//! The highest of many straight edges in space, all round.
//!
//! Of two edges seen over less than half a turn, the difference of their altitudes' tangents is
//! a sine wave, which changes its sign at most once: an edge that is highest at both ends of an
//! interval is so in between, and where two edges are highest at its two ends, one crossing
//! decides. Nothing is sampled.

use super::blocker::Source;
use super::stretch::{LEVEL, Piece, Ray, SLIVER, Shape, push_piece};
use std::f64::consts::TAU;

/// An edge over an interval of azimuth, radians, `0 <= from < to <= 2π`, less than half a turn
/// wide.
#[derive(Clone, Copy, Debug)]
pub(super) struct Span {
    pub from: f64,
    pub to: f64,
    pub shape: Shape,
    pub source: Source,
}

const HORIZON: Span = Span {
    from: 0.0,
    to: TAU,
    shape: LEVEL,
    source: Source::Horizon,
};

/// Adds an edge that begins at any azimuth, in two parts where it runs across north.
pub(super) fn push_span(
    spans: &mut Vec<Span>,
    from: f64,
    width: f64,
    shape: Shape,
    source: Source,
) {
    let span = |from, to| Span {
        from,
        to,
        shape,
        source,
    };
    across_north(from, width, |from, to| spans.push(span(from, to)));
}

/// Calls with an interval of azimuth as it lies in [0, 2π], in two parts where it runs across
/// north.
pub(super) fn across_north(from: f64, width: f64, mut call: impl FnMut(f64, f64)) {
    let turned = from.rem_euclid(TAU);
    // A tiny negative azimuth rounds up to a whole turn.
    let from = if turned >= TAU { 0.0 } else { turned };
    let to = from + width;
    call(from, to.min(TAU));
    if to - TAU > SLIVER {
        call(0.0, to - TAU);
    }
}

/// The azimuths at which spans begin and end, north twice, ascending.
pub(super) fn bounds(azimuths: impl Iterator<Item = f64>) -> Vec<f64> {
    let mut bounds: Vec<f64> = azimuths.chain([0.0, TAU]).collect();
    bounds.sort_unstable_by(f64::total_cmp);
    bounds.dedup_by(|later, earlier| *later - *earlier < SLIVER);
    bounds
}

/// The highest of edges and of the level horizon.
pub(super) fn envelope(spans: &mut [Span]) -> Vec<Piece> {
    spans.sort_unstable_by(|a, b| a.from.total_cmp(&b.from));
    let bounds = bounds(spans.iter().flat_map(|span| [span.from, span.to]));
    let mut pieces = Vec::with_capacity(bounds.len());
    let mut active: Vec<Span> = Vec::new();
    let mut coming = spans.iter().peekable();
    let mut left = Ray::new(0.0);
    for ends in bounds.windows(2) {
        let right = Ray::new(ends[1]);
        active.retain(|span| span.to > left.at + SLIVER);
        while let Some(span) = coming.next_if(|span| span.from <= left.at + SLIVER) {
            active.push(*span);
        }
        let outer = Interval {
            left: (left, highest(&active, &left)),
            right: (right, highest(&active, &right)),
        };
        outer.add_to(&mut pieces, &active);
        left = right;
    }
    pieces
}

fn highest<'a>(active: &'a [Span], ray: &Ray) -> &'a Span {
    let mut best = (&HORIZON, 0.0);
    for span in active {
        let tangent = span.shape.tangent(ray);
        if tangent > best.1 {
            best = (span, tangent);
        }
    }
    best.0
}

/// An interval with what is highest at its ends.
struct Interval<'a> {
    left: (Ray, &'a Span),
    right: (Ray, &'a Span),
}

impl<'a> Interval<'a> {
    fn add_to(&self, pieces: &mut Vec<Piece>, active: &'a [Span]) {
        let ((left, first), (right, last)) = (self.left, self.right);
        let mut push = |span: &Span| {
            push_piece(
                pieces,
                Piece {
                    from: left.at,
                    shape: span.shape,
                    source: span.source,
                },
            );
        };
        if std::ptr::eq(first, last) || first.shape == last.shape {
            return push(first);
        }
        let middle = 0.5 * (left.at + right.at);
        let at = first.shape.edge_crossing(&last.shape, middle);
        let at = at.unwrap_or(middle).clamp(left.at, right.at);
        if at - left.at < SLIVER || right.at - at < SLIVER {
            // They meet at an end: one of them is the higher all along.
            let ray = Ray::new(middle);
            let is_first = first.shape.tangent(&ray) >= last.shape.tangent(&ray);
            return push(if is_first { first } else { last });
        }
        let ray = Ray::new(at);
        let between = highest(active, &ray);
        let level = first.shape.tangent(&ray).max(last.shape.tangent(&ray));
        // By more than rounding, or the two would be cut again where they cross.
        if between.shape.tangent(&ray) > level + 1e-14 * (1.0 + level) {
            for (left, right) in [(self.left, (ray, between)), ((ray, between), self.right)] {
                Interval { left, right }.add_to(pieces, active);
            }
        } else {
            push(first);
            push_piece(
                pieces,
                Piece {
                    from: at,
                    shape: last.shape,
                    source: last.source,
                },
            );
        }
    }
}
