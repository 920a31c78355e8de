//! Bad usage and bad input: code 2, one sentence that names the place, nothing else.

use crate::program::run;
use std::fs;
use std::path::Path;

const AT: &str = "2026-12-05T17:40:00Z";

fn position(at: &str, lat: &str, lon: &str, rest: &[&str]) -> crate::program::Run {
    let mut arguments = vec!["positions", "--at", at, "--lat", lat, "--lon", lon];
    arguments.extend(rest);
    run(&arguments)
}

fn night(site: &str, date: &str) -> crate::program::Run {
    run(&["night", "--site", site, "--date", date])
}

#[test]
fn coordinates_that_are_none() {
    for bad in ["91", "-90.001", "NaN", "inf", "-inf", "1e400", "north", ""] {
        position(AT, bad, "0", &[]).refused(&["--lat", "90 degrees"]);
    }
    for bad in ["180.5", "-181", "nan", "infinity", "3,4"] {
        position(AT, "0", bad, &[]).refused(&["--lon", "180 degrees"]);
    }
    position(AT, "0", "0", &["--elevation", "9001"]).refused(&["--elevation", "metres"]);
    position(AT, "0", "0", &["--elevation", "NaN"]).refused(&["--elevation", "\"NaN\""]);
    position(AT, "0", "0", &["--delta-t", "inf"]).refused(&["--delta-t", "seconds"]);
    position(AT, "0", "0", &["--body", "pluto"]).refused(&["--body", "\"pluto\"", "venus"]);
}

#[test]
fn times_and_dates_that_are_none() {
    for bad in [
        "now",
        "2026-02-29T00:00:00Z",
        "2026-12-05",
        "2026-12-05T25:00:00Z",
    ] {
        position(bad, "0", "0", &[]).refused(&["--at", bad]);
    }
    for bad in ["1599-12-31T23:59:59Z", "2401-01-01T00:00:00Z"] {
        position(bad, "0", "0", &[]).refused(&["--at", &bad[..10], "1600 to 2400"]);
    }
    for bad in ["2026-02-30", "5 December", "2026-1-1", "99999-01-01"] {
        night("fennick-common", bad).refused(&["--date", bad]);
    }
    night("fennick-common", "1599-12-31").refused(&["--date", "1599-12-31", "1600 to 2400"]);
    night("fennick-common", "2401-01-01").refused(&["--date", "2401-01-01", "1600 to 2400"]);
    run(&["--now", "soon"]).refused(&["--now", "\"soon\""]);
    if cfg!(feature = "desktop") {
        run(&["--renderer", "pencil"]).refused(&["--renderer", "pencil"]);
    }
    run(&["--date", "soon"]).refused(&["--date", "\"soon\""]);
}

#[test]
fn usage_that_is_wrong() {
    run(&["positions"]).refused(&["--at", "--lat", "--lon"]);
    run(&["night", "--date", "2026-12-05"]).refused(&["--site"]);
    run(&["dusk"]).refused(&["dusk"]);
    run(&["night", "--colour"]).refused(&["--colour"]);
    position(AT, "0", "0", &["--format", "xml"]).refused(&["--format", "xml", "json"]);
    run(&["positions", "--table", "x.csv", "--at", AT]).refused(&["--table", "--at"]);
    run(&[
        "--site",
        "fennick-common",
        "night",
        "--site",
        "x",
        "--date",
        "y",
    ])
    .refused(&["subcommand"]);
}

#[test]
fn sites_that_are_none() {
    night("no-such-site", "2026-12-05").refused(&["--site", "no-such-site", "fennick-common"]);
    let spot = [
        "night",
        "--site",
        "fennick-common",
        "--date",
        "2026-12-05",
        "--spot",
        "roof",
    ];
    run(&spot).refused(&["\"roof\"", "\"pond lawn\""]);
    let folder = tempfile::tempdir().expect("a folder");
    let path = |name: &str| folder.path().join(name);
    let shown = |path: &Path| path.to_str().expect("a plain path").to_owned();
    night(&shown(folder.path()), "2026-12-05").refused(&["folder"]);

    fs::write(path("noise"), [0xff, 0xfe, 0, 1, 0x80]).expect("written");
    night(&shown(&path("noise")), "2026-12-05").refused(&["noise"]);
    fs::write(path("huge"), vec![b' '; 50 * 1024 * 1024]).expect("written");
    night(&shown(&path("huge")), "2026-12-05").refused(&["huge"]);

    let head = "Site(name: \"A\", latitude_deg: 1.0,\nlongitude_deg: 2.0, time_zone: ";
    for (tail, parts) in [
        ("\"Europe/Nowhere\")", ["line 2", "Europe/Nowhere"]),
        ("\"UTC\", colour: 3)", ["line 2", "colour"]),
        ("\"UTC\", name: \"B\")", ["line 2", "name"]),
        ("\"UTC\",\nelevation_m: NaN)", ["line 3", "elevation_m"]),
        (
            "\"UTC\",\nskyline: [(90.0, 1.0), (20.0, 1.0)])",
            ["line 3", "20"],
        ),
        (
            "\"UTC\",\nskyline: [(90.0, 1.0), (90.0, 2.0)])",
            ["line 3", "90"],
        ),
    ] {
        let file = path("bad.site.ron");
        fs::write(&file, format!("{head}{tail}")).expect("written");
        night(&shown(&file), "2026-12-05").refused(&["bad.site.ron", parts[0], parts[1]]);
    }
}

#[test]
fn a_date_that_the_zone_skipped() {
    // Samoa went from 29 to 31 December 2011 (IANA zone Pacific/Apia).
    let folder = tempfile::tempdir().expect("a folder");
    let file = folder.path().join("apia.site.ron");
    let text = "Site(name: \"A\", latitude_deg: -13.8, longitude_deg: -171.8, \
                time_zone: \"Pacific/Apia\")";
    fs::write(&file, text).expect("written");
    let site = file.to_str().expect("a plain path");
    night(site, "2011-12-30").refused(&["2011-12-30", "Pacific/Apia"]);
    night(site, "2011-12-31").succeeds();
}
