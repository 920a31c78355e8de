//! A table of positions: read, worked out and written row by row, in order, in the memory of one
//! row. The rows before a bad one have been written when it is refused.

use super::bounded::{Bounded, RowMark};
use super::row::{Row, observer};
use super::seen::Skies;
use super::spans::Spans;
use super::writer::RowWriter;
use crate::cli::Surroundings;
use crate::cli::arguments::Format;
use crate::cli::civil_text;
use crate::cli::fault::Fault;
use crate::cli::resolve::{self, Limits, quoted};
use crate::measure::{Moment, TimeScales, Ut1};
use crate::sky::Body;
use crate::words::Words;
use chrono::{DateTime, TimeDelta, Utc};
use csv::{ByteRecord, ErrorKind, Position};
use std::fs::File;
use std::io::Read;
use std::path::Path;

pub(super) fn run(
    file: &str,
    format: Option<Format>,
    scales: TimeScales,
    around: &mut Surroundings<'_>,
) -> Result<(), Fault> {
    let words = around.words;
    let is_json = match format {
        None | Some(Format::Csv) => false,
        Some(Format::Json) => true,
        Some(Format::Text) => return Err(Fault::Input(words.text("cli-table-no-text"))),
    };
    let (name, input): (&str, Box<dyn Read + '_>) = match file {
        "-" => ("stdin", Box::new(&mut *around.input)),
        _ => (file, Box::new(open(words, file)?)),
    };
    let row_mark = RowMark::default();
    let mut reader = csv::ReaderBuilder::new()
        .buffer_capacity(64 * 1024)
        .from_reader(Bounded::new(input, row_mark.clone()));
    let header = reader
        .byte_headers()
        .map_err(|error| unreadable(words, name, &error))?;
    let mut table = Table {
        words,
        name,
        columns: Columns::find(words, name, header)?,
        scales,
        spans: Spans::default(),
        skies: Skies::default(),
    };
    let mut writer = RowWriter::new(is_json, &mut *around.output);
    let mut record = ByteRecord::new();
    let outcome = loop {
        match reader.read_byte_record(&mut record) {
            Ok(false) => break Ok(()),
            Ok(true) => {}
            Err(error) => break Err(unreadable(words, name, &error)),
        }
        row_mark.row();
        match table.row(&record) {
            Ok(row) => writer.row(field(&record, table.columns.id), &row)?,
            Err(fault) => break Err(fault),
        }
    };
    writer.finish(outcome.is_ok())?;
    outcome
}

fn open(words: &Words, file: &str) -> Result<File, Fault> {
    let refused = |reason: String| {
        let arguments = [("file", file.to_owned()), ("reason", reason)];
        Fault::Input(words.text_with("cli-table-unreadable", &arguments))
    };
    if Path::new(file).is_dir() {
        return Err(refused(words.text("cli-is-folder")));
    }
    File::open(file).map_err(|error| refused(error.to_string()))
}

fn unreadable(words: &Words, name: &str, error: &csv::Error) -> Fault {
    let file = ("file", name.to_owned());
    Fault::Input(match error.kind() {
        ErrorKind::UnequalLengths {
            pos,
            expected_len,
            len,
        } => words.text_with(
            "cli-table-uneven",
            &[
                file,
                ("line", pos.as_ref().map_or(0, Position::line).to_string()),
                ("fields", len.to_string()),
                ("expected", expected_len.to_string()),
            ],
        ),
        _ => words.text_with(
            "cli-table-unreadable",
            &[file, ("reason", error.to_string())],
        ),
    })
}

/// A field's bytes without the white space around them.
fn field(record: &ByteRecord, column: usize) -> &[u8] {
    record.get(column).unwrap_or_default().trim_ascii()
}

/// Where the columns stand in a record.
struct Columns {
    id: usize,
    utc: Option<usize>,
    ut1: Option<usize>,
    latitude: usize,
    longitude: usize,
    elevation: Option<usize>,
    delta_t: Option<usize>,
    body: usize,
}

impl Columns {
    fn find(words: &Words, file: &str, header: &ByteRecord) -> Result<Self, Fault> {
        let refused = |id: &str, column: &str| {
            let arguments = [("file", file.to_owned()), ("column", column.to_owned())];
            Fault::Input(words.text_with(id, &arguments))
        };
        let optional = |column: &str| {
            let is_named = |index: &usize| field(header, *index) == column.as_bytes();
            let mut found = (0..header.len()).filter(is_named);
            match (found.next(), found.next()) {
                (_, Some(_)) => Err(refused("cli-table-column-twice", column)),
                (index, None) => Ok(index),
            }
        };
        let required = |column: &str| {
            optional(column)?.ok_or_else(|| refused("cli-table-column-missing", column))
        };
        let columns = Self {
            id: required("id")?,
            utc: optional("utc")?,
            ut1: optional("ut1")?,
            latitude: required("lat_deg")?,
            longitude: required("lon_deg")?,
            elevation: optional("elevation_m")?,
            delta_t: optional("delta_t_s")?,
            body: required("body")?,
        };
        if columns.utc.or(columns.ut1).is_none() {
            return Err(refused("cli-table-column-missing", "utc"));
        }
        Ok(columns)
    }
}

/// What rows are worked out with.
struct Table<'a> {
    words: &'a Words,
    name: &'a str,
    columns: Columns,
    scales: TimeScales,
    spans: Spans,
    skies: Skies,
}

impl Table<'_> {
    fn row(&mut self, record: &ByteRecord) -> Result<Row, Fault> {
        let columns = &self.columns;
        let number = |column, name, limits| self.number(record, column, name, limits);
        let latitude_deg = number(columns.latitude, "lat_deg", resolve::LATITUDE)?;
        let longitude_deg = number(columns.longitude, "lon_deg", resolve::LONGITUDE)?;
        let elevation_m = match columns.elevation {
            Some(column) => number(column, "elevation_m", resolve::ELEVATION)?,
            None => 0.0,
        };
        let scales = match columns.delta_t {
            Some(column) if !field(record, column).is_empty() => {
                TimeScales::with_delta_t_s(number(column, "delta_t_s", resolve::DELTA_T)?)
            }
            _ => self.scales,
        };
        let moment = self.moment(record, scales)?;
        let body = self.body(record)?;
        let observer = observer(latitude_deg, longitude_deg, elevation_m);
        match self.spans.covering(moment.tt(), body) {
            Ok(span) => Ok(Row::new(span, moment, &observer, body, &mut self.skies)),
            Err(error) => Err(Fault::Input(error.to_string())),
        }
    }

    /// The row's instant: its UT1 where there is one, else its UTC.
    fn moment(&self, record: &ByteRecord, scales: TimeScales) -> Result<Moment, Fault> {
        let given = |column: Option<usize>| {
            column
                .map(|column| field(record, column))
                .filter(|text| !text.is_empty())
        };
        let (ut1, utc) = (given(self.columns.ut1), given(self.columns.utc));
        let name = match (ut1, self.columns.utc) {
            (None, Some(_)) => "utc",
            _ => "ut1",
        };
        let text = ut1.or(utc).unwrap_or_default();
        let refused = || {
            let value = quoted(&String::from_utf8_lossy(text));
            let arguments = [("place", self.place(record, name)), ("value", value)];
            Fault::Input(self.words.text_with("cli-bad-table-time", &arguments))
        };
        let time = civil_text::parse(text).ok_or_else(refused)?;
        let date = time.utc.date_naive();
        if crate::measure::check_date(date).is_err() {
            resolve::supported(self.words, &self.place(record, name), date)?;
        }
        match ut1 {
            None => scales.moment_from_civil(time.utc).map_err(|_| refused()),
            // Only UTC has leap seconds.
            Some(_) if time.is_leap_second => Err(refused()),
            Some(_) => Ok(scales.moment_from_ut1(ut1_of(time.utc))),
        }
    }

    fn body(&self, record: &ByteRecord) -> Result<Body, Fault> {
        let text = field(record, self.columns.body);
        let is_named = |body: &Body| body.name().as_bytes() == text;
        match Body::ALL.into_iter().find(is_named) {
            Some(body) => Ok(body),
            None => {
                let text = String::from_utf8_lossy(text);
                resolve::body(self.words, &self.place(record, "body"), &text)
            }
        }
    }

    fn number(
        &self,
        record: &ByteRecord,
        column: usize,
        name: &str,
        limits: Limits,
    ) -> Result<f64, Fault> {
        let text = field(record, column);
        let read = std::str::from_utf8(text).ok().and_then(|t| limits.read(t));
        read.map_or_else(
            || {
                let text = String::from_utf8_lossy(text);
                resolve::number(self.words, &self.place(record, name), &text, limits)
            },
            Ok,
        )
    }

    fn place(&self, record: &ByteRecord, column: &str) -> String {
        let line = record.position().map_or(0, Position::line);
        self.words.text_with(
            "cli-table-place",
            &[
                ("file", self.name.to_owned()),
                ("line", line.to_string()),
                ("column", column.to_owned()),
            ],
        )
    }
}

fn ut1_of(time: DateTime<Utc>) -> Ut1 {
    let j2000_noon = DateTime::UNIX_EPOCH + TimeDelta::seconds(946_728_000);
    let past = time - j2000_noon;
    let seconds = past.num_seconds() as f64 + f64::from(past.subsec_nanos()) * 1e-9;
    Ut1::from_days_since_j2000(seconds / 86_400.0)
}
