//! `dimmet night` in its three forms. The times themselves are checked in the plan's own tests.

use crate::program::run;
use chrono::DateTime;
use serde_json::Value;

fn night(site: &str, date: &str, format: &str) -> crate::program::Run {
    run(&["night", "--site", site, "--date", date, "--format", format])
}

/// Fails unless the value is a moment whose two times are the same instant.
fn assert_moment(value: &Value, what: &str) {
    let time = |name: &str| {
        let text = value[name]
            .as_str()
            .unwrap_or_else(|| panic!("{what} lacks {name}"));
        DateTime::parse_from_rfc3339(text).unwrap_or_else(|error| panic!("{what}: {error}"))
    };
    assert_eq!(time("utc"), time("local_time"), "{what}");
}

fn names(value: &Value) -> Vec<&str> {
    let object = value.as_object().expect("an object");
    let mut names: Vec<&str> = object.keys().map(String::as_str).collect();
    names.sort_unstable();
    names
}

#[test]
fn json_has_the_shape_that_is_promised() {
    let document = night("fennick-common", "2026-12-05", "json").json();
    for name in ["start", "middle", "end"] {
        assert_moment(&document[name], name);
    }
    for name in [
        "set",
        "civil_dusk",
        "nautical_dusk",
        "astronomical_dusk",
        "astronomical_dawn",
        "nautical_dawn",
        "civil_dawn",
        "rise",
    ] {
        assert_moment(&document["sun"][name], name);
    }
    for name in ["optics_from", "optics_until"] {
        assert_moment(&document["safety"][name], name);
    }
    let mut counts = (0, 0);
    for body in document["bodies"].as_array().expect("a list") {
        assert_eq!(
            names(body),
            [
                "body",
                "is_up_at_start",
                "rise",
                "set",
                "skyline_events",
                "windows"
            ]
        );
        for list in ["rise", "set"] {
            for moment in body[list].as_array().expect("a list") {
                assert_moment(moment, list);
            }
        }
        for event in body["skyline_events"].as_array().expect("a list") {
            assert_eq!(
                names(event),
                ["alt_deg", "az_deg", "kind", "local_time", "utc"]
            );
            assert_moment(event, "skyline event");
            assert!(
                matches!(event["kind"].as_str(), Some("clears" | "hidden")),
                "{event}"
            );
            counts.0 += 1;
        }
        for window in body["windows"].as_array().expect("a list") {
            for moment in ["start", "end", "best"] {
                assert_moment(&window[moment], moment);
            }
            let eye = window["eye"].as_str().expect("an eye");
            assert!(
                ["passer-by", "visitor", "keen", "optics"].contains(&eye),
                "{window}"
            );
            let margin_mag = window["best_margin_mag"].as_f64().expect("a margin");
            assert!(margin_mag >= 0.0, "{window}");
            for stray in [
                "start_earliest",
                "start_latest",
                "end_earliest",
                "end_latest",
            ] {
                if !window[stray].is_null() {
                    assert_moment(&window[stray], stray);
                }
            }
            assert!(
                window["best_clearance_deg"]
                    .as_f64()
                    .is_some_and(|c| c > 0.0),
                "{window}"
            );
            counts.1 += 1;
        }
    }
    assert!(
        counts.0 > 8 && counts.1 > 4,
        "events and windows: {counts:?}"
    );
}

#[test]
fn what_does_not_occur_is_null() {
    let document = night("ternskjell-quay", "2026-06-21", "json").json();
    for name in ["set", "civil_dusk", "nautical_dusk", "rise"] {
        assert_eq!(document["sun"][name], Value::Null, "{name}");
    }
    assert_eq!(document["safety"]["optics_from"], Value::Null);
    assert_eq!(document["safety"]["optics_until"], Value::Null);
}

#[test]
fn csv_has_a_line_for_each_window() {
    let table = night("fennick-common", "2026-12-05", "csv").succeeds();
    let document = night("fennick-common", "2026-12-05", "json").json();
    let bodies = document["bodies"].as_array().expect("a list");
    let windows: Vec<(&str, &Value)> = bodies
        .iter()
        .flat_map(|body| {
            let windows = body["windows"].as_array().expect("a list");
            windows
                .iter()
                .map(|w| (body["body"].as_str().expect("a name"), w))
        })
        .collect();
    let mut reader = csv::Reader::from_reader(table.as_bytes());
    let header = reader.headers().expect("a header").clone();
    let column = |name: &str| header.iter().position(|h| h == name).expect("a column");
    let lines: Vec<csv::StringRecord> = reader.records().map(|r| r.expect("a line")).collect();
    assert_eq!(lines.len(), windows.len());
    for (line, (body, window)) in lines.iter().zip(windows) {
        assert_eq!(&line[column("body")], body);
        assert_eq!(
            Value::from(&line[column("start_utc")]),
            window["start"]["utc"]
        );
        assert_eq!(
            Value::from(&line[column("end_local_time")]),
            window["end"]["local_time"]
        );
        assert_eq!(Value::from(&line[column("end_cause")]), window["end_cause"]);
    }
}

#[test]
fn the_page_reads_aloud_and_cautions() {
    let page = night("fennick-common", "2026-12-05", "text").succeeds();
    let sentence = page.find("Visitors see Saturn from").expect("a sentence");
    let caution = page.find("Caps stay on until at least").expect("a caution");
    let table = page.find("clearance\n").expect("a table");
    assert!(
        sentence < caution && caution < table,
        "in that order:\n{page}"
    );
    for part in [
        "Sat 5 Dec 2026",
        "Sun 6 Dec 2026",
        "Sun-watcher",
        "ISO 12312-2",
    ] {
        assert!(page.contains(part), "{part} is missing in:\n{page}");
    }
    assert!(!page.contains('«'), "a message is missing in:\n{page}");
}

#[test]
fn polar_day_and_night_are_answers() {
    let day = night("ternskjell-quay", "2026-06-21", "text").succeeds();
    assert!(day.contains("The Sun does not set"), "{day}");
    assert!(day.contains("No optics time at dusk"), "{day}");
    let night = night("ternskjell-quay", "2026-12-21", "text").succeeds();
    assert!(night.contains("The Sun does not rise"), "{night}");
}

#[test]
fn a_site_is_found_by_name_path_and_spot() {
    let by_slug = night("fennick-common", "2026-12-05", "csv").succeeds();
    assert_eq!(
        night("Fennick Common", "2026-12-05", "csv").succeeds(),
        by_slug
    );
    let path = concat!(
        env!("CARGO_MANIFEST_DIR"),
        "/assets/sites/fennick-common.site.ron"
    );
    assert_eq!(night(path, "2026-12-05", "csv").succeeds(), by_slug);
    let spot = [
        "night",
        "--site",
        "fennick-common",
        "--date",
        "2026-12-05",
        "--spot",
        "pond lawn",
        "--format",
        "csv",
    ];
    assert_ne!(
        run(&spot).succeeds(),
        by_slug,
        "another spot sees other edges"
    );
}

#[test]
fn the_years_at_the_ends_are_planned_and_say_what_civil_time_is() {
    for date in ["1600-01-02", "2400-12-30"] {
        let document = night("fennick-common", date, "json").json();
        assert_eq!(document["start"]["scale"], "ut1", "{date}");
        assert_moment(&document["start"], date);
    }
}

#[test]
fn what_was_measured_elsewhere_is_told_of_where_it_does_not_count() {
    let folder = tempfile::tempdir().expect("a temporary folder");
    let file = folder.path().join("lawn.site.ron");
    let text = "(name: \"Lawn\", latitude_deg: 51.0, longitude_deg: 0.0, time_zone: \"UTC\", \
                spots: [(name: \"mark\"), (name: \"pond lawn\", east_m: 20.0)], \
                skyline: [(90.0, 4.0), (270.0, 6.0)], skyline_far: [(200.0, 300.0)])";
    std::fs::write(&file, text).expect("written");
    let site = file.to_str().expect("a plain path");
    let at = |command: &str, spot: &str| {
        run(&[
            command,
            "--site",
            site,
            "--date",
            "2026-12-05",
            "--spot",
            spot,
        ])
    };
    for command in ["night", "daylight"] {
        let mark = at(command, "mark");
        assert_eq!((mark.code, mark.err.as_str()), (0, ""));
        let lawn = at(command, "pond lawn");
        assert_eq!(lawn.code, 0);
        assert!(
            lawn.err.starts_with("pond lawn: ") && lawn.err.contains("left out"),
            "{command}: {}",
            lawn.err
        );
        assert_eq!(lawn.err.lines().count(), 1);
    }
}
