//! Worked examples of Meeus, *Astronomical Algorithms*, 2nd edition.
//!
//! The book works in the FK5 with the IAU 1976 precession and the IAU 1980 nutation; that and
//! its shorter theories, not the printed digits, set most tolerances here. The printed values are
//! quoted from memory.

use crate::common::assert_within;
use dimmet::measure::{Angle, Moment, Tt, Ut1, Vector};
use dimmet::sky::stars::bright_stars;
use dimmet::sky::{Air, Apparent, Body, Ephemeris, Observer, Span};

const ARCSEC_DEG: f64 = 1.0 / 3600.0;

fn hours(h: f64, min: f64, s: f64) -> f64 {
    15.0 * (h + min / 60.0 + s / 3600.0)
}

fn south(deg: f64, min: f64, s: f64) -> f64 {
    -(deg + min / 60.0 + s / 3600.0)
}

fn span(tt: Tt, bodies: &[Body]) -> Span {
    Ephemeris::new().cover(tt, tt, bodies).unwrap()
}

fn moment(tt: Tt, delta_t_s: f64) -> Moment {
    let days = tt.days_since_j2000() - delta_t_s / 86_400.0;
    Moment::new(tt, Ut1::from_days_since_j2000(days))
}

#[track_caller]
fn assert_place(actual: Apparent, ra_deg: f64, dec_deg: f64, tolerance_arcsec: f64, what: &str) {
    let expected =
        Vector::from_spherical(Angle::from_degrees(ra_deg), Angle::from_degrees(dec_deg));
    let off = actual.direction.angle_to(expected).arcsec();
    assert_within(off, 0.0, tolerance_arcsec, what);
}

#[test]
fn the_sun_matches_25b() {
    let tt = Tt::from_julian_date(2_448_908.5);
    let span = span(tt, &[Body::Sun]);
    let epoch = span.at(moment(tt, 59.0));
    let sun = epoch.geocentric(Body::Sun);
    let (ra_deg, dec_deg) = (hours(13.0, 13.0, 30.749), south(7.0, 47.0, 1.74));
    assert_place(sun, ra_deg, dec_deg, 0.15, "25.b, complete theory");
    let (longitude, latitude) = epoch.ecliptic(sun.direction);
    let longitude_deg = 199.0 + 54.0 / 60.0 + 21.56 / 3600.0;
    assert_within(
        longitude.degrees(),
        longitude_deg,
        0.15 * ARCSEC_DEG,
        "25.b longitude",
    );
    assert_within(latitude.arcsec(), 0.721, 0.15, "25.b latitude");
    assert_within(sun.distance_au, 0.997_608_53, 1e-6, "25.b distance");
}

#[test]
fn venus_matches_33a_and_41a() {
    let tt = Tt::from_julian_date(2_448_976.5);
    let span = span(tt, &[Body::Venus]);
    let epoch = span.at(moment(tt, 59.0));
    let venus = epoch.geocentric(Body::Venus);
    let (ra_deg, dec_deg) = (hours(21.0, 4.0, 41.454), south(18.0, 53.0, 16.84));
    assert_place(venus, ra_deg, dec_deg, 0.15, "33.a, complete theory");
    let fraction = epoch.appearance(Body::Venus).illuminated_fraction;
    assert_within(fraction, 0.647, 0.0005, "41.a illuminated fraction");
}

// Meeus gives his shortened lunar theory 10 arcsec in longitude and 4 in latitude.
#[test]
fn the_moon_matches_47a_and_48a() {
    let tt = Tt::from_julian_date(2_448_724.5);
    let span = span(tt, &[Body::Moon]);
    let epoch = span.at(moment(tt, 59.0));
    let moon = epoch.geocentric(Body::Moon);
    let (longitude, latitude) = epoch.ecliptic(moon.direction);
    assert_within(
        longitude.degrees(),
        133.167_265,
        10.0 * ARCSEC_DEG,
        "47.a longitude",
    );
    assert_within(
        latitude.degrees(),
        -3.229_126,
        4.0 * ARCSEC_DEG,
        "47.a latitude",
    );
    let geometric_km = span.moon(tt).length() * 149_597_870.7;
    assert_within(geometric_km, 368_409.7, 10.0, "47.a distance, km");

    let appearance = epoch.appearance(Body::Moon);
    // From apparent places there, which aberration turns by 20 arcsec: 0.01 degree of phase.
    let phase_deg = appearance.phase_angle.degrees();
    assert_within(phase_deg, 69.0756, 0.01, "48.a phase angle");
    let fraction = appearance.illuminated_fraction;
    assert_within(fraction, 0.6786, 0.000_15, "48.a fraction");
    assert_within(
        appearance.bright_limb.degrees(),
        285.0,
        0.05,
        "48.a bright limb",
    );
}

// Printed to 0.01 s of time and 0.1 arcsec; the book leaves out diurnal aberration, up to 0.27
// arcsec at that latitude.
#[test]
fn mars_from_palomar_matches_40a() {
    let delta_t_s = 64.5;
    let ut1 = Ut1::from_julian_date(2_452_879.5 + (3.0 + 17.0 / 60.0) / 24.0);
    let tt = Tt::from_days_since_j2000(ut1.days_since_j2000() + delta_t_s / 86_400.0);
    let span = span(tt, &[Body::Mars]);
    let epoch = span.at(Moment::new(tt, ut1));
    let palomar = Observer {
        latitude: Angle::from_degrees(33.0 + 21.0 / 60.0 + 22.0 / 3600.0),
        longitude: Angle::from_degrees(-hours(7.0, 47.0, 27.0)),
        elevation_m: 1706.0,
        air: Air::default(),
    };
    let mars = epoch.seen_by(&palomar).topocentric(Body::Mars);
    let (ra_deg, dec_deg) = (hours(22.0, 38.0, 8.54), south(15.0, 46.0, 30.0));
    assert_place(mars, ra_deg, dec_deg, 0.4, "40.a");
}

// Venus from the U.S. Naval Observatory; the example turns a given geocentric place, so the
// place is given here too. Printed to 0.0001 degree.
#[test]
fn altitude_and_azimuth_match_13b() {
    let ut1 = Ut1::from_julian_date(2_446_895.5 + (19.0 + 21.0 / 60.0) / 24.0);
    let tt = Tt::from_days_since_j2000(ut1.days_since_j2000() + 55.0 / 86_400.0);
    let span = span(tt, &[]);
    let epoch = span.at(Moment::new(tt, ut1));
    let washington = Observer {
        latitude: Angle::from_degrees(38.0 + 55.0 / 60.0 + 17.0 / 3600.0),
        longitude: Angle::from_degrees(-(77.0 + 3.0 / 60.0 + 56.0 / 3600.0)),
        elevation_m: 0.0,
        air: Air::default(),
    };
    let venus = Vector::from_spherical(
        Angle::from_degrees(hours(23.0, 9.0, 16.641)),
        Angle::from_degrees(south(6.0, 43.0, 11.61)),
    );
    let place = epoch.seen_by(&washington).horizontal(venus);
    assert_within(place.altitude.degrees(), 15.1249, 0.0001, "13.b altitude");
    // The book counts azimuth from the south.
    assert_within(
        place.azimuth.degrees(),
        68.0337 + 180.0,
        0.0001,
        "13.b azimuth",
    );
}

// Theta Persei, which has no proper name, is HIP 12777. FK5 place and motion there, Hipparcos
// here, and 28 years of precession between them.
#[test]
fn a_star_matches_23a() {
    let tt = Tt::from_julian_date(2_462_088.69);
    let span = span(tt, &[]);
    let epoch = span.at(moment(tt, 70.0));
    let theta_persei = bright_stars()
        .iter()
        .find(|star| star.hip == 12_777)
        .unwrap();
    let (ra_deg, dec_deg) = (hours(2.0, 46.0, 14.390), 49.0 + 21.0 / 60.0 + 7.45 / 3600.0);
    assert_place(epoch.star(theta_persei), ra_deg, dec_deg, 0.25, "23.a");
}

// Printed to 0.001 degree; the book's ring plane is older than the pole used here.
#[test]
fn saturns_rings_match_45a() {
    let tt = Tt::from_julian_date(2_448_972.500_68);
    let span = span(tt, &[Body::Saturn]);
    let opening = span.at(moment(tt, 59.0)).ring_opening();
    assert_within(opening.degrees(), 16.442, 0.02, "45.a, B");
}
