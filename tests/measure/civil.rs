//! Civil time of zones: each case is one of the IANA time zone database.

use chrono::{DateTime, NaiveDate, NaiveDateTime, TimeDelta, Utc, Weekday};
use chrono_tz::Tz;
use dimmet::measure::civil::{self, LocalTime};

fn date(text: &str) -> NaiveDate {
    text.parse().expect("a date")
}
fn local(text: &str) -> NaiveDateTime {
    text.parse().expect("a local time")
}
fn utc(text: &str) -> DateTime<Utc> {
    text.parse().expect("an instant")
}
fn hours(date: NaiveDate, zone: Tz) -> f64 {
    let start = civil::start_of_date(date, zone).expect("the date exists");
    let end = civil::end_of_date(date, zone).expect("the date exists");
    (end - start).num_seconds() as f64 / 3600.0
}

#[test]
fn an_ordinary_day_runs_from_midnight_to_midnight() {
    let (day, zone) = (date("2026-12-05"), Tz::Europe__London);
    assert_eq!(
        civil::start_of_date(day, zone),
        Some(utc("2026-12-05T00:00:00Z"))
    );
    assert_eq!(
        civil::end_of_date(day, zone),
        Some(utc("2026-12-06T00:00:00Z"))
    );
    assert_eq!(
        civil::middle_of(day, zone),
        Some(utc("2026-12-05T12:00:00Z"))
    );
    let tonga = Tz::Pacific__Tongatapu;
    assert_eq!(
        civil::start_of_date(day, tonga),
        Some(utc("2026-12-04T11:00:00Z"))
    );
}

#[test]
fn days_with_a_clock_change_are_longer_or_shorter() {
    let zone = Tz::Europe__London;
    assert_eq!(hours(date("2026-03-29"), zone), 23.0, "summer time begins");
    assert_eq!(hours(date("2026-10-25"), zone), 25.0, "summer time ends");
    assert_eq!(
        hours(date("2026-10-04"), Tz::Australia__Lord_Howe),
        23.5,
        "half an hour there"
    );
}

#[test]
fn a_date_skipped_at_the_date_line_does_not_exist() {
    for (zone, skipped, before) in [
        (Tz::Pacific__Apia, "2011-12-30", "2011-12-29"),
        (Tz::Pacific__Fakaofo, "2011-12-30", "2011-12-29"),
        (Tz::Pacific__Kiritimati, "1994-12-31", "1994-12-30"),
        (Tz::Pacific__Kwajalein, "1993-08-21", "1993-08-20"),
    ] {
        assert!(!civil::date_exists(date(skipped), zone), "{zone} {skipped}");
        assert_eq!(civil::start_of_date(date(skipped), zone), None, "{zone}");
        assert_eq!(civil::end_of_date(date(skipped), zone), None, "{zone}");
        assert_eq!(civil::middle_of(date(skipped), zone), None, "{zone}");
        assert!(civil::date_exists(date(before), zone), "{zone} {before}");
        let next = date(skipped).succ_opt().expect("a next day");
        assert_eq!(
            civil::end_of_date(date(before), zone),
            civil::start_of_date(next, zone),
            "{zone}: the day after the gap follows the day before it"
        );
    }
    assert_eq!(
        civil::start_of_date(date("2011-12-31"), Tz::Pacific__Apia),
        Some(utc("2011-12-30T10:00:00Z")),
        "Samoa went from -10 to +14"
    );
}

#[test]
fn a_midnight_that_does_not_exist_gives_the_first_instant_that_does() {
    for (zone, day, start, length_hours) in [
        (
            Tz::Africa__Cairo,
            "2023-04-28",
            "2023-04-27T22:00:00Z",
            23.0,
        ),
        (
            Tz::America__Sao_Paulo,
            "2018-11-04",
            "2018-11-04T03:00:00Z",
            23.0,
        ),
        (Tz::Asia__Beirut, "2024-03-31", "2024-03-30T22:00:00Z", 23.0),
        (
            Tz::America__Santiago,
            "2026-09-06",
            "2026-09-06T04:00:00Z",
            23.0,
        ),
    ] {
        assert_eq!(
            civil::start_of_date(date(day), zone),
            Some(utc(start)),
            "{zone} {day}"
        );
        let shown = civil::local(utc(start), zone).time().to_string();
        assert_eq!(
            shown, "01:00:00",
            "{zone}: the clock jumped from midnight to one"
        );
        assert_eq!(hours(date(day), zone), length_hours, "{zone} {day}");
        let midnight = date(day).and_time(chrono::NaiveTime::MIN);
        assert!(
            matches!(LocalTime::find(midnight, zone), LocalTime::Never { turned_at } if turned_at == utc(start)),
            "{zone} {day}"
        );
    }
}

#[test]
fn clocks_turned_back_over_midnight_give_the_date_before_its_second_piece() {
    // At 24:00 on 2018-02-17 the clock of Sao Paulo went back to 23:00.
    let zone = Tz::America__Sao_Paulo;
    assert_eq!(hours(date("2018-02-17"), zone), 25.0);
    assert_eq!(
        civil::start_of_date(date("2018-02-18"), zone),
        Some(utc("2018-02-18T03:00:00Z"))
    );
    // St John's, 1987 to 2006, changed at 00:01: the new date had begun for a minute.
    let (zone, day) = (Tz::America__St_Johns, date("2005-10-30"));
    let start = civil::start_of_date(day, zone).expect("the date exists");
    let end_of_eve = civil::end_of_date(date("2005-10-29"), zone).expect("the date exists");
    assert_eq!(start, utc("2005-10-30T02:30:00Z"));
    assert_eq!(end_of_eve - start, TimeDelta::hours(1));
    assert_eq!(civil::local_date(start, zone), day);
    assert_eq!(
        civil::local_date(end_of_eve - TimeDelta::seconds(1), zone),
        date("2005-10-29")
    );
}

#[test]
fn an_hour_that_occurs_twice_is_refused_in_one_sentence_or_resolved_to_the_earlier() {
    let (zone, twice) = (Tz::Europe__London, local("2026-10-25T01:30:00"));
    let found = LocalTime::find(twice, zone);
    let (earlier, later) = (utc("2026-10-25T00:30:00Z"), utc("2026-10-25T01:30:00Z"));
    assert_eq!(found, LocalTime::Twice { earlier, later });
    assert_eq!((found.first(), found.last()), (earlier, later));
    let sentence = civil::utc_from_local(twice, zone)
        .expect_err("it occurs twice")
        .to_string();
    assert_eq!(
        sentence,
        "the local time 2026-10-25 01:30:00 occurs twice in Europe/London, at offset +01:00 and \
         again at +00:00: give the time with its offset"
    );
}

#[test]
fn an_hour_that_does_not_occur_is_refused_in_one_sentence() {
    let (zone, never) = (Tz::Europe__London, local("2026-03-29T01:30:00.250"));
    assert_eq!(
        LocalTime::find(never, zone),
        LocalTime::Never {
            turned_at: utc("2026-03-29T01:00:00Z")
        }
    );
    let sentence = civil::utc_from_local(never, zone)
        .expect_err("it never occurs")
        .to_string();
    assert_eq!(
        sentence,
        "the local time 2026-03-29 01:30:00 does not occur in Europe/London: the clock was \
         turned forward over it, to 2026-03-29 02:00:00"
    );
}

#[test]
fn an_ordinary_local_time_is_found() {
    let instant = civil::utc_from_local(local("2026-12-05T07:10:00"), Tz::America__Denver);
    assert_eq!(instant, Ok(utc("2026-12-05T14:10:00Z")));
}

#[test]
fn the_weekday_is_that_of_the_moment_itself() {
    // A Saturday dawn in Auckland is still Friday in Greenwich.
    let dawn = utc("2026-12-04T17:30:00Z");
    assert_eq!(civil::weekday(dawn, Tz::Pacific__Auckland), Weekday::Sat);
    assert_eq!(civil::weekday(dawn, Tz::UTC), Weekday::Fri);
}

#[test]
fn before_standard_time_a_zone_keeps_local_mean_time() {
    // IANA: Europe/Zurich LMT +0:34:08 until 1853.
    let offset = civil::offset(utc("1650-06-01T12:00:00Z"), Tz::Europe__Zurich);
    assert_eq!(offset.local_minus_utc(), 34 * 60 + 8);
    assert_eq!(
        civil::start_of_date(date("1650-06-01"), Tz::Europe__Zurich),
        Some(utc("1650-05-31T23:25:52Z"))
    );
}

#[test]
fn after_2099_summer_time_is_no_longer_known() {
    let hour = |text: &str| civil::offset(utc(text), Tz::Europe__London).local_minus_utc() / 3600;
    assert_eq!(hour("2099-07-01T12:00:00Z"), 1);
    assert_eq!(hour("2150-07-01T12:00:00Z"), 0);
}

#[test]
fn every_date_that_exists_starts_within_itself_and_days_follow_each_other() {
    for zone in [
        Tz::Asia__Gaza,
        Tz::America__Havana,
        Tz::Antarctica__Troll,
        Tz::Pacific__Apia,
    ] {
        let mut day = date("2009-12-25");
        while day < date("2012-01-05") {
            if let Some(start) = civil::start_of_date(day, zone) {
                let end = civil::end_of_date(day, zone).expect("a date with a start has an end");
                assert_eq!(civil::local_date(start, zone), day, "{zone} {day}");
                assert_ne!(
                    civil::local_date(start - TimeDelta::seconds(1), zone),
                    day,
                    "{zone}"
                );
                assert_eq!(
                    civil::local_date(end - TimeDelta::seconds(1), zone),
                    day,
                    "{zone} {day}"
                );
                assert_ne!(civil::local_date(end, zone), day, "{zone} {day}");
            }
            day = day.succ_opt().expect("a next day");
        }
    }
}

#[test]
fn dates_at_the_ends_of_the_calendar_are_answered() {
    for zone in [
        Tz::Pacific__Kiritimati,
        Tz::Pacific__Pago_Pago,
        Tz::Europe__London,
    ] {
        for day in [NaiveDate::MIN, NaiveDate::MAX] {
            assert_eq!(civil::start_of_date(day, zone), None, "{zone} {day}");
            assert_eq!(civil::end_of_date(day, zone), None, "{zone} {day}");
            assert_eq!(civil::middle_of(day, zone), None, "{zone} {day}");
            let midnight = day.and_time(chrono::NaiveTime::MIN);
            assert!(
                civil::utc_from_local(midnight, zone).is_ok(),
                "{zone} {day}"
            );
        }
    }
}
