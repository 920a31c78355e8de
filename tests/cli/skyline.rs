//! `dimmet skyline` in its three forms. What it says is checked in the place's own tests.

use crate::program::run;
use dimmet::place::skyline_from_table;

fn skyline(more: &[&str]) -> crate::program::Run {
    let mut arguments = vec!["skyline", "--site", "fennick-common"];
    arguments.extend(more);
    run(&arguments)
}

#[test]
fn json_has_a_row_for_each_step_with_what_blocks_and_what_is_open() {
    let document = skyline(&["--step", "0.5", "--format", "json"]).json();
    assert_eq!(document["dimmet"], 1);
    assert_eq!(document["spot"], "mark");
    assert_eq!(document["stature"], "adult");
    assert_eq!(document["measured"], "mark");
    let rows = document["rows"].as_array().expect("a list");
    assert_eq!(rows.len(), 720);
    assert_eq!(rows[719]["az_deg"], 359.5);
    // The oak due west has open sky beneath its crown, over the hedge.
    let oak = &rows[2 * 276];
    assert_eq!(
        (&oak["kind"], &oak["blocker"]),
        (&"obstacle".into(), &"oak".into())
    );
    let opening = &oak["openings"][0];
    let degrees = |name: &str| opening[name].as_f64().expect("a number");
    assert!(degrees("floor_deg") < degrees("ceiling_deg"), "{oak}");
    assert!(degrees("ceiling_deg") < oak["alt_deg"].as_f64().expect("a number"));
    let hill = &rows[2 * 40];
    assert_eq!(
        (&hill["kind"], hill["blocker"].is_null()),
        (&"measured".into(), true)
    );
}

#[test]
fn csv_reads_back_as_a_measured_skyline() {
    let csv = skyline(&["--format", "csv"]).out;
    assert!(
        csv.starts_with("az_deg,alt_deg,kind,blocker,openings\n"),
        "{csv}"
    );
    let points = skyline_from_table(csv.as_bytes()).expect("it reads back");
    assert_eq!(points.len(), 360);
    let document = skyline(&["--format", "json"]).json();
    for (point, row) in points
        .iter()
        .zip(document["rows"].as_array().expect("a list"))
    {
        assert_eq!(row["az_deg"].as_f64(), Some(point.azimuth_deg));
        assert_eq!(row["alt_deg"].as_f64(), Some(point.altitude_deg));
    }
}

#[test]
fn whose_eyes_from_where_and_when_make_a_difference() {
    let south = |more: &[&str]| {
        let mut arguments = vec!["--step", "90", "--format", "json"];
        arguments.extend(more);
        let document = skyline(&arguments).json();
        let altitude = document["rows"][2]["alt_deg"].as_f64().expect("a number");
        (altitude, document)
    };
    let (adult, _) = south(&[]);
    let (child, document) = south(&["--stature", "child"]);
    assert!(child > adult, "{child} {adult}");
    assert_eq!(document["eye_height_m"], 1.1);
    // The beech in the south stands bare in December; what is left is the hills.
    let (bare, document) = south(&["--date", "2026-12-05"]);
    assert!(bare < adult, "{bare} {adult}");
    assert_eq!(document["date"], "2026-12-05");
    let (_, document) = south(&["--spot", "pond lawn"]);
    assert_eq!(
        (&document["measured"], &document["is_measured_left_out"]),
        (&"far".into(), &false.into())
    );
}

#[test]
fn the_page_says_which_measured_skyline_counts() {
    let page = skyline(&["--spot", "bandstand", "--step", "30"]).out;
    assert!(
        page.starts_with("Skyline at bandstand, Fennick Common (eye 2.70 m over"),
        "{page}"
    );
    assert!(
        page.contains("Of what was measured elsewhere the parts marked far count."),
        "{page}"
    );
    assert_eq!(page.lines().count(), 2 + 1 + 1 + 12, "{page}");
}

#[test]
fn bad_steps_dates_and_spots_are_refused_in_one_sentence() {
    for (arguments, expected) in [
        (
            ["--step", "0"],
            "dimmet: --step is \"0\", but must be a number from 0.01 to 90 degrees",
        ),
        (
            ["--step", "nan"],
            "dimmet: --step is \"nan\", but must be a number from 0.01 to 90 degrees",
        ),
        (
            ["--date", "2026-13-01"],
            "dimmet: --date is \"2026-13-01\", but must be a date like 2026-12-05",
        ),
        (
            ["--spot", "roof"],
            "dimmet: Fennick Common has no spot \"roof\"; its spots are \"mark\", \"pond lawn\", \
             \"bandstand\"",
        ),
    ] {
        let run = skyline(&arguments);
        assert_eq!((run.code, run.err.trim()), (2, expected));
        assert!(run.out.is_empty());
    }
}

#[test]
fn a_night_is_planned_for_the_eyes_that_are_named() {
    let night = |stature: &str| {
        run(&[
            "night",
            "--site",
            "fennick-common",
            "--date",
            "2026-12-05",
            "--format",
            "json",
            "--stature",
            stature,
        ])
        .json()
    };
    let hidden = |document: &serde_json::Value| {
        let bodies = document["bodies"].as_array().expect("a list").clone();
        bodies
            .iter()
            .map(|body| body["skyline_events"].clone())
            .collect::<Vec<_>>()
    };
    let (adult, child) = (night("adult"), night("child"));
    assert_ne!(hidden(&adult), hidden(&child));
    assert_eq!(hidden(&adult), hidden(&night("adult")));
}
