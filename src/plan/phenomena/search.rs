//! Looking for zeros and turns along evenly spaced instants, missing none and finding none twice.
//!
//! The instants are whole steps from J2000 whatever stretch is looked through. Neighbouring
//! stretches therefore see an event in the same bracket and place it at the same instant, and
//! exactly one of the two half-open stretches holds it.

use crate::measure::search;

/// An event's instant is found to this, days (0.01 s).
const TOLERANCE_DAYS: f64 = 1e-7;
/// Reach of the differences that rates are taken from, days: the error left of the fourth order
/// is below a second in any event's time, and so is that of the ephemeris' fitted pieces
/// (0.05 mas) where they join.
const RATE_REACH_DAYS: f64 = 0.2;
/// Instants before and after a stretch that a search looks at.
const STEPS_AROUND: f64 = 2.0;

/// A stretch of time, days of TT since J2000, half-open.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Stretch {
    /// Its first instant.
    pub from_days: f64,
    /// The first instant past it.
    pub to_days: f64,
}

/// A bracket whose zero or turn could not be found.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Lost {
    /// The bracket, days of TT since J2000.
    pub bracket: (f64, f64),
}

/// A turn.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Turn {
    /// When, days of TT since J2000.
    pub at: f64,
    /// A maximum, or else a minimum.
    pub is_maximum: bool,
}

impl Stretch {
    /// Whether an instant lies in it.
    pub fn has(&self, days: f64) -> bool {
        (self.from_days..self.to_days).contains(&days)
    }

    /// The whole steps from J2000 that surround the stretch, with the room that a search needs.
    pub fn ticks(&self, step_days: f64) -> Vec<f64> {
        let first = (self.from_days / step_days).floor() - STEPS_AROUND;
        let last = (self.to_days / step_days).ceil() + STEPS_AROUND;
        (first as i64..=last as i64)
            .map(|k| k as f64 * step_days)
            .collect()
    }

    /// The first and the last instant that a search with this step may ask for.
    pub fn with_room(&self, step_days: f64) -> (f64, f64) {
        let room = (STEPS_AROUND + 1.0) * step_days + 2.0 * RATE_REACH_DAYS;
        (self.from_days - room, self.to_days + room)
    }
}

/// Where a function vanishes, given its values at the ticks; the function may turn once between
/// neighbouring ticks.
///
/// # Errors
/// A bracket in which the function is on the same side just before and just after what was found.
pub fn zeros(
    function: impl Fn(f64) -> f64,
    ticks: &[f64],
    values: &[f64],
) -> Result<Vec<search::Crossing>, Lost> {
    let found = search::crossings_of_sampled(&function, ticks, values, TOLERANCE_DAYS);
    for crossing in &found {
        let (before, after) = (
            crossing.at - 2.0 * TOLERANCE_DAYS,
            crossing.at + 2.0 * TOLERANCE_DAYS,
        );
        if (function(before) < 0.0) == (function(after) < 0.0) {
            return Err(Lost {
                bracket: (before, after),
            });
        }
    }
    Ok(found)
}

/// Where a smooth function turns. `change` is its growth from one instant to another (for an
/// angle the signed difference, so that it may run past 360°), and `growths` that from each tick
/// to the next; the function may turn once in three ticks. Only turns are looked for that
/// `is_sought` wants, by the number of the tick in their middle and whether they are maxima.
///
/// # Errors
/// A bracket over which the rate does not pass through zero once.
pub fn turns(
    change: impl Fn(f64, f64) -> f64,
    ticks: &[f64],
    growths: &[f64],
    is_sought: impl Fn(usize, bool) -> bool,
) -> Result<Vec<Turn>, Lost> {
    let mut found = Vec::new();
    for k in 1..growths.len() {
        let is_maximum = growths[k] < 0.0;
        if (growths[k - 1] < 0.0) != is_maximum && is_sought(k, is_maximum) {
            let bracket = (ticks[k - 1], ticks[k + 1]);
            found.push(turn_between(&change, bracket, is_maximum)?);
        }
    }
    Ok(found)
}

/// The one turn of a smooth function within a bracket.
///
/// # Errors
/// The rate does not pass through zero once, in the sense asked for.
pub fn turn_between(
    change: impl Fn(f64, f64) -> f64,
    bracket: (f64, f64),
    is_maximum: bool,
) -> Result<Turn, Lost> {
    let rate = |at: f64| rate(&change, at);
    match search::crossings(rate, &[bracket.0, bracket.1], TOLERANCE_DAYS)[..] {
        [crossing] if crossing.rising != is_maximum => Ok(Turn {
            at: crossing.at,
            is_maximum,
        }),
        _ => Err(Lost { bracket }),
    }
}

/// All minima of a smooth function within a bracket in whose middle it is lower than at both
/// ends; it may turn once in an eighth of the bracket.
///
/// # Errors
/// No minimum is found, though there must be one.
pub fn minima_between(
    change: impl Fn(f64, f64) -> f64,
    bracket: (f64, f64),
) -> Result<Vec<f64>, Lost> {
    let samples = search::grid(bracket.0, bracket.1, (bracket.1 - bracket.0) / 8.0);
    let found: Vec<f64> = search::crossings(|at| rate(&change, at), &samples, TOLERANCE_DAYS)
        .iter()
        .filter(|crossing| crossing.rising)
        .map(|crossing| crossing.at)
        .collect();
    if found.is_empty() {
        return Err(Lost { bracket });
    }
    Ok(found)
}

/// The rate of a smooth function by its central difference of the fourth order, but for a constant
/// divisor.
fn rate(change: &impl Fn(f64, f64) -> f64, at: f64) -> f64 {
    let near = change(at - RATE_REACH_DAYS, at + RATE_REACH_DAYS);
    let far = change(at - 2.0 * RATE_REACH_DAYS, at + 2.0 * RATE_REACH_DAYS);
    8.0 * near - far
}

/// The one turn within a bracket of a function that can be told as finely as its values are:
/// for two bodies that pass each other, from the Earth's centre or from a turning place on it.
///
/// # Errors
/// The function is not lower (or higher, for a maximum) within the bracket than at its ends.
pub fn turn_of_smooth(
    function: impl Fn(f64) -> f64,
    bracket: (f64, f64),
    is_maximum: bool,
) -> Result<Turn, Lost> {
    // The central difference of the second order over a quarter of an hour each way.
    const REACH_DAYS: f64 = 0.01;
    let rate = |at: f64| function(at + REACH_DAYS) - function(at - REACH_DAYS);
    match search::crossings(rate, &[bracket.0, bracket.1], TOLERANCE_DAYS)[..] {
        [crossing] if crossing.rising != is_maximum => Ok(Turn {
            at: crossing.at,
            is_maximum,
        }),
        _ => Err(Lost { bracket }),
    }
}

/// The one zero within a bracket.
///
/// # Errors
/// The function has the same sign at both ends.
pub fn zero_between(function: impl Fn(f64) -> f64, bracket: (f64, f64)) -> Result<f64, Lost> {
    match search::crossings(function, &[bracket.0, bracket.1], TOLERANCE_DAYS)[..] {
        [crossing] => Ok(crossing.at),
        _ => Err(Lost { bracket }),
    }
}
