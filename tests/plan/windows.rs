//! Crossings of a skyline against JPL DE440 (tests/data/windows.csv).

use crate::reference::{date, instant, number, rows, sight, sites};
use chrono::{DateTime, Utc};
use dimmet::measure::{Angle, TimeScales};
use dimmet::place::Skyline;
use dimmet::plan::{Night, NightRequest};
use dimmet::sky::{Air, Body, Ephemeris, Observer};
use std::collections::{BTreeMap, HashMap};

/// The table rounds to whole seconds; the requirement is 3 s.
const TOLERANCE_S: f64 = 3.0;

fn skyline(name: &str, profiles: &[HashMap<String, String>]) -> Skyline {
    let points: Vec<(f64, f64)> = match name.strip_prefix("const_") {
        Some(altitude) => vec![(0.0, altitude.parse().expect("an altitude"))],
        None => profiles
            .iter()
            .filter(|row| row["profile"] == name)
            .map(|row| (number(row, "az_deg"), number(row, "alt_deg")))
            .collect(),
    };
    assert!(!points.is_empty(), "no such profile: {name}");
    Skyline::measured(
        &points
            .iter()
            .map(|(azimuth, altitude)| {
                (
                    Angle::from_degrees(*azimuth),
                    Angle::from_degrees(*altitude),
                )
            })
            .collect::<Vec<_>>(),
    )
}

#[test]
fn skyline_crossings_match_de440() {
    let sites = sites();
    let profiles = rows(include_str!("../data/profiles.csv"));
    let ephemeris = Ephemeris::new();
    let mut nights: BTreeMap<(String, String, String, String, String), Vec<_>> = BTreeMap::new();
    for row in rows(include_str!("../data/windows.csv")) {
        let key = ["site", "local_date", "obstruction", "refraction", "body"]
            .map(|column| row[column].clone());
        nights.entry(key.into()).or_default().push(row);
    }
    let (mut compared, mut worst) = (0, 0.0_f64);
    let mut wrong = Vec::new();
    for ((name, _, obstruction, refraction, body), rows) in nights {
        let site = &sites[&name];
        // Air of no pressure does not refract.
        let air = match refraction.as_str() {
            "none" => Air {
                pressure_hpa: 0.0,
                ..site.observer.air
            },
            _ => site.observer.air,
        };
        let body: Body = body.parse().expect("a known body");
        let scales = TimeScales::with_delta_t_s(number(&rows[0], "delta_t_s"));
        let plan = |date| {
            Night::plan(
                &ephemeris,
                &NightRequest {
                    observer: &Observer {
                        air,
                        ..site.observer
                    },
                    skyline: &skyline(&obstruction, &profiles),
                    zone: site.zone,
                    date,
                    scales,
                    sight: sight(),
                    eyes: &[],
                    bodies: &[body],
                },
            )
            .expect("the reference dates are supported")
        };
        // The table's nights run from noon to noon of the clock, ours from culmination to
        // culmination of the Sun: an event between the two stands in the neighbouring night.
        let evening = date(&rows[0]);
        let mut events = plan(evening)
            .body(body)
            .expect("asked for")
            .skyline_events
            .clone();
        let has_edge =
            |row: &HashMap<String, String>| row["start_by"] == "noon" || row["end_by"] == "noon";
        if rows.iter().any(has_edge) {
            for neighbour in [evening.pred_opt(), evening.succ_opt()]
                .into_iter()
                .flatten()
            {
                events.extend_from_slice(
                    &plan(neighbour)
                        .body(body)
                        .expect("asked for")
                        .skyline_events,
                );
            }
        }
        let mut check = |clears: bool, expected: DateTime<Utc>, row: &HashMap<String, String>| {
            let off_s = events
                .iter()
                .filter(|event| event.clears == clears)
                .map(|event| {
                    (scales.civil(event.moment).0 - expected)
                        .as_seconds_f64()
                        .abs()
                })
                .min_by(f64::total_cmp);
            match off_s {
                Some(off_s) if off_s <= TOLERANCE_S => {
                    compared += 1;
                    worst = worst.max(off_s);
                }
                _ => wrong.push(format!("{off_s:?} s off: {row:?}")),
            }
        };
        for row in &rows {
            if row["start_by"] == "object" {
                check(true, instant(&row["start_utc"]), row);
            }
            if row["end_by"] == "object" {
                check(false, instant(&row["end_utc"]), row);
            }
        }
    }
    println!("{compared} crossings compared, worst {worst:.2} s");
    assert!(
        wrong.is_empty(),
        "{} of {compared} wrong:\n{}",
        wrong.len(),
        wrong[..wrong.len().min(20)].join("\n")
    );
    assert!(compared > 4000, "only {compared} crossings were compared");
}
