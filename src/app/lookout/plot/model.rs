//! The chosen body's margin for each eye through the shown span.

use crate::app::lookout::model::{SUN_RISE_SET, Sample, Tracks, shown_span};
use crate::app::scene::Scene;
use crate::light::{Eye, Standing};
use crate::measure::Moment;
use crate::plan::Half;

/// The curves. Times are minutes from the origin, margins magnitudes.
#[derive(Clone, Debug, PartialEq)]
pub struct Model {
    /// What the minutes are counted from.
    pub origin: Origin,
    /// The origin's time, seconds after the half-night's start.
    pub origin_s: f64,
    /// The shown span, minutes.
    pub from_min: f64,
    /// Its end.
    pub to_min: f64,
    /// The part of it in which the Sun is up: nobody is sent looking then.
    pub daylight_min: Option<(f64, f64)>,
    /// The least margin that is shown.
    pub lowest_mag: f64,
    /// The greatest.
    pub highest_mag: f64,
    /// Each eye's curve, in the order of [`Eye::ALL`].
    pub curves: Vec<Curve>,
    /// What the chosen eye's margin is in the harshest and the kindest air: unbroken pieces of
    /// (minutes, least, greatest).
    pub spread: Vec<Vec<[f64; 3]>>,
}

/// What minutes are counted from.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
#[allow(missing_docs)]
pub enum Origin {
    Sunset,
    Sunrise,
    /// The Sun neither sets nor rises: the half-night's start.
    Start,
}

/// One eye's margin while the body is above the horizon: pieces of (minutes, magnitudes).
/// The margin behind optics is told only while optics may be uncapped.
#[derive(Clone, Debug, PartialEq)]
pub struct Curve {
    /// Whose.
    pub eye: Eye,
    /// Unbroken pieces.
    pub pieces: Vec<Vec<[f64; 2]>>,
}

impl Model {
    /// The curves of the scene's half-night.
    pub fn new(scene: &Scene<'_>, tracks: &Tracks) -> Self {
        let (from_s, to_s) = shown_span(scene);
        let (origin, origin_s) = origin(scene, tracks);
        let minutes = |at_s: f64| (at_s - origin_s) / 60.0;
        let samples: Vec<&Sample> = tracks
            .body(scene.body)
            .iter()
            .filter(|sample| sample.at_s >= from_s && sample.at_s <= to_s)
            .collect();
        let is_told = |eye: Eye, sample: &Sample| {
            sample.standing != Standing::Down
                && (eye != Eye::Optics || is_uncapped(scene, tracks.moment(sample.at_s)))
        };
        let curves: Vec<Curve> = Eye::ALL
            .into_iter()
            .enumerate()
            .map(|(k, eye)| Curve {
                eye,
                pieces: pieces(samples.iter().map(|sample| {
                    let point = [minutes(sample.at_s), sample.margins_mag[k]];
                    (is_told(eye, sample) && point[1].is_finite()).then_some(point)
                })),
            })
            .collect();
        let spread = pieces(samples.iter().map(|sample| {
            let (harshest, kindest) = sample.spread_mag;
            let is_known = harshest.is_finite() && kindest.is_finite();
            (is_told(scene.eye, sample) && is_known).then_some([
                minutes(sample.at_s),
                harshest,
                kindest,
            ])
        }));
        let (lowest_mag, highest_mag) = range(&curves, scene.eye);
        Self {
            origin,
            origin_s,
            from_min: minutes(from_s),
            to_min: minutes(to_s),
            daylight_min: daylight(scene, minutes(from_s), minutes(to_s), origin),
            lowest_mag,
            highest_mag,
            curves,
            spread,
        }
    }
}

fn origin(scene: &Scene<'_>, tracks: &Tracks) -> (Origin, f64) {
    let sun = &scene.night.sun;
    let at_s = |moment: Moment| moment.seconds_since(tracks.start);
    match (scene.half, sun.set, sun.rise) {
        (Half::Dusk, Some(set), _) => (Origin::Sunset, at_s(set)),
        (Half::Dawn, _, Some(rise)) => (Origin::Sunrise, at_s(rise)),
        _ => (Origin::Start, 0.0),
    }
}

/// The part of the shown span in which the Sun is up, minutes.
fn daylight(scene: &Scene<'_>, from: f64, to: f64, origin: Origin) -> Option<(f64, f64)> {
    match origin {
        Origin::Sunset => (from < 0.0).then_some((from, 0.0)),
        Origin::Sunrise => (to > 0.0).then_some((0.0, to)),
        // It stays up, or else down, throughout.
        Origin::Start => (scene.night.sun.highest > SUN_RISE_SET).then_some((from, to)),
    }
}

fn is_uncapped(scene: &Scene<'_>, moment: Moment) -> bool {
    let optics = &scene.night.optics;
    match scene.half {
        Half::Dusk => optics.from.is_some_and(|from| moment >= from),
        Half::Dawn => optics.until.is_some_and(|until| moment <= until),
    }
}

/// Points without those that are missing, broken where one is.
fn pieces<P>(points: impl Iterator<Item = Option<P>>) -> Vec<Vec<P>> {
    let mut pieces: Vec<Vec<P>> = Vec::new();
    let mut is_joined = false;
    for point in points {
        let is_there = point.is_some();
        if is_there && !is_joined {
            pieces.push(Vec::new());
        }
        if let (Some(point), Some(piece)) = (point, pieces.last_mut()) {
            piece.push(point);
        }
        is_joined = is_there;
    }
    pieces
}

/// The range that shows where the curves cross zero: the chosen eye's and the unaided eyes'
/// margins, but neither the depth of full daylight nor all that optics give in the dark.
fn range(curves: &[Curve], chosen: Eye) -> (f64, f64) {
    const LOWEST_MAG: (f64, f64) = (-4.0, -1.0);
    const HIGHEST_MAG: (f64, f64) = (2.0, 12.0);
    let counted = curves
        .iter()
        .filter(|curve| curve.eye != Eye::Optics || chosen == Eye::Optics);
    let (low, high) = counted
        .flat_map(|curve| curve.pieces.iter().flatten())
        .fold((0.0, 0.0), |(low, high): (f64, f64), [_, mag]| {
            (low.min(*mag), high.max(*mag))
        });
    (
        (low - 0.5).clamp(LOWEST_MAG.0, LOWEST_MAG.1),
        (high + 0.5).clamp(HIGHEST_MAG.0, HIGHEST_MAG.1),
    )
}
