//! One night over a site, whatever stands in the way: what every spot of it shares.

use super::bright::EyeSky;
use super::interval::Interval;
use super::night::{BodyNight, Cause, Edge, Night, NightError, NightRequest, SkylineEvent};
use super::passage::{Passage, Way};
use super::path::Path;
use super::sight::Sight;
use super::survey;
use super::track::Watch;
use super::windows::Searched;
use crate::light::Eye;
use crate::measure::{Angle, Moment};
use crate::place::Skyline;
use crate::sky::{Body, Ephemeris, Observer, Span};

/// Everything of a night that does not depend on the skyline: the Sun's times, where each body
/// stands all through it, when it rises and sets, and when it is bright enough for each eye.
///
/// Made once for a site's air, a date, eyes and bodies, in some 15 ms; [`NightSky::behind`] then
/// plans the night of any spot in one or two. It never changes, takes some 90 kB, and is
/// to be shared (in an [`std::sync::Arc`]) between threads. The sky is that of the site's mark: a
/// kilometre off everything stands 0.01° elsewhere, and comes 2 s sooner or later.
#[derive(Clone, Debug)]
pub struct NightSky {
    /// The night without its bodies.
    pub(super) bare: Night,
    pub(super) bodies: Vec<BodySky>,
    pub(super) observer: Observer,
    pub(super) sight: Sight,
    pub(super) span: Span,
}

/// One body through a night in which nothing stands in the way.
#[derive(Clone, Debug)]
pub(super) struct BodySky {
    pub body: Body,
    pub rise: Vec<Moment>,
    pub set: Vec<Moment>,
    pub is_up_at_start: bool,
    pub path: Path,
    pub eyes: Vec<EyeSky>,
}

impl NightSky {
    /// Goes through a night. The request's skyline plays no part.
    ///
    /// # Errors
    /// The date does not exist in the zone, or lies outside the supported years.
    pub fn new(ephemeris: &Ephemeris, request: &NightRequest<'_>) -> Result<Self, NightError> {
        survey::survey(ephemeris, request)
    }

    /// The night as it is seen from behind a skyline.
    pub fn behind(&self, skyline: &Skyline) -> Night {
        Night {
            bodies: self
                .bodies
                .iter()
                .map(|body| self.body_behind(body, skyline))
                .collect(),
            ..self.bare.clone()
        }
    }

    /// One body of that night alone; `None` if it was not asked for.
    pub fn body_night(&self, body: Body, skyline: &Skyline) -> Option<BodyNight> {
        Some(self.body_behind(self.body(body)?, skyline))
    }

    /// The night's Sun times, its halves and optics times, without any body.
    pub fn night(&self) -> &Night {
        &self.bare
    }

    /// Azimuth of a body's centre, and refracted altitude of the point of it that counts (a
    /// planet's centre, the Moon's upper limb), at a moment of the night; `None` if the body was
    /// not asked for.
    pub fn place(&self, body: Body, moment: Moment) -> Option<(Angle, Angle)> {
        let at_s = moment.seconds_since(self.bare.start);
        let seen = self.body(body)?.path.at(at_s);
        Some((seen.azimuth, seen.altitude))
    }

    pub(super) fn body(&self, body: Body) -> Option<&BodySky> {
        self.bodies.iter().find(|sky| sky.body == body)
    }

    pub(super) fn watch(&self) -> Watch<'_> {
        Watch {
            span: &self.span,
            observer: &self.observer,
            start: self.bare.start,
        }
    }

    fn body_behind(&self, sky: &BodySky, skyline: &Skyline) -> BodyNight {
        let passage = Passage::new(&sky.path, skyline);
        let skyline_events: Vec<SkylineEvent> = passage
            .crossings()
            .into_iter()
            .map(|crossing| {
                let seen = sky.path.at(crossing.at);
                SkylineEvent {
                    moment: self.watch().moment(crossing.at),
                    clears: crossing.rising,
                    azimuth: seen.azimuth,
                    altitude: seen.altitude,
                }
            })
            .collect();
        let eyes = Searched {
            night: self,
            body: sky,
            passage: &passage,
            skyline,
        }
        .windows(&skyline_events);
        BodyNight {
            body: sky.body,
            rise: sky.rise.clone(),
            set: sky.set.clone(),
            is_up_at_start: sky.is_up_at_start,
            is_clear_at_start: passage.starts_clear(),
            skyline_events,
            eyes,
        }
    }
}

impl BodySky {
    /// What an eye that was asked for has of it.
    pub fn eye(&self, eye: Eye) -> Option<&EyeSky> {
        self.eyes.iter().find(|sky| sky.eye == eye)
    }
}

impl Night {
    /// All of it, from noon to noon.
    pub(super) fn whole(&self) -> Interval {
        let edge = |moment| Edge {
            moment,
            cause: Cause::Noon,
        };
        Interval {
            start: edge(self.start),
            end: edge(self.end),
        }
    }
}
