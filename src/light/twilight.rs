//! Sunlight in the sky, by day and through twilight: the table, and how it is read.
//!
//! `assets/light/twilight.bin` holds the CIE 1931 colour of the sky for several hazes, site
//! elevations, Sun altitudes, altitudes and azimuths from the Sun, made by [`super::scattering`].
//! A [`Dome`] is the table for one site's air, a [`Slice`] the same for one Sun altitude, a
//! [`Row`] the same for one altitude in the sky.
//!
//! The stored value is the logarithm of the colour divided by [`Shape`], how the first
//! scattering falls off with the angle from the Sun: what is left is smooth, so the glow around
//! the Sun moves with it instead of jumping from node to node.

use super::Conditions;
use super::scattering::{phase, spectrum};
use std::f64::consts::PI;
use std::sync::{Arc, OnceLock};

/// Hazes: node `i` has a zenith extinction by haze of 0.85 mag (i / 7)², crowded at clean air.
pub const HAZES: usize = 8;

/// The thickest haze, magnitudes at the zenith.
const MOST_HAZE_MAG: f64 = 0.85;

/// Site elevations at the nodes, km.
pub const ELEVATION_KM: [f64; 3] = [0.0, 1.4, 3.0];

/// Sun altitudes at the nodes, degrees.
pub const SUN_ALTITUDE_DEG: [f64; 31] = [
    -18.0, -17.0, -16.0, -15.0, -14.0, -13.0, -12.0, -11.0, -10.0, -9.0, -8.0, -7.0, -6.0, -5.0,
    -4.0, -3.0, -2.0, -1.0, 0.0, 1.0, 2.0, 3.0, 4.0, 5.0, 6.0, 9.0, 14.0, 22.0, 35.0, 56.0, 90.0,
];

/// Altitudes in the sky: node `i` is at 90 deg (i / 16)², crowded at the horizon.
pub const ALTITUDES: usize = 17;

/// Azimuths from the Sun: node `j` is at 180 deg (j / 14)², crowded at the Sun.
pub const AZIMUTHS: usize = 15;

/// Values for one Sun altitude.
const SLICE: usize = ALTITUDES * AZIMUTHS;

/// One colour: natural logarithms of X, Y, Z (Y in cd/m²), each divided by the shape.
type Ln = [f32; 3];

static TABLE: &[u8] = include_bytes!("../../assets/light/twilight.bin");

/// The stored step of the logarithm (0.0005 mag) and what is stored as zero.
const LN_STEP: f32 = 0.0005;
const LN_LEAST: f32 = -20.0;

/// A logarithm as the table stores it.
pub fn stored(ln: f64) -> u16 {
    ((ln as f32 - LN_LEAST) / LN_STEP)
        .round()
        .clamp(0.0, 65_535.0) as u16
}

/// The zenith extinction by haze of node `index`, magnitudes.
pub fn node_haze_mag(index: usize) -> f64 {
    MOST_HAZE_MAG * (index as f64 / (HAZES - 1) as f64).powi(2)
}

/// The altitude of node `index`, radians.
pub fn node_altitude(index: usize) -> f64 {
    PI / 2.0 * (index as f64 / (ALTITUDES - 1) as f64).powi(2)
}

/// The azimuth from the Sun of node `index`, radians.
pub fn node_azimuth(index: usize) -> f64 {
    PI * (index as f64 / (AZIMUTHS - 1) as f64).powi(2)
}

fn table() -> &'static [Ln] {
    static DECODED: OnceLock<Vec<Ln>> = OnceLock::new();
    DECODED.get_or_init(|| {
        let value = |low, high| LN_LEAST + LN_STEP * f32::from(u16::from_le_bytes([low, high]));
        TABLE
            .chunks_exact(6)
            .map(|b| [value(b[0], b[1]), value(b[2], b[3]), value(b[4], b[5])])
            .collect()
    })
}

/// How the first scattering falls off with the angle from the Sun, in a given air.
#[derive(Clone, Copy, Debug)]
pub struct Shape {
    /// Light scattered by haze, for each that air scatters.
    haze: f32,
}

impl Shape {
    /// The shape for haze of a given zenith extinction at a site of given elevation.
    pub fn new(haze_mag: f64, elevation_km: f64) -> Self {
        let air_mag = 0.1066 * (-elevation_km / 8.2).exp();
        // Very thick haze scatters its light more than once and loses the sharp lobe.
        let haze = (phase::HAZE_ALBEDO * haze_mag / air_mag).min(2.0);
        Self { haze: haze as f32 }
    }
    /// Its value at an angle from the Sun of given cosine: about 1 away from the Sun.
    #[inline]
    pub fn at(&self, cos_angle: f32) -> f32 {
        0.25 + 0.5625 * (1.0 + cos_angle * cos_angle) + self.haze * phase::haze_of_mean(cos_angle)
    }
}

/// A place between nodes: the four that count, and their weights (Catmull and Rom;
/// the value and its slope are continuous).
#[derive(Clone, Copy)]
struct Four {
    node: [usize; 4],
    weight: [f32; 4],
}

impl Four {
    /// `x` is counted in nodes; beyond the ends the mirror image stands in.
    #[inline]
    fn new(x: f32, nodes: usize) -> Self {
        let x = x.clamp(0.0, (nodes - 1) as f32);
        let i = (x as usize).min(nodes - 2);
        let t = x - i as f32;
        let (t2, t3) = (t * t, t * t * t);
        Self {
            node: [
                i.abs_diff(1).min(i + 1),
                i,
                i + 1,
                if i + 2 < nodes { i + 2 } else { i },
            ],
            weight: [
                0.5 * (-t + 2.0 * t2 - t3),
                0.5 * (2.0 - 5.0 * t2 + 3.0 * t3),
                0.5 * (t + 4.0 * t2 - 3.0 * t3),
                0.5 * (-t2 + t3),
            ],
        }
    }
    #[inline]
    fn of(&self, value: impl Fn(usize) -> Ln) -> Ln {
        let mut sum = [0.0; 3];
        for (node, weight) in self.node.into_iter().zip(self.weight) {
            let ln = value(node);
            for i in 0..3 {
                sum[i] += weight * ln[i];
            }
        }
        sum
    }
}

/// The cell of an axis that holds `value`, and how far into it.
fn cell(nodes: &[f64], value: f64) -> (usize, f64) {
    let i = nodes
        .partition_point(|node| *node <= value)
        .clamp(1, nodes.len() - 1)
        - 1;
    (i, (value - nodes[i]) / (nodes[i + 1] - nodes[i]))
}

/// Sunlight in the sky over one site, for every Sun altitude. Clones share the table.
#[derive(Clone, Debug)]
pub struct Dome {
    ln: Arc<[Ln]>,
    shape: Shape,
}

impl Dome {
    /// Reads the table for a site's air. Haze thicker than the thickest in the table is taken
    /// as that; elevations beyond its ends continue its trend to 5 km.
    pub fn new(conditions: &Conditions) -> Self {
        let haze_mag = conditions
            .extinction()
            .aerosol_mag
            .clamp(0.0, MOST_HAZE_MAG);
        let elevation_km = (conditions.elevation_m() / 1000.0).clamp(-0.5, 5.0);
        let hazes = Four::new(
            (haze_mag / MOST_HAZE_MAG).sqrt() as f32 * (HAZES - 1) as f32,
            HAZES,
        );
        let (low, part) = cell(&ELEVATION_KM, elevation_km);
        let elevations = [(low, 1.0 - part as f32), (low + 1, part as f32)];
        let size = SUN_ALTITUDE_DEG.len() * SLICE;
        let mut ln = vec![[0.0; 3]; size];
        for (haze, haze_weight) in hazes.node.into_iter().zip(hazes.weight) {
            for (elevation, elevation_weight) in elevations {
                let start = (haze * ELEVATION_KM.len() + elevation) * size;
                let weight = haze_weight * elevation_weight;
                for (ln, node) in ln.iter_mut().zip(&table()[start..start + size]) {
                    for (ln, node) in ln.iter_mut().zip(node) {
                        *ln += weight * node;
                    }
                }
            }
        }
        Self {
            ln: ln.into(),
            shape: Shape::new(haze_mag, elevation_km),
        }
    }
    /// The sky for one airless altitude of the Sun's centre. Below -18 deg it goes on falling as
    /// it does there.
    pub fn slice(&self, sun_altitude: f64) -> Slice {
        let (sin_sun, cos_sun) = sun_altitude.sin_cos();
        let (i, t) = cell(
            &SUN_ALTITUDE_DEG,
            sun_altitude.to_degrees().clamp(-40.0, 90.0),
        );
        let t = t as f32;
        let [low, high] = [i, i + 1].map(|i| &self.ln[i * SLICE..(i + 1) * SLICE]);
        let mut ln = [[0.0; 3]; SLICE];
        for (ln, (a, b)) in ln.iter_mut().zip(low.iter().zip(high)) {
            *ln = std::array::from_fn(|axis| a[axis] + (b[axis] - a[axis]) * t);
        }
        Slice {
            ln,
            shape: self.shape,
            sin_sun,
            cos_sun,
        }
    }
}

/// Sunlight in the sky at one Sun altitude.
#[derive(Clone, Debug)]
pub struct Slice {
    ln: [Ln; SLICE],
    shape: Shape,
    sin_sun: f64,
    cos_sun: f64,
}

impl Slice {
    /// The sky along one altitude (radians; below the horizon as at it).
    pub fn row(&self, altitude: f64) -> Row {
        let altitude = altitude.clamp(0.0, PI / 2.0);
        let four = Four::new(
            (altitude / (PI / 2.0)).sqrt() as f32 * (ALTITUDES - 1) as f32,
            ALTITUDES,
        );
        let (sin, cos) = altitude.sin_cos();
        Row {
            ln: std::array::from_fn(|j| four.of(|i| self.ln[i * AZIMUTHS + j])),
            shape: self.shape,
            along: sin * self.sin_sun,
            across: cos * self.cos_sun,
        }
    }
}

/// Sunlight in the sky at one Sun altitude, along one altitude.
#[derive(Clone, Debug)]
pub struct Row {
    ln: [Ln; AZIMUTHS],
    shape: Shape,
    along: f64,
    across: f64,
}

impl Row {
    /// CIE 1931 X, Y, Z at an azimuth counted from the Sun's to either side (radians); Y in
    /// cd/m².
    #[inline]
    pub fn xyz(&self, azimuth_from_sun: f64) -> [f64; 3] {
        let turns = azimuth_from_sun * (1.0 / (2.0 * PI));
        let from_sun = 2.0 * (turns - turns.round()).abs();
        let four = Four::new((from_sun as f32).sqrt() * (AZIMUTHS - 1) as f32, AZIMUTHS);
        let ln = four.of(|j| self.ln[j]);
        let cos_angle = self.along + self.across * cos(azimuth_from_sun);
        let shape = self.shape.at(cos_angle.clamp(-1.0, 1.0) as f32);
        ln.map(|ln| f64::from(spectrum::exp(ln) * shape))
    }
}

/// Cosine of any angle to 2e-8, in a third of the library's time: a painter asks for one a
/// texel.
#[inline]
pub(super) fn cos(angle: f64) -> f64 {
    let turns = angle * (1.0 / (2.0 * PI));
    // From the nearest quarter turn where the cosine is 0: sin of at most a quarter turn.
    let quarter = PI / 2.0 - 2.0 * PI * (turns - turns.round()).abs();
    let s = quarter * quarter;
    // The sine's series, its factorials as factors: divisions would take longer.
    const C: [f64; 5] = [
        -1.0 / 6.0,
        1.0 / 120.0,
        -1.0 / 5040.0,
        1.0 / 362_880.0,
        -1.0 / 39_916_800.0,
    ];
    quarter * (1.0 + s * (C[0] + s * (C[1] + s * (C[2] + s * (C[3] + s * C[4])))))
}
