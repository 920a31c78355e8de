//! The bright stars.

/// A star of the catalogue.
#[derive(Clone, Debug, PartialEq)]
pub struct Star {
    /// Proper name as adopted by the IAU, if it has one.
    pub name: Option<String>,
    /// Visual magnitude.
    pub magnitude: f64,
}
