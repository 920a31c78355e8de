//! What brings the outer planets' series to JPL DE440.
//!
//! Kept as `assets/series/corrections.csv` and made by `make_corrections.py` beside it: for each
//! planet the radial, along-track and normal differences, in parts of the distance, as a cubic
//! in time (units of four centuries) by 1, cos L and sin L.

use crate::measure::{Angle, Tt, Vector};

/// Coefficients of one part, by shape (1, cos L, sin L) and power of time.
type Part = [[f64; 4]; 3];

/// One planet's correction.
#[derive(Clone, Debug)]
pub(super) struct Correction {
    /// Mean longitude at J2000 and its rate in a Julian century
    /// (Simon et al. 1994, Astron. Astrophys. 282, 663, table 5.9).
    longitude: (Angle, Angle),
    radial: Part,
    along: Part,
    normal: Part,
}

impl Correction {
    /// Reads a planet's lines of the asset.
    pub fn from_asset(text: &str, planet: &str, longitude_deg: (f64, f64)) -> Self {
        let mut correction = Self {
            longitude: (
                Angle::from_degrees(longitude_deg.0),
                Angle::from_degrees(longitude_deg.1),
            ),
            radial: Part::default(),
            along: Part::default(),
            normal: Part::default(),
        };
        for line in text.lines().skip(1) {
            let fields: Vec<&str> = line.split(',').collect();
            let [name, part, shape, power, coefficient] = fields[..] else {
                unreachable!("a shipped correction has five columns: {line}")
            };
            if name != planet {
                continue;
            }
            let part = match part {
                "radial" => &mut correction.radial,
                "along" => &mut correction.along,
                _ => &mut correction.normal,
            };
            if let (Ok(shape), Ok(power), Ok(coefficient)) = (
                shape.parse::<usize>(),
                power.parse::<usize>(),
                coefficient.parse(),
            ) {
                part[shape][power] = coefficient;
            }
        }
        correction
    }

    /// The corrected place of a planet, from its place by the series and its direction of motion
    /// (of any length).
    pub fn applied(&self, tt: Tt, place: Vector, motion: Vector) -> Vector {
        let centuries = tt.centuries_since_j2000();
        let (sin, cos) = (self.longitude.0 + self.longitude.1 * centuries).sin_cos();
        let x = centuries / 4.0;
        let value = |part: &Part| {
            part.iter()
                .zip([1.0, cos, sin])
                .map(|(powers, shape)| shape * powers.iter().rev().fold(0.0, |sum, c| sum * x + c))
                .sum::<f64>()
        };
        let radial = place.unit();
        let normal = place.cross(motion).unit();
        let along = normal.cross(radial);
        let shift = radial * value(&self.radial)
            + along * value(&self.along)
            + normal * value(&self.normal);
        place + shift * place.length()
    }
}
