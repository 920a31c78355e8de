//! `dimmet positions`: bodies at one instant from one place, or a table of such rows.

mod bounded;
mod columns;
mod row;
mod seen;
mod spans;
mod table;
mod text;
mod writer;

use super::arguments::{Format, PositionsArguments};
use super::fault::Fault;
use super::moment::MomentRecord;
use super::{JSON_VERSION, Surroundings, resolve, rounded};
use crate::measure::{CivilScale, Moment, TimeScales};
use crate::sky::{Body, Ephemeris, Observer};
use chrono::{DateTime, FixedOffset};
use row::Row;
use seen::Skies;
use serde::Serialize;

/// What is asked for, all of it valid.
struct Request {
    at: DateTime<FixedOffset>,
    moment: Moment,
    observer: Observer,
    bodies: Vec<Body>,
}

/// The JSON document up to its rows.
#[derive(Serialize)]
struct Head {
    dimmet: u32,
    #[serde(flatten)]
    moment: MomentRecord,
    lat_deg: f64,
    lon_deg: f64,
    elevation_m: f64,
}

pub(super) fn run(
    arguments: &PositionsArguments,
    scales: TimeScales,
    around: &mut Surroundings<'_>,
) -> Result<(), Fault> {
    if let Some(file) = &arguments.table {
        return table::run(file, arguments.format, scales, around);
    }
    let request = resolve_request(arguments, scales, around)?;
    let tt = request.moment.tt();
    let bodies: Vec<Body> = request.bodies.iter().copied().chain([Body::Moon]).collect();
    let span = Ephemeris::new()
        .cover(tt, tt, &bodies)
        .map_err(|error| Fault::Input(error.to_string()))?;
    let mut skies = Skies::default();
    let rows: Vec<Row> = request
        .bodies
        .iter()
        .map(|body| Row::new(&span, request.moment, &request.observer, *body, &mut skies))
        .collect();
    let mut out = Vec::new();
    match arguments.format.unwrap_or(Format::Text) {
        Format::Text => out.extend(text::page(around.words, &request, &rows).into_bytes()),
        Format::Csv => {
            columns::write_csv_header(&mut out);
            rows.iter().for_each(|row| row.write_csv(&mut out));
        }
        Format::Json => write_json(&mut out, &request, &rows)?,
    }
    around.output.write_all(&out)?;
    Ok(around.output.flush()?)
}

fn resolve_request(
    arguments: &PositionsArguments,
    scales: TimeScales,
    around: &Surroundings<'_>,
) -> Result<Request, Fault> {
    let words = around.words;
    // The parser has seen to it that these three are there.
    let given = |text: &Option<String>| text.clone().unwrap_or_default();
    let at = resolve::time(words, "--at", &given(&arguments.at))?;
    let number = |place: &str, text: &str, limits| resolve::number(words, place, text, limits);
    let latitude_deg = number("--lat", &given(&arguments.lat), resolve::LATITUDE)?;
    let longitude_deg = number("--lon", &given(&arguments.lon), resolve::LONGITUDE)?;
    let elevation_m = match &arguments.elevation {
        Some(text) => number("--elevation", text, resolve::ELEVATION)?,
        None => 0.0,
    };
    let mut bodies = Vec::new();
    for name in &arguments.body {
        let body = resolve::body(words, "--body", name)?;
        if !bodies.contains(&body) {
            bodies.push(body);
        }
    }
    if bodies.is_empty() {
        bodies.extend(Body::ALL);
    }
    let moment = scales
        .moment_from_civil(at.to_utc())
        .map_err(|error| Fault::Input(error.to_string()))?;
    Ok(Request {
        at,
        moment,
        observer: row::observer(latitude_deg, longitude_deg, elevation_m),
        bodies,
    })
}

fn write_json(out: &mut Vec<u8>, request: &Request, rows: &[Row]) -> Result<(), Fault> {
    let utc = request.at.to_utc();
    let head = Head {
        dimmet: JSON_VERSION,
        moment: MomentRecord::new(utc, *request.at.offset(), CivilScale::of(utc)),
        lat_deg: rounded(request.observer.latitude.degrees(), 7),
        lon_deg: rounded(request.observer.longitude.degrees(), 7),
        elevation_m: request.observer.elevation_m,
    };
    let head = serde_json::to_string(&head).map_err(std::io::Error::from)?;
    out.extend_from_slice(head.trim_end_matches('}').as_bytes());
    out.extend_from_slice(b",\"bodies\":[");
    for (index, row) in rows.iter().enumerate() {
        out.extend_from_slice(if index == 0 { b"\n{" } else { b",\n{" });
        row.write_json(out);
        out.push(b'}');
    }
    out.extend_from_slice(b"\n]}\n");
    Ok(())
}
