//! The sky at one instant from one place on the Earth.

use super::phase::position_angle;
use super::refraction;
use super::stars::Star;
use super::vantage::Vantage;
use super::{AU_KM, Apparent, Appearance, Body, Epoch, Observer};
use crate::measure::{Angle, Matrix, Vector};

/// Equatorial radius of the WGS84 ellipsoid, metres.
const WGS84_RADIUS_M: f64 = 6_378_137.0;
/// Flattening of the WGS84 ellipsoid.
const WGS84_FLATTENING: f64 = 1.0 / 298.257_223_563;
/// The Earth's rotation, radians a day (7.292115e-5 rad/s, as WGS84 has it).
const ROTATION_PER_DAY: f64 = 7.292_115e-5 * 86_400.0;

/// A place above the horizon, without refraction.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Horizontal {
    /// Airless altitude of the centre.
    pub altitude: Angle,
    /// Azimuth from north through east, [0°, 360°).
    pub azimuth: Angle,
}

/// A place above the horizon as the air shows it.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Refracted {
    /// Refracted altitude.
    pub altitude: Angle,
    /// Azimuth from north through east, [0°, 360°).
    pub azimuth: Angle,
}

/// The sky at one instant from one place.
#[derive(Clone, Debug)]
pub struct View<'a> {
    epoch: &'a Epoch<'a>,
    observer: &'a Observer,
    vantage: Vantage<'a>,
    /// Rows: north, east and up, on the true equator of date.
    north_east_up: Matrix,
}

impl<'a> View<'a> {
    pub(super) fn new(epoch: &'a Epoch<'a>, observer: &'a Observer) -> Self {
        let sidereal_time = epoch.frame().sidereal_time + observer.longitude;
        let (sin_time, cos_time) = sidereal_time.sin_cos();
        let (sin_latitude, cos_latitude) = observer.latitude.sin_cos();

        let to_curvature_m =
            WGS84_RADIUS_M / (1.0 - eccentricity_squared() * sin_latitude * sin_latitude).sqrt();
        let from_axis_m = (to_curvature_m + observer.elevation_m) * cos_latitude;
        let along_axis_m =
            (to_curvature_m * (1.0 - eccentricity_squared()) + observer.elevation_m) * sin_latitude;
        let from_centre = Vector::new(from_axis_m * cos_time, from_axis_m * sin_time, along_axis_m)
            / (AU_KM * 1000.0);
        let velocity = Vector::new(-from_centre.y, from_centre.x, 0.0) * ROTATION_PER_DAY;

        let icrs_from_true = epoch.frame().true_from_icrs.transposed();
        let centre = epoch.centre();
        Self {
            epoch,
            observer,
            vantage: Vantage {
                place: centre.place + icrs_from_true * from_centre,
                velocity: centre.velocity + icrs_from_true * velocity,
                ..*centre
            },
            north_east_up: Matrix([
                [
                    -sin_latitude * cos_time,
                    -sin_latitude * sin_time,
                    cos_latitude,
                ],
                [-sin_time, cos_time, 0.0],
                [
                    cos_latitude * cos_time,
                    cos_latitude * sin_time,
                    sin_latitude,
                ],
            ]),
        }
    }
    /// Topocentric apparent place (true equator and equinox of date, diurnal aberration and
    /// parallax applied).
    pub fn topocentric(&self, body: Body) -> Apparent {
        self.epoch.seen_from(&self.vantage, body).apparent
    }
    /// Topocentric apparent place of a star.
    pub fn star(&self, star: &Star) -> Apparent {
        self.epoch.star_from(&self.vantage, star)
    }
    /// Airless altitude and azimuth of a topocentric direction.
    pub fn horizontal(&self, direction: Vector) -> Horizontal {
        let turned = self.north_east_up * direction;
        Horizontal {
            altitude: turned.latitude(),
            azimuth: turned.longitude(),
        }
    }
    /// The topocentric direction (true equator and equinox of date) of an airless altitude and
    /// azimuth.
    pub fn direction(&self, place: Horizontal) -> Vector {
        self.north_east_up.transposed() * Vector::from_spherical(place.azimuth, place.altitude)
    }
    /// Airless altitude and azimuth of a body's centre.
    pub fn place(&self, body: Body) -> Horizontal {
        self.horizontal(self.topocentric(body).direction)
    }
    /// The airless place as this observer's air shows it.
    pub fn refracted(&self, place: Horizontal) -> Refracted {
        Refracted {
            altitude: refraction::refracted(place.altitude, &self.observer.air),
            azimuth: place.azimuth,
        }
    }
    /// Refracted altitude and azimuth of a body's centre.
    pub fn refracted_place(&self, body: Body) -> Refracted {
        self.refracted(self.place(body))
    }
    /// Refracted altitude and azimuth of the upper limb of a body's disc, taken as round; for
    /// the Sun and the Moon. Refraction is that at the limb.
    pub fn refracted_upper_limb(&self, body: Body) -> Refracted {
        let topocentric = self.topocentric(body);
        let sine = body.equatorial_radius_km() / (topocentric.distance_au * AU_KM);
        let centre = self.horizontal(topocentric.direction);
        self.refracted(Horizontal {
            altitude: centre.altitude + Angle::from_radians(sine.asin()),
            ..centre
        })
    }
    /// Phase, size and orientation as seen from here.
    pub fn appearance(&self, body: Body) -> Appearance {
        self.epoch.appearance_from(&self.vantage, body)
    }
    /// Parallactic angle of a topocentric direction: from the direction of the pole to that of
    /// the zenith, positive west of the meridian, [-180°, 180°].
    pub fn parallactic_angle(&self, direction: Vector) -> Angle {
        let [_, _, up] = self.north_east_up.0;
        position_angle(direction, Vector::new(up[0], up[1], up[2]))
    }
    /// Where the middle of a body's bright limb lies as the naked eye sees it: from straight up
    /// counter-clockwise, [0°, 360°). 0 for the Sun.
    pub fn bright_limb_from_zenith(&self, body: Body) -> Angle {
        if body == Body::Sun {
            return Angle::ZERO;
        }
        let parallactic = self.parallactic_angle(self.topocentric(body).direction);
        (self.appearance(body).bright_limb - parallactic).wrapped()
    }
}

const fn eccentricity_squared() -> f64 {
    WGS84_FLATTENING * (2.0 - WGS84_FLATTENING)
}
