//! Visual magnitudes of the planets, the Moon and the Sun.

use super::Body;
use crate::measure::{Angle, Tt, Vector};

/// A visual magnitude, or why there is none.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Magnitude {
    /// V, within the formula's range of phase angles.
    Within(f64),
    /// V by the formula outside the phase angles it was fitted to, where it stays smooth: see
    /// [`of_planet`] and [`of_moon`].
    Extrapolated(f64),
    /// The formula says nothing here.
    OutsideRange,
}

impl Magnitude {
    /// V, whether or not extrapolated.
    pub fn value(self) -> Option<f64> {
        match self {
            Self::Within(v) | Self::Extrapolated(v) => Some(v),
            Self::OutsideRange => None,
        }
    }
    /// Fainter by so many magnitudes.
    fn plus(self, offset: f64) -> Self {
        match self {
            Self::Within(v) => Self::Within(v + offset),
            Self::Extrapolated(v) => Self::Extrapolated(v + offset),
            Self::OutsideRange => Self::OutsideRange,
        }
    }
}

/// How the Sun, a body and whoever looks at it stand to each other when the light left.
#[derive(Clone, Copy, Debug)]
pub struct Lighting {
    /// From the Sun to the body, au, on the axes of the ICRS.
    pub from_sun: Vector,
    /// From the observer to the body, au, on the same axes.
    pub from_observer: Vector,
    /// When.
    pub tt: Tt,
}

impl Lighting {
    /// The angle Sun-body-observer, [0°, 180°].
    pub fn phase_angle(&self) -> Angle {
        self.from_sun.angle_to(self.from_observer)
    }
    /// Latitudes of the Sun and of the observer in the sky of a body with that pole, planetocentric.
    fn sub_latitudes(&self, pole: Vector) -> (Angle, Angle) {
        let latitude = |from: Vector| Angle::from_radians((-from.unit().dot(pole)).asin());
        (latitude(self.from_sun), latitude(self.from_observer))
    }
}

/// The visual magnitude of any body.
pub fn of(body: Body, lighting: &Lighting) -> Magnitude {
    match body {
        Body::Sun => of_sun(lighting.from_observer.length()),
        Body::Moon => of_moon(lighting),
        _ => of_planet(body, lighting),
    }
}

/// The Sun's V at a distance, au: -26.74 at 1 au.
///
/// Source: the value used in Schaefer's sky brightness model (Sky & Telescope, May 1998).
pub fn of_sun(distance_au: f64) -> Magnitude {
    Magnitude::Within(-26.74 + 5.0 * distance_au.log10())
}

/// The Moon's V: -12.73 + 0.026 α + 4e-9 α⁴ at mean distances, α the phase angle in degrees.
///
/// Source: Krisciunas & Schaefer 1991 (PASP 103, 1033), with the inverse squares of both
/// distances. It lacks the surge within 7° of full. Beyond 150° it makes the thin crescent too
/// bright and is marked as extrapolated.
pub fn of_moon(lighting: &Lighting) -> Magnitude {
    const MEAN_DISTANCE_AU: f64 = 384_400.0 / 149_597_870.7;
    let a = lighting.phase_angle().degrees();
    let distances = lighting.from_sun.length() * lighting.from_observer.length() / MEAN_DISTANCE_AU;
    let v = -12.73 + 0.026 * a + 4e-9 * a.powi(4) + 5.0 * distances.log10();
    if a <= 150.0 {
        Magnitude::Within(v)
    } else {
        Magnitude::Extrapolated(v)
    }
}

/// A planet's V.
///
/// Source: Mallama & Hilton 2018 (Astron. Comput. 25, 10). Left out, as their tables are not
/// in the paper's equations: Mars's terms of rotation and orbit, up to 0.06 magnitude.
///
/// | planet | phase angles | beyond them |
/// | --- | --- | --- |
/// | Mercury | 2° to 170° | extrapolated |
/// | Venus | 0° to 179° | extrapolated |
/// | Mars | 0° to 50° (all that the Earth sees) | nothing |
/// | Jupiter | 0° to 12° (all) | nothing |
/// | Saturn with its rings | 0° to 6.5° (all), rings open to 27° | nothing |
/// | Uranus | 0° to 154° | nothing |
/// | Neptune | 0° to 133°; before 2000 to 1.9° | nothing |
pub fn of_planet(planet: Body, lighting: &Lighting) -> Magnitude {
    let a = lighting.phase_angle().degrees();
    let at_unit_distances = match planet {
        Body::Sun | Body::Moon => Magnitude::OutsideRange,
        Body::Mercury => mercury(a),
        Body::Venus => venus(a),
        Body::Mars => up_to(50.0, a, series(a, &[-1.601, 2.267e-2, -1.302e-4])),
        Body::Jupiter => up_to(12.0, a, series(a, &[-9.395, -3.7e-4, 6.16e-4])),
        Body::Saturn => saturn(a, ring_latitude(lighting)),
        Body::Uranus => uranus(a, lighting),
        Body::Neptune => neptune(a, lighting.tt.decimal_year()),
    };
    let distances = lighting.from_sun.length() * lighting.from_observer.length();
    at_unit_distances.plus(5.0 * distances.log10())
}

/// How far Saturn's rings are open to the observer: the saturnicentric latitude B of the
/// observer, north positive. The rings' apparent axes are as |sin B| to 1.
pub fn ring_opening(lighting: &Lighting) -> Angle {
    lighting.sub_latitudes(saturn_pole(lighting.tt)).1
}

/// Saturn's north pole, the pole of the rings too.
///
/// Source: IAU WGCCRE 2015 (Archinal et al. 2018).
pub fn saturn_pole(tt: Tt) -> Vector {
    let t = tt.centuries_since_j2000();
    Vector::from_spherical(
        Angle::from_degrees(40.589 - 0.036 * t),
        Angle::from_degrees(83.537 - 0.004 * t),
    )
}

/// The mean of the Sun's and the observer's ring latitudes as the formula wants it: none while
/// the observer looks at the rings' unlit face.
fn ring_latitude(lighting: &Lighting) -> Angle {
    let (sun, observer) = lighting.sub_latitudes(saturn_pole(lighting.tt));
    let product = sun.radians() * observer.radians();
    Angle::from_radians(product.max(0.0).sqrt())
}

fn series(a: f64, coefficients: &[f64]) -> f64 {
    coefficients.iter().rev().fold(0.0, |sum, c| sum * a + c)
}

fn up_to(largest: f64, a: f64, v: f64) -> Magnitude {
    if a <= largest {
        Magnitude::Within(v)
    } else {
        Magnitude::OutsideRange
    }
}

fn mercury(a: f64) -> Magnitude {
    let v = series(
        a,
        &[
            -0.613,
            6.3280e-2,
            -1.6336e-3,
            3.3644e-5,
            -3.4265e-7,
            1.6893e-9,
            -3.0334e-12,
        ],
    );
    if (2.0..=170.0).contains(&a) {
        Magnitude::Within(v)
    } else {
        Magnitude::Extrapolated(v)
    }
}

fn venus(a: f64) -> Magnitude {
    if a <= 163.7 {
        Magnitude::Within(series(
            a,
            &[-4.384, -1.044e-3, 3.687e-4, -2.814e-6, 8.938e-9],
        ))
    } else {
        // Light scattered forwards in the clouds.
        let v = series(a, &[236.05828, -2.81914, 8.39034e-3]);
        if a <= 179.0 {
            Magnitude::Within(v)
        } else {
            Magnitude::Extrapolated(v)
        }
    }
}

fn saturn(a: f64, ring_latitude: Angle) -> Magnitude {
    if ring_latitude.degrees() > 27.0 {
        return Magnitude::OutsideRange;
    }
    let s = ring_latitude.sin();
    let v = -8.914 - 1.825 * s + 0.026 * a - 0.378 * s * (-2.25 * a).exp();
    up_to(6.5, a, v)
}

fn uranus(a: f64, lighting: &Lighting) -> Magnitude {
    // Pole: IAU WGCCRE 2015. The formula takes planetographic latitudes.
    let pole = Vector::from_spherical(Angle::from_degrees(257.311), Angle::from_degrees(-15.175));
    const POLAR_RADIUS_KM: f64 = 24_973.0;
    let squeezed = (Body::Uranus.equatorial_radius_km() / POLAR_RADIUS_KM).powi(2);
    let planetographic_deg =
        |latitude: Angle| (latitude.tan() * squeezed).atan().to_degrees().abs();
    let (sun, observer) = lighting.sub_latitudes(pole);
    let latitude_deg = 0.5 * (planetographic_deg(sun) + planetographic_deg(observer));
    let phase = if a > 3.1 {
        series(a, &[0.0, 6.587e-3, 1.045e-4])
    } else {
        0.0
    };
    up_to(154.0, a, -7.110 - 8.4e-4 * latitude_deg + phase)
}

fn neptune(a: f64, year: f64) -> Magnitude {
    // The planet brightened between 1980 and 2000.
    let full = -6.89 - 0.0054 * (year - 1980.0).clamp(0.0, 20.0);
    let full = if year >= 2000.0 { -7.00 } else { full };
    if a <= 1.9 {
        Magnitude::Within(full)
    } else if year >= 2000.0 {
        up_to(133.0, a, full + series(a, &[0.0, 7.944e-3, 9.617e-5]))
    } else {
        Magnitude::OutsideRange
    }
}
