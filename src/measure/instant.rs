//! Instants in their time scales: Terrestrial Time, UT1, and civil time (UTC, or UT1 where
//! there is no UTC).

use super::delta_t;
use chrono::{DateTime, Datelike, NaiveDate, TimeDelta, Timelike, Utc};
use std::fmt;

const SECONDS_PER_DAY: f64 = 86_400.0;
/// The Julian date of 2000 January 1, 12h, from which the scales here count.
const J2000_JULIAN_DATE: f64 = 2_451_545.0;

macro_rules! scale {
    ($(#[$doc:meta])* $name:ident) => {
        $(#[$doc])*
        #[derive(Clone, Copy, Debug, PartialEq, PartialOrd)]
        pub struct $name(f64);

        impl $name {
            /// From days since 2000 January 1, 12h in this scale.
            pub const fn from_days_since_j2000(days: f64) -> Self {
                Self(days)
            }
            /// From a Julian date in this scale (good to 40 microseconds).
            pub const fn from_julian_date(julian_date: f64) -> Self {
                Self(julian_date - J2000_JULIAN_DATE)
            }
            /// Days since 2000 January 1, 12h in this scale.
            pub const fn days_since_j2000(self) -> f64 {
                self.0
            }
            /// Julian centuries of 36525 days since 2000 January 1, 12h in this scale.
            pub const fn centuries_since_j2000(self) -> f64 {
                self.0 / 36_525.0
            }
            /// The Julian date in this scale.
            pub const fn julian_date(self) -> f64 {
                self.0 + J2000_JULIAN_DATE
            }
            /// Later by so many days.
            pub const fn plus_days(self, days: f64) -> Self {
                Self(self.0 + days)
            }
            /// Later by so many seconds.
            pub const fn plus_seconds(self, seconds: f64) -> Self {
                Self(self.0 + seconds / SECONDS_PER_DAY)
            }
        }
    };
}

scale!(
    /// Terrestrial Time: the uniform scale that the planets' motions are given in.
    Tt
);
scale!(
    /// Universal Time UT1: the Earth's rotation as a clock.
    Ut1
);

impl Tt {
    /// The year with its fraction, 2000.0 being J2000; for slow quantities only.
    pub fn decimal_year(self) -> f64 {
        2000.0 + self.days_since_j2000() / 365.25
    }
}

/// One instant, known both as Terrestrial Time and as UT1.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Moment {
    tt: Tt,
    ut1: Ut1,
}

impl Moment {
    /// From both scales at once.
    pub const fn new(tt: Tt, ut1: Ut1) -> Self {
        Self { tt, ut1 }
    }
    /// As Terrestrial Time.
    pub const fn tt(self) -> Tt {
        self.tt
    }
    /// As UT1.
    pub const fn ut1(self) -> Ut1 {
        self.ut1
    }
    /// TT - UT1, seconds.
    pub fn delta_t_s(self) -> f64 {
        (self.tt.days_since_j2000() - self.ut1.days_since_j2000()) * SECONDS_PER_DAY
    }
    /// Later by so many seconds, with TT - UT1 held: for steps within days, where it changes
    /// by under 10 ms.
    pub fn plus_seconds(self, seconds: f64) -> Self {
        Self {
            tt: self.tt.plus_seconds(seconds),
            ut1: self.ut1.plus_seconds(seconds),
        }
    }
    /// Seconds from `earlier` to this one.
    pub fn seconds_since(self, earlier: Self) -> f64 {
        (self.tt.days_since_j2000() - earlier.tt.days_since_j2000()) * SECONDS_PER_DAY
    }
}

impl PartialOrd for Moment {
    fn partial_cmp(&self, other: &Self) -> Option<std::cmp::Ordering> {
        self.tt.partial_cmp(&other.tt)
    }
}

/// What civil time means at an instant.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum CivilScale {
    /// Coordinated Universal Time, 1972 to 2050, with the last known TAI - UTC held.
    Utc,
    /// UT1, before and after.
    Ut1,
}

/// A date outside the years that the program supports.
#[derive(Clone, Debug, PartialEq)]
pub struct DateOutOfRange {
    /// The date that was asked for, as year-month-day.
    pub date: String,
}

impl DateOutOfRange {
    /// The first supported year.
    pub const FIRST_YEAR: i32 = 1600;
    /// The last supported year.
    pub const LAST_YEAR: i32 = 2400;
}

impl fmt::Display for DateOutOfRange {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(
            f,
            "the date {} lies outside the supported years {} to {}",
            self.date,
            Self::FIRST_YEAR,
            Self::LAST_YEAR
        )
    }
}

impl std::error::Error for DateOutOfRange {}

/// Leads between civil time, UT1 and TT; knows TT - UT1 or is told it.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct TimeScales {
    stated_delta_t_s: Option<f64>,
}

impl TimeScales {
    /// TT - UT1 from the program's own table and models ([`delta_t`]).
    pub const fn new() -> Self {
        Self {
            stated_delta_t_s: None,
        }
    }
    /// TT - UT1 as stated, seconds, for comparison with tables.
    pub const fn with_delta_t_s(delta_t_s: f64) -> Self {
        Self {
            stated_delta_t_s: Some(delta_t_s),
        }
    }
    /// TT - UT1 at an instant, seconds.
    pub fn delta_t_s(&self, tt: Tt) -> f64 {
        self.stated_delta_t_s
            .unwrap_or_else(|| delta_t::delta_t_s(tt))
    }
    /// The instant of a Terrestrial Time.
    pub fn moment_from_tt(&self, tt: Tt) -> Moment {
        Moment::new(tt, Ut1(tt.0 - self.delta_t_s(tt) / SECONDS_PER_DAY))
    }
    /// The instant of a UT1.
    pub fn moment_from_ut1(&self, ut1: Ut1) -> Moment {
        // TT - UT1 changes by under 1e-7 s over its own length, so one step settles it.
        let near = Tt(ut1.0 + self.delta_t_s(Tt(ut1.0)) / SECONDS_PER_DAY);
        Moment::new(Tt(ut1.0 + self.delta_t_s(near) / SECONDS_PER_DAY), ut1)
    }
    /// The instant of a civil time: UTC from 1972 to 2050, UT1 before and after.
    ///
    /// # Errors
    /// The date lies outside 1600 to 2400.
    pub fn moment_from_civil(&self, civil: DateTime<Utc>) -> Result<Moment, DateOutOfRange> {
        check_date(civil.date_naive())?;
        let days = days_since_j2000(civil);
        Ok(match CivilScale::of(civil) {
            CivilScale::Ut1 => self.moment_from_ut1(Ut1(days)),
            CivilScale::Utc => {
                let tt_minus_utc_s = TT_MINUS_TAI_S + tai_minus_utc_s(civil);
                self.moment_from_tt(Tt(days + tt_minus_utc_s / SECONDS_PER_DAY))
            }
        })
    }
    /// The civil time of an instant, and what it means there. To the microsecond.
    pub fn civil(&self, moment: Moment) -> (DateTime<Utc>, CivilScale) {
        // The step at a leap second is one second; so is the most that the guess can be off.
        let guess = civil_from_days(moment.tt.0 - (TT_MINUS_TAI_S + 37.0) / SECONDS_PER_DAY);
        if CivilScale::of(guess) == CivilScale::Ut1 {
            return (civil_from_days(moment.ut1.0), CivilScale::Ut1);
        }
        let mut leap_s = tai_minus_utc_s(guess);
        for _ in 0..2 {
            let utc = civil_from_days(moment.tt.0 - (TT_MINUS_TAI_S + leap_s) / SECONDS_PER_DAY);
            leap_s = tai_minus_utc_s(utc);
        }
        let utc = civil_from_days(moment.tt.0 - (TT_MINUS_TAI_S + leap_s) / SECONDS_PER_DAY);
        (utc, CivilScale::Utc)
    }
}

impl CivilScale {
    /// What a civil time means.
    pub fn of(civil: DateTime<Utc>) -> Self {
        if (1972..2050).contains(&civil.year()) {
            Self::Utc
        } else {
            Self::Ut1
        }
    }
}

/// TT - TAI, seconds, by definition (IAU 1991).
const TT_MINUS_TAI_S: f64 = 32.184;

/// First day (year, month) of each value of TAI - UTC from 10 s on, one second apart.
/// Source: IERS Bulletin C, the list of leap seconds to the one of 2017; Bulletin C 72
/// (July 2026) announces none.
const LEAP_SECONDS: [(i32, u32); 28] = [
    (1972, 1),
    (1972, 7),
    (1973, 1),
    (1974, 1),
    (1975, 1),
    (1976, 1),
    (1977, 1),
    (1978, 1),
    (1979, 1),
    (1980, 1),
    (1981, 7),
    (1982, 7),
    (1983, 7),
    (1985, 7),
    (1988, 1),
    (1990, 1),
    (1991, 1),
    (1992, 7),
    (1993, 7),
    (1994, 7),
    (1996, 1),
    (1997, 7),
    (1999, 1),
    (2006, 1),
    (2009, 1),
    (2012, 7),
    (2015, 7),
    (2017, 1),
];

/// TAI - UTC at a UTC, seconds; the last known value is held.
fn tai_minus_utc_s(utc: DateTime<Utc>) -> f64 {
    let month = (utc.year(), utc.month());
    9.0 + LEAP_SECONDS
        .iter()
        .take_while(|start| **start <= month)
        .count() as f64
}

/// Refuses a date outside the supported years.
///
/// # Errors
/// The date lies outside 1600 to 2400.
pub fn check_date(date: NaiveDate) -> Result<(), DateOutOfRange> {
    if (DateOutOfRange::FIRST_YEAR..=DateOutOfRange::LAST_YEAR).contains(&date.year()) {
        Ok(())
    } else {
        Err(DateOutOfRange {
            date: date.to_string(),
        })
    }
}

fn j2000_noon() -> DateTime<Utc> {
    DateTime::UNIX_EPOCH + TimeDelta::seconds(946_728_000)
}

fn days_since_j2000(civil: DateTime<Utc>) -> f64 {
    // Within a leap second chrono counts nanoseconds past the full second.
    let whole = civil.timestamp() - j2000_noon().timestamp();
    (whole as f64 + f64::from(civil.nanosecond()) * 1e-9) / SECONDS_PER_DAY
}

fn civil_from_days(days: f64) -> DateTime<Utc> {
    j2000_noon() + TimeDelta::microseconds((days * SECONDS_PER_DAY * 1e6).round() as i64)
}
