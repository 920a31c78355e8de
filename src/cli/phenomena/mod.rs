//! `dimmet phenomena`: dated events, with a site's circumstances if one is named.

mod record;
mod rows;
mod text;

use super::arguments::{Format, PhenomenaArguments};
use super::{Fault, Surroundings, resolve};
use crate::measure::{Moment, Progress, TimeScales, civil};
use crate::place::Site;
use crate::plan::phenomena::{Event, Lookout, phenomena};
use crate::plan::phenomena::{PhenomenaError, PhenomenaRequest};
use crate::sky::{Body, Ephemeris};
use crate::words::CivilClock;
use chrono::{DateTime, NaiveDate, TimeDelta, Utc};
use chrono_tz::Tz;
use std::num::NonZeroUsize;

/// Those that have events; with a site the Moon has some with them.
const PLANETS: [Body; 7] = [
    Body::Mercury,
    Body::Venus,
    Body::Mars,
    Body::Jupiter,
    Body::Saturn,
    Body::Uranus,
    Body::Neptune,
];

/// The events of a span of days.
struct Listed {
    from: NaiveDate,
    to: NaiveDate,
    clock: CivilClock,
    site_name: Option<String>,
    events: Vec<Event>,
}

/// What stands before a list with moments for which people would look at the Sun itself, or turn
/// instruments to the sky by day.
const CAUTIONS: [&str; 5] = [
    "daylight-caution-sun",
    "caution-filters",
    "caution-viewers",
    "caution-finders",
    "caution-rules",
];

/// Below this the Sun's upper limb is down, with refraction.
const SUN_DOWN_DEG: f64 = -50.0 / 60.0;

impl Listed {
    /// The messages to warn with.
    fn cautions(&self) -> &'static [&'static str] {
        let is_by_day = |event: &Event| {
            let contacts = event.local_contacts.iter();
            contacts
                .filter_map(|contact| contact.local)
                .any(|local| local.sun_altitude.degrees() > SUN_DOWN_DEG)
        };
        let is_risky = |event: &Event| event.is_transit() || is_by_day(event);
        if self.events.iter().any(is_risky) {
            &CAUTIONS
        } else {
            &[]
        }
    }
}

pub(super) fn run(
    arguments: &PhenomenaArguments,
    scales: TimeScales,
    around: &mut Surroundings<'_>,
) -> Result<(), Fault> {
    let words = around.words;
    let site = match &arguments.site {
        Some(text) => Some(resolve::site_with_terrain(text, around)?),
        None => None,
    };
    let listed = list(arguments, scales, site.as_ref(), around)?;
    let output = match arguments.format.unwrap_or(Format::Text) {
        Format::Text => text::page(words, &listed).into_bytes(),
        Format::Json => record::json(words, &listed)?,
        Format::Csv => rows::csv(&listed)?,
    };
    around.output.write_all(&output)?;
    Ok(around.output.flush()?)
}

fn list(
    arguments: &PhenomenaArguments,
    scales: TimeScales,
    site: Option<&Site>,
    around: &Surroundings<'_>,
) -> Result<Listed, Fault> {
    let clock = CivilClock {
        scales,
        zone: site.map_or(Tz::UTC, Site::zone),
    };
    let (from, to) = dates(arguments, around)?;
    let refused = |error: PhenomenaError| Fault::Input(error.to_string());
    let span = moments((from, to), clock).ok_or_else(|| refused(PhenomenaError::Empty))?;
    let bodies = bodies(arguments, site.is_some(), around)?;
    let place = match site {
        None => None,
        Some(site) => {
            let spot = site.resolve_spot(arguments.spot.as_deref())?;
            Some((site.observer(), site.skyline(spot)))
        }
    };
    let request = PhenomenaRequest {
        from: span.0,
        to: span.1,
        scales,
        bodies: &bodies,
        lookout: place
            .as_ref()
            .map(|(observer, skyline)| Lookout { observer, skyline }),
        threads: std::thread::available_parallelism().unwrap_or(NonZeroUsize::MIN),
    };
    let mut events = Vec::new();
    phenomena(&Ephemeris::new(), &request, &Progress::new(), |event| {
        events.push(event);
    })
    .map_err(refused)?;
    Ok(Listed {
        from,
        to,
        clock,
        site_name: site.map(|site| site.name.clone()),
        events,
    })
}

/// The first and the last day.
fn dates(
    arguments: &PhenomenaArguments,
    around: &Surroundings<'_>,
) -> Result<(NaiveDate, NaiveDate), Fault> {
    let words = around.words;
    let from = resolve::date(words, "--from", &arguments.from)?;
    let to = resolve::date(words, "--to", &arguments.to)?;
    if to < from {
        let dates = [("from", from.to_string()), ("to", to.to_string())];
        return Err(Fault::Input(words.text_with("phenomena-reversed", &dates)));
    }
    Ok((from, to))
}

/// The start of the first day and the end of the last, by the zone's civil time. A day that the
/// zone skipped holds no time.
fn moments((from, to): (NaiveDate, NaiveDate), clock: CivilClock) -> Option<(Moment, Moment)> {
    let start = |date: NaiveDate| civil::start_of_date(date, clock.zone);
    let first = start(from).or_else(|| start(from.succ_opt()?))?;
    let last = civil::end_of_date(to, clock.zone).or_else(|| start(to.succ_opt()?))?;
    Some((moment(clock.scales, first)?, moment(clock.scales, last)?))
}

/// The moment of a civil time that is within the supported years by a zone's clock, and may lie
/// some hours outside them by that of offset zero.
fn moment(scales: TimeScales, utc: DateTime<Utc>) -> Option<Moment> {
    const ROOM: TimeDelta = TimeDelta::days(2);
    [TimeDelta::zero(), ROOM, -ROOM].iter().find_map(|room| {
        let near = scales.moment_from_civil(utc + *room).ok()?;
        Some(near.plus_seconds(-room.as_seconds_f64()))
    })
}

fn bodies(
    arguments: &PhenomenaArguments,
    has_site: bool,
    around: &Surroundings<'_>,
) -> Result<Vec<Body>, Fault> {
    let words = around.words;
    let mut bodies = Vec::new();
    for name in &arguments.body {
        let body = resolve::body(words, "--body", name)?;
        let has_events = PLANETS.contains(&body) || (body == Body::Moon && has_site);
        if !has_events {
            let known = PLANETS.map(Body::name).join(", ");
            let arguments = [("body", body.name().to_owned()), ("known", known)];
            let sentence = words.text_with("phenomena-no-planet", &arguments);
            return Err(Fault::Input(sentence));
        }
        if !bodies.contains(&body) {
            bodies.push(body);
        }
    }
    if bodies.is_empty() {
        bodies.extend(PLANETS);
    }
    Ok(bodies)
}
