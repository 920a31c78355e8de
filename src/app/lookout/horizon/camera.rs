//! Which part of the sky is shown, and where a place in it falls on the screen.
//!
//! One scale serves both ways: a degree of altitude is as long as a degree of azimuth. Azimuths
//! are placed by their signed distance from the middle, so that north is a place like any other.

use crate::app::lookout::model::Sample;
use crate::app::measured::Place;
use crate::measure::Angle;
use eframe::egui::{Pos2, Rect, pos2};

/// Degrees below the horizon that are shown as ground.
const GROUND_DEG: f64 = 1.6;
/// The highest altitude that the view's upper edge can have.
const HIGHEST_DEG: f64 = 92.0;
/// The narrowest view.
const NARROWEST_DEG: f64 = 24.0;

/// What the chosen body and the Sun use of the sky: azimuths unwrapped, so that `from <= to`
/// however they lie about north, degrees.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Sector {
    /// Where the body's path begins on the left.
    pub from_deg: f64,
    /// Where it ends on the right.
    pub to_deg: f64,
    /// How high it climbs.
    pub top_deg: f64,
    /// The same with the Sun's path: the limits of turning and widening.
    pub with_sun_deg: (f64, f64),
}

impl Sector {
    /// The sector of the body's and the Sun's samples between two times. A body that is never up
    /// leaves the sector to the Sun.
    pub fn new(body: &[Sample], sun: &[Sample], (from_s, to_s): (f64, f64)) -> Self {
        /// Down to where the Sun's glow still shows where it stands.
        const GLOW_DEG: f64 = -12.0;
        let within = |samples: &[Sample], least_deg: f64| -> Option<(f64, f64, f64)> {
            let used = samples.iter().filter(|sample| {
                sample.at_s >= from_s
                    && sample.at_s <= to_s
                    && sample.altitude.degrees() > least_deg
            });
            extent(used)
        };
        let sun = within(sun, GLOW_DEG);
        let body = within(body, 0.0);
        let (from_deg, to_deg, top_deg) = body.or(sun).unwrap_or((180.0, 180.0, 0.0));
        let with_sun_deg = sun.map_or((from_deg, to_deg), |(sun_from, sun_to, _)| {
            let middle = 0.5 * (from_deg + to_deg);
            // The Sun's sector a whole turn on or back, whichever lies nearer.
            let turns = ((middle - 0.5 * (sun_from + sun_to)) / 360.0).round() * 360.0;
            (from_deg.min(sun_from + turns), to_deg.max(sun_to + turns))
        });
        Self {
            from_deg,
            to_deg,
            top_deg: if body.is_some() { top_deg } else { 0.0 },
            with_sun_deg,
        }
    }

    /// The azimuth in its middle.
    pub fn middle_deg(&self) -> f64 {
        0.5 * (self.from_deg + self.to_deg)
    }
}

/// Least and greatest azimuth, followed along the samples, and the greatest altitude.
fn extent<'a>(samples: impl Iterator<Item = &'a Sample>) -> Option<(f64, f64, f64)> {
    let mut found: Option<(f64, f64, f64)> = None;
    let mut last_deg = 0.0;
    for sample in samples {
        let (azimuth, altitude) = (sample.azimuth, sample.altitude.degrees());
        found = Some(match found {
            None => {
                last_deg = azimuth.degrees();
                (last_deg, last_deg, altitude)
            }
            Some((from, to, top)) => {
                last_deg += (azimuth - Angle::from_degrees(last_deg)).signed().degrees();
                (from.min(last_deg), to.max(last_deg), top.max(altitude))
            }
        });
    }
    found
}

/// How far the user has turned, widened and tilted the view from where it was framed.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Turn {
    /// To the right, degrees.
    pub turn_deg: f64,
    /// Times the framed width.
    pub widening: f64,
    /// Upwards, degrees.
    pub tilt_deg: f64,
}

impl Default for Turn {
    fn default() -> Self {
        Self {
            turn_deg: 0.0,
            widening: 1.0,
            tilt_deg: 0.0,
        }
    }
}

/// The part of the sky that a rectangle of the screen shows.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Camera {
    /// Where on the screen.
    pub rect: Rect,
    /// Azimuth in the middle, degrees.
    pub middle_deg: f64,
    /// Altitude at the lower edge, degrees.
    pub bottom_deg: f64,
    /// Points to a degree, both ways.
    pub points_per_deg: f64,
}

impl Camera {
    /// Frames a sector and then turns, widens and tilts within what the sector allows; gives
    /// back what remained of the turning, so that nothing is stored beyond a limit.
    pub fn new(sector: &Sector, turn: Turn, rect: Rect) -> (Self, Turn) {
        /// Room beside the path, and above it for its labels.
        const BESIDE_DEG: f64 = 12.0;
        const ABOVE_DEG: f64 = 11.0;
        const LEAST_WIDTH_DEG: f64 = 64.0;
        const LEAST_TOP_DEG: f64 = 30.0;
        let (width, height) = (
            f64::from(rect.width().max(1.0)),
            f64::from(rect.height().max(1.0)),
        );
        let top_deg = (sector.top_deg + ABOVE_DEG).clamp(LEAST_TOP_DEG, HIGHEST_DEG);
        let path_deg = sector.to_deg - sector.from_deg;
        let wanted_deg = (path_deg + 2.0 * BESIDE_DEG).max(LEAST_WIDTH_DEG);
        // Never more than the whole horizon, never more than horizon to zenith.
        let least_scale = (width / 360.0).max(height / (HIGHEST_DEG + GROUND_DEG));
        let framed_scale = (width / wanted_deg)
            .min(height / (top_deg + GROUND_DEG))
            .max(least_scale);

        let (sun_from, sun_to) = sector.with_sun_deg;
        let framed_width = width / framed_scale;
        let widest = (sun_to - sun_from + 2.0 * BESIDE_DEG)
            .max(framed_width)
            .min(width / least_scale);
        let widening = (turn.widening.max(0.0) * framed_width)
            .clamp(NARROWEST_DEG.min(framed_width), widest)
            / framed_width;
        let points_per_deg = framed_scale / widening;

        let turn_deg = (sector.middle_deg() + turn.turn_deg).clamp(sun_from, sun_to.max(sun_from))
            - sector.middle_deg();
        let height_deg = height / points_per_deg;
        let most_tilt = (top_deg.max(framed_scale.recip() * height - GROUND_DEG) + GROUND_DEG
            - height_deg)
            .max(0.0);
        let tilt_deg = turn.tilt_deg.clamp(0.0, most_tilt);
        let camera = Self {
            rect,
            middle_deg: sector.middle_deg() + turn_deg,
            bottom_deg: tilt_deg - GROUND_DEG,
            points_per_deg,
        };
        let turn = Turn {
            turn_deg,
            widening,
            tilt_deg,
        };
        (camera, turn)
    }

    /// Degrees from edge to edge.
    pub fn width_deg(&self) -> f64 {
        f64::from(self.rect.width()) / self.points_per_deg
    }

    /// Altitude at the upper edge, degrees.
    pub fn top_deg(&self) -> f64 {
        self.bottom_deg + f64::from(self.rect.height()) / self.points_per_deg
    }

    /// Signed azimuth from the middle of the view, degrees, in [-180, 180).
    pub fn beside_deg(&self, azimuth: Angle) -> f64 {
        (azimuth - Angle::from_degrees(self.middle_deg))
            .signed()
            .degrees()
    }

    /// Where a place falls by its degrees beside the middle and its altitude; may be off the
    /// rectangle.
    pub fn pos_beside(&self, beside_deg: f64, altitude_deg: f64) -> Pos2 {
        pos2(
            self.rect.center().x + (beside_deg * self.points_per_deg) as f32,
            self.rect.bottom() - ((altitude_deg - self.bottom_deg) * self.points_per_deg) as f32,
        )
    }

    /// Where a place falls; may be off the rectangle.
    pub fn pos(&self, azimuth: Angle, altitude: Angle) -> Pos2 {
        self.pos_beside(self.beside_deg(azimuth), altitude.degrees())
    }
}

impl Place for Camera {
    fn pos(&self, azimuth: Angle, altitude: Angle) -> Pos2 {
        Self::pos(self, azimuth, altitude)
    }

    fn sky(&self, pos: Pos2) -> (Angle, Angle) {
        let beside_deg = f64::from(pos.x - self.rect.center().x) / self.points_per_deg;
        let above_deg = f64::from(self.rect.bottom() - pos.y) / self.points_per_deg;
        (
            Angle::from_degrees(self.middle_deg + beside_deg).wrapped(),
            Angle::from_degrees(self.bottom_deg + above_deg),
        )
    }
}

#[cfg(test)]
mod tests {
    #![allow(clippy::unwrap_used)]
    use super::{Camera, Sector, Turn};
    use crate::app::lookout::model::Sample;
    use crate::light::Standing;
    use crate::measure::Angle;
    use eframe::egui::{Rect, pos2, vec2};

    fn path(azimuths_deg: &[f64], altitude_deg: f64) -> Vec<Sample> {
        azimuths_deg
            .iter()
            .enumerate()
            .map(|(k, azimuth)| Sample {
                at_s: 60.0 * k as f64,
                azimuth: Angle::from_degrees(*azimuth).wrapped(),
                altitude: Angle::from_degrees(altitude_deg),
                counting: Angle::ZERO,
                clearance: Angle::ZERO,
                sun_altitude: Angle::ZERO,
                margins_mag: [0.0; 4],
                spread_mag: (0.0, 0.0),
                standing: Standing::Plain,
            })
            .collect()
    }

    fn rect() -> Rect {
        Rect::from_min_size(pos2(0.0, 0.0), vec2(1150.0, 430.0))
    }

    #[test]
    fn a_path_across_north_is_framed_in_one_piece() {
        let sector = Sector::new(&path(&[340.0, 355.0, 10.0, 25.0], 30.0), &[], (0.0, 1e4));
        assert!((sector.from_deg - 340.0).abs() < 1e-9, "{sector:?}");
        assert!((sector.to_deg - 385.0).abs() < 1e-9, "{sector:?}");
        let (camera, _) = Camera::new(&sector, Turn::default(), rect());
        let left = camera.pos(Angle::from_degrees(340.0), Angle::ZERO);
        let right = camera.pos(Angle::from_degrees(25.0), Angle::ZERO);
        assert!(
            left.x > 0.0 && left.x < right.x && right.x < 1150.0,
            "{left:?} {right:?}"
        );
    }

    #[test]
    fn the_suns_sector_is_taken_on_the_near_side_of_north() {
        let sector = Sector::new(
            &path(&[350.0, 370.0], 30.0),
            &path(&[20.0, 30.0], 1.0),
            (0.0, 1e4),
        );
        assert!((sector.with_sun_deg.0 - 350.0).abs() < 1e-9, "{sector:?}");
        assert!((sector.with_sun_deg.1 - 390.0).abs() < 1e-9, "{sector:?}");
    }

    #[test]
    fn one_scale_serves_both_ways() {
        let sector = Sector::new(&path(&[230.0, 250.0], 30.0), &[], (0.0, 1e4));
        let (camera, _) = Camera::new(&sector, Turn::default(), rect());
        let a = camera.pos(Angle::from_degrees(240.0), Angle::from_degrees(10.0));
        let b = camera.pos(Angle::from_degrees(250.0), Angle::from_degrees(20.0));
        assert!((b.x - a.x - (a.y - b.y)).abs() < 1e-3, "{a:?} {b:?}");
    }

    #[test]
    fn a_path_near_the_zenith_fits_below_the_upper_edge() {
        let sector = Sector::new(&path(&[100.0, 170.0, 260.0], 86.0), &[], (0.0, 1e4));
        let (camera, _) = Camera::new(&sector, Turn::default(), rect());
        assert!(
            camera.top_deg() >= 90.0 && camera.top_deg() < 93.0,
            "{camera:?}"
        );
        assert!(camera.width_deg() <= 360.0, "{camera:?}");
    }

    #[test]
    fn turning_and_widening_stop_at_what_body_and_sun_use() {
        let sector = Sector::new(
            &path(&[200.0, 240.0], 30.0),
            &path(&[230.0, 250.0], 0.0),
            (0.0, 1e4),
        );
        let far = Turn {
            turn_deg: 500.0,
            widening: 50.0,
            tilt_deg: 70.0,
        };
        let (camera, kept) = Camera::new(&sector, far, rect());
        assert!((camera.middle_deg - 250.0).abs() < 1e-9, "{camera:?}");
        assert!(camera.width_deg() < 130.0, "{camera:?}");
        assert!(kept.turn_deg < 31.0 && kept.tilt_deg == 0.0, "{kept:?}");
        let near = Turn {
            widening: 0.001,
            ..Turn::default()
        };
        let (camera, _) = Camera::new(&sector, near, rect());
        assert!((camera.width_deg() - 24.0).abs() < 1e-6, "{camera:?}");
    }

    #[test]
    fn a_view_without_body_or_sun_still_shows_something() {
        let sector = Sector::new(&[], &[], (0.0, 1e4));
        let (camera, _) = Camera::new(&sector, Turn::default(), rect());
        assert!(camera.points_per_deg.is_finite() && camera.points_per_deg > 0.0);
    }
}
