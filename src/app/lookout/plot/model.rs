//! The clearance of the bright bodies through the shown span.

use crate::app::lookout::model::{Tracks, shown_span};
use crate::app::scene::Scene;
use crate::light::Standing;
use crate::measure::Moment;
use crate::plan::Half;
use crate::sky::Body;

/// The curves. Times are minutes from the origin.
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
    /// The greatest clearance of any curve, degrees.
    pub highest_deg: f64,
    /// The chosen body's curve, then the others'.
    pub curves: Vec<Curve>,
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

/// One body's clearance while it is above the horizon: pieces of (minutes, degrees).
#[derive(Clone, Debug, PartialEq)]
pub struct Curve {
    /// Which.
    pub body: Body,
    /// Unbroken pieces.
    pub pieces: Vec<Vec<[f64; 2]>>,
}

impl Model {
    /// The curves of the scene's half-night.
    pub fn new(scene: &Scene<'_>, tracks: &Tracks) -> Self {
        let (from_s, to_s) = shown_span(scene);
        let sun = &scene.night.sun;
        let at_s = |moment: Moment| moment.seconds_since(tracks.start);
        let (origin, origin_s) = match (scene.half, sun.set, sun.rise) {
            (Half::Dusk, Some(set), _) => (Origin::Sunset, at_s(set)),
            (Half::Dawn, _, Some(rise)) => (Origin::Sunrise, at_s(rise)),
            _ => (Origin::Start, 0.0),
        };
        let minutes = |at_s: f64| (at_s - origin_s) / 60.0;
        let others = Body::BRIGHT.iter().filter(|body| **body != scene.body);
        let curves: Vec<Curve> = std::iter::once(&scene.body)
            .chain(others)
            .map(|body| {
                let shown = tracks
                    .body(*body)
                    .iter()
                    .filter(|sample| sample.at_s >= from_s && sample.at_s <= to_s);
                let mut pieces: Vec<Vec<[f64; 2]>> = Vec::new();
                let mut is_joined = false;
                for sample in shown {
                    let is_up = sample.standing != Standing::Down;
                    if is_up && !is_joined {
                        pieces.push(Vec::new());
                    }
                    if let (true, Some(piece)) = (is_up, pieces.last_mut()) {
                        piece.push([minutes(sample.at_s), sample.clearance.degrees()]);
                    }
                    is_joined = is_up;
                }
                Curve {
                    body: *body,
                    pieces,
                }
            })
            .collect();
        let highest_deg = curves
            .iter()
            .flat_map(|curve| curve.pieces.iter().flatten())
            .map(|[_, clearance_deg]| *clearance_deg)
            .fold(10.0, f64::max);
        Self {
            origin,
            origin_s,
            from_min: minutes(from_s),
            to_min: minutes(to_s),
            highest_deg,
            curves,
        }
    }
}
