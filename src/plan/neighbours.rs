//! The events around a moment: the last and the next conjunction, greatest elongation or
//! opposition of a body.

use super::phenomena::{self, Circle, Course, Event, Kind, Stretch, Value};
use super::phenomena::{alignments, greatest_elongations};
use crate::measure::{Angle, Moment, TimeScales};
use crate::sky::{Body, Ephemeris};

/// How far an event can lie from a moment, days: the synodic period and a quarter more (Mars'
/// spacing runs from 764 to 811 days).
fn reach_days(body: Body) -> f64 {
    match body {
        Body::Moon => 32.0,
        Body::Mercury => 145.0,
        Body::Venus => 730.0,
        Body::Mars => 975.0,
        _ => 430.0,
    }
}

/// What happens between a body, the Sun and the Earth.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Aspect {
    /// At the Sun's ecliptic longitude, on the near side (Mercury, Venus).
    InferiorConjunction,
    /// At the Sun's ecliptic longitude, beyond it (Mercury, Venus).
    SuperiorConjunction,
    /// At the Sun's ecliptic longitude (outer planets; for the Moon: new moon).
    Conjunction,
    /// Opposite to the Sun in ecliptic longitude (outer planets; for the Moon: full moon).
    Opposition,
    /// Farthest from the Sun in the evening sky (Mercury, Venus).
    GreatestElongationEast,
    /// Farthest from the Sun in the morning sky (Mercury, Venus).
    GreatestElongationWest,
}

/// One event. Geocentric, in apparent ecliptic longitude of date; greatest elongations in the
/// apparent angle from the Sun's centre.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Neighbour {
    /// What.
    pub aspect: Aspect,
    /// When.
    pub moment: Moment,
    /// Elongation from the Sun then.
    pub elongation: Angle,
}

/// The events on either side of a moment. `None`: beyond the supported years.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Neighbours {
    /// The last conjunction with the Sun at or before the moment.
    pub last_conjunction: Option<Neighbour>,
    /// The first one after it.
    pub next_conjunction: Option<Neighbour>,
    /// The last greatest elongation (Mercury, Venus) or opposition (the others).
    pub last_height: Option<Neighbour>,
    /// The first one after it.
    pub next_height: Option<Neighbour>,
}

/// The events around `moment`. The Sun has none.
pub fn neighbours(
    ephemeris: &Ephemeris,
    scales: TimeScales,
    body: Body,
    moment: Moment,
) -> Neighbours {
    if body == Body::Sun {
        return Neighbours::default();
    }
    let (last_conjunction, last_height) = nearest(ephemeris, scales, body, moment, Side::Before);
    let (next_conjunction, next_height) = nearest(ephemeris, scales, body, moment, Side::After);
    Neighbours {
        last_conjunction,
        next_conjunction,
        last_height,
        next_height,
    }
}

/// The nearest conjunction and the nearest of the others on one side of a moment. Looks near
/// first: fitting the theories over years is what takes time.
fn nearest(
    ephemeris: &Ephemeris,
    scales: TimeScales,
    body: Body,
    moment: Moment,
    side: Side,
) -> (Option<Neighbour>, Option<Neighbour>) {
    const SHARES: [f64; 3] = [0.3, 0.6, 1.0];
    let mut found = (None, None);
    for share in SHARES {
        let events = events(ephemeris, scales, body, moment, (side, share));
        let pick = |is_conjunction: bool| {
            let mut of_kind = events
                .iter()
                .filter(|event| event.aspect.is_conjunction() == is_conjunction);
            match side {
                Side::Before => of_kind.next_back().copied(),
                Side::After => of_kind.next().copied(),
            }
        };
        // Where the theories end within the longer reach, what lay near still stands.
        found = (pick(true).or(found.0), pick(false).or(found.1));
        if found.0.is_some() && found.1.is_some() {
            break;
        }
    }
    found
}

impl Aspect {
    /// Whether it is a conjunction with the Sun of any kind.
    pub const fn is_conjunction(self) -> bool {
        matches!(
            self,
            Self::InferiorConjunction | Self::SuperiorConjunction | Self::Conjunction
        )
    }
}

/// Which way from the moment.
#[derive(Clone, Copy, PartialEq)]
enum Side {
    Before,
    After,
}

/// All events within a share of the reach on one side of a moment, in time order; none where the
/// theories end, or where the search fails.
fn events(
    ephemeris: &Ephemeris,
    scales: TimeScales,
    body: Body,
    moment: Moment,
    (side, share): (Side, f64),
) -> Vec<Neighbour> {
    let reach = share * reach_days(body);
    let now = moment.tt().days_since_j2000();
    // A minute past the moment, so that an event at the very moment is among the last ones.
    let (from_days, to_days) = match side {
        Side::Before => (now - reach, now + 1.0 / 1440.0),
        Side::After => (now, now + reach),
    };
    let stretch = Stretch { from_days, to_days };
    let Ok(course) = Course::new(ephemeris, scales, body, stretch) else {
        return Vec::new();
    };
    let mut found = alignments(&course, Circle::Longitude).unwrap_or_default();
    if matches!(body, Body::Mercury | Body::Venus) {
        found.extend(greatest_elongations(&course).unwrap_or_default());
    }
    let mut found: Vec<Neighbour> = found.iter().filter_map(Neighbour::of).collect();
    found.retain(|event| (event.moment > moment) == (side == Side::After));
    found.sort_by(|a, b| a.moment.seconds_since(b.moment).total_cmp(&0.0));
    found
}

impl Neighbour {
    /// The same event told in short; `None` for kinds that are not told here.
    fn of(event: &Event) -> Option<Self> {
        let aspect = match event.kind {
            Kind::InferiorConjunction(_) => Aspect::InferiorConjunction,
            Kind::SuperiorConjunction(_) => Aspect::SuperiorConjunction,
            Kind::Conjunction(_) => Aspect::Conjunction,
            Kind::Opposition(_) => Aspect::Opposition,
            Kind::GreatestElongation(phenomena::Side::East) => Aspect::GreatestElongationEast,
            Kind::GreatestElongation(phenomena::Side::West) => Aspect::GreatestElongationWest,
            _ => return None,
        };
        let Value::Elongation(elongation) = event.value else {
            return None;
        };
        Some(Self {
            aspect,
            moment: event.moment,
            elongation,
        })
    }
}

#[cfg(test)]
mod tests {
    #![allow(clippy::unwrap_used)]
    use super::{Aspect, Neighbour, neighbours};
    use crate::measure::{Moment, TimeScales};
    use crate::sky::{Body, Ephemeris};
    use chrono::{DateTime, Utc};

    fn moment(utc: &str) -> Moment {
        let utc: DateTime<Utc> = utc.parse().unwrap();
        TimeScales::new().moment_from_civil(utc).unwrap()
    }

    /// Days that an event lies off a time.
    fn days_off(event: Option<Neighbour>, utc: &str) -> f64 {
        event.unwrap().moment.seconds_since(moment(utc)) / 86_400.0
    }

    /// Geocentric conjunctions of Venus in apparent ecliptic longitude, and the dates and angles
    /// of its greatest elongations. Source: computed with JPL DE440 (skyfield 1.55); the row of
    /// 2012 agrees with published tables. Conjunctions are printed to the minute (superior ones
    /// to the day), elongations to the day and 0.01°.
    const VENUS: [(&str, Aspect, &str, f64); 12] = [
        (
            "2012-04-15",
            Aspect::GreatestElongationEast,
            "2012-03-27T12:00:00Z",
            46.04,
        ),
        (
            "2012-05-01",
            Aspect::InferiorConjunction,
            "2012-06-06T01:09:00Z",
            f64::NAN,
        ),
        (
            "2012-07-12",
            Aspect::GreatestElongationWest,
            "2012-08-15T12:00:00Z",
            45.80,
        ),
        (
            "2013-02-01",
            Aspect::SuperiorConjunction,
            "2013-03-28T12:00:00Z",
            f64::NAN,
        ),
        (
            "2017-02-17",
            Aspect::InferiorConjunction,
            "2017-03-25T10:17:00Z",
            f64::NAN,
        ),
        (
            "2025-02-01",
            Aspect::InferiorConjunction,
            "2025-03-23T01:07:00Z",
            f64::NAN,
        ),
        (
            "2025-04-01",
            Aspect::GreatestElongationWest,
            "2025-06-01T12:00:00Z",
            45.88,
        ),
        (
            "2026-09-18",
            Aspect::InferiorConjunction,
            "2026-10-24T03:44:00Z",
            f64::NAN,
        ),
        (
            "2026-12-05",
            Aspect::GreatestElongationWest,
            "2027-01-03T12:00:00Z",
            46.95,
        ),
        (
            "2027-07-01",
            Aspect::SuperiorConjunction,
            "2027-08-12T12:00:00Z",
            f64::NAN,
        ),
        (
            "2033-01-01",
            Aspect::GreatestElongationEast,
            "2033-01-07T12:00:00Z",
            47.19,
        ),
        (
            "2034-08-20",
            Aspect::InferiorConjunction,
            "2034-10-21T17:04:00Z",
            f64::NAN,
        ),
    ];

    #[test]
    fn venus_comes_round_when_de440_says() {
        let ephemeris = Ephemeris::new();
        for (date, aspect, utc, elongation_deg) in VENUS {
            let now = moment(&format!("{date}T00:00:00Z"));
            let found = neighbours(&ephemeris, TimeScales::new(), Body::Venus, now);
            let event = match aspect.is_conjunction() {
                true => found.next_conjunction,
                false if date == "2012-04-15" => found.last_height,
                false => found.next_height,
            };
            assert_eq!(event.unwrap().aspect, aspect, "{date}");
            let off = days_off(event, utc);
            if aspect == Aspect::InferiorConjunction {
                // Printed to the minute.
                assert!(off.abs() < 1.5 / 1440.0, "{date}: {off} days off {utc}");
            } else {
                // Printed to the day.
                assert!(off.abs() < 0.51, "{date}: {off} days off {utc}");
            }
            if elongation_deg.is_finite() {
                let found_deg = event.unwrap().elongation.degrees();
                assert!(
                    (found_deg - elongation_deg).abs() < 0.0051,
                    "{date}: {found_deg}"
                );
            }
        }
    }

    /// Greatest elongations of Mercury, to the day and 0.1°. Source: computed with JPL DE440
    /// (skyfield 1.55).
    const MERCURY: [(&str, Aspect, f64); 7] = [
        ("2026-02-19", Aspect::GreatestElongationEast, 18.1),
        ("2026-04-03", Aspect::GreatestElongationWest, 27.8),
        ("2026-06-15", Aspect::GreatestElongationEast, 24.5),
        ("2026-08-02", Aspect::GreatestElongationWest, 19.5),
        ("2026-10-12", Aspect::GreatestElongationEast, 25.2),
        ("2026-11-20", Aspect::GreatestElongationWest, 19.6),
        ("2027-02-03", Aspect::GreatestElongationEast, 18.3),
    ];

    #[test]
    fn mercury_swings_from_side_to_side() {
        let ephemeris = Ephemeris::new();
        let mut now = moment("2026-02-01T00:00:00Z");
        for (date, aspect, elongation_deg) in MERCURY {
            let found = neighbours(&ephemeris, TimeScales::new(), Body::Mercury, now);
            let event = found.next_height.unwrap();
            let off = days_off(found.next_height, &format!("{date}T12:00:00Z"));
            assert_eq!(event.aspect, aspect, "{date}");
            assert!(off.abs() < 0.51, "{date}: {off} days off");
            let found_deg = event.elongation.degrees();
            assert!(
                (found_deg - elongation_deg).abs() < 0.051,
                "{date}: {found_deg}"
            );
            // The same event is the last one as soon as it is over.
            now = event.moment.plus_seconds(60.0);
            let after = neighbours(&ephemeris, TimeScales::new(), Body::Mercury, now);
            assert_eq!(after.last_height.unwrap().aspect, aspect, "{date}");
        }
    }

    #[test]
    fn outer_planets_and_the_moon_have_oppositions() {
        let ephemeris = Ephemeris::new();
        let around = |body, utc| neighbours(&ephemeris, TimeScales::new(), body, moment(utc));
        // Opposition of Mars on 2025 January 16, of Saturn on 2025 September 21, full moon on
        // 2026 April 2, 2:12 UTC. Source: the year's printed almanacs, from memory.
        let mars = around(Body::Mars, "2025-01-01T00:00:00Z");
        assert_eq!(mars.next_height.unwrap().aspect, Aspect::Opposition);
        assert!(
            days_off(mars.next_height, "2025-01-16T03:00:00Z").abs() < 0.6,
            "{mars:?}"
        );
        let saturn = around(Body::Saturn, "2025-10-21T00:00:00Z");
        assert!(
            days_off(saturn.last_height, "2025-09-21T06:00:00Z").abs() < 0.6,
            "{saturn:?}"
        );
        let moon = around(Body::Moon, "2026-03-25T00:00:00Z");
        assert_eq!(moon.next_height.unwrap().aspect, Aspect::Opposition);
        assert!(
            days_off(moon.next_height, "2026-04-02T02:12:00Z").abs() < 2.0 / 1440.0,
            "{moon:?}"
        );
    }

    #[test]
    fn every_event_is_found_on_both_sides_from_any_date() {
        let ephemeris = Ephemeris::new();
        for body in [
            Body::Moon,
            Body::Mercury,
            Body::Venus,
            Body::Mars,
            Body::Jupiter,
        ] {
            for days in (0..900).step_by(61) {
                let now = moment("2024-01-05T00:00:00Z").plus_seconds(86_400.0 * f64::from(days));
                let found = neighbours(&ephemeris, TimeScales::new(), body, now);
                let last = [found.last_conjunction, found.last_height];
                let next = [found.next_conjunction, found.next_height];
                for event in last {
                    assert!(event.unwrap().moment <= now, "{body} {days}");
                }
                for event in next {
                    assert!(event.unwrap().moment > now, "{body} {days}");
                }
            }
        }
    }

    #[test]
    fn the_last_supported_day_still_has_neighbours_on_both_sides() {
        // The theories reach two years beyond the supported dates.
        let ephemeris = Ephemeris::new();
        let now = moment("2400-12-30T00:00:00Z");
        for body in [Body::Moon, Body::Mercury, Body::Venus, Body::Saturn] {
            let found = neighbours(&ephemeris, TimeScales::new(), body, now);
            let last = [found.last_conjunction, found.last_height];
            let next = [found.next_conjunction, found.next_height];
            let count = last.iter().chain(&next).flatten().count();
            assert_eq!(count, 4, "{body}: {found:?}");
        }
    }
}
