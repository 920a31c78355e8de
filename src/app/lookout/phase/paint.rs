//! Lays out and draws the phase card.

use super::model::{Model, Rings, Seen, Through};
use crate::app::command::OpticsView;
use crate::app::lookout::disc;
use crate::app::lookout::says::Says;
use crate::app::palette::Look;
use crate::app::scene::Scene;
use crate::sky::Body;
use eframe::egui::{
    Align2, Color32, Mesh, Painter, Pos2, Rect, Shape, Stroke, StrokeKind, Vec2, pos2, vec2,
};

/// The card with the three discs.
pub fn paint(painter: &Painter, scene: &Scene<'_>, model: &Model, card: Rect) {
    let (look, says) = (&scene.look, Says::new(scene));
    let colours = &look.colours;
    painter.rect_filled(card, look.room.corner, colours.card);
    let line = Stroke::new(1.0, colours.line);
    painter.rect_stroke(card, look.room.corner, line, StrokeKind::Inside);
    let inner = card.shrink(look.room.inside);
    let font = look.font(look.sizes.label);
    let lesser = |text: String| painter.layout_no_wrap(text, font.clone(), colours.lesser);
    let title = lesser(says.text("phase-title", &[]));
    let row = title.size().y;
    painter.galley(inner.min, title, colours.lesser);
    let size = match model.body {
        Body::Moon | Body::Sun => says.arcmin(model.ring),
        _ => says.whole_arcsec(model.ring),
    };
    let scale = lesser(says.text("phase-scale", &[("size", &size)]));
    painter.galley(
        pos2(inner.right() - scale.size().x, inner.top()),
        scale,
        colours.lesser,
    );

    let width = inner.width() / 3.0;
    let captions = 2.0 * row + 4.0;
    let radius = (0.5 * width - 7.0)
        .min(0.5 * (inner.height() - row - captions - 10.0))
        .max(8.0);
    for (k, seen) in model.views.iter().enumerate() {
        let x = inner.left() + (k as f32 + 0.5) * width;
        let centre = pos2(x, inner.top() + row + 6.0 + radius);
        body(painter, look, model, seen, centre, radius);
        let (name, note) = captions_of(says, model, seen);
        let top = centre.y + radius + 4.0;
        for (text, colour, y) in [(name, colours.text, top), (note, colours.lesser, top + row)] {
            let text = painter.layout(text, font.clone(), colour, width - 4.0);
            let one_line = Rect::from_min_size(
                pos2(x - 0.5 * width, y),
                vec2(
                    width,
                    if colour == colours.text {
                        row
                    } else {
                        inner.bottom() + row - y
                    },
                ),
            );
            let place = Align2::CENTER_TOP.anchor_size(pos2(x, y), text.size());
            painter
                .with_clip_rect(one_line.intersect(painter.clip_rect()))
                .galley(place.min, text, colour);
        }
    }
}

/// What each disc is called, and what is to be known of it.
fn captions_of(says: Says<'_>, model: &Model, seen: &Seen) -> (String, String) {
    let view = says.text(
        match seen.view {
            OpticsView::Erect => "phase-erect",
            OpticsView::Inverted => "phase-inverted",
            OpticsView::Mirrored => "phase-mirrored",
        },
        &[],
    );
    match &seen.through {
        Through::Eye => {
            let is_disc = matches!(model.body, Body::Moon | Body::Sun);
            let id = if is_disc {
                "phase-eye-disc"
            } else {
                "phase-eye-point"
            };
            (says.text("phase-eye", &[]), says.text(id, &[]))
        }
        Through::Binocular(label) => {
            let label = label.clone();
            (
                label.unwrap_or_else(|| says.text("phase-binocular", &[])),
                view,
            )
        }
        Through::Telescope(None) => (says.text("phase-telescope", &[]), view),
        Through::Telescope(Some((label, power))) => {
            let power = says.power(*power);
            let note = says.text("phase-power", &[("power", &power), ("view", &view)]);
            (label.clone(), note)
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
