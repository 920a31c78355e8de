//! The sky as a picture: the light model's own colours, exposed for a screen.

use super::camera::Camera;
use crate::app::palette::Look;
use crate::app::scene::Scene;
use crate::light::tone::Exposure;
use crate::light::{Glow, GlowRow};
use crate::measure::{Angle, Moment};
use crate::plan::Lamps;
use eframe::egui::{Color32, ColorImage, lerp};
use std::f64::consts::TAU;

/// Columns and rows of the sky's texture; it is stretched smoothly over the view.
const SIZE: [usize; 2] = [224, 84];

/// The light of a scene's sky at a moment, as assumed.
pub fn glow<'a>(scene: &Scene<'a>, moment: Moment) -> Glow<'a> {
    let epoch = scene.span.at(moment);
    Lamps::of(&epoch.seen_by(scene.observer)).glow(&scene.sight.sky)
}

/// A sky made ready for a screen.
pub struct Picture<'a> {
    glow: &'a Glow<'a>,
    look: &'a Look,
    exposure: Exposure,
}

impl<'a> Picture<'a> {
    /// Exposes for the whole sky, wherever the view is turned: what is looked at must not change
    /// how dark it is, and the horizon view and the fade must agree.
    pub fn new(glow: &'a Glow<'a>, look: &'a Look) -> Self {
        Self {
            glow,
            look,
            exposure: Exposure::for_luminance(typical_luminance(glow)),
        }
    }

    /// The colour in one place; below the horizon as at it.
    pub fn colour(&self, altitude: Angle, azimuth: Angle) -> Color32 {
        self.texel(&self.glow.along(altitude.radians()), azimuth)
    }

    /// What a camera sees, to be stretched over its rectangle.
    pub fn image(&self, camera: &Camera) -> ColorImage {
        let [columns, rows] = SIZE;
        let share = |k: usize, count: usize| (k as f64 + 0.5) / count as f64;
        let azimuths: Vec<Angle> = (0..columns)
            .map(|column| {
                let beside_deg = (share(column, columns) - 0.5) * camera.width_deg();
                Angle::from_degrees(camera.middle_deg + beside_deg)
            })
            .collect();
        let mut pixels = Vec::with_capacity(columns * rows);
        for row in 0..rows {
            let altitude_deg = lerp(camera.top_deg()..=camera.bottom_deg, share(row, rows));
            let along = self.glow.along(altitude_deg.to_radians());
            pixels.extend(azimuths.iter().map(|azimuth| self.texel(&along, *azimuth)));
        }
        ColorImage::new(SIZE, pixels)
    }

    fn texel(&self, along: &GlowRow, azimuth: Angle) -> Color32 {
        let [r, g, b] = self.exposure.srgb(along.xyz(azimuth.radians()));
        self.look.texel(Color32::from_rgb(r, g, b))
    }
}

/// The mean luminance over even patches of the sky, cd/m²: the glow of dusk counts for much in it,
/// as it does for the eye.
fn typical_luminance(glow: &Glow<'_>) -> f64 {
    const RINGS: usize = 4;
    const AROUND: usize = 12;
    let mut sum = 0.0;
    for ring in 0..RINGS {
        // Even steps of the sine are even patches of the sphere.
        let altitude = ((ring as f64 + 0.5) / RINGS as f64).asin();
        let along = glow.along(altitude);
        for step in 0..AROUND {
            let azimuth = TAU * step as f64 / AROUND as f64;
            sum += along.luminance(azimuth).total();
        }
    }
    sum / (RINGS * AROUND) as f64
}

#[cfg(test)]
mod tests {
    #![allow(clippy::unwrap_used)]
    use super::{Camera, Picture};
    use crate::app::palette::{Look, Palette, Theme};
    use crate::light::{Conditions, Glow, SkyLight};
    use crate::measure::Angle;
    use crate::place::Extinction;
    use eframe::egui::{Color32, Pos2, Rect, Rgba, vec2};

    const SUN_AZIMUTH_DEG: f64 = 250.0;

    /// Clear lowland air under a dark sky.
    fn air() -> SkyLight {
        let extinction = Extinction {
            rayleigh_mag: 0.10,
            ozone_mag: 0.03,
            aerosol_mag: 0.10,
        };
        SkyLight::new(Conditions::new(extinction, 100.0, 21.0).unwrap())
    }

    fn sunk(air: &SkyLight, sun_deg: f64) -> Glow<'_> {
        air.at(sun_deg.to_radians(), SUN_AZIMUTH_DEG.to_radians(), None)
    }

    fn look(theme: Theme) -> Look {
        Palette::shipped().unwrap().look(theme)
    }

    fn colour(glow: &Glow<'_>, look: &Look, beside_sun_deg: f64, altitude_deg: f64) -> Color32 {
        let azimuth = Angle::from_degrees(SUN_AZIMUTH_DEG + beside_sun_deg);
        Picture::new(glow, look).colour(Angle::from_degrees(altitude_deg), azimuth)
    }

    fn light_of(colour: Color32) -> f32 {
        Rgba::from(colour).intensity()
    }

    #[test]
    fn the_sky_darkens_all_over_as_the_sun_sinks() {
        let (air, look) = (air(), look(Theme::Dark));
        for (beside_deg, altitude_deg) in [(0.0, 5.0), (90.0, 30.0), (180.0, 10.0), (0.0, 90.0)] {
            let mut last = f32::INFINITY;
            // Deeper, the night's own light is all that is left there, and only the eye's state
            // still changes.
            for sun_deg in [3.0, 0.0, -2.0, -4.0, -6.0, -9.0, -12.0] {
                let light = light_of(colour(
                    &sunk(&air, sun_deg),
                    &look,
                    beside_deg,
                    altitude_deg,
                ));
                assert!(light < last, "Sun at {sun_deg}: {light} after {last}");
                last = light;
            }
        }
    }

    #[test]
    fn a_whole_view_darkens_without_a_gap() {
        let (air, look) = (air(), look(Theme::Dark));
        let camera = Camera {
            rect: Rect::from_min_size(Pos2::ZERO, vec2(900.0, 400.0)),
            middle_deg: 240.0,
            bottom_deg: -4.0,
            points_per_deg: 10.0,
        };
        let total = |sun_deg| {
            let glow = sunk(&air, sun_deg);
            let image = Picture::new(&glow, &look).image(&camera);
            assert!(image.pixels.iter().all(|pixel| *pixel != Color32::BLACK));
            image
                .pixels
                .iter()
                .map(|pixel| light_of(*pixel))
                .sum::<f32>()
        };
        let (shallow, deep) = (total(-2.0), total(-6.0));
        assert!(deep < 0.8 * shallow, "{deep} after {shallow}");
    }

    #[test]
    fn dusk_is_reddish_low_over_the_sun_and_blue_at_the_zenith() {
        let (air, look) = (air(), look(Theme::Dark));
        for sun_deg in [-2.0, -4.0, -6.0] {
            let glow = sunk(&air, sun_deg);
            let low = colour(&glow, &look, 0.0, 2.0);
            assert!(low.r() > low.g() && low.g() > low.b(), "{sun_deg}: {low:?}");
            let high = colour(&glow, &look, 0.0, 90.0);
            assert!(
                high.b() > high.g() && high.b() > high.r(),
                "{sun_deg}: {high:?}"
            );
        }
    }

    #[test]
    fn the_earths_shadow_is_darker_than_the_belt_above_it() {
        let (air, look) = (air(), look(Theme::Dark));
        let glow = sunk(&air, -4.0);
        let light = |beside_deg, altitude_deg| {
            light_of(colour(&glow, &look, beside_deg, f64::from(altitude_deg)))
        };
        // The brightest of a stretch of sky, opposite the Sun and over it.
        let belt = |beside_deg| {
            (10..40)
                .map(|deg| light(beside_deg, deg))
                .fold(0.0, f32::max)
        };
        let (shadow, belt_over_it) = (light(180.0, 6), belt(180.0));
        assert!(shadow < 0.8 * belt_over_it, "{shadow} under {belt_over_it}");
        assert!(light(0.0, 4) > belt(0.0), "no shadow over the Sun");
    }

    #[test]
    fn the_red_theme_has_brightness_alone() {
        let air = air();
        let glow = sunk(&air, -4.0);
        let [r, g, b, _] = colour(&glow, &look(Theme::Red), 0.0, 2.0).to_array();
        assert!(r == g && g == b && r > 0);
    }
}
