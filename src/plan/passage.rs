//! Where a body goes behind a skyline and comes out of it.

use super::path::Seen;
use crate::measure::{Angle, search};
use crate::place::Skyline;

/// A body's way across the sky for a time.
pub(super) trait Way {
    /// Instants, ascending, from the first to the last: at most 300 s apart, so that between two
    /// of them altitude and azimuth turn at most once. Seconds after the night's start.
    fn times_s(&self) -> impl Iterator<Item = f64>;
    /// Where the body is seen at any instant between the first and the last.
    fn at(&self, at_s: f64) -> Seen;
}

/// A body's way past one skyline, sampled closely enough that nothing of it is stepped over.
pub(super) struct Passage<'a, W> {
    way: &'a W,
    skyline: &'a Skyline,
    /// Seconds after the night's start, ascending.
    times_s: Vec<f64>,
    /// The clearance at each, radians.
    clearances: Vec<f64>,
}

/// How close to a break of the skyline the samples on its two sides are: a lamp post of 0.01
/// degrees is passed in two seconds.
const BESIDE_S: f64 = 0.5;

/// Seconds between samples where there is open sky beneath a crown: the body comes into view and
/// goes out of it there without passing a break. In this time it moves by 5 arcmin.
const OPENING_STEP_S: f64 = 20.0;

impl<'a, W: Way> Passage<'a, W> {
    /// A body's samples, with those that the skyline needs beside them.
    pub fn new(way: &'a W, skyline: &'a Skyline) -> Self {
        let mut passage = Self {
            way,
            skyline,
            times_s: Vec::new(),
            clearances: Vec::new(),
        };
        let highest = skyline.highest() + Angle::from_degrees(1.0);
        let lowest = Angle::from_degrees(-1.0);
        let reaches = |altitude: Angle| altitude < highest && altitude > lowest;
        let mut before = None;
        for at_s in way.times_s() {
            let seen = way.at(at_s);
            if let Some((before_s, azimuth, altitude)) = before
                && (reaches(seen.altitude) || reaches(altitude))
            {
                passage.look_between((before_s, azimuth), (at_s, seen.azimuth));
            }
            passage.push(at_s);
            before = Some((at_s, seen.azimuth, seen.altitude));
        }
        passage
    }

    fn push(&mut self, at_s: f64) {
        self.times_s.push(at_s);
        self.clearances.push(self.clearance(at_s).radians());
    }

    /// The body's clearance at any instant.
    pub fn clearance(&self, at_s: f64) -> Angle {
        let seen = self.way.at(at_s);
        self.skyline.clearance(seen.azimuth, seen.altitude)
    }

    /// Adds samples just before and just after the body's azimuth passes each break of the
    /// skyline between two samples, and close ones beneath crowns.
    fn look_between(&mut self, (a_s, a): (f64, Angle), (b_s, b): (f64, Angle)) {
        let turned = (b - a).signed();
        let from = if turned > Angle::ZERO { a } else { b };
        let mut passed_s: Vec<f64> = breaks_within(self.skyline.breaks(), from, turned.abs())
            .map(|edge| {
                let share = (edge - a).signed() / turned;
                // One secant step from the straight-line guess leaves milliseconds.
                let guess_s = a_s + share * (b_s - a_s);
                let missed = (edge - self.way.at(guess_s).azimuth).signed();
                guess_s + missed / turned * (b_s - a_s)
            })
            .collect();
        if turned < Angle::ZERO {
            passed_s.reverse();
        }
        let mut last_s = a_s;
        for at_s in passed_s {
            self.look_through_opening(last_s, at_s.min(b_s));
            for beside_s in [at_s - BESIDE_S, at_s + BESIDE_S] {
                // Of two breaks within a second the later's first sample is left out.
                if beside_s > last_s && beside_s < b_s {
                    self.push(beside_s);
                    last_s = beside_s;
                }
            }
        }
        self.look_through_opening(last_s, b_s);
    }

    /// Between two breaks: whether there is an opening decides about the whole stretch.
    fn look_through_opening(&mut self, from_s: f64, to_s: f64) {
        if to_s - from_s <= 2.0 * BESIDE_S {
            return;
        }
        let middle = self.way.at(0.5 * (from_s + to_s));
        if self.skyline.openings(middle.azimuth).is_empty() {
            return;
        }
        let inner = search::grid(from_s, to_s - BESIDE_S, OPENING_STEP_S);
        for at_s in &inner[1..] {
            self.push(*at_s);
        }
    }

    /// Whether the body is in view at the first sample.
    pub fn starts_clear(&self) -> bool {
        self.clearances.first().is_some_and(|first| *first > 0.0)
    }

    /// Where it comes into view and goes out of it, in order, to 10 ms.
    pub fn crossings(&self) -> Vec<search::Crossing> {
        const TOLERANCE_S: f64 = 0.01;
        let mut found = Vec::new();
        for k in 1..self.times_s.len() {
            if self.changes(k) || self.can_touch(k) {
                found.extend(search::crossings_of_sampled(
                    |at_s| self.clearance(at_s).radians(),
                    &self.times_s[k - 1..=k],
                    &self.clearances[k - 1..=k],
                    TOLERANCE_S,
                ));
            }
        }
        found
    }

    fn changes(&self, k: usize) -> bool {
        (self.clearances[k - 1] < 0.0) != (self.clearances[k] < 0.0)
    }

    /// Whether the clearance can cross zero and come back in the step that ends at sample `k`:
    /// the parabola through its ends and its middle goes more than half the way to zero from the
    /// nearer end. Between breaks the clearance is smooth and turns once at most; across a break
    /// it jumps, and what lies within that second is not told apart.
    fn can_touch(&self, k: usize) -> bool {
        let (a_s, b_s) = (self.times_s[k - 1], self.times_s[k]);
        if b_s - a_s <= 2.0 * BESIDE_S {
            return false;
        }
        let side = self.clearances[k].signum();
        let (a, b) = (side * self.clearances[k - 1], side * self.clearances[k]);
        let nearer = a.min(b);
        // No body and no skyline of use moves by more than this in a step.
        const FAR_RAD: f64 = 0.5;
        if nearer > FAR_RAD {
            return false;
        }
        let middle = side * self.clearance(0.5 * (a_s + b_s)).radians();
        let (slope, bend) = (b - a, a + b - 2.0 * middle);
        let least = if 2.0 * bend > slope.abs() {
            middle - slope * slope / (8.0 * bend)
        } else {
            nearer.min(middle)
        };
        least < 0.5 * nearer
    }
}

/// The breaks (ascending) in the interval of azimuth of some width clockwise of `from`, in
/// clockwise order.
fn breaks_within(breaks: &[Angle], from: Angle, width: Angle) -> impl Iterator<Item = Angle> {
    let first = breaks.partition_point(|edge| *edge < from);
    breaks[first..]
        .iter()
        .chain(&breaks[..first])
        .copied()
        .take_while(move |edge| (*edge - from).wrapped() <= width)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn breaks_are_found_across_north() {
        let breaks = [1.0, 5.0, 90.0, 355.0, 359.0].map(Angle::from_degrees);
        let within = |from: f64, width: f64| -> Vec<f64> {
            breaks_within(
                &breaks,
                Angle::from_degrees(from),
                Angle::from_degrees(width),
            )
            .map(|edge| edge.degrees().round())
            .collect()
        };
        assert_eq!(within(354.0, 8.0), [355.0, 359.0, 1.0]);
        assert_eq!(within(4.0, 2.0), [5.0]);
        assert_eq!(within(359.5, 1.0), [] as [f64; 0]);
        assert_eq!(within(0.0, 359.5), [1.0, 5.0, 90.0, 355.0, 359.0]);
    }
}
