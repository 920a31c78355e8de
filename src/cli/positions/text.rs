//! Positions as a page to read.

use super::Request;
use super::row::Row;
use super::seen::Seen;
use crate::cli::page::{Page, Side};
use crate::measure::CivilScale;
use crate::sky::Body;
use crate::words::{Words, decimal};

pub(super) fn page(words: &Words, request: &Request, rows: &[Row]) -> String {
    let mut page = Page::default();
    let observer = &request.observer;
    page.line(&words.text_with(
        "positions-title",
        &[
            ("time", words.weekday_date_time(request.at.naive_local())),
            ("offset", request.at.offset().to_string()),
            ("latitude", words.degrees(observer.latitude, 4)),
            ("longitude", words.degrees(observer.longitude, 4)),
            ("elevation", decimal(observer.elevation_m, 0)),
        ],
    ));
    if CivilScale::of(request.at.to_utc()) == CivilScale::Ut1 {
        page.line(&words.text("clock-is-ut1"));
    }
    page.gap();
    let head = [
        words.text("column-body"),
        words.text("column-altitude"),
        words.text("column-azimuth"),
        words.text("column-elongation"),
        words.text("column-lit"),
        words.text("column-disc"),
        words.text("column-magnitude"),
    ];
    let mut sides = [Side::Right; 7];
    sides[0] = Side::Left;
    let lines: Vec<Vec<String>> = rows.iter().map(|row| line(words, row)).collect();
    page.table(&head, &lines, &sides);
    page.gap();
    seen_table(&mut page, words, rows);
    page.line(&words.text_with(
        "positions-note",
        &[("pressure", decimal(observer.air.pressure_hpa, 0))],
    ));
    page.text()
}

/// How those that are up stand to the sky and to eyes.
fn seen_table(page: &mut Page, words: &Words, rows: &[Row]) {
    let lines: Vec<Vec<String>> = rows
        .iter()
        .filter_map(|row| Some(seen_line(words.body(row.body), row.seen.as_ref()?)))
        .collect();
    if lines.is_empty() {
        return;
    }
    page.line(&words.text("positions-seen-title"));
    let head = [
        words.text("column-body"),
        words.text("column-sky"),
        words.text("column-extinction"),
        words.text("column-limit"),
        words.text("column-passer-by"),
        words.text("column-visitor"),
        words.text("column-keen"),
        words.text("column-optics"),
    ];
    let mut sides = [Side::Right; 8];
    sides[0] = Side::Left;
    page.table(&head, &lines, &sides);
    page.gap();
}

fn seen_line(name: String, seen: &Seen) -> Vec<String> {
    let sky = if seen.sky_cd_m2 < 1.0 {
        decimal(seen.sky_cd_m2, 5)
    } else {
        decimal(seen.sky_cd_m2, 0)
    };
    let mut line = vec![
        name,
        sky,
        decimal(seen.extinction_mag, 2),
        decimal(seen.limit_mag, 1),
    ];
    line.extend(seen.margins_mag.map(|margin_mag| decimal(margin_mag, 1)));
    line
}

fn line(words: &Words, row: &Row) -> Vec<String> {
    let of_phase = |text: String| match row.body {
        Body::Sun => words.text("no-value"),
        _ => text,
    };
    vec![
        words.body(row.body),
        words.degrees(row.refracted_altitude, 1),
        words.azimuth(row.place.azimuth),
        of_phase(words.elongation(&row.appearance)),
        of_phase(words.percent(row.appearance.illuminated_fraction)),
        words.disc(row.topo_appearance.diameter),
        words.magnitude(row.appearance.magnitude),
    ]
}
