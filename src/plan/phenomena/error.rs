//! Why a list of events cannot be given.

use super::search::Lost;
use crate::measure::Tt;
use crate::sky::{Body, OutsideEphemeris};
use std::fmt;

/// Why a list of events cannot be given.
#[derive(Clone, Debug, PartialEq)]
pub enum PhenomenaError {
    /// The span leaves the years that the ephemeris covers.
    OutOfRange(OutsideEphemeris),
    /// The span ends where it starts, or before.
    Empty,
    /// A search closed in on something that then was not there: no list is given, as an event
    /// might be missing from it.
    Lost {
        /// Whose event.
        body: Body,
        /// The start of the bracket.
        from: Tt,
        /// Its end.
        to: Tt,
    },
}

impl PhenomenaError {
    /// A lost bracket of a body's.
    pub(super) fn lost(body: Body, lost: Lost) -> Self {
        let tt = Tt::from_days_since_j2000;
        Self::Lost {
            body,
            from: tt(lost.bracket.0),
            to: tt(lost.bracket.1),
        }
    }
}

impl fmt::Display for PhenomenaError {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Self::OutOfRange(error) => error.fmt(f),
            Self::Empty => write!(
                f,
                "the span holds no time: its end must come after its start"
            ),
            Self::Lost { body, from, to } => write!(
                f,
                "an event of {body} between the Julian dates (TT) {} and {} could not be pinned \
                 down, so the list is not given: leave those days out of the span",
                from.julian_date(),
                to.julian_date()
            ),
        }
    }
}

impl std::error::Error for PhenomenaError {}

impl From<OutsideEphemeris> for PhenomenaError {
    fn from(error: OutsideEphemeris) -> Self {
        Self::OutOfRange(error)
    }
}
