//! Draws the fade.

use super::layout::{LaneLayout, Layout, bubble_height};
use super::model::{Lane, Model};
use crate::app::lookout::shaded;
use crate::app::palette::Look;
use crate::light::Standing;
use eframe::egui::{
    Align2, Color32, CornerRadius, Mesh, Painter, Pos2, Rect, Shape, Stroke, TextureId, pos2,
};

/// Everything but the time that is shown.
pub fn paint(painter: &Painter, look: &Look, model: &Model, layout: &Layout, sky: TextureId) {
    let band = layout.band;
    let whole = Rect::from_min_max(Pos2::ZERO, pos2(1.0, 1.0));
    painter.image(sky, band, whole, Color32::WHITE);
    for (x, name) in &layout.marks {
        let line = Stroke::new(1.0, look.colours.sky_text.gamma_multiply(0.7));
        painter.vline(*x, band.y_range(), line);
        if let Some(name) = name {
            let at = pos2(x + 6.0, band.top() + 3.0);
            shaded(painter, look, at, name);
        }
    }
    for (x, is_hour, time) in &layout.ticks {
        let reach = if *is_hour { 7.0 } else { 4.0 };
        let ends = [pos2(*x, band.bottom()), pos2(*x, band.bottom() + reach)];
        painter.line_segment(ends, Stroke::new(1.0, look.colours.lesser));
        if let Some(time) = time {
            let at = pos2(*x, band.bottom() + 6.0);
            let rect = Align2::CENTER_TOP.anchor_size(at, time.size());
            painter.galley(rect.min, time.clone(), look.colours.lesser);
        }
    }
    for (k, place) in &layout.lanes {
        let lane = &model.lanes[*k];
        self::lane(painter, look, layout, model.full_deg, lane, place);
    }
    if let Some((at, text)) = &layout.absent {
        painter.galley(*at, text.clone(), look.colours.lesser);
    }
}

/// A mountain as tall as the clearance: amber while seen, grey in too bright a sky; pale dots at
/// its foot while the skyline hides the body.
fn lane(
    painter: &Painter,
    look: &Look,
    layout: &Layout,
    full_deg: f64,
    lane: &Lane,
    place: &LaneLayout,
) {
    let (rect, colours) = (place.rect, &look.colours);
    let foot = Stroke::new(1.0, colours.line);
    painter.hline(rect.x_range(), rect.bottom(), foot);
    let mut mesh = Mesh::default();
    let mut crests: Vec<Shape> = Vec::new();
    let top = |clearance_deg: f64| {
        let share = (clearance_deg / full_deg).clamp(0.0, 1.0) as f32;
        rect.bottom() - share * rect.height()
    };
    for pair in lane.points.windows(2) {
        let colour = match pair[0].standing {
            Standing::Plain => colours.seen,
            Standing::WashedOut => colours.idle,
            Standing::Blocked | Standing::Down => continue,
        };
        let crest = [0, 1].map(|k| pos2(layout.x(pair[k].at_s), top(pair[k].clearance_deg)));
        crests.push(Shape::line_segment(crest, Stroke::new(1.0, colour)));
        let first = mesh.vertices.len() as u32;
        for point in pair {
            let x = layout.x(point.at_s);
            mesh.colored_vertex(pos2(x, top(point.clearance_deg)), colour);
            mesh.colored_vertex(pos2(x, rect.bottom()), colour);
        }
        mesh.add_triangle(first, first + 1, first + 2);
        mesh.add_triangle(first + 1, first + 3, first + 2);
    }
    painter.add(Shape::mesh(mesh));
    // The mesh's edge is hard; a hair line softens it.
    painter.extend(crests);
    let mut next_dot = f32::NEG_INFINITY;
    for point in &lane.points {
        let x = layout.x(point.at_s);
        if point.standing == Standing::Blocked && x >= next_dot {
            painter.circle_filled(pos2(x, rect.bottom() - 1.0), 1.2, colours.hidden);
            next_dot = x + 7.0;
        }
    }
    let (at, name) = &place.name;
    painter.galley(*at, name.clone(), colours.text);
    for (at, note) in &place.notes {
        let shade = colours.ground.gamma_multiply(0.8);
        for aside in super::super::AROUND {
            painter.galley_with_override_text_color(*at + aside, note.clone(), shade);
        }
        painter.galley(*at, note.clone(), colours.text);
    }
}

/// The line through everything at one time, with the time above it. `is_shown` for the moment
/// that the whole window shows; else it is only under the pointer.
pub fn cursor(painter: &Painter, look: &Look, layout: &Layout, x: f32, time: &str, is_shown: bool) {
    let colours = &look.colours;
    let (line, ground, ink) = if is_shown {
        (colours.text, colours.text, colours.ground)
    } else {
        (
            colours.lesser.gamma_multiply(0.6),
            colours.card,
            colours.lesser,
        )
    };
    let width = if is_shown { 2.0 } else { 1.0 };
    let top = layout.band.top();
    painter.vline(
        x,
        top - 3.0..=layout.whole.bottom(),
        Stroke::new(width, line),
    );
    let text = painter.layout_no_wrap(time.to_owned(), look.bold(look.sizes.control), ink);
    let height = bubble_height(look) - 5.0;
    let half = 0.5 * text.size().x + 14.0;
    let middle = x.clamp(
        layout.whole.left() + half,
        (layout.whole.right() - half).max(layout.whole.left() + half),
    );
    let bubble = Rect::from_min_max(
        pos2(middle - half, top - 3.0 - height),
        pos2(middle + half, top - 3.0),
    );
    painter.rect_filled(bubble, CornerRadius::same((0.5 * height) as u8), ground);
    let place = Align2::CENTER_CENTER.anchor_size(bubble.center(), text.size());
    painter.galley(place.min, text, ink);
}
