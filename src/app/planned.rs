//! One night's plan with everything that the drawings need beside it. Made when site, spot or
//! date change, never for a change of the moment.

use crate::light::Eye;
use crate::measure::TimeScales;
use crate::place::{Grounds, Site, Skyline, Spot, Stature};
use crate::plan::{Night, NightError, NightRequest, NightSky, Sight};
use crate::sky::{Body, Ephemeris, Observer, Span};
use chrono::NaiveDate;
use chrono_tz::Tz;
use std::sync::Arc;

/// A planned night.
#[derive(Clone, Debug)]
pub struct Planned {
    /// The plan for the bright bodies.
    pub night: Night,
    /// The same night whatever stands in the way: what every spot of the site shares.
    pub night_sky: Arc<NightSky>,
    /// All bodies over the night.
    pub span: Span,
    /// Place and air.
    pub observer: Observer,
    /// What blocks the view from the spot.
    pub skyline: Skyline,
    /// The site's civil zone.
    pub zone: Tz,
    /// How the sky is lit and whose eyes look.
    pub sight: Sight,
    /// Different for every plan made.
    pub count: u64,
    /// The count of the plan for which the sky was gone through: the same for all that differ in
    /// the skyline alone.
    pub sky_count: u64,
}

/// A spot on a site, as far as planning goes.
pub struct Standpoint {
    observer: Observer,
    skyline: Skyline,
    zone: Tz,
    sight: Sight,
}

impl Standpoint {
    /// What a spot on a site means for planning, for people of a stature; the date decides whether
    /// trees have leaves.
    ///
    /// # Errors
    /// The site's air, sky or kit is beyond what the light model takes.
    pub fn new(
        site: &Site,
        spot: &Spot,
        stature: Stature,
        date: NaiveDate,
    ) -> Result<Self, NightError> {
        Ok(Self {
            observer: site.observer(),
            skyline: Grounds::new(site, Some(date)).skyline(spot, stature),
            zone: site.zone(),
            sight: Sight::of_site(site)?,
        })
    }

    /// The request for a night seen from here.
    pub fn request(&self, date: NaiveDate, scales: TimeScales) -> NightRequest<'_> {
        NightRequest {
            observer: &self.observer,
            skyline: &self.skyline,
            zone: self.zone,
            date,
            scales,
            sight: &self.sight,
            eyes: &Eye::ALL,
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
        (date, scales): (NaiveDate, TimeScales),
        count: u64,
    ) -> Result<Planned, NightError> {
        let night_sky = NightSky::new(ephemeris, &self.request(date, scales))?;
        let night = night_sky.behind(&self.skyline);
        let span = ephemeris
            .cover(night.start.tt(), night.end.tt(), &Body::ALL)
            .map_err(|_| {
                NightError::OutOfRange(crate::measure::DateOutOfRange {
                    date: date.to_string(),
                })
            })?;
        Ok(Planned {
            night,
            night_sky: Arc::new(night_sky),
            span,
            observer: self.observer,
            skyline: self.skyline,
            zone: self.zone,
            sight: self.sight,
            count,
            sky_count: count,
        })
    }
}

impl Planned {
    /// The same night seen from behind another skyline of the same site; `count` is the new
    /// plan's own. A matter of milliseconds.
    #[must_use]
    pub fn behind(&self, skyline: Skyline, count: u64) -> Self {
        Self {
            night: self.night_sky.behind(&skyline),
            skyline,
            count,
            ..self.clone()
        }
    }
}
