//! How long places take once their span is fitted, and how long fitting takes.

use dimmet::measure::{Angle, Moment, TimeScales, Tt};
use dimmet::sky::{Air, Body, Ephemeris, Observer, Span};
use divan::{Bencher, black_box};

fn main() {
    divan::main();
}

const FROM: Tt = Tt::from_days_since_j2000(9787.0);
const TO: Tt = Tt::from_days_since_j2000(9788.0);

fn observer() -> Observer {
    Observer {
        latitude: Angle::from_degrees(51.05),
        longitude: Angle::from_degrees(-3.42),
        elevation_m: 96.0,
        air: Air::default(),
    }
}

fn night(ephemeris: &Ephemeris) -> Span {
    ephemeris
        .cover(FROM, TO, &Body::ALL)
        .expect("a supported year")
}

fn moment() -> Moment {
    TimeScales::default().moment_from_tt(FROM.plus_days(0.37))
}

/// Airless altitude and azimuth of all nine bodies at one instant: to stay below 10
/// microseconds.
#[divan::bench]
fn nine_topocentric_places(bencher: Bencher<'_, '_>) {
    let (span, observer, moment) = (night(&Ephemeris::new()), observer(), moment());
    bencher.bench(|| {
        let epoch = span.at(black_box(moment));
        let view = epoch.seen_by(&observer);
        Body::ALL.map(|body| view.place(body))
    });
}

/// Everything that a row of positions tells of one body.
#[divan::bench]
fn one_row_of_positions(bencher: Bencher<'_, '_>) {
    let (span, observer, moment) = (night(&Ephemeris::new()), observer(), moment());
    bencher.bench(|| {
        let epoch = span.at(black_box(moment));
        let view = epoch.seen_by(&observer);
        (
            epoch.geocentric(Body::Venus),
            epoch.appearance(Body::Venus),
            view.topocentric(Body::Venus),
            view.appearance(Body::Venus),
            view.refracted_place(Body::Venus),
        )
    });
}

/// Fitting what a night needs, from nothing.
#[divan::bench]
fn fit_one_night() -> Span {
    night(&Ephemeris::new())
}
