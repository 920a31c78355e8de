//! What is said of single points of the map.

use super::job::{Asked, Found, Summing};
use crate::app::grounds::Desk;
use crate::app::lookout::says::Says;
use crate::app::scene::Scene;
use crate::measure::Angle;
use crate::place::{Grounds, PlanPoint, Skyline};
use crate::plan::standing::{Cell, Stay};
use crate::plan::{BodyNight, Edge, NightSky, Window};
use crate::words::{decimal, spoken_cause};

/// Somebody at a point, in the shown half-night.
struct Here {
    /// What blocks the view.
    skyline: Skyline,
    /// What the body does.
    body: BodyNight,
    /// When it is seen.
    windows: Vec<Window>,
}

impl Here {
    /// At any point of the grounds.
    fn at(asked: &Asked, sky: &NightSky, at: PlanPoint) -> Option<Self> {
        let grounds = Grounds::new(&asked.site, Some(asked.date));
        let skyline = grounds.skyline_from(asked.site.viewpoint_at(at, asked.stature));
        let body = sky.body_night(asked.body, &skyline)?;
        let windows = body.windows_in(asked.eye, asked.half).to_vec();
        Some(Self {
            skyline,
            body,
            windows,
        })
    }

    /// The longest time in which the body is seen: what the map counts.
    fn longest(&self) -> Option<&Window> {
        let by_minutes = |a: &&Window, b: &&Window| minutes(a).total_cmp(&minutes(b));
        self.windows.iter().max_by(by_minutes)
    }
}

/// Minutes of a window.
fn minutes(window: &Window) -> f64 {
    window.end.moment.seconds_since(window.start.moment) / 60.0
}

/// Where a point lies from the mark.
fn whereabouts(desk: &Desk<'_>, at: PlanPoint) -> String {
    let part = |id: [&str; 2], metres: f64| {
        let id = if metres < 0.0 { id[1] } else { id[0] };
        let metres = decimal(metres.abs(), 0);
        desk.words.text_with(id, &[("metres", metres)])
    };
    desk.words.text_with(
        "standing-whereabouts",
        &[
            ("east", part(["metres-east", "metres-west"], at.east_m)),
            ("north", part(["metres-north", "metres-south"], at.north_m)),
        ],
    )
}

/// From when until when the longest time is, how many minutes, and what ends it.
fn times(desk: &Desk<'_>, scene: &Scene<'_>, here: &Here) -> String {
    let words = desk.words;
    let Some(longest) = here.longest() else {
        return words.text("standing-not-seen");
    };
    let time = |edge: Edge| words.time(scene.clock(), edge.moment);
    let obstacle = obstacle_at(&here.skyline, &here.body, longest.end);
    let cause = spoken_cause(scene.night, longest.end);
    let says = Says::new(scene);
    let end = says.edge(cause, true, obstacle.as_deref(), &time(longest.end));
    let id = if end.is_some() {
        "standing-times"
    } else {
        "standing-times-open"
    };
    words.text_with(
        id,
        &[
            ("start", time(longest.start)),
            ("end", time(longest.end)),
            ("minutes", decimal(minutes(longest), 0)),
            ("why", end.unwrap_or_default()),
        ],
    )
}

/// A place of the map: where, its minutes over the nights where there are several, and the shown
/// night's times.
pub fn place(
    desk: &Desk<'_>,
    scene: &Scene<'_>,
    (asked, sky): (&Asked, &NightSky),
    (at, stay): (PlanPoint, &Stay),
) -> String {
    let times = match Here::at(asked, sky, at) {
        Some(here) => times(desk, scene, &here),
        None => desk.words.text("standing-not-seen"),
    };
    let id = match (asked.nights, asked.summing) {
        (1, _) => "standing-place-one",
        (_, Summing::Sum) => "standing-place-sum",
        (_, Summing::Least) => "standing-place-least",
    };
    desk.words.text_with(
        id,
        &[
            ("where", whereabouts(desk, at)),
            ("minutes", decimal(stay.minutes, 0)),
            ("nights", asked.nights.to_string()),
            ("times", times),
        ],
    )
}

/// The point of the map under the pointer.
pub fn pointed(
    desk: &Desk<'_>,
    scene: &Scene<'_>,
    asked_of: (&Asked, &NightSky),
    found: &Found,
    at: PlanPoint,
) -> String {
    let Some((column, row)) = found.map.raster.square(at) else {
        return desk.words.text("standing-point-at");
    };
    match found.map.shown(column, row) {
        Cell::Stay(stay) => {
            let said = place(desk, scene, asked_of, (at, &stay));
            desk.words.text_with("standing-pointed", &[("said", said)])
        }
        Cell::LeftOut(why) => desk.words.left_out(desk.state.site(), at, why),
        Cell::Waiting => desk.words.text("square-waiting"),
    }
}

/// What the chosen spot gives, what the best place would give more, how far it is to ten minutes
/// more, and what a crowd on its patch has.
pub fn costs(desk: &Desk<'_>, found: &Found) -> Vec<String> {
    const GAIN_MIN: f64 = 10.0;
    let (words, spot) = (desk.words, desk.state.spot());
    if found.map.stays().next().is_none() {
        return vec![words.text("standing-nowhere")];
    }
    let Some(here) = found.spots.get(desk.state.spot_index()) else {
        return Vec::new();
    };
    let fewer = decimal(found.map.cost_of(&here.stay), 0);
    let id = if fewer == "0" {
        "standing-no-cost"
    } else {
        "standing-cost"
    };
    let mut lines = vec![words.text_with(
        id,
        &[
            ("spot", spot.name.clone()),
            ("minutes", decimal(here.stay.minutes, 0)),
            ("fewer", fewer),
        ],
    )];
    let gain = found.map.gain(spot.plan_point(), &here.stay, GAIN_MIN);
    lines.push(match gain {
        Some(gain) => words.text_with(
            "standing-gain",
            &[
                ("metres", decimal(gain.distance_m.ceil(), 0)),
                ("direction", words.direction(gain.bearing)),
            ],
        ),
        None => words.text("standing-no-gain"),
    });
    if let Some(patch) = &here.patch {
        lines.push(words.patch(spot, Some(patch)));
    }
    lines
}

/// The label of what a window's end has to do with, where it is an obstacle.
fn obstacle_at(skyline: &Skyline, body: &BodyNight, edge: Edge) -> Option<String> {
    let event = body
        .skyline_events
        .iter()
        .find(|event| event.moment == edge.moment)?;
    // Just inside: exactly on an edge the next thing may be named.
    let inside = event.altitude - Angle::from_arcmin(0.5);
    let blocking = skyline.blocked_by(event.azimuth, inside);
    let label = blocking.unwrap_or_else(|| skyline.label(event.azimuth));
    label.map(str::to_owned)
}
