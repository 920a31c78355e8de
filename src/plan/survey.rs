//! Going through a night: culminations, the Sun's times, each body's path and light.

use super::bright::Looked;
use super::lit::Lit;
use super::night::{Night, NightError, NightRequest, SunTimes};
use super::night_sky::{BodySky, NightSky};
use super::path::Path;
use super::track::{Sample, Track, Watch};
use super::{Half, optics};
use crate::measure::{Angle, DateOutOfRange, Moment, check_date, civil, search};
use crate::sky::{Body, Ephemeris, OutsideEphemeris, Span};

/// The refraction that the convention for rising and setting takes at the horizon.
const HORIZON_REFRACTION: Angle = Angle::from_arcmin(34.0);
/// The Sun's centre at rising and setting by convention: 34' of refraction and 16' of radius.
pub(super) const SUN_RISE_SET: Angle = Angle::from_arcmin(-50.0);

const SECONDS_PER_HOUR: f64 = 3600.0;

/// Goes through a night ([`NightSky::new`]).
pub(super) fn survey(
    ephemeris: &Ephemeris,
    request: &NightRequest<'_>,
) -> Result<NightSky, NightError> {
    let culminations = Culminations::find(ephemeris, request)?;
    let Culminations {
        span,
        start,
        middle,
        end,
    } = culminations;
    let watch = Watch {
        span: &span,
        observer: request.observer,
        start,
    };
    let length_s = end.seconds_since(start);

    let sun = Track::new(watch, Body::Sun, length_s);
    let bare = Night {
        date: request.date,
        start,
        middle,
        end,
        sun: sun_times(&sun, middle),
        bodies: Vec::new(),
        optics: optics::optics_times(&sun, middle, request),
    };
    let lit = Lit::new(watch, request.sight, dark_part_s(&bare, request));
    let bodies = Body::ALL
        .into_iter()
        .filter(|body| *body == Body::Moon || request.bodies.contains(body))
        .filter(|body| *body != Body::Sun)
        .map(|body| {
            let track = Track::new(watch, body, length_s);
            body_sky(&track, &lit, &bare, request)
        })
        .collect();
    Ok(NightSky {
        bare,
        bodies,
        observer: *request.observer,
        sight: request.sight.clone(),
        span,
    })
}

/// The Sun's three culminations that bound a night and its halves.
struct Culminations {
    span: Span,
    start: Moment,
    middle: Moment,
    end: Moment,
}

impl Culminations {
    /// The upper culmination nearest the middle of the civil date, and the two that follow it.
    ///
    /// The Sun stands in the meridian where its east component vanishes: falling through zero
    /// above the pole (it moves from east to west), rising below it. That holds in every
    /// latitude and, unlike the altitude's turning points, at the poles too, where the altitude
    /// follows the declination alone. The two differ by seconds elsewhere.
    fn find(ephemeris: &Ephemeris, request: &NightRequest<'_>) -> Result<Self, NightError> {
        check_date(request.date).map_err(NightError::OutOfRange)?;
        let noon = civil::middle_of(request.date, request.zone).ok_or(NightError::NoSuchDate {
            date: request.date,
            zone: request.zone,
        })?;
        let noon = request
            .scales
            .moment_from_civil(noon)
            .map_err(NightError::OutOfRange)?;
        let mut bodies = request.bodies.to_vec();
        bodies.extend([Body::Sun, Body::Moon]);
        let span = ephemeris
            .cover(noon.tt().plus_days(-0.6), noon.tt().plus_days(1.6), &bodies)
            .map_err(|OutsideEphemeris { .. }| {
                NightError::OutOfRange(DateOutOfRange {
                    date: request.date.to_string(),
                })
            })?;
        let east_component = |at_s: f64| {
            let epoch = span.at(noon.plus_seconds(at_s));
            let place = epoch.seen_by(request.observer).place(Body::Sun);
            place.altitude.cos() * place.azimuth.sin()
        };
        // Hourly: the component is a sine of one day, its zeros half a day apart.
        let hours = search::grid(
            -13.0 * SECONDS_PER_HOUR,
            38.0 * SECONDS_PER_HOUR,
            SECONDS_PER_HOUR,
        );
        let turns = search::crossings(east_component, &hours, 0.01);
        let nearest = turns
            .iter()
            .filter(|turn| !turn.rising)
            .min_by(|a, b| a.at.abs().total_cmp(&b.at.abs()));
        let after = |at: f64, rising: bool| {
            turns
                .iter()
                .find(|turn| turn.at > at && turn.rising == rising)
        };
        let found = nearest.and_then(|start| {
            let middle = after(start.at, true)?;
            Some((start.at, middle.at, after(middle.at, false)?.at))
        });
        let Some((start, middle, end)) = found else {
            // The Sun crosses the meridian twice a day everywhere on Earth.
            unreachable!("51 hours hold an upper, a lower and an upper culmination of the Sun")
        };
        Ok(Self {
            start: noon.plus_seconds(start),
            middle: noon.plus_seconds(middle),
            end: noon.plus_seconds(end),
            span,
        })
    }
}

/// The Sun's setting, rising and twilights.
fn sun_times(sun: &Track<'_>, middle: Moment) -> SunTimes {
    let times_at = |altitude: Angle| {
        let crossings = sun.crossings(|sample| (sample.airless - altitude).radians());
        // The last descent and the first ascent: near the polar circles the Sun can dip below a
        // limit more than once only through the noons that bound the night.
        let down = crossings
            .iter()
            .rfind(|c| !c.rising)
            .map(|c| sun.watch.moment(c.at));
        let up = crossings
            .iter()
            .find(|c| c.rising)
            .map(|c| sun.watch.moment(c.at));
        (down, up)
    };
    let degrees = |altitude: f64| times_at(Angle::from_degrees(altitude));
    let (set, rise) = times_at(SUN_RISE_SET);
    let (civil_dusk, civil_dawn) = degrees(-6.0);
    let (nautical_dusk, nautical_dawn) = degrees(-12.0);
    let (astronomical_dusk, astronomical_dawn) = degrees(-18.0);
    let altitude_at = |moment: Moment| {
        sun.watch
            .sample(Body::Sun, moment.seconds_since(sun.watch.start))
            .airless
    };
    SunTimes {
        set,
        civil_dusk,
        nautical_dusk,
        astronomical_dusk,
        astronomical_dawn,
        nautical_dawn,
        civil_dawn,
        rise,
        highest: altitude_at(sun.watch.start),
        lowest: altitude_at(middle),
    }
}

/// The part of a night in which eyes are sent looking, seconds after its start: while the Sun is
/// down, and a little beyond.
fn dark_part_s(night: &Night, request: &NightRequest<'_>) -> std::ops::Range<f64> {
    const BEYOND_S: f64 = 600.0;
    let length_s = night.end.seconds_since(night.start);
    let at_s = |moment: Moment| moment.seconds_since(night.start);
    let sun_stays_up = night.sun.set.is_none() && night.sun.highest >= SUN_RISE_SET;
    if request.eyes.is_empty() || sun_stays_up {
        return 0.0..0.0;
    }
    let from_s = night.sun.set.map_or(0.0, |set| at_s(set) - BEYOND_S);
    let to_s = night
        .sun
        .rise
        .map_or(length_s, |rise| at_s(rise) + BEYOND_S);
    from_s.max(0.0)..to_s.min(length_s)
}

fn body_sky(track: &Track<'_>, lit: &Lit<'_>, bare: &Night, request: &NightRequest<'_>) -> BodySky {
    // By convention without the site's air: the centre, or the Moon's upper limb, at -34'.
    let above_horizon =
        |sample: &Sample| (sample.airless + sample.limb + HORIZON_REFRACTION).radians();
    let horizon = track.crossings(above_horizon);
    let moments = |rising: bool| {
        let chosen = horizon.iter().filter(|crossing| crossing.rising == rising);
        chosen
            .map(|crossing| track.watch.moment(crossing.at))
            .collect()
    };
    BodySky {
        body: track.body,
        rise: moments(true),
        set: moments(false),
        is_up_at_start: track
            .samples
            .first()
            .is_some_and(|first| above_horizon(first) >= 0.0),
        eyes: Looked { track, lit, bare }.eyes(request.eyes),
        path: Path::of(track),
    }
}

impl Half {
    /// The other half of the same night.
    pub const fn other(self) -> Self {
        match self {
            Self::Dusk => Self::Dawn,
            Self::Dawn => Self::Dusk,
        }
    }
}
