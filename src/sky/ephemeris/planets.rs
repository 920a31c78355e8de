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

#[cfg(test)]
mod tests {
    use super::{DAYS_PER_MILLENNIUM, Planet, Planet::*};

    /// The place by VSOP87A, au, at days from J2000: the check values published with the theory
    /// (`vsop87.chk`), as carried by the tests of the crate `vsop87` 3.0.0, where x and y have
    /// ten decimals and z is good to 2.5e-6 au.
    const CHECK_VALUES: [(Planet, f64, [f64; 3]); 24] = [
        (
            Mercury,
            0.0,
            [-0.130_093_411_5, -0.447_287_671_6, -0.024_598_4],
        ),
        (
            Mercury,
            -73050.0,
            [-0.168_356_523_7, 0.273_510_815_7, 0.037_810_4],
        ),
        (
            Mercury,
            -109575.0,
            [0.325_672_036_0, 0.088_086_580_2, -0.022_982],
        ),
        (
            Venus,
            0.0,
            [-0.718_302_279_7, -0.032_654_601_7, 0.041_014_3],
        ),
        (
            Venus,
            -73050.0,
            [-0.598_353_520_8, 0.395_850_215_6, 0.039_823_8],
        ),
        (
            Venus,
            -109575.0,
            [0.453_119_326_5, -0.569_242_096_9, -0.033_564_3],
        ),
        (
            Earth,
            0.0,
            [-0.177_135_458_6, 0.967_241_623_7, -0.000_003_9],
        ),
        (
            Earth,
            -73050.0,
            [-0.199_391_800_2, 0.962_797_436_8, 0.000_430_8],
        ),
        (
            Earth,
            -109575.0,
            [-0.210_465_465_2, 0.960_357_995_4, 0.000_647_3],
        ),
        (Mars, 0.0, [1.390_715_926_4, -0.013_415_704_3, -0.034_467_8]),
        (
            Mars,
            -73050.0,
            [-1.111_921_962_1, -1.096_326_301_4, 0.004_920_9],
        ),
        (
            Mars,
            -109575.0,
            [-1.638_748_952_4, 0.250_710_524_2, 0.046_560_6],
        ),
        (
            Jupiter,
            0.0,
            [4.001_174_026_8, 2.938_581_007_7, -0.101_783_8],
        ),
        (
            Jupiter,
            -73050.0,
            [-0.018_039_000_4, 5.131_774_883_9, -0.020_044_8],
        ),
        (
            Jupiter,
            -109575.0,
            [1.281_731_835_3, -5.028_007_987_4, -0.009_125_2],
        ),
        (
            Saturn,
            0.0,
            [6.406_406_857_3, 6.569_992_944_9, -0.369_076_8],
        ),
        (
            Saturn,
            -73050.0,
            [-5.679_091_087_0, 7.115_247_812_0, 0.097_852_1],
        ),
        (
            Saturn,
            -109575.0,
            [8.993_475_899_2, -3.788_322_543_7, -0.286_638_9],
        ),
        (
            Uranus,
            0.0,
            [14.431_893_415_9, -13.734_316_252_7, -0.238_142_2],
        ),
        (
            Uranus,
            -73050.0,
            [-18.270_833_517_8, 0.987_765_571_5, 0.242_034_4],
        ),
        (
            Uranus,
            -109575.0,
            [-4.221_439_193_6, 18.316_026_638_4, 0.124_759_3],
        ),
        (
            Neptune,
            0.0,
            [16.812_111_657_6, -24.991_663_090_8, 0.127_219],
        ),
        (
            Neptune,
            -73050.0,
            [-20.313_894_357_8, -22.490_825_579_6, 0.930_915_2],
        ),
        (
            Neptune,
            -109575.0,
            [29.502_281_195_0, 4.598_770_111_4, -0.774_050_7],
        ),
    ];

    /// What trimming is measured to cost, au; `assets/series/README.md`.
    fn loss_au(planet: Planet) -> f64 {
        match planet {
            Mercury => 1.3e-8,
            Venus | Earth => 0.7e-8,
            Mars => 0.9e-8,
            Jupiter => 1.0e-7,
            Saturn => 1.9e-7,
            Uranus => 4.5e-7,
            Neptune => 6.6e-7,
        }
    }

    #[test]
    fn the_trimmed_series_match_the_published_check_values() {
        for (planet, days, [x, y, z]) in CHECK_VALUES {
            let place = planet.vsop87a(days / DAYS_PER_MILLENNIUM);
            let name = planet.name();
            let missed = (place.x - x).hypot(place.y - y);
            assert!(
                missed <= loss_au(planet) + 1e-10,
                "{name} at {days} days: x and y off by {missed:e} au"
            );
            let missed = (place.z - z).abs();
            assert!(
                missed <= 2.6e-6,
                "{name} at {days} days: z off by {missed:e} au"
            );
        }
    }

    #[test]
    fn the_five_outer_planets_are_corrected_and_no_others() {
        let corrected = Planet::ALL.map(|planet| planet.correction().is_some());
        assert_eq!(
            corrected,
            [false, false, false, true, true, true, true, true]
        );
    }
}
