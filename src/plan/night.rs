//! One night at one spot: from the Sun's highest point on a date to its next.

use super::{NightSky, Sight};
use crate::light::{Eye, LightError};
use crate::measure::{Angle, DateOutOfRange, Moment, TimeScales};
use crate::place::Skyline;
use crate::sky::{Body, Ephemeris, Observer};
use chrono::NaiveDate;
use chrono_tz::Tz;
use std::fmt;

/// The two halves of a night.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, serde::Serialize, serde::Deserialize)]
#[serde(rename_all = "lowercase")]
pub enum Half {
    /// From the Sun's highest point to its lowest.
    Dusk,
    /// From its lowest to its next highest.
    Dawn,
}

/// What a night is asked for.
#[derive(Clone, Copy, Debug)]
pub struct NightRequest<'a> {
    /// Where from.
    pub observer: &'a Observer,
    /// What blocks the view there.
    pub skyline: &'a Skyline,
    /// Civil zone that the date is counted in.
    pub zone: Tz,
    /// The evening's date.
    pub date: NaiveDate,
    /// How civil time leads to TT.
    pub scales: TimeScales,
    /// How the sky is lit and whose eyes look.
    pub sight: &'a Sight,
    /// Which eyes; for none, no windows are looked for.
    pub eyes: &'a [Eye],
    /// Which bodies; the Sun and the Moon are always planned.
    pub bodies: &'a [Body],
}

/// A night: every moment of it that matters.
#[derive(Clone, Debug)]
pub struct Night {
    /// The evening's date.
    pub date: NaiveDate,
    /// The Sun's upper culmination that begins it.
    pub start: Moment,
    /// The Sun's lower culmination, where dusk ends and dawn begins.
    pub middle: Moment,
    /// The next upper culmination.
    pub end: Moment,
    /// The Sun's times.
    pub sun: SunTimes,
    /// The bodies asked for and the Moon, in the order of [`Body::ALL`].
    pub bodies: Vec<BodyNight>,
    /// When optics may be uncapped.
    pub optics: OpticsTimes,
}

/// The Sun's times; `None` where one does not occur between start and end.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
#[allow(missing_docs)]
pub struct SunTimes {
    pub set: Option<Moment>,
    pub civil_dusk: Option<Moment>,
    pub nautical_dusk: Option<Moment>,
    pub astronomical_dusk: Option<Moment>,
    pub astronomical_dawn: Option<Moment>,
    pub nautical_dawn: Option<Moment>,
    pub civil_dawn: Option<Moment>,
    pub rise: Option<Moment>,
    /// Airless altitude of the Sun's centre at its highest (start) and lowest (middle) point.
    pub highest: Angle,
    pub lowest: Angle,
}

/// One body through a night.
#[derive(Clone, Debug)]
pub struct BodyNight {
    /// Which.
    pub body: Body,
    /// Risings over a level horizon by convention (airless -34', the Moon's upper limb).
    pub rise: Vec<Moment>,
    /// Settings, by the same convention.
    pub set: Vec<Moment>,
    /// Whether it is above that horizon when the night begins; with no rising and no setting
    /// it then never sets, or else never rises.
    pub is_up_at_start: bool,
    /// Whether it stands clear of the skyline when the night begins.
    pub is_clear_at_start: bool,
    /// Where it clears or goes behind the skyline, in order.
    pub skyline_events: Vec<SkylineEvent>,
    /// Its windows for each of the eyes: read them with [`BodyNight::windows`] and
    /// [`BodyNight::windows_in`].
    pub(super) eyes: Vec<EyeWindows>,
}

/// One eye's windows for one body, each list in order.
#[derive(Clone, Debug)]
pub(super) struct EyeWindows {
    pub eye: Eye,
    pub night: Vec<Window>,
    pub dusk: Vec<Window>,
    pub dawn: Vec<Window>,
}

/// A body clearing the skyline or going behind it.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct SkylineEvent {
    /// When.
    pub moment: Moment,
    /// Whether it comes into view there, or else goes out of it.
    pub clears: bool,
    /// Azimuth of its centre.
    pub azimuth: Angle,
    /// Refracted altitude of the point that counts (planet's centre, Moon's upper limb).
    pub altitude: Angle,
}

/// Why a window starts or ends.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Cause {
    /// The Sun's light in the sky.
    Twilight,
    /// The Moon's.
    Moonlight,
    /// The air before it: rising extinction is the larger loss.
    Haze,
    /// Something on the skyline.
    Skyline,
    /// The horizon, where nothing stands above it.
    Horizon,
    /// The boundary between dusk and dawn, where one half is asked for.
    Half,
    /// The Sun's highest point: the night's edge.
    Noon,
}

impl Cause {
    /// The name used in files and on the command line.
    pub const fn name(self) -> &'static str {
        match self {
            Self::Twilight => "twilight",
            Self::Moonlight => "moonlight",
            Self::Haze => "haze",
            Self::Skyline => "skyline",
            Self::Horizon => "horizon",
            Self::Half => "half",
            Self::Noon => "noon",
        }
    }
}

/// One end of a window.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Edge {
    /// When.
    pub moment: Moment,
    /// Why.
    pub cause: Cause,
}

/// How far an end may stray as haze and eyes differ within [`crate::light::Spread`].
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Stray {
    /// At the earliest.
    pub earliest: Option<Moment>,
    /// At the latest.
    pub latest: Option<Moment>,
}

/// An unbroken interval in which a body is plain for an eye.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Window {
    /// Whose eye.
    pub eye: Eye,
    /// Its start.
    pub start: Edge,
    /// How early and how late that may come. `latest` is `None` where the harshest air and eye
    /// miss the body altogether.
    pub start_stray: Stray,
    /// Its end.
    pub end: Edge,
    /// How early and how late that may come. `earliest` is `None` where the harshest air and eye
    /// miss the body altogether.
    pub end_stray: Stray,
    /// The moment to show it at.
    pub best: Best,
}

/// The moment to show a body at: where the lesser of two merits is greatest, the clearance
/// counted in fists (10°) and the margin counted in hundreds of light (5 magnitudes). So a body that sinks into a
/// darkening sky is shown while it still stands clear, in a sky that has begun to deepen.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Best {
    /// When.
    pub moment: Moment,
    /// Azimuth of the centre.
    pub azimuth: Angle,
    /// Refracted altitude of the point that counts.
    pub altitude: Angle,
    /// That altitude above the skyline.
    pub clearance: Angle,
    /// Magnitudes by which it outshines the eye's threshold.
    pub margin_mag: f64,
    /// The lesser of the two merits.
    pub merit: f64,
}

/// When optics may be uncapped, erring against the user.
///
/// The horizon is the lowest one that the Sun could be seen over: the sea's dip from the site's
/// elevation, never helped by trees or roofs. The upper limb is wholly below it; then follows
/// the longer of 5 minutes and 1° of depression at dusk, and 10 minutes and 2° before the limb's
/// return at dawn; rounded to whole minutes of the local clock, later at dusk and earlier at
/// dawn. Source: common practice of public observing; local rules come first.
///
/// `None`: no optics time in that half. Where the Sun is that low already when the night begins
/// (polar night), `from` is the night's start; `until` its end likewise.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct OpticsTimes {
    /// From, at dusk.
    pub from: Option<Moment>,
    /// Until, at dawn.
    pub until: Option<Moment>,
}

/// Why a night cannot be planned.
#[derive(Clone, Debug, PartialEq)]
pub enum NightError {
    /// The date lies outside the supported years.
    OutOfRange(DateOutOfRange),
    /// The date does not exist in that zone (skipped at the date line).
    NoSuchDate {
        /// The date.
        date: NaiveDate,
        /// The zone.
        zone: Tz,
    },
    /// The site's air, sky or kit is beyond what the light model takes.
    Light(LightError),
}

impl fmt::Display for NightError {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Self::OutOfRange(error) => error.fmt(f),
            Self::Light(error) => error.fmt(f),
            Self::NoSuchDate { date, zone } => {
                write!(
                    f,
                    "the date {date} does not exist in the zone {zone}: it was skipped there"
                )
            }
        }
    }
}

impl std::error::Error for NightError {}

impl From<LightError> for NightError {
    fn from(error: LightError) -> Self {
        Self::Light(error)
    }
}

impl Night {
    /// Plans a night; to plan it for several skylines, keep the [`NightSky`].
    ///
    /// # Errors
    /// The date does not exist in the zone, or lies outside the supported years.
    pub fn plan(ephemeris: &Ephemeris, request: &NightRequest<'_>) -> Result<Self, NightError> {
        Ok(NightSky::new(ephemeris, request)?.behind(request.skyline))
    }
    /// What a body does in it.
    pub fn body(&self, body: Body) -> Option<&BodyNight> {
        self.bodies.iter().find(|night| night.body == body)
    }
    /// Start and end of one half.
    pub fn half(&self, half: Half) -> (Moment, Moment) {
        match half {
            Half::Dusk => (self.start, self.middle),
            Half::Dawn => (self.middle, self.end),
        }
    }
}

impl BodyNight {
    /// Its windows for an eye through the whole night, in order; none for an eye that was not
    /// asked for.
    pub fn windows(&self, eye: Eye) -> &[Window] {
        self.of_eye(eye).map_or(&[], |windows| &windows.night)
    }
    /// The same within one half, cut at the half's ends with [`Cause::Half`], each with the best
    /// moment of that half.
    pub fn windows_in(&self, eye: Eye, half: Half) -> &[Window] {
        self.of_eye(eye).map_or(&[], |windows| match half {
            Half::Dusk => &windows.dusk,
            Half::Dawn => &windows.dawn,
        })
    }
    fn of_eye(&self, eye: Eye) -> Option<&EyeWindows> {
        self.eyes.iter().find(|windows| windows.eye == eye)
    }
}
