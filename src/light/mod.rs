//! Whether an eye sees a body in that sky.
//!
//! The present rule is one stated Sun altitude per body ([`rule`]); everything else asks
//! [`standing`] and never the rule itself, so that a light model can take its place.

mod error;
mod extinction;
mod rule;
pub mod scattering;
pub mod twilight;

pub use error::LightError;
pub use extinction::{Extinction, Haze};
pub use rule::{Eye, Standing, standing, sun_altitude_limit};
