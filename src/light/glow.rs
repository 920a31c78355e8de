//! The light of the whole sky over a site at one instant.

use super::extinction::extinction_mag;
use super::moonlight::MoonRow;
use super::twilight::{Dome, Row, Slice};
use super::{Conditions, Gaze, Margin, Moonlight, Target};

/// The sky over a site in its air, at any time: made once per site and shared.
#[derive(Clone, Debug)]
pub struct SkyLight {
    conditions: Conditions,
    dome: Dome,
}

/// The light of the sky at one instant: made once per instant and shared by bodies and eyes.
#[derive(Clone, Debug)]
pub struct Glow<'a> {
    site: &'a SkyLight,
    slice: Slice,
    sun_azimuth: f64,
    moon: Option<Moonlight>,
}

/// Luminance of the sky in one direction, cd/m², by what lights it.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Luminance {
    /// Sunlight, by day and through twilight.
    pub sun: f64,
    /// Moonlight.
    pub moon: f64,
    /// The night's own: airglow, stars, lamps.
    pub night: f64,
}

impl Luminance {
    /// All of it.
    pub fn total(&self) -> f64 {
        self.sun + self.moon + self.night
    }
}

impl SkyLight {
    /// The sky over a site under these conditions; some 0.2 ms of work.
    pub fn new(conditions: Conditions) -> Self {
        Self {
            conditions,
            dome: Dome::new(&conditions),
        }
    }
    /// The conditions.
    pub fn conditions(&self) -> &Conditions {
        &self.conditions
    }
    /// The sky while the Sun stands there (airless altitude and azimuth of its centre, radians)
    /// and the Moon, if it counts.
    pub fn at(&self, sun_altitude: f64, sun_azimuth: f64, moon: Option<Moonlight>) -> Glow<'_> {
        Glow {
            site: self,
            slice: self.dome.slice(sun_altitude),
            sun_azimuth,
            moon,
        }
    }
}

/// Chromaticities with which light counts whose spectrum is not computed, X, Y, Z for Y = 1: of
/// moonlit sky (as a clear day's), of airglow, and of street lamps (from memory).
const MOON_COLOUR: [f64; 3] = [0.96, 1.0, 1.45];
const AIRGLOW_COLOUR: [f64; 3] = [0.97, 1.0, 0.90];
const LAMP_COLOUR: [f64; 3] = [1.10, 1.0, 0.55];

impl Glow<'_> {
    /// Luminance towards an altitude and azimuth (radians); below the horizon as at it.
    pub fn luminance(&self, altitude: f64, azimuth: f64) -> Luminance {
        self.along(altitude).luminance(azimuth)
    }
    /// The sky along one altitude (radians): what a painter asks for, row by row.
    pub fn along(&self, altitude: f64) -> GlowRow {
        let conditions = &self.site.conditions;
        let altitude = altitude.clamp(0.0, std::f64::consts::FRAC_PI_2);
        let night = conditions.night_luminance(altitude);
        let lamps = night * conditions.part_from_lamps();
        let airglow = night - lamps;
        GlowRow {
            row: self.slice.row(altitude),
            sun_azimuth: self.sun_azimuth,
            moon: self
                .moon
                .map(|moon| moon.along(conditions.extinction(), altitude)),
            night_xyz: [0, 1, 2].map(|i| lamps * LAMP_COLOUR[i] + airglow * AIRGLOW_COLOUR[i]),
        }
    }
    /// By how much a target outshines an eye's threshold there, and what makes it up.
    pub fn margin(&self, target: &Target, gaze: &Gaze) -> Margin {
        let row = self.along(target.altitude);
        let mut luminance = row.luminance(target.azimuth);
        if !target.is_moonlit {
            luminance.moon = 0.0;
        }
        let extinction_mag = extinction_mag(self.site.conditions.extinction(), target.altitude);
        Margin::new(target, extinction_mag, luminance, gaze)
    }
    /// The same for several eyes, the sky being looked at once.
    pub fn margins<const EYES: usize>(
        &self,
        target: &Target,
        gazes: &[Gaze; EYES],
    ) -> [Margin; EYES] {
        let first = self.margin(target, &gazes[0]);
        std::array::from_fn(|eye| first.for_gaze(target, &gazes[eye]))
    }
}

/// The light of the sky at one instant along one altitude.
#[derive(Clone, Debug)]
pub struct GlowRow {
    row: Row,
    sun_azimuth: f64,
    moon: Option<MoonRow>,
    night_xyz: [f64; 3],
}

impl GlowRow {
    /// Luminance towards an azimuth (radians).
    pub fn luminance(&self, azimuth: f64) -> Luminance {
        Luminance {
            sun: self.row.xyz(azimuth - self.sun_azimuth)[1],
            moon: self.moonlight(azimuth),
            night: self.night_xyz[1],
        }
    }
    /// CIE 1931 X, Y, Z towards an azimuth (radians); Y in cd/m².
    #[inline]
    pub fn xyz(&self, azimuth: f64) -> [f64; 3] {
        let [x, y, z] = self.row.xyz(azimuth - self.sun_azimuth);
        let [night_x, night_y, night_z] = self.night_xyz;
        let moon = self.moonlight(azimuth);
        let [moon_x, _, moon_z] = MOON_COLOUR;
        [
            x + night_x + moon * moon_x,
            y + night_y + moon,
            z + night_z + moon * moon_z,
        ]
    }
    #[inline]
    fn moonlight(&self, azimuth: f64) -> f64 {
        self.moon.map_or(0.0, |moon| moon.luminance(azimuth))
    }
}
