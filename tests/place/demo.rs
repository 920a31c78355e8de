//! The demo sites.

use dimmet::place::{Instrument, demo_site, demo_sites, slug, zone};
use std::collections::BTreeSet;

#[test]
fn they_are_found_by_name_and_by_slug() {
    for (asked, name) in [
        ("Fennick Common", "Fennick Common"),
        ("fennick common", "Fennick Common"),
        ("fennick-common", "Fennick Common"),
        ("tarrow-bay-school", "Tarrow Bay School"),
        ("TERNSKJELL QUAY", "Ternskjell Quay"),
    ] {
        assert_eq!(
            demo_site(asked).map(|site| site.name.as_str()),
            Some(name),
            "{asked}"
        );
    }
    assert!(demo_site("nowhere").is_none());
    assert_eq!(slug("  St. Ann's  Hill "), "st-ann-s-hill");
    assert_eq!(demo_sites().len(), 3);
}

#[test]
fn they_lie_where_the_scenario_needs_them() {
    let latitudes: Vec<f64> = demo_sites().iter().map(|site| site.latitude_deg).collect();
    assert!(
        (45.0..55.0).contains(&latitudes[0]),
        "a mid-northern park: {latitudes:?}"
    );
    assert!(
        (-45.0..-30.0).contains(&latitudes[1]),
        "a southern school: {latitudes:?}"
    );
    assert!(
        latitudes[2] > 67.0,
        "the Sun does not always set: {latitudes:?}"
    );
    for site in demo_sites() {
        let observer = site.observer();
        let suggested = zone::suggestion(observer.latitude, observer.longitude);
        assert_eq!(
            suggested,
            Some(site.time_zone),
            "{}: the zone of the place",
            site.name
        );
        assert!(
            site.spots.len() >= 2,
            "{}: somewhere else to stand",
            site.name
        );
        let labels: BTreeSet<&str> = site.kit.iter().map(Instrument::label).collect();
        assert_eq!(labels.len(), 2, "{}: two instruments", site.name);
    }
}

#[test]
fn each_mark_sees_labelled_things_both_east_and_west() {
    for site in demo_sites() {
        let features = site.skyline(&site.spots[0]).features();
        let labels_between = |from: f64, to: f64| {
            features
                .iter()
                .filter(|feature| (from..to).contains(&feature.azimuth.degrees()))
                .map(|feature| feature.label.to_string())
                .collect::<BTreeSet<String>>()
        };
        let (east, west) = (labels_between(20.0, 180.0), labels_between(180.0, 340.0));
        assert!(east.len() >= 2, "{}: {features:?}", site.name);
        assert!(west.len() >= 2, "{}: {features:?}", site.name);
    }
}

#[test]
fn each_spot_sees_something_else() {
    for site in demo_sites() {
        let mark = site.skyline(&site.spots[0]);
        for spot in &site.spots[1..] {
            let here = site.skyline(spot);
            assert!(!here.features().is_empty(), "{} {}", site.name, spot.name);
            assert_ne!(here, mark, "{} {}", site.name, spot.name);
        }
    }
}

#[test]
fn the_school_has_a_sea_horizon_in_the_west() {
    let site = demo_site("tarrow-bay-school").expect("the school");
    let skyline = site.skyline(&site.spots[0]);
    let degrees = dimmet::measure::Angle::from_degrees;
    let is_open = |azimuth: f64| skyline.altitude(degrees(azimuth)).degrees() == 0.0;
    assert!(
        (190..280).all(|azimuth| is_open(f64::from(azimuth))),
        "sea from south to west"
    );
    assert!(!is_open(80.0), "hills in the east");
}
