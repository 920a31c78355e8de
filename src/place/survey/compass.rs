//! Readings of compass and clinometer, and a measured skyline put together from parts.

use super::super::SkylinePoint;
use super::{SurveyError, skyline_point, within};
use crate::measure::Angle;

/// Which north a compass's bearings count from.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum North {
    /// True north: bearings are azimuths.
    True,
    /// Magnetic north, which lies so far east of true north (west negative). The user states it,
    /// from a chart or from [`super::timed::ShadowBearing::declination`].
    Magnetic {
        /// East positive.
        declination: Angle,
    },
}

impl North {
    /// The azimuth of a bearing, [0°, 360°).
    pub fn azimuth(self, bearing: Angle) -> Angle {
        match self {
            Self::True => bearing.wrapped(),
            Self::Magnetic { declination } => (bearing + declination).wrapped(),
        }
    }
}

/// How far above the level, on a clinometer's scale.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Tilt {
    /// Degrees above the level.
    Degrees(f64),
    /// Slope in percent: 100 times rise over run, so that 100 is 45 degrees.
    Percent(f64),
}

impl Tilt {
    /// The altitude.
    pub fn altitude(self) -> Angle {
        match self {
            Self::Degrees(degrees) => Angle::from_degrees(degrees),
            Self::Percent(percent) => Angle::from_radians((percent / 100.0).atan()),
        }
    }

    fn plus(self, divisions: f64) -> Self {
        match self {
            Self::Degrees(degrees) => Self::Degrees(degrees + divisions),
            Self::Percent(percent) => Self::Percent(percent + divisions),
        }
    }
}

/// One look at the skyline through compass and clinometer.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Reading {
    /// What the compass says, degrees, [0, 360]; which north it means is stated apart.
    pub bearing_deg: f64,
    /// What the clinometer says.
    pub tilt: Tilt,
}

/// How finely the instruments can be read.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct ReadingError {
    /// Of the compass, degrees.
    pub bearing_deg: f64,
    /// How well the declination is known, degrees; 0 for true bearings.
    pub declination_deg: f64,
    /// Of the clinometer, in units of its own scale (degrees or percent).
    pub tilt: f64,
}

impl Default for ReadingError {
    /// A hand-held compass to 1 degree, a clinometer to half a division, the declination from a
    /// chart to half a degree (common practice).
    fn default() -> Self {
        Self {
            bearing_deg: 1.0,
            declination_deg: 0.5,
            tilt: 0.5,
        }
    }
}

/// How far a skyline point may be off.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct PointError {
    /// In azimuth.
    pub azimuth: Angle,
    /// In altitude.
    pub altitude: Angle,
}

impl Reading {
    /// The skyline's point that was read.
    ///
    /// # Errors
    /// The bearing lies outside [0°, 360°], the declination outside ±180°, or the altitude
    /// outside what a skyline holds.
    pub fn point(&self, north: North) -> Result<SkylinePoint, SurveyError> {
        within("the bearing", self.bearing_deg, 0.0, 360.0, "degrees")?;
        if let North::Magnetic { declination } = north {
            let declination_deg = declination.degrees();
            within("the declination", declination_deg, -180.0, 180.0, "degrees")?;
        }
        let azimuth = north.azimuth(Angle::from_degrees(self.bearing_deg));
        skyline_point(azimuth, self.tilt.altitude())
    }

    /// What the reading error makes of the point: in azimuth compass and declination together
    /// (the root of the sum of their squares), in altitude the larger of reading too high and
    /// too low.
    pub fn error(&self, north: North, error: &ReadingError) -> PointError {
        let azimuth_deg = match north {
            North::True => error.bearing_deg.abs(),
            North::Magnetic { .. } => error.bearing_deg.hypot(error.declination_deg),
        };
        let read = self.tilt.altitude();
        let off = |divisions: f64| {
            (self.tilt.plus(divisions).altitude() - read)
                .abs()
                .radians()
        };
        PointError {
            azimuth: Angle::from_degrees(azimuth_deg),
            altitude: Angle::from_radians(off(error.tilt).max(off(-error.tilt))),
        }
    }
}

/// The part of the horizon that a set of points describes.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Sweep {
    /// All round: nothing of the skyline before is kept.
    Whole,
    /// From one azimuth clockwise to another, degrees.
    Sector {
        /// Where it begins, [0, 360).
        from_deg: f64,
        /// Where it ends, [0, 360); before `from_deg` if the sector holds north.
        to_deg: f64,
    },
    /// Only those points: each becomes a corner of the skyline before, whose other corners stay.
    Points,
}

/// Nearer than this two points stand at one azimuth, and so far beside a sector the skyline
/// before goes on, degrees. A pace moves a tree 100 m away by forty times as much.
const BESIDE_DEG: f64 = 0.01;

impl Sweep {
    /// The smallest sector that holds all the points: what is left when the widest gap between
    /// neighbours is taken away. No points make no sector.
    pub fn around(points: &[SkylinePoint]) -> Self {
        let mut azimuths_deg: Vec<f64> = points.iter().map(|point| point.azimuth_deg).collect();
        azimuths_deg.sort_by(f64::total_cmp);
        azimuths_deg.dedup();
        let next = azimuths_deg.iter().cycle().skip(1);
        let widest = azimuths_deg.iter().zip(next).max_by(|(a, b), (c, d)| {
            let gap_deg = |from: f64, to: f64| {
                if to > from {
                    to - from
                } else {
                    to - from + 360.0
                }
            };
            gap_deg(**a, **b).total_cmp(&gap_deg(**c, **d))
        });
        widest.map_or(Self::Points, |(to_deg, from_deg)| Self::Sector {
            from_deg: *from_deg,
            to_deg: *to_deg,
        })
    }

    fn holds(&self, azimuth_deg: f64) -> bool {
        match *self {
            Self::Whole => true,
            Self::Points => false,
            Self::Sector { from_deg, to_deg } => {
                clockwise_deg(from_deg, azimuth_deg) <= clockwise_deg(from_deg, to_deg)
            }
        }
    }
}

/// A measured skyline with newly measured points in it, in ascending azimuth.
///
/// Within the sweep the new points replace what was; elsewhere the skyline stays exactly as it
/// was, and level where nothing was: just beside the sector's ends it gets a corner on its old
/// line. Of points at one azimuth the highest counts.
pub fn merged(before: &[SkylinePoint], new: &[SkylinePoint], sweep: Sweep) -> Vec<SkylinePoint> {
    let sweep = match sweep {
        Sweep::Points if before.is_empty() => Sweep::around(new),
        sweep => sweep,
    };
    let is_at = |a: f64, b: f64| clockwise_deg(a, b).min(clockwise_deg(b, a)) < BESIDE_DEG;
    let is_new = |azimuth_deg: f64| {
        new.iter()
            .any(|point| is_at(point.azimuth_deg, azimuth_deg))
    };
    let mut points: Vec<SkylinePoint> = before
        .iter()
        .filter(|point| !sweep.holds(point.azimuth_deg) && !is_new(point.azimuth_deg))
        .copied()
        .collect();
    if let Sweep::Sector { from_deg, to_deg } = sweep
        && clockwise_deg(from_deg, to_deg) < 360.0 - 2.0 * BESIDE_DEG
    {
        for beside_deg in [from_deg - BESIDE_DEG, to_deg + BESIDE_DEG] {
            let azimuth_deg = beside_deg.rem_euclid(360.0);
            let has_corner = points.iter().any(|p| is_at(p.azimuth_deg, azimuth_deg));
            if !has_corner {
                points.push(SkylinePoint {
                    azimuth_deg,
                    altitude_deg: altitude_deg(before, azimuth_deg),
                });
            }
        }
    }
    points.extend(new);
    points.sort_by(|a, b| {
        let azimuth = a.azimuth_deg.total_cmp(&b.azimuth_deg);
        azimuth.then(b.altitude_deg.total_cmp(&a.altitude_deg))
    });
    points.dedup_by(|later, earlier| later.azimuth_deg == earlier.azimuth_deg);
    points
}

/// Altitude of a measured skyline, straight between its points and level where there are none;
/// unlike the skyline that is planned with, not raised to 0.
fn altitude_deg(points: &[SkylinePoint], azimuth_deg: f64) -> f64 {
    let after = points.partition_point(|point| point.azimuth_deg <= azimuth_deg);
    let (Some(first), Some(last)) = (points.first(), points.last()) else {
        return 0.0;
    };
    let start = if after == 0 { last } else { &points[after - 1] };
    let end = points.get(after).unwrap_or(first);
    let width_deg = clockwise_deg(start.azimuth_deg, end.azimuth_deg);
    if width_deg == 0.0 {
        return start.altitude_deg;
    }
    let share = clockwise_deg(start.azimuth_deg, azimuth_deg) / width_deg;
    start.altitude_deg + share * (end.altitude_deg - start.altitude_deg)
}

/// How far clockwise from one azimuth to another, [0, 360).
fn clockwise_deg(from_deg: f64, to_deg: f64) -> f64 {
    let turned_deg = (to_deg - from_deg).rem_euclid(360.0);
    if turned_deg >= 360.0 { 0.0 } else { turned_deg }
}
