//! Heights and positions by pacing and by tape, against trigonometry worked by hand.

use crate::common::assert_within;
use dimmet::measure::Angle;
use dimmet::place::Spot;
use dimmet::place::survey::SurveyError;
use dimmet::place::survey::height::{
    Estimate, Slips, by_angle, by_held_stick, by_placed_stick, by_shadow, by_two_angles, pace_m,
    paced_m, position, width,
};
use proptest::prelude::*;

fn degrees(degrees: f64) -> Angle {
    Angle::from_degrees(degrees)
}

fn slips() -> Slips {
    Slips::default()
}

fn refusal<T: std::fmt::Debug>(result: Result<T, SurveyError>) -> String {
    result.expect_err("refused").to_string()
}

#[test]
fn angle_and_distance() {
    // tan 35 = 0.70020754, tan 36 = 0.72654253: 1.6 + 20 * 0.70020754 = 15.604151;
    // half a metre makes 0.5 * 0.70020754, a degree 20 * 0.02633499.
    let tree = by_angle(20.0, degrees(35.0), 1.6, &slips()).unwrap();
    assert_within(tree.length_m, 15.604_151, 1e-6, "height");
    assert_within(tree.by_distance_m, 0.350_104, 1e-6, "half a metre");
    assert_within(tree.by_angle_m, 0.526_700, 1e-6, "one degree");
    // The root of 0.350104^2 + 0.526700^2 = 0.399985.
    assert_within(tree.combined_m(), 0.632_444, 1e-6, "both");
}

#[test]
fn a_stick_held_before_the_eye() {
    // 30 * 0.6 / 0.7 = 25.714286; half a metre makes 0.5 * 0.6 / 0.7.
    let spire = by_held_stick(30.0, 0.6, 0.7, 1.6, &slips()).unwrap();
    assert_within(spire.length_m, 25.714_286, 1e-6, "height");
    assert_within(spire.by_distance_m, 0.428_571, 1e-6, "half a metre");
    // The top stands (25.714286 - 1.6) / 30 = 0.8038095 up, 38.792652 degrees; a degree more is
    // tan 39.792652 = 0.8329514, that is 30 * 0.0291418.
    assert_within(spire.by_angle_m, 0.874_255, 1e-6, "one degree");
}

#[test]
fn a_stick_set_in_the_ground() {
    // 1.6 + (2.0 - 1.6) * 24 / 1.5 = 8.
    let roof = by_placed_stick(24.0, 2.0, 1.5, 1.6, &slips()).unwrap();
    assert_within(roof.length_m, 8.0, 1e-9, "height");
    assert_within(roof.by_distance_m, 0.5 * 0.4 / 1.5, 1e-9, "half a metre");
}

#[test]
fn two_shadows_of_one_minute() {
    // 14.2 * 1.0 / 1.25 = 11.36.
    let mast = by_shadow(14.2, 1.0, 1.25, &slips()).unwrap();
    assert_within(mast.length_m, 11.36, 1e-9, "height");
    assert_within(mast.by_distance_m, 0.4, 1e-9, "half a metre of shadow");
    // atan 0.8 = 38.659808; tan 39.659808 = 0.8290317, that is 14.2 * 0.0290317.
    assert_within(mast.by_angle_m, 0.412_250, 1e-6, "the stick leans a degree");
}

#[test]
fn two_angles_where_the_foot_cannot_be_reached() {
    // Sine rule: 20 sin 20 sin 30 / sin 10 = 19.696155 above the eye,
    // and 20 sin 20 cos 30 / sin 10 = 34.114741 from the nearer point.
    let tower = by_two_angles(20.0, degrees(20.0), degrees(30.0), 1.6, &slips()).unwrap();
    assert_within(tower.height.length_m, 21.296_155, 1e-6, "height");
    assert_within(tower.distance.length_m, 34.114_741, 1e-5, "distance");
    assert_within(
        tower.height.by_distance_m,
        0.5 * 19.696_155 / 20.0,
        1e-6,
        "half a metre of the line",
    );
    // Far at 21: 20 sin 21 sin 30 / sin 9 = 22.908504, 3.212348 more; near at 29:
    // 20 sin 20 sin 29 / sin 9 = 21.199249, 1.503094 more; the root of the squares is 3.546614.
    assert_within(tower.height.by_angle_m, 3.546_614, 1e-6, "one degree each");
}

#[test]
fn a_slip_that_leaves_nothing_to_measure_has_no_bound() {
    let near = by_two_angles(5.0, degrees(40.0), degrees(40.6), 1.6, &slips()).unwrap();
    assert_eq!(near.height.by_angle_m, f64::INFINITY);
    assert!(near.height.by_distance_m.is_finite());
    let steep = by_angle(1.0, degrees(89.0), 1.6, &slips()).unwrap();
    assert_eq!(
        steep.by_angle_m,
        f64::INFINITY,
        "a degree more is the zenith"
    );
}

#[test]
fn a_place_from_bearing_and_distance() {
    let spot = Spot {
        east_m: 3.0,
        north_m: -2.0,
        ..Spot::mark()
    };
    // sin 250 = -0.93969262, cos 250 = -0.34202014, tan 1 = 0.01745506.
    let oak = position(&spot, degrees(250.0), 40.0, &slips()).unwrap();
    assert_within(oak.at.east_m, -34.587_705, 1e-6, "east");
    assert_within(oak.at.north_m, -15.680_806, 1e-6, "north");
    assert_within(oak.along_m, 0.5, 1e-12, "along");
    assert_within(oak.across_m, 0.698_203, 1e-6, "across");
    // The root of 0.25 + 0.487487.
    assert_within(oak.combined_m(), 0.858_771, 1e-6, "both");
    // 80 tan 5 = 6.999093; half a metre: tan 5; a degree: 80 (tan 5.5 - tan 5) = 0.704031.
    let crown = width(40.0, degrees(10.0), &slips()).unwrap();
    assert_within(crown.length_m, 6.999_093, 1e-6, "width");
    assert_within(crown.by_distance_m, 0.087_489, 1e-6, "half a metre");
    assert_within(crown.by_angle_m, 0.704_031, 1e-6, "one degree");
}

#[test]
fn paces() {
    assert_within(
        pace_m(50.0, 64.0).unwrap(),
        0.781_25,
        1e-12,
        "50 m in 64 paces",
    );
    assert_within(paced_m(40.0, 0.78).unwrap(), 31.2, 1e-12, "40 paces");
    assert_eq!(
        refusal(pace_m(50.0, 10.0)),
        "the pace is 5, but must lie between 0.2 and 2 metres"
    );
    assert!(refusal(paced_m(0.0, 0.78)).starts_with("the number of paces is 0"));
}

#[test]
fn what_cannot_be_is_refused_in_a_sentence() {
    let s = slips();
    assert_eq!(
        refusal(by_angle(0.0, degrees(30.0), 1.6, &s)),
        "the distance is 0 m: measure it from where you stood to the foot of the object"
    );
    assert_eq!(
        refusal(by_angle(10.0, degrees(90.0), 1.6, &s)),
        "the altitude is 90.0 degrees, but a height can be told only between -80 and 89: step \
         back from the object"
    );
    assert_eq!(
        refusal(by_shadow(10.0, 1.0, 0.0, &s)),
        "the stick's shadow is 0 m long: a height can be told only from a shadow that can be \
         measured"
    );
    assert_eq!(
        refusal(by_angle(10.0, degrees(-45.0), 1.6, &s)),
        "that makes a height of -8.40 m, which is not above the ground: check the distance, the \
         angle and the eye's height"
    );
    assert_eq!(
        refusal(by_placed_stick(10.0, 2.0, 12.0, 1.6, &s)),
        "the stick stands 12 m away, beyond the object at 10 m: set it between the eye and the \
         object"
    );
    assert_eq!(
        refusal(by_two_angles(10.0, degrees(30.0), degrees(20.0), 1.6, &s)),
        "the top stands at 30.0 degrees from the far point and at 20.0 from the near one: it \
         must be above the level and rise as you walk towards it"
    );
    assert!(refusal(by_angle(f64::NAN, degrees(30.0), 1.6, &s)).contains("NaN"));
    assert!(refusal(by_angle(10.0, degrees(f64::NAN), 1.6, &s)).contains("NaN"));
    assert!(refusal(by_held_stick(10.0, 0.0, 0.6, 1.6, &s)).starts_with("the stick's length is 0"));
    assert!(refusal(width(10.0, degrees(0.0), &s)).starts_with("the angle between its sides is 0"));
    let far = position(&Spot::mark(), degrees(90.0), 10_000.0, &s).unwrap();
    assert_within(far.at.east_m, 10_000.0, 1e-9, "just on the plan");
    let edge = Spot {
        east_m: 9_999.0,
        ..Spot::mark()
    };
    assert!(refusal(position(&edge, degrees(90.0), 5.0, &s)).contains("east of the mark"));
}

proptest! {
    #[test]
    fn every_method_finds_the_height_that_made_its_readings(
        height_m in 2.0..60.0f64,
        distance_m in 3.0..200.0f64,
        walked_m in 1.0..50.0f64,
        eye_m in 0.5..1.9f64,
        sun_deg in 8.0..70.0f64,
    ) {
        let altitude = |distance_m: f64| Angle::from_radians(((height_m - eye_m) / distance_m).atan());
        let arm_m = 0.6;
        let close = |found: Estimate| (found.length_m - height_m).abs() < 1e-6 * height_m;
        prop_assume!(altitude(distance_m).degrees() < 89.0);
        let s = slips();
        prop_assert!(close(by_angle(distance_m, altitude(distance_m), eye_m, &s).unwrap()));
        let held_m = arm_m * height_m / distance_m;
        prop_assume!((0.01..10.0).contains(&held_m));
        prop_assert!(close(by_held_stick(distance_m, held_m, arm_m, eye_m, &s).unwrap()));
        let placed_m = eye_m + (height_m - eye_m) * 1.5 / distance_m;
        prop_assume!(placed_m < 10.0);
        prop_assert!(close(by_placed_stick(distance_m, placed_m, 1.5, eye_m, &s).unwrap()));
        let per_metre = 1.0 / degrees(sun_deg).tan();
        prop_assert!(close(by_shadow(height_m * per_metre, 1.2, 1.2 * per_metre, &s).unwrap()));
        let (far, near) = (altitude(distance_m + walked_m), altitude(distance_m));
        let unreached = by_two_angles(walked_m, far, near, eye_m, &s).unwrap();
        prop_assert!(close(unreached.height));
        prop_assert!((unreached.distance.length_m - distance_m).abs() < 1e-6 * distance_m);
    }
}
