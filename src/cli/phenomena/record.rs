//! Events as JSON.

use super::Listed;
use crate::cli::moment::{MomentRecord, MomentWriter};
use crate::cli::{Fault, JSON_VERSION, rounded};
use crate::measure::{Angle, Tt};
use crate::plan::phenomena::{Circumstances, Event};
use chrono::{DateTime, TimeDelta};
use serde::Serialize;

#[derive(Serialize)]
struct Document<'a> {
    dimmet: u32,
    from: String,
    to: String,
    time_zone: &'static str,
    #[serde(skip_serializing_if = "Option::is_none")]
    site: Option<&'a str>,
    events: Vec<EventRecord>,
}

#[derive(Serialize)]
struct EventRecord {
    kind: &'static str,
    body: &'static str,
    tt: String,
    #[serde(flatten)]
    moment: MomentRecord,
    delta_t_s: f64,
    value: f64,
    unit: &'static str,
    #[serde(skip_serializing_if = "Option::is_none")]
    local: Option<LocalRecord>,
}

#[derive(Serialize)]
struct LocalRecord {
    alt_deg: f64,
    az_deg: f64,
    sun_alt_deg: f64,
    /// Whether the body, refracted, stands clear of the skyline.
    is_clear: bool,
}

/// The document, with its last line break.
pub(super) fn json(listed: &Listed) -> Result<Vec<u8>, Fault> {
    let moments = MomentWriter {
        scales: listed.clock.scales,
        zone: listed.clock.zone,
    };
    let document = Document {
        dimmet: JSON_VERSION,
        from: listed.from.to_string(),
        to: listed.to.to_string(),
        time_zone: listed.clock.zone.name(),
        site: listed.site_name.as_deref(),
        events: listed
            .events
            .iter()
            .map(|(event, local)| record(moments, event, local.as_ref()))
            .collect(),
    };
    let mut text = serde_json::to_vec_pretty(&document).map_err(std::io::Error::from)?;
    text.push(b'\n');
    Ok(text)
}

fn record(moments: MomentWriter, event: &Event, local: Option<&Circumstances>) -> EventRecord {
    EventRecord {
        kind: event.kind.name(),
        body: event.body.name(),
        tt: tt_text(event.moment.tt()),
        moment: moments.record(event.moment),
        delta_t_s: rounded(event.moment.delta_t_s(), 3),
        value: rounded(event.value.number(), 7),
        unit: event.value.unit(),
        local: local.map(|local| LocalRecord {
            alt_deg: degrees(local.place.altitude),
            az_deg: degrees(local.place.azimuth.wrapped()),
            sun_alt_deg: degrees(local.sun_altitude),
            is_clear: local.is_clear,
        }),
    }
}

fn degrees(angle: Angle) -> f64 {
    rounded(angle.degrees(), 7)
}

/// A Terrestrial Time as date and time to the millisecond; without an offset, as it is in no
/// zone.
pub(super) fn tt_text(tt: Tt) -> String {
    const J2000_UNIX_S: i64 = 946_728_000;
    let ms = (tt.days_since_j2000() * 86_400_000.0).round() as i64;
    let noon = DateTime::UNIX_EPOCH + TimeDelta::seconds(J2000_UNIX_S);
    let time = noon + TimeDelta::milliseconds(ms);
    time.naive_utc().format("%Y-%m-%dT%H:%M:%S%.3f").to_string()
}
