//! The sky's colour: a gradient from the horizon up, warm on the Sun's side, darkening as the
//! Sun sinks.

use super::camera::Camera;
use crate::app::palette::{Look, Palette, SkyAt};
use crate::measure::Angle;
use eframe::egui::{Color32, ColorImage, Rgba, lerp};

/// Columns and rows of the sky's texture; it is stretched smoothly over the view.
const SIZE: [usize; 2] = [256, 96];

/// How fast the horizon's colour gives way to the middle one, degrees of altitude; and where the
/// high one is reached.
const LOW_DEG: f32 = 8.0;
const HIGH_DEG: f32 = 56.0;

/// How the colour runs with altitude, on the Sun's side and away from it.
struct Gradient {
    low: Rgba,
    low_away: Rgba,
    middle: Rgba,
    middle_away: Rgba,
    high: Rgba,
}

impl Gradient {
    fn new(sky: &SkyAt) -> Self {
        let (low, middle, high) = (
            Rgba::from(sky.low),
            Rgba::from(sky.middle),
            Rgba::from(sky.high),
        );
        Self {
            low,
            low_away: mix(middle, high, 0.1),
            middle,
            middle_away: mix(middle, high, 0.4),
            high,
        }
    }

    /// `sunward` is 1 above the Sun and 0 on the opposite side.
    fn colour(&self, altitude_deg: f32, sunward: f32) -> Rgba {
        let low = mix(self.low_away, self.low, sunward);
        let middle = mix(self.middle_away, self.middle, sunward);
        let altitude_deg = altitude_deg.max(0.0);
        let share = (altitude_deg / HIGH_DEG).min(1.0);
        let above = mix(middle, self.high, share * share * (3.0 - 2.0 * share));
        mix(above, low, (-altitude_deg / LOW_DEG).exp())
    }
}

fn mix(a: Rgba, b: Rgba, share: f32) -> Rgba {
    a * (1.0 - share) + b * share
}

/// How much of the Sun's side an azimuth has, 1 to 0.
fn sunward(azimuth: Angle, sun_azimuth: Angle) -> f32 {
    let from_sun = (azimuth - sun_azimuth).cos() as f32;
    // Half at a right angle would light the whole sky; the square keeps it to the Sun's side.
    (0.5 + 0.5 * from_sun).powi(2)
}

/// The sky's colour in one place.
pub fn colour(
    palette: &Palette,
    sun: (Angle, Angle),
    azimuth: Angle,
    altitude_deg: f32,
) -> Color32 {
    let (sun_altitude, sun_azimuth) = sun;
    let gradient = Gradient::new(&palette.sky(sun_altitude.degrees() as f32));
    gradient
        .colour(altitude_deg, sunward(azimuth, sun_azimuth))
        .into()
}

/// The sky that a camera sees, as a picture to be stretched over its rectangle.
pub fn image(palette: &Palette, look: &Look, camera: &Camera, sun: (Angle, Angle)) -> ColorImage {
    let (sun_altitude, sun_azimuth) = sun;
    let gradient = Gradient::new(&palette.sky(sun_altitude.degrees() as f32));
    let [columns, rows] = SIZE;
    let share = |k: usize, count: usize| (k as f64 + 0.5) / count as f64;
    let sunwards: Vec<f32> = (0..columns)
        .map(|column| {
            let beside_deg = (share(column, columns) - 0.5) * camera.width_deg();
            sunward(
                Angle::from_degrees(camera.middle_deg + beside_deg),
                sun_azimuth,
            )
        })
        .collect();
    let mut pixels = Vec::with_capacity(columns * rows);
    for row in 0..rows {
        let altitude_deg = lerp(camera.top_deg()..=camera.bottom_deg, share(row, rows)) as f32;
        // Along a row the colour runs straight from the one side's to the other's; blended as
        // the screen counts, so that only the ends need converting.
        let towards: Color32 = gradient.colour(altitude_deg, 1.0).into();
        let away: Color32 = gradient.colour(altitude_deg, 0.0).into();
        let (towards, away) = (look.texel(towards), look.texel(away));
        let blend = |share: f32, channel: usize| {
            let (from, to) = (f32::from(away[channel]), f32::from(towards[channel]));
            // Half a step, so that the cast rounds.
            (from + (to - from) * share + 0.5) as u8
        };
        pixels.extend(
            sunwards.iter().map(|share| {
                Color32::from_rgb(blend(*share, 0), blend(*share, 1), blend(*share, 2))
            }),
        );
    }
    ColorImage::new(SIZE, pixels)
}

/// The faintest star that shows, V, by the Sun's airless altitude: first magnitude stars at the
/// end of civil twilight, all of the list when it is dark. Common practice, rounded.
pub fn faintest_star(sun_altitude: Angle) -> f64 {
    const STEPS: [(f64, f64); 6] = [
        (-2.0, -2.0),
        (-4.0, -0.5),
        (-6.0, 1.0),
        (-9.0, 2.6),
        (-12.0, 3.8),
        (-16.0, 4.8),
    ];
    let sun_deg = sun_altitude.degrees();
    let after = STEPS.partition_point(|(step_deg, _)| *step_deg >= sun_deg);
    match (
        after.checked_sub(1).and_then(|k| STEPS.get(k)),
        STEPS.get(after),
    ) {
        (Some((high_deg, a)), Some((low_deg, b))) => {
            a + (b - a) * (sun_deg - high_deg) / (low_deg - high_deg)
        }
        (Some((_, only)), None) | (None, Some((_, only))) => *only,
        (None, None) => f64::NEG_INFINITY,
    }
}

#[cfg(test)]
mod tests {
    #![allow(clippy::unwrap_used)]
    use super::{colour, faintest_star};
    use crate::app::palette::Palette;
    use crate::measure::Angle;

    fn light_of(sun_deg: f64, azimuth_deg: f64, altitude_deg: f32) -> f32 {
        let sun = (Angle::from_degrees(sun_deg), Angle::from_degrees(250.0));
        let palette = Palette::shipped().unwrap();
        let colour = colour(
            &palette,
            sun,
            Angle::from_degrees(azimuth_deg),
            altitude_deg,
        );
        eframe::egui::Rgba::from(colour).intensity()
    }

    #[test]
    fn the_sky_darkens_as_the_sun_sinks() {
        let mut last = f32::INFINITY;
        for sun_deg in [3.0, 0.0, -3.0, -6.0, -9.0, -12.0, -17.0] {
            let light = light_of(sun_deg, 250.0, 5.0);
            assert!(light < last, "Sun at {sun_deg}: {light} after {last}");
            last = light;
        }
    }

    #[test]
    fn twilight_is_brighter_on_the_suns_side() {
        assert!(light_of(-8.0, 250.0, 3.0) > 1.5 * light_of(-8.0, 70.0, 3.0));
    }

    #[test]
    fn stars_come_out_as_the_sun_sinks() {
        assert!(faintest_star(Angle::from_degrees(5.0)) < -1.5);
        assert!((faintest_star(Angle::from_degrees(-6.0)) - 1.0).abs() < 1e-12);
        assert!((faintest_star(Angle::from_degrees(-7.5)) - 1.8).abs() < 1e-9);
        assert!(faintest_star(Angle::from_degrees(-30.0)) > 4.5);
    }
}
