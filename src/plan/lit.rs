//! The sky's light through a night, shared by all bodies and eyes.

use super::path::Cubic;
use super::sight::{Lamps, Luck, Sight, target};
use super::track::Watch;
use crate::light::{Eye, Glow, Margin};
use crate::measure::search;
use crate::sky::Body;
use std::ops::Range;

/// Seconds between samples. Margins turn over tens of minutes (the sky falls by 0.3 mag a
/// minute at its fastest, steadily), so a step of five minutes holds at most one turn.
const STEP_S: f64 = 300.0;

/// What stands for the margin of a body whose brightness is not known: never seen.
const UNKNOWN_MAG: f64 = -99.0;

/// The sky's light through the part of a night in which eyes are sent looking.
pub(super) struct Lit<'a> {
    pub watch: Watch<'a>,
    pub sight: &'a Sight,
    /// Seconds after the night's start, ascending.
    pub times_s: Vec<f64>,
    /// The sky at each of them, with each [`Luck`] in the air.
    glows: Vec<[Glow<'a>; Luck::ALL.len()]>,
}

/// One body's margins at some of the samples, for one eye with each luck.
pub(super) type Margins = [Vec<f64>; Luck::ALL.len()];

impl<'a> Lit<'a> {
    /// Samples the sky over a part of the night, seconds after its start.
    pub fn new(watch: Watch<'a>, sight: &'a Sight, part_s: Range<f64>) -> Self {
        let times_s = search::grid(part_s.start, part_s.end, STEP_S);
        let glow_at = |at_s: &f64| {
            let epoch = watch.span.at(watch.moment(*at_s));
            let lamps = Lamps::of(&epoch.seen_by(watch.observer));
            Luck::ALL.map(|luck| lamps.glow(sight.sky_with(luck)))
        };
        let glows = times_s.iter().map(glow_at).collect();
        Self {
            watch,
            sight,
            times_s,
            glows,
        }
    }

    /// The samples within an interval and the two just outside either end, which a cubic needs.
    pub fn around(&self, from_s: f64, to_s: f64) -> Range<usize> {
        let first = self.times_s.partition_point(|at_s| *at_s <= from_s);
        let past = self.times_s.partition_point(|at_s| *at_s < to_s);
        first.saturating_sub(2)..(past + 2).min(self.times_s.len())
    }

    /// A body's margins at the samples of a range, for each of the eyes.
    pub fn margins(&self, body: Body, eyes: &[Eye], samples: Range<usize>) -> Vec<Margins> {
        let mut margins: Vec<Margins> = eyes.iter().map(|_| Margins::default()).collect();
        for sample in samples {
            let epoch = self.watch.span.at(self.watch.moment(self.times_s[sample]));
            let target = target(&epoch.seen_by(self.watch.observer), body);
            for (luck, glow) in Luck::ALL.into_iter().zip(&self.glows[sample]) {
                let mut first: Option<Margin> = None;
                for (eye, margins) in eyes.iter().zip(&mut margins) {
                    let margin = target.map(|target| {
                        let gaze = self.sight.gaze_with(*eye, luck);
                        match &first {
                            Some(first) => first.for_gaze(&target, &gaze),
                            None => glow.margin(&target, &gaze),
                        }
                    });
                    first = first.or(margin);
                    let margin_mag = margin.map(|margin| margin.margin_mag);
                    margins[luck as usize].push(margin_mag.unwrap_or(UNKNOWN_MAG));
                }
            }
        }
        margins
    }

    /// A body's margin at any instant, magnitudes.
    pub fn margin_mag(&self, body: Body, eye: Eye, luck: Luck, at_s: f64) -> f64 {
        margin(self.watch, self.sight, (body, eye, luck), at_s)
            .map_or(UNKNOWN_MAG, |margin| margin.margin_mag)
    }
}

/// A body's margin for an eye at any instant; `None` where its brightness is not known.
pub(super) fn margin(
    watch: Watch<'_>,
    sight: &Sight,
    (body, eye, luck): (Body, Eye, Luck),
    at_s: f64,
) -> Option<Margin> {
    let epoch = watch.span.at(watch.moment(at_s));
    let view = epoch.seen_by(watch.observer);
    let target = target(&view, body)?;
    let glow = Lamps::of(&view).glow(sight.sky_with(luck));
    Some(glow.margin(&target, &sight.gaze_with(eye, luck)))
}

/// One body's margins for one eye at the samples of a night's light, and between them.
#[derive(Clone, Debug)]
pub(super) struct MarginRow {
    times_s: Range<f64>,
    /// Magnitudes; [`UNKNOWN_MAG`] at samples that were not looked at.
    mags: Vec<f32>,
}

impl MarginRow {
    /// Of samples that nobody has looked at.
    pub fn unknown(lit: &Lit<'_>) -> Self {
        let ends = (lit.times_s.first(), lit.times_s.last());
        let (Some(first), Some(last)) = ends else {
            unreachable!("a grid has two ends")
        };
        Self {
            times_s: *first..*last,
            mags: vec![UNKNOWN_MAG as f32; lit.times_s.len()],
        }
    }

    /// Puts the values from a sample on.
    pub fn put(&mut self, first: usize, mags: &[f64]) {
        for (known, mag) in self.mags[first..].iter_mut().zip(mags) {
            *known = *mag as f32;
        }
    }

    /// The samples with their times, seconds after the night's start.
    pub fn samples(&self) -> impl Iterator<Item = (f64, f64)> + '_ {
        let step_s = self.step_s();
        let row = self.mags.iter().enumerate();
        row.map(move |(k, mag)| (self.times_s.start + k as f64 * step_s, f64::from(*mag)))
    }

    fn step_s(&self) -> f64 {
        (self.times_s.end - self.times_s.start) / (self.mags.len() - 1) as f64
    }

    /// The margin between samples: a cubic where four of them are known, else straight.
    pub fn at(&self, at_s: f64) -> f64 {
        let place = (at_s - self.times_s.start) / self.step_s();
        let cubic = Cubic::at(place, self.mags.len());
        let mag = |k: usize| f64::from(self.mags[k]);
        if cubic.nodes().all(|k| mag(k) > UNKNOWN_MAG) {
            return cubic.of(mag);
        }
        let k = (place.max(0.0) as usize).min(self.mags.len() - 2);
        mag(k) + (place - k as f64) * (mag(k + 1) - mag(k))
    }
}
