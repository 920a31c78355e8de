//! A night as a page for a host: what to read aloud first, then the caution, then the times.

use super::Planned;
use crate::cli::page::{Page, Side};
use crate::measure::{CivilScale, Moment};
use crate::plan::{BodyNight, Half, Window};
use crate::sky::Body;
use crate::words::{HalfNight, Words};

/// The Sun's centre at rising and setting.
const SUNSET_ALTITUDE_DEG: f64 = -50.0 / 60.0;

pub(super) fn page(words: &Words, planned: &Planned<'_>, halves: &[Half]) -> String {
    let mut page = Page::default();
    page.line(&words.text_with(
        "night-title",
        &[
            ("site", planned.site.name.clone()),
            ("spot", planned.spot.name.clone()),
            ("date", words.weekday_date(planned.night.date)),
        ],
    ));
    let zone = planned.clock.zone.name();
    page.line(&words.text_with("clock-of-site", &[("zone", zone)]));
    if planned.clock.scales.civil(planned.night.middle).1 == CivilScale::Ut1 {
        page.line(&words.text("clock-is-ut1"));
    }
    for half in halves {
        write_half(&mut page, words, planned, *half);
    }
    page.gap();
    for caution in [
        "caution-filters",
        "caution-viewers",
        "caution-finders",
        "caution-rules",
    ] {
        page.line(&words.text(caution));
    }
    page.text()
}

fn write_half(page: &mut Page, words: &Words, planned: &Planned<'_>, half: Half) {
    let night = &planned.night;
    page.gap();
    page.line(&heading(words, planned, half));
    page.gap();
    let order = in_order(planned, half);
    let sun_stays_up = night.sun.lowest.degrees() > SUNSET_ALTITUDE_DEG;
    if sun_stays_up {
        // The same for every body, so it is said once.
        page.line(&sun(words, planned, half));
    } else {
        for body in &order {
            page.line(&words.half_night(&HalfNight {
                night,
                half,
                body: body.body,
                skyline: &planned.skyline,
                clock: planned.clock,
            }));
        }
    }
    page.gap();
    page.line(&optics(words, planned, half));
    page.gap();
    if !sun_stays_up {
        page.line(&sun(words, planned, half));
    }
    page.line(&moon(words, planned, half));
    page.gap();
    write_table(page, words, planned, half, &order);
}

fn heading(words: &Words, planned: &Planned<'_>, half: Half) -> String {
    let sun = &planned.night.sun;
    // The civil date of the moment itself: a dawn's is the morning's.
    let (moment, id) = match half {
        Half::Dusk => (sun.set.unwrap_or(planned.night.start), "night-dusk"),
        Half::Dawn => (sun.rise.unwrap_or(planned.night.end), "night-dawn"),
    };
    let date = words.weekday_date(planned.clock.date(moment));
    words.text_with(id, &[("date", date)])
}

/// The bodies that an eye can see, in the order of appearing; those that do not appear at last.
fn in_order<'a>(planned: &'a Planned<'_>, half: Half) -> Vec<&'a BodyNight> {
    let mut bodies: Vec<&BodyNight> = Body::BRIGHT
        .iter()
        .filter_map(|body| planned.night.body(*body))
        .collect();
    let appears = |body: &BodyNight| {
        let first = body.windows_in(half).first();
        first.map_or(f64::INFINITY, |window| {
            window.start.moment.seconds_since(planned.night.start)
        })
    };
    bodies.sort_by(|a, b| appears(a).total_cmp(&appears(b)));
    bodies
}

fn optics(words: &Words, planned: &Planned<'_>, half: Half) -> String {
    let optics = &planned.night.optics;
    let time = |moment: Moment| words.time(planned.clock, moment);
    match half {
        Half::Dusk => match optics.from {
            Some(from) => words.text_with("optics-from", &[("time", time(from))]),
            None => words.text("optics-none-dusk"),
        },
        Half::Dawn => match optics.until {
            Some(until) => words.text_with("optics-until", &[("time", time(until))]),
            None => words.text("optics-none-dawn"),
        },
    }
}

fn sun(words: &Words, planned: &Planned<'_>, half: Half) -> String {
    let sun = &planned.night.sun;
    let altitude = |angle| [("altitude", words.degrees(angle, 1))];
    if sun.lowest.degrees() > SUNSET_ALTITUDE_DEG {
        return words.text_with("night-sun-stays-up", &altitude(sun.lowest));
    }
    if sun.highest.degrees() < SUNSET_ALTITUDE_DEG {
        return words.text_with("night-sun-stays-down", &altitude(sun.highest));
    }
    let time = |moment| words.time_or_dash(planned.clock, moment);
    match half {
        Half::Dusk => words.text_with(
            "night-sun-dusk",
            &[
                ("set", time(sun.set)),
                ("civil", time(sun.civil_dusk)),
                ("nautical", time(sun.nautical_dusk)),
                ("astronomical", time(sun.astronomical_dusk)),
            ],
        ),
        Half::Dawn => words.text_with(
            "night-sun-dawn",
            &[
                ("astronomical", time(sun.astronomical_dawn)),
                ("nautical", time(sun.nautical_dawn)),
                ("civil", time(sun.civil_dawn)),
                ("rise", time(sun.rise)),
            ],
        ),
    }
}

/// The Moon's phase, and its rising and setting within the half.
fn moon(words: &Words, planned: &Planned<'_>, half: Half) -> String {
    let night = planned.night.body(Body::Moon);
    let (from, to) = planned.night.half(half);
    let time = |moments: Option<&Vec<Moment>>| {
        let within = |moment: &&Moment| **moment >= from && **moment <= to;
        let first = moments.and_then(|moments| moments.iter().find(within));
        words.time_or_dash(planned.clock, first.copied())
    };
    words.text_with(
        "night-moon",
        &[
            ("percent", words.percent(planned.moon.illuminated_fraction)),
            ("elongation", words.elongation(&planned.moon)),
            ("rise", time(night.map(|night| &night.rise))),
            ("set", time(night.map(|night| &night.set))),
        ],
    )
}

fn write_table(
    page: &mut Page,
    words: &Words,
    planned: &Planned<'_>,
    half: Half,
    order: &[&BodyNight],
) {
    let head = [
        words.text("column-body"),
        words.text("column-from"),
        words.text("column-until"),
        words.text("column-length"),
        words.text("column-best"),
        words.text("column-altitude"),
        words.text("column-azimuth"),
        words.text("column-clearance"),
    ];
    let lines: Vec<Vec<String>> = order
        .iter()
        .flat_map(|body| body.windows_in(half).iter().map(|w| (body.body, w)))
        .map(|(body, window)| line(words, planned, body, window))
        .collect();
    if lines.is_empty() {
        return;
    }
    let mut sides = [Side::Right; 8];
    sides[0] = Side::Left;
    page.table(&head, &lines, &sides);
}

fn line(words: &Words, planned: &Planned<'_>, body: Body, window: &Window) -> Vec<String> {
    let (start, end, best) = (window.start.moment, window.end.moment, &window.best);
    vec![
        words.body(body),
        words.time(planned.clock, start),
        words.time(planned.clock, end),
        words.duration(end.seconds_since(start)),
        words.time(planned.clock, best.moment),
        words.degrees(best.altitude, 1),
        words.azimuth(best.azimuth),
        words.degrees(best.clearance, 1),
    ]
}
