//! Dates and times as they are typed: `2026-12-05`, `2026-12-05T17:40:00.5Z`. By hand, because
//! tables hold millions.

use chrono::{DateTime, NaiveDate, NaiveTime, Utc};

/// A time at offset zero.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) struct CivilText {
    /// The time; a leap second is kept as chrono keeps it, past the full second.
    pub utc: DateTime<Utc>,
    /// Whether it is a leap second, which only UTC has.
    pub is_leap_second: bool,
}

/// `YYYY-MM-DDTHH:MM[:SS[.fraction]][Z]`; a space may stand for the `T`.
pub(super) fn parse(text: &[u8]) -> Option<CivilText> {
    let text = text.strip_suffix(b"Z").unwrap_or(text);
    let (date, time) = (text.get(..10)?, text.get(11..)?);
    if !matches!(text[10], b'T' | b' ') {
        return None;
    }
    let hour = digits(time.get(..2)?)?;
    let minute = digits(time.get(3..5)?)?;
    let (mut second, mut nanosecond) = match time.get(5..) {
        Some([]) => (0, 0),
        Some([b':', rest @ ..]) => (digits(rest.get(..2)?)?, fraction(&rest[2..])?),
        _ => return None,
    };
    if time[2] != b':' {
        return None;
    }
    let is_leap_second = (hour, minute, second) == (23, 59, 60);
    if is_leap_second {
        (second, nanosecond) = (59, nanosecond + 1_000_000_000);
    }
    let time = NaiveTime::from_hms_nano_opt(hour, minute, second, nanosecond)?;
    Some(CivilText {
        utc: parse_date(date)?.and_time(time).and_utc(),
        is_leap_second,
    })
}

/// `YYYY-MM-DD`.
pub(super) fn parse_date(text: &[u8]) -> Option<NaiveDate> {
    let &[.., b'-', _, _, b'-', _, _] = text else {
        return None;
    };
    if text.len() != 10 {
        return None;
    }
    NaiveDate::from_ymd_opt(
        digits(&text[..4])? as i32,
        digits(&text[5..7])?,
        digits(&text[8..])?,
    )
}

fn digits(text: &[u8]) -> Option<u32> {
    text.iter().try_fold(0, |value, byte| {
        byte.is_ascii_digit()
            .then(|| value * 10 + u32::from(byte - b'0'))
    })
}

/// Nanoseconds of `.123`; nothing at all is none. Digits beyond the ninth are passed over.
fn fraction(text: &[u8]) -> Option<u32> {
    let [b'.', places @ ..] = text else {
        return text.is_empty().then_some(0);
    };
    if places.is_empty() || !places.iter().all(u8::is_ascii_digit) {
        return None;
    }
    let kept = &places[..places.len().min(9)];
    Some(digits(kept)? * 10_u32.pow(9 - kept.len() as u32))
}

#[cfg(test)]
mod tests {
    use super::{parse, parse_date};
    use proptest::prelude::*;

    #[test]
    fn times_are_read_to_the_nanosecond() {
        let shown = |text: &str| parse(text.as_bytes()).map(|time| time.utc.to_rfc3339());
        let half = Some("2026-12-05T17:40:00.500+00:00".to_owned());
        assert_eq!(shown("2026-12-05T17:40:00.5Z"), half);
        assert_eq!(shown("2026-12-05 17:40:00.5"), half);
        let minute = Some("1617-05-29T05:20:00+00:00".to_owned());
        assert_eq!(shown("1617-05-29T05:20"), minute);
        assert!(parse(b"2016-12-31T23:59:60Z").is_some_and(|time| time.is_leap_second));
    }

    #[test]
    fn what_is_no_time_is_refused() {
        for text in [
            "",
            "2026",
            "2026-12-05",
            "2026-13-05T10:00:00",
            "2026-02-29T10:00:00",
            "2026-12-05T24:00:00",
            "2026-12-05T10:60:00",
            "2026-12-05T10:00:60",
            "2026-12-05T10-00:00",
            "2026-12-05T10:00:00.",
            "2026-12-05T10:00:00+01:00",
            "2026-12-05x10:00:00",
            "+026-12-05T10:00:00",
        ] {
            assert_eq!(parse(text.as_bytes()), None, "{text}");
        }
        assert_eq!(parse_date(b"2026-1-05"), None);
    }

    proptest! {
        #[test]
        fn no_bytes_at_all_make_it_panic(bytes: Vec<u8>) {
            let _ = parse(&bytes);
            let _ = parse_date(&bytes);
        }

        #[test]
        fn a_time_written_out_is_read_back(
            seconds in -11_676_096_000_i64..13_600_000_000, nanos in 0_u32..1_000_000_000
        ) {
            let time = chrono::DateTime::from_timestamp(seconds, nanos).expect("a supported year");
            let text = time.to_rfc3339_opts(chrono::SecondsFormat::Nanos, true);
            prop_assert_eq!(parse(text.as_bytes()).map(|time| time.utc), Some(time));
        }
    }
}
