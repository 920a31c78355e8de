//! `dimmet phenomena`.

use crate::program::run;

fn asked<'a>(from: &'a str, to: &'a str, rest: &[&'a str]) -> Vec<&'a str> {
    [&["phenomena", "--from", from, "--to", to][..], rest].concat()
}

/// Venus around its inferior conjunction of 2026. Source: computed with JPL DE440 (skyfield
/// 1.55): conjunction 2026-10-24 3:44 UT, greatest illuminated extent 2026-09-18 and 11-29.
#[test]
fn json_has_the_events_with_their_values() {
    let arguments = asked(
        "2026-08-01",
        "2026-11-30",
        &["--body", "venus", "--format", "json"],
    );
    let document = run(&arguments).json();
    assert_eq!(document["from"], "2026-08-01");
    let events = document["events"].as_array().expect("a list");
    let event = |kind: &str| {
        let found: Vec<_> = events
            .iter()
            .filter(|event| event["kind"] == kind)
            .collect();
        assert_eq!(found.len(), 1, "{kind} among {events:#?}");
        found[0]
    };
    let conjunction = event("inferior_conjunction_lon");
    assert_eq!(conjunction["body"], "venus");
    assert_eq!(conjunction["unit"], "deg");
    let utc = conjunction["utc"].as_str().expect("a time");
    assert!(
        utc.starts_with("2026-10-24T03:4") && utc.ends_with('Z'),
        "{utc}"
    );
    let tt = conjunction["tt"].as_str().expect("a time");
    assert!(tt.starts_with("2026-10-24T03:4"), "{tt}");
    assert!(conjunction.get("local").is_none(), "no site was named");
    let extent = event("greatest_illuminated_extent_E");
    assert!(
        extent["utc"]
            .as_str()
            .expect("a time")
            .starts_with("2026-09-1")
    );
    assert_eq!(extent["unit"], "arcsec2");
    event("greatest_illuminated_extent_W");
    event("stationary_ra_then_westward");
    event("stationary_ra_then_eastward");
    event("greatest_elongation_E");
    event("perigee");
}

/// A stated TT - UT1 moves the civil time of an event, where that is UT1, and not its TT.
#[test]
fn a_stated_delta_t_moves_the_civil_time_alone() {
    let first = |delta_t: &str| {
        let rest = ["--body", "mars", "--format", "json", "--delta-t", delta_t];
        let document = run(&asked("1801-01-01", "1802-12-31", &rest)).json();
        document["events"][0].clone()
    };
    let (plain, moved) = (first("0"), first("120"));
    assert_eq!(plain["tt"], moved["tt"]);
    assert_eq!(plain["scale"], "ut1");
    let utc = |event: &serde_json::Value| {
        let text = event["utc"].as_str().expect("a time").to_owned();
        chrono::DateTime::parse_from_rfc3339(&text).expect("a time")
    };
    assert_eq!((utc(&plain) - utc(&moved)).num_milliseconds(), 120_000);
}

#[test]
fn a_site_says_where_the_body_stands() {
    let rest = ["--site", "fennick-common", "--format", "json"];
    let document = run(&asked("2026-08-01", "2026-12-31", &rest)).json();
    assert_eq!(document["site"], "Fennick Common");
    assert_eq!(document["time_zone"], "Europe/London");
    let events = document["events"].as_array().expect("a list");
    assert!(events.len() > 20, "{} events", events.len());
    for event in events {
        let local = &event["local"];
        let number = |name: &str| local[name].as_f64().expect("a number");
        assert!((0.0..360.0).contains(&number("az_deg")), "{event}");
        assert!(number("sun_alt_deg").abs() < 63.0, "{event}");
        if number("alt_deg") < -1.0 {
            assert_eq!(local["is_clear"], false, "{event}");
        }
    }
}

#[test]
fn days_are_inclusive_and_add_up() {
    let events = |from: &str, to: &str| {
        let table = run(&asked(from, to, &["--format", "csv"])).succeeds();
        table.lines().skip(1).map(str::to_owned).collect::<Vec<_>>()
    };
    // The conjunction of 2026-10-24.
    let day = events("2026-10-24", "2026-10-24");
    assert!(
        day.iter()
            .any(|row| row.starts_with("inferior_conjunction_lon,venus")),
        "{day:?}"
    );
    let whole = events("2026-10-01", "2026-10-31");
    let parts = [
        events("2026-10-01", "2026-10-23"),
        day,
        events("2026-10-25", "2026-10-31"),
    ];
    assert_eq!(whole, parts.concat());
    // The very ends of the supported years.
    assert!(!events("1600-01-01", "1600-03-31").is_empty());
    assert!(!events("2400-10-01", "2400-12-31").is_empty());
}

#[test]
fn the_page_speaks_to_visitors() {
    let page = run(&asked("2026-01-01", "2027-12-31", &[])).succeeds();
    assert!(
        page.contains("Venus is farthest from the Sun in the evening sky"),
        "{page}"
    );
    assert!(page.contains("Saturn’s rings"), "{page}");
    assert!(!page.contains('«') && !page.contains("{ $"), "{page}");
    let site = ["--site", "tarrow-bay-school", "--body", "neptune"];
    let page = run(&asked("2026-01-01", "2026-12-31", &site)).succeeds();
    assert!(
        page.contains("Tarrow Bay School") && page.contains("hidden"),
        "{page}"
    );
    let nothing = run(&asked("2026-01-01", "2026-01-01", &["--body", "uranus"])).succeeds();
    assert!(nothing.contains("No planet has an event"), "{nothing}");
}

#[test]
fn spans_and_bodies_that_are_none() {
    run(&asked("2026-02-01", "2026-01-31", &[])).refused(&["--to", "2026-01-31", "2026-02-01"]);
    run(&asked("1599-12-31", "1600-01-31", &[])).refused(&["--from", "1600 to 2400"]);
    run(&asked("2400-12-31", "2401-01-01", &[])).refused(&["--to", "1600 to 2400"]);
    run(&asked("2026-02-30", "2026-03-01", &[])).refused(&["--from", "2026-02-30"]);
    let body = |name| run(&asked("2026-01-01", "2026-01-31", &["--body", name]));
    body("sun").refused(&["--body", "sun", "venus"]);
    body("pluto").refused(&["--body", "pluto"]);
    run(&["phenomena", "--from", "2026-01-01"]).refused(&["--to"]);
}

/// The transit of Mercury in 2032. Source: the published catalogues (from memory): 6:41, 6:43,
/// 8:54, 11:05 and 11:07 UT, 572 arcsec; the whole of it above the horizon of England.
#[test]
fn a_transit_comes_with_its_contacts_and_cautions() {
    let site = ["--site", "fennick-common", "--body", "mercury"];
    let json = [&site[..], &["--format", "json"]].concat();
    let document = run(&asked("2032-11-13", "2032-11-13", &json)).json();
    assert!(
        document["cautions"][0]
            .as_str()
            .expect("a text")
            .contains("never look at the Sun")
    );
    let events = document["events"].as_array().expect("a list");
    let transit = events
        .iter()
        .find(|event| event["kind"] == "transit")
        .expect("the transit");
    assert_eq!(transit["other"], "sun");
    assert_eq!(transit["radii"]["sun_arcsec_at_1_au"], 959.63);
    assert!(
        (transit["value"].as_f64().expect("a number") - 572.0).abs() < 1.0,
        "{transit}"
    );
    let names = ["I", "II", "greatest", "III", "IV"];
    let minutes = ["06:4", "06:4", "08:5", "11:0", "11:0"];
    for contacts in [&transit["contacts"], &transit["local"]["contacts"]] {
        let contacts = contacts.as_array().expect("a list");
        assert_eq!(contacts.len(), 5);
        for (contact, (name, minute)) in contacts.iter().zip(names.iter().zip(minutes)) {
            assert_eq!(contact["name"], *name);
            let utc = contact["utc"].as_str().expect("a time");
            assert!(
                utc.starts_with(&format!("2032-11-13T{minute}")),
                "{name}: {utc}"
            );
        }
    }
    assert!(transit["contacts"][0].get("alt_deg").is_none());
    let local = &transit["local"]["contacts"][2];
    assert!(
        local["sun_alt_deg"].as_f64().expect("a number") > 5.0,
        "{local}"
    );

    let page = run(&asked("2032-11-13", "2032-11-13", &site)).succeeds();
    assert!(page.starts_with("Caution: never look at the Sun"), "{page}");
    assert!(
        page.contains("959.63″ at 1 au") && page.contains("IV, off the disc"),
        "{page}"
    );
    assert!(!page.contains('«') && !page.contains("{ $"), "{page}");
}

/// Venus and Jupiter on 2027-08-25 and the Moon's meetings are told with both names.
#[test]
fn appulses_and_the_moon_are_told_with_both_names() {
    let listed = |rest: &[&str]| {
        let rest = [rest, &["--format", "json"]].concat();
        let document = run(&asked("2027-01-01", "2027-12-31", &rest)).json();
        document["events"].as_array().expect("a list").clone()
    };
    let count = |events: &[serde_json::Value], kind: &str, body: &str, other: &str| {
        let is_it = |event: &&serde_json::Value| {
            event["kind"] == kind && event["body"] == body && event["other"] == other
        };
        events.iter().filter(is_it).count()
    };
    let venus = listed(&["--body", "venus"]);
    assert_eq!(
        count(&venus, "appulse", "venus", "jupiter"),
        1,
        "{venus:#?}"
    );
    // The second of the pair can be asked for too.
    let jupiter = listed(&["--body", "jupiter"]);
    assert_eq!(count(&jupiter, "appulse", "venus", "jupiter"), 1);
    assert_eq!(
        count(&jupiter, "appulse", "moon", "jupiter"),
        0,
        "the Moon's need a site"
    );
    let at_site = listed(&["--site", "fennick-common", "--body", "moon"]);
    assert!(at_site.len() > 3, "{} events", at_site.len());
    for event in &at_site {
        let (body, other) = (&event["body"], &event["other"]);
        assert!(body == "moon" || other == "moon", "{event}");
        assert!(
            event["position_angle_deg"].is_f64() && event["local"].is_object(),
            "{event}"
        );
    }
    run(&asked("2027-01-01", "2027-12-31", &["--body", "moon"])).refused(&["moon", "--site"]);
}

/// The Moon over Venus on 2025-09-19, seen from England by day. Source: the year's almanacs (from
/// memory): covered about 12 UT, uncovered some 80 minutes later.
#[test]
fn an_occultation_comes_with_its_contacts() {
    let rest = ["--site", "fennick-common", "--body", "venus"];
    let json = [&rest[..], &["--format", "json"]].concat();
    let document = run(&asked("2025-09-19", "2025-09-19", &json)).json();
    let events = document["events"].as_array().expect("a list");
    let hidden = events
        .iter()
        .find(|event| event["kind"] == "lunar_occultation")
        .expect("the occultation");
    assert_eq!(
        (&hidden["body"], &hidden["other"]),
        (&"venus".into(), &"moon".into())
    );
    assert_eq!(hidden["radii"]["moon_km"], 1738.091);
    let contacts = hidden["local"]["contacts"].as_array().expect("a list");
    let names: Vec<_> = contacts
        .iter()
        .map(|contact| contact["name"].clone())
        .collect();
    assert_eq!(
        names,
        ["first_touch", "disappearance", "reappearance", "last_touch"]
    );
    let covered = contacts[1]["utc"].as_str().expect("a time");
    assert!(
        "2025-09-19T11:45" < covered && covered < "2025-09-19T12:15",
        "{covered}"
    );
    let page = run(&asked("2025-09-19", "2025-09-19", &rest)).succeeds();
    assert!(page.contains("its centre is uncovered") && page.contains("hidden by the Moon"));
    assert!(
        page.starts_with("Caution: never look at the Sun"),
        "by day: {page}"
    );
}
