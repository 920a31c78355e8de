//! Refraction and dip.

use crate::common::assert_within;
use dimmet::measure::Angle;
use dimmet::sky::Air;
use dimmet::sky::refraction::{airless, dip, refracted, refraction};
use proptest::prelude::*;

fn arcmin(angle: Angle) -> f64 {
    angle.degrees() * 60.0
}

// Meeus, Astronomical Algorithms, 2nd ed., example 16.a, the Sun's upper limb; printed to 0.001'.
#[test]
fn saemundsson_matches_meeus_16a() {
    let air = Air::default();
    let lifted = refraction(Angle::from_arcmin(33.246), &air);
    assert_within(arcmin(lifted), 24.618, 0.0006, "Meeus 16.a");
    let back = airless(Angle::from_arcmin(57.864), &air);
    assert_within(arcmin(back), 33.246, 0.0012, "Meeus 16.a, backwards");
}

// Meeus, p. 107: R grows as pressure and falls as absolute temperature.
#[test]
fn refraction_scales_with_the_air() {
    let standard = refraction(Angle::ZERO, &Air::default());
    let thin_and_cold = Air {
        pressure_hpa: 702.0,
        temperature_c: -10.0,
    };
    let ratio = refraction(Angle::ZERO, &thin_and_cold) / standard;
    assert_within(ratio, 702.0 / 1010.0 * 283.0 / 263.0, 1e-12, "Meeus p. 107");
}

// Common practice, as the comparison tables take it: held below -1 degree.
#[test]
fn refraction_is_held_below_minus_one_degree() {
    let air = Air::default();
    let held = refraction(Angle::from_degrees(-1.0), &air);
    assert!(held > refraction(Angle::ZERO, &air), "it grows downwards");
    for degrees in [-1.5, -5.0, -90.0] {
        assert_eq!(refraction(Angle::from_degrees(degrees), &air), held);
    }
}

// The Nautical Almanac's dip table, printed to 0.1': 5.6' at 10 m (from memory).
#[test]
fn dip_matches_the_almanac() {
    assert_within(arcmin(dip(10.0)), 5.6, 0.05, "Nautical Almanac, dip");
    assert_eq!(dip(0.0), Angle::ZERO);
    assert_eq!(dip(-3.0), Angle::ZERO);
}

fn any_air() -> impl Strategy<Value = Air> {
    (500.0..1080.0, -60.0..50.0).prop_map(|(pressure_hpa, temperature_c)| Air {
        pressure_hpa,
        temperature_c,
    })
}

proptest! {
    #[test]
    fn refraction_falls_and_refracted_altitude_grows(
        low in -1.0..89.9_f64, step in 1e-6..0.1_f64, air in any_air()
    ) {
        let (low, high) = (Angle::from_degrees(low), Angle::from_degrees(low + step));
        prop_assert!(refraction(high, &air) <= refraction(low, &air));
        prop_assert!(refracted(high, &air) > refracted(low, &air));
    }

    #[test]
    fn refraction_is_undone(altitude in -90.0..90.0_f64, air in any_air()) {
        let altitude = Angle::from_degrees(altitude);
        let back = airless(refracted(altitude, &air), &air);
        prop_assert!((back - altitude).abs().arcsec() < 1e-6);
    }
}
