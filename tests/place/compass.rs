//! Compass and clinometer, and skylines put together from parts.

use crate::common::assert_within;
use dimmet::measure::Angle;
use dimmet::place::survey::compass::{North, Reading, ReadingError, Sweep, Tilt, merged};
use dimmet::place::{Skyline, SkylinePoint};
use proptest::prelude::*;

fn point(azimuth_deg: f64, altitude_deg: f64) -> SkylinePoint {
    SkylinePoint {
        azimuth_deg,
        altitude_deg,
    }
}

fn degrees(degrees: f64) -> Angle {
    Angle::from_degrees(degrees)
}

fn skyline(points: &[SkylinePoint]) -> Skyline {
    let angles: Vec<(Angle, Angle)> = points
        .iter()
        .map(|point| (degrees(point.azimuth_deg), degrees(point.altitude_deg)))
        .collect();
    Skyline::measured(&angles)
}

#[test]
fn an_eastern_declination_is_added_to_the_bearing() {
    let reading = Reading {
        bearing_deg: 359.0,
        tilt: Tilt::Degrees(4.5),
    };
    let true_north = reading.point(North::True).unwrap();
    assert_within(true_north.azimuth_deg, 359.0, 1e-9, "a true bearing");
    let east = North::Magnetic {
        declination: degrees(2.5),
    };
    let point = reading.point(east).unwrap();
    assert_within(point.azimuth_deg, 1.5, 1e-9, "359 + 2.5 through north");
    assert_within(point.altitude_deg, 4.5, 1e-12, "altitude");
    let west = North::Magnetic {
        declination: degrees(-2.5),
    };
    let azimuth_deg = reading.point(west).unwrap().azimuth_deg;
    assert_within(azimuth_deg, 356.5, 1e-9, "west is subtracted");
}

#[test]
fn a_slope_of_a_hundred_percent_is_45_degrees() {
    assert_within(
        Tilt::Percent(100.0).altitude().degrees(),
        45.0,
        1e-12,
        "100 %",
    );
    // By hand: atan(0.1) = 5.710593 degrees.
    assert_within(
        Tilt::Percent(10.0).altitude().degrees(),
        5.710_593,
        1e-6,
        "10 %",
    );
}

#[test]
fn errors_of_reading_become_errors_of_the_point() {
    let error = ReadingError {
        bearing_deg: 3.0,
        declination_deg: 4.0,
        tilt: 1.0,
    };
    let reading = |tilt| Reading {
        bearing_deg: 250.0,
        tilt,
    };
    let magnetic = North::Magnetic {
        declination: Angle::ZERO,
    };
    let by_degrees = reading(Tilt::Degrees(20.0)).error(magnetic, &error);
    assert_within(by_degrees.azimuth.degrees(), 5.0, 1e-9, "3 and 4 together");
    assert_within(by_degrees.altitude.degrees(), 1.0, 1e-9, "one degree");
    let by_percent = reading(Tilt::Percent(0.0)).error(North::True, &error);
    assert_within(by_percent.azimuth.degrees(), 3.0, 1e-9, "no declination");
    // By hand: atan(0.01) = 0.572939 degrees.
    assert_within(
        by_percent.altitude.degrees(),
        0.572_939,
        1e-6,
        "1 % at the level",
    );
    // By hand, downwards being the larger: atan(1.00) - atan(0.99) = 0.287916 degrees.
    let steep = reading(Tilt::Percent(100.0)).error(North::True, &error);
    assert_within(
        steep.altitude.degrees(),
        0.287_916,
        1e-6,
        "1 % at 45 degrees",
    );
}

#[test]
fn what_cannot_be_is_refused_in_a_sentence() {
    let refusal = |bearing_deg, tilt, north| {
        let reading = Reading { bearing_deg, tilt };
        reading.point(north).expect_err("refused").to_string()
    };
    assert_eq!(
        refusal(361.0, Tilt::Degrees(1.0), North::True),
        "the bearing is 361, but must lie between 0 and 360 degrees"
    );
    assert_eq!(
        refusal(10.0, Tilt::Degrees(91.0), North::True),
        "the altitude is 91, but must lie between -10 and 90 degrees"
    );
    let far = North::Magnetic {
        declination: degrees(200.0),
    };
    assert!(refusal(10.0, Tilt::Degrees(1.0), far).starts_with("the declination is 200"));
    assert!(refusal(f64::NAN, Tilt::Degrees(1.0), North::True).contains("NaN"));
}

#[test]
fn a_partial_sweep_leaves_the_rest_as_it_was() {
    let before = [point(0.0, 2.0), point(120.0, 8.0), point(240.0, 5.0)];
    let new = [point(100.0, 3.0), point(110.0, 4.0), point(130.0, 6.0)];
    let sweep = Sweep::around(&new);
    assert_eq!(
        sweep,
        Sweep::Sector {
            from_deg: 100.0,
            to_deg: 130.0
        }
    );
    let after = skyline(&merged(&before, &new, sweep));
    let (old, at) = (skyline(&before), |azimuth_deg| degrees(azimuth_deg));
    for azimuth_deg in [0.0, 50.0, 99.98, 130.02, 180.0, 240.0, 359.0] {
        let expected_deg = old.altitude(at(azimuth_deg)).degrees();
        let actual_deg = after.altitude(at(azimuth_deg)).degrees();
        assert_within(actual_deg, expected_deg, 1e-9, &format!("at {azimuth_deg}"));
    }
    for (azimuth_deg, expected_deg) in [(100.0, 3.0), (105.0, 3.5), (120.0, 5.0), (130.0, 6.0)] {
        let actual_deg = after.altitude(at(azimuth_deg)).degrees();
        assert_within(
            actual_deg,
            expected_deg,
            1e-9,
            &format!("new at {azimuth_deg}"),
        );
    }
}

#[test]
fn a_sweep_across_north_is_level_elsewhere_where_nothing_was() {
    let new = [point(350.0, 5.0), point(10.0, 7.0)];
    let sweep = Sweep::around(&new);
    let points = merged(&[], &new, sweep);
    assert!(
        points.is_sorted_by(|a, b| a.azimuth_deg < b.azimuth_deg),
        "{points:?}"
    );
    let after = skyline(&points);
    for (azimuth_deg, expected_deg) in [
        (350.0, 5.0),
        (0.0, 6.0),
        (10.0, 7.0),
        (10.1, 0.0),
        (180.0, 0.0),
        (349.9, 0.0),
    ] {
        let actual_deg = after.altitude(degrees(azimuth_deg)).degrees();
        assert_within(actual_deg, expected_deg, 1e-9, &format!("at {azimuth_deg}"));
    }
}

#[test]
fn single_points_become_corners_and_a_whole_sweep_replaces_all() {
    let before = [point(0.0, 2.0), point(120.0, 8.0), point(240.0, 5.0)];
    let new = [point(120.004, 9.0), point(180.0, 1.0)];
    assert_eq!(
        merged(&before, &new, Sweep::Points),
        [before[0], new[0], new[1], before[2]]
    );
    assert_eq!(merged(&before, &new, Sweep::Whole), new);
    let doubled = [point(50.0, 1.0), point(50.0, 4.0)];
    assert_eq!(merged(&before, &doubled, Sweep::Whole), [doubled[1]]);
}

proptest! {
    #[test]
    fn merging_ascends_and_touches_nothing_outside(
        before in prop::collection::btree_map(0u32..3600, 0.0..30.0f64, 0..20),
        new in prop::collection::btree_map(0u32..3600, 0.0..30.0f64, 1..10),
        asked in 0.0..360.0f64,
    ) {
        let points = |map: &std::collections::BTreeMap<u32, f64>| -> Vec<SkylinePoint> {
            map.iter().map(|(tenths, alt)| point(f64::from(*tenths) / 10.0, *alt)).collect()
        };
        let (before, new) = (points(&before), points(&new));
        let sweep = Sweep::around(&new);
        let after = merged(&before, &new, sweep);
        prop_assert!(after.is_sorted_by(|a, b| a.azimuth_deg < b.azimuth_deg));
        let Sweep::Sector { from_deg, to_deg } = sweep else { panic!("a sector: {sweep:?}") };
        let past_deg = (asked - from_deg).rem_euclid(360.0);
        let width_deg = (to_deg - from_deg).rem_euclid(360.0);
        if past_deg > width_deg + 0.02 && past_deg < 359.98 {
            let old_deg = skyline(&before).altitude(degrees(asked)).degrees();
            let new_deg = skyline(&after).altitude(degrees(asked)).degrees();
            prop_assert!((old_deg - new_deg).abs() < 1e-6, "{asked}: {old_deg} {new_deg}");
        }
    }
}
