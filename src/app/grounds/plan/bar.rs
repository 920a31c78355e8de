//! The tools above the plan.

use super::{BAR_GAP, Plan, Tool};
use crate::app::command::{Command, Commands};
use crate::app::grounds::Desk;
use crate::app::widgets::{check_box, choice, command_button, name_it};
use eframe::egui::{Role, Ui};

impl Plan {
    /// Tools first, then what changes the view and takes changes back.
    pub(super) fn bar(&mut self, ui: &mut Ui, desk: &Desk<'_>, commands: &mut Commands) {
        ui.spacing_mut().item_spacing.y = BAR_GAP.y;
        ui.horizontal_wrapped(|ui| {
            ui.spacing_mut().item_spacing = BAR_GAP;
            for tool in Tool::ALL {
                let name = desk.words.text(tool.wording());
                let hint = desk.words.text(&format!("{}-hint", tool.wording()));
                let key = tool.key().map_or("", |key| key.symbol_or_name());
                let hint = desk
                    .words
                    .text_with::<&str>("hint-with-key", &[("hint", &hint), ("key", key)]);
                let response = choice(ui, desk.look, self.tool == tool, &name);
                if response.on_hover_text(hint).clicked() {
                    self.take(tool);
                }
            }
        });
        ui.horizontal_wrapped(|ui| {
            ui.spacing_mut().item_spacing = BAR_GAP;
            for (command, is_possible) in [
                (Command::Undo, desk.state.can_undo()),
                (Command::Redo, desk.state.can_redo()),
            ] {
                ui.add_enabled_ui(is_possible, |ui| {
                    command_button(ui, desk.words, command, commands);
                });
            }
            ui.add_space(6.0);
            for (sign, id, times) in [("−", "plan-farther", 0.8), ("+", "plan-nearer", 1.25)] {
                let name = desk.words.text(id);
                let response = ui.button(sign).on_hover_text(&name);
                name_it(&response, Role::Button, &name);
                if response.clicked()
                    && let Some(view) = &mut self.view
                {
                    view.points_per_m = (view.points_per_m * times).clamp(0.02, 400.0);
                }
            }
            let everything = desk.words.text("plan-everything");
            let hint = desk.words.text("plan-everything-hint");
            if ui.button(everything).on_hover_text(hint).clicked() {
                self.view = None;
            }
            let hint = desk.words.text("plan-snaps-hint");
            let name = desk.words.text("plan-snaps");
            check_box(ui, desk.look, &mut self.snaps, &name).on_hover_text(hint);
        });
    }
}
