//! Terrain: elevation tiles and the far skyline.

mod files;
mod horizon;
mod keeping;
mod refusals;
mod spots;
mod valley;

use dimmet::measure::Progress;
use dimmet::place::{FarSkyline, Relief, SiteError, Terrain, TerrainRequest};
use std::path::{Path, PathBuf};

const VOID: i16 = -32768;
/// Metres in an arc-second of latitude at 51 deg: the usual series for the length of a degree,
/// 111132.954 - 559.822 cos 2B + 1.175 cos 4B (from memory; printed in most textbooks).
const ARC_SECOND_AT_51_M: f64 = 30.901;

fn data(name: &str) -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR"))
        .join("tests/data/terrain")
        .join(name)
}

/// The lines of an expectation file, split at commas.
fn rows(name: &str) -> Vec<Vec<String>> {
    let text = std::fs::read_to_string(data(name)).expect("an expectation file");
    let lines = text.lines().filter(|line| !line.starts_with('#'));
    lines
        .map(|line| line.split(',').map(str::to_owned).collect())
        .collect()
}

/// Writes a 3 arc-second tile with the elevation of each posting by (row, column).
fn write_tile(folder: &Path, name: &str, elevation_m: impl Fn(i64, i64) -> i16) {
    let bytes: Vec<u8> = (0..1201)
        .flat_map(|row| (0..1201).map(move |column| (row, column)))
        .flat_map(|(row, column)| elevation_m(row, column).to_be_bytes())
        .collect();
    std::fs::write(folder.join(name), bytes).expect("written");
}

/// A folder with four tiles around 51° N, 4° W, by posting (north, east) of that corner.
fn world(elevation_m: impl Fn(i64, i64) -> i16) -> tempfile::TempDir {
    let folder = tempfile::tempdir().expect("a folder");
    for (name, north, east) in [
        ("N51W004.hgt", 1200, 0),
        ("N51W005.hgt", 1200, -1200),
        ("N50W004.hgt", 0, 0),
        ("N50W005.hgt", 0, -1200),
    ] {
        write_tile(folder.path(), name, |row, column| {
            elevation_m(north - row, east + column)
        });
    }
    folder
}

/// Seen from that corner.
fn at_corner() -> TerrainRequest {
    TerrainRequest::at(51.0, -4.0)
}

fn far_skyline(path: &Path, request: TerrainRequest) -> Result<FarSkyline, SiteError> {
    let terrain = Terrain::open(path, request)?;
    let skyline = terrain.far_skyline(&Progress::new(), &mut |_| {})?;
    Ok(skyline.expect("not cancelled"))
}

fn relief(path: &Path, request: TerrainRequest) -> Result<Relief, SiteError> {
    let relief = Terrain::open(path, request)?.relief(&Progress::new())?;
    Ok(relief.expect("not cancelled"))
}
