//! What holds of every skyline with crowns that hang over an open sky.

use dimmet::measure::Angle;
use dimmet::place::{Grounds, Obstacle, PlanPoint, Site, Skyline, SkylinePoint, Stature};
use proptest::prelude::*;

fn degrees(value: f64) -> Angle {
    Angle::from_degrees(value)
}

fn skyline(obstacles: &[Obstacle], measured: &[SkylinePoint]) -> Skyline {
    let mut site = Site::new("Test", 50.0, 0.0, chrono_tz::Tz::UTC).expect("a valid site");
    site.obstacles = obstacles.to_vec();
    site.skyline = measured.to_vec();
    Grounds::new(&site, None).skyline(&site.spots[0], Stature::Adult)
}

fn any_tree() -> impl Strategy<Value = Obstacle> {
    let axis = (0.0..std::f64::consts::TAU, 12.0..70.0f64);
    let sizes = (
        4.0..20.0f64,
        2.0..14.0f64,
        prop::option::of(0.1..0.95f64),
        0.2..0.9f64,
    );
    (axis, sizes).prop_map(|((turn, distance_m), (height_m, width_m, gap, trunk_m))| {
        Obstacle::Tree {
            label: format!("{height_m:.3}"),
            east_m: distance_m * turn.sin(),
            north_m: distance_m * turn.cos(),
            base_m: None,
            height_m,
            width_m,
            gap_m: gap.map(|share| share * height_m),
            trunk_m: Some(trunk_m),
            leafless: None,
        }
    })
}

fn any_wall() -> impl Strategy<Value = Obstacle> {
    let point = (8.0..90.0f64, -80.0..80.0f64).prop_map(|(e, n)| PlanPoint::new(e, n));
    (prop::collection::vec(point, 2..4), 2.0..9.0).prop_map(|(line_m, height_m)| Obstacle::Wall {
        label: "wall".into(),
        line_m,
        base_m: None,
        height_m,
    })
}

fn any_obstacles() -> impl Strategy<Value = Vec<Obstacle>> {
    let any = prop_oneof![4 => any_tree(), 1 => any_wall()];
    prop::collection::vec(any, 1..25)
}

fn any_hills() -> impl Strategy<Value = Vec<SkylinePoint>> {
    prop::collection::vec(0.0..12.0f64, 0..12).prop_map(|altitudes| {
        let step = 360.0 / altitudes.len() as f64;
        let point = |(k, altitude_deg): (usize, &f64)| SkylinePoint {
            azimuth_deg: step * k as f64,
            altitude_deg: *altitude_deg,
        };
        altitudes.iter().enumerate().map(point).collect()
    })
}

/// Whether one obstacle hides a point of the sky from an eye 1.6 m over the mark, found by
/// looking where the line of sight passes the obstacle's plane, and by how much it is missed:
/// negative where the answer is too close to tell.
fn is_hidden_by(tree: &Obstacle, azimuth_deg: f64, altitude_deg: f64) -> Option<bool> {
    let Obstacle::Tree {
        east_m,
        north_m,
        height_m,
        width_m,
        gap_m,
        trunk_m,
        ..
    } = tree
    else {
        return None;
    };
    let distance_m = east_m.hypot(*north_m);
    let axis = east_m.atan2(*north_m);
    let turn = azimuth_deg.to_radians() - axis;
    if turn.cos() <= 0.0 {
        return Some(false);
    }
    let aside_m = (distance_m * turn.tan()).abs();
    let up_m = 1.6 + distance_m / turn.cos() * altitude_deg.to_radians().tan();
    let shoulder_m = 0.6 * height_m;
    let half_m = if up_m <= shoulder_m {
        0.5 * width_m
    } else {
        0.5 * width_m * (1.0 - 0.5 * (up_m - shoulder_m) / (height_m - shoulder_m))
    };
    let in_crown = up_m < *height_m && aside_m < half_m && up_m > gap_m.unwrap_or(0.0);
    let is_trunk = gap_m.is_some_and(|gap_m| up_m <= gap_m);
    let in_trunk = is_trunk && aside_m < 0.5 * trunk_m.unwrap_or(0.05 * width_m);
    Some(in_crown || in_trunk)
}

/// Azimuths and altitudes that fall on no edge by design.
fn places() -> impl Iterator<Item = (f64, f64)> {
    let azimuths = (0..480).map(|k| 0.017_31 + f64::from(k) * 0.75);
    azimuths.flat_map(|azimuth| (0..30).map(move |k| (azimuth, 0.000_7 + f64::from(k) * 1.3)))
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(60))]

    #[test]
    fn a_point_is_blocked_where_a_line_of_sight_meets_a_tree(
        trees in prop::collection::vec(any_tree(), 1..25),
    ) {
        let seen = skyline(&trees, &[]);
        for (azimuth, altitude) in places() {
            let is_hidden = trees.iter().any(|tree| is_hidden_by(tree, azimuth, altitude) == Some(true));
            let clearance = seen.clearance(degrees(azimuth), degrees(altitude)).degrees();
            let near_edge = clearance.abs() < 1e-7
                || seen.breaks().iter().any(|edge| (edge.degrees() - azimuth).abs() < 1e-7);
            prop_assert!(near_edge || is_hidden == (clearance < 0.0),
                "{azimuth} {altitude}: {is_hidden}, {clearance}");
            let blocked = seen.blocked_by(degrees(azimuth), degrees(altitude));
            prop_assert!(near_edge || blocked.is_some() == is_hidden);
        }
    }

    #[test]
    fn what_the_union_blocks_its_parts_block(
        obstacles in any_obstacles(), hills in any_hills(),
    ) {
        let whole = skyline(&obstacles, &hills);
        let mut parts: Vec<Skyline> =
            obstacles.iter().map(|one| skyline(std::slice::from_ref(one), &[])).collect();
        parts.push(skyline(&[], &hills));
        for (azimuth, altitude) in places() {
            let (azimuth, altitude) = (degrees(azimuth), degrees(altitude));
            let of_parts = parts.iter().map(|part| part.clearance(azimuth, altitude));
            let least = of_parts.fold(degrees(90.0), |a, b| if b < a { b } else { a });
            let clearance = whole.clearance(azimuth, altitude);
            if least.abs().degrees() > 1e-9 {
                prop_assert_eq!(least < Angle::ZERO, clearance < Angle::ZERO);
            }
            // Open sky is as far from an edge as the nearest part's edge is.
            if clearance > Angle::ZERO {
                prop_assert!((clearance - least).abs().degrees() < 1e-9);
            }
            let tops = parts.iter().map(|part| part.altitude(azimuth).degrees());
            let highest = tops.fold(0.0, f64::max);
            prop_assert!((whole.altitude(azimuth).degrees() - highest).abs() < 1e-9);
        }
    }

    #[test]
    fn a_higher_crown_never_lowers_the_top_and_a_lower_gap_never_opens_more(
        trees in prop::collection::vec(any_tree(), 1..12), which in any::<prop::sample::Index>(),
        by in 0.05..0.9f64,
    ) {
        let mut fuller = trees.clone();
        let k = which.index(fuller.len());
        if let Obstacle::Tree { gap_m: Some(gap_m), .. } = &mut fuller[k] {
            *gap_m *= by;
        }
        let (before, after) = (skyline(&trees, &[]), skyline(&fuller, &[]));
        for (azimuth, altitude) in places() {
            let (azimuth, altitude) = (degrees(azimuth), degrees(altitude));
            let was_open = before.clearance(azimuth, altitude).degrees();
            let is_open = after.clearance(azimuth, altitude).degrees();
            prop_assert!(is_open < 1e-9 || was_open > 0.0, "{was_open} {is_open}");
        }
    }

    #[test]
    fn clearance_is_continuous_in_altitude_and_between_breaks(
        trees in prop::collection::vec(any_tree(), 1..25), hills in any_hills(),
    ) {
        let seen = skyline(&trees, &hills);
        let clearance = |azimuth: f64, altitude: f64| {
            seen.clearance(Angle::from_radians(azimuth), Angle::from_radians(altitude)).radians()
        };
        for k in 0..60 {
            let azimuth = 0.1 * f64::from(k) + 0.0131;
            for step in 0..600 {
                let altitude = f64::from(step) * 1e-3;
                let change = clearance(azimuth, altitude + 1e-3) - clearance(azimuth, altitude);
                prop_assert!(change.abs() <= 1e-3 + 1e-12, "{change}");
            }
        }
        // The steepest edge is a shoulder of a crown 20 m high and 2 m wide, 8 m over 0.5 m; the
        // hills are not as steep.
        const STEEPEST: f64 = 16.5;
        for [from, to] in seen.breaks().array_windows() {
            let (from, to) = (from.radians() + 1e-11, to.radians() - 1e-11);
            if to - from < 1e-6 {
                continue;
            }
            let step = (to - from) / 400.0;
            for altitude in [0.01, 0.05, 0.12, 0.3] {
                let at = |k: u32| clearance(from + step * f64::from(k), altitude);
                for k in 0..400 {
                    let change = (at(k + 1) - at(k)).abs();
                    prop_assert!(change <= STEEPEST * step + 1e-12, "{from} to {to}: {change}");
                }
            }
        }
    }

    /// Between neighbouring breaks nothing begins, ends or changes its order.
    #[test]
    fn nothing_happens_between_breaks(obstacles in any_obstacles(), hills in any_hills()) {
        let seen = skyline(&obstacles, &hills);
        for [from, to] in seen.breaks().array_windows() {
            let share = |share: f64| *from + (*to - *from) * share;
            if (*to - *from).radians() < 1e-9 {
                continue;
            }
            let (label, count) = (seen.label(share(0.5)), seen.openings(share(0.5)).len());
            for k in 1..40 {
                let at = share(f64::from(k) / 40.0);
                prop_assert_eq!(seen.label(at), label);
                prop_assert_eq!(seen.openings(at).len(), count);
            }
        }
    }
}
