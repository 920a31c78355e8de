//! Which part of the horizon the strip shows, and where a place in it falls.
//!
//! Azimuth and altitude have scales of their own: all round, the strip is far wider than high.

use crate::app::measured::Place;
use crate::measure::Angle;
use eframe::egui::{Pos2, Rect, lerp, pos2, remap};

/// The narrowest stretch that can be shown, degrees.
const NARROWEST_DEG: f64 = 12.0;
/// Degrees below the horizon that are shown as ground.
const GROUND_DEG: f64 = 1.5;

/// The stretch of azimuth that the user has chosen.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct View {
    /// Azimuth in the middle, degrees.
    pub middle_deg: f64,
    /// From edge to edge, degrees, at most 360.
    pub width_deg: f64,
}

impl Default for View {
    /// All round, with south in the middle.
    fn default() -> Self {
        Self {
            middle_deg: 180.0,
            width_deg: 360.0,
        }
    }
}

impl View {
    /// A stretch with room on either side.
    pub fn around(from_deg: f64, to_deg: f64) -> Self {
        const BESIDE_DEG: f64 = 8.0;
        Self {
            middle_deg: 0.5 * (from_deg + to_deg),
            width_deg: to_deg - from_deg + 2.0 * BESIDE_DEG,
        }
        .within_limits()
    }

    /// Turned to the right and widened; the azimuth `about_deg` beside the middle stays where it
    /// is.
    pub fn steered(self, turn_deg: f64, widening: f64, about_deg: f64) -> Self {
        let width_deg = (self.width_deg * widening).clamp(NARROWEST_DEG, 360.0);
        let kept = width_deg / self.width_deg;
        Self {
            middle_deg: self.middle_deg + turn_deg + about_deg * (1.0 - kept),
            width_deg,
        }
        .within_limits()
    }

    fn within_limits(self) -> Self {
        Self {
            middle_deg: self.middle_deg.rem_euclid(360.0),
            width_deg: self.width_deg.clamp(NARROWEST_DEG, 360.0),
        }
    }
}

/// The part of the sky that a rectangle of the screen shows.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Frame {
    /// Where on the screen.
    pub rect: Rect,
    /// Which azimuths.
    pub view: View,
    /// Altitude at the upper edge, degrees.
    pub top_deg: f64,
}

impl Frame {
    /// The upper edge, degrees, for what reaches `highest_deg`.
    pub fn top_for(highest_deg: f64) -> f64 {
        const ABOVE_DEG: f64 = 5.0;
        (highest_deg + ABOVE_DEG).clamp(25.0, 92.0)
    }

    /// Altitude at the lower edge, degrees.
    pub const fn bottom_deg(&self) -> f64 {
        -GROUND_DEG
    }

    /// Half the width, degrees.
    pub fn half_deg(&self) -> f64 {
        0.5 * self.view.width_deg
    }

    /// Points to a degree of azimuth.
    pub fn points_per_deg(&self) -> f64 {
        f64::from(self.rect.width()) / self.view.width_deg
    }

    /// Signed azimuth from the middle, degrees, in [-180, 180).
    pub fn beside_deg(&self, azimuth: Angle) -> f64 {
        (azimuth - Angle::from_degrees(self.view.middle_deg))
            .signed()
            .degrees()
    }

    /// Where a place falls by its degrees beside the middle and its altitude.
    pub fn pos_beside(&self, beside_deg: f64, altitude_deg: f64) -> Pos2 {
        let y = remap(
            altitude_deg,
            self.bottom_deg()..=self.top_deg,
            f64::from(self.rect.bottom())..=f64::from(self.rect.top()),
        );
        let x = f64::from(self.rect.center().x) + beside_deg * self.points_per_deg();
        pos2(x as f32, y as f32)
    }
}

impl Place for Frame {
    fn pos(&self, azimuth: Angle, altitude: Angle) -> Pos2 {
        self.pos_beside(self.beside_deg(azimuth), altitude.degrees())
    }

    fn sky(&self, pos: Pos2) -> (Angle, Angle) {
        let aside = f64::from(pos.x - self.rect.center().x) / self.points_per_deg();
        let azimuth = Angle::from_degrees(self.view.middle_deg + aside).wrapped();
        let share = f64::from((self.rect.bottom() - pos.y) / self.rect.height());
        let altitude_deg = lerp(self.bottom_deg()..=self.top_deg, share);
        (azimuth, Angle::from_degrees(altitude_deg))
    }
}

#[cfg(test)]
mod tests {
    use super::{Frame, View};
    use crate::app::measured::Place;
    use crate::measure::Angle;
    use eframe::egui::{Rect, pos2};

    fn frame(view: View) -> Frame {
        let rect = Rect::from_min_max(pos2(20.0, 10.0), pos2(740.0, 210.0));
        let top_deg = Frame::top_for(30.0);
        Frame {
            rect,
            view,
            top_deg,
        }
    }

    #[test]
    fn the_screen_and_the_sky_lead_into_one_another() {
        for view in [View::default(), View::around(340.0, 395.0)] {
            let frame = frame(view);
            for (azimuth, altitude) in [(5.0, 0.0), (350.0, 12.3), (17.5, 30.0)] {
                let there = frame.pos(Angle::from_degrees(azimuth), Angle::from_degrees(altitude));
                let (back, height) = frame.sky(there);
                assert!((back.degrees() - azimuth).abs() < 1e-3, "{back:?}");
                assert!((height.degrees() - altitude).abs() < 1e-3, "{height:?}");
            }
        }
    }

    #[test]
    fn widening_keeps_what_is_under_the_pointer() {
        let view = View::around(200.0, 260.0);
        let pointer_deg = 245.0;
        let share = |view: View| (pointer_deg - view.middle_deg) / view.width_deg;
        let narrower = view.steered(0.0, 0.5, pointer_deg - view.middle_deg);
        assert!((share(view) - share(narrower)).abs() < 1e-9);
        assert_eq!(view.steered(0.0, 100.0, 0.0).width_deg, 360.0);
        assert!(view.steered(0.0, 1e-6, 0.0).width_deg > 1.0);
    }
}
