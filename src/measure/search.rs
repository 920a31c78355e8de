//! Where a function of time crosses zero or turns. Knows no astronomy.

/// A zero crossing.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Crossing {
    /// Where.
    pub at: f64,
    /// Whether the function grows there.
    pub rising: bool,
}

/// A turning point.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Extremum {
    /// Where.
    pub at: f64,
    /// The function there.
    pub value: f64,
    /// A maximum, or else a minimum.
    pub is_maximum: bool,
}

/// Evenly spaced sample points from `from` to `to`, both included, at most `step` apart.
pub fn grid(from: f64, to: f64, step: f64) -> Vec<f64> {
    let count = ((to - from) / step).ceil().max(1.0);
    (0..=count as usize)
        .map(|k| from + (to - from) * k as f64 / count)
        .collect()
}

/// All crossings between the first and the last of `samples` (ascending), in order.
///
/// Between neighbouring samples the function may turn at most once; where three samples show
/// that it turns on the near side of zero, the turn itself is looked at, so that two crossings
/// within one step are found. A jump counts as a crossing at the jump. A zero counts as positive.
pub fn crossings(function: impl Fn(f64) -> f64, samples: &[f64], tolerance: f64) -> Vec<Crossing> {
    let values: Vec<f64> = samples.iter().map(|at| function(*at)).collect();
    crossings_of_sampled(function, samples, &values, tolerance)
}

/// [`crossings`] where the function's values at the samples are already known.
pub fn crossings_of_sampled(
    function: impl Fn(f64) -> f64,
    samples: &[f64],
    values: &[f64],
    tolerance: f64,
) -> Vec<Crossing> {
    let mut found = Vec::new();
    let mut between = |a: f64, fa: f64, b: f64, fb: f64| {
        if (fa < 0.0) != (fb < 0.0) {
            let at = root(&function, (a, fa), (b, fb), tolerance);
            found.push(Crossing {
                at,
                rising: fa < 0.0,
            });
        }
    };
    for k in 1..samples.len() {
        let (a, b) = (samples[k - 1], samples[k]);
        let (fa, fb) = (values[k - 1], values[k]);
        let turn = turns_towards_zero(values, k)
            .then(|| extremum_between(&function, a, b, fa < 0.0, tolerance))
            .filter(|turn| (turn.value < 0.0) != (fa < 0.0));
        match turn {
            Some(turn) => {
                between(a, fa, turn.at, turn.value);
                between(turn.at, turn.value, b, fb);
            }
            None => between(a, fa, b, fb),
        }
    }
    found
}

/// Whether the step that ends at sample `k` can hide a turn across zero: both ends on one side,
/// and the neighbouring steps (where there are any) lead towards zero from outside.
fn turns_towards_zero(values: &[f64], k: usize) -> bool {
    let (fa, fb) = (values[k - 1], values[k]);
    if (fa < 0.0) != (fb < 0.0) {
        return false;
    }
    let side = if fa < 0.0 { -1.0 } else { 1.0 };
    let before = k >= 2 && side * values[k - 2] < side * fa;
    let after = k + 1 < values.len() && side * values[k + 1] < side * fb;
    !before && !after
}

/// The turning point of `function` between `a` and `b`, where it has one turn (golden section,
/// then one parabola through the last three points).
pub fn extremum_between(
    function: impl Fn(f64) -> f64,
    a: f64,
    b: f64,
    is_maximum: bool,
    tolerance: f64,
) -> Extremum {
    const GOLDEN: f64 = 0.618_033_988_749_894_9;
    let sign = if is_maximum { 1.0 } else { -1.0 };
    let (mut low, mut high) = (a, b);
    let mut left = high - GOLDEN * (high - low);
    let mut right = low + GOLDEN * (high - low);
    let (mut f_left, mut f_right) = (sign * function(left), sign * function(right));
    while high - low > tolerance {
        if f_left > f_right {
            high = right;
            (right, f_right) = (left, f_left);
            left = high - GOLDEN * (high - low);
            f_left = sign * function(left);
        } else {
            low = left;
            (left, f_left) = (right, f_right);
            right = low + GOLDEN * (high - low);
            f_right = sign * function(right);
        }
        if left >= right {
            break; // the interval has reached the spacing of floating-point numbers
        }
    }
    let at = 0.5 * (low + high);
    Extremum {
        at,
        value: function(at),
        is_maximum,
    }
}

/// All turning points strictly inside the samples' interval, in order. Between neighbouring
/// samples the function may turn at most once.
pub fn extrema(function: impl Fn(f64) -> f64, samples: &[f64], tolerance: f64) -> Vec<Extremum> {
    let values: Vec<f64> = samples.iter().map(|at| function(*at)).collect();
    (1..samples.len().saturating_sub(1))
        .filter_map(|k| {
            let (before, here, after) = (values[k - 1], values[k], values[k + 1]);
            let is_maximum = here >= before && here > after;
            let is_minimum = here <= before && here < after;
            (is_maximum || is_minimum).then(|| {
                extremum_between(
                    &function,
                    samples[k - 1],
                    samples[k + 1],
                    is_maximum,
                    tolerance,
                )
            })
        })
        .collect()
}

/// The zero between two points of opposite sign, to `tolerance`, by Brent's method
/// (Brent 1973, *Algorithms for Minimization without Derivatives*, chapter 4).
fn root(
    function: impl Fn(f64) -> f64,
    first: (f64, f64),
    second: (f64, f64),
    tolerance: f64,
) -> f64 {
    let ((mut a, mut fa), (mut b, mut fb)) = (first, second);
    let (mut c, mut fc) = (a, fa);
    let mut last_step = b - a;
    let mut step = last_step;
    for _ in 0..200 {
        if (fb < 0.0) == (fc < 0.0) {
            (c, fc) = (a, fa);
            last_step = b - a;
            step = last_step;
        }
        if fc.abs() < fb.abs() {
            (a, fa) = (b, fb);
            (b, fb) = (c, fc);
            (c, fc) = (a, fa);
        }
        let least = 2.0 * f64::EPSILON * b.abs() + 0.5 * tolerance;
        let half = 0.5 * (c - b);
        if half.abs() <= least || fb == 0.0 {
            return b;
        }
        step = if last_step.abs() < least || fa.abs() <= fb.abs() {
            last_step = half;
            half
        } else {
            let s = fb / fa;
            let (mut p, mut q) = if a == c {
                (2.0 * half * s, 1.0 - s)
            } else {
                let (u, r) = (fa / fc, fb / fc);
                (
                    s * (2.0 * half * u * (u - r) - (b - a) * (r - 1.0)),
                    (u - 1.0) * (r - 1.0) * (s - 1.0),
                )
            };
            if p > 0.0 {
                q = -q
            } else {
                p = -p
            }
            if 2.0 * p < (3.0 * half * q - (least * q).abs()).min((last_step * q).abs()) {
                last_step = step;
                p / q
            } else {
                last_step = half;
                half
            }
        };
        (a, fa) = (b, fb);
        b += if step.abs() > least {
            step
        } else {
            least.copysign(half)
        };
        fb = function(b);
    }
    b
}

#[cfg(test)]
mod tests {
    use super::{crossings, extrema, grid};

    #[test]
    fn two_crossings_within_one_step_are_found() {
        // Below zero for 0.02 around 3.3, sampled every 1.0.
        let dip = |t: f64| (t - 3.3) * (t - 3.3) - 1e-4;
        let found = crossings(dip, &grid(0.0, 7.0, 1.0), 1e-9);
        assert_eq!(found.len(), 2, "{found:?}");
        assert!(
            (found[0].at - 3.29).abs() < 1e-8 && !found[0].rising,
            "{found:?}"
        );
        assert!(
            (found[1].at - 3.31).abs() < 1e-8 && found[1].rising,
            "{found:?}"
        );
    }

    #[test]
    fn a_double_crossing_in_the_first_and_last_step_is_found() {
        for centre in [0.4, 6.7] {
            let dip = |t: f64| (t - centre) * (t - centre) - 1e-4;
            assert_eq!(
                crossings(dip, &grid(0.0, 7.0, 1.0), 1e-9).len(),
                2,
                "centre {centre}"
            );
        }
    }

    #[test]
    fn a_jump_is_a_crossing_at_the_jump() {
        let found = crossings(
            |t| if t < 2.345 { -1.0 } else { 1.0 },
            &grid(0.0, 7.0, 1.0),
            1e-9,
        );
        assert_eq!(found.len(), 1, "{found:?}");
        assert!(
            (found[0].at - 2.345).abs() < 1e-8 && found[0].rising,
            "{found:?}"
        );
    }

    #[test]
    fn sine_turns_and_crosses_where_it_should() {
        let samples = grid(0.1, 9.0, 0.5);
        let zeros: Vec<f64> = crossings(f64::sin, &samples, 1e-12)
            .iter()
            .map(|c| c.at)
            .collect();
        assert_eq!(zeros.len(), 2, "{zeros:?}");
        assert!((zeros[0] - std::f64::consts::PI).abs() < 1e-10, "{zeros:?}");
        let turns = extrema(f64::sin, &samples, 1e-9);
        assert_eq!(turns.len(), 3, "{turns:?}");
        assert!(
            (turns[0].at - std::f64::consts::FRAC_PI_2).abs() < 1e-7,
            "{turns:?}"
        );
    }
}
