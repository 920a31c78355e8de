//! A night as JSON.

use super::Planned;
use crate::cli::moment::{MomentRecord, MomentWriter};
use crate::cli::{Fault, JSON_VERSION, rounded};
use crate::measure::Angle;
use crate::plan::{BodyNight, SkylineEvent, Window};
use serde::Serialize;

#[derive(Serialize)]
struct NightRecord<'a> {
    dimmet: u32,
    site: &'a str,
    spot: &'a str,
    time_zone: &'static str,
    date: String,
    delta_t_s: f64,
    start: MomentRecord,
    middle: MomentRecord,
    end: MomentRecord,
    sun: SunRecord,
    moon: MoonRecord,
    bodies: Vec<BodyRecord>,
    safety: SafetyRecord,
}

#[derive(Serialize)]
struct SunRecord {
    set: Option<MomentRecord>,
    civil_dusk: Option<MomentRecord>,
    nautical_dusk: Option<MomentRecord>,
    astronomical_dusk: Option<MomentRecord>,
    astronomical_dawn: Option<MomentRecord>,
    nautical_dawn: Option<MomentRecord>,
    civil_dawn: Option<MomentRecord>,
    rise: Option<MomentRecord>,
    highest_alt_deg: f64,
    lowest_alt_deg: f64,
}

/// The Moon's first rising and setting, and its phase at the night's middle.
#[derive(Serialize)]
struct MoonRecord {
    rise: Option<MomentRecord>,
    set: Option<MomentRecord>,
    illuminated_fraction: f64,
    elongation_deg: f64,
}

#[derive(Serialize)]
struct BodyRecord {
    body: &'static str,
    is_up_at_start: bool,
    rise: Vec<MomentRecord>,
    set: Vec<MomentRecord>,
    skyline_events: Vec<SkylineEventRecord>,
    windows: Vec<WindowRecord>,
}

#[derive(Serialize)]
struct SkylineEventRecord {
    #[serde(flatten)]
    moment: MomentRecord,
    kind: &'static str,
    az_deg: f64,
    alt_deg: f64,
}

#[derive(Serialize)]
struct WindowRecord {
    eye: &'static str,
    start: MomentRecord,
    end: MomentRecord,
    start_cause: &'static str,
    end_cause: &'static str,
    best: MomentRecord,
    best_alt_deg: f64,
    best_az_deg: f64,
    best_clearance_deg: f64,
    /// Not known while visibility is a rule about the Sun's altitude.
    best_margin_mag: Option<f64>,
}

#[derive(Serialize)]
struct SafetyRecord {
    optics_from: Option<MomentRecord>,
    optics_until: Option<MomentRecord>,
}

/// The document, with its last line break.
pub(super) fn json(planned: &Planned<'_>) -> Result<Vec<u8>, Fault> {
    let mut text = serde_json::to_vec_pretty(&record(planned)).map_err(std::io::Error::from)?;
    text.push(b'\n');
    Ok(text)
}

fn record<'a>(planned: &'a Planned<'a>) -> NightRecord<'a> {
    let night = &planned.night;
    let moments = MomentWriter {
        scales: planned.clock.scales,
        zone: planned.clock.zone,
    };
    NightRecord {
        dimmet: JSON_VERSION,
        site: &planned.site.name,
        spot: &planned.spot.name,
        time_zone: planned.clock.zone.name(),
        date: night.date.to_string(),
        delta_t_s: rounded(night.middle.delta_t_s(), 4),
        start: moments.record(night.start),
        middle: moments.record(night.middle),
        end: moments.record(night.end),
        sun: sun(planned, moments),
        moon: moon(planned, moments),
        bodies: night.bodies.iter().map(|b| body(b, moments)).collect(),
        safety: SafetyRecord {
            optics_from: moments.some(night.optics.from),
            optics_until: moments.some(night.optics.until),
        },
    }
}

fn sun(planned: &Planned<'_>, moments: MomentWriter) -> SunRecord {
    let sun = &planned.night.sun;
    SunRecord {
        set: moments.some(sun.set),
        civil_dusk: moments.some(sun.civil_dusk),
        nautical_dusk: moments.some(sun.nautical_dusk),
        astronomical_dusk: moments.some(sun.astronomical_dusk),
        astronomical_dawn: moments.some(sun.astronomical_dawn),
        nautical_dawn: moments.some(sun.nautical_dawn),
        civil_dawn: moments.some(sun.civil_dawn),
        rise: moments.some(sun.rise),
        highest_alt_deg: degrees(sun.highest),
        lowest_alt_deg: degrees(sun.lowest),
    }
}

fn moon(planned: &Planned<'_>, moments: MomentWriter) -> MoonRecord {
    let night = planned.night.body(crate::sky::Body::Moon);
    let first = |list: Option<&Vec<_>>| list.and_then(|list| list.first()).copied();
    MoonRecord {
        rise: moments.some(first(night.map(|night| &night.rise))),
        set: moments.some(first(night.map(|night| &night.set))),
        illuminated_fraction: rounded(planned.moon.illuminated_fraction, 6),
        elongation_deg: degrees(planned.moon.elongation),
    }
}

fn body(night: &BodyNight, moments: MomentWriter) -> BodyRecord {
    BodyRecord {
        body: night.body.name(),
        is_up_at_start: night.is_up_at_start,
        rise: moments.all(&night.rise),
        set: moments.all(&night.set),
        skyline_events: night
            .skyline_events
            .iter()
            .map(|event| skyline_event(event, moments))
            .collect(),
        windows: night.windows.iter().map(|w| window(w, moments)).collect(),
    }
}

fn skyline_event(event: &SkylineEvent, moments: MomentWriter) -> SkylineEventRecord {
    SkylineEventRecord {
        moment: moments.record(event.moment),
        kind: if event.clears { "clears" } else { "hidden" },
        az_deg: degrees(event.azimuth.wrapped()),
        alt_deg: degrees(event.altitude),
    }
}

fn window(window: &Window, moments: MomentWriter) -> WindowRecord {
    WindowRecord {
        eye: window.eye.name(),
        start: moments.record(window.start.moment),
        end: moments.record(window.end.moment),
        start_cause: window.start.cause.name(),
        end_cause: window.end.cause.name(),
        best: moments.record(window.best.moment),
        best_alt_deg: degrees(window.best.altitude),
        best_az_deg: degrees(window.best.azimuth.wrapped()),
        best_clearance_deg: degrees(window.best.clearance),
        best_margin_mag: None,
    }
}

fn degrees(angle: Angle) -> f64 {
    rounded(angle.degrees(), 7)
}
