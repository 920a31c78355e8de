//! A grid of minutes over the plan, and the lines of equal minutes through it.

use crate::place::PlanPoint;

/// Minutes on a grid of squares over the plan.
#[derive(Clone, Debug, PartialEq)]
pub struct Field {
    /// South-western corner of the first square.
    pub corner: PlanPoint,
    /// Side of a square, m.
    pub step_m: f64,
    /// Squares from west to east.
    pub columns: usize,
    /// Minutes of each square, rows from south to north; `None` where nobody stands.
    pub minutes: Vec<Option<f32>>,
}

/// A line of equal minutes.
#[derive(Clone, Debug, PartialEq)]
pub struct Contour {
    /// Minutes along it.
    pub minutes: f32,
    /// Its points in order.
    pub points: Vec<PlanPoint>,
}

impl Field {
    /// Squares from south to north.
    pub fn rows(&self) -> usize {
        self.minutes.len() / self.columns.max(1)
    }

    /// The corner opposite to the first.
    pub fn far_corner(&self) -> PlanPoint {
        self.point(self.columns as f64, self.rows() as f64)
    }

    /// So many squares east and north of the corner.
    fn point(&self, right: f64, up: f64) -> PlanPoint {
        PlanPoint::new(
            self.corner.east_m + self.step_m * right,
            self.corner.north_m + self.step_m * up,
        )
    }

    /// Which square a point lies in, by its place in the list.
    pub fn square(&self, at: PlanPoint) -> Option<usize> {
        let right = ((at.east_m - self.corner.east_m) / self.step_m).floor();
        let up = ((at.north_m - self.corner.north_m) / self.step_m).floor();
        let is_in = |place: f64, count: usize| place >= 0.0 && place < count as f64;
        (is_in(right, self.columns) && is_in(up, self.rows()))
            .then(|| up as usize * self.columns + right as usize)
    }

    /// The middle of a square.
    pub fn middle(&self, square: usize) -> PlanPoint {
        let (right, up) = (square % self.columns, square / self.columns);
        self.point(right as f64 + 0.5, up as f64 + 0.5)
    }

    fn at(&self, right: usize, up: usize) -> Option<f32> {
        *self.minutes.get(up * self.columns + right)?
    }

    /// Fewest and most minutes; `None` where nobody stands anywhere.
    pub fn range(&self) -> Option<(f32, f32)> {
        let known = self.minutes.iter().flatten();
        known.fold(None, |range, minutes| match range {
            None => Some((*minutes, *minutes)),
            Some((least, most)) => Some((least.min(*minutes), f32::max(most, *minutes))),
        })
    }

    /// Round minutes to draw lines at: a handful within the range.
    pub fn levels(&self) -> Vec<f32> {
        const MOST_LINES: f32 = 6.0;
        const STEPS: [f32; 10] = [1.0, 2.0, 5.0, 10.0, 15.0, 20.0, 30.0, 60.0, 120.0, 240.0];
        let Some((least, most)) = self.range() else {
            return Vec::new();
        };
        let step = STEPS
            .into_iter()
            .find(|step| (most - least) / step <= MOST_LINES)
            .unwrap_or(480.0);
        let first = (least / step).floor() as i32 + 1;
        (first..)
            .map(|count| count as f32 * step)
            .take_while(|level| *level < most)
            .collect()
    }

    /// The lines of equal minutes, by marching over the squares of four neighbouring middles.
    pub fn contours(&self) -> Vec<Contour> {
        self.levels()
            .into_iter()
            .flat_map(|level| {
                join(self.segments(level)).into_iter().map(move |points| {
                    let points = points
                        .into_iter()
                        .map(|(right, up)| self.point(right + 0.5, up + 0.5))
                        .collect();
                    Contour {
                        minutes: level,
                        points,
                    }
                })
            })
            .collect()
    }

    /// Where a level crosses each square of four middles: its pieces between two edges each.
    fn segments(&self, level: f32) -> Vec<[Crossing; 2]> {
        let mut segments = Vec::new();
        for up in 1..self.rows() {
            for right in 1..self.columns {
                // Anticlockwise from the south-west.
                let corners = [(right - 1, up - 1), (right, up - 1), (right, up), (right - 1, up)];
                let values = corners.map(|(right, up)| self.at(right, up));
                let [Some(a), Some(b), Some(c), Some(d)] = values else {
                    continue;
                };
                let values = [a, b, c, d];
                let crossings: Vec<Crossing> = (0..4)
                    .filter_map(|k| {
                        let next = (k + 1) % 4;
                        crossing((corners[k], values[k]), (corners[next], values[next]), level)
                    })
                    .collect();
                // Two, or at a saddle four, which are joined around the corners.
                segments.extend(crossings.chunks_exact(2).map(|pair| [pair[0], pair[1]]));
            }
        }
        segments
    }
}

/// A place where a line crosses the edge between two middles.
#[derive(Clone, Copy, Debug, PartialEq)]
struct Crossing {
    /// The edge, named by its western or southern end and whether it runs north.
    edge: (usize, usize, bool),
    /// Where, in squares from the first middle.
    at: (f64, f64),
}

type Corner = ((usize, usize), f32);

fn crossing(one: Corner, other: Corner, level: f32) -> Option<Crossing> {
    if (one.1 >= level) == (other.1 >= level) {
        return None;
    }
    // Always from the same end, so that neighbouring squares find the same point.
    let (first, last) = if one.0 <= other.0 { (one, other) } else { (other, one) };
    let share = f64::from((level - first.1) / (last.1 - first.1));
    let ((x, y), is_north) = (first.0, first.0.0 == last.0.0);
    let (x_at, y_at) = (x as f64, y as f64);
    Some(Crossing {
        edge: (x, y, is_north),
        at: if is_north {
            (x_at, y_at + share)
        } else {
            (x_at + share, y_at)
        },
    })
}

/// Joins pieces that share an edge into lines.
fn join(segments: Vec<[Crossing; 2]>) -> Vec<Vec<(f64, f64)>> {
    use std::collections::HashMap;
    let mut at_edge: HashMap<(usize, usize, bool), Vec<usize>> = HashMap::new();
    for (index, segment) in segments.iter().enumerate() {
        for end in segment {
            at_edge.entry(end.edge).or_default().push(index);
        }
    }
    let mut is_used = vec![false; segments.len()];
    let mut follow = |from: Crossing, is_used: &mut Vec<bool>| {
        let mut line = Vec::new();
        let mut end = from;
        while let Some(next) = at_edge
            .get(&end.edge)
            .and_then(|touching| touching.iter().copied().find(|index| !is_used[*index]))
        {
            is_used[next] = true;
            let [a, b] = segments[next];
            end = if a.edge == end.edge { b } else { a };
            line.push(end.at);
        }
        line
    };
    let mut lines = Vec::new();
    for (index, segment) in segments.iter().enumerate() {
        if is_used[index] {
            continue;
        }
        is_used[index] = true;
        let [a, b] = *segment;
        let mut line = follow(a, &mut is_used);
        line.reverse();
        line.extend([a.at, b.at]);
        line.extend(follow(b, &mut is_used));
        lines.push(line);
    }
    lines
}

#[cfg(test)]
mod tests {
    use super::Field;
    use crate::place::PlanPoint;

    /// Minutes by a rule of metres east and north.
    fn field(side: usize, minutes: impl Fn(f64, f64) -> Option<f32>) -> Field {
        let corner = PlanPoint::new(-10.0, 20.0);
        let middle = |k: usize| k as f64 + 0.5;
        Field {
            corner,
            step_m: 1.0,
            columns: side,
            minutes: (0..side * side)
                .map(|k| {
                    minutes(
                        corner.east_m + middle(k % side),
                        corner.north_m + middle(k / side),
                    )
                })
                .collect(),
        }
    }

    #[test]
    fn lines_of_a_slope_run_straight_where_its_minutes_are() {
        let field = field(20, |east, _| Some(60.0 + 2.0 * east as f32));
        let contours = field.contours();
        let levels: Vec<f32> = contours.iter().map(|contour| contour.minutes).collect();
        assert_eq!(levels, field.levels(), "one line to each level");
        assert!(levels.len() >= 3, "{levels:?}");
        for contour in contours {
            let east_m = f64::from((contour.minutes - 60.0) / 2.0);
            assert_eq!(contour.points.len(), 20);
            for point in contour.points {
                assert!((point.east_m - east_m).abs() < 1e-4, "{point:?}");
            }
        }
    }

    #[test]
    fn the_line_around_a_hill_is_closed() {
        let hill = |east: f64, north: f64| {
            Some((30.0 - (east - 0.2).hypot(north - 30.1)) as f32)
        };
        let field = field(20, hill);
        let around = field
            .contours()
            .into_iter()
            .find(|contour| contour.minutes == 25.0);
        let points = around.expect("a line five metres around the top").points;
        assert_eq!(points.first(), points.last());
        for point in points {
            let off = point.distance_m(PlanPoint::new(0.2, 30.1)) - 5.0;
            assert!(off.abs() < 0.06, "{point:?} is {off} m off the circle");
        }
    }

    #[test]
    fn nothing_runs_through_squares_where_nobody_stands() {
        let field = field(20, |east, _| (east < 0.0).then_some(60.0 + 2.0 * east as f32));
        let points = field.contours().into_iter().flat_map(|line| line.points);
        assert!(points.into_iter().all(|point| point.east_m < 0.0));
        assert_eq!(field.square(PlanPoint::new(-9.5, 20.5)), Some(0));
        assert_eq!(field.square(PlanPoint::new(9.9, 39.9)), Some(399));
        assert_eq!(field.square(PlanPoint::new(10.1, 30.0)), None);
    }
}
