//! Places on the WGS84 ellipsoid: the end of a straight line from the site.

use crate::measure::Angle;

/// Semi-major axis of WGS84, m (and of GRS80, on which ETRS89 rests).
pub(super) const SEMI_MAJOR_M: f64 = 6_378_137.0;
/// Flattening of WGS84; that of GRS80 moves no place by more than 0.1 mm.
pub(super) const FLATTENING: f64 = 1.0 / 298.257_223_563;
/// Square of the first eccentricity.
const ECCENTRICITY2: f64 = FLATTENING * (2.0 - FLATTENING);

/// Geodetic latitude and longitude, radians.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Position {
    pub latitude: f64,
    pub longitude: f64,
}

/// The site on the ellipsoid, with what straight lines from it need.
#[derive(Clone, Debug)]
pub(super) struct Origin {
    /// Geocentric, m.
    place_m: [f64; 3],
    east: [f64; 3],
    north: [f64; 3],
    up: [f64; 3],
    /// Radius of curvature in the meridian, m.
    meridian_m: f64,
    /// Radius of curvature across the meridian, m.
    prime_vertical_m: f64,
}

impl Origin {
    pub(super) fn new(position: Position) -> Self {
        let (sin_lat, cos_lat) = position.latitude.sin_cos();
        let (sin_lon, cos_lon) = position.longitude.sin_cos();
        let w2 = 1.0 - ECCENTRICITY2 * sin_lat * sin_lat;
        let prime_vertical_m = SEMI_MAJOR_M / w2.sqrt();
        Self {
            place_m: [
                prime_vertical_m * cos_lat * cos_lon,
                prime_vertical_m * cos_lat * sin_lon,
                prime_vertical_m * (1.0 - ECCENTRICITY2) * sin_lat,
            ],
            east: [-sin_lon, cos_lon, 0.0],
            north: [-sin_lat * cos_lon, -sin_lat * sin_lon, cos_lat],
            up: [cos_lat * cos_lon, cos_lat * sin_lon, sin_lat],
            meridian_m: prime_vertical_m * (1.0 - ECCENTRICITY2) / w2,
            prime_vertical_m,
        }
    }

    /// Gauss's mean radius of curvature, m. Within 60 km it gives the drop of the surface to
    /// 0.9 m in 282 m in every direction, which is 0.001 deg.
    pub(super) fn mean_radius_m(&self) -> f64 {
        (self.meridian_m * self.prime_vertical_m).sqrt()
    }

    /// The place so far away along the ellipsoid in a direction.
    ///
    /// The line is the circle that touches the ellipsoid with its curvature in that direction
    /// (Euler's theorem); within 60 km it ends less than 0.1 m from the geodesic's end.
    pub(super) fn ahead(&self, azimuth: Angle, distance_m: f64) -> Position {
        let (sin_az, cos_az) = azimuth.sin_cos();
        let curvature = cos_az * cos_az / self.meridian_m + sin_az * sin_az / self.prime_vertical_m;
        let (sin, cos) = (distance_m * curvature).sin_cos();
        let (along_m, down_m) = (sin / curvature, (1.0 - cos) / curvature);
        let [x, y, z] = std::array::from_fn(|k| {
            let forward = self.east[k] * sin_az + self.north[k] * cos_az;
            self.place_m[k] + along_m * forward - down_m * self.up[k]
        });
        // Bowring's formula, exact to far below a millimetre so close to the ellipsoid.
        let from_axis_m = x.hypot(y);
        let semi_minor_m = SEMI_MAJOR_M * (1.0 - FLATTENING);
        let (sin, cos) = (z * SEMI_MAJOR_M)
            .atan2(from_axis_m * semi_minor_m)
            .sin_cos();
        let second2 = ECCENTRICITY2 / (1.0 - ECCENTRICITY2);
        Position {
            latitude: (z + second2 * semi_minor_m * sin.powi(3))
                .atan2(from_axis_m - ECCENTRICITY2 * SEMI_MAJOR_M * cos.powi(3)),
            longitude: y.atan2(x),
        }
    }
}

#[cfg(test)]
mod tests {
    use super::{Origin, Position};
    use crate::measure::Angle;

    const EXPECTED: &str = include_str!("../../../tests/data/terrain/geodesic.csv");

    #[test] // PROJ's geodesics by pyproj (make_utm.py beside the file)
    fn lines_end_where_geodesics_end() {
        let mut rows = 0;
        for line in EXPECTED.lines().filter(|line| !line.starts_with('#')) {
            let fields: Vec<f64> = line
                .split(',')
                .map(|number| number.parse().expect("a number"))
                .collect();
            let origin = Origin::new(Position {
                latitude: fields[0].to_radians(),
                longitude: fields[1].to_radians(),
            });
            let end = origin.ahead(Angle::from_degrees(fields[2]), fields[3]);
            let north_m = (end.latitude.to_degrees() - fields[4]) * 111_195.0;
            let turned = Angle::from_radians(end.longitude) - Angle::from_degrees(fields[5]);
            let east_m = turned.signed().degrees() * 111_195.0 * end.latitude.cos();
            assert!(north_m.hypot(east_m) < 0.1, "{line}: {north_m}, {east_m}");
            rows += 1;
        }
        assert_eq!(rows, 40);
    }
}
