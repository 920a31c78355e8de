//! What the fade shows of a half-night. Nothing here depends on the moment.

use crate::app::lookout::model::{Sample, Tick, Tracks, shown_span, ticks};
use crate::app::scene::Scene;
use crate::light::Standing;
use crate::measure::Moment;
use crate::plan::{BodyNight, Cause, Edge, Half, Window};
use crate::sky::Body;
use crate::words::spoken_cause;

/// The fade of one half-night. Times are seconds after its start.
#[derive(Clone, Debug, PartialEq)]
pub struct Model {
    /// The part of the half-night that is shown.
    pub from_s: f64,
    /// Its end.
    pub to_s: f64,
    /// Sunset or sunrise and the twilights, in time order.
    pub marks: Vec<Mark>,
    /// The whole local ten minutes.
    pub ticks: Vec<Tick>,
    /// The chosen body's lane, then the others' in their usual order.
    pub lanes: Vec<Lane>,
    /// The clearance that fills a lane's height, degrees.
    pub full_deg: f64,
}

/// One of the Sun's times.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Mark {
    /// When.
    pub at_s: f64,
    /// What.
    pub kind: MarkKind,
}

/// Which of the Sun's times.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
#[allow(missing_docs)]
pub enum MarkKind {
    Sunset,
    Sunrise,
    Civil,
    Nautical,
    Astronomical,
}

/// One body's way through the shown span.
#[derive(Clone, Debug, PartialEq)]
pub struct Lane {
    /// Which.
    pub body: Body,
    /// Minute by minute.
    pub points: Vec<Point>,
    /// Its windows' ends within the span, in time order.
    pub ends: Vec<End>,
    /// Why it has no window, if it has none.
    pub absence: Option<Absence>,
}

/// A body's clearance at one minute.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Point {
    /// When.
    pub at_s: f64,
    /// Above the skyline, degrees.
    pub clearance_deg: f64,
    /// What the body is then.
    pub standing: Standing,
}

/// One end of a window.
#[derive(Clone, Debug, PartialEq)]
pub struct End {
    /// When.
    pub at_s: f64,
    /// Why.
    pub cause: Cause,
    /// The same as it is told: see [`spoken_cause`].
    pub spoken: &'static str,
    /// Whether the window ends there, or else starts.
    pub is_end: bool,
    /// How far it may stray, where the sky's light or the air is the cause.
    pub stray: Option<Stray>,
    /// What stands there, where the skyline is the cause and what stands there has a name.
    pub obstacle: Option<String>,
}

/// How far an end that the light decides may stray as haze and eyes differ.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Stray {
    /// Between two times.
    Between(f64, f64),
    /// As far as this time in the kindest air; in the harshest the body is not seen at all.
    OrNotAtAll(f64),
}

impl Stray {
    /// `None` for what the light does not decide, and for a minute or less.
    fn of(window: &Window, is_end: bool, at_s: impl Fn(Moment) -> f64) -> Option<Self> {
        const TOLD_FROM_S: f64 = 60.0;
        let (edge, stray) = if is_end {
            (window.end, window.end_stray)
        } else {
            (window.start, window.start_stray)
        };
        match edge.cause {
            Cause::Twilight | Cause::Haze | Cause::Moonlight => {}
            Cause::Skyline | Cause::Horizon | Cause::Half | Cause::Noon => return None,
        }
        let (kindest, harshest) = if is_end {
            (stray.latest, stray.earliest)
        } else {
            (stray.earliest, stray.latest)
        };
        let kindest_s = at_s(kindest?);
        let Some(harshest_s) = harshest.map(at_s) else {
            return Some(Self::OrNotAtAll(kindest_s));
        };
        let (from_s, to_s) = (kindest_s.min(harshest_s), kindest_s.max(harshest_s));
        (to_s - from_s > TOLD_FROM_S).then_some(Self::Between(from_s, to_s))
    }
}

/// Why a body is not seen in the shown span.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Absence {
    /// Below the horizon throughout.
    Down,
    /// Behind the skyline whenever it is up.
    Hidden,
    /// In too bright a sky whenever it is clear.
    WashedOut,
}

impl Model {
    /// The fade of the scene's half-night.
    pub fn new(scene: &Scene<'_>, tracks: &Tracks) -> Self {
        /// The range of what fills a lane: neither is a low body made a mountain, nor a high one
        /// let everything else shrink to nothing.
        const FULL_DEG: (f64, f64) = (16.0, 45.0);
        let (from_s, to_s) = shown_span(scene);
        let others = Body::BRIGHT.iter().filter(|body| **body != scene.body);
        let lanes: Vec<Lane> = std::iter::once(&scene.body)
            .chain(others)
            .map(|body| Lane::new(scene, tracks, *body, from_s, to_s))
            .collect();
        let highest = lanes
            .iter()
            .flat_map(|lane| lane.points.iter().map(|point| point.clearance_deg))
            .fold(0.0, f64::max);
        Self {
            from_s,
            to_s,
            marks: marks(scene, tracks, from_s, to_s),
            ticks: ticks(tracks, scene.scales, scene.zone, from_s, to_s),
            lanes,
            full_deg: highest.clamp(FULL_DEG.0, FULL_DEG.1),
        }
    }
}

impl Lane {
    fn new(scene: &Scene<'_>, tracks: &Tracks, body: Body, from_s: f64, to_s: f64) -> Self {
        let points: Vec<Point> = tracks
            .body(body)
            .iter()
            .filter(|sample| sample.at_s >= from_s && sample.at_s <= to_s)
            .map(Point::of)
            .collect();
        let night = scene.night.body(body);
        let windows = night.map_or(&[][..], |night| night.windows_in(scene.eye, scene.half));
        let ends: Vec<End> = windows
            .iter()
            .flat_map(|window| [(window, window.start, false), (window, window.end, true)])
            .filter_map(|(window, edge, is_end)| {
                let since_start = |moment: Moment| moment.seconds_since(tracks.start);
                let at_s = since_start(edge.moment);
                let spoken = spoken_cause(scene.night, edge);
                let is_within = at_s >= from_s - 1.0 && at_s <= to_s + 1.0;
                is_within.then(|| End {
                    at_s,
                    cause: edge.cause,
                    spoken,
                    is_end,
                    stray: Stray::of(window, is_end, since_start)
                        .filter(|_| spoken == edge.cause.name()),
                    obstacle: night.and_then(|night| obstacle(scene, night, edge)),
                })
            })
            .collect();
        let absence = absence(&points);
        Self {
            body,
            points,
            ends,
            absence,
        }
    }
}

impl Point {
    fn of(sample: &Sample) -> Self {
        Self {
            at_s: sample.at_s,
            clearance_deg: sample.clearance.degrees(),
            standing: sample.standing,
        }
    }
}

/// What a body goes behind, or comes out from, at a window's edge.
fn obstacle(scene: &Scene<'_>, night: &BodyNight, edge: Edge) -> Option<String> {
    if edge.cause != Cause::Skyline {
        return None;
    }
    let event = night
        .skyline_events
        .iter()
        .find(|event| event.moment.seconds_since(edge.moment).abs() < 1.0)?;
    let label = scene.skyline.hides(event.azimuth, event.altitude);
    label.map(str::to_owned)
}

fn absence(points: &[Point]) -> Option<Absence> {
    let has = |standing| points.iter().any(|point| point.standing == standing);
    if has(Standing::Plain) {
        None
    } else if has(Standing::WashedOut) {
        Some(Absence::WashedOut)
    } else if has(Standing::Blocked) {
        Some(Absence::Hidden)
    } else {
        Some(Absence::Down)
    }
}

fn marks(scene: &Scene<'_>, tracks: &Tracks, from_s: f64, to_s: f64) -> Vec<Mark> {
    let sun = &scene.night.sun;
    let times: [(Option<Moment>, MarkKind); 4] = match scene.half {
        Half::Dusk => [
            (sun.set, MarkKind::Sunset),
            (sun.civil_dusk, MarkKind::Civil),
            (sun.nautical_dusk, MarkKind::Nautical),
            (sun.astronomical_dusk, MarkKind::Astronomical),
        ],
        Half::Dawn => [
            (sun.astronomical_dawn, MarkKind::Astronomical),
            (sun.nautical_dawn, MarkKind::Nautical),
            (sun.civil_dawn, MarkKind::Civil),
            (sun.rise, MarkKind::Sunrise),
        ],
    };
    times
        .into_iter()
        .filter_map(|(moment, kind)| {
            let at_s = moment?.seconds_since(tracks.start);
            (at_s >= from_s && at_s <= to_s).then_some(Mark { at_s, kind })
        })
        .collect()
}
