//! Skyline points from noted times, and the Sun's shadow as a compass.
//!
//! The reference places are rows of `places.csv` (JPL DE440; how it was made stands at its head).

use crate::common::assert_within;
use dimmet::measure::{Angle, Moment, Tt, Ut1};
use dimmet::place::survey::compass::North;
use dimmet::place::survey::timed::{Noted, met_skyline, shadow_bearing};
use dimmet::sky::{Air, Body, Ephemeris, Observer};
use serde::Deserialize;
use std::path::Path;

#[derive(Debug, Deserialize)]
struct Row {
    id: u32,
    era: String,
    body: Body,
    site: String,
    jd_tt: f64,
    delta_t_s: f64,
    alt_deg: f64,
    az_deg: f64,
    angular_diameter_arcsec: f64,
    distance_apparent_au: f64,
    topo_distance_au: f64,
}

#[derive(Deserialize)]
struct SiteRow {
    site: String,
    lat_deg: f64,
    lon_east_deg: f64,
    elevation_m: f64,
}

fn read<T: for<'de> Deserialize<'de>>(name: &str) -> Vec<T> {
    let path = Path::new(env!("CARGO_MANIFEST_DIR"))
        .join("tests/data")
        .join(name);
    let mut reader = csv::ReaderBuilder::new()
        .comment(Some(b'#'))
        .from_path(path)
        .unwrap();
    reader.deserialize().map(Result::unwrap).collect()
}

/// The rows of a body in our years that stand above the level, with who saw them.
fn rows(body: Body) -> Vec<(Row, Observer)> {
    let sites: Vec<SiteRow> = read("sites.csv");
    let seen = |row: Row| {
        let site = sites.iter().find(|site| site.site == row.site).unwrap();
        let observer = Observer {
            latitude: Angle::from_degrees(site.lat_deg),
            longitude: Angle::from_degrees(site.lon_east_deg),
            elevation_m: site.elevation_m,
            air: Air::default(),
        };
        (row, observer)
    };
    let all: Vec<Row> = read("places.csv");
    all.into_iter()
        .filter(|row| row.body == body && row.era == "1900-2100")
        .filter(|row| (1.0..75.0).contains(&row.alt_deg))
        .map(seen)
        .collect()
}

fn noted(row: &Row, uncertainty_s: f64) -> Noted {
    let tt = Tt::from_julian_date(row.jd_tt);
    let ut1_days = tt.days_since_j2000() - row.delta_t_s / 86_400.0;
    Noted {
        moment: Moment::new(tt, Ut1::from_days_since_j2000(ut1_days)),
        uncertainty_s,
    }
}

/// Saemundsson's refraction in standard air, as printed: arcminutes from degrees.
fn lifted_deg(airless_deg: f64) -> f64 {
    let argument_deg = airless_deg + 10.3 / (airless_deg + 5.11);
    airless_deg + 1.02 / argument_deg.to_radians().tan() / 60.0
}

#[test]
fn a_planet_that_went_behind_something_gives_its_centre() {
    let ephemeris = Ephemeris::new();
    let rows = rows(Body::Venus);
    assert!(rows.len() > 20, "{} rows of Venus", rows.len());
    for (row, observer) in &rows {
        let point = met_skyline(&ephemeris, observer, Body::Venus, &noted(row, 0.0)).unwrap();
        let id = row.id;
        let across = row.alt_deg.to_radians().cos();
        assert_within(
            (point.azimuth.degrees() - row.az_deg) * across,
            0.0,
            1e-4,
            &format!("azimuth, row {id}"),
        );
        assert_within(
            point.altitude.degrees(),
            lifted_deg(row.alt_deg),
            1e-4,
            &format!("altitude, row {id}"),
        );
        assert_eq!(
            point.altitude_error,
            Angle::ZERO,
            "no uncertainty, row {id}"
        );
        assert!(!point.is_sun);
        let skyline = point.skyline_point().unwrap();
        assert_within(skyline.azimuth_deg, row.az_deg, 1e-3, "the skyline's point");
    }
}

#[test]
fn the_upper_limb_of_sun_and_moon_counts() {
    let ephemeris = Ephemeris::new();
    for body in [Body::Sun, Body::Moon] {
        for (row, observer) in &rows(body) {
            let point = met_skyline(&ephemeris, observer, body, &noted(row, 0.0)).unwrap();
            // The table's diameter is seen from the Earth's centre.
            let nearer = row.distance_apparent_au / row.topo_distance_au;
            let limb_deg = row.alt_deg + 0.5 * row.angular_diameter_arcsec * nearer / 3600.0;
            assert_within(
                point.altitude.degrees(),
                lifted_deg(limb_deg),
                3e-4,
                &format!("upper limb of {body}, row {}", row.id),
            );
            assert_eq!(point.is_sun, body == Body::Sun);
        }
    }
}

// What the Earth's rotation does to a fixed direction: the azimuth turns by
// w (sin lat - cos lat cos az tan alt), the altitude by w cos lat sin az (Smart, *Textbook on
// Spherical Astronomy*, from memory; it follows from the spherical triangle).
#[test]
fn the_uncertainty_becomes_the_motion_in_it() {
    let ephemeris = Ephemeris::new();
    let uncertainty_s = 30.0;
    let turned_deg = 360.985_647 / 86_400.0 * uncertainty_s;
    let mut compared = 0;
    for (row, observer) in rows(Body::Venus) {
        if !(10.0..40.0).contains(&row.alt_deg) {
            continue;
        }
        let note = noted(&row, uncertainty_s);
        let point = met_skyline(&ephemeris, &observer, Body::Venus, &note).unwrap();
        let (azimuth, latitude) = (row.az_deg.to_radians(), observer.latitude);
        let tan_altitude = row.alt_deg.to_radians().tan();
        let azimuth_deg =
            turned_deg * (latitude.sin() - latitude.cos() * azimuth.cos() * tan_altitude).abs();
        let altitude_deg = turned_deg * (latitude.cos() * azimuth.sin()).abs();
        // Its own motion of at most 1.3 degrees a day makes 0.0005, refraction above 10 degrees
        // flattens the rise by less than 0.9 percent.
        assert_within(point.azimuth_error.degrees(), azimuth_deg, 0.001, "azimuth");
        assert_within(
            point.altitude_error.degrees(),
            altitude_deg,
            0.006,
            "altitude",
        );
        compared += 1;
    }
    assert!(compared > 10, "{compared} rows compared");
}

#[test]
fn a_known_distance_makes_a_height_of_it() {
    let (row, observer) = rows(Body::Venus)
        .into_iter()
        .find(|(row, _)| (10.0..20.0).contains(&row.alt_deg))
        .unwrap();
    let point = met_skyline(
        &Ephemeris::new(),
        &observer,
        Body::Venus,
        &noted(&row, 20.0),
    )
    .unwrap();
    let oak = point.height(50.0, 1.6, 0.5).unwrap();
    let expected_m = 1.6 + 50.0 * lifted_deg(row.alt_deg).to_radians().tan();
    assert_within(oak.length_m, expected_m, 1e-4, "height of the oak");
    assert!(
        oak.by_angle_m > 0.0 && oak.by_angle_m < 0.1,
        "20 s: {oak:?}"
    );
}

#[test]
fn the_shadow_of_a_pole_lies_opposite_the_sun() {
    let ephemeris = Ephemeris::new();
    let rows = rows(Body::Sun);
    assert!(rows.len() > 15, "{} rows of the Sun", rows.len());
    for (row, observer) in &rows {
        let shadow = shadow_bearing(&ephemeris, observer, &noted(row, 10.0)).unwrap();
        let true_deg = (row.az_deg + 180.0).rem_euclid(360.0);
        assert_within(shadow.azimuth.degrees(), true_deg, 2e-4, "shadow's azimuth");
        assert!(shadow.error.degrees() > 0.0 && shadow.error.degrees() < 0.5);
        // A compass that reads 7.5 degrees too little is put right by 7.5 east.
        let reading = Angle::from_degrees(true_deg - 7.5).wrapped();
        assert_within(
            shadow.declination(reading).degrees(),
            7.5,
            2e-4,
            "declination",
        );
        let azimuth = shadow.north(reading).azimuth(reading);
        assert_within(
            (azimuth - shadow.azimuth).signed().degrees(),
            0.0,
            1e-9,
            "put right",
        );
        assert!(matches!(shadow.north(reading), North::Magnetic { .. }));
        let lean_deg = shadow.error_of_lean(Angle::from_degrees(1.0)).degrees();
        assert_within(lean_deg, shadow.sun_altitude.tan(), 0.05 * lean_deg, "lean");
    }
}

#[test]
fn what_cannot_be_is_refused_in_a_sentence() {
    let ephemeris = Ephemeris::new();
    let (row, observer) = rows(Body::Sun).remove(0);
    let later = |hours: f64| Noted {
        moment: noted(&row, 0.0).moment.plus_seconds(3600.0 * hours),
        uncertainty_s: 0.0,
    };
    let refusals: Vec<String> = (0..24)
        .filter_map(|hours| shadow_bearing(&ephemeris, &observer, &later(f64::from(hours))).err())
        .map(|error| error.to_string())
        .collect();
    assert!(
        refusals
            .iter()
            .any(|sentence| sentence.contains("below the level")),
        "{refusals:?}"
    );
    let below = (0..24)
        .filter_map(|h| met_skyline(&ephemeris, &observer, Body::Moon, &later(f64::from(h))).err())
        .next()
        .expect("the Moon is down for some hours")
        .to_string();
    assert!(
        below.starts_with("the body stood") && below.ends_with("moon"),
        "{below}"
    );
    let long = Noted {
        uncertainty_s: 4000.0,
        ..later(0.0)
    };
    assert_eq!(
        met_skyline(&ephemeris, &observer, Body::Sun, &long)
            .unwrap_err()
            .to_string(),
        "the uncertainty is 4000, but must lie between 0 and 1800 seconds"
    );
    let ages = Noted {
        moment: later(0.0).moment.plus_seconds(1e11),
        uncertainty_s: 0.0,
    };
    let sentence = met_skyline(&ephemeris, &observer, Body::Sun, &ages)
        .unwrap_err()
        .to_string();
    assert!(sentence.contains("1600 to 2400"), "{sentence}");
}
