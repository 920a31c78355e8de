//! `dimmet daylight`: a bright planet in full day, for the unaided eye in a building's shade.
//! Nothing else leads here: it is asked for on purpose.

mod record;
mod text;

use super::arguments::{DaylightArguments, PageFormat};
use super::{Fault, Surroundings, resolve};
use crate::measure::TimeScales;
use crate::plan::{Daylight, DaylightRequest, NightError, Sight};
use crate::sky::{Body, Ephemeris};
use crate::words::CivilClock;

/// A day that was looked through, and where.
struct Found<'a> {
    site_name: &'a str,
    spot_name: &'a str,
    clock: CivilClock,
    daylight: Daylight,
}

pub(super) fn run(
    arguments: &DaylightArguments,
    scales: TimeScales,
    around: &mut Surroundings<'_>,
) -> Result<(), Fault> {
    let words = around.words;
    let site = resolve::site_with_terrain(&arguments.site, around)?;
    let spot = site.resolve_spot(arguments.spot.as_deref())?;
    let date = resolve::date(words, "--date", &arguments.date)?;
    let body = match &arguments.body {
        Some(text) => resolve::body(words, "--body", text)?,
        None => Body::Venus,
    };
    if body == Body::Sun {
        return Err(Fault::Input(words.text("cli-daylight-sun")));
    }
    resolve::tell_what_is_left_out(&site, spot, around)?;
    let sight = Sight::of_site(&site).map_err(NightError::from)?;
    let request = DaylightRequest {
        site: &site,
        spot,
        date,
        scales,
        sight: &sight,
        body,
    };
    let found = Found {
        site_name: &site.name,
        spot_name: &spot.name,
        clock: CivilClock {
            scales,
            zone: site.zone(),
        },
        daylight: Daylight::find(&Ephemeris::new(), &request)?,
    };
    let output = match arguments.format.unwrap_or(PageFormat::Text) {
        PageFormat::Text => text::page(words, &found).into_bytes(),
        PageFormat::Json => record::json(words, &found)?,
    };
    around.output.write_all(&output)?;
    Ok(around.output.flush()?)
}
