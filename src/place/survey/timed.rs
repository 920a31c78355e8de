//! The sky as the measuring instrument: when a body went behind something, and where the Sun
//! casts the shadow of a pole.

use super::super::SkylinePoint;
use super::compass::North;
use super::height::{self, Estimate, Slips};
use super::{SurveyError, skyline_point, within};
use crate::measure::{Angle, Moment};
use crate::sky::{Body, Ephemeris, Observer, Refracted};

/// A noted moment.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Noted {
    /// When.
    pub moment: Moment,
    /// How far the clock or the eye may be off either way, s, [0, 1800].
    pub uncertainty_s: f64,
}

/// A skyline's point from the moment at which a body met it.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct TimedPoint {
    /// Azimuth of the body's centre.
    pub azimuth: Angle,
    /// Refracted altitude of the point of the body that counts where windows are planned:
    /// planets' centres, the upper limb of the Moon and the Sun.
    pub altitude: Angle,
    /// The most that the body moves in azimuth within the uncertainty.
    pub azimuth_error: Angle,
    /// The most that it moves in altitude within the uncertainty.
    pub altitude_error: Angle,
    /// The body was the Sun, which nobody may look at: the last of it behind the edge is taken
    /// from where the light leaves the ground or a sheet of paper. Whoever shows this point must
    /// say so.
    pub is_sun: bool,
}

/// The skyline's point that a body met, rising or setting.
///
/// Its own error is that of the place of the body (below 1 arcsecond) and of the refraction,
/// which near the level horizon may differ from the formula by some arcminutes.
///
/// # Errors
/// The uncertainty is out of range, the moment lies outside the supported years, or the body
/// stood more than 3 degrees below the level then.
pub fn met_skyline(
    ephemeris: &Ephemeris,
    observer: &Observer,
    body: Body,
    noted: &Noted,
) -> Result<TimedPoint, SurveyError> {
    let has_limb = matches!(body, Body::Sun | Body::Moon);
    let (at, error) = seen(ephemeris, observer, body, has_limb, noted)?;
    let lowest = Angle::from_degrees(-3.0);
    if at.altitude < lowest {
        return Err(SurveyError(format!(
            "the body stood {:.1} degrees below the level then: check the date, the time and \
             whether it was {body}",
            -at.altitude.degrees()
        )));
    }
    Ok(TimedPoint {
        azimuth: at.azimuth,
        altitude: at.altitude,
        azimuth_error: error.azimuth,
        altitude_error: error.altitude,
        is_sun: body == Body::Sun,
    })
}

impl TimedPoint {
    /// As a point of a measured skyline.
    ///
    /// # Errors
    /// Never for a point that [`met_skyline`] made.
    pub fn skyline_point(&self) -> Result<SkylinePoint, SurveyError> {
        skyline_point(self.azimuth, self.altitude)
    }

    /// Height over the ground of what the body met, at a known distance; the slip of angle is
    /// the body's motion within the uncertainty.
    ///
    /// # Errors
    /// As [`height::by_angle`].
    pub fn height(
        &self,
        distance_m: f64,
        eye_height_m: f64,
        slip_m: f64,
    ) -> Result<Estimate, SurveyError> {
        let slips = Slips {
            distance_m: slip_m,
            angle: self.altitude_error,
        };
        height::by_angle(distance_m, self.altitude, eye_height_m, &slips)
    }
}

/// The direction of the shadow of an upright pole.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct ShadowBearing {
    /// Azimuth in which the shadow lies, from the pole's foot to its tip, [0°, 360°).
    pub azimuth: Angle,
    /// The most that the shadow turns within the uncertainty.
    pub error: Angle,
    /// Refracted altitude of the Sun's centre.
    pub sun_altitude: Angle,
}

/// Where the shadow of an upright pole lies at a noted time: opposite the Sun.
///
/// # Errors
/// As [`met_skyline`], or the Sun was down, or it stood so high (above 80 degrees) that the
/// shadow is too short to give a direction.
pub fn shadow_bearing(
    ephemeris: &Ephemeris,
    observer: &Observer,
    noted: &Noted,
) -> Result<ShadowBearing, SurveyError> {
    let (sun, error) = seen(ephemeris, observer, Body::Sun, false, noted)?;
    let altitude_deg = sun.altitude.degrees();
    if altitude_deg < 0.0 {
        return Err(SurveyError(format!(
            "the Sun stood {:.1} degrees below the level then and cast no shadow: check the date \
             and the time",
            -altitude_deg
        )));
    }
    if altitude_deg > 80.0 {
        return Err(SurveyError(format!(
            "the Sun stood {altitude_deg:.1} degrees high then, and the shadow is too short to \
             give a direction: take it earlier or later in the day"
        )));
    }
    Ok(ShadowBearing {
        azimuth: (sun.azimuth + Angle::from_degrees(180.0)).wrapped(),
        error: error.azimuth,
        sun_altitude: sun.altitude,
    })
}

impl ShadowBearing {
    /// The declination that puts this compass right, east positive: the Earth's together with
    /// the compass's own deviation.
    pub fn declination(&self, reading: Angle) -> Angle {
        (self.azimuth - reading).signed()
    }

    /// That declination as the north which the compass's bearings count from.
    pub fn north(&self, reading: Angle) -> North {
        North::Magnetic {
            declination: self.declination(reading),
        }
    }

    /// How far the shadow's tip lies off the direction if the pole leans sideways by so much.
    pub fn error_of_lean(&self, lean: Angle) -> Angle {
        Angle::from_radians((lean.tan() * self.sun_altitude.tan()).atan()).abs()
    }
}

/// Where a body (or its upper limb) was seen, and how far it moves within the uncertainty.
fn seen(
    ephemeris: &Ephemeris,
    observer: &Observer,
    body: Body,
    is_limb: bool,
    noted: &Noted,
) -> Result<(Refracted, Refracted), SurveyError> {
    let uncertainty_s = noted.uncertainty_s;
    within("the uncertainty", uncertainty_s, 0.0, 1800.0, "seconds")?;
    let [early, late] = [-uncertainty_s, uncertainty_s].map(|s| noted.moment.plus_seconds(s));
    let span = ephemeris
        .cover(early.tt(), late.tt(), &[body])
        .map_err(|outside| SurveyError(outside.to_string()))?;
    let place = |moment| {
        let epoch = span.at(moment);
        let view = epoch.seen_by(observer);
        if is_limb {
            view.refracted_upper_limb(body)
        } else {
            view.refracted_place(body)
        }
    };
    let at = place(noted.moment);
    let ends = [place(early), place(late)];
    let largest = |off: &dyn Fn(&Refracted) -> Angle| {
        let [a, b] = [off(&ends[0]).radians().abs(), off(&ends[1]).radians().abs()];
        Angle::from_radians(a.max(b))
    };
    let error = Refracted {
        azimuth: largest(&|end| (end.azimuth - at.azimuth).signed()),
        altitude: largest(&|end| end.altitude - at.altitude),
    };
    Ok((at, error))
}
