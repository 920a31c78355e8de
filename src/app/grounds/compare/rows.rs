//! What the comparison shows of each spot.

use crate::app::grounds::Desk;
use crate::app::lookout::says::Says;
use crate::app::scene::Scene;
use crate::measure::Moment;
use crate::plan::{CompareRequest, NightSky, SpotNight, SpotWindow, compare};
use crate::words::{decimal, spoken_cause};

/// One spot.
#[derive(Clone, Debug, PartialEq)]
pub struct Row {
    /// Its name.
    pub name: String,
    /// From when until when the body is seen there, each time.
    pub windows: Vec<(Moment, Moment)>,
    /// Minutes of the longest time.
    pub minutes: f64,
    /// Its start and end.
    pub times: String,
    /// Its best moment.
    pub best: String,
    /// What ends it, or why there is none.
    pub why: String,
    /// The instruments that stand there.
    pub kit: String,
}

/// Every spot of the site, in its order, for the shown half-night, body, eye and stature.
pub fn rows(desk: &Desk<'_>, scene: &Scene<'_>, sky: &NightSky) -> Vec<Row> {
    let request = CompareRequest {
        site: scene.site,
        night: sky,
        body: scene.body,
        eye: scene.eye,
        half: scene.half,
        stature: desk.state.stature(),
    };
    compare(&request, &scene.site.spots)
        .iter()
        .map(|spot| row(desk, scene, spot))
        .collect()
}

fn row(desk: &Desk<'_>, scene: &Scene<'_>, spot: &SpotNight<'_>) -> Row {
    let words = desk.words;
    let ends = |window: &SpotWindow| (window.window.start.moment, window.window.end.moment);
    let kit: Vec<&str> = spot
        .kit
        .iter()
        .map(|instrument| instrument.label())
        .collect();
    let (times, best, why) = match spot.longest() {
        Some(longest) => said(desk, scene, longest),
        None => (
            words.text("compare-not-seen"),
            String::new(),
            words.text(match spot.absence {
                Some(absence) => why_not(absence),
                None => "compare-not-seen",
            }),
        ),
    };
    Row {
        name: spot.spot.name.clone(),
        windows: spot.windows.iter().map(ends).collect(),
        minutes: spot.longest().map_or(0.0, |longest| longest.minutes),
        times,
        best,
        why,
        kit: kit.join(", "),
    }
}

/// Times, best moment and what ends it, of a spot's longest window.
fn said(desk: &Desk<'_>, scene: &Scene<'_>, longest: &SpotWindow) -> (String, String, String) {
    let words = desk.words;
    let time = |moment| words.time(scene.clock(), moment);
    let window = &longest.window;
    let times = words.text_with(
        "compare-times",
        &[
            ("start", time(window.start.moment)),
            ("end", time(window.end.moment)),
            ("minutes", decimal(longest.minutes, 0)),
        ],
    );
    let best = words.text_with("compare-best", &[("time", time(window.best.moment))]);
    let cause = spoken_cause(scene.night, window.end);
    let end = time(window.end.moment);
    let why = Says::new(scene).edge(cause, true, longest.end_blocker.as_deref(), &end);
    (times, best, why.unwrap_or_default())
}

/// Why a body is not seen, as briefly as a table wants it.
fn why_not(absence: crate::plan::Absence) -> &'static str {
    use crate::plan::Absence;
    match absence {
        Absence::NotForEyes => "compare-too-faint",
        Absence::SunStaysUp | Absence::TooBright | Absence::UpWithTheSun => "lane-too-bright",
        Absence::Down => "lane-not-up",
        Absence::Blocked => "lane-hidden",
    }
}
