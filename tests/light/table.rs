//! The shipped table against the computation that it was made from.

use crate::published::sky;
use dimmet::light::scattering::{Atmosphere, Field, Ingredients, spectrum};

/// The worst places are the edge of the Earth's shadow just after sunset, and the last degree
/// above the horizon under a low Sun.
const WORST_MAG: f64 = 0.25;
const RMS_MAG: f64 = 0.06;

/// Between the nodes in every way at once.
#[test]
fn between_its_nodes_the_table_is_the_computation() {
    for (haze_mag, elevation_m) in [(0.03, 1400.0), (0.11, 700.0), (0.50, 100.0)] {
        let atmosphere = Atmosphere::new(Ingredients {
            haze_depth: haze_mag / 1.0857,
            site_km: elevation_m / 1000.0,
            ozone: 1.0,
            ground_albedo: 0.15,
        });
        let field = Field::new(&atmosphere);
        let site = sky(haze_mag, elevation_m, 22.5);
        let mut differences = Vec::new();
        for sun in [-9.5, -6.5, -4.4, -1.5, 0.5, 7.0, 19.0, 50.0f64] {
            let glow = site.at(sun.to_radians(), 0.0, None);
            for altitude in [0.2, 0.9, 2.2, 4.4, 7.1, 15.0, 32.0, 65.0f64] {
                for azimuth in [0.4, 2.1, 6.0, 12.0, 28.0, 52.0, 100.0, 170.0f64] {
                    let (a, z) = (altitude.to_radians(), azimuth.to_radians());
                    let [once, more] = field
                        .radiance(sun.to_radians(), a, z)
                        .map(|light| spectrum::xyz(&light)[1]);
                    let difference = 2.5 * (glow.luminance(a, z).sun / (once + more)).log10();
                    differences.push(difference);
                    let place = format!("haze {haze_mag}, Sun {sun}, at {altitude} {azimuth}");
                    assert!(difference.abs() < WORST_MAG, "{place}: {difference} mag");
                }
            }
        }
        let squares: f64 = differences.iter().map(|d| d * d).sum();
        let rms = (squares / differences.len() as f64).sqrt();
        assert!(rms < RMS_MAG, "haze {haze_mag}: rms {rms} mag");
    }
}
