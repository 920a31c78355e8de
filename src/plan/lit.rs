//! The sky's light through a night, shared by all bodies and eyes.

use super::sight::{Lamps, Luck, Sight, target};
use super::track::Watch;
use crate::light::{Eye, Glow, Margin, Target};
use crate::measure::search;
use crate::sky::Body;

/// Seconds between samples. Margins turn over tens of minutes (the sky falls by 0.3 mag a
/// minute at its fastest, steadily), so a step of five minutes holds at most one turn.
const STEP_S: f64 = 300.0;

/// What stands for the margin of a body whose brightness is not known: never seen.
const UNKNOWN_MAG: f64 = -99.0;

/// The sky's light through a night.
pub(super) struct Lit<'a> {
    pub watch: Watch<'a>,
    pub sight: &'a Sight,
    /// Seconds after the night's start, ascending.
    pub times_s: Vec<f64>,
    /// The sky at each of them, with each [`Luck`] in the air.
    glows: Vec<[Glow<'a>; Luck::ALL.len()]>,
}

/// One body's margins at the samples, for one eye with each luck.
pub(super) type Margins = [Vec<f64>; Luck::ALL.len()];

impl<'a> Lit<'a> {
    /// Samples the sky over `[0, length_s]`.
    pub fn new(watch: Watch<'a>, sight: &'a Sight, length_s: f64) -> Self {
        let times_s = search::grid(0.0, length_s, STEP_S);
        let glows = times_s
            .iter()
            .map(|at_s| {
                let epoch = watch.span.at(watch.moment(*at_s));
                let lamps = Lamps::of(&epoch.seen_by(watch.observer));
                Luck::ALL.map(|luck| lamps.glow(sight.sky_with(luck)))
            })
            .collect();
        Self {
            watch,
            sight,
            times_s,
            glows,
        }
    }

    /// A body's margins at every sample, for each of the eyes.
    pub fn margins(&self, body: Body, eyes: &[Eye]) -> Vec<Margins> {
        let mut margins: Vec<Margins> = eyes.iter().map(|_| Margins::default()).collect();
        for (at_s, glows) in self.times_s.iter().zip(&self.glows) {
            let target = self.target(body, *at_s);
            for (luck, glow) in Luck::ALL.into_iter().zip(glows) {
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

    /// A body's margin at any instant.
    pub fn margin(&self, body: Body, eye: Eye, luck: Luck, at_s: f64) -> Option<Margin> {
        let epoch = self.watch.span.at(self.watch.moment(at_s));
        let view = epoch.seen_by(self.watch.observer);
        let target = target(&view, body)?;
        let glow = Lamps::of(&view).glow(self.sight.sky_with(luck));
        Some(glow.margin(&target, &self.sight.gaze_with(eye, luck)))
    }

    /// That margin as a number, magnitudes.
    pub fn margin_mag(&self, body: Body, eye: Eye, luck: Luck, at_s: f64) -> f64 {
        self.margin(body, eye, luck, at_s)
            .map_or(UNKNOWN_MAG, |margin| margin.margin_mag)
    }

    fn target(&self, body: Body, at_s: f64) -> Option<Target> {
        let epoch = self.watch.span.at(self.watch.moment(at_s));
        target(&epoch.seen_by(self.watch.observer), body)
    }
}
