//! What an observer sees: directions, orientation, limbs and orbits.

use crate::common::assert_within;
use dimmet::measure::{Angle, Moment, TimeScales, Tt, Vector};
use dimmet::sky::refraction::refracted;
use dimmet::sky::{Air, Body, Ephemeris, Horizontal, Observer, Span};
use proptest::prelude::*;
use std::sync::OnceLock;

fn observer(latitude_deg: f64, longitude_deg: f64) -> Observer {
    Observer {
        latitude: Angle::from_degrees(latitude_deg),
        longitude: Angle::from_degrees(longitude_deg),
        elevation_m: 120.0,
        air: Air::default(),
    }
}

/// 2026 October 17, 0h TT, and a day from there.
const START: Tt = Tt::from_days_since_j2000(9785.5);

fn day() -> &'static Span {
    static DAY: OnceLock<Span> = OnceLock::new();
    DAY.get_or_init(|| {
        let end = START.plus_days(1.0);
        Ephemeris::new().cover(START, end, &Body::ALL).unwrap()
    })
}

fn moment(day: f64) -> Moment {
    TimeScales::default().moment_from_tt(START.plus_days(day))
}

// Spherical trigonometry: the lit side points at the Sun along the great circle. Here that
// circle is drawn on the horizon's own axes, without any right ascension.
#[test]
fn the_lit_side_points_at_the_sun() {
    let (span, observer) = (day(), observer(51.0, -3.0));
    for hour in 0..24 {
        let epoch = span.at(moment(f64::from(hour) / 24.0));
        let view = epoch.seen_by(&observer);
        let sun = view.place(Body::Sun);
        for body in [Body::Moon, Body::Venus, Body::Jupiter] {
            let place = view.place(body);
            let turn = (sun.azimuth - place.azimuth).signed();
            let up = sun.altitude.sin() * place.altitude.cos()
                - sun.altitude.cos() * place.altitude.sin() * turn.cos();
            let left = -turn.sin() * sun.altitude.cos();
            let expected = Angle::from_radians(left.atan2(up));
            let off = (view.bright_limb_from_zenith(body) - expected).signed();
            assert_within(off.degrees(), 0.0, 1e-6, "bright limb from the zenith");
        }
    }
}

// By definition: nothing on the meridian, positive west of it in the northern hemisphere, and
// at a western horizon on the equator the pole lies to the right: 90 degrees.
#[test]
fn the_parallactic_angle_has_the_usual_sign() {
    let (span, observer) = (day(), observer(45.0, 10.0));
    let epoch = span.at(moment(0.3));
    let view = epoch.seen_by(&observer);
    let angle_deg = |azimuth_deg, altitude_deg| {
        let direction = view.direction(Horizontal {
            altitude: Angle::from_degrees(altitude_deg),
            azimuth: Angle::from_degrees(azimuth_deg),
        });
        view.parallactic_angle(direction).degrees()
    };
    assert_within(angle_deg(180.0, 30.0), 0.0, 1e-9, "south");
    // A body due west on the horizon has declination 0: tan q = 1 / tan(latitude).
    assert_within(angle_deg(270.0, 0.0), 45.0, 1e-9, "west");
    assert_within(angle_deg(90.0, 0.0), -45.0, 1e-9, "east");
}

#[test]
fn the_upper_limb_is_half_a_disc_higher() {
    let (span, observer) = (day(), observer(-33.9, 149.0));
    let epoch = span.at(moment(0.6));
    let view = epoch.seen_by(&observer);
    for body in [Body::Sun, Body::Moon] {
        let radius = view.appearance(body).diameter / 2.0;
        let expected = refracted(view.place(body).altitude + radius, &observer.air);
        let actual = view.refracted_upper_limb(body).altitude;
        assert_within((actual - expected).arcsec(), 0.0, 1e-6, body.name());
        assert!(
            (0.2..0.3).contains(&radius.degrees()),
            "{body} has half a degree"
        );
    }
    let venus = view.refracted_place(Body::Venus);
    let airless = view.place(Body::Venus);
    assert_eq!(venus.azimuth, airless.azimuth);
    assert_eq!(venus.altitude, refracted(airless.altitude, &observer.air));
}

// Axes and eccentricities of the mean orbits at J2000 (Standish's elements for approximate
// places, JPL; from memory). The osculating orbit wavers about them: giants most.
#[test]
fn orbits_have_the_planets_shapes() {
    let span = day();
    let epoch = span.at(moment(0.5));
    for (body, axis_au, e) in [
        (Some(Body::Mercury), 0.387_10, 0.2056),
        (Some(Body::Venus), 0.723_33, 0.0068),
        (None, 1.0000, 0.0167),
        (Some(Body::Mars), 1.523_7, 0.0934),
        (Some(Body::Jupiter), 5.203, 0.048),
    ] {
        let points = epoch.orbit(body, 3600);
        assert_eq!(points.len(), 3600);
        let (perihelion, aphelion) = (points[0].length(), points[1800].length());
        let axis = 0.5 * (perihelion + aphelion);
        assert_within(axis / axis_au, 1.0, 0.003, "axis");
        assert_within(
            (aphelion - perihelion) / (2.0 * axis),
            e,
            0.003,
            "eccentricity",
        );
        let now = epoch.heliocentric_ecliptic(body);
        let nearest = points.iter().map(|point| (*point - now).length());
        let nearest = nearest.fold(f64::INFINITY, f64::min);
        assert_within(nearest / axis, 0.0, 0.001, "the planet stands on its orbit");
    }
    assert!(epoch.orbit(Some(Body::Moon), 10).is_empty());
}

// The Earth's orbit is the ecliptic: common knowledge.
#[test]
fn the_earth_stays_in_the_ecliptic() {
    let span = day();
    let earth = span.at(moment(0.2)).heliocentric_ecliptic(None);
    assert_within(earth.latitude().degrees(), 0.0, 0.01, "Earth's latitude");
    // In the middle of October the Earth is seen from the Sun at the longitude of Aries 23.
    assert_within(earth.longitude().degrees(), 23.5, 1.0, "Earth's longitude");
}

// The nutation is read from fitted pieces; the series itself is the standard.
#[test]
fn the_frame_of_a_span_is_that_of_the_series() {
    let span = day();
    for part in 0..10 {
        let moment = moment(f64::from(part) / 10.0);
        let series = dimmet::sky::frame::nutation(moment.tt());
        let direct = dimmet::sky::frame::Frame::new(moment, series);
        let epoch = span.at(moment);
        let off = epoch.frame().sidereal_time - direct.sidereal_time;
        assert_within(off.arcsec(), 0.0, 0.0001, "sidereal time");
        for axis in [Vector::new(1.0, 0.0, 0.0), Vector::new(0.0, 0.0, 1.0)] {
            let turned = epoch.frame().true_from_icrs * axis;
            let off = turned.angle_to(direct.true_from_icrs * axis);
            assert_within(off.arcsec(), 0.0, 0.001, "axis of the frame");
        }
    }
}

proptest! {
    #[test]
    fn altitude_and_azimuth_go_there_and_back(
        latitude_deg in -90.0..90.0_f64,
        longitude_deg in -180.0..180.0_f64,
        altitude_deg in -89.9..89.9_f64,
        azimuth_deg in 0.0..360.0_f64,
        day_part in 0.0..1.0_f64,
    ) {
        let epoch = day().at(moment(day_part));
        let observer = observer(latitude_deg, longitude_deg);
        let view = epoch.seen_by(&observer);
        let place = Horizontal {
            altitude: Angle::from_degrees(altitude_deg),
            azimuth: Angle::from_degrees(azimuth_deg),
        };
        let back = view.horizontal(view.direction(place));
        prop_assert!((back.altitude - place.altitude).abs().degrees() < 1e-9);
        prop_assert!((back.azimuth - place.azimuth).signed().abs().degrees() < 1e-9);
    }
}
