//! The far skyline kept beside its site file.

use super::far_skyline::{Crest, FarSkyline};
use super::{Terrain, TerrainRequest};
use crate::measure::Progress;
use crate::place::SiteError;
use atomic_write_file::AtomicWriteFile;
use serde::Serialize;
use std::fs::{self, File};
use std::io::{Read, Write};
use std::path::{Path, PathBuf};

/// Of the file and of the way in which a skyline is found: raised when either changes.
const VERSION: u32 = 1;
/// No skyline kept here is larger, bytes.
const LARGEST_BYTES: u64 = 8 * 1024 * 1024;

/// Everything that a kept skyline depends on.
#[derive(Serialize)]
struct Key {
    version: u32,
    request: TerrainRequest,
    tiles: Vec<TileKey>,
}

#[derive(Serialize)]
struct TileKey {
    path: PathBuf,
    bytes: u64,
    modified_ns: u64,
}

/// The path of a site's terrain: relative to the folder of its site file, where it has one.
pub fn terrain_path(terrain: &Path, site_file: Option<&Path>) -> PathBuf {
    match site_file.and_then(Path::parent) {
        Some(folder) => folder.join(terrain),
        None => terrain.to_owned(),
    }
}

/// Where the skyline of a saved site is kept: `NAME.terrain` beside `NAME.site.ron`.
pub fn cache_path(site_file: &Path) -> PathBuf {
    let name = site_file.file_name().unwrap_or_default().to_string_lossy();
    let stem = name
        .strip_suffix(".site.ron")
        .or_else(|| name.strip_suffix(".ron"))
        .unwrap_or(&name);
    site_file.with_file_name(format!("{stem}.terrain"))
}

/// The skyline that the tiles at a path make, from the file kept beside the site file if that is
/// still right, otherwise worked out ([`Terrain::far_skyline`]) and kept. `None` when cancelled.
///
/// A kept skyline counts only for the same request and the same tiles (path, length and time of
/// the last change); one that is out of date or damaged is passed over, and one that cannot be
/// written is not kept. Without a site file nothing is kept.
///
/// # Errors
/// As [`Terrain::open`] and [`Terrain::far_skyline`].
pub fn far_skyline_cached(
    path: &Path,
    site_file: Option<&Path>,
    request: TerrainRequest,
    progress: &Progress,
    on_coarse: &mut dyn FnMut(FarSkyline),
) -> Result<Option<FarSkyline>, SiteError> {
    let terrain = Terrain::open(path, request)?;
    let cache = site_file.map(cache_path);
    let key = Key::of(&terrain);
    if let Some(kept) = cache.as_ref().and_then(|cache| read(cache, &key)) {
        progress.set_total(1);
        progress.advance(1);
        return Ok(Some(kept));
    }
    let skyline = terrain.far_skyline(progress, on_coarse)?;
    if let (Some(cache), Some(skyline)) = (cache, &skyline) {
        // A folder that may not be written to costs time at the next start, nothing else.
        let _ = write(&cache, &key, skyline);
    }
    Ok(skyline)
}

impl Key {
    fn of(terrain: &Terrain) -> Self {
        Self {
            version: VERSION,
            request: terrain.request,
            tiles: terrain
                .tiles
                .iter()
                .map(|tile| TileKey {
                    path: tile.path.clone(),
                    bytes: tile.bytes,
                    modified_ns: tile.modified_ns,
                })
                .collect(),
        }
    }
}

/// A line of JSON with the key, the numbers, and eight bytes that tell whether both are whole.
fn write(path: &Path, key: &Key, skyline: &FarSkyline) -> std::io::Result<()> {
    let mut bytes = serde_json::to_vec(key)?;
    bytes.push(b'\n');
    bytes.extend((skyline.azimuths as u32).to_le_bytes());
    for number in numbers(skyline) {
        bytes.extend(number.to_le_bytes());
    }
    for crest in &skyline.crests {
        // Nothing known is a distance that is no number.
        let (distance_m, rise_m) = crest.map_or((f32::NAN, 0.0), |c| (c.distance_m, c.rise_m));
        bytes.extend(distance_m.to_le_bytes());
        bytes.extend(rise_m.to_le_bytes());
    }
    bytes.extend(checksum(&bytes).to_le_bytes());
    let mut file = AtomicWriteFile::open(path)?;
    file.write_all(&bytes)?;
    file.commit()
}

fn numbers(skyline: &FarSkyline) -> [f64; 5] {
    [
        skyline.ground_m,
        skyline.drop_per_m,
        skyline.nearest_m,
        skyline.void_share,
        skyline.uncovered_share,
    ]
}

/// The skyline in a file if it is whole and of this key.
fn read(path: &Path, key: &Key) -> Option<FarSkyline> {
    let about = fs::metadata(path).ok()?;
    if !about.is_file() || about.len() > LARGEST_BYTES {
        return None;
    }
    let mut bytes = Vec::new();
    let mut file = File::open(path).ok()?.take(LARGEST_BYTES);
    file.read_to_end(&mut bytes).ok()?;
    let (bytes, sum) = bytes.split_last_chunk()?;
    if u64::from_le_bytes(*sum) != checksum(bytes) {
        return None;
    }
    let line_end = bytes.iter().position(|byte| *byte == b'\n')?;
    let (line, body) = bytes.split_at(line_end);
    if line != serde_json::to_vec(key).ok()? {
        return None;
    }
    let (azimuths, body) = body.get(1..)?.split_first_chunk()?;
    let azimuths = u32::from_le_bytes(*azimuths) as usize;
    let (head, body) = body.split_at_checked(5 * 8)?;
    let (head, _) = head.as_chunks();
    let [ground_m, drop_per_m, nearest_m, void_share, uncovered_share] = head
        .iter()
        .map(|n| f64::from_le_bytes(*n))
        .collect::<Vec<_>>()[..]
    else {
        return None;
    };
    let (pairs, rest) = body.as_chunks::<8>();
    let is_whole = rest.is_empty() && azimuths > 0 && pairs.len() % azimuths == 0;
    is_whole.then(|| FarSkyline {
        azimuths,
        crests: pairs.iter().map(crest).collect(),
        ground_m,
        drop_per_m,
        nearest_m,
        void_share,
        uncovered_share,
    })
}

fn crest(&[a, b, c, d, e, f, g, h]: &[u8; 8]) -> Option<Crest> {
    let distance_m = f32::from_le_bytes([a, b, c, d]);
    let rise_m = f32::from_le_bytes([e, f, g, h]);
    distance_m
        .is_finite()
        .then_some(Crest { distance_m, rise_m })
}

/// FNV-1a with 64 bits (G. Fowler, L. C. Noll, K.-P. Vo; constants as published): against a file
/// cut short or altered by chance, not by intent.
fn checksum(bytes: &[u8]) -> u64 {
    bytes.iter().fold(0xcbf2_9ce4_8422_2325, |hash, byte| {
        (hash ^ u64::from(*byte)).wrapping_mul(0x0000_0100_0000_01b3)
    })
}
