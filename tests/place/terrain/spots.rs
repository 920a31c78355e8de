//! The far skyline from other spots and eye heights.

use super::{ARC_SECOND_AT_51_M, at_corner, far_skyline, world};
use crate::common::assert_within;
use dimmet::measure::Angle;
use dimmet::place::{FarSkyline, Skyline, TerrainRequest};

const POSTING_M: f64 = 3.0 * ARC_SECOND_AT_51_M;

/// A ridge of 40 m at posting 11 (1.0 km) before one of 500 m at posting 216 (20 km), both from
/// west to east; the mark and all else are at sea level.
fn two_ridges() -> FarSkyline {
    let land = world(|north, _| match north {
        11 => 40,
        216 => 500,
        _ => 0,
    });
    far_skyline(land.path(), at_corner()).expect("read")
}

fn altitude_deg(height_m: f64, away_m: f64) -> f64 {
    let drop_m = 0.87 * away_m * away_m / (2.0 * 6_380_000.0);
    ((height_m - drop_m) / away_m).atan().to_degrees()
}

#[test]
fn a_nearer_ridge_does_not_hide_for_good_what_a_higher_eye_sees() {
    let skyline = two_ridges();
    let (near_m, far_m) = (11.0 * POSTING_M, 216.0 * POSTING_M);
    let north = |east_m, north_m, eye_m| {
        skyline
            .altitude(Angle::ZERO, east_m, north_m, eye_m)
            .degrees()
    };
    for eye_m in [0.0, 1.1, 1.6, 10.0, 20.0, 35.0, 60.0] {
        let (near, far) = (
            altitude_deg(40.0 - eye_m, near_m),
            altitude_deg(500.0 - eye_m, far_m),
        );
        assert_eq!(
            near > far,
            eye_m < 16.0,
            "the far one emerges from about 16 m on"
        );
        assert_within(north(0.0, 0.0, eye_m), near.max(far), 0.003, "by hand");
    }
    for step_m in [-150.0, -40.0, 40.0, 150.0, 400.0] {
        let near = altitude_deg(38.4, near_m - step_m);
        assert_within(north(0.0, step_m, 1.6), near, 0.003, "nearer by so much");
        assert_within(
            north(step_m, 0.0, 1.6),
            north(0.0, 0.0, 1.6),
            0.003,
            "along the ridge",
        );
        let far = altitude_deg(470.0, far_m - step_m);
        assert_within(
            north(0.0, step_m, 30.0),
            far.max(altitude_deg(10.0, near_m - step_m)),
            0.003,
            "from 30 m",
        );
    }
}

#[test]
fn seen_askew_from_another_spot_a_ridge_keeps_its_place() {
    let skyline = two_ridges();
    let near_m = 11.0 * POSTING_M;
    for azimuth_deg in [300.0, 345.0, 20.0, 50.0] {
        let azimuth = Angle::from_degrees(azimuth_deg);
        for (east_m, north_m) in [(0.0, 0.0), (120.0, -80.0), (-90.0, 150.0)] {
            let away_m = (near_m - north_m) / azimuth.cos();
            let actual = skyline.altitude(azimuth, east_m, north_m, 1.6).degrees();
            assert_within(actual, altitude_deg(38.4, away_m), 0.003, "by hand");
        }
    }
}

#[test]
fn a_summit_moves_against_the_spot() {
    // A summit of 3 x 3 postings 2 km to the north and a spot 100 m to the east of the mark.
    let land = world(|north, east| i16::from((21..=23).contains(&north) && east.abs() <= 1) * 300);
    let skyline = far_skyline(land.path(), at_corner()).expect("read");
    let points = skyline.points(100.0, 0.0, 1.6);
    let raised: Vec<f64> = points
        .iter()
        .filter(|(_, altitude)| altitude.degrees() > 8.0)
        .map(|(azimuth, _)| azimuth.signed().degrees())
        .collect();
    let middle = raised.iter().sum::<f64>() / raised.len() as f64;
    let away_m = 21.0 * POSTING_M;
    let expected = -(100.0 / away_m).atan().to_degrees();
    assert_within(middle, expected, 0.15, "its bearing by hand");
    assert!(raised.len() > 30, "{}", raised.len());
}

#[test]
fn the_points_make_a_skyline() {
    let skyline = two_ridges();
    let made = Skyline::measured(&skyline.points(0.0, 0.0, 1.6));
    for azimuth in [0.0, 7.77, 90.0, 350.02] {
        let azimuth = Angle::from_degrees(azimuth);
        let expected = skyline.altitude(azimuth, 0.0, 0.0, 1.6).degrees().max(0.0);
        assert_within(
            made.altitude(azimuth).degrees(),
            expected,
            1e-9,
            "the same line",
        );
    }
}

#[test]
fn the_ground_is_that_of_the_tiles_and_a_wrong_elevation_is_noticed() {
    let land = world(|_, _| 250);
    let request = TerrainRequest {
        radius_m: 5000.0,
        ..at_corner()
    };
    let skyline = far_skyline(land.path(), request).expect("read");
    assert_eq!(skyline.ground_m(), 250.0);
    assert_eq!(skyline.nearest_m(), 200.0);
    assert_eq!(skyline.disagreement_m(225.0), None);
    assert_eq!(skyline.disagreement_m(215.0), Some(35.0));
    assert_eq!(skyline.disagreement_m(300.0), Some(-50.0));
}
