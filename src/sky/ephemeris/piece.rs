//! What is kept as Chebyshev pieces, and how long and how fine they are.

use super::moon;
use super::planets::Planet;
use crate::measure::{Chebyshev, Tt, Vector};
use crate::sky::frame;

/// A vector function of time that is too slow to evaluate in a frame.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Quantity {
    /// Heliocentric place, au, on the axes of the ICRS.
    Planet(Planet),
    /// Geocentric place of the Moon, au, on the axes of the ICRS.
    Moon,
    /// The three components of [`frame::nutation`], radians.
    Nutation,
}

/// How a quantity is cut up: time from J2000 in steps of equal length.
#[derive(Clone, Copy, Debug)]
pub struct Layout {
    /// Length of one piece, days.
    pub days: f64,
    /// Chebyshev nodes of one piece.
    pub nodes: usize,
}

impl Quantity {
    /// How many there are.
    pub const COUNT: usize = Planet::ALL.len() + 2;

    /// A number below [`Self::COUNT`], its own.
    pub const fn number(self) -> usize {
        match self {
            Self::Planet(planet) => planet as usize,
            Self::Moon => Planet::ALL.len(),
            Self::Nutation => Planet::ALL.len() + 1,
        }
    }

    /// Length and nodes of the pieces. They keep within 0.005 arcsec of the theory as seen from
    /// the Earth at its nearest; `tests/sky/ephemeris.rs` measures it. The outer planets' are finer
    /// than that asks for: their slow stations hang on the rates too.
    pub const fn layout(self) -> Layout {
        let (days, nodes) = match self {
            Self::Planet(Planet::Mercury) => (32.0, 17),
            Self::Planet(Planet::Venus) => (64.0, 11),
            Self::Planet(Planet::Earth) => (16.0, 10),
            Self::Planet(Planet::Mars) => (64.0, 8),
            Self::Planet(_) => (128.0, 8),
            Self::Moon => (8.0, 12),
            Self::Nutation => (frame::NUTATION_PIECE_DAYS, frame::NUTATION_PIECE_NODES),
        };
        Layout { days, nodes }
    }

    /// The index of the piece that an instant lies in.
    pub fn index_at(self, tt: Tt) -> i32 {
        (tt.days_since_j2000() / self.layout().days).floor() as i32
    }

    /// The theory's own value. Slow: for fitting only.
    pub fn theory(self, tt: Tt) -> Vector {
        match self {
            Self::Planet(planet) => planet.heliocentric(tt),
            Self::Moon => moon::geocentric(tt),
            Self::Nutation => frame::nutation(tt),
        }
    }

    /// Fits one piece; its variable is days since J2000.
    pub fn fit(self, index: i32) -> Chebyshev {
        let Layout { days, nodes } = self.layout();
        Chebyshev::fit(f64::from(index) * days, days, nodes, |day| {
            self.theory(Tt::from_days_since_j2000(day))
        })
    }
}

#[cfg(test)]
mod tests {
    use super::{Planet, Quantity};
    use crate::measure::{Angle, Tt};
    use crate::sky::Ephemeris;

    /// Instants all over the covered years and all over the pieces, without a pattern.
    fn instants(count: u32) -> impl Iterator<Item = Tt> {
        let length = Ephemeris::LAST.days_since_j2000() - Ephemeris::FIRST.days_since_j2000();
        (0..count).map(move |k| {
            let share = (f64::from(k) * 0.618_033_988_749_895).fract();
            Ephemeris::FIRST.plus_days(share * length)
        })
    }

    /// Seen over the least distance from the Earth, au, rounded down; the Earth's from Venus.
    fn greatest_miss(quantity: Quantity, least_distance_au: f64) -> Angle {
        let missed = instants(400).map(|tt| {
            let fitted = quantity.fit(quantity.index_at(tt));
            let miss = fitted.value(tt.days_since_j2000()) - quantity.theory(tt);
            miss.length() / least_distance_au
        });
        Angle::from_radians(missed.fold(0.0, f64::max))
    }

    #[test]
    fn pieces_keep_within_five_milliarcseconds_of_the_theories() {
        for (quantity, least_distance_au) in [
            (Quantity::Planet(Planet::Mercury), 0.54),
            (Quantity::Planet(Planet::Venus), 0.26),
            (Quantity::Planet(Planet::Earth), 0.26),
            (Quantity::Planet(Planet::Mars), 0.37),
            (Quantity::Planet(Planet::Jupiter), 3.9),
            (Quantity::Planet(Planet::Saturn), 7.9),
            (Quantity::Planet(Planet::Uranus), 17.2),
            (Quantity::Planet(Planet::Neptune), 28.6),
            (Quantity::Moon, 0.0023),
        ] {
            let miss = greatest_miss(quantity, least_distance_au).arcsec();
            assert!(miss < 0.005, "{quantity:?} misses by {miss} arcsec");
        }
    }

    #[test]
    fn pieces_of_the_nutation_keep_within_a_tenth_of_a_milliarcsecond() {
        let miss = greatest_miss(Quantity::Nutation, 1.0).arcsec();
        assert!(miss < 1e-4, "the nutation misses by {miss} arcsec");
    }
}
