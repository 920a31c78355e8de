//! Nights at the edges: polar day and night, a body that dips for minutes, skipped dates.

use crate::reference::sight;
use chrono::NaiveDate;
use chrono_tz::Tz;
use dimmet::light::Eye;
use dimmet::measure::{Angle, Moment, TimeScales};
use dimmet::place::{Skyline, demo_site};
use dimmet::plan::{Absence, Cause, Half, Night, NightError, NightRequest, Sight};
use dimmet::sky::{Air, Body, Ephemeris, Observer, refraction};

fn observer(latitude_deg: f64, longitude_deg: f64, elevation_m: f64) -> Observer {
    Observer {
        latitude: Angle::from_degrees(latitude_deg),
        longitude: Angle::from_degrees(longitude_deg),
        elevation_m,
        air: Air::default(),
    }
}

fn try_night(observer: &Observer, zone: Tz, date: (i32, u32, u32)) -> Result<Night, NightError> {
    Night::plan(
        &Ephemeris::new(),
        &NightRequest {
            observer,
            skyline: &Skyline::open(),
            zone,
            date: NaiveDate::from_ymd_opt(date.0, date.1, date.2).expect("a date"),
            scales: TimeScales::new(),
            sight: sight(),
            eyes: &[Eye::Visitor],
            bodies: &Body::ALL,
        },
    )
}

fn night(observer: &Observer, zone: Tz, date: (i32, u32, u32)) -> Night {
    try_night(observer, zone, date).expect("the night can be planned")
}

fn utc(moment: Moment) -> String {
    TimeScales::new()
        .civil(moment)
        .0
        .format("%Y-%m-%dT%H:%M:%S")
        .to_string()
}

/// Seconds between a moment and a printed UTC.
fn off_s(moment: Moment, expected: &str) -> f64 {
    let expected: chrono::DateTime<chrono::Utc> = expected.parse().expect("a time in RFC 3339");
    (TimeScales::new().civil(moment).0 - expected)
        .as_seconds_f64()
        .abs()
}

#[test]
fn jupiter_below_the_horizon_for_minutes_is_not_missed() {
    // At 67 N in October 2024 Jupiter's lower culmination touches the horizon. The times were
    // computed from JPL DE440 with Skyfield 1.55 (2 s steps, straight line between), centre at
    // airless -34'. The altitude moves by 0.003 degrees in the whole dip, so 0.1 arcsec of
    // altitude is 1 s here.
    for (latitude_deg, set, rise) in [
        (66.99, "2024-10-07T14:31:16Z", "2024-10-07T14:39:48Z"),
        (66.993, "2024-10-07T14:33:47Z", "2024-10-07T14:37:18Z"),
    ] {
        let night = night(&observer(latitude_deg, 25.0, 0.0), Tz::UTC, (2024, 10, 7));
        let jupiter = night.body(Body::Jupiter).expect("Jupiter was asked for");
        assert_eq!(
            (jupiter.set.len(), jupiter.rise.len()),
            (1, 1),
            "at {latitude_deg}"
        );
        assert!(
            off_s(jupiter.set[0], set) < 4.0,
            "set {} not {set}",
            utc(jupiter.set[0])
        );
        assert!(
            off_s(jupiter.rise[0], rise) < 4.0,
            "rise {} not {rise}",
            utc(jupiter.rise[0])
        );
    }
}

#[test]
fn polar_day_has_neither_sunset_nor_optics_time() {
    let night = night(&observer(69.6, 19.0, 10.0), Tz::Europe__Oslo, (2027, 6, 21));
    assert_eq!((night.sun.set, night.sun.rise), (None, None));
    assert!(night.sun.lowest > Angle::ZERO, "the Sun stays up");
    assert_eq!((night.optics.from, night.optics.until), (None, None));
    assert!(
        night
            .bodies
            .iter()
            .all(|body| body.windows(Eye::Visitor).is_empty()),
        "no window in daylight"
    );
}

#[test]
fn polar_night_is_dark_enough_for_optics_from_end_to_end() {
    let night = night(
        &observer(80.0, 19.0, 10.0),
        Tz::Europe__Oslo,
        (2026, 12, 20),
    );
    assert_eq!((night.sun.set, night.sun.rise), (None, None));
    assert!(
        night.sun.highest < Angle::from_degrees(-8.0),
        "{}",
        night.sun.highest.degrees()
    );
    let (from, until) = (
        night.optics.from.expect("from"),
        night.optics.until.expect("until"),
    );
    assert!(from.seconds_since(night.start) < 60.0 && night.end.seconds_since(until) < 60.0);
    // Jupiter at declination +12 never sets there: one window, bounded by the noons.
    let jupiter = night.body(Body::Jupiter).expect("Jupiter was asked for");
    assert!(jupiter.is_up_at_start && jupiter.set.is_empty() && jupiter.rise.is_empty());
    let [window] = jupiter.windows(Eye::Visitor)[..] else {
        panic!("{:?}", jupiter.windows(Eye::Visitor))
    };
    assert_eq!(
        (window.start.cause, window.end.cause),
        (Cause::Noon, Cause::Noon)
    );
    let [dawn] = jupiter.windows_in(Eye::Visitor, Half::Dawn)[..] else {
        panic!("one window at dawn")
    };
    assert_eq!(
        (dawn.start.moment, dawn.start.cause),
        (night.middle, Cause::Half)
    );
}

#[test]
fn the_poles_have_nights_too() {
    for latitude_deg in [90.0, -90.0] {
        let night = night(&observer(latitude_deg, 0.0, 0.0), Tz::UTC, (2026, 12, 1));
        let hours = night.end.seconds_since(night.start) / 3600.0;
        assert!(
            (hours - 24.0).abs() < 0.02,
            "{hours} hours at {latitude_deg}"
        );
    }
}

#[test]
fn a_date_that_the_zone_skipped_is_refused() {
    // Samoa went from 29 to 31 December 2011 (IANA time zone database, zone Pacific/Apia).
    let apia = observer(-13.83, -171.77, 10.0);
    let error = try_night(&apia, Tz::Pacific__Apia, (2011, 12, 30)).expect_err("no such date");
    assert_eq!(
        error.to_string(),
        "the date 2011-12-30 does not exist in the zone Pacific/Apia: it was skipped there"
    );
    assert!(try_night(&apia, Tz::Pacific__Apia, (2011, 12, 29)).is_ok());
    assert!(try_night(&apia, Tz::Pacific__Apia, (2011, 12, 31)).is_ok());
}

#[test]
fn the_edges_of_the_supported_years_work_and_beyond_them_is_refused() {
    let site = observer(51.0, -3.4, 96.0);
    assert!(try_night(&site, Tz::Europe__London, (1600, 1, 1)).is_ok());
    assert!(try_night(&site, Tz::Europe__London, (2400, 12, 31)).is_ok());
    for year in [1599, 2401] {
        let error = try_night(&site, Tz::Europe__London, (year, 6, 1)).expect_err("unsupported");
        assert!(
            error.to_string().contains("supported years 1600 to 2400"),
            "{error}"
        );
    }
}

#[test]
fn optics_times_err_against_the_user() {
    // A mountain: the dip lets the Sun be seen longer.
    for elevation_m in [0.0, 3000.0] {
        let site = observer(-23.0, -67.8, elevation_m);
        let night = night(&site, Tz::America__Santiago, (2027, 3, 10));
        let span = Ephemeris::new()
            .cover(night.start.tt(), night.end.tt(), &[Body::Sun])
            .expect("a supported date");
        let sun = |moment: Moment| span.at(moment).seen_by(&site).place(Body::Sun).altitude;
        let from = night.optics.from.expect("the Sun sets");
        let until = night.optics.until.expect("the Sun rises");
        // When the upper limb (16.0' on that day) passes the dipped horizon.
        let limb = |moment: Moment| {
            refraction::refracted(sun(moment) + Angle::from_arcmin(16.1), &site.air)
                + refraction::dip(elevation_m)
        };
        assert!(
            limb(from.plus_seconds(-300.0)) < Angle::ZERO,
            "at {elevation_m} m"
        );
        assert!(
            limb(until.plus_seconds(600.0)) < Angle::ZERO,
            "at {elevation_m} m"
        );
        let set = night.sun.set.expect("the Sun sets");
        // Near the equator the Sun sinks 1 degree in 4.4 minutes: five minutes rule dusk, and
        // the rounding adds up to one; 2 degrees take 8.7 minutes, so ten rule dawn.
        let wait_min = from.seconds_since(set) / 60.0;
        let expected = if elevation_m == 0.0 {
            5.0..6.5
        } else {
            10.0..13.5
        };
        assert!(
            expected.contains(&wait_min),
            "{wait_min} min after sunset at {elevation_m} m"
        );
        for moment in [from, until] {
            assert!(
                utc(moment).ends_with(":00"),
                "{} is a whole minute",
                utc(moment)
            );
        }
    }
}

#[test]
fn a_window_ends_with_the_cause_that_comes_first() {
    // At the horizon the air takes nine magnitudes: Venus comes out of the haze, not up from the
    // horizon. A wall all around hides that; a high one hides everything.
    let site = observer(51.05, -3.42, 96.0);
    let plan = |skyline: &Skyline| {
        Night::plan(
            &Ephemeris::new(),
            &NightRequest {
                observer: &site,
                skyline,
                zone: Tz::Europe__London,
                date: NaiveDate::from_ymd_opt(2026, 12, 4).expect("a date"),
                scales: TimeScales::new(),
                sight: sight(),
                eyes: &[Eye::Visitor],
                bodies: &[Body::Venus],
            },
        )
        .expect("the night can be planned")
    };
    let open = plan(&Skyline::open());
    let [window] = open
        .body(Body::Venus)
        .expect("asked for")
        .windows(Eye::Visitor)[..]
    else {
        panic!("one window at dawn")
    };
    assert_eq!(
        (window.start.cause, window.end.cause),
        (Cause::Haze, Cause::Twilight)
    );
    assert!(window.start.moment < window.best.moment && window.best.moment < window.end.moment);
    let low_wall = plan(&Skyline::measured(&[(
        Angle::ZERO,
        Angle::from_degrees(10.0),
    )]));
    let [window] = low_wall
        .body(Body::Venus)
        .expect("asked for")
        .windows(Eye::Visitor)[..]
    else {
        panic!("one window over a low wall")
    };
    assert_eq!(
        (window.start.cause, window.end.cause),
        (Cause::Skyline, Cause::Twilight)
    );
    let high_wall = plan(&Skyline::measured(&[(
        Angle::ZERO,
        Angle::from_degrees(45.0),
    )]));
    assert!(
        high_wall
            .body(Body::Venus)
            .expect("asked for")
            .windows(Eye::Visitor)
            .is_empty()
    );
}

#[test]
fn duller_eyes_see_for_a_shorter_time() {
    let visitor_minutes = |factor: Option<f64>| {
        let mut site = demo_site("fennick-common").expect("a demo site").clone();
        site.eyes.visitor = factor;
        let night = Night::plan(
            &Ephemeris::new(),
            &NightRequest {
                observer: &site.observer(),
                skyline: &Skyline::open(),
                zone: site.zone(),
                date: NaiveDate::from_ymd_opt(2026, 12, 4).expect("a date"),
                scales: TimeScales::new(),
                sight: &Sight::of_site(&site).expect("factors within range"),
                eyes: &[Eye::Visitor],
                bodies: &[Body::Mars],
            },
        )
        .expect("the night can be planned");
        let mars = night.body(Body::Mars).expect("asked for");
        let windows = mars.windows(Eye::Visitor).iter();
        windows
            .map(|window| window.end.moment.seconds_since(window.start.moment) / 60.0)
            .sum::<f64>()
    };
    let (dull, usual) = (visitor_minutes(Some(9.0)), visitor_minutes(None));
    assert!(
        dull > 60.0 && dull < usual - 5.0,
        "{dull} and {usual} minutes"
    );
}

#[test]
fn a_body_that_sets_before_the_sun_is_up_with_the_sun() {
    // Six weeks after its inferior conjunction of 24 October 2026 Venus leads the Sun.
    let night = night(
        &observer(51.05, -3.42, 96.0),
        Tz::Europe__London,
        (2026, 12, 4),
    );
    let venus = night.body(Body::Venus).expect("asked for");
    assert!(venus.set[0] < night.sun.set.expect("the Sun sets"));
    assert_eq!(
        venus.absence(&night, Eye::Visitor, Half::Dusk),
        Absence::UpWithTheSun
    );
}
