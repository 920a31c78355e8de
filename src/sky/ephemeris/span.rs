//! Reading the fitted pieces.

use super::piece::Quantity;
use super::planets::Planet;
use super::{Body, Ephemeris};
use crate::measure::{Chebyshev, Moment, Tt, Vector};
use crate::sky::Epoch;
use std::sync::Arc;

/// Fitted pieces for some bodies over one interval: immutable, shared, read without locks.
///
/// Every method answers for every body and instant. What lies outside the span (a body that was
/// not asked for, an instant past the room at its ends) is fetched or fitted through the shared
/// [`Ephemeris`]: right, but slow, so ask [`Ephemeris::cover`] for what a loop will use.
#[derive(Clone, Debug)]
pub struct Span {
    ephemeris: Ephemeris,
    tracks: [Track; Quantity::COUNT],
}

/// Successive pieces of one quantity.
#[derive(Clone, Debug, Default)]
pub struct Track {
    first: i32,
    pieces: Vec<Arc<Chebyshev>>,
}

impl Track {
    /// Pieces in order; `first` is the index of the first.
    pub const fn new(first: i32, pieces: Vec<Arc<Chebyshev>>) -> Self {
        Self { first, pieces }
    }

    fn piece(&self, index: i32) -> Option<&Chebyshev> {
        let from_first = index.checked_sub(self.first)?;
        let piece = self.pieces.get(usize::try_from(from_first).ok()?)?;
        Some(piece)
    }
}

impl Span {
    /// Nothing covered.
    pub(super) fn new(ephemeris: Ephemeris) -> Self {
        Self {
            ephemeris,
            tracks: Default::default(),
        }
    }

    pub(super) fn put(&mut self, quantity: Quantity, track: Track) {
        self.tracks[quantity.number()] = track;
    }

    /// Reads a piece: the span's own, or else the shared one.
    fn read<T>(&self, quantity: Quantity, tt: Tt, read: impl Fn(&Chebyshev, f64) -> T) -> T {
        let (index, day) = (quantity.index_at(tt), tt.days_since_j2000());
        match self.tracks[quantity.number()].piece(index) {
            Some(piece) => read(piece, day),
            None => read(&self.ephemeris.cache.piece(quantity, index), day),
        }
    }

    /// Fixes an instant within the interval.
    pub fn at(&self, moment: Moment) -> Epoch<'_> {
        Epoch::new(self, moment)
    }

    /// Heliocentric place, au, on the axes of the ICRS; the Sun's is zero.
    pub fn heliocentric(&self, body: Body, tt: Tt) -> Vector {
        match (body, Planet::of(body)) {
            (_, Some(planet)) => self.read(Quantity::Planet(planet), tt, Chebyshev::value),
            (Body::Moon, None) => {
                self.read(Quantity::Planet(Planet::Earth), tt, Chebyshev::value) + self.moon(tt)
            }
            (_, None) => Vector::default(),
        }
    }

    /// Heliocentric place (au) and velocity (au/day), as [`Self::heliocentric`].
    pub fn heliocentric_with_velocity(&self, body: Body, tt: Tt) -> (Vector, Vector) {
        let with_rate = |quantity| self.read(quantity, tt, Chebyshev::value_and_rate);
        match (body, Planet::of(body)) {
            (_, Some(planet)) => with_rate(Quantity::Planet(planet)),
            (Body::Moon, None) => {
                let (earth, moon) = (self.earth(tt), with_rate(Quantity::Moon));
                (earth.0 + moon.0, earth.1 + moon.1)
            }
            (_, None) => Default::default(),
        }
    }

    /// Heliocentric place (au) and velocity (au/day) of the Earth, on the axes of the ICRS.
    pub fn earth(&self, tt: Tt) -> (Vector, Vector) {
        let earth = Quantity::Planet(Planet::Earth);
        self.read(earth, tt, Chebyshev::value_and_rate)
    }

    /// Geocentric geometric place of the Moon, au, on the axes of the ICRS.
    pub fn moon(&self, tt: Tt) -> Vector {
        self.read(Quantity::Moon, tt, Chebyshev::value)
    }

    /// Nutation in longitude and obliquity and the equation of the equinoxes, radians, as the
    /// components of one vector.
    pub fn nutation(&self, tt: Tt) -> Vector {
        self.read(Quantity::Nutation, tt, Chebyshev::value)
    }
}
