//! Openings beneath crowns, poles, shapes, slopes and statures against trigonometry by hand;
//! leaves by date; which measured skyline holds where; the places of a patch.

use crate::common::assert_within;
use chrono::NaiveDate;
use dimmet::measure::Angle;
use dimmet::place::{
    Blocker, Exclusion, Grounds, Leafless, MeasuredUse, Obstacle, PlanPoint, Sector, Site, Skyline,
    SkylinePoint, Slope, Spot, Stature, Viewpoint, YearDay, demo_site,
};

const EYE_M: f64 = 1.6;

fn degrees(value: f64) -> Angle {
    Angle::from_degrees(value)
}
fn at(east_m: f64, north_m: f64) -> PlanPoint {
    PlanPoint::new(east_m, north_m)
}
fn site(obstacles: Vec<Obstacle>) -> Site {
    let mut site = Site::new("Test", 50.0, 0.0, chrono_tz::Tz::UTC).expect("a valid site");
    site.obstacles = obstacles;
    site
}
fn from_mark(obstacles: Vec<Obstacle>) -> Skyline {
    let site = site(obstacles);
    site.skyline(&site.spots[0])
}
/// An oak 40 m due west: 15 m high, 10 m wide, its underside at 5 m, its trunk 0.8 m wide.
fn oak() -> Obstacle {
    Obstacle::Tree {
        label: "oak".into(),
        east_m: -40.0,
        north_m: 0.0,
        base_m: None,
        height_m: 15.0,
        width_m: 10.0,
        gap_m: Some(5.0),
        trunk_m: Some(0.8),
        leafless: None,
    }
}
/// A church 300 m due west, 6 m high as a box 30 m wide.
fn church() -> Obstacle {
    Obstacle::Shape {
        label: "church".into(),
        corners_m: vec![
            at(-300.0, -15.0),
            at(-300.0, 15.0),
            at(-310.0, 15.0),
            at(-310.0, -15.0),
        ],
        base_m: None,
        height_m: 6.0,
    }
}
fn altitude_deg(skyline: &Skyline, azimuth_deg: f64) -> f64 {
    skyline.altitude(degrees(azimuth_deg)).degrees()
}
fn clearance_deg(skyline: &Skyline, azimuth_deg: f64, altitude_deg: f64) -> f64 {
    skyline
        .clearance(degrees(azimuth_deg), degrees(altitude_deg))
        .degrees()
}
/// The altitude of something `up_m` above the eye at a distance, degrees.
fn elevation_deg(up_m: f64, distance_m: f64) -> f64 {
    up_m.atan2(distance_m).to_degrees()
}

#[test]
fn beneath_a_crown_the_sky_is_open_beside_the_trunk() {
    let seen = from_mark(vec![oak()]);
    // Hand trigonometry: 2 m aside of the axis at 40 m.
    let aside = 2f64.atan2(40.0).to_degrees();
    let underside = elevation_deg(5.0 - EYE_M, 40f64.hypot(2.0));
    for azimuth in [270.0 - aside, 270.0 + aside] {
        let openings = seen.openings(degrees(azimuth));
        assert_eq!(openings.len(), 1, "{openings:?}");
        assert_eq!(openings[0].0, Angle::ZERO, "down to the horizon");
        assert_within(
            openings[0].1.degrees(),
            underside,
            1e-9,
            "hand trigonometry",
        );
        assert_within(
            altitude_deg(&seen, azimuth),
            elevation_deg(13.4, 40f64.hypot(2.0)),
            1e-9,
            "the top goes on as before",
        );
    }
    // The trunk's edges: 0.4 m aside.
    let trunk = 0.4f64.atan2(40.0).to_degrees();
    for (azimuth, count) in [
        (270.0 - trunk - 1e-6, 1),
        (270.0 - trunk + 1e-6, 0),
        (270.0, 0),
        (270.0 + trunk - 1e-6, 0),
        (270.0 + trunk + 1e-6, 1),
    ] {
        assert_eq!(seen.openings(degrees(azimuth)).len(), count, "{azimuth}");
    }
    assert!(clearance_deg(&seen, 270.0, 3.0) < 0.0, "behind the trunk");
    // Below the shoulders the crown is as wide as its underside: 5 m to each side.
    let edge = 5f64.atan2(40.0).to_degrees();
    assert_eq!(altitude_deg(&seen, 270.0 + edge + 1e-6), 0.0);
    assert_within(
        altitude_deg(&seen, 270.0 + edge - 1e-9),
        elevation_deg(9.0 - EYE_M, 40f64.hypot(5.0)),
        1e-6,
        "its shoulder, 0.6 of 15 m up",
    );
}

#[test]
fn a_gap_above_the_shoulders_cuts_the_crown_where_it_is_narrower() {
    let mut tree = oak();
    if let Obstacle::Tree { gap_m, .. } = &mut tree {
        *gap_m = Some(12.0);
    }
    let seen = from_mark(vec![tree]);
    // Half-way from the shoulders at 9 m to the top at 15 m: 3.75 m to each side.
    let edge = 3.75f64.atan2(40.0).to_degrees();
    assert_eq!(altitude_deg(&seen, 270.0 + edge + 1e-6), 0.0);
    let inside = degrees(270.0 + edge - 1e-9);
    assert_within(
        seen.altitude(inside).degrees(),
        elevation_deg(12.0 - EYE_M, 40f64.hypot(3.75)),
        1e-6,
        "hand trigonometry",
    );
}

#[test]
fn clearance_in_an_opening_is_the_lesser_distance_to_floor_and_ceiling() {
    let seen = from_mark(vec![oak(), church()]);
    let azimuth = 268.0;
    let openings = seen.openings(degrees(azimuth));
    let (floor, ceiling) = (openings[0].0.degrees(), openings[0].1.degrees());
    // The church's near wall at 300 m / cos 2°; the crown's underside at 40 m / cos 2°.
    let aslant = 2f64.to_radians().cos();
    assert_within(
        floor,
        elevation_deg(4.4, 300.0 / aslant),
        1e-9,
        "hand trigonometry",
    );
    assert_within(
        ceiling,
        elevation_deg(3.4, 40.0 / aslant),
        1e-9,
        "hand trigonometry",
    );
    let top = altitude_deg(&seen, azimuth);
    for (altitude, expected) in [
        (floor + 0.5, 0.5),
        (ceiling - 0.5, 0.5),
        (floor - 0.3, -0.3),
        (ceiling + 0.7, -0.7),
        (top - 0.2, -0.2),
        (top + 3.0, 3.0),
    ] {
        let what = format!("at {altitude}");
        assert_within(
            clearance_deg(&seen, azimuth, altitude),
            expected,
            1e-9,
            &what,
        );
    }
    let nearest = |altitude: f64| {
        let edge = seen.nearest_edge(degrees(azimuth), degrees(altitude));
        edge.degrees()
    };
    assert_within(nearest(floor + 0.5), floor, 1e-9, "over the church");
    assert_within(nearest(ceiling - 0.5), ceiling, 1e-9, "under the crown");
    assert_within(nearest(top + 3.0), top, 1e-9, "over the oak");
}

#[test]
fn a_church_beneath_the_oak_is_named() {
    let seen = from_mark(vec![oak(), church()]);
    let by = |azimuth: f64, altitude: f64| {
        seen.blocked_by(degrees(azimuth), degrees(altitude))
            .map(|label| label.unwrap_or("nothing with a name").to_owned())
    };
    assert_eq!(by(268.0, 0.5).as_deref(), Some("church"));
    assert_eq!(by(268.0, 2.0), None, "open");
    assert_eq!(by(268.0, 9.0).as_deref(), Some("oak"));
    assert_eq!(by(268.0, 60.0), None);
    assert_eq!(by(270.0, 2.0).as_deref(), Some("oak"), "its trunk");
    assert_eq!(by(180.0, 0.0).as_deref(), Some("nothing with a name"));
    assert_eq!(seen.label(degrees(268.0)), Some("oak"));
    assert_eq!(seen.blocker(degrees(180.0)), Blocker::Horizon);
    // At the underside's very edge, from the open side, the oak is meant.
    let underside = seen.openings(degrees(268.0))[0].1;
    let little = Angle::from_arcsec(0.2);
    assert_eq!(seen.hides(degrees(268.0), underside - little), Some("oak"));
    // The trunk parts what shows of the church: 15 m to each side at 300 m, less 0.4 m at 40 m.
    let churches: Vec<_> = seen
        .features()
        .into_iter()
        .filter(|feature| &*feature.label == "church")
        .collect();
    assert_eq!(churches.len(), 2, "{churches:?}");
    let (outer, inner) = (15f64.atan2(300.0), 0.4f64.atan2(40.0));
    let middle = (0.5 * (outer + inner)).to_degrees();
    assert_within(
        churches[0].azimuth.degrees(),
        270.0 - middle,
        1e-6,
        "left of the trunk",
    );
    assert_within(
        churches[1].azimuth.degrees(),
        270.0 + middle,
        1e-6,
        "right of the trunk",
    );
    assert_within(
        churches[0].width.radians(),
        outer - inner,
        1e-8,
        "its width",
    );
    let near_top = elevation_deg(4.4, 300.0 / inner.cos());
    assert_within(churches[0].top.degrees(), near_top, 1e-9, "its top");
    assert_within(
        seen.top_of("church", degrees(268.0))
            .expect("it shows")
            .degrees(),
        seen.floor(degrees(268.0)).degrees(),
        1e-12,
        "what stands there",
    );
}

#[test]
fn what_is_drawn_leaves_the_opening_open() {
    let seen = from_mark(vec![oak(), church()]);
    let step = degrees(0.25);
    let crowns = seen.crowns(step);
    assert_eq!(crowns.len(), 1);
    let half = crowns[0].len() / 2;
    for (upper, lower) in crowns[0][..half].iter().zip(crowns[0][half..].iter().rev()) {
        assert_eq!(upper.0, lower.0, "one over the other");
        assert!(upper.1 > lower.1, "{upper:?} {lower:?}");
        let inside = (upper.1 + lower.1) / 2.0;
        // At an edge itself the look-up is of its clockwise side.
        let is_edge = seen.breaks().contains(&upper.0);
        let is_blocked = seen.clearance(upper.0, inside) < Angle::ZERO;
        assert!(is_edge || is_blocked, "{upper:?} {lower:?}");
    }
    for (azimuth, altitude) in seen.floor_outline(step) {
        let azimuth = azimuth.degrees();
        let is_edge = seen
            .breaks()
            .iter()
            .any(|edge| (edge.degrees() - azimuth).abs() < 1e-6);
        if !is_edge && azimuth < 360.0 {
            let floor = seen.floor(degrees(azimuth)).degrees();
            assert_within(altitude.degrees(), floor, 1e-9, "the floor");
        }
    }
}

#[test]
fn a_pole_is_a_strip_of_one_width() {
    // 8 m high and 0.2 m wide, 25 m due north on ground 1 m over the mark's.
    let seen = from_mark(vec![Obstacle::Pole {
        label: "flagpole".into(),
        east_m: 0.0,
        north_m: 25.0,
        base_m: Some(1.0),
        height_m: 8.0,
        width_m: 0.2,
    }]);
    let half = 0.1f64.atan2(25.0).to_degrees();
    assert_within(
        altitude_deg(&seen, 0.0),
        elevation_deg(7.4, 25.0),
        1e-9,
        "hand trigonometry",
    );
    let corner = elevation_deg(7.4, 25f64.hypot(0.1));
    assert_within(altitude_deg(&seen, half - 1e-9), corner, 1e-6, "its corner");
    assert_eq!(altitude_deg(&seen, half + 1e-6), 0.0);
    assert_eq!(altitude_deg(&seen, 360.0 - half - 1e-6), 0.0);
    assert_eq!(seen.breaks().len(), 2, "{:?}", seen.breaks());
}

#[test]
fn a_wall_up_a_slope_rises_with_it() {
    // The ground rises by 10 m in 100 m to the north; the wall runs north 20 m east of the mark.
    let mut site = site(vec![Obstacle::Wall {
        label: "wall".into(),
        line_m: vec![at(20.0, -5.0), at(20.0, 60.0)],
        base_m: None,
        height_m: 2.0,
    }]);
    site.slope = Slope {
        east_percent: 0.0,
        north_percent: 10.0,
    };
    let seen = site.skyline(&site.spots[0]);
    for north_m in [0.0, 12.5, 40.0, 59.0] {
        let azimuth = 90.0 - f64::atan2(north_m, 20.0).to_degrees();
        let up_m = 2.0 + 0.1 * north_m - EYE_M;
        let expected = elevation_deg(up_m, 20f64.hypot(north_m));
        assert_within(
            altitude_deg(&seen, azimuth),
            expected,
            1e-9,
            "hand trigonometry",
        );
    }
    // A straight line in azimuth and altitude would pass elsewhere half-way.
    let (from, to) = (91.0, 30.0);
    let chord = 0.5 * (altitude_deg(&seen, from) + altitude_deg(&seen, to));
    assert!((altitude_deg(&seen, 0.5 * (from + to)) - chord).abs() > 0.3);
}

#[test]
fn a_slope_lifts_a_tree_and_the_eye() {
    let mut site = site(vec![oak()]);
    site.slope = Slope {
        east_percent: -5.0,
        north_percent: 0.0,
    };
    // The oak's ground lies 2 m higher; 10 m east of the mark the eye stands 0.5 m lower.
    let top = altitude_deg(&site.skyline(&site.spots[0]), 270.0);
    assert_within(
        top,
        elevation_deg(17.0 - EYE_M, 40.0),
        1e-9,
        "hand trigonometry",
    );
    let east = Spot::at("east", at(10.0, 0.0));
    let top = altitude_deg(&site.skyline(&east), 270.0);
    assert_within(
        top,
        elevation_deg(17.5 - EYE_M, 50.0),
        1e-9,
        "hand trigonometry",
    );
    // What is stated comes before the slope.
    let lifted = Spot {
        base_m: Some(1.0),
        ..east
    };
    let top = altitude_deg(&site.skyline(&lifted), 270.0);
    assert_within(
        top,
        elevation_deg(16.0 - EYE_M, 50.0),
        1e-9,
        "hand trigonometry",
    );
}

#[test]
fn a_child_and_a_wheelchair_see_less() {
    let site = site(vec![oak()]);
    let top = |stature| {
        let seen = Grounds::new(&site, None).skyline(&site.spots[0], stature);
        altitude_deg(&seen, 270.0)
    };
    for (stature, eye_m) in [
        (Stature::Adult, 1.6),
        (Stature::Wheelchair, 1.2),
        (Stature::Child, 1.1),
    ] {
        let expected = elevation_deg(15.0 - eye_m, 40.0);
        assert_within(top(stature), expected, 1e-9, "hand trigonometry");
    }
    // On a terrace of 2 m a child's eye is half a metre lower than an adult's.
    let terrace = Spot {
        eye_height_m: 3.6,
        ..Spot::mark()
    };
    assert_within(
        site.viewpoint(&terrace, Stature::Child).height_m,
        3.1,
        1e-12,
        "by hand",
    );
}

#[test]
fn the_eyes_height_belongs_to_people() {
    let read = |spots: &str| {
        let text = format!(
            "(name: \"Lawn\", latitude_deg: 51.0, longitude_deg: 0.0, time_zone: \"UTC\", \
             people: (adult_m: 1.75){spots})"
        );
        Site::from_ron(&text).unwrap()
    };
    let heights_m = |site: &Site, spot: usize| {
        let at = |stature| site.viewpoint(&site.spots[spot], stature).height_m;
        [at(Stature::Adult), at(Stature::Child)]
    };
    let stated = read(
        ", spots: [(name: \"mark\"), (name: \"lawn\", east_m: 9.0), \
         (name: \"terrace\", east_m: 30.0, eye_height_m: 2.75)]",
    );
    for (site, spot) in [(&stated, 0), (&stated, 1), (&read(""), 0)] {
        let [adult_m, child_m] = heights_m(site, spot);
        assert_within(adult_m, 1.75, 1e-9, "an adult where no spot states it");
        assert_within(child_m, 1.1, 1e-9, "a child");
    }
    // Other people on the same spots: children stay as tall as they are.
    let mut taller = stated;
    taller.set_adult_eye_m(1.6);
    assert_eq!(taller.spots[0].eye_height_m, 1.6);
    for (spot, up_m) in [(0, 0.0), (1, 0.0), (2, 1.0)] {
        let [adult_m, child_m] = heights_m(&taller, spot);
        assert_within(adult_m, 1.6 + up_m, 1e-9, "an adult");
        assert_within(child_m, 1.1 + up_m, 1e-9, "a child");
    }
    let point = r#"{"type": "Feature", "properties": {},
        "geometry": {"type": "Point", "coordinates": [0.0, 51.0001]}}"#;
    let imported = dimmet::place::exchange::from_geojson(point, &read("")).unwrap();
    assert_eq!(imported.spots[0].eye_height_m, 1.75);
}

#[test]
fn an_eye_above_the_underside_sees_no_opening() {
    let site = site(vec![oak()]);
    let high = Viewpoint {
        at: at(0.0, 0.0),
        height_m: 5.5,
    };
    let seen = Grounds::new(&site, None).skyline_from(high);
    assert!(seen.openings(degrees(268.0)).is_empty());
    assert!(seen.clearance(degrees(268.0), degrees(0.5)) < Angle::ZERO);
}

#[test]
fn a_leafless_crown_blocks_where_it_is_dense() {
    let bare = |see_through: f64, gap_m: Option<f64>| {
        let mut tree = oak();
        if let Obstacle::Tree {
            leafless,
            gap_m: gap,
            ..
        } = &mut tree
        {
            *gap = gap_m;
            *leafless = Some(Leafless {
                from: YearDay { month: 11, day: 15 },
                to: YearDay { month: 4, day: 20 },
                see_through,
            });
        }
        site(vec![tree])
    };
    let date = |month, day| NaiveDate::from_ymd_opt(2026, month, day);
    let seen = |site: &Site, date: Option<NaiveDate>| {
        Grounds::new(site, date).skyline(&site.spots[0], Stature::Adult)
    };
    let through = bare(0.6, Some(5.0));
    let crown = elevation_deg(13.4, 40f64.hypot(1.0));
    let beside = 270.0 + 1f64.atan2(40.0).to_degrees();
    for day in [None, date(11, 14), date(4, 21), date(7, 1)] {
        assert_within(
            altitude_deg(&seen(&through, day), beside),
            crown,
            1e-9,
            "in leaf",
        );
    }
    for day in [date(11, 15), date(1, 1), date(4, 20)] {
        let winter = seen(&through, day);
        assert_eq!(altitude_deg(&winter, beside), 0.0, "{day:?}");
        let trunk = altitude_deg(&winter, 270.0);
        assert_within(
            trunk,
            elevation_deg(3.4, 40.0),
            1e-9,
            "its trunk up to the gap",
        );
    }
    // Without a gap the trunk goes up to the shoulders, a twentieth of the crown wide or as given.
    let winter = seen(&bare(0.6, None), date(1, 1));
    assert_within(
        altitude_deg(&winter, 270.0),
        elevation_deg(7.4, 40.0),
        1e-9,
        "0.6 of 15 m",
    );
    let dense = bare(0.4, Some(5.0));
    assert_within(
        altitude_deg(&seen(&dense, date(1, 1)), beside),
        crown,
        1e-9,
        "too dense",
    );
    let mut patient = bare(0.4, Some(5.0));
    patient.blocking_density = 0.6;
    assert_eq!(
        altitude_deg(&seen(&patient, date(1, 1)), beside),
        0.0,
        "0.6 is not above 0.6"
    );
}

fn points(points: &[(f64, f64)]) -> Vec<SkylinePoint> {
    points
        .iter()
        .map(|(azimuth_deg, altitude_deg)| SkylinePoint {
            azimuth_deg: *azimuth_deg,
            altitude_deg: *altitude_deg,
        })
        .collect()
}

#[test]
fn a_measured_skyline_belongs_to_its_spot() {
    let mut site = site(Vec::new());
    site.skyline = points(&[(0.0, 2.0), (90.0, 2.0), (180.0, 8.0), (270.0, 2.0)]);
    let away = Spot::at("away", at(30.0, 0.0));
    let near = Spot::at("near", at(0.3, -0.3));
    site.spots = vec![Spot::mark(), away.clone(), near.clone()];
    let use_of = |site: &Site, spot: &Spot| Grounds::new(site, None).measured_use(spot);
    assert_eq!(use_of(&site, &Spot::mark()), MeasuredUse::Mark);
    assert_eq!(use_of(&site, &near), MeasuredUse::Mark);
    assert_eq!(use_of(&site, &away), MeasuredUse::LeftOut);
    assert_eq!(site.skyline(&away), Skyline::open());
    // From 120 to 200 degrees it is far: cut there exactly, and level elsewhere.
    site.skyline_far = vec![Sector {
        from_deg: 120.0,
        to_deg: 200.0,
    }];
    let is_any_left_out = true;
    assert_eq!(
        use_of(&site, &away),
        MeasuredUse::FarPartsOnly { is_any_left_out }
    );
    let seen = site.skyline(&away);
    for (azimuth, expected) in [
        (119.999_999, 0.0),
        (120.000_001, 4.0),
        (150.0, 6.0),
        (180.0, 8.0),
        (199.999_999, 8.0 - 6.0 * 20.0 / 90.0),
        (200.000_001, 0.0),
        (10.0, 0.0),
    ] {
        assert_within(
            altitude_deg(&seen, azimuth),
            expected,
            1e-6,
            "straight line by hand",
        );
    }
    assert_eq!(seen.blocker(degrees(150.0)), Blocker::Measured);
    assert_eq!(seen.blocker(degrees(10.0)), Blocker::Horizon);
    let breaks: Vec<f64> = seen
        .breaks()
        .iter()
        .map(|edge| edge.degrees().round())
        .collect();
    assert_eq!(breaks, [120.0, 180.0, 200.0]);
    assert_within(
        altitude_deg(&site.skyline(&near), 10.0),
        2.0,
        1e-9,
        "whole at the mark",
    );
    // Two sectors that close the circle leave nothing out, and north is no edge of them.
    site.skyline_far = vec![
        Sector {
            from_deg: 300.0,
            to_deg: 100.0,
        },
        Sector {
            from_deg: 100.0,
            to_deg: 300.0,
        },
    ];
    let is_any_left_out = false;
    assert_eq!(
        use_of(&site, &away),
        MeasuredUse::FarPartsOnly { is_any_left_out }
    );
    assert_eq!(site.skyline(&away), site.skyline(&near));
    // What was measured from a spot holds there, and its far parts elsewhere.
    site.spots[1].skyline = points(&[(0.0, 5.0), (180.0, 5.0)]);
    site.spots[1].skyline_far = vec![Sector {
        from_deg: 10.0,
        to_deg: 20.0,
    }];
    let own = site.spots[1].clone();
    assert_eq!(use_of(&site, &own), MeasuredUse::Own);
    assert_within(
        altitude_deg(&site.skyline(&own), 180.0),
        5.0,
        1e-9,
        "its own",
    );
    let third = Spot::at("third", at(0.0, 50.0));
    assert_within(
        altitude_deg(&site.skyline(&third), 15.0),
        5.0,
        1e-9,
        "the highest far part",
    );
    assert_within(
        altitude_deg(&site.skyline(&third), 30.0),
        2.0,
        1e-9,
        "the mark's",
    );
    site.skyline.clear();
    site.spots[1].skyline.clear();
    assert_eq!(use_of(&site, &third), MeasuredUse::Nothing);
}

#[test]
fn a_part_of_the_sky_is_as_in_the_whole() {
    let site = demo_site("fennick-common").expect("a demo site");
    let prepared = Grounds::new(site, None).prepared();
    for (east_m, north_m) in [(3.0, 4.0), (-20.0, 30.0), (10.0, -50.0)] {
        let eye = site.viewpoint_at(at(east_m, north_m), Stature::Adult);
        let terrain = prepared.terrain_from(eye);
        let whole = prepared.skyline_from(eye);
        for (from, width) in [(200.0, 90.0), (330.0, 60.0), (0.0, 179.0), (10.0, 300.0)] {
            let sector = Sector {
                from_deg: from,
                to_deg: (from + width) % 360.0,
            };
            let part = prepared.skyline_within(eye, sector, &terrain);
            for k in 0..200 {
                let azimuth = degrees(from + width * (0.0013 + f64::from(k) / 200.0));
                assert_eq!(
                    part.altitude(azimuth),
                    whole.altitude(azimuth),
                    "{azimuth:?}"
                );
                assert_eq!(
                    part.openings(azimuth),
                    whole.openings(azimuth),
                    "{azimuth:?}"
                );
                assert_eq!(part.label(azimuth), whole.label(azimuth), "{azimuth:?}");
            }
        }
    }
}

#[test]
fn a_patch_has_its_middle_and_rings_where_one_can_stand() {
    let mut site = site(vec![oak()]);
    let patch = |site: &Site, radius_m| {
        let spot = Spot {
            radius_m,
            ..Spot::mark()
        };
        site.patch(&spot)
    };
    assert_eq!(patch(&site, None), [at(0.0, 0.0)]);
    assert_eq!(patch(&site, Some(0.0)), [at(0.0, 0.0)]);
    // One ring of six at 0.8 m, two rings within 2 m, four within 40 m.
    assert_eq!(patch(&site, Some(0.8)).len(), 7);
    assert_eq!(patch(&site, Some(2.0)).len(), 19);
    let wide = patch(&site, Some(36.0));
    let reaches = wide.iter().map(|place| place.distance_m(at(0.0, 0.0)));
    assert_within(reaches.fold(0.0, f64::max), 36.0, 1e-9, "its rim");
    // One of the 61 stands under the oak's crown (36 m due west), which is left out.
    assert_eq!(wide.len(), 60);
    site.excluded = vec![Exclusion {
        label: "pond".into(),
        corners_m: vec![
            at(0.5, -60.0),
            at(60.0, -60.0),
            at(60.0, 60.0),
            at(0.5, 60.0),
        ],
    }];
    let west = patch(&site, Some(36.0));
    assert!(
        west.len() < 40 && west.iter().all(|place| place.east_m < 0.5),
        "{west:?}"
    );
}
