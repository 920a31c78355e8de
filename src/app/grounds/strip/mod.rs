//! The skyline from the chosen spot, all round.

mod frame;
mod paint;
mod reading;
mod ways;

use super::Desk;
use crate::app::command::{Command, Commands};
use crate::app::lookout::Kept;
use crate::app::measured::{Handles, Owned};
use crate::app::scene::Scene;
use crate::app::shapes::{self, Band};
use crate::app::widgets::{bold, card, choice, figure, text};
use crate::measure::{Angle, Moment};
use crate::place::Stature;
use crate::plan::Half;
use crate::words::decimal;
use eframe::egui::{
    CursorIcon, EventFilter, Key, Modifiers, Rect, Response, Role, Sense, Stroke, StrokeKind, Ui,
    WidgetInfo, pos2, vec2,
};
use frame::{Frame, View};
use ways::Ways;

/// How fine the shapes' outline is.
const OUTLINE_STEP: Angle = Angle::from_degrees(0.5);
/// Height of the drawing, points.
const HEIGHT: f32 = 190.0;
/// Of which the ruler of azimuths takes so much.
const RULER: f32 = 24.0;

/// What it keeps between frames.
#[derive(Default)]
pub struct Strip {
    view: View,
    handles: Handles,
    /// Altitude at the upper edge, degrees: it stays while a point is dragged, so that the scale
    /// does not run away from the pointer.
    top_deg: f64,
    bands: Kept<u64, Vec<Band>>,
    ways: Kept<WaysKey, Ways>,
}

/// What the bodies' ways depend on.
#[derive(Clone, Copy, PartialEq)]
struct WaysKey {
    site: usize,
    half: Half,
    ends: (Moment, Moment),
}

impl Strip {
    /// Shows it.
    pub fn show(&mut self, ui: &mut Ui, desk: &Desk<'_>, commands: &mut Commands) {
        let Some(scene) = desk.scene else {
            return;
        };
        let look = desk.look;
        let key = WaysKey {
            site: desk.state.site_index(),
            half: scene.half,
            ends: scene.ends(),
        };
        let ways = self.ways.get(key, || Ways::new(scene));
        card(ui, look, 0.0, |ui| {
            ui.spacing_mut().item_spacing = vec2(8.0, 8.0);
            self.heading(ui, desk, scene, &ways);
            statures(ui, desk, commands);
            let (response, frame) = self.drawing(ui, desk, scene, &ways, commands);
            let said = reading::reading(desk, scene, &ways, &response, &frame);
            let line = text(ui, look, look.sizes.label, look.colours.text, &said);
            line.widget_info(|| WidgetInfo::labeled(Role::Label, true, &said));
            let measured = reading::measured(desk, &self.handles);
            text(ui, look, look.sizes.label, look.colours.lesser, &measured);
        });
    }

    /// The spot's name and the two usual stretches.
    fn heading(&mut self, ui: &mut Ui, desk: &Desk<'_>, scene: &Scene<'_>, ways: &Ways) {
        let look = desk.look;
        let title = desk
            .words
            .text_with("strip-title", &[("spot", scene.spot.name.as_str())]);
        ui.horizontal_wrapped(|ui| {
            bold(ui, look, look.sizes.control, look.colours.text, &title);
            let all_round = View::default();
            let name = desk.words.text("strip-all-round");
            if choice(ui, look, self.view == all_round, &name).clicked() {
                self.view = all_round;
            }
            let body = desk.words.body_in_sentence(scene.body);
            let name = desk
                .words
                .text_with("strip-where-it-passes", &[("body", body.as_str())]);
            let passing = ways
                .extent_deg(scene.body)
                .map(|(from, to)| View::around(from, to));
            let is_passing = passing == Some(self.view) && self.view != all_round;
            ui.add_enabled_ui(passing.is_some(), |ui| {
                if choice(ui, look, is_passing, &name).clicked() {
                    self.view = passing.unwrap_or_default();
                }
            });
        });
    }

    fn drawing(
        &mut self,
        ui: &mut Ui,
        desk: &Desk<'_>,
        scene: &Scene<'_>,
        ways: &Ways,
        commands: &mut Commands,
    ) -> (Response, Frame) {
        let size = vec2(ui.available_width(), HEIGHT);
        let (whole, response) = ui.allocate_exact_size(size, Sense::click_and_drag());
        let name = desk
            .words
            .text_with("strip-name", &[("spot", scene.spot.name.as_str())]);
        response.widget_info(|| WidgetInfo::labeled(Role::Canvas, true, &name));
        let sky = whole.with_max_y(whole.bottom() - RULER);
        if !self.handles.is_dragging() {
            self.top_deg = Frame::top_for(highest_deg(scene, ways));
        }
        let frame = Frame {
            rect: sky,
            view: self.view,
            top_deg: self.top_deg,
        };
        if !ui.is_rect_visible(whole) {
            return (response, frame);
        }
        let owned = Owned::at(desk.state.site(), desk.state.spot_index());
        let is_held =
            owned.is_some_and(|owned| self.handles.handle(ui, &response, &owned, &frame, commands));
        if response.clicked() || response.drag_started() {
            response.request_focus();
        }
        if !is_held {
            self.steer(ui, &response, &frame);
        }
        let bands = self.bands.get(scene.night_count, || {
            shapes::bands(scene.skyline, OUTLINE_STEP)
        });
        let painter = ui.painter().clone();
        paint::paint(&painter, desk, scene, &frame, ways, &bands);
        let below = Rect::from_min_max(pos2(whole.left(), sky.bottom()), whole.max);
        paint::ruler(&painter, desk, &frame, below);
        if let Some(owned) = owned {
            let inside = painter.with_clip_rect(sky.intersect(painter.clip_rect()));
            self.handles
                .paint(&inside, desk.look, &response, &owned, &frame, false);
        }
        if response.has_focus() {
            let stroke = Stroke::new(2.0, desk.look.colours.chosen);
            painter.rect_stroke(whole, 0.0, stroke, StrokeKind::Inside);
        }
        (response, frame)
    }

    /// Turning and widening by hand.
    fn steer(&mut self, ui: &Ui, response: &Response, frame: &Frame) {
        /// Of the wheel, for a view e times as wide.
        const POINTS_PER_E: f64 = 400.0;
        if response.dragged() {
            let moved_deg = f64::from(response.drag_delta().x) / frame.points_per_deg();
            self.view = self.view.steered(-moved_deg, 1.0, 0.0);
            ui.ctx().set_cursor_icon(CursorIcon::Grabbing);
        } else if response.hovered() {
            ui.ctx().set_cursor_icon(CursorIcon::Crosshair);
        }
        if let Some(pointer) = response.hover_pos() {
            // Taken out of the input, so that the column around does not move as well.
            let (wheel, pinch) = ui.input_mut(|input| {
                let wheel = std::mem::take(&mut input.smooth_scroll_delta.y);
                (f64::from(wheel), f64::from(input.zoom_delta()))
            });
            if wheel != 0.0 || pinch != 1.0 {
                let about_deg =
                    f64::from(pointer.x - frame.rect.center().x) / frame.points_per_deg();
                let widening = (-wheel / POINTS_PER_E).exp() / pinch;
                self.view = self.view.steered(0.0, widening, about_deg);
            }
        }
        self.steer_by_keys(ui, response);
    }

    fn steer_by_keys(&mut self, ui: &Ui, response: &Response) {
        const TURN_SHARE: f64 = 0.08;
        const WIDENING: f64 = 1.2;
        if !response.has_focus() {
            return;
        }
        let filter = EventFilter {
            horizontal_arrows: true,
            vertical_arrows: true,
            ..EventFilter::default()
        };
        ui.memory_mut(|memory| memory.set_focus_lock_filter(response.id, filter));
        let (turns, wider) = ui.input_mut(|input| {
            let mut pressed = |modifiers, key| {
                f64::from(u32::try_from(input.count_and_consume_key(modifiers, key)).unwrap_or(0))
            };
            let command = Modifiers::COMMAND;
            let turns = pressed(command, Key::ArrowRight) - pressed(command, Key::ArrowLeft);
            let narrower =
                pressed(Modifiers::NONE, Key::Plus) + pressed(Modifiers::NONE, Key::Equals);
            (turns, pressed(Modifiers::NONE, Key::Minus) - narrower)
        });
        if turns != 0.0 || wider != 0.0 {
            let turn_deg = turns * TURN_SHARE * self.view.width_deg;
            self.view = self.view.steered(turn_deg, WIDENING.powf(wider), 0.0);
        }
    }
}

/// How high the drawing must reach: the skyline, and the chosen body as far as it is near it.
fn highest_deg(scene: &Scene<'_>, ways: &Ways) -> f64 {
    const HIGHEST_WAY_DEG: f64 = 45.0;
    let way = ways.of(scene.body).iter();
    let way_deg = way.fold(0.0, |top: f64, point| top.max(point.altitude.degrees()));
    scene
        .skyline
        .highest()
        .degrees()
        .max(way_deg.min(HIGHEST_WAY_DEG))
}

/// Whose height: the eye's height belongs to people.
fn statures(ui: &mut Ui, desk: &Desk<'_>, commands: &mut Commands) {
    let look = desk.look;
    ui.horizontal_wrapped(|ui| {
        let font = look.font(look.sizes.label);
        figure(ui, font, look.colours.lesser, &desk.words.text("for-eye"));
        for stature in Stature::ALL {
            let command = Command::ChooseStature(stature);
            let site = desk.state.site();
            let spot = desk.state.spot();
            let height_m = site.viewpoint(spot, stature).height_m - site.ground_m(spot);
            let id = command.wording().unwrap_or_default();
            let name = desk
                .words
                .text_with(id, &[("height", decimal(height_m, 2))]);
            let response = choice(ui, look, desk.state.stature() == stature, &name);
            if response.clicked() {
                commands.push(command);
            }
        }
    });
}
