//! The moment shown, with its weekday and civil date, and the controls that move it.

use super::command::{Command, Commands, Speed};
use super::palette::Look;
use super::state::{Motion, State};
use super::widgets::{bold, choice, command_button, sign_button};
use super::wording::Words;
use eframe::egui::Ui;

/// The row between the view and the fade.
pub fn transport_ui(
    ui: &mut Ui,
    look: &Look,
    words: &Words,
    state: &State,
    commands: &mut Commands,
) {
    ui.horizontal_wrapped(|ui| {
        let moment = words.weekday_date_time(state.local_time());
        bold(ui, look, look.sizes.name, look.colours.text, &moment);
        ui.add_space(look.room.inside);
        for (sign, minutes) in [("◂◂", -10), ("◂", -1), ("▸", 1), ("▸▸", 10)] {
            sign_button(ui, words, sign, Command::StepMinutes(minutes), commands);
        }
        ui.add_space(look.room.inside);
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
        ui.add_space(look.room.inside);
        let is_running = matches!(state.motion(), Motion::Running(_));
        let command = if is_running {
            Command::Stop
        } else {
            Command::LetItRun(state.speed())
        };
        command_button(ui, words, command, commands);
        for speed in Speed::ALL {
            let minutes = speed.minutes_per_second().to_string();
            let name = words.text_with("speed", &[("minutes", &minutes)]);
            let is_chosen = state.motion() == Motion::Running(speed);
            if choice(ui, look, is_chosen, &name).clicked() {
                commands.push(Command::LetItRun(speed));
            }
        }
    });
}
