//! Everything that the Lookout's drawings are made from.

use super::command::OpticsView;
use super::palette::Look;
use crate::light::Eye;
use crate::measure::{Moment, TimeScales};
use crate::place::{Site, Skyline, Spot};
use crate::plan::{Half, Night, Sight};
use crate::sky::{Body, Ephemeris, Observer, Span};
use crate::words::{CivilClock, HalfNight, Words};
use chrono_tz::Tz;

/// One half-night at one spot, and the moment in it that is shown. Plain references: a drawing
/// makes its own model from them, and keeps what is costly keyed by [`SceneKey`].
#[derive(Clone, Copy)]
pub struct Scene<'a> {
    /// The site.
    pub site: &'a Site,
    /// Where on it.
    pub spot: &'a Spot,
    /// Place and air.
    pub observer: &'a Observer,
    /// What blocks the view from the spot.
    pub skyline: &'a Skyline,
    /// The night's plan; holds the bright bodies.
    pub night: &'a Night,
    /// Which half of it.
    pub half: Half,
    /// The chosen body.
    pub body: Body,
    /// Whose eye.
    pub eye: Eye,
    /// How the sky is lit and whose eyes look.
    pub sight: &'a Sight,
    /// The instant shown, within the half.
    pub moment: Moment,
    /// All nine bodies over the whole night with room on either side.
    pub span: &'a Span,
    /// The site's civil zone.
    pub zone: Tz,
    /// The theories themselves, for what reaches beyond the night (orbits, neighbouring events).
    pub ephemeris: &'a Ephemeris,
    /// How civil time leads to TT.
    pub scales: TimeScales,
    /// The wording.
    pub words: &'a Words,
    /// How the chosen optics show the disc.
    pub optics_view: OpticsView,
    /// Colours and sizes in the present theme.
    pub look: Look,
    /// Changes whenever the plan is made anew (site, spot, date): with half, body and theme it
    /// keys what a drawing keeps between frames.
    pub night_count: u64,
    /// Changes only when the sky itself is gone through anew (another site, date or air), not
    /// when the skyline alone is another.
    pub sky_count: u64,
}

/// What the half-night's sentence depends on: everything but moment and colours.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct SceneKey {
    night_count: u64,
    half: Half,
    body: Body,
    eye: Eye,
}

impl Scene<'_> {
    /// The key of everything but moment and colours.
    pub fn key(&self) -> SceneKey {
        SceneKey {
            night_count: self.night_count,
            half: self.half,
            body: self.body,
            eye: self.eye,
        }
    }

    /// The site's clock.
    pub fn clock(&self) -> CivilClock {
        CivilClock {
            scales: self.scales,
            zone: self.zone,
        }
    }

    /// The half-night as words speak of it.
    pub fn half_night(&self) -> HalfNight<'_> {
        HalfNight {
            night: self.night,
            half: self.half,
            body: self.body,
            eye: self.eye,
            skyline: self.skyline,
            clock: self.clock(),
        }
    }

    /// Start and end of the half-night.
    pub fn ends(&self) -> (Moment, Moment) {
        self.night.half(self.half)
    }
}
