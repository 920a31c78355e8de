//! What the plan shows, in metres.

use super::things;
use crate::app::grounds::Selection;
use crate::place::{Obstacle, PlanPoint, Site};
use chrono::NaiveDate;

/// Everything on the plan, in the order in which things lie over one another.
#[derive(Clone, Debug, PartialEq)]
pub struct Model {
    /// Corners of the grounds; none where they are not drawn.
    pub outline: Vec<PlanPoint>,
    /// The things.
    pub things: Vec<Thing>,
}

/// A thing of the site.
#[derive(Clone, Debug, PartialEq)]
pub struct Thing {
    /// Which.
    pub selection: Selection,
    /// What people call it.
    pub label: String,
    /// How it is drawn.
    pub figure: Figure,
}

/// How a thing is drawn.
#[derive(Clone, Debug, PartialEq)]
pub enum Figure {
    /// A part where nobody is to stand.
    Excluded(Vec<PlanPoint>),
    /// A tree from above.
    Crown {
        /// Its axis.
        at: PlanPoint,
        /// Radius of the crown, m.
        radius_m: f64,
        /// Radius of the trunk, m.
        trunk_m: f64,
        /// Whether one can look through beneath it.
        has_gap: bool,
        /// Whether it has no leaves on the shown date.
        is_bare: bool,
    },
    /// A pole from above.
    Pole {
        /// Its axis.
        at: PlanPoint,
        /// Its radius, m.
        radius_m: f64,
    },
    /// A footprint, with the ridges of its roof.
    Footprint {
        /// Its corners.
        corners: Vec<PlanPoint>,
        /// The ridges, each by its ends.
        ridges: Vec<[PlanPoint; 2]>,
    },
    /// A wall's line.
    Wall(Vec<PlanPoint>),
    /// Where people stand.
    Spot {
        /// Its middle.
        at: PlanPoint,
        /// Radius of the patch that a crowd takes, m.
        radius_m: Option<f64>,
        /// Height of an adult's eye over the ground, m.
        eye_m: f64,
        /// Whether the whole window shows the view from there.
        is_chosen: bool,
    },
}

impl Model {
    /// The plan of a site on a date, with one of its spots chosen.
    pub fn new(site: &Site, spot: usize, date: NaiveDate) -> Self {
        let order = |thing: &Selection| match thing {
            Selection::Outline | Selection::Exclusion(_) => 0,
            Selection::Obstacle(_) => 1,
            Selection::Spot(_) => 2,
        };
        let mut all = things::all(site);
        all.sort_by_key(order);
        let things = all
            .into_iter()
            .filter_map(|selection| {
                Some(Thing {
                    selection,
                    label: selection.label(site)?.to_owned(),
                    figure: figure(site, selection, spot, date)?,
                })
            })
            .collect();
        Self {
            outline: site.outline_m.clone(),
            things,
        }
    }
}

fn figure(site: &Site, thing: Selection, spot: usize, date: NaiveDate) -> Option<Figure> {
    Some(match thing {
        Selection::Outline => return None,
        Selection::Exclusion(index) => {
            Figure::Excluded(site.excluded.get(index)?.corners_m.clone())
        }
        Selection::Spot(index) => {
            let standing = site.spots.get(index)?;
            Figure::Spot {
                at: standing.plan_point(),
                radius_m: standing.radius_m,
                eye_m: standing.eye_height_m,
                is_chosen: index == spot,
            }
        }
        Selection::Obstacle(index) => match site.obstacles.get(index)? {
            Obstacle::Tree {
                east_m,
                north_m,
                width_m,
                gap_m,
                trunk_m,
                leafless,
                ..
            } => Figure::Crown {
                at: PlanPoint::new(*east_m, *north_m),
                radius_m: 0.5 * width_m,
                // As the skyline takes it where it is left out.
                trunk_m: 0.5 * trunk_m.unwrap_or(width_m / 20.0),
                has_gap: gap_m.is_some(),
                is_bare: leafless.is_some_and(|leafless| leafless.holds(date)),
            },
            Obstacle::Pole {
                east_m,
                north_m,
                width_m,
                ..
            } => Figure::Pole {
                at: PlanPoint::new(*east_m, *north_m),
                radius_m: 0.5 * width_m,
            },
            Obstacle::Wall { line_m, .. } => Figure::Wall(line_m.clone()),
            footprint @ (Obstacle::Building { corners_m, .. }
            | Obstacle::Shape { corners_m, .. }) => Figure::Footprint {
                corners: corners_m.clone(),
                ridges: footprint.ridges(),
            },
        },
    })
}
