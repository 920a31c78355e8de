//! A vector function of one variable, held as Chebyshev polynomials over one interval.

use super::Vector;
use std::f64::consts::PI;

/// A fitted span of a vector function: three Chebyshev series over `[start, start + length]`.
///
/// Source: Clenshaw's recurrence and the discrete cosine form of the coefficients, as in
/// Press et al., *Numerical Recipes*, section 5.8.
#[derive(Clone, Debug)]
pub struct Chebyshev {
    middle: f64,
    half_length: f64,
    /// Highest order first, so that the recurrence walks forwards.
    coefficients: Box<[Vector]>,
}

impl Chebyshev {
    /// Fits `function` by its values at `nodes` Chebyshev nodes of the interval.
    pub fn fit(start: f64, length: f64, nodes: usize, function: impl Fn(f64) -> Vector) -> Self {
        let half_length = 0.5 * length;
        let middle = start + half_length;
        let count = nodes as f64;
        let values: Vec<Vector> = (0..nodes)
            .map(|k| function(middle + half_length * (PI * (k as f64 + 0.5) / count).cos()))
            .collect();
        let coefficients = (0..nodes)
            .rev()
            .map(|order| {
                let sum = values
                    .iter()
                    .enumerate()
                    .fold(Vector::default(), |sum, (k, value)| {
                        sum + *value * (PI * order as f64 * (k as f64 + 0.5) / count).cos()
                    });
                sum * (if order == 0 { 1.0 } else { 2.0 } / count)
            })
            .collect();
        Self {
            middle,
            half_length,
            coefficients,
        }
    }

    /// The value at `at`; meant for the fitted interval only.
    pub fn value(&self, at: f64) -> Vector {
        let x = (at - self.middle) / self.half_length;
        let (mut b1, mut b2) = (Vector::default(), Vector::default());
        let (last, others) = match self.coefficients.split_last() {
            Some(parts) => parts,
            None => return Vector::default(),
        };
        for coefficient in others {
            let b0 = *coefficient + b1 * (2.0 * x) - b2;
            b2 = b1;
            b1 = b0;
        }
        *last + b1 * x - b2
    }

    /// The value and its derivative by the variable at `at`.
    pub fn value_and_rate(&self, at: f64) -> (Vector, Vector) {
        let x = (at - self.middle) / self.half_length;
        let (mut b1, mut b2) = (Vector::default(), Vector::default());
        let (mut d1, mut d2) = (Vector::default(), Vector::default());
        let (last, others) = match self.coefficients.split_last() {
            Some(parts) => parts,
            None => return (Vector::default(), Vector::default()),
        };
        for coefficient in others {
            let d0 = b1 * 2.0 + d1 * (2.0 * x) - d2;
            d2 = d1;
            d1 = d0;
            let b0 = *coefficient + b1 * (2.0 * x) - b2;
            b2 = b1;
            b1 = b0;
        }
        (*last + b1 * x - b2, (b1 + d1 * x - d2) / self.half_length)
    }
}

#[cfg(test)]
mod tests {
    use super::{Chebyshev, Vector};

    #[test]
    fn a_fit_gives_back_the_function_and_its_slope() {
        let fit = Chebyshev::fit(2.0, 3.0, 24, |t| Vector::new(t.sin(), t.cos(), t * t));
        for t in [2.0, 2.3, 3.7, 5.0] {
            let (value, rate) = fit.value_and_rate(t);
            assert!(
                (value - Vector::new(t.sin(), t.cos(), t * t)).length() < 1e-12,
                "value at {t}"
            );
            assert!(
                (rate - Vector::new(t.cos(), -t.sin(), 2.0 * t)).length() < 1e-10,
                "slope at {t}"
            );
            assert_eq!(fit.value(t), value);
        }
    }
}
