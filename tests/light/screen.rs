//! The sky's colour on a screen.

use crate::common::assert_within;
use crate::published::{lowland, moonless};
use dimmet::light::SkyLight;
use dimmet::light::tone::{Exposure, linear_srgb_from_xyz};

#[test] // IEC 61966-2-1: its white, D65, is X 0.9505, Y 1, Z 1.0890
fn white_is_white() {
    for part in linear_srgb_from_xyz([0.9505, 1.0, 1.0890]) {
        assert_within(part, 1.0, 1e-3, "linear sRGB of D65");
    }
}

fn shown(site: &SkyLight, sun: f64, altitude: f64, azimuth: f64) -> [u8; 3] {
    let glow = moonless(site, sun);
    let row = glow.along(20f64.to_radians());
    let typical = (0..12)
        .map(|i| row.luminance(f64::from(i) * 0.25).total().ln())
        .sum::<f64>()
        / 12.0;
    let exposure = Exposure::for_luminance(typical.exp());
    exposure.srgb(glow.along(altitude.to_radians()).xyz(azimuth.to_radians()))
}

#[test]
fn the_screen_darkens_through_dusk() {
    let site = lowland();
    let mut before = 255.0;
    for i in 0..40 {
        let sun = 5.0 - 0.6 * f64::from(i);
        let [r, g, b] = shown(&site, sun, 30.0, 90.0).map(f64::from);
        let brightness = 0.2 * r + 0.7 * g + 0.1 * b;
        assert!(
            brightness <= before + 1.0,
            "Sun {sun}: {brightness} after {before}"
        );
        before = brightness;
    }
    assert!(before < 45.0, "a dark night is dark: {before}");
    assert!(before > 3.0, "but not black: {before}");
}

#[test] // what everyone sees at dusk
fn the_colours_are_those_of_dusk() {
    let site = lowland();
    let [r, _, b] = shown(&site, -4.0, 2.0, 0.0).map(i32::from);
    assert!(r > b + 20, "the afterglow is warm: {r} {b}");
    let [r, _, b] = shown(&site, -4.0, 70.0, 90.0).map(i32::from);
    assert!(b > r + 30, "the zenith is blue: {r} {b}");
    // The pink belt lies above the Earth's bluish shadow, opposite the Sun.
    let warmth = |altitude: f64| {
        let [r, _, b] = shown(&site, -1.5, altitude, 180.0).map(f64::from);
        r / b
    };
    assert!(
        warmth(8.0) > warmth(0.5),
        "belt {} over shadow {}",
        warmth(8.0),
        warmth(0.5)
    );
    assert!(
        warmth(8.0) > warmth(30.0),
        "belt {} under the blue {}",
        warmth(8.0),
        warmth(30.0)
    );
}
