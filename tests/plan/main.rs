//! The night's plan against reference tables and against what must hold by itself.

// The figures measured are there for whoever runs with --nocapture.
#![allow(clippy::print_stdout)]

mod appulses;
mod behind;
mod daylight;
mod edges;
mod phenomena;
mod reference;
mod rise_set;
mod standing;
mod transits;
mod windows;
