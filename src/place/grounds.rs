//! What blocks the view from a spot, on a date: everything that a site says of it, together.

use super::{
    MeasuredUse, Obstacle, PlanPoint, PreparedGrounds, Site, Skyline, Spot, Stature, Viewpoint,
};
use chrono::NaiveDate;

/// A site's surroundings on one date.
#[derive(Clone, Copy, Debug)]
pub struct Grounds<'a> {
    site: &'a Site,
    date: Option<NaiveDate>,
}

impl<'a> Grounds<'a> {
    /// The surroundings on a date, which decides whether trees have leaves; without one they all
    /// have. A leafless crown blocks where more of it is opaque than the site's
    /// `blocking_density`; its trunk always does.
    pub fn new(site: &'a Site, date: Option<NaiveDate>) -> Self {
        Self { site, date }
    }

    /// What does not depend on the eye, worked out: for whoever asks from more than one spot.
    pub fn prepared(&self) -> PreparedGrounds<'a> {
        PreparedGrounds::new(self.site, self.date)
    }

    /// The skyline that somebody at a spot has: the highest of the measured skyline as far as it
    /// holds there ([`Site::measured_use`]), the obstacles and the terrain.
    ///
    /// An obstacle that the spot stands in is left out; [`Site::check`] refuses such spots of the
    /// site's own, and [`Obstacle::surrounds`] asks for any other.
    pub fn skyline(&self, spot: &Spot, stature: Stature) -> Skyline {
        self.prepared().skyline(spot, stature)
    }

    /// The skyline from any point of the grounds: what was measured counts only where it is far.
    pub fn skyline_from(&self, viewpoint: Viewpoint) -> Skyline {
        self.prepared().skyline_from(viewpoint)
    }

    /// Which measured skyline counts at a spot.
    pub fn measured_use(&self, spot: &Spot) -> MeasuredUse {
        self.site.measured_use(spot)
    }

    /// The obstacle that a point lies in, if it does.
    pub fn around(&self, at: PlanPoint) -> Option<&'a Obstacle> {
        self.site
            .obstacles
            .iter()
            .find(|obstacle| obstacle.surrounds(at))
    }

    /// The date that decides on leaves.
    pub fn date(&self) -> Option<NaiveDate> {
        self.date
    }
}

impl Site {
    /// The skyline that an adult at a spot has with trees in full leaf.
    pub fn skyline(&self, spot: &Spot) -> Skyline {
        Grounds::new(self, None).skyline(spot, Stature::Adult)
    }
}
