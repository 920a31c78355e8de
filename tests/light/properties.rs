//! What must hold everywhere: no steps, and more haze or more Sun never helps where it cannot.

use crate::published::{moonless, sky};
use dimmet::light::{Cost, Eye, Eyes, Margin, Moonlight, SkyLight, Spread, Target};
use proptest::prelude::*;

/// A second's change of the sky that is a step, magnitudes.
const STEP_MAG: f64 = 0.02;

/// A second's motion of Sun, Moon and body, radians.
const SECOND: f64 = 15.04 / 3600.0 * std::f64::consts::PI / 180.0;

fn margins(site: &SkyLight, eyes: &Eyes, second: f64) -> Vec<Margin> {
    // Everything sets as steeply as it can; the Moon rises.
    let sun = 0.30 - second * SECOND;
    let moon = Moonlight {
        altitude: -0.25 + second * SECOND,
        azimuth: 3.0,
        magnitude: -12.0,
    };
    let glow = site.at(sun, 1.0 + second * SECOND, Some(moon));
    let places = [
        (0.45, 1.2, -4.0),
        (0.9, 0.4, 0.0),
        (0.31, 1.0, -1.0),
        (0.6, 2.9, 2.0),
    ];
    let mut all = Vec::new();
    for (altitude, azimuth, magnitude) in places {
        let target =
            Target::point(magnitude, altitude - second * SECOND, azimuth).with_disc(20.0, 0.5);
        for eye in Eye::ALL {
            all.push(glow.margin(&target, &eyes.gaze(eye)));
        }
    }
    all
}

#[test]
fn second_by_second_nothing_steps() {
    let eyes = Eyes::default();
    for site in [
        sky(0.11, 100.0, 20.4),
        sky(0.40, 1400.0, 18.0),
        sky(0.0, 3200.0, 22.0),
    ] {
        let mut before = margins(&site, &eyes, 0.0);
        let mut worst: f64 = 0.0;
        for second in 1..(2 * 3600) {
            let now = margins(&site, &eyes, f64::from(second));
            for (now, before) in now.iter().zip(&before) {
                let sky = 2.5 * (now.luminance.total() / before.luminance.total()).log10();
                let margin = now.margin_mag - before.margin_mag;
                worst = worst.max(sky.abs()).max(margin.abs());
                assert!(sky.abs() <= STEP_MAG, "second {second}: sky {sky} mag");
                assert!(
                    margin.abs() <= STEP_MAG,
                    "second {second}: margin {margin} mag"
                );
            }
            before = now;
        }
        println!("worst {worst}");
        assert!(worst > 1e-4, "the sky did not move: {worst}");
    }
}

/// Finer still across every node: a change of a thousandth of a degree.
#[test]
fn no_step_where_one_cell_hands_over_to_the_next() {
    let site = sky(0.16, 1400.0, 22.0);
    let step = 0.001f64;
    let mag = |sun: f64, altitude: f64, azimuth: f64| {
        let light = moonless(&site, sun).luminance(altitude.to_radians(), azimuth.to_radians());
        2.5 * light.total().log10()
    };
    for i in 0..1000 {
        let sun = -18.5 + 0.0487 * f64::from(i);
        for (a, z) in [(0.0, 0.0), (3.0, 10.0), (20.0, 40.0), (89.9, 170.0)] {
            let here = mag(sun, a, z);
            for (name, there) in [
                ("Sun", mag(sun + step, a, z)),
                ("altitude", mag(sun, a + step, z)),
                ("azimuth", mag(sun, a, z + step)),
            ] {
                assert!(
                    (there - here).abs() < 0.005,
                    "{name}, Sun {sun}, at {a} {z}: {}",
                    there - here
                );
            }
        }
    }
    for i in 0..9000 {
        let at = 0.01 * f64::from(i);
        for sun in [-8.0, -3.0, 0.0, 10.0] {
            let (low, high) = (mag(sun, at, 30.0), mag(sun, at + 0.01, 30.0));
            assert!(
                (low - high).abs() < 0.03,
                "altitude {at}, Sun {sun}: {}",
                high - low
            );
            let (low, high) = (mag(sun, 5.0, 2.0 * at), mag(sun, 5.0, 2.0 * at + 0.02));
            assert!(
                (low - high).abs() < 0.03,
                "azimuth {}, Sun {sun}: {}",
                2.0 * at,
                high - low
            );
        }
    }
    for haze in 0..800 {
        let haze = f64::from(haze) * 0.0011;
        let [a, b] = [haze, haze + 1e-4].map(|haze| {
            let site = sky(haze, 1000.0, 22.0);
            2.5 * moonless(&site, -5.0).luminance(0.1, 0.2).total().log10()
        });
        assert!((a - b).abs() < 0.01, "haze {haze}: {}", b - a);
    }
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(256))]

    #[test]
    fn more_haze_never_makes_a_body_on_a_dark_sky_brighter(
        haze in 0.0..1.0f64, more in 0.01..0.5f64, altitude in 0.5..90.0f64, azimuth in 0.0..360.0f64,
        sun in -60.0..-18.0f64, magnitude in -4.5..4.0f64,
    ) {
        let target = Target::point(magnitude, altitude.to_radians(), azimuth.to_radians());
        for eye in Eye::ALL {
            let gaze = Eyes::default().gaze(eye);
            let [clear, hazy] = [haze, haze + more].map(|haze| {
                moonless(&sky(haze, 300.0, 21.5), sun).margin(&target, &gaze).margin_mag
            });
            prop_assert!(hazy <= clear + 1e-9, "{}: {clear} then {hazy}", eye.name());
        }
    }

    #[test]
    fn a_deeper_sun_never_costs_margin(
        haze in 0.0..0.8f64, elevation in 0.0..3000.0f64, altitude in 0.0..90.0f64, azimuth in 0.0..360.0f64,
        sun in -18.0..-1.0f64, deeper in 0.01..3.0f64,
    ) {
        let site = sky(haze, elevation, 21.5);
        let target = Target::point(-2.0, altitude.to_radians(), azimuth.to_radians());
        let gaze = Eyes::default().gaze(Eye::Visitor);
        let [before, after] = [sun, sun - deeper].map(|sun| moonless(&site, sun).margin(&target, &gaze).margin_mag);
        prop_assert!(after >= before - 1e-3, "Sun {sun} then {deeper} deeper: {before} then {after}");
    }

    #[test]
    fn the_kindest_evening_is_kinder_than_the_harshest_on_a_dark_sky(
        haze in 0.02..0.6f64, altitude in 1.0..90.0f64, sun in -30.0..-14.0f64,
    ) {
        let conditions = *sky(haze, 100.0, 21.0).conditions();
        let gaze = Eyes::default().gaze(Eye::Visitor);
        let target = Target::point(0.0, altitude.to_radians(), 2.0);
        let spread = Spread::default();
        let [kind, usual, harsh] = [
            spread.kindest(&conditions, &gaze), (conditions, gaze), spread.harshest(&conditions, &gaze),
        ].map(|(conditions, gaze)| moonless(&SkyLight::new(conditions), sun).margin(&target, &gaze).margin_mag);
        prop_assert!(kind > usual && usual > harsh, "{kind} {usual} {harsh}");
    }
}

#[test]
fn what_costs_most_is_named() {
    let site = sky(0.11, 100.0, 21.0);
    let gaze = Eyes::default().gaze(Eye::Visitor);
    let at = |sun: f64, altitude: f64, moon: Option<Moonlight>| {
        site.at(sun.to_radians(), 0.0, moon)
            .margin(&Target::point(0.0, altitude.to_radians(), 0.5), &gaze)
    };
    let inside = at(-8.0, 15.0, None);
    assert_eq!(
        at(-3.0, 16.0, None).cost_against(&inside),
        Some(Cost::Twilight)
    );
    assert_eq!(at(-9.0, 2.0, None).cost_against(&inside), Some(Cost::Haze));
    let full = Moonlight {
        altitude: 0.5,
        azimuth: 0.6,
        magnitude: -12.5,
    };
    assert_eq!(
        at(-18.0, 15.0, Some(full)).cost_against(&at(-18.0, 15.0, None)),
        Some(Cost::Moonlight)
    );
    assert_eq!(inside.cost_against(&inside), None);
}
