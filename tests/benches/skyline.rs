//! How long the exact skyline of 200 obstacles takes: all round at 0.1 degree, and one part of
//! the sky from one of many points.

use dimmet::measure::Angle;
use dimmet::place::{Grounds, Obstacle, PlanPoint, Sector, Site, Stature};
use std::f64::consts::TAU;
use std::hint::black_box;

fn main() {
    divan::main();
}

/// 200 obstacles of every kind 15 m to 120 m around the mark, from a fixed sequence.
fn site() -> Site {
    let mut site = Site::new("Bench", 51.0, 0.0, chrono_tz::Tz::UTC).expect("a valid site");
    let mut state = 1_u64;
    let mut random = || {
        // Numerical Recipes' 64-bit linear congruence; the upper bits.
        state = state
            .wrapping_mul(6_364_136_223_846_793_005)
            .wrapping_add(1_442_695_040_888_963_407);
        (state >> 11) as f64 / (1_u64 << 53) as f64
    };
    site.obstacles = (0..200)
        .map(|number| {
            let (turn, distance_m) = (TAU * random(), 15.0 + 105.0 * random());
            let middle = PlanPoint::new(distance_m * turn.sin(), distance_m * turn.cos());
            let (size_m, height_m) = (1.0 + random(), 4.0 + 14.0 * random());
            obstacle(number, middle, size_m, height_m)
        })
        .collect();
    site.check().expect("a valid site");
    site
}

fn obstacle(number: usize, middle: PlanPoint, size_m: f64, height_m: f64) -> Obstacle {
    let label = format!("{number}");
    let PlanPoint { east_m, north_m } = middle;
    let corner =
        |east: f64, north: f64| PlanPoint::new(east_m + east * size_m, north_m + north * size_m);
    let rectangle = vec![
        corner(-5.0, -3.0),
        corner(5.0, -3.0),
        corner(5.0, 3.0),
        corner(-5.0, 3.0),
    ];
    match number % 5 {
        0 | 1 => Obstacle::Tree {
            label,
            east_m,
            north_m,
            base_m: None,
            height_m,
            width_m: 5.0 * size_m,
            gap_m: (number.is_multiple_of(2)).then_some(0.3 * height_m),
            trunk_m: None,
            leafless: None,
        },
        2 => Obstacle::Building {
            label,
            corners_m: rectangle,
            base_m: None,
            eaves_m: 0.6 * height_m,
            ridge_m: Some(height_m),
        },
        3 => Obstacle::Wall {
            label,
            line_m: vec![corner(-8.0, 0.0), corner(2.0, 1.0), corner(8.0, -2.0)],
            base_m: None,
            height_m: 2.5,
        },
        _ => Obstacle::Shape {
            label,
            corners_m: rectangle,
            base_m: None,
            height_m,
        },
    }
}

#[divan::bench]
fn all_round_at_a_tenth_of_a_degree(bencher: divan::Bencher) {
    let site = site();
    let grounds = Grounds::new(&site, None);
    bencher.bench(|| {
        let skyline = grounds.skyline(&site.spots[0], Stature::Adult);
        let sum: f64 = (0..3600)
            .map(|k| {
                skyline
                    .altitude(Angle::from_degrees(0.1 * f64::from(k)))
                    .degrees()
            })
            .sum();
        black_box(sum)
    });
}

#[divan::bench]
fn built_all_round(bencher: divan::Bencher) {
    let site = site();
    let prepared = Grounds::new(&site, None).prepared();
    bencher.bench(|| prepared.skyline(&site.spots[0], Stature::Adult));
}

#[divan::bench]
fn prepared(bencher: divan::Bencher) {
    let site = site();
    bencher.bench(|| Grounds::new(&site, None).prepared());
}

#[divan::bench]
fn part_of_the_sky(bencher: divan::Bencher) {
    let site = site();
    let prepared = Grounds::new(&site, None).prepared();
    let viewpoint = site.viewpoint_at(PlanPoint::new(1.0, 2.0), Stature::Adult);
    let terrain = prepared.terrain_from(viewpoint);
    let sector = Sector {
        from_deg: 210.0,
        to_deg: 260.0,
    };
    bencher.bench(|| prepared.skyline_within(viewpoint, sector, &terrain));
}

#[divan::bench]
fn two_hundred_trees_with_gaps(bencher: divan::Bencher) {
    let mut site = site();
    for obstacle in &mut site.obstacles {
        let at = obstacle.points()[0];
        *obstacle = Obstacle::Tree {
            label: obstacle.label().to_owned(),
            east_m: at.east_m,
            north_m: at.north_m,
            base_m: None,
            height_m: 12.0,
            width_m: 8.0,
            gap_m: Some(3.0),
            trunk_m: None,
            leafless: None,
        };
    }
    let prepared = Grounds::new(&site, None).prepared();
    bencher.bench(|| prepared.skyline(&site.spots[0], Stature::Adult));
}
