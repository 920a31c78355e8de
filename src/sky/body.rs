//! The bodies that the program knows by name.

use serde::{Deserialize, Serialize};
use std::fmt;
use std::str::FromStr;

/// The Sun, the Moon and the planets seen from the Earth.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, PartialOrd, Ord, Serialize, Deserialize)]
#[serde(rename_all = "lowercase")]
#[allow(missing_docs)]
pub enum Body {
    Sun,
    Moon,
    Mercury,
    Venus,
    Mars,
    Jupiter,
    Saturn,
    Uranus,
    Neptune,
}

impl Body {
    /// All of them, in the order in which they are listed everywhere.
    pub const ALL: [Self; 9] = [
        Self::Sun,
        Self::Moon,
        Self::Mercury,
        Self::Venus,
        Self::Mars,
        Self::Jupiter,
        Self::Saturn,
        Self::Uranus,
        Self::Neptune,
    ];
    /// The Moon and the planets that an unaided eye can see: what sessions are held for.
    pub const BRIGHT: [Self; 6] = [
        Self::Venus,
        Self::Mercury,
        Self::Mars,
        Self::Jupiter,
        Self::Saturn,
        Self::Moon,
    ];

    /// The lower-case name used in files and on the command line.
    pub const fn name(self) -> &'static str {
        match self {
            Self::Sun => "sun",
            Self::Moon => "moon",
            Self::Mercury => "mercury",
            Self::Venus => "venus",
            Self::Mars => "mars",
            Self::Jupiter => "jupiter",
            Self::Saturn => "saturn",
            Self::Uranus => "uranus",
            Self::Neptune => "neptune",
        }
    }

    /// Equatorial radius, km.
    ///
    /// Source: IAU WGCCRE 2015 (Archinal et al. 2018, Celest. Mech. Dyn. Astr. 130, 22);
    /// the Sun's is the IAU 2015 nominal radius.
    pub const fn equatorial_radius_km(self) -> f64 {
        match self {
            Self::Sun => 695_700.0,
            Self::Moon => 1737.4,
            Self::Mercury => 2440.53,
            Self::Venus => 6051.8,
            Self::Mars => 3396.19,
            Self::Jupiter => 71_492.0,
            Self::Saturn => 60_268.0,
            Self::Uranus => 25_559.0,
            Self::Neptune => 24_764.0,
        }
    }
}

impl fmt::Display for Body {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(self.name())
    }
}

/// A name that is no body's.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct UnknownBody(pub String);

impl fmt::Display for UnknownBody {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        let known: Vec<&str> = Body::ALL.iter().map(|body| body.name()).collect();
        write!(
            f,
            "unknown body \"{}\"; the bodies are {}",
            self.0,
            known.join(", ")
        )
    }
}

impl std::error::Error for UnknownBody {}

impl FromStr for Body {
    type Err = UnknownBody;
    fn from_str(text: &str) -> Result<Self, UnknownBody> {
        Self::ALL
            .into_iter()
            .find(|body| body.name() == text)
            .ok_or_else(|| UnknownBody(text.to_owned()))
    }
}
