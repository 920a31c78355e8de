//! Daylight finding as a page: the cautions first.

use super::Found;
use crate::cli::page::Page;
use crate::measure::CivilScale;
use crate::words::Words;

/// What stands before everything else.
pub(super) const CAUTIONS: [&str; 3] = [
    "daylight-caution-sun",
    "daylight-caution-shade",
    "daylight-caution-instruments",
];

pub(super) fn page(words: &Words, found: &Found<'_>) -> String {
    let (clock, daylight) = (found.clock, &found.daylight);
    let mut page = Page::default();
    for caution in CAUTIONS {
        page.line(&words.text(caution));
    }
    page.gap();
    page.line(&words.text_with(
        "daylight-title",
        &[
            ("body", words.body(daylight.body)),
            ("site", found.site_name.to_owned()),
            ("spot", found.spot_name.to_owned()),
            ("date", words.weekday_date(daylight.date)),
        ],
    ));
    page.line(&words.text_with("clock-of-site", &[("zone", clock.zone.name())]));
    let first = daylight.plain.first();
    if first.is_some_and(|first| clock.scales.civil(first.start).1 == CivilScale::Ut1) {
        page.line(&words.text("clock-is-ut1"));
    }
    page.gap();
    for sentence in words.daylight(clock, daylight) {
        page.line(&sentence);
    }
    page.text()
}
