//! A skyline as a page.

use super::Seen;
use crate::cli::page::{Page, Side};
use crate::place::{Blocker, MeasuredUse};
use crate::words::{Words, decimal};

pub(super) fn page(words: &Words, seen: &Seen<'_>) -> String {
    let mut page = Page::default();
    page.line(&words.text_with(
        "skyline-title",
        &[
            ("spot", seen.spot.name.clone()),
            ("site", seen.site.name.clone()),
            ("height", decimal(seen.eye_height_m(), 2)),
        ],
    ));
    page.line(&words.text(match seen.measured_use {
        MeasuredUse::Own => "skyline-measured-own",
        MeasuredUse::Mark => "skyline-measured-mark",
        MeasuredUse::FarPartsOnly {
            is_any_left_out: false,
        } => "skyline-measured-far",
        MeasuredUse::FarPartsOnly {
            is_any_left_out: true,
        } => "skyline-measured-far-only",
        MeasuredUse::LeftOut => "skyline-measured-left-out",
        MeasuredUse::Nothing => "skyline-measured-nothing",
    }));
    page.gap();
    let head = [
        "column-azimuth",
        "column-altitude",
        "column-blocked-by",
        "column-openings",
    ]
    .map(|id| words.text(id));
    let rows: Vec<Vec<String>> = seen
        .rows
        .iter()
        .map(|row| {
            let openings: Vec<String> = row
                .openings
                .iter()
                .map(|(floor, ceiling)| {
                    words.text_with(
                        "skyline-opening",
                        &[
                            ("floor", words.degrees(*floor, 2)),
                            ("ceiling", words.degrees(*ceiling, 2)),
                        ],
                    )
                })
                .collect();
            vec![
                words.degrees(row.azimuth, 2),
                words.degrees(row.altitude, 2),
                blocked_by(words, &row.blocker),
                openings.join(", "),
            ]
        })
        .collect();
    page.table(
        &head,
        &rows,
        &[Side::Right, Side::Right, Side::Left, Side::Left],
    );
    page.text()
}

fn blocked_by(words: &Words, blocker: &Blocker) -> String {
    match blocker {
        Blocker::Obstacle(label) => label.to_string(),
        Blocker::Measured => words.text("skyline-blocked-measured"),
        Blocker::Terrain => words.text("skyline-blocked-terrain"),
        Blocker::Horizon => words.text("skyline-blocked-horizon"),
    }
}
