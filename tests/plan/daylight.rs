//! Finding a bright planet by day: shade and light.

use chrono::NaiveDate;
use dimmet::measure::{Angle, Moment, TimeScales};
use dimmet::place::{
    Haze, Leafless, Obstacle, PlanPoint, Sector, Site, SkylinePoint, Spot, YearDay,
};
use dimmet::plan::{Daylight, DaylightRequest, Drift, Sight};
use dimmet::sky::{Body, Ephemeris, Horizontal};

/// A morning with Venus 46° west of the Sun at magnitude -4.7.
const VENUS_WEST: &str = "2026-12-20";
/// A morning with Venus 41° west of the Sun and nearly on its daily path.
const VENUS_ON_THE_SUNS_PATH: &str = "2028-07-10";
/// An afternoon with Venus 42° east of the Sun.
const VENUS_EAST: &str = "2026-09-10";
/// Eye height 1.6 m; the hall stands from 6 m to 20 m south and its roof is flat.
const WALL_M: f64 = 6.0;
const FAR_M: f64 = 20.0;
const EAVES_M: f64 = 40.0;
const EYE_M: f64 = 1.6;

fn yard(obstacles: Vec<Obstacle>) -> Site {
    let mut site = Site::new("yard", 40.0, 0.0, chrono_tz::UTC).expect("a site");
    site.air.haze = Some(Haze::VeryClear);
    site.obstacles = obstacles;
    site
}

fn plan(points: &[(f64, f64)]) -> Vec<PlanPoint> {
    let point = |(east_m, north_m): &(f64, f64)| PlanPoint {
        east_m: *east_m,
        north_m: *north_m,
    };
    points.iter().map(point).collect()
}

/// A hall to the south-east, from 1 m to 40 m east: the far corner of its west wall, at azimuth
/// 177.1°, is where the Sun comes out. Mirrored for `side` -1.
fn hall(side: f64) -> Obstacle {
    let (near, far) = (-WALL_M, -FAR_M);
    Obstacle::Building {
        label: "hall".into(),
        corners_m: plan(&[
            (side, near),
            (side * 40.0, near),
            (side * 40.0, far),
            (side, far),
        ]),
        base_m: None,
        eaves_m: EAVES_M,
        ridge_m: None,
    }
}

fn find(site: &Site, date: &str, body: Body) -> Daylight {
    let date: NaiveDate = date.parse().expect("a date");
    let request = DaylightRequest {
        site,
        spot: &site.spots[0],
        date,
        scales: TimeScales::new(),
        sight: &Sight::of_site(site).expect("usual air"),
        body,
    };
    Daylight::find(&Ephemeris::new(), &request).expect("a supported date")
}

fn place(site: &Site, body: Body, moment: Moment) -> Horizontal {
    let span = Ephemeris::new()
        .cover(moment.tt(), moment.tt(), &[body])
        .expect("a supported date");
    let observer = site.observer();
    span.at(moment).seen_by(&observer).place(body)
}

fn minutes(from: Moment, to: Moment) -> Vec<Moment> {
    let count = (to.seconds_since(from) / 60.0).round() as usize;
    let at = |minute: usize| from.plus_seconds(minute as f64 * 60.0);
    (0..=count).map(at).collect()
}

/// By the hall's own geometry: a wall along a line 6 m south and a west wall that ends at the
/// corner, with a roof far higher than the Sun there. The Sun's
/// radius is taken as 16'; refraction at these altitudes (0.2° at most) is left out.
fn is_hidden_with_room(site: &Site, moment: Moment, room_deg: f64) -> bool {
    let sun = place(site, Body::Sun, moment);
    let radius_deg = 16.0 / 60.0 + room_deg;
    let reach_deg = radius_deg / sun.altitude.cos();
    let corner_deg = 180.0 - (1.0 / FAR_M).atan().to_degrees();
    let roof = |azimuth_deg: f64| {
        let across = (180.0 - azimuth_deg).to_radians().cos();
        ((EAVES_M - EYE_M) * across / WALL_M).atan().to_degrees()
    };
    let azimuth_deg = sun.azimuth.degrees();
    azimuth_deg + reach_deg < corner_deg
        && sun.altitude.degrees() + radius_deg < roof(azimuth_deg - reach_deg)
}

#[test]
fn the_shade_outlasts_the_slot_by_fifteen_minutes() {
    let site = yard(vec![hall(1.0)]);
    let found = find(&site, VENUS_WEST, Body::Venus);
    assert_eq!(found.slots.len(), 1, "{:?}", found.slots);
    let slot = &found.slots[0];
    assert_eq!(slot.building, "hall");
    let beyond_s = slot.shaded_until.seconds_since(slot.stretch.end);
    assert!((beyond_s - 900.0).abs() < 0.01, "{beyond_s} s beyond");
    for moment in minutes(slot.stretch.start, slot.shaded_until) {
        assert!(is_hidden_with_room(&site, moment, 0.99), "at {moment:?}");
    }
    // Here the shade ends the slot, so that it is no shorter than it must be.
    let plain_end = found.plain.last().expect("Venus is plain").end;
    assert!(plain_end > slot.shaded_until);
    let after = slot.shaded_until.plus_seconds(60.0);
    assert!(
        !is_hidden_with_room(&site, after, 1.02),
        "it could be longer"
    );
}

#[test]
fn nothing_but_a_building_gives_shade() {
    let (west, east, near) = (1.0, 40.0, -WALL_M);
    let wall = |label: &str| Obstacle::Wall {
        label: label.into(),
        line_m: plan(&[(west, near), (east, near)]),
        base_m: None,
        height_m: EAVES_M,
    };
    // Crowns side by side where the hall stands, wider than they are apart.
    let trees = (0..8)
        .map(|index| Obstacle::Tree {
            label: "limes".into(),
            east_m: 5.0 + 5.0 * f64::from(index),
            north_m: near - 2.0,
            base_m: None,
            height_m: EAVES_M,
            width_m: 8.0,
            gap_m: None,
            trunk_m: None,
            leafless: None,
        })
        .collect();
    let mut measured = yard(Vec::new());
    let point = |azimuth_deg: f64, altitude_deg: f64| SkylinePoint {
        azimuth_deg,
        altitude_deg,
    };
    measured.skyline = vec![
        point(90.0, 0.0),
        point(91.0, 60.0),
        point(169.0, 60.0),
        point(170.0, 0.0),
    ];
    let others = [
        ("nothing", yard(Vec::new())),
        ("a hedge", yard(vec![wall("hedge")])),
        ("a wall", yard(vec![wall("garden wall")])),
        ("trees", yard(trees)),
        ("a measured skyline", measured),
    ];
    for (what, site) in others {
        let found = find(&site, VENUS_WEST, Body::Venus);
        assert!(!found.plain.is_empty(), "behind {what} Venus is plain");
        assert_eq!(found.slots, [], "{what} gives no shade");
    }
}

#[test]
fn what_was_measured_is_no_part_of_a_buildings_shade() {
    // Too low to give shade; what was measured stands high over it.
    let mut shed = hall(1.0);
    if let Obstacle::Building { eaves_m, .. } = &mut shed {
        *eaves_m = 2.5;
    }
    let point = |azimuth_deg: f64, altitude_deg: f64| SkylinePoint {
        azimuth_deg,
        altitude_deg,
    };
    let high = vec![
        point(90.0, 0.0),
        point(91.0, 60.0),
        point(169.0, 60.0),
        point(170.0, 0.0),
    ];
    let mut from_here = yard(vec![shed.clone()]);
    from_here.spots[0].skyline = high.clone();
    let mut far = yard(vec![shed]);
    far.spots.push(Spot {
        skyline: high,
        skyline_far: vec![Sector {
            from_deg: 80.0,
            to_deg: 180.0,
        }],
        ..Spot::at("lawn", PlanPoint::new(-30.0, 0.0))
    });
    for (what, site) in [("from the spot", from_here), ("far away", far)] {
        let found = find(&site, VENUS_WEST, Body::Venus);
        assert!(!found.plain.is_empty(), "Venus is plain");
        assert_eq!(found.slots, [], "measured {what} it gives no shade");
    }
}

#[test]
fn bare_trees_let_a_planet_through_by_day() {
    let limes = |leafless| {
        let lime = |index: i32| Obstacle::Tree {
            label: "limes".into(),
            east_m: 6.0 * f64::from(index),
            north_m: -8.0,
            base_m: None,
            height_m: 12.0,
            width_m: 8.0,
            gap_m: None,
            trunk_m: None,
            leafless,
        };
        (-5..6).map(lime).collect()
    };
    let winter = Leafless {
        from: YearDay { month: 11, day: 15 },
        to: YearDay { month: 4, day: 20 },
        see_through: 0.9,
    };
    let plain = |site: Site| find(&site, VENUS_WEST, Body::Venus).plain;
    let minutes = |site: Site| -> f64 {
        let plain = plain(site);
        let seconds = plain.iter().map(|s| s.end.seconds_since(s.start));
        seconds.sum::<f64>() / 60.0
    };
    let (in_leaf, bare) = (
        minutes(yard(limes(None))),
        minutes(yard(limes(Some(winter)))),
    );
    assert!(bare > in_leaf + 60.0, "{in_leaf} and {bare} minutes");
}

#[test]
fn a_tree_does_not_lengthen_a_buildings_shade() {
    let alone = find(&yard(vec![hall(1.0)]), VENUS_WEST, Body::Venus);
    let tree = Obstacle::Tree {
        label: "lime".into(),
        east_m: 1.0,
        north_m: -12.0,
        base_m: None,
        height_m: 9.0,
        width_m: 3.0,
        gap_m: None,
        trunk_m: None,
        leafless: None,
    };
    let site = yard(vec![hall(1.0), tree]);
    let with_tree = find(&site, VENUS_WEST, Body::Venus);
    let ends = |found: &Daylight| found.slots.last().map(|slot| slot.shaded_until);
    assert!(ends(&alone).is_some());
    assert_eq!(ends(&with_tree), ends(&alone));
}

/// Common practice.
#[test]
fn venus_is_plain_by_day_in_clear_air_and_lost_in_haze_near_the_sun() {
    let clear = yard(Vec::new());
    let found = find(&clear, VENUS_WEST, Body::Venus);
    let plain_s: f64 = found
        .plain
        .iter()
        .map(|stretch| stretch.end.seconds_since(stretch.start))
        .sum();
    assert!(plain_s > 4.0 * 3600.0, "plain for {plain_s} s only");
    let hazy = Site {
        air: dimmet::place::SiteAir {
            haze: Some(Haze::Murky),
            ..clear.air
        },
        ..clear.clone()
    };
    // Ten days after the superior conjunction of 2026 January 6 (elongation 2 to 3°).
    let near_sun = find(&hazy, "2026-01-16", Body::Venus);
    assert!(near_sun.has_day);
    assert_eq!(near_sun.plain, [], "lost beside the Sun in haze");
    // And what is too faint is never plain.
    assert_eq!(find(&clear, VENUS_WEST, Body::Neptune).plain, []);
}

fn separation_deg(a: Horizontal, b: Horizontal) -> f64 {
    let cos = a.altitude.sin() * b.altitude.sin()
        + a.altitude.cos() * b.altitude.cos() * (a.azimuth - b.azimuth).cos();
    cos.acos().to_degrees()
}

#[test]
fn the_sun_drifts_into_an_untracked_tube_only_from_the_east_of_the_body() {
    let site = yard(vec![hall(1.0)]);
    let slot = find(&site, VENUS_ON_THE_SUNS_PATH, Body::Venus)
        .slots
        .remove(0);
    let Drift::Into(moment) = slot.drift else {
        panic!("{:?}", slot.drift);
    };
    let axis = place(&site, Body::Venus, slot.stretch.start);
    let off = |moment| separation_deg(axis, place(&site, Body::Sun, moment));
    assert!(off(moment) <= 5.0 && off(moment.plus_seconds(-60.0)) > 5.0);
    assert!(moment > slot.stretch.start);

    // Ten degrees of declination apart, it passes.
    let west = find(&site, VENUS_WEST, Body::Venus);
    assert_eq!(west.slots[0].drift, Drift::Past);

    // In the evening sky, from behind a hall in the south-west.
    let evening = yard(vec![hall(-1.0)]);
    let east = find(&evening, VENUS_EAST, Body::Venus);
    assert!(!east.slots.is_empty());
    assert!(east.slots.iter().all(|slot| slot.drift == Drift::Away));
}

#[test]
fn places_are_told_from_the_sun_and_the_moon() {
    let site = yard(vec![hall(1.0)]);
    let slot = find(&site, VENUS_WEST, Body::Venus).slots.remove(0);
    let sun = place(&site, Body::Sun, slot.place.moment);
    let venus = place(&site, Body::Venus, slot.place.moment);
    let from_sun = slot.place.from_sun;
    let error_deg = from_sun.separation.degrees() - separation_deg(venus, sun);
    assert!(error_deg.abs() < 0.2, "refraction apart: {error_deg}");
    // North of the tropics what is west of the Sun stands to its right by midday.
    assert!(from_sun.right > Angle::from_degrees(20.0), "{from_sun:?}");
    assert!(from_sun.above > Angle::ZERO, "{from_sun:?}");
    assert_eq!(slot.place.from_moon, None, "the Moon is down");
    let from_itself = find(&site, VENUS_WEST, Body::Moon);
    assert!(
        from_itself
            .slots
            .iter()
            .all(|slot| slot.place.from_moon.is_none())
    );
}

#[test]
fn a_day_without_a_high_sun_has_nothing_to_find() {
    let mut site = yard(vec![hall(1.0)]);
    site.latitude_deg = 69.0;
    let found = find(&site, VENUS_WEST, Body::Venus);
    assert!(!found.has_day && found.plain.is_empty() && found.slots.is_empty());
}
