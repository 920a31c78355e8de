//! How much light the people at a site need, as its file states it.

use super::limits;
use serde::{Deserialize, Serialize};

/// How many times the light that Crumey's laboratory observers needed (Crumey 2014's factor F)
/// each eye needs here, [0.5, 50]; what is left out keeps the light model's own value.
#[derive(Clone, Copy, Debug, Default, PartialEq, Serialize, Deserialize)]
#[serde(rename = "Eyes", deny_unknown_fields)]
pub struct SiteEyes {
    /// Untrained, nobody points.
    #[serde(
        default,
        deserialize_with = "limits::optional::passer_by",
        skip_serializing_if = "Option::is_none"
    )]
    pub passer_by: Option<f64>,
    /// Untrained, pointed to the place.
    #[serde(
        default,
        deserialize_with = "limits::optional::visitor",
        skip_serializing_if = "Option::is_none"
    )]
    pub visitor: Option<f64>,
    /// Practised, knows exactly where.
    #[serde(
        default,
        deserialize_with = "limits::optional::keen",
        skip_serializing_if = "Option::is_none"
    )]
    pub keen: Option<f64>,
    /// Behind an instrument of the kit.
    #[serde(
        default,
        deserialize_with = "limits::optional::optics",
        skip_serializing_if = "Option::is_none"
    )]
    pub optics: Option<f64>,
}

impl SiteEyes {
    /// Whether nothing is stated.
    pub fn is_usual(&self) -> bool {
        *self == Self::default()
    }
}
