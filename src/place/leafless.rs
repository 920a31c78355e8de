//! When a tree stands without leaves, and what that lets through.

use super::limits;
use chrono::{Datelike, NaiveDate};
use serde::{Deserialize, Serialize};

/// The part of every year in which a tree is leafless; it may run across new year.
#[derive(Clone, Copy, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Leafless {
    /// Its first day; the file writes `(month, day)`.
    pub from: YearDay,
    /// Its last day.
    pub to: YearDay,
    /// How much of the sky behind the bare crown shows through it: 0 nothing, 1 all of it.
    #[serde(deserialize_with = "limits::see_through")]
    pub see_through: f64,
}

/// A day of the year without the year; the file writes `(month, day)`.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Serialize, Deserialize)]
#[serde(try_from = "(u32, u32)", into = "(u32, u32)")]
pub struct YearDay {
    /// 1 to 12.
    pub month: u32,
    /// 1 to 31.
    pub day: u32,
}

impl TryFrom<(u32, u32)> for YearDay {
    type Error = String;

    fn try_from((month, day): (u32, u32)) -> Result<Self, String> {
        // A leap year, so that 29 February is a day.
        NaiveDate::from_ymd_opt(2000, month, day)
            .map(|_| Self { month, day })
            .ok_or_else(|| {
                format!("({month}, {day}) is no day of the year: write (month, day), as (11, 15)")
            })
    }
}

impl From<YearDay> for (u32, u32) {
    fn from(day: YearDay) -> Self {
        (day.month, day.day)
    }
}

impl Leafless {
    /// Whether a date falls into it.
    pub fn holds(&self, date: NaiveDate) -> bool {
        let day = YearDay {
            month: date.month(),
            day: date.day(),
        };
        if self.from <= self.to {
            self.from <= day && day <= self.to
        } else {
            self.from <= day || day <= self.to
        }
    }
}
