//! The layer `light` against published values and against itself.

#![allow(clippy::unwrap_used)]

#[path = "../common/mod.rs"]
mod common;

mod arcus;
mod crescent;
mod darkness;
mod daylight;
mod document;
mod input;
mod moon;
mod optics;
mod practice;
mod properties;
mod published;
mod screen;
mod table;
mod threshold;
mod twilight;
