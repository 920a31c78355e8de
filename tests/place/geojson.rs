//! GeoJSON and skyline tables: out and back, mapping data, and what is refused.

use crate::common::assert_within;
use dimmet::measure::Angle;
use dimmet::place::exchange::{
    Remark, TangentPlane, from_geojson, read_geojson, skyline_to_table, to_geojson, write_geojson,
    write_skyline_table,
};
use dimmet::place::{
    Exclusion, Leafless, Obstacle, PlanPoint, Site, SkylinePoint, Spot, YearDay,
    read_skyline_table, skyline_from_table,
};
use proptest::prelude::*;
use serde::Deserialize;
use std::fs;
use std::path::Path;

fn site() -> Site {
    Site::new("Fennick Common", 51.05, -3.42, chrono_tz::Europe::London).unwrap()
}

fn at(east_m: f64, north_m: f64) -> PlanPoint {
    PlanPoint::new(east_m, north_m)
}

/// One of everything, with every measure given.
fn furnished() -> Site {
    let mut site = site();
    site.spots.push(Spot {
        base_m: Some(1.5),
        radius_m: Some(6.0),
        eye_height_m: 1.1,
        ..Spot::at("upper lawn", at(30.0, -20.0))
    });
    site.obstacles = vec![
        Obstacle::Tree {
            label: "oak \"old\"".into(),
            east_m: -42.0,
            north_m: 8.0,
            base_m: Some(-0.5),
            height_m: 17.0,
            width_m: 12.0,
            gap_m: Some(3.0),
            trunk_m: Some(0.8),
            leafless: Some(Leafless {
                from: YearDay { month: 11, day: 15 },
                to: YearDay { month: 4, day: 20 },
                see_through: 0.6,
            }),
        },
        Obstacle::Pole {
            label: "lamp".into(),
            east_m: 12.0,
            north_m: 70.0,
            base_m: None,
            height_m: 5.0,
            width_m: 0.2,
        },
        Obstacle::Building {
            label: "hall".into(),
            corners_m: vec![
                at(-60.0, -20.0),
                at(-40.0, -20.0),
                at(-40.0, -32.0),
                at(-60.0, -32.0),
            ],
            base_m: None,
            eaves_m: 5.5,
            ridge_m: Some(8.0),
        },
        Obstacle::Shape {
            label: "bandstand".into(),
            corners_m: vec![at(80.0, 0.0), at(90.0, 0.0), at(85.0, 9.0)],
            base_m: Some(0.25),
            height_m: 6.0,
        },
        Obstacle::Wall {
            label: "hedge".into(),
            line_m: vec![at(-30.0, -60.0), at(-30.0, 60.0), at(0.0, 9000.0)],
            base_m: None,
            height_m: 2.2,
        },
    ];
    site.excluded = vec![Exclusion {
        label: "pond".into(),
        corners_m: vec![at(100.0, 100.0), at(120.0, 100.0), at(120.0, 130.0)],
    }];
    site.check().unwrap();
    site
}

fn collection(features: &str) -> String {
    format!(r#"{{"type": "FeatureCollection", "features": [{features}]}}"#)
}

fn feature(geometry: &str, properties: &str) -> String {
    format!(r#"{{"type": "Feature", "geometry": {geometry}, "properties": {{{properties}}}}}"#)
}

const POINT: &str = r#"{"type": "Point", "coordinates": [-3.4195, 51.0503]}"#;
const LINE: &str =
    r#"{"type": "LineString", "coordinates": [[-3.4195, 51.0503], [-3.419, 51.0505]]}"#;
const AREA: &str = r#"{"type": "Polygon", "coordinates": [[[-3.4195, 51.0503], [-3.419, 51.0503],
    [-3.419, 51.0506], [-3.4195, 51.0503]]]}"#;

fn refusal(text: &str) -> String {
    let refused = from_geojson(text, &site());
    refused.expect_err("the file must be refused").to_string()
}

#[derive(Deserialize)]
struct Row {
    mark_lat_deg: f64,
    mark_lon_deg: f64,
    lat_deg: f64,
    lon_deg: f64,
    east_m: f64,
    north_m: f64,
}

// tangent.csv: PROJ's azimuthal equidistant projection on WGS84, by make_tangent.py beside it.
#[test]
fn the_plan_agrees_with_an_independent_projection() {
    let path = Path::new(env!("CARGO_MANIFEST_DIR")).join("tests/data/tangent.csv");
    let mut table = csv::ReaderBuilder::new()
        .comment(Some(b'#'))
        .from_path(path)
        .unwrap();
    let rows: Vec<Row> = table.deserialize().map(Result::unwrap).collect();
    assert_eq!(rows.len(), 30);
    for row in rows {
        let site = Site::new("s", row.mark_lat_deg, row.mark_lon_deg, chrono_tz::UTC).unwrap();
        let plane = TangentPlane::at(&site);
        let (longitude, latitude) = (
            Angle::from_degrees(row.lon_deg),
            Angle::from_degrees(row.lat_deg),
        );
        let found = plane.plan_point(longitude, latitude);
        let distance_m = row.east_m.hypot(row.north_m);
        // The stated shortening, d^3 / 6 R^2, and half a millimetre for what is left.
        let tolerance_m = distance_m.powi(3) / (6.0 * 6.36e6 * 6.36e6) + 0.5e-3;
        let what = format!("{} {}", row.lat_deg, row.lon_deg);
        assert_within(found.east_m, row.east_m, tolerance_m, &what);
        assert_within(found.north_m, row.north_m, tolerance_m, &what);
        assert_within(
            plane.distance_m(longitude, latitude),
            distance_m,
            2e-3,
            &what,
        );
        let (longitude, latitude) = plane.coordinates(at(row.east_m, row.north_m));
        let off_deg = (longitude - Angle::from_degrees(row.lon_deg))
            .signed()
            .degrees();
        assert_within(off_deg, 0.0, 2e-7, &what);
        assert_within(latitude.degrees(), row.lat_deg, 5e-8, &what);
    }
}

#[test]
fn a_site_goes_out_and_comes_back() {
    let site = furnished();
    let folder = tempfile::tempdir().unwrap();
    let path = folder.path().join("grounds.geojson");
    write_geojson(&site, &path).unwrap();
    let mut bare = site.clone();
    bare.spots.clear();
    bare.obstacles.clear();
    bare.excluded.clear();
    let imported = read_geojson(&path, &bare).unwrap();
    assert_eq!(imported.remarks, []);
    let back = imported.added_to(&bare).unwrap();
    for (found, made) in back.obstacles.iter().zip(&site.obstacles) {
        // A footprint may start at another corner and run the other way round.
        let (found_points, points) = (found.points(), made.points());
        assert_eq!(found_points.len(), points.len());
        for point in &points {
            let nearest_m = found_points
                .iter()
                .map(|other| other.distance_m(*point))
                .fold(f64::MAX, f64::min);
            assert!(nearest_m < 3e-4, "{}: off by {nearest_m} m", made.label());
        }
        let mut same = found.clone();
        same.set_points(&points);
        assert_eq!(same, *made, "its measures");
    }
    assert_eq!(back.obstacles.len(), 5);
    assert_eq!(back.spots.len(), 2);
    for (found, made) in back.spots.iter().zip(&site.spots) {
        assert!(
            found.plan_point().distance_m(made.plan_point()) < 3e-4,
            "{found:?}"
        );
        assert_eq!(
            (
                &found.name,
                found.base_m,
                found.radius_m,
                found.eye_height_m
            ),
            (&made.name, made.base_m, made.radius_m, made.eye_height_m)
        );
    }
    assert_eq!(back.excluded[0].label, "pond");
    assert_eq!(back.excluded[0].corners_m.len(), 3);
}

#[test]
fn what_is_written_is_as_the_standard_wants_it() {
    let text = to_geojson(&furnished()).unwrap();
    let document: serde_json::Value = serde_json::from_str(&text).unwrap();
    assert_eq!(document["type"], "FeatureCollection");
    let features = document["features"].as_array().unwrap();
    assert_eq!(features.len(), 8);
    for feature in features {
        assert_eq!(feature["type"], "Feature");
        assert!(feature["properties"]["kind"].is_string());
        if feature["geometry"]["type"] != "Polygon" {
            continue;
        }
        let ring: Vec<(f64, f64)> =
            serde_json::from_value(feature["geometry"]["coordinates"][0].clone()).unwrap();
        assert_eq!(ring.first(), ring.last(), "the ring is closed");
        let doubled: f64 = ring
            .windows(2)
            .map(|side| {
                let (x, y) = ring[0];
                (side[0].0 - x) * (side[1].1 - y) - (side[1].0 - x) * (side[0].1 - y)
            })
            .sum();
        assert!(doubled > 0.0, "counter-clockwise: {feature}");
    }
    // The mark is the first spot, at the site's own coordinates, longitude first.
    assert_eq!(features[0]["geometry"]["coordinates"][0], -3.42);
    assert_eq!(features[0]["geometry"]["coordinates"][1], 51.05);
}

#[test]
fn mapping_data_comes_in_with_what_was_assumed() {
    let text = collection(
        &[
            feature(
                AREA,
                r#""building": "yes", "name": "Old school", "building:levels": "2""#,
            ),
            feature(
                AREA,
                r#""building": "house", "height": "9 m", "roof:height": 3"#,
            ),
            feature(
                POINT,
                r#""natural": "tree", "height": 14.5, "diameter_crown": "9""#,
            ),
            feature(POINT, r#""natural": "tree", "height": "tall", "fid": 12"#),
            feature(LINE, r#""barrier": "hedge", "height": null"#),
            feature(POINT, r#""highway": "street_lamp""#),
            feature(LINE, r#""highway": "footway", "name": "Mill Lane""#),
            feature(AREA, r#""amenity": "parking""#),
            feature(LINE, r#""name": "old line""#),
            feature(
                r#"{"type": "Point", "coordinates": [-3.418, 51.0497, 102.5]}"#,
                r#""name": "mark""#,
            ),
            feature("null", r#""name": "nowhere""#),
        ]
        .join(","),
    );
    let imported = from_geojson(&text, &site()).unwrap();
    let remarks: Vec<(usize, Remark)> = imported
        .remarks
        .iter()
        .map(|remarked| (remarked.feature, remarked.remark.clone()))
        .collect();
    assert_eq!(
        remarks,
        [
            (1, Remark::HeightFromStoreys { height_m: 6.0 }),
            (1, Remark::RoofTakenAsFlat),
            (
                4,
                Remark::LengthNotRead {
                    property: "height".into()
                }
            ),
            (4, Remark::HeightAssumed { height_m: 8.0 }),
            (4, Remark::WidthAssumed { width_m: 6.0 }),
            (5, Remark::HeightAssumed { height_m: 2.0 }),
            (6, Remark::HeightAssumed { height_m: 5.0 }),
            (6, Remark::WidthAssumed { width_m: 0.2 }),
            (7, Remark::PassedOver),
            (9, Remark::KindAssumed),
            (9, Remark::HeightAssumed { height_m: 2.0 }),
            (10, Remark::Renamed),
            (11, Remark::NoGeometry),
        ]
    );
    let kinds: Vec<&str> = imported
        .obstacles
        .iter()
        .map(|obstacle| match obstacle {
            Obstacle::Tree { .. } => "tree",
            Obstacle::Pole { .. } => "pole",
            Obstacle::Shape { .. } => "shape",
            Obstacle::Building { .. } => "building",
            Obstacle::Wall { .. } => "wall",
        })
        .collect();
    assert_eq!(
        kinds,
        [
            "building", "building", "tree", "tree", "wall", "pole", "wall"
        ]
    );
    assert!(matches!(
        &imported.obstacles[1],
        Obstacle::Building { eaves_m, ridge_m: Some(ridge_m), label, .. }
            if *eaves_m == 6.0 && *ridge_m == 9.0 && label == "building 2"
    ));
    assert!(matches!(
        &imported.obstacles[2],
        Obstacle::Tree {
            height_m: 14.5,
            width_m: 9.0,
            ..
        }
    ));
    assert_eq!(imported.excluded.len(), 1);
    assert_eq!(
        imported.spots[0].name, "mark 2",
        "the site has a mark already"
    );
    // By hand, from the ellipsoid's radii of curvature at 51.05 N (6391.09 km across, 6374.11 km
    // along the meridian): a degree of longitude is 70.123 km, one of latitude 111.249 km.
    assert_within(imported.spots[0].east_m, 140.246, 0.01, "east");
    assert_within(imported.spots[0].north_m, -33.375, 0.01, "north");
    imported.added_to(&site()).unwrap();
}

#[test]
fn a_number_is_a_name_too() {
    let text = collection(&feature(POINT, r#""name": 12"#));
    let imported = from_geojson(&text, &site()).unwrap();
    assert_eq!(imported.spots[0].name, "12");
    assert_eq!(imported.remarks, []);
}

#[test]
fn what_cannot_be_is_refused_in_a_sentence() {
    let one = |geometry: &str, properties: &str| collection(&feature(geometry, properties));
    for (text, expected) in [
        (
            one(
                r#"{"type": "Point", "coordinates": [51.0503, -3.4195]}"#,
                "",
            ),
            "feature 1: [51.0503, -3.4195] lies on the site only when exchanged: longitude comes \
             first, then latitude",
        ),
        (
            one(
                r#"{"type": "Point", "coordinates": [-3.4195, 52.0503]}"#,
                "",
            ),
            "feature 1: [-3.4195, 52.0503] lies 111 km from the site's mark, but nothing of a \
             site is farther than 10 km",
        ),
        (
            one(
                r#"{"type": "Point", "coordinates": [512345.0, 181234.0]}"#,
                "",
            ),
            "feature 1: [512345, 181234] is no longitude and latitude in degrees: save the file \
             in WGS84",
        ),
        (
            one(POINT, r#""kind": "tree", "leafless": "winter""#),
            "feature 1: its leafless cannot be read (invalid type: string \"winter\", expected \
             struct Leafless): write it as {\"from\": [11, 15], \"to\": [4, 20], \
             \"see_through\": 0.6}",
        ),
        (
            collection(&[feature(POINT, ""), feature(AREA, r#""kind": "wall""#)].join(",")),
            "feature 2: a wall is drawn as a LineString, but this one is a Polygon",
        ),
        (
            one(POINT, r#""kind": "castle""#),
            "feature 1: its kind is \"castle\"; the kinds are spot, tree, pole, wall, building, \
             shape, excluded",
        ),
        (
            one(POINT, r#""kind": "tree", "height_m": -2, "width_m": 3"#),
            "feature 1: height_m is -2, but must lie between 0.01 and 1000 metres",
        ),
        (
            one(POINT, r#""kind": "tree", "height_m": "tall", "width_m": 3"#),
            "feature 1: its height_m is \"tall\", not a number of metres",
        ),
        (
            one(
                r#"{"type": "Polygon", "coordinates": [[[-3.4195, 51.0503], [-3.419, 51.0506],
                    [-3.419, 51.0503], [-3.4195, 51.0507], [-3.4195, 51.0503]]]}"#,
                r#""kind": "shape", "height_m": 3, "label": "bow""#,
            ),
            "feature 1: the shape \"bow\" cannot be: its sides cross each other: list the corners \
             in order",
        ),
        (
            one(
                &format!(
                    r#"{{"type": "MultiPoint", "coordinates": [{0}, {0}]}}"#,
                    "[-3.4195, 51.0503]"
                ),
                "",
            ),
            "feature 1: it is a MultiPoint of 2 parts: split it into features of one part each",
        ),
        (
            r#"{"type": "FeatureCollection", "features": [],
                "crs": {"type": "name", "properties": {"name": "urn:ogc:def:crs:EPSG::27700"}}}"#
                .into(),
            "the coordinates are in the system urn:ogc:def:crs:EPSG::27700: save the file in \
             WGS84 longitude and latitude",
        ),
    ] {
        assert_eq!(refusal(&text), expected, "{text}");
    }
    for text in [
        "",
        "not json",
        "[]",
        "{}",
        r#"{"type": "Topology"}"#,
        r#"{"type": "FeatureCollection"}"#,
        &one(r#"{"type": "Point", "coordinates": [NaN, 51.0]}"#, ""),
        &one(r#"{"type": "Point", "coordinates": [1e999, 51.0]}"#, ""),
        &one(r#"{"type": "Point"}"#, ""),
    ] {
        let sentence = refusal(text);
        assert!(
            sentence.starts_with("this is no GeoJSON: "),
            "{text}: {sentence}"
        );
    }
    for text in [
        one(r#"{"type": "Point", "coordinates": []}"#, ""),
        one(r#"{"type": "Polygon", "coordinates": []}"#, ""),
        one(r#"{"type": "Polygon", "coordinates": [[]]}"#, ""),
        one(
            r#"{"type": "LineString", "coordinates": [[-3.42, 51.05]]}"#,
            "",
        ),
        one(r#"{"type": "MultiPolygon", "coordinates": []}"#, ""),
        one(r#"{"type": "GeometryCollection", "geometries": []}"#, ""),
    ] {
        let sentence = refusal(&text);
        assert!(
            !sentence.contains('\n') && !sentence.is_empty(),
            "{text}: {sentence}"
        );
    }
    let many = collection(&vec![feature(POINT, ""); 2501].join(","));
    assert_eq!(
        refusal(&many),
        "there are 2501 features, but may be at most 2500: cut out the grounds first"
    );
}

#[test]
fn a_kind_without_its_measures_gets_the_usual_ones() {
    let text = collection(
        &[
            feature(POINT, r#""kind": "tree", "width_m": 3, "gap_m": 2"#),
            feature(AREA, r#""kind": "building", "height": 9, "label": "barn""#),
            feature(
                AREA,
                r#""kind": "building", "eaves_m": 4, "ridge_m": 7, "height": 9"#,
            ),
        ]
        .join(","),
    );
    let imported = from_geojson(&text, &site()).unwrap();
    let remarks: Vec<(usize, &str, Remark)> = imported
        .remarks
        .iter()
        .map(|remarked| {
            (
                remarked.feature,
                remarked.label.as_str(),
                remarked.remark.clone(),
            )
        })
        .collect();
    assert_eq!(
        remarks,
        [
            (1, "tree 1", Remark::HeightAssumed { height_m: 8.0 }),
            (2, "barn", Remark::RoofTakenAsFlat),
        ]
    );
    assert!(matches!(
        imported.obstacles[0],
        Obstacle::Tree {
            height_m: 8.0,
            width_m: 3.0,
            gap_m: Some(2.0),
            ..
        }
    ));
    assert!(matches!(
        imported.obstacles[1],
        Obstacle::Building {
            eaves_m: 9.0,
            ridge_m: None,
            ..
        }
    ));
    assert!(matches!(
        imported.obstacles[2],
        Obstacle::Building {
            eaves_m: 4.0,
            ridge_m: Some(7.0),
            ..
        }
    ));
}

#[test]
fn many_spots_of_one_name_are_told_apart() {
    let text = collection(&vec![feature(POINT, r#""name": "here""#); 2500].join(","));
    let imported = from_geojson(&text, &site()).unwrap();
    let names: std::collections::HashSet<&str> = imported
        .spots
        .iter()
        .map(|spot| spot.name.as_str())
        .collect();
    assert_eq!(names.len(), 2500);
    let refused = imported.added_to(&site()).unwrap_err().to_string();
    assert!(refused.contains("2501 spots"), "{refused}");
}

#[test]
fn a_file_is_named_and_the_site_stays_as_it_was() {
    let folder = tempfile::tempdir().unwrap();
    let path = folder.path().join("big.geojson");
    fs::write(&path, " ".repeat(4 * 1024 * 1024 + 1)).unwrap();
    let sentence = read_geojson(&path, &site()).unwrap_err().to_string();
    assert!(
        sentence.contains("big.geojson") && sentence.contains("4 MB"),
        "{sentence}"
    );
    fs::write(&path, "{").unwrap();
    let sentence = read_geojson(&path, &site()).unwrap_err().to_string();
    assert!(
        sentence.contains("big.geojson: this is no GeoJSON"),
        "{sentence}"
    );
    // A spot within an obstacle is found when both come together.
    let text = collection(
        &[
            feature(POINT, r#""name": "inside""#),
            feature(POINT, r#""kind": "tree", "height_m": 9, "width_m": 4"#),
        ]
        .join(","),
    );
    let site = site();
    let refused = from_geojson(&text, &site).unwrap().added_to(&site);
    let sentence = refused.unwrap_err().to_string();
    assert!(
        sentence.contains("stands inside the obstacle"),
        "{sentence}"
    );
}

#[test]
fn holes_are_told_and_single_parts_taken() {
    let ring = "[[-3.4195, 51.0503], [-3.419, 51.0503], [-3.419, 51.0506], [-3.4195, 51.0503]]";
    let text = collection(&feature(
        &format!(r#"{{"type": "MultiPolygon", "coordinates": [[{ring}, {ring}]]}}"#),
        r#""kind": "shape", "height_m": 3, "label": "court""#,
    ));
    let imported = from_geojson(&text, &site()).unwrap();
    assert_eq!(imported.obstacles.len(), 1);
    assert_eq!(imported.remarks.len(), 1);
    assert_eq!(imported.remarks[0].remark, Remark::HolesLeftOut);
    assert_eq!(imported.remarks[0].label, "court");
    // A system that is WGS84 by another name is taken.
    let named = r#"{"type": "FeatureCollection", "features": [],
        "crs": {"type": "name", "properties": {"name": "urn:ogc:def:crs:OGC:1.3:CRS84"}}}"#;
    assert_eq!(from_geojson(named, &site()).unwrap(), Default::default());
}

#[test]
fn a_skyline_table_goes_out_and_comes_back() {
    let points = [(0.0, 2.0), (10.125, -0.5), (359.999_999_9, 1.0 / 3.0)].map(
        |(azimuth_deg, altitude_deg)| SkylinePoint {
            azimuth_deg,
            altitude_deg,
        },
    );
    let folder = tempfile::tempdir().unwrap();
    let path = folder.path().join("west.csv");
    write_skyline_table(&points, &path).unwrap();
    assert_eq!(read_skyline_table(&path).unwrap(), points);
    let none = skyline_to_table(&[]).unwrap_err().to_string();
    assert!(none.contains("no row of figures"), "{none}");
    let twice = skyline_to_table(&[points[0], points[0]])
        .unwrap_err()
        .to_string();
    assert!(twice.contains("stand at one azimuth"), "{twice}");
    let missing = folder.path().join("no folder/west.csv");
    let sentence = write_skyline_table(&points, &missing)
        .unwrap_err()
        .to_string();
    assert!(sentence.contains("there is no folder"), "{sentence}");
}

proptest! {
    #[test]
    fn the_plan_and_the_coordinates_are_inverse(
        latitude_deg in -85.0..85.0f64,
        longitude_deg in -180.0..180.0f64,
        east_m in -10_000.0..10_000.0f64,
        north_m in -10_000.0..10_000.0f64,
    ) {
        let site = Site::new("s", latitude_deg, longitude_deg, chrono_tz::UTC).unwrap();
        let plane = TangentPlane::at(&site);
        let (longitude, latitude) = plane.coordinates(at(east_m, north_m));
        prop_assert!((-180.0..=180.0).contains(&longitude.degrees()));
        let back = plane.plan_point(longitude, latitude);
        prop_assert!(back.distance_m(at(east_m, north_m)) < 1e-6, "{back:?}");
    }

    #[test]
    fn any_skyline_comes_back_the_same(
        points in prop::collection::btree_map(0u32..36_000, -10.0..90.0f64, 1..50),
    ) {
        let points: Vec<SkylinePoint> = points
            .iter()
            .map(|(hundredths, altitude_deg)| SkylinePoint {
                azimuth_deg: f64::from(*hundredths) / 100.0,
                altitude_deg: *altitude_deg,
            })
            .collect();
        let table = skyline_to_table(&points).unwrap();
        prop_assert_eq!(skyline_from_table(table.as_bytes()).unwrap(), points);
    }

    #[test]
    fn no_text_makes_the_reader_panic(text in "[\\[\\]{}\",:0-9.a-zA-Z -]{0,200}") {
        if let Ok(imported) = from_geojson(&text, &site()) {
            prop_assert!(imported.obstacles.is_empty());
        }
    }

    // Valid frames with any geometry and any numbers within.
    #[test]
    fn no_geometry_makes_the_reader_panic(
        kind in "(Point|LineString|Polygon|MultiPoint|MultiLineString|MultiPolygon)",
        coordinates in "[\\[\\],0-9.-]{0,40}",
        height in "[0-9a-z.\"-]{0,6}",
    ) {
        let geometry = format!(r#"{{"type": "{kind}", "coordinates": [{coordinates}]}}"#);
        let text = collection(&feature(&geometry, &format!("\"height\": {height}")));
        if let Err(error) = from_geojson(&text, &site()) {
            prop_assert!(!error.to_string().contains('\n'), "{error}");
        }
    }
}
