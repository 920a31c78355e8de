//! `dimmet skyline`: what blocks the view from one spot of a site.

mod record;
mod rows;
mod text;

use super::arguments::{Format, SkylineArguments};
use super::resolve::{self, Limits};
use super::{Fault, Surroundings};
use crate::measure::Angle;
use crate::place::{Blocker, Grounds, MeasuredUse, Site, Spot, Stature};
use chrono::NaiveDate;

/// Degrees between azimuths: not finer than a lamp post, not so coarse that nothing is left.
const STEP: Limits = Limits {
    low: 0.01,
    high: 90.0,
    unit: "degrees",
};
const USUAL_STEP_DEG: f64 = 1.0;

/// A skyline, and where it was asked for.
struct Seen<'a> {
    site: &'a Site,
    spot: &'a Spot,
    stature: Stature,
    date: Option<NaiveDate>,
    measured_use: MeasuredUse,
    rows: Vec<Row>,
}

/// What blocks at one azimuth.
struct Row {
    azimuth: Angle,
    altitude: Angle,
    blocker: Blocker,
    /// Floor and ceiling, low to high.
    openings: Vec<(Angle, Angle)>,
}

pub(super) fn run(
    arguments: &SkylineArguments,
    around: &mut Surroundings<'_>,
) -> Result<(), Fault> {
    let words = around.words;
    let site = resolve::site_with_terrain(&arguments.site, around)?;
    let spot = site.resolve_spot(arguments.spot.as_deref())?;
    let date = match &arguments.date {
        Some(text) => Some(resolve::date(words, "--date", text)?),
        None => None,
    };
    let step_deg = match &arguments.step {
        Some(text) => resolve::number(words, "--step", text, STEP)?,
        None => USUAL_STEP_DEG,
    };
    let stature = resolve::stature(arguments.stature);
    let seen = Seen::new(&site, (spot, stature), date, step_deg);
    let output = match arguments.format.unwrap_or(Format::Text) {
        Format::Text => text::page(words, &seen).into_bytes(),
        Format::Json => record::json(&seen)?,
        Format::Csv => rows::csv(&seen)?,
    };
    around.output.write_all(&output)?;
    Ok(around.output.flush()?)
}

impl<'a> Seen<'a> {
    fn new(
        site: &'a Site,
        (spot, stature): (&'a Spot, Stature),
        date: Option<NaiveDate>,
        step_deg: f64,
    ) -> Self {
        let grounds = Grounds::new(site, date);
        let skyline = grounds.skyline(spot, stature);
        let count = (360.0 / step_deg - 1e-9).ceil() as u32;
        let rows = (0..count)
            .map(|k| {
                let azimuth = Angle::from_degrees(step_deg * f64::from(k));
                Row {
                    azimuth,
                    altitude: skyline.altitude(azimuth),
                    blocker: skyline.blocker(azimuth),
                    openings: skyline.openings(azimuth),
                }
            })
            .collect();
        Self {
            site,
            spot,
            stature,
            date,
            measured_use: grounds.measured_use(spot),
            rows,
        }
    }

    /// Height of the eye over the mark's ground, m.
    fn eye_height_m(&self) -> f64 {
        self.site.viewpoint(self.spot, self.stature).height_m
    }
}

/// A blocker's kind in tables.
fn kind(blocker: &Blocker) -> &'static str {
    match blocker {
        Blocker::Obstacle(_) => "obstacle",
        Blocker::Measured => "measured",
        Blocker::Terrain => "terrain",
        Blocker::Horizon => "horizon",
    }
}
