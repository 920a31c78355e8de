//! Measured skylines, outlines and breaks.

use crate::common::assert_within;
use dimmet::measure::Angle;
use dimmet::place::{Site, Skyline, SkylinePoint, demo_sites};
use proptest::prelude::*;

fn degrees(value: f64) -> Angle {
    Angle::from_degrees(value)
}
fn measured(points: &[(f64, f64)]) -> Skyline {
    let points: Vec<_> = points
        .iter()
        .map(|(a, h)| (degrees(*a), degrees(*h)))
        .collect();
    Skyline::measured(&points)
}
fn altitude_deg(skyline: &Skyline, azimuth_deg: f64) -> f64 {
    skyline.altitude(degrees(azimuth_deg)).degrees()
}

#[test]
fn it_is_straight_between_points_and_wraps_at_north() {
    let skyline = measured(&[(20.0, 2.0), (180.0, 4.0), (340.0, 6.0)]);
    for (azimuth, expected) in [
        (20.0, 2.0),
        (100.0, 3.0),
        (180.0, 4.0),
        (260.0, 5.0),
        (340.0, 6.0),
        (350.0, 5.0),
        (0.0, 4.0),
        (10.0, 3.0),
        (-10.0, 5.0),
        (370.0, 3.0),
    ] {
        assert_within(
            altitude_deg(&skyline, azimuth),
            expected,
            1e-9,
            "straight line by hand",
        );
    }
    let breaks: Vec<f64> = skyline
        .breaks()
        .iter()
        .map(|b| b.degrees().round())
        .collect();
    assert_eq!(breaks, [20.0, 180.0, 340.0], "north is no bend");
    assert_within(skyline.highest().degrees(), 6.0, 1e-9, "its highest point");
}

#[test]
fn a_point_at_north_is_a_bend() {
    let skyline = measured(&[(0.0, 5.0), (90.0, 1.0), (270.0, 1.0)]);
    assert_within(
        altitude_deg(&skyline, 315.0),
        3.0,
        1e-9,
        "straight line by hand",
    );
    assert_eq!(skyline.breaks().first(), Some(&Angle::ZERO));
    assert_eq!(skyline.breaks().len(), 3);
}

#[test]
fn one_point_is_level_none_is_open_and_below_zero_counts_as_zero() {
    let level = measured(&[(123.0, 7.0)]);
    for azimuth in [0.0, 122.9, 123.1, 359.9] {
        assert_within(altitude_deg(&level, azimuth), 7.0, 1e-9, "level");
    }
    assert_eq!(measured(&[]), Skyline::open());
    assert_eq!(Skyline::default(), Skyline::open());
    assert_eq!(Skyline::open().highest(), Angle::ZERO);
    // From -2 at 0 to 2 at 90: level to 45, then rising.
    let dipping = measured(&[(0.0, -2.0), (90.0, 2.0), (180.0, 2.0), (270.0, -2.0)]);
    assert_eq!(altitude_deg(&dipping, 30.0), 0.0);
    assert_within(altitude_deg(&dipping, 67.5), 1.0, 1e-9, "half-way up");
    assert!(
        dipping
            .breaks()
            .iter()
            .any(|b| (b.degrees() - 45.0).abs() < 1e-9)
    );
    // Odd input is put in order rather than trusted.
    assert_eq!(
        measured(&[(340.0, 6.0), (20.0, 2.0)]),
        measured(&[(20.0, 2.0), (340.0, 6.0)])
    );
    assert_eq!(
        measured(&[(f64::NAN, 6.0), (20.0, f64::INFINITY)]),
        Skyline::open()
    );
}

#[test]
fn the_outline_goes_once_round_with_both_sides_of_each_jump() {
    for site in demo_sites() {
        for spot in &site.spots {
            let skyline = site.skyline(spot);
            let outline = skyline.outline(degrees(0.5));
            let azimuths: Vec<f64> = outline.iter().map(|(a, _)| a.degrees()).collect();
            assert!(azimuths.is_sorted(), "ascending");
            assert_within(azimuths[0], 0.0, 1e-12, "from north");
            assert_within(azimuths[azimuths.len() - 1], 360.0, 1e-9, "to north");
            let widest = azimuths
                .array_windows()
                .map(|[a, b]| b - a)
                .fold(0.0, f64::max);
            assert!(widest <= 0.5 + 1e-9, "{widest}");
            for edge in skyline.breaks() {
                let within = degrees(1e-7);
                for side in [
                    skyline.altitude(*edge - within),
                    skyline.altitude(*edge + within),
                ] {
                    let is_drawn = outline.iter().any(|(a, h)| {
                        (*a - *edge).signed().abs() < within && (*h - side).abs().degrees() < 1e-4
                    });
                    assert!(is_drawn, "{}: both sides of {}", site.name, edge.degrees());
                }
            }
        }
    }
}

#[test]
fn between_neighbouring_breaks_it_is_smooth() {
    // A jump or a bend inside would show as a second difference far above a smooth curve's,
    // which falls with the square of the step.
    for site in demo_sites() {
        let skyline = site.skyline(&site.spots[0]);
        for [from, to] in skyline.breaks().array_windows() {
            let second_difference = |parts: f64| {
                let step = (*to - *from) / parts;
                let value = |k: f64| skyline.altitude(*from + step * k).radians();
                let points: Vec<f64> = (1..parts as usize - 1).map(|k| value(k as f64)).collect();
                points
                    .array_windows()
                    .map(|[a, b, c]| (a - 2.0 * b + c).abs())
                    .fold(0.0, f64::max)
            };
            let (coarse, fine) = (second_difference(20.0), second_difference(200.0));
            assert!(
                fine < 0.03 * coarse + 1e-13,
                "{}: {coarse:e} {fine:e}",
                from.degrees()
            );
        }
    }
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(100))]

    /// Where a measured skyline and obstacles cross, the higher is kept on each side.
    #[test]
    fn measured_and_obstacles_together_are_the_higher_of_both(
        altitudes in prop::collection::vec(-3.0..15.0, 2..30),
    ) {
        let step = 360.0 / altitudes.len() as f64;
        let points: Vec<SkylinePoint> = altitudes.iter().enumerate()
            .map(|(k, altitude_deg)| SkylinePoint { azimuth_deg: step * k as f64, altitude_deg: *altitude_deg })
            .collect();
        let mut bare: Site = demo_sites()[0].clone();
        bare.skyline.clear();
        let mut both = bare.clone();
        both.skyline = points.clone();
        let mark = both.spots[0].clone();
        let (obstacles, both) = (bare.skyline(&mark), both.skyline(&mark));
        let pairs: Vec<(f64, f64)> = points.into_iter().map(Into::into).collect();
        let hills = measured(&pairs);
        for k in 0..7200 {
            let azimuth = 0.011 + f64::from(k) * 0.05;
            let higher = altitude_deg(&obstacles, azimuth).max(altitude_deg(&hills, azimuth));
            assert_within(altitude_deg(&both, azimuth), higher, 1e-9, "the higher of both");
        }
    }
}
