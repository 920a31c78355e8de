//! What binoculars and telescopes do for an eye.

use super::LightError;
use crate::place::Instrument;

/// An instrument, as far as light is concerned.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Optics {
    aperture_mm: f64,
    magnification: f64,
    transmission: f64,
}

/// Part of the light that glass and coatings pass (common practice).
const USUAL_TRANSMISSION: f64 = 0.8;

impl Default for Optics {
    /// 10x50 binoculars: what most sessions have.
    fn default() -> Self {
        Self {
            aperture_mm: 50.0,
            magnification: 10.0,
            transmission: USUAL_TRANSMISSION,
        }
    }
}

/// What the eye behind the instrument faces.
pub(super) struct Through {
    /// Luminance of the sky in the eyepiece, as an eye with its natural pupil would meet it.
    pub luminance: f64,
    /// Light of a point gained, magnitudes.
    pub gain_mag: f64,
    /// How much larger things look, in area.
    pub area_factor: f64,
}

impl Optics {
    /// An instrument of an aperture in mm, a magnification, and the part of the light that it
    /// passes (0 to 1).
    ///
    /// # Errors
    /// An aperture outside 5 to 10000 mm, a magnification outside 1 to 5000, a transmission
    /// outside 0.1 to 1, or a figure that is not finite.
    pub fn new(
        aperture_mm: f64,
        magnification: f64,
        transmission: f64,
    ) -> Result<Self, LightError> {
        Ok(Self {
            aperture_mm: LightError::check("aperture in mm", aperture_mm, 5.0, 10_000.0)?,
            magnification: LightError::check("magnification", magnification, 1.0, 5000.0)?,
            transmission: LightError::check("transmission", transmission, 0.1, 1.0)?,
        })
    }
    /// An instrument of a site's kit with each of its eyepieces, in the order of
    /// [`Instrument::views`].
    ///
    /// # Errors
    /// As [`Optics::new`]: an eyepiece that makes less than 1 times of the instrument.
    pub fn of(instrument: &Instrument) -> Result<Vec<Self>, LightError> {
        let views = instrument.views().into_iter();
        views
            .map(|(magnification, _)| {
                Self::new(instrument.aperture_mm(), magnification, USUAL_TRANSMISSION)
            })
            .collect()
    }
    /// Looking at a sky of a luminance in cd/m².
    ///
    /// The sky is dimmed by the square of exit pupil over eye pupil, a point gains the square of
    /// aperture over eye pupil (Crumey 2014, sect. 3 and eq. 66; Schaefer 1990, PASP 102, 212),
    /// the eye pupil being that of an eye used to the sky outside. Light outside the eye pupil
    /// is lost. In a bright sky the gain of a point comes to 5 log of the magnification.
    pub(super) fn against(&self, luminance: f64) -> Through {
        let eye_pupil_mm = pupil_mm(luminance);
        let exit_mm = (self.aperture_mm / self.magnification).min(eye_pupil_mm);
        let dilution = (exit_mm / eye_pupil_mm).powi(2);
        let grasp = (exit_mm * self.magnification / eye_pupil_mm).powi(2);
        Through {
            luminance: luminance * self.transmission * dilution,
            gain_mag: 2.5 * (self.transmission * grasp).log10(),
            area_factor: self.magnification * self.magnification,
        }
    }
}

/// Diameter of an eye's pupil used to a luminance in cd/m², mm.
///
/// Source: Moon and Spencer 1944 (J. Opt. Soc. Am. 34, 319), from memory.
fn pupil_mm(luminance: f64) -> f64 {
    // In millilamberts.
    let log = (luminance.max(1e-7) * std::f64::consts::PI / 10.0).log10();
    10f64.powf(0.8558 - 4.01e-4 * (log + 8.1).max(0.0).powi(3))
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Common practice: 2 to 3 mm in daylight, 4 at 10 cd/m², 5 to 6 at 0.1, 7 in the dark.
    #[test]
    fn a_pupil_opens_as_the_sky_darkens() {
        for (luminance, least, most) in [
            (1000.0, 2.0, 3.0),
            (10.0, 3.5, 4.5),
            (0.1, 5.0, 6.0),
            (2e-4, 6.5, 7.2),
        ] {
            let pupil = pupil_mm(luminance);
            assert!(
                (least..=most).contains(&pupil),
                "{luminance} cd/m²: {pupil} mm"
            );
        }
    }
}
