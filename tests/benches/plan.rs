//! How long a night's plan takes: budgets are 5 ms with the spans kept, 30 ms from nothing.

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

fn plan(ephemeris: &Ephemeris) -> Night {
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
            eyes: &Eye::ALL,
            bodies: &Body::ALL,
        },
    )
    .expect("the night can be planned")
}

#[divan::bench]
fn night_with_spans_kept(bencher: divan::Bencher) {
    let ephemeris = Ephemeris::new();
    plan(&ephemeris);
    bencher.bench(|| plan(&ephemeris));
}

/// The series themselves are read once a process; the spans are fitted anew.
#[divan::bench]
fn night_with_nothing_fitted(bencher: divan::Bencher) {
    plan(&Ephemeris::new());
    bencher.bench(|| plan(&Ephemeris::new()));
}
