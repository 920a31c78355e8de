//! Measured skylines from tables.

use dimmet::measure::Angle;
use dimmet::place::{
    PlanPoint, Sector, Site, SkylinePoint, Spot, read_skyline_table, skyline_from_table,
};
use proptest::prelude::*;
use std::fs;

fn refusal(table: &str) -> String {
    skyline_from_table(table.as_bytes())
        .expect_err("the table must be refused")
        .to_string()
}

#[test]
fn a_table_is_read_in_any_order_of_rows_and_columns() {
    let table = "# by compass and clinometer\nalt_deg,note,az_deg\n4.0, oak ,262.5\n1.5,,10\n";
    let points = skyline_from_table(table.as_bytes()).expect("a good table");
    let pairs: Vec<(f64, f64)> = points.into_iter().map(Into::into).collect();
    assert_eq!(pairs, [(10.0, 1.5), (262.5, 4.0)]);
}

#[test]
fn what_is_wrong_is_named_by_line_and_column() {
    for (table, expected) in [
        (
            "az_deg,altitude\n1,2\n",
            "line 1: there is no column `alt_deg`: the first line must name the columns, \
             az_deg,alt_deg",
        ),
        (
            "10,4\n20,5\n",
            "line 1: there is no column `az_deg`: the first line must name the columns, \
             az_deg,alt_deg",
        ),
        (
            "az_deg,alt_deg\n1,2\n2,high\n",
            "line 3, column 2 (alt_deg): \"high\" is not a number",
        ),
        (
            "az_deg,alt_deg\n1,2\n360,2\n",
            "line 3, column 1 (az_deg): 360 must be at least 0 and below 360 degrees",
        ),
        (
            "az_deg,alt_deg\nNaN,2\n",
            "line 2, column 1 (az_deg): NaN must be at least 0 and below 360 degrees",
        ),
        (
            "az_deg,alt_deg\n1,inf\n",
            "line 2, column 2 (alt_deg): inf must be between -10 and 90 degrees",
        ),
        (
            "az_deg,alt_deg\n1,2\n3\n",
            "line 3, column 2 (alt_deg): the row ends before it",
        ),
        (
            "az_deg,alt_deg\n40,2\n10,3\n40,5\n",
            "lines 2 and 4 stand at one azimuth, 40: keep one",
        ),
        (
            "az_deg,alt_deg\n",
            "there is no row of figures below the column names",
        ),
    ] {
        assert_eq!(refusal(table), expected, "{table}");
    }
    refusal("");
}

#[test]
fn a_file_is_named_with_what_is_wrong_in_it() {
    let folder = tempfile::tempdir().expect("a folder");
    let path = folder.path().join("west.csv");
    fs::write(&path, "az_deg,alt_deg\n1,x\n").expect("written");
    let sentence = read_skyline_table(&path).expect_err("refused").to_string();
    assert_eq!(
        sentence,
        format!(
            "{}: line 2, column 2 (alt_deg): \"x\" is not a number",
            path.display()
        )
    );
    let missing = folder.path().join("missing.csv");
    let sentence = read_skyline_table(&missing)
        .expect_err("refused")
        .to_string();
    assert!(
        sentence.contains("missing.csv") && sentence.contains("no such file"),
        "{sentence}"
    );
}

proptest! {
    #[test]
    fn no_bytes_make_the_reader_panic(rows in "[0-9.,\\-\"\n az_deglt#]{0,200}") {
        let table = format!("az_deg,alt_deg\n{rows}");
        if let Ok(points) = skyline_from_table(table.as_bytes()) {
            let ascends = points.array_windows().all(|[a, b]| a.azimuth_deg < b.azimuth_deg);
            prop_assert!(ascends && !points.is_empty());
        }
    }
}

#[test]
fn a_spots_own_skyline_can_begin_with_what_is_far() {
    let mut site = Site::new("Hill", 50.0, 8.0, chrono_tz::Tz::UTC).expect("a valid site");
    assert!(site.far_points().is_empty(), "nothing measured");
    let point = |azimuth_deg, altitude_deg| SkylinePoint {
        azimuth_deg,
        altitude_deg,
    };
    site.skyline = vec![point(30.0, 4.0), point(200.0, 9.0), point(300.0, 2.0)];
    assert!(site.far_points().is_empty(), "nothing marked far");
    site.skyline_far = vec![Sector {
        from_deg: 250.0,
        to_deg: 40.0,
    }];
    site.spots.push(Spot::at("lawn", PlanPoint::new(20.0, 5.0)));
    let far = site.skyline(&site.spots[1]);
    let mut own = site.clone();
    own.spots[1].skyline = site.far_points();
    own.check().expect("points that a file can hold");
    let own = own.skyline(&own.spots[1]);
    for tenth in 0..3600 {
        let azimuth = Angle::from_degrees(0.1 * f64::from(tenth) + 0.05);
        let (far, own) = (far.altitude(azimuth), own.altitude(azimuth));
        assert!((far - own).degrees().abs() < 1e-6, "{}", azimuth.degrees());
    }
}
