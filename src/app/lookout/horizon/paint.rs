//! Draws the horizon view.

use super::Shapes;
use super::captions::Label;
use super::layout::{Layout, outline, outlines};
use super::model::Model;
use super::path::Stretch;
use crate::app::lookout::{disc, shaded};
use crate::app::palette::Look;
use crate::light::Standing;
use crate::sky::Body;
use eframe::egui::epaint::RectShape;
use eframe::egui::{
    Align2, Color32, CornerRadius, Mesh, Painter, Pos2, Rect, Shape, Stroke, TextureId, pos2,
};

/// What is painted, in the order in which things lie over one another.
pub fn paint(
    painter: &Painter,
    look: &Look,
    model: &Model,
    layout: &Layout,
    sky: TextureId,
    skyline: &Shapes,
) {
    let rect = layout.camera.rect;
    let inside = painter.with_clip_rect(rect.intersect(painter.clip_rect()));
    let whole = Rect::from_min_max(Pos2::ZERO, pos2(1.0, 1.0));
    let corner = look.room.corner as u8;
    let above = CornerRadius {
        nw: corner,
        ne: corner,
        ..CornerRadius::ZERO
    };
    inside.add(RectShape::filled(rect, above, Color32::WHITE).with_texture(sky, whole));
    stars(&inside, look, model, layout);
    sun(&inside, look, layout);
    bodies(&inside, look, model, layout);
    shapes(&inside, look, layout, skyline);
    for stretch in &layout.stretches {
        path(&inside, look, stretch);
    }
    ticks(&inside, look, layout);
    target(&inside, look, model, layout);
    altitudes(&inside, look, layout);
    for label in &layout.labels {
        text(&inside, look, label);
    }
    azimuths(painter, look, layout);
    let card = rect.union(layout.ruler);
    painter.rect_stroke(
        card,
        CornerRadius::same(look.room.corner as u8),
        Stroke::new(1.0, look.colours.line),
        eframe::egui::StrokeKind::Inside,
    );
}

fn stars(painter: &Painter, look: &Look, model: &Model, layout: &Layout) {
    let ruler = layout.altitudes.iter().map(|mark| mark.text.size().x);
    let ruler = layout.camera.rect.left() + 24.0 + ruler.fold(0.0, f32::max);
    for star in &model.stars {
        let at = layout.camera.pos(star.azimuth, star.altitude);
        // None among letters.
        let is_free = at.x > ruler && layout.labels.iter().all(|label| !label.rect.contains(at));
        if layout.camera.rect.contains(at) && is_free {
            // Not by magnitude: what stands out of the sky by as much looks as bright.
            let margin = (star.margin_mag as f32).clamp(0.0, 6.0);
            let radius = 0.7 + 0.28 * margin;
            let share = (0.25 + 0.5 * margin).min(1.0);
            painter.circle_filled(at, radius, look.colours.body.gamma_multiply(share));
        }
    }
}

fn sun(painter: &Painter, look: &Look, layout: &Layout) {
    let radius = 9.0;
    for (growth, share) in [(4.0, 0.10), (2.4, 0.16), (1.5, 0.3)] {
        let glow = look.colours.sun.gamma_multiply(share);
        painter.circle_filled(layout.sun, radius * growth, glow);
    }
    painter.circle_filled(layout.sun, radius, look.colours.sun);
}

fn bodies(painter: &Painter, look: &Look, model: &Model, layout: &Layout) {
    for (mark, (at, radius)) in model.others.iter().zip(&layout.others) {
        let share = match mark.sample.standing {
            Standing::Plain => 1.0,
            Standing::WashedOut => 0.4,
            Standing::Blocked | Standing::Down => continue,
        };
        if mark.body == Body::Moon {
            let limb = disc::towards_limb(mark.limb_from_up);
            let (lit, unlit) = (look.colours.disc_lit, look.colours.disc_shade);
            let unlit = unlit.gamma_multiply(0.35 * share);
            let phase = (mark.phase_angle, limb);
            disc::paint(
                painter,
                *at,
                *radius,
                phase,
                (lit.gamma_multiply(0.6 + 0.4 * share), unlit),
            );
        } else {
            painter.circle_filled(*at, *radius, look.colours.body.gamma_multiply(share));
        }
    }
}

/// The skyline's flat shapes: the floor down to the lower edge, and over it the crowns.
fn shapes(painter: &Painter, look: &Look, layout: &Layout, skyline: &Shapes) {
    let bottom = layout.camera.rect.bottom() + 1.0;
    let floor = outline(&layout.camera, &skyline.floor);
    let foot = floor
        .iter()
        .map(|point| pos2(point.x, bottom.max(point.y)))
        .collect();
    strip(painter, look, floor, foot, Rim::Upper);
    for crown in &skyline.crowns {
        let half = crown.len() / 2;
        let lower: Vec<_> = crown[half..].iter().rev().copied().collect();
        for [upper, lower] in outlines(&layout.camera, [&crown[..half], &lower]) {
            strip(painter, look, upper, lower, Rim::Both);
        }
    }
}

/// Which edges of a strip are softened.
#[derive(Clone, Copy, PartialEq)]
enum Rim {
    Upper,
    Both,
}

/// What lies between two lines of as many points, each over its fellow.
fn strip(painter: &Painter, look: &Look, upper: Vec<Pos2>, lower: Vec<Pos2>, rim: Rim) {
    let colour = look.colours.skyline;
    let mut mesh = Mesh::default();
    for (k, (above, below)) in upper.iter().zip(&lower).enumerate() {
        mesh.colored_vertex(*above, colour);
        mesh.colored_vertex(*below, colour);
        if k > 0 {
            let k = 2 * k as u32;
            mesh.add_triangle(k - 2, k - 1, k);
            mesh.add_triangle(k - 1, k + 1, k);
        }
    }
    painter.add(Shape::mesh(mesh));
    // The mesh's edge is hard; a hair line softens it, and tells the shapes from a night sky.
    let stroke = Stroke::new(1.0, look.colours.hidden.gamma_multiply(0.25));
    if rim == Rim::Both {
        painter.add(Shape::line(lower, stroke));
    }
    painter.add(Shape::line(upper, stroke));
}

fn path(painter: &Painter, look: &Look, stretch: &Stretch) {
    let colours = &look.colours;
    match stretch.standing {
        Standing::Plain => {
            // The dark edge keeps it apart from the glow of dusk, which has the same colour.
            let edge = Stroke::new(6.0, colours.sky_shade.gamma_multiply(0.35));
            painter.add(Shape::line(stretch.points.clone(), edge));
            let line = Stroke::new(4.0, colours.seen);
            painter.add(Shape::line(stretch.points.clone(), line));
        }
        Standing::WashedOut => {
            let stroke = Stroke::new(1.8, colours.too_bright);
            painter.extend(Shape::dashed_line(&stretch.points, stroke, 9.0, 6.0));
        }
        Standing::Blocked => {
            painter.extend(Shape::dotted_line(
                &stretch.points,
                colours.hidden.gamma_multiply(0.85),
                9.0,
                1.4,
            ));
        }
        Standing::Down => {}
    }
}

fn ticks(painter: &Painter, look: &Look, layout: &Layout) {
    for tick in &layout.ticks {
        let reach = if tick.tick.minute == 0 { 8.0 } else { 5.5 };
        let colour = match tick.standing {
            Standing::Plain => look.colours.sky_shade,
            Standing::WashedOut => look.colours.too_bright,
            Standing::Blocked | Standing::Down => look.colours.hidden,
        };
        let half = tick.across * reach;
        painter.line_segment([tick.at - half, tick.at + half], Stroke::new(1.5, colour));
    }
}

fn target(painter: &Painter, look: &Look, model: &Model, layout: &Layout) {
    let Some(at) = layout.target else { return };
    if let Some([top, foot]) = layout.drop {
        let stroke = Stroke::new(1.2, look.colours.sky_text);
        painter.extend(Shape::dashed_line(&[top, foot], stroke, 3.0, 3.0));
        painter.circle_filled(foot, 2.5, look.colours.sky_text);
    }
    let colour = look.colours.body;
    match model.target.sample.standing {
        Standing::Plain => {
            painter.circle_filled(at, 15.0, colour.gamma_multiply(0.22));
            painter.circle_filled(at, 6.5, colour);
        }
        Standing::WashedOut => {
            painter.circle_filled(at, 6.5, colour.gamma_multiply(0.55));
            painter.circle_stroke(at, 6.5, Stroke::new(1.5, colour));
        }
        Standing::Blocked | Standing::Down => {
            painter.circle_stroke(at, 6.5, Stroke::new(1.5, look.colours.hidden));
        }
    }
    if model.target.body == Body::Moon && model.target.sample.standing != Standing::Blocked {
        let limb = disc::towards_limb(model.target.limb_from_up);
        let phase = (model.target.phase_angle, limb);
        let tones = (look.colours.disc_lit, look.colours.disc_shade);
        disc::paint(painter, at, 10.0, phase, tones);
    }
}

fn altitudes(painter: &Painter, look: &Look, layout: &Layout) {
    const LONG: f32 = 14.0;
    let left = layout.camera.rect.left();
    for mark in &layout.altitudes {
        let ends = [pos2(left, mark.at), pos2(left + LONG, mark.at)];
        painter.line_segment(ends, Stroke::new(1.2, look.colours.sky_text));
        let size = mark.text.size();
        let rect = Rect::from_min_size(pos2(left + LONG + 7.0, mark.at - 0.5 * size.y), size);
        let label = Label {
            rect,
            lines: vec![mark.text.clone()],
            is_right_aligned: false,
            is_on_sky: true,
        };
        text(painter, look, &label);
    }
}

fn azimuths(painter: &Painter, look: &Look, layout: &Layout) {
    let ruler = layout.ruler;
    let corner = look.room.corner as u8;
    let below = CornerRadius {
        sw: corner,
        se: corner,
        ..CornerRadius::ZERO
    };
    painter.rect_filled(ruler, below, look.colours.card);
    painter.hline(
        ruler.x_range(),
        ruler.top(),
        Stroke::new(1.0, look.colours.line),
    );
    for mark in &layout.azimuths {
        let reach = if mark.is_named { 7.0 } else { 4.0 };
        let ends = [
            pos2(mark.at, ruler.top()),
            pos2(mark.at, ruler.top() + reach),
        ];
        painter.line_segment(ends, Stroke::new(1.0, look.colours.lesser));
        let at = pos2(mark.at, ruler.center().y + 3.0);
        let place = Align2::CENTER_CENTER.anchor_size(at, mark.text.size());
        painter.galley(place.min, mark.text.clone(), look.colours.lesser);
    }
}

/// A label's lines.
fn text(painter: &Painter, look: &Look, label: &Label) {
    let mut y = label.rect.top();
    for line in &label.lines {
        let x = if label.is_right_aligned {
            label.rect.right() - line.size().x
        } else {
            label.rect.left()
        };
        let at = pos2(x, y);
        if label.is_on_sky {
            shaded(painter, look, at, line);
        } else {
            painter.galley(at, line.clone(), look.colours.skyline_name);
        }
        y += line.size().y;
    }
}
