//! Dates and times for people: the site's own clock, to the minute.

use super::Words;
use crate::measure::{Moment, TimeScales, civil};
use chrono::{DateTime, Datelike, FixedOffset, NaiveDate, NaiveDateTime, NaiveTime, TimeDelta};
use chrono_tz::Tz;

/// A site's clock: how instants become its civil times.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct CivilClock {
    /// How civil time leads to TT.
    pub scales: TimeScales,
    /// The civil zone.
    pub zone: Tz,
}

impl CivilClock {
    /// The local civil time of an instant, to the microsecond.
    pub fn local(&self, moment: Moment) -> DateTime<FixedOffset> {
        civil::local(self.scales.civil(moment).0, self.zone)
    }

    /// The local civil time rounded to the nearest minute.
    pub fn minute(&self, moment: Moment) -> NaiveDateTime {
        let rounded = self.local(moment).naive_local() + TimeDelta::seconds(30);
        let past_minute = TimeDelta::nanoseconds(
            rounded
                .and_utc()
                .timestamp_nanos_opt()
                .map_or(0, |ns| ns.rem_euclid(60_000_000_000)),
        );
        rounded - past_minute
    }

    /// The civil date of an instant.
    pub fn date(&self, moment: Moment) -> NaiveDate {
        self.local(moment).date_naive()
    }
}

impl Words {
    /// A time of day of an instant on a site's clock, to the minute.
    pub fn time(&self, clock: CivilClock, moment: Moment) -> String {
        self.clock_time(clock.minute(moment).time())
    }

    /// A time of day where there is one, else a dash.
    pub fn time_or_dash(&self, clock: CivilClock, moment: Option<Moment>) -> String {
        moment.map_or_else(|| self.text("no-value"), |moment| self.time(clock, moment))
    }

    /// A time of day on the clock of 24 hours.
    pub fn clock_time(&self, time: NaiveTime) -> String {
        time.format("%-H:%M").to_string()
    }

    /// A date with its weekday.
    pub fn weekday_date(&self, date: NaiveDate) -> String {
        self.text_with("weekday-date", &self.date_arguments(date))
    }

    /// A month with its year.
    pub fn month_year(&self, date: NaiveDate) -> String {
        let month = self.text(&format!("month-{}", date.month()));
        self.text_with(
            "month-year",
            &[("month", month), ("year", date.year().to_string())],
        )
    }

    /// A date with its weekday and the time of day.
    pub fn weekday_date_time(&self, local: NaiveDateTime) -> String {
        let mut arguments = self.date_arguments(local.date()).to_vec();
        arguments.push(("time", self.clock_time(local.time())));
        self.text_with("weekday-date-time", &arguments)
    }

    fn date_arguments(&self, date: NaiveDate) -> [(&'static str, String); 4] {
        [
            (
                "weekday",
                self.text(&format!("weekday-{}", date.weekday().number_from_monday())),
            ),
            ("day", date.day().to_string()),
            ("month", self.text(&format!("month-short-{}", date.month()))),
            ("year", date.year().to_string()),
        ]
    }

    /// A duration in hours and minutes.
    pub fn duration(&self, seconds: f64) -> String {
        let minutes = (seconds / 60.0).round() as i64;
        if minutes < 60 {
            return self.text_with("duration-minutes", &[("minutes", minutes.to_string())]);
        }
        let parts = [("hours", minutes / 60), ("minutes", minutes % 60)];
        self.text_with(
            "duration-hours",
            &parts.map(|(name, n)| (name, n.to_string())),
        )
    }

    /// How long until something, counting down.
    pub fn countdown(&self, seconds: f64) -> String {
        let seconds = seconds.max(0.0) as i64;
        let text = |id: &str, parts: [(&'static str, i64); 2]| {
            self.text_with(id, &parts.map(|(name, n)| (name, n.to_string())))
        };
        if seconds >= 3600 {
            text(
                "countdown-hours",
                [("hours", seconds / 3600), ("minutes", seconds % 3600 / 60)],
            )
        } else {
            text(
                "countdown",
                [("minutes", seconds / 60), ("seconds", seconds % 60)],
            )
        }
    }
}
