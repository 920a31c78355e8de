//! Figures that cannot be: refused in a sentence, and never a NaN.

use crate::published::sky;
use dimmet::light::tone::Exposure;
use dimmet::light::{Conditions, Eye, Eyes, Moonlight, Optics, Target};
use dimmet::place::Extinction;

#[test]
fn impossible_figures_are_refused_with_their_range() {
    let air = Extinction::of_clean_air(0.0);
    let hazy = |aerosol_mag| Extinction { aerosol_mag, ..air };
    let refused = [
        Conditions::new(hazy(-0.1), 0.0, 21.0).unwrap_err(),
        Conditions::new(hazy(f64::NAN), 0.0, 21.0).unwrap_err(),
        Conditions::new(air, f64::INFINITY, 21.0).unwrap_err(),
        Conditions::new(air, 0.0, 23.0).unwrap_err(),
        Conditions::new(air, 0.0, f64::NAN).unwrap_err(),
        Optics::new(0.0, 10.0, 0.8).unwrap_err(),
        Optics::new(50.0, 0.5, 0.8).unwrap_err(),
        Optics::new(50.0, f64::NAN, 0.8).unwrap_err(),
        Optics::new(50.0, 10.0, 1.1).unwrap_err(),
        Eyes::default().with_factor(Eye::Keen, 0.0).unwrap_err(),
    ];
    for error in refused {
        assert!(
            !(error.least..=error.most).contains(&error.value),
            "{error:?}"
        );
        let sentence = error.to_string();
        for part in [error.least.to_string(), error.most.to_string()] {
            assert!(sentence.contains(&part), "{sentence}");
        }
    }
    let sentence = Optics::new(50.0, 0.5, 0.8).unwrap_err().to_string();
    assert_eq!(sentence, "the magnification is 0.5: give 1 to 5000");
}

#[test]
fn no_place_of_sun_moon_or_body_gives_a_nan() {
    for (haze, elevation) in [(0.0, -400.0), (0.5, 0.0), (2.9, 9000.0)] {
        let site = sky(haze, elevation, 22.0);
        for sun in [-90.0, -40.0, -18.0, -0.1, 0.0, 45.0, 90.0f64] {
            for moon in [None, Some(-3.0), Some(0.0), Some(90.0f64)] {
                let moon = moon.map(|deg: f64| Moonlight {
                    altitude: deg.to_radians(),
                    azimuth: 0.0,
                    magnitude: -12.0,
                });
                let glow = site.at(sun.to_radians(), 7.0, moon);
                for altitude in [-90.0, -0.5, 0.0, 0.01, 45.0, 90.0f64] {
                    for azimuth in [-400.0, 0.0, 180.0, 360.0, 720.0f64] {
                        let target =
                            Target::point(-4.0, altitude.to_radians(), azimuth.to_radians());
                        for eye in Eye::ALL {
                            for target in [
                                target,
                                target.with_disc(1800.0, 0.0),
                                target.with_disc(60.0, 0.3),
                            ] {
                                let margin = glow.margin(&target, &Eyes::default().gaze(eye));
                                let numbers = [
                                    margin.margin_mag,
                                    margin.limit_mag,
                                    margin.extinction_mag,
                                    margin.luminance.total(),
                                ];
                                assert!(
                                    numbers.iter().all(|n| n.is_finite()),
                                    "Sun {sun}, at {altitude} {azimuth}: {margin:?}"
                                );
                                assert!(margin.luminance.total() > 0.0, "some light is left");
                            }
                        }
                    }
                }
            }
        }
    }
}

#[test]
fn a_screen_gets_a_colour_whatever_comes() {
    for typical in [0.0, -1.0, 1e-9, 1.0, 1e9, f64::NAN, f64::INFINITY] {
        let exposure = Exposure::for_luminance(typical);
        for xyz in [
            [0.0; 3],
            [1.0, 0.0, 5.0],
            [1e9; 3],
            [f64::NAN; 3],
            [f64::INFINITY, 1.0, 1.0],
        ] {
            let linear = exposure.linear(xyz);
            assert!(
                linear.iter().all(|part| (0.0..=1.0).contains(part)),
                "{typical} {xyz:?}: {linear:?}"
            );
        }
    }
}
