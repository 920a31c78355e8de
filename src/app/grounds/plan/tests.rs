//! The plan at work without a window: what it shows, and what changes make of a site.
#![allow(clippy::unwrap_used)]

use super::backdrop::{Placing, placed};
use super::camera::{Camera, View};
use super::drag::{Drag, Grip, Manner, handles};
use super::model::{Figure, Model};
use super::snap::{Sign, Snap};
use super::things::{self, Extent};
use super::tools::{Tool, rays_from};
use crate::app::grounds::Selection;
use crate::place::{Obstacle, PicturePoint, PlanPoint, Site, SkylinePoint, Spot, demo_site};
use crate::words::Words;
use chrono::NaiveDate;
use eframe::egui::{Rect, pos2, vec2};
use proptest::prelude::*;

fn at(east_m: f64, north_m: f64) -> PlanPoint {
    PlanPoint::new(east_m, north_m)
}

/// Five points of the screen to a metre, the mark in the middle.
fn camera() -> Camera {
    Camera {
        rect: Rect::from_min_size(pos2(20.0, 30.0), vec2(800.0, 600.0)),
        view: View {
            centre: at(0.0, 0.0),
            points_per_m: 5.0,
        },
    }
}

fn bare() -> Site {
    Site::new("Bare Field", 51.0, -3.0, chrono_tz::Europe::London).unwrap()
}

const SNAPS: Manner = Manner {
    snaps: true,
    is_free: false,
};

#[test]
fn the_demo_site_in_words() {
    let site = demo_site("fennick-common").unwrap();
    let date = NaiveDate::from_ymd_opt(2026, 12, 4).unwrap();
    let model = Model::new(site, 1, date);
    let text: Vec<String> = model
        .things
        .iter()
        .map(|thing| {
            let what = match &thing.figure {
                Figure::Excluded(_) => "excluded".to_owned(),
                Figure::Crown { radius_m, .. } => format!("crown {radius_m}"),
                Figure::Pole { .. } => "pole".to_owned(),
                Figure::Footprint { corners, ridges } => {
                    format!("{} corners {} ridge", corners.len(), ridges.len())
                }
                Figure::Wall(line) => format!("wall {}", line.len()),
                Figure::Spot { is_chosen, .. } => format!("spot {is_chosen}"),
            };
            format!("{}: {what}", thing.label)
        })
        .collect();
    // As the site file lists them; spots lie on top.
    assert_eq!(
        text,
        [
            "pond: excluded",
            "car park: excluded",
            "oak: crown 6",
            "hall: 4 corners 1 ridge",
            "hedge: wall 3",
            "pines: crown 4.5",
            "pines: crown 4.5",
            "limes: crown 5.5",
            "limes: crown 6",
            "pavilion: 4 corners 1 ridge",
            "beech: crown 8.5",
            "lamp post: pole",
            "mark: spot false",
            "pond lawn: spot true",
            "bandstand: spot false",
        ]
    );
}

#[test]
fn everything_fits_into_the_view() {
    let site = demo_site("ternskjell-quay").unwrap();
    for size in [vec2(800.0, 600.0), vec2(300.0, 900.0)] {
        let rect = Rect::from_min_size(pos2(5.0, 7.0), size);
        let view = View::of_everything(&Extent::of(site), rect);
        let camera = Camera { rect, view };
        for thing in things::all(site) {
            for point in thing.points(site) {
                assert!(rect.contains(camera.to_screen(point)), "{point:?}");
            }
        }
    }
}

proptest! {
    /// Whatever was zoomed and panned before: the point under the pointer stays there.
    #[test]
    fn the_point_under_the_pointer_stays_while_zooming(
        east_m in -500.0..500.0, north_m in -500.0..500.0,
        scale in 0.5..50.0f64, times in 0.5..2.0f64,
        x in 20.0..820.0f32, y in 30.0..630.0f32,
    ) {
        let view = View { centre: at(east_m, north_m), points_per_m: scale };
        let camera = Camera { view, ..camera() };
        let pointer = pos2(x, y);
        let before = camera.to_plan(pointer);
        let after = Camera { view: camera.zoomed(pointer, times), ..camera };
        prop_assert!(after.to_plan(pointer).distance_m(before) < 1e-6);
        prop_assert!(after.to_screen(before).distance(pointer) < 0.01);
    }

    /// A picture is placed so that both known points lie where they are said to, and the way back
    /// gives the pixel.
    #[test]
    fn a_placed_picture_goes_through_both_known_points(
        right in 10.0..900.0f64, down in 10.0..900.0f64,
        east_m in -100.0..100.0f64, north_m in 5.0..100.0f64,
        x in 0.0..1000.0f64, y in 0.0..1000.0f64,
    ) {
        let mut backdrop = placed("a.png".into(), [1000, 1000]);
        backdrop.first = PicturePoint { right_px: 0.0, down_px: 0.0, at: at(3.0, -4.0) };
        backdrop.second = PicturePoint { right_px: right, down_px: down, at: at(east_m, north_m) };
        let placing = Placing::new(&backdrop).unwrap();
        prop_assert!(placing.to_plan(0.0, 0.0).distance_m(at(3.0, -4.0)) < 1e-6);
        prop_assert!(placing.to_plan(right, down).distance_m(at(east_m, north_m)) < 1e-6);
        let (back_x, back_y) = placing.to_picture(placing.to_plan(x, y));
        prop_assert!((back_x - x).abs() < 1e-4 && (back_y - y).abs() < 1e-4);
    }

    /// Turning keeps lengths; moving keeps the shape.
    #[test]
    fn a_turned_or_moved_building_keeps_its_size(
        to_east in -60.0..60.0f64, to_north in -60.0..60.0f64, is_turn in any::<bool>(),
    ) {
        let mut site = bare();
        site.spots[0].east_m = 900.0;
        site.obstacles.push(building(&[(10.0, 10.0), (30.0, 10.0), (30.0, 20.0), (10.0, 20.0)]));
        let thing = Selection::Obstacle(0);
        let grip = if is_turn { Grip::Turn } else { Grip::Whole };
        let drag = Drag::begin(&site, thing, grip, at(20.0, 26.0));
        let (changed, _) = drag.to(at(to_east, to_north), camera(), SNAPS);
        let points = thing.points(&changed);
        for (k, length_m) in [20.0, 10.0, 20.0, 10.0].into_iter().enumerate() {
            let actual_m = points[k].distance_m(points[(k + 1) % 4]);
            prop_assert!((actual_m - length_m).abs() < 0.003, "{actual_m} for {length_m}");
        }
    }
}

fn building(corners: &[(f64, f64)]) -> Obstacle {
    Obstacle::Building {
        label: "shed".into(),
        corners_m: corners.iter().map(|(e, n)| at(*e, *n)).collect(),
        base_m: None,
        eaves_m: 3.0,
        ridge_m: None,
    }
}

#[test]
fn a_position_is_drawn_to_the_nearest_of_corner_right_angle_side_and_grid() {
    let mut site = bare();
    site.obstacles.push(building(&[
        (10.0, 10.0),
        (33.0, 10.0),
        (33.0, 21.0),
        (10.0, 21.0),
    ]));
    let snap = Snap::new(&site, None, camera(), true);
    // Eight points of the screen reach 1.6 m; the grid stands 5 m apart.
    let sign = |raw| {
        let snapped = snap.at(raw);
        (snapped.at, snapped.sign)
    };
    assert_eq!(sign(at(9.0, 9.2)), (at(10.0, 10.0), Some(Sign::Corner)));
    assert_eq!(sign(at(22.3, 9.2)), (at(22.3, 10.0), Some(Sign::Line)));
    assert_eq!(sign(at(-6.0, -12.4)), (at(-5.0, -12.4), Some(Sign::Grid)));
    assert_eq!(sign(at(-7.52, -12.48)), (at(-7.5, -12.5), None));
    let off = Snap::new(&site, None, camera(), false);
    assert_eq!(off.at(at(9.03, 9.18)).at, at(9.0, 9.2));
    assert_eq!(off.at(at(9.0, 9.2)).sign, None);
    // A side of 3-4-5: square to it lies (4, -3) and its multiples.
    let drawn = [at(-40.0, -40.0), at(-37.0, -36.0)];
    let snap = Snap::new(&site, None, camera(), true).with_rays(rays_from(&drawn));
    let snapped = snap.at(at(-28.7, -42.3));
    assert_eq!(snapped.sign, Some(Sign::RightAngle));
    let (side, next) = (
        (3.0, 4.0),
        (snapped.at.east_m + 37.0, snapped.at.north_m + 36.0),
    );
    let cosine = (side.0 * next.0 + side.1 * next.1) / (5.0 * next.0.hypot(next.1));
    assert!(cosine.abs() < 1e-3, "{cosine}");
}

#[test]
fn a_side_drawn_last_meets_the_first_one_squarely() {
    let drawn = [at(0.0, 0.0), at(20.0, 0.0), at(20.0, 13.0)];
    let snap = Snap::new(&bare(), None, camera(), true).with_rays(rays_from(&drawn));
    let snapped = snap.at(at(0.7, 12.4));
    assert_eq!(snapped.at, at(0.0, 13.0), "square to both");
    assert_eq!(snapped.from.len(), 2);
}

#[test]
fn the_rim_of_a_crown_sets_its_width() {
    let mut site = bare();
    let words = Words::english();
    let (made, thing) = Tool::Tree
        .made(&site, &[at(20.0, 0.0), at(20.0, 4.0)], &words)
        .unwrap();
    site = made;
    assert_eq!(thing.radius_m(&site), Some(4.0));
    let rim = handles(&site, thing, camera())[0];
    assert_eq!(rim, (Grip::Rim, camera().to_screen(at(24.0, 0.0))));
    let drag = Drag::begin(&site, thing, Grip::Rim, at(24.0, 0.0));
    let (wider, _) = drag.to(at(26.52, 0.0), camera(), SNAPS);
    assert_eq!(thing.radius_m(&wider), Some(6.5));
    assert_eq!(thing.points(&wider), [at(20.0, 0.0)]);
}

#[test]
fn a_spot_goes_with_its_instruments_and_the_last_one_stays() {
    let mut site = demo_site("fennick-common").unwrap().clone();
    site.kit[0].set_spot(Some("pond lawn".into()));
    let rest = Selection::Spot(1).removed(&site).unwrap();
    assert_eq!(rest.spots.len(), 2);
    assert_eq!(rest.kit[0].spot(), None);
    assert_eq!(Selection::Spot(0).removed(&bare()), None);
    assert_eq!(Selection::Obstacle(99).removed(&site), None);
}

#[test]
fn a_copied_spot_gets_a_name_of_its_own_and_no_measured_skyline() {
    let mut site = bare();
    site.spots.push(Spot::at("lawn", at(5.0, 0.0)));
    site.spots.push(Spot::at("lawn 2", at(8.0, 0.0)));
    site.spots[1].skyline = vec![SkylinePoint {
        azimuth_deg: 90.0,
        altitude_deg: 4.0,
    }];
    let (more, copy) = Selection::Spot(1).duplicated(&site, at(3.0, -3.0)).unwrap();
    assert_eq!(copy, Selection::Spot(3));
    assert_eq!(more.spots[3].name, "lawn 3");
    assert_eq!(more.spots[3].plan_point(), at(8.0, -3.0));
    assert!(more.spots[3].skyline.is_empty());
    assert!(more.check().is_ok());
    assert_eq!(Selection::Outline.duplicated(&site, at(1.0, 1.0)), None);
}

#[test]
fn what_every_tool_makes_can_be_written() {
    let words = Words::english();
    let corners = [at(10.0, 10.0), at(20.0, 10.0), at(20.0, 22.0)];
    for tool in Tool::ALL {
        match tool.made(&bare(), &corners, &words) {
            Some((site, thing)) => {
                assert!(site.check().is_ok(), "{tool:?}: {:?}", site.check());
                assert!(thing.exists(&site));
            }
            None => assert!(matches!(tool, Tool::Select | Tool::Tape), "{tool:?}"),
        }
        assert!(tool.made(&bare(), &[], &words).is_none(), "{tool:?}");
    }
}

#[test]
fn the_topmost_thing_is_taken_and_the_outline_only_by_its_line() {
    let mut site = bare();
    site.outline_m = vec![
        at(-50.0, -50.0),
        at(50.0, -50.0),
        at(50.0, 50.0),
        at(-50.0, 50.0),
    ];
    site.obstacles.push(building(&[
        (10.0, 10.0),
        (30.0, 10.0),
        (30.0, 20.0),
        (10.0, 20.0),
    ]));
    assert_eq!(
        things::at(&site, at(0.2, 0.2), 1.0),
        Some(Selection::Spot(0))
    );
    assert_eq!(
        things::at(&site, at(20.0, 15.0), 1.0),
        Some(Selection::Obstacle(0))
    );
    assert_eq!(things::at(&site, at(-20.0, 15.0), 1.0), None);
    assert_eq!(
        things::at(&site, at(-50.5, 15.0), 1.0),
        Some(Selection::Outline)
    );
}
