//! Events as JSON.

use super::Listed;
use crate::cli::moment::{MomentRecord, MomentWriter};
use crate::cli::{Fault, JSON_VERSION, rounded};
use crate::measure::{Angle, Tt};
use crate::plan::phenomena::{Circumstances, Contact, Event, Kind, Target};
use crate::plan::phenomena::{MOON_RADIUS_KM, SUN_SEMIDIAMETER_ARCSEC};
use crate::words::Words;
use chrono::{DateTime, TimeDelta};
use serde::Serialize;

#[derive(Serialize)]
struct Document<'a> {
    dimmet: u32,
    from: String,
    to: String,
    time_zone: &'static str,
    #[serde(skip_serializing_if = "Option::is_none")]
    site: Option<&'a str>,
    /// Where the Sun is looked at, or is up.
    #[serde(skip_serializing_if = "Vec::is_empty")]
    cautions: Vec<String>,
    events: Vec<EventRecord>,
}

#[derive(Serialize)]
struct EventRecord {
    kind: &'static str,
    body: &'static str,
    other: Option<String>,
    tt: String,
    #[serde(flatten)]
    moment: MomentRecord,
    delta_t_s: f64,
    value: f64,
    unit: &'static str,
    #[serde(skip_serializing_if = "Option::is_none")]
    position_angle_deg: Option<f64>,
    #[serde(skip_serializing_if = "Option::is_none")]
    elongation_deg: Option<f64>,
    #[serde(skip_serializing_if = "Option::is_none")]
    radii: Option<RadiiRecord>,
    #[serde(skip_serializing_if = "Vec::is_empty")]
    contacts: Vec<ContactRecord>,
    #[serde(skip_serializing_if = "Option::is_none")]
    local: Option<LocalRecord>,
}

/// What the contacts hang on.
#[derive(Serialize)]
struct RadiiRecord {
    #[serde(skip_serializing_if = "Option::is_none")]
    sun_arcsec_at_1_au: Option<f64>,
    #[serde(skip_serializing_if = "Option::is_none")]
    moon_km: Option<f64>,
    planet_km: f64,
}

#[derive(Serialize)]
struct ContactRecord {
    name: &'static str,
    tt: String,
    #[serde(flatten)]
    moment: MomentRecord,
    separation_arcsec: f64,
    position_angle_deg: f64,
    #[serde(flatten)]
    place: Option<PlaceRecord>,
}

#[derive(Serialize)]
struct LocalRecord {
    #[serde(flatten)]
    place: PlaceRecord,
    #[serde(skip_serializing_if = "Vec::is_empty")]
    contacts: Vec<ContactRecord>,
}

#[derive(Serialize)]
struct PlaceRecord {
    alt_deg: f64,
    az_deg: f64,
    sun_alt_deg: f64,
    /// Whether the body, refracted, stands clear of the skyline.
    is_clear: bool,
}

/// The document, with its last line break.
pub(super) fn json(words: &Words, listed: &Listed) -> Result<Vec<u8>, Fault> {
    let moments = MomentWriter {
        scales: listed.clock.scales,
        zone: listed.clock.zone,
    };
    let document = Document {
        dimmet: JSON_VERSION,
        from: listed.from.to_string(),
        to: listed.to.to_string(),
        time_zone: listed.clock.zone.name(),
        site: listed.site_name.as_deref(),
        cautions: listed.cautions().iter().map(|id| words.text(id)).collect(),
        events: listed
            .events
            .iter()
            .map(|event| record(moments, event))
            .collect(),
    };
    let mut text = serde_json::to_vec_pretty(&document).map_err(std::io::Error::from)?;
    text.push(b'\n');
    Ok(text)
}

fn record(moments: MomentWriter, event: &Event) -> EventRecord {
    let contacts = |contacts: &[Contact]| {
        let records = contacts
            .iter()
            .map(|contact| contact_record(moments, contact));
        records.collect()
    };
    EventRecord {
        kind: event.kind.name(),
        body: event.body.name(),
        other: event.other.map(Target::name),
        tt: tt_text(event.moment.tt()),
        moment: moments.record(event.moment),
        delta_t_s: rounded(event.moment.delta_t_s(), 3),
        value: rounded(event.value.number(), 7),
        unit: event.value.unit(),
        position_angle_deg: event.position_angle.map(degrees),
        elongation_deg: event.elongation.map(degrees),
        radii: radii(event),
        contacts: contacts(&event.contacts),
        local: event.local.map(|local| LocalRecord {
            place: local.into(),
            contacts: contacts(&event.local_contacts),
        }),
    }
}

/// The radii that an event's contacts were found with, if it has some.
fn radii(event: &Event) -> Option<RadiiRecord> {
    let is_occultation = event.kind == Kind::LunarOccultation;
    (event.is_transit() || is_occultation).then(|| RadiiRecord {
        sun_arcsec_at_1_au: event.is_transit().then_some(SUN_SEMIDIAMETER_ARCSEC),
        moon_km: is_occultation.then_some(rounded(MOON_RADIUS_KM, 3)),
        planet_km: event.body.equatorial_radius_km(),
    })
}

fn contact_record(moments: MomentWriter, contact: &Contact) -> ContactRecord {
    ContactRecord {
        name: contact.name.name(),
        tt: tt_text(contact.moment.tt()),
        moment: moments.record(contact.moment),
        separation_arcsec: rounded(contact.separation.arcsec(), 3),
        position_angle_deg: degrees(contact.position_angle),
        place: contact.local.map(PlaceRecord::from),
    }
}

impl From<Circumstances> for PlaceRecord {
    fn from(local: Circumstances) -> Self {
        Self {
            alt_deg: degrees(local.place.altitude),
            az_deg: degrees(local.place.azimuth.wrapped()),
            sun_alt_deg: degrees(local.sun_altitude),
            is_clear: local.is_clear,
        }
    }
}

fn degrees(angle: Angle) -> f64 {
    rounded(angle.degrees(), 7)
}

/// A Terrestrial Time as date and time to the millisecond; without an offset, as it is in no
/// zone.
pub(super) fn tt_text(tt: Tt) -> String {
    const J2000_UNIX_S: i64 = 946_728_000;
    let ms = (tt.days_since_j2000() * 86_400_000.0).round() as i64;
    let noon = DateTime::UNIX_EPOCH + TimeDelta::seconds(J2000_UNIX_S);
    let time = noon + TimeDelta::milliseconds(ms);
    time.naive_utc().format("%Y-%m-%dT%H:%M:%S%.3f").to_string()
}
