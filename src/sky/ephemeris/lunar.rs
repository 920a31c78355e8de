//! The Moon's series: ELP/MPP02.
//!
//! Source: Chapront and Francou 2003, Astron. Astrophys. 404, 735, constants fitted to DE405.
//! Cut and kept as `assets/series/moon.csv`; the README beside it states the loss.

use crate::measure::{Angle, Matrix, Tt, Vector};

const AU_KM: f64 = 149_597_870.7;

/// Obliquity of the inertial mean ecliptic of J2000 to the equator of the DE405 frame, and the
/// arc from that frame's origin to the ecliptic's node on it.
///
/// Source: Chapront, Chapront-Touzé and Francou 2002 (Astron. Astrophys. 387, 700), table 4, the
/// DE405 row (from memory; against DE440 the Moon's mean place is left turned by 0.008 arcsec).
const OBLIQUITY: Angle = Angle::from_arcsec(84_381.409_60);
const NODE: Angle = Angle::from_arcsec(-0.050_28);

/// Laskar's P and Q: the node and inclination of the mean ecliptic of date on that of J2000, by
/// powers of Julian centuries (Chapront and Francou 2003, section 5.2).
const P: [f64; 6] = [
    0.0,
    0.101_803_91e-4,
    0.470_204_39e-6,
    -0.541_736_7e-9,
    -0.250_794_8e-11,
    0.463_486e-14,
];
const Q: [f64; 6] = [
    0.0,
    -0.113_469_002e-3,
    0.123_726_74e-6,
    0.126_541_70e-8,
    -0.137_180_8e-11,
    -0.320_334e-14,
];

/// The Moon's geocentric place as sums of sines.
#[derive(Clone, Debug)]
pub(super) struct LunarSeries {
    /// Mean longitude, rad, by powers of Julian centuries.
    mean_longitude: Vec<f64>,
    longitude: Vec<Term>,
    latitude: Vec<Term>,
    distance: Vec<Term>,
}

/// Arcseconds or kilometres times a power of time times a sine.
#[derive(Clone, Copy, Debug)]
struct Term {
    power: i32,
    amplitude: f64,
    argument: [f64; 5],
}

fn polynomial(coefficients: &[f64], t: f64) -> f64 {
    coefficients
        .iter()
        .rev()
        .fold(0.0, |sum, coefficient| sum * t + coefficient)
}

fn sum(terms: &[Term], t: f64) -> f64 {
    terms
        .iter()
        .map(|term| term.amplitude * t.powi(term.power) * polynomial(&term.argument, t).sin())
        .sum()
}

impl LunarSeries {
    /// Reads the series of the program's own assets.
    pub fn from_asset(text: &str) -> Self {
        let mut lines = text.lines();
        let first = lines
            .next()
            .and_then(|line| line.split(':').nth(1))
            .unwrap_or_default();
        let mut series = Self {
            mean_longitude: first
                .split_whitespace()
                .filter_map(|f| f.parse().ok())
                .collect(),
            longitude: Vec::new(),
            latitude: Vec::new(),
            distance: Vec::new(),
        };
        for line in lines.skip(1) {
            let mut fields = line.split(',');
            let terms = match fields.next() {
                Some("L") => &mut series.longitude,
                Some("B") => &mut series.latitude,
                _ => &mut series.distance,
            };
            let numbers: Vec<f64> = fields.filter_map(|field| field.parse().ok()).collect();
            let [power, amplitude, c0, c1, c2, c3, c4] = numbers[..] else {
                unreachable!("a shipped series has eight columns: {line}")
            };
            let argument = [c0, c1, c2, c3, c4];
            terms.push(Term {
                power: power as i32,
                amplitude,
                argument,
            });
        }
        series
    }

    /// Geocentric geometric place, au, on the axes of the ICRS.
    pub fn place(&self, tt: Tt) -> Vector {
        let t = tt.centuries_since_j2000();
        let longitude = Angle::from_radians(polynomial(&self.mean_longitude, t))
            + Angle::from_arcsec(sum(&self.longitude, t));
        let latitude = Angle::from_arcsec(sum(&self.latitude, t));
        let distance_au = sum(&self.distance, t) / AU_KM;
        let of_date = Vector::from_spherical(longitude, latitude) * distance_au;
        icrs_from_ecliptic_j2000() * (ecliptic_j2000_from_date(t) * of_date)
    }
}

/// The inertial mean ecliptic of J2000 from the mean ecliptic of date with the departure point
/// as origin, which the series is given in.
fn ecliptic_j2000_from_date(t: f64) -> Matrix {
    let (p, q) = (polynomial(&P, t), polynomial(&Q, t));
    let root = (1.0 - p * p - q * q).sqrt();
    Matrix([
        [1.0 - 2.0 * p * p, 2.0 * p * q, 2.0 * p * root],
        [2.0 * p * q, 1.0 - 2.0 * q * q, -2.0 * q * root],
        [
            -2.0 * p * root,
            2.0 * q * root,
            1.0 - 2.0 * p * p - 2.0 * q * q,
        ],
    ])
}

fn icrs_from_ecliptic_j2000() -> Matrix {
    Matrix::about_z(-NODE) * Matrix::about_x(-OBLIQUITY)
}
