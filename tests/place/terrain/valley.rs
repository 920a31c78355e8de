//! A real valley: the SRTM excerpt, against dense sampling by pyproj and numpy.

use super::{data, far_skyline, rows};
use crate::common::assert_within;
use dimmet::measure::Angle;
use dimmet::place::TerrainRequest;

#[test] // tests/data/terrain/make_terrain.py, which samples geodesics every 2 to 5 m
fn the_skyline_of_a_real_valley_is_that_of_dense_sampling() {
    let request = TerrainRequest {
        radius_m: 25_000.0,
        ..TerrainRequest::at(36.6028, -84.2122)
    };
    let skyline = far_skyline(&data("jacksboro.tif"), request).expect("read");
    let heading = std::fs::read_to_string(data("skyline.csv")).expect("read");
    assert!(heading.contains(&format!(
        "# ground at the mark: {:.3} m",
        skyline.ground_m()
    )));
    let mut worst = [0.0f64; 2];
    let (mut highest, mut compared) = (0.0f64, 0);
    for row in rows("skyline.csv") {
        let number: Vec<f64> = row.iter().map(|n| n.parse().expect("a number")).collect();
        let &[east_m, north_m, eye_m, azimuth_deg, expected_deg] = &number[..] else {
            panic!("five numbers: {row:?}");
        };
        let azimuth = Angle::from_degrees(azimuth_deg);
        let actual = skyline.altitude(azimuth, east_m, north_m, eye_m).degrees();
        let is_moved = east_m != 0.0;
        // From the mark: dense sampling passes crests by up to half a metre, 0.003 deg from 5 km;
        // the plain formula is 0.001 deg from the exact triangle.
        // From 50 or 100 m away, and 5 m up: 0.3 r/d of the altitude may be missing.
        let tolerance = if is_moved { 0.15 } else { 0.004 };
        worst[usize::from(is_moved)] =
            worst[usize::from(is_moved)].max((actual - expected_deg).abs());
        highest = highest.max(expected_deg);
        compared += 1;
        assert_within(actual, expected_deg, tolerance, &format!("{row:?}"));
    }
    assert!(
        compared > 1000 && highest > 5.0,
        "{compared} directions up to {highest}"
    );
}
