//! A skyline as CSV. What reads measured skylines reads its first two columns.

use super::{Seen, kind};
use crate::cli::{Fault, rounded};
use crate::measure::Angle;
use csv::Writer;
use std::io;

const COLUMNS: [&str; 5] = ["az_deg", "alt_deg", "kind", "blocker", "openings"];

pub(super) fn csv(seen: &Seen<'_>) -> Result<Vec<u8>, Fault> {
    let mut writer = Writer::from_writer(Vec::new());
    let failed = |error: csv::Error| Fault::Output(io::Error::from(error));
    let degrees = |angle: Angle| format!("{}", rounded(angle.degrees(), 7));
    writer.write_record(COLUMNS).map_err(failed)?;
    for row in &seen.rows {
        let openings: Vec<String> = row
            .openings
            .iter()
            .map(|(floor, ceiling)| format!("{} {}", degrees(*floor), degrees(*ceiling)))
            .collect();
        let record = [
            degrees(row.azimuth),
            degrees(row.altitude),
            kind(&row.blocker).to_owned(),
            row.blocker.label().unwrap_or_default().to_owned(),
            openings.join("; "),
        ];
        writer.write_record(&record).map_err(failed)?;
    }
    writer
        .into_inner()
        .map_err(|error| Fault::Output(io::Error::other(error.to_string())))
}
