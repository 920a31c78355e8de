//! Lines of equal minutes over a standing map (marching squares).

use super::StandingMap;
use crate::place::PlanPoint;
use std::collections::HashMap;

/// A line along which the minutes are equal.
#[derive(Clone, Debug, PartialEq)]
pub struct Contour {
    /// How many.
    pub minutes: f64,
    /// Its points; a closed line ends with its first point again. More minutes lie on its left.
    pub line: Vec<PlanPoint>,
}

/// A side between the centres of two neighbouring squares: the western or southern one, and
/// whether the other lies north of it.
type Side = (usize, usize, bool);

impl StandingMap {
    /// The lines of some numbers of minutes. They run between the centres of squares that are
    /// known and can be stood on, and end where those end.
    pub fn contours(&self, levels: &[f64]) -> Vec<Contour> {
        levels
            .iter()
            .flat_map(|level| {
                let lines = self.chains(*level);
                lines.into_iter().map(|line| Contour {
                    minutes: *level,
                    line: line
                        .iter()
                        .map(|side| self.crossing(*side, *level))
                        .collect(),
                })
            })
            .collect()
    }

    fn minutes(&self, column: usize, row: usize) -> Option<f64> {
        Some(self.cell(column, row).stay()?.minutes)
    }

    /// Where a level lies on a side, by proportion.
    fn crossing(&self, (column, row, is_north): Side, level: f64) -> PlanPoint {
        let (other_column, other_row) = if is_north {
            (column, row + 1)
        } else {
            (column + 1, row)
        };
        let at = |column, row| self.minutes(column, row).unwrap_or(level);
        let (a, b) = (at(column, row), at(other_column, other_row));
        let share = if a == b { 0.5 } else { (level - a) / (b - a) };
        let (from, to) = (
            self.raster.centre(column, row),
            self.raster.centre(other_column, other_row),
        );
        PlanPoint::new(
            from.east_m + share * (to.east_m - from.east_m),
            from.north_m + share * (to.north_m - from.north_m),
        )
    }

    /// The pieces of a level's line, side to side through one square each, more minutes on the
    /// left.
    fn pieces(&self, level: f64) -> Vec<(Side, Side)> {
        let mut pieces = Vec::new();
        for row in 0..self.raster.rows.saturating_sub(1) {
            for column in 0..self.raster.columns.saturating_sub(1) {
                let corners = [
                    (column, row),
                    (column + 1, row),
                    (column + 1, row + 1),
                    (column, row + 1),
                ]
                .map(|(column, row)| self.minutes(column, row));
                let [Some(a), Some(b), Some(c), Some(d)] = corners else {
                    continue;
                };
                let is_more = [a, b, c, d].map(|minutes| minutes >= level);
                // The sides anticlockwise: south, east, north, west.
                let sides = [
                    (column, row, false),
                    (column + 1, row, true),
                    (column, row + 1, false),
                    (column, row, true),
                ];
                // Going round anticlockwise, where more begins a line goes out and where it ends
                // one comes in; between an end and the next beginning lies less.
                let begins = |k: usize| !is_more[k] && is_more[(k + 1) % 4];
                let ends = |k: usize| is_more[k] && !is_more[(k + 1) % 4];
                let is_middle_more = a + b + c + d >= 4.0 * level;
                for k in (0..4).filter(|k| ends(*k)) {
                    // A saddle's middle decides whether its two heights meet there.
                    let mut others = (1..4).map(|n| (k + n) % 4).filter(|m| begins(*m));
                    let to = if is_middle_more {
                        others.next()
                    } else {
                        others.next_back()
                    };
                    pieces.extend(to.map(|to| (sides[k], sides[to])));
                }
            }
        }
        pieces
    }

    /// The pieces joined end to end.
    fn chains(&self, level: f64) -> Vec<Vec<Side>> {
        let pieces = self.pieces(level);
        let mut following: HashMap<Side, Side> = pieces.iter().copied().collect();
        let ends: std::collections::HashSet<Side> = pieces.iter().map(|(_, to)| *to).collect();
        // Open lines first, from their beginnings; what is left then is closed.
        let (open, closed): (Vec<Side>, Vec<Side>) = pieces
            .iter()
            .map(|(from, _)| *from)
            .partition(|from| !ends.contains(from));
        let mut chains = Vec::new();
        for first in open.into_iter().chain(closed) {
            let mut chain = vec![first];
            let mut at = first;
            while let Some(next) = following.remove(&at) {
                chain.push(next);
                at = next;
            }
            if chain.len() > 1 {
                chains.push(chain);
            }
        }
        chains
    }
}
