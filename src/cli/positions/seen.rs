//! How a body in a row stands to the sky behind it and to eyes, in usual air under a usual sky.

use crate::light::{Conditions, Eye, Eyes, Gaze, SkyLight, Target};
use crate::measure::Moment;
use crate::place::Site;
use crate::plan::Lamps;
use crate::sky::{Observer, View};
use chrono_tz::Tz;
use std::collections::HashMap;
use std::collections::hash_map::Entry;

/// What the sky behind a body and the air before it leave of it.
#[derive(Clone, Copy, Debug)]
pub(super) struct Seen {
    /// Luminance of the sky behind it, cd/m².
    pub sky_cd_m2: f64,
    /// What the air takes, magnitudes.
    pub extinction_mag: f64,
    /// The faintest magnitude, after extinction, that a visitor sees there.
    pub limit_mag: f64,
    /// By how much each of [`Eye::ALL`] sees it, magnitudes: seen at 0 and above.
    pub margins_mag: [f64; Eye::ALL.len()],
}

/// The skies over places of several elevations, and what lit the last one asked for.
pub(super) struct Skies {
    kept: HashMap<i32, SkyLight>,
    gazes: [Gaze; Eye::ALL.len()],
    last: Option<(Moment, Observer, Lamps)>,
}

impl Default for Skies {
    fn default() -> Self {
        let eyes = Eyes::default();
        Self {
            kept: HashMap::new(),
            gazes: Eye::ALL.map(|eye| eyes.gaze(eye)),
            last: None,
        }
    }
}

impl Skies {
    /// A sky is made for each multiple of this and kept, which bounds time and memory. Half of
    /// it changes the extinction by 0.0003 mag an airmass.
    const STEP_M: f64 = 50.0;

    /// How a target stands to the sky and to eyes at the instant of the view.
    pub fn seen(
        &mut self,
        view: &View<'_>,
        moment: Moment,
        observer: &Observer,
        target: &Target,
    ) -> Option<Seen> {
        let lamps = match &self.last {
            Some((at, from, lamps)) if *at == moment && from == observer => *lamps,
            _ => {
                let lamps = Lamps::of(view);
                self.last = Some((moment, *observer, lamps));
                lamps
            }
        };
        let step = (observer.elevation_m / Self::STEP_M).round();
        let sky = match self.kept.entry(step as i32) {
            Entry::Occupied(kept) => kept.into_mut(),
            Entry::Vacant(free) => {
                free.insert(SkyLight::new(usual_conditions(step * Self::STEP_M)?))
            }
        };
        let margins = lamps.glow(sky).margins(target, &self.gazes);
        let visitor = &margins[Eye::Visitor as usize];
        Some(Seen {
            sky_cd_m2: visitor.luminance.total(),
            extinction_mag: visitor.extinction_mag,
            limit_mag: visitor.limit_mag,
            margins_mag: margins.map(|margin| margin.margin_mag),
        })
    }
}

/// What a site file that says nothing of its air and its night has at that elevation.
fn usual_conditions(elevation_m: f64) -> Option<Conditions> {
    let mut site = Site::new("usual", 0.0, 0.0, Tz::UTC).ok()?;
    site.elevation_m = elevation_m;
    Conditions::of_site(&site).ok()
}
