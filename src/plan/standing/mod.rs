//! Where to stand: how long each square metre of the grounds sees a body, and when.
//!
//! [`Standing`] holds what all places share: for each night the times at which the body is bright
//! enough for the eye, and its way across the sky in them. [`Standing::stay`] answers for one
//! viewpoint, [`Standing::map`] for the whole grounds; a [`StandingMap`] then tells the best
//! places, the contours and the way to more minutes.

mod best;
mod contours;
mod map;
mod raster;
mod rays;

pub use best::Gain;
pub use contours::Contour;
pub use map::{Cell, StandingMap, WhyLeftOut};
pub use raster::Raster;

use super::night::Half;
use super::night_sky::NightSky;
use crate::light::Eye;
use crate::measure::Moment;
use crate::place::{PreparedGrounds, Site, Skyline, Spot, Stature, TerrainView, Viewpoint};
use crate::sky::Body;
use rays::NightRays;

/// What a standing map is asked for.
#[derive(Clone, Copy, Debug)]
pub struct StandingRequest<'a> {
    /// The site.
    pub site: &'a Site,
    /// One night or several over it: each must have been gone through for the body and the eye.
    pub nights: &'a [&'a NightSky],
    /// Which body.
    pub body: Body,
    /// Whose eye.
    pub eye: Eye,
    /// Which half of each night.
    pub half: Half,
    /// How high the eye is.
    pub stature: Stature,
}

/// What somebody at a place has of a body.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Stay {
    /// The longest window of the first night, from and until; `None` where there is none.
    pub window: Option<(Moment, Moment)>,
    /// Minutes of the longest window, summed over the nights.
    pub minutes: f64,
    /// The least that one of the nights gives, minutes of its longest window.
    pub least_minutes: f64,
    /// Minutes of all windows of all nights.
    pub total_minutes: f64,
}

impl Stay {
    /// The same with the least that one of the nights gives as its minutes.
    #[must_use]
    pub fn by_least(self) -> Self {
        Self {
            minutes: self.least_minutes,
            ..self
        }
    }
}

/// A standing map before any place is asked about: shared by threads.
#[derive(Debug)]
pub struct Standing<'a> {
    request: StandingRequest<'a>,
    nights: Vec<NightRays<'a>>,
}

impl<'a> Standing<'a> {
    /// Takes from the nights when the body is bright enough, whatever stands in the way.
    pub fn new(request: StandingRequest<'a>) -> Self {
        let nights = request.nights.iter();
        Self {
            request,
            nights: nights.map(|sky| NightRays::new(sky, &request)).collect(),
        }
    }

    /// What it was asked for.
    pub fn request(&self) -> &StandingRequest<'a> {
        &self.request
    }

    /// What an eye at a viewpoint has, near parts of measured skylines left out.
    pub fn stay(&self, viewpoint: Viewpoint) -> Stay {
        self.over_nights(|night| night.grounds.skyline_from(viewpoint))
    }

    /// The same for one of many places, with terrain as it is seen from nearby.
    fn stay_near(&self, viewpoint: Viewpoint, terrain: &TerrainView) -> Stay {
        self.over_nights(|night| night.skyline(viewpoint, terrain))
    }

    /// What somebody of the stature has at a spot, with the skyline measured there.
    pub fn stay_at_spot(&self, spot: &Spot, stature: Stature) -> Stay {
        self.over_nights(|night| night.grounds.skyline(spot, stature))
    }

    /// What the eye would have with nothing in the way.
    pub fn stay_in_the_open(&self) -> Stay {
        self.over_nights(|_| Skyline::open())
    }

    /// The surroundings that all nights share: where one cannot stand.
    fn grounds(&self) -> Option<&PreparedGrounds<'a>> {
        self.nights.first().map(|night| &night.grounds)
    }

    fn over_nights(&self, skyline: impl Fn(&NightRays<'_>) -> Skyline) -> Stay {
        let mut stay = Stay::default();
        for (index, night) in self.nights.iter().enumerate() {
            let behind = night.behind(&skyline(night));
            let minutes = behind.longest_minutes();
            stay.minutes += minutes;
            stay.total_minutes += behind.total_s / 60.0;
            if index == 0 {
                stay.window = behind
                    .longest_s
                    .map(|(from_s, to_s)| (night.moment(from_s), night.moment(to_s)));
                stay.least_minutes = minutes;
            }
            stay.least_minutes = stay.least_minutes.min(minutes);
        }
        stay
    }
}
