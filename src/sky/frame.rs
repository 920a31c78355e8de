//! The Earth's orientation: frame bias, precession, nutation and sidereal time.
//!
//! IAU 2006 precession with IAU 2000A nutation adjusted to it, equinox based, from the IAU SOFA
//! routines. The 1365 terms of the nutation are far too slow for a place of their own each, so
//! they are evaluated into Chebyshev pieces by [`nutation`] and read from there.

use crate::measure::{Angle, Matrix, Moment, Tt, Vector};
use sofars::consts::DJ00;
use sofars::{erst, pnp};

/// Length of one fitted piece of the nutation, days, and its nodes: these keep within 0.05 mas
/// of the series (the shortest large terms run through in five days).
pub const NUTATION_PIECE_DAYS: f64 = 16.0;
/// Chebyshev nodes of one piece.
pub const NUTATION_PIECE_NODES: usize = 14;

/// Nutation in longitude, nutation in obliquity and the equation of the equinoxes, radians, as
/// the three components: the function that the pieces are fitted to. Slow.
pub fn nutation(tt: Tt) -> Vector {
    let days = tt.days_since_j2000();
    let (in_longitude, in_obliquity) = pnp::nut06a(DJ00, days);
    let (gamma, phi, psi, obliquity) = pnp::pfw06(DJ00, days);
    let matrix = pnp::fw2m(gamma, phi, psi + in_longitude, obliquity + in_obliquity);
    // UT1 drops out of the difference; any will do.
    let apparent = erst::gst06(DJ00, 0.0, DJ00, days, &matrix);
    let mean = erst::gmst06(DJ00, 0.0, DJ00, days);
    let equation = Angle::from_radians(apparent - mean).signed();
    Vector::new(in_longitude, in_obliquity, equation.radians())
}

/// The Earth's orientation at one instant.
#[derive(Clone, Copy, Debug)]
pub struct Frame {
    /// True equator and equinox of date from the axes of the ICRS.
    pub true_from_icrs: Matrix,
    /// Obliquity of the ecliptic of date, nutation included.
    pub true_obliquity: Angle,
    /// Greenwich apparent sidereal time, [0°, 360°).
    pub sidereal_time: Angle,
}

impl Frame {
    /// From the three components that [`nutation`] gives at the instant.
    pub fn new(moment: Moment, nutation: Vector) -> Self {
        let tt_days = moment.tt().days_since_j2000();
        let (gamma, phi, psi, obliquity) = pnp::pfw06(DJ00, tt_days);
        let true_obliquity = obliquity + nutation.y;
        let ut1_days = moment.ut1().days_since_j2000();
        let mean_sidereal = erst::gmst06(DJ00, ut1_days, DJ00, tt_days);
        Self {
            true_from_icrs: Matrix(pnp::fw2m(gamma, phi, psi + nutation.x, true_obliquity)),
            true_obliquity: Angle::from_radians(true_obliquity),
            sidereal_time: Angle::from_radians(mean_sidereal + nutation.z).wrapped(),
        }
    }

    /// Ecliptic longitude and latitude of a direction given on the true equator of date.
    pub fn ecliptic(&self, direction: Vector) -> (Angle, Angle) {
        let turned = Matrix::about_x(self.true_obliquity) * direction;
        (turned.longitude(), turned.latitude())
    }
}

/// The mean ecliptic and equinox of J2000 from the axes of the ICRS.
///
/// Source: the IAU 2006 bias and obliquity at J2000, as above.
pub fn ecliptic_j2000_from_icrs() -> Matrix {
    let (gamma, phi, psi, obliquity) = pnp::pfw06(DJ00, 0.0);
    Matrix::about_x(Angle::from_radians(obliquity)) * Matrix(pnp::fw2m(gamma, phi, psi, obliquity))
}
