//! When a body is plain for an eye: clear of the skyline, and brighter than the eye's threshold.

use super::interval::{Interval, both, cut, holding};
use super::lit::{Lit, Margins};
use super::night::{Best, Cause, Edge, EyeWindows, Half, Night, SkylineEvent, Stray, Window};
use super::sight::Luck;
use super::survey::SUN_RISE_SET;
use super::track::Track;
use crate::light::{Cost, Eye};
use crate::measure::{Angle, Moment, search};

/// What the search for one body's windows needs.
pub(super) struct Searched<'a> {
    pub track: &'a Track<'a>,
    pub lit: &'a Lit<'a>,
    pub night: &'a Night,
}

/// One eye's intervals with each luck in air and eyes.
type Intervals = [Vec<Interval>; Luck::ALL.len()];

impl Searched<'_> {
    /// The windows for each of the eyes.
    pub fn windows(&self, skyline_events: &[SkylineEvent], eyes: &[Eye]) -> Vec<EyeWindows> {
        let edge = |moment| Edge {
            moment,
            cause: Cause::Noon,
        };
        let outer = Interval {
            start: edge(self.night.start),
            end: edge(self.night.end),
        };
        let first = self.track.samples.first();
        let clear = holding(
            outer,
            first.is_some_and(|first| first.clearance > Angle::ZERO),
            skyline_events.iter().map(|event| self.skyline_edge(event)),
        );
        if clear.is_empty() {
            return eyes.iter().map(|eye| EyeWindows::none(*eye)).collect();
        }
        let margins = self.lit.margins(self.track.body, eyes);
        let of_eye = |(eye, margins): (&Eye, &Margins)| {
            let allowed = both(&clear, &self.allowed(outer, *eye));
            let plain = Luck::ALL
                .map(|luck| both(&allowed, &self.bright_enough(outer, *eye, luck, margins)));
            self.of_eye(*eye, &plain)
        };
        eyes.iter().zip(&margins).map(of_eye).collect()
    }

    /// Where nothing stands above the horizon, the horizon itself is the cause.
    fn skyline_edge(&self, event: &SkylineEvent) -> Edge {
        let is_open = self.track.watch.skyline.altitude(event.azimuth) <= Angle::ZERO
            && event.altitude.abs() < Angle::from_arcmin(1.0);
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

    /// When an eye is sent looking at all: while the Sun is down, and through an instrument only
    /// within the optics times. What shines in daylight is looked for on purpose and by other
    /// rules, never from here.
    fn allowed(&self, outer: Interval, eye: Eye) -> Vec<Interval> {
        let night = self.night;
        let is_down_at_start = night.sun.highest < SUN_RISE_SET;
        let (from, to) = match eye {
            Eye::Optics => (night.optics.from, night.optics.until),
            _ => {
                let from = night.sun.set.or(is_down_at_start.then_some(night.start));
                (from, night.sun.rise.or(from.map(|_| night.end)))
            }
        };
        let (Some(from), Some(to)) = (from, to) else {
            return Vec::new();
        };
        cut(outer, from, to, Cause::Twilight).into_iter().collect()
    }

    /// When the body outshines the eye's threshold. What each end is due to is found later, for
    /// the ends that count.
    fn bright_enough(
        &self,
        outer: Interval,
        eye: Eye,
        luck: Luck,
        margins: &Margins,
    ) -> Vec<Interval> {
        /// The spread is told to the minute.
        const SPREAD_TOLERANCE_S: f64 = 10.0;
        const TOLERANCE_S: f64 = 0.5;
        let tolerance_s = if luck == Luck::Usual {
            TOLERANCE_S
        } else {
            SPREAD_TOLERANCE_S
        };
        let values = &margins[luck as usize];
        let crossings = search::crossings_of_sampled(
            |at_s| self.lit.margin_mag(self.track.body, eye, luck, at_s),
            &self.lit.times_s,
            values,
            tolerance_s,
        );
        holding(
            outer,
            values.first().is_some_and(|first| *first >= 0.0),
            crossings.into_iter().map(|crossing| Edge {
                moment: self.lit.watch.moment(crossing.at),
                cause: Cause::Twilight,
            }),
        )
    }

    fn of_eye(&self, eye: Eye, plain: &Intervals) -> EyeWindows {
        let half = |half| {
            let (from, to) = self.night.half(half);
            let parts = plain.each_ref().map(|intervals| {
                let cut = |whole: &Interval| cut(*whole, from, to, Cause::Half);
                intervals.iter().filter_map(cut).collect()
            });
            self.windows_of(eye, &parts)
        };
        EyeWindows {
            eye,
            night: self.windows_of(eye, plain),
            dusk: half(Half::Dusk),
            dawn: half(Half::Dawn),
        }
    }

    fn windows_of(&self, eye: Eye, plain: &Intervals) -> Vec<Window> {
        let [usual, kindest, harshest] = plain;
        usual
            .iter()
            .map(|interval| self.window(eye, *interval, kindest, harshest))
            .collect()
    }

    fn window(
        &self,
        eye: Eye,
        usual: Interval,
        kindest: &[Interval],
        harshest: &[Interval],
    ) -> Window {
        let best = self.best(eye, usual);
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
        Window {
            eye,
            start: self.explained(eye, usual.start, &best),
            start_stray: Stray {
                earliest: Some(earliest),
                latest: first_harsh.map(|harsh| later(usual.start.moment, harsh.start.moment)),
            },
            end: self.explained(eye, usual.end, &best),
            end_stray: Stray {
                earliest: last_harsh.map(|harsh| earlier(usual.end.moment, harsh.end.moment)),
                latest: Some(latest),
            },
            best,
        }
    }

    /// An end that the light decides, with what costs most there against the best moment.
    fn explained(&self, eye: Eye, edge: Edge, best: &Best) -> Edge {
        if edge.cause != Cause::Twilight {
            return edge;
        }
        let margin = |moment: Moment| {
            let at_s = moment.seconds_since(self.lit.watch.start);
            self.lit.margin(self.track.body, eye, Luck::Usual, at_s)
        };
        let cost = match (margin(edge.moment), margin(best.moment)) {
            (Some(at_end), Some(at_best)) => at_end.cost_against(&at_best),
            _ => None,
        };
        let cause = match cost {
            Some(Cost::Haze) => Cause::Haze,
            Some(Cost::Moonlight) => Cause::Moonlight,
            Some(Cost::Twilight | Cost::Fading) | None => Cause::Twilight,
        };
        Edge { cause, ..edge }
    }

    /// See [`Best`] for the rule.
    fn best(&self, eye: Eye, interval: Interval) -> Best {
        /// Merits turn over hours, but the lesser of two can have a crest anywhere; ten minutes
        /// find the right one and the golden section then finds its top.
        const STEP_S: f64 = 600.0;
        const TOLERANCE_S: f64 = 15.0;
        let watch = &self.track.watch;
        let body = self.track.body;
        let merit = |at_s: f64| {
            let clearance = watch.sample(body, at_s).clearance;
            let margin_mag = self.lit.margin_mag(body, eye, Luck::Usual, at_s);
            (clearance.degrees() / 10.0).min(margin_mag / 5.0)
        };
        let from_s = interval.start.moment.seconds_since(watch.start);
        let to_s = interval.end.moment.seconds_since(watch.start);
        let samples = search::grid(from_s, to_s, STEP_S);
        let (crest_s, crest) = samples
            .iter()
            .map(|at_s| (*at_s, merit(*at_s)))
            .max_by(|a, b| a.1.total_cmp(&b.1))
            .unwrap_or((from_s, 0.0));
        let (low, high) = ((crest_s - STEP_S).max(from_s), (crest_s + STEP_S).min(to_s));
        let top = search::extremum_between(merit, low, high, true, TOLERANCE_S);
        let at_s = if top.value >= crest { top.at } else { crest_s };
        let sample = watch.sample(body, at_s);
        Best {
            moment: watch.moment(at_s),
            azimuth: sample.azimuth,
            altitude: sample.refracted,
            clearance: sample.clearance,
            margin_mag: self.lit.margin_mag(body, eye, Luck::Usual, at_s),
            merit: top.value.max(crest),
        }
    }
}
