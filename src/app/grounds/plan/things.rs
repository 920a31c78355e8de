//! The things of a site as the plan handles them: points, rims, names; moved, copied, removed.

use super::geometry::{is_within, nearest_on, plus, sides};
use crate::app::grounds::Selection;
use crate::place::{Obstacle, PlanPoint, Site};

/// How a thing stands in the plan.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Form {
    /// A point, perhaps with a circle around it.
    Point,
    /// A line that does not close.
    Line,
    /// Corners that enclose something.
    Corners,
}

/// The smallest upright rectangle around everything.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Extent {
    /// Its south-west corner.
    pub least: PlanPoint,
    /// Its north-east corner.
    pub most: PlanPoint,
}

impl Extent {
    /// Around all that a site has, the mark and the spots included.
    pub fn of(site: &Site) -> Self {
        let mut extent = Self {
            least: PlanPoint::new(0.0, 0.0),
            most: PlanPoint::new(0.0, 0.0),
        };
        for thing in all(site) {
            let around_m = thing.radius_m(site).unwrap_or(0.0);
            for point in thing.points(site) {
                extent.least.east_m = extent.least.east_m.min(point.east_m - around_m);
                extent.least.north_m = extent.least.north_m.min(point.north_m - around_m);
                extent.most.east_m = extent.most.east_m.max(point.east_m + around_m);
                extent.most.north_m = extent.most.north_m.max(point.north_m + around_m);
            }
        }
        extent
    }
}

/// Everything that can be selected, in the order of the Tab key: spots, obstacles, excluded areas,
/// the outline.
pub fn all(site: &Site) -> Vec<Selection> {
    let spots = (0..site.spots.len()).map(Selection::Spot);
    let obstacles = (0..site.obstacles.len()).map(Selection::Obstacle);
    let excluded = (0..site.excluded.len()).map(Selection::Exclusion);
    let outline = (!site.outline_m.is_empty()).then_some(Selection::Outline);
    spots
        .chain(obstacles)
        .chain(excluded)
        .chain(outline)
        .collect()
}

impl Selection {
    /// Whether a site has it.
    pub fn exists(self, site: &Site) -> bool {
        match self {
            Self::Spot(index) => index < site.spots.len(),
            Self::Obstacle(index) => index < site.obstacles.len(),
            Self::Exclusion(index) => index < site.excluded.len(),
            Self::Outline => !site.outline_m.is_empty(),
        }
    }

    /// How it stands in the plan.
    pub fn form(self, site: &Site) -> Form {
        match self {
            Self::Spot(_) => Form::Point,
            Self::Exclusion(_) | Self::Outline => Form::Corners,
            Self::Obstacle(index) => match site.obstacles.get(index) {
                Some(Obstacle::Wall { .. }) => Form::Line,
                Some(Obstacle::Building { .. } | Obstacle::Shape { .. }) => Form::Corners,
                Some(Obstacle::Tree { .. } | Obstacle::Pole { .. }) | None => Form::Point,
            },
        }
    }

    /// Its points; none where the site does not have it.
    pub fn points(self, site: &Site) -> Vec<PlanPoint> {
        match self {
            Self::Spot(index) => site
                .spots
                .get(index)
                .map(|spot| vec![spot.plan_point()])
                .unwrap_or_default(),
            Self::Obstacle(index) => site
                .obstacles
                .get(index)
                .map(Obstacle::points)
                .unwrap_or_default(),
            Self::Exclusion(index) => site
                .excluded
                .get(index)
                .map(|area| area.corners_m.clone())
                .unwrap_or_default(),
            Self::Outline => site.outline_m.clone(),
        }
    }

    /// Puts its points anew.
    pub fn set_points(self, site: &mut Site, points: &[PlanPoint]) {
        match self {
            Self::Spot(index) => {
                if let (Some(spot), Some(at)) = (site.spots.get_mut(index), points.first()) {
                    (spot.east_m, spot.north_m) = (at.east_m, at.north_m);
                }
            }
            Self::Obstacle(index) => {
                if let Some(obstacle) = site.obstacles.get_mut(index) {
                    obstacle.set_points(points);
                }
            }
            Self::Exclusion(index) => {
                if let Some(area) = site.excluded.get_mut(index) {
                    area.corners_m = points.to_vec();
                }
            }
            Self::Outline => site.outline_m = points.to_vec(),
        }
    }

    /// The radius of the circle around its point, m: a crown, a pole, a spot's patch.
    pub fn radius_m(self, site: &Site) -> Option<f64> {
        match self {
            Self::Spot(index) => site.spots.get(index)?.radius_m,
            Self::Obstacle(index) => match site.obstacles.get(index)? {
                Obstacle::Tree { width_m, .. } | Obstacle::Pole { width_m, .. } => {
                    Some(0.5 * width_m)
                }
                _ => None,
            },
            Self::Exclusion(_) | Self::Outline => None,
        }
    }

    /// Gives the circle around its point another radius, m.
    pub fn set_radius(self, site: &mut Site, to_m: f64) {
        let to_m = to_m.clamp(0.05, 500.0);
        match self {
            Self::Spot(index) => {
                if let Some(spot) = site.spots.get_mut(index) {
                    spot.radius_m = Some(to_m);
                }
            }
            Self::Obstacle(index) => {
                if let Some(Obstacle::Tree { width_m, .. } | Obstacle::Pole { width_m, .. }) =
                    site.obstacles.get_mut(index)
                {
                    *width_m = 2.0 * to_m;
                }
            }
            Self::Exclusion(_) | Self::Outline => {}
        }
    }

    /// What people call it; `None` for the outline.
    pub fn label(self, site: &Site) -> Option<&str> {
        match self {
            Self::Spot(index) => site.spots.get(index).map(|spot| spot.name.as_str()),
            Self::Obstacle(index) => site.obstacles.get(index).map(Obstacle::label),
            Self::Exclusion(index) => site.excluded.get(index).map(|area| area.label.as_str()),
            Self::Outline => None,
        }
    }

    /// The site with it moved.
    pub fn moved(self, site: &Site, by: PlanPoint) -> Site {
        let mut moved = site.clone();
        let points = self.points(site);
        let points: Vec<PlanPoint> = points.iter().map(|at| plus(*at, by, 1.0)).collect();
        self.set_points(&mut moved, &points);
        moved
    }

    /// The site without it; `None` for the last spot, which stays. Instruments that stood at a
    /// spot stand nowhere in particular then.
    pub fn removed(self, site: &Site) -> Option<Site> {
        let mut rest = site.clone();
        match self {
            Self::Spot(index) => {
                if site.spots.len() < 2 || index >= site.spots.len() {
                    return None;
                }
                let gone = rest.spots.remove(index);
                for instrument in &mut rest.kit {
                    if instrument.spot() == Some(gone.name.as_str()) {
                        instrument.set_spot(None);
                    }
                }
            }
            Self::Obstacle(index) if index < site.obstacles.len() => {
                rest.obstacles.remove(index);
            }
            Self::Exclusion(index) if index < site.excluded.len() => {
                rest.excluded.remove(index);
            }
            Self::Outline => rest.outline_m.clear(),
            Self::Obstacle(_) | Self::Exclusion(_) => return None,
        }
        Some(rest)
    }

    /// The site with a copy of it, moved, and the copy; `None` for the outline, of which there is
    /// one only.
    pub fn duplicated(self, site: &Site, by: PlanPoint) -> Option<(Site, Self)> {
        let mut more = site.clone();
        let copy = match self {
            Self::Spot(index) => {
                let mut spot = site.spots.get(index)?.clone();
                spot.name = free_name(site, &spot.name);
                // What was measured there was not measured here.
                spot.skyline.clear();
                spot.skyline_far.clear();
                more.spots.push(spot);
                Self::Spot(site.spots.len())
            }
            Self::Obstacle(index) => {
                more.obstacles.push(site.obstacles.get(index)?.clone());
                Self::Obstacle(site.obstacles.len())
            }
            Self::Exclusion(index) => {
                more.excluded.push(site.excluded.get(index)?.clone());
                Self::Exclusion(site.excluded.len())
            }
            Self::Outline => return None,
        };
        Some((copy.moved(&more, by), copy))
    }

    /// Whether a point lies on it, or within some metres of it.
    pub fn is_at(self, site: &Site, at: PlanPoint, reach_m: f64) -> bool {
        let points = self.points(site);
        match self.form(site) {
            Form::Point => {
                // A spot is taken by its point: its patch is ground to stand on.
                let radius_m = match self {
                    Self::Spot(_) => 0.0,
                    _ => self.radius_m(site).unwrap_or(0.0),
                };
                points
                    .iter()
                    .any(|point| point.distance_m(at) <= radius_m.max(reach_m))
            }
            form => {
                let is_closed = form == Form::Corners;
                // The outline is taken by its line: everything lies within it.
                let is_filled = is_closed && self != Self::Outline;
                (is_filled && is_within(at, &points))
                    || sides(&points, is_closed)
                        .into_iter()
                        .any(|side| nearest_on(at, side).distance_m(at) <= reach_m)
            }
        }
    }
}

/// What lies at a point, the topmost first: spots, then obstacles, the last drawn above, then
/// excluded areas and the outline.
pub fn at(site: &Site, at: PlanPoint, reach_m: f64) -> Option<Selection> {
    let order = |thing: &Selection| match thing {
        Selection::Spot(_) => 0,
        Selection::Obstacle(_) => 1,
        Selection::Exclusion(_) => 2,
        Selection::Outline => 3,
    };
    all(site)
        .into_iter()
        .rev()
        .filter(|thing| thing.is_at(site, at, reach_m))
        .min_by_key(order)
}

/// A spot name that the site does not have yet, made from one with a number behind it.
pub fn free_name(site: &Site, name: &str) -> String {
    let stem = name.trim_end_matches(|c: char| c.is_ascii_digit() || c == ' ');
    let stem = if stem.is_empty() { name } else { stem };
    // Room for the number within the longest name that a site file may have.
    let stem: String = stem.chars().take(70).collect();
    (2..)
        .map(|number| format!("{stem} {number}"))
        .find(|name| site.spots.iter().all(|spot| spot.name != *name))
        .unwrap_or(stem)
}
