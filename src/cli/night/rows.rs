//! A night's windows as CSV: one line a window.

use super::Planned;
use crate::cli::Fault;
use crate::cli::moment::MomentWriter;
use csv::Writer;
use std::io;

const COLUMNS: [&str; 16] = [
    "date",
    "body",
    "eye",
    "start_utc",
    "start_local_time",
    "start_cause",
    "end_utc",
    "end_local_time",
    "end_cause",
    "best_utc",
    "best_local_time",
    "best_alt_deg",
    "best_az_deg",
    "best_clearance_deg",
    "best_margin_mag",
    "scale",
];

pub(super) fn csv(planned: &Planned<'_>) -> Result<Vec<u8>, Fault> {
    let moments = MomentWriter {
        scales: planned.clock.scales,
        zone: planned.clock.zone,
    };
    let mut writer = Writer::from_writer(Vec::new());
    let failed = |error: csv::Error| Fault::Output(io::Error::from(error));
    writer.write_record(COLUMNS).map_err(failed)?;
    for body in &planned.night.bodies {
        for window in &body.windows {
            let (start, end) = (
                moments.record(window.start.moment),
                moments.record(window.end.moment),
            );
            let best = moments.record(window.best.moment);
            let degrees = |angle: crate::measure::Angle| format!("{:.7}", angle.degrees());
            let record = [
                planned.night.date.to_string(),
                body.body.name().to_owned(),
                window.eye.name().to_owned(),
                start.utc,
                start.local_time,
                window.start.cause.name().to_owned(),
                end.utc,
                end.local_time,
                window.end.cause.name().to_owned(),
                best.utc,
                best.local_time,
                degrees(window.best.altitude),
                degrees(window.best.azimuth.wrapped()),
                degrees(window.best.clearance),
                String::new(),
                best.scale.unwrap_or("utc").to_owned(),
            ];
            writer.write_record(&record).map_err(failed)?;
        }
    }
    writer
        .into_inner()
        .map_err(|error| Fault::Output(io::Error::other(error.to_string())))
}
