//! The planets' and the Moon's motions: series, kept as Chebyshev spans.
//!
//! [`Ephemeris`] owns what has been fitted, [`Span`] reads it. The series themselves (VSOP87A
//! with a correction, ELP/MPP02) are evaluated only at the nodes of a piece. What the theories
//! are, where their coefficients come from and how close they stand to JPL DE440 is told in
//! `assets/series/README.md`.

mod cache;
mod correction;
mod moon;
mod piece;
mod planets;
mod series;
mod span;

pub use planets::ICRS_FROM_ECLIPTIC;
pub use span::Span;

use super::Body;
use crate::measure::Tt;
use cache::Cache;
use piece::Quantity;
use planets::Planet;
use span::Track;
use std::fmt;
use std::sync::Arc;

/// The theories, evaluated on demand into Chebyshev pieces that are kept and shared.
///
/// Clones share the pieces. What is kept is bounded (40 MB when every piece of every body has been
/// asked for). Threads may use one ephemeris at the same time.
#[derive(Clone, Debug, Default)]
pub struct Ephemeris {
    cache: Arc<Cache>,
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
    /// The first instant that [`Self::cover`] accepts: two years before the supported ones, so
    /// that searches from their edge have room (1598.0).
    pub const FIRST: Tt = Tt::from_days_since_j2000((1598.0 - 2000.0) * 365.25);
    /// The last one, two years after (2403.0).
    pub const LAST: Tt = Tt::from_days_since_j2000((2403.0 - 2000.0) * 365.25);

    /// Covered before `from`, days: light time (Neptune's is 0.18 day) and steps for rates.
    const ROOM_BEFORE_DAYS: f64 = 0.3;
    /// Covered after `to`, days: steps for rates.
    const ROOM_AFTER_DAYS: f64 = 0.05;

    /// An ephemeris with nothing fitted yet; cheap, and cheap to clone (clones share the pieces).
    pub fn new() -> Self {
        Self::default()
    }

    /// The given bodies over `from` to `to` with room for light time before `from`; the Earth
    /// and the nutation always among them. Fits what is not kept yet (about a millisecond for
    /// each body and piece); with everything kept it takes about a microsecond, so that rows in
    /// any order may each ask for their own instant.
    ///
    /// # Errors
    /// The interval leaves [`Self::FIRST`] to [`Self::LAST`], or an end is not a number.
    pub fn cover(&self, from: Tt, to: Tt, bodies: &[Body]) -> Result<Span, OutsideEphemeris> {
        for tt in [from, to] {
            if !(Self::FIRST..=Self::LAST).contains(&tt) {
                return Err(OutsideEphemeris { tt });
            }
        }
        let start = from.plus_days(-Self::ROOM_BEFORE_DAYS);
        let end = to.plus_days(Self::ROOM_AFTER_DAYS);
        let asked = bodies.iter().filter_map(|body| match body {
            Body::Sun => None,
            Body::Moon => Some(Quantity::Moon),
            body => Planet::of(*body).map(Quantity::Planet),
        });
        let mut span = Span::new(self.clone());
        for quantity in [Quantity::Planet(Planet::Earth), Quantity::Nutation]
            .into_iter()
            .chain(asked)
        {
            let (first, last) = (quantity.index_at(start), quantity.index_at(end));
            let pieces = self.cache.pieces(quantity, first..=last);
            span.put(quantity, Track::new(first, pieces));
        }
        Ok(span)
    }
}
