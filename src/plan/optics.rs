//! When optics may be uncapped: the rule stands at [`OpticsTimes`].

use super::night::{NightRequest, OpticsTimes};
use super::track::Track;
use crate::measure::{Angle, Moment, civil, search};
use crate::sky::{Observer, refraction};

/// The wait and the depression that follow the limb's vanishing, or go before its return.
struct Reserve {
    wait_s: f64,
    depression: Angle,
}

const DUSK: Reserve = Reserve {
    wait_s: 5.0 * 60.0,
    depression: Angle::from_degrees(1.0),
};
const DAWN: Reserve = Reserve {
    wait_s: 10.0 * 60.0,
    depression: Angle::from_degrees(2.0),
};

/// The Sun's apparent radius at perihelion, the largest of the year.
const LARGEST_SUN_RADIUS: Angle = Angle::from_arcsec(976.0);

/// The optics times of a night from the Sun's track.
pub(super) fn optics_times(
    sun: &Track<'_>,
    middle: Moment,
    request: &NightRequest<'_>,
) -> OpticsTimes {
    let hidden_at = limb_vanishes_at(request.observer);
    let middle_s = middle.seconds_since(sun.watch.start);
    let end_s = sun.samples.last().map_or(middle_s, |last| last.at_s);
    let below = |limit: Angle, at_s: f64| sun.watch.sample(sun.body, at_s).airless < limit;
    // When the Sun has sunk below a limit for the rest of dusk; and until when it stays below.
    let sunk_s = |limit: Angle| {
        let crossings = sun.crossings(|sample| (sample.airless - limit).radians());
        let last = crossings
            .iter()
            .rfind(|c| !c.rising && c.at <= middle_s)
            .map(|c| c.at);
        last.or_else(|| below(limit, 0.0).then_some(0.0))
    };
    let stays_s = |limit: Angle| {
        let crossings = sun.crossings(|sample| (sample.airless - limit).radians());
        let first = crossings
            .iter()
            .find(|c| c.rising && c.at >= middle_s)
            .map(|c| c.at);
        first.or_else(|| below(limit, end_s).then_some(end_s))
    };
    let from_s = || {
        let (hidden_s, deep_s) = (sunk_s(hidden_at)?, sunk_s(hidden_at - DUSK.depression)?);
        let waited_s = if hidden_s > 0.0 {
            hidden_s + DUSK.wait_s
        } else {
            0.0
        };
        Some(waited_s.max(deep_s))
    };
    let until_s = || {
        let (returns_s, deep_s) = (stays_s(hidden_at)?, stays_s(hidden_at - DAWN.depression)?);
        let waited_s = if returns_s < end_s {
            returns_s - DAWN.wait_s
        } else {
            end_s
        };
        Some(waited_s.min(deep_s))
    };
    let rounded = |at_s: f64, round: fn(f64) -> f64| {
        whole_local_minute(sun.watch.moment(at_s), request, round)
    };
    OpticsTimes {
        from: from_s()
            .map(|at_s| rounded(at_s, f64::ceil))
            .filter(|from| *from < middle),
        until: until_s()
            .map(|at_s| rounded(at_s, f64::floor))
            .filter(|until| *until > middle),
    }
}

/// The airless altitude of the Sun's centre at which its upper limb goes below the lowest
/// horizon it could be seen over from that elevation.
fn limb_vanishes_at(observer: &Observer) -> Angle {
    let dip = refraction::dip(observer.elevation_m.max(0.0));
    let limb_above = |centre_deg: f64| {
        let limb = Angle::from_degrees(centre_deg) + LARGEST_SUN_RADIUS;
        (refraction::refracted(limb, &observer.air) + dip).degrees()
    };
    // From 9000 m the dip is 2.8 degrees; refraction is at most 1 in the densest air.
    let crossing = search::crossings(limb_above, &search::grid(-6.0, 2.0, 0.5), 1e-6);
    crossing.last().map_or(Angle::from_degrees(-6.0), |found| {
        Angle::from_degrees(found.at)
    })
}

/// The moment moved to a whole minute of the local clock.
fn whole_local_minute(moment: Moment, request: &NightRequest<'_>, round: fn(f64) -> f64) -> Moment {
    const MICROSECONDS_PER_MINUTE: f64 = 60e6;
    let (now, _) = request.scales.civil(moment);
    let offset_s = i64::from(civil::offset(now, request.zone).local_minus_utc());
    let local_us = now.timestamp_micros() + offset_s * 1_000_000;
    let whole_us = round(local_us as f64 / MICROSECONDS_PER_MINUTE) * MICROSECONDS_PER_MINUTE;
    moment.plus_seconds((whole_us - local_us as f64) * 1e-6)
}
