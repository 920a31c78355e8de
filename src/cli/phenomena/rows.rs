//! Events as CSV: one line an event; the contacts of transits and occultations are left to JSON and the page.

use super::Listed;
use super::record::tt_text;
use crate::cli::Fault;
use crate::cli::moment::MomentWriter;
use crate::measure::Angle;
use crate::plan::phenomena::Target;
use csv::Writer;
use std::io;

const COLUMNS: [&str; 13] = [
    "kind",
    "body",
    "other",
    "tt",
    "utc",
    "local_time",
    "scale",
    "value",
    "unit",
    "alt_deg",
    "az_deg",
    "sun_alt_deg",
    "is_clear",
];

/// The table. The site's columns are blank without one.
pub(super) fn csv(listed: &Listed) -> Result<Vec<u8>, Fault> {
    let moments = MomentWriter {
        scales: listed.clock.scales,
        zone: listed.clock.zone,
    };
    let mut writer = Writer::from_writer(Vec::new());
    let failed = |error: csv::Error| Fault::Output(io::Error::from(error));
    writer.write_record(COLUMNS).map_err(failed)?;
    for event in &listed.events {
        let local = event.local;
        let moment = moments.record(event.moment);
        let degrees = |angle: Option<Angle>| {
            angle.map_or_else(String::new, |angle| format!("{:.7}", angle.degrees()))
        };
        let record = [
            event.kind.name().to_owned(),
            event.body.name().to_owned(),
            event.other.map(Target::name).unwrap_or_default(),
            tt_text(event.moment.tt()),
            moment.utc,
            moment.local_time,
            moment.scale.unwrap_or("utc").to_owned(),
            format!("{:.7}", event.value.number()),
            event.value.unit().to_owned(),
            degrees(local.map(|local| local.place.altitude)),
            degrees(local.map(|local| local.place.azimuth.wrapped())),
            degrees(local.map(|local| local.sun_altitude)),
            local.map_or_else(String::new, |local| local.is_clear.to_string()),
        ];
        writer.write_record(&record).map_err(failed)?;
    }
    writer
        .into_inner()
        .map_err(|error| Fault::Output(io::Error::other(error.to_string())))
}
