//! What is told of one body at one instant from one place.

use super::seen::{Seen, Skies};
use crate::measure::{Angle, Moment};
use crate::place::standard_pressure_hpa;
use crate::plan::target;
use crate::sky::refraction::refracted;
use crate::sky::{Air, Apparent, Appearance, Body, Horizontal, Observer, Span};

/// One body at one instant from one place.
#[derive(Clone, Copy, Debug)]
pub(super) struct Row {
    pub body: Body,
    pub moment: Moment,
    pub place: Horizontal,
    pub refracted_altitude: Angle,
    pub topocentric: Apparent,
    pub geocentric: Apparent,
    pub appearance: Appearance,
    pub topo_appearance: Appearance,
    /// `None` for the Sun, below the horizon, and where no brightness is known.
    pub seen: Option<Seen>,
}

impl Row {
    /// Works the row out; the span holds the body and the Moon.
    pub fn new(
        span: &Span,
        moment: Moment,
        observer: &Observer,
        body: Body,
        skies: &mut Skies,
    ) -> Self {
        let epoch = span.at(moment);
        let view = epoch.seen_by(observer);
        let topocentric = view.topocentric(body);
        let place = view.horizontal(topocentric.direction);
        let refracted_altitude = refracted(place.altitude, &observer.air);
        let topo_appearance = view.appearance(body);
        let is_sought = body != Body::Sun && refracted_altitude >= Angle::ZERO;
        let seen = is_sought
            .then(|| target(&view, body))
            .flatten()
            .and_then(|target| skies.seen(&view, moment, observer, &target));
        Self {
            body,
            moment,
            place,
            refracted_altitude,
            topocentric,
            geocentric: epoch.geocentric(body),
            appearance: epoch.appearance(body),
            topo_appearance,
            seen,
        }
    }
}

/// An observer in the standard atmosphere's pressure at that elevation and 10 °C.
pub(super) fn observer(latitude_deg: f64, longitude_deg: f64, elevation_m: f64) -> Observer {
    Observer {
        latitude: Angle::from_degrees(latitude_deg),
        longitude: Angle::from_degrees(longitude_deg),
        elevation_m,
        air: Air {
            pressure_hpa: standard_pressure_hpa(elevation_m),
            ..Air::default()
        },
    }
}
