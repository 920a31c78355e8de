//! The half-night in one sentence that a host could read aloud.

use super::scene::Scene;
use super::wording::Words;
use crate::measure::Moment;
use crate::plan::{Cause, Edge, Window};

/// When the chosen body is seen, why then, and when best; or why not.
pub fn sentence(scene: &Scene<'_>, words: &Words) -> String {
    let Some(body) = scene.night.body(scene.body) else {
        return String::new();
    };
    let windows = body.windows_in(scene.half);
    let Some(best) = windows
        .iter()
        .max_by(|a, b| a.best.merit.total_cmp(&b.best.merit))
    else {
        return words.text_with(why_not(scene), &[("body", &words.body_aloud(scene.body))]);
    };
    let mut parts = vec![window_sentence(scene, words, best)];
    for other in windows.iter().filter(|window| *window != best) {
        let (start, end) = (
            words.time(scene, other.start.moment),
            words.time(scene, other.end.moment),
        );
        parts.push(words.text_with("sentence-also", &[("start", &start), ("end", &end)]));
    }
    let time = words.time(scene, best.best.moment);
    let altitude = words.degrees(best.best.altitude, 0);
    parts.push(words.text_with("sentence-best", &[("time", &time), ("altitude", &altitude)]));
    parts.join(" ")
}

fn window_sentence(scene: &Scene<'_>, words: &Words, window: &Window) -> String {
    let (start, end) = (window.start, window.end);
    words.text_with(
        "sentence-window",
        &[
            ("body", &words.body_aloud(scene.body)),
            ("start", &words.time(scene, start.moment)),
            ("startcause", start.cause.name()),
            ("startwhat", &what_stands_there(scene, words, start)),
            ("end", &words.time(scene, end.moment)),
            ("endcause", end.cause.name()),
            ("endwhat", &what_stands_there(scene, words, end)),
        ],
    )
}

/// What the body clears or goes behind at a window's end.
fn what_stands_there(scene: &Scene<'_>, words: &Words, edge: Edge) -> String {
    let is_here = |moment: Moment| moment.seconds_since(edge.moment).abs() < 1.0;
    let event = (edge.cause == Cause::Skyline)
        .then(|| scene.night.body(scene.body))
        .flatten()
        .and_then(|body| body.skyline_events.iter().find(|e| is_here(e.moment)));
    let label = event.and_then(|event| scene.skyline.label(event.azimuth));
    match label {
        Some(label) => words.text_with("the-obstacle", &[("label", label)]),
        None => words.text("the-skyline"),
    }
}

/// The message for a half-night in which the body is not seen.
fn why_not(scene: &Scene<'_>) -> &'static str {
    const STEP_S: f64 = 300.0;
    let (start, end) = scene.ends();
    let length_s = end.seconds_since(start);
    let mut is_ever_up = false;
    let mut is_ever_clear = false;
    for at_s in crate::measure::search::grid(0.0, length_s, STEP_S) {
        let epoch = scene.span.at(start.plus_seconds(at_s));
        let place = epoch.seen_by(scene.observer).place(scene.body);
        let altitude = crate::sky::refraction::refracted(place.altitude, &scene.observer.air);
        is_ever_up |= altitude.degrees() > 0.0;
        is_ever_clear |= altitude > scene.skyline.altitude(place.azimuth);
    }
    match (is_ever_up, is_ever_clear) {
        (false, _) => "sentence-not-up",
        (true, false) => "sentence-behind-skyline",
        (true, true) => "sentence-sky-too-bright",
    }
}
