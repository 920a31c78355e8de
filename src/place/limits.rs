//! The numbers of a site file, each with its range: checked while they are read, so that a
//! refusal knows its line and column. RON itself reads `NaN`, `inf` and `1e400` without a word.

use serde::de::Error;
use serde::{Deserialize, Deserializer};

/// What a number may be.
struct Limits {
    field: &'static str,
    low: f64,
    high: f64,
    /// Whether `high` itself is refused.
    is_open: bool,
    unit: &'static str,
}

impl Limits {
    fn check(&self, value: f64) -> Result<f64, String> {
        let Self {
            field,
            low,
            high,
            is_open,
            unit,
        } = self;
        let is_within = (*low..=*high).contains(&value) && !(*is_open && value == *high);
        if is_within {
            Ok(value)
        } else if *is_open {
            Err(format!(
                "{field} is {value}, but must be at least {low} and below {high} {unit}"
            ))
        } else {
            Err(format!(
                "{field} is {value}, but must lie between {low} and {high} {unit}"
            ))
        }
    }
}

macro_rules! limits {
    ($($field:ident: $low:literal to $high:literal $(open $open:literal)?, $unit:literal;)*) => {
        $(
            pub(super) fn $field<'de, D: Deserializer<'de>>(from: D) -> Result<f64, D::Error> {
                let limits = Limits {
                    field: stringify!($field),
                    low: $low,
                    high: $high,
                    is_open: [$($open,)? false][0],
                    unit: $unit,
                };
                limits.check(f64::deserialize(from)?).map_err(D::Error::custom)
            }
        )*
    };
}

limits! {
    latitude_deg: -90.0 to 90.0, "degrees";
    longitude_deg: -180.0 to 180.0, "degrees";
    elevation_m: -450.0 to 9000.0, "metres";
    pressure_hpa: 300.0 to 1100.0, "hectopascals";
    temperature_c: -90.0 to 60.0, "degrees Celsius";
    extinction_mag: 0.0 to 3.0, "magnitudes at the zenith";
    dark_mag_arcsec2: 14.0 to 22.5, "magnitudes per square arcsecond";
    east_m: -10000.0 to 10000.0, "metres";
    north_m: -10000.0 to 10000.0, "metres";
    eye_height_m: 0.0 to 200.0, "metres";
    azimuth_deg: 0.0 to 360.0 open true, "degrees";
    altitude_deg: -10.0 to 90.0, "degrees";
    base_m: -1000.0 to 1000.0, "metres";
    radius_m: 0.0 to 500.0, "metres";
    gap_m: 0.1 to 1000.0, "metres";
    trunk_m: 0.01 to 100.0, "metres";
    slope_percent: -100.0 to 100.0, "per cent";
    see_through: 0.0 to 1.0, "(0: nothing, 1: all)";
    blocking_density: 0.0 to 1.0, "(0: every twig blocks, 1: only what is opaque)";
    terrain_k: -1.0 to 0.9, "(0.13 is usual)";
    backdrop_pixel: -100000.0 to 100000.0, "pixels";
    height_m: 0.01 to 1000.0, "metres";
    width_m: 0.01 to 1000.0, "metres";
    eaves_m: 0.01 to 1000.0, "metres";
    ridge_m: 0.01 to 1000.0, "metres";
    aperture_mm: 5.0 to 10000.0, "millimetres";
    focal_length_mm: 20.0 to 100000.0, "millimetres";
    eyepiece_mm: 1.0 to 200.0, "millimetres";
    apparent_field_deg: 5.0 to 150.0, "degrees";
    magnification: 1.0 to 1000.0, "times";
    field_deg: 0.05 to 90.0, "degrees";
    passer_by: 0.5 to 50.0, "times the laboratory observers' light";
    visitor: 0.5 to 50.0, "times the laboratory observers' light";
    keen: 0.5 to 50.0, "times the laboratory observers' light";
    optics: 0.5 to 50.0, "times the laboratory observers' light";
}

/// The same checks for numbers that may be left out.
pub(super) mod optional {
    use serde::{Deserialize, Deserializer};

    macro_rules! optional {
        ($($field:ident by $path:literal;)*) => {
            $(
                pub(in super::super) fn $field<'de, D: Deserializer<'de>>(
                    from: D,
                ) -> Result<Option<f64>, D::Error> {
                    #[derive(Deserialize)]
                    #[serde(transparent)]
                    struct Number(#[serde(deserialize_with = $path)] f64);
                    Ok(Option::<Number>::deserialize(from)?.map(|number| number.0))
                }
            )*
        };
    }
    optional! {
        pressure_hpa by "super::pressure_hpa";
        extinction_mag by "super::extinction_mag";
        ridge_m by "super::ridge_m";
        base_m by "super::base_m";
        radius_m by "super::radius_m";
        gap_m by "super::gap_m";
        trunk_m by "super::trunk_m";
        passer_by by "super::passer_by";
        visitor by "super::visitor";
        keen by "super::keen";
        optics by "super::optics";
    }
}

/// A name that people read: not empty, at most 80 characters, none of them a control character.
pub(super) fn name<'de, D: Deserializer<'de>>(from: D) -> Result<String, D::Error> {
    const LONGEST: usize = 80;
    let name = String::deserialize(from)?;
    if name.trim().is_empty() {
        Err(D::Error::custom("a name or label is empty: give it one"))
    } else if name.chars().count() > LONGEST {
        Err(D::Error::custom(format_args!(
            "a name or label has {} characters, but may have at most {LONGEST}",
            name.chars().count()
        )))
    } else if name.chars().any(char::is_control) {
        Err(D::Error::custom(format_args!(
            "the name or label {name:?} holds a line break or another control character"
        )))
    } else {
        Ok(name)
    }
}
