//! Draws the phase card.

use super::layout::Layout;
use super::model::{Model, Rings, Seen};
use crate::app::lookout::disc;
use crate::app::palette::Look;
use crate::app::scene::Scene;
use eframe::egui::{Color32, Mesh, Painter, Pos2, Shape, Stroke, StrokeKind, Vec2};

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
    painter.circle_stroke(centre, ring, scale);
    let radius = ring * (model.diameter / model.ring) as f32;
    let tones = (colours.disc_lit, colours.disc_shade);
    let half = |is_near| {
        if let Some(rings) = model.rings {
            painter.add(ring_half(
                rings,
                centre,
                radius,
                seen.towards_pole,
                is_near,
                colours.disc_lit,
            ));
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
/// turned towards us.
fn ring_half(
    rings: Rings,
    centre: Pos2,
    radius: f32,
    towards_pole: Vec2,
    is_near: bool,
    colour: Color32,
) -> Shape {
    const STEPS: u32 = 48;
    let along = towards_pole.rot90();
    let squeeze = rings.opening_sine.abs() as f32;
    let side = if is_near == (rings.opening_sine > 0.0) {
        -1.0
    } else {
        1.0
    };
    let mut mesh = Mesh::default();
    for k in 0..=STEPS {
        let (sin, cos) = (std::f32::consts::PI * k as f32 / STEPS as f32).sin_cos();
        let towards = along * cos + towards_pole * (side * squeeze * sin);
        for edge in [rings.outer, rings.inner] {
            mesh.colored_vertex(
                centre + towards * (radius * edge as f32),
                colour.gamma_multiply(0.8),
            );
        }
        if k > 0 {
            let k = 2 * k;
            mesh.add_triangle(k - 2, k - 1, k);
            mesh.add_triangle(k - 1, k + 1, k);
        }
    }
    Shape::mesh(mesh)
}
