//! Daylight finding as JSON. The cautions go with it.

use super::Found;
use crate::cli::fault::Fault;
use crate::cli::moment::{MomentRecord, MomentWriter};
use crate::cli::{JSON_VERSION, rounded};
use crate::plan::{Apart, Drift, Slot, Stretch, Whereabouts};
use crate::words::Words;
use serde::Serialize;

#[derive(Serialize)]
struct Document<'a> {
    dimmet: u32,
    cautions: [String; 3],
    site: &'a str,
    spot: &'a str,
    date: String,
    time_zone: &'a str,
    body: &'static str,
    /// Whether the Sun stands higher than 5° at all.
    has_day: bool,
    /// When a keen eye would see the body, were the Sun no danger.
    bright_enough: Vec<StretchRecord>,
    slots: Vec<SlotRecord<'a>>,
}

#[derive(Serialize)]
struct StretchRecord {
    start: MomentRecord,
    end: MomentRecord,
}

#[derive(Serialize)]
struct SlotRecord<'a> {
    #[serde(flatten)]
    stretch: StretchRecord,
    building: &'a str,
    shaded_until: MomentRecord,
    place: PlaceRecord,
    is_west_of_sun: bool,
    /// When the Sun would come within 5° of where an untracked tube points that was pointed at
    /// the body as the slot began.
    sun_in_untracked_tube: Option<MomentRecord>,
}

#[derive(Serialize)]
struct PlaceRecord {
    at: MomentRecord,
    alt_refracted_deg: f64,
    az_deg: f64,
    margin_mag_keen: f64,
    from_sun: ApartRecord,
    from_moon: Option<ApartRecord>,
}

#[derive(Serialize)]
struct ApartRecord {
    separation_deg: f64,
    right_deg: f64,
    above_deg: f64,
}

pub(super) fn json(words: &Words, found: &Found<'_>) -> Result<Vec<u8>, Fault> {
    let (clock, daylight) = (found.clock, &found.daylight);
    let moments = MomentWriter {
        scales: clock.scales,
        zone: clock.zone,
    };
    let document = Document {
        dimmet: JSON_VERSION,
        cautions: super::text::CAUTIONS.map(|id| words.text(id)),
        site: found.site_name,
        spot: found.spot_name,
        date: daylight.date.to_string(),
        time_zone: clock.zone.name(),
        body: daylight.body.name(),
        has_day: daylight.has_day,
        bright_enough: daylight
            .plain
            .iter()
            .map(|stretch| StretchRecord::new(&moments, stretch))
            .collect(),
        slots: daylight
            .slots
            .iter()
            .map(|slot| SlotRecord::new(&moments, slot))
            .collect(),
    };
    let mut out = serde_json::to_vec_pretty(&document).map_err(std::io::Error::from)?;
    out.push(b'\n');
    Ok(out)
}

impl StretchRecord {
    fn new(moments: &MomentWriter, stretch: &Stretch) -> Self {
        Self {
            start: moments.record(stretch.start),
            end: moments.record(stretch.end),
        }
    }
}

impl<'a> SlotRecord<'a> {
    fn new(moments: &MomentWriter, slot: &'a Slot) -> Self {
        Self {
            stretch: StretchRecord::new(moments, &slot.stretch),
            building: &slot.building,
            shaded_until: moments.record(slot.shaded_until),
            place: PlaceRecord::new(moments, &slot.place),
            is_west_of_sun: slot.drift != Drift::Away,
            sun_in_untracked_tube: match slot.drift {
                Drift::Into(moment) => Some(moments.record(moment)),
                Drift::Away | Drift::Past => None,
            },
        }
    }
}

impl PlaceRecord {
    fn new(moments: &MomentWriter, place: &Whereabouts) -> Self {
        Self {
            at: moments.record(place.moment),
            alt_refracted_deg: rounded(place.altitude.degrees(), 2),
            az_deg: rounded(place.azimuth.degrees(), 2),
            margin_mag_keen: rounded(place.margin_mag, 2),
            from_sun: ApartRecord::new(&place.from_sun),
            from_moon: place.from_moon.as_ref().map(ApartRecord::new),
        }
    }
}

impl ApartRecord {
    fn new(apart: &Apart) -> Self {
        Self {
            separation_deg: rounded(apart.separation.degrees(), 2),
            right_deg: rounded(apart.right.degrees(), 2),
            above_deg: rounded(apart.above.degrees(), 2),
        }
    }
}
