//! The rulers of altitude and azimuth.

use super::camera::Camera;
use crate::app::lookout::says::Says;
use crate::app::palette::Look;
use crate::measure::Angle;
use eframe::egui::{Color32, FontId, Galley, Painter};
use std::sync::Arc;

/// A mark on a ruler.
pub struct RulerMark {
    /// Where along the ruler.
    pub at: f32,
    /// A compass point, or a degree.
    pub is_named: bool,
    /// Its text.
    pub text: Arc<Galley>,
}

/// What the rulers are made from.
pub struct Rulers<'a> {
    /// What is said beside the marks.
    pub says: Says<'a>,
    /// Fonts and colours.
    pub look: Look,
    /// Measures text.
    pub painter: &'a Painter,
    /// The part of the sky that is shown.
    pub camera: Camera,
}

impl Rulers<'_> {
    /// Every ten degrees of altitude, in fists and in degrees.
    pub fn altitudes(&self) -> Vec<RulerMark> {
        let camera = &self.camera;
        let lowest = (camera.bottom_deg / 10.0).ceil().max(1.0) as i32;
        let highest = (camera.top_deg().min(90.0) / 10.0).floor() as i32;
        (lowest..=highest)
            .map(|fists| RulerMark {
                at: camera.pos_beside(0.0, 10.0 * f64::from(fists)).y,
                is_named: true,
                text: self.galley(
                    self.says.text(
                        "horizon-fists",
                        &[
                            (
                                "fists",
                                &self
                                    .says
                                    .fists(Angle::from_degrees(10.0 * f64::from(fists))),
                            ),
                            ("degrees", &self.says.degrees(10 * fists)),
                        ],
                    ),
                    self.look.font(self.look.sizes.label),
                    self.look.colours.sky_text,
                ),
            })
            .filter(|mark| {
                let half = 0.5 * mark.text.size().y;
                mark.at - half > camera.rect.top() && mark.at + half < camera.rect.bottom()
            })
            .collect()
    }

    /// Degrees every ten, and the eight compass points by name instead; thinned out where they
    /// would touch.
    pub fn azimuths(&self) -> Vec<RulerMark> {
        let camera = &self.camera;
        let half_deg = (0.5 * camera.width_deg()).min(180.0);
        let from = ((camera.middle_deg - half_deg) / 5.0).ceil() as i64;
        let to = ((camera.middle_deg + half_deg) / 5.0).floor() as i64;
        let mut marks: Vec<RulerMark> = Vec::new();
        let mut put = |fives: i64, is_named: bool| {
            let azimuth_deg = (5 * fives).rem_euclid(360);
            let (text, font, colour) = if is_named {
                let point = (azimuth_deg / 45) as usize;
                let font = self.look.bold(self.look.sizes.label);
                (self.says.compass(point), font, self.look.colours.text)
            } else {
                let font = self.look.font(self.look.sizes.label);
                (
                    self.says.degrees(azimuth_deg as i32),
                    font,
                    self.look.colours.lesser,
                )
            };
            let beside_deg = 5.0 * fives as f64 - camera.middle_deg;
            let at = camera.pos_beside(beside_deg, 0.0).x;
            let text = self.galley(text, font, colour);
            let half = 0.5 * text.size().x + 6.0;
            let is_free = at - half > camera.rect.left()
                && at + half < camera.rect.right()
                && marks
                    .iter()
                    .all(|mark| (mark.at - at).abs() > half + 0.5 * mark.text.size().x + 6.0);
            if is_free {
                marks.push(RulerMark { at, is_named, text });
            }
        };
        (from..=to)
            .filter(|fives| fives % 18 == 0)
            .for_each(|fives| put(fives, true));
        (from..=to)
            .filter(|fives| fives % 9 == 0)
            .for_each(|fives| put(fives, true));
        (from..=to)
            .filter(|fives| fives % 2 == 0 && fives % 18 != 0)
            .for_each(|fives| put(fives, false));
        marks
    }

    fn galley(&self, text: String, font: FontId, colour: Color32) -> Arc<Galley> {
        self.painter.layout_no_wrap(text, font, colour)
    }
}
