//! Heliocentric places of the planets: VSOP87A, and for Mars to Neptune a correction.

use super::correction::{self, Correction};
use super::series::{PoissonSeries, Reading};
use crate::measure::{Matrix, Tt, Vector};
use crate::sky::Body;
use std::sync::OnceLock;

/// The files of `assets/series` give amplitudes in units of 1e-11 au.
const READING: Reading = Reading {
    variables: ["x", "y", "z"],
    units: [1e-11; 3],
    sines: false,
};
/// VSOP87 counts time in thousands of Julian years.
const DAYS_PER_MILLENNIUM: f64 = 365_250.0;

/// Equator and equinox of FK5 from the dynamical ecliptic and equinox J2000 of VSOP87.
///
/// Source: Bretagnon and Francou 1988, Astron. Astrophys. 202, 309, as printed in the theory's
/// own notes (`vsop87.doc`). The axes of FK5 stand within 0.03 arcsec of those of the ICRS;
/// against DE440 no turn of Mercury's, Venus's and the Earth's places betters them by more than
/// 0.02 arcsec, so they are taken for the same.
pub const ICRS_FROM_ECLIPTIC: Matrix = Matrix([
    [1.0, 0.000_000_440_360, -0.000_000_190_919],
    [-0.000_000_479_966, 0.917_482_137_087, -0.397_776_982_902],
    [0.0, 0.397_776_982_902, 0.917_482_137_087],
]);

/// A planet of the theory, the Earth (not its barycentre with the Moon) among them.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
#[allow(missing_docs)]
pub enum Planet {
    Mercury,
    Venus,
    Earth,
    Mars,
    Jupiter,
    Saturn,
    Uranus,
    Neptune,
}

impl Planet {
    /// All of them, from the Sun outwards.
    pub const ALL: [Self; 8] = [
        Self::Mercury,
        Self::Venus,
        Self::Earth,
        Self::Mars,
        Self::Jupiter,
        Self::Saturn,
        Self::Uranus,
        Self::Neptune,
    ];

    /// The planet that a body is; none for the Sun and the Moon.
    pub const fn of(body: Body) -> Option<Self> {
        match body {
            Body::Sun | Body::Moon => None,
            Body::Mercury => Some(Self::Mercury),
            Body::Venus => Some(Self::Venus),
            Body::Mars => Some(Self::Mars),
            Body::Jupiter => Some(Self::Jupiter),
            Body::Saturn => Some(Self::Saturn),
            Body::Uranus => Some(Self::Uranus),
            Body::Neptune => Some(Self::Neptune),
        }
    }

    /// The lower-case name, as in the asset files.
    pub const fn name(self) -> &'static str {
        match self {
            Self::Mercury => "mercury",
            Self::Venus => "venus",
            Self::Earth => "earth",
            Self::Mars => "mars",
            Self::Jupiter => "jupiter",
            Self::Saturn => "saturn",
            Self::Uranus => "uranus",
            Self::Neptune => "neptune",
        }
    }

    const fn text(self) -> &'static str {
        match self {
            Self::Mercury => include_str!("../../../assets/series/mercury.txt"),
            Self::Venus => include_str!("../../../assets/series/venus.txt"),
            Self::Earth => include_str!("../../../assets/series/earth.txt"),
            Self::Mars => include_str!("../../../assets/series/mars.txt"),
            Self::Jupiter => include_str!("../../../assets/series/jupiter.txt"),
            Self::Saturn => include_str!("../../../assets/series/saturn.txt"),
            Self::Uranus => include_str!("../../../assets/series/uranus.txt"),
            Self::Neptune => include_str!("../../../assets/series/neptune.txt"),
        }
    }

    /// VSOP87A alone: au, in the theory's own axes (dynamical ecliptic and equinox J2000).
    fn vsop87a(self, millennia: f64) -> Vector {
        static SERIES: [OnceLock<PoissonSeries>; 8] = [const { OnceLock::new() }; 8];
        SERIES[self as usize]
            .get_or_init(|| PoissonSeries::parse(self.text(), READING))
            .value(millennia)
    }

    fn correction(self) -> Option<&'static Correction> {
        static CORRECTIONS: OnceLock<[Option<Correction>; 8]> = OnceLock::new();
        CORRECTIONS.get_or_init(|| Self::ALL.map(|planet| correction::of(planet.name())))
            [self as usize]
            .as_ref()
    }

    /// Heliocentric place, au, on the axes of the ICRS. Slow (some 20 microseconds): for
    /// fitting only. The argument is taken for TDB, which never leaves TT by 2 ms.
    pub fn heliocentric(self, tt: Tt) -> Vector {
        let millennia = tt.days_since_j2000() / DAYS_PER_MILLENNIUM;
        let place = self.vsop87a(millennia);
        let place = match self.correction() {
            Some(correction) => correction.applied(place, millennia),
            None => place,
        };
        ICRS_FROM_ECLIPTIC * place
    }
}
