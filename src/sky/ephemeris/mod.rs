//! The planets' and the Moon's motions: series, kept as Chebyshev spans.

use super::{Body, Epoch};
use crate::measure::{Moment, Tt, Vector};
use std::fmt;

/// The theories, evaluated on demand into Chebyshev spans that are kept and shared.
#[derive(Clone, Debug, Default)]
pub struct Ephemeris {}

/// A time outside what the ephemeris covers.
#[derive(Clone, Debug, PartialEq)]
pub struct OutsideEphemeris {
    /// The time that was asked for.
    pub tt: Tt,
}

impl fmt::Display for OutsideEphemeris {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(
            f,
            "the year {:.1} lies outside the supported years 1600 to 2400",
            self.tt.decimal_year()
        )
    }
}

impl std::error::Error for OutsideEphemeris {}

impl Ephemeris {
    /// An ephemeris with nothing fitted yet; cheap, and cheap to clone (clones share the spans).
    pub fn new() -> Self {
        Self::default()
    }

    /// The given bodies (the Earth always among them) over `from` to `to`, with enough room
    /// before `from` for light time. Fits what is not kept yet.
    ///
    /// # Errors
    /// The interval leaves the years that the theories are checked for.
    pub fn cover(&self, _from: Tt, _to: Tt, _bodies: &[Body]) -> Result<Span, OutsideEphemeris> {
        todo!()
    }
}

/// Fitted pieces for some bodies over one interval: immutable, shared, read without locks.
#[derive(Clone, Debug)]
pub struct Span {}

impl Span {
    /// Fixes an instant within the interval.
    pub fn at(&self, moment: Moment) -> Epoch<'_> {
        Epoch::new(self, moment)
    }
    /// Heliocentric place of a planet, au, on the axes of the ICRS. Not for the Sun or Moon.
    pub fn heliocentric(&self, _body: Body, _tt: Tt) -> Vector {
        todo!()
    }
    /// Heliocentric place (au) and velocity (au/day) of a planet, as [`Self::heliocentric`].
    pub fn heliocentric_with_velocity(&self, body: Body, tt: Tt) -> (Vector, Vector) {
        let h = 0.01;
        let rate = (self.heliocentric(body, tt.plus_days(h))
            - self.heliocentric(body, tt.plus_days(-h)))
            / (2.0 * h);
        (self.heliocentric(body, tt), rate)
    }
    /// Heliocentric place (au) and velocity (au/day) of the Earth, on the axes of the ICRS.
    pub fn earth(&self, _tt: Tt) -> (Vector, Vector) {
        todo!()
    }
    /// The three components of [`super::frame::nutation`].
    pub fn nutation(&self, tt: Tt) -> Vector {
        super::frame::nutation(tt)
    }
    /// Geocentric geometric place of the Moon, au, on the axes of the ICRS.
    pub fn moon(&self, _tt: Tt) -> Vector {
        todo!()
    }
}
