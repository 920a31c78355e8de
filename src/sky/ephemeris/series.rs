//! Sums of periodic terms: the form in which the theories of the planets and the Moon are
//! published.

use crate::measure::Vector;
use std::cmp::Ordering;
use std::f64::consts::FRAC_PI_2;

/// Powers of time from 0 to 5 for each variable.
const POWERS: usize = 6;
/// Arguments are polynomials in time of up to this degree (the constant is the phase).
const DEGREE: usize = 4;

/// Three Poisson series, sum of t^p A cos(argument), the argument a polynomial in t. Terms are
/// gathered by argument, so that one sine and cosine serve every variable and power.
#[derive(Debug)]
pub struct PoissonSeries {
    arguments: Vec<Argument>,
    terms: Vec<Term>,
}

/// How the rows of a text are to be read.
#[derive(Clone, Copy, Debug)]
pub struct Reading {
    /// The names of the three variables in the first column.
    pub variables: [&'static str; 3],
    /// The units of their amplitudes.
    pub units: [f64; 3],
    /// Whether the rows give sines, or else cosines.
    pub sines: bool,
}

/// Coefficients of t, t², t³, t⁴, radians.
type Rates = [f64; DEGREE];

#[derive(Debug)]
struct Argument {
    rates: Rates,
    /// How many of the terms, in order, have it.
    terms: usize,
}

#[derive(Debug)]
struct Term {
    /// Variable times [`POWERS`] plus power.
    slot: usize,
    cosine: f64,
    sine: f64,
}

impl PoissonSeries {
    /// Reads rows `variable power A phase rate [rate² ...]`; lines that start with `#` are
    /// comments.
    ///
    /// # Panics
    /// A row is not of that form: the texts are compiled in, and the tests read every one.
    pub fn parse(text: &str, reading: Reading) -> Self {
        let mut rows: Vec<(Rates, Term)> = text
            .lines()
            .filter(|line| !line.starts_with('#'))
            .map(|line| parse_row(line, reading).expect("a row of a compiled-in series"))
            .collect();
        rows.sort_by(|(one, _), (other, _)| {
            one.iter()
                .zip(other)
                .map(|(one, other)| one.total_cmp(other))
                .find(|order| order.is_ne())
                .unwrap_or(Ordering::Equal)
        });
        let arguments = rows
            .chunk_by(|(one, _), (other, _)| one == other)
            .map(|same| Argument {
                rates: same[0].0,
                terms: same.len(),
            })
            .collect();
        let terms = rows.into_iter().map(|(_, term)| term).collect();
        Self { arguments, terms }
    }

    /// The three sums at a time, in the time's own unit.
    pub fn value(&self, time: f64) -> Vector {
        let mut sums = [0.0; 3 * POWERS];
        let mut terms = self.terms.as_slice();
        for Argument {
            rates,
            terms: count,
        } in &self.arguments
        {
            let [linear, square, cube, fourth] = rates;
            let angle = time * (linear + time * (square + time * (cube + time * fourth)));
            let (sine, cosine) = angle.sin_cos();
            let (these, later) = terms.split_at(*count);
            for term in these {
                sums[term.slot] += term.cosine * cosine + term.sine * sine;
            }
            terms = later;
        }
        let sum = |variable: usize| {
            let powers = &sums[variable * POWERS..(variable + 1) * POWERS];
            powers
                .iter()
                .rev()
                .fold(0.0, |sum, coefficient| sum * time + coefficient)
        };
        Vector::new(sum(0), sum(1), sum(2))
    }
}

fn parse_row(line: &str, reading: Reading) -> Option<(Rates, Term)> {
    let mut columns = line.split_ascii_whitespace();
    let name = columns.next()?;
    let variable = reading.variables.iter().position(|own| *own == name)?;
    let power: usize = columns.next()?.parse().ok()?;
    let amplitude = columns.next()?.parse::<f64>().ok()? * reading.units[variable];
    let phase: f64 = columns.next()?.parse().ok()?;
    let mut rates = [0.0; DEGREE];
    let mut given = 0;
    for column in columns {
        *rates.get_mut(given)? = column.parse().ok()?;
        given += 1;
    }
    let quarter = if reading.sines { FRAC_PI_2 } else { 0.0 };
    let (sine, cosine) = (phase - quarter).sin_cos();
    let term = Term {
        slot: variable * POWERS + power,
        cosine: amplitude * cosine,
        sine: -amplitude * sine,
    };
    (power < POWERS && given > 0).then_some((rates, term))
}

#[cfg(test)]
mod tests {
    use super::{PoissonSeries, Reading};

    const READING: Reading = Reading {
        variables: ["x", "y", "z"],
        units: [0.5, 1.0, 2.0],
        sines: false,
    };

    #[test]
    fn terms_are_summed_by_variable_and_power() {
        let text = "# a heading\nx 0 2 0.5 3.\nx 1 1 0 3.\ny 2 4 1.0 0.\nz 0 1 0.2 5. 0.3 0 -1\n";
        let expected_x = (0.5f64 + 2.1).cos() + 0.7 * 0.5 * 2.1f64.cos();
        let argument_z = 0.2 + 3.5 + 0.3 * 0.49 - 0.7f64.powi(4);
        let value = PoissonSeries::parse(text, READING).value(0.7);
        assert!((value.x - expected_x).abs() < 1e-14, "x {}", value.x);
        assert!(
            (value.y - 0.49 * 4.0 * 1f64.cos()).abs() < 1e-14,
            "y {}",
            value.y
        );
        assert!(
            (value.z - 2.0 * argument_z.cos()).abs() < 1e-14,
            "z {}",
            value.z
        );
        let sines = Reading {
            sines: true,
            ..READING
        };
        let value = PoissonSeries::parse(text, sines).value(0.7);
        assert!(
            (value.z - 2.0 * argument_z.sin()).abs() < 1e-14,
            "z {}",
            value.z
        );
    }

    #[test]
    #[should_panic(expected = "a row of a compiled-in series")]
    fn a_spoilt_row_is_not_passed_over() {
        PoissonSeries::parse("x 0 2 0.5 3.\nx 6 2 0.5 3.\n", READING);
    }
}
