//! Tracing over a photograph: directions from pixels, fitted to a few marked directions.
//!
//! Pixels count from the picture's upper left corner, x to the right and y downwards, so that
//! the middle of the first pixel is (0.5, 0.5). A picture shows azimuths that grow to the right.

mod camera;
mod outline;
mod panorama;

pub use camera::Camera;
pub use outline::Traced;
pub use panorama::{Panorama, Projection};

use super::{SurveyError, within};
use crate::measure::Angle;

/// Most marks and most points of the level that a fit takes.
const MOST_MARKS: usize = 100;

/// A place in a picture; it need not lie inside.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Pixel {
    /// To the right of the left edge.
    pub x: f64,
    /// Below the upper edge.
    pub y: f64,
}

/// A direction from the spot.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Direction {
    /// From true north through east, [0°, 360°).
    pub azimuth: Angle,
    /// Above the level through the eye.
    pub altitude: Angle,
}

/// A picture's size, pixels.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct PictureSize {
    /// Width, from 2 to 100 000.
    pub width: u32,
    /// Height, from 2 to 100 000.
    pub height: u32,
}

impl PictureSize {
    fn middle(self) -> Pixel {
        Pixel {
            x: 0.5 * f64::from(self.width),
            y: 0.5 * f64::from(self.height),
        }
    }
}

/// Something in the picture whose direction is known.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct PhotoMark {
    /// Where it is in the picture.
    pub at: Pixel,
    /// Its azimuth.
    pub azimuth: Angle,
    /// Its altitude, where that is known too.
    pub altitude: Option<Angle>,
}

/// How the picture's level is known.
#[derive(Clone, Debug, PartialEq)]
pub enum Level {
    /// The picture was taken level: a row of pixels is level, and where no mark has an altitude,
    /// the middle row is altitude 0.
    Picture,
    /// These pixels are at altitude 0 (a sea horizon, marks at the eye's height); one gives the
    /// height of the level, two or more its slope. There may be none where two or more marks
    /// have an altitude.
    Points(Vec<Pixel>),
}

/// What the picture is.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum PictureKind {
    /// Stitched or swept, with azimuth even along its width.
    Panorama(Projection),
    /// One exposure through an ordinary lens, not cropped: straight lines are straight.
    Single,
}

/// What a picture shows where.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Picture {
    /// A panorama.
    Panorama(Panorama),
    /// A single photograph.
    Single(Camera),
}

/// How far a mark's fitted direction lies from the stated one, fitted minus stated.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Residual {
    /// In azimuth, [-180°, 180°).
    pub azimuth: Angle,
    /// In altitude, for marks that state one.
    pub altitude: Option<Angle>,
}

impl Residual {
    /// The length of both on the sky, near the level.
    pub fn size(&self) -> Angle {
        let altitude = self.altitude.unwrap_or(Angle::ZERO).radians();
        Angle::from_radians(self.azimuth.radians().hypot(altitude))
    }
}

/// A picture fitted to its marks.
#[derive(Clone, Debug, PartialEq)]
pub struct PhotoFit {
    /// What the picture shows where.
    pub picture: Picture,
    /// Of each mark, in their order. One that is far larger than the others is a wrong mark.
    pub residuals: Vec<Residual>,
    /// The fitted altitude of each point of the level, which should be 0.
    pub level: Vec<Angle>,
    /// How many more facts were marked than the fit needs. At 0 every residual is 0 whatever is
    /// marked, and says nothing.
    pub spare: usize,
    /// What one pixel is at the picture's middle: no outline is finer.
    pub pixel: Angle,
}

/// Fits a picture to its marks by least squares.
///
/// # Errors
/// Too few marks, marks that cannot be (all at one azimuth or in one column, azimuth growing to
/// the left), a field of view above 150 degrees for a single photograph or a turn for a
/// panorama, or numbers that are none.
pub fn fit(
    kind: PictureKind,
    size: PictureSize,
    marks: &[PhotoMark],
    level: &Level,
) -> Result<PhotoFit, SurveyError> {
    check(size, marks, level)?;
    let points: &[Pixel] = match level {
        Level::Picture => &[],
        Level::Points(points) => points,
    };
    let (picture, unknowns) = match kind {
        PictureKind::Panorama(projection) => {
            let (panorama, unknowns) = panorama::fit(projection, size, marks, level)?;
            (Picture::Panorama(panorama), unknowns)
        }
        PictureKind::Single => {
            let (camera, unknowns) = camera::fit(size, marks, level)?;
            (Picture::Single(camera), unknowns)
        }
    };
    let facts = marks.len() + marks.iter().filter(|mark| mark.altitude.is_some()).count();
    Ok(PhotoFit {
        residuals: marks.iter().map(|mark| residual(&picture, mark)).collect(),
        level: points
            .iter()
            .map(|at| picture.direction(*at).altitude)
            .collect(),
        spare: (facts + points.len()).saturating_sub(unknowns),
        pixel: match &picture {
            Picture::Panorama(panorama) => panorama.azimuth_per_pixel,
            Picture::Single(camera) => Angle::from_radians(1.0 / camera.focal_length_px),
        },
        picture,
    })
}

fn residual(picture: &Picture, mark: &PhotoMark) -> Residual {
    let fitted = picture.direction(mark.at);
    Residual {
        azimuth: (fitted.azimuth - mark.azimuth).signed(),
        altitude: mark.altitude.map(|altitude| fitted.altitude - altitude),
    }
}

impl Picture {
    /// The direction of a pixel.
    pub fn direction(&self, at: Pixel) -> Direction {
        match self {
            Self::Panorama(panorama) => panorama.direction(at),
            Self::Single(camera) => camera.direction(at),
        }
    }

    /// The pixel of a direction, which may lie outside the picture; for drawing over it. `None`
    /// behind a camera, and towards the zenith of a cylinder. In a panorama it is the place
    /// nearest to the picture's middle.
    pub fn pixel(&self, direction: Direction) -> Option<Pixel> {
        match self {
            Self::Panorama(panorama) => panorama.pixel(direction),
            Self::Single(camera) => camera.pixel(direction),
        }
    }
}

fn check(size: PictureSize, marks: &[PhotoMark], level: &Level) -> Result<(), SurveyError> {
    for (what, pixels) in [
        ("the picture's width", size.width),
        ("the picture's height", size.height),
    ] {
        within(what, f64::from(pixels), 2.0, 100_000.0, "pixels")?;
    }
    if marks.len() < 2 {
        return Err(SurveyError(format!(
            "{} is marked in the picture, but two known directions or more are needed",
            match marks.len() {
                0 => "no direction",
                _ => "one direction",
            }
        )));
    }
    let points = match level {
        Level::Picture => &[][..],
        Level::Points(points) => points,
    };
    if marks.len().max(points.len()) > MOST_MARKS {
        return Err(SurveyError(format!(
            "there are {} marks in the picture, but may be at most {MOST_MARKS}",
            marks.len().max(points.len())
        )));
    }
    let altitudes = marks.iter().filter(|mark| mark.altitude.is_some()).count();
    if points.is_empty() && *level != Level::Picture && altitudes < 2 {
        return Err(SurveyError(
            "the level is not known: mark two points at altitude 0, give two marks an altitude, \
             or say that the picture is level"
                .into(),
        ));
    }
    for at in marks
        .iter()
        .map(|mark| mark.at)
        .chain(points.iter().copied())
    {
        within("a mark's place in the picture", at.x, -1e6, 1e6, "pixels")?;
        within("a mark's place in the picture", at.y, -1e6, 1e6, "pixels")?;
    }
    for mark in marks {
        let azimuth_deg = mark.azimuth.degrees();
        within("a mark's azimuth", azimuth_deg, -360.0, 360.0, "degrees")?;
        if let Some(altitude) = mark.altitude {
            within(
                "a mark's altitude",
                altitude.degrees(),
                -60.0,
                85.0,
                "degrees",
            )?;
        }
    }
    Ok(())
}

/// The leftmost and the rightmost mark.
///
/// # Errors
/// All marks stand in one column (nearer than a pixel), or at one azimuth.
fn outermost(marks: &[PhotoMark]) -> Result<(&PhotoMark, &PhotoMark), SurveyError> {
    let by_x = |a: &&PhotoMark, b: &&PhotoMark| a.at.x.total_cmp(&b.at.x);
    let ends = marks.iter().min_by(by_x).zip(marks.iter().max_by(by_x));
    let (left, right) = ends
        .filter(|(left, right)| right.at.x - left.at.x >= 1.0)
        .ok_or_else(|| {
            SurveyError(
                "all marks stand in one column of the picture: mark directions further apart"
                    .into(),
            )
        })?;
    let same = |mark: &PhotoMark| (mark.azimuth - left.azimuth).signed().abs().degrees() < 1e-6;
    if marks.iter().all(same) {
        return Err(SurveyError(format!(
            "all marks have the azimuth {:.1}: mark directions further apart",
            left.azimuth.wrapped().degrees()
        )));
    }
    Ok((left, right))
}

/// That the azimuths grow to the left.
fn mirrored(left: &PhotoMark, right: &PhotoMark) -> SurveyError {
    SurveyError(format!(
        "azimuth must grow to the right, but the mark at x {:.0} has {:.1} degrees and the one at \
         x {:.0} has {:.1}: exchange them, or turn the picture the right way round",
        left.at.x,
        left.azimuth.wrapped().degrees(),
        right.at.x,
        right.azimuth.wrapped().degrees()
    ))
}

/// The straight line y = a + b x through points, by least squares; level where all x agree.
fn line_through(points: &[(f64, f64)]) -> (f64, f64) {
    let count = points.len().max(1) as f64;
    let mean_x = points.iter().map(|point| point.0).sum::<f64>() / count;
    let mean_y = points.iter().map(|point| point.1).sum::<f64>() / count;
    let spread: f64 = points.iter().map(|(x, _)| (x - mean_x).powi(2)).sum();
    let slope = if spread >= 1.0 {
        let product = |(x, y): &(f64, f64)| (x - mean_x) * (y - mean_y);
        points.iter().map(product).sum::<f64>() / spread
    } else {
        0.0
    };
    (mean_y - slope * mean_x, slope)
}
