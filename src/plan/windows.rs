//! When a body is plain for an eye: clear of the skyline, in a sky dark enough.

use super::interval::{Interval, both, cut, holding};
use super::night::{Best, Cause, Edge, Half, Night, SkylineEvent, Window};
use super::track::{Sample, Track};
use crate::light::{self, Eye};
use crate::measure::{Angle, search};

/// What the search for one body's windows needs.
pub(super) struct Searched<'a> {
    pub track: &'a Track<'a>,
    pub sun: &'a Track<'a>,
    pub night: &'a Night,
    pub eye: Eye,
}

impl Searched<'_> {
    /// The windows of the whole night, of dusk and of dawn.
    pub fn windows(
        &self,
        skyline_events: &[SkylineEvent],
    ) -> (Vec<Window>, Vec<Window>, Vec<Window>) {
        let edge = |moment| Edge {
            moment,
            cause: Cause::Noon,
        };
        let outer = Interval {
            start: edge(self.night.start),
            end: edge(self.night.end),
        };
        let clear = holding(
            outer,
            self.track
                .samples
                .first()
                .is_some_and(|first| first.clearance > Angle::ZERO),
            skyline_events.iter().map(|event| self.skyline_edge(event)),
        );
        let dark = self.dark_enough(outer);
        let plain = both(&clear, &dark);
        let half = |half| {
            let (from, to) = self.night.half(half);
            let within = plain
                .iter()
                .filter_map(|whole| cut(*whole, from, to, Cause::Half));
            within.map(|part| self.window(part)).collect()
        };
        let whole = plain
            .iter()
            .map(|interval| self.window(*interval))
            .collect();
        (whole, half(Half::Dusk), half(Half::Dawn))
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

    /// When the sky is dark enough for the body.
    fn dark_enough(&self, outer: Interval) -> Vec<Interval> {
        let Some(limit) = light::sun_altitude_limit(self.track.body) else {
            return Vec::new();
        };
        let depth = |sample: &Sample| (limit - sample.airless).radians();
        holding(
            outer,
            self.sun
                .samples
                .first()
                .is_some_and(|first| depth(first) > 0.0),
            self.sun.crossings(depth).into_iter().map(|crossing| Edge {
                moment: self.sun.watch.moment(crossing.at),
                cause: Cause::Twilight,
            }),
        )
    }

    fn window(&self, interval: Interval) -> Window {
        Window {
            eye: self.eye,
            start: interval.start,
            end: interval.end,
            best: self.best(interval),
        }
    }

    /// See [`Best`] for the rule.
    fn best(&self, interval: Interval) -> Best {
        /// Merits turn over hours, but the lesser of two can have a crest anywhere; ten minutes
        /// find the right one and the golden section then finds its top.
        const STEP_S: f64 = 600.0;
        let watch = &self.track.watch;
        let limit = light::sun_altitude_limit(self.track.body).unwrap_or_default();
        let merit = |at_s: f64| {
            let clearance = watch.sample(self.track.body, at_s).clearance;
            let depth = limit - watch.sample(crate::sky::Body::Sun, at_s).airless;
            (clearance.degrees() / 10.0).min(depth.degrees() / 5.0)
        };
        let from_s = interval.start.moment.seconds_since(watch.start);
        let to_s = interval.end.moment.seconds_since(watch.start);
        let samples = search::grid(from_s, to_s, STEP_S);
        let crest = samples
            .iter()
            .map(|at_s| (*at_s, merit(*at_s)))
            .max_by(|a, b| a.1.total_cmp(&b.1))
            .map_or(from_s, |(at_s, _)| at_s);
        let (low, high) = ((crest - STEP_S).max(from_s), (crest + STEP_S).min(to_s));
        let top = search::extremum_between(merit, low, high, true, 1.0);
        let at_s = if top.value >= merit(crest) {
            top.at
        } else {
            crest
        };
        let sample = watch.sample(self.track.body, at_s);
        Best {
            moment: watch.moment(at_s),
            azimuth: sample.azimuth,
            altitude: sample.refracted,
            clearance: sample.clearance,
            merit: merit(at_s),
        }
    }
}
