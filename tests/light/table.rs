//! The shipped table against the computation that it was made from.

use crate::published::sky;
use dimmet::light::scattering::{Atmosphere, Field, Ingredients, spectrum};

/// Between the nodes in every way at once. The tolerance is for straight lines between nodes a
/// degree of Sun altitude and some 0.1 mag of haze apart.
#[test]
fn between_its_nodes_the_table_is_the_computation() {
    let (haze_mag, elevation_m) = (0.11, 700.0);
    let atmosphere = Atmosphere::new(Ingredients {
        haze_depth: haze_mag / 1.0857,
        site_km: elevation_m / 1000.0,
        ozone: 1.0,
        ground_albedo: 0.15,
    });
    let field = Field::new(&atmosphere);
    let site = sky(haze_mag, elevation_m, 22.5);
    let mut worst: (f64, String) = (0.0, String::new());
    let mut squares = 0.0;
    let mut count = 0.0;
    for sun in [-9.5, -6.5, -4.4, -1.5, 0.5, 7.0, 19.0, 50.0f64] {
        let glow = site.at(sun.to_radians(), 0.0, None);
        for altitude in [0.2, 0.9, 2.2, 4.4, 7.1, 15.0, 32.0, 65.0f64] {
            for azimuth in [0.4, 2.1, 6.0, 12.0, 28.0, 52.0, 100.0, 170.0f64] {
                let (a, z) = (altitude.to_radians(), azimuth.to_radians());
                let [once, more] = field
                    .radiance(sun.to_radians(), a, z)
                    .map(|light| spectrum::xyz(&light)[1]);
                let difference = 2.5 * (glow.luminance(a, z).sun / (once + more)).log10();
                squares += difference * difference;
                count += 1.0;
                if difference.abs() > worst.0.abs() {
                    worst = (difference, format!("Sun {sun}, at {altitude} {azimuth}"));
                }
            }
        }
    }
    println!("worst {worst:?}, rms {}", f64::sqrt(squares / count));
    assert!(
        f64::sqrt(squares / count) < 0.03,
        "rms {}",
        f64::sqrt(squares / count)
    );
    assert!(worst.0.abs() < 0.12, "{worst:?}");
}
