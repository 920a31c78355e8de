//! The horizon view.
mod camera;
mod labels;
pub mod sky;
