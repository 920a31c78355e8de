//! The star list.

use crate::common::assert_within;
use dimmet::measure::Tt;
use dimmet::sky::stars::{bright_stars, star_named};
use std::collections::HashSet;

#[test]
fn the_list_is_whole() {
    let stars = bright_stars();
    assert_eq!(stars.len(), 919);
    assert!(
        stars
            .windows(2)
            .all(|pair| pair[0].magnitude <= pair[1].magnitude)
    );
    assert!(stars.iter().all(|star| star.magnitude <= 4.5));
    let names: Vec<&str> = stars
        .iter()
        .filter_map(|star| star.name.as_deref())
        .collect();
    assert_eq!(names.len(), 283);
    assert_eq!(
        names.iter().collect::<HashSet<_>>().len(),
        names.len(),
        "names are unique"
    );
    assert_eq!(
        stars
            .iter()
            .map(|star| star.hip)
            .collect::<HashSet<_>>()
            .len(),
        919
    );
}

// The Bright Star Catalogue's places for J2000.0 (from memory), rounded to 1 s and 1': enough
// to see names at the wrong stars.
#[test]
fn names_stand_at_their_stars() {
    let j2000 = Tt::from_days_since_j2000(0.0);
    for (name, ra_h, ra_min, ra_s, dec_deg, dec_min) in [
        ("Sirius", 6.0, 45.0, 9.0, -16.0, -43.0),
        ("Vega", 18.0, 36.0, 56.0, 38.0, 47.0),
        ("Regulus", 10.0, 8.0, 22.0, 11.0, 58.0),
        ("Spica", 13.0, 25.0, 12.0, -11.0, -10.0),
        ("Aldebaran", 4.0, 35.0, 55.0, 16.0, 31.0),
        ("Antares", 16.0, 29.0, 24.0, -26.0, -26.0),
        ("Rigil Kentaurus", 14.0, 39.0, 36.0, -60.0, -50.0),
    ] {
        let direction = star_named(name).unwrap().direction(j2000);
        let ra_deg = 15.0 * (ra_h + ra_min / 60.0 + ra_s / 3600.0);
        assert_within(direction.longitude().degrees(), ra_deg, 0.005, name);
        assert_within(
            direction.latitude().degrees(),
            dec_deg + dec_min / 60.0,
            0.02,
            name,
        );
    }
    assert!(star_named("regulus").is_some());
    assert!(star_named("Nobody's Star").is_none());
}

// Alpha Centauri moves 3.7 arcsec a year (Hipparcos).
#[test]
fn stars_move() {
    let star = star_named("Rigil Kentaurus").unwrap();
    let (then, now) = (
        Tt::from_days_since_j2000(0.0),
        Tt::from_days_since_j2000(36_525.0),
    );
    let moved = star.direction(then).angle_to(star.direction(now)).arcsec();
    assert_within(moved, 371.0, 1.0, "alpha Centauri in a century");
}
