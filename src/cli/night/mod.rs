//! `dimmet night`: one night at one spot of a site, and the coming dusk of the demo site.

mod record;
mod rows;
mod text;

use super::arguments::{Format, NightArguments};
use super::{Fault, Surroundings, resolve};
use crate::light::Eye;
use crate::measure::{Moment, TimeScales, civil};
use crate::place::{Grounds, Site, Skyline, Spot, Stature, demo_sites};
use crate::plan::{Half, Night, NightError, NightRequest, Sight};
use crate::sky::{Appearance, Body, Ephemeris, Observer};
use crate::words::CivilClock;
use chrono::{Days, NaiveDate};

/// The bodies of a night, in the order in which they are listed.
const BODIES: [Body; 8] = [
    Body::Moon,
    Body::Mercury,
    Body::Venus,
    Body::Mars,
    Body::Jupiter,
    Body::Saturn,
    Body::Uranus,
    Body::Neptune,
];

/// Dates in a row that have no dusk to come: one that is over, and one that the zone skipped.
const DATES_AHEAD: u64 = 3;

/// A planned night and where it was planned for.
struct Planned<'a> {
    site: &'a Site,
    spot: &'a Spot,
    skyline: Skyline,
    clock: CivilClock,
    night: Night,
    /// The Moon as seen from the Earth's centre at the night's middle.
    moon: Appearance,
}

pub(super) fn run(
    arguments: &NightArguments,
    scales: TimeScales,
    around: &mut Surroundings<'_>,
) -> Result<(), Fault> {
    let words = around.words;
    let site = resolve::site_with_terrain(&arguments.site, around)?;
    let spot = site.resolve_spot(arguments.spot.as_deref())?;
    let date = resolve::date(words, "--date", &arguments.date)?;
    let stature = resolve::stature(arguments.stature);
    resolve::tell_what_is_left_out(&site, spot, around)?;
    let planned = Planned::new(&site, (spot, stature), date, scales)?;
    let output = match arguments.format.unwrap_or(Format::Text) {
        Format::Text => text::page(words, &planned, &[Half::Dusk, Half::Dawn]).into_bytes(),
        Format::Json => record::json(&planned)?,
        Format::Csv => rows::csv(&planned)?,
    };
    around.output.write_all(&output)?;
    Ok(around.output.flush()?)
}

/// Prints the coming dusk, or the one under way, at the first demo site.
///
/// # Errors
/// The clock's date lies outside the supported years, or the output cannot be written.
pub fn coming_dusk(scales: TimeScales, around: &mut Surroundings<'_>) -> Result<(), Fault> {
    let site = &demo_sites()[0];
    let spot = site.resolve_spot(None)?;
    let outside = |error: crate::measure::DateOutOfRange| Fault::Input(error.to_string());
    let now = scales.moment_from_civil(around.now).map_err(outside)?;
    let today = civil::local_date(around.now, site.zone());
    let mut failure = None;
    for date in (0..DATES_AHEAD).filter_map(|days| today.checked_add_days(Days::new(days))) {
        match Planned::new(site, (spot, Stature::Adult), date, scales) {
            Ok(planned) if planned.night.middle > now => {
                let page = text::page(around.words, &planned, &[Half::Dusk]);
                around.output.write_all(page.as_bytes())?;
                return Ok(around.output.flush()?);
            }
            Ok(_) => {}
            Err(error) => failure = Some(error),
        }
    }
    match failure {
        Some(error) => Err(error.into()),
        None => Ok(()),
    }
}

impl<'a> Planned<'a> {
    fn new(
        site: &'a Site,
        (spot, stature): (&'a Spot, Stature),
        date: NaiveDate,
        scales: TimeScales,
    ) -> Result<Self, NightError> {
        let ephemeris = Ephemeris::new();
        let observer: Observer = site.observer();
        let skyline = Grounds::new(site, Some(date)).skyline(spot, stature);
        let sight = Sight::of_site(site)?;
        let request = NightRequest {
            observer: &observer,
            skyline: &skyline,
            zone: site.zone(),
            date,
            scales,
            sight: &sight,
            eyes: &Eye::ALL,
            bodies: &BODIES,
        };
        let night = Night::plan(&ephemeris, &request)?;
        let moon = moon_at(&ephemeris, night.middle, date)?;
        Ok(Self {
            site,
            spot,
            clock: CivilClock {
                scales,
                zone: site.zone(),
            },
            skyline,
            night,
            moon,
        })
    }
}

fn moon_at(
    ephemeris: &Ephemeris,
    moment: Moment,
    date: NaiveDate,
) -> Result<Appearance, NightError> {
    let outside = |_| {
        NightError::OutOfRange(crate::measure::DateOutOfRange {
            date: date.to_string(),
        })
    };
    let span = ephemeris
        .cover(moment.tt(), moment.tt(), &[Body::Moon])
        .map_err(outside)?;
    Ok(span.at(moment).appearance(Body::Moon))
}
