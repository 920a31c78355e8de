//! Single photographs: an ordinary lens that keeps straight lines straight.

use super::super::SurveyError;
use super::{Direction, Level, PhotoMark, PictureSize, Pixel, line_through, mirrored, outermost};
use crate::measure::{Angle, Vector};

/// Widest field that a single photograph is believed to have, degrees.
const WIDEST_DEG: f64 = 150.0;

/// A fitted camera. Its axis meets the picture's middle.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Camera {
    /// The picture's middle.
    pub middle: Pixel,
    /// Azimuth of the axis, [0°, 360°).
    pub heading: Angle,
    /// Altitude of the axis.
    pub pitch: Angle,
    /// How far the camera was turned clockwise about its axis, seen from behind: the level then
    /// rises to the right in the picture.
    pub roll: Angle,
    /// Focal length in pixels: one pixel at the middle is its inverse, in radians.
    pub focal_length_px: f64,
}

/// The camera's axes in the world: x east, y north, z up.
struct Axes {
    forward: Vector,
    right: Vector,
    up: Vector,
}

impl Camera {
    fn axes(&self) -> Axes {
        let forward = Vector::from_spherical(Angle::from_degrees(90.0) - self.heading, self.pitch);
        let (sin_heading, cos_heading) = self.heading.sin_cos();
        let level_right = Vector::new(cos_heading, -sin_heading, 0.0);
        let level_up = level_right.cross(forward);
        let (sin_roll, cos_roll) = self.roll.sin_cos();
        Axes {
            forward,
            right: level_right * cos_roll - level_up * sin_roll,
            up: level_up * cos_roll + level_right * sin_roll,
        }
    }

    /// The direction of a pixel.
    pub fn direction(&self, at: Pixel) -> Direction {
        let axes = self.axes();
        let across = (at.x - self.middle.x) / self.focal_length_px;
        let above = (self.middle.y - at.y) / self.focal_length_px;
        let sight = axes.forward + axes.right * across + axes.up * above;
        Direction {
            azimuth: (Angle::from_degrees(90.0) - sight.longitude()).wrapped(),
            altitude: sight.latitude(),
        }
    }

    /// The pixel of a direction; `None` where the camera does not look.
    pub fn pixel(&self, direction: Direction) -> Option<Pixel> {
        let axes = self.axes();
        let sight = Vector::from_spherical(
            Angle::from_degrees(90.0) - direction.azimuth,
            direction.altitude,
        );
        let depth = sight.dot(axes.forward);
        let scale = self.focal_length_px / depth;
        // At a hundredth the pixel is a hundred focal lengths off the middle.
        (depth > 0.01).then(|| Pixel {
            x: self.middle.x + scale * sight.dot(axes.right),
            y: self.middle.y - scale * sight.dot(axes.up),
        })
    }

    /// The angle across the picture's width through its middle.
    pub fn field(&self) -> Angle {
        Angle::from_radians(2.0 * (self.middle.x / self.focal_length_px).atan())
    }
}

/// What the fit turns: heading, logarithm of the focal length, pitch, roll.
type Unknowns = [f64; 4];

fn camera(middle: Pixel, unknowns: &Unknowns) -> Camera {
    Camera {
        middle,
        heading: Angle::from_radians(unknowns[0]).wrapped(),
        focal_length_px: unknowns[1].exp(),
        pitch: Angle::from_radians(unknowns[2]),
        roll: Angle::from_radians(unknowns[3]),
    }
}

struct Fit<'a> {
    middle: Pixel,
    marks: &'a [PhotoMark],
    level: &'a [Pixel],
    /// How many of the unknowns are free; the rest keep their start.
    free: usize,
}

/// The camera that fits the marks, and how many numbers that took.
pub(super) fn fit(
    size: PictureSize,
    marks: &[PhotoMark],
    level: &Level,
) -> Result<(Camera, usize), SurveyError> {
    let (left, right) = outermost(marks)?;
    let between_deg = (right.azimuth - left.azimuth).signed().degrees();
    if between_deg <= 0.0 {
        return Err(mirrored(left, right));
    }
    let points: &[Pixel] = match level {
        Level::Picture => &[],
        Level::Points(points) => points,
    };
    let altitudes = marks.iter().filter(|mark| mark.altitude.is_some()).count() + points.len();
    let fit = Fit {
        middle: size.middle(),
        marks,
        level: points,
        free: match level {
            _ if altitudes == 0 => 2,
            Level::Points(_) if altitudes > 1 => 4,
            _ => 3,
        },
    };
    let found = fit.best(size).ok_or_else(|| {
        SurveyError(
            "no camera fits these marks: check their azimuths and altitudes, or take the picture \
             as a panorama"
                .into(),
        )
    })?;
    let field_deg = found.field().degrees();
    if field_deg > WIDEST_DEG {
        return Err(SurveyError(format!(
            "the marks make the photograph {field_deg:.0} degrees wide, but a single one shows \
             at most {WIDEST_DEG}: check their azimuths, or take it as a panorama"
        )));
    }
    Ok((found, fit.free))
}

impl Fit<'_> {
    /// The best of the fits from several fields of view.
    fn best(&self, size: PictureSize) -> Option<Camera> {
        const START_FIELDS_DEG: [f64; 8] = [2.0, 8.0, 20.0, 40.0, 65.0, 90.0, 115.0, 140.0];
        let start = |field_deg: &f64| {
            let half = Angle::from_degrees(0.5 * field_deg);
            let focal_length_px = 0.5 * f64::from(size.width) / half.tan();
            self.solve(self.start(focal_length_px))
        };
        let solved = START_FIELDS_DEG.iter().filter_map(start);
        let best = solved.min_by(|a, b| self.cost(a).total_cmp(&self.cost(b)))?;
        // Without a fact to spare the marks must be met: if they are not, they cannot be.
        let missed = self.missed(&best);
        let is_met = missed.iter().all(|miss| miss.abs() < 1e-3);
        (is_met || missed.len() > self.free).then(|| camera(self.middle, &best))
    }

    /// A start for a focal length: the level from its points, the heading from the marks.
    fn start(&self, focal_length_px: f64) -> Unknowns {
        let level: Vec<(f64, f64)> = self
            .level
            .iter()
            .map(|at| (at.x - self.middle.x, self.middle.y - at.y))
            .collect();
        let (above, slope) = line_through(&level);
        let (mut sin, mut cos) = (0.0, 0.0);
        for mark in self.marks {
            let across = ((mark.at.x - self.middle.x) / focal_length_px).atan();
            let heading = mark.azimuth.radians() - across;
            sin += heading.sin();
            cos += heading.cos();
        }
        [
            sin.atan2(cos),
            focal_length_px.ln(),
            if self.free > 2 {
                -(above / focal_length_px).atan()
            } else {
                0.0
            },
            if self.free > 3 { slope.atan() } else { 0.0 },
        ]
    }

    /// Angles, radians, by which the marks and the level are missed: across the mark's azimuth
    /// (on the sky, so that it means as much at any altitude) and in altitude.
    fn missed(&self, unknowns: &Unknowns) -> Vec<f64> {
        let camera = camera(self.middle, unknowns);
        let mut missed = Vec::with_capacity(2 * self.marks.len() + self.level.len());
        for mark in self.marks {
            let fitted = camera.direction(mark.at);
            let turned = (fitted.azimuth - mark.azimuth).signed().radians();
            missed.push(turned * mark.altitude.unwrap_or(fitted.altitude).cos());
            if let Some(altitude) = mark.altitude {
                missed.push((fitted.altitude - altitude).radians());
            }
        }
        let level = self
            .level
            .iter()
            .map(|at| camera.direction(*at).altitude.radians());
        missed.extend(level);
        missed
    }

    fn cost(&self, unknowns: &Unknowns) -> f64 {
        self.missed(unknowns).iter().map(|miss| miss * miss).sum()
    }

    /// Gauss-Newton with damping that grows while a step does not lower the sum of squares
    /// (Levenberg 1944, Quart. Appl. Math. 2, 164). `None` if it leaves the sensible cameras.
    fn solve(&self, start: Unknowns) -> Option<Unknowns> {
        let mut at = start;
        let mut cost = self.cost(&at);
        let mut damping = 1e-3;
        for _ in 0..200 {
            let (normal, gradient) = self.normal_equations(&at);
            let step = solved(&normal, &gradient, damping, self.free);
            let mut next = at;
            for k in 0..self.free {
                next[k] -= step[k];
            }
            let next_cost = self.cost(&next);
            if next_cost <= cost {
                let is_settled = step.iter().all(|change| change.abs() < 1e-14);
                (at, cost) = (next, next_cost);
                damping = (damping * 0.1).max(1e-15);
                if is_settled {
                    break;
                }
            } else {
                damping *= 10.0;
                if damping > 1e12 {
                    break;
                }
            }
        }
        let is_sensible = at.iter().all(|value| value.is_finite())
            && at[2].abs() < 1.5
            && at[3].abs() < 1.5
            && (0.0..20.0).contains(&at[1]);
        is_sensible.then_some(at)
    }

    /// The normal matrix and the gradient, with derivatives from central differences.
    fn normal_equations(&self, at: &Unknowns) -> ([[f64; 4]; 4], [f64; 4]) {
        const STEP: f64 = 1e-6;
        let missed = self.missed(at);
        let slopes: Vec<Vec<f64>> = (0..self.free)
            .map(|k| {
                let moved = |step: f64| {
                    let mut moved = *at;
                    moved[k] += step;
                    self.missed(&moved)
                };
                let (more, less) = (moved(STEP), moved(-STEP));
                let slope = |(more, less): (&f64, &f64)| (more - less) / (2.0 * STEP);
                more.iter().zip(&less).map(slope).collect()
            })
            .collect();
        let product = |a: &[f64], b: &[f64]| a.iter().zip(b).map(|(a, b)| a * b).sum::<f64>();
        let mut normal = [[0.0; 4]; 4];
        let mut gradient = [0.0; 4];
        for (row, slope) in slopes.iter().enumerate() {
            gradient[row] = product(slope, &missed);
            for (column, other) in slopes.iter().enumerate() {
                normal[row][column] = product(slope, other);
            }
        }
        (normal, gradient)
    }
}

/// The step that solves the damped normal equations, by elimination with pivots; 0 for what is
/// not free or not told by any mark.
fn solved(normal: &[[f64; 4]; 4], gradient: &[f64; 4], damping: f64, free: usize) -> [f64; 4] {
    let mut rows: Vec<[f64; 5]> = (0..free)
        .map(|k| {
            let mut row = [0.0; 5];
            row[..4].copy_from_slice(&normal[k]);
            row[k] += damping * normal[k][k].max(1e-12);
            row[4] = gradient[k];
            row
        })
        .collect();
    for k in 0..free {
        let pivot = (k..free)
            .max_by(|a, b| rows[*a][k].abs().total_cmp(&rows[*b][k].abs()))
            .unwrap_or(k);
        rows.swap(k, pivot);
        if rows[k][k].abs() < 1e-300 {
            continue;
        }
        let pivot_row = rows[k];
        for row in rows.iter_mut().skip(k + 1) {
            let factor = row[k] / pivot_row[k];
            for (value, pivot) in row.iter_mut().zip(pivot_row) {
                *value -= factor * pivot;
            }
        }
    }
    let mut step = [0.0; 4];
    for k in (0..free).rev() {
        let known: f64 = (k + 1..free).map(|j| rows[k][j] * step[j]).sum();
        if rows[k][k].abs() >= 1e-300 {
            step[k] = (rows[k][4] - known) / rows[k][k];
        }
    }
    step
}
