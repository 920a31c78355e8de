//! Visual magnitudes of the planets and the Moon.

/// A visual magnitude, or why there is none.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Magnitude {
    /// V, within the formula's range of phase angles.
    Within(f64),
    /// V by extrapolation just outside the formula's stated range (Mercury within 2 degrees of
    /// either end, Venus above 179).
    Extrapolated(f64),
    /// The formula says nothing here.
    OutsideRange,
}

impl Magnitude {
    /// V, whether or not extrapolated.
    pub fn value(self) -> Option<f64> {
        match self {
            Self::Within(v) | Self::Extrapolated(v) => Some(v),
            Self::OutsideRange => None,
        }
    }
}
