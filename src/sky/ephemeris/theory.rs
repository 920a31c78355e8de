//! The theories by name: which series, corrected how, kept in what pieces.

use super::correction::Correction;
use super::lunar::LunarSeries;
use super::series::Series;
use crate::measure::{Chebyshev, Tt, Vector};
use crate::sky::{Body, frame};
use std::sync::LazyLock;

/// A vector function of time that is kept in fitted pieces.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub(super) enum Theory {
    /// Heliocentric Earth.
    Earth,
    /// Geocentric Moon.
    Moon,
    /// Nutation in longitude and obliquity and the equation of the equinoxes.
    Nutation,
    Mercury,
    Venus,
    Mars,
    Jupiter,
    Saturn,
    Uranus,
    Neptune,
}

/// How many theories there are.
pub(super) const COUNT: usize = 10;

/// One planet's series with what corrects it.
struct Planet {
    series: Series,
    correction: Option<Correction>,
}

macro_rules! asset {
    ($name:literal) => {
        include_str!(concat!("../../../assets/series/", $name, ".csv"))
    };
}

macro_rules! planet {
    ($static:ident, $name:literal) => {
        static $static: LazyLock<Planet> = LazyLock::new(|| Planet {
            series: Series::from_asset(asset!($name)),
            correction: None,
        });
    };
    ($static:ident, $name:literal, $longitude_deg:expr) => {
        static $static: LazyLock<Planet> = LazyLock::new(|| Planet {
            series: Series::from_asset(asset!($name)),
            correction: Some(Correction::from_asset(
                asset!("corrections"),
                $name,
                $longitude_deg,
            )),
        });
    };
}

planet!(MERCURY, "mercury");
planet!(VENUS, "venus");
planet!(EARTH, "earth");
planet!(MARS, "mars", (355.432_999_58, 19_140.299_342_43));
planet!(JUPITER, "jupiter", (34.351_518_74, 3_034.905_674_64));
planet!(SATURN, "saturn", (50.077_444_30, 1_222.113_794_04));
planet!(URANUS, "uranus", (314.055_005_11, 428.466_998_31));
planet!(NEPTUNE, "neptune", (304.348_665_48, 218.486_200_19));
static MOON: LazyLock<LunarSeries> = LazyLock::new(|| LunarSeries::from_asset(asset!("moon")));

impl Theory {
    /// The theory of a planet's place.
    pub const fn of_planet(body: Body) -> Option<Self> {
        Some(match body {
            Body::Sun | Body::Moon => return None,
            Body::Mercury => Self::Mercury,
            Body::Venus => Self::Venus,
            Body::Mars => Self::Mars,
            Body::Jupiter => Self::Jupiter,
            Body::Saturn => Self::Saturn,
            Body::Uranus => Self::Uranus,
            Body::Neptune => Self::Neptune,
        })
    }

    /// Its place in lists of theories.
    pub const fn index(self) -> usize {
        self as usize
    }

    /// Length of a piece in days, and its Chebyshev nodes: each keeps within 0.005 arcsec of
    /// the theory (0.1 mas for the nutation); `tests/sky` checks that.
    pub const fn piece(self) -> (f64, usize) {
        match self {
            Self::Mercury => (32.0, 17),
            Self::Venus => (64.0, 11),
            Self::Earth => (16.0, 10),
            Self::Mars => (64.0, 9),
            Self::Jupiter | Self::Saturn | Self::Uranus | Self::Neptune => (128.0, 6),
            Self::Moon => (8.0, 12),
            Self::Nutation => (frame::NUTATION_PIECE_DAYS, frame::NUTATION_PIECE_NODES),
        }
    }

    /// The theory itself at an instant: slow.
    pub fn evaluated(self, tt: Tt) -> Vector {
        let planet: &Planet = match self {
            Self::Moon => return MOON.place(tt),
            Self::Nutation => return frame::nutation(tt),
            Self::Mercury => &MERCURY,
            Self::Venus => &VENUS,
            Self::Earth => &EARTH,
            Self::Mars => &MARS,
            Self::Jupiter => &JUPITER,
            Self::Saturn => &SATURN,
            Self::Uranus => &URANUS,
            Self::Neptune => &NEPTUNE,
        };
        let place = planet.series.place(tt);
        match &planet.correction {
            None => place,
            Some(correction) => {
                // The direction of motion only tells along-track from normal: a day will do.
                let motion = planet.series.place(tt.plus_days(1.0)) - place;
                correction.applied(tt, place, motion)
            }
        }
    }

    /// Fits the piece of that number.
    pub fn fitted(self, piece: i32) -> Chebyshev {
        let (length_days, nodes) = self.piece();
        Chebyshev::fit(f64::from(piece) * length_days, length_days, nodes, |days| {
            self.evaluated(Tt::from_days_since_j2000(days))
        })
    }
}
