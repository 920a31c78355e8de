//! Why a light figure is refused.

use std::fmt;

/// A figure that is not finite or lies outside what the model covers.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum LightError {
    /// Outside its range.
    OutOfRange {
        /// What it is, with its unit.
        what: &'static str,
        /// The value given.
        value: f64,
        /// Least allowed.
        least: f64,
        /// Most allowed.
        most: f64,
    },
    /// A total extinction below what gas and ozone alone take at that elevation.
    ImpossibleExtinction {
        /// The total given, magnitudes at the zenith.
        total_mag: f64,
        /// Elevation, metres.
        elevation_m: f64,
        /// The least possible total there.
        least_mag: f64,
        /// Most allowed.
        most_mag: f64,
    },
}

impl LightError {
    /// The value, if it is within the range.
    pub(super) fn check(
        what: &'static str,
        value: f64,
        least: f64,
        most: f64,
    ) -> Result<f64, Self> {
        if (least..=most).contains(&value) {
            Ok(value)
        } else {
            Err(Self::OutOfRange { what, value, least, most })
        }
    }
}

impl fmt::Display for LightError {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Self::OutOfRange { what, value, least, most } => {
                write!(f, "the {what} {value} is not within {least} to {most}")
            }
            Self::ImpossibleExtinction { total_mag, elevation_m, least_mag, most_mag } => write!(
                f,
                "the extinction {total_mag} mag is impossible at {elevation_m} m, where air and \
                 ozone alone take {least_mag:.3}: give {:.3} to {most_mag}",
                (least_mag * 1000.0).ceil() / 1000.0
            ),
        }
    }
}

impl std::error::Error for LightError {}
