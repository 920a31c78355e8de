//! The light that falls on level ground, integrated over the whole sky.

use crate::document::{assert_documented, table};
use crate::published::{lowland, moonless};
use dimmet::light::{SkyLight, extinction_mag};
use dimmet::measure::Angle;
use dimmet::sky::{Air, refraction};
use std::f64::consts::{FRAC_PI_2, PI};

/// Seidelmann 1992 (Explanatory Supplement), after Janiczek and DeYoung 1987 (USNO Circular
/// 171): log of the illuminance in lux as a cubic of Sun altitude / 90, by pieces that begin
/// at an altitude in degrees.
const SEIDELMANN: [(f64, [f64; 4]); 6] = [
    (20.0, [3.74, 3.97, -4.07, 1.47]),
    (5.0, [3.05, 13.28, -45.98, 64.33]),
    (-0.8, [2.88, 22.26, -207.64, 1034.30]),
    (-5.0, [2.88, 21.81, -258.11, -858.36]),
    (-12.0, [2.70, 12.17, -431.69, -1899.83]),
    (-18.0, [13.84, 262.72, 1447.42, 2797.93]),
];

fn published_lx(sun_altitude_deg: f64) -> f64 {
    let (_, [l0, l1, l2, l3]) = SEIDELMANN
        .into_iter()
        .find(|(from, _)| sun_altitude_deg >= *from)
        .unwrap();
    let x = sun_altitude_deg / 90.0;
    10f64.powf(l0 + x * (l1 + x * (l2 + x * l3)))
}

/// Sunlight outside the air, lux (IESNA: the solar illuminance constant 128 to 134 klx).
const SUN_LX: f64 = 133_600.0;

fn model_lx(site: &SkyLight, sun_altitude_deg: f64) -> f64 {
    let glow = moonless(site, sun_altitude_deg);
    let (rows, columns) = (180, 180);
    let (step, across) = (FRAC_PI_2 / f64::from(rows), PI / f64::from(columns));
    let mut sky = 0.0;
    for i in 0..rows {
        let altitude = (f64::from(i) + 0.5) * step;
        let row = glow.along(altitude);
        for j in 0..columns {
            let luminance = row.luminance((f64::from(j) + 0.5) * across).total();
            sky += luminance * altitude.sin() * altitude.cos() * step * across * 2.0;
        }
    }
    let refracted =
        refraction::refracted(Angle::from_degrees(sun_altitude_deg), &Air::default()).radians();
    let passed = 10f64.powf(-0.4 * extinction_mag(site.conditions().extinction(), refracted));
    sky + SUN_LX * refracted.sin().max(0.0) * passed
}

#[test]
fn the_whole_sky_gives_the_published_illuminance() {
    let site = lowland();
    let mut rows = Vec::new();
    let near = (-9..=20).rev().map(|sun| (f64::from(sun), 1.35));
    // The sources themselves differ by a factor of 1.8 at -12.
    for (sun, factor) in near.chain([(-12.0, 1.8), (-15.0, 1.8)]) {
        let (model, published) = (model_lx(&site, sun), published_lx(sun));
        let ratio = model / published;
        assert!(
            (1.0 / factor..=factor).contains(&ratio),
            "Sun {sun}: {model:.3e} lx, published {published:.3e}, ratio {ratio:.2}"
        );
        if [20.0, 10.0, 5.0].contains(&sun) || sun <= 0.0 && sun % 3.0 == 0.0 {
            rows.push([
                format!("{sun}"),
                format!("{model:.1e}"),
                format!("{published:.1e}"),
                format!("{ratio:.1}"),
            ]);
        }
    }
    let head = ["Sun, deg", "model", "published", "ratio"];
    assert_documented("illuminance", &table(head, &rows));
}
