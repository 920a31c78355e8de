//! Signs at the pointer, the line under the plan, and what was refused.

use super::camera::Camera;
use super::snap::{Sign, Snapped};
use super::{Plan, Takes};
use crate::app::grounds::{Desk, Selection};
use crate::app::palette::Look;
use crate::app::widgets::{card_frame, error_line};
use crate::place::PlanPoint;
use crate::words::decimal;
use eframe::egui::{
    Align, Align2, Label, Layout, Painter, Pos2, Rect, RichText, Shape, Stroke, StrokeKind, Ui,
    UiBuilder, vec2,
};

/// Height of the line under the plan, points.
pub fn height(look: &Look) -> f32 {
    look.sizes.label + 12.0
}

/// A small sign of what the pointer's position was drawn to, with its word.
pub fn snap_sign(painter: &Painter, desk: &Desk<'_>, camera: Camera, snapped: &Snapped) {
    let Some(sign) = snapped.sign else { return };
    let at = camera.to_screen(snapped.at);
    let stroke = Stroke::new(1.5, desk.look.colours.keen);
    let box_around = Rect::from_center_size(at, vec2(11.0, 11.0));
    let word = match sign {
        Sign::Corner => {
            painter.rect_stroke(box_around, 0.0, stroke, StrokeKind::Middle);
            "snap-corner"
        }
        Sign::Line => {
            painter.line_segment([box_around.left_top(), box_around.right_bottom()], stroke);
            painter.line_segment([box_around.left_bottom(), box_around.right_top()], stroke);
            "snap-line"
        }
        Sign::RightAngle => {
            for from in &snapped.from {
                let line = [camera.to_screen(*from), at];
                painter.extend(Shape::dashed_line(&line, stroke, 3.0, 4.0));
            }
            let angle = vec![
                box_around.left_top(),
                box_around.left_bottom(),
                box_around.right_bottom(),
            ];
            painter.add(Shape::line(angle, stroke));
            "snap-right-angle"
        }
        Sign::Grid => {
            painter.circle_stroke(at, 5.0, stroke);
            "snap-grid"
        }
    };
    let text = desk.words.text(word);
    let font = desk.look.font(desk.look.sizes.least);
    let galley = painter.layout_no_wrap(text, font, desk.look.colours.keen);
    let rect = Align2::LEFT_TOP.anchor_size(at + vec2(9.0, 7.0), galley.size());
    let hem = desk.look.colours.card.gamma_multiply(0.8);
    painter.rect_filled(rect.expand2(vec2(2.0, 0.0)), 3.0, hem);
    painter.galley(rect.min, galley, desk.look.colours.keen);
}

/// One of the picture's two known points.
pub fn picture_point(painter: &Painter, look: &Look, at: Pos2, name: &str) {
    let stroke = Stroke::new(1.5, look.colours.keen);
    painter.circle(at, 8.0, look.colours.card.gamma_multiply(0.8), stroke);
    let font = look.bold(look.sizes.least);
    painter.text(at, Align2::CENTER_CENTER, name, font, look.colours.keen);
}

impl Plan {
    /// What the tool waits for, or the tape's reading, or the map's at the pointer; and where the
    /// pointer is.
    pub(super) fn foot(
        &self,
        ui: &mut Ui,
        rect: Rect,
        desk: &Desk<'_>,
        selection: Option<Selection>,
        on_map: Option<&str>,
    ) {
        let look = desk.look;
        let font = look.font(look.sizes.label);
        let line = Rect::from_min_max(rect.min + vec2(2.0, 4.0), rect.max);
        let layout = Layout::right_to_left(Align::Center);
        ui.scope_builder(UiBuilder::new().max_rect(line).layout(layout), |ui| {
            let at = self
                .cross
                .or(self.snapped.as_ref().map(|snapped| snapped.at));
            if let Some(at) = at {
                let text = RichText::new(position(desk, at)).font(font.clone());
                ui.add(Label::new(text.color(look.colours.text)).extend());
            }
            ui.with_layout(Layout::left_to_right(Align::Center), |ui| {
                let (text, colour) = match (self.tape(desk), on_map) {
                    (Some(reading), _) => (reading, look.colours.chosen),
                    (None, Some(reading)) => (reading.to_owned(), look.colours.text),
                    (None, None) => (self.hint(desk, selection), look.colours.lesser),
                };
                let text = RichText::new(text).font(font).color(colour);
                ui.add(Label::new(text).truncate());
            });
        });
    }

    fn hint(&self, desk: &Desk<'_>, selection: Option<Selection>) -> String {
        let id = match (self.tool.takes(), self.points.len()) {
            _ if self.is_standing => "plan-waits-standing",
            (Takes::Things, _) if selection.is_some() => "plan-waits-selected",
            (Takes::Things, _) => "plan-waits-things",
            (Takes::Point, _) => "plan-waits-point",
            (Takes::Circle, _) => "plan-waits-circle",
            (Takes::Line, 0) => "plan-waits-line",
            (Takes::Line, _) => "plan-waits-line-on",
            (Takes::Corners, 0) => "plan-waits-corners",
            (Takes::Corners, _) => "plan-waits-corners-on",
            (Takes::Pair, _) => "plan-waits-pair",
        };
        desk.words.text(id)
    }

    /// Distance and bearing between the tape's ends, or along the side being drawn.
    fn tape(&self, desk: &Desk<'_>) -> Option<String> {
        let next = self
            .cross
            .or(self.snapped.as_ref().map(|snapped| snapped.at));
        let (from, to) = match (self.tool.takes(), self.points.as_slice()) {
            (Takes::Pair, [from, to]) => (*from, *to),
            (Takes::Pair | Takes::Line | Takes::Corners, [.., last]) => (*last, next?),
            (Takes::Pair | Takes::Line, []) => (self.drawn_from?, next?),
            _ => return None,
        };
        let is_one = from.distance_m(to) < 0.005;
        if is_one {
            return None;
        }
        let distance = decimal(from.distance_m(to), 2);
        let bearing = desk.words.azimuth(from.bearing(to));
        Some(desk.words.text_with::<&str>(
            "tape-reading",
            &[("distance", &distance), ("bearing", &bearing)],
        ))
    }

    /// Why the last change was refused, over the plan's upper edge until it was read.
    pub(super) fn refusal(&mut self, ui: &mut Ui, rect: Rect, desk: &Desk<'_>) {
        let Some(refusal) = desk.state.refusal() else {
            self.read_refusal = None;
            return;
        };
        if self.read_refusal.as_deref() == Some(refusal) {
            return;
        }
        let room = Rect::from_min_max(
            rect.min + vec2(10.0, 10.0),
            Pos2::new(
                (rect.left() + 520.0).min(rect.right() - 50.0),
                rect.bottom(),
            ),
        );
        ui.scope_builder(UiBuilder::new().max_rect(room), |ui| {
            card_frame(desk.look)
                .stroke(Stroke::new(1.0, desk.look.colours.caution))
                .show(ui, |ui| {
                    let text = desk
                        .words
                        .text_with::<&str>("plan-refused", &[("reason", refusal)]);
                    error_line(ui, desk.look, Some(&text));
                });
        });
    }
}

/// A point of the plan in words.
fn position(desk: &Desk<'_>, at: PlanPoint) -> String {
    let side = |value: f64, positive: &'static str, negative: &'static str| {
        let id = if value < 0.0 { negative } else { positive };
        let metres = decimal(value.abs(), 1);
        desk.words.text_with::<&str>(id, &[("metres", &metres)])
    };
    let east = side(at.east_m, "plan-east", "plan-west");
    let north = side(at.north_m, "plan-north", "plan-south");
    desk.words
        .text_with::<&str>("plan-position", &[("east", &east), ("north", &north)])
}
