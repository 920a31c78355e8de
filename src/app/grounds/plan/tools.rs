//! The tools, and what each makes of the points that were set.

use super::geometry::{minus, quarter_turned, unit};
use super::things::free_name;
use crate::app::grounds::Selection;
use crate::place::{Exclusion, Obstacle, PlanPoint, Site, Spot};
use crate::words::Words;
use eframe::egui::Key;

/// What the pointer does on the plan.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Tool {
    /// Selects, moves, reshapes.
    #[default]
    Select,
    /// Sets a tree; dragged, as wide as that.
    Tree,
    /// Draws a building.
    Building,
    /// Draws a wall from point to point.
    Wall,
    /// Sets a pole.
    Pole,
    /// Draws any other shape.
    Shape,
    /// Sets a spot.
    Spot,
    /// Draws an area where nobody is to stand.
    Excluded,
    /// Draws the outline of the grounds anew.
    Outline,
    /// Measures a distance and a bearing.
    Tape,
    /// Points out the first known point of the picture under the plan.
    FirstPicturePoint,
    /// Points out the second.
    SecondPicturePoint,
}

/// What a tool is given.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Takes {
    /// Nothing: it works on what is there.
    Things,
    /// One point.
    Point,
    /// One point, and how far around it.
    Circle,
    /// Points of a line that does not close, at least two.
    Line,
    /// Corners that enclose something, at least three; or a rectangle.
    Corners,
    /// Two points.
    Pair,
}

impl Tool {
    /// Those on the bar, in the order in which they are offered.
    pub const ALL: [Self; 10] = [
        Self::Select,
        Self::Tree,
        Self::Building,
        Self::Wall,
        Self::Pole,
        Self::Shape,
        Self::Spot,
        Self::Excluded,
        Self::Outline,
        Self::Tape,
    ];

    /// The wording of its name; with "-hint" what it does and how.
    pub const fn wording(self) -> &'static str {
        match self {
            Self::Select => "tool-select",
            Self::Tree => "tool-tree",
            Self::Building => "tool-building",
            Self::Wall => "tool-wall",
            Self::Pole => "tool-pole",
            Self::Shape => "tool-shape",
            Self::Spot => "tool-spot",
            Self::Excluded => "tool-excluded",
            Self::Outline => "tool-outline",
            Self::Tape => "tool-tape",
            Self::FirstPicturePoint => "tool-first-picture-point",
            Self::SecondPicturePoint => "tool-second-picture-point",
        }
    }

    /// The key that takes it while the plan has the focus.
    pub const fn key(self) -> Option<Key> {
        Some(match self {
            Self::Select => Key::Num1,
            Self::Tree => Key::Num2,
            Self::Building => Key::Num3,
            Self::Wall => Key::Num4,
            Self::Pole => Key::Num5,
            Self::Shape => Key::Num6,
            Self::Spot => Key::Num7,
            Self::Excluded => Key::Num8,
            Self::Outline => Key::Num9,
            Self::Tape => Key::Num0,
            Self::FirstPicturePoint | Self::SecondPicturePoint => return None,
        })
    }

    /// What it is given.
    pub const fn takes(self) -> Takes {
        match self {
            Self::Select => Takes::Things,
            Self::Tree => Takes::Circle,
            Self::Building | Self::Shape | Self::Excluded | Self::Outline => Takes::Corners,
            Self::Wall => Takes::Line,
            Self::Pole | Self::Spot | Self::FirstPicturePoint | Self::SecondPicturePoint => {
                Takes::Point
            }
            Self::Tape => Takes::Pair,
        }
    }

    /// The site with what the tool makes of the points, and the thing made; `None` where the
    /// points are too few. New things have heights as common as any, to be changed in numbers.
    pub fn made(
        self,
        site: &Site,
        points: &[PlanPoint],
        words: &Words,
    ) -> Option<(Site, Selection)> {
        let mut site = site.clone();
        let label = || words.text(self.wording()).to_lowercase();
        let first = *points.first()?;
        let corners_m = points.to_vec();
        let has_corners = points.len() >= 3;
        let obstacle = match self {
            Self::Tree => {
                let radius_m = points.get(1).map_or(3.0, |rim| rim.distance_m(first));
                Obstacle::Tree {
                    label: label(),
                    east_m: first.east_m,
                    north_m: first.north_m,
                    base_m: None,
                    height_m: 10.0,
                    width_m: (20.0 * radius_m).round().max(1.0) / 10.0,
                    gap_m: None,
                    trunk_m: None,
                    leafless: None,
                }
            }
            Self::Pole => Obstacle::Pole {
                label: label(),
                east_m: first.east_m,
                north_m: first.north_m,
                base_m: None,
                height_m: 6.0,
                width_m: 0.2,
            },
            Self::Building if has_corners => Obstacle::Building {
                label: label(),
                corners_m,
                base_m: None,
                eaves_m: 5.0,
                ridge_m: Some(8.0),
            },
            Self::Shape if has_corners => Obstacle::Shape {
                label: label(),
                corners_m,
                base_m: None,
                height_m: 3.0,
            },
            Self::Wall if points.len() >= 2 => Obstacle::Wall {
                label: label(),
                line_m: corners_m,
                base_m: None,
                height_m: 2.0,
            },
            Self::Spot => {
                let name = free_name(&site, &label());
                site.spots.push(Spot {
                    eye_height_m: site.people.adult_m,
                    ..Spot::at(&name, first)
                });
                let index = site.spots.len() - 1;
                return Some((site, Selection::Spot(index)));
            }
            Self::Excluded if has_corners => {
                site.excluded.push(Exclusion {
                    label: words.text("excluded-label"),
                    corners_m,
                });
                let index = site.excluded.len() - 1;
                return Some((site, Selection::Exclusion(index)));
            }
            Self::Outline if has_corners => {
                site.outline_m = corners_m;
                return Some((site, Selection::Outline));
            }
            _ => return None,
        };
        site.obstacles.push(obstacle);
        let index = site.obstacles.len() - 1;
        Some((site, Selection::Obstacle(index)))
    }
}

/// The lines on which the next point of a line makes a right angle with the last side, or goes
/// straight on; after the first point, due east and due north.
pub fn rays_from(points: &[PlanPoint]) -> Vec<(PlanPoint, PlanPoint)> {
    let (east, north) = (PlanPoint::new(1.0, 0.0), PlanPoint::new(0.0, 1.0));
    match points {
        [] => Vec::new(),
        [only] => vec![(*only, east), (*only, north)],
        [first, rest @ .., last] => {
            let before = rest.last().unwrap_or(first);
            let mut rays = Vec::new();
            if let Some(along) = unit(minus(*last, *before)) {
                rays.push((*last, quarter_turned(along)));
                rays.push((*last, along));
            }
            // So that the closing side meets the first one squarely.
            if let (true, Some(along)) = (points.len() > 2, unit(minus(points[1], *first))) {
                rays.push((*first, quarter_turned(along)));
            }
            rays
        }
    }
}
