//! By how much an eye sees a body or misses it, and what that is made of.

use super::{Gaze, Luminance};

/// Something to be seen.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Target {
    /// V, outside the atmosphere.
    pub magnitude: f64,
    /// Lit area as seen by the unaided eye, square arcminutes; 0 for a star.
    pub area_arcmin2: f64,
    /// Refracted altitude, radians.
    pub altitude: f64,
    /// Azimuth, radians.
    pub azimuth: f64,
    /// Whether the sky before it is lit by the Moon: not where it is the Moon, or covered by it.
    pub is_moonlit: bool,
}

impl Target {
    /// A point, in moonlight where there is any.
    pub fn point(magnitude: f64, altitude: f64, azimuth: f64) -> Self {
        Self {
            magnitude,
            area_arcmin2: 0.0,
            altitude,
            azimuth,
            is_moonlit: true,
        }
    }
    /// A disc lit in part: its apparent diameter in arcseconds, and the part of it that is lit.
    #[must_use]
    pub fn with_disc(mut self, diameter_arcsec: f64, illuminated_fraction: f64) -> Self {
        let radius_arcmin = diameter_arcsec / 120.0;
        let disc = std::f64::consts::PI * radius_arcmin * radius_arcmin;
        self.area_arcmin2 = disc * illuminated_fraction.clamp(0.0, 1.0);
        self
    }
    /// The Moon, as a disc lit in part: V as the sky layer gives it, phase angle in degrees,
    /// apparent diameter in arcseconds.
    ///
    /// V of Krisciunas and Schaefer 1991 is too bright beyond 150 deg of phase angle. There it is
    /// made to fall as a dark, evenly scattering sphere does (Lommel and Seeliger's law; the
    /// shadows of mountains on the thinnest crescents, from Danjon's 7 deg down, are left out).
    pub fn moon(
        magnitude: f64,
        phase_angle_deg: f64,
        diameter_arcsec: f64,
        altitude: f64,
        azimuth: f64,
    ) -> Self {
        let lit = (1.0 + phase_angle_deg.to_radians().cos()) / 2.0;
        Self::point(
            magnitude + thin_crescent_mag(phase_angle_deg),
            altitude,
            azimuth,
        )
        .with_disc(diameter_arcsec, lit)
        .without_moonlight()
    }
    /// The Moon itself, or what it covers: its own glow in the sky does not count.
    #[must_use]
    pub fn without_moonlight(mut self) -> Self {
        self.is_moonlit = false;
        self
    }
}

/// Magnitudes by which the Moon is fainter than the formula for V, from 150 deg of phase angle
/// on.
fn thin_crescent_mag(phase_angle_deg: f64) -> f64 {
    const THIN_DEG: f64 = 150.0;
    let a = phase_angle_deg.min(179.0);
    if a.is_nan() || a <= THIN_DEG {
        return 0.0;
    }
    // Lommel and Seeliger: 1 + sin(a/2) tan(a/2) ln tan(a/4).
    let sphere = |degrees: f64| {
        let half = (degrees / 2.0).to_radians();
        1.0 + half.sin() * half.tan() * (half / 2.0).tan().ln()
    };
    let formula = |degrees: f64| 0.026 * degrees + 4e-9 * degrees.powi(4);
    let by_sphere = -2.5 * (sphere(a) / sphere(THIN_DEG)).log10();
    (by_sphere - (formula(a) - formula(THIN_DEG))).max(0.0)
}

/// By how much a body outshines an eye's threshold, and the parts of it.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Margin {
    /// The body's magnitude outside the atmosphere.
    pub magnitude: f64,
    /// What the air takes, magnitudes.
    pub extinction_mag: f64,
    /// Luminance of the sky behind it.
    pub luminance: Luminance,
    /// The faintest magnitude, after extinction, that the eye sees there.
    pub limit_mag: f64,
    /// `limit_mag` less the magnitude after extinction: seen at 0 and above.
    pub margin_mag: f64,
}

impl Margin {
    pub(super) fn new(
        target: &Target,
        extinction_mag: f64,
        luminance: Luminance,
        gaze: &Gaze,
    ) -> Self {
        let limit_mag = gaze.limit(luminance.total(), target.area_arcmin2);
        Self {
            magnitude: target.magnitude,
            extinction_mag,
            luminance,
            limit_mag,
            margin_mag: limit_mag - target.magnitude - extinction_mag,
        }
    }
    /// The same target and sky for another eye.
    #[must_use]
    pub fn for_gaze(&self, target: &Target, gaze: &Gaze) -> Self {
        Self::new(target, self.extinction_mag, self.luminance, gaze)
    }
    /// What costs more at `self` (the end of a window) than at `inside`, a moment within it.
    /// `None`: nothing does, the body is no worse off.
    pub fn cost_against(&self, inside: &Self) -> Option<Cost> {
        let by_sky = inside.limit_mag - self.limit_mag;
        let rise = |part: fn(&Luminance) -> f64| part(&self.luminance) - part(&inside.luminance);
        let sky = if rise(|light| light.moon) > rise(|light| light.sun) {
            Cost::Moonlight
        } else {
            Cost::Twilight
        };
        [
            (Cost::Haze, self.extinction_mag - inside.extinction_mag),
            (sky, by_sky),
            (Cost::Fading, self.magnitude - inside.magnitude),
        ]
        .into_iter()
        .filter(|(_, cost)| *cost > 0.0)
        .max_by(|a, b| a.1.total_cmp(&b.1))
        .map(|(cost, _)| cost)
    }
}

/// What ends a window, where neither skyline nor horizon does.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Cost {
    /// The Sun's light in the sky.
    Twilight,
    /// The Moon's.
    Moonlight,
    /// The air in front of the body.
    Haze,
    /// The body itself grows fainter.
    Fading,
}
