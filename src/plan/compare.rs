//! The spots of a site side by side for one night.

use super::night::{Cause, Edge, Half, Window};
use super::{Absence, NightSky};
use crate::light::Eye;
use crate::measure::{Angle, Moment};
use crate::place::{Grounds, Instrument, Site, Skyline, Spot, Stature};
use crate::sky::Body;

/// What spots are compared for.
#[derive(Clone, Copy, Debug)]
pub struct CompareRequest<'a> {
    /// The site.
    pub site: &'a Site,
    /// The night over it, gone through for the body and the eye.
    pub night: &'a NightSky,
    /// Which body.
    pub body: Body,
    /// Whose eye.
    pub eye: Eye,
    /// Which half of the night.
    pub half: Half,
    /// How high the eye is.
    pub stature: Stature,
}

/// One spot's part of a comparison.
#[derive(Clone, Debug)]
pub struct SpotNight<'a> {
    /// The spot.
    pub spot: &'a Spot,
    /// Its skyline for the stature.
    pub skyline: Skyline,
    /// The body's windows, in order.
    pub windows: Vec<SpotWindow>,
    /// Why there are none, where there are none.
    pub absence: Option<Absence>,
    /// The instruments that stand there; those that stand wherever people do are not among them.
    pub kit: Vec<&'a Instrument>,
}

/// A window as it is seen from a spot.
#[derive(Clone, Debug, PartialEq)]
pub struct SpotWindow {
    /// The window, with its best moment.
    pub window: Window,
    /// How long it is.
    pub minutes: f64,
    /// The label of what the body comes out from behind; `None` where nothing labelled hid it.
    pub start_blocker: Option<String>,
    /// The label of what it goes behind.
    pub end_blocker: Option<String>,
}

impl SpotNight<'_> {
    /// The longest window.
    pub fn longest(&self) -> Option<&SpotWindow> {
        self.windows
            .iter()
            .max_by(|a, b| a.minutes.total_cmp(&b.minutes))
    }
}

/// Every given spot's windows of the body, in the order of the spots. A body or an eye that the
/// night was not gone through for gives none.
pub fn compare<'a>(request: &CompareRequest<'a>, spots: &'a [Spot]) -> Vec<SpotNight<'a>> {
    spots.iter().map(|spot| request.at(spot)).collect()
}

impl<'a> CompareRequest<'a> {
    fn at(&self, spot: &'a Spot) -> SpotNight<'a> {
        let night = self.night.night();
        let grounds = Grounds::new(self.site, Some(night.date));
        let skyline = grounds.skyline(spot, self.stature);
        let body = self.night.body_night(self.body, &skyline);
        let windows: Vec<SpotWindow> = body
            .iter()
            .flat_map(|body| body.windows_in(self.eye, self.half))
            .map(|window| self.window(*window, &skyline))
            .collect();
        let absence = body
            .filter(|_| windows.is_empty())
            .map(|body| body.absence(night, self.eye, self.half));
        let stands_here = |instrument: &&Instrument| instrument.spot() == Some(&spot.name);
        SpotNight {
            spot,
            skyline,
            windows,
            absence,
            kit: self.site.kit.iter().filter(stands_here).collect(),
        }
    }

    fn window(&self, window: Window, skyline: &Skyline) -> SpotWindow {
        /// Just beyond an end the body is hidden; a lamp post of 0.01 degrees hides it for 2 s.
        const BEYOND_S: f64 = 0.5;
        let blocker = |edge: Edge, beyond_s: f64| {
            (edge.cause == Cause::Skyline)
                .then(|| self.blocker(edge.moment.plus_seconds(beyond_s), skyline))
                .flatten()
        };
        SpotWindow {
            window,
            minutes: window.end.moment.seconds_since(window.start.moment) / 60.0,
            start_blocker: blocker(window.start, -BEYOND_S),
            end_blocker: blocker(window.end, BEYOND_S),
        }
    }

    fn blocker(&self, moment: Moment, skyline: &Skyline) -> Option<String> {
        let (azimuth, altitude): (Angle, Angle) = self.night.place(self.body, moment)?;
        let label = skyline.blocked_by(azimuth, altitude)??;
        Some(label.to_owned())
    }
}
