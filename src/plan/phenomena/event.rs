//! What can happen, and what is told of it.

use super::Circumstances;
use crate::measure::{Angle, Moment};
use crate::sky::Body;

/// The circle along which two bodies are compared.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Circle {
    /// Apparent ecliptic longitude of date.
    Longitude,
    /// Apparent right ascension of date.
    RightAscension,
}

/// The side of the Sun that a body stands on, by apparent ecliptic longitude.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Side {
    /// East of the Sun: in the evening sky.
    East,
    /// West of the Sun: in the morning sky.
    West,
}

/// A kind of event. All are geocentric and apparent.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Kind {
    /// Mercury or Venus at the Sun's longitude or right ascension, on the near side.
    InferiorConjunction(Circle),
    /// Mercury or Venus at the Sun's longitude or right ascension, beyond it.
    SuperiorConjunction(Circle),
    /// An outer planet (or the Moon) at the Sun's longitude or right ascension.
    Conjunction(Circle),
    /// 180° from the Sun in longitude or right ascension.
    Opposition(Circle),
    /// Mercury or Venus at its largest angle from the Sun's centre.
    GreatestElongation(Side),
    /// Right ascension stands still, growing before and falling after.
    StationaryThenWestward,
    /// Right ascension stands still, falling before and growing after.
    StationaryThenEastward,
    /// Mercury or Venus at a phase angle of 90°: half lit.
    Dichotomy(Side),
    /// Venus with its largest lit area in the sky.
    GreatestIlluminatedExtent(Side),
    /// Venus at its brightest by the magnitude formula, as a crescent.
    MagnitudeMinimum(Side),
    /// Venus or Mars nearest to the Earth.
    Perigee,
    /// Venus or Mars farthest from the Earth.
    Apogee,
    /// Saturn's rings open widest for the time being.
    RingOpeningGreatest,
    /// Saturn's rings open least for the time being.
    RingOpeningLeast,
    /// The Earth passes through the plane of Saturn's rings.
    RingPlaneCrossing,
    /// Mercury or Venus before the Sun's disc; the instant is that of the least separation.
    Transit,
}

/// A quantity with its unit.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Value {
    /// Angle from the Sun's centre, apparent.
    Elongation(Angle),
    /// Lit area of the disc in the sky, square arcseconds.
    LitAreaArcsec2(f64),
    /// Visual magnitude.
    Magnitude(f64),
    /// Distance from the Earth when the light left, au.
    DistanceAu(f64),
    /// Saturnicentric latitude of the Earth, north positive.
    RingOpening(Angle),
    /// Apparent angle between the centres of two bodies, told in arcseconds.
    SeparationArcsec(Angle),
}

/// One of the moments of a transit.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum ContactName {
    /// The planet's disc touches the Sun's from outside, coming on.
    First,
    /// It touches the limb from inside, having come on.
    Second,
    /// The centres are nearest to each other.
    Greatest,
    /// It touches the limb from inside, going off.
    Third,
    /// It touches the limb from outside, having gone off.
    Fourth,
}

/// A moment of a transit as seen from one place.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Contact {
    /// Which.
    pub name: ContactName,
    /// When.
    pub moment: Moment,
    /// Apparent angle between the centres.
    pub separation: Angle,
    /// Position angle of the planet's centre from the Sun's, from north of date through east,
    /// [0°, 360°).
    pub position_angle: Angle,
    /// Where the planet and the Sun then stand; `None` for the Earth's centre.
    pub local: Option<Circumstances>,
}

/// Something that happens at an instant.
#[derive(Clone, Debug, PartialEq)]
pub struct Event {
    /// What.
    pub kind: Kind,
    /// To which body.
    pub body: Body,
    /// The second body, if two take part.
    pub other: Option<Body>,
    /// When.
    pub moment: Moment,
    /// The quantity that the kind is about.
    pub value: Value,
    /// A transit's moments as seen from the Earth's centre, in order of time: those that occur.
    pub contacts: Vec<Contact>,
    /// Where the body stands at the moment as seen from the lookout that was given.
    pub local: Option<Circumstances>,
    /// A transit's moments as seen from there, in order of time. Where the planet misses the disc
    /// only the least separation is among them.
    pub local_contacts: Vec<Contact>,
}

impl ContactName {
    /// The name used in files.
    pub const fn name(self) -> &'static str {
        match self {
            Self::First => "I",
            Self::Second => "II",
            Self::Greatest => "greatest",
            Self::Third => "III",
            Self::Fourth => "IV",
        }
    }
}

impl Side {
    const fn pick(self, east: &'static str, west: &'static str) -> &'static str {
        match self {
            Self::East => east,
            Self::West => west,
        }
    }
}

impl Circle {
    const fn pick(self, longitude: &'static str, right_ascension: &'static str) -> &'static str {
        match self {
            Self::Longitude => longitude,
            Self::RightAscension => right_ascension,
        }
    }
}

impl Kind {
    /// The name used in files and on the command line.
    pub const fn name(self) -> &'static str {
        match self {
            Self::InferiorConjunction(circle) => {
                circle.pick("inferior_conjunction_lon", "inferior_conjunction_ra")
            }
            Self::SuperiorConjunction(circle) => {
                circle.pick("superior_conjunction_lon", "superior_conjunction_ra")
            }
            Self::Conjunction(circle) => circle.pick("conjunction_lon", "conjunction_ra"),
            Self::Opposition(circle) => circle.pick("opposition_lon", "opposition_ra"),
            Self::GreatestElongation(side) => {
                side.pick("greatest_elongation_E", "greatest_elongation_W")
            }
            Self::StationaryThenWestward => "stationary_ra_then_westward",
            Self::StationaryThenEastward => "stationary_ra_then_eastward",
            Self::Dichotomy(side) => side.pick("dichotomy_E", "dichotomy_W"),
            Self::GreatestIlluminatedExtent(side) => side.pick(
                "greatest_illuminated_extent_E",
                "greatest_illuminated_extent_W",
            ),
            Self::MagnitudeMinimum(side) => side.pick("magnitude_minimum_E", "magnitude_minimum_W"),
            Self::Perigee => "perigee",
            Self::Apogee => "apogee",
            Self::RingOpeningGreatest => "ring_opening_greatest",
            Self::RingOpeningLeast => "ring_opening_least",
            Self::RingPlaneCrossing => "ring_plane_crossing",
            Self::Transit => "transit",
        }
    }
}

impl Event {
    /// Whether it is one before the Sun's disc, which nobody looks at without a solar filter.
    pub fn is_transit(&self) -> bool {
        self.kind == Kind::Transit
    }
}

impl Value {
    /// The number, in [`Self::unit`].
    pub const fn number(self) -> f64 {
        match self {
            Self::Elongation(angle) | Self::RingOpening(angle) => angle.degrees(),
            Self::SeparationArcsec(angle) => angle.arcsec(),
            Self::LitAreaArcsec2(number) | Self::Magnitude(number) | Self::DistanceAu(number) => {
                number
            }
        }
    }

    /// The name of its unit.
    pub const fn unit(self) -> &'static str {
        match self {
            Self::Elongation(_) | Self::RingOpening(_) => "deg",
            Self::SeparationArcsec(_) => "arcsec",
            Self::LitAreaArcsec2(_) => "arcsec2",
            Self::Magnitude(_) => "mag",
            Self::DistanceAu(_) => "au",
        }
    }
}
