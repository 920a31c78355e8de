//! Measured skylines as comma-separated tables.

use crate::place::file::write_text;
use crate::place::{SiteError, SkylinePoint};
use std::fmt::Write;
use std::path::Path;

/// A measured skyline as a comma-separated table with the columns `az_deg,alt_deg`;
/// [`crate::place::skyline_from_table`] reads the same points back.
///
/// # Errors
/// There is no point, two share an azimuth, or one is not a number or out of range.
pub fn skyline_to_table(points: &[SkylinePoint]) -> Result<String, SiteError> {
    let mut table = String::from("az_deg,alt_deg\n");
    for point in points {
        // Writing to a string does not fail.
        let _ = writeln!(table, "{},{}", point.azimuth_deg, point.altitude_deg);
    }
    crate::place::skyline_from_table(table.as_bytes())?;
    Ok(table)
}

/// Writes a measured skyline as a table, whole or not at all.
///
/// # Errors
/// As [`skyline_to_table`], or the file cannot be written: one sentence naming it.
pub fn write_skyline_table(points: &[SkylinePoint], path: &Path) -> Result<(), SiteError> {
    write_text(path, &skyline_to_table(points)?)
}
