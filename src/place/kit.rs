//! A site's instruments.

use super::limits;
use serde::de::Error;
use serde::{Deserialize, Deserializer, Serialize};

/// An instrument that visitors look through.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub enum Instrument {
    /// With exchangeable eyepieces.
    Telescope {
        /// What its users call it.
        #[serde(deserialize_with = "limits::name")]
        label: String,
        /// Diameter of the objective or main mirror, mm.
        #[serde(deserialize_with = "limits::aperture_mm")]
        aperture_mm: f64,
        /// Focal length, mm.
        #[serde(deserialize_with = "limits::focal_length_mm")]
        focal_length_mm: f64,
        /// Its eyepieces, at least one.
        #[serde(deserialize_with = "at_least_one")]
        eyepieces: Vec<Eyepiece>,
        /// How it turns the picture.
        view: Orientation,
        /// The spot that it stands at, by name; left out, wherever people stand.
        #[serde(default, skip_serializing_if = "Option::is_none")]
        spot: Option<String>,
    },
    /// With a fixed magnification; always erect.
    Binocular {
        /// What its users call it.
        #[serde(deserialize_with = "limits::name")]
        label: String,
        /// Magnification, times.
        #[serde(deserialize_with = "limits::magnification")]
        magnification: f64,
        /// Diameter of one objective, mm.
        #[serde(deserialize_with = "limits::aperture_mm")]
        aperture_mm: f64,
        /// True field, degrees.
        #[serde(deserialize_with = "limits::field_deg")]
        field_deg: f64,
        /// The spot that it stands at, by name; left out, wherever people stand.
        #[serde(default, skip_serializing_if = "Option::is_none")]
        spot: Option<String>,
    },
}

/// An eyepiece; the file writes it `(focal length, apparent field)`.
#[derive(Clone, Copy, Debug, PartialEq, Serialize, Deserialize)]
#[serde(from = "EyepieceInFile", into = "(f64, f64)")]
pub struct Eyepiece {
    /// Focal length, mm.
    pub focal_length_mm: f64,
    /// Apparent field, degrees.
    pub apparent_field_deg: f64,
}

#[derive(Deserialize)]
struct EyepieceInFile(
    #[serde(deserialize_with = "limits::eyepiece_mm")] f64,
    #[serde(deserialize_with = "limits::apparent_field_deg")] f64,
);

impl From<EyepieceInFile> for Eyepiece {
    fn from(EyepieceInFile(focal_length_mm, apparent_field_deg): EyepieceInFile) -> Self {
        Self {
            focal_length_mm,
            apparent_field_deg,
        }
    }
}

impl From<Eyepiece> for (f64, f64) {
    fn from(eyepiece: Eyepiece) -> Self {
        (eyepiece.focal_length_mm, eyepiece.apparent_field_deg)
    }
}

/// How an instrument's picture stands to what the unaided eye sees. Only the parity is certain;
/// where the observer's head decides (a Newtonian's side eyepiece), the picture may be turned.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, Serialize, Deserialize)]
#[serde(rename_all = "lowercase")]
pub enum Orientation {
    /// As the eye sees it: binoculars, erecting prisms.
    Erect,
    /// Turned by half a turn: a straight-through refractor, a Newtonian.
    Inverted,
    /// Left and right exchanged, up kept: a star diagonal.
    Mirrored,
}

impl Instrument {
    /// What its users call it.
    pub fn label(&self) -> &str {
        match self {
            Self::Telescope { label, .. } | Self::Binocular { label, .. } => label,
        }
    }

    /// The spot that it stands at, by name.
    pub fn spot(&self) -> Option<&str> {
        match self {
            Self::Telescope { spot, .. } | Self::Binocular { spot, .. } => spot.as_deref(),
        }
    }

    /// Puts it at a spot, or nowhere in particular.
    pub fn set_spot(&mut self, name: Option<String>) {
        match self {
            Self::Telescope { spot, .. } | Self::Binocular { spot, .. } => *spot = name,
        }
    }

    /// How it turns the picture.
    pub const fn orientation(&self) -> Orientation {
        match self {
            Self::Telescope { view, .. } => *view,
            Self::Binocular { .. } => Orientation::Erect,
        }
    }

    /// Diameter of the objective, mm.
    pub const fn aperture_mm(&self) -> f64 {
        match self {
            Self::Telescope { aperture_mm, .. } | Self::Binocular { aperture_mm, .. } => {
                *aperture_mm
            }
        }
    }

    /// Magnification (times) and true field (degrees) with each eyepiece in the file's order;
    /// one pair for a binocular. A true field is the apparent field over the magnification.
    pub fn views(&self) -> Vec<(f64, f64)> {
        match self {
            Self::Telescope {
                focal_length_mm,
                eyepieces,
                ..
            } => eyepieces
                .iter()
                .map(|eyepiece| {
                    let magnification = focal_length_mm / eyepiece.focal_length_mm;
                    (magnification, eyepiece.apparent_field_deg / magnification)
                })
                .collect(),
            Self::Binocular {
                magnification,
                field_deg,
                ..
            } => vec![(*magnification, *field_deg)],
        }
    }
}

fn at_least_one<'de, D: Deserializer<'de>>(from: D) -> Result<Vec<Eyepiece>, D::Error> {
    let eyepieces = Vec::<Eyepiece>::deserialize(from)?;
    if eyepieces.is_empty() {
        return Err(D::Error::custom(
            "eyepieces is empty: name at least one as (focal length in mm, apparent field in \
             degrees)",
        ));
    }
    Ok(eyepieces)
}
