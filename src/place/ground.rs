//! The ground of a site, and whose eyes stand on it.

use super::{PlanPoint, Site, Spot, limits};
use serde::{Deserialize, Serialize};

/// How the ground rises away from the mark: a plane through the mark's ground.
#[derive(Clone, Copy, Debug, Default, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields, default)]
pub struct Slope {
    /// Metres that it rises in a hundred metres towards the east.
    #[serde(deserialize_with = "limits::slope_percent")]
    pub east_percent: f64,
    /// Metres that it rises in a hundred metres towards the north.
    #[serde(deserialize_with = "limits::slope_percent")]
    pub north_percent: f64,
}

impl Slope {
    /// Height of the ground over the mark's, m.
    pub fn height_m(&self, at: PlanPoint) -> f64 {
        0.01 * (self.east_percent * at.east_m + self.north_percent * at.north_m)
    }

    pub(super) fn is_level(&self) -> bool {
        *self == Self::default()
    }
}

/// Whose eyes: their height belongs to the people, not to the spot.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, Hash, Serialize, Deserialize)]
#[serde(rename_all = "lowercase")]
pub enum Stature {
    /// A standing adult: the eye height that the spot states.
    #[default]
    Adult,
    /// A child.
    Child,
    /// Somebody in a wheelchair.
    Wheelchair,
}

impl Stature {
    /// All of them, from high to low as usual.
    pub const ALL: [Self; 3] = [Self::Adult, Self::Wheelchair, Self::Child];

    /// The name used in files and on the command line.
    pub const fn name(self) -> &'static str {
        match self {
            Self::Adult => "adult",
            Self::Child => "child",
            Self::Wheelchair => "wheelchair",
        }
    }
}

/// Heights of the eye over the ground that one stands on, m.
#[derive(Clone, Copy, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields, default)]
pub struct People {
    /// A standing adult; what the spots' `eye_height_m` is meant for.
    #[serde(deserialize_with = "limits::eye_height_m")]
    pub adult_m: f64,
    /// A child.
    #[serde(deserialize_with = "limits::eye_height_m")]
    pub child_m: f64,
    /// Somebody in a wheelchair.
    #[serde(deserialize_with = "limits::eye_height_m")]
    pub wheelchair_m: f64,
}

impl Default for People {
    /// Common practice: 1.6 m, 1.1 m and 1.2 m.
    fn default() -> Self {
        Self {
            adult_m: 1.6,
            child_m: 1.1,
            wheelchair_m: 1.2,
        }
    }
}

impl People {
    /// The eye height of a stature, m.
    pub fn eye_height_m(&self, stature: Stature) -> f64 {
        match stature {
            Stature::Adult => self.adult_m,
            Stature::Child => self.child_m,
            Stature::Wheelchair => self.wheelchair_m,
        }
    }

    pub(super) fn is_usual(&self) -> bool {
        *self == Self::default()
    }
}

/// Where an eye is.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Viewpoint {
    /// Over which point of the plan.
    pub at: PlanPoint,
    /// How high over the ground at the site's mark, m.
    pub height_m: f64,
}

impl Site {
    /// Gives the adults here another height of the eye, m: every spot's goes with it, a terrace
    /// stays as high as it was.
    pub fn set_adult_eye_m(&mut self, adult_m: f64) {
        let higher_m = adult_m - self.people.adult_m;
        for spot in &mut self.spots {
            // Without the last bits of adding and taking away.
            let eye_m = ((spot.eye_height_m + higher_m) * 1e6).round() / 1e6;
            spot.eye_height_m = eye_m.clamp(0.0, 200.0);
        }
        self.people.adult_m = adult_m;
    }

    /// Height of a spot's ground over the mark's, m: as stated, or as the site slopes.
    pub fn ground_m(&self, spot: &Spot) -> f64 {
        spot.base_m
            .unwrap_or_else(|| self.slope.height_m(spot.plan_point()))
    }

    /// The eye of somebody at a spot. A spot states a standing adult's eye height (a terrace
    /// counted in); the others' are lower by what they are lower than an adult, never below the
    /// ground.
    pub fn viewpoint(&self, spot: &Spot, stature: Stature) -> Viewpoint {
        let lower_m = self.people.adult_m - self.people.eye_height_m(stature);
        Viewpoint {
            at: spot.plan_point(),
            height_m: self.ground_m(spot) + (spot.eye_height_m - lower_m).max(0.0),
        }
    }

    /// The eye of somebody on the open ground at a point.
    pub fn viewpoint_at(&self, at: PlanPoint, stature: Stature) -> Viewpoint {
        Viewpoint {
            at,
            height_m: self.slope.height_m(at) + self.people.eye_height_m(stature),
        }
    }
}
