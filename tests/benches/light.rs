//! How long the light of the sky takes: a half-night of bodies and eyes, and a painted frame.

use dimmet::light::tone::Exposure;
use dimmet::light::{Conditions, Eye, Eyes, Moonlight, SkyLight, Target};
use dimmet::place::Extinction;
use divan::Bencher;

fn main() {
    divan::main();
}

fn site() -> SkyLight {
    let extinction = Extinction {
        aerosol_mag: 0.11,
        ..Extinction::of_clean_air(96.0)
    };
    SkyLight::new(Conditions::new(extinction, 96.0, 20.4).expect("a possible site"))
}

const MOON: Moonlight = Moonlight {
    altitude: 0.4,
    azimuth: 2.0,
    magnitude: -11.0,
};

#[divan::bench]
fn one_site() -> SkyLight {
    site()
}

/// 10 h at one-minute steps, six bodies, four eyes: 15 ms are allowed.
#[divan::bench]
fn half_night(bencher: Bencher<'_, '_>) {
    let site = site();
    let eyes = Eyes::default();
    let gazes = Eye::ALL.map(|eye| eyes.gaze(eye));
    bencher.bench_local(|| {
        let mut seen = 0;
        for minute in 0..600 {
            let turned = f64::from(minute) * 0.0043;
            let glow = site.at(0.3 - turned, 4.0 + turned, Some(MOON));
            for body in 0..6 {
                let altitude = 0.9 - turned * 0.5 + f64::from(body) * 0.05;
                let target =
                    Target::point(f64::from(body) - 4.0, altitude, 3.5).with_disc(20.0, 0.5);
                let margins = glow.margins(&target, &gazes);
                seen += margins
                    .iter()
                    .filter(|margin| margin.margin_mag > 0.0)
                    .count();
            }
        }
        seen
    });
}

/// A sky of 256 x 96 with its tone: 60 ns a texel (1.5 ms) are allowed.
#[divan::bench(args = [false, true])]
fn frame(bencher: Bencher<'_, '_>, is_moonlit: bool) {
    let site = site();
    let exposure = Exposure::for_luminance(10.0);
    bencher.bench_local(|| {
        let glow = site.at(-0.05, 4.4, is_moonlit.then_some(MOON));
        let mut pixels = Vec::with_capacity(256 * 96);
        for row in 0..96 {
            let row = glow.along(0.9 * (1.0 - f64::from(row) / 96.0));
            for column in 0..256 {
                pixels.push(exposure.srgb(row.xyz(3.4 + 2.0 * f64::from(column) / 256.0)));
            }
        }
        pixels
    });
}

/// The light alone, without its tone.
#[divan::bench]
fn frame_of_light(bencher: Bencher<'_, '_>) {
    let site = site();
    bencher.bench_local(|| {
        let glow = site.at(-0.05, 4.4, None);
        let mut sum = 0.0;
        for row in 0..96 {
            let row = glow.along(0.9 * (1.0 - f64::from(row) / 96.0));
            for column in 0..256 {
                sum += row.xyz(3.4 + 2.0 * f64::from(column) / 256.0)[1];
            }
        }
        sum
    });
}
