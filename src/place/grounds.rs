//! What blocks the view from a spot, on a date: everything that a site says of it, together.

use super::silhouette;
use super::{Obstacle, PlanPoint, Site, Skyline, SkylinePoint, Spot, Stature, Viewpoint};
use crate::measure::Angle;
use chrono::NaiveDate;
use std::sync::Arc;

/// A site's surroundings on one date.
#[derive(Clone, Copy, Debug)]
pub struct Grounds<'a> {
    site: &'a Site,
    date: Option<NaiveDate>,
}

impl<'a> Grounds<'a> {
    /// The surroundings on a date, which decides whether trees have leaves; without one they all
    /// have.
    pub fn new(site: &'a Site, date: Option<NaiveDate>) -> Self {
        Self { site, date }
    }

    /// The skyline that somebody at a spot has: the highest of the measured skyline as far as it
    /// holds there, the obstacles and the terrain.
    ///
    /// An obstacle that the spot stands in is left out; [`Site::check`] refuses such spots of the
    /// site's own, and [`Obstacle::surrounds`] asks for any other.
    pub fn skyline(&self, spot: &Spot, stature: Stature) -> Skyline {
        self.seen(self.site.viewpoint(spot, stature), &self.site.skyline)
    }

    /// The skyline from any point of the grounds: what was measured counts only where it is far.
    pub fn skyline_from(&self, viewpoint: Viewpoint) -> Skyline {
        self.seen(viewpoint, &[])
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

    fn seen(&self, viewpoint: Viewpoint, measured: &[SkylinePoint]) -> Skyline {
        let points: Vec<(Angle, Angle)> = measured
            .iter()
            .map(|point| {
                (
                    Angle::from_degrees(point.azimuth_deg),
                    Angle::from_degrees(point.altitude_deg),
                )
            })
            .collect();
        let mut edges = Vec::new();
        for obstacle in self
            .site
            .obstacles
            .iter()
            .filter(|obstacle| !obstacle.surrounds(viewpoint.at))
        {
            let label: Arc<str> = obstacle.label().into();
            let outline = silhouette::edges(obstacle, &self.site.slope, &viewpoint);
            edges.extend(outline.into_iter().map(|edge| (edge, label.clone())));
        }
        Skyline::with_edges(&points, &edges)
    }
}

impl Site {
    /// The skyline that an adult at a spot has with trees in full leaf.
    pub fn skyline(&self, spot: &Spot) -> Skyline {
        Grounds::new(self, None).skyline(spot, Stature::Adult)
    }
}
