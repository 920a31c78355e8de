//! Time zones: the IANA list and a suggestion from coordinates.
//!
//! The suggestion's borders are simplified and come from timezone-boundary-builder, made from
//! OpenStreetMap: "contains information from timezone-boundary-builder and OpenStreetMap, which
//! is made available under the Open Database License (ODbL)" belongs wherever licences are shown.

use crate::measure::Angle;
use chrono_tz::{TZ_VARIANTS, Tz};
use std::fmt;
use std::sync::LazyLock;
use tzf_rs::DefaultFinder;

/// The notice that the licence of the zones' borders asks for.
pub const BORDERS_NOTICE: &str = "Time zone suggestions contain information from \
    timezone-boundary-builder and OpenStreetMap, which is made available under the Open Database \
    License (ODbL) 1.0.";

/// A name that is not in the IANA list.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct UnknownZone {
    /// The name.
    pub name: String,
    /// Names of the list that are spelled most like it.
    pub nearest: Vec<&'static str>,
}

/// All zone names of the IANA list, ascending, older names included.
pub fn names() -> impl Iterator<Item = &'static str> {
    TZ_VARIANTS.iter().map(|zone| zone.name())
}

/// The zone of a name, spelled exactly as in the IANA list.
///
/// # Errors
/// There is no such zone; the error offers the names spelled most like it.
pub fn parse(name: &str) -> Result<Tz, UnknownZone> {
    name.parse().map_err(|_| UnknownZone {
        name: name.chars().take(80).collect(),
        nearest: nearest(name),
    })
}

/// The zone that holds a place; at sea one of `Etc/GMT±n`. Borders are simplified, so a place
/// near one may get its neighbour's zone: offer it, and let the user change it. `None` where
/// the place is no place.
///
/// The first call unpacks the borders (about 0.1 s).
pub fn suggestion(latitude: Angle, longitude: Angle) -> Option<Tz> {
    static FINDER: LazyLock<DefaultFinder> = LazyLock::new(DefaultFinder::new);
    let is_place = latitude.degrees().abs() <= 90.0 && longitude.is_finite();
    is_place
        .then(|| FINDER.get_tz_name(longitude.signed().degrees(), latitude.degrees()))
        .and_then(|name| name.parse().ok())
}

/// Up to three names, all equally near: spelled most alike as a whole or in their last part.
fn nearest(name: &str) -> Vec<&'static str> {
    const MOST: usize = 3;
    const FARTHEST: usize = 3;
    // Longer than any zone's name, so not one misspelled.
    if name.len() > 60 {
        return Vec::new();
    }
    let wanted = name.trim().to_lowercase().replace(' ', "_");
    let mut ranked: Vec<(usize, &'static str)> = names()
        .map(|known| {
            let lower = known.to_lowercase();
            let city = lower.rsplit('/').next().unwrap_or(&lower);
            let wanted_city = wanted.rsplit('/').next().unwrap_or(&wanted);
            let distance = edits(&wanted, &lower).min(edits(wanted_city, city) + 1);
            (distance, known)
        })
        .filter(|(distance, _)| *distance <= FARTHEST)
        .collect();
    ranked.sort_unstable();
    let best = ranked.first().map_or(0, |(distance, _)| *distance);
    ranked.retain(|(distance, _)| *distance == best);
    ranked
        .into_iter()
        .take(MOST)
        .map(|(_, known)| known)
        .collect()
}

/// Least number of characters put in, taken out or exchanged (Levenshtein distance).
fn edits(a: &str, b: &str) -> usize {
    let b: Vec<char> = b.chars().collect();
    let mut row: Vec<usize> = (0..=b.len()).collect();
    for (i, from) in a.chars().enumerate() {
        let mut diagonal = row[0];
        row[0] = i + 1;
        for (k, to) in b.iter().enumerate() {
            let exchanged = diagonal + usize::from(from != *to);
            diagonal = row[k + 1];
            row[k + 1] = exchanged.min(diagonal + 1).min(row[k] + 1);
        }
    }
    row[b.len()]
}

impl fmt::Display for UnknownZone {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "there is no time zone {:?}; ", self.name)?;
        if self.nearest.is_empty() {
            f.write_str("give an IANA name such as Europe/London")
        } else {
            write!(f, "did you mean {}?", self.nearest.join(" or "))
        }
    }
}

impl std::error::Error for UnknownZone {}
