//! What the strip says below itself.

use super::frame::Frame;
use super::ways::{self, Ways};
use crate::app::grounds::Desk;
use crate::app::measured::{Handles, Owned, Place, elsewhere};
use crate::app::scene::Scene;
use crate::measure::Angle;
use crate::place::MeasuredUse;
use eframe::egui::Response;

/// What is under the pointer, or else where the chosen body stands.
pub fn reading(
    desk: &Desk<'_>,
    scene: &Scene<'_>,
    ways: &Ways,
    response: &Response,
    frame: &Frame,
) -> String {
    let pointer = response
        .hover_pos()
        .filter(|at| frame.rect.contains(*at))
        .map(|at| frame.sky(at));
    match pointer {
        Some((azimuth, altitude)) => at(desk, scene, None, azimuth, altitude),
        None => {
            let at_s = scene.moment.seconds_since(ways.start);
            let point = ways::point(scene, scene.body, ways.start, at_s);
            let body = desk.words.body(scene.body);
            at(desk, scene, Some(&body), point.azimuth, point.altitude)
        }
    }
}

/// A place in the sky: where, what blocks it or how far it is clear, and of what.
fn at(
    desk: &Desk<'_>,
    scene: &Scene<'_>,
    body: Option<&str>,
    azimuth: Angle,
    altitude: Angle,
) -> String {
    let words = desk.words;
    let clearance = scene.skyline.clearance(azimuth, altitude);
    let blocking = scene.skyline.blocked_by(azimuth, altitude);
    let label = blocking.unwrap_or_else(|| scene.skyline.label(azimuth));
    let obstacle = match label {
        Some(label) => words.text_with("the-obstacle", &[("label", label)]),
        None => words.text("the-skyline"),
    };
    let id = match (blocking.is_some(), body.is_some()) {
        (true, true) => "strip-body-behind",
        (true, false) => "strip-behind",
        (false, true) => "strip-body-clear",
        (false, false) => "strip-clear",
    };
    words.text_with::<&str>(
        id,
        &[
            ("body", body.unwrap_or_default()),
            ("azimuth", &words.azimuth(azimuth)),
            ("altitude", &words.degrees(altitude, 1)),
            ("clearance", &words.degrees(clearance.abs(), 1)),
            ("obstacle", &obstacle),
        ],
    )
}

/// Which measured skyline holds at the chosen spot; while one of its points is chosen, that point.
pub fn measured(desk: &Desk<'_>, handles: &Handles) -> String {
    let site = desk.state.site();
    let owned = Owned::at(site, desk.state.spot_index());
    if let Some(point) = owned.and_then(|owned| handles.chosen(&owned)) {
        let azimuth = Angle::from_degrees(point.azimuth_deg);
        let altitude = Angle::from_degrees(point.altitude_deg);
        return desk.words.text_with(
            "measured-point",
            &[
                ("azimuth", desk.words.azimuth(azimuth)),
                ("altitude", desk.words.degrees(altitude, 1)),
            ],
        );
    }
    desk.words.text(match site.measured_use(desk.state.spot()) {
        MeasuredUse::Own | MeasuredUse::Mark => "measured-here",
        MeasuredUse::Nothing if owned.is_some() => "measured-nothing",
        other => elsewhere(other).unwrap_or("measured-nowhere"),
    })
}
