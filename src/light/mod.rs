//! Whether an eye sees a body in that sky.
//!
//! A site's [`Conditions`] (its extinction and how dark its nights are) make a [`SkyLight`],
//! once per site. [`SkyLight::at`] fixes an instant by the places of Sun and Moon and gives a
//! [`Glow`], once per instant. That answers for every body ([`Target`]) and eye ([`Gaze`], one
//! of [`Eyes`]) with a [`Margin`] in magnitudes and its parts; and for a painter with the sky's
//! colour, which [`tone`] turns into a screen's.
//!
//! Angles are radians here, altitudes refracted but for the Sun's, azimuths from north through
//! east.
//!
//! | part | source |
//! | --- | --- |
//! | [`extinction_mag`] | Schaefer 1998 |
//! | [`twilight`], day and dusk | computed: [`scattering`] |
//! | [`Moonlight`] | Krisciunas and Schaefer 1991 |
//! | [`threshold`] | Crumey 2014 |
//! | [`Optics`] | Crumey 2014, Schaefer 1990 |

mod conditions;
mod error;
mod extinction;
mod eye;
mod glow;
mod margin;
mod moonlight;
mod optics;
pub mod scattering;
mod spread;
mod standing;
pub mod threshold;
pub mod tone;
pub mod twilight;

pub use conditions::{Conditions, luminance_from_mag_arcsec2, mag_arcsec2_from_luminance};
pub use error::LightError;
pub use extinction::extinction_mag;
pub use eye::{Eyes, Gaze};
pub use glow::{Glow, GlowRow, Luminance, SkyLight};
pub use margin::{Cost, Margin, Target};
pub use moonlight::Moonlight;
pub use optics::Optics;
pub use spread::Spread;
pub use standing::{Eye, Standing};
