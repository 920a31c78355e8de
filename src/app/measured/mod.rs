//! The measured skyline in the hand: its points are dragged, added and taken away wherever a
//! skyline is drawn.

mod edit;
mod handles;

pub use edit::{Owned, elsewhere};
pub use handles::{Handles, Place};
