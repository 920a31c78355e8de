//! What lies under and around the plan: grid, mark, scale bar, north arrow.

use super::camera::Camera;
use super::paint::faint;
use crate::app::palette::Look;
use crate::place::PlanPoint;
use crate::words::Words;
use eframe::egui::{Align2, Painter, Shape, Stroke, pos2, vec2};

/// Room between these and the plan's edge, points.
const MARGIN: f32 = 14.0;

/// The grid's lines, every fifth stronger (of the metre's and ten metres' grid; every second of
/// the others), and a cross at the mark.
pub fn grid(painter: &Painter, look: &Look, camera: Camera) {
    let step_m = camera.grid_m();
    let strong = if step_m == 1.0 || step_m == 10.0 {
        5
    } else {
        2
    };
    let rect = camera.rect;
    let (low, high) = (
        camera.to_plan(rect.left_bottom()),
        camera.to_plan(rect.right_top()),
    );
    let stroke = |index: i64| {
        let share = if index % strong == 0 { 0.85 } else { 0.4 };
        Stroke::new(1.0, faint(look, share))
    };
    /// More would be a grey ground and not a grid.
    const MOST_LINES: i64 = 400;
    let lines = |from_m: f64, to_m: f64| {
        let first = (from_m / step_m).ceil() as i64;
        let last = (to_m / step_m).floor() as i64;
        first..=last.min(first + MOST_LINES)
    };
    for index in lines(low.east_m, high.east_m) {
        let x = camera
            .to_screen(PlanPoint::new(index as f64 * step_m, 0.0))
            .x;
        painter.vline(x, rect.y_range(), stroke(index));
    }
    for index in lines(low.north_m, high.north_m) {
        let y = camera
            .to_screen(PlanPoint::new(0.0, index as f64 * step_m))
            .y;
        painter.hline(rect.x_range(), y, stroke(index));
    }
    let mark = camera.to_screen(PlanPoint::new(0.0, 0.0));
    let stroke = Stroke::new(1.5, look.colours.lesser);
    painter.line_segment([mark - vec2(13.0, 0.0), mark + vec2(13.0, 0.0)], stroke);
    painter.line_segment([mark - vec2(0.0, 13.0), mark + vec2(0.0, 13.0)], stroke);
}

/// The scale bar at the lower left, the north arrow at the upper right.
pub fn scale_and_north(painter: &Painter, look: &Look, camera: Camera, words: &Words) {
    const LONGEST: f64 = 130.0;
    let rect = camera.rect;
    let colour = look.colours.text;
    let length_m = camera.scale_bar_m(LONGEST);
    let left = pos2(rect.left() + MARGIN, rect.bottom() - MARGIN);
    let right = left + vec2(camera.points(length_m), 0.0);
    let line = vec![left - vec2(0.0, 5.0), left, right, right - vec2(0.0, 5.0)];
    for (width, colour) in [(5.0, look.colours.card), (1.5, colour)] {
        painter.add(Shape::line(line.clone(), Stroke::new(width, colour)));
    }
    let text = words.text_with::<&str>("plan-metres", &[("metres", &format!("{length_m}"))]);
    painter.text(
        left.lerp(right, 0.5) - vec2(0.0, 4.0),
        Align2::CENTER_BOTTOM,
        text,
        look.font(look.sizes.label),
        colour,
    );
    let tip = pos2(rect.right() - MARGIN - 8.0, rect.top() + MARGIN);
    let arrow = vec![
        tip,
        tip + vec2(7.0, 22.0),
        tip + vec2(0.0, 17.0),
        tip + vec2(-7.0, 22.0),
    ];
    let (east_half, west_half) = (
        vec![arrow[0], arrow[1], arrow[2]],
        vec![arrow[0], arrow[2], arrow[3]],
    );
    painter.add(Shape::convex_polygon(east_half, colour, Stroke::NONE));
    painter.add(Shape::convex_polygon(
        west_half,
        look.colours.card,
        Stroke::NONE,
    ));
    painter.add(Shape::closed_line(arrow, Stroke::new(1.2, colour)));
    painter.text(
        tip + vec2(0.0, 24.0),
        Align2::CENTER_TOP,
        words.compass_point(0),
        look.bold(look.sizes.label),
        colour,
    );
}
