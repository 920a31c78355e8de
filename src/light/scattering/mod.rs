//! Sunlight scattered in a spherical atmosphere, in absolute units.
//!
//! What [`super::twilight`]'s table is made from; commands and frames never come here.
//!
//! The first scattering is computed along each path; later ones as an isotropic field
//! ([`Field`]). Nothing is fitted to measured skies: `tests/light` compares.

mod atmosphere;
mod field;
mod path;
pub mod phase;
pub mod spectrum;

pub use atmosphere::{Atmosphere, Ingredients};
pub use field::Field;
