//! Unbroken intervals of a night, each end with its cause.

use super::{Cause, Edge};
use crate::measure::Moment;

/// From an instant to a later one.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Interval {
    pub start: Edge,
    pub end: Edge,
}

/// The intervals in which something holds, from its changes in time order.
///
/// `holds_at_start` is its state at the outer interval's start; `changes` lists when it turns
/// and why. The outer ends keep their own causes.
pub(super) fn holding(
    outer: Interval,
    holds_at_start: bool,
    changes: impl IntoIterator<Item = Edge>,
) -> Vec<Interval> {
    let mut intervals = Vec::new();
    let mut open = holds_at_start.then_some(outer.start);
    for change in changes {
        open = match open {
            Some(start) => {
                intervals.push(Interval { start, end: change });
                None
            }
            None => Some(change),
        };
    }
    intervals.extend(open.map(|start| Interval {
        start,
        end: outer.end,
    }));
    intervals
}

/// Where both hold. At each end the inner of the two causes counts.
pub(super) fn both(first: &[Interval], second: &[Interval]) -> Vec<Interval> {
    let mut common = Vec::new();
    for a in first {
        for b in second {
            let start = if a.start.moment >= b.start.moment {
                a.start
            } else {
                b.start
            };
            let end = if a.end.moment <= b.end.moment {
                a.end
            } else {
                b.end
            };
            if start.moment < end.moment {
                common.push(Interval { start, end });
            }
        }
    }
    common
}

/// The part of an interval between two instants, cut ends with the given cause.
pub(super) fn cut(interval: Interval, from: Moment, to: Moment, cause: Cause) -> Option<Interval> {
    let edge = |moment| Edge { moment, cause };
    let start = if interval.start.moment < from {
        edge(from)
    } else {
        interval.start
    };
    let end = if interval.end.moment > to {
        edge(to)
    } else {
        interval.end
    };
    (start.moment < end.moment).then_some(Interval { start, end })
}
