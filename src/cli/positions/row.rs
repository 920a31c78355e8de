//! What is told of one body at one instant from one place.

use crate::measure::{Angle, Moment};
use crate::place::standard_pressure_hpa;
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
}

impl Row {
    /// Works the row out; the span holds the body.
    pub fn new(span: &Span, moment: Moment, observer: &Observer, body: Body) -> Self {
        let epoch = span.at(moment);
        let view = epoch.seen_by(observer);
        let topocentric = view.topocentric(body);
        let place = view.horizontal(topocentric.direction);
        Self {
            body,
            moment,
            place,
            refracted_altitude: refracted(place.altitude, &observer.air),
            topocentric,
            geocentric: epoch.geocentric(body),
            appearance: epoch.appearance(body),
            topo_appearance: view.appearance(body),
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
