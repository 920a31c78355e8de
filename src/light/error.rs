//! Why a light figure is refused.

use std::fmt;

/// A figure that is not finite or lies outside what the model covers.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct LightError {
    /// What it is, with its unit.
    pub what: &'static str,
    /// The value given.
    pub value: f64,
    /// Least allowed.
    pub least: f64,
    /// Most allowed.
    pub most: f64,
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
            Err(Self {
                what,
                value,
                least,
                most,
            })
        }
    }
}

impl fmt::Display for LightError {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        let Self {
            what,
            value,
            least,
            most,
        } = self;
        write!(f, "the {what} is {value}: give {least} to {most}")
    }
}

impl std::error::Error for LightError {}
