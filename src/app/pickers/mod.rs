//! The row that chooses what is shown: site and spot, date, half, body, eye, air.

mod date;

use super::area::Area;
use super::command::{Command, Commands};
use super::palette::Look;
use super::state::State;
use super::widgets::{choice, command_button, figure, name_it, text};
use crate::light::Eye;
use crate::place::{Haze, Spot};
use crate::plan::Half;
use crate::sky::Body;
use crate::words::{Words, decimal};
use eframe::egui::containers::menu::MenuButton;
use eframe::egui::{Button, Color32, Role, ScrollArea, Stroke, TextStyle, Ui, vec2};

/// The whole row; it wraps where there is no room.
pub fn picker_row(ui: &mut Ui, look: &Look, words: &Words, state: &State, commands: &mut Commands) {
    ui.horizontal_wrapped(|ui| {
        site_picker(ui, look, words, state, commands);
        date::date_picker(ui, look, words, state, commands);
        ui.add_space(4.0);
        for half in [Half::Dusk, Half::Dawn] {
            let command = Command::ChooseHalf(half);
            let name = words.text(command.wording().unwrap_or_default());
            if choice(ui, look, state.half() == half, &name).clicked() {
                commands.push(command);
            }
        }
        ui.add_space(4.0);
        for body in Body::BRIGHT {
            let name = words.body(body);
            if choice(ui, look, state.body() == body, &name).clicked() {
                commands.push(Command::ChooseBody(body));
            }
        }
        ui.add_space(4.0);
        eye_picker(ui, look, words, state, commands);
        air_picker(ui, look, words, state, commands);
    });
}

/// Whose eye: a menu with a word on each. The button carries the word before it in its name.
fn eye_picker(ui: &mut Ui, look: &Look, words: &Words, state: &State, commands: &mut Commands) {
    let name = |eye| words.text(Command::ChooseEye(eye).wording().unwrap_or_default());
    let shown = name(state.eye());
    let font = look.font(look.sizes.label);
    figure(ui, font, look.colours.lesser, &words.text("for-eye"));
    let button = Button::new(format!("{shown} ▾")).stroke(Stroke::new(1.5, look.colours.chosen));
    let (button, _) = MenuButton::from_button(button).ui(ui, |ui| {
        ui.set_min_width(300.0);
        ui.spacing_mut().button_padding.x = 8.0;
        for eye in Eye::ALL {
            let command = Command::ChooseEye(eye);
            let hint = words.text(&format!("{}-hint", command.wording().unwrap_or_default()));
            let response = ui.selectable_label(eye == state.eye(), name(eye));
            text(ui, look, look.sizes.label, look.colours.lesser, &hint);
            if response.on_hover_text(&hint).clicked() {
                commands.push(command);
                ui.close();
            }
        }
    });
    name_it(
        &button,
        Role::Button,
        &words.text_with::<&str>("eye-picker", &[("eye", &shown)]),
    );
}

/// How hazy the air is: a menu with the extinction that each word stands for at this site.
fn air_picker(ui: &mut Ui, look: &Look, words: &Words, state: &State, commands: &mut Commands) {
    let name = |haze| words.text(Command::ChooseHaze(haze).wording().unwrap_or_default());
    let shown = name(state.haze());
    let font = look.font(look.sizes.label);
    figure(ui, font, look.colours.lesser, &words.text("in-air"));
    let (button, _) = MenuButton::new(format!("{shown} ▾")).ui(ui, |ui| {
        ui.set_min_width(220.0);
        ui.spacing_mut().button_padding.x = 8.0;
        let words_of_haze = Haze::ALL.into_iter().map(Some);
        for haze in std::iter::once(None).chain(words_of_haze) {
            let site = haze.map(|haze| state.site().with_haze(haze));
            let extinction = site.as_ref().unwrap_or_else(|| state.site()).extinction();
            let line = words.text_with::<&str>(
                "air-line",
                &[
                    ("word", &name(haze)),
                    ("extinction", &decimal(extinction.total_mag(), 2)),
                ],
            );
            if ui.selectable_label(haze == state.haze(), line).clicked() {
                commands.push(Command::ChooseHaze(haze));
                ui.close();
            }
        }
    });
    name_it(
        &button,
        Role::Button,
        &words.text_with::<&str>("air-picker", &[("air", &shown)]),
    );
}

fn site_picker(ui: &mut Ui, look: &Look, words: &Words, state: &State, commands: &mut Commands) {
    let naming = |spot: &Spot| {
        let names = [("site", &*state.site().name), ("spot", &*spot.name)];
        words.text_with::<&str>("site-and-spot", &names)
    };
    let shown = naming(state.spot());
    let button = Button::new(format!("{shown} ▾"));
    let button = if state.area == Area::Grounds {
        // As wide for every spot: a press on the plan chooses one, and the plan must not move.
        let captions = state
            .site()
            .spots
            .iter()
            .map(|spot| format!("{} ▾", naming(spot)));
        button.min_size(vec2(widest(ui, captions), 0.0))
    } else {
        button
    };
    let (button, _) = MenuButton::from_button(button).ui(ui, |ui| {
        ui.set_min_width(240.0);
        ui.spacing_mut().button_padding.x = 8.0;
        ScrollArea::vertical().max_height(320.0).show(ui, |ui| {
            for (index, known) in state.sites().list().iter().enumerate() {
                let is_chosen = index == state.site_index();
                if ui.selectable_label(is_chosen, &known.site.name).clicked() {
                    commands.push(Command::ChooseSite(index));
                    ui.close();
                }
            }
            if state.site().spots.len() > 1 {
                ui.separator();
                text(
                    ui,
                    look,
                    look.sizes.label,
                    look.colours.lesser,
                    &words.text("spots"),
                );
                for (index, spot) in state.site().spots.iter().enumerate() {
                    let is_chosen = index == state.spot_index();
                    if ui.selectable_label(is_chosen, &spot.name).clicked() {
                        commands.push(Command::ChooseSpot(index));
                        ui.close();
                    }
                }
            }
        });
        ui.separator();
        command_button(ui, words, Command::NewSite, commands);
        command_button(ui, words, Command::FindSiteFile, commands);
    });
    name_it(
        &button,
        Role::Button,
        &words.text_with::<&str>("site-picker", &[("shown", &shown)]),
    );
}

/// The width of a button that holds any of the captions.
fn widest(ui: &Ui, captions: impl Iterator<Item = String>) -> f32 {
    let font = TextStyle::Button.resolve(ui.style());
    let width = |caption| {
        let galley = ui
            .painter()
            .layout_no_wrap(caption, font.clone(), Color32::WHITE);
        galley.size().x
    };
    captions.map(width).fold(0.0, f32::max) + 2.0 * ui.spacing().button_padding.x
}
