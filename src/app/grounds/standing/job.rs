//! The map's work: what is asked, and what the worker's thread answers in parts.

use super::heat;
use crate::app::planned::Standpoint;
use crate::app::worker::Telling;
use crate::light::Eye;
use crate::measure::TimeScales;
use crate::place::{PlanPoint, Site, Spot, Stature};
use crate::plan::standing::{Contour, Raster, Standing, StandingMap, StandingRequest, Stay};
use crate::plan::{Half, NightError, NightRequest, NightSky, Patch, patch};
use crate::sky::{Body, Ephemeris};
use chrono::{Days, NaiveDate};
use std::num::NonZeroUsize;
use std::sync::Arc;

/// Side of a square, m.
const FINEST_M: f64 = 1.0;
/// How many places are marked, and how far apart they are, m.
const BEST: (usize, f64) = (3, 10.0);

/// How several nights make one figure.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Summing {
    /// All their minutes together.
    #[default]
    Sum,
    /// The minutes of the worst of them.
    Least,
}

/// What the map is asked for.
#[derive(Clone, Debug, PartialEq)]
pub struct Asked {
    /// The site in the air that is planned for.
    pub site: Arc<Site>,
    /// The shown night's date.
    pub date: NaiveDate,
    /// How many nights from it on.
    pub nights: u32,
    /// How they make one figure.
    pub summing: Summing,
    /// Which half of the nights.
    pub half: Half,
    /// The body.
    pub body: Body,
    /// Whose eye.
    pub eye: Eye,
    /// Whose height.
    pub stature: Stature,
    /// How civil time leads to TT.
    pub scales: TimeScales,
}

/// What is known so far. Minutes are already the figure that was asked for, be it the sum or the
/// least.
#[derive(Clone, Debug)]
pub struct Found {
    /// The minutes.
    pub map: StandingMap,
    /// What the chosen spot and every other gives, in the site's order.
    pub spots: Arc<[AtSpot]>,
    /// The best places, the best first, well apart.
    pub best: Vec<(PlanPoint, Stay)>,
    /// Lines of equal minutes; none until the map is whole.
    pub contours: Vec<Contour>,
}

/// What one of the site's spots gives.
#[derive(Clone, Copy, Debug)]
pub struct AtSpot {
    /// Somebody of the stature asked for.
    pub stay: Stay,
    /// The crowd on its patch, where it has one.
    pub patch: Option<Patch>,
}

/// What the worker tells.
pub type News = Result<Found, NightError>;

impl Asked {
    /// Works it out, telling what is known so far. The shown night is given: it has been gone
    /// through already.
    pub fn work(&self, shown: &Arc<NightSky>, ephemeris: &Ephemeris, telling: &Telling<News>) {
        if let Err(error) = self.tell_all(shown, ephemeris, telling) {
            telling.tell(Err(error));
        }
    }

    fn tell_all(
        &self,
        shown: &Arc<NightSky>,
        ephemeris: &Ephemeris,
        telling: &Telling<News>,
    ) -> Result<(), NightError> {
        let further = self.further(ephemeris, telling)?;
        let nights: Vec<&NightSky> = std::iter::once(&**shown).chain(&further).collect();
        let standing = Standing::new(StandingRequest {
            site: &self.site,
            nights: &nights,
            body: self.body,
            eye: self.eye,
            half: self.half,
            stature: self.stature,
        });
        let spots: Arc<[AtSpot]> = self
            .site
            .spots
            .iter()
            .map(|spot| self.at_spot(&standing, spot))
            .collect();
        let raster = Raster::of_site(&self.site, FINEST_M);
        let threads = std::thread::available_parallelism().unwrap_or(NonZeroUsize::MIN);
        let whole = standing.map(raster, threads, &telling.progress, |map| {
            telling.tell(Ok(self.found(map, &spots, false)));
        });
        if let Some(map) = whole {
            telling.tell(Ok(self.found(&map, &spots, true)));
        }
        Ok(())
    }

    /// The nights after the shown one.
    fn further(
        &self,
        ephemeris: &Ephemeris,
        telling: &Telling<News>,
    ) -> Result<Vec<NightSky>, NightError> {
        (1..u64::from(self.nights))
            .filter_map(|days| self.date.checked_add_days(Days::new(days)))
            .take_while(|_| !telling.progress.is_cancelled())
            .map(|date| self.sky(ephemeris, date))
            // A date that the zone skipped is no night.
            .filter(|sky| !matches!(sky, Err(NightError::NoSuchDate { .. })))
            .collect()
    }

    fn sky(&self, ephemeris: &Ephemeris, date: NaiveDate) -> Result<NightSky, NightError> {
        // The sky is one for all spots.
        let standpoint = Standpoint::new(&self.site, &Spot::mark(), self.stature, date)?;
        let request = NightRequest {
            eyes: &[self.eye],
            bodies: &[self.body],
            ..standpoint.request(date, self.scales)
        };
        NightSky::new(ephemeris, &request)
    }

    fn at_spot(&self, standing: &Standing<'_>, spot: &Spot) -> AtSpot {
        let stay = standing.stay_at_spot(spot, self.stature);
        AtSpot {
            stay: match self.summing {
                Summing::Sum => stay,
                Summing::Least => stay.by_least(),
            },
            patch: spot.radius_m.and_then(|_| patch(standing, spot)),
        }
    }

    fn found(&self, map: &StandingMap, spots: &Arc<[AtSpot]>, is_whole: bool) -> Found {
        let map = match self.summing {
            Summing::Sum => map.clone(),
            Summing::Least => map.by_least(),
        };
        let levels = heat::levels(heat::range(&map).unwrap_or_default());
        let (count, apart_m) = BEST;
        Found {
            spots: spots.clone(),
            best: map.best_places(count, apart_m),
            contours: if is_whole {
                map.contours(&levels)
            } else {
                Vec::new()
            },
            map,
        }
    }
}
