//! Civil dates and times of a zone: local days that are longer or shorter than 24 hours, hours
//! that occur twice or not at all, dates that were skipped.
//!
//! A `DateTime<Utc>` here is civil time at offset zero: UTC from 1972 to 2050, and UT1 before
//! and after (see [`super::TimeScales`]); the zone's offset is added to either in the same way.
//! The offsets are the IANA database's as `chrono-tz` carries it: local mean time of the zone's
//! principal city before standard time came in (Europe/Zurich +00:34:08 in 1600), and after
//! 2099 the zone's standard offset without summer time, since the database is expanded that far.

use chrono::{DateTime, Datelike, Days, FixedOffset, NaiveDate, NaiveDateTime, NaiveTime};
use chrono::{Offset, TimeDelta, TimeZone, Utc, Weekday};
use chrono_tz::Tz;
use std::fmt;

/// The instants that a zone's clock shows a local time at.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum LocalTime {
    /// At one instant.
    Once(DateTime<Utc>),
    /// At two: the clock was turned back over it.
    Twice {
        /// The first time round.
        earlier: DateTime<Utc>,
        /// The second time round.
        later: DateTime<Utc>,
    },
    /// At none: the clock was turned forward over it.
    Never {
        /// The instant at which the clock was turned forward.
        turned_at: DateTime<Utc>,
    },
}

/// What is wrong with a local time that does not occur exactly once.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct NotOnce {
    /// The local time.
    pub local: NaiveDateTime,
    /// The zone.
    pub zone: Tz,
    /// What it is instead.
    pub outcome: LocalTime,
}

impl LocalTime {
    /// Looks a local time up. At the far ends of the calendar, where an offset could lead out of
    /// it, the offset is taken as zero.
    pub fn find(local: NaiveDateTime, zone: Tz) -> Self {
        if is_at_the_calendars_end(local.date()) {
            return Self::Once(local.and_utc());
        }
        let found = zone.from_local_datetime(&local);
        match (found.earliest(), found.latest()) {
            (Some(earlier), Some(later)) if earlier != later => Self::Twice {
                earlier: earlier.to_utc(),
                later: later.to_utc(),
            },
            (Some(once), _) => Self::Once(once.to_utc()),
            _ => Self::Never {
                turned_at: first_reaching(local, zone),
            },
        }
    }

    /// The first instant at which the clock shows that time or, where it is never shown, the
    /// instant at which the clock jumps over it.
    pub const fn first(self) -> DateTime<Utc> {
        match self {
            Self::Once(instant) => instant,
            Self::Twice { earlier, .. } => earlier,
            Self::Never { turned_at } => turned_at,
        }
    }

    /// The last such instant.
    pub const fn last(self) -> DateTime<Utc> {
        match self {
            Self::Twice { later, .. } => later,
            other => other.first(),
        }
    }
}

/// The one instant at which a zone's clock shows a local time.
///
/// # Errors
/// It is shown twice or never; the error says which and names the offsets to choose from. Use
/// [`LocalTime::find`] and [`LocalTime::first`] where the earlier one will do.
pub fn utc_from_local(local: NaiveDateTime, zone: Tz) -> Result<DateTime<Utc>, NotOnce> {
    match LocalTime::find(local, zone) {
        LocalTime::Once(instant) => Ok(instant),
        outcome => Err(NotOnce {
            local,
            zone,
            outcome,
        }),
    }
}

/// Whether a date occurs in the zone at all; a date can be skipped at the date line.
pub fn date_exists(date: NaiveDate, zone: Tz) -> bool {
    start_of_date(date, zone).is_some()
}

/// The first instant of a local date: midnight, or the instant at which the clock jumps over
/// midnight into it. `None` where the zone skipped the date (or beyond the year ±262000, where
/// the calendar ends).
pub fn start_of_date(date: NaiveDate, zone: Tz) -> Option<DateTime<Utc>> {
    if is_at_the_calendars_end(date) {
        return None;
    }
    let start = LocalTime::find(date.and_time(NaiveTime::MIN), zone).first();
    (local_date(start, zone) == date).then_some(start)
}

/// The instant at which a local date is over for good, itself no longer within it. `None` where
/// the zone skipped the date.
///
/// Where a clock is turned back over midnight the date occurs in two pieces, and the next date's
/// [`start_of_date`] comes before this end.
pub fn end_of_date(date: NaiveDate, zone: Tz) -> Option<DateTime<Utc>> {
    start_of_date(date, zone)?;
    let next = date.checked_add_days(Days::new(1))?;
    let midnight = LocalTime::find(next.and_time(NaiveTime::MIN), zone);
    // A clock turned back to midnight shows it twice, but the date ends only once; one turned
    // back over midnight leads into the date again.
    let is_last_piece = |end: DateTime<Utc>| local_date(end - TimeDelta::seconds(1), zone) == date;
    Some(if is_last_piece(midnight.last()) {
        midnight.last()
    } else {
        midnight.first()
    })
}

/// The middle between the start and the end of a local date, noon on most days. `None` where
/// the zone skipped the date.
pub fn middle_of(date: NaiveDate, zone: Tz) -> Option<DateTime<Utc>> {
    let (start, end) = (start_of_date(date, zone)?, end_of_date(date, zone)?);
    Some(start + (end - start) / 2)
}

/// What the zone's clock and calendar show at an instant.
pub fn local(instant: DateTime<Utc>, zone: Tz) -> DateTime<FixedOffset> {
    instant.with_timezone(&offset(instant, zone))
}

/// The civil date at an instant.
pub fn local_date(instant: DateTime<Utc>, zone: Tz) -> NaiveDate {
    local(instant, zone).date_naive()
}

/// The weekday of an instant's own civil date.
pub fn weekday(instant: DateTime<Utc>, zone: Tz) -> Weekday {
    local(instant, zone).weekday()
}

/// Local time minus civil time at offset zero, at an instant; east of Greenwich positive.
pub fn offset(instant: DateTime<Utc>, zone: Tz) -> FixedOffset {
    zone.offset_from_utc_datetime(&instant.naive_utc()).fix()
}

fn is_at_the_calendars_end(date: NaiveDate) -> bool {
    date.year().abs() > 262_000
}

/// The first instant, to the second, at which the clock shows `local` or more. Only asked where
/// a clock was turned forward over `local`, so the clock grows through the search.
fn first_reaching(local: NaiveDateTime, zone: Tz) -> DateTime<Utc> {
    // No zone was ever more than 16 hours from Greenwich.
    const REACH_S: i64 = 16 * 3600;
    let reached = |instant: DateTime<Utc>| self::local(instant, zone).naive_local() >= local;
    let (mut before_s, mut after_s) = (-REACH_S, REACH_S);
    while after_s - before_s > 1 {
        let middle_s = before_s.midpoint(after_s);
        if reached(local.and_utc() + TimeDelta::seconds(middle_s)) {
            after_s = middle_s;
        } else {
            before_s = middle_s;
        }
    }
    // Transitions fall on whole seconds; `local` need not.
    let instant = local.and_utc() + TimeDelta::seconds(after_s);
    let whole = instant - TimeDelta::nanoseconds(i64::from(instant.timestamp_subsec_nanos()));
    if reached(whole) { whole } else { instant }
}

impl fmt::Display for NotOnce {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        let time = self.local.format("%Y-%m-%d %H:%M:%S");
        let zone = self.zone;
        match self.outcome {
            LocalTime::Twice { earlier, later } => write!(
                f,
                "the local time {time} occurs twice in {zone}, at offset {} and again at {}: \
                 give the time with its offset",
                offset(earlier, zone),
                offset(later, zone)
            ),
            LocalTime::Never { turned_at } => write!(
                f,
                "the local time {time} does not occur in {zone}: the clock was turned forward \
                 over it, to {}",
                local(turned_at, zone).format("%Y-%m-%d %H:%M:%S")
            ),
            LocalTime::Once(_) => write!(f, "the local time {time} occurs once in {zone}"),
        }
    }
}

impl std::error::Error for NotOnce {}
