//! SRTM tiles: one degree by one degree, sixteen-bit metres from the north-west corner.

use super::raster::{Placement, Raster, System, Window};
use super::tiles::{self, Steps};
use crate::place::SiteError;
use std::fs::File;
use std::io::{Read, Seek, SeekFrom};
use std::path::Path;

/// Postings along a side at 3 and at 1 arc-second.
const SIDES: [usize; 2] = [1201, 3601];
const VOID: i16 = -32768;

/// South-west corner as (latitude, longitude) in degrees, from a name such as `N51W004.hgt`.
///
/// # Errors
/// The name is not of that form.
fn corner(path: &Path) -> Result<(i32, i32), SiteError> {
    let name = path.file_name().unwrap_or_default().to_string_lossy();
    let parsed = || {
        let part = |from: usize, to: usize| name.get(from..to);
        let signed = |letter: &str, digits: &str, positive: &str, negative: &str, most: i32| {
            let value: i32 = digits
                .bytes()
                .all(|byte| byte.is_ascii_digit())
                .then(|| digits.parse().ok())??;
            let sign = if letter.eq_ignore_ascii_case(positive) {
                1
            } else if letter.eq_ignore_ascii_case(negative) {
                -1
            } else {
                return None;
            };
            (value <= most).then_some(sign * value)
        };
        let latitude = signed(part(0, 1)?, part(1, 3)?, "N", "S", 90)?;
        let longitude = signed(part(3, 4)?, part(4, 7)?, "E", "W", 180)?;
        Some((latitude, longitude))
    };
    parsed().ok_or_else(|| {
        SiteError(format!(
            "{} cannot be placed: an .hgt tile is named for its south-west corner, such as \
             N51W004.hgt",
            path.display()
        ))
    })
}

/// Where a tile lies, from its name and its length.
///
/// # Errors
/// The name does not say, or the length is that of no tile.
pub(super) fn placement(path: &Path, bytes: u64) -> Result<Placement, SiteError> {
    let tile_bytes = |side: usize| (side * side * 2) as u64;
    let Some(side) = SIDES.into_iter().find(|side| tile_bytes(*side) == bytes) else {
        let [coarse, fine] = SIDES.map(tile_bytes);
        return Err(SiteError(format!(
            "{} has {bytes} bytes, but a whole .hgt tile has {coarse} (1201 x 1201) or {fine} \
             (3601 x 3601): it is cut short or of another kind, so fetch it anew",
            path.display()
        )));
    };
    of_side(path, side)
}

/// Where a tile lies, from its name alone; its number of postings is not known yet.
///
/// # Errors
/// The name does not say.
pub(super) fn nominal_placement(path: &Path) -> Result<Placement, SiteError> {
    of_side(path, SIDES[0])
}

fn of_side(path: &Path, side: usize) -> Result<Placement, SiteError> {
    let (south, west) = corner(path)?;
    let per_degree = (side - 1) as f64;
    Ok(Placement {
        system: System::Geographic {
            about_deg: f64::from(west) + 0.5,
        },
        column: [-f64::from(west) * per_degree, per_degree, 0.0],
        row: [f64::from(south + 1) * per_degree, 0.0, -per_degree],
        size: (side, side),
    })
}

/// Reads a window of a tile; `None` when cancelled.
///
/// # Errors
/// The file cannot be read.
pub(super) fn read(
    path: &Path,
    placement: Placement,
    window: Window,
    steps: &mut Steps,
) -> Result<Option<Raster>, SiteError> {
    let named = |error: std::io::Error| tiles::unreadable(path, &error);
    let side = placement.size.0;
    let mut raster = Raster::unknown(placement, window)
        .map_err(|SiteError(why)| SiteError(format!("{}: {why}", path.display())))?;
    let mut file = File::open(path).map_err(named)?;
    file.seek(SeekFrom::Start((window.first_row * side * 2) as u64))
        .map_err(named)?;
    let mut bytes = vec![0; side * 2];
    let mut elevations_m = vec![0.0; side];
    for k in 0..window.rows {
        if !steps.reach(k, window.rows) {
            return Ok(None);
        }
        file.read_exact(&mut bytes).map_err(named)?;
        let (pairs, _) = bytes.as_chunks();
        for (elevation_m, pair) in elevations_m.iter_mut().zip(pairs) {
            *elevation_m = match i16::from_be_bytes(*pair) {
                VOID => f32::NAN,
                metres => f32::from(metres),
            };
        }
        raster.set_row(window.first_row + k, 0, &elevations_m);
    }
    Ok(Some(raster))
}
