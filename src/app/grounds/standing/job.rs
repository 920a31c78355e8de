//! The map's work: what is asked, and what the worker's thread answers in parts.

use super::field::Field;
use crate::app::planned::Standpoint;
use crate::app::worker::Telling;
use crate::light::Eye;
use crate::measure::TimeScales;
use crate::place::{Grounds, PlanPoint, Site, Stature};
use crate::plan::{Half, NightError, NightSky};
use crate::sky::{Body, Ephemeris};
use chrono::{Days, NaiveDate};
use std::sync::Arc;

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

/// What is known of it so far.
#[derive(Clone, Debug)]
pub struct Found {
    /// The minutes.
    pub field: Field,
    /// Middles of the best squares, the best first, well apart.
    pub best: Vec<PlanPoint>,
    /// The shown night, for asking about single points.
    pub sky: Arc<NightSky>,
    /// Whether all of it is known.
    pub is_whole: bool,
}

impl Asked {
    fn sky(&self, ephemeris: &Ephemeris, date: NaiveDate) -> Result<NightSky, NightError> {
        let spot = crate::place::Spot::mark();
        let standpoint = Standpoint::new(&self.site, &spot, self.stature, date)?;
        let request = crate::plan::NightRequest {
            eyes: &[self.eye],
            bodies: &[self.body],
            ..standpoint.request(date, self.scales)
        };
        NightSky::new(ephemeris, &request)
    }

    /// Works it out, telling each finer grid.
    pub fn work(&self, ephemeris: &Ephemeris, telling: &Telling<Result<Found, NightError>>) {
        if let Err(error) = self.tell_all(ephemeris, telling) {
            telling.tell(Err(error));
        }
    }

    fn tell_all(
        &self,
        ephemeris: &Ephemeris,
        telling: &Telling<Result<Found, NightError>>,
    ) -> Result<(), NightError> {
        const SIDE_M: f64 = 50.0;
        let dates = (0..u64::from(self.nights)).filter_map(|k| self.date.checked_add_days(Days::new(k)));
        let skies: Vec<NightSky> = dates
            .map(|date| self.sky(ephemeris, date))
            .collect::<Result<_, _>>()?;
        let shown = Arc::new(skies[0].clone());
        let grounds = Grounds::new(&self.site, Some(self.date));
        let steps = [8.0, 4.0, 2.0, 1.0];
        telling
            .progress
            .set_total(steps.iter().map(|s: &f64| ((100.0 / s).ceil() as u64).pow(2)).sum());
        for step_m in steps {
            let columns = (2.0 * SIDE_M / step_m).ceil() as usize;
            let corner = PlanPoint::new(-SIDE_M, -SIDE_M);
            let mut minutes = Vec::new();
            for k in 0..columns * columns {
                if telling.progress.is_cancelled() {
                    return Ok(());
                }
                let middle = |k: usize| (k as f64 + 0.5) * step_m - SIDE_M;
                let at = PlanPoint::new(middle(k % columns), middle(k / columns));
                telling.progress.advance(1);
                let is_out = grounds.around(at).is_some()
                    || self.site.excluded.iter().any(|area| area.holds(at));
                minutes.push((!is_out).then(|| {
                    let skyline = grounds.skyline_from(self.site.viewpoint_at(at, self.stature));
                    let of_night = skies.iter().map(|sky| {
                        let night = sky.body_night(self.body, &skyline);
                        let windows = night.as_ref().map_or(&[][..], |n| n.windows_in(self.eye, self.half));
                        let s: f64 = windows.iter().map(|w| w.end.moment.seconds_since(w.start.moment)).sum();
                        (s / 60.0) as f32
                    });
                    match self.summing {
                        Summing::Sum => of_night.sum(),
                        Summing::Least => of_night.fold(f32::INFINITY, f32::min),
                    }
                }));
            }
            let field = Field { corner, step_m, columns, minutes };
            let mut order: Vec<usize> = (0..field.minutes.len()).filter(|k| field.minutes[*k].is_some()).collect();
            order.sort_by(|a, b| field.minutes[*b].partial_cmp(&field.minutes[*a]).unwrap_or(std::cmp::Ordering::Equal));
            let mut best: Vec<PlanPoint> = Vec::new();
            for k in order {
                let at = PlanPoint::new(
                    corner.east_m + (k % columns) as f64 * step_m + 0.5 * step_m,
                    corner.north_m + (k / columns) as f64 * step_m + 0.5 * step_m,
                );
                if best.iter().all(|b| b.distance_m(at) > 10.0) { best.push(at); }
                if best.len() == 3 { break; }
            }
            telling.tell(Ok(Found { field, best, sky: shown.clone(), is_whole: step_m == 1.0 }));
        }
        Ok(())
    }
}
