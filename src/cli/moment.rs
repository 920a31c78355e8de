//! A moment as the machine-readable outputs show it.

use crate::measure::{CivilScale, Moment, TimeScales, civil};
use chrono::{DateTime, FixedOffset, Offset, SecondsFormat, TimeDelta, Utc};
use chrono_tz::Tz;
use serde::Serialize;

/// A moment: `{utc, local_time}`, with `scale: "ut1"` where civil time is UT1. In RFC 3339, to
/// the millisecond.
#[derive(Clone, Debug, PartialEq, Eq, Serialize)]
pub(super) struct MomentRecord {
    pub utc: String,
    pub local_time: String,
    #[serde(skip_serializing_if = "Option::is_none")]
    pub scale: Option<&'static str>,
}

/// What turns moments into records.
#[derive(Clone, Copy, Debug)]
pub(super) struct MomentWriter {
    pub scales: TimeScales,
    pub zone: Tz,
}

impl MomentWriter {
    pub fn record(&self, moment: Moment) -> MomentRecord {
        let (utc, scale) = self.scales.civil(moment);
        MomentRecord::new(utc, civil::offset(utc, self.zone), scale)
    }

    pub fn some(&self, moment: Option<Moment>) -> Option<MomentRecord> {
        moment.map(|moment| self.record(moment))
    }

    pub fn all(&self, moments: &[Moment]) -> Vec<MomentRecord> {
        moments.iter().map(|moment| self.record(*moment)).collect()
    }
}

impl MomentRecord {
    /// Of a civil time at offset zero and a local offset.
    pub fn new(utc: DateTime<Utc>, offset: FixedOffset, scale: CivilScale) -> Self {
        let utc = to_millisecond(utc);
        let local = utc.with_timezone(&whole_minutes(offset));
        Self {
            utc: utc.to_rfc3339_opts(SecondsFormat::Millis, true),
            local_time: local.to_rfc3339_opts(SecondsFormat::Millis, false),
            scale: (scale == CivilScale::Ut1).then_some("ut1"),
        }
    }
}

fn to_millisecond(utc: DateTime<Utc>) -> DateTime<Utc> {
    const MILLISECOND_NS: i64 = 1_000_000;
    let half = MILLISECOND_NS / 2;
    let past = (i64::from(utc.timestamp_subsec_nanos()) + half).rem_euclid(MILLISECOND_NS);
    utc + TimeDelta::nanoseconds(half - past)
}

/// RFC 3339 has no seconds in an offset, and local mean times had them: the local time is then
/// given at the nearest whole minute's offset, so that it stays the same instant.
fn whole_minutes(offset: FixedOffset) -> FixedOffset {
    let seconds = f64::from(offset.local_minus_utc());
    FixedOffset::east_opt((seconds / 60.0).round() as i32 * 60).unwrap_or_else(|| Utc.fix())
}

#[cfg(test)]
mod tests {
    use super::*;

    fn record(utc: &str, offset_s: i32) -> MomentRecord {
        let utc: DateTime<Utc> = utc.parse().expect("a time");
        let offset = FixedOffset::east_opt(offset_s).expect("an offset");
        MomentRecord::new(utc, offset, CivilScale::of(utc))
    }

    #[test]
    fn times_are_rounded_to_the_millisecond() {
        let shown = record("2026-12-05T17:59:59.9996Z", 3600);
        assert_eq!(shown.utc, "2026-12-05T18:00:00.000Z");
        assert_eq!(shown.local_time, "2026-12-05T19:00:00.000+01:00");
        assert_eq!(shown.scale, None);
    }

    #[test]
    fn a_local_mean_time_stays_the_same_instant() {
        let shown = record("1700-06-01T12:00:00Z", 34 * 60 + 8);
        assert_eq!(shown.local_time, "1700-06-01T12:34:00.000+00:34");
        assert_eq!(shown.scale, Some("ut1"));
    }
}
