//! `dimmet positions` for one instant.

use crate::program::run;
use dimmet::light::Eye;
use dimmet::measure::TimeScales;
use dimmet::place::Site;
use dimmet::plan::{Lamps, Sight, target};
use dimmet::sky::{Body, Ephemeris};
use serde_json::Value;

const COLUMNS: [&str; 23] = [
    "body",
    "jd_tt",
    "delta_t_s",
    "alt_deg",
    "alt_refracted_deg",
    "az_deg",
    "ra_deg",
    "dec_deg",
    "geo_ra_deg",
    "geo_dec_deg",
    "distance_au",
    "elongation_deg",
    "phase_angle_deg",
    "illuminated_fraction",
    "diameter_arcsec",
    "magnitude",
    "bright_limb_deg",
    "topo_diameter_arcsec",
    "topo_illuminated_fraction",
    "topo_bright_limb_deg",
    "sky_cd_m2",
    "extinction_mag",
    "limit_mag",
];

const EYES: [&str; 4] = ["passer_by", "visitor", "keen", "optics"];

fn positions(at: &str, rest: &[&str]) -> crate::program::Run {
    let mut arguments = vec!["positions", "--at", at, "--lat", "-33.9", "--lon", "-70.5"];
    arguments.extend(rest);
    run(&arguments)
}

#[test]
fn json_holds_every_column_of_every_body() {
    let document = positions("2026-12-05T17:40:00+01:00", &["--format", "json"]).json();
    assert_eq!(document["utc"], "2026-12-05T16:40:00.000Z");
    assert_eq!(document["local_time"], "2026-12-05T17:40:00.000+01:00");
    assert_eq!(document.get("scale"), None, "it is UTC");
    let bodies = document["bodies"].as_array().expect("a list");
    let names: Vec<&str> = bodies.iter().filter_map(|b| b["body"].as_str()).collect();
    assert_eq!(
        names,
        [
            "sun", "moon", "mercury", "venus", "mars", "jupiter", "saturn", "uranus", "neptune"
        ]
    );
    for body in bodies {
        let body = body.as_object().expect("an object");
        assert_eq!(body.len(), COLUMNS.len() + 1);
        let margins = body["margin_mag"].as_object().expect("an object");
        let has_all = EYES.iter().all(|eye| margins.contains_key(*eye));
        assert!(has_all && margins.len() == EYES.len(), "{margins:?}");
        for column in COLUMNS {
            assert!(body.contains_key(column), "{column} of {}", body["body"]);
        }
    }
    let sun = &bodies[0];
    assert_eq!(sun["elongation_deg"], Value::Null, "the Sun has none");
    assert!(bodies[3]["elongation_deg"].is_f64(), "Venus has one");
}

#[test]
fn bodies_come_once_each_in_the_order_asked_for() {
    let asked = [
        "--body", "mars", "--body", "venus", "--body", "mars", "--format", "csv",
    ];
    let table = positions("2026-12-05T17:40:00Z", &asked).succeeds();
    let lines: Vec<&str> = table.lines().collect();
    let margins = EYES.map(|eye| format!(",margin_mag_{eye}")).concat();
    assert_eq!(lines[0], COLUMNS.join(",") + &margins);
    assert!(
        lines[1].starts_with("mars,") && lines[2].starts_with("venus,"),
        "{table}"
    );
    assert_eq!(lines.len(), 3);
}

#[test]
fn a_stated_delta_t_is_used_and_civil_time_is_ut1_before_1972() {
    let asked = ["--delta-t", "45.5", "--body", "sun", "--format", "json"];
    let document = positions("1700-06-01T12:00:00", &asked).json();
    assert_eq!(document["scale"], "ut1");
    assert_eq!(document["bodies"][0]["delta_t_s"], 45.5);
    // 1700 June 1, 12h is JD 2342124.0 (Meeus, 2nd ed., ch. 7: counting days), plus 45.5 s.
    let jd_tt = document["bodies"][0]["jd_tt"].as_f64().expect("a number");
    crate::common::assert_within(jd_tt, 2_342_124.0 + 45.5 / 86_400.0, 1e-8, "Julian date");
}

/// The plan's margin for the same bodies at the same instant, at a site with nothing stated but
/// its place: the Moon is up on this evening.
#[test]
fn margins_are_those_of_the_plan() {
    let asked = ["--elevation", "850", "--format", "json"];
    let document = positions("2026-12-19T23:55:00Z", &asked).json();
    let mut site = Site::new("hill", -33.9, -70.5, chrono_tz::UTC).expect("a site");
    site.elevation_m = 850.0;
    let sight = Sight::of_site(&site).expect("usual air");
    let at = "2026-12-19T23:55:00Z".parse().expect("a time");
    let moment = TimeScales::new()
        .moment_from_civil(at)
        .expect("a supported time");
    let span = Ephemeris::new()
        .cover(moment.tt(), moment.tt(), &Body::ALL)
        .expect("a supported year");
    let observer = site.observer();
    let epoch = span.at(moment);
    let view = epoch.seen_by(&observer);
    let glow = Lamps::of(&view).glow(&sight.sky);
    let mut seen = 0;
    for row in document["bodies"].as_array().expect("a list") {
        let body: Body = row["body"]
            .as_str()
            .expect("a name")
            .parse()
            .expect("a body");
        let is_up = row["alt_refracted_deg"].as_f64().expect("a number") >= 0.0;
        if body == Body::Sun || !is_up {
            assert_eq!(row["sky_cd_m2"], Value::Null, "{body:?}");
            assert_eq!(row["margin_mag"]["keen"], Value::Null, "{body:?}");
            continue;
        }
        seen += 1;
        let target = target(&view, body).expect("a magnitude");
        for (eye, name) in Eye::ALL.into_iter().zip(EYES) {
            let margin = glow.margin(&target, &sight.gaze(eye));
            let told = |value: &Value| value.as_f64().expect("a number");
            let near = crate::common::assert_within;
            near(
                told(&row["margin_mag"][name]),
                margin.margin_mag,
                1e-4,
                name,
            );
            near(
                told(&row["extinction_mag"]),
                margin.extinction_mag,
                1e-4,
                "extinction",
            );
            near(
                told(&row["sky_cd_m2"]),
                margin.luminance.total(),
                1e-6,
                "sky",
            );
            if eye == Eye::Visitor {
                near(told(&row["limit_mag"]), margin.limit_mag, 1e-4, "limit");
            }
        }
    }
    assert!(seen >= 3, "only {seen} bodies are up");
}

#[test]
fn the_page_has_a_line_for_each_body() {
    let page = positions("2026-12-05T17:40:00Z", &[]).succeeds();
    for part in ["−33.9000°", "Venus", "Neptune", "magnitude"] {
        assert!(page.contains(part), "{part} is missing in:\n{page}");
    }
}

#[test]
fn help_version_and_completions_are_results() {
    assert!(run(&["--help"]).succeeds().contains("positions"));
    assert!(run(&["positions", "--help"]).succeeds().contains("--table"));
    let version = format!("dimmet {}\n", env!("CARGO_PKG_VERSION"));
    assert_eq!(run(&["--version"]).succeeds(), version);
    for shell in ["bash", "zsh", "fish", "elvish", "powershell"] {
        let script = run(&["completions", shell]).succeeds();
        assert!(script.contains("positions"), "{shell}");
    }
}
