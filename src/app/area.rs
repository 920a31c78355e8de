//! The work areas that the window shows.

use serde::{Deserialize, Serialize};

/// A work area.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
#[serde(rename_all = "lowercase")]
pub enum Area {
    /// One half-night at one spot.
    #[default]
    Lookout,
    /// The plan of the site and its skylines.
    Grounds,
}

impl Area {
    /// All of them, in the order of their tabs.
    pub const ALL: [Self; 2] = [Self::Lookout, Self::Grounds];
}
