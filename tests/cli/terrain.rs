//! Terrain on the command line: looked along, kept beside the site file, remarked on.

use crate::program::run;
use std::path::{Path, PathBuf};

/// A site on the valley floor of the checked tile, in a folder of its own.
fn site_file(folder: &Path, elevation_m: f64, terrain: &str) -> PathBuf {
    let file = folder.join("valley.site.ron");
    let text = format!(
        "(name: \"Valley\", latitude_deg: 36.6028, longitude_deg: -84.2122, \
         elevation_m: {elevation_m}, time_zone: \"America/New_York\", terrain: {terrain:?})"
    );
    std::fs::write(&file, text).expect("written");
    file
}

fn tile() -> String {
    let tile = Path::new(env!("CARGO_MANIFEST_DIR")).join("tests/data/terrain/jacksboro.tif");
    tile.to_str().expect("a plain path").to_owned()
}

/// Altitudes by dense sampling along geodesics (PROJ through pyproj; the file says how), every
/// 10 degrees.
fn expected() -> Vec<(f64, f64)> {
    let file = concat!(
        env!("CARGO_MANIFEST_DIR"),
        "/tests/data/terrain/skyline.csv"
    );
    let text = std::fs::read_to_string(file).expect("reference data");
    text.lines()
        .filter(|line| line.starts_with("0,0,1.6,"))
        .map(|line| {
            let numbers: Vec<f64> = line
                .split(',')
                .map(|n| n.parse().expect("a number"))
                .collect();
            (numbers[3], numbers[4])
        })
        .filter(|(azimuth_deg, _)| azimuth_deg % 10.0 == 0.0)
        .collect()
}

#[test]
fn the_skyline_is_the_valleys_and_is_kept_beside_the_site() {
    let folder = tempfile::tempdir().expect("a temporary folder");
    let file = site_file(folder.path(), 318.0, &tile());
    let site = file.to_str().expect("a plain path");
    let look = || {
        run(&[
            "skyline", "--site", site, "--step", "10", "--format", "json",
        ])
    };
    let first = look();
    let document: serde_json::Value = serde_json::from_str(&first.out).expect("JSON");
    let rows = document["rows"].as_array().expect("a list");
    let expected = expected();
    assert_eq!((rows.len(), expected.len()), (36, 36));
    for (row, (azimuth_deg, altitude_deg)) in rows.iter().zip(expected) {
        assert_eq!(row["az_deg"].as_f64(), Some(azimuth_deg));
        let found = row["alt_deg"].as_f64().expect("a number");
        // As in the place's own test: the reference looks 25 km far, the program 60.
        assert!((found - altitude_deg).abs() < 0.02, "{row}: {altitude_deg}");
        assert_eq!(row["kind"], "terrain", "{row}");
    }
    // The excerpt is smaller than the circle that is looked at.
    assert!(
        first.err.contains("lies outside its elevation tiles"),
        "{}",
        first.err
    );
    assert!(!first.err.contains("apart"), "{}", first.err);
    let kept = folder.path().join("valley.terrain");
    let when = std::fs::metadata(&kept)
        .and_then(|about| about.modified())
        .expect("kept");
    assert_eq!(look().out, first.out);
    let again = std::fs::metadata(&kept)
        .and_then(|about| about.modified())
        .expect("kept");
    assert_eq!(when, again, "not worked out a second time");
}

#[test]
fn ground_elsewhere_than_the_site_file_says_is_remarked_on() {
    let folder = tempfile::tempdir().expect("a temporary folder");
    let file = site_file(folder.path(), 900.0, &tile());
    let site = file.to_str().expect("a plain path");
    let run = run(&["skyline", "--site", site, "--step", "90"]);
    assert!(
        run.err.contains("318 m") && run.err.contains("582 m apart"),
        "{}",
        run.err
    );
}

#[test]
fn a_spot_too_far_off_for_the_marks_terrain_is_remarked_on() {
    let folder = tempfile::tempdir().expect("a temporary folder");
    let file = site_file(folder.path(), 318.0, &tile());
    let text = std::fs::read_to_string(&file).expect("readable");
    let spots = "spots: [(name: \"near\", east_m: 900.0), (name: \"mill\", east_m: -4000.0)])";
    std::fs::write(&file, text.trim_end_matches(')').to_owned() + ", " + spots).expect("written");
    let site = file.to_str().expect("a plain path");
    let run = run(&["skyline", "--site", site, "--step", "90"]);
    assert_eq!(run.code, 0, "{}", run.err);
    assert!(
        run.err.contains("mill lies 4.0 km") && !run.err.contains("near"),
        "{}",
        run.err
    );
}

#[test]
fn a_missing_tile_is_one_sentence_and_no_answer() {
    let folder = tempfile::tempdir().expect("a temporary folder");
    let file = site_file(folder.path(), 318.0, "hills.tif");
    let site = file.to_str().expect("a plain path");
    let run = run(&["night", "--site", site, "--date", "2026-12-04"]);
    assert_eq!(run.code, 2);
    assert!(run.out.is_empty());
    assert!(
        run.err.contains("hills.tif") && run.err.lines().count() == 1,
        "{}",
        run.err
    );
}
