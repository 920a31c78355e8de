//! What must hold everywhere: no steps, and more haze or more Sun never helps where it cannot.

use crate::published::{moonless, sky};
use dimmet::light::{Cost, Eye, Eyes, Margin, Moonlight, SkyLight, Spread, Target};
use proptest::prelude::*;

/// A second's change of the sky that is a step, magnitudes.
const STEP_MAG: f64 = 0.02;

/// A second's motion of Sun, Moon and body, radians.
const SECOND: f64 = 15.04 / 3600.0 * std::f64::consts::PI / 180.0;

fn margins(site: &SkyLight, eyes: &Eyes, second: f64) -> Vec<Margin> {
    // Everything sets as steeply as it can, none of them into the last degree above the horizon,
    // where extinction alone changes by more than that; the Moon rises.
    let sun = 0.30 - second * SECOND;
    let moon = Moonlight {
        altitude: -0.25 + second * SECOND,
        azimuth: 3.0,
        magnitude: -12.0,
    };
    let glow = site.at(sun, 1.0 + second * SECOND, Some(moon));
    let places = [
        (0.65, 1.2, -4.0),
        (0.9, 0.4, 0.0),
        (0.56, 1.0, -1.0),
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
                    "second {second}: margin {margin} mag, {before:?} then {now:?}"
                );
            }
            before = now;
        }
        assert!(worst > 1e-4, "the sky did not move: {worst}");
    }
}

/// A step would show as a change of rate: the difference of neighbouring differences over a
/// thousandth of a degree, in the last degree above the horizon too, where extinction itself
/// changes by up to 10 mag a degree.
#[test]
fn no_step_where_one_cell_hands_over_to_the_next() {
    const STEP_DEG: f64 = 0.001;
    const BEND_MAG: f64 = 0.001;
    let site = sky(0.16, 1400.0, 22.0);
    let gaze = Eyes::default().gaze(Eye::Visitor);
    let bend =
        |f: &dyn Fn(f64) -> f64, x: f64| (f(x - STEP_DEG) - 2.0 * f(x) + f(x + STEP_DEG)).abs();
    let margin = |sun: f64, altitude: f64, azimuth: f64| {
        let target = Target::point(-2.0, altitude.to_radians(), azimuth.to_radians());
        moonless(&site, sun).margin(&target, &gaze).margin_mag
    };
    let mut greatest: f64 = 0.0;
    let mut check = |bend: f64, what: String| {
        greatest = greatest.max(bend);
        assert!(bend < BEND_MAG, "{what}: {bend} mag");
    };
    for i in 0..3000 {
        let sun = -18.5 + 0.0363 * f64::from(i);
        for (a, z) in [(0.01, 0.0), (3.0, 10.0), (20.0, 40.0), (89.9, 170.0)] {
            check(
                bend(&|sun| margin(sun, a, z), sun),
                format!("Sun {sun}, at {a} {z}"),
            );
        }
        let at = 0.0025 + 0.03 * f64::from(i) - 0.01 * f64::from(i % 3);
        for sun in [-14.0, -8.0, -3.0, 0.0, 10.0] {
            if at > STEP_DEG && at < 89.9 {
                check(
                    bend(&|a| margin(sun, a, 30.0), at),
                    format!("altitude {at}, Sun {sun}"),
                );
            }
            check(
                bend(&|z| margin(sun, 5.0, z), 2.0 * at),
                format!("azimuth {}, Sun {sun}", 2.0 * at),
            );
        }
    }
    assert!(greatest > 1e-9, "nothing was bent: {greatest}");
    for haze in 0..900 {
        let of_haze = |haze: f64| {
            let site = sky(haze, 1000.0, 22.0);
            2.5 * moonless(&site, -5.0).luminance(0.1, 0.2).total().log10()
        };
        let haze = 0.001 + f64::from(haze) * 0.0011;
        let bend = (of_haze(haze - 1e-4) - 2.0 * of_haze(haze) + of_haze(haze + 1e-4)).abs();
        assert!(bend < BEND_MAG, "haze {haze}: {bend}");
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
