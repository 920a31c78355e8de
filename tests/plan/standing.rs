//! The standing map, a crowd's patch and spots side by side, against nights planned one by one
//! and against what must hold whatever stands where.

use crate::behind::{Random, night_sky, random_site};
use chrono::NaiveDate;
use dimmet::light::Eye;
use dimmet::measure::{Angle, Moment, Progress};
use dimmet::place::{Grounds, PlanPoint, Site, Stature, demo_site, demo_sites};
use dimmet::plan::standing::{Cell, Raster, Standing, StandingMap, StandingRequest, WhyLeftOut};
use dimmet::plan::{Cause, CompareRequest, Half, NightSky, compare, patch};
use dimmet::sky::Body;
use std::num::NonZeroUsize;

const TWO: NonZeroUsize = NonZeroUsize::new(2).expect("two");

fn request<'a>(
    site: &'a Site,
    nights: &'a [&'a NightSky],
    body: Body,
    half: Half,
) -> StandingRequest<'a> {
    StandingRequest {
        site,
        nights,
        body,
        eye: Eye::Visitor,
        half,
        stature: Stature::Adult,
    }
}

fn map(standing: &Standing<'_>, raster: Raster) -> StandingMap {
    standing
        .map(raster, TWO, &Progress::new(), |_| {})
        .expect("nobody cancels it")
}

fn date(year: i32, month: u32, day: u32) -> NaiveDate {
    NaiveDate::from_ymd_opt(year, month, day).expect("a date")
}

/// The longest window of a night planned for a place by itself.
fn planned(
    sky: &NightSky,
    site: &Site,
    at: PlanPoint,
    body: Body,
    half: Half,
) -> Option<(Moment, Moment)> {
    let grounds = Grounds::new(site, Some(sky.night().date));
    let night = sky.behind(&grounds.skyline_from(site.viewpoint_at(at, Stature::Adult)));
    let windows = night
        .body(body)
        .expect("asked for")
        .windows_in(Eye::Visitor, half);
    windows
        .iter()
        .map(|window| (window.start.moment, window.end.moment))
        .max_by(|a, b| a.1.seconds_since(a.0).total_cmp(&b.1.seconds_since(b.0)))
}

#[test]
fn a_cell_has_the_window_that_a_night_planned_there_has() {
    const TOLERANCE_S: f64 = 2.0;
    let mut random = Random(17);
    let (mut compared, mut hidden, mut worst_s) = (0, 0, 0.0_f64);
    for site in demo_sites() {
        for day in [date(2026, 12, 4), date(2027, 4, 18)] {
            let sky = night_sky(site, day);
            let nights = [&sky];
            for (body, half) in [
                (Body::Venus, Half::Dawn),
                (Body::Venus, Half::Dusk),
                (Body::Jupiter, Half::Dawn),
                (Body::Saturn, Half::Dusk),
                (Body::Moon, Half::Dawn),
                (Body::Moon, Half::Dusk),
            ] {
                let standing = Standing::new(request(site, &nights, body, half));
                let spots = site.spots.iter().map(|spot| spot.plan_point());
                let anywhere = (0..12).map(|_| {
                    PlanPoint::new(random.between(-50.0, 50.0), random.between(-50.0, 50.0))
                });
                for at in spots.chain(anywhere).collect::<Vec<_>>() {
                    // A map of that one square.
                    let square = Raster {
                        origin: at,
                        step_m: 1.0,
                        columns: 1,
                        rows: 1,
                    };
                    let Cell::Stay(stay) = map(&standing, square).cell(0, 0) else {
                        continue;
                    };
                    let expected = planned(&sky, site, at, body, half);
                    let what = format!("{} {at:?} {day} {body:?} {half:?}", site.name);
                    match (stay.window, expected) {
                        (None, None) => hidden += 1,
                        (Some(is), Some(expected)) => {
                            let start_s = is.0.seconds_since(expected.0).abs();
                            let end_s = is.1.seconds_since(expected.1).abs();
                            worst_s = worst_s.max(start_s).max(end_s);
                            assert!(
                                start_s < TOLERANCE_S && end_s < TOLERANCE_S,
                                "{what}: {start_s} s and {end_s} s off"
                            );
                            compared += 1;
                        }
                        (is, expected) => panic!("{what}: {is:?}, planned {expected:?}"),
                    }
                }
            }
        }
    }
    println!("{compared} windows, {hidden} without, worst {worst_s:.3} s");
    assert!(compared > 150, "only {compared} windows were compared");
}

#[test]
fn a_higher_obstacle_gives_no_square_more_minutes() {
    let mut random = Random(5);
    let mut less = 0;
    for _ in 0..3 {
        let site = random_site(&mut random, 12);
        let sky = night_sky(&site, random.date());
        let nights = [&sky];
        let raster = Raster::of_site(&site, 9.0);
        for (body, half) in [(Body::Moon, Half::Dusk), (Body::Jupiter, Half::Dawn)] {
            let low = map(&Standing::new(request(&site, &nights, body, half)), raster);
            let mut raised = site.clone();
            let chosen = random.below(raised.obstacles.len());
            crate::behind::raise(&mut raised.obstacles[chosen], 6.0);
            let high = map(
                &Standing::new(request(&raised, &nights, body, half)),
                raster,
            );
            for row in 0..raster.rows {
                for column in 0..raster.columns {
                    let (Cell::Stay(before), Cell::Stay(after)) =
                        (low.cell(column, row), high.cell(column, row))
                    else {
                        continue;
                    };
                    // A second of two searches' own tolerance.
                    assert!(
                        after.minutes <= before.minutes + 1.0 / 60.0
                            && after.total_minutes <= before.total_minutes + 1.0 / 60.0,
                        "{:?} {body:?}: {before:?} became {after:?}",
                        raster.centre(column, row)
                    );
                    less += usize::from(after.total_minutes < before.total_minutes - 0.5);
                }
            }
        }
    }
    assert!(less > 0, "no raised obstacle hid anything anywhere");
}

#[test]
fn places_where_nobody_is_to_stand_are_left_out() {
    let mut site = demo_site("fennick-common").expect("a demo site").clone();
    let corners = |points: &[(f64, f64)]| -> Vec<PlanPoint> {
        points.iter().map(|(e, n)| PlanPoint::new(*e, *n)).collect()
    };
    site.outline_m = corners(&[(-60.0, -40.0), (20.0, -40.0), (20.0, 30.0), (-60.0, 30.0)]);
    site.excluded = vec![dimmet::place::Exclusion {
        label: "pond".into(),
        corners_m: corners(&[(0.0, 10.0), (15.0, 10.0), (15.0, 25.0), (0.0, 25.0)]),
    }];
    let sky = night_sky(&site, date(2026, 12, 4));
    let nights = [&sky];
    let standing = Standing::new(request(&site, &nights, Body::Saturn, Half::Dusk));
    assert_eq!(standing.left_out(PlanPoint::new(0.0, 0.0)), None);
    for (at, why) in [
        ((7.0, 20.0), WhyLeftOut::Excluded),
        ((-50.0, -26.0), WhyLeftOut::InObstacle), // the hall
        ((21.0, 0.0), WhyLeftOut::Outside),
    ] {
        assert_eq!(
            standing.left_out(PlanPoint::new(at.0, at.1)),
            Some(why),
            "{at:?}"
        );
    }
    let raster = Raster::of_site(&site, 5.0);
    assert_eq!(raster.origin, PlanPoint::new(-60.0, -40.0));
    assert_eq!((raster.columns, raster.rows), (17, 15));
}

#[test]
fn the_map_tells_the_best_places_what_a_place_costs_and_the_way_to_more() {
    let site = demo_site("fennick-common").expect("a demo site");
    let sky = night_sky(site, date(2026, 12, 4));
    let nights = [&sky];
    let standing = Standing::new(request(site, &nights, Body::Venus, Half::Dawn));
    let raster = Raster::of_site(site, 4.0);
    let mut shares = 0;
    let mut coarse = 0;
    let progress = Progress::new();
    let map = standing
        .map(raster, TWO, &progress, |partial| {
            shares += 1;
            // After the first report every square has at least a coarse one to stand for it.
            coarse +=
                usize::from(partial.shown(raster.columns - 1, raster.rows - 1) != Cell::Waiting);
        })
        .expect("nobody cancels it");
    assert!(shares >= 2 && coarse == shares, "{coarse} of {shares}");
    assert_eq!(progress.share(), 1.0);
    let best = map.best_places(3, 15.0);
    assert_eq!(best.len(), 3);
    for (k, (at, stay)) in best.iter().enumerate() {
        assert!(
            best[..k]
                .iter()
                .all(|other| other.0.distance_m(*at) >= 15.0)
        );
        assert!(map.cost_of(stay) < 60.0, "{stay:?}");
    }
    assert!(map.cost_of(&best[0].1) <= 0.1, "the first is the best");
    let (from, here) = map
        .stays()
        .min_by(|a, b| a.1.minutes.total_cmp(&b.1.minutes))
        .expect("a square to stand on");
    let cost = map.cost_of(&here);
    assert!(cost > 10.0, "the worst square costs {cost} minutes");
    let gain = map.gain(from, &here, 10.0).expect("the best gives more");
    assert!(gain.minutes >= 10.0);
    assert!((gain.to.distance_m(from) - gain.distance_m).abs() < 1e-9);
    assert_eq!(gain.bearing, from.bearing(gain.to));
    assert!(
        map.stays()
            .filter(|(at, _)| at.distance_m(from) < gain.distance_m - 1e-9)
            .all(|(_, stay)| stay.minutes < here.minutes + 10.0),
        "nothing nearer gives as much"
    );
    assert_eq!(map.gain(from, &here, cost + 1.0), None);
    // A contour's points lie between squares of more and of fewer minutes.
    let level = here.minutes + 0.5 * cost;
    let contours = map.contours(&[level]);
    assert!(!contours.is_empty());
    for point in contours.iter().flat_map(|contour| &contour.line) {
        let around: Vec<f64> = map
            .stays()
            .filter(|(at, _)| at.distance_m(*point) <= raster.step_m + 1e-9)
            .map(|(_, stay)| stay.minutes)
            .collect();
        let (least, most) = around
            .iter()
            .fold((f64::MAX, f64::MIN), |(a, b), m| (a.min(*m), b.max(*m)));
        assert!(
            least <= level && level <= most,
            "{point:?}: {least} to {most}"
        );
    }
}

#[test]
fn a_cancelled_map_is_none() {
    let site = demo_site("fennick-common").expect("a demo site");
    let sky = night_sky(site, date(2026, 12, 4));
    let nights = [&sky];
    let standing = Standing::new(request(site, &nights, Body::Venus, Half::Dawn));
    let progress = Progress::new();
    let mut squares = 0;
    let answer = standing.map(Raster::of_site(site, 2.0), TWO, &progress, |partial| {
        squares = partial.stays().count();
        progress.cancel();
    });
    assert_eq!(answer, None);
    assert!(
        squares > 0 && squares < 2500,
        "{squares} were known when it was cancelled"
    );
}

#[test]
fn several_nights_are_summed_and_the_least_is_told() {
    let site = demo_site("fennick-common").expect("a demo site");
    let skies = [
        night_sky(site, date(2026, 12, 4)),
        night_sky(site, date(2027, 1, 10)),
    ];
    let at = site.viewpoint_at(PlanPoint::new(10.0, -20.0), Stature::Adult);
    let alone = skies.each_ref().map(|sky| {
        let nights = [sky];
        Standing::new(request(site, &nights, Body::Venus, Half::Dawn)).stay(at)
    });
    let nights = skies.each_ref();
    let both = Standing::new(request(site, &nights, Body::Venus, Half::Dawn)).stay(at);
    assert!(alone[0].minutes > 1.0 && alone[1].minutes > 1.0 && alone[0] != alone[1]);
    assert!((both.minutes - alone[0].minutes - alone[1].minutes).abs() < 1e-9);
    assert_eq!(both.least_minutes, alone[0].minutes.min(alone[1].minutes));
    assert_eq!(both.window, alone[0].window);
}

#[test]
fn the_worst_of_a_crowd_is_a_child_close_behind_a_wall() {
    let mut site = demo_site("fennick-common").expect("a demo site").clone();
    site.skyline.clear();
    site.spots.truncate(1);
    site.spots[0].radius_m = Some(6.0);
    // A wall 9 m off in the south-east, where Venus comes up.
    site.obstacles = vec![dimmet::place::Obstacle::Wall {
        label: "wall".into(),
        line_m: vec![PlanPoint::new(0.0, -18.0), PlanPoint::new(18.0, 0.0)],
        base_m: None,
        height_m: 4.0,
    }];
    let sky = night_sky(&site, date(2026, 12, 4));
    let nights = [&sky];
    let standing = Standing::new(request(&site, &nights, Body::Venus, Half::Dawn));
    let answer = patch(&standing, &site.spots[0]).expect("people stand there");
    let middle = answer.middle.expect("and in its middle");
    assert_eq!(answer.worst.stature, Stature::Child);
    let towards = PlanPoint::new(0.0, 0.0).bearing(answer.worst.at);
    assert!(
        (towards - Angle::from_degrees(135.0)).signed().abs() < Angle::from_degrees(20.0),
        "the worst place lies towards the wall, at {}",
        towards.degrees()
    );
    assert!(answer.worst.stay.minutes < answer.median.stay.minutes);
    assert!(answer.worst.stay.minutes < middle.minutes);
    assert_eq!(answer.places, site.patch(&site.spots[0]).len());
}

#[test]
fn spots_are_compared_with_what_ends_their_windows() {
    let mut site = demo_site("fennick-common").expect("a demo site").clone();
    site.kit[0].set_spot(Some("pond lawn".into()));
    let sky = night_sky(&site, date(2027, 1, 10));
    let mut labels = 0;
    for (body, half) in [(Body::Saturn, Half::Dusk), (Body::Venus, Half::Dawn)] {
        let asked = CompareRequest {
            site: &site,
            night: &sky,
            body,
            eye: Eye::Visitor,
            half,
            stature: Stature::Adult,
        };
        let spots = compare(&asked, &site.spots);
        assert_eq!(spots.len(), 3);
        for compared in &spots {
            let skyline =
                Grounds::new(&site, Some(sky.night().date)).skyline(compared.spot, Stature::Adult);
            let night = sky.behind(&skyline);
            let expected = night
                .body(body)
                .expect("asked for")
                .windows_in(Eye::Visitor, half);
            let windows: Vec<_> = compared.windows.iter().map(|seen| seen.window).collect();
            assert_eq!(windows, expected, "{}", compared.spot.name);
            assert_eq!(compared.absence.is_some(), windows.is_empty());
            let stands = compared.kit.len();
            assert_eq!(stands, usize::from(compared.spot.name == "pond lawn"));
            for seen in &compared.windows {
                let named = seen.end_blocker.iter().chain(&seen.start_blocker);
                labels += named.count();
                assert!(seen.window.end.cause == Cause::Skyline || seen.end_blocker.is_none());
            }
        }
    }
    assert!(labels > 0, "nothing labelled ends a window");
}
