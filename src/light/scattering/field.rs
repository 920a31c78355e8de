//! Scattered sunlight: the first scattering along each path, and all later ones as a field.
//!
//! The first scattering keeps its direction. Later ones are taken as equal in all directions,
//! so that their light depends on height and on the Sun's zenith distance alone: it is gathered
//! at the nodes of that grid, pass after pass, each from the light of the pass before.
//! Sunbeams are bent and spread by refraction, lines of sight are straight; polarisation is left
//! out; the Sun's disc counts only at the Earth's edge.

use super::atmosphere::{Atmosphere, EARTH_KM, Mix, TOP_KM};
use super::path::{Path, Step, cos_edge};
use super::phase::{self, HAZE_ALBEDO, HAZE_STRAIGHT_ON};
use super::spectrum::{SUN, Spectrum, WAVELENGTHS, exp};
use std::f64::consts::PI;

/// How many scatterings after the first; each adds about a third of the one before.
const PASSES: usize = 5;

const HEIGHTS: usize = 26;
/// Zenith distances of the Sun: every 7.5 deg to 75, every 1.5 to 90, every 1 to 116.
const ANGLES: usize = 10 + 10 + 26 + 1;

/// Directions that a node gathers from: azimuths on each side of the Sun, and steps a leg.
const AZIMUTHS: usize = 6;
const GATHER_STEPS: usize = 18;

/// Steps of a path seen from the site.
const VIEW_STEPS: usize = 90;

/// Where light counts as none; its logarithm is stored.
const DARK: f32 = 1e-30;

/// Abscissae and weights of Gauss and Legendre on [0, 1] (Abramowitz and Stegun, table 25.4).
const GAUSS_8: [(f64, f64); 8] = [
    (0.019_855_072, 0.050_614_268),
    (0.101_666_761, 0.111_190_517),
    (0.237_233_795, 0.156_853_323),
    (0.408_282_679, 0.181_341_892),
    (0.591_717_321, 0.181_341_892),
    (0.762_766_205, 0.156_853_323),
    (0.898_333_239, 0.111_190_517),
    (0.980_144_928, 0.050_614_268),
];
const GAUSS_3: [(f64, f64); 3] = [
    (0.112_701_665, 0.277_777_778),
    (0.5, 0.444_444_444),
    (0.887_298_335, 0.277_777_778),
];

/// All light in an atmosphere that has been scattered at least once.
pub struct Field<'a> {
    atmosphere: &'a Atmosphere,
    ln_mean: Vec<Spectrum>,
}

impl<'a> Field<'a> {
    /// Follows the light through the atmosphere; a second or so of work.
    pub fn new(atmosphere: &'a Atmosphere) -> Self {
        let mut pass = first_pass(atmosphere);
        let mut sum: Vec<Spectrum> = pass.ln_mean.iter().map(|ln| ln.map(f32::exp)).collect();
        for _ in 1..PASSES {
            pass = next_pass(atmosphere, &pass);
            for (sum, ln) in sum.iter_mut().zip(&pass.ln_mean) {
                for i in 0..WAVELENGTHS {
                    sum[i] += ln[i].exp();
                }
            }
        }
        let ln_mean = sum.iter().map(|mean| mean.map(f32::ln)).collect();
        Self {
            atmosphere,
            ln_mean,
        }
    }
    /// Radiance seen from the site, W m⁻² sr⁻¹ nm⁻¹: of light scattered once, and of light
    /// scattered more often. Angles in radians; azimuth is counted from the Sun's, to either
    /// side; altitudes from 0 up.
    pub fn radiance(&self, sun_altitude: f64, altitude: f64, azimuth: f64) -> [Spectrum; 2] {
        let atmosphere = self.atmosphere;
        let site_km = atmosphere.ingredients.site_km;
        let ray = Ray::new(site_km, altitude.sin(), sun_altitude.sin(), azimuth.cos());
        let path = Path::clear(site_km, altitude.sin(), VIEW_STEPS);
        let haze = HAZE_ALBEDO * phase::haze(ray.cos_scattering);
        let once = along(atmosphere, &path, |step, density, depth| {
            ray.sunlit(atmosphere, step, density, depth, haze as f32)
        });
        let more = along(atmosphere, &path, |step, density, depth| {
            ray.diffuse(atmosphere, step, density, depth, &self.ln_mean)
        });
        [once.0, more.0]
    }
}

/// The light that reaches each node, and the radiance of the ground under each place of the Sun.
struct Pass {
    ln_mean: Vec<Spectrum>,
    ground: Vec<Spectrum>,
}

/// Light scattered once, and sunlight off the ground.
fn first_pass(atmosphere: &Atmosphere) -> Pass {
    let ground: Vec<Spectrum> = (0..ANGLES)
        .map(|j| {
            let cos = node_angle_deg(j).to_radians().cos();
            let (depth, shown) = atmosphere.sunward(0.0, cos);
            let part = atmosphere.ingredients.ground_albedo / PI * cos.max(0.0);
            std::array::from_fn(|i| part as f32 * shown * SUN[i] * exp(-depth[i]))
        })
        .collect();
    gather(atmosphere, &ground, |ray, step, density, depth| {
        let haze = HAZE_ALBEDO * (1.0 - HAZE_STRAIGHT_ON) * phase::haze_aside(ray.cos_scattering);
        ray.sunlit(atmosphere, step, density, depth, haze as f32)
    })
}

/// The light of the pass before, scattered once more.
fn next_pass(atmosphere: &Atmosphere, before: &Pass) -> Pass {
    gather(atmosphere, &before.ground, |ray, step, density, depth| {
        ray.diffuse(atmosphere, step, density, depth, &before.ln_mean)
    })
}

fn gather(
    atmosphere: &Atmosphere,
    ground: &[Spectrum],
    emission: impl Fn(&Ray, &Step, &Mix, &Spectrum) -> Spectrum,
) -> Pass {
    let mut pass = Pass {
        ln_mean: Vec::new(),
        ground: Vec::new(),
    };
    for height_index in 0..HEIGHTS {
        // At the ground itself a level path would be of no length.
        let height = node_height_km(height_index).max(0.005);
        let directions = directions(height);
        for angle_index in 0..ANGLES {
            let sin_sun = node_angle_deg(angle_index).to_radians().cos();
            let mut mean = [0.0f32; WAVELENGTHS];
            let mut falling = [0.0f32; WAVELENGTHS];
            for &(sin_altitude, weight) in &directions {
                let path = Path::new(height, sin_altitude, GATHER_STEPS);
                for k in 0..AZIMUTHS {
                    let azimuth = PI * (k as f64 + 0.5) / AZIMUTHS as f64;
                    let ray = Ray::new(height, sin_altitude, sin_sun, azimuth.cos());
                    let (mut light, depth) = along(atmosphere, &path, |step, density, depth| {
                        emission(&ray, step, density, depth)
                    });
                    if let Some(distance_km) = path.ground_km() {
                        let from = ground_under(ground, ray.sun_zenith_deg(0.0, distance_km));
                        for i in 0..WAVELENGTHS {
                            light[i] += from[i] * exp(-depth[i]);
                        }
                    }
                    let part = weight / AZIMUTHS as f64;
                    let onto = part * 4.0 * PI * sin_altitude.max(0.0);
                    for i in 0..WAVELENGTHS {
                        mean[i] += part as f32 * light[i];
                        falling[i] += onto as f32 * light[i];
                    }
                }
            }
            pass.ln_mean.push(mean.map(|value| value.max(DARK).ln()));
            if height_index == 0 {
                let part = (atmosphere.ingredients.ground_albedo / PI) as f32;
                pass.ground.push(falling.map(|value| value * part));
            }
        }
    }
    pass
}

/// Sines of altitude and their parts of the sphere, crowded at the edge of the Earth.
fn directions(height_km: f64) -> Vec<(f64, f64)> {
    let edge = cos_edge(height_km);
    let above = GAUSS_8.map(|(x, w)| (edge + (1.0 - edge) * x * x, x * w * (1.0 - edge)));
    let below = GAUSS_3.map(|(x, w)| (edge - (1.0 + edge) * x * x, x * w * (1.0 + edge)));
    above.into_iter().chain(below).collect()
}

/// Adds up the light along a path, and its optical depth. `emission` gives, at each step, the
/// light per km that reaches the start, from the densities there and the optical depth so far.
#[inline(always)]
fn along(
    atmosphere: &Atmosphere,
    path: &Path,
    emission: impl Fn(&Step, &Mix, &Spectrum) -> Spectrum,
) -> (Spectrum, Spectrum) {
    let mut light = [0.0f32; WAVELENGTHS];
    let mut depth = [0.0f32; WAVELENGTHS];
    for step in path.steps() {
        let density = atmosphere.density(step.height_km);
        let length = step.length_km as f32;
        let across = atmosphere
            .optical_depth(density)
            .map(|per_km| per_km * length);
        let mut middle = [0.0; WAVELENGTHS];
        for i in 0..WAVELENGTHS {
            middle[i] = depth[i] + 0.5 * across[i];
        }
        let emitted = emission(&step, &density, &middle);
        for i in 0..WAVELENGTHS {
            // sinh(x/2)/(x/2): in a thick step the near part counts for more than the middle.
            let x2 = across[i] * across[i];
            light[i] += emitted[i] * length * (1.0 + x2 / 24.0 * (1.0 + x2 / 80.0)).min(10.0);
            depth[i] += across[i];
        }
    }
    (light, depth)
}

/// Where a straight path goes and where the Sun stands along it.
struct Ray {
    radius_km: f64,
    sin_sun: f64,
    cos_scattering: f64,
}

impl Ray {
    fn new(height_km: f64, sin_altitude: f64, sin_sun: f64, cos_azimuth: f64) -> Self {
        let cos = |sin: f64| (1.0 - sin * sin).max(0.0).sqrt();
        let cos_scattering =
            sin_altitude * sin_sun + cos(sin_altitude) * cos(sin_sun) * cos_azimuth;
        Self {
            radius_km: EARTH_KM + height_km,
            sin_sun,
            cos_scattering: cos_scattering.clamp(-1.0, 1.0),
        }
    }
    /// Cosine of the Sun's zenith distance at a point of the path.
    #[inline(always)]
    fn cos_sun(&self, height_km: f64, distance_km: f64) -> f64 {
        let along = self.radius_km * self.sin_sun + distance_km * self.cos_scattering;
        (along / (EARTH_KM + height_km)).clamp(-1.0, 1.0)
    }
    #[inline(always)]
    fn sun_zenith_deg(&self, height_km: f64, distance_km: f64) -> f64 {
        self.cos_sun(height_km, distance_km).acos().to_degrees()
    }
    /// Sunlight scattered here towards the start, dimmed on both ways; `haze` is the chance per
    /// steradian that haze sends it so.
    #[inline(always)]
    fn sunlit(
        &self,
        atmosphere: &Atmosphere,
        step: &Step,
        density: &Mix,
        depth: &Spectrum,
        haze: f32,
    ) -> Spectrum {
        let cos_sun = self.cos_sun(step.height_km, step.distance_km);
        let (sunward, shown) = atmosphere.sunward(step.height_km, cos_sun);
        let mut emitted = [0.0; WAVELENGTHS];
        if shown > 0.0 {
            let air = phase::air(self.cos_scattering) as f32 * density.air * shown;
            let haze = haze * density.haze * shown;
            for i in 0..WAVELENGTHS {
                let scattered = air * atmosphere.air_depth[i] + haze * atmosphere.haze_depth[i];
                emitted[i] = SUN[i] * scattered * exp(-sunward[i] - depth[i]);
            }
        }
        emitted
    }
    /// Light of the field scattered here towards the start.
    #[inline(always)]
    fn diffuse(
        &self,
        atmosphere: &Atmosphere,
        step: &Step,
        density: &Mix,
        depth: &Spectrum,
        ln_mean: &[Spectrum],
    ) -> Spectrum {
        const ASIDE: f32 = (HAZE_ALBEDO * (1.0 - HAZE_STRAIGHT_ON)) as f32;
        let sun_zenith_deg = self.sun_zenith_deg(step.height_km, step.distance_km);
        let ln = between(ln_mean, step.height_km, sun_zenith_deg);
        let (air, haze) = (density.air, density.haze * ASIDE);
        let mut emitted = [0.0; WAVELENGTHS];
        for i in 0..WAVELENGTHS {
            let scattered = air * atmosphere.air_depth[i] + haze * atmosphere.haze_depth[i];
            emitted[i] = scattered * exp(ln[i] - depth[i]);
        }
        emitted
    }
}

fn node_height_km(index: usize) -> f64 {
    TOP_KM * (index as f64 / (HEIGHTS - 1) as f64).powi(2)
}

fn node_angle_deg(index: usize) -> f64 {
    let i = index as f64;
    if index <= 10 {
        i * 7.5
    } else if index <= 20 {
        75.0 + (i - 10.0) * 1.5
    } else {
        90.0 + (i - 20.0)
    }
}

/// The node below a zenith distance of the Sun, and how far on the next one is.
#[inline(always)]
fn angle_index(degrees: f64) -> (usize, f32) {
    let y = if degrees <= 75.0 {
        degrees / 7.5
    } else if degrees <= 90.0 {
        10.0 + (degrees - 75.0) / 1.5
    } else {
        (20.0 + (degrees - 90.0)).min((ANGLES - 1) as f64)
    };
    let j = (y as usize).min(ANGLES - 2);
    (j, (y - j as f64) as f32)
}

#[inline(always)]
fn between(table: &[Spectrum], height_km: f64, sun_zenith_deg: f64) -> Spectrum {
    let x = (height_km / TOP_KM).clamp(0.0, 1.0).sqrt() * (HEIGHTS - 1) as f64;
    let i = (x as usize).min(HEIGHTS - 2);
    let s = (x - i as f64) as f32;
    let (j, t) = angle_index(sun_zenith_deg);
    let node = i * ANGLES + j;
    let corners = [
        &table[node],
        &table[node + 1],
        &table[node + ANGLES],
        &table[node + ANGLES + 1],
    ];
    let weights = [(1.0 - s) * (1.0 - t), (1.0 - s) * t, s * (1.0 - t), s * t];
    let mut value = [0.0; WAVELENGTHS];
    for (corner, weight) in corners.into_iter().zip(weights) {
        for i in 0..WAVELENGTHS {
            value[i] += corner[i] * weight;
        }
    }
    value
}

fn ground_under(ground: &[Spectrum], sun_zenith_deg: f64) -> Spectrum {
    let (j, t) = angle_index(sun_zenith_deg);
    std::array::from_fn(|i| ground[j][i] * (1.0 - t) + ground[j + 1][i] * t)
}
