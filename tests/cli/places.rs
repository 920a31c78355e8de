//! `positions --table` against JPL DE440: every row of `places.csv` (its head says how it was
//! made), told the row's UT1 and TT - UT1. Mars to Neptune are fitted to DE440, so for those
//! five it is no independent check.

use crate::common::assert_within;
use crate::program::run_with_input;
use std::collections::HashMap;
use std::path::Path;

type Record = HashMap<String, String>;

fn records(text: &[u8]) -> Vec<Record> {
    let mut reader = csv::ReaderBuilder::new()
        .comment(Some(b'#'))
        .from_reader(text);
    reader
        .deserialize()
        .map(|row| row.expect("a row"))
        .collect()
}

fn data(name: &str) -> Vec<Record> {
    let path = Path::new(env!("CARGO_MANIFEST_DIR"))
        .join("tests/data")
        .join(name);
    records(&std::fs::read(path).expect("reference data"))
}

fn number(record: &Record, column: &str) -> Option<f64> {
    let text = record[column].as_str();
    (!text.is_empty()).then(|| text.parse().unwrap_or_else(|_| panic!("{column}: {text}")))
}

/// Places to what the program promises: arcseconds by body within 1900 to 2100, and beyond.
fn tolerance_arcsec(body: &str, era: &str) -> f64 {
    match (body, era == "1900-2100") {
        ("sun" | "mercury" | "venus", true) => 0.1,
        ("mars" | "jupiter" | "saturn" | "neptune", true) => 0.3,
        ("uranus", true) => 0.6,
        ("moon", true) => 0.7,
        ("sun" | "mercury" | "venus", false) => 0.5,
        ("moon", false) => 5.0,
        (_, false) => 0.8,
        (_, true) => panic!("no tolerance for {body}"),
    }
}

#[test]
fn every_row_of_the_reference_comes_out() {
    let sites: HashMap<String, Record> = data("sites.csv")
        .into_iter()
        .map(|site| (site["site"].clone(), site))
        .collect();
    let expected = data("places.csv");
    assert_eq!(expected.len(), 936);
    let mut table = "id,ut1,lat_deg,lon_deg,elevation_m,delta_t_s,body\n".to_owned();
    for row in &expected {
        let site = &sites[&row["site"]];
        let fields = [
            &row["id"],
            &row["ut1"],
            &site["lat_deg"],
            &site["lon_east_deg"],
            &site["elevation_m"],
            &row["delta_t_s"],
            &row["body"],
        ];
        table += &(fields.map(String::as_str).join(",") + "\n");
    }
    let printed = run_with_input(&["positions", "--table", "-"], table.as_bytes()).succeeds();
    let actual = records(printed.as_bytes());
    assert_eq!(actual.len(), expected.len());
    for (actual, expected) in actual.iter().zip(&expected) {
        assert_eq!(actual["id"], expected["id"], "order is kept");
        compare(actual, expected);
    }
}

fn compare(actual: &Record, expected: &Record) {
    let (id, body) = (&expected["id"], expected["body"].as_str());
    let what = |column: &str| format!("{column} of row {id} ({body}), DE440");
    let both = |ours: &str, theirs: &str| {
        let (ours, theirs) = (number(actual, ours), number(expected, theirs));
        (ours.expect("defined"), theirs.expect("defined"))
    };
    let arcsec = tolerance_arcsec(body, &expected["era"]);
    for (ours, theirs, latitude) in [
        ("az_deg", "az_deg", "alt_deg"),
        ("ra_deg", "topo_ra_deg", "topo_dec_deg"),
        ("geo_ra_deg", "geo_ra_deg", "geo_dec_deg"),
    ] {
        let (actual, reference) = both(ours, theirs);
        let along = (actual - reference + 540.0).rem_euclid(360.0) - 180.0;
        let circle = number(expected, latitude)
            .expect("defined")
            .to_radians()
            .cos();
        assert_within(along * circle * 3600.0, 0.0, arcsec, &what(ours));
    }
    for (ours, theirs) in [
        ("alt_deg", "alt_deg"),
        ("dec_deg", "topo_dec_deg"),
        ("geo_dec_deg", "geo_dec_deg"),
    ] {
        let (actual, reference) = both(ours, theirs);
        assert_within((actual - reference) * 3600.0, 0.0, arcsec, &what(ours));
    }
    for (ours, theirs, tolerance) in [
        // 1 s of UT1 is 1.2e-5 days: the reference gives it to the millisecond.
        ("jd_tt", "jd_tt", 2e-8),
        ("distance_au", "distance_apparent_au", 1e-4),
        ("diameter_arcsec", "angular_diameter_arcsec", 0.02),
    ] {
        let (actual, reference) = both(ours, theirs);
        assert_within(actual, reference, tolerance, &what(ours));
    }
    for (ours, theirs, tolerance) in [
        ("elongation_deg", "elongation_deg", 2.0 * arcsec / 3600.0),
        ("illuminated_fraction", "illuminated_fraction", 0.0005),
        ("bright_limb_deg", "bright_limb_pa_deg", 0.1),
    ] {
        match (number(actual, ours), number(expected, theirs)) {
            (Some(actual), Some(reference)) => {
                let difference = (actual - reference + 540.0).rem_euclid(360.0) - 180.0;
                assert_within(difference, 0.0, tolerance, &what(ours));
            }
            (actual, reference) => assert_eq!(actual, reference, "{}", what(ours)),
        }
    }
    // The reference has no magnitude for the Sun and the Moon.
    if let Some(reference) = number(expected, "magnitude") {
        let actual = number(actual, "magnitude").expect("defined");
        assert_within(actual, reference, 0.02, &what("magnitude"));
    }
}
