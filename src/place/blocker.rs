//! What can block the view.

use std::sync::Arc;

/// What blocks the view at some point of the sky.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum Blocker {
    /// An obstacle, by what people call it.
    Obstacle(Arc<str>),
    /// A measured skyline.
    Measured,
    /// Terrain out of an elevation tile.
    Terrain,
    /// The level horizon.
    Horizon,
}

impl Blocker {
    /// What people call it, where it is an obstacle.
    pub fn label(&self) -> Option<&str> {
        match self {
            Self::Obstacle(label) => Some(label),
            Self::Measured | Self::Terrain | Self::Horizon => None,
        }
    }
}

/// The same within a skyline, whose table of names an obstacle's number refers to.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Source {
    Horizon,
    Measured,
    Terrain,
    Obstacle(u32),
}
