//! Ephemerides, frames, apparent places, refraction, phase, magnitude and stars.
//!
//! The way from theory to the sky: [`Ephemeris`] evaluates the series and keeps them as
//! Chebyshev spans; [`Ephemeris::cover`] hands out a [`Span`] of shared, immutable pieces;
//! [`Span::at`] fixes an instant and gives an [`Epoch`] with the Earth's place, its
//! orientation and sidereal time; from there [`Epoch::geocentric`] and [`Epoch::appearance`]
//! for the centre of the Earth, and [`Epoch::seen_by`] for an observer.

mod body;
pub mod ephemeris;
mod epoch;
pub mod frame;
pub mod magnitude;
mod observer;
mod orbit;
mod phase;
pub mod refraction;
pub mod stars;
mod vantage;
mod view;

pub use body::{Body, UnknownBody};
pub use ephemeris::{Ephemeris, OutsideEphemeris, Span};
pub use epoch::{Apparent, Epoch};
pub use observer::{Air, Observer};
pub use phase::{Appearance, position_angle};
pub use view::{Horizontal, Refracted, View};

/// One astronomical unit, km (IAU 2012 Resolution B2).
const AU_KM: f64 = 149_597_870.7;
