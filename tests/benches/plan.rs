//! How long a night's plan takes: with the light for four eyes and its spread, and without.

use chrono::NaiveDate;
use dimmet::light::Eye;
use dimmet::measure::TimeScales;
use dimmet::place::demo_sites;
use dimmet::plan::{Night, NightRequest, Sight};
use dimmet::sky::{Body, Ephemeris};
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
