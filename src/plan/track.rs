//! One body's way across a site's sky, sampled through a night.

use crate::measure::{Angle, Moment};
use crate::sky::{Body, Observer, Span};

/// Astronomical unit, km (IAU 2012 Resolution B2).
const AU_KM: f64 = 149_597_870.7;

/// Seconds between samples. A body's altitude turns only at its culminations, hours apart, and
/// its azimuth moves by a few degrees in a step, so that a step holds at most one turn of
/// either. A second setting within minutes of a first rising is a turn on the near side of zero,
/// which the search looks at whatever the step.
const STEP_S: f64 = 300.0;

/// Where a body is, at one instant, over one site.
#[derive(Clone, Copy, Debug)]
pub(super) struct Sample {
    /// Seconds after the night's start.
    pub at_s: f64,
    /// Azimuth of the centre.
    pub azimuth: Angle,
    /// Airless altitude of the centre.
    pub airless: Angle,
    /// Half of the body's apparent diameter where its upper limb counts, else zero.
    pub limb: Angle,
}

/// Who looks, from where, and when.
#[derive(Clone, Copy, Debug)]
pub(super) struct Watch<'a> {
    pub span: &'a Span,
    pub observer: &'a Observer,
    pub start: Moment,
}

impl Watch<'_> {
    /// The instant so many seconds after the start.
    pub fn moment(&self, at_s: f64) -> Moment {
        self.start.plus_seconds(at_s)
    }

    /// Where a body is then. The Sun's limb counts as the Moon's does.
    pub fn sample(&self, body: Body, at_s: f64) -> Sample {
        let epoch = self.span.at(self.moment(at_s));
        let view = epoch.seen_by(self.observer);
        let apparent = view.topocentric(body);
        let place = view.horizontal(apparent.direction);
        let limb = match body {
            Body::Sun | Body::Moon => {
                let distance_km = apparent.distance_au * AU_KM;
                Angle::from_radians((body.equatorial_radius_km() / distance_km).asin())
            }
            _ => Angle::ZERO,
        };
        Sample {
            at_s,
            azimuth: place.azimuth,
            airless: place.altitude,
            limb,
        }
    }
}

/// A body's samples through a night, in time order.
#[derive(Clone, Debug)]
pub(super) struct Track<'a> {
    pub watch: Watch<'a>,
    pub body: Body,
    pub samples: Vec<Sample>,
}

impl<'a> Track<'a> {
    /// Samples at even steps over `[0, length_s]`.
    pub fn new(watch: Watch<'a>, body: Body, length_s: f64) -> Self {
        let samples = crate::measure::search::grid(0.0, length_s, STEP_S)
            .into_iter()
            .map(|at_s| watch.sample(body, at_s))
            .collect();
        Self {
            watch,
            body,
            samples,
        }
    }

    /// Where a quantity of the samples crosses zero, to 10 ms: seconds after the start, and
    /// whether it grows.
    pub fn crossings(
        &self,
        quantity: impl Fn(&Sample) -> f64,
    ) -> Vec<crate::measure::search::Crossing> {
        const TOLERANCE_S: f64 = 0.01;
        let at_s: Vec<f64> = self.samples.iter().map(|sample| sample.at_s).collect();
        let values: Vec<f64> = self.samples.iter().map(&quantity).collect();
        crate::measure::search::crossings_of_sampled(
            |at_s| quantity(&self.watch.sample(self.body, at_s)),
            &at_s,
            &values,
            TOLERANCE_S,
        )
    }
}
