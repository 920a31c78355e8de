//! The way of the light from a body to whoever looks: light time, deflection by the Sun,
//! aberration.

use super::{Body, Span};
use crate::measure::{Angle, Matrix, Tt, Vector};

/// The speed of light, au/day (299 792 458 m/s; one au is 149 597 870 700 m).
const LIGHT_AU_PER_DAY: f64 = 173.144_632_684_669_3;
/// The Sun's Schwarzschild radius, au (the constant SRS of IAU SOFA).
const SUN_SCHWARZSCHILD_RADIUS_AU: f64 = 1.974_125_743_36e-8;
/// Light time is settled when it changes by less than this (a tenth of a millisecond, in which
/// the fastest planet moves 5 m).
const LIGHT_TIME_SETTLED_DAYS: f64 = 1e-9;

/// A moving point from which bodies are seen, at one instant. Vectors are on the axes of the
/// ICRS, au and days.
#[derive(Clone, Copy, Debug)]
pub(super) struct Vantage<'a> {
    pub span: &'a Span,
    pub tt: Tt,
    /// From the Sun.
    pub place: Vector,
    /// About the Sun.
    pub velocity: Vector,
}

/// Where a body was when the light left it, with the Sun's own drift meanwhile allowed for.
#[derive(Clone, Copy, Debug)]
pub(super) struct Sighting {
    pub from_observer: Vector,
    pub from_sun: Vector,
}

impl Vantage<'_> {
    /// Follows the light back to the body.
    pub fn sight(&self, body: Body) -> Sighting {
        let sun_velocity = sun_velocity(self.tt);
        let mut light_days = 0.0;
        loop {
            let from_sun = self.heliocentric(body, self.tt.plus_days(-light_days));
            let from_observer = from_sun - self.place - sun_velocity * light_days;
            let settled_days = from_observer.length() / LIGHT_AU_PER_DAY;
            let change_days = (settled_days - light_days).abs();
            // Each pass shrinks the change by the body's speed over light's: three are enough.
            if change_days < LIGHT_TIME_SETTLED_DAYS || !change_days.is_finite() {
                return Sighting {
                    from_observer,
                    from_sun,
                };
            }
            light_days = settled_days;
        }
    }

    fn heliocentric(&self, body: Body, tt: Tt) -> Vector {
        match body {
            Body::Sun => Vector::default(),
            Body::Moon => self.span.earth(tt).0 + self.span.moon(tt),
            planet => self.span.heliocentric(planet, tt),
        }
    }

    /// The direction in which a body is seen. The Sun's own light is not deflected.
    pub fn seen(&self, body: Body, sighting: &Sighting) -> Vector {
        let natural = sighting.from_observer.unit();
        self.aberrated(if body == Body::Sun {
            natural
        } else {
            deflected(natural, sighting.from_sun.unit(), self.place)
        })
    }

    /// The direction in which a star is seen that stands at `direction` from the Sun.
    pub fn seen_star(&self, direction: Vector, parallax: Angle) -> Vector {
        let natural = (direction - self.place * parallax.radians()).unit();
        self.aberrated(deflected(natural, natural, self.place))
    }

    fn aberrated(&self, natural: Vector) -> Vector {
        aberrated(
            natural,
            (self.velocity + sun_velocity(self.tt)) / LIGHT_AU_PER_DAY,
        )
    }
}

/// Bends a direction by the Sun's gravity: `natural` towards the source, `source_from_sun` its
/// direction from the Sun, `observer` the observer's place from the Sun, au.
///
/// Source: the form of IAU SOFA's `ld`, with its limiter: within 5' of the Sun's centre, behind
/// the disc, the deflection is held back from growing without bound.
pub(super) fn deflected(natural: Vector, source_from_sun: Vector, observer: Vector) -> Vector {
    let distance = observer.length();
    let outwards = observer / distance;
    let limit = 1e-6 / (distance * distance).max(1.0);
    let bend = source_from_sun.dot(source_from_sun + outwards).max(limit);
    let weight = SUN_SCHWARZSCHILD_RADIUS_AU / distance / bend;
    (natural + natural.cross(outwards.cross(source_from_sun)) * weight).unit()
}

/// Turns a direction by the observer's velocity, in units of the speed of light.
///
/// Source: the special-relativistic form of IAU SOFA's `ab` (its term of the Sun's potential,
/// 0.4 microarcseconds, left out).
pub(super) fn aberrated(natural: Vector, velocity: Vector) -> Vector {
    let slowed = (1.0 - velocity.dot(velocity)).sqrt();
    let along = natural.dot(velocity);
    (natural * slowed + velocity * (1.0 + along / (1.0 + slowed))).unit()
}

/// The Sun's velocity about the barycentre of the solar system, au/day: 13 m/s, which moves a
/// star by up to 0.01 arcsec.
///
/// The sum over Jupiter and Saturn on mean circles; their eccentricities, and Uranus and
/// Neptune, would change it by under 2 m/s, 0.001 arcsec. Source: mean longitudes, axes and
/// masses at J2000 as in Standish's elements for approximate places (JPL) and the IAU 2009
/// system of constants.
fn sun_velocity(tt: Tt) -> Vector {
    // Longitude at J2000 and motion in a century, degrees; axis, au; the Sun's mass over its.
    const PULLS: [(f64, f64, f64, f64); 2] = [
        (34.396, 3034.746, 5.2029, 1047.3486),
        (49.954, 1222.494, 9.5367, 3497.898),
    ];
    const OBLIQUITY: Angle = Angle::from_degrees(23.4393);
    let centuries = tt.centuries_since_j2000();
    let ecliptic = PULLS
        .iter()
        .map(|(longitude_deg, motion_deg, axis_au, mass_ratio)| {
            let (sin, cos) = Angle::from_degrees(longitude_deg + motion_deg * centuries).sin_cos();
            let speed = Angle::from_degrees(motion_deg / 36_525.0).radians() * axis_au;
            Vector::new(sin, -cos, 0.0) * (speed / mass_ratio)
        })
        .fold(Vector::default(), |sum, part| sum + part);
    Matrix::about_x(-OBLIQUITY) * ecliptic
}

#[cfg(test)]
mod tests {
    // Published numbers stand as they are printed.
    #![allow(clippy::excessive_precision)]

    use super::{aberrated, deflected, sun_velocity};
    use crate::measure::{Angle, Tt, Vector};

    fn assert_close(actual: Vector, expected: Vector, tolerance: f64, what: &str) {
        let difference = (actual - expected).length();
        assert!(
            difference <= tolerance,
            "{what}: {actual:?} is {difference:e} off"
        );
    }

    // IAU SOFA, t_sofa_c.c, t_ab: printed to 12 digits; the tolerance is the term left out.
    #[test]
    fn aberration_matches_sofa() {
        let natural = Vector::new(
            -0.76321968546737951,
            -0.60869453983060384,
            -0.21676408580639883,
        );
        let velocity = Vector::new(
            2.1044018893653786e-5,
            -8.9108923304429319e-5,
            -3.8633714797716569e-5,
        );
        let expected = Vector::new(
            -0.7631631094219556269,
            -0.6087553082505590832,
            -0.2167926269368471279,
        );
        assert_close(aberrated(natural, velocity), expected, 5e-12, "t_ab");
    }

    // IAU SOFA, t_sofa_c.c, t_ldsun: a star; printed to 12 digits.
    #[test]
    fn deflection_matches_sofa() {
        let star = Vector::new(-0.763276255, -0.608633767, -0.216735543);
        let observer = Vector::new(-0.973644023, -0.20925523, -0.0907169552) * 0.999809214;
        let expected = Vector::new(
            -0.7632762580731413169,
            -0.6086337635262647900,
            -0.2167355419322321302,
        );
        // Ours is made a unit vector; the printed input is one only to 1e-9.
        assert_close(
            deflected(star, star, observer) - star.unit(),
            expected - star,
            1e-12,
            "t_ldsun",
        );
    }

    // Einstein 1916: 1.75 arcsec at the limb (959.6 arcsec from the centre) at 1 au; behind the
    // disc it must stay bounded.
    #[test]
    fn deflection_at_the_limb_is_einsteins() {
        let observer = Vector::new(-1.0, 0.0, 0.0);
        let bent_arcsec = |from_centre_arcsec: f64| {
            let from_centre = Angle::from_arcsec(from_centre_arcsec);
            let star = Vector::from_spherical(from_centre, Angle::ZERO);
            let bent = deflected(star, star, observer);
            bent.longitude().signed().arcsec() - from_centre_arcsec
        };
        assert!((bent_arcsec(959.6) - 1.75).abs() < 0.005, "at the limb");
        for behind_arcsec in [0.0, 1.0, 100.0, 500.0] {
            assert!(
                (0.0..6.0).contains(&bent_arcsec(behind_arcsec)),
                "behind the disc"
            );
        }
    }

    // IAU SOFA's epv00, the Earth about the barycentre less the Earth about the Sun: the Sun's
    // velocity to millimetres a second. 2 m/s is what the doc comment states.
    #[test]
    fn the_suns_velocity_matches_sofa() {
        const METRE_PER_SECOND: f64 = 86_400.0 / 149_597_870_700.0;
        for year in (1900..2100).step_by(7) {
            let days = (f64::from(year) - 2000.0) * 365.25;
            let (about_sun, about_barycentre) =
                sofars::eph::epv00(sofars::consts::DJ00, days).expect("1900 to 2100");
            let part = |k: usize| about_barycentre[1][k] - about_sun[1][k];
            let expected = Vector::new(part(0), part(1), part(2));
            let off = sun_velocity(Tt::from_days_since_j2000(days)) - expected;
            assert!(off.length() < 2.0 * METRE_PER_SECOND, "{year}: {off:?}");
            assert!(
                expected.length() > 8.0 * METRE_PER_SECOND,
                "{year}: not nothing"
            );
        }
    }
}
