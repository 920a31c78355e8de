//! Where the plan's names go: inside a thing where there is room, else beneath it, and none over
//! another.

use super::camera::Camera;
use super::geometry::mean;
use super::model::{Figure, Model, Thing};
use crate::app::grounds::Selection;
use crate::app::palette::Look;
use crate::place::PlanPoint;
use eframe::egui::Galley;
use eframe::egui::{Align2, Color32, Painter, Pos2, Rect, Vec2, vec2};
use std::sync::Arc;

/// A name that found a place.
pub struct Label {
    /// Its letters.
    pub galley: Arc<Galley>,
    /// Where.
    pub rect: Rect,
    /// Their colour.
    pub colour: Color32,
    /// Whether it stands on the plan's ground, and not within its thing.
    pub is_outside: bool,
}

impl Label {
    /// The ground under it.
    pub fn hem(&self) -> Rect {
        hem(self.rect)
    }
}

fn hem(letters: Rect) -> Rect {
    letters.expand2(vec2(2.0, 0.0))
}

/// Places the names: the selected thing's first, then the spots', then the others'; none over
/// what is `taken` already.
pub fn labels(
    painter: &Painter,
    look: &Look,
    camera: Camera,
    model: &Model,
    selection: Option<Selection>,
    taken: &[Rect],
    words: &dyn Fn(&Thing) -> String,
) -> Vec<Label> {
    let rank = |thing: &&Thing| {
        let is_spot = matches!(thing.figure, Figure::Spot { .. });
        match (selection == Some(thing.selection), is_spot) {
            (true, _) => 0,
            (_, true) => 1,
            _ => 2,
        }
    };
    let mut things: Vec<&Thing> = model.things.iter().collect();
    things.sort_by_key(rank);
    let mut placed: Vec<Label> = Vec::new();
    for thing in things {
        let is_selected = selection == Some(thing.selection);
        let Some((middle, half)) = room(thing, camera) else {
            continue;
        };
        if !camera.rect.expand(40.0).contains(middle) {
            continue;
        }
        let is_spot = matches!(thing.figure, Figure::Spot { .. });
        let font = if is_spot || is_selected {
            look.bold(look.sizes.label)
        } else {
            look.font(look.sizes.label)
        };
        let galley = painter.layout_no_wrap(words(thing), font, look.colours.text);
        let size = galley.size();
        let is_inside = !is_spot && size.x + 6.0 < 2.0 * half.x && size.y < 2.0 * half.y;
        let colour = match (is_selected, is_spot, is_inside) {
            // Within a near-black shape the brighter amber, whatever the theme.
            (true, _, true) => look.colours.seen,
            (true, ..) => look.colours.chosen,
            (_, true, _) => look.colours.text,
            (_, _, true) if !matches!(thing.figure, Figure::Excluded(_)) => {
                look.colours.skyline_name
            }
            _ => look.colours.lesser,
        };
        let beside = vec2(half.x + 5.0, 0.0);
        let below = vec2(0.0, half.y + 3.0);
        let shows_trunk =
            matches!(thing.figure, Figure::Crown { .. }) && half.y >= super::paint::TRUNK_FROM;
        let places = if is_inside && shows_trunk {
            vec![Align2::CENTER_TOP.anchor_size(middle + vec2(0.0, 4.0), size)]
        } else if is_inside {
            // Where a spot's name lies over the middle, above or below it if that is inside too.
            let aside = vec2(0.0, size.y + 4.0);
            let has_room = 3.0 * size.y + 12.0 < 2.0 * half.y;
            let offsets = [Vec2::ZERO, -aside, aside];
            offsets
                .into_iter()
                .take(if has_room { 3 } else { 1 })
                .map(|offset| Align2::CENTER_CENTER.anchor_size(middle + offset, size))
                .collect()
        } else {
            vec![
                Align2::CENTER_TOP.anchor_size(middle + below, size),
                Align2::LEFT_CENTER.anchor_size(middle + beside, size),
                Align2::CENTER_BOTTOM.anchor_size(middle - below, size),
                Align2::RIGHT_CENTER.anchor_size(middle - beside, size),
            ]
        };
        let free = places.into_iter().find(|rect| {
            camera.rect.contains_rect(*rect)
                && placed
                    .iter()
                    .map(Label::hem)
                    .chain(taken.iter().copied())
                    .all(|other| !other.intersects(hem(*rect)))
        });
        if let Some(rect) = free {
            let is_ground = matches!(thing.figure, Figure::Excluded(_));
            placed.push(Label {
                galley,
                rect,
                colour,
                is_outside: !is_inside || is_ground,
            });
        }
    }
    placed
}

/// A thing's middle on the screen, and how far it reaches to either side of it.
fn room(thing: &Thing, camera: Camera) -> Option<(Pos2, Vec2)> {
    let round = |at: &PlanPoint, radius_m: f64, least: f32| {
        let half = camera.points(radius_m).max(least);
        Some((camera.to_screen(*at), vec2(half, half)))
    };
    match &thing.figure {
        Figure::Crown { at, radius_m, .. } => {
            let (middle, half) = round(at, *radius_m, 3.0)?;
            // What a circle holds of an upright line of letters.
            Some((middle, vec2(half.x * 0.95, half.y)))
        }
        Figure::Pole { at, radius_m } => round(at, *radius_m, 4.0),
        Figure::Spot { at, .. } => round(at, 0.0, 8.0),
        Figure::Footprint { corners, .. } | Figure::Excluded(corners) => {
            let rect = around(corners, camera)?;
            let middle = camera.to_screen(mean(corners));
            Some((middle, 0.5 * rect.size()))
        }
        Figure::Wall(line) => {
            // Beside the middle of its longest side.
            let longest = line.windows(2).max_by(|a, b| {
                let length_m = |ends: &[PlanPoint]| ends[0].distance_m(ends[1]);
                length_m(a).total_cmp(&length_m(b))
            })?;
            Some((camera.to_screen(mean(longest)), vec2(4.0, 4.0)))
        }
    }
}

fn around(points: &[PlanPoint], camera: Camera) -> Option<Rect> {
    let points: Vec<Pos2> = points.iter().map(|at| camera.to_screen(*at)).collect();
    (!points.is_empty()).then(|| Rect::from_points(&points))
}
