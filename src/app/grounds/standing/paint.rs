//! Draws the map under the plan, and its legend.

use super::heat;
use crate::app::palette::Look;
use crate::place::PlanPoint;
use crate::plan::standing::{Raster, Stay};
use crate::words::{Words, decimal};
use eframe::egui::{
    Align2, Color32, Mesh, Painter, Pos2, Rect, Shape, Stroke, TextureId, Vec2, pos2, vec2,
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

/// Shorter lines of equal minutes are not drawn, points on the screen.
const LEAST: f32 = 12.0;

/// The lines of equal minutes.
pub fn contours(painter: &Painter, to_screen: ToScreen<'_>, look: &Look, lines: &[Line]) {
    let colours = &look.colours;
    for line in lines {
        let points = on_screen(to_screen, line);
        if length(&points) < LEAST {
            continue;
        }
        let shade = Stroke::new(2.6, colours.sky_shade.gamma_multiply(0.55));
        painter.add(Shape::line(points.clone(), shade));
        painter.add(Shape::line(points, Stroke::new(1.1, colours.sky_text)));
    }
}

/// The minutes of every line of some length, wherever they cover nothing of what is `taken`.
pub fn figures(
    painter: &Painter,
    to_screen: ToScreen<'_>,
    look: &Look,
    lines: &[Line],
    mut taken: Vec<Rect>,
) {
    let colours = &look.colours;
    let visible = painter.clip_rect().shrink(4.0);
    for line in lines {
        let font = look.font(look.sizes.least);
        let text = painter.layout_no_wrap(line.text.clone(), font, colours.sky_text);
        let points = on_screen(to_screen, line);
        if let Some(rect) = figure_place(&points, text.size(), visible, &taken) {
            taken.push(rect.expand(10.0));
            painter.rect_filled(ground_of(rect), 3.0, colours.sky_shade.gamma_multiply(0.8));
            painter.galley(rect.min, text, colours.sky_text);
        }
    }
}

/// Where a figure of some size goes on a line: halfway along where there is room, else nearer to
/// an end; nowhere on a short line.
fn figure_place(points: &[Pos2], size: Vec2, visible: Rect, taken: &[Rect]) -> Option<Rect> {
    const LEAST_FOR_TEXT: f32 = 70.0;
    let length = length(points);
    if length < LEAST_FOR_TEXT {
        return None;
    }
    [0.5, 0.35, 0.65, 0.2, 0.8].into_iter().find_map(|share| {
        let rect = Align2::CENTER_CENTER.anchor_size(along(points, share * length)?, size);
        let is_free = visible.contains_rect(rect)
            && taken.iter().all(|other| !other.intersects(ground_of(rect)));
        is_free.then_some(rect)
    })
}

/// The ground under a figure.
fn ground_of(figure: Rect) -> Rect {
    figure.expand2(vec2(3.0, 0.0))
}

fn on_screen(to_screen: ToScreen<'_>, line: &Line) -> Vec<Pos2> {
    line.points.iter().map(|at| to_screen(*at)).collect()
}

fn length(points: &[Pos2]) -> f32 {
    points
        .windows(2)
        .map(|pair| pair[0].distance(pair[1]))
        .sum()
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

/// Of a best place's number, points.
const RADIUS: f32 = 9.0;

/// Where the best places' numbers stand: each on its place, but above a spot that is there.
pub fn marks(
    to_screen: ToScreen<'_>,
    places: &[(PlanPoint, Stay)],
    spots: &[PlanPoint],
) -> Vec<Rect> {
    /// From a spot's middle, points: the number touches the spot's circle.
    const APART: f32 = 17.0;
    let spots: Vec<Pos2> = spots.iter().map(|spot| to_screen(*spot)).collect();
    let mark = |(place, _): &(PlanPoint, Stay)| {
        let at = to_screen(*place);
        let spot = spots.iter().find(|spot| spot.distance(at) < APART);
        let middle = spot.map_or(at, |spot| *spot - vec2(0.0, APART));
        Rect::from_center_size(middle, Vec2::splat(2.0 * RADIUS))
    };
    places.iter().map(mark).collect()
}

/// The best places' numbers.
pub fn numbers(painter: &Painter, look: &Look, marks: &[Rect]) {
    let colours = &look.colours;
    // The first on top.
    for (index, mark) in marks.iter().enumerate().rev() {
        let at = mark.center();
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
    // Where everything is alike there is one figure, at the end of its colour.
    if range.1 > range.0 || range.1 <= 0.0 {
        mark(range.0, Align2::LEFT_TOP);
    }
    if range.1 > 0.0 {
        mark(range.1, Align2::RIGHT_TOP);
    }
    for level in heat::levels(range) {
        mark(level, Align2::CENTER_TOP);
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// A line from left to right, as long as it takes for a figure.
    const LINE: [Pos2; 2] = [pos2(100.0, 100.0), pos2(400.0, 100.0)];
    const VISIBLE: Rect = Rect::from_min_max(Pos2::ZERO, pos2(800.0, 600.0));

    #[test]
    fn a_figure_gives_way_to_names_and_numbers() {
        let size = vec2(40.0, 12.0);
        let free = figure_place(&LINE, size, VISIBLE, &[]).expect("room");
        assert_eq!(free.center(), pos2(250.0, 100.0));
        let name = Rect::from_center_size(free.center(), vec2(60.0, 14.0));
        let beside = figure_place(&LINE, size, VISIBLE, &[name]).expect("room beside the name");
        assert!(!beside.intersects(name), "{beside} over {name}");
        let all = Rect::from_center_size(free.center(), vec2(400.0, 14.0));
        assert_eq!(figure_place(&LINE, size, VISIBLE, &[all]), None);
    }

    #[test]
    fn a_number_stands_above_the_spot_at_its_place_and_else_on_it() {
        let to_screen = |at: PlanPoint| pos2(at.east_m as f32, -at.north_m as f32);
        let stay = Stay::default();
        let places = [
            (PlanPoint::new(0.0, 0.0), stay),
            (PlanPoint::new(60.0, 0.0), stay),
        ];
        let spot = PlanPoint::new(1.0, 1.0);
        let marks = marks(&to_screen, &places, &[spot]);
        let circle = Rect::from_center_size(to_screen(spot), Vec2::splat(15.0));
        assert!(!marks[0].intersects(circle), "{} over {circle}", marks[0]);
        assert!(marks[0].center().y < circle.center().y);
        assert_eq!(marks[1].center(), pos2(60.0, 0.0));
    }
}
