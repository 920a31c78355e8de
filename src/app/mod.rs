//! The desktop window.

pub mod command;
pub mod lookout;
pub mod palette;
pub mod scene;
