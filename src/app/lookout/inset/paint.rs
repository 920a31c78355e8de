//! Lays out and draws the inset.

use super::model::{Centre, Dated, Model, Plan};
use crate::app::lookout::labels::{self, Rank, Wanted};
use crate::app::lookout::says::Says;
use crate::app::scene::Scene;
use eframe::egui::{
    Color32, FontId, Galley, Painter, Pos2, Rect, Shape, Stroke, StrokeKind, Vec2, pos2, vec2,
};
use std::sync::Arc;

/// The card with the plan, its title and the events around the moment.
pub fn paint(
    painter: &Painter,
    scene: &Scene<'_>,
    model: &Model,
    (last, next): (Option<Dated>, Option<Dated>),
    card: Rect,
) {
    let (look, says) = (&scene.look, Says::new(scene));
    let (colours, sizes) = (&look.colours, &look.sizes);
    painter.rect_filled(card, look.room.corner, colours.card);
    let line = Stroke::new(1.0, colours.line);
    painter.rect_stroke(card, look.room.corner, line, StrokeKind::Inside);
    let inner = card.shrink(look.room.inside);
    let galley = |text: String, font: FontId, colour: Color32| -> Arc<Galley> {
        painter.layout(text, font, colour, inner.width())
    };
    let label = || look.font(sizes.label);
    let title = galley(says.text("inset-title", &[]), label(), colours.lesser);
    painter.galley(inner.min, title.clone(), colours.lesser);
    let mut bottom = inner.bottom();
    for event in [next, last].into_iter().flatten() {
        let text = galley(
            says.dated(model.body, event.event.aspect, event.days),
            label(),
            colours.lesser,
        );
        bottom -= text.size().y;
        painter.galley(pos2(inner.left(), bottom), text, colours.lesser);
    }
    // The plan may reach up beside the title, which is short.
    let room = Rect::from_min_max(
        pos2(inner.left(), inner.top() + 0.5 * title.size().y),
        pos2(inner.right(), bottom - 4.0),
    );
    let title_rect = Rect::from_min_size(inner.min, title.size());
    plan(
        &painter.with_clip_rect(card),
        scene,
        model,
        room,
        title_rect,
    );
}

fn plan(painter: &Painter, scene: &Scene<'_>, model: &Model, room: Rect, title: Rect) {
    let (look, says) = (&scene.look, Says::new(scene));
    let colours = &look.colours;
    let radius = 0.5 * room.width().min(room.height()) - 4.0;
    let centre = room.center();
    let scale = radius / model.reach_au as f32;
    let pos = |plan: &Plan| centre + vec2(plan.right_au as f32, -plan.up_au as f32) * scale;
    for (k, orbit) in model.orbits.iter().enumerate().rev() {
        let points: Vec<Pos2> = orbit.iter().map(pos).collect();
        let (width, colour) = match k {
            0 => (1.8, colours.orbit),
            _ => (1.0, colours.orbit.gamma_multiply(0.75)),
        };
        painter.add(Shape::closed_line(points, Stroke::new(width, colour)));
    }
    let (earth, place) = (pos(&model.earth), pos(&model.place));
    let sun = match model.centre {
        Centre::Sun => centre,
        Centre::Earth => centre - vec2(0.0, radius),
    };
    let sight = Stroke::new(1.5, colours.chosen);
    painter.line_segment(
        [earth, sun],
        Stroke::new(1.0, colours.chosen.gamma_multiply(0.6)),
    );
    painter.line_segment([earth, place], sight);
    let arc = elongation_arc(earth, sun, place);
    painter.add(Shape::line(arc.clone(), Stroke::new(1.2, colours.chosen)));

    let is_sun_there = model.centre == Centre::Sun;
    if is_sun_there {
        painter.circle_filled(sun, 6.5, colours.sun);
    } else {
        let up = vec2(0.0, -12.0);
        painter.arrow(sun - up, up, Stroke::new(1.2, colours.sun));
    }
    painter.circle_filled(earth, 4.5, colours.keen);
    painter.circle_filled(place, 4.5, colours.text);

    let small = look.font(look.sizes.label);
    let text = |text: String, colour| painter.layout_no_wrap(text, small.clone(), colour);
    let sun_name = if is_sun_there {
        "inset-sun"
    } else {
        "inset-to-sun"
    };
    let mut texts = vec![
        (
            Rank::Target,
            place,
            text(says.body(model.body), colours.text),
        ),
        (
            Rank::Moon,
            earth,
            text(says.text("inset-earth", &[]), colours.keen),
        ),
        (
            Rank::Planet,
            sun,
            text(says.text(sun_name, &[]), colours.lesser),
        ),
    ];
    let elongation = text(says.tenths(model.elongation), colours.chosen);
    texts.push((Rank::Hour, arc[arc.len() / 2], elongation));
    let wanted: Vec<Wanted> = texts
        .iter()
        .map(|(rank, at, text)| Wanted {
            rank: *rank,
            size: text.size(),
            places: [9.0, 16.0, 26.0]
                .iter()
                .flat_map(|gap| labels::around(*at, text.size(), *gap))
                .collect(),
        })
        .collect();
    let mut taken = vec![title];
    taken.extend([sun, earth, place].map(|at| Rect::from_center_size(at, Vec2::splat(13.0))));
    taken.extend(along(earth, place));
    taken.extend(along(earth, sun));
    let bounds = room.expand2(vec2(0.0, 4.0));
    let places = labels::arrange(&wanted, bounds, &taken);
    for ((_, _, text), place) in texts.into_iter().zip(places) {
        if let Some(place) = place {
            painter.galley(place.min, text, colours.text);
        }
    }
}

/// A line as small boxes that labels keep off.
fn along(from: Pos2, to: Pos2) -> impl Iterator<Item = Rect> {
    let steps = (from.distance(to) / 4.0).ceil().max(1.0) as usize;
    (0..=steps).map(move |k| {
        let at = from.lerp(to, k as f32 / steps as f32);
        Rect::from_center_size(at, Vec2::splat(3.0))
    })
}

/// The arc of the elongation at the Earth, from the Sun's direction to the body's.
fn elongation_arc(earth: Pos2, sun: Pos2, place: Pos2) -> Vec<Pos2> {
    const STEPS: usize = 24;
    let (to_sun, to_place) = (sun - earth, place - earth);
    let reach = (0.4 * to_sun.length().min(to_place.length())).clamp(8.0, 34.0);
    let from = to_sun.angle();
    let mut turn = to_place.angle() - from;
    if turn > std::f32::consts::PI {
        turn -= std::f32::consts::TAU;
    } else if turn < -std::f32::consts::PI {
        turn += std::f32::consts::TAU;
    }
    (0..=STEPS)
        .map(|k| earth + Vec2::angled(from + turn * k as f32 / STEPS as f32) * reach)
        .collect()
}
