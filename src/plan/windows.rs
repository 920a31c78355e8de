//! When a body is plain for an eye: clear of the skyline, and brighter than the eye's threshold.

use super::bright::EyeSky;
use super::interval::{Interval, both, cut, holding};
use super::lit;
use super::night::{Best, Cause, Edge, EyeWindows, Half, SkylineEvent, Stray, Window};
use super::night_sky::{BodySky, NightSky};
use super::passage::{Passage, Way};
use super::path::Path;
use super::sight::Luck;
use crate::light::{Cost, Margin};
use crate::measure::{Angle, Moment, search};
use crate::place::Skyline;

/// What the search for one body's windows behind one skyline needs.
pub(super) struct Searched<'a> {
    pub night: &'a NightSky,
    pub body: &'a BodySky,
    pub passage: &'a Passage<'a, Path>,
    pub skyline: &'a Skyline,
}

/// What is found for one eye before windows are made of it.
struct Plain<'a> {
    sky: &'a EyeSky,
    /// When the body is plain, with each luck in air and eyes.
    intervals: [Vec<Interval>; Luck::ALL.len()],
    /// Seconds after the night's start and the merit there ([`Best`]), in order.
    merits: Vec<(f64, f64)>,
}

/// The lesser of the two merits of a moment; see [`Best`].
fn merit(clearance: Angle, margin_mag: f64) -> f64 {
    (clearance.degrees() / 10.0).min(margin_mag / 5.0)
}

impl Searched<'_> {
    /// The windows for each of the eyes.
    pub fn windows(&self, skyline_events: &[SkylineEvent]) -> Vec<EyeWindows> {
        let clear = holding(
            self.night.bare.whole(),
            self.passage.starts_clear(),
            skyline_events.iter().map(|event| self.skyline_edge(event)),
        );
        let eyes = self.body.eyes.iter();
        eyes.map(|sky| self.of_eye(&self.plain(sky, &clear)))
            .collect()
    }

    fn plain<'b>(&self, sky: &'b EyeSky, clear: &[Interval]) -> Plain<'b> {
        let intervals = sky.bright.each_ref().map(|bright| both(clear, bright));
        let usual = &intervals[Luck::Usual as usize];
        let is_plain = |at_s: f64| {
            let moment = self.night.watch().moment(at_s);
            usual
                .iter()
                .any(|plain| plain.start.moment <= moment && moment <= plain.end.moment)
        };
        let merits = sky
            .margins
            .samples()
            .filter(|(at_s, _)| is_plain(*at_s))
            .map(|(at_s, mag)| (at_s, merit(self.passage.clearance(at_s), mag)))
            .collect();
        Plain {
            sky,
            intervals,
            merits,
        }
    }

    /// Where nothing stands above the horizon, the horizon itself is the cause.
    fn skyline_edge(&self, event: &SkylineEvent) -> Edge {
        let level = |floor: Angle| floor <= Angle::ZERO;
        let is_open = event.altitude.abs() < Angle::from_arcmin(1.0)
            && (level(self.skyline.altitude(event.azimuth))
                || self
                    .skyline
                    .openings(event.azimuth)
                    .first()
                    .is_some_and(|(floor, _)| level(*floor)));
        let cause = if is_open {
            Cause::Horizon
        } else {
            Cause::Skyline
        };
        Edge {
            moment: event.moment,
            cause,
        }
    }

    fn of_eye(&self, plain: &Plain<'_>) -> EyeWindows {
        let night = self.windows_of(plain, &plain.intervals, &[]);
        let half = |half| {
            let (from, to) = self.night.bare.half(half);
            let parts = plain.intervals.each_ref().map(|intervals| {
                let cut = |whole: &Interval| cut(*whole, from, to, Cause::Half);
                intervals.iter().filter_map(cut).collect()
            });
            self.windows_of(plain, &parts, &night)
        };
        EyeWindows {
            eye: plain.sky.eye,
            dusk: half(Half::Dusk),
            dawn: half(Half::Dawn),
            night,
        }
    }

    /// Windows of the intervals; one that is among those known already is taken from there.
    fn windows_of(
        &self,
        plain: &Plain<'_>,
        intervals: &[Vec<Interval>; Luck::ALL.len()],
        known: &[Window],
    ) -> Vec<Window> {
        let [usual, kindest, harshest] = intervals;
        let window = |interval: &Interval| {
            let same = |window: &&Window| {
                window.start.moment == interval.start.moment
                    && window.end.moment == interval.end.moment
            };
            known.iter().find(same).copied().unwrap_or_else(|| {
                let best = self.best(plain, *interval);
                self.window(plain.sky, *interval, kindest, harshest, best)
            })
        };
        usual.iter().map(window).collect()
    }

    fn window(
        &self,
        sky: &EyeSky,
        usual: Interval,
        kindest: &[Interval],
        harshest: &[Interval],
        (best, margin): (Best, Option<Margin>),
    ) -> Window {
        let overlaps = |other: &&Interval| {
            other.start.moment < usual.end.moment && other.end.moment > usual.start.moment
        };
        let earlier = |a: Moment, b: Moment| if a < b { a } else { b };
        let later = |a: Moment, b: Moment| if a > b { a } else { b };
        let kind = kindest.iter().filter(overlaps);
        let (mut earliest, mut latest) = (usual.start.moment, usual.end.moment);
        for interval in kind {
            earliest = earlier(earliest, interval.start.moment);
            latest = later(latest, interval.end.moment);
        }
        let first_harsh = harshest.iter().find(overlaps);
        let last_harsh = harshest.iter().rfind(overlaps);
        let explained = |edge| explained(sky, edge, margin.as_ref());
        Window {
            eye: sky.eye,
            start: explained(usual.start),
            start_stray: Stray {
                earliest: Some(earliest),
                latest: first_harsh.map(|harsh| later(usual.start.moment, harsh.start.moment)),
            },
            end: explained(usual.end),
            end_stray: Stray {
                earliest: last_harsh.map(|harsh| earlier(usual.end.moment, harsh.end.moment)),
                latest: Some(latest),
            },
            best,
        }
    }

    /// See [`Best`] for the rule: the best of the samples, then the top near it. With it comes
    /// the margin there and what makes it up.
    fn best(&self, plain: &Plain<'_>, interval: Interval) -> (Best, Option<Margin>) {
        const NEAR_S: f64 = 300.0;
        const TOLERANCE_S: f64 = 20.0;
        let watch = self.night.watch();
        let margins = &plain.sky.margins;
        let value = |at_s: f64| merit(self.passage.clearance(at_s), margins.at(at_s));
        let from_s = interval.start.moment.seconds_since(watch.start);
        let to_s = interval.end.moment.seconds_since(watch.start);
        let within = plain
            .merits
            .iter()
            .filter(|(at_s, _)| (from_s..=to_s).contains(at_s));
        let crest_s = within
            .max_by(|a, b| a.1.total_cmp(&b.1))
            .map_or(0.5 * (from_s + to_s), |(at_s, _)| *at_s);
        let (low, high) = ((crest_s - NEAR_S).max(from_s), (crest_s + NEAR_S).min(to_s));
        // The crest can stand at an end that has no sample of its own.
        let top = search::extremum_between(value, low, high, true, TOLERANCE_S);
        let at_s = [(top.at, top.value), (low, value(low)), (high, value(high))]
            .into_iter()
            .max_by(|a, b| a.1.total_cmp(&b.1))
            .map_or(crest_s, |(at_s, _)| at_s);
        let seen = self.body.path.at(at_s);
        let clearance = self.skyline.clearance(seen.azimuth, seen.altitude);
        let asked = (self.body.body, plain.sky.eye, Luck::Usual);
        let margin = lit::margin(watch, &self.night.sight, asked, at_s);
        let margin_mag = margin.map_or_else(|| margins.at(at_s), |margin| margin.margin_mag);
        let best = Best {
            moment: watch.moment(at_s),
            azimuth: seen.azimuth,
            altitude: seen.altitude,
            clearance,
            margin_mag,
            merit: merit(clearance, margin_mag),
        };
        (best, margin)
    }
}

/// An end that the light decides, with what costs most there against the best moment.
fn explained(sky: &EyeSky, edge: Edge, at_best: Option<&Margin>) -> Edge {
    if edge.cause != Cause::Twilight {
        return edge;
    }
    let known = sky
        .at_ends
        .iter()
        .find(|(moment, _)| *moment == edge.moment);
    let cost = match (known, at_best) {
        (Some((_, at_end)), Some(at_best)) => at_end.cost_against(at_best),
        _ => None,
    };
    let cause = match cost {
        Some(Cost::Haze) => Cause::Haze,
        Some(Cost::Moonlight) => Cause::Moonlight,
        Some(Cost::Twilight | Cost::Fading) | None => Cause::Twilight,
    };
    Edge { cause, ..edge }
}
