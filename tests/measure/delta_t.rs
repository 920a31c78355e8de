//! TT - UT1 against published values and against another program's tables.

use crate::common::assert_within;
use dimmet::measure::Tt;
use dimmet::measure::delta_t::{delta_t_s, delta_t_uncertainty_s};

fn tt_of_year(year: f64) -> Tt {
    Tt::from_days_since_j2000((year - 2000.0) * 365.25)
}

#[test]
fn published_values_are_met() {
    // Astronomical Almanac, table "Reduction of time scales", as commonly reprinted; from memory,
    // printed to 0.01 s; 0.02 s allows for the year's start being taken as a Julian year.
    for (year, published_s) in [
        (1965.0, 35.73),
        (1970.0, 40.18),
        (1972.0, 42.23),
        (1980.0, 50.54),
        (1990.0, 56.86),
        (2000.0, 63.83),
        (2010.0, 66.07),
        (2020.0, 69.36),
    ] {
        assert_within(
            delta_t_s(tt_of_year(year)),
            published_s,
            0.02,
            &format!("TT - UT1 in {year}, Astronomical Almanac"),
        );
    }
    // IERS Bulletin A: TT - UT1 69.11 on 2026-01-01, 69.17 on 2026-07-01.
    for (julian_date, published_s) in [(2_461_041.5, 69.11), (2_461_222.5, 69.17)] {
        let actual = delta_t_s(Tt::from_julian_date(julian_date));
        assert_within(
            actual,
            published_s,
            0.01,
            "TT - UT1 in 2026, IERS Bulletin A",
        );
    }
}

#[test]
fn the_cubics_of_2021_are_met_at_their_ends() {
    // Morrison et al. 2021, Table S15.2020, first coefficient of the rows that begin there.
    for (year, published_s) in [
        (1600.0, 109.127),
        (1650.0, 43.952),
        (1720.0, 12.068),
        (1800.0, 18.367),
        (1900.0, -1.977),
        (1950.0, 28.932),
    ] {
        let actual = delta_t_s(tt_of_year(year));
        assert_within(actual, published_s, 0.002, "TT - UT1, Morrison et al. 2021");
    }
}

/// Skyfield 1.55 carries IERS values to about January 2026 and a prediction after that, which by
/// November had gone 0.15 s astray.
const SKYFIELD_OBSERVED_TO: f64 = 2026.2;

/// Allowed difference from Skyfield by year, seconds. 1962-1973: it still uses the cubics there,
/// which run 0.1 to 0.65 s below the IERS values that are used here, and leading over to those
/// begins in 1950. After 2027: two joining curves to one parabola, both guesses.
fn tolerance_s(year: f64) -> f64 {
    if year < 1950.0 {
        0.01
    } else if year < 1973.0 {
        0.7
    } else if year < SKYFIELD_OBSERVED_TO {
        0.1
    } else {
        // Measured: 0.3 s in 2027 (Skyfield's curve starts from its old prediction), 1.4 s in 2050,
        // 3.2 s in 2100, 6.6 s in 2400: far below the stated uncertainty.
        delta_t_uncertainty_s(tt_of_year(year)).mul_add(0.1, 0.9)
    }
}

#[test]
fn skyfield_agrees() {
    let mut checked = 0;
    for line in include_str!("../data/delta_t.csv").lines() {
        let Some((julian_date, expected)) = line.split_once(',') else {
            continue;
        };
        let Ok(julian_date) = julian_date.parse::<f64>() else {
            continue;
        };
        let tt = Tt::from_julian_date(julian_date);
        let year = tt.decimal_year();
        let expected: f64 = expected.parse().expect("a figure");
        assert_within(
            delta_t_s(tt),
            expected,
            tolerance_s(year),
            &format!("TT - UT1 in {year:.2}, Skyfield 1.55"),
        );
        checked += 1;
    }
    assert!(checked > 900, "only {checked} rows were compared");
}

#[test]
fn the_years_2020_to_2026_agree_with_the_values_in_the_rise_and_set_table() {
    // delta_t_s column of Skyfield 1.55's table, rounded to 0.01 s: tolerance 0.1 s.
    let mut checked = 0;
    for line in include_str!("../data/rise_set.csv").lines() {
        let fields: Vec<&str> = line.split(',').collect();
        let [_, _, _, _, utc, expected, ..] = fields.as_slice() else {
            continue;
        };
        let Ok(utc) = chrono::DateTime::parse_from_rfc3339(utc) else {
            continue;
        };
        let days = utc.timestamp() as f64 / 86_400.0 - 10_957.5;
        if days > (SKYFIELD_OBSERVED_TO - 2000.0) * 365.25 {
            continue;
        }
        let expected: f64 = expected.parse().expect("a figure");
        let actual = delta_t_s(Tt::from_days_since_j2000(days));
        assert_within(
            actual,
            expected,
            0.1,
            &format!("TT - UT1 at {utc}, Skyfield 1.55"),
        );
        checked += 1;
    }
    assert!(checked > 1000, "only {checked} rows were compared");
}

#[test]
fn there_is_no_step() {
    // The fastest honest change is 2.4 s a year (1600s) and 4 s a year (2400s), so 0.1 s in
    // nine days; a step at a join would show as more.
    const STEP_DAYS: f64 = 3.0;
    let days = |year: f64| (year - 2000.0) * 365.25;
    let mut at = days(1600.0);
    let mut before = delta_t_s(Tt::from_days_since_j2000(at));
    while at < days(2401.0) {
        at += STEP_DAYS;
        let here = delta_t_s(Tt::from_days_since_j2000(at));
        assert_within(
            here,
            before,
            0.05,
            &format!("TT - UT1 {STEP_DAYS} days on, day {at}"),
        );
        before = here;
    }
    // Across each join within a second; the published coefficients are rounded to 0.001 s.
    for join in [1962.0, 1950.0, 1972.0, 2027.793] {
        let near = days(join);
        for k in -40..40 {
            let at = near + f64::from(k) * 0.25;
            let (a, b) = (
                Tt::from_days_since_j2000(at),
                Tt::from_days_since_j2000(at + 1e-5),
            );
            assert_within(
                delta_t_s(b),
                delta_t_s(a),
                2.5e-3,
                &format!("across a join, day {at}"),
            );
        }
    }
}

#[test]
fn the_near_future_is_nearly_flat_and_the_far_future_grows() {
    let in_year = |year: f64| delta_t_s(tt_of_year(year));
    assert_within(
        in_year(2035.0),
        70.0,
        1.0,
        "nearly flat: today's 69.2 s plus a slow rise",
    );
    assert_within(
        in_year(2050.0),
        72.5,
        2.5,
        "nearly flat: today's 69.2 s plus a slow rise",
    );
    assert!(
        in_year(2400.0) > 400.0,
        "tidal slowing adds minutes by 2400: {}",
        in_year(2400.0)
    );
}

#[test]
fn the_uncertainty_is_least_where_there_are_observations() {
    let in_year = |year: f64| delta_t_uncertainty_s(tt_of_year(year));
    assert_within(in_year(1600.0), 20.0, 1e-6, "commonly quoted, 1600");
    assert_within(in_year(1750.0), 3.0, 1e-6, "commonly quoted, 1700 and 1800");
    assert_within(in_year(2020.0), 0.01, 1e-6, "observed");
    let future: Vec<f64> = (2030..=2400)
        .step_by(10)
        .map(|year| in_year(f64::from(year)))
        .collect();
    assert!(
        future.is_sorted_by(|a, b| a < b),
        "grows with time: {future:?}"
    );
    assert!((3.0..10.0).contains(&future[2]), "2050: {}", future[2]);
}
