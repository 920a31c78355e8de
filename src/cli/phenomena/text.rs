//! Events as a page: one line each, in a visitor's words.

use super::Listed;
use crate::cli::page::{Page, Side};
use crate::measure::CivilScale;
use crate::plan::phenomena::{Circumstances, Event};
use crate::words::Words;

pub(super) fn page(words: &Words, listed: &Listed) -> String {
    let mut page = Page::default();
    let dates = [
        ("from", words.weekday_date(listed.from)),
        ("to", words.weekday_date(listed.to)),
    ];
    page.line(&match &listed.site_name {
        None => words.text_with("phenomena-title", &dates),
        Some(site) => {
            let [from, to] = dates;
            words.text_with("phenomena-title-site", &[from, to, ("site", site.clone())])
        }
    });
    let clock = listed.clock;
    page.line(&words.text_with("phenomena-clock", &[("zone", clock.zone.name())]));
    let is_ut1 = |event: &Event| clock.scales.civil(event.moment).1 == CivilScale::Ut1;
    if listed.events.iter().any(|(event, _)| is_ut1(event)) {
        page.line(&words.text("clock-is-ut1"));
    }
    if listed.site_name.is_some() {
        page.line(&words.text("phenomena-altitude-note"));
    }
    page.gap();
    if listed.events.is_empty() {
        page.line(&words.text("phenomena-none"));
    } else {
        table(&mut page, words, listed);
    }
    page.text()
}

fn table(page: &mut Page, words: &Words, listed: &Listed) {
    let mut head = vec![
        words.text("column-date"),
        words.text("column-time"),
        words.text("column-event"),
        words.text("column-value"),
    ];
    let mut sides = vec![Side::Right, Side::Right, Side::Left, Side::Left];
    if listed.site_name.is_some() {
        head.extend([
            words.text("column-altitude"),
            words.text("column-sun-altitude"),
        ]);
        sides.extend([Side::Left, Side::Right]);
    }
    let rows: Vec<Vec<String>> = listed
        .events
        .iter()
        .map(|(event, local)| row(words, listed, event, local.as_ref()))
        .collect();
    page.table(&head, &rows, &sides);
}

fn row(
    words: &Words,
    listed: &Listed,
    event: &Event,
    local: Option<&Circumstances>,
) -> Vec<String> {
    let minute = listed.clock.minute(event.moment);
    let mut row = vec![
        words.weekday_date(minute.date()),
        words.clock_time(minute.time()),
        words.event(event),
        words.event_value(event.value),
    ];
    if let Some(local) = local {
        let altitude = words.degrees(local.place.altitude, 0);
        row.push(if local.is_clear {
            altitude
        } else {
            words.text_with("phenomena-hidden", &[("altitude", altitude)])
        });
        row.push(words.degrees(local.sun_altitude, 0));
    }
    row
}
