//! The air, haze and ozone above a spherical Earth, and how much sunlight reaches each height.

use super::path::{Path, cos_edge};
use super::phase::{HAZE_ALBEDO, HAZE_STRAIGHT_ON};
use super::spectrum::{self, Spectrum, WAVELENGTHS};

/// The Earth's mean radius, km.
pub const EARTH_KM: f64 = 6371.0;

/// Where the atmosphere ends, km: above it nothing is left that scatters at twilight.
pub const TOP_KM: f64 = 110.0;

/// Air density, kg m⁻³, every 5 km from sea level (US Standard Atmosphere 1976).
const AIR_DENSITY: [f64; 23] = [
    1.225, 0.7364, 0.4135, 0.1948, 8.891e-2, 4.008e-2, 1.841e-2, 8.463e-3, 3.996e-3, 1.966e-3,
    1.027e-3, 5.681e-4, 3.097e-4, 1.632e-4, 8.283e-5, 3.992e-5, 1.846e-5, 8.220e-6, 3.416e-6,
    1.393e-6, 5.604e-7, 2.331e-7, 9.708e-8,
];

/// Ozone number density, 10¹² cm⁻³, every 4 km from sea level (mid-latitude mean; from memory
/// of Krueger and Minzner 1976, J. Geophys. Res. 81, 4477). Only its shape is used.
const OZONE_DENSITY: [f64; 18] = [
    0.68, 0.58, 0.57, 2.02, 2.95, 4.77, 4.54, 3.24, 2.03, 1.22, 0.607, 0.274, 0.103, 0.038, 0.018,
    0.008, 0.003, 0.001,
];

/// Scale height of haze, km (Schaefer 1998).
const HAZE_SCALE_KM: f64 = 1.5;

/// The thin haze that stays in the upper air when the lower is clean: optical depth and scale
/// height (common practice for background aerosol above the boundary layer).
const UPPER_HAZE_DEPTH: f64 = 0.006;
const UPPER_HAZE_SCALE_KM: f64 = 7.0;

/// Where the upper haze ends: above the stratosphere's sulphate layer it thins out by e every
/// 2.5 km (from memory of satellite occultation profiles).
const UPPER_HAZE_TOP_KM: f64 = 22.0;
const UPPER_HAZE_TOP_SCALE_KM: f64 = 2.5;

/// Heights at which densities are kept, km apart.
const DENSITY_STEP_KM: f64 = 0.2;

/// Densities or columns of the three parts, each in units of its own vertical column: of the
/// whole air at sea level, of haze of optical depth 1 at 0.55 µm, of the whole ozone layer.
#[derive(Clone, Copy, Debug, Default)]
pub struct Mix {
    /// Air.
    pub air: f32,
    /// Haze.
    pub haze: f32,
    /// Ozone.
    pub ozone: f32,
}

impl Mix {
    /// Both, part by part.
    #[inline(always)]
    fn with(self, other: Self, f: impl Fn(f32, f32) -> f32) -> Self {
        Self {
            air: f(self.air, other.air),
            haze: f(self.haze, other.haze),
            ozone: f(self.ozone, other.ozone),
        }
    }
    #[inline(always)]
    fn towards(self, other: Self, part: f32) -> Self {
        self.with(other, |a, b| a + (b - a) * part)
    }
}

/// What the atmosphere is made of at one site.
#[derive(Clone, Copy, Debug)]
pub struct Ingredients {
    /// Vertical optical depth of haze above the site at 0.55 µm.
    pub haze_depth: f64,
    /// Height of the site above sea level, km.
    pub site_km: f64,
    /// Ozone, in units of the usual layer.
    pub ozone: f64,
    /// Part of the light that the ground sends back.
    pub ground_albedo: f64,
}

/// The atmosphere over one site.
pub struct Atmosphere {
    /// What it is made of.
    pub ingredients: Ingredients,
    /// Optical depth by scattering of one unit of air.
    pub air_depth: Spectrum,
    /// Optical depth of one unit of haze.
    pub haze_depth: Spectrum,
    ozone_depth: Spectrum,
    densities: Vec<Mix>,
    sunward: SunwardColumns,
}

impl Atmosphere {
    /// The atmosphere made of these.
    pub fn new(ingredients: Ingredients) -> Self {
        let densities = densities(&ingredients);
        let sunward = SunwardColumns::new(&densities);
        Self {
            ingredients,
            air_depth: spectrum::air_depth(),
            haze_depth: spectrum::haze_depth(),
            ozone_depth: spectrum::ozone_depth(),
            densities,
            sunward,
        }
    }
    /// Densities at a height, per km.
    #[inline(always)]
    pub fn density(&self, height_km: f64) -> Mix {
        density_at(&self.densities, height_km)
    }
    /// Optical depth of a column, by all that turns light out of it; what haze sends straight
    /// on stays in it.
    #[inline(always)]
    pub fn optical_depth(&self, column: Mix) -> Spectrum {
        const LEAVING: f32 = (1.0 - HAZE_ALBEDO * HAZE_STRAIGHT_ON) as f32;
        let haze = column.haze * LEAVING;
        let mut depth = [0.0; WAVELENGTHS];
        for (i, depth) in depth.iter_mut().enumerate() {
            *depth = self.air_depth[i] * column.air
                + self.haze_depth[i] * haze
                + self.ozone_depth[i] * column.ozone;
        }
        depth
    }
    /// Optical depth towards the Sun from a height where it stands at a true zenith distance of
    /// given cosine, and the part of its light that comes as far: what shows of its disc over
    /// the Earth's edge, less what refraction spreads.
    #[inline(always)]
    pub fn sunward(&self, height_km: f64, cos_zenith: f64) -> (Spectrum, f32) {
        let (column, shown) = self.sunward.at(height_km, cos_zenith);
        (self.optical_depth(column), shown)
    }
}

fn log_interpolated(table: &[f64], step_km: f64, height_km: f64) -> f64 {
    let x = height_km / step_km;
    let i = (x as usize).min(table.len() - 2);
    table[i] * (table[i + 1] / table[i]).powf(x - i as f64)
}

/// Densities every [`DENSITY_STEP_KM`] from sea level to the top.
fn densities(ingredients: &Ingredients) -> Vec<Mix> {
    let heights = (0..=(TOP_KM / DENSITY_STEP_KM) as usize).map(|i| i as f64 * DENSITY_STEP_KM);
    let air = |h: f64| log_interpolated(&AIR_DENSITY, 5.0, h);
    let ozone = |h: f64| log_interpolated(&OZONE_DENSITY, 4.0, h);
    let column = |density: &dyn Fn(f64) -> f64| {
        heights
            .clone()
            .map(|h| density(h + DENSITY_STEP_KM / 2.0) * DENSITY_STEP_KM)
            .sum::<f64>()
    };
    let (air_column, ozone_column) = (column(&air), column(&ozone));
    let upper = UPPER_HAZE_DEPTH.min(ingredients.haze_depth);
    let lower = ingredients.haze_depth - upper;
    let haze = |h: f64| {
        let above = h - ingredients.site_km;
        // Below a mountain the haze thickens, but not without end.
        lower / HAZE_SCALE_KM * (-above / HAZE_SCALE_KM).min(1.0).exp()
            + upper / UPPER_HAZE_SCALE_KM
                * (-above.max(0.0) / UPPER_HAZE_SCALE_KM).exp()
                * (-(h - UPPER_HAZE_TOP_KM).max(0.0) / UPPER_HAZE_TOP_SCALE_KM).exp()
    };
    heights
        .clone()
        .map(|h| Mix {
            air: (air(h) / air_column) as f32,
            haze: haze(h) as f32,
            ozone: (ozone(h) / ozone_column * ingredients.ozone) as f32,
        })
        .collect()
}

#[inline(always)]
fn density_at(densities: &[Mix], height_km: f64) -> Mix {
    let x = height_km.min(TOP_KM) / DENSITY_STEP_KM;
    let i = (x as usize).min(densities.len() - 2);
    densities[i].towards(densities[i + 1], (x - i as f64) as f32)
}

/// What stands between each height and the Sun, by the Sun's true place between the zenith and
/// where refraction lets it go behind the edge of the Earth.
struct SunwardColumns {
    /// Cosine of the true zenith distance at which the Sun's centre goes behind the edge.
    cos_edge: Vec<f64>,
    nodes: Vec<Sunward>,
}

/// Logarithms of the columns, and of how much refraction spreads the light.
#[derive(Clone, Copy)]
struct Sunward {
    ln_column: Mix,
    ln_focus: f32,
}

impl Sunward {
    #[inline(always)]
    fn towards(self, other: Self, part: f32) -> Self {
        Self {
            ln_column: self.ln_column.towards(other.ln_column, part),
            ln_focus: self.ln_focus + (other.ln_focus - self.ln_focus) * part,
        }
    }
}

const HEIGHTS: usize = 72;
const ANGLES: usize = 160;

/// Angular diameter of the Sun, radians.
const SUN_DIAMETER: f64 = 0.0093;

/// Refraction at the horizon at sea level, radians (34').
const HORIZON_REFRACTION: f64 = 0.0099;

/// How far refraction has bent a sunbeam on its way to a height where it arrives from an
/// apparent zenith distance (radians). Taken in proportion to the air's density at the lowest
/// point of the beam; above the horizon it falls with altitude as at sea level, to 5 % of itself.
fn bending(densities: &[Mix], height_km: f64, zenith: f64) -> f64 {
    let part =
        |height: f64| f64::from(density_at(densities, height).air / density_at(densities, 0.0).air);
    let altitude_deg = 90.0 - zenith.to_degrees();
    if altitude_deg >= 0.0 {
        HORIZON_REFRACTION * part(height_km) / (1.0 + altitude_deg / 2.0)
    } else {
        // In to the lowest point and out again, less what lies above the height.
        let lowest_km = ((EARTH_KM + height_km) * zenith.sin() - EARTH_KM).max(0.0);
        HORIZON_REFRACTION * (2.0 * part(lowest_km) - part(height_km))
    }
}

impl SunwardColumns {
    fn new(densities: &[Mix]) -> Self {
        let mut columns = Self {
            cos_edge: Vec::new(),
            nodes: Vec::new(),
        };
        for i in 0..HEIGHTS {
            let height = TOP_KM * (i as f64 / (HEIGHTS - 1) as f64).powi(2);
            let true_zenith = |apparent: f64| apparent + bending(densities, height, apparent);
            let lowest = cos_edge(height).acos();
            let edge = true_zenith(lowest).cos();
            columns.cos_edge.push(edge);
            for j in 0..ANGLES {
                let w = j as f64 / (ANGLES - 1) as f64;
                let zenith = (edge + (1.0 - edge) * w * w).min(1.0).acos();
                // True zenith distance grows with the apparent one: halve the interval.
                let (mut low, mut high) = (0.0, lowest);
                for _ in 0..40 {
                    let middle = (low + high) / 2.0;
                    if true_zenith(middle) < zenith {
                        low = middle;
                    } else {
                        high = middle;
                    }
                }
                const APART: f64 = 1e-4;
                let spread = (true_zenith(low) - true_zenith(low - APART)) / APART;
                columns.nodes.push(Sunward {
                    ln_column: ln_column(densities, height, low.cos()),
                    ln_focus: -(spread.max(0.1).ln()) as f32,
                });
            }
        }
        columns
    }
    /// The column, and the part of the Sun's light that comes as far, its absorption apart.
    #[inline(always)]
    fn at(&self, height_km: f64, cos_zenith: f64) -> (Mix, f32) {
        let x = (height_km / TOP_KM).clamp(0.0, 1.0).sqrt() * (HEIGHTS - 1) as f64;
        let i = (x as usize).min(HEIGHTS - 2);
        let s = x - i as f64;
        let edge = self.cos_edge[i] + (self.cos_edge[i + 1] - self.cos_edge[i]) * s;
        let shown = ((cos_zenith - edge) / SUN_DIAMETER + 0.5).clamp(0.0, 1.0);
        let y = ((cos_zenith - edge) / (1.0 - edge)).clamp(0.0, 1.0).sqrt() * (ANGLES - 1) as f64;
        let j = (y as usize).min(ANGLES - 2);
        let t = (y - j as f64) as f32;
        let row = |i: usize| self.nodes[i * ANGLES + j].towards(self.nodes[i * ANGLES + j + 1], t);
        let node = row(i).towards(row(i + 1), s as f32);
        let column = node
            .ln_column
            .with(node.ln_column, |value, _| spectrum::exp(value));
        (column, shown as f32 * spectrum::exp(node.ln_focus))
    }
}

/// Logarithm of the column from a height outwards, along a direction that misses the Earth.
fn ln_column(densities: &[Mix], height_km: f64, cos_zenith: f64) -> Mix {
    let mut column = Mix::default();
    for step in Path::clear(height_km, cos_zenith, 60).steps() {
        let length = step.length_km as f32;
        column = column.with(density_at(densities, step.height_km), |a, b| a + b * length);
    }
    column.with(column, |value, _| value.max(1e-30).ln())
}
