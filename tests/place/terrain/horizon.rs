//! Dip, horizon distance and single summits, against published formulas and by hand.

use super::{ARC_SECOND_AT_51_M, VOID, at_corner, far_skyline, world};
use crate::common::assert_within;
use dimmet::measure::{Angle, Progress};
use dimmet::place::{FarSkyline, Terrain, TerrainRequest};

fn north_deg(skyline: &FarSkyline, eye_m: f64) -> f64 {
    skyline.altitude(Angle::ZERO, 0.0, 0.0, eye_m).degrees()
}

#[test]
fn the_sea_dips_as_the_almanac_and_the_textbooks_say() {
    let sea = world(|_, _| 0);
    // Dip in arcminutes of the square root of the height in metres. The first is of the Nautical
    // Almanac and of Bowditch, *American Practical Navigator* (0.97 for feet), whose refraction
    // is k = 0.164; the second is geometry alone. Both are printed to three figures, so 0.3 %.
    for (refraction_k, arcmin) in [(0.164, 1.76), (0.0, 1.93)] {
        for eye_m in [25.0, 100.0] {
            let request = TerrainRequest {
                refraction_k,
                eye_height_m: eye_m,
                ..at_corner()
            };
            let skyline = far_skyline(sea.path(), request).expect("read");
            let dip = arcmin * eye_m.sqrt();
            for (azimuth, altitude) in skyline.points(0.0, 0.0, eye_m) {
                let what = format!("dip at {} from {eye_m} m, Bowditch", azimuth.degrees());
                assert_within(altitude.degrees() * -60.0, dip, 0.004 * dip, &what);
            }
            assert_eq!(skyline.void_share(), 0.0);
            assert_eq!(skyline.uncovered_share(), 0.0);
        }
    }
}

/// A tableland from 0.36 deg north on, as wide as the world; sea before it.
fn tableland(height_m: i16) -> tempfile::TempDir {
    world(move |north, _| if north >= 432 { height_m } else { 0 })
}

const AWAY_M: f64 = 432.0 * 3.0 * ARC_SECOND_AT_51_M;

#[test]
fn a_tableland_stands_as_high_as_the_surveyors_formula_says() {
    let land = tableland(500);
    let request = TerrainRequest {
        refraction_k: 0.14,
        ..at_corner()
    };
    let skyline = far_skyline(land.path(), request).expect("read");
    // Curvature and refraction together: 0.0675 K^2 m for K km, with k = 0.14
    // (C. D. Ghilani, Elementary Surveying; from memory). Its three figures are 0.5 m here.
    let drop_m = 0.0675 * (AWAY_M / 1000.0).powi(2);
    let expected = ((500.0 - 1.6 - drop_m) / AWAY_M).atan().to_degrees();
    assert_within(
        north_deg(&skyline, 1.6),
        expected,
        0.001,
        "by Ghilani's formula",
    );
    // Seen askew, its edge is farther away.
    let askew_m = AWAY_M / 30f64.to_radians().cos();
    let drop_m = 0.0675 * (askew_m / 1000.0).powi(2);
    let expected = ((500.0 - 1.6 - drop_m) / askew_m).atan().to_degrees();
    for azimuth in [30.0, 330.0] {
        let azimuth = Angle::from_degrees(azimuth);
        let actual = skyline.altitude(azimuth, 0.0, 0.0, 1.6).degrees();
        // A parallel bends away from a straight line by 0.1 % of the distance here.
        assert_within(actual, expected, 0.002, "by Ghilani's formula, askew");
    }
}

#[test]
fn what_lies_behind_the_horizon_is_hidden_by_the_textbook_amount() {
    // Horizon distance without refraction: 3.57 km times the root of the height in metres (common
    // in textbooks). From 30 m it is 19.6 km, so that 33 m of what is 40 km away are hidden.
    let hidden_m = (AWAY_M / 3570.0 - 30f64.sqrt()).powi(2);
    assert_within(hidden_m, 33.0, 0.5, "by hand");
    let seen = |height_m: i16| {
        let request = TerrainRequest {
            refraction_k: 0.0,
            eye_height_m: 30.0,
            ..at_corner()
        };
        let skyline = far_skyline(tableland(height_m).path(), request).expect("read");
        north_deg(&skyline, 30.0)
    };
    let sea = seen(0);
    assert_within(seen(31), sea, 1e-4, "31 m are below the horizon");
    let emerging = (seen(38) - sea).to_radians() * AWAY_M;
    assert_within(emerging, 38.0 - hidden_m, 1.0, "metres above the horizon");
}

#[test]
fn a_single_summit_is_found_in_its_direction() {
    // One posting, 20 km to the east: 340 postings of 58.4 m.
    let summit = world(|north, east| if (north, east) == (0, 340) { 1000 } else { 0 });
    let skyline = far_skyline(summit.path(), at_corner()).expect("read");
    let points = skyline.points(0.0, 0.0, 1.6);
    let highest = points
        .iter()
        .max_by(|a, b| a.1.radians().total_cmp(&b.1.radians()))
        .expect("points");
    // The parallel leaves the great circle east by half the longitude times the sine of latitude.
    let bearing = 90.0 - 0.5 * 340.0 / 1200.0 * 51f64.to_radians().sin();
    assert_within(highest.0.degrees(), bearing, 0.1, "its bearing by hand");
    // A degree of longitude at latitude 51: 70.2 km (111.412 cos B - 0.094 cos 3B).
    let away_m: f64 = 340.0 / 1200.0 * 70_197.0;
    let drop_m = 0.87 * away_m * away_m / (2.0 * 6_380_000.0);
    let expected = ((1000.0 - 1.6 - drop_m) / away_m).atan().to_degrees();
    // Lines 0.1 deg apart pass its tip by up to 17 m, where a flank of 1000 m in 93 m has fallen by
    // 18 %.
    let top = highest.1.degrees();
    assert!(top <= expected + 1e-3, "{top} above {expected}");
    assert_within(top, expected, 0.2 * expected, "its height by hand");
    // One posting to either side, 93 m, is 0.27 deg.
    for (azimuth, altitude) in points {
        let is_beside = (azimuth.degrees() - bearing).abs() > 0.35;
        assert!(
            !is_beside || altitude.degrees() < 0.0,
            "{}",
            azimuth.degrees()
        );
    }
}

#[test]
fn voids_do_not_block_and_are_counted() {
    let void_from = |first: i64| {
        let land = world(move |north, _| match north {
            north if (first..first + 200).contains(&north) => VOID,
            432.. => 500,
            _ => 0,
        });
        far_skyline(land.path(), at_corner()).expect("read")
    };
    let before_it = void_from(200);
    let over_its_edge = void_from(400);
    assert!(before_it.void_share() > 0.01 && before_it.void_share() < 0.2);
    assert_eq!(before_it.uncovered_share(), 0.0);
    let whole = far_skyline(tableland(500).path(), at_corner()).expect("read");
    assert_within(
        north_deg(&before_it, 1.6),
        north_deg(&whole, 1.6),
        1e-6,
        "a void before the edge hides nothing",
    );
    // The edge is unknown up to posting 600, so the land is seen from there on.
    let away_m = 600.0 * 3.0 * ARC_SECOND_AT_51_M;
    let drop_m = 0.87 * away_m * away_m / (2.0 * 6_380_000.0);
    let expected = ((500.0 - 1.6 - drop_m) / away_m).atan().to_degrees();
    assert_within(north_deg(&over_its_edge, 1.6), expected, 0.002, "by hand");
}

#[test]
fn where_tiles_are_missing_nothing_blocks_and_the_share_is_said() {
    let land = tableland(500);
    std::fs::remove_file(land.path().join("N51W004.hgt")).expect("removed");
    let skyline = far_skyline(land.path(), at_corner()).expect("read");
    let altitude = |azimuth| {
        let azimuth = Angle::from_degrees(azimuth);
        skyline.altitude(azimuth, 0.0, 0.0, 1.6).degrees()
    };
    assert!(altitude(330.0) > 0.3, "land to the north-west");
    assert_eq!(altitude(30.0), 0.0, "nothing known to the north-east");
    assert_within(
        skyline.uncovered_share(),
        0.25,
        0.01,
        "a quarter of the circle",
    );
}

#[test]
fn a_coarse_result_comes_first_and_work_stops_when_asked() {
    let land = tableland(500);
    let terrain = Terrain::open(land.path(), at_corner()).expect("opened");
    let progress = Progress::new();
    let mut coarse = Vec::new();
    let mut share_then = 0.0;
    let fine = terrain
        .far_skyline(&progress, &mut |skyline| {
            share_then = progress.share();
            coarse.push(skyline.points(0.0, 0.0, 1.6));
        })
        .expect("read")
        .expect("not cancelled")
        .points(0.0, 0.0, 1.6);
    assert_eq!((coarse.len(), coarse[0].len(), fine.len()), (1, 180, 3600));
    assert!(share_then > 0.1 && share_then < 0.5, "{share_then}");
    assert_eq!(progress.share(), 1.0);
    for (k, (azimuth, altitude)) in coarse[0].iter().enumerate() {
        assert_within(
            azimuth.degrees(),
            fine[20 * k].0.degrees(),
            1e-9,
            "each 2 deg",
        );
        assert_within(
            altitude.degrees(),
            fine[20 * k].1.degrees(),
            1e-9,
            "the same line",
        );
    }
    assert!(fine.is_sorted_by(|a, b| a.0 < b.0), "ascending");

    let progress = Progress::new();
    let stopped = terrain.far_skyline(&progress, &mut |_| progress.cancel());
    assert_eq!(stopped, Ok(None), "cancelled between the passes");
    assert!(progress.share() < 0.5);
    let stopped = terrain.far_skyline(&progress, &mut |_| panic!("cancelled before it began"));
    assert_eq!(stopped, Ok(None));
}
