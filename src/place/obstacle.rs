//! Trees, buildings and walls in metres.

/// Something that blocks the view.
#[derive(Clone, Debug, PartialEq)]
pub enum Obstacle {}
