//! How long a night's plan takes: with the light for four eyes and its spread, and without;
//! anew behind another skyline; and from every place of the grounds.

use chrono::NaiveDate;
use dimmet::light::Eye;
use dimmet::measure::{Progress, TimeScales};
use dimmet::place::{Obstacle, PlanPoint, Site, Skyline, Stature, demo_sites};
use dimmet::plan::standing::{Raster, Standing, StandingRequest};
use dimmet::plan::{Half, Night, NightRequest, NightSky, Sight};
use dimmet::sky::{Body, Ephemeris};
use std::num::NonZeroUsize;
use std::sync::LazyLock;

fn main() {
    divan::main();
}

fn plan(ephemeris: &Ephemeris, eyes: &[Eye]) -> Night {
    static SIGHT: LazyLock<Sight> =
        LazyLock::new(|| Sight::of_site(&demo_sites()[0]).expect("the demo site's air"));
    let (site, sight) = (&demo_sites()[0], &*SIGHT);
    Night::plan(
        ephemeris,
        &NightRequest {
            observer: &site.observer(),
            skyline: &site.skyline(&site.spots[0]),
            zone: site.zone(),
            date: NaiveDate::from_ymd_opt(2026, 12, 4).expect("a date"),
            scales: TimeScales::new(),
            sight,
            eyes,
            bodies: &Body::ALL,
        },
    )
    .expect("the night can be planned")
}

#[divan::bench]
fn night_with_spans_kept(bencher: divan::Bencher) {
    let ephemeris = Ephemeris::new();
    plan(&ephemeris, &Eye::ALL);
    bencher.bench(|| plan(&ephemeris, &Eye::ALL));
}

/// Risings, settings, skyline moments and optics times alone.
#[divan::bench]
fn night_without_eyes(bencher: divan::Bencher) {
    let ephemeris = Ephemeris::new();
    plan(&ephemeris, &[]);
    bencher.bench(|| plan(&ephemeris, &[]));
}

/// The series themselves are read once a process; the spans are fitted anew.
#[divan::bench]
fn night_with_nothing_fitted(bencher: divan::Bencher) {
    plan(&Ephemeris::new(), &Eye::ALL);
    bencher.bench(|| plan(&Ephemeris::new(), &Eye::ALL));
}

fn night_sky(ephemeris: &Ephemeris) -> NightSky {
    let site = &demo_sites()[0];
    NightSky::new(
        ephemeris,
        &NightRequest {
            observer: &site.observer(),
            skyline: &Skyline::open(),
            zone: site.zone(),
            date: NaiveDate::from_ymd_opt(2026, 12, 4).expect("a date"),
            scales: TimeScales::new(),
            sight: &Sight::of_site(site).expect("the demo site's air"),
            eyes: &Eye::ALL,
            bodies: &Body::ALL,
        },
    )
    .expect("the night can be planned")
}

/// The same night from behind another skyline: what every edit of an obstacle takes.
#[divan::bench(args = [10, 40, 200])]
fn night_behind_another_skyline(bencher: divan::Bencher, obstacles: usize) {
    let sky = night_sky(&Ephemeris::new());
    let site = crowded(obstacles);
    let skyline = site.skyline(&site.spots[0]);
    bencher.bench(|| sky.behind(&skyline));
}

/// 100 m x 100 m at 1 m for Venus at dawn, two threads.
#[divan::bench(args = [40, 200], sample_count = 5)]
fn standing_map(bencher: divan::Bencher, obstacles: usize) {
    let sky = night_sky(&Ephemeris::new());
    let site = crowded(obstacles);
    let nights = [&sky];
    let standing = Standing::new(StandingRequest {
        site: &site,
        nights: &nights,
        body: Body::Venus,
        eye: Eye::Visitor,
        half: Half::Dawn,
        stature: Stature::Adult,
    });
    let raster = Raster::of_site(&site, 1.0);
    let threads = NonZeroUsize::new(2).expect("two");
    bencher.bench(|| standing.map(raster, threads, &Progress::new(), |_| {}));
}

/// The first demo site's mark amid so many trees, houses, walls and poles, 15 m to 150 m off.
fn crowded(obstacles: usize) -> Site {
    let mut site = demo_sites()[0].clone();
    site.spots.truncate(1);
    site.obstacles.clear();
    for k in 0..obstacles {
        let turn = k as f64 * 2.399_963; // the golden angle spreads them evenly
        let far_m = 15.0 + 135.0 * ((k as f64 + 0.5) / obstacles as f64).sqrt();
        let at = PlanPoint::new(far_m * turn.sin(), far_m * turn.cos());
        let off =
            |east_m: f64, north_m: f64| PlanPoint::new(at.east_m + east_m, at.north_m + north_m);
        let label = format!("obstacle {k}");
        let height_m = 3.0 + (k % 7) as f64;
        site.obstacles.push(match k % 4 {
            0 => Obstacle::Tree {
                label,
                east_m: at.east_m,
                north_m: at.north_m,
                base_m: None,
                height_m: 2.0 * height_m,
                width_m: height_m,
                gap_m: None,
                trunk_m: None,
                leafless: None,
            },
            1 => Obstacle::Building {
                label,
                corners_m: vec![
                    off(-5.0, -3.0),
                    off(5.0, -3.0),
                    off(5.0, 3.0),
                    off(-5.0, 3.0),
                ],
                base_m: None,
                eaves_m: height_m,
                ridge_m: Some(height_m + 2.0),
            },
            2 => Obstacle::Wall {
                label,
                line_m: vec![off(-4.0, -2.0), off(4.0, 2.0)],
                base_m: None,
                height_m: 2.0,
            },
            _ => Obstacle::Pole {
                label,
                east_m: at.east_m,
                north_m: at.north_m,
                base_m: None,
                height_m,
                width_m: 0.2,
            },
        });
    }
    site
}
