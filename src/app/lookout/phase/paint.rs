//! Draws the phase card.

use super::layout::Layout;
use super::model::{Model, Rings, Seen};
use crate::app::lookout::disc;
use crate::app::palette::{Colours, Look};
use crate::app::scene::Scene;
use eframe::egui::{Mesh, Painter, Pos2, Shape, Stroke, StrokeKind, Vec2};

/// The card with the three discs; `is_lit` where the telescope's is under the pointer.
pub fn paint(painter: &Painter, scene: &Scene<'_>, model: &Model, layout: &Layout, is_lit: bool) {
    let look = &scene.look;
    let colours = &look.colours;
    painter.rect_filled(layout.card, look.room.corner, colours.card);
    let line = Stroke::new(1.0, colours.line);
    painter.rect_stroke(layout.card, look.room.corner, line, StrokeKind::Inside);
    if is_lit {
        let place = layout.discs[2].place;
        painter.rect_filled(place, look.room.corner, colours.chosen_ground);
    }
    for (at, text) in &layout.texts {
        painter.galley(*at, text.clone(), colours.lesser);
    }
    for (seen, disc) in model.views.iter().zip(&layout.discs) {
        body(painter, look, model, seen, disc.centre, layout.ring);
        for (at, text) in &disc.texts {
            painter.galley(*at, text.clone(), colours.text);
        }
    }
}

fn body(painter: &Painter, look: &Look, model: &Model, seen: &Seen, centre: Pos2, ring: f32) {
    let colours = &look.colours;
    let scale = Stroke::new(1.0, colours.line);
    // A field of dark sky, so that the lit part stands out on a light card too.
    painter.circle(centre, ring, colours.sky_shade, scale);
    let radius = ring * (model.diameter / model.ring) as f32;
    let tones = (colours.disc_lit, colours.disc_shade);
    let half = |is_near| {
        if let Some(rings) = model.rings {
            let pole = seen.towards_pole;
            painter.extend(ring_half(rings, centre, radius, pole, is_near, colours));
        }
    };
    half(false);
    disc::paint(
        painter,
        centre,
        radius,
        (model.phase_angle, seen.towards_limb),
        tones,
    );
    half(true);
}

/// Half of Saturn's rings: the near half crosses the disc on the side away from the pole that is
/// turned towards us. Its edges are drawn in the shade, so that it shows before the disc too.
fn ring_half(
    rings: Rings,
    centre: Pos2,
    radius: f32,
    towards_pole: Vec2,
    is_near: bool,
    colours: &Colours,
) -> [Shape; 3] {
    const STEPS: u32 = 64;
    let along = towards_pole.rot90();
    let squeeze = rings.opening_sine.abs() as f32;
    let is_below_pole = is_near == (rings.opening_sine > 0.0);
    let side = if is_below_pole { -1.0 } else { 1.0 };
    let edge = |size: f64| -> Vec<Pos2> {
        (0..=STEPS)
            .map(|k| {
                let (sin, cos) = (std::f32::consts::PI * k as f32 / STEPS as f32).sin_cos();
                let towards = along * cos + towards_pole * (side * squeeze * sin);
                centre + towards * (radius * size as f32)
            })
            .collect()
    };
    let (outer, inner) = (edge(rings.outer), edge(rings.inner));
    let mut mesh = Mesh::default();
    for (k, (outer, inner)) in (0..).zip(outer.iter().zip(&inner)) {
        for point in [outer, inner] {
            mesh.colored_vertex(*point, colours.disc_lit.gamma_multiply(0.85));
        }
        if k > 0 {
            mesh.add_triangle(2 * k - 2, 2 * k - 1, 2 * k);
            mesh.add_triangle(2 * k - 1, 2 * k + 1, 2 * k);
        }
    }
    let line = Stroke::new(1.0, colours.disc_shade);
    [
        Shape::mesh(mesh),
        Shape::line(outer, line),
        Shape::line(inner, line),
    ]
}
