//! Panoramas: azimuth even along the width.

use super::super::SurveyError;
use super::{Direction, Level, PhotoMark, PictureSize, Pixel, line_through, mirrored, outermost};
use crate::measure::Angle;
use std::f64::consts::{FRAC_PI_2, TAU};

/// How altitude runs up a panorama's height.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Projection {
    /// Even, at the scale of the azimuth.
    Equirectangular,
    /// As its tangent, as on a cylinder around the camera; what most cameras sweep.
    Cylindrical,
}

/// A fitted panorama.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Panorama {
    /// How altitude runs.
    pub projection: Projection,
    /// The picture's middle column, from which the rest counts.
    pub middle_x: f64,
    /// Azimuth of that column.
    pub middle_azimuth: Angle,
    /// Azimuth across one pixel, the same everywhere.
    pub azimuth_per_pixel: Angle,
    /// Where altitude 0 crosses the middle column.
    pub level_y: f64,
    /// How many pixels it falls for each pixel to the right.
    pub level_slope: f64,
}

impl Panorama {
    /// The direction of a pixel.
    pub fn direction(&self, at: Pixel) -> Direction {
        let right = at.x - self.middle_x;
        let up = self.level_y + self.level_slope * right - at.y;
        let rise = self.azimuth_per_pixel.radians() * up;
        Direction {
            azimuth: (self.middle_azimuth + self.azimuth_per_pixel * right).wrapped(),
            altitude: Angle::from_radians(match self.projection {
                Projection::Equirectangular => rise,
                Projection::Cylindrical => rise.atan(),
            }),
        }
    }

    /// The pixel of a direction, nearest to the middle.
    pub fn pixel(&self, direction: Direction) -> Option<Pixel> {
        let right = (direction.azimuth - self.middle_azimuth).signed() / self.azimuth_per_pixel;
        let rise = rise(self.projection, direction.altitude)?;
        Some(Pixel {
            x: self.middle_x + right,
            y: self.level_y + self.level_slope * right - rise / self.azimuth_per_pixel.radians(),
        })
    }
}

/// What altitude makes of the picture's height, in radians of azimuth.
fn rise(projection: Projection, altitude: Angle) -> Option<f64> {
    let is_shown = altitude.radians().abs() < FRAC_PI_2 - 1e-9;
    match projection {
        Projection::Equirectangular => Some(altitude.radians()),
        Projection::Cylindrical => is_shown.then(|| altitude.tan()),
    }
}

/// The panorama that fits the marks, and how many numbers that took.
pub(super) fn fit(
    projection: Projection,
    size: PictureSize,
    marks: &[PhotoMark],
    level: &Level,
) -> Result<(Panorama, usize), SurveyError> {
    /// A whole turn with some overlap.
    const WIDEST_DEG: f64 = 400.0;
    let middle = size.middle();
    let (left, right) = outermost(marks)?;
    let field_deg = |scale: f64| Angle::from_radians(scale).degrees() * f64::from(size.width);
    // The outermost marks may be a turn further apart than their azimuths say.
    let fits = [0.0, TAU].iter().filter_map(|turn| {
        let between = (right.azimuth - left.azimuth).wrapped().radians() + turn;
        let rough = between / (right.at.x - left.at.x);
        (rough > 0.0 && field_deg(rough) <= WIDEST_DEG)
            .then(|| azimuths(marks, left, rough, middle))
    });
    let (_, middle_azimuth, azimuth_per_pixel) = fits
        .min_by(|a, b| a.0.total_cmp(&b.0))
        .filter(|(_, _, scale)| *scale > 0.0)
        .ok_or_else(|| mirrored(left, right))?;
    if field_deg(azimuth_per_pixel) > WIDEST_DEG {
        return Err(SurveyError(format!(
            "the marks make the panorama {:.0} degrees wide, more than a turn: check their \
             azimuths",
            field_deg(azimuth_per_pixel)
        )));
    }
    let scaled = |altitude: Angle| rise(projection, altitude).map(|rise| rise / azimuth_per_pixel);
    let mut level_at: Vec<(f64, f64)> = marks
        .iter()
        .filter_map(|mark| {
            let above = scaled(mark.altitude?)?;
            Some((mark.at.x - middle.x, mark.at.y + above))
        })
        .collect();
    let (level_y, level_slope, unknowns) = match level {
        Level::Picture if level_at.is_empty() => (middle.y, 0.0, 2),
        Level::Picture => {
            let sum: f64 = level_at.iter().map(|(_, y)| y).sum();
            (sum / level_at.len() as f64, 0.0, 3)
        }
        Level::Points(points) => {
            level_at.extend(points.iter().map(|at| (at.x - middle.x, at.y)));
            let (level_y, level_slope) = line_through(&level_at);
            (level_y, level_slope, if level_at.len() > 1 { 4 } else { 3 })
        }
    };
    let panorama = Panorama {
        projection,
        middle_x: middle.x,
        middle_azimuth: Angle::from_radians(middle_azimuth).wrapped(),
        azimuth_per_pixel: Angle::from_radians(azimuth_per_pixel),
        level_y,
        level_slope,
    };
    Ok((panorama, unknowns))
}

/// The sum of squares, the middle's azimuth and the azimuth per pixel, radians, of the straight
/// line through the marks' azimuths. They are freed of the step at north: each is taken next to
/// where the rough scale, counted from the leftmost mark, puts it.
fn azimuths(marks: &[PhotoMark], left: &PhotoMark, rough: f64, middle: Pixel) -> (f64, f64, f64) {
    let unwrapped: Vec<(f64, f64)> = marks
        .iter()
        .map(|mark| {
            let expected = left.azimuth + Angle::from_radians(rough * (mark.at.x - left.at.x));
            let azimuth = expected + (mark.azimuth - expected).signed();
            (mark.at.x - middle.x, azimuth.radians())
        })
        .collect();
    let (start, slope) = line_through(&unwrapped);
    let missed = |(x, azimuth): &(f64, f64)| (start + slope * x - azimuth).powi(2);
    (unwrapped.iter().map(missed).sum(), start, slope)
}
