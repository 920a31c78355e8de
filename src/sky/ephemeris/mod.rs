//! The planets' and the Moon's motions: series, kept as Chebyshev pieces.
//!
//! The series are evaluated only to fit a piece: heliocentric places of the planets, geocentric
//! ones of the Moon, and the nutation. Pieces never change once fitted; [`Ephemeris`] keeps and
//! shares them, and a [`Span`] holds those of one interval, so that reading takes no lock.

mod correction;
mod lunar;
mod series;
mod theory;

use super::{Body, Epoch};
use crate::measure::{Chebyshev, Moment, Tt, Vector};
use std::collections::HashMap;
use std::fmt;
use std::sync::{Arc, Mutex, PoisonError};
use theory::Theory;

/// Room before and after the asked interval, days: light takes 4.3 hours from Neptune at its
/// farthest, and a search may look a little beyond its ends.
const ROOM_DAYS: f64 = 0.5;

/// The theories are covered from 1598 to 2402, so that searches at the ends of the supported
/// years 1600 to 2400 have room.
const COVERED_DAYS: f64 = 402.0 * 365.25;

/// Pieces that are kept at the most (some 20 MB): beyond it the store is emptied, and what is in
/// use lives on in its spans.
const MOST_PIECES: usize = 20_000;

/// The theories, evaluated on demand into Chebyshev pieces that are kept and shared.
#[derive(Clone, Debug, Default)]
pub struct Ephemeris {
    pieces: Arc<Mutex<HashMap<(Theory, i32), Arc<Chebyshev>>>>,
}

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
    /// An ephemeris with nothing fitted yet; cheap, and cheap to clone (clones share the pieces).
    pub fn new() -> Self {
        Self::default()
    }

    /// The given bodies (the Earth and its nutation always among them) over `from` to `to`, with
    /// room before `from` for light time. Fits what is not kept yet.
    ///
    /// # Errors
    /// The interval leaves the years that the theories are checked for.
    pub fn cover(&self, from: Tt, to: Tt, bodies: &[Body]) -> Result<Span, OutsideEphemeris> {
        for tt in [from, to] {
            // Written so that a NaN is outside too.
            if !(tt.days_since_j2000().abs() <= COVERED_DAYS) {
                return Err(OutsideEphemeris { tt });
            }
        }
        let mut span = Span::default();
        let of_body = |body: &Body| match body {
            Body::Sun => None,
            Body::Moon => Some(Theory::Moon),
            planet => Theory::of_planet(*planet),
        };
        let always = [Theory::Earth, Theory::Nutation];
        for theory in always.into_iter().chain(bodies.iter().filter_map(of_body)) {
            span.runs[theory.index()] = Some(self.run(theory, from, to));
        }
        Ok(span)
    }

    /// The pieces of one theory over an interval.
    fn run(&self, theory: Theory, from: Tt, to: Tt) -> Run {
        let (length_days, _) = theory.piece();
        let number = |days: f64| (days / length_days).floor() as i32;
        let first = number(from.days_since_j2000() - ROOM_DAYS);
        let last = number(to.days_since_j2000() + ROOM_DAYS);
        let pieces = (first..=last)
            .map(|piece| self.piece(theory, piece))
            .collect();
        Run {
            start_days: f64::from(first) * length_days,
            length_days,
            pieces,
        }
    }

    fn piece(&self, theory: Theory, piece: i32) -> Arc<Chebyshev> {
        // A thread that panicked while it held the lock cannot have left half a piece behind.
        let lock = || self.pieces.lock().unwrap_or_else(PoisonError::into_inner);
        if let Some(kept) = lock().get(&(theory, piece)) {
            return Arc::clone(kept);
        }
        let fitted = Arc::new(theory.fitted(piece));
        let mut pieces = lock();
        if pieces.len() >= MOST_PIECES {
            pieces.clear();
        }
        Arc::clone(pieces.entry((theory, piece)).or_insert(fitted))
    }
}

/// Neighbouring pieces of one theory.
#[derive(Clone, Debug)]
struct Run {
    start_days: f64,
    length_days: f64,
    pieces: Vec<Arc<Chebyshev>>,
}

impl Run {
    fn piece(&self, days: f64) -> &Chebyshev {
        // Beyond its ends a run goes on with its end pieces; `cover` leaves room enough.
        let number = ((days - self.start_days) / self.length_days).max(0.0) as usize;
        &self.pieces[number.min(self.pieces.len() - 1)]
    }
}

/// Fitted pieces for some bodies over one interval: immutable, shared, read without locks.
///
/// Only instants within the interval that was covered are meant to be asked for, and only bodies
/// that were covered: another body is a mistake of the calling code, and panics.
#[derive(Clone, Debug, Default)]
pub struct Span {
    runs: [Option<Run>; theory::COUNT],
}

impl Span {
    /// Fixes an instant within the interval.
    pub fn at(&self, moment: Moment) -> Epoch<'_> {
        Epoch::new(self, moment)
    }

    /// Whether a body was asked for when the span was covered (the Sun always is).
    pub fn holds(&self, body: Body) -> bool {
        match body {
            Body::Sun => true,
            Body::Moon => self.runs[Theory::Moon.index()].is_some(),
            planet => Theory::of_planet(planet).is_some_and(|t| self.runs[t.index()].is_some()),
        }
    }

    fn run(&self, theory: Theory) -> &Run {
        match &self.runs[theory.index()] {
            Some(run) => run,
            None => panic!("{theory:?} was not among the bodies that this span covers"),
        }
    }

    fn value(&self, theory: Theory, tt: Tt) -> Vector {
        let days = tt.days_since_j2000();
        self.run(theory).piece(days).value(days)
    }

    fn value_and_rate(&self, theory: Theory, tt: Tt) -> (Vector, Vector) {
        let days = tt.days_since_j2000();
        self.run(theory).piece(days).value_and_rate(days)
    }

    /// Heliocentric place of a planet, au, on the axes of the ICRS. Not for the Sun or Moon.
    pub fn heliocentric(&self, body: Body, tt: Tt) -> Vector {
        Theory::of_planet(body).map_or(Vector::default(), |theory| self.value(theory, tt))
    }

    /// Heliocentric place (au) and velocity (au/day) of a planet, as [`Self::heliocentric`].
    pub fn heliocentric_with_velocity(&self, body: Body, tt: Tt) -> (Vector, Vector) {
        Theory::of_planet(body).map_or(Default::default(), |theory| self.value_and_rate(theory, tt))
    }

    /// Heliocentric place (au) and velocity (au/day) of the Earth, on the axes of the ICRS.
    pub fn earth(&self, tt: Tt) -> (Vector, Vector) {
        self.value_and_rate(Theory::Earth, tt)
    }

    /// Geocentric geometric place of the Moon, au, on the axes of the ICRS.
    pub fn moon(&self, tt: Tt) -> Vector {
        self.value(Theory::Moon, tt)
    }

    /// The three components of the nutation function of the Earth's orientation: longitude,
    /// obliquity, equation of the equinoxes, radians.
    pub fn nutation(&self, tt: Tt) -> Vector {
        self.value(Theory::Nutation, tt)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Instants spread over the supported years without a pattern.
    fn instants(count: u32) -> impl Iterator<Item = Tt> {
        (0..count).map(move |k| {
            let share = (f64::from(k) * 0.618_033_988_749_895).fract();
            Tt::from_days_since_j2000((share - 0.5) * 2.0 * 400.0 * 365.25)
        })
    }

    #[test]
    fn pieces_keep_within_five_milliarcseconds_of_the_theories() {
        let ephemeris = Ephemeris::new();
        for (theory, least_au) in [
            (Theory::Mercury, 0.55),
            (Theory::Venus, 0.27),
            (Theory::Earth, 0.27),
            (Theory::Mars, 0.37),
            (Theory::Jupiter, 3.9),
            (Theory::Saturn, 8.0),
            (Theory::Uranus, 17.2),
            (Theory::Neptune, 28.8),
            (Theory::Moon, 0.0024),
            (Theory::Nutation, 50.0),
        ] {
            for tt in instants(150) {
                let (length_days, _) = theory.piece();
                let number = (tt.days_since_j2000() / length_days).floor() as i32;
                let fitted = ephemeris.piece(theory, number).value(tt.days_since_j2000());
                let missed = (fitted - theory.evaluated(tt)).length() / least_au;
                let missed = Angle::from_radians(missed).arcsec();
                assert!(
                    missed < 0.005,
                    "{theory:?} misses by {missed} arcsec at {tt:?}"
                );
            }
        }
    }

    #[test]
    fn outside_the_covered_years_is_refused() {
        let at = |days| Tt::from_days_since_j2000(days);
        let ephemeris = Ephemeris::new();
        for days in [-200_000.0, 200_000.0, f64::NAN, f64::INFINITY] {
            let error = ephemeris.cover(at(days), at(0.0), &[Body::Sun]);
            assert!(error.is_err(), "{days} days from J2000 must be refused");
        }
        assert!(
            ephemeris
                .cover(at(-146_096.0), at(-146_090.0), &[Body::Venus])
                .is_ok()
        );
    }

    #[test]
    fn clones_share_what_is_fitted() {
        let ephemeris = Ephemeris::new();
        let now = Tt::from_days_since_j2000(9_800.0);
        let first = ephemeris.clone().piece(Theory::Venus, 153);
        assert!(Arc::ptr_eq(&first, &ephemeris.piece(Theory::Venus, 153)));
        assert!(
            ephemeris
                .cover(now, now, &[Body::Venus])
                .is_ok_and(|span| span.holds(Body::Venus))
        );
    }

    use crate::measure::Angle;
}
