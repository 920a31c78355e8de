//! Whose eye, and what a body is for it.

use crate::measure::Angle;
use serde::{Deserialize, Serialize};

/// Whose eye.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
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

impl Standing {
    /// What a body is at one instant: `altitude` is refracted, `clearance` is it above the
    /// skyline, `margin_mag` is what it outshines the eye's threshold by.
    pub fn of(altitude: Angle, clearance: Angle, margin_mag: f64) -> Self {
        if altitude < Angle::ZERO {
            Self::Down
        } else if clearance <= Angle::ZERO {
            Self::Blocked
        } else if margin_mag >= 0.0 {
            Self::Plain
        } else {
            Self::WashedOut
        }
    }
}
