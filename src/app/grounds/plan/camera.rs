//! Which part of the plan is shown, north up.

use super::geometry::{minus, plus};
use super::things::Extent;
use crate::place::PlanPoint;
use eframe::egui::{Pos2, Rect, Vec2, pos2};

/// The least and the most points of the screen to a metre.
const SCALES: (f64, f64) = (0.02, 400.0);

/// Grid steps, m, from fine to coarse.
const GRIDS_M: [f64; 4] = [1.0, 5.0, 10.0, 50.0];

/// What is kept between frames.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct View {
    /// The point in the middle.
    pub centre: PlanPoint,
    /// Points of the screen to a metre.
    pub points_per_m: f64,
}

impl View {
    /// Everything, with some room around it.
    pub fn of_everything(extent: &Extent, rect: Rect) -> Self {
        const LEAST_M: f64 = 20.0;
        const ROOM: f64 = 1.16;
        let (west, south) = (extent.least.east_m, extent.least.north_m);
        let (east, north) = (extent.most.east_m, extent.most.north_m);
        let across = f64::from(rect.width().max(1.0)) / (ROOM * (east - west).max(LEAST_M));
        let up = f64::from(rect.height().max(1.0)) / (ROOM * (north - south).max(LEAST_M));
        Self {
            centre: PlanPoint::new(0.5 * (west + east), 0.5 * (south + north)),
            points_per_m: across.min(up).clamp(SCALES.0, SCALES.1),
        }
    }
}

/// The plan on the screen.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Camera {
    /// Where it is drawn.
    pub rect: Rect,
    /// What it shows.
    pub view: View,
}

impl Camera {
    /// Where a point of the plan is drawn.
    pub fn to_screen(self, point: PlanPoint) -> Pos2 {
        let from = minus(point, self.view.centre);
        let scale = self.view.points_per_m;
        let centre = self.rect.center();
        pos2(
            centre.x + (scale * from.east_m) as f32,
            centre.y - (scale * from.north_m) as f32,
        )
    }

    /// The point of the plan that is drawn there.
    pub fn to_plan(self, pos: Pos2) -> PlanPoint {
        plus(self.view.centre, self.metres(pos - self.rect.center()), 1.0)
    }

    /// A displacement on the screen in metres.
    pub fn metres(self, by: Vec2) -> PlanPoint {
        let scale = self.view.points_per_m;
        PlanPoint::new(f64::from(by.x) / scale, -f64::from(by.y) / scale)
    }

    /// Points of the screen for a length, m.
    pub fn points(self, length_m: f64) -> f32 {
        (self.view.points_per_m * length_m) as f32
    }

    /// The view with the ground moved along with the pointer.
    pub fn panned(self, by: Vec2) -> View {
        View {
            centre: plus(self.view.centre, self.metres(by), -1.0),
            ..self.view
        }
    }

    /// The view so many times as large, with the point under a position kept there.
    pub fn zoomed(self, at: Pos2, times: f64) -> View {
        let points_per_m = (self.view.points_per_m * times).clamp(SCALES.0, SCALES.1);
        let fixed = self.to_plan(at);
        let share = self.view.points_per_m / points_per_m;
        View {
            centre: plus(fixed, minus(self.view.centre, fixed), share),
            points_per_m,
        }
    }

    /// The grid's step, m: its lines stand at least some points apart.
    pub fn grid_m(self) -> f64 {
        const LEAST_POINTS: f64 = 14.0;
        GRIDS_M
            .into_iter()
            .find(|step_m| step_m * self.view.points_per_m >= LEAST_POINTS)
            .unwrap_or(GRIDS_M[GRIDS_M.len() - 1])
    }

    /// To what positions are rounded, m: as fine as a hand can point at this scale.
    pub fn step_m(self) -> f64 {
        if self.view.points_per_m > 60.0 {
            0.01
        } else {
            0.1
        }
    }

    /// A round length, m, for the scale bar, of at most so many points.
    pub fn scale_bar_m(self, most_points: f64) -> f64 {
        let most_m = most_points / self.view.points_per_m;
        let decade = 10f64.powf(most_m.log10().floor());
        [5.0, 2.0]
            .into_iter()
            .map(|times| times * decade)
            .find(|length_m| *length_m <= most_m)
            .unwrap_or(decade)
    }
}
