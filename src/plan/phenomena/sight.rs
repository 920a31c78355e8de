//! Two bodies as they are seen together, from the Earth's centre or from a place.

use super::{Circumstances, Lookout, Target};
use crate::measure::{Angle, Moment, TimeScales, Tt, Vector};
use crate::sky::{Apparent, Body, Epoch, Span, View, position_angle};

/// One astronomical unit, km (IAU 2012 Resolution B2).
const AU_KM: f64 = 149_597_870.7;

/// Where events are looked at from.
#[derive(Clone, Copy)]
pub struct Sight<'a> {
    /// Covers what is looked at.
    pub span: &'a Span,
    /// How TT leads to the Earth's rotation.
    pub scales: TimeScales,
    /// From where; `None`: the Earth's centre.
    pub lookout: Option<Lookout<'a>>,
}

/// Two bodies (or a body and a star) at an instant.
#[derive(Clone, Copy, Debug)]
pub struct Pair {
    /// The first one's apparent place.
    pub first: Apparent,
    /// The second one's.
    pub second: Apparent,
}

impl Sight<'_> {
    /// The instant of days of TT since J2000.
    pub fn moment(&self, days: f64) -> Moment {
        self.scales.moment_from_tt(Tt::from_days_since_j2000(days))
    }

    /// Reads something off the sky.
    pub fn at<T>(&self, days: f64, read: impl FnOnce(&Epoch<'_>) -> T) -> T {
        read(&self.span.at(self.moment(days)))
    }

    /// Two bodies at an instant.
    pub fn pair(&self, days: f64, first: Target, second: Target) -> Pair {
        self.at(days, |epoch| match self.lookout {
            None => Pair {
                first: first.geocentric(epoch),
                second: second.geocentric(epoch),
            },
            Some(lookout) => {
                let view = epoch.seen_by(lookout.observer);
                Pair {
                    first: first.topocentric(&view),
                    second: second.topocentric(&view),
                }
            }
        })
    }

    /// A body's apparent angle from the Sun's centre.
    pub fn elongation(&self, days: f64, body: Body) -> Angle {
        self.pair(days, Target::Body(body), Target::Body(Body::Sun))
            .separation()
    }

    /// Where a body stands, if a place looks at it.
    pub fn circumstances(&self, days: f64, body: Body) -> Option<Circumstances> {
        let lookout = self.lookout?;
        Some(self.at(days, |epoch| lookout.circumstances_at(epoch, body)))
    }
}

impl Target {
    /// Its apparent place from the Earth's centre.
    pub(super) fn geocentric(self, epoch: &Epoch<'_>) -> Apparent {
        match self {
            Self::Body(body) => epoch.geocentric(body),
            Self::Star(star) => epoch.star(star),
        }
    }

    fn topocentric(self, view: &View<'_>) -> Apparent {
        match self {
            Self::Body(body) => view.topocentric(body),
            Self::Star(star) => view.star(star),
        }
    }
}

impl Pair {
    /// Apparent angle between the centres.
    pub fn separation(&self) -> Angle {
        self.first.direction.angle_to(self.second.direction)
    }

    /// The square of the chord between the directions: smooth where the separation is not.
    pub fn chord_squared(&self) -> f64 {
        let chord: Vector = self.first.direction - self.second.direction;
        chord.dot(chord)
    }

    /// Position angle of the first seen from the second, from north of date through east,
    /// [0°, 360°).
    pub fn position_angle(&self) -> Angle {
        position_angle(self.second.direction, self.first.direction).wrapped()
    }
}

/// The angle under which a radius is seen.
pub fn semidiameter(radius_km: f64, seen: &Apparent) -> Angle {
    Angle::from_radians((radius_km / (seen.distance_au * AU_KM)).asin())
}
