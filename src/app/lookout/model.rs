//! Where every bright body stands, minute by minute through one half-night: what the horizon
//! view, the fade and the plot are all made from.

use super::lights::Lights;
use crate::app::scene::Scene;
use crate::light::{Eye, Standing};
use crate::measure::{Angle, Moment, TimeScales, civil, search};
use crate::plan::Half;
use crate::sky::{Body, Epoch, Observer, refraction};
use chrono::Timelike;
use chrono_tz::Tz;

/// The Sun's centre at rising and setting by convention.
pub const SUN_RISE_SET: Angle = Angle::from_arcmin(-50.0);

/// Seconds between samples.
const STEP_S: f64 = 60.0;

/// The half-night in samples. Times are seconds after its start.
#[derive(Clone, Debug)]
pub struct Tracks {
    /// When the half-night starts.
    pub start: Moment,
    /// How long it is, seconds.
    pub length_s: f64,
    /// The Sun's samples; clearance and standing as for a body, of its upper limb.
    pub sun: Vec<Sample>,
    /// Every bright body's samples, in the order of [`Body::BRIGHT`].
    pub bodies: Vec<(Body, Vec<Sample>)>,
}

/// A body at one instant.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Sample {
    /// Seconds after the half-night's start.
    pub at_s: f64,
    /// Azimuth, [0°, 360°).
    pub azimuth: Angle,
    /// Refracted altitude of the centre.
    pub altitude: Angle,
    /// Refracted altitude of the point that counts: the upper limb of the Sun and the Moon.
    pub counting: Angle,
    /// How far that point stands from what blocks.
    pub clearance: Angle,
    /// Airless altitude of the Sun's centre.
    pub sun_altitude: Angle,
    /// Magnitudes by which it outshines the threshold of each eye, in the order of
    /// [`Eye::ALL`]; the Sun's are zero.
    pub margins_mag: [f64; 4],
    /// The same for the scene's eye, in the harshest and in the kindest air.
    pub spread_mag: (f64, f64),
    /// What the body is for the scene's eye.
    pub standing: Standing,
}

impl Tracks {
    /// Samples the half-night.
    pub fn new(scene: &Scene<'_>) -> Self {
        let (start, end) = scene.ends();
        let length_s = end.seconds_since(start);
        let mut sun = Vec::new();
        let mut bodies: Vec<(Body, Vec<Sample>)> = Body::BRIGHT
            .iter()
            .map(|body| (*body, Vec::new()))
            .collect();
        for at_s in search::grid(0.0, length_s, STEP_S) {
            let epoch = scene.span.at(start.plus_seconds(at_s));
            let lights = Lights::new(scene, &epoch);
            let sample = |body| Sample::new(scene, &epoch, &lights, body, at_s);
            sun.push(sample(Body::Sun));
            for (body, samples) in &mut bodies {
                samples.push(sample(*body));
            }
        }
        Self {
            start,
            length_s,
            sun,
            bodies,
        }
    }

    /// The same half-night from behind the scene's skyline, which these samples need not have
    /// been made for: the sky is not gone through again.
    #[must_use]
    pub fn behind(&self, scene: &Scene<'_>) -> Self {
        let behind = |samples: &[Sample]| samples.iter().map(|s| s.behind(scene)).collect();
        Self {
            sun: behind(&self.sun),
            bodies: self
                .bodies
                .iter()
                .map(|(body, samples)| (*body, behind(samples)))
                .collect(),
            ..*self
        }
    }

    /// One body's samples; empty for one that is not bright.
    pub fn body(&self, body: Body) -> &[Sample] {
        match body {
            Body::Sun => &self.sun,
            _ => self
                .bodies
                .iter()
                .find(|(known, _)| *known == body)
                .map_or(&[], |(_, samples)| samples),
        }
    }

    /// Seconds from the half-night's start to a moment, kept within the half-night.
    pub fn at_s(&self, moment: Moment) -> f64 {
        moment.seconds_since(self.start).clamp(0.0, self.length_s)
    }

    /// The moment so many seconds after the start.
    pub fn moment(&self, at_s: f64) -> Moment {
        self.start.plus_seconds(at_s)
    }

    /// The moment of the whole local minute nearest to a time, within the half-night.
    pub fn whole_minute(&self, scales: TimeScales, zone: Tz, at_s: f64) -> Moment {
        let local = civil::local(scales.civil(self.moment(at_s)).0, zone);
        let into_s = f64::from(local.second()) + f64::from(local.nanosecond()) * 1e-9;
        let back_s = if into_s < 30.0 { into_s } else { into_s - 60.0 };
        self.moment((at_s - back_s).clamp(0.0, self.length_s))
    }

    /// The Sun's airless altitude at a time, straight between samples.
    pub fn sun_altitude(&self, at_s: f64) -> Angle {
        between(&self.sun, at_s, |sample| sample.sun_altitude)
    }
}

impl Sample {
    /// A body at the instant of `epoch`.
    pub fn new(
        scene: &Scene<'_>,
        epoch: &Epoch<'_>,
        lights: &Lights<'_>,
        body: Body,
        at_s: f64,
    ) -> Self {
        let view = epoch.seen_by(scene.observer);
        let place = view.place(body);
        let altitude = refracted(place.altitude, scene.observer);
        let counting = match body {
            Body::Sun | Body::Moon => view.refracted_upper_limb(body).altitude,
            _ => altitude,
        };
        let clearance = scene.skyline.clearance(place.azimuth, counting);
        let (margins_mag, spread_mag) = lights.margins(&view, body);
        let margin_mag = margin_of(scene.eye, lights.sun_altitude, &margins_mag);
        Self {
            at_s,
            azimuth: place.azimuth,
            altitude,
            counting,
            clearance,
            sun_altitude: lights.sun_altitude,
            margins_mag,
            spread_mag,
            standing: Standing::of(counting, clearance, margin_mag),
        }
    }

    /// The same from behind the scene's skyline.
    fn behind(self, scene: &Scene<'_>) -> Self {
        let clearance = scene.skyline.clearance(self.azimuth, self.counting);
        let margin_mag = margin_of(scene.eye, self.sun_altitude, &self.margins_mag);
        Self {
            clearance,
            standing: Standing::of(self.counting, clearance, margin_mag),
            ..self
        }
    }
}

/// The margin that counts for an eye. Nobody is sent looking while the Sun is up, whatever shines
/// then.
fn margin_of(eye: Eye, sun_altitude: Angle, margins_mag: &[f64; 4]) -> f64 {
    match Eye::ALL.iter().position(|known| *known == eye) {
        Some(number) if sun_altitude < SUN_RISE_SET => margins_mag[number],
        _ => f64::NEG_INFINITY,
    }
}

/// A quantity of the samples at a time, straight between them.
pub fn between(samples: &[Sample], at_s: f64, quantity: impl Fn(&Sample) -> Angle) -> Angle {
    let after = samples.partition_point(|sample| sample.at_s <= at_s);
    match (
        after.checked_sub(1).and_then(|k| samples.get(k)),
        samples.get(after),
    ) {
        (Some(a), Some(b)) => {
            let share = (at_s - a.at_s) / (b.at_s - a.at_s);
            quantity(a) + (quantity(b) - quantity(a)) * share
        }
        (Some(only), None) | (None, Some(only)) => quantity(only),
        (None, None) => Angle::ZERO,
    }
}

fn refracted(airless: Angle, observer: &Observer) -> Angle {
    refraction::refracted(airless, &observer.air)
}

/// A whole local ten minutes of the half-night.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Tick {
    /// Seconds after the half-night's start.
    pub at_s: f64,
    /// Minutes after the local hour: 0, 10, 20, 30, 40 or 50.
    pub minute: u32,
}

/// The whole local ten minutes between two times of the half-night, in order.
pub fn ticks(tracks: &Tracks, scales: TimeScales, zone: Tz, from_s: f64, to_s: f64) -> Vec<Tick> {
    const TEN_MINUTES_S: f64 = 600.0;
    let local = |at_s: f64| civil::local(scales.civil(tracks.moment(at_s)).0, zone);
    let first = local(from_s);
    let into_s =
        f64::from(first.minute() % 10 * 60 + first.second()) + f64::from(first.nanosecond()) * 1e-9;
    // Civil time is known to the microsecond; one just short of a tick is the tick.
    let wait_s = if into_s < 1e-3 {
        0.0
    } else {
        TEN_MINUTES_S - into_s
    };
    let count = ((to_s - from_s - wait_s) / TEN_MINUTES_S).floor();
    // Clocks are turned by whole tens of minutes, so ticks stay ticks.
    (0..=count.max(-1.0) as i64)
        .filter(|_| count >= 0.0)
        .map(|k| {
            let at_s = from_s + wait_s + k as f64 * TEN_MINUTES_S;
            Tick {
                at_s,
                minute: local(at_s + 1.0).minute() / 10 * 10,
            }
        })
        .collect()
}

/// The part of the half-night that the fade shows, seconds after its start: at dusk from an hour
/// before sunset to the later of the end of astronomical twilight and twenty minutes after the
/// chosen body's last window; at dawn the mirror image. The whole half where the Sun neither
/// sets nor rises in it.
pub fn shown_span(scene: &Scene<'_>) -> (f64, f64) {
    const DAYLIGHT_S: f64 = 3600.0;
    const AFTER_WINDOW_S: f64 = 1200.0;
    let (start, end) = scene.ends();
    let length_s = end.seconds_since(start);
    let at_s = |moment: Moment| moment.seconds_since(start);
    let windows = scene
        .night
        .body(scene.body)
        .map_or(&[][..], |night| night.windows_in(scene.eye, scene.half));
    let sun = &scene.night.sun;
    let (from, to) = match scene.half {
        Half::Dusk => {
            let Some(set) = sun.set else {
                return (0.0, length_s);
            };
            let dark = sun.astronomical_dusk.map_or(length_s, at_s);
            let last = windows.last().map_or(0.0, |window| at_s(window.end.moment));
            (at_s(set) - DAYLIGHT_S, dark.max(last + AFTER_WINDOW_S))
        }
        Half::Dawn => {
            let Some(rise) = sun.rise else {
                return (0.0, length_s);
            };
            let dark = sun.astronomical_dawn.map_or(0.0, at_s);
            let first = windows
                .first()
                .map_or(length_s, |window| at_s(window.start.moment));
            (dark.min(first - AFTER_WINDOW_S), at_s(rise) + DAYLIGHT_S)
        }
    };
    (from.max(0.0), to.min(length_s))
}
