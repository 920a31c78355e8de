//! How long the lists of dated events take: one year, and two centuries.

use dimmet::measure::{Progress, TimeScales, Tt};
use dimmet::plan::phenomena::{PhenomenaRequest, phenomena};
use dimmet::sky::{Body, Ephemeris};
use std::num::NonZeroUsize;

fn main() {
    divan::main();
}

/// The number of events from one year to another, on two threads and with nothing fitted.
fn count(from_year: f64, to_year: f64) -> usize {
    let scales = TimeScales::new();
    let moment =
        |year: f64| scales.moment_from_tt(Tt::from_days_since_j2000((year - 2000.0) * 365.25));
    let request = PhenomenaRequest {
        from: moment(from_year),
        to: moment(to_year),
        scales,
        bodies: &Body::ALL,
        lookout: None,
        threads: NonZeroUsize::new(2).expect("two"),
    };
    let mut count = 0;
    phenomena(&Ephemeris::new(), &request, &Progress::new(), |_| {
        count += 1
    })
    .expect("all are found");
    count
}

#[divan::bench]
fn one_year() -> usize {
    count(2026.0, 2027.0)
}

#[divan::bench(sample_count = 1, sample_size = 1)]
fn two_centuries() -> usize {
    count(1900.0, 2100.0)
}
