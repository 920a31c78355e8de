//! Height and position by pacing or tape, with a clinometer, a stick or a shadow.
//!
//! All of them take the ground from the eye to the foot of the object as level.

use super::super::PlanPoint;
use super::super::Spot;
use super::{SurveyError, within};
use crate::measure::Angle;

/// Longest distance that is measured on foot, m.
const FARTHEST_M: f64 = 10_000.0;

/// Slips of the hand that a measured length is tried with.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Slips {
    /// Of the measured distance, m.
    pub distance_m: f64,
    /// Of each angle of sight.
    pub angle: Angle,
}

impl Default for Slips {
    /// Half a metre and one degree.
    fn default() -> Self {
        Self {
            distance_m: 0.5,
            angle: Angle::from_degrees(1.0),
        }
    }
}

/// A length and what slips of the hand make of it. An error is infinite where a slip of that
/// size would leave nothing to measure.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Estimate {
    /// The length, m.
    pub length_m: f64,
    /// The most that the slip of distance changes it, m.
    pub by_distance_m: f64,
    /// The most that the slip of angle changes it, m.
    pub by_angle_m: f64,
}

impl Estimate {
    /// Both slips together, as the root of the sum of their squares, m.
    pub fn combined_m(&self) -> f64 {
        self.by_distance_m.hypot(self.by_angle_m)
    }

    /// A length as a function of (slip of distance, slip of angle); NaN or infinite where it
    /// cannot be measured so.
    fn new(slips: &Slips, length_m: impl Fn(f64, Angle) -> f64) -> Self {
        let measured_m = length_m(0.0, Angle::ZERO);
        Self {
            length_m: measured_m,
            by_distance_m: largest_change_m(measured_m, slips.distance_m, |slip| {
                length_m(slip, Angle::ZERO)
            }),
            by_angle_m: largest_change_m(measured_m, slips.angle.radians(), |slip| {
                length_m(0.0, Angle::from_radians(slip))
            }),
        }
    }
}

fn largest_change_m(measured_m: f64, slip: f64, length_m: impl Fn(f64) -> f64) -> f64 {
    let change_m = |slip: f64| {
        let change_m = (length_m(slip) - measured_m).abs();
        if change_m.is_nan() {
            f64::INFINITY
        } else {
            change_m
        }
    };
    change_m(slip).max(change_m(-slip))
}

/// Tangent of an angle of sight; no number at or beyond the vertical.
fn slope(angle: Angle) -> f64 {
    if angle.abs().degrees() < 90.0 {
        angle.tan()
    } else {
        f64::NAN
    }
}

fn distance_m(what: &str, value_m: f64) -> Result<f64, SurveyError> {
    if value_m == 0.0 {
        return Err(SurveyError(format!(
            "{what} is 0 m: measure it from where you stood to the foot of the object"
        )));
    }
    within(what, value_m, 0.01, FARTHEST_M, "metres")
}

fn eye_m(value_m: f64) -> Result<f64, SurveyError> {
    within("the eye's height", value_m, 0.0, 200.0, "metres")
}

fn upward(what: &str, angle: Angle) -> Result<f64, SurveyError> {
    let angle_deg = angle.degrees();
    if (-80.0..=89.0).contains(&angle_deg) {
        Ok(angle.tan())
    } else {
        Err(SurveyError(format!(
            "{what} is {angle_deg:.1} degrees, but a height can be told only between -80 and 89: \
             step back from the object"
        )))
    }
}

fn above_ground(estimate: Estimate) -> Result<Estimate, SurveyError> {
    if estimate.length_m > 0.0 {
        Ok(estimate)
    } else {
        Err(SurveyError(format!(
            "that makes a height of {:.2} m, which is not above the ground: check the distance, \
             the angle and the eye's height",
            estimate.length_m
        )))
    }
}

/// The length of one pace, from paces counted along a known distance, m.
///
/// # Errors
/// No paces, or a pace outside [0.2, 2.0] m.
pub fn pace_m(known_m: f64, paces: f64) -> Result<f64, SurveyError> {
    distance_m("the known distance", known_m)?;
    within("the number of paces", paces, 1.0, 100_000.0, "paces")?;
    within("the pace", known_m / paces, 0.2, 2.0, "metres")
}

/// A distance from its paces, m.
///
/// # Errors
/// No paces, or a pace outside [0.2, 2.0] m.
pub fn paced_m(paces: f64, pace_m: f64) -> Result<f64, SurveyError> {
    within("the number of paces", paces, 0.5, 100_000.0, "paces")?;
    within("the pace", pace_m, 0.2, 2.0, "metres")?;
    distance_m("the paced distance", paces * pace_m)
}

/// Height over the ground from the altitude of the top and the distance to below it:
/// eye + distance · tan(altitude).
///
/// # Errors
/// No distance, an altitude of sight outside [-80°, 89°], or a height not above the ground.
pub fn by_angle(
    distance: f64,
    altitude: Angle,
    eye_height_m: f64,
    slips: &Slips,
) -> Result<Estimate, SurveyError> {
    let distance = distance_m("the distance", distance)?;
    let eye_height_m = eye_m(eye_height_m)?;
    upward("the altitude", altitude)?;
    above_ground(Estimate::new(slips, |walked_m, turned| {
        eye_height_m + (distance + walked_m) * slope(altitude + turned)
    }))
}

/// Height from an upright stick held before the eye so that it just covers the object from foot
/// to top: distance · stick / (eye to stick). The slip of angle is that of the sight to the top.
///
/// # Errors
/// A length is zero or out of range.
pub fn by_held_stick(
    distance: f64,
    stick_m: f64,
    eye_to_stick_m: f64,
    eye_height_m: f64,
    slips: &Slips,
) -> Result<Estimate, SurveyError> {
    let distance = distance_m("the distance", distance)?;
    let eye_height_m = eye_m(eye_height_m)?;
    within("the stick's length", stick_m, 0.01, 10.0, "metres")?;
    within(
        "the distance from eye to stick",
        eye_to_stick_m,
        0.05,
        10.0,
        "metres",
    )?;
    let below = eye_height_m / distance;
    let top = Angle::from_radians((stick_m / eye_to_stick_m - below).atan());
    above_ground(Estimate::new(slips, |walked_m, turned| {
        (distance + walked_m) * (slope(top + turned) + below)
    }))
}

/// Height from a stick set upright in the ground, its tip in line with the object's top:
/// eye + (stick - eye) · distance / (eye to stick), both distances from the eye.
///
/// # Errors
/// A length is zero or out of range, or the stick stands beyond the object.
pub fn by_placed_stick(
    distance: f64,
    stick_m: f64,
    eye_to_stick_m: f64,
    eye_height_m: f64,
    slips: &Slips,
) -> Result<Estimate, SurveyError> {
    let distance = distance_m("the distance", distance)?;
    let eye_height_m = eye_m(eye_height_m)?;
    within("the stick's length", stick_m, 0.01, 10.0, "metres")?;
    distance_m("the distance from eye to stick", eye_to_stick_m)?;
    if eye_to_stick_m > distance {
        return Err(SurveyError(format!(
            "the stick stands {eye_to_stick_m} m away, beyond the object at {distance} m: set it \
             between the eye and the object"
        )));
    }
    let top = Angle::from_radians(((stick_m - eye_height_m) / eye_to_stick_m).atan());
    above_ground(Estimate::new(slips, |walked_m, turned| {
        eye_height_m + (distance + walked_m) * slope(top + turned)
    }))
}

/// Height from two shadows of the same minute: the object's shadow · stick / the stick's shadow.
/// The slip of distance is that of the object's shadow, measured from below its top; the slip of
/// angle is how far the stick leans towards or away from the Sun.
///
/// # Errors
/// A length is zero or out of range.
pub fn by_shadow(
    shadow_m: f64,
    stick_m: f64,
    stick_shadow_m: f64,
    slips: &Slips,
) -> Result<Estimate, SurveyError> {
    for (what, length_m) in [
        ("the object's shadow", shadow_m),
        ("the stick's shadow", stick_shadow_m),
    ] {
        if length_m == 0.0 {
            return Err(SurveyError(format!(
                "{what} is 0 m long: a height can be told only from a shadow that can be measured"
            )));
        }
    }
    let shadow_m = within("the object's shadow", shadow_m, 0.01, FARTHEST_M, "metres")?;
    within("the stick's length", stick_m, 0.01, 10.0, "metres")?;
    within("the stick's shadow", stick_shadow_m, 0.01, 1000.0, "metres")?;
    let sun = Angle::from_radians((stick_m / stick_shadow_m).atan());
    above_ground(Estimate::new(slips, |walked_m, turned| {
        (shadow_m + walked_m) * slope(sun + turned)
    }))
}

/// A foot that cannot be reached: its height, and how far from the nearer point it stands.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Unreached {
    /// Height over the ground.
    pub height: Estimate,
    /// Distance from the nearer of the two points.
    pub distance: Estimate,
}

/// Height and distance from two altitudes of the top, taken at the ends of a line that was
/// walked straight towards the object: with the tangents f (far) and n (near) the distance left
/// is walked · f / (n - f), and the height eye + distance · n. Each angle slips on its own; the
/// two are combined as the root of the sum of their squares.
///
/// # Errors
/// Nothing was walked, an altitude lies outside [-80°, 89°], or the top did not rise on the way.
pub fn by_two_angles(
    walked: f64,
    far: Angle,
    near: Angle,
    eye_height_m: f64,
    slips: &Slips,
) -> Result<Unreached, SurveyError> {
    let walked = distance_m("the line walked", walked)?;
    let eye_height_m = eye_m(eye_height_m)?;
    let (far_slope, near_slope) = (
        upward("the altitude at the far point", far)?,
        upward("the altitude at the near point", near)?,
    );
    if far_slope <= 0.0 || near_slope <= far_slope {
        return Err(SurveyError(format!(
            "the top stands at {:.1} degrees from the far point and at {:.1} from the near one: \
             it must be above the level and rise as you walk towards it",
            far.degrees(),
            near.degrees()
        )));
    }
    let distance_m = |walked: f64, far: Angle, near: Angle| {
        let rise = slope(near) - slope(far);
        if rise > 0.0 && slope(far) > 0.0 {
            walked * slope(far) / rise
        } else {
            f64::NAN
        }
    };
    let height_m = |walked: f64, far: Angle, near: Angle| {
        eye_height_m + distance_m(walked, far, near) * slope(near)
    };
    let estimate = |length_m: &dyn Fn(f64, Angle, Angle) -> f64| {
        let of_far = Estimate::new(slips, |step, turned| {
            length_m(walked + step, far + turned, near)
        });
        let of_near = Estimate::new(slips, |_, turned| length_m(walked, far, near + turned));
        Estimate {
            by_angle_m: of_far.by_angle_m.hypot(of_near.by_angle_m),
            ..of_far
        }
    };
    Ok(Unreached {
        height: above_ground(estimate(&height_m))?,
        distance: estimate(&distance_m),
    })
}

/// Where something stands on the plan, seen from a spot.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Position {
    /// The place.
    pub at: PlanPoint,
    /// How far it may be off along the line of sight, m: the slip of distance.
    pub along_m: f64,
    /// How far it may be off across it, m: the slip of angle at that distance.
    pub across_m: f64,
}

impl Position {
    /// Both together, as the root of the sum of their squares, m.
    pub fn combined_m(&self) -> f64 {
        self.along_m.hypot(self.across_m)
    }
}

/// The place at an azimuth and a distance from a spot.
///
/// # Errors
/// No distance, an azimuth that is no number, or a place off the plan (10 km from the mark).
pub fn position(
    spot: &Spot,
    azimuth: Angle,
    distance: f64,
    slips: &Slips,
) -> Result<Position, SurveyError> {
    let distance = distance_m("the distance", distance)?;
    within("the azimuth", azimuth.degrees(), -360.0, 360.0, "degrees")?;
    let (sin, cos) = azimuth.sin_cos();
    let at = PlanPoint {
        east_m: spot.east_m + distance * sin,
        north_m: spot.north_m + distance * cos,
    };
    within(
        "its place east of the mark",
        at.east_m,
        -FARTHEST_M,
        FARTHEST_M,
        "metres",
    )?;
    within(
        "its place north of the mark",
        at.north_m,
        -FARTHEST_M,
        FARTHEST_M,
        "metres",
    )?;
    Ok(Position {
        at,
        along_m: slips.distance_m,
        across_m: distance * slips.angle.tan(),
    })
}

/// The width of something that faces the observer, from the angle between its sides:
/// 2 · distance · tan(angle / 2).
///
/// # Errors
/// No distance, or an angle outside (0°, 170°].
pub fn width(distance: f64, angle: Angle, slips: &Slips) -> Result<Estimate, SurveyError> {
    let distance = distance_m("the distance", distance)?;
    let between = within(
        "the angle between its sides",
        angle.degrees(),
        0.001,
        170.0,
        "degrees",
    )?;
    Ok(Estimate::new(slips, |walked_m, turned| {
        let half = Angle::from_degrees(0.5 * between) + turned / 2.0;
        2.0 * (distance + walked_m) * slope(half)
    }))
}
