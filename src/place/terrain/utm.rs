//! Universal Transverse Mercator coordinates.

use super::geodesy::{FLATTENING, Position, SEMI_MAJOR_M};
use std::f64::consts::PI;

/// A zone of the Universal Transverse Mercator grid.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) struct UtmZone {
    /// 1 to 60, from 180° W eastward.
    pub number: u8,
    /// Whether northings count from 10,000 km south of the equator.
    pub is_south: bool,
}

const SCALE: f64 = 0.9996;
const FALSE_EASTING_M: f64 = 500_000.0;
const SOUTHERN_NORTHING_M: f64 = 10_000_000.0;
/// Third flattening.
const N: f64 = FLATTENING / (2.0 - FLATTENING);
/// Places farther than this from the zone's meridian have no coordinates here: 14 zones.
const FARTHEST: f64 = 40.0 * PI / 180.0;

/// Krüger's coefficients of the northing and easting in the third flattening, to its fourth
/// power: below a millimetre within [`FARTHEST`].
///
/// Source: L. Krüger, *Konforme Abbildung des Erdellipsoids in der Ebene* (1912); C. Karney,
/// "Transverse Mercator with an accuracy of a few nanometers", J. Geodesy 85 (2011), eq. 35.
const ALPHA: [f64; 4] = [
    N * (1.0 / 2.0 + N * (-2.0 / 3.0 + N * (5.0 / 16.0 + N * (41.0 / 180.0)))),
    N * N * (13.0 / 48.0 + N * (-3.0 / 5.0 + N * (557.0 / 1440.0))),
    N * N * N * (61.0 / 240.0 + N * (-103.0 / 140.0)),
    N * N * N * N * (49561.0 / 161_280.0),
];

impl UtmZone {
    /// Easting and northing, m; `None` far outside the zone.
    pub(super) fn project(self, position: Position) -> Option<(f64, f64)> {
        let meridian = (f64::from(self.number) * 6.0 - 183.0).to_radians();
        let east = (position.longitude - meridian + PI).rem_euclid(2.0 * PI) - PI;
        if east.abs() > FARTHEST {
            return None;
        }
        let eccentricity = 2.0 * N.sqrt() / (1.0 + N);
        let sin_lat = position.latitude.sin();
        let conformal_tan =
            (sin_lat.atanh() - eccentricity * (eccentricity * sin_lat).atanh()).sinh();
        let xi = conformal_tan.atan2(east.cos());
        let eta = (east.sin() / conformal_tan.hypot(1.0)).atanh();
        let (mut northing, mut easting) = (xi, eta);
        for (k, alpha) in ALPHA.iter().enumerate() {
            let turn = 2.0 * (k + 1) as f64;
            let (sin, cos) = (turn * xi).sin_cos();
            northing += alpha * sin * (turn * eta).cosh();
            easting += alpha * cos * (turn * eta).sinh();
        }
        let radius_m = SCALE * SEMI_MAJOR_M / (1.0 + N) * (1.0 + N * N / 4.0 + N.powi(4) / 64.0);
        let false_northing_m = if self.is_south {
            SOUTHERN_NORTHING_M
        } else {
            0.0
        };
        Some((
            FALSE_EASTING_M + radius_m * easting,
            false_northing_m + radius_m * northing,
        ))
    }
}

#[cfg(test)]
mod tests {
    use super::{Position, UtmZone};

    /// `epsg,latitude_deg,longitude_deg,easting_m,northing_m`.
    const EXPECTED: &str = include_str!("../../../tests/data/terrain/utm.csv");

    #[test] // PROJ by pyproj (make_utm.py beside the file), printed to 0.1 mm
    fn coordinates_are_those_of_proj() {
        let mut rows = 0;
        for line in EXPECTED.lines().filter(|line| line.starts_with("32")) {
            let fields: Vec<f64> = line
                .split(',')
                .map(|n| n.parse().expect("a number"))
                .collect();
            let epsg = fields[0] as u32;
            let zone = UtmZone {
                number: (epsg % 100) as u8,
                is_south: epsg > 32700,
            };
            let (easting_m, northing_m) = zone
                .project(Position {
                    latitude: fields[1].to_radians(),
                    longitude: fields[2].to_radians(),
                })
                .expect("within the zone's reach");
            assert!((easting_m - fields[3]).abs() < 1e-3, "{line}: {easting_m}");
            assert!(
                (northing_m - fields[4]).abs() < 1e-3,
                "{line}: {northing_m}"
            );
            rows += 1;
        }
        assert!(rows >= 40, "{rows} rows");
        let antipode = Position {
            latitude: 0.5,
            longitude: 3.0,
        };
        let zone = UtmZone {
            number: 30,
            is_south: false,
        };
        assert_eq!(zone.project(antipode), None);
    }
}
