//! An event as a site has it.

use crate::measure::Angle;
use crate::place::Skyline;
use crate::sky::{Body, Epoch, Horizontal, Observer};

/// A place from which events are looked at.
#[derive(Clone, Copy, Debug)]
pub struct Lookout<'a> {
    /// Where on the Earth.
    pub observer: &'a Observer,
    /// What blocks the view there.
    pub skyline: &'a Skyline,
}

/// Where a body stands over a place at an instant.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Circumstances {
    /// Airless topocentric altitude and azimuth of the body's centre.
    pub place: Horizontal,
    /// Airless topocentric altitude of the Sun's centre.
    pub sun_altitude: Angle,
    /// Whether the body's centre, refracted, stands clear of the skyline.
    pub is_clear: bool,
}

impl Lookout<'_> {
    /// Where the body stands.
    pub(super) fn circumstances_at(&self, epoch: &Epoch<'_>, body: Body) -> Circumstances {
        let view = epoch.seen_by(self.observer);
        let place = view.place(body);
        let refracted = view.refracted(place);
        let clearance = self
            .skyline
            .clearance(refracted.azimuth, refracted.altitude);
        Circumstances {
            place,
            sun_altitude: view.place(Body::Sun).altitude,
            is_clear: clearance > Angle::ZERO,
        }
    }
}
