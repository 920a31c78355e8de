//! One night's plan with everything that the drawings need beside it. Made when site, spot or
//! date change, never for a change of the moment.

use crate::light::Eye;
use crate::measure::TimeScales;
use crate::place::{Site, Skyline, Spot};
use crate::plan::{Night, NightError, NightRequest};
use crate::sky::{Body, Ephemeris, Observer, Span};
use chrono::NaiveDate;
use chrono_tz::Tz;

/// A planned night.
#[derive(Clone, Debug)]
pub struct Planned {
    /// The plan for the bright bodies.
    pub night: Night,
    /// All bodies over the night.
    pub span: Span,
    /// Place and air.
    pub observer: Observer,
    /// What blocks the view from the spot.
    pub skyline: Skyline,
    /// The site's civil zone.
    pub zone: Tz,
    /// Different for every plan made.
    pub count: u64,
}

/// A spot on a site, as far as planning goes.
pub struct Standpoint {
    observer: Observer,
    skyline: Skyline,
    zone: Tz,
}

impl Standpoint {
    /// What a spot on a site means for planning.
    pub fn new(site: &Site, spot: &Spot) -> Self {
        Self {
            observer: site.observer(),
            skyline: site.skyline(spot),
            zone: site.zone(),
        }
    }

    /// The request for a night seen from here.
    pub fn request(&self, date: NaiveDate, scales: TimeScales, eye: Eye) -> NightRequest<'_> {
        NightRequest {
            observer: &self.observer,
            skyline: &self.skyline,
            zone: self.zone,
            date,
            scales,
            eye,
            bodies: &Body::BRIGHT,
        }
    }

    /// Plans a night.
    ///
    /// # Errors
    /// The date does not exist in the zone, or lies outside the supported years.
    pub fn plan(
        self,
        ephemeris: &Ephemeris,
        (date, scales, eye): (NaiveDate, TimeScales, Eye),
        count: u64,
    ) -> Result<Planned, NightError> {
        let night = Night::plan(ephemeris, &self.request(date, scales, eye))?;
        let span = ephemeris
            .cover(night.start.tt(), night.end.tt(), &Body::ALL)
            .map_err(|_| {
                NightError::OutOfRange(crate::measure::DateOutOfRange {
                    date: date.to_string(),
                })
            })?;
        Ok(Planned {
            night,
            span,
            observer: self.observer,
            skyline: self.skyline,
            zone: self.zone,
            count,
        })
    }
}
