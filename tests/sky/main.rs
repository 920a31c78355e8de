//! The layer `sky` against published values and against JPL DE440.

#![allow(clippy::unwrap_used)]

#[path = "../common/mod.rs"]
mod common;

mod ephemeris;
mod frames;
mod handbook;
mod magnitudes;
mod places;
mod refraction;
mod stars;
mod views;
