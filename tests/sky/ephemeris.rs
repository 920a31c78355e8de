//! The motions of the planets and the Moon: against JPL DE440, at the ends of the supported
//! years, and shared among threads.
//!
//! `ephemeris.csv` holds 64 instants of 1600-2400: heliocentric places of the planets (from Mars
//! on the barycentres of their systems) and the geocentric Moon, au, on the axes of the ICRS;
//! `make_ephemeris.py` beside it computes them from JPL DE440 (NAIF, public) with jplephem 2.24.
//! Mars to Neptune are corrected by a fit to DE440, so that for those five it is no independent
//! check.

use dimmet::measure::{Tt, Vector};
use dimmet::sky::{Body, Ephemeris, Span};
use std::collections::HashMap;
use std::str::FromStr;

struct Instant {
    tt: Tt,
    earth: Vector,
    places: HashMap<Body, Vector>,
}

fn instants() -> Vec<Instant> {
    let mut instants: Vec<Instant> = Vec::new();
    for row in include_str!("../data/ephemeris.csv").lines().skip(1) {
        let [days, body, x, y, z] = row.split(',').collect::<Vec<_>>()[..] else {
            panic!("five columns in {row}");
        };
        let number = |text: &str| text.parse::<f64>().unwrap();
        let (tt, place) = (
            Tt::from_days_since_j2000(number(days)),
            Vector::new(number(x), number(y), number(z)),
        );
        if instants.last().is_none_or(|last| last.tt != tt) {
            instants.push(Instant {
                tt,
                earth: Vector::default(),
                places: HashMap::new(),
            });
        }
        let instant = instants.last_mut().unwrap();
        match Body::from_str(body) {
            Ok(body) => drop(instant.places.insert(body, place)),
            Err(_) => instant.earth = place,
        }
    }
    assert_eq!(instants.len(), 64, "instants in the table");
    instants
}

/// Geometric place seen from the Earth's centre, au.
fn geocentric(span: &Span, body: Body, tt: Tt) -> Vector {
    match body {
        Body::Moon => span.moon(tt),
        body => span.heliocentric(body, tt) - span.earth(tt).0,
    }
}

/// The direction, arcsec, that a body is allowed to differ by, in 1900-2100 and elsewhere:
/// measured over thousands of instants (`assets/series/README.md`) and rounded up; all within
/// what the program promises.
fn allowed_arcsec(body: Body) -> (f64, f64) {
    match body {
        Body::Sun => (0.05, 0.2),
        Body::Moon => (0.1, 0.5),
        Body::Mercury => (0.1, 0.3),
        Body::Venus => (0.1, 0.35),
        // Far from today mostly the Earth's own error, seen across 0.4 au.
        Body::Mars => (0.1, 0.5),
        Body::Jupiter => (0.11, 0.15),
        Body::Saturn => (0.1, 0.1),
        Body::Uranus | Body::Neptune => (0.05, 0.05),
    }
}

/// Relative; 0.005 arcsec in the Moon's parallax, nothing in any size or magnitude.
const ALLOWED_DISTANCE: f64 = 1.5e-6;

#[test]
fn geocentric_places_match_de440() {
    let ephemeris = Ephemeris::new();
    for Instant { tt, earth, places } in instants() {
        let span = ephemeris.cover(tt, tt, &Body::ALL).unwrap();
        let modern = (1900.0..2100.0).contains(&tt.decimal_year());
        for body in Body::ALL {
            let expected = match body {
                Body::Sun => -earth,
                Body::Moon => places[&body],
                body => places[&body] - earth,
            };
            let actual = geocentric(&span, body, tt);
            let missed = actual.angle_to(expected).arcsec();
            let stretched = (actual.length() / expected.length() - 1.0).abs();
            let (modern_arcsec, other_arcsec) = allowed_arcsec(body);
            let allowed_arcsec = if modern { modern_arcsec } else { other_arcsec };
            let year = tt.decimal_year();
            assert!(
                missed <= allowed_arcsec,
                "{body} in {year}: {missed} arcsec from DE440, allowed {allowed_arcsec}"
            );
            assert!(
                stretched <= ALLOWED_DISTANCE,
                "{body} in {year}: distance off by {stretched:e}, allowed {ALLOWED_DISTANCE:e}"
            );
        }
    }
}

/// The rate that a span gives is the slope of its places (the aberration rests on the Earth's).
#[test]
fn velocities_are_the_slopes_of_the_places() {
    let tt = Tt::from_days_since_j2000(9_813.27);
    let span = Ephemeris::new().cover(tt, tt, &Body::ALL).unwrap();
    let step_days = 0.005;
    for body in Body::ALL {
        let (place, velocity) = span.heliocentric_with_velocity(body, tt);
        assert_eq!(place, span.heliocentric(body, tt), "{body}");
        let slope = (span.heliocentric(body, tt.plus_days(step_days))
            - span.heliocentric(body, tt.plus_days(-step_days)))
            / (2.0 * step_days);
        let missed = (velocity - slope).length();
        // What the step leaves out: a sixth of its square by the third derivative, which is
        // greatest for Mercury at its perihelion (some 1e-3 au/day³).
        assert!(missed < 1e-8, "{body}: {missed:e} au/day");
    }
    let earth = span.earth(tt);
    let speed_km_s = earth.1.length() * 149_597_870.7 / 86_400.0;
    assert!(
        (29.2..30.4).contains(&speed_km_s),
        "the Earth moves at {speed_km_s} km/s"
    );
}

#[test]
fn both_ends_of_the_supported_years_have_room() {
    let ephemeris = Ephemeris::new();
    for year in [1598.1, 1600.0, 2400.999, 2402.9] {
        let tt = Tt::from_days_since_j2000((year - 2000.0) * 365.25);
        assert!(ephemeris.cover(tt, tt, &Body::ALL).is_ok(), "{year}");
    }
    let within = Tt::from_days_since_j2000(0.0);
    for days in [-147_000.0, 147_500.0, f64::NAN, f64::INFINITY] {
        let outside = Tt::from_days_since_j2000(days);
        for (from, to) in [(outside, within), (within, outside)] {
            let error = ephemeris.cover(from, to, &[]).unwrap_err();
            let same = error.tt.days_since_j2000().to_bits() == days.to_bits();
            assert!(same, "{days} days from J2000 is named in {error:?}");
        }
    }
}

/// A body or an instant that was not covered is answered all the same, and alike.
#[test]
fn what_a_span_lacks_is_fitted_when_it_is_read() {
    let tt = Tt::from_days_since_j2000(-3_210.4);
    let whole = Ephemeris::new().cover(tt, tt, &Body::ALL).unwrap();
    let bare = Ephemeris::new().cover(tt, tt, &[]).unwrap();
    for body in Body::ALL {
        assert_eq!(
            bare.heliocentric(body, tt),
            whole.heliocentric(body, tt),
            "{body}"
        );
    }
    let later = tt.plus_days(500.0);
    let there = Ephemeris::new().cover(later, later, &Body::ALL).unwrap();
    assert_eq!(whole.moon(later), there.moon(later), "500 days later");
}

#[test]
fn threads_share_one_ephemeris() {
    let ephemeris = Ephemeris::new();
    let at = |row: u32| Tt::from_days_since_j2000(f64::from(row) * 7.9);
    let read = |ephemeris: &Ephemeris| -> Vec<Vector> {
        (0..100)
            .map(|row| {
                let span = ephemeris.cover(at(row), at(row), &Body::ALL).unwrap();
                geocentric(&span, Body::Moon, at(row)) + geocentric(&span, Body::Mars, at(row))
            })
            .collect()
    };
    let found: Vec<Vec<Vector>> = std::thread::scope(|scope| {
        let threads: Vec<_> = (0..4)
            .map(|_| {
                let clone = ephemeris.clone();
                scope.spawn(move || read(&clone))
            })
            .collect();
        threads.into_iter().map(|t| t.join().unwrap()).collect()
    });
    let alone = read(&Ephemeris::new());
    for (thread, values) in found.iter().enumerate() {
        assert_eq!(values, &alone, "thread {thread}");
    }
}
