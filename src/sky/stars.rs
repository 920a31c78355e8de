//! The bright stars.

use crate::measure::{Angle, Tt, Vector};
use std::fmt;
use std::sync::OnceLock;

/// The list that the program ships; its sources stand beside it.
const STARS: &str = include_str!("../../assets/stars/stars.csv");

/// The epoch of the catalogue's places, J1991.25, in days since J2000.
const CATALOGUE_EPOCH: Tt = Tt::from_days_since_j2000((1991.25 - 2000.0) * 365.25);

/// A star of the catalogue.
#[derive(Clone, Debug, PartialEq)]
pub struct Star {
    /// Number in the Hipparcos catalogue.
    pub hip: u32,
    /// Proper name as adopted by the IAU, if it has one.
    pub name: Option<String>,
    /// Visual magnitude, Johnson V.
    pub magnitude: f64,
    /// Colour, Johnson B-V, magnitudes.
    pub colour_b_v: f64,
    /// Parallax; the catalogue's errors make a few of them negative.
    pub parallax: Angle,
    direction: Vector,
    motion_per_year: Vector,
}

impl Star {
    /// The direction from the Sun at `tt`, on the axes of the ICRS: the catalogue's place
    /// carried along its proper motion in a straight line (radial velocity left out: it moves
    /// no star of the list by more than 1 arcsec in 400 years).
    pub fn direction(&self, tt: Tt) -> Vector {
        let days = tt.days_since_j2000() - CATALOGUE_EPOCH.days_since_j2000();
        (self.direction + self.motion_per_year * (days / 365.25)).unit()
    }

    fn from_row(row: &str) -> Option<Self> {
        let mut fields = row.split(',');
        let hip = fields.next()?.parse().ok()?;
        let name = fields.next()?;
        let mut number = || fields.next()?.parse::<f64>().ok();
        let (ra, dec) = (
            Angle::from_degrees(number()?),
            Angle::from_degrees(number()?),
        );
        let (motion_east, motion_north) = (mas(number()?), mas(number()?));
        let (parallax, magnitude, colour_b_v) = (mas(number()?), number()?, number()?);
        let (sin_ra, cos_ra) = ra.sin_cos();
        let (sin_dec, cos_dec) = dec.sin_cos();
        let east = Vector::new(-sin_ra, cos_ra, 0.0);
        let north = Vector::new(-sin_dec * cos_ra, -sin_dec * sin_ra, cos_dec);
        Some(Self {
            hip,
            name: (!name.is_empty()).then(|| name.to_owned()),
            magnitude,
            colour_b_v,
            parallax,
            direction: Vector::from_spherical(ra, dec),
            motion_per_year: east * motion_east.radians() + north * motion_north.radians(),
        })
    }
}

impl fmt::Display for Star {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match &self.name {
            Some(name) => f.write_str(name),
            None => write!(f, "HIP {}", self.hip),
        }
    }
}

/// The 919 stars to V 4.5, brightest first; read once, then shared.
pub fn bright_stars() -> &'static [Star] {
    static READ: OnceLock<Vec<Star>> = OnceLock::new();
    READ.get_or_init(|| {
        let rows = STARS.lines().skip(1);
        rows.map(|row| Star::from_row(row).expect("a row of the shipped star list is whole"))
            .collect()
    })
}

/// A star by its proper name, letter case passed over.
pub fn star_named(name: &str) -> Option<&'static Star> {
    bright_stars().iter().find(|star| {
        star.name
            .as_ref()
            .is_some_and(|known| known.to_lowercase() == name.to_lowercase())
    })
}

fn mas(milliarcseconds: f64) -> Angle {
    Angle::from_arcsec(milliarcseconds * 1e-3)
}
