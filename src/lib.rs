//! Dimmet plans and runs public observing sessions of the bright planets at dusk and dawn.
//!
//! The modules stand in layers; each uses only those above it in this list, and
//! `.ci/layers` checks that. Nothing outside [`app`] names the window library, and nothing
//! in the library reads a clock, the locale or the environment: those are arguments.
//!
//! | layer | holds |
//! | --- | --- |
//! | [`measure`] | angles, vectors, time scales, civil time, searches (knows no astronomy) |
//! | [`sky`] | ephemerides, frames, apparent places, refraction, phase, magnitude, stars |
//! | [`place`] | site file, skyline, spots and obstacles, time zone |
//! | [`light`] | whether an eye sees a body in that sky |
//! | [`plan`] | a night: risings, settings, skyline moments, windows, optics times |
//! | [`words`] | wording, numbers and times for people |
//! | [`cli`] | the subcommands |
//! | [`app`] | the desktop window (feature `desktop`) |

pub mod light;
pub mod measure;
pub mod place;
pub mod plan;
pub mod sky;
pub mod words;

pub mod cli;

#[cfg(feature = "desktop")]
pub mod app;
