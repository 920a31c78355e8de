//! Whose eye, and what it looks through.

use super::threshold::{extended_lx, magnitude_from_lux, point_lx};
use super::{Eye, LightError, Optics};

/// What each eye needs: the factor of the light that Crumey's laboratory observers needed
/// (Crumey 2014's F), place known.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Eyes {
    passer_by: f64,
    visitor: f64,
    keen: f64,
    optics: f64,
    instrument: Optics,
}

impl Default for Eyes {
    /// Keen 1.4 and visitor 2.4, the ends of what Crumey 2014 finds for real observers; 2.4 also
    /// reproduces Tousey and Koomen 1953 to 0.13 mag. A passer-by needs 1.5 mag more light than
    /// a visitor (common practice; 1 to 2 mag after Tousey and Hulburt 1948, from memory). Behind
    /// the eyepiece stands a visitor.
    fn default() -> Self {
        Self {
            passer_by: 2.4 * 3.981_071_7,
            visitor: 2.4,
            keen: 1.4,
            optics: 2.4,
            instrument: Optics::default(),
        }
    }
}

impl Eyes {
    /// The same with one eye's factor changed.
    ///
    /// # Errors
    /// A factor outside 0.5 to 50, or not finite.
    pub fn with_factor(mut self, eye: Eye, factor: f64) -> Result<Self, LightError> {
        *self.factor_mut(eye) = LightError::check("factor of an eye", factor, 0.5, 50.0)?;
        Ok(self)
    }
    /// The same with another instrument.
    #[must_use]
    pub fn with_instrument(mut self, instrument: Optics) -> Self {
        self.instrument = instrument;
        self
    }
    fn factor_mut(&mut self, eye: Eye) -> &mut f64 {
        match eye {
            Eye::PasserBy => &mut self.passer_by,
            Eye::Visitor => &mut self.visitor,
            Eye::Keen => &mut self.keen,
            Eye::Optics => &mut self.optics,
        }
    }
    /// One of them.
    pub fn gaze(&self, eye: Eye) -> Gaze {
        let factor = *self.clone().factor_mut(eye);
        Gaze {
            factor_mag: 2.5 * factor.log10(),
            optics: (eye == Eye::Optics).then_some(self.instrument),
        }
    }
}

/// One eye, ready to look.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Gaze {
    factor_mag: f64,
    optics: Option<Optics>,
}

impl Gaze {
    /// The same eye sharper by so many magnitudes (duller if negative).
    #[must_use]
    pub fn sharper_by(mut self, mag: f64) -> Self {
        self.factor_mag -= mag;
        self
    }
    /// The faintest magnitude, as it reaches the observer, that this eye sees against a sky of a
    /// luminance in cd/m²: a point, or something that covers `area_arcmin2` evenly.
    pub fn limit(&self, luminance: f64, area_arcmin2: f64) -> f64 {
        let (luminance, area, gain_mag) = match &self.optics {
            None => (luminance, area_arcmin2, 0.0),
            Some(optics) => {
                let through = optics.against(luminance);
                (
                    through.luminance,
                    area_arcmin2 * through.area_factor,
                    through.gain_mag,
                )
            }
        };
        let threshold = if area > 0.0 {
            extended_lx(luminance, area)
        } else {
            point_lx(luminance)
        };
        magnitude_from_lux(threshold) - self.factor_mag + gain_mag
    }
}
