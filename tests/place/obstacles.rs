//! Obstacles against hand trigonometry and against rays shot one by one.

use crate::common::assert_within;
use dimmet::measure::Angle;
use dimmet::place::{Obstacle, PlanPoint, Site, Skyline, Spot};
use proptest::prelude::*;

const EYE_M: f64 = 1.6;

fn degrees(value: f64) -> Angle {
    Angle::from_degrees(value)
}
fn at(east_m: f64, north_m: f64) -> PlanPoint {
    PlanPoint { east_m, north_m }
}
fn spot(east_m: f64, north_m: f64) -> Spot {
    Spot {
        eye_height_m: EYE_M,
        ..Spot::at("here", at(east_m, north_m))
    }
}
fn skyline(obstacles: &[Obstacle], spot: &Spot) -> Skyline {
    let mut site = Site::new("Test", 50.0, 0.0, chrono_tz::Tz::UTC).expect("a valid site");
    site.obstacles = obstacles.to_vec();
    site.skyline(spot)
}
fn tree(east_m: f64, north_m: f64, height_m: f64, width_m: f64) -> Obstacle {
    Obstacle::Tree {
        label: "tree".into(),
        east_m,
        north_m,
        base_m: None,
        height_m,
        width_m,
        gap_m: None,
        trunk_m: None,
        leafless: None,
    }
}
fn wall(line_m: &[PlanPoint], height_m: f64) -> Obstacle {
    Obstacle::Wall {
        label: "wall".into(),
        line_m: line_m.to_vec(),
        base_m: None,
        height_m,
    }
}
fn altitude_deg(skyline: &Skyline, azimuth_deg: f64) -> f64 {
    skyline.altitude(degrees(azimuth_deg)).degrees()
}
/// The altitude of something `up_m` above the eye at a distance, degrees.
fn elevation_deg(up_m: f64, distance_m: f64) -> f64 {
    up_m.atan2(distance_m).to_degrees()
}

#[test]
fn a_long_wall_falls_away_on_both_sides() {
    // 2.2 m high, 30 m due west: 0.6 m over the eye at 30 m, and at 30 m / cos 45° further on.
    let seen = skyline(
        &[wall(&[at(-30.0, -60.0), at(-30.0, 60.0)], 2.2)],
        &spot(0.0, 0.0),
    );
    assert_within(
        altitude_deg(&seen, 270.0),
        elevation_deg(0.6, 30.0),
        1e-9,
        "hand trigonometry",
    );
    let aside = 30.0 / 45f64.to_radians().cos();
    for azimuth in [225.0, 315.0] {
        assert_within(
            altitude_deg(&seen, azimuth),
            elevation_deg(0.6, aside),
            1e-9,
            "hand",
        );
    }
    // Its ends stand at atan(60 / 30) on either side of west.
    let reach = 60f64.atan2(30.0).to_degrees();
    assert_eq!(altitude_deg(&seen, 270.0 + reach + 1e-6), 0.0);
    assert!(altitude_deg(&seen, 270.0 + reach - 1e-6) > 0.4);
    assert_eq!(seen.label(degrees(270.0)), Some("wall"));
    assert_eq!(seen.label(degrees(90.0)), None);
    assert_within(
        seen.highest().degrees(),
        elevation_deg(0.6, 30.0),
        1e-9,
        "its nearest point",
    );
}

#[test]
fn a_crown_has_a_flat_top_and_straight_shoulders() {
    let seen = skyline(&[tree(-42.0, 8.0, 17.0, 12.0)], &spot(0.0, 0.0));
    let distance = 42f64.hypot(8.0);
    let axis = (-42f64).atan2(8.0).to_degrees() + 360.0;
    assert_within(
        altitude_deg(&seen, axis),
        elevation_deg(15.4, distance),
        1e-9,
        "its top",
    );
    // The corner of the top, 3 m aside; the shoulder, 6 m aside and 10.2 m up.
    let top_corner = axis + 3f64.atan2(distance).to_degrees();
    let expected = elevation_deg(15.4, distance.hypot(3.0));
    assert_within(
        altitude_deg(&seen, top_corner),
        expected,
        1e-9,
        "its top's corner",
    );
    let edge = axis - 6f64.atan2(distance).to_degrees();
    let expected = elevation_deg(0.6 * 17.0 - 1.6, distance.hypot(6.0));
    assert_within(
        altitude_deg(&seen, edge + 1e-9),
        expected,
        1e-6,
        "its shoulder",
    );
    assert_eq!(altitude_deg(&seen, edge - 1e-9), 0.0, "beside it");
    // Half-way down the shoulder, 4.5 m aside, the height is half-way too.
    let half = axis + 4.5f64.atan2(distance).to_degrees();
    let expected = elevation_deg(0.8 * 17.0 - 1.6, distance.hypot(4.5));
    assert_within(
        altitude_deg(&seen, half),
        expected,
        1e-9,
        "half-way down its shoulder",
    );
    assert_eq!(seen.breaks().len(), 4, "two edges and two corners");
}

#[test]
fn a_gabled_hall_shows_its_ridge_its_gable_and_its_eaves() {
    // 20 m by 12 m, ridge along the longer axis at 26 m south of the mark.
    let corners = [
        (-60.0, -20.0),
        (-40.0, -20.0),
        (-40.0, -32.0),
        (-60.0, -32.0),
    ];
    let hall = |turn: usize| Obstacle::Building {
        label: "hall".into(),
        corners_m: (0..4)
            .map(|k| at(corners[(k + turn) % 4].0, corners[(k + turn) % 4].1))
            .collect(),
        base_m: None,
        eaves_m: 5.5,
        ridge_m: Some(8.0),
    };
    for turn in 0..4 {
        let seen = skyline(&[hall(turn)], &spot(0.0, 0.0));
        let azimuth = |east: f64, north: f64| f64::atan2(east, north).to_degrees() + 360.0;
        let ridge_end = altitude_deg(&seen, azimuth(-40.0, -26.0));
        assert_within(
            ridge_end,
            elevation_deg(6.4, 40f64.hypot(26.0)),
            1e-6,
            "near ridge end",
        );
        let ridge_middle = altitude_deg(&seen, azimuth(-50.0, -26.0));
        assert_within(
            ridge_middle,
            elevation_deg(6.4, 50f64.hypot(26.0)),
            1e-9,
            "ridge",
        );
        // The near gable's far corner: eaves, 3.9 m over the eye.
        let corner = altitude_deg(&seen, azimuth(-40.0, -32.0) + 1e-9);
        assert_within(
            corner,
            elevation_deg(3.9, 40f64.hypot(32.0)),
            1e-6,
            "eaves at the corner",
        );
        // Half-way up that gable's verge.
        let verge = altitude_deg(&seen, azimuth(-40.0, -29.0));
        assert_within(
            verge,
            elevation_deg(5.15, 40f64.hypot(29.0)),
            1e-9,
            "middle of the verge",
        );
        assert_within(
            seen.highest().degrees(),
            ridge_end,
            1e-6,
            "nothing is higher",
        );
    }
}

#[test]
fn a_flat_roof_is_its_eaves_and_ground_and_eye_heights_count() {
    let block = |base_m: f64| Obstacle::Building {
        label: "block".into(),
        corners_m: vec![at(-5.0, 20.0), at(5.0, 20.0), at(5.0, 30.0), at(-5.0, 30.0)],
        base_m: Some(base_m),
        eaves_m: 6.0,
        ridge_m: None,
    };
    let seen = |base_m: f64, eye_height_m: f64| {
        let spot = Spot {
            eye_height_m,
            ..spot(0.0, 0.0)
        };
        altitude_deg(&skyline(&[block(base_m)], &spot), 0.0)
    };
    assert_within(seen(0.0, 1.6), elevation_deg(4.4, 20.0), 1e-9, "near eaves");
    assert_within(
        seen(2.0, 1.6),
        elevation_deg(6.4, 20.0),
        1e-9,
        "on higher ground",
    );
    assert_within(
        seen(0.0, 3.0),
        elevation_deg(3.0, 20.0),
        1e-9,
        "from a higher eye",
    );
    assert_eq!(seen(-5.0, 1.6), 0.0, "below the eye it hides no sky");
}

#[test]
fn a_footprint_in_two_parts_that_meet_at_a_corner_is_seen_from_its_near_sides() {
    // The small western part runs the other way round than the large eastern one.
    let meeting = at(0.0, 20.0);
    let corners_m = vec![
        meeting,
        at(-1.0, 19.0),
        at(-1.0, 21.0),
        meeting,
        at(5.0, 15.0),
        at(5.0, 25.0),
    ];
    let block = Obstacle::Shape {
        label: "block".into(),
        corners_m,
        base_m: None,
        height_m: 6.0,
    };
    let seen = skyline(std::slice::from_ref(&block), &spot(0.0, 0.0));
    for azimuth_deg in [-2.0, -1.0, 1.0, 5.0, 10.0] {
        let side = |a, b| {
            ray(azimuth_deg, &spot(0.0, 0.0), a, b)
                .map(|(distance_m, _)| elevation_deg(4.4, distance_m))
        };
        let points = block.points();
        let sides = (0..6).filter_map(|k| side(points[k], points[(k + 1) % 6]));
        let expected = sides.fold(0.0, f64::max);
        assert_within(
            altitude_deg(&seen, azimuth_deg),
            expected,
            1e-9,
            &format!("at {azimuth_deg}"),
        );
    }
}

#[test]
fn a_narrow_post_is_in_the_breaks() {
    // 0.1 m at 60 m is a tenth of a degree.
    let seen = skyline(&[tree(60.0, 0.0, 8.0, 0.1)], &spot(0.0, 0.0));
    let [first, second, third, fourth] = seen.breaks() else {
        panic!("two edges and two corners: {:?}", seen.breaks());
    };
    assert_within((*fourth - *first).degrees(), 0.0955, 1e-4, "its width");
    let middle = (*second + *third) * 0.5;
    assert_within(
        seen.altitude(middle).degrees(),
        elevation_deg(6.4, 60.0),
        1e-9,
        "its top",
    );
    let features = seen.features();
    assert_eq!((features.len(), &*features[0].label), (1, "tree"));
    assert_within(features[0].azimuth.degrees(), 90.0, 1e-9, "due east");
}

#[test]
fn what_stands_across_north_is_one_thing() {
    let seen = skyline(&[tree(0.0, 50.0, 12.0, 8.0)], &spot(0.0, 0.0));
    assert_within(
        altitude_deg(&seen, 359.9),
        altitude_deg(&seen, 0.1),
        1e-9,
        "both sides",
    );
    let features = seen.features();
    assert_eq!(features.len(), 1, "{features:?}");
    let from_north = features[0].azimuth.signed().degrees();
    assert_within(from_north, 0.0, 1e-9, "due north");
    assert_within(
        features[0].top.degrees(),
        elevation_deg(10.4, 50.0),
        1e-9,
        "its top",
    );
    assert_eq!(
        seen.breaks().len(),
        4,
        "north itself is no break: {:?}",
        seen.breaks()
    );
}

#[test]
fn an_obstacle_around_the_spot_is_left_out_and_told_of() {
    let oak = tree(1.0, 0.0, 9.0, 4.0);
    assert!(oak.surrounds(at(0.0, 0.0)) && !oak.surrounds(at(-1.5, 0.0)));
    assert_eq!(skyline(&[oak], &spot(0.0, 0.0)), Skyline::open());
    let fence = wall(&[at(-5.0, 0.0), at(5.0, 0.0)], 2.0);
    assert!(fence.surrounds(at(2.0, 0.05)) && !fence.surrounds(at(2.0, 0.2)));
    assert!(!fence.surrounds(at(9.0, 0.0)), "beyond its end");
    // Seen end-on it covers no azimuth.
    assert_eq!(skyline(&[fence], &spot(9.0, 0.0)), Skyline::open());
}

/// Distance along a ray to a segment and the share of the segment there, if it is hit.
fn ray(azimuth_deg: f64, from: &Spot, a: PlanPoint, b: PlanPoint) -> Option<(f64, f64)> {
    let (sin, cos) = azimuth_deg.to_radians().sin_cos();
    let across = |p: PlanPoint| (p.east_m - from.east_m) * cos - (p.north_m - from.north_m) * sin;
    let along = |p: PlanPoint| (p.east_m - from.east_m) * sin + (p.north_m - from.north_m) * cos;
    let (xa, xb) = (across(a), across(b));
    let share = xa / (xa - xb);
    let distance = along(a) + share * (along(b) - along(a));
    ((0.0..=1.0).contains(&share) && distance > 0.0).then_some((distance, share))
}

/// The altitude of one obstacle at one azimuth by shooting a ray at it, degrees, at least 0.
fn shot_deg(obstacle: &Obstacle, from: &Spot, azimuth_deg: f64) -> f64 {
    let edge = |a: (PlanPoint, f64), b: (PlanPoint, f64)| {
        let hit = ray(azimuth_deg, from, a.0, b.0);
        hit.map_or(0.0, |(distance, share)| {
            elevation_deg(a.1 + share * (b.1 - a.1) - from.eye_height_m, distance)
        })
    };
    let edges: Vec<f64> = match obstacle {
        Obstacle::Wall {
            line_m, height_m, ..
        } => line_m
            .array_windows()
            .map(|[a, b]| edge((*a, *height_m), (*b, *height_m)))
            .collect(),
        Obstacle::Tree {
            east_m,
            north_m,
            height_m,
            width_m,
            ..
        } => {
            let (de, dn) = (east_m - from.east_m, north_m - from.north_m);
            let distance = de.hypot(dn);
            let point = |share: f64, height: f64| {
                let aside = share * width_m / distance;
                (
                    at(east_m + aside * dn, north_m - aside * de),
                    height * height_m,
                )
            };
            let outline = [
                point(-0.5, 0.6),
                point(-0.25, 1.0),
                point(0.25, 1.0),
                point(0.5, 0.6),
            ];
            outline.array_windows().map(|[a, b]| edge(*a, *b)).collect()
        }
        Obstacle::Pole {
            east_m,
            north_m,
            height_m,
            width_m,
            ..
        } => {
            let (de, dn) = (east_m - from.east_m, north_m - from.north_m);
            let aside = 0.5 * width_m / de.hypot(dn);
            vec![edge(
                (at(east_m - aside * dn, north_m + aside * de), *height_m),
                (at(east_m + aside * dn, north_m - aside * de), *height_m),
            )]
        }
        Obstacle::Building {
            corners_m,
            eaves_m: top_m,
            ..
        }
        | Obstacle::Shape {
            corners_m,
            height_m: top_m,
            ..
        } => (0..corners_m.len())
            .map(|k| {
                let next = corners_m[(k + 1) % corners_m.len()];
                edge((corners_m[k], *top_m), (next, *top_m))
            })
            .collect(),
    };
    edges.into_iter().fold(0.0, f64::max)
}

fn any_tree() -> impl Strategy<Value = Obstacle> {
    (-80.0..80.0, -80.0..80.0, 0.5..30.0, 0.05..12.0).prop_map(|(e, n, h, w)| tree(e, n, h, w))
}
fn any_wall() -> impl Strategy<Value = Obstacle> {
    let point = (-80.0..80.0, -80.0..80.0).prop_map(|(e, n)| at(e, n));
    (prop::collection::vec(point, 2..5), 0.5..9.0).prop_map(|(line, h)| wall(&line, h))
}
fn any_block() -> impl Strategy<Value = Obstacle> {
    (-80.0..80.0, -80.0..80.0, 3.0..30.0, 3.0..30.0, 2.0..15.0).prop_map(|(e, n, w, d, eaves_m)| {
        Obstacle::Building {
            label: "block".into(),
            corners_m: vec![at(e, n), at(e + w, n), at(e + w, n + d), at(e, n + d)],
            base_m: None,
            eaves_m,
            ridge_m: None,
        }
    })
}
fn any_obstacles() -> impl Strategy<Value = Vec<Obstacle>> {
    let any = prop_oneof![any_tree(), any_wall(), any_block()];
    prop::collection::vec(any, 1..8).prop_map(|obstacles| {
        let is_clear = |obstacle: &Obstacle| !obstacle.surrounds(at(0.0, 0.0));
        obstacles.into_iter().filter(is_clear).collect()
    })
}
fn raised(obstacle: &Obstacle, by_m: f64) -> Obstacle {
    let mut higher = obstacle.clone();
    match &mut higher {
        Obstacle::Tree { height_m, .. }
        | Obstacle::Wall { height_m, .. }
        | Obstacle::Pole { height_m, .. }
        | Obstacle::Shape { height_m, .. } => *height_m += by_m,
        Obstacle::Building { eaves_m, .. } => *eaves_m += by_m,
    }
    higher
}
/// Azimuths that fall on no corner by design.
fn azimuths() -> impl Iterator<Item = f64> {
    (0..1440).map(|k| 0.017_3 + f64::from(k) * 0.25)
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(150))]

    #[test]
    fn the_skyline_is_the_highest_of_rays_shot_at_each_obstacle(obstacles in any_obstacles()) {
        let here = spot(0.0, 0.0);
        let seen = skyline(&obstacles, &here);
        for azimuth in azimuths() {
            let near_break = seen.breaks().iter()
                .any(|edge| (edge.degrees() - azimuth).abs() < 1e-7);
            let shot = obstacles.iter().map(|o| shot_deg(o, &here, azimuth)).fold(0.0, f64::max);
            let seen = altitude_deg(&seen, azimuth);
            prop_assert!(near_break || (seen - shot).abs() < 1e-6, "{azimuth}: {seen}, ray {shot}");
        }
    }

    #[test]
    fn the_skyline_is_the_highest_of_its_parts(obstacles in any_obstacles()) {
        let here = spot(0.0, 0.0);
        let seen = skyline(&obstacles, &here);
        let parts: Vec<Skyline> =
            obstacles.iter().map(|o| skyline(std::slice::from_ref(o), &here)).collect();
        for azimuth in azimuths() {
            let highest = parts.iter().map(|p| altitude_deg(p, azimuth)).fold(0.0, f64::max);
            assert_within(altitude_deg(&seen, azimuth), highest, 1e-9, "the highest part");
        }
    }

    #[test]
    fn a_higher_obstacle_never_lowers_the_skyline(
        obstacles in any_obstacles(), which in any::<prop::sample::Index>(), by_m in 0.0..20.0,
    ) {
        prop_assume!(!obstacles.is_empty());
        let here = spot(0.0, 0.0);
        let mut higher = obstacles.clone();
        let k = which.index(higher.len());
        higher[k] = raised(&higher[k], by_m);
        let (before, after) = (skyline(&obstacles, &here), skyline(&higher, &here));
        for azimuth in azimuths() {
            prop_assert!(altitude_deg(&after, azimuth) >= altitude_deg(&before, azimuth) - 1e-9);
        }
        prop_assert!(after.highest() >= before.highest() - Angle::from_radians(1e-12));
    }

    #[test]
    fn stepping_back_from_a_lone_wall_never_raises_it(
        half_m in 1.0..60.0f64, height_m in 0.5..12.0f64, near_m in 1.0..50.0f64, back_m in 0.0..50.0f64,
        aside_m in -30.0..30.0f64,
    ) {
        let fence = [wall(&[at(-half_m, 0.0), at(half_m, 0.0)], height_m)];
        let highest = |north_m: f64| skyline(&fence, &spot(aside_m, -north_m)).highest().degrees();
        prop_assert!(highest(near_m + back_m) <= highest(near_m) + 1e-9);
    }
}
