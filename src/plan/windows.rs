//! When a body is plain for an eye: clear of the skyline, and brighter than the eye's threshold.

use super::interval::{Interval, both, cut, holding};
use super::lit::Lit;
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

/// What is found for one eye before windows are made of it.
#[derive(Default)]
struct Plain {
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
    pub fn windows(&self, skyline_events: &[SkylineEvent], eyes: &[Eye]) -> Vec<EyeWindows> {
        let outer = self.outer();
        let first = self.track.samples.first();
        let clear = holding(
            outer,
            first.is_some_and(|first| first.clearance > Angle::ZERO),
            skyline_events.iter().map(|event| self.skyline_edge(event)),
        );
        let mut found: Vec<Plain> = eyes.iter().map(|_| Plain::default()).collect();
        for stretch in both(&clear, &self.allowed(Eye::Visitor)) {
            self.search(stretch, eyes, &mut found);
        }
        let of_eye = |(eye, plain): (&Eye, &Plain)| self.of_eye(*eye, plain);
        eyes.iter().zip(&found).map(of_eye).collect()
    }

    /// The whole night.
    fn outer(&self) -> Interval {
        let edge = |moment| Edge {
            moment,
            cause: Cause::Noon,
        };
        Interval {
            start: edge(self.night.start),
            end: edge(self.night.end),
        }
    }

    /// Looks through an interval in which the body is clear of the skyline and the Sun is down.
    fn search(&self, stretch: Interval, eyes: &[Eye], found: &mut [Plain]) {
        let (lit, body) = (self.lit, self.track.body);
        let at_s = |edge: Edge| edge.moment.seconds_since(lit.watch.start);
        let samples = lit.around(at_s(stretch.start), at_s(stretch.end));
        let times_s = &lit.times_s[samples.clone()];
        let clearance = |at_s: &f64| lit.watch.sample(body, *at_s).clearance;
        let clearances: Vec<Angle> = times_s.iter().map(clearance).collect();
        let margins = lit.margins(body, eyes, samples);
        for ((eye, margins), plain) in eyes.iter().zip(&margins).zip(found) {
            let allowed = both(&[stretch], &self.allowed(*eye));
            for luck in Luck::ALL {
                let bright = self.bright_enough(*eye, luck, times_s, &margins[luck as usize]);
                plain.intervals[luck as usize].extend(both(&allowed, &bright));
            }
            let usual = times_s
                .iter()
                .zip(&clearances)
                .zip(&margins[Luck::Usual as usize]);
            plain
                .merits
                .extend(usual.map(|((at_s, clearance), mag)| (*at_s, merit(*clearance, *mag))));
        }
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
    fn allowed(&self, eye: Eye) -> Vec<Interval> {
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
        let cut = cut(self.outer(), from, to, Cause::Twilight);
        cut.into_iter().collect()
    }

    /// When the body outshines the eye's threshold, between the first and the last of some
    /// samples with their margins. What each end is due to is found later, for the ends that
    /// count.
    fn bright_enough(&self, eye: Eye, luck: Luck, times_s: &[f64], mags: &[f64]) -> Vec<Interval> {
        /// The spread is told to the minute.
        const SPREAD_TOLERANCE_S: f64 = 10.0;
        const TOLERANCE_S: f64 = 0.5;
        let tolerance_s = match luck {
            Luck::Usual => TOLERANCE_S,
            Luck::Kindest | Luck::Harshest => SPREAD_TOLERANCE_S,
        };
        let edge = |at_s: f64| Edge {
            moment: self.lit.watch.moment(at_s),
            cause: Cause::Twilight,
        };
        let (Some(first_s), Some(last_s)) = (times_s.first(), times_s.last()) else {
            return Vec::new();
        };
        let crossings = search::crossings_of_sampled(
            |at_s| self.lit.margin_mag(self.track.body, eye, luck, at_s),
            times_s,
            mags,
            tolerance_s,
        );
        let outer = Interval {
            start: edge(*first_s),
            end: edge(*last_s),
        };
        let starts_bright = mags.first().is_some_and(|first| *first >= 0.0);
        holding(
            outer,
            starts_bright,
            crossings.iter().map(|crossing| edge(crossing.at)),
        )
    }

    fn of_eye(&self, eye: Eye, plain: &Plain) -> EyeWindows {
        let night = self.windows_of(eye, plain, &plain.intervals, &[]);
        let half = |half| {
            let (from, to) = self.night.half(half);
            let parts = plain.intervals.each_ref().map(|intervals| {
                let cut = |whole: &Interval| cut(*whole, from, to, Cause::Half);
                intervals.iter().filter_map(cut).collect()
            });
            self.windows_of(eye, plain, &parts, &night)
        };
        EyeWindows {
            eye,
            dusk: half(Half::Dusk),
            dawn: half(Half::Dawn),
            night,
        }
    }

    /// Windows of the intervals; one that is among those known already is taken from there.
    fn windows_of(
        &self,
        eye: Eye,
        plain: &Plain,
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
                let best = self.best(eye, *interval, &plain.merits);
                self.window(eye, *interval, kindest, harshest, best)
            })
        };
        usual.iter().map(window).collect()
    }

    fn window(
        &self,
        eye: Eye,
        usual: Interval,
        kindest: &[Interval],
        harshest: &[Interval],
        best: Best,
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

    /// See [`Best`] for the rule: the best of the samples, then the top near it.
    fn best(&self, eye: Eye, interval: Interval, merits: &[(f64, f64)]) -> Best {
        const NEAR_S: f64 = 300.0;
        const TOLERANCE_S: f64 = 20.0;
        let (lit, body) = (self.lit, self.track.body);
        let exact = |at_s: f64| {
            let clearance = lit.watch.sample(body, at_s).clearance;
            merit(clearance, lit.margin_mag(body, eye, Luck::Usual, at_s))
        };
        let from_s = interval.start.moment.seconds_since(lit.watch.start);
        let to_s = interval.end.moment.seconds_since(lit.watch.start);
        let within = merits
            .iter()
            .filter(|(at_s, _)| (from_s..=to_s).contains(at_s));
        let crest_s = within
            .max_by(|a, b| a.1.total_cmp(&b.1))
            .map_or(0.5 * (from_s + to_s), |(at_s, _)| *at_s);
        let (low, high) = ((crest_s - NEAR_S).max(from_s), (crest_s + NEAR_S).min(to_s));
        // The crest can stand at an end that has no sample of its own.
        let top = search::extremum_between(exact, low, high, true, TOLERANCE_S);
        let (at_s, merit) = [(top.at, top.value), (low, exact(low)), (high, exact(high))]
            .into_iter()
            .max_by(|a, b| a.1.total_cmp(&b.1))
            .unwrap_or((crest_s, 0.0));
        let sample = lit.watch.sample(body, at_s);
        Best {
            moment: lit.watch.moment(at_s),
            azimuth: sample.azimuth,
            altitude: sample.refracted,
            clearance: sample.clearance,
            margin_mag: lit.margin_mag(body, eye, Luck::Usual, at_s),
            merit,
        }
    }
}
