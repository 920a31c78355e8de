//! The moment shown, with its weekday and civil date, and the controls that move it.

use super::command::{Command, Commands, Speed};
use super::palette::Look;
use super::state::{Motion, State};
use super::widgets::{bold, choice, command_button, sign_button, text};
use crate::words::Words;
use eframe::egui::{Role, Ui, WidgetInfo};

/// The row between the view and the fade.
pub fn transport_ui(
    ui: &mut Ui,
    look: &Look,
    words: &Words,
    state: &State,
    commands: &mut Commands,
) {
    ui.horizontal_wrapped(|ui| {
        let local = state.local_time();
        let (date, time) = (
            words.weekday_date(local.date()),
            words.clock_time(local.time()),
        );
        bold(ui, look, look.sizes.sentence, look.colours.text, &date);
        bold(ui, look, look.sizes.name, look.colours.text, &time);
        ui.add_space(look.room.inside);
        ui.scope(|ui| {
            ui.spacing_mut().item_spacing.x = 3.0;
            for (sign, minutes) in [("◂◂", -10), ("◂", -1), ("▸", 1), ("▸▸", 10)] {
                sign_button(ui, words, sign, Command::StepMinutes(minutes), commands);
            }
        });
        command_button(ui, words, Command::GoToBest, commands);
        let is_following = state.motion() == Motion::Following;
        let this_minute = choice(ui, look, is_following, &words.text("this-minute"))
            .on_hover_text(words.text("this-minute-hint"));
        if this_minute.clicked() {
            commands.push(if is_following {
                Command::Stop
            } else {
                Command::ThisMinute
            });
        }
        ui.add_space(4.0);
        speeds_ui(ui, look, words, state, commands);
    });
}

/// The speeds; the one that runs is chosen, and pressed again it stops.
fn speeds_ui(ui: &mut Ui, look: &Look, words: &Words, state: &State, commands: &mut Commands) {
    let (size, colour) = (look.sizes.label, look.colours.lesser);
    text(ui, look, size, colour, &words.text("let-it-run"))
        .on_hover_text(words.text("let-it-run-hint"));
    ui.scope(|ui| {
        ui.spacing_mut().item_spacing.x = 3.0;
        for speed in Speed::ALL {
            let minutes = speed.minutes_per_second();
            let is_running = state.motion() == Motion::Running(speed);
            let response = choice(ui, look, is_running, &minutes.to_string());
            let name = words.text_with("speed", &[("minutes", minutes)]);
            let enabled = ui.is_enabled();
            response.widget_info(|| WidgetInfo::selected(Role::Button, enabled, is_running, &name));
            if response.on_hover_text(name).clicked() {
                commands.push(if is_running {
                    Command::Stop
                } else {
                    Command::LetItRun(speed)
                });
            }
        }
    });
    text(ui, look, size, colour, &words.text("speed-unit"));
}
