//! Draws the map under the plan, and its legend.

use super::heat;
use crate::app::palette::Look;
use crate::place::PlanPoint;
use crate::plan::standing::{Raster, Stay};
use crate::words::{Words, decimal};
use eframe::egui::{
    Align2, Color32, Mesh, Painter, Pos2, Rect, Shape, Stroke, TextureId, pos2, vec2,
};

/// How the plan's points fall on the screen.
pub type ToScreen<'a> = &'a dyn Fn(PlanPoint) -> Pos2;

/// The outermost corners of the squares, in the south-west and in the north-east.
pub fn corners(raster: &Raster) -> [PlanPoint; 2] {
    let half_m = 0.5 * raster.step_m;
    let last = raster.centre(
        raster.columns.saturating_sub(1),
        raster.rows.saturating_sub(1),
    );
    [
        PlanPoint::new(
            raster.origin.east_m - half_m,
            raster.origin.north_m - half_m,
        ),
        PlanPoint::new(last.east_m + half_m, last.north_m + half_m),
    ]
}

/// The squares, from a texture of one pixel each.
pub fn squares(painter: &Painter, to_screen: ToScreen<'_>, raster: &Raster, texture: TextureId) {
    let [south_west, north_east] = corners(raster).map(to_screen);
    let rect = Rect::from_two_pos(south_west, north_east);
    let mut mesh = Mesh::with_texture(texture);
    let whole = Rect::from_min_max(Pos2::ZERO, pos2(1.0, 1.0));
    mesh.add_rect_with_uv(rect, whole, Color32::WHITE);
    painter.add(Shape::mesh(mesh));
}

/// A line of equal minutes with what is written on it.
pub struct Line {
    /// Its minutes, in words.
    pub text: String,
    /// Its points.
    pub points: Vec<PlanPoint>,
}

/// The lines of equal minutes, each line of some length with its minutes written on it.
pub fn contours(painter: &Painter, to_screen: ToScreen<'_>, look: &Look, lines: &[Line]) {
    /// Shorter lines carry no figure, and lines of a few points are not drawn.
    const LEAST_FOR_TEXT: f32 = 70.0;
    const LEAST: f32 = 12.0;
    let colours = &look.colours;
    let mut taken: Vec<Rect> = Vec::new();
    for line in lines {
        let points: Vec<Pos2> = line.points.iter().map(|at| to_screen(*at)).collect();
        let length: f32 = points
            .windows(2)
            .map(|pair| pair[0].distance(pair[1]))
            .sum();
        if length < LEAST {
            continue;
        }
        let shade = Stroke::new(2.6, colours.sky_shade.gamma_multiply(0.55));
        painter.add(Shape::line(points.clone(), shade));
        painter.add(Shape::line(
            points.clone(),
            Stroke::new(1.1, colours.sky_text),
        ));
        if length < LEAST_FOR_TEXT {
            continue;
        }
        let font = look.font(look.sizes.least);
        let text = painter.layout_no_wrap(line.text.clone(), font, colours.sky_text);
        let visible = painter.clip_rect().shrink(4.0);
        // Halfway along where there is room, else nearer to an end.
        let place = [0.5, 0.35, 0.65, 0.2, 0.8].into_iter().find_map(|share| {
            let at = along(&points, share * length)?;
            let rect = Align2::CENTER_CENTER.anchor_size(at, text.size());
            let is_free =
                visible.contains_rect(rect) && taken.iter().all(|other| !other.intersects(rect));
            is_free.then_some(rect)
        });
        if let Some(rect) = place {
            taken.push(rect.expand(10.0));
            let ground = rect.expand2(vec2(3.0, 0.0));
            painter.rect_filled(ground, 3.0, colours.sky_shade.gamma_multiply(0.8));
            painter.galley(rect.min, text, colours.sky_text);
        }
    }
}

/// The point so far along a line.
fn along(points: &[Pos2], mut far: f32) -> Option<Pos2> {
    for pair in points.windows(2) {
        let step = pair[0].distance(pair[1]);
        if far <= step && step > 0.0 {
            return Some(pair[0].lerp(pair[1], far / step));
        }
        far -= step;
    }
    points.last().copied()
}

/// The best places with their numbers.
pub fn places(
    painter: &Painter,
    to_screen: ToScreen<'_>,
    look: &Look,
    places: &[(PlanPoint, Stay)],
) {
    const RADIUS: f32 = 9.0;
    let colours = &look.colours;
    // The first on top.
    for (index, (place, _)) in places.iter().enumerate().rev() {
        let at = to_screen(*place);
        painter.circle_filled(at, RADIUS, colours.sky_shade);
        painter.circle_stroke(at, RADIUS, Stroke::new(2.0, colours.seen));
        painter.text(
            at,
            Align2::CENTER_CENTER,
            index + 1,
            look.bold(look.sizes.least),
            colours.sky_text,
        );
    }
}

/// The legend: the colours from fewest to most, with the minutes of the lines.
pub fn legend(painter: &Painter, rect: Rect, look: &Look, words: &Words, range: (f64, f64)) {
    const STEPS: usize = 48;
    let bar = rect.with_max_y(rect.top() + 12.0);
    let x_at = |share: f32| bar.left() + share * bar.width();
    for step in 0..STEPS {
        let (from, to) = (step as f32 / STEPS as f32, (step + 1) as f32 / STEPS as f32);
        let part = Rect::from_min_max(pos2(x_at(from), bar.top()), pos2(x_at(to), bar.bottom()));
        painter.rect_filled(part, 0.0, heat::colour(&look.colours, 0.5 * (from + to)));
    }
    let font = look.font(look.sizes.least);
    let mut taken: Vec<Rect> = Vec::new();
    let mut mark = |minutes: f64, align: Align2| {
        let at = pos2(x_at(heat::share(range, minutes)), bar.bottom() + 3.0);
        let text = words.text_with("standing-minutes", &[("minutes", decimal(minutes, 0))]);
        let text = painter.layout_no_wrap(text, font.clone(), look.colours.lesser);
        let place = align.anchor_size(at, text.size());
        if taken.iter().any(|other| other.intersects(place)) {
            return;
        }
        taken.push(place.expand(6.0));
        painter.vline(
            at.x.clamp(bar.left() + 0.5, bar.right() - 0.5),
            bar.y_range(),
            Stroke::new(1.0, look.colours.sky_text),
        );
        painter.galley(place.min, text, look.colours.lesser);
    };
    mark(range.0, Align2::LEFT_TOP);
    if range.1 > range.0 {
        mark(range.1, Align2::RIGHT_TOP);
    }
    for level in heat::levels(range) {
        mark(level, Align2::CENTER_TOP);
    }
}
