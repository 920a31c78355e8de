//! Draws the plan.

use super::camera::Camera;
use super::drag::Grip;
use super::layout::Label;
use super::model::{Figure, Model, Thing};
use super::triangles::{filled, hatching};
use crate::app::grounds::Selection;
use crate::app::palette::Look;
use crate::place::PlanPoint;
use eframe::egui::{Color32, Painter, Pos2, Rect, Shape, Stroke, StrokeKind, Vec2, vec2};

/// A crown of this radius on the screen shows its trunk, points.
pub const TRUNK_FROM: f32 = 24.0;

/// Of a spot's circle with its dark rim, points.
const SPOT_RADIUS: f32 = 7.5;

/// What a spot's circle covers.
pub fn spot_rect(centre: Pos2) -> Rect {
    Rect::from_center_size(centre, Vec2::splat(2.0 * SPOT_RADIUS))
}

/// The things, in the model's order, the selected one in amber.
pub fn things(
    painter: &Painter,
    look: &Look,
    camera: Camera,
    model: &Model,
    selection: Option<Selection>,
) {
    let is_outline = selection == Some(Selection::Outline);
    outline(painter, look, camera, &model.outline, is_outline);
    for thing in &model.things {
        let rim = if selection == Some(thing.selection) {
            Stroke::new(2.0, look.colours.chosen)
        } else {
            Stroke::new(1.2, look.colours.hidden.gamma_multiply(0.7))
        };
        figure(painter, look, camera, thing, rim);
    }
}

fn outline(
    painter: &Painter,
    look: &Look,
    camera: Camera,
    corners: &[PlanPoint],
    is_selected: bool,
) {
    let mut line = screen(camera, corners);
    let Some(first) = line.first().copied() else {
        return;
    };
    line.push(first);
    let stroke = if is_selected {
        Stroke::new(2.0, look.colours.chosen)
    } else {
        Stroke::new(1.2, look.colours.lesser)
    };
    painter.extend(Shape::dashed_line(&line, stroke, 10.0, 5.0));
}

fn figure(painter: &Painter, look: &Look, camera: Camera, thing: &Thing, rim: Stroke) {
    let colours = &look.colours;
    let shape = colours.skyline;
    match &thing.figure {
        Figure::Excluded(corners) => {
            let corners = screen(camera, corners);
            let hatch = Stroke::new(1.0, colours.lesser.gamma_multiply(0.45));
            for line in hatching(&corners, 11.0) {
                painter.line_segment(line, hatch);
            }
            painter.add(Shape::closed_line(corners, rim));
        }
        Figure::Crown {
            at,
            radius_m,
            trunk_m,
            has_gap,
            is_bare,
        } => {
            let centre = camera.to_screen(*at);
            let radius = camera.points(*radius_m).max(2.0);
            // Bare or open beneath, more of the ground shows.
            let share = match (is_bare, has_gap) {
                (true, _) => 0.3,
                (false, true) => 0.7,
                (false, false) => 1.0,
            };
            painter.circle_filled(centre, radius, shape.gamma_multiply(share));
            if *has_gap {
                let around = circle(centre, radius);
                painter.extend(Shape::dashed_line(&around, rim, 5.0, 4.0));
            } else {
                painter.circle_stroke(centre, radius, rim);
            }
            if radius >= TRUNK_FROM {
                let trunk = camera.points(*trunk_m).max(1.5);
                painter.circle_filled(centre, trunk, colours.skyline_name.gamma_multiply(0.6));
            }
        }
        Figure::Pole { at, radius_m } => {
            let centre = camera.to_screen(*at);
            // Seen however small it is, and told from a tree by its cross.
            let radius = camera.points(*radius_m).max(3.5);
            painter.circle(centre, radius, shape, rim);
            let arm = radius + 3.0;
            painter.line_segment([centre - vec2(arm, 0.0), centre + vec2(arm, 0.0)], rim);
            painter.line_segment([centre - vec2(0.0, arm), centre + vec2(0.0, arm)], rim);
        }
        Figure::Footprint { corners, ridges } => {
            let corners = screen(camera, corners);
            painter.add(Shape::mesh(filled(&corners, shape)));
            let ridge = Stroke::new(1.2, colours.skyline_name.gamma_multiply(0.55));
            for ends in ridges {
                painter.line_segment(ends.map(|at| camera.to_screen(at)), ridge);
            }
            painter.add(Shape::closed_line(corners, rim));
        }
        Figure::Wall(line) => {
            let line = screen(camera, line);
            painter.add(Shape::line(
                line.clone(),
                Stroke::new(5.0 + rim.width, rim.color),
            ));
            painter.add(Shape::line(line, Stroke::new(4.0, shape)));
        }
        Figure::Spot {
            at,
            radius_m,
            is_chosen,
            ..
        } => {
            let centre = camera.to_screen(*at);
            if let Some(radius_m) = radius_m {
                let radius = camera.points(*radius_m);
                let fill = colours.chosen.gamma_multiply(0.10);
                painter.circle(centre, radius, fill, rim);
            }
            let colour = if *is_chosen {
                colours.chosen
            } else {
                colours.text
            };
            // Dark around it, so that it stands out over whatever lies there.
            painter.circle_filled(centre, SPOT_RADIUS, colours.card);
            painter.circle_stroke(centre, 5.5, Stroke::new(1.8, colour));
            if *is_chosen {
                painter.circle_filled(centre, 3.0, colour);
            }
            if rim.color == colours.chosen {
                painter.circle_stroke(centre, 9.0, rim);
            }
        }
    }
}

/// The names, each over a hem of the colour that it stands on.
pub fn labels(painter: &Painter, look: &Look, labels: &[Label]) {
    for label in labels {
        let ground = if label.is_outside {
            look.colours.card.gamma_multiply(0.75)
        } else {
            look.colours.skyline
        };
        painter.rect_filled(label.hem(), 3.0, ground);
        painter.galley_with_override_text_color(label.rect.min, label.galley.clone(), label.colour);
    }
}

/// The handles of the thing selected.
pub fn handles(painter: &Painter, look: &Look, handles: &[(Grip, Pos2)]) {
    let (card, chosen) = (look.colours.card, look.colours.chosen);
    let stroke = Stroke::new(1.5, chosen);
    for (grip, at) in handles {
        match grip {
            Grip::Corner(_) => {
                let square = Rect::from_center_size(*at, vec2(8.0, 8.0));
                painter.rect(
                    square,
                    0.0,
                    chosen,
                    Stroke::new(1.0, card),
                    StrokeKind::Outside,
                );
            }
            Grip::Side(_) => {
                painter.circle(*at, 4.0, card, stroke);
            }
            Grip::Rim => {
                painter.circle(*at, 5.0, chosen, Stroke::new(1.0, card));
            }
            Grip::Turn => {
                painter.line_segment([*at, *at + vec2(0.0, 20.0)], stroke);
                painter.circle(*at, 5.5, card, stroke);
                painter.circle_filled(*at, 2.0, chosen);
            }
            Grip::Whole => {}
        }
    }
}

/// What is being drawn: the points set, and the way to the next.
pub fn draft(
    painter: &Painter,
    look: &Look,
    camera: Camera,
    points: &[PlanPoint],
    next: Option<PlanPoint>,
    closes: bool,
) {
    let chosen = look.colours.chosen;
    let mut line = screen(camera, points);
    for at in &line {
        painter.circle_filled(*at, 4.0, chosen);
    }
    line.extend(next.map(|at| camera.to_screen(at)));
    if closes && line.len() > 2 {
        let ends = [line[line.len() - 1], line[0]];
        let faint = Stroke::new(1.2, chosen.gamma_multiply(0.5));
        painter.extend(Shape::dashed_line(&ends, faint, 6.0, 4.0));
    }
    if line.len() > 1 {
        painter.add(Shape::line(line, Stroke::new(2.0, chosen)));
    }
}

/// A cross where a key would set the next point.
pub fn cross(painter: &Painter, look: &Look, at: Pos2) {
    for (width, colour) in [(4.0, look.colours.card), (1.5, look.colours.chosen)] {
        let stroke = Stroke::new(width, colour);
        painter.line_segment([at - vec2(11.0, 0.0), at + vec2(11.0, 0.0)], stroke);
        painter.line_segment([at - vec2(0.0, 11.0), at + vec2(0.0, 11.0)], stroke);
    }
}

/// A circle as a line.
fn circle(centre: Pos2, radius: f32) -> Vec<Pos2> {
    const SIDES: u32 = 64;
    (0..=SIDES)
        .map(|k| centre + radius * Vec2::angled(std::f32::consts::TAU * k as f32 / SIDES as f32))
        .collect()
}

/// Points of the plan on the screen.
pub fn screen(camera: Camera, points: &[PlanPoint]) -> Vec<Pos2> {
    points.iter().map(|at| camera.to_screen(*at)).collect()
}

/// A colour that shows a line on the plan's ground without drawing the eye.
pub fn faint(look: &Look, share: f32) -> Color32 {
    look.colours.line.gamma_multiply(share)
}
