//! A night behind many skylines: the same as planned anew, and never longer for a higher one.

use chrono::NaiveDate;
use dimmet::light::Eye;
use dimmet::measure::{Angle, TimeScales};
use dimmet::place::{Obstacle, PlanPoint, Site, Skyline, demo_site, demo_sites};
use dimmet::plan::{Night, NightRequest, NightSky, Sight};
use dimmet::sky::{Body, Ephemeris};

/// Numbers that look random and are the same in every run (splitmix64).
pub struct Random(pub u64);

impl Random {
    fn next(&mut self) -> u64 {
        self.0 = self.0.wrapping_add(0x9e37_79b9_7f4a_7c15);
        let mut z = self.0;
        z = (z ^ (z >> 30)).wrapping_mul(0xbf58_476d_1ce4_e5b9);
        z = (z ^ (z >> 27)).wrapping_mul(0x94d0_49bb_1331_11eb);
        z ^ (z >> 31)
    }
    pub fn between(&mut self, low: f64, high: f64) -> f64 {
        low + (high - low) * (self.next() >> 11) as f64 / (1_u64 << 53) as f64
    }
    pub fn below(&mut self, count: usize) -> usize {
        (self.next() % count as u64) as usize
    }
    pub fn date(&mut self) -> NaiveDate {
        let first = NaiveDate::from_ymd_opt(2026, 1, 1).expect("a date");
        first + chrono::Days::new(self.below(1500) as u64)
    }
}

fn request<'a>(
    site: &Site,
    observer: &'a dimmet::sky::Observer,
    skyline: &'a Skyline,
    sight: &'a Sight,
    date: NaiveDate,
) -> NightRequest<'a> {
    NightRequest {
        observer,
        skyline,
        zone: site.zone(),
        date,
        scales: TimeScales::new(),
        sight,
        eyes: &Eye::ALL,
        bodies: &Body::BRIGHT,
    }
}

pub fn night_sky(site: &Site, date: NaiveDate) -> NightSky {
    let sight = Sight::of_site(site).expect("the demo sites' air");
    let (observer, open) = (site.observer(), Skyline::open());
    NightSky::new(
        &Ephemeris::new(),
        &request(site, &observer, &open, &sight, date),
    )
    .expect("a supported date")
}

fn planned_anew(site: &Site, date: NaiveDate, skyline: &Skyline) -> Night {
    let sight = Sight::of_site(site).expect("the demo sites' air");
    Night::plan(
        &Ephemeris::new(),
        &request(site, &site.observer(), skyline, &sight, date),
    )
    .expect("a supported date")
}

/// One of the demo sites with other obstacles around its mark, 12 m to 80 m off.
pub fn random_site(random: &mut Random, obstacles: usize) -> Site {
    let mut site = demo_sites()[random.below(3)].clone();
    site.obstacles.clear();
    site.spots.truncate(1);
    for k in 0..obstacles {
        let (turn, far_m) = (random.between(0.0, 6.3), random.between(12.0, 80.0));
        let at = PlanPoint::new(far_m * turn.sin(), far_m * turn.cos());
        let label = format!("obstacle {k}");
        let (base_m, height_m) = (None, random.between(3.0, 14.0));
        let (east_m, north_m) = (at.east_m, at.north_m);
        let corner = |east: f64, north: f64| PlanPoint::new(east_m + east, north_m + north);
        let (wide, deep) = (random.between(2.0, 7.0), random.between(2.0, 7.0));
        let footprint = vec![
            corner(-wide, -deep),
            corner(wide, -deep),
            corner(wide, deep),
            corner(-wide, deep),
        ];
        site.obstacles.push(match random.below(5) {
            0 => Obstacle::Tree {
                label,
                east_m,
                north_m,
                base_m,
                height_m,
                width_m: wide,
                gap_m: (random.below(2) == 0).then_some(0.3 * height_m),
                trunk_m: None,
                leafless: None,
            },
            1 => Obstacle::Building {
                label,
                corners_m: footprint,
                base_m,
                eaves_m: height_m,
                ridge_m: Some(1.4 * height_m),
            },
            2 => Obstacle::Shape {
                label,
                corners_m: footprint,
                base_m,
                height_m,
            },
            3 => Obstacle::Wall {
                label,
                line_m: vec![corner(-wide, deep), corner(wide, -deep)],
                base_m,
                height_m,
            },
            _ => Obstacle::Pole {
                label,
                east_m,
                north_m,
                base_m,
                height_m,
                width_m: 0.2,
            },
        });
    }
    site
}

/// Makes an obstacle higher by so many metres; what was beneath a crown stays open.
pub fn raise(obstacle: &mut Obstacle, by_m: f64) {
    match obstacle {
        // A crown's shoulders rise with its top, so it only ever covers more.
        Obstacle::Tree { height_m, .. }
        | Obstacle::Pole { height_m, .. }
        | Obstacle::Shape { height_m, .. }
        | Obstacle::Wall { height_m, .. } => *height_m += by_m,
        Obstacle::Building {
            eaves_m, ridge_m, ..
        } => {
            *eaves_m += by_m;
            if let Some(ridge_m) = ridge_m {
                *ridge_m += by_m;
            }
        }
    }
}

#[test]
fn a_night_behind_a_skyline_is_the_night_planned_anew() {
    const TOLERANCE_S: f64 = 1.0;
    let mut random = Random(3);
    let (mut windows, mut events) = (0, 0);
    for _ in 0..6 {
        let site = random_site(&mut random, 14);
        let date = random.date();
        let sky = night_sky(&site, date);
        // Behind others first: none leaves a trace.
        for _ in 0..2 {
            let other = random_site(&mut random, 6);
            sky.behind(&other.skyline(&other.spots[0]));
        }
        let skyline = site.skyline(&site.spots[0]);
        let (behind, anew) = (sky.behind(&skyline), planned_anew(&site, date, &skyline));
        assert_eq!(behind.optics, anew.optics);
        assert_eq!(behind.bodies.len(), anew.bodies.len());
        for (a, b) in behind.bodies.iter().zip(&anew.bodies) {
            assert_eq!((a.body, &a.rise, &a.set), (b.body, &b.rise, &b.set));
            assert_eq!(a.skyline_events.len(), b.skyline_events.len());
            for (x, y) in a.skyline_events.iter().zip(&b.skyline_events) {
                assert!(x.moment.seconds_since(y.moment).abs() < TOLERANCE_S);
                assert_eq!(x.clears, y.clears);
                events += 1;
            }
            let order: Vec<f64> = a
                .skyline_events
                .iter()
                .map(|event| event.moment.seconds_since(behind.start))
                .collect();
            assert!(order.is_sorted(), "{order:?}");
            assert!(
                a.skyline_events
                    .windows(2)
                    .all(|pair| pair[0].clears != pair[1].clears),
                "in and out of view in turn"
            );
            for eye in Eye::ALL {
                assert_eq!(a.windows(eye).len(), b.windows(eye).len());
                for (x, y) in a.windows(eye).iter().zip(b.windows(eye)) {
                    for (x, y) in [(x.start, y.start), (x.end, y.end)] {
                        assert!(x.moment.seconds_since(y.moment).abs() < TOLERANCE_S);
                        assert_eq!(x.cause, y.cause);
                    }
                    windows += 1;
                }
            }
        }
    }
    assert!(
        windows > 100 && events > 50,
        "{windows} windows, {events} events"
    );
}

/// The windows' ends and the skyline's events agree with the clearance looked at every 7 s.
#[test]
fn what_is_between_two_events_is_all_clear_or_all_hidden() {
    const STEP_S: f64 = 7.0;
    let mut random = Random(23);
    let mut looked = 0;
    for _ in 0..4 {
        let site = random_site(&mut random, 20);
        let sky = night_sky(&site, random.date());
        let skyline = site.skyline(&site.spots[0]);
        let night = sky.behind(&skyline);
        for body in &night.bodies {
            let mut is_clear = body.is_clear_at_start;
            let mut events = body.skyline_events.iter().peekable();
            let length_s = night.end.seconds_since(night.start);
            for k in 1..(length_s / STEP_S) as usize {
                let moment = night.start.plus_seconds(k as f64 * STEP_S);
                let mut just_passed = false;
                while let Some(event) = events.next_if(|event| event.moment <= moment) {
                    is_clear = event.clears;
                    just_passed = moment.seconds_since(event.moment) < 0.02;
                }
                let next_s = events.peek().map(|next| next.moment.seconds_since(moment));
                if just_passed || next_s.is_some_and(|next_s| next_s < 0.02) {
                    continue;
                }
                let (azimuth, altitude) = sky.place(body.body, moment).expect("asked for");
                let clearance = skyline.clearance(azimuth, altitude);
                assert_eq!(
                    clearance.radians() > 0.0,
                    is_clear,
                    "{:?} {} s after noon: clearance {}",
                    body.body,
                    k as f64 * STEP_S,
                    clearance.degrees()
                );
                looked += 1;
            }
        }
    }
    assert!(looked > 100_000, "{looked}");
}

#[test]
fn a_higher_obstacle_never_gives_a_longer_window() {
    // Two searches, each to half a second.
    const TOLERANCE_S: f64 = 1.0;
    let mut random = Random(11);
    let mut shorter = 0;
    for _ in 0..8 {
        let site = random_site(&mut random, 10);
        let sky = night_sky(&site, random.date());
        let chosen = random.below(site.obstacles.len());
        let mut raised = site.clone();
        raise(&mut raised.obstacles[chosen], random.between(1.0, 12.0));
        let (low, high) = (
            sky.behind(&site.skyline(&site.spots[0])),
            sky.behind(&raised.skyline(&raised.spots[0])),
        );
        for (before, after) in low.bodies.iter().zip(&high.bodies) {
            for eye in Eye::ALL {
                for window in after.windows(eye) {
                    let held = before.windows(eye).iter().any(|wide| {
                        window.start.moment.seconds_since(wide.start.moment) >= -TOLERANCE_S
                            && wide.end.moment.seconds_since(window.end.moment) >= -TOLERANCE_S
                    });
                    assert!(held, "{:?} {eye:?}: {window:?} is new", before.body);
                }
                let total_s = |night: &dimmet::plan::BodyNight| -> f64 {
                    let windows = night.windows(eye).iter();
                    windows
                        .map(|w| w.end.moment.seconds_since(w.start.moment))
                        .sum()
                };
                shorter += usize::from(total_s(after) < total_s(before) - 30.0);
            }
        }
    }
    assert!(shorter > 0, "no raised obstacle hid anything");
}

#[test]
fn a_body_comes_through_the_opening_beneath_a_crown() {
    let mut site = demo_site("fennick-common").expect("a demo site").clone();
    site.skyline.clear();
    site.spots.truncate(1);
    let date = NaiveDate::from_ymd_opt(2026, 12, 4).expect("a date");
    let sky = night_sky(&site, date);
    // Where Venus stands two hours after it rises.
    let venus_rise = sky
        .behind(&Skyline::open())
        .body(Body::Venus)
        .expect("asked for")
        .rise[0];
    let (azimuth, altitude) = sky
        .place(Body::Venus, venus_rise.plus_seconds(7200.0))
        .expect("asked for");
    let far_m = 40.0;
    let at = |rise: f64, far_m: f64| 1.6 + far_m * rise.tan();
    let ahead = |far_m: f64, aside_m: f64| {
        let (sin, cos) = azimuth.sin_cos();
        PlanPoint::new(far_m * sin + aside_m * cos, far_m * cos - aside_m * sin)
    };
    // A wall before the tree leaves a slit of 0.15 degrees beneath a crown as thin: Venus passes
    // both within two minutes. At several altitudes, so that some fall between two samples.
    let wall_m = 35.0;
    for lower_deg in [5.0, 5.3, 5.6, 5.9, 6.2, 6.5] {
        let slit = (altitude - Angle::from_degrees(lower_deg)).radians();
        let thin = 0.0026;
        let wall = Obstacle::Wall {
            label: "wall".into(),
            line_m: vec![ahead(wall_m, -40.0), ahead(wall_m, 40.0)],
            base_m: None,
            height_m: at(slit - thin, wall_m),
        };
        let tree = |gap_m: Option<f64>| Obstacle::Tree {
            label: "lime".into(),
            east_m: ahead(far_m, 0.0).east_m,
            north_m: ahead(far_m, 0.0).north_m,
            base_m: None,
            height_m: at(slit + thin, far_m),
            width_m: 60.0,
            gap_m,
            trunk_m: Some(0.4),
            leafless: None,
        };
        let mut clears = |gap_m: Option<f64>| -> usize {
            site.obstacles = vec![wall.clone(), tree(gap_m)];
            let night = sky.behind(&site.skyline(&site.spots[0]));
            let venus = night.body(Body::Venus).expect("asked for");
            let events = venus.skyline_events.iter();
            events.filter(|event| event.clears).count()
        };
        // With a crown to the ground it comes out once, over the top; with a gap it has been in
        // view beneath the crown before.
        assert_eq!(clears(None), 1, "{lower_deg}");
        assert_eq!(clears(Some(at(slit, far_m))), 2, "{lower_deg}");
    }
}
