//! The skyline kept beside the site file.

use super::{at_corner, world};
use dimmet::measure::Progress;
use dimmet::place::{
    FarSkyline, SiteError, TerrainRequest, cache_path, far_skyline_cached, terrain_path,
};
use std::fs;
use std::path::Path;
use std::time::{Duration, UNIX_EPOCH};

/// The skyline, and whether it was worked out.
fn ask(tiles: &Path, site_file: Option<&Path>, request: TerrainRequest) -> (FarSkyline, bool) {
    let mut is_new = false;
    let progress = Progress::new();
    let skyline = far_skyline_cached(tiles, site_file, request, &progress, &mut |_| is_new = true);
    assert_eq!(progress.share(), 1.0);
    (skyline.expect("read").expect("not cancelled"), is_new)
}

fn near() -> TerrainRequest {
    TerrainRequest {
        radius_m: 5000.0,
        ..at_corner()
    }
}

#[test]
fn a_kept_skyline_is_the_same_and_serves_until_something_changes() {
    let tiles = world(|north, east| (200 + north % 37 + (east * 3) % 29) as i16);
    let folder = tempfile::tempdir().expect("a folder");
    let site_file = folder.path().join("common.site.ron");
    let (first, is_new) = ask(tiles.path(), Some(&site_file), near());
    assert!(is_new);
    let names: Vec<_> = fs::read_dir(folder.path())
        .expect("listed")
        .map(|entry| entry.expect("an entry").file_name())
        .collect();
    assert_eq!(names, ["common.terrain"], "one file, nothing temporary");
    assert_eq!(
        ask(tiles.path(), Some(&site_file), near()),
        (first.clone(), false)
    );

    let other_air = TerrainRequest {
        refraction_k: 0.2,
        ..near()
    };
    let (second, is_new) = ask(tiles.path(), Some(&site_file), other_air);
    assert!(is_new && second != first);
    let moved = TerrainRequest {
        longitude_deg: -4.000_01,
        ..near()
    };
    assert!(ask(tiles.path(), Some(&site_file), moved).1);
    assert!(
        ask(tiles.path(), Some(&site_file), near()).1,
        "only the last is kept"
    );

    let tile = fs::File::options()
        .write(true)
        .open(tiles.path().join("N51W004.hgt"))
        .expect("opened");
    tile.set_modified(UNIX_EPOCH + Duration::from_secs(1_600_000_000))
        .expect("its time set");
    assert!(
        ask(tiles.path(), Some(&site_file), near()).1,
        "a tile has changed"
    );
    assert!(!ask(tiles.path(), Some(&site_file), near()).1);
    fs::remove_file(tiles.path().join("N51W005.hgt")).expect("removed");
    assert!(
        ask(tiles.path(), Some(&site_file), near()).1,
        "a tile is gone"
    );
}

#[test]
fn a_damaged_file_is_passed_over() {
    let tiles = world(|north, _| north.rem_euclid(50) as i16);
    let folder = tempfile::tempdir().expect("a folder");
    let site_file = folder.path().join("common.site.ron");
    let cache = cache_path(&site_file);
    let (first, _) = ask(tiles.path(), Some(&site_file), near());
    let whole = fs::read(&cache).expect("kept");
    let mut altered = whole.clone();
    altered[whole.len() / 2] ^= 1;
    let mut longer = whole.clone();
    longer.extend([0; 8]);
    for damaged in [
        &altered[..],
        &longer,
        &whole[..whole.len() - 9],
        b"",
        b"{}\n",
    ] {
        fs::write(&cache, damaged).expect("written");
        assert_eq!(
            ask(tiles.path(), Some(&site_file), near()),
            (first.clone(), true)
        );
    }
    assert_eq!(fs::read(&cache).expect("kept anew"), whole);
    // Nor does it matter if nothing can be kept.
    fs::remove_file(&cache).expect("removed");
    fs::create_dir(&cache).expect("a folder in its place");
    assert_eq!(
        ask(tiles.path(), Some(&site_file), near()),
        (first.clone(), true)
    );
    assert_eq!(ask(tiles.path(), None, near()), (first, true));
}

#[test]
fn a_cancelled_or_refused_one_is_not_kept() {
    let tiles = world(|_, _| 10);
    let folder = tempfile::tempdir().expect("a folder");
    let site_file = folder.path().join("common.site.ron");
    let progress = Progress::new();
    let mut cancel = |_| progress.cancel();
    let stopped = far_skyline_cached(
        tiles.path(),
        Some(&site_file),
        near(),
        &progress,
        &mut cancel,
    );
    assert_eq!(stopped, Ok(None));
    assert!(!cache_path(&site_file).exists());
    let nowhere = folder.path().join("nowhere");
    let refused: Result<_, SiteError> = far_skyline_cached(
        &nowhere,
        Some(&site_file),
        near(),
        &Progress::new(),
        &mut |_| {},
    );
    assert!(refused.is_err());
    assert!(!cache_path(&site_file).exists());
}

#[test]
fn paths_are_beside_the_site_file() {
    let site_file = Path::new("sites/common.site.ron");
    assert_eq!(cache_path(site_file), Path::new("sites/common.terrain"));
    assert_eq!(cache_path(Path::new("a.ron")), Path::new("a.terrain"));
    let tiles = Path::new("tiles");
    assert_eq!(
        terrain_path(tiles, Some(site_file)),
        Path::new("sites/tiles")
    );
    assert_eq!(terrain_path(tiles, None), tiles);
    #[cfg(unix)]
    assert_eq!(
        terrain_path(Path::new("/dem"), Some(site_file)),
        Path::new("/dem")
    );
}
