//! The keys of the plan while it has the focus.

use super::camera::Camera;
use super::geometry::{minus, plus, rounded};
use super::tools::Takes;
use super::{Plan, Tool, duplicate, remove, select, things};
use crate::app::command::{Command, Commands};
use crate::app::grounds::{Desk, Selection};
use crate::place::PlanPoint;
use eframe::egui::{EventFilter, FocusDirection, Id, Key, Modifiers, Ui, vec2};

/// The arrows, each with its direction east and north.
const ARROWS: [(Key, f64, f64); 4] = [
    (Key::ArrowLeft, -1.0, 0.0),
    (Key::ArrowRight, 1.0, 0.0),
    (Key::ArrowUp, 0.0, 1.0),
    (Key::ArrowDown, 0.0, -1.0),
];

/// Less than the cross's smallest step.
const NEAR_M: f64 = 0.05;

/// What the help says of them: keys and what they do.
pub const HELP: [(&str, &str); 12] = [
    ("plan-keys-tools", "plan-keys-tools-do"),
    ("plan-keys-more-tools", "plan-keys-more-tools-do"),
    ("plan-keys-tab", "plan-keys-tab-do"),
    ("plan-keys-arrows", "plan-keys-arrows-do"),
    ("plan-keys-cross", "plan-keys-cross-do"),
    ("plan-keys-set", "plan-keys-set-do"),
    ("plan-keys-finish", "plan-keys-finish-do"),
    ("plan-keys-delete", "plan-keys-delete-do"),
    ("plan-keys-duplicate", "plan-keys-duplicate-do"),
    ("plan-keys-zoom", "plan-keys-zoom-do"),
    ("plan-keys-escape", "plan-keys-escape-do"),
    ("plan-keys-alt", "plan-keys-alt-do"),
];

/// The plan's own id: whoever holds the focus under it gets the keys.
pub fn id() -> Id {
    Id::unique("plan of the site")
}

/// Whether the plan itself uses a key, which then does nothing else while it has the focus.
pub fn is_used(key: Key, modifiers: Modifiers) -> bool {
    let is_arrow = ARROWS.iter().any(|(arrow, ..)| *arrow == key);
    is_arrow && !modifiers.command || key == Key::Space
}

impl Plan {
    pub(super) fn keys(
        &mut self,
        ui: &Ui,
        camera: Camera,
        desk: &Desk<'_>,
        selection: &mut Option<Selection>,
        commands: &mut Commands,
    ) {
        if ui.memory(|memory| memory.has_focus(id())) {
            let filter = EventFilter {
                tab: true,
                horizontal_arrows: true,
                vertical_arrows: true,
                escape: true,
            };
            ui.memory_mut(|memory| memory.set_focus_lock_filter(id(), filter));
            self.choose_by_key(ui, camera, desk, selection, commands);
            self.draw_by_key(ui, desk, selection, commands);
            self.arrows(ui, camera, desk, *selection, commands);
        }
        let is_down = ui.input(|input| ARROWS.iter().any(|(arrow, ..)| input.key_down(*arrow)));
        if self.is_nudging && !is_down {
            self.is_nudging = false;
            commands.push(Command::EndDrag);
        }
    }

    /// Tools, things and the view.
    fn choose_by_key(
        &mut self,
        ui: &Ui,
        camera: Camera,
        desk: &Desk<'_>,
        selection: &mut Option<Selection>,
        commands: &mut Commands,
    ) {
        let pressed = |modifiers, key| ui.input_mut(|input| input.consume_key(modifiers, key));
        for tool in Tool::ALL {
            if tool.key().is_some_and(|key| pressed(Modifiers::NONE, key)) {
                self.take(tool);
                if tool != Tool::Select {
                    let step_m = camera.grid_m();
                    self.cross = Some(rounded(camera.view.centre, step_m.min(1.0)));
                }
            }
        }
        // The one with Shift first: without it, Shift would be passed over.
        if pressed(Modifiers::SHIFT, Key::Tab) {
            self.go_on(ui, desk, selection, commands, true);
        } else if pressed(Modifiers::NONE, Key::Tab) {
            self.go_on(ui, desk, selection, commands, false);
        }
        if pressed(Modifiers::NONE, Key::Minus) {
            self.view = Some(camera.zoomed(camera.rect.center(), 0.8));
        }
        if pressed(Modifiers::NONE, Key::Plus) || pressed(Modifiers::NONE, Key::Equals) {
            self.view = Some(camera.zoomed(camera.rect.center(), 1.25));
        }
        if pressed(Modifiers::NONE, Key::E) {
            self.view = None;
        }
        if pressed(Modifiers::COMMAND, Key::D)
            && let Some(thing) = *selection
        {
            duplicate(thing, selection, desk, commands);
        }
        if pressed(Modifiers::NONE, Key::Escape) {
            self.give_up(ui, desk, selection, commands);
        }
    }

    /// One step back out of whatever is going on.
    fn give_up(
        &mut self,
        ui: &Ui,
        desk: &Desk<'_>,
        selection: &mut Option<Selection>,
        commands: &mut Commands,
    ) {
        self.read_refusal = desk.state.refusal().map(str::to_owned);
        if let Some(drag) = self.drag.take() {
            commands.push(Command::DragSite(Box::new(drag.before)));
            commands.push(Command::EndDrag);
        } else if !self.points.is_empty() || self.drawn_from.is_some() {
            let tool = self.tool;
            self.take(tool);
        } else if self.tool != Tool::Select {
            self.take(Tool::Select);
        } else if selection.is_some() {
            *selection = None;
        } else {
            ui.memory_mut(|memory| memory.surrender_focus(id()));
        }
    }

    /// Selects the next thing, or the one before; past the last, the focus goes on.
    fn go_on(
        &mut self,
        ui: &Ui,
        desk: &Desk<'_>,
        selection: &mut Option<Selection>,
        commands: &mut Commands,
        is_back: bool,
    ) {
        let mut all = things::all(desk.state.site());
        if is_back {
            all.reverse();
        }
        let index = selection.and_then(|thing| all.iter().position(|other| *other == thing));
        let next = all.get(index.map_or(0, |index| index + 1)).copied();
        let leaves = next.is_none() || (is_back && selection.is_none());
        if leaves || self.tool != Tool::Select {
            *selection = None;
            let direction = if is_back {
                FocusDirection::Previous
            } else {
                FocusDirection::Next
            };
            ui.memory_mut(|memory| memory.move_focus(direction));
        } else {
            select(selection, next, desk, commands);
        }
    }

    /// Setting points, finishing, deleting.
    fn draw_by_key(
        &mut self,
        ui: &Ui,
        desk: &Desk<'_>,
        selection: &mut Option<Selection>,
        commands: &mut Commands,
    ) {
        let pressed = |key| ui.input_mut(|input| input.consume_key(Modifiers::NONE, key));
        let (space, enter) = (pressed(Key::Space), pressed(Key::Enter));
        let takes = self.tool.takes();
        let is_one = matches!(takes, Takes::Point | Takes::Circle);
        if let Some(at) = self.cross.filter(|_| space || (enter && is_one)) {
            // Keys go by tenths of a metre however small the plan is shown.
            if self.set_point(at, NEAR_M) {
                self.finish(desk, selection, false, commands);
            }
        } else if enter && matches!(takes, Takes::Line | Takes::Corners) {
            self.finish(desk, selection, false, commands);
        }
        let deletes = pressed(Key::Delete) || pressed(Key::Backspace);
        if deletes
            && self.points.pop().is_none()
            && let Some(thing) = *selection
        {
            self.read_refusal = None;
            remove(thing, selection, desk, commands);
        }
    }

    /// With a drawing tool, the cross; else the thing selected; else the view.
    fn arrows(
        &mut self,
        ui: &Ui,
        camera: Camera,
        desk: &Desk<'_>,
        selection: Option<Selection>,
        commands: &mut Commands,
    ) {
        /// Of the view, for one press.
        const PAN: f32 = 60.0;
        let mut steps = PlanPoint::new(0.0, 0.0);
        let modifiers = ui.input(|input| input.modifiers);
        let mut is_pressed = false;
        for (arrow, east, north) in ARROWS {
            let count = ui.input_mut(|input| {
                input.count_and_consume_key(Modifiers::SHIFT, arrow)
                    + input.count_and_consume_key(Modifiers::ALT, arrow)
                    + input.count_and_consume_key(Modifiers::NONE, arrow)
            });
            is_pressed |= count > 0;
            steps = plus(steps, PlanPoint::new(east, north), count as f64);
        }
        if !is_pressed {
            return;
        }
        if self.tool != Tool::Select {
            let step_m = match (modifiers.shift, modifiers.alt) {
                (true, _) => 10.0,
                (_, true) => 0.1,
                _ => 1.0,
            };
            let pointed = self.snapped.as_ref().map(|snapped| snapped.at);
            let from = self.cross.or(pointed).unwrap_or(camera.view.centre);
            let to = rounded(plus(from, steps, step_m), 0.1);
            self.cross = Some(to);
            // What is out of sight cannot be set with care.
            if !camera.rect.shrink(20.0).contains(camera.to_screen(to)) {
                let view = camera.view;
                self.view = Some(super::View {
                    centre: plus(view.centre, minus(to, from), 1.0),
                    ..view
                });
            }
        } else if let Some(thing) = selection {
            let step_m = if modifiers.shift { 1.0 } else { 0.1 };
            let by = plus(PlanPoint::new(0.0, 0.0), steps, step_m);
            let mut site = desk.state.site().clone();
            let points: Vec<PlanPoint> = thing
                .points(&site)
                .iter()
                .map(|at| rounded(plus(*at, by, 1.0), 0.001))
                .collect();
            thing.set_points(&mut site, &points);
            self.is_nudging = true;
            self.change(site, commands);
        } else {
            let by = vec2(-steps.east_m as f32, steps.north_m as f32) * PAN;
            self.view = Some(camera.panned(by));
        }
    }
}
