//! Vectors in space and rotations between frames.

use super::Angle;
use std::ops::{Add, Div, Mul, Neg, Sub};

/// A displacement or a direction; the frame and the unit are the caller's to state.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Vector {
    /// Along the frame's first axis.
    pub x: f64,
    /// Along the second.
    pub y: f64,
    /// Along the third.
    pub z: f64,
}

impl Vector {
    /// From components.
    pub const fn new(x: f64, y: f64, z: f64) -> Self {
        Self { x, y, z }
    }
    /// The unit vector at a longitude (from x towards y) and a latitude (towards z).
    pub fn from_spherical(longitude: Angle, latitude: Angle) -> Self {
        let (sin_longitude, cos_longitude) = longitude.sin_cos();
        let (sin_latitude, cos_latitude) = latitude.sin_cos();
        Self::new(
            cos_latitude * cos_longitude,
            cos_latitude * sin_longitude,
            sin_latitude,
        )
    }
    /// Scalar product.
    pub fn dot(self, other: Self) -> f64 {
        self.x * other.x + self.y * other.y + self.z * other.z
    }
    /// Vector product.
    pub fn cross(self, other: Self) -> Self {
        Self::new(
            self.y * other.z - self.z * other.y,
            self.z * other.x - self.x * other.z,
            self.x * other.y - self.y * other.x,
        )
    }
    /// Length.
    pub fn length(self) -> f64 {
        self.dot(self).sqrt()
    }
    /// The direction, of length one.
    pub fn unit(self) -> Self {
        self / self.length()
    }
    /// Longitude in [0°, 360°), from x towards y.
    pub fn longitude(self) -> Angle {
        Angle::from_radians(self.y.atan2(self.x)).wrapped()
    }
    /// Latitude in [-90°, 90°], towards z.
    pub fn latitude(self) -> Angle {
        Angle::from_radians(self.z.atan2(self.x.hypot(self.y)))
    }
    /// The angle between two directions, in [0°, 180°], exact also when it is tiny.
    pub fn angle_to(self, other: Self) -> Angle {
        Angle::from_radians(self.cross(other).length().atan2(self.dot(other)))
    }
}

impl Add for Vector {
    type Output = Self;
    fn add(self, other: Self) -> Self {
        Self::new(self.x + other.x, self.y + other.y, self.z + other.z)
    }
}
impl Sub for Vector {
    type Output = Self;
    fn sub(self, other: Self) -> Self {
        Self::new(self.x - other.x, self.y - other.y, self.z - other.z)
    }
}
impl Neg for Vector {
    type Output = Self;
    fn neg(self) -> Self {
        Self::new(-self.x, -self.y, -self.z)
    }
}
impl Mul<f64> for Vector {
    type Output = Self;
    fn mul(self, factor: f64) -> Self {
        Self::new(self.x * factor, self.y * factor, self.z * factor)
    }
}
impl Div<f64> for Vector {
    type Output = Self;
    fn div(self, divisor: f64) -> Self {
        self * (1.0 / divisor)
    }
}

/// A rotation between two frames, by rows: `to_from * vector_in_from = vector_in_to`.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Matrix(pub [[f64; 3]; 3]);

impl Matrix {
    /// No rotation.
    pub const IDENTITY: Self = Self([[1.0, 0.0, 0.0], [0.0, 1.0, 0.0], [0.0, 0.0, 1.0]]);

    /// The frame turned by `angle` about its third axis (positive from x towards y).
    pub fn about_z(angle: Angle) -> Self {
        let (s, c) = angle.sin_cos();
        Self([[c, s, 0.0], [-s, c, 0.0], [0.0, 0.0, 1.0]])
    }
    /// The frame turned by `angle` about its second axis (positive from z towards x).
    pub fn about_y(angle: Angle) -> Self {
        let (s, c) = angle.sin_cos();
        Self([[c, 0.0, -s], [0.0, 1.0, 0.0], [s, 0.0, c]])
    }
    /// The frame turned by `angle` about its first axis (positive from y towards z).
    pub fn about_x(angle: Angle) -> Self {
        let (s, c) = angle.sin_cos();
        Self([[1.0, 0.0, 0.0], [0.0, c, s], [0.0, -s, c]])
    }
    /// The rotation back.
    pub fn transposed(self) -> Self {
        let m = self.0;
        Self([
            [m[0][0], m[1][0], m[2][0]],
            [m[0][1], m[1][1], m[2][1]],
            [m[0][2], m[1][2], m[2][2]],
        ])
    }
}

impl Mul<Vector> for Matrix {
    type Output = Vector;
    fn mul(self, v: Vector) -> Vector {
        let row = |r: [f64; 3]| r[0] * v.x + r[1] * v.y + r[2] * v.z;
        Vector::new(row(self.0[0]), row(self.0[1]), row(self.0[2]))
    }
}
impl Mul for Matrix {
    type Output = Self;
    fn mul(self, other: Self) -> Self {
        let columns = other.transposed().0;
        Self(self.0.map(|row| {
            columns.map(|column| row[0] * column[0] + row[1] * column[1] + row[2] * column[2])
        }))
    }
}
