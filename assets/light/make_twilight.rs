//! Makes the table of the sky's brightness and colour that the program ships.
//!
//! `cargo run --release --no-default-features --features tables --bin make_twilight` writes
//! `assets/light/twilight.bin`, the same bytes every time on one machine, in about
//! 15 s on two cores.
//! [`dimmet::light::twilight`] says what it holds.

use dimmet::light::scattering::{Atmosphere, Field, Ingredients, spectrum};
use dimmet::light::twilight::{
    ALTITUDES, AZIMUTHS, ELEVATION_KM, HAZES, SUN_ALTITUDE_DEG, Shape, node_altitude, node_azimuth,
    node_haze_mag, stored,
};
use std::path::Path;

/// Part of the light that open country sends back (common practice).
const GROUND_ALBEDO: f64 = 0.15;

/// Magnitudes of extinction for one unit of optical depth: 2.5 log e.
const MAG_PER_DEPTH: f64 = 2.5 * std::f64::consts::LOG10_E;

fn main() -> std::io::Result<()> {
    let mut bytes = Vec::new();
    std::thread::scope(|scope| {
        let skies = (0..HAZES).flat_map(|haze| {
            ELEVATION_KM.map(|site_km| scope.spawn(move || sky(node_haze_mag(haze), site_km)))
        });
        // All are started before the first is waited for.
        for sky in skies.collect::<Vec<_>>() {
            let values = sky
                .join()
                .map_err(|_| std::io::Error::other("a sky failed"))?;
            bytes.extend(values.into_iter().flat_map(u16::to_le_bytes));
        }
        Ok::<(), std::io::Error>(())
    })?;
    let path = Path::new(env!("CARGO_MANIFEST_DIR")).join("assets/light/twilight.bin");
    std::fs::write(path, bytes)
}

/// The table for one air: by Sun altitude, altitude, azimuth, and X, Y, Z.
fn sky(haze_mag: f64, site_km: f64) -> Vec<u16> {
    let atmosphere = Atmosphere::new(Ingredients {
        haze_depth: haze_mag / MAG_PER_DEPTH,
        site_km,
        ozone: 1.0,
        ground_albedo: GROUND_ALBEDO,
    });
    let field = Field::new(&atmosphere);
    let shape = Shape::new(haze_mag, site_km);
    let mut values = Vec::new();
    for sun_deg in SUN_ALTITUDE_DEG {
        let sun = sun_deg.to_radians();
        for (i, j) in (0..ALTITUDES).flat_map(|i| (0..AZIMUTHS).map(move |j| (i, j))) {
            let (altitude, azimuth) = (node_altitude(i), node_azimuth(j));
            let [once, more] = field
                .radiance(sun, altitude, azimuth)
                .map(|light| spectrum::xyz(&light));
            let cos_angle = altitude.sin() * sun.sin() + altitude.cos() * sun.cos() * azimuth.cos();
            let shape = f64::from(shape.at(cos_angle.clamp(-1.0, 1.0) as f32));
            values.extend([0, 1, 2].map(|axis| stored(((once[axis] + more[axis]) / shape).ln())));
        }
    }
    values
}
