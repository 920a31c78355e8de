//! The elevation files that matter for a site: found, placed, read.

use super::geodesy::{Origin, Position};
use super::raster::{Placement, Raster, Window};
use super::{geotiff, hgt};
use crate::measure::{Angle, Progress};
use crate::place::SiteError;
use std::fs::{self, Metadata};
use std::io::ErrorKind;
use std::path::{Path, PathBuf};
use std::time::UNIX_EPOCH;

/// The most postings that are held at once: 256 MB. A circle of 60 km at one arc-second has half
/// as many up to latitude 60.
const MOST_POSTINGS: usize = 64_000_000;

/// One file, and the part of it that matters.
pub(super) struct Tile {
    pub path: PathBuf,
    pub bytes: u64,
    /// Time of its last change, ns from 1970; 0 where the file system does not say.
    pub modified_ns: u64,
    pub placement: Placement,
    pub window: Window,
    kind: Kind,
}

#[derive(Clone, Copy)]
enum Kind {
    Hgt,
    GeoTiff,
}

impl Kind {
    fn of(path: &Path) -> Option<Self> {
        let extension = path.extension()?.to_string_lossy().to_ascii_lowercase();
        match extension.as_str() {
            "hgt" => Some(Self::Hgt),
            "tif" | "tiff" => Some(Self::GeoTiff),
            _ => None,
        }
    }
}

/// The circle around a site.
pub(super) struct Circle {
    centre: Position,
    /// Places along it and inside, for finding the part of a grid that holds it.
    places: Vec<Position>,
}

impl Circle {
    pub(super) fn new(centre: Position, radius_m: f64) -> Self {
        let origin = Origin::new(centre);
        // Between places 5 deg apart the chord falls short of the arc by 0.1 % of the radius.
        let around = (0..72)
            .map(|k| origin.ahead(Angle::from_degrees(f64::from(k) * 5.0), radius_m * 1.001));
        Self {
            centre,
            places: std::iter::once(centre).chain(around).collect(),
        }
    }
}

/// The tiles at a path, a file or a folder of them, that reach into a circle; finest first.
///
/// # Errors
/// The path holds no tile, a tile cannot be placed, none holds the site, or they have too many
/// postings.
pub(super) fn find(path: &Path, circle: &Circle) -> Result<Vec<Tile>, SiteError> {
    let about = fs::metadata(path).map_err(|error| unreadable(path, &error))?;
    let mut tiles = Vec::new();
    for file in files(path, &about)? {
        tiles.extend(tile(file, circle)?);
    }
    let latitude = circle.centre.latitude;
    tiles.sort_by(|a, b| {
        let spacing_m = |tile: &Tile| tile.placement.spacing_m(latitude);
        let by_spacing = spacing_m(a).total_cmp(&spacing_m(b));
        by_spacing.then_with(|| a.path.cmp(&b.path))
    });
    if !tiles.iter().any(|tile| holds(tile, circle.centre)) {
        return Err(SiteError(format!(
            "{} does not hold the site at latitude {:.4}, longitude {:.4}; choose the elevations \
             around it",
            path.display(),
            latitude.to_degrees(),
            circle.centre.longitude.to_degrees()
        )));
    }
    let postings: usize = tiles.iter().map(|tile| tile.window.postings()).sum();
    if postings > MOST_POSTINGS {
        return Err(SiteError(format!(
            "{} has {} million elevations within the radius, but at most {} million are read: \
             choose a smaller radius or a coarser file",
            path.display(),
            postings / 1_000_000,
            MOST_POSTINGS / 1_000_000
        )));
    }
    Ok(tiles)
}

fn holds(tile: &Tile, position: Position) -> bool {
    let placement = &tile.placement;
    placement.system.project(position).is_some_and(|at| {
        let (column, row) = placement.cell(at);
        let (columns, rows) = placement.size;
        (-0.5..=columns as f64 - 0.5).contains(&column) && (-0.5..=rows as f64 - 0.5).contains(&row)
    })
}

/// The file itself, or the tiles of a folder by name.
fn files(path: &Path, about: &Metadata) -> Result<Vec<PathBuf>, SiteError> {
    if !about.is_dir() {
        return match Kind::of(path) {
            Some(_) => Ok(vec![path.to_owned()]),
            None => Err(SiteError(format!(
                "{} is no elevation file by its name; choose an .hgt or .tif file, or a folder of \
                 them",
                path.display()
            ))),
        };
    }
    let mut found = Vec::new();
    for entry in fs::read_dir(path).map_err(|error| unreadable(path, &error))? {
        let file = entry.map_err(|error| unreadable(path, &error))?.path();
        if Kind::of(&file).is_some() && file.is_file() {
            found.push(file);
        }
    }
    if found.is_empty() {
        return Err(SiteError(format!(
            "{} holds no elevation tiles; choose a folder with .hgt or .tif files",
            path.display()
        )));
    }
    found.sort();
    Ok(found)
}

/// A file as a tile; `None` if it does not reach into the circle.
fn tile(path: PathBuf, circle: &Circle) -> Result<Option<Tile>, SiteError> {
    let Some(kind) = Kind::of(&path) else {
        return Ok(None);
    };
    let about = fs::metadata(&path).map_err(|error| unreadable(&path, &error))?;
    if !about.is_file() {
        return Err(SiteError(format!(
            "{} is not a plain file; choose an elevation file",
            path.display()
        )));
    }
    let is_far = |placement: Placement| placement.window(&circle.places).is_none();
    let placement = match kind {
        // A tile far away may be of any size: it is not needed.
        Kind::Hgt if is_far(hgt::nominal_placement(&path)?) => return Ok(None),
        Kind::Hgt => hgt::placement(&path, about.len())?,
        Kind::GeoTiff => geotiff::placement(&path)?,
    };
    let Some(window) = placement.window(&circle.places) else {
        return Ok(None);
    };
    Ok(Some(Tile {
        bytes: about.len(),
        modified_ns: modified_ns(&about),
        path,
        placement,
        window,
        kind,
    }))
}

fn modified_ns(about: &Metadata) -> u64 {
    let since_1970 = about
        .modified()
        .ok()
        .and_then(|at| at.duration_since(UNIX_EPOCH).ok());
    since_1970.map_or(0, |since| since.as_nanos() as u64)
}

impl Tile {
    /// Steps of progress that reading a tile counts as.
    pub(super) const STEPS: u64 = 200;

    /// Reads the elevations; `None` when cancelled.
    ///
    /// # Errors
    /// The file is damaged or can no longer be read.
    pub(super) fn read(&self, progress: &Progress) -> Result<Option<Raster>, SiteError> {
        let mut steps = Steps {
            progress,
            counted: 0,
        };
        let raster = match self.kind {
            Kind::Hgt => hgt::read(&self.path, self.placement, self.window, &mut steps),
            Kind::GeoTiff => geotiff::read(&self.path, self.placement, self.window, &mut steps),
        };
        steps.reach(1, 1);
        raster
    }
}

/// Counts the reading of one tile.
pub(super) struct Steps<'a> {
    progress: &'a Progress,
    counted: u64,
}

impl Steps<'_> {
    /// Counts up to a part of the whole; false if the work should stop.
    pub(super) fn reach(&mut self, part: usize, whole: usize) -> bool {
        let reached = Tile::STEPS * part as u64 / whole.max(1) as u64;
        self.progress.advance(reached.saturating_sub(self.counted));
        self.counted = reached;
        !self.progress.is_cancelled()
    }
}

/// A sentence about a path that cannot be read.
pub(super) fn unreadable(path: &Path, error: &std::io::Error) -> SiteError {
    let why = match error.kind() {
        ErrorKind::NotFound => "there is no such file or folder".into(),
        ErrorKind::PermissionDenied => "its permissions forbid it".into(),
        ErrorKind::UnexpectedEof => "it is cut short; fetch it anew".into(),
        _ => error.to_string(),
    };
    SiteError(format!("cannot read {}: {why}", path.display()))
}
