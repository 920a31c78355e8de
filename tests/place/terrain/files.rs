//! Elevations read from files, against rasterio on the same files.

use super::{VOID, data, relief, rows, write_tile};
use crate::common::assert_within;
use dimmet::measure::Angle;
use dimmet::place::{Relief, TerrainRequest};

fn elevation_m(relief: &Relief, latitude_deg: f64, longitude_deg: f64) -> Option<f64> {
    relief.elevation_m(
        Angle::from_degrees(latitude_deg),
        Angle::from_degrees(longitude_deg),
    )
}

fn number(text: &str) -> f64 {
    text.parse().expect("a number")
}

/// Compares with an expectation that may be not a number: a void.
fn compare(relief: &Relief, latitude_deg: f64, longitude_deg: f64, expected_m: f64, what: &str) {
    let actual = elevation_m(relief, latitude_deg, longitude_deg);
    if expected_m.is_nan() {
        assert_eq!(actual, None, "{what}: a void by rasterio");
    } else {
        let actual = actual.unwrap_or_else(|| panic!("{what}: known to rasterio"));
        // Places are printed to 1e-12 deg, elevations to 0.1 mm and kept as 32-bit numbers.
        assert_within(actual, expected_m, 1e-3, what);
    }
}

#[test] // rasterio 1.4.4 with PROJ's coordinates (make_terrain.py)
fn elevations_in_many_kinds_of_geotiff_are_those_of_rasterio() {
    let rows = rows("kinds.csv");
    let mut kinds: Vec<&str> = rows.iter().map(|row| row[0].as_str()).collect();
    kinds.dedup();
    assert_eq!(kinds.len(), 8);
    for kind in kinds {
        let of_kind: Vec<_> = rows.iter().filter(|row| row[0] == kind).collect();
        let (latitude, longitude) = (number(&of_kind[20][1]), number(&of_kind[20][2]));
        let request = TerrainRequest {
            radius_m: 15_000.0,
            ..TerrainRequest::at(latitude, longitude)
        };
        let relief = relief(&data(&format!("kinds/{kind}.tif")), request).expect(kind);
        assert!(of_kind.len() > 25, "{kind}");
        for row in of_kind {
            compare(
                &relief,
                number(&row[1]),
                number(&row[2]),
                number(&row[3]),
                kind,
            );
        }
    }
}

/// CRC-32 of the usual kind (ISO 3309), bit by bit.
fn crc32(bytes: &[u8]) -> u32 {
    !bytes.iter().fold(!0, |crc, byte| {
        (0..8).fold(crc ^ u32::from(*byte), |crc, _| {
            (crc >> 1) ^ (0xedb8_8320 & (crc & 1).wrapping_neg())
        })
    })
}

#[test] // rasterio 1.4.4 on the same bytes (make_terrain.py)
fn elevations_in_an_hgt_tile_are_those_of_rasterio() {
    let folder = tempfile::tempdir().expect("a folder");
    write_tile(folder.path(), "S34E151.hgt", |row, column| {
        if (row / 40 + column / 40) % 11 == 0 {
            VOID
        } else {
            ((row * 7 + column * 13 + row * column / 50) % 3001 - 200) as i16
        }
    });
    let bytes = std::fs::read(folder.path().join("S34E151.hgt")).expect("read");
    let heading = std::fs::read_to_string(data("hgt.csv")).expect("read");
    assert!(
        heading.contains(&format!("# crc32,{}\n", crc32(&bytes))),
        "not the tile that rasterio read"
    );
    let mut voids = 0;
    let rows = rows("hgt.csv");
    for row in &rows {
        let (latitude, longitude) = (number(&row[0]), number(&row[1]));
        let request = TerrainRequest {
            radius_m: 1000.0,
            ..TerrainRequest::at(latitude, longitude)
        };
        let relief = relief(folder.path(), request).expect("read");
        compare(&relief, latitude, longitude, number(&row[2]), "S34E151.hgt");
        voids += usize::from(row[2] == "nan");
    }
    assert!(
        rows.len() > 100 && voids > 5,
        "{} rows, {voids} voids",
        rows.len()
    );
}

#[test]
fn tiles_join_across_their_edges_and_across_the_date_line() {
    let folder = tempfile::tempdir().expect("a folder");
    // East of 179 E, the elevation grows by a metre a posting right across the line.
    write_tile(folder.path(), "S17E179.hgt", |_, column| column as i16);
    write_tile(folder.path(), "S17W180.hgt", |_, column| {
        1200 + column as i16
    });
    let request = TerrainRequest {
        radius_m: 20_000.0,
        ..TerrainRequest::at(-16.5, 179.95)
    };
    let relief = relief(folder.path(), request).expect("read");
    for (longitude, expected_m) in [(179.9, 1080.0), (180.0, 1200.0), (-179.9, 1320.0)] {
        let actual = elevation_m(&relief, -16.5, longitude).expect("known");
        assert_within(actual, expected_m, 1e-6, "by construction");
    }
}

#[test]
fn one_or_two_void_corners_are_filled_and_more_are_not() {
    let folder = tempfile::tempdir().expect("a folder");
    write_tile(folder.path(), "N51W004.hgt", |row, column| {
        match (row, column) {
            (600, 600) | (700, 700) | (700, 701) | (800, 800) | (800, 801) | (801, 800) => VOID,
            _ => 100 + 10 * (column % 2) as i16,
        }
    });
    let request = TerrainRequest {
        radius_m: 40_000.0,
        ..TerrainRequest::at(51.5, -3.5)
    };
    let relief = relief(folder.path(), request).expect("read");
    let middle = |row: f64, column: f64| {
        elevation_m(
            &relief,
            52.0 - (row + 0.5) / 1200.0,
            -4.0 + (column + 0.5) / 1200.0,
        )
    };
    // The mean of 110, 100 and 110 stands for the unknown corner: the mean of four is the same.
    let one = middle(600.0, 600.0).expect("filled");
    assert_within(one, 320.0 / 3.0, 1e-4, "by hand");
    let two = middle(700.0, 700.0).expect("filled");
    assert_within(two, 105.0, 1e-4, "by hand");
    assert_eq!(middle(800.0, 800.0), None, "three of four are void");
}

#[test]
fn the_finest_tile_that_knows_a_place_counts() {
    let folder = tempfile::tempdir().expect("a folder");
    std::fs::copy(data("kinds/u8_strips.tif"), folder.path().join("b.tif")).expect("copied");
    write_tile(folder.path(), "N51W004.hgt", |row, _| {
        if row > 1150 { VOID } else { 1000 }
    });
    // 3 arc-seconds are finer than 0.002 deg, but have a void south of 51.04.
    let relief = relief(folder.path(), TerrainRequest::at(51.06, -3.46)).expect("read");
    assert_eq!(elevation_m(&relief, 51.07, -3.45), Some(1000.0));
    let coarse = elevation_m(&relief, 51.03, -3.45).expect("known to the coarser file");
    assert!((1.0..256.0).contains(&coarse), "{coarse}");
}
