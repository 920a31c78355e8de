//! Risings, settings and twilights against JPL DE440 (tests/data/rise_set.csv).

use crate::reference::{ReferenceSite, date, instant, number, rows, sight, sites};
use chrono::{DateTime, NaiveDate, Utc};
use dimmet::measure::{Moment, TimeScales};
use dimmet::place::Skyline;
use dimmet::plan::{Night, NightRequest};
use dimmet::sky::{Body, Ephemeris};
use std::collections::BTreeMap;

/// The table rounds to whole seconds; the requirement is 2 s between 60 S and 60 N and 20 s
/// beyond, where a body grazes its threshold.
const TOLERANCE_S: f64 = 2.0;
const POLAR_TOLERANCE_S: f64 = 20.0;

/// All events (body, name, when) of a civil date, from the two nights that share it.
fn events(
    ephemeris: &Ephemeris,
    site: &ReferenceSite,
    date: NaiveDate,
    scales: TimeScales,
) -> Vec<(Body, &'static str, DateTime<Utc>)> {
    let mut events = Vec::new();
    for evening in [date.pred_opt().expect("a day before"), date] {
        let night = Night::plan(
            ephemeris,
            &NightRequest {
                observer: &site.observer,
                skyline: &Skyline::open(),
                zone: site.zone,
                date: evening,
                scales,
                sight: sight(),
                eyes: &[],
                bodies: &Body::ALL,
            },
        )
        .expect("the reference dates are supported");
        let mut add = |body, name, moment: Moment| {
            let (utc, _) = scales.civil(moment);
            if utc.with_timezone(&site.zone).date_naive() == date {
                events.push((body, name, utc));
            }
        };
        let sun = night.sun;
        for (name, moment) in [
            ("set", sun.set),
            ("civil_dusk", sun.civil_dusk),
            ("nautical_dusk", sun.nautical_dusk),
            ("astronomical_dusk", sun.astronomical_dusk),
            ("astronomical_dawn", sun.astronomical_dawn),
            ("nautical_dawn", sun.nautical_dawn),
            ("civil_dawn", sun.civil_dawn),
            ("rise", sun.rise),
        ] {
            if let Some(moment) = moment {
                add(Body::Sun, name, moment);
            }
        }
        for body in &night.bodies {
            body.rise
                .iter()
                .for_each(|moment| add(body.body, "rise", *moment));
            body.set
                .iter()
                .for_each(|moment| add(body.body, "set", *moment));
        }
    }
    events
}

#[test]
fn risings_settings_and_twilights_match_de440() {
    let sites = sites();
    let ephemeris = Ephemeris::new();
    let mut by_day: BTreeMap<(String, NaiveDate), Vec<_>> = BTreeMap::new();
    for row in rows(include_str!("../data/rise_set.csv")) {
        if row["event"] != "transit" {
            by_day
                .entry((row["site"].clone(), date(&row)))
                .or_default()
                .push(row);
        }
    }
    let (mut compared, mut absent, mut worst) = (0, 0, [0.0_f64; 2]);
    let mut wrong = Vec::new();
    for ((name, date), rows) in by_day {
        let site = &sites[&name];
        // Rows of events that do not occur have none.
        let dated = rows.iter().find(|row| !row["delta_t_s"].is_empty());
        let scales = TimeScales::with_delta_t_s(dated.map_or(69.2, |row| number(row, "delta_t_s")));
        let found = events(&ephemeris, site, date, scales);
        let is_polar = site.observer.latitude.degrees().abs() > 60.0;
        let tolerance = if is_polar {
            POLAR_TOLERANCE_S
        } else {
            TOLERANCE_S
        };
        for row in rows {
            // Near a turning point or the date's edge the event itself may come or go.
            if !row["note"].is_empty()
                && !row["note"].starts_with("always")
                && row["note"] != "not_on_date"
            {
                continue;
            }
            if row["note"].contains("grazing") {
                continue;
            }
            let body: Body = row["body"].parse().expect("a known body");
            let same = || {
                found
                    .iter()
                    .filter(|(b, name, _)| *b == body && *name == row["event"])
            };
            if row["utc"].is_empty() {
                absent += 1;
                if let Some((_, _, when)) = same().next() {
                    wrong.push(format!(
                        "{name} {date} {body} {}: found {when}, none expected",
                        row["event"]
                    ));
                }
                continue;
            }
            let expected = instant(&row["utc"]);
            let off_s = same()
                .map(|(_, _, when)| (*when - expected).as_seconds_f64().abs())
                .min_by(f64::total_cmp);
            match off_s {
                Some(off_s) if off_s <= tolerance => {
                    compared += 1;
                    let worst = &mut worst[usize::from(is_polar)];
                    *worst = worst.max(off_s);
                }
                _ => wrong.push(format!(
                    "{name} {date} {body} {} {expected}: off by {off_s:?} s",
                    row["event"]
                )),
            }
        }
    }
    println!(
        "{compared} events compared, {absent} absences; worst {:.2} s to 60 deg, {:.2} s beyond",
        worst[0], worst[1]
    );
    assert!(
        wrong.is_empty(),
        "{} of {compared} wrong:\n{}",
        wrong.len(),
        wrong[..wrong.len().min(30)].join("\n")
    );
    assert!(
        compared > 7500 && absent > 400,
        "only {compared} events and {absent} absences were compared"
    );
}
