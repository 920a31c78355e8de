//! The planets' series: VSOP87, version A.
//!
//! Source: Bretagnon and Francou 1988, Astron. Astrophys. 202, 309. Cut and kept as
//! `assets/series/NAME.csv`; the README beside it states the loss.

use crate::measure::{Matrix, Tt, Vector};

/// The dynamical ecliptic of VSOP87 turned to the equator and equinox of J2000 (FK5), as the
/// authors give it with the theory.
const FK5_FROM_DYNAMICAL: Matrix = Matrix([
    [1.0, 0.000_000_440_360, -0.000_000_190_919],
    [-0.000_000_479_966, 0.917_482_137_087, -0.397_776_982_902],
    [0.0, 0.397_776_982_902, 0.917_482_137_087],
]);

/// One planet's heliocentric place as a sum of cosines.
#[derive(Clone, Debug)]
pub(super) struct Series {
    /// By axis, by power of time: the terms of that polynomial coefficient.
    axes: [Vec<Vec<Term>>; 3],
}

#[derive(Clone, Copy, Debug)]
struct Term {
    amplitude_au: f64,
    phase_rad: f64,
    rate_rad_per_millennium: f64,
}

impl Series {
    /// Reads a series of the program's own assets.
    pub fn from_asset(text: &str) -> Self {
        let mut axes: [Vec<Vec<Term>>; 3] = Default::default();
        for line in text.lines().skip(1) {
            let mut fields = line.split(',');
            let axis = fields.next().unwrap_or_default();
            let mut number = || fields.next().and_then(|field| field.parse::<f64>().ok());
            let (Some(power), Some(amplitude_au), Some(phase_rad), Some(rate)) =
                (number(), number(), number(), number())
            else {
                unreachable!("a shipped series has five columns: {line}")
            };
            let powers = &mut axes[match axis {
                "x" => 0,
                "y" => 1,
                _ => 2,
            }];
            let power = power as usize;
            if powers.len() <= power {
                powers.resize(power + 1, Vec::new());
            }
            powers[power].push(Term {
                amplitude_au,
                phase_rad,
                rate_rad_per_millennium: rate,
            });
        }
        Self { axes }
    }

    /// Heliocentric place, au, on the axes of the ICRS.
    pub fn place(&self, tt: Tt) -> Vector {
        // VSOP87 counts TDB, which stays within 2 ms of TT.
        let millennia = tt.days_since_j2000() / 365_250.0;
        let [x, y, z] = self.axes.each_ref().map(|powers| {
            powers.iter().rev().fold(0.0, |sum, terms| {
                sum * millennia
                    + terms
                        .iter()
                        .map(|term| {
                            let angle = term.phase_rad + term.rate_rad_per_millennium * millennia;
                            term.amplitude_au * angle.cos()
                        })
                        .sum::<f64>()
            })
        });
        FK5_FROM_DYNAMICAL * Vector::new(x, y, z)
    }
}
