//! When a body is bright enough for an eye, whatever stands in the way: everything of its
//! windows that does not depend on the skyline.

use super::interval::{Interval, both, cut, holding};
use super::lit::{self, Lit, MarginRow};
use super::night::{Cause, Edge, Night};
use super::sight::{Luck, Sight};
use super::survey::SUN_RISE_SET;
use super::track::{Sample, Track};
use crate::light::{Eye, Margin};
use crate::measure::{Angle, Moment, search};
use crate::sky::refraction;

/// How far below the level horizon a body is still looked at, so that the instant at which it
/// rises over any skyline lies within.
const BELOW_HORIZON: Angle = Angle::from_degrees(0.2);

/// One eye's view of a body through a night in which nothing stands in the way.
#[derive(Clone, Debug)]
pub(super) struct EyeSky {
    pub eye: Eye,
    /// When the body is bright enough and the eye sent looking, with each luck in air and eyes.
    pub bright: [Vec<Interval>; Luck::ALL.len()],
    /// The margins at those ends of the usual intervals that the light decides.
    pub at_ends: Vec<(Moment, Margin)>,
    /// The margins with usual luck all along.
    pub margins: MarginRow,
}

/// What the search for one body's light needs.
pub(super) struct Looked<'a> {
    pub track: &'a Track<'a>,
    pub lit: &'a Lit<'a>,
    pub bare: &'a Night,
}

impl Looked<'_> {
    /// The body for each of the eyes.
    pub fn eyes(&self, eyes: &[Eye]) -> Vec<EyeSky> {
        let sky = |eye: &Eye| EyeSky {
            eye: *eye,
            bright: Default::default(),
            at_ends: Vec::new(),
            margins: MarginRow::unknown(self.lit),
        };
        let mut skies: Vec<EyeSky> = eyes.iter().map(sky).collect();
        for stretch in both(&self.up(), &self.allowed(Eye::Visitor)) {
            self.look(stretch, eyes, &mut skies);
        }
        for sky in &mut skies {
            let ends = sky.bright[Luck::Usual as usize].iter();
            sky.at_ends = ends
                .flat_map(|interval| [interval.start, interval.end])
                .filter(|edge| edge.cause == Cause::Twilight)
                .filter_map(|edge| Some((edge.moment, self.margin(sky.eye, edge.moment)?)))
                .collect();
        }
        skies
    }

    fn margin(&self, eye: Eye, moment: Moment) -> Option<Margin> {
        let at_s = moment.seconds_since(self.lit.watch.start);
        let sight: &Sight = self.lit.sight;
        lit::margin(
            self.lit.watch,
            sight,
            (self.track.body, eye, Luck::Usual),
            at_s,
        )
    }

    /// The whole night.
    fn outer(&self) -> Interval {
        self.bare.whole()
    }

    /// When the body is up, over the level horizon or hardly below it.
    fn up(&self) -> Vec<Interval> {
        let air = &self.track.watch.observer.air;
        let above = |sample: &Sample| {
            let altitude = refraction::refracted(sample.airless + sample.limb, air);
            (altitude + BELOW_HORIZON).radians()
        };
        let edge = |crossing: &search::Crossing| Edge {
            moment: self.track.watch.moment(crossing.at),
            cause: Cause::Horizon,
        };
        let starts_up = self.track.samples.first().is_some_and(|s| above(s) >= 0.0);
        let crossings = self.track.crossings(above);
        holding(self.outer(), starts_up, crossings.iter().map(edge))
    }

    /// Looks through an interval in which the body is up and the Sun is down.
    fn look(&self, stretch: Interval, eyes: &[Eye], skies: &mut [EyeSky]) {
        let lit = self.lit;
        let at_s = |edge: Edge| edge.moment.seconds_since(lit.watch.start);
        let samples = lit.around(at_s(stretch.start), at_s(stretch.end));
        let times_s = &lit.times_s[samples.clone()];
        let margins = lit.margins(self.track.body, eyes, samples.clone());
        for (sky, margins) in skies.iter_mut().zip(&margins) {
            let allowed = both(&[stretch], &self.allowed(sky.eye));
            for luck in Luck::ALL {
                let bright = self.bright_enough(sky.eye, luck, times_s, &margins[luck as usize]);
                sky.bright[luck as usize].extend(both(&allowed, &bright));
            }
            sky.margins
                .put(samples.start, &margins[Luck::Usual as usize]);
        }
    }

    /// When an eye is sent looking at all: while the Sun is down, and through an instrument only
    /// within the optics times. What shines in daylight is looked for on purpose and by other
    /// rules, never from here.
    fn allowed(&self, eye: Eye) -> Vec<Interval> {
        let night = self.bare;
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
}
