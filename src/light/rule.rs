//! The stated-Sun-altitude rule.

use crate::measure::Angle;
use crate::sky::Body;

/// Whose eye.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Eye {
    /// Untrained, nobody points.
    PasserBy,
    /// Untrained, pointed to the place.
    Visitor,
    /// Practised, knows exactly where.
    Keen,
    /// Behind an instrument from the site's kit.
    Optics,
}

impl Eye {
    /// All of them, from the least demanding of light to the most helped.
    pub const ALL: [Self; 4] = [Self::PasserBy, Self::Visitor, Self::Keen, Self::Optics];

    /// The name used in files and on the command line.
    pub const fn name(self) -> &'static str {
        match self {
            Self::PasserBy => "passer-by",
            Self::Visitor => "visitor",
            Self::Keen => "keen",
            Self::Optics => "optics",
        }
    }
}

/// What a body is, at one instant, for one eye.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Standing {
    /// Seen.
    Plain,
    /// The sky is too bright.
    WashedOut,
    /// Behind the skyline.
    Blocked,
    /// Below the horizon.
    Down,
}

/// The Sun's airless altitude below which a visitor sees the body against the sky.
///
/// Source: common practice, in the order that the published limiting magnitudes of twilight
/// give (Koomen et al. 1952 with Tousey and Koomen 1953): Venus and Jupiter about sunset, first
/// magnitude at the end of civil twilight. `None`: not a body for the unaided eye.
pub fn sun_altitude_limit(body: Body) -> Option<Angle> {
    let degrees = match body {
        Body::Sun | Body::Uranus | Body::Neptune => return None,
        Body::Moon => 0.0,
        Body::Venus => -1.0,
        Body::Jupiter => -3.0,
        Body::Mercury | Body::Mars => -6.0,
        Body::Saturn => -6.5,
    };
    Some(Angle::from_degrees(degrees))
}

/// What a body is at one instant. `altitude` is refracted; `clearance` is it above the skyline.
pub fn standing(
    _eye: Eye,
    body: Body,
    altitude: Angle,
    clearance: Angle,
    sun_altitude: Angle,
) -> Standing {
    if altitude < Angle::ZERO {
        Standing::Down
    } else if clearance <= Angle::ZERO {
        Standing::Blocked
    } else if sun_altitude_limit(body).is_some_and(|limit| sun_altitude < limit) {
        Standing::Plain
    } else {
        Standing::WashedOut
    }
}
