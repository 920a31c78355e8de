//! Civil dates and times of a zone: local days that are longer or shorter than 24 hours, hours
//! that occur twice or not at all.

use chrono::{DateTime, NaiveDate, Utc};
use chrono_tz::Tz;

/// The middle of a civil date in a zone, or `None` where the zone skipped the date.
pub fn middle_of(_date: NaiveDate, _zone: Tz) -> Option<DateTime<Utc>> {
    todo!()
}
