//! Bad tiles, folders and requests: one sentence each, naming the file and what to do.

use super::{data, far_skyline, relief, world, write_tile};
use dimmet::place::{Terrain, TerrainRequest};
use std::fs;
use std::path::{Path, PathBuf};
use tiff::encoder::TiffEncoder;
use tiff::encoder::colortype::{ColorType, Gray16, RGB8};
use tiff::tags::Tag;

/// In the middle of the files that these tests make.
fn here() -> TerrainRequest {
    TerrainRequest {
        radius_m: 1000.0,
        ..TerrainRequest::at(51.05, -3.45)
    }
}

/// The sentence with which a path is refused, be it when opened or when read.
#[track_caller]
fn refusal(path: &Path, request: TerrainRequest) -> String {
    let sentence = far_skyline(path, request)
        .expect_err("it must be refused")
        .to_string();
    assert!(
        sentence.contains(&path.display().to_string()),
        "{sentence} must name {}",
        path.display()
    );
    assert!(!sentence.contains('\n'), "{sentence}");
    sentence
}

/// A tag of several doubles or shorts.
enum Extra<'a> {
    Doubles(Tag, &'a [f64]),
    Shorts(&'a [u16]),
}

const SCALE: Extra<'_> = Extra::Doubles(Tag::ModelPixelScaleTag, &[0.002, 0.002, 0.0]);
const TIE: Extra<'_> = Extra::Doubles(Tag::ModelTiepointTag, &[0.0, 0.0, 0.0, -3.5, 51.1, 0.0]);
/// Version and one key: latitude and longitude on WGS84.
const WGS84: Extra<'_> = Extra::Shorts(&[1, 1, 0, 1, 2048, 0, 1, 4326]);

fn write_tiff<C: ColorType<Inner: Default + Clone>>(path: &Path, extras: &[Extra<'_>])
where
    [C::Inner]: tiff::encoder::TiffValue,
{
    let (width, height) = (50, 50);
    let mut file = fs::File::create(path).expect("created");
    let mut encoder = TiffEncoder::new(&mut file).expect("begun");
    let mut image = encoder.new_image::<C>(width, height).expect("begun");
    for extra in extras {
        let tags = image.encoder();
        match extra {
            Extra::Doubles(tag, numbers) => tags.write_tag(*tag, *numbers),
            Extra::Shorts(numbers) => tags.write_tag(Tag::GeoKeyDirectoryTag, *numbers),
        }
        .expect("a tag");
    }
    let samples = (width * height) as usize * C::BITS_PER_SAMPLE.len();
    image
        .write_data(&vec![C::Inner::default(); samples])
        .expect("written");
}

fn gray(folder: &Path, name: &str, extras: &[Extra<'_>]) -> PathBuf {
    let path = folder.join(name);
    write_tiff::<Gray16>(&path, extras);
    path
}

#[test]
fn hgt_tiles_of_a_wrong_size_or_name() {
    let folder = tempfile::tempdir().expect("a folder");
    let named = |name: &str| folder.path().join(name);
    write_tile(folder.path(), "N51W004.hgt", |_, _| 0);
    let whole = fs::read(named("N51W004.hgt")).expect("read");
    fs::write(named("N51W004.hgt"), &whole[..whole.len() - 2]).expect("cut");
    let sentence = refusal(&named("N51W004.hgt"), here());
    assert!(sentence.contains("has 2884800 bytes"), "{sentence}");
    assert!(sentence.contains("2884802 (1201 x 1201)"), "{sentence}");
    fs::write(named("N51W004.hgt"), b"").expect("emptied");
    assert!(refusal(&named("N51W004.hgt"), here()).contains("has 0 bytes"));
    for name in [
        "hills.hgt",
        "N51.hgt",
        "X51W004.hgt",
        "N99W004.hgt",
        "N+1W004.hgt",
        "N51W0é.hgt",
    ] {
        fs::write(named(name), &whole).expect("written");
        let sentence = refusal(&named(name), here());
        assert!(
            sentence.contains("south-west corner, such as N51W004.hgt"),
            "{sentence}"
        );
    }
}

#[test]
fn a_broken_tile_far_away_does_no_harm() {
    let folder = tempfile::tempdir().expect("a folder");
    write_tile(folder.path(), "N51W004.hgt", |_, _| 0);
    fs::write(folder.path().join("S20E010.hgt"), b"short").expect("written");
    fs::write(folder.path().join("readme.txt"), b"no tile").expect("written");
    far_skyline(folder.path(), here()).expect("not needed");
}

#[test]
fn what_is_no_geotiff_of_elevations() {
    let folder = tempfile::tempdir().expect("a folder");
    let folder = folder.path();
    let good = gray(folder, "good.tif", &[SCALE, TIE, WGS84]);
    far_skyline(&good, here()).expect("these tags are enough");

    let path = folder.join("text.tif");
    fs::write(&path, "not a tiff at all").expect("written");
    assert!(refusal(&path, here()).contains("is not a TIFF file"));
    fs::write(&path, "").expect("written");
    assert!(refusal(&path, here()).contains("is not a TIFF file"));

    for (name, extras) in [
        ("bare.tif", &[][..]),
        ("unplaced.tif", &[WGS84]),
        ("unscaled.tif", &[WGS84, TIE]),
        ("keyless.tif", &[SCALE, TIE]),
    ] {
        let sentence = refusal(&gray(folder, name, extras), here());
        assert!(
            sentence.contains("does not say where it lies"),
            "{sentence}"
        );
    }
    let flat = Extra::Doubles(Tag::ModelPixelScaleTag, &[0.0, 0.002, 0.0]);
    let sentence = refusal(&gray(folder, "flat.tif", &[flat, TIE, WGS84]), here());
    assert!(sentence.contains("on one line"), "{sentence}");
    let nan = Extra::Doubles(Tag::ModelPixelScaleTag, &[f64::NAN, 0.002, 0.0]);
    refusal(&gray(folder, "nan.tif", &[nan, TIE, WGS84]), here());

    let path = folder.join("photo.tif");
    write_tiff::<RGB8>(&path, &[SCALE, TIE, WGS84]);
    assert!(refusal(&path, here()).contains("is a picture"));
}

#[test]
fn coordinates_of_other_kinds() {
    let folder = tempfile::tempdir().expect("a folder");
    let refused = |name: &str, keys: &[u16]| {
        refusal(
            &gray(folder.path(), name, &[SCALE, TIE, Extra::Shorts(keys)]),
            here(),
        )
    };
    // A national grid, a web map, a grid of the user's own, degrees on another ellipsoid, a zone
    // that does not exist, and geocentric coordinates.
    for (name, keys, said) in [
        (
            "a.tif",
            &[1, 1, 0, 2, 1024, 0, 1, 1, 3072, 0, 1, 27700][..],
            "EPSG:27700",
        ),
        ("b.tif", &[1, 1, 0, 1, 3072, 0, 1, 3857], "EPSG:3857"),
        (
            "c.tif",
            &[1, 1, 0, 2, 1024, 0, 1, 1, 3072, 0, 1, 32767],
            "an unnamed kind",
        ),
        ("d.tif", &[1, 1, 0, 1, 2048, 0, 1, 4230], "EPSG:4230"),
        ("e.tif", &[1, 1, 0, 1, 3072, 0, 1, 32661], "EPSG:32661"),
        ("f.tif", &[1, 1, 0, 1, 1024, 0, 1, 3], "an unnamed kind"),
        ("g.tif", &[1, 1], "an unnamed kind"),
    ] {
        let sentence = refused(name, keys);
        assert!(sentence.contains(said), "{sentence}");
        assert!(
            sentence.contains("save it in latitude and longitude (EPSG:4326) or in a UTM zone")
        );
    }
    let feet = refused(
        "feet.tif",
        &[1, 1, 0, 2, 2048, 0, 1, 4326, 4099, 0, 1, 9003],
    );
    assert!(feet.contains("not in metres"), "{feet}");
}

const WIDTH: u16 = 256;
const LENGTH: u16 = 257;
const ROWS_PER_STRIP: u16 = 278;

/// Changes a tag with one value of four bytes.
fn set_long(tiff: &mut [u8], tag: u16, value: u32) {
    let entry = [&tag.to_le_bytes()[..], &[4, 0, 1, 0, 0, 0]].concat();
    let at = tiff.windows(8).position(|w| w == entry).expect("the tag") + 8;
    tiff[at..at + 4].copy_from_slice(&value.to_le_bytes());
}

#[test]
fn sizes_that_cannot_be() {
    let folder = tempfile::tempdir().expect("a folder");
    let path = gray(folder.path(), "huge.tif", &[SCALE, TIE, WGS84]);
    let mut good = fs::read(&path).expect("read");
    set_long(&mut good, ROWS_PER_STRIP, u32::MAX);
    for (tag, size, said) in [
        (WIDTH, 3_000_000_000, "has 3000000000 x 50 cells"),
        (LENGTH, 3_000_000_000, "has 50 x 3000000000 cells"),
        (WIDTH, 1, "has 1 x 50 cells"),
    ] {
        let mut bytes = good.clone();
        set_long(&mut bytes, tag, size);
        fs::write(&path, bytes).expect("written");
        let sentence = refusal(&path, here());
        assert!(sentence.contains(said), "{sentence}");
    }
}

#[test]
fn more_elevations_than_are_read() {
    // Postings 2 m apart over 0.5 deg: only the head of the file matters, it is never read.
    let folder = tempfile::tempdir().expect("a folder");
    let path = gray(
        folder.path(),
        "fine.tif",
        &[
            Extra::Doubles(Tag::ModelPixelScaleTag, &[2e-5, 2e-5, 0.0]),
            Extra::Doubles(Tag::ModelTiepointTag, &[0.0, 0.0, 0.0, -3.7, 51.3, 0.0]),
            WGS84,
        ],
    );
    let mut bytes = fs::read(&path).expect("read");
    for tag in [WIDTH, LENGTH, ROWS_PER_STRIP] {
        set_long(&mut bytes, tag, 25_000);
    }
    fs::write(&path, bytes).expect("written");
    let wide = TerrainRequest {
        radius_m: 30_000.0,
        ..here()
    };
    let sentence = refusal(&path, wide);
    assert!(
        sentence.contains("at most 64 million are read"),
        "{sentence}"
    );
    // Within 1 km it would do, but for the file's single strip.
    let sentence = refusal(&path, here());
    assert!(
        sentence.contains("unpacks to more than 256 MB"),
        "{sentence}"
    );
}

#[test]
fn files_cut_short_anywhere_are_refused_or_read_and_never_crash() {
    let folder = tempfile::tempdir().expect("a folder");
    let path = folder.path().join("cut.tif");
    for kind in [
        "u16_deflate_tiles",
        "i16_lzw_point",
        "f64_south_point",
        "u8_strips",
    ] {
        let whole = fs::read(data(&format!("kinds/{kind}.tif"))).expect("read");
        let request = match kind {
            "f64_south_point" => TerrainRequest {
                latitude_deg: -33.87,
                longitude_deg: 150.85,
                ..here()
            },
            _ => here(),
        };
        let mut refused = 0;
        for part in 1..40 {
            fs::write(&path, &whole[..whole.len() * part / 40]).expect("written");
            if let Err(error) = relief(&path, request) {
                assert!(error.to_string().contains("cut.tif"), "{error}");
                refused += 1;
            }
        }
        assert!(refused > 10, "{kind}: {refused}");
        // And with a byte changed anywhere.
        for at in (0..whole.len()).step_by(whole.len() / 60) {
            let mut altered = whole.clone();
            altered[at] ^= 0x5a;
            fs::write(&path, altered).expect("written");
            if let Err(error) = relief(&path, request) {
                assert!(!error.to_string().contains('\n'), "{error}");
            }
        }
    }
}

#[test]
fn folders_and_files_without_the_site() {
    let folder = tempfile::tempdir().expect("a folder");
    let empty = folder.path().join("empty");
    fs::create_dir(&empty).expect("made");
    fs::write(empty.join("notes.txt"), "nothing").expect("written");
    assert!(refusal(&empty, here()).contains("holds no elevation tiles"));
    assert!(refusal(&folder.path().join("missing"), here()).contains("there is no such file"));
    let notes = empty.join("notes.txt");
    assert!(refusal(&notes, here()).contains("no elevation file by its name"));
    #[cfg(target_os = "linux")]
    assert!(refusal(Path::new("/dev/null"), here()).contains("no elevation file"));

    let land = world(|_, _| 0);
    let far = TerrainRequest::at(48.0, 11.5);
    let sentence = refusal(land.path(), far);
    assert!(
        sentence.contains("does not hold the site at latitude 48.0000, longitude 11.5000"),
        "{sentence}"
    );
    // Tiles within the radius, but none under the site.
    let beside = TerrainRequest::at(52.2, -3.5);
    assert!(refusal(land.path(), beside).contains("does not hold the site"));
    let holes = world(|_, _| super::VOID);
    assert!(refusal(holes.path(), super::at_corner()).contains("has a void there"));
}

#[test]
fn requests_out_of_range() {
    let land = data("jacksboro.tif");
    let good = TerrainRequest::at(36.6, -84.2);
    for (request, said) in [
        (
            TerrainRequest {
                radius_m: 60_001.0,
                ..good
            },
            "the radius must lie between 1000 and 60000",
        ),
        (
            TerrainRequest {
                radius_m: f64::NAN,
                ..good
            },
            "the radius",
        ),
        (
            TerrainRequest {
                latitude_deg: 91.0,
                ..good
            },
            "the latitude",
        ),
        (
            TerrainRequest {
                longitude_deg: f64::INFINITY,
                ..good
            },
            "the longitude",
        ),
        (
            TerrainRequest {
                eye_height_m: -1.0,
                ..good
            },
            "the eye height",
        ),
        (
            TerrainRequest {
                refraction_k: 1.0,
                ..good
            },
            "the coefficient of refraction must lie between -1 and 0.9, but it is 1",
        ),
    ] {
        let Err(error) = Terrain::open(&land, request) else {
            panic!("{request:?} must be refused");
        };
        assert!(error.to_string().contains(said), "{error}");
    }
}
