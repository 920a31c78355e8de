//! From what was typed to what it means. Every refusal names the place (an option, or a table's
//! line and column), the text that stands there and what to write in its stead.

use super::Surroundings;
use super::arguments::StatureName;
use super::civil_text::{self, CivilText};
use super::fault::Fault;
use crate::measure::{Progress, TimeScales, check_date};
use crate::place::{MeasuredUse, Site, Spot, Stature, demo_site, demo_sites, slug};
use crate::sky::Body;
use crate::words::{Words, decimal};
use chrono::{DateTime, FixedOffset, NaiveDate};
use std::path::{Path, PathBuf};
use std::sync::Arc;

/// What a number may be.
#[derive(Clone, Copy, Debug)]
pub(super) struct Limits {
    pub low: f64,
    pub high: f64,
    /// The name of its unit in the message `cli-bad-number`.
    pub unit: &'static str,
}

impl Limits {
    /// A number within them; not-a-number and infinities never are.
    pub fn read(&self, text: &str) -> Option<f64> {
        let value = text.trim().parse().ok()?;
        (self.low..=self.high).contains(&value).then_some(value)
    }
}

/// Geodetic latitude.
pub(super) const LATITUDE: Limits = Limits {
    low: -90.0,
    high: 90.0,
    unit: "degrees",
};
/// East longitude.
pub(super) const LONGITUDE: Limits = Limits {
    low: -180.0,
    high: 180.0,
    unit: "degrees",
};
/// Height of a place; as in site files.
pub(super) const ELEVATION: Limits = Limits {
    low: -450.0,
    high: 9000.0,
    unit: "metres",
};
/// TT - UT1: within an hour, several times what any published model gives for these years.
pub(super) const DELTA_T: Limits = Limits {
    low: -3600.0,
    high: 3600.0,
    unit: "seconds",
};

/// A text shown in a message: in quotes, without control characters, cut where it is long.
pub(super) fn quoted(text: &str) -> String {
    const LONGEST: usize = 40;
    let start: String = text.chars().take(LONGEST).collect();
    let is_cut = start.len() < text.len();
    format!(
        "\"{}{}\"",
        start.escape_debug(),
        if is_cut { "…" } else { "" }
    )
}

/// A number within its limits.
pub(super) fn number(words: &Words, place: &str, text: &str, limits: Limits) -> Result<f64, Fault> {
    match limits.read(text) {
        Some(value) => Ok(value),
        None => Err(Fault::Input(words.text_with(
            "cli-bad-number",
            &[
                ("place", place.to_owned()),
                ("value", quoted(text)),
                (
                    "low",
                    decimal(limits.low, if limits.low.fract() == 0.0 { 0 } else { 2 }),
                ),
                ("high", decimal(limits.high, 0)),
                ("unit", limits.unit.to_owned()),
            ],
        ))),
    }
}

/// How civil time leads to TT, with TT - UT1 stated or not.
pub(super) fn scales(words: &Words, delta_t: Option<&str>) -> Result<TimeScales, Fault> {
    let Some(text) = delta_t else {
        return Ok(TimeScales::new());
    };
    number(words, "--delta-t", text, DELTA_T).map(TimeScales::with_delta_t_s)
}

/// A time with its offset; one without is at offset zero.
pub(super) fn time(words: &Words, place: &str, text: &str) -> Result<DateTime<FixedOffset>, Fault> {
    let refused = || bad_text(words, "cli-bad-time", place, text);
    let time = match civil_text::parse(text.trim().as_bytes()) {
        Some(CivilText { utc, .. }) => utc.fixed_offset(),
        None => DateTime::parse_from_rfc3339(text.trim()).map_err(|_| refused())?,
    };
    supported(words, place, time.to_utc().date_naive())?;
    Ok(time)
}

/// A date as year-month-day.
pub(super) fn date(words: &Words, place: &str, text: &str) -> Result<NaiveDate, Fault> {
    let date = civil_text::parse_date(text.trim().as_bytes())
        .ok_or_else(|| bad_text(words, "cli-bad-date", place, text))?;
    supported(words, place, date)?;
    Ok(date)
}

/// Refuses a date outside the supported years.
pub(super) fn supported(words: &Words, place: &str, date: NaiveDate) -> Result<(), Fault> {
    check_date(date).map_err(|error| {
        Fault::Input(words.text_with(
            "cli-refused",
            &[("place", place.to_owned()), ("error", error.to_string())],
        ))
    })
}

/// A body by its name.
pub(super) fn body(words: &Words, place: &str, text: &str) -> Result<Body, Fault> {
    text.trim().parse().map_err(|_| {
        let known = Body::ALL.map(Body::name).join(", ");
        Fault::Input(words.text_with(
            "cli-bad-body",
            &[
                ("place", place.to_owned()),
                ("value", quoted(text)),
                ("known", known),
            ],
        ))
    })
}

/// Whose eyes look; an adult's where nothing is said.
pub(super) fn stature(name: Option<StatureName>) -> Stature {
    match name {
        None | Some(StatureName::Adult) => Stature::Adult,
        Some(StatureName::Child) => Stature::Child,
        Some(StatureName::Wheelchair) => Stature::Wheelchair,
    }
}

/// The demo site of that name, or a site file by its path, or one kept in the sites folder; with
/// its file, if it has one.
pub(super) fn site(
    words: &Words,
    text: &str,
    folder: Option<&Path>,
) -> Result<(Site, Option<PathBuf>), Fault> {
    if let Some(demo) = demo_site(text) {
        return Ok((demo.clone(), None));
    }
    let kept = folder.map(|folder| folder.join(format!("{}.site.ron", slug(text))));
    let file = [Some(PathBuf::from(text)), kept]
        .into_iter()
        .flatten()
        .find(|file| file.exists());
    if let Some(file) = file {
        return Ok((Site::read(&file)?, Some(file)));
    }
    let known: Vec<String> = demo_sites().iter().map(|site| slug(&site.name)).collect();
    Err(Fault::Input(words.text_with(
        "cli-no-site",
        &[("value", quoted(text)), ("known", known.join(", "))],
    )))
}

/// The same site with what its terrain makes of the skyline, which is worked out first where it
/// is not kept beside the file. What is worth saying of it goes to the messages.
pub(super) fn site_with_terrain(text: &str, around: &mut Surroundings<'_>) -> Result<Site, Fault> {
    let (mut site, file) = site(around.words, text, around.sites_folder)?;
    if let Some(far) = site.find_far(file.as_deref(), &Progress::new(), &mut |_| {})? {
        for remark in around.words.terrain_remarks(&site, &far) {
            writeln!(around.messages, "{remark}")?;
        }
        site.far = Some(Arc::new(far));
    }
    Ok(site)
}

/// Says among the messages what of the measured skylines does not count at a spot.
pub(super) fn tell_what_is_left_out(
    site: &Site,
    spot: &Spot,
    around: &mut Surroundings<'_>,
) -> Result<(), Fault> {
    let id = match site.measured_use(spot) {
        MeasuredUse::FarPartsOnly {
            is_any_left_out: true,
        } => "cli-measured-far-only",
        MeasuredUse::LeftOut => "cli-measured-left-out",
        _ => return Ok(()),
    };
    let said = around
        .words
        .text_with(id, &[("spot", spot.name.as_str()), ("site", &site.name)]);
    Ok(writeln!(around.messages, "{said}")?)
}

fn bad_text(words: &Words, id: &str, place: &str, text: &str) -> Fault {
    Fault::Input(words.text_with(id, &[("place", place.to_owned()), ("value", quoted(text))]))
}
