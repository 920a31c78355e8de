//! What the Sun's state means for optics: the caution's model.

use super::scene::Scene;
use crate::measure::{Angle, Moment};
use crate::plan::Half;
use crate::sky::Body;

/// Nearer to the Sun than this, the caution is sterner.
const NEAR_THE_SUN: Angle = Angle::from_degrees(20.0);
/// The airless altitude of the Sun's centre at which it counts as up, by convention.
const SUN_UP: Angle = Angle::from_arcmin(-50.0);
/// How long before the end of the optics time it is said that it ends.
const WARNED_S: f64 = 30.0 * 60.0;

/// Where optics stand.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum OpticsState {
    /// The Sun does not go down far enough in this half: no optics time.
    NoTime,
    /// The Sun is up; caps stay on, at dusk until then at least.
    SunUp {
        /// The optics time of this dusk.
        until: Option<Moment>,
    },
    /// The Sun is down, but not for long enough.
    JustSet {
        /// The optics time.
        until: Moment,
    },
    /// The Sun is down.
    Open {
        /// When this dawn's optics time ends, if that is known to come.
        cap_by: Option<Moment>,
        /// Whether that is near.
        is_near: bool,
    },
    /// The Sun is about to rise: caps are on.
    AboutToRise {
        /// Sunrise.
        rise: Option<Moment>,
    },
}

/// The caution at one instant.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Caution {
    /// Where optics stand.
    pub optics: OpticsState,
    /// Seconds until that changes, where it will.
    pub changes_in_s: Option<f64>,
    /// Whether the chosen body stands so near the Sun that nobody may sweep for it.
    pub is_near_the_sun: bool,
    /// The chosen body's elongation.
    pub elongation: Angle,
}

impl Caution {
    /// The caution for what is shown.
    pub fn new(scene: &Scene<'_>) -> Self {
        let epoch = scene.span.at(scene.moment);
        let view = epoch.seen_by(scene.observer);
        let elongation = view.appearance(scene.body).elongation;
        let is_sun_up = view.place(Body::Sun).altitude > SUN_UP;
        let optics = optics_state(scene, is_sun_up);
        let changes_at = match optics {
            OpticsState::NoTime => None,
            OpticsState::SunUp { until } => until,
            OpticsState::JustSet { until } => Some(until),
            OpticsState::Open { cap_by, .. } => cap_by,
            OpticsState::AboutToRise { rise } => rise,
        };
        Self {
            optics,
            changes_in_s: changes_at.map(|at| at.seconds_since(scene.moment)),
            is_near_the_sun: elongation < NEAR_THE_SUN,
            elongation,
        }
    }

    /// Whether optics stay capped.
    pub fn is_capped(&self) -> bool {
        !matches!(self.optics, OpticsState::Open { .. })
    }
}

fn optics_state(scene: &Scene<'_>, is_sun_up: bool) -> OpticsState {
    let (from, until) = (scene.night.optics.from, scene.night.optics.until);
    match scene.half {
        Half::Dusk => match from {
            None => OpticsState::NoTime,
            Some(from) if scene.moment >= from => OpticsState::Open {
                cap_by: until,
                is_near: until.is_some_and(|at| at.seconds_since(scene.moment) < WARNED_S),
            },
            Some(from) if is_sun_up => OpticsState::SunUp { until: Some(from) },
            Some(from) => OpticsState::JustSet { until: from },
        },
        Half::Dawn => match until {
            None => OpticsState::NoTime,
            Some(until) if scene.moment < until => OpticsState::Open {
                cap_by: Some(until),
                is_near: until.seconds_since(scene.moment) < WARNED_S,
            },
            Some(_) if is_sun_up => OpticsState::SunUp { until: None },
            Some(_) => OpticsState::AboutToRise {
                rise: scene.night.sun.rise,
            },
        },
    }
}
