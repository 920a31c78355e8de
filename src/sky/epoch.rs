//! The sky at one instant: apparent places from the Earth's centre.

use super::frame::{self, Frame};
use super::magnitude;
use super::orbit;
use super::phase::Seen;
use super::stars::Star;
use super::vantage::Vantage;
use super::{Appearance, Body, Observer, Span, View};
use crate::measure::{Angle, Moment, Vector};

/// One instant: the Earth's place and velocity, its orientation and sidereal time are worked
/// out once and serve every body and every observer.
///
/// Against JPL DE440 the places keep within what `tests/sky/places.rs` states and checks.
#[derive(Clone, Debug)]
pub struct Epoch<'a> {
    moment: Moment,
    frame: Frame,
    centre: Vantage<'a>,
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

impl<'a> Epoch<'a> {
    pub(super) fn new(span: &'a Span, moment: Moment) -> Self {
        let tt = moment.tt();
        let (place, velocity) = span.earth(tt);
        Self {
            moment,
            frame: Frame::new(moment, span.nutation(tt)),
            centre: Vantage {
                span,
                tt,
                place,
                velocity,
            },
        }
    }
    /// The instant.
    pub fn moment(&self) -> Moment {
        self.moment
    }
    /// The Earth's orientation.
    pub fn frame(&self) -> &Frame {
        &self.frame
    }
    /// Apparent place seen from the Earth's centre.
    pub fn geocentric(&self, body: Body) -> Apparent {
        self.seen_from(&self.centre, body).apparent
    }
    /// Apparent place of a star seen from the Earth's centre: proper motion, parallax,
    /// deflection and aberration applied.
    pub fn star(&self, star: &Star) -> Apparent {
        self.star_from(&self.centre, star)
    }
    /// Apparent ecliptic longitude and latitude of a geocentric direction (true ecliptic and
    /// equinox of date).
    pub fn ecliptic(&self, direction: Vector) -> (Angle, Angle) {
        self.frame.ecliptic(direction)
    }
    /// Phase, size and brightness seen from the Earth's centre.
    pub fn appearance(&self, body: Body) -> Appearance {
        self.appearance_from(&self.centre, body)
    }
    /// How far Saturn's rings are open towards the Earth: the saturnicentric latitude B of the
    /// Earth, positive while their north face is seen. Their axes look as |sin B| to 1.
    pub fn ring_opening(&self) -> Angle {
        let saturn = self.seen_from(&self.centre, Body::Saturn);
        magnitude::ring_opening(&saturn.lighting(self.moment.tt()))
    }
    /// The sky as this observer sees it.
    pub fn seen_by(&self, observer: &'a Observer) -> View<'_> {
        View::new(self, observer)
    }
    /// Heliocentric place of a body or of the Earth (`None`), au, in the mean ecliptic of
    /// J2000, at this instant (no light time); for drawing orbits.
    pub fn heliocentric_ecliptic(&self, body: Option<Body>) -> Vector {
        let (span, tt) = (self.centre.span, self.centre.tt);
        let place = match body {
            None => self.centre.place,
            Some(Body::Sun) => Vector::default(),
            Some(Body::Moon) => self.centre.place + span.moon(tt),
            Some(planet) => span.heliocentric(planet, tt),
        };
        frame::ecliptic_j2000_from_icrs() * place
    }
    /// Points of the orbit that a planet or the Earth (`None`) is running round at this instant,
    /// au, in the mean ecliptic of J2000, evenly in eccentric anomaly from perihelion on. Empty
    /// for the Sun and the Moon.
    pub fn orbit(&self, body: Option<Body>, points: usize) -> Vec<Vector> {
        let (place, velocity) = match body {
            None => (self.centre.place, self.centre.velocity),
            Some(Body::Sun | Body::Moon) => return Vec::new(),
            Some(planet) => self
                .centre
                .span
                .heliocentric_with_velocity(planet, self.centre.tt),
        };
        let turn = frame::ecliptic_j2000_from_icrs();
        orbit::ellipse(turn * place, turn * velocity, points)
    }

    pub(super) fn centre(&self) -> &Vantage<'a> {
        &self.centre
    }
    pub(super) fn seen_from(&self, vantage: &Vantage<'_>, body: Body) -> Seen {
        let sighting = vantage.sight(body);
        Seen {
            sighting,
            apparent: Apparent {
                direction: self.frame.true_from_icrs * vantage.seen(body, &sighting),
                distance_au: sighting.from_observer.length(),
            },
        }
    }
    pub(super) fn star_from(&self, vantage: &Vantage<'_>, star: &Star) -> Apparent {
        let direction = vantage.seen_star(star.direction(vantage.tt), star.parallax);
        Apparent {
            direction: self.frame.true_from_icrs * direction,
            distance_au: f64::INFINITY,
        }
    }
    pub(super) fn appearance_from(&self, vantage: &Vantage<'_>, body: Body) -> Appearance {
        let seen = self.seen_from(vantage, body);
        let sun = self.seen_from(vantage, Body::Sun);
        Appearance::new(body, &seen, &sun, &self.frame, self.moment.tt())
    }
}
