//! A skyline as JSON.

use super::{Row, Seen, kind};
use crate::cli::{Fault, JSON_VERSION, rounded};
use crate::measure::Angle;
use crate::place::MeasuredUse;
use serde::Serialize;

#[derive(Serialize)]
struct SkylineRecord<'a> {
    dimmet: u32,
    site: &'a str,
    spot: &'a str,
    stature: &'static str,
    /// Over the ground at the site's mark, m.
    eye_height_m: f64,
    /// What decides on leaves; null: all in leaf.
    date: Option<String>,
    /// Which measured skyline counts here.
    measured: &'static str,
    /// Whether something that was measured elsewhere does not count here.
    is_measured_left_out: bool,
    rows: Vec<RowRecord<'a>>,
}

#[derive(Serialize)]
struct RowRecord<'a> {
    az_deg: f64,
    alt_deg: f64,
    /// `obstacle`, `measured`, `terrain` or `horizon`.
    kind: &'static str,
    /// The obstacle's label; null where it is none.
    blocker: Option<&'a str>,
    openings: Vec<OpeningRecord>,
}

/// Open sky beneath a crown.
#[derive(Serialize)]
struct OpeningRecord {
    floor_deg: f64,
    ceiling_deg: f64,
}

/// The document, with its last line break.
pub(super) fn json(seen: &Seen<'_>) -> Result<Vec<u8>, Fault> {
    let (measured, is_measured_left_out) = match seen.measured_use {
        MeasuredUse::Own => ("own", false),
        MeasuredUse::Mark => ("mark", false),
        MeasuredUse::FarPartsOnly { is_any_left_out } => ("far", is_any_left_out),
        MeasuredUse::LeftOut => ("none", true),
        MeasuredUse::Nothing => ("none", false),
    };
    let record = SkylineRecord {
        dimmet: JSON_VERSION,
        site: &seen.site.name,
        spot: &seen.spot.name,
        stature: seen.stature.name(),
        eye_height_m: rounded(seen.eye_height_m(), 3),
        date: seen.date.map(|date| date.to_string()),
        measured,
        is_measured_left_out,
        rows: seen.rows.iter().map(row).collect(),
    };
    let mut text = serde_json::to_vec_pretty(&record).map_err(std::io::Error::from)?;
    text.push(b'\n');
    Ok(text)
}

fn row(row: &Row) -> RowRecord<'_> {
    let degrees = |angle: Angle| rounded(angle.degrees(), 7);
    RowRecord {
        az_deg: degrees(row.azimuth),
        alt_deg: degrees(row.altitude),
        kind: kind(&row.blocker),
        blocker: row.blocker.label(),
        openings: row
            .openings
            .iter()
            .map(|(floor, ceiling)| OpeningRecord {
                floor_deg: degrees(*floor),
                ceiling_deg: degrees(*ceiling),
            })
            .collect(),
    }
}
