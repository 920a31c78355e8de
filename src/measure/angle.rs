//! Angles with their unit kept out of sight.

use std::f64::consts::{PI, TAU};
use std::ops::{Add, Div, Mul, Neg, Sub};

/// An angle. Kept in radians; made from and read in whatever unit the caller names.
#[derive(Clone, Copy, Debug, Default, PartialEq, PartialOrd)]
pub struct Angle(f64);

impl Angle {
    /// No angle at all.
    pub const ZERO: Self = Self(0.0);

    /// From radians.
    pub const fn from_radians(radians: f64) -> Self {
        Self(radians)
    }
    /// From degrees.
    pub const fn from_degrees(degrees: f64) -> Self {
        Self(degrees * (PI / 180.0))
    }
    /// From arcminutes.
    pub const fn from_arcmin(arcmin: f64) -> Self {
        Self::from_degrees(arcmin / 60.0)
    }
    /// From arcseconds.
    pub const fn from_arcsec(arcsec: f64) -> Self {
        Self::from_degrees(arcsec / 3600.0)
    }
    /// In radians.
    pub const fn radians(self) -> f64 {
        self.0
    }
    /// In degrees.
    pub const fn degrees(self) -> f64 {
        self.0 * (180.0 / PI)
    }
    /// In arcseconds.
    pub const fn arcsec(self) -> f64 {
        self.degrees() * 3600.0
    }
    /// Sine.
    pub fn sin(self) -> f64 {
        self.0.sin()
    }
    /// Cosine.
    pub fn cos(self) -> f64 {
        self.0.cos()
    }
    /// Sine and cosine together.
    pub fn sin_cos(self) -> (f64, f64) {
        self.0.sin_cos()
    }
    /// Tangent.
    pub fn tan(self) -> f64 {
        self.0.tan()
    }
    /// The same direction in [0°, 360°).
    pub fn wrapped(self) -> Self {
        let turned = self.0.rem_euclid(TAU);
        // A tiny negative angle rounds up to a whole turn.
        Self(if turned >= TAU { 0.0 } else { turned })
    }
    /// The same direction in [-180°, 180°).
    pub fn signed(self) -> Self {
        Self((self.0 + PI).rem_euclid(TAU) - PI)
    }
    /// Without its sign.
    pub fn abs(self) -> Self {
        Self(self.0.abs())
    }
    /// Whether the angle is a finite number.
    pub fn is_finite(self) -> bool {
        self.0.is_finite()
    }
}

impl Add for Angle {
    type Output = Self;
    fn add(self, other: Self) -> Self {
        Self(self.0 + other.0)
    }
}
impl Sub for Angle {
    type Output = Self;
    fn sub(self, other: Self) -> Self {
        Self(self.0 - other.0)
    }
}
impl Neg for Angle {
    type Output = Self;
    fn neg(self) -> Self {
        Self(-self.0)
    }
}
impl Mul<f64> for Angle {
    type Output = Self;
    fn mul(self, factor: f64) -> Self {
        Self(self.0 * factor)
    }
}
impl Div<f64> for Angle {
    type Output = Self;
    fn div(self, divisor: f64) -> Self {
        Self(self.0 / divisor)
    }
}
impl Div for Angle {
    type Output = f64;
    fn div(self, other: Self) -> f64 {
        self.0 / other.0
    }
}

#[cfg(test)]
mod tests {
    use super::Angle;

    #[test]
    fn wrapping_keeps_the_direction_and_the_range() {
        assert_eq!(Angle::from_degrees(-1e-18).wrapped(), Angle::ZERO);
        assert!((Angle::from_degrees(-90.0).wrapped().degrees() - 270.0).abs() < 1e-12);
        assert!((Angle::from_degrees(190.0).signed().degrees() + 170.0).abs() < 1e-12);
        assert!((Angle::from_degrees(180.0).signed().degrees() + 180.0).abs() < 1e-12);
    }
}
