//! The built program on its command line.

#[path = "../common/mod.rs"]
mod common;

mod daylight;
mod night;
mod no_display;
mod phenomena;
mod places;
mod positions;
mod program;
mod refusals;
mod skyline;
mod table;
mod terrain;
