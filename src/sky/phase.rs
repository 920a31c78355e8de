//! Elongation, phase, apparent size and orientation.

use super::epoch::Apparent;
use super::frame::Frame;
use super::magnitude::{self, Lighting, Magnitude};
use super::vantage::Sighting;
use super::{AU_KM, Body};
use crate::measure::{Angle, Tt, Vector};

/// What a body looks like from a place.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Appearance {
    /// Angle from the Sun's centre, apparent, [0°, 180°].
    pub elongation: Angle,
    /// Whether the body stands east of the Sun by ecliptic longitude (sets after it).
    pub is_east_of_sun: bool,
    /// Sun-body-observer angle when the light left, [0°, 180°]; 0 for the Sun.
    pub phase_angle: Angle,
    /// Illuminated fraction of the disc, [0, 1]; 1 for the Sun.
    pub illuminated_fraction: f64,
    /// Equatorial angular diameter: twice the angle whose sine is radius over distance.
    pub diameter: Angle,
    /// Position angle of the middle of the bright limb, north through east, [0°, 360°): the
    /// direction towards the Sun (Meeus, *Astronomical Algorithms*, 2nd ed., eq. 48.5); 0 for
    /// the Sun.
    pub bright_limb: Angle,
    /// Distance when the light left, au.
    pub distance_au: f64,
    /// Visual magnitude.
    pub magnitude: Magnitude,
}

/// A body sighted and placed.
#[derive(Clone, Copy, Debug)]
pub(super) struct Seen {
    pub sighting: Sighting,
    pub apparent: Apparent,
}

impl Seen {
    pub fn lighting(&self, tt: Tt) -> Lighting {
        Lighting {
            from_sun: self.sighting.from_sun,
            from_observer: self.sighting.from_observer,
            tt,
        }
    }
}

impl Appearance {
    pub(super) fn new(body: Body, seen: &Seen, sun: &Seen, frame: &Frame, tt: Tt) -> Self {
        let lighting = seen.lighting(tt);
        let distance_au = seen.apparent.distance_au;
        let sine = body.equatorial_radius_km() / (distance_au * AU_KM);
        let from_body = |elongation, is_east_of_sun, phase_angle: Angle, bright_limb| Self {
            elongation,
            is_east_of_sun,
            phase_angle,
            illuminated_fraction: 0.5 * (1.0 + phase_angle.cos()),
            diameter: Angle::from_radians(2.0 * sine.asin()),
            bright_limb,
            distance_au,
            magnitude: magnitude::of(body, &lighting),
        };
        if body == Body::Sun {
            return from_body(Angle::ZERO, false, Angle::ZERO, Angle::ZERO);
        }
        let (towards_body, towards_sun) = (seen.apparent.direction, sun.apparent.direction);
        let (longitude, _) = frame.ecliptic(towards_body);
        let (sun_longitude, _) = frame.ecliptic(towards_sun);
        from_body(
            towards_body.angle_to(towards_sun),
            (longitude - sun_longitude).signed() > Angle::ZERO,
            lighting.phase_angle(),
            position_angle(towards_body, towards_sun).wrapped(),
        )
    }
}

/// The direction along the sky from one place to another: from that of the pole through east,
/// (-180°, 180°]. 0 where there is none: from the pole, or to the same or the opposite place. Both
/// are given on the true equator of date.
pub fn position_angle(from: Vector, to: Vector) -> Angle {
    let east = from.x * to.y - from.y * to.x;
    let from_axis_squared = from.x * from.x + from.y * from.y;
    let north = to.z * from_axis_squared - from.z * (from.x * to.x + from.y * to.y);
    Angle::from_radians(east.atan2(north))
}
