//! The site file as text: what is read, what is refused and with which sentence.

use crate::common::assert_within;
use dimmet::place::{Haze, Instrument, Obstacle, Orientation, Site, demo_sites};
use proptest::prelude::*;

const LEAST: &str = r#"Site(
    name: "Least",
    latitude_deg: 10.0,
    longitude_deg: 20.0,
    time_zone: "Africa/Ndjamena",
)"#;

/// A site file of the least fields and some more.
fn with(fields: &str) -> String {
    LEAST.replace("\n)", &format!("\n    {fields}\n)"))
}

fn refusal(text: &str) -> String {
    Site::from_ron(text)
        .expect_err("the text must be refused")
        .to_string()
}

#[test]
fn the_least_file_is_read_with_the_usual_values() {
    let site = Site::from_ron(LEAST).expect("a valid site");
    let observer = site.observer();
    assert_eq!(
        (observer.latitude.degrees(), observer.elevation_m),
        (10.0, 0.0)
    );
    assert_within(
        observer.longitude.degrees(),
        20.0,
        1e-12,
        "longitude as given",
    );
    assert_within(
        observer.air.pressure_hpa,
        1013.25,
        1e-9,
        "ISO 2533 at sea level",
    );
    assert_eq!(observer.air.temperature_c, 10.0);
    assert_eq!(site.zone(), chrono_tz::Tz::Africa__Ndjamena);
    let spot = site.resolve_spot(None).expect("a spot");
    assert_eq!(
        (spot.name.as_str(), spot.east_m, spot.north_m),
        ("mark", 0.0, 0.0)
    );
    assert!(site.skyline(spot).breaks().is_empty(), "an open horizon");
    assert!(site.terrain.is_none());
}

#[test]
fn every_field_of_the_full_file_is_read() {
    let site = Site::from_ron(
        r#"Site(
        name: "Full", latitude_deg: 51.05, longitude_deg: -3.42, elevation_m: 96.0,
        time_zone: "Europe/London",
        air: Air(pressure_hpa: 1003.0, temperature_c: 12.0, extinction_mag: 0.28),
        sky: Sky(dark_mag_arcsec2: 20.4),
        spots: [Spot(name: "mark", east_m: 0.0, north_m: 0.0, eye_height_m: 1.6)],
        skyline: [(180.0, 4.0), (225.0, 9.5), (262.0, 6.0), (300.0, 3.2)],
        obstacles: [
            Tree(label: "oak", east_m: -42.0, north_m: 8.0, base_m: 0.0, height_m: 17.0, width_m: 12.0),
            Building(label: "hall", corners_m: [(-60.0, -20.0), (-40.0, -20.0), (-40.0, -32.0), (-60.0, -32.0)], base_m: 0.0, eaves_m: 5.5, ridge_m: 8.0),
            Wall(label: "hedge", line_m: [(-30.0, -60.0), (-30.0, 60.0)], base_m: 0.0, height_m: 2.2),
        ],
        terrain: None,
        kit: [Telescope(label: "90 mm refractor", aperture_mm: 90.0, focal_length_mm: 900.0, eyepieces: [(25.0, 52.0), (10.0, 52.0)], view: mirrored),
              Binocular(label: "10x50", magnification: 10.0, aperture_mm: 50.0, field_deg: 6.5)],
    )"#,
    )
    .expect("the example of the design");
    assert_eq!(site.observer().air.pressure_hpa, 1003.0);
    assert_eq!(site.sky.dark_mag_arcsec2, 20.4);
    assert_eq!(site.skyline.len(), 4);
    let labels: Vec<&str> = site.obstacles.iter().map(Obstacle::label).collect();
    assert_eq!(labels, ["oak", "hall", "hedge"]);
    let views: Vec<_> = site.kit.iter().map(Instrument::views).collect();
    // 900 / 25 and 900 / 10 times; 52 degrees over each.
    assert_eq!(views[0], [(36.0, 52.0 / 36.0), (90.0, 52.0 / 90.0)]);
    assert_eq!(views[1], [(10.0, 6.5)]);
    assert_eq!(site.kit[0].orientation(), Orientation::Mirrored);
    assert_eq!(site.kit[1].orientation(), Orientation::Erect);
}

#[test]
fn eyes_may_be_stated_and_are_kept_within_their_range() {
    let site = Site::from_ron(&with("eyes: Eyes(visitor: 3.1, keen: 1.2),")).expect("a valid site");
    assert_eq!(site.eyes.visitor, Some(3.1));
    assert_eq!(site.eyes.passer_by, None);
    let again = Site::from_ron(&site.to_ron().expect("written")).expect("read back");
    assert_eq!(again, site);
    for factor in ["0.0", "-2.4", "51.0", "NaN", "inf"] {
        let text = with(&format!("eyes: Eyes(visitor: {factor}),"));
        let error = Site::from_ron(&text).expect_err(factor).to_string();
        assert!(
            error.contains("visitor") && error.contains("0.5 and 50"),
            "{factor}: {error}"
        );
    }
}

#[test]
fn clean_air_takes_what_schaefer_gives_and_haze_words_add_to_it() {
    let at = |fields: &str| {
        Site::from_ron(&with(fields))
            .expect("a valid site")
            .extinction()
    };
    // 0.1066 + 0.031 at sea level (Schaefer 1998); "Clear" is 0.25 in all.
    let clear = at("");
    assert_within(
        clear.rayleigh_mag + clear.ozone_mag,
        0.1376,
        1e-12,
        "Schaefer 1998",
    );
    assert_within(clear.total_mag(), 0.2476, 1e-12, "clear air at sea level");
    // 0.1066 exp(-1) at one scale height.
    assert_within(
        at("elevation_m: 8200.0,").rayleigh_mag,
        0.039_216,
        1e-6,
        "Schaefer 1998",
    );
    let stated = at("air: Air(extinction_mag: 0.3),");
    assert_within(stated.total_mag(), 0.3, 1e-12, "the stated total");
    assert_within(
        stated.aerosol_mag,
        0.3 - 0.1376,
        1e-12,
        "what clean air leaves of it",
    );
    let murky = at("air: Air(haze: Murky),");
    assert_eq!(murky.aerosol_mag, Haze::Murky.aerosol_mag());
    assert!(murky.total_mag() > at("air: Air(haze: Hazy),").total_mag());
    assert!(at("air: Air(haze: VeryClear),").total_mag() < clear.total_mag());
}

#[test]
fn pressure_falls_with_elevation_as_in_the_standard_atmosphere() {
    // ISO 2533: 898.746 hPa at 1000 m, 701.085 hPa at 3000 m (geopotential).
    for (elevation_m, expected) in [(1000.0, 898.746), (3000.0, 701.085)] {
        let text = with(&format!("elevation_m: {elevation_m:?},"));
        let site = Site::from_ron(&text).expect("a valid site");
        assert_within(site.observer().air.pressure_hpa, expected, 0.02, "ISO 2533");
    }
}

#[test]
fn refusals_name_line_column_field_value_and_range() {
    for (text, expected) in [
        (
            LEAST.replace("10.0", "95.0"),
            "line 3, column 19: latitude_deg is 95, but must lie between -90 and 90 degrees",
        ),
        (
            LEAST.replace("20.0", "NaN"),
            "line 4, column 20: longitude_deg is NaN, but must lie between -180 and 180 degrees",
        ),
        (
            LEAST.replace("10.0", "-inf"),
            "line 3, column 19: latitude_deg is -inf, but must lie between -90 and 90 degrees",
        ),
        (
            with("elevation_m: 1e400,"),
            "line 6, column 18: elevation_m is inf, but must lie between -450 and 9000 metres",
        ),
        (
            with("air: Air(pressure_hpa: 20.0),"),
            "line 6, column 28: pressure_hpa is 20, but must lie between 300 and 1100 hectopascals",
        ),
        (
            with("skyline: [(0.0, 1.0),\n (360.0, 2.0)],"),
            "line 7, column 3: azimuth_deg is 360, but must be at least 0 and below 360 degrees",
        ),
        (
            with("skyline: [(10.0, 1.0), (30.0, 2.0), (20.0, 3.0)],"),
            "line 6, column 52: the skyline point (20, 3) comes after (30, 2): list the points in \
             ascending azimuth",
        ),
        (
            with("skyline: [(10.0, 1.0), (10.0, 2.0)],"),
            "line 6, column 39: the skyline points (10, 1) and (10, 2) stand at one azimuth: keep one",
        ),
        (
            LEAST.replace("Africa/Ndjamena", "Europe/Lodnon"),
            "line 5, column 17: there is no time zone \"Europe/Lodnon\"; did you mean Europe/London?",
        ),
        (
            with("air: Air(haze: Clear,\n extinction_mag: 0.3),"),
            "line 6, column 14: air has both extinction_mag and haze: keep one",
        ),
        (
            with("// extinction_mag\n air: Air(extinction_mag: 0.1),"),
            "line 7, column 11: extinction_mag is 0.1, but clean air at 0 m alone takes 0.1376: \
             give that or more",
        ),
        (
            with("spots: [Spot(name: \"a\"), Spot(name: \"a\")],"),
            "line 6, column 41: there are two spots named \"a\": rename one",
        ),
        (
            with("version: 2,"),
            "line 6, column 14: version is 2, but this program knows version 1 only",
        ),
        (
            with(
                "obstacles: [Tree(label: \"elm\", east_m: 1.0, north_m: 0.0, height_m: 9.0, width_m: 4.0)],",
            ),
            "the spot \"mark\" stands inside the obstacle \"elm\": move one of them",
        ),
        (
            with(
                "kit: [Binocular(label: \"\", magnification: 8.0, aperture_mm: 30.0, field_deg: 7.0)],",
            ),
            "line 6, column 29: a name or label is empty: give it one",
        ),
    ] {
        assert_eq!(refusal(&text), expected, "{text}");
    }
}

#[test]
fn unknown_repeated_and_missing_fields_are_refused_where_they_stand() {
    for (text, line, word) in [
        (with("lonn: 3.0,"), 6, "lonn"),
        (with("name: \"again\","), 6, "name"),
        (with("air: Air(presure_hpa: 1000.0),"), 6, "presure_hpa"),
        (with("air: Air(haze: Foggy),"), 6, "Foggy"),
        (with("spots: [Spot(nme: \"x\")],"), 6, "nme"),
        (with("obstacles: [Shrub(label: \"x\")],"), 6, "Shrub"),
        (
            with("obstacles: [Wall(label: \"x\", line_m: [(1.0, 1.0), (2.0, 2.0)])],"),
            6,
            "height_m",
        ),
        (
            LEAST.replace("    longitude_deg: 20.0,\n", ""),
            5,
            "longitude_deg",
        ),
        (LEAST.replace("10.0", "\"ten\""), 3, "float"),
        (LEAST.replace("20.0,", "20.0"), 5, "comma"),
        (format!("{LEAST} more"), 6, "Trailing"),
    ] {
        let sentence = refusal(&text);
        assert!(
            sentence.starts_with(&format!("line {line}, ")),
            "{sentence}\n{text}"
        );
        assert!(
            sentence.to_lowercase().contains(&word.to_lowercase()),
            "{sentence} must name {word}"
        );
    }
}

#[test]
fn impossible_shapes_are_refused() {
    let building = |corners: &str, heights: &str| {
        with(&format!(
            "obstacles: [Building(label: \"barn\", corners_m: [{corners}], {heights})],"
        ))
    };
    for (text, part) in [
        (
            building(
                "(9.0, 9.0), (9.0, 20.0), (20.0, 20.0)",
                "eaves_m: 5.0, ridge_m: 4.0",
            ),
            "ridge_m 4 lies below its eaves_m 5",
        ),
        (
            building("(9.0, 9.0), (9.0, 20.0)", "eaves_m: 5.0"),
            "at least three corners",
        ),
        (
            building("(9.0, 9.0), (12.0, 12.0), (20.0, 20.0)", "eaves_m: 5.0"),
            "enclose an area",
        ),
        (
            building(
                "(9.0, 9.0), (20.0, 20.0), (20.0, 9.0), (9.0, 24.0)",
                "eaves_m: 5.0",
            ),
            "cross each other",
        ),
        (
            building(
                "(-9.0, -9.0), (-9.0, 20.0), (20.0, 20.0), (20.0, -9.0)",
                "eaves_m: 5.0",
            ),
            "the spot \"mark\" stands inside the obstacle \"barn\"",
        ),
        (
            with(
                "obstacles: [Wall(label: \"w\", line_m: [(3.0, 3.0), (3.0, 3.0)], height_m: 1.0)],",
            ),
            "two points apart",
        ),
        (
            with(
                "obstacles: [Wall(label: \"w\", line_m: [(-3.0, 0.0), (3.0, 0.0)], height_m: 1.0)],",
            ),
            "stands inside the obstacle \"w\"",
        ),
    ] {
        let sentence = refusal(&text);
        assert!(sentence.contains(part), "{sentence} must say: {part}");
    }
}

#[test]
fn what_cannot_stand_on_the_grounds_is_refused_where_it_is_written() {
    let bow = "[(9.0, 9.0), (20.0, 20.0), (20.0, 9.0), (9.0, 24.0)]";
    let tree = |rest: &str| {
        with(&format!(
            "obstacles: [Tree(label: \"elm\", east_m: 30.0, north_m: 0.0, height_m: 9.0, width_m: 4.0, {rest})],"
        ))
    };
    for (text, expected) in [
        (
            with(&format!(
                "obstacles: [Shape(label: \"tent\", corners_m: {bow}, height_m: 3.0)],"
            )),
            "line 6, column 30: the obstacle \"tent\" cannot be: its sides cross each other: list \
             the corners in order",
        ),
        (
            with(&format!(
                "excluded: [Exclusion(label: \"pond\", corners_m: {bow})],"
            )),
            "line 6, column 33: the excluded area \"pond\" cannot be: its sides cross each other: \
             list the corners in order",
        ),
        (
            with(&format!("outline_m: {bow},")),
            "line 6, column 5: the outline of the grounds cannot be: its sides cross each other: \
             list the corners in order",
        ),
        (
            with("outline_m: [(1.0, 1.0), (2.0, 2.0)],"),
            "line 6, column 5: the outline of the grounds cannot be: its outline_m need at least \
             three corners that enclose an area",
        ),
        (
            tree("gap_m: 9.0"),
            "line 6, column 29: the obstacle \"elm\" cannot be: its gap_m 9 reaches its height_m 9",
        ),
        (
            tree("trunk_m: 5.0"),
            "line 6, column 29: the obstacle \"elm\" cannot be: its trunk_m 5 exceeds its width_m 4",
        ),
        (
            tree("leafless: Leafless(from: (2, 30), to: (4, 1), see_through: 0.5)")
                .replace("[Tree", "\n[Tree"),
            "line 7, column 109: (2, 30) is no day of the year: write (month, day), as (11, 15)",
        ),
        (
            with(
                "obstacles: [Pole(label: \"post\", east_m: 9.0, north_m: 0.0, height_m: 0.0, width_m: 0.1)],",
            ),
            "line 6, column 74: height_m is 0, but must lie between 0.01 and 1000 metres",
        ),
        (
            with(
                "obstacles: [Pole(label: \"post\", east_m: 9.0, north_m: 0.0, height_m: -2.0, width_m: 0.1)],",
            ),
            "line 6, column 74: height_m is -2, but must lie between 0.01 and 1000 metres",
        ),
        (
            with(
                "kit: [Binocular(label: \"8x30\", magnification: 8.0, aperture_mm: 30.0, field_deg: 7.0, spot: \"roof\")],",
            ),
            "line 6, column 97: the instrument \"8x30\" stands at the spot \"roof\", but there is \
             none of that name: write one of \"mark\", or leave it out",
        ),
        (
            with(&format!("skyline_far: [{}],", "(0.0, 1.0), ".repeat(101))),
            "line 6, column 5: there are 101 skyline_far, but may be at most 100",
        ),
    ] {
        assert_eq!(refusal(&text), expected, "{text}");
    }
}

#[test]
fn all_that_the_grounds_can_say_reads_back_the_same() {
    let text = with(
        "slope: Slope(east_percent: 2.5, north_percent: -1.0),
    people: People(adult_m: 1.65, child_m: 1.0, wheelchair_m: 1.25),
    spots: [
        Spot(name: \"mark\", eye_height_m: 1.5, radius_m: 4.0),
        Spot(name: \"roof\", east_m: 30.0, north_m: -2.0, base_m: 3.5, skyline: [(10.0, 4.0)], skyline_far: [(0.0, 0.0)]),
    ],
    skyline: [(0.0, 1.0), (90.0, 2.0)],
    skyline_far: [(350.0, 20.0)],
    obstacles: [
        Tree(label: \"elm\", east_m: 9.0, north_m: 9.0, height_m: 9.0, width_m: 4.0, gap_m: 2.5, trunk_m: 0.4, leafless: Leafless(from: (11, 1), to: (4, 30), see_through: 0.7)),
        Pole(label: \"post\", east_m: 5.0, north_m: 0.0, base_m: -1.0, height_m: 4.0, width_m: 0.1),
        Shape(label: \"tent\", corners_m: [(-5.0, -5.0), (-9.0, -5.0), (-7.0, -9.0)], height_m: 3.0),
    ],
    blocking_density: 0.25,
    excluded: [Exclusion(label: \"pond\", corners_m: [(1.0, 1.0), (4.0, 1.0), (2.0, 4.0)])],
    outline_m: [(-20.0, -20.0), (20.0, -20.0), (0.0, 30.0)],
    terrain_k: 0.2,
    kit: [Binocular(label: \"8x30\", magnification: 8.0, aperture_mm: 30.0, field_deg: 7.0, spot: \"roof\")],",
    );
    let site = Site::from_ron(&text).expect("a valid site");
    let again = Site::from_ron(&site.to_ron().expect("it can be written"));
    assert_eq!(again.expect("what was written can be read"), site);
    let bare = Site::from_ron(LEAST).expect("a valid site");
    assert_ne!(site.slope, bare.slope);
    assert_ne!(site.people, bare.people);
    assert_ne!(site.blocking_density, bare.blocking_density);
    assert_ne!(site.terrain_k, bare.terrain_k);
    assert_eq!(site.spots[0].radius_m, Some(4.0));
    assert_eq!(
        (site.spots[1].base_m, site.spots[1].skyline.len()),
        (Some(3.5), 1)
    );
    assert_eq!(
        (site.spots[1].skyline_far.len(), site.skyline_far.len()),
        (1, 1)
    );
    assert_eq!((site.excluded.len(), site.outline_m.len()), (1, 3));
    assert_eq!(site.kit[0].spot(), Some("roof"));
    let Obstacle::Tree {
        gap_m,
        trunk_m,
        leafless,
        ..
    } = &site.obstacles[0]
    else {
        panic!("a tree: {:?}", site.obstacles[0]);
    };
    assert_eq!(
        (*gap_m, *trunk_m, leafless.is_some()),
        (Some(2.5), Some(0.4), true)
    );
    // Nobody could tell apart what is usual from what is left out, so it is not written.
    let least = bare.to_ron().expect("it can be written");
    for field in [
        "slope",
        "people",
        "skyline_far",
        "blocking_density",
        "excluded",
        "outline_m",
        "terrain_k",
    ] {
        assert!(!least.contains(field), "{least}");
    }
}

#[test]
fn deep_nesting_is_refused_and_a_byte_order_mark_is_not() {
    refusal(&"[".repeat(200_000));
    refusal(&format!("Site(skyline: {}", "(".repeat(200_000)));
    Site::from_ron(&format!("\u{feff}{LEAST}")).expect("a valid site behind a byte order mark");
}

#[test]
fn an_unknown_spot_is_answered_with_the_known_ones() {
    let site = &demo_sites()[0];
    assert_eq!(
        site.resolve_spot(Some("pond lawn")).expect("a spot").name,
        "pond lawn"
    );
    let sentence = site
        .resolve_spot(Some("roof"))
        .expect_err("no such spot")
        .to_string();
    assert_eq!(
        sentence,
        "Fennick Common has no spot \"roof\"; its spots are \"mark\", \"pond lawn\", \"bandstand\""
    );
}

#[test]
fn the_written_text_reads_back_the_same_and_has_a_line_for_each_thing() {
    for site in demo_sites() {
        let text = site.to_ron().expect("a demo site can be written");
        assert_eq!(
            &Site::from_ron(&text).expect("what was written can be read"),
            site
        );
        let lines = 20..75;
        assert!(lines.contains(&text.lines().count()), "{text}");
        assert!(text.contains("\n        Spot(name: \"mark\", "), "{text}");
    }
}

#[test]
fn a_site_made_by_the_program_is_checked_too() {
    let zone = chrono_tz::Tz::Europe__London;
    let mut site = Site::new("New", 51.0, -3.0, zone).expect("a valid site");
    assert!(Site::new("New", f64::NAN, -3.0, zone).is_err());
    assert!(Site::new(" ", 51.0, -3.0, zone).is_err());
    site.longitude_deg = 200.0;
    assert_eq!(
        site.to_ron().expect_err("out of range").to_string(),
        "longitude_deg is 200, but must lie between -180 and 180 degrees"
    );
    site.longitude_deg = -3.0;
    site.spots.clear();
    assert!(
        site.check()
            .expect_err("no spot")
            .to_string()
            .contains("at least one spot")
    );
}

/// The text of a demo site with some of its bytes exchanged, taken out or doubled.
fn mutated() -> impl Strategy<Value = Vec<u8>> {
    let edit = (any::<prop::sample::Index>(), any::<u8>(), 0..4u8);
    (0..demo_sites().len(), prop::collection::vec(edit, 1..12)).prop_map(|(which, edits)| {
        let mut bytes = demo_sites()[which]
            .to_ron()
            .expect("a demo site")
            .into_bytes();
        for (index, byte, kind) in edits {
            let at = index.index(bytes.len());
            match kind {
                0 => bytes[at] = byte,
                1 => {
                    bytes.remove(at);
                }
                2 => bytes.insert(at, bytes[at]),
                _ => bytes[at] = b"0123456789.-()[]\",:e"[usize::from(byte) % 20],
            }
        }
        bytes
    })
}

/// Reads a text and asks for everything that a valid site can be asked for.
fn try_all(text: &str) {
    if let Ok(site) = Site::from_ron(text) {
        let again = site.to_ron().expect("what was read can be written");
        assert_eq!(Site::from_ron(&again).expect("and read again"), site);
        for spot in &site.spots {
            let skyline = site.skyline(spot);
            let highest = skyline.highest().degrees();
            assert!(
                (0.0..=90.0).contains(&highest),
                "highest {highest} of {text}"
            );
            let outline = skyline.outline(dimmet::measure::Angle::from_degrees(1.0));
            assert!(
                outline.iter().all(|(a, h)| a.is_finite() && h.is_finite()),
                "{text}"
            );
        }
    }
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(400))]

    #[test]
    fn no_bytes_make_the_reader_panic(bytes in prop::collection::vec(any::<u8>(), 0..400)) {
        try_all(&String::from_utf8_lossy(&bytes));
    }

    #[test]
    fn no_mutation_of_a_site_makes_the_reader_panic(bytes in mutated()) {
        try_all(&String::from_utf8_lossy(&bytes));
    }
}
