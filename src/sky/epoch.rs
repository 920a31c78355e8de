//! The sky at one instant: apparent places from the Earth's centre and from a place on it.

use super::{Appearance, Body, Observer, Span};
use crate::measure::{Angle, Moment, Vector};

/// One instant: the Earth's place and velocity, its orientation and sidereal time are worked
/// out once and serve every body and every observer.
#[derive(Clone, Debug)]
pub struct Epoch<'a> {
    span: &'a Span,
    moment: Moment,
}

/// An apparent place: true equator and equinox of date, light time, deflection and aberration
/// applied.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Apparent {
    /// The unit vector towards it.
    pub direction: Vector,
    /// Distance when the light left, au; infinite for a star.
    pub distance_au: f64,
}

impl Apparent {
    /// Right ascension, [0°, 360°).
    pub fn right_ascension(&self) -> Angle {
        self.direction.longitude()
    }
    /// Declination.
    pub fn declination(&self) -> Angle {
        self.direction.latitude()
    }
}

/// A place above the horizon, without refraction.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Horizontal {
    /// Airless altitude of the centre.
    pub altitude: Angle,
    /// Azimuth from north through east, [0°, 360°).
    pub azimuth: Angle,
}

impl<'a> Epoch<'a> {
    pub(super) fn new(span: &'a Span, moment: Moment) -> Self {
        Self { span, moment }
    }
    /// The instant.
    pub fn moment(&self) -> Moment {
        self.moment
    }
    /// Apparent place seen from the Earth's centre.
    pub fn geocentric(&self, _body: Body) -> Apparent {
        todo!()
    }
    /// Apparent ecliptic longitude and latitude of a geocentric direction (true ecliptic and
    /// equinox of date).
    pub fn ecliptic(&self, _direction: Vector) -> (Angle, Angle) {
        todo!()
    }
    /// Phase, size and brightness seen from the Earth's centre.
    pub fn appearance(&self, _body: Body) -> Appearance {
        todo!()
    }
    /// The sky as this observer sees it.
    pub fn seen_by(&self, observer: &'a Observer) -> View<'_> {
        View {
            epoch: self,
            observer,
        }
    }
    /// Heliocentric place of a planet or of the Earth (`None`), au, in the mean ecliptic of
    /// J2000; for drawing orbits.
    pub fn heliocentric_ecliptic(&self, _body: Option<Body>) -> Vector {
        todo!()
    }
}

/// The sky at one instant from one place.
#[derive(Clone, Debug)]
pub struct View<'a> {
    epoch: &'a Epoch<'a>,
    observer: &'a Observer,
}

impl View<'_> {
    /// Topocentric apparent place (true equator and equinox of date, diurnal aberration and
    /// parallax applied).
    pub fn topocentric(&self, _body: Body) -> Apparent {
        todo!()
    }
    /// Airless altitude and azimuth of a topocentric direction.
    pub fn horizontal(&self, _direction: Vector) -> Horizontal {
        todo!()
    }
    /// Airless altitude and azimuth of a body's centre.
    pub fn place(&self, body: Body) -> Horizontal {
        self.horizontal(self.topocentric(body).direction)
    }
    /// Phase, size and orientation as seen from here.
    pub fn appearance(&self, _body: Body) -> Appearance {
        todo!()
    }
    /// Parallactic angle of a topocentric direction: from the direction of the pole to that of
    /// the zenith, positive west of the meridian.
    pub fn parallactic_angle(&self, _direction: Vector) -> Angle {
        todo!()
    }
}
