//! The squares of a standing map.

use crate::place::{PlanPoint, Site};

/// Half the side of the grounds where a site draws no outline, m.
const USUAL_HALF_M: f64 = 50.0;

/// Metres that the grounds reach beyond the outermost spots where a site draws no outline.
const BEYOND_SPOTS_M: f64 = 10.0;

/// Squares of even size in rows from south to north, each row from west to east. The site's mark
/// is the centre of one, and so is every spot at whole steps from it.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Raster {
    /// The centre of the square in the south-west.
    pub origin: PlanPoint,
    /// Side of a square, m.
    pub step_m: f64,
    /// Squares in a row.
    pub columns: usize,
    /// Rows.
    pub rows: usize,
}

impl Raster {
    /// Most squares: beyond that they are made larger.
    pub const MOST: usize = 40_000;

    /// Over a site's outline, or without one a square of 100 m around its mark that reaches at
    /// least 10 m beyond every spot. Grounds that would take too many squares take larger ones.
    pub fn of_site(site: &Site, finest_m: f64) -> Self {
        let (mut low, mut high) = (
            PlanPoint::new(f64::INFINITY, f64::INFINITY),
            PlanPoint::new(f64::NEG_INFINITY, f64::NEG_INFINITY),
        );
        let mut hold = |at: PlanPoint, reach_m: f64| {
            low.east_m = low.east_m.min(at.east_m - reach_m);
            low.north_m = low.north_m.min(at.north_m - reach_m);
            high.east_m = high.east_m.max(at.east_m + reach_m);
            high.north_m = high.north_m.max(at.north_m + reach_m);
        };
        if site.outline_m.is_empty() {
            hold(PlanPoint::new(0.0, 0.0), USUAL_HALF_M);
            for spot in &site.spots {
                hold(spot.plan_point(), BEYOND_SPOTS_M);
            }
        } else {
            for corner in &site.outline_m {
                hold(*corner, 0.0);
            }
        }
        let mut raster = Self::between(low, high, finest_m.max(0.1));
        while raster.len() > Self::MOST {
            raster = Self::between(low, high, 1.25 * raster.step_m);
        }
        raster
    }

    fn between(low: PlanPoint, high: PlanPoint, step_m: f64) -> Self {
        let down = |m: f64| (m / step_m).ceil() * step_m;
        let count = |from: f64, to: f64| ((to - from) / step_m).floor().max(0.0) as usize + 1;
        let origin = PlanPoint::new(down(low.east_m), down(low.north_m));
        Self {
            origin,
            step_m,
            columns: count(origin.east_m, high.east_m),
            rows: count(origin.north_m, high.north_m),
        }
    }

    /// How many squares.
    pub fn len(&self) -> usize {
        self.columns * self.rows
    }

    /// Whether there are none.
    pub fn is_empty(&self) -> bool {
        self.len() == 0
    }

    /// The centre of a square.
    pub fn centre(&self, column: usize, row: usize) -> PlanPoint {
        PlanPoint::new(
            self.origin.east_m + column as f64 * self.step_m,
            self.origin.north_m + row as f64 * self.step_m,
        )
    }

    /// Column and row of the square that holds a point, if one does.
    pub fn square(&self, at: PlanPoint) -> Option<(usize, usize)> {
        let along = |from_m: f64, count: usize| {
            let step = (from_m / self.step_m).round();
            (step >= 0.0 && step < count as f64).then_some(step as usize)
        };
        Some((
            along(at.east_m - self.origin.east_m, self.columns)?,
            along(at.north_m - self.origin.north_m, self.rows)?,
        ))
    }
}
