//! What is said of single points of the map.

use super::job::{Asked, Found};
use crate::app::grounds::Desk;
use crate::app::lookout::says::Says;
use crate::app::scene::Scene;
use crate::measure::Angle;
use crate::place::{Grounds, PlanPoint, Skyline};
use crate::plan::{BodyNight, Edge, Window};
use crate::words::{decimal, spoken_cause};

/// Somebody at a point, in the shown half-night.
pub struct Here {
    /// What blocks the view.
    pub skyline: Skyline,
    /// What the body does.
    pub body: BodyNight,
    /// When it is seen.
    pub windows: Vec<Window>,
}

impl Here {
    /// At any point of the grounds.
    pub fn at(asked: &Asked, found: &Found, at: PlanPoint) -> Option<Self> {
        let grounds = Grounds::new(&asked.site, Some(asked.date));
        let skyline = grounds.skyline_from(asked.site.viewpoint_at(at, asked.stature));
        let body = found.sky.body_night(asked.body, &skyline)?;
        let windows = body.windows_in(asked.eye, asked.half).to_vec();
        Some(Self {
            skyline,
            body,
            windows,
        })
    }

    /// Minutes in which the body is seen.
    pub fn minutes(&self) -> f64 {
        minutes(&self.windows)
    }
}

/// Minutes of windows together.
pub fn minutes(windows: &[Window]) -> f64 {
    let length_s = |window: &Window| window.end.moment.seconds_since(window.start.moment);
    windows.iter().map(length_s).sum::<f64>() / 60.0
}

/// Where a point lies from the mark.
pub fn whereabouts(desk: &Desk<'_>, at: PlanPoint) -> String {
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

/// From when until when, how many minutes, and what ends it.
pub fn times(desk: &Desk<'_>, scene: &Scene<'_>, here: &Here) -> String {
    let words = desk.words;
    let (Some(first), Some(last)) = (here.windows.first(), here.windows.last()) else {
        return words.text("standing-not-seen");
    };
    let time = |edge: Edge| words.time(scene.clock(), edge.moment);
    let obstacle = obstacle_at(&here.skyline, &here.body, last.end);
    let cause = spoken_cause(scene.night, last.end);
    let says = Says::new(scene);
    let end = says.edge(cause, true, obstacle.as_deref(), &time(last.end));
    let id = if end.is_some() {
        "standing-times"
    } else {
        "standing-times-open"
    };
    words.text_with(
        id,
        &[
            ("start", time(first.start)),
            ("end", time(last.end)),
            ("minutes", decimal(here.minutes(), 0)),
            ("why", end.unwrap_or_default()),
        ],
    )
}

/// The label of what a window's end has to do with, where it is an obstacle.
pub fn obstacle_at(skyline: &Skyline, body: &BodyNight, edge: Edge) -> Option<String> {
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
