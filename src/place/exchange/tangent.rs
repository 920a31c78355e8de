//! Between geodetic coordinates and the metres of a site's plan.

use crate::measure::{Angle, Vector};
use crate::place::{PlanPoint, Site};

/// Equatorial radius and flattening of the WGS84 ellipsoid (NIMA TR8350.2).
const RADIUS_M: f64 = 6_378_137.0;
const FLATTENING: f64 = 1.0 / 298.257_223_563;
const ECCENTRICITY_SQUARED: f64 = FLATTENING * (2.0 - FLATTENING);

/// The plane that touches the WGS84 ellipsoid at a site's mark, east and north on it in metres.
///
/// Points are taken on the ellipsoid and seen straight from above. Up to 10 km from the mark
/// the plan is shorter than the ground by at most the cube of the distance over six radii
/// squared, 4 mm, and bearings agree to below 1 arcsecond; what the ground's height above the
/// ellipsoid adds, 16 mm in 100 m for every 1000 m of it, is left out, as maps do.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct TangentPlane {
    latitude: Angle,
    longitude: Angle,
}

impl TangentPlane {
    /// The plane at a site's mark.
    pub fn at(site: &Site) -> Self {
        Self {
            latitude: Angle::from_degrees(site.latitude_deg),
            longitude: Angle::from_degrees(site.longitude_deg),
        }
    }

    /// The point of the plan above a longitude and a latitude.
    pub fn plan_point(&self, longitude: Angle, latitude: Angle) -> PlanPoint {
        let from_mark =
            on_ellipsoid(longitude, latitude) - on_ellipsoid(self.longitude, self.latitude);
        let [east, north] = self.axes();
        PlanPoint::new(from_mark.dot(east), from_mark.dot(north))
    }

    /// How far a place is from the mark in a straight line, m; within a millionth of the ground's
    /// distance up to 10 km.
    pub fn distance_m(&self, longitude: Angle, latitude: Angle) -> f64 {
        let from_mark =
            on_ellipsoid(longitude, latitude) - on_ellipsoid(self.longitude, self.latitude);
        from_mark.length()
    }

    /// The longitude, in [-180°, 180°), and the latitude below a point of the plan within 15 km
    /// of the mark; to a micrometre.
    pub fn coordinates(&self, at: PlanPoint) -> (Angle, Angle) {
        let sin = self.latitude.sin();
        let flattened = 1.0 - ECCENTRICITY_SQUARED * sin * sin;
        let across_m = RADIUS_M / flattened.sqrt();
        let along_m = across_m * (1.0 - ECCENTRICITY_SQUARED) / flattened;
        // Nobody surveys a lawn at the pole; there all longitudes are one.
        let from_axis_m = across_m * self.latitude.cos().max(1e-9);
        let (mut longitude, mut latitude) = (self.longitude, self.latitude);
        // The first step is right to a part in a thousand, each further one a thousand times
        // better.
        for _ in 0..8 {
            let reached = self.plan_point(longitude, latitude);
            let (east_m, north_m) = (at.east_m - reached.east_m, at.north_m - reached.north_m);
            longitude = longitude + Angle::from_radians(east_m / from_axis_m);
            latitude = latitude + Angle::from_radians(north_m / along_m);
        }
        (longitude.signed(), latitude)
    }

    /// Unit vectors east and north at the mark.
    fn axes(&self) -> [Vector; 2] {
        let (sin_latitude, cos_latitude) = self.latitude.sin_cos();
        let (sin_longitude, cos_longitude) = self.longitude.sin_cos();
        [
            Vector::new(-sin_longitude, cos_longitude, 0.0),
            Vector::new(
                -sin_latitude * cos_longitude,
                -sin_latitude * sin_longitude,
                cos_latitude,
            ),
        ]
    }
}

/// A point of the ellipsoid from the Earth's centre, m.
fn on_ellipsoid(longitude: Angle, latitude: Angle) -> Vector {
    let (sin, cos) = latitude.sin_cos();
    let across_m = RADIUS_M / (1.0 - ECCENTRICITY_SQUARED * sin * sin).sqrt();
    let (sin_longitude, cos_longitude) = longitude.sin_cos();
    Vector::new(
        across_m * cos * cos_longitude,
        across_m * cos * sin_longitude,
        across_m * (1.0 - ECCENTRICITY_SQUARED) * sin,
    )
}
