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
    /// The Moon itself, or what it covers: its own glow in the sky does not count.
    #[must_use]
    pub fn without_moonlight(mut self) -> Self {
        self.is_moonlit = false;
        self
    }
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
