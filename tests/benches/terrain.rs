//! How long the far skyline takes: from four tiles to 60 km, and for another spot.

use dimmet::measure::Progress;
use dimmet::place::{FarSkyline, Terrain, TerrainRequest};
use divan::Bencher;
use std::path::Path;

fn main() {
    divan::main();
}

/// Four 3 arc-second tiles of hills around 51° N, 4° W.
fn tiles() -> tempfile::TempDir {
    let folder = tempfile::tempdir().expect("a folder");
    for (name, north, west) in [
        ("N51W004.hgt", 52.0, -4.0),
        ("N51W005.hgt", 52.0, -5.0),
        ("N50W004.hgt", 51.0, -4.0),
        ("N50W005.hgt", 51.0, -5.0),
    ] {
        let bytes: Vec<u8> = (0..1201)
            .flat_map(|row| (0..1201).map(move |column| (row, column)))
            .flat_map(|(row, column)| {
                {
                    let (y, x) = (
                        north - f64::from(row) / 1200.0,
                        west + f64::from(column) / 1200.0,
                    );
                    let hills = (y * 90.0).sin() * (x * 70.0).cos() * 200.0
                        + (y * 611.0 + x * 300.0).sin() * 40.0
                        + (x * 2111.0).sin() * (y * 1777.0).sin() * 15.0;
                    (300.0 + hills).round() as i16
                }
                .to_be_bytes()
            })
            .collect();
        std::fs::write(folder.path().join(name), bytes).expect("written");
    }
    folder
}

fn far_skyline(folder: &Path) -> FarSkyline {
    let terrain = Terrain::open(folder, TerrainRequest::at(51.02, -4.03)).expect("opened");
    let skyline = terrain.far_skyline(&Progress::new(), &mut |_| {});
    skyline.expect("read").expect("not cancelled")
}

/// Tiles found, read and looked at to 60 km in 3600 directions: 2 s are allowed.
#[divan::bench]
fn to_60_km(bencher: Bencher<'_, '_>) {
    let folder = tiles();
    bencher.bench_local(|| far_skyline(folder.path()));
}

/// The skyline of another spot from what was found: 1 ms is allowed.
#[divan::bench(args = [0.0, 60.0])]
fn from_a_spot(bencher: Bencher<'_, '_>, east_m: f64) {
    let skyline = far_skyline(tiles().path());
    bencher.bench_local(|| skyline.points(east_m, 0.5 * east_m, 2.0));
}
