//! Photographs: synthetic cameras and panoramas, wrong marks, outlines.

use crate::common::assert_within;
use dimmet::measure::Angle;
use dimmet::place::Skyline;
use dimmet::place::survey::compass::Sweep;
use dimmet::place::survey::photo::{
    Camera, Direction, Level, Panorama, PhotoMark, Picture, PictureKind, PictureSize, Pixel,
    Projection, Traced, fit,
};
use proptest::prelude::*;

const SIZE: PictureSize = PictureSize {
    width: 4000,
    height: 3000,
};

fn degrees(degrees: f64) -> Angle {
    Angle::from_degrees(degrees)
}

fn camera(heading_deg: f64, pitch_deg: f64, roll_deg: f64, field_deg: f64) -> Camera {
    Camera {
        middle: Pixel {
            x: 2000.0,
            y: 1500.0,
        },
        heading: degrees(heading_deg),
        pitch: degrees(pitch_deg),
        roll: degrees(roll_deg),
        focal_length_px: 2000.0 / degrees(0.5 * field_deg).tan(),
    }
}

/// A mark as the picture shows it.
fn mark(picture: Picture, x: f64, y: f64, has_altitude: bool) -> PhotoMark {
    let at = Pixel { x, y };
    let direction = picture.direction(at);
    PhotoMark {
        at,
        azimuth: direction.azimuth,
        altitude: has_altitude.then_some(direction.altitude),
    }
}

fn assert_same(fitted: Picture, made: Picture, what: &str) {
    for (x, y) in [(0.0, 0.0), (4000.0, 0.0), (2000.0, 1500.0), (10.0, 2990.0)] {
        let (a, b) = (
            fitted.direction(Pixel { x, y }),
            made.direction(Pixel { x, y }),
        );
        let off_deg = (a.azimuth - b.azimuth).signed().degrees() * b.altitude.cos();
        assert_within(off_deg, 0.0, 1e-6, &format!("{what}: azimuth at {x},{y}"));
        assert_within(
            (a.altitude - b.altitude).degrees(),
            0.0,
            1e-6,
            &format!("{what}: altitude at {x},{y}"),
        );
    }
}

// Worked by hand: 60 degrees wide, 4000 pixels: f = 2000 / tan 30 = 3464.1016. Looking level
// due south, 1000 pixels right of the middle is atan(1000 / 3464.1016) = 16.102114 degrees west
// of south; 1000 pixels above it is atan(1000 / hypot(1000, 3464.1016)) = 15.501360 degrees up.
#[test]
fn a_level_camera_by_hand() {
    let made = Picture::Single(camera(180.0, 0.0, 0.0, 60.0));
    let seen = made.direction(Pixel {
        x: 3000.0,
        y: 500.0,
    });
    assert_within(seen.azimuth.degrees(), 196.102_114, 1e-6, "azimuth");
    assert_within(seen.altitude.degrees(), 15.501_360, 1e-6, "altitude");
    // Turned clockwise by 10 degrees, the level rises to the right.
    let turned = Picture::Single(camera(180.0, 0.0, 10.0, 60.0));
    let level = turned
        .pixel(Direction {
            azimuth: degrees(190.0),
            altitude: Angle::ZERO,
        })
        .unwrap();
    assert!(level.x > 2000.0 && level.y < 1500.0, "{level:?}");
    // Looking up, altitude 0 lies below the middle, f tan(pitch) down.
    let up = Picture::Single(camera(180.0, 12.0, 0.0, 60.0));
    let foot = up
        .pixel(Direction {
            azimuth: degrees(180.0),
            altitude: Angle::ZERO,
        })
        .unwrap();
    assert_within(
        foot.y,
        1500.0 + 3464.1016 * degrees(12.0).tan(),
        1e-3,
        "level",
    );
}

#[test]
fn two_azimuths_and_a_level_picture_are_enough() {
    let made = Picture::Single(camera(350.0, 0.0, 0.0, 65.0));
    let marks = [
        mark(made, 300.0, 1400.0, false),
        mark(made, 3600.0, 1200.0, false),
    ];
    let fitted = fit(PictureKind::Single, SIZE, &marks, &Level::Picture).unwrap();
    assert_same(fitted.picture, made, "two azimuths across north");
    assert_eq!(fitted.spare, 0);
    let Picture::Single(found) = fitted.picture else {
        panic!("a camera")
    };
    assert_within(found.field().degrees(), 65.0, 1e-6, "field of view");
    assert_within(
        fitted.pixel.radians(),
        1.0 / found.focal_length_px,
        1e-15,
        "one pixel",
    );
}

#[test]
fn a_wrong_mark_stands_out() {
    let made = Picture::Single(camera(225.0, 4.0, 1.0, 70.0));
    let mut marks: Vec<PhotoMark> = [400.0, 1300.0, 2200.0, 3000.0, 3700.0]
        .iter()
        .map(|x| mark(made, *x, 1400.0, true))
        .collect();
    marks[3].azimuth = marks[3].azimuth + degrees(6.0);
    let fitted = fit(
        PictureKind::Single,
        SIZE,
        &marks,
        &Level::Points(Vec::new()),
    )
    .unwrap();
    let sizes: Vec<f64> = fitted
        .residuals
        .iter()
        .map(|r| r.size().degrees())
        .collect();
    let worst = (0..5)
        .max_by(|a, b| sizes[*a].total_cmp(&sizes[*b]))
        .unwrap();
    assert_eq!(worst, 3, "{sizes:?}");
    assert!(
        sizes[3] > 3.0 && fitted.residuals[3].azimuth < Angle::ZERO,
        "{sizes:?}"
    );
    assert_eq!(fitted.spare, 6, "ten facts for four numbers");
}

#[test]
fn a_full_panorama_takes_marks_on_both_sides_of_north() {
    let made = Picture::Panorama(Panorama {
        projection: Projection::Equirectangular,
        middle_x: 2000.0,
        middle_azimuth: degrees(10.0),
        azimuth_per_pixel: degrees(360.0 / 4000.0),
        level_y: 1490.0,
        level_slope: 0.0,
    });
    let kind = PictureKind::Panorama(Projection::Equirectangular);
    let marks = [
        mark(made, 3950.0, 1400.0, true),
        mark(made, 5.0, 1000.0, true),
        mark(made, 1700.0, 1500.0, false),
    ];
    let fitted = fit(kind, SIZE, &marks, &Level::Picture).unwrap();
    assert_same(fitted.picture, made, "a whole turn");
    // The same landmark at both ends.
    let ends = [
        mark(made, 0.0, 1490.0, true),
        mark(made, 4000.0, 1490.0, true),
        mark(made, 1000.0, 1490.0, false),
    ];
    let fitted = fit(kind, SIZE, &ends, &Level::Picture).unwrap();
    assert_same(fitted.picture, made, "one landmark at both ends");
}

#[test]
fn a_level_picture_without_altitudes_has_its_level_in_the_middle() {
    let marks = [
        PhotoMark {
            at: Pixel { x: 0.0, y: 100.0 },
            azimuth: degrees(180.0),
            altitude: None,
        },
        PhotoMark {
            at: Pixel {
                x: 4000.0,
                y: 100.0,
            },
            azimuth: degrees(280.0),
            altitude: None,
        },
    ];
    let kind = PictureKind::Panorama(Projection::Cylindrical);
    let fitted = fit(kind, SIZE, &marks, &Level::Picture).unwrap();
    // By hand: 100 degrees over 4000 pixels, 400 pixels up: 10 degrees = 0.17453293 of rise,
    // which on a cylinder is atan(0.17453293) = 9.900277 degrees.
    let seen = fitted.picture.direction(Pixel {
        x: 1000.0,
        y: 1100.0,
    });
    assert_within(seen.azimuth.degrees(), 205.0, 1e-9, "azimuth");
    assert_within(seen.altitude.degrees(), 9.900_277, 1e-6, "altitude");
}

#[test]
fn marks_that_cannot_be_are_refused() {
    let made = Picture::Single(camera(225.0, 0.0, 0.0, 60.0));
    let panorama = PictureKind::Panorama(Projection::Equirectangular);
    let (left, right) = (
        mark(made, 500.0, 1500.0, false),
        mark(made, 3500.0, 1500.0, false),
    );
    let refusal = |kind, marks: &[PhotoMark], level: Level| {
        let refused = fit(kind, SIZE, marks, &level);
        refused.expect_err("the marks must be refused").to_string()
    };
    for kind in [PictureKind::Single, panorama] {
        assert_eq!(
            refusal(kind, &[left], Level::Picture),
            "one direction is marked in the picture, but two known directions or more are needed"
        );
        let same = PhotoMark {
            azimuth: left.azimuth,
            ..right
        };
        let sentence = refusal(kind, &[left, same], Level::Picture);
        assert!(
            sentence.starts_with("all marks have the azimuth"),
            "{sentence}"
        );
        let column = PhotoMark {
            at: left.at,
            ..right
        };
        let sentence = refusal(kind, &[left, column], Level::Picture);
        assert!(sentence.contains("one column"), "{sentence}");
        let mirrored = [
            PhotoMark {
                at: right.at,
                ..left
            },
            PhotoMark {
                at: left.at,
                ..right
            },
        ];
        let sentence = refusal(kind, &mirrored, Level::Picture);
        assert!(
            sentence.starts_with("azimuth must grow to the right"),
            "{sentence}"
        );
        let nowhere = refusal(kind, &[left, right], Level::Points(Vec::new()));
        assert!(nowhere.starts_with("the level is not known"), "{nowhere}");
        let none = PhotoMark {
            azimuth: degrees(f64::NAN),
            ..right
        };
        assert!(refusal(kind, &[left, none], Level::Picture).contains("NaN"));
    }
    let near = PhotoMark {
        at: Pixel {
            x: left.at.x + 40.0,
            y: 1500.0,
        },
        azimuth: left.azimuth + degrees(60.0),
        altitude: None,
    };
    let sentence = refusal(PictureKind::Single, &[left, near], Level::Picture);
    assert!(
        sentence.starts_with("no camera fits these marks"),
        "{sentence}"
    );
    let wide = [
        PhotoMark {
            azimuth: degrees(155.0),
            ..left
        },
        PhotoMark {
            azimuth: degrees(300.0),
            ..right
        },
    ];
    let sentence = refusal(PictureKind::Single, &wide, Level::Picture);
    assert!(
        sentence.contains("degrees wide, but a single one shows at most 150"),
        "{sentence}"
    );
}

fn level_panorama() -> Picture {
    Picture::Panorama(Panorama {
        projection: Projection::Equirectangular,
        middle_x: 2000.0,
        middle_azimuth: degrees(0.0),
        azimuth_per_pixel: degrees(0.025),
        level_y: 1500.0,
        level_slope: 0.0,
    })
}

fn traced(picture: Picture, pixels: &[(f64, f64)]) -> Traced {
    let outline: Vec<Pixel> = pixels.iter().map(|(x, y)| Pixel { x: *x, y: *y }).collect();
    let traced = picture.trace(&outline, degrees(0.05)).unwrap();
    assert!(
        traced
            .points
            .is_sorted_by(|a, b| a.azimuth_deg < b.azimuth_deg),
        "{traced:?}"
    );
    traced
}

fn altitude_deg(traced: &Traced, azimuth_deg: f64) -> f64 {
    let points: Vec<(Angle, Angle)> = traced
        .points
        .iter()
        .map(|point| (degrees(point.azimuth_deg), degrees(point.altitude_deg)))
        .collect();
    Skyline::measured(&points)
        .altitude(degrees(azimuth_deg))
        .degrees()
}

#[test]
fn an_outline_across_north_becomes_points() {
    // 40 pixels a degree: from azimuth -25 (4 degrees up) to 15 (8 degrees) and level to 25.
    let traced = traced(
        level_panorama(),
        &[(1000.0, 1340.0), (2600.0, 1180.0), (3000.0, 1180.0)],
    );
    assert_eq!(traced.points.len(), 3, "{traced:?}");
    for (azimuth_deg, expected_deg) in [(335.0, 4.0), (355.0, 6.0), (15.0, 8.0), (20.0, 8.0)] {
        let actual_deg = altitude_deg(&traced, azimuth_deg);
        assert_within(actual_deg, expected_deg, 1e-6, &format!("at {azimuth_deg}"));
    }
    let Sweep::Sector { from_deg, to_deg } = traced.sweep else {
        panic!("a sector: {traced:?}")
    };
    assert_within(from_deg, 335.0, 1e-9, "from");
    assert_within(to_deg, 25.0, 1e-9, "to");
}

#[test]
fn where_an_outline_overhangs_the_highest_counts() {
    // Along the ground, up a trunk, out to both sides of a crown and over it, drawn in one line.
    let traced = traced(
        level_panorama(),
        &[
            (2000.0, 1460.0),
            (2400.0, 1460.0),
            (2400.0, 1300.0),
            (2200.0, 1300.0),
            (2200.0, 1100.0),
            (2600.0, 1100.0),
            (2600.0, 1300.0),
            (2420.0, 1300.0),
            (2420.0, 1460.0),
            (3000.0, 1460.0),
        ],
    );
    for (azimuth_deg, expected_deg) in [
        (2.0, 1.0),
        (4.99, 1.0),
        (5.0, 10.0),
        (10.0, 10.0),
        (15.0, 10.0),
        (15.01, 1.0),
        (20.0, 1.0),
    ] {
        let actual_deg = altitude_deg(&traced, azimuth_deg);
        assert_within(actual_deg, expected_deg, 1e-6, &format!("at {azimuth_deg}"));
    }
    assert!(traced.points.len() <= 6, "thinned: {traced:?}");
}

#[test]
fn an_outline_that_cannot_be_is_refused() {
    let refusal = |pixels: &[(f64, f64)], tolerance_deg: f64| {
        let outline: Vec<Pixel> = pixels.iter().map(|(x, y)| Pixel { x: *x, y: *y }).collect();
        let refused = level_panorama().trace(&outline, degrees(tolerance_deg));
        refused.expect_err("refused").to_string()
    };
    assert_eq!(
        refusal(&[(1.0, 1.0)], 0.05),
        "the outline has 1 points, but must have between 2 and 4000"
    );
    assert_eq!(
        refusal(&[(1.0, 1.0), (1.0, 900.0)], 0.05),
        "the outline only goes up and down: draw it along the skyline"
    );
    assert!(refusal(&[(1.0, 1.0), (f64::NAN, 1.0)], 0.05).contains("NaN"));
    assert!(refusal(&[(1.0, 1.0), (9.0, 1.0)], 0.0).starts_with("the tolerance is 0"));
}

proptest! {
    #[test]
    fn a_synthetic_camera_is_recovered(
        heading_deg in 0.0..360.0f64,
        pitch_deg in -15.0..25.0f64,
        roll_deg in -12.0..12.0f64,
        field_deg in 12.0..110.0f64,
        xs in prop::collection::vec(0.0..800.0f64, 4),
        ys in prop::collection::vec(0.0..3000.0f64, 4),
    ) {
        let made = Picture::Single(camera(heading_deg, pitch_deg, roll_deg, field_deg));
        let marks: Vec<PhotoMark> = (0..4)
            .map(|k| mark(made, 1000.0 * k as f64 + xs[k], ys[k], true))
            .collect();
        let fitted = fit(PictureKind::Single, SIZE, &marks, &Level::Points(Vec::new())).unwrap();
        assert_same(fitted.picture, made, "four full marks");
        for residual in &fitted.residuals {
            prop_assert!(residual.size().degrees() < 1e-6, "{residual:?}");
        }
        let pixel = Pixel { x: 123.0, y: 2345.0 };
        let back = fitted.picture.pixel(fitted.picture.direction(pixel)).unwrap();
        prop_assert!((back.x - pixel.x).hypot(back.y - pixel.y) < 1e-5, "{back:?}");
    }

    #[test]
    fn a_camera_is_recovered_from_azimuths_and_a_marked_level(
        heading_deg in 0.0..360.0f64,
        pitch_deg in -8.0..8.0f64,
        roll_deg in -6.0..6.0f64,
        field_deg in 30.0..90.0f64,
    ) {
        let made = Picture::Single(camera(heading_deg, pitch_deg, roll_deg, field_deg));
        let marks = [
            mark(made, 200.0, 1300.0, false),
            mark(made, 2100.0, 1600.0, false),
            mark(made, 3700.0, 1400.0, false),
        ];
        let level = [-0.35, 0.4].map(|share: f64| {
            let azimuth = degrees(heading_deg + share * field_deg).wrapped();
            made.pixel(Direction { azimuth, altitude: Angle::ZERO }).unwrap()
        });
        let level = Level::Points(level.to_vec());
        let fitted = fit(PictureKind::Single, SIZE, &marks, &level).unwrap();
        assert_same(fitted.picture, made, "azimuths and level");
        prop_assert!(fitted.level.iter().all(|off| off.abs().degrees() < 1e-6));
    }

    #[test]
    fn a_synthetic_panorama_is_recovered(
        middle_deg in 0.0..360.0f64,
        field_deg in 40.0..390.0f64,
        level_y in 500.0..2500.0f64,
        level_slope in -0.03..0.03f64,
        is_cylinder in any::<bool>(),
    ) {
        let projection = if is_cylinder {
            Projection::Cylindrical
        } else {
            Projection::Equirectangular
        };
        let made = Picture::Panorama(Panorama {
            projection,
            middle_x: 2000.0,
            middle_azimuth: degrees(middle_deg),
            azimuth_per_pixel: degrees(field_deg / 4000.0),
            level_y,
            level_slope,
        });
        let marks = [
            mark(made, 50.0, level_y - 300.0, true),
            mark(made, 1500.0, level_y - 100.0, false),
            mark(made, 2900.0, level_y - 200.0, true),
            mark(made, 3950.0, level_y + 100.0, false),
        ];
        let kind = PictureKind::Panorama(projection);
        let fitted = fit(kind, SIZE, &marks, &Level::Points(Vec::new())).unwrap();
        assert_same(fitted.picture, made, "panorama");
        prop_assert_eq!(fitted.spare, 2);
    }

    // The outline's own directions, sampled finely, are the check: the skyline lies below none
    // of them by more than the tolerance (0.05 degrees along the sky makes up to three times
    // that in altitude where the outline is steep), and is as high as the highest.
    #[test]
    fn a_traced_skyline_keeps_to_its_outline(
        ys in prop::collection::vec(200.0..1600.0f64, 3..12),
        pitch_deg in 0.0..20.0f64,
        roll_deg in -5.0..5.0f64,
    ) {
        let made = Picture::Single(camera(270.0, pitch_deg, roll_deg, 70.0));
        let step = 3600.0 / (ys.len() - 1) as f64;
        let outline: Vec<Pixel> = ys
            .iter()
            .enumerate()
            .map(|(k, y)| Pixel { x: 200.0 + step * k as f64, y: *y })
            .collect();
        let pixels: Vec<(f64, f64)> = outline.iter().map(|at| (at.x, at.y)).collect();
        let result = traced(made, &pixels);
        let mut highest_deg = f64::MIN;
        for ends in outline.windows(2) {
            for step in 0..=100 {
                let share = f64::from(step) / 100.0;
                let at = Pixel {
                    x: ends[0].x + share * (ends[1].x - ends[0].x),
                    y: ends[0].y + share * (ends[1].y - ends[0].y),
                };
                let seen = made.direction(at);
                let slack_deg = altitude_deg(&result, seen.azimuth.degrees())
                    - seen.altitude.degrees().max(0.0);
                highest_deg = highest_deg.max(seen.altitude.degrees());
                let is_end = (at.x - 200.0).abs() < 1.0 || (at.x - 3800.0).abs() < 1.0;
                prop_assert!(is_end || slack_deg > -0.15, "below by {slack_deg} at {at:?}");
            }
        }
        let top_deg = result.points.iter().map(|point| point.altitude_deg).fold(-90.0, f64::max);
        prop_assert!((top_deg - highest_deg).abs() < 0.1, "{top_deg} {highest_deg}");
    }
}
