//! Geocentric place of the Moon: ELP/MPP02 in its fit to DE405.
//!
//! Source: Chapront and Francou 2003, Astron. Astrophys. 404, 735, and the notes published with
//! the theory (`elpmpp02.pdf`, 2002). The coefficients are explained in
//! `assets/series/README.md`.

use super::series::{PoissonSeries, Reading};
use crate::measure::{Angle, Matrix, Tt, Vector};
use std::sync::OnceLock;

const TEXT: &str = include_str!("../../../assets/series/moon.txt");

/// IAU 2012.
const KM_PER_AU: f64 = 149_597_870.7;

/// Mean longitude: coefficients of powers of Julian centuries from J2000, radians (W1 of the
/// theory; the same numbers head the asset).
const MEAN_LONGITUDE_RAD: [f64; 5] = [
    3.810_344_090_830_880_3,
    8_399.684_730_071_93,
    -3.318_952_042_550_094e-5,
    3.110_249_449_106_061_6e-8,
    -2.032_823_764_892_284_5e-10,
];

/// Laskar's precession of the ecliptic, sin(i/2) sin and cos of the node, by powers of Julian
/// centuries from the first; from the notes to the theory.
const P: [f64; 5] = [
    0.101_803_91e-4,
    0.470_204_39e-6,
    -0.541_736_7e-9,
    -0.250_794_8e-11,
    0.463_486e-14,
];
const Q: [f64; 5] = [
    -0.113_469_002e-3,
    0.123_726_74e-6,
    0.126_541_70e-8,
    -0.137_180_8e-11,
    -0.320_334e-14,
];

/// Obliquity of the theory's fixed ecliptic on the equator of the ICRS, and right ascension of
/// its node there, arcsec: the values for DE405 in Chapront, Chapront-Touzé and Francou 2002,
/// Astron. Astrophys. 387, 700, table 3 (from memory; against DE440 over 1900-2100 a turn of
/// 0.004 arcsec is left).
const OBLIQUITY_ARCSEC: f64 = 84_381.409_60;
const NODE_ARCSEC: f64 = -0.050_28;

/// Geocentric place, au, on the axes of the ICRS. Slow (some 60 microseconds): for fitting only.
/// The argument is taken for TDB, which never leaves TT by 2 ms (0.001 arcsec here).
pub fn geocentric(tt: Tt) -> Vector {
    let centuries = tt.centuries_since_j2000();
    icrs_from_ecliptic() * (j2000_from_date(centuries) * of_date(centuries)) / KM_PER_AU
}

/// Place in the mean ecliptic of date, longitudes counted from the departure point, km.
fn of_date(centuries: f64) -> Vector {
    let sums = series().value(centuries);
    let longitude = polynomial(&MEAN_LONGITUDE_RAD, centuries) + sums.x;
    let latitude = sums.y;
    Vector::from_spherical(
        Angle::from_radians(longitude),
        Angle::from_radians(latitude),
    ) * sums.z
}

fn series() -> &'static PoissonSeries {
    static SERIES: OnceLock<PoissonSeries> = OnceLock::new();
    SERIES.get_or_init(|| {
        let arcsec = Angle::from_arcsec(1.0).radians();
        let reading = Reading {
            variables: ["longitude", "latitude", "distance"],
            units: [arcsec, arcsec, 1.0],
            sines: true,
        };
        PoissonSeries::parse(TEXT, reading)
    })
}

/// Inertial mean ecliptic and equinox of J2000 from the mean ecliptic of date and its departure
/// point.
fn j2000_from_date(centuries: f64) -> Matrix {
    let p = centuries * polynomial(&P, centuries);
    let q = centuries * polynomial(&Q, centuries);
    let s = 2.0 * (1.0 - p * p - q * q).sqrt();
    Matrix([
        [1.0 - 2.0 * p * p, 2.0 * p * q, p * s],
        [2.0 * p * q, 1.0 - 2.0 * q * q, -q * s],
        [-p * s, q * s, 1.0 - 2.0 * p * p - 2.0 * q * q],
    ])
}

fn icrs_from_ecliptic() -> Matrix {
    Matrix::about_z(Angle::from_arcsec(-NODE_ARCSEC))
        * Matrix::about_x(Angle::from_arcsec(-OBLIQUITY_ARCSEC))
}

fn polynomial(coefficients: &[f64], time: f64) -> f64 {
    coefficients
        .iter()
        .rev()
        .fold(0.0, |sum, coefficient| sum * time + coefficient)
}

#[cfg(test)]
mod tests {
    use super::{Tt, Vector, j2000_from_date, of_date};

    /// Places in the ecliptic of J2000, km, printed with the theory's own program for its fit to
    /// DE405 (from memory; the package's untrimmed coefficients give every digit of them).
    const CHECK_VALUES: [(f64, Vector); 3] = [
        (
            2_500_000.5,
            Vector::new(274_034.591_03, 252_067.536_89, -18_998.755_19),
        ),
        (
            2_300_000.5,
            Vector::new(353_104.313_59, -195_254.118_08, 34_943.545_92),
        ),
        (
            2_100_000.5,
            Vector::new(-19_851.276_74, -385_646.177_17, -27_597.661_34),
        ),
    ];

    #[test]
    fn the_trimmed_series_match_the_published_check_values() {
        // 0.1 arcsec, the measured loss, at the greatest distance of the three.
        const TOLERANCE_KM: f64 = 0.2;
        for (julian_date, expected) in CHECK_VALUES {
            let centuries = Tt::from_julian_date(julian_date).centuries_since_j2000();
            let actual = j2000_from_date(centuries) * of_date(centuries);
            let missed = (actual - expected).length();
            assert!(
                missed < TOLERANCE_KM,
                "{missed} km off at JD {julian_date}: {actual:?}"
            );
        }
    }
}
