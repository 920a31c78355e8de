//! What can happen, and what is told of it.

use super::Circumstances;
use crate::measure::{Angle, Moment};
use crate::sky::Body;
use crate::sky::stars::Star;

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
    /// Two bodies, or a planet and a star, at their least separation; with the Moon as the lookout
    /// sees it.
    Appulse,
    /// The Moon passes over a planet as the lookout sees it; the instant is that of the least
    /// separation.
    LunarOccultation,
}

/// What a body is seen with.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Target {
    /// A body.
    Body(Body),
    /// A star of the catalogue.
    Star(&'static Star),
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
    /// The same, told in arcminutes.
    SeparationArcmin(Angle),
}

/// One of the moments of a transit or a lunar occultation.
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
    /// The planet's disc and the Moon's touch, before the occultation.
    FirstTouch,
    /// The planet's centre passes behind the Moon's mean limb.
    Disappearance,
    /// It comes out again.
    Reappearance,
    /// The discs touch, after the occultation.
    LastTouch,
}

/// A moment of a transit or a lunar occultation as seen from one place.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Contact {
    /// Which.
    pub name: ContactName,
    /// When.
    pub moment: Moment,
    /// Apparent angle between the centres.
    pub separation: Angle,
    /// Position angle of the planet's centre from the Sun's or the Moon's, from north of date through east,
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
    pub other: Option<Target>,
    /// When.
    pub moment: Moment,
    /// The quantity that the kind is about.
    pub value: Value,
    /// Where two take part: the position angle from north of date through east, [0°, 360°), of the
    /// body seen from the other.
    pub position_angle: Option<Angle>,
    /// The body's apparent angle from the Sun's centre, where the value does not tell it.
    pub elongation: Option<Angle>,
    /// A transit's moments as seen from the Earth's centre, in order of time: those that occur.
    pub contacts: Vec<Contact>,
    /// Where the body stands at the moment as seen from the lookout that was given.
    pub local: Option<Circumstances>,
    /// A transit's or an occultation's moments as seen from there, in order of time. Where the
    /// planet misses the Sun's disc only the least separation is among them; where its own disc
    /// is not wholly hidden by the Moon its centre may only touch the limb, or stay outside.
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
            Self::FirstTouch => "first_touch",
            Self::Disappearance => "disappearance",
            Self::Reappearance => "reappearance",
            Self::LastTouch => "last_touch",
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
            Self::Appulse => "appulse",
            Self::LunarOccultation => "lunar_occultation",
        }
    }
}

impl Target {
    /// The lower-case name used in files and on the command line.
    pub fn name(self) -> String {
        match self {
            Self::Body(body) => body.name().to_owned(),
            Self::Star(star) => star.to_string().to_lowercase(),
        }
    }
}

impl Event {
    /// An event of one body, with nothing else told yet.
    pub(super) fn new(kind: Kind, body: Body, moment: Moment, value: Value) -> Self {
        Self {
            kind,
            body,
            other: None,
            moment,
            value,
            position_angle: None,
            elongation: None,
            contacts: Vec::new(),
            local: None,
            local_contacts: Vec::new(),
        }
    }

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
            Self::SeparationArcmin(angle) => angle.arcsec() / 60.0,
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
            Self::SeparationArcmin(_) => "arcmin",
            Self::LitAreaArcsec2(_) => "arcsec2",
            Self::Magnitude(_) => "mag",
            Self::DistanceAu(_) => "au",
        }
    }
}
