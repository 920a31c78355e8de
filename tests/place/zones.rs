//! The list of zones and the suggestion.

use chrono_tz::Tz;
use dimmet::measure::Angle;
use dimmet::place::zone;

fn suggested(latitude_deg: f64, longitude_deg: f64) -> Option<Tz> {
    zone::suggestion(
        Angle::from_degrees(latitude_deg),
        Angle::from_degrees(longitude_deg),
    )
}

#[test]
fn the_list_is_the_iana_list_in_order() {
    let names: Vec<&str> = zone::names().collect();
    assert!(names.len() > 500, "only {} zones", names.len());
    assert!(names.is_sorted(), "the list must be in order");
    for name in &names {
        assert_eq!(zone::parse(name).map(|zone| zone.name()), Ok(*name));
    }
}

#[test]
fn a_misspelled_zone_is_answered_with_the_nearest_names() {
    let refusal = |name: &str| zone::parse(name).expect_err("no such zone").to_string();
    assert_eq!(
        refusal("europe/london"),
        "there is no time zone \"europe/london\"; did you mean Europe/London?"
    );
    for (name, meant) in [
        ("Europe/Lodnon", "Europe/London"),
        ("America/New York", "America/New_York"),
        ("Melbourne", "Australia/Melbourne"),
        ("Asia/Ulan Bator", "Asia/Ulan_Bator"),
    ] {
        let error = zone::parse(name).expect_err("no such zone");
        assert_eq!(error.nearest.first(), Some(&meant), "{name}: {error}");
    }
    assert_eq!(
        refusal("qqqqqqqqqqqq"),
        "there is no time zone \"qqqqqqqqqqqq\"; give an IANA name such as Europe/London"
    );
    assert!(
        refusal(&"x".repeat(100_000)).len() < 300,
        "a long name is not repeated whole"
    );
}

#[test]
fn places_get_their_zone() {
    // Cities with their IANA zones (common knowledge).
    for (latitude_deg, longitude_deg, expected) in [
        (51.5, -0.12, Tz::Europe__London),
        (-37.81, 144.96, Tz::Australia__Melbourne),
        (69.65, 18.96, Tz::Europe__Oslo),
        (40.71, -74.0, Tz::America__New_York),
        (-13.83, -171.76, Tz::Pacific__Apia),
    ] {
        assert_eq!(suggested(latitude_deg, longitude_deg), Some(expected));
        assert_eq!(
            suggested(latitude_deg, longitude_deg + 360.0),
            Some(expected),
            "a turn on"
        );
    }
    assert_eq!(suggested(0.0, -30.0), Some(Tz::Etc__GMTPlus2), "at sea");
    assert_eq!(suggested(f64::NAN, 0.0), None);
    assert_eq!(suggested(0.0, f64::INFINITY), None);
    assert_eq!(suggested(91.0, 0.0), None);
    for latitude_deg in [-90.0, 90.0] {
        assert!(
            suggested(latitude_deg, 180.0).is_some(),
            "the poles have a zone"
        );
    }
}
