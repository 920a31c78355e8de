//! The few controls that the window is made of, each with its accessible name.

use super::command::{Command, Commands};
use super::palette::Look;
use crate::words::Words;
use eframe::egui::{
    Align2, Button, Color32, FontId, Frame, Label, Margin, Response, RichText, Role, Stroke,
    TextEdit, Ui, WidgetInfo,
};

/// A button that runs a command, worded and hinted by the command itself.
pub fn command_button(ui: &mut Ui, words: &Words, command: Command, commands: &mut Commands) {
    let id = command.wording().unwrap_or_default();
    let response = ui
        .button(words.text(id))
        .on_hover_text(words.text(&format!("{id}-hint")));
    if response.clicked() {
        commands.push(command);
    }
}

/// A small button that shows a sign and is named in words.
pub fn sign_button(
    ui: &mut Ui,
    words: &Words,
    sign: &str,
    command: Command,
    commands: &mut Commands,
) {
    let name = words.text(command.wording().unwrap_or_default());
    let response = ui.button(sign).on_hover_text(&name);
    name_it(&response, Role::Button, &name);
    if response.clicked() {
        commands.push(command);
    }
}

/// One choice of several: outlined in the chosen colour while it is chosen.
pub fn choice(ui: &mut Ui, look: &Look, is_chosen: bool, text: &str) -> Response {
    let mut button = Button::new(text).selected(is_chosen);
    if is_chosen {
        button = button.stroke(Stroke::new(1.5, look.colours.chosen));
    }
    let response = ui.add(button);
    let enabled = ui.is_enabled();
    response.widget_info(|| WidgetInfo::selected(Role::RadioButton, enabled, is_chosen, text));
    response
}

/// A box to tick, outlined so that it is seen on a card while it is empty.
pub fn check_box(ui: &mut Ui, look: &Look, is_ticked: &mut bool, text: &str) -> Response {
    ui.scope(|ui| {
        let inactive = &mut ui.visuals_mut().widgets.inactive;
        inactive.bg_fill = look.colours.ground;
        inactive.bg_stroke = Stroke::new(1.0, look.colours.lesser);
        ui.checkbox(is_ticked, text)
    })
    .inner
}

/// Gives a control a name other than the text that it shows.
pub fn name_it(response: &Response, role: Role, name: &str) {
    response.widget_info(|| WidgetInfo::labeled(role, true, name));
}

/// A line of text to write in, under its label; an error stands below in one sentence.
pub fn field(ui: &mut Ui, look: &Look, label: &str, text: &mut String, error: Option<&str>) {
    let name = ui.label(
        RichText::new(label)
            .font(look.font(look.sizes.label))
            .color(look.colours.lesser),
    );
    ui.add(line(text).desired_width(f32::INFINITY))
        .labelled_by(name.id);
    error_line(ui, look, error);
}

/// One line to write in.
pub fn line(text: &mut String) -> TextEdit<'_> {
    TextEdit::singleline(text)
        .margin(Margin::symmetric(8, 6))
        .align(Align2::LEFT_CENTER)
}

/// A plain decimal number; a true minus is taken for a hyphen.
pub fn number(text: &str) -> Option<f64> {
    let text = text.trim().replace('−', "-");
    let is_plain = text
        .chars()
        .all(|c| c.is_ascii_digit() || matches!(c, '.' | '-' | '+'));
    text.parse()
        .ok()
        .filter(|value: &f64| is_plain && value.is_finite())
}

/// What is wrong, in one sentence, where there is anything.
pub fn error_line(ui: &mut Ui, look: &Look, error: Option<&str>) {
    if let Some(error) = error {
        let text = RichText::new(error)
            .font(look.font(look.sizes.label))
            .color(look.colours.caution);
        ui.add(Label::new(text).wrap());
    }
}

/// Lines of running text stand so far apart, in heights of the type.
const LINE: f32 = 1.3;

/// Text of a size and colour, wrapped.
pub fn text(ui: &mut Ui, look: &Look, size: f32, colour: Color32, words: &str) -> Response {
    let rich = RichText::new(words).font(look.font(size)).color(colour);
    ui.add(Label::new(rich.line_height(Some(LINE * size))).wrap())
}

/// The same in the bold face.
pub fn bold(ui: &mut Ui, look: &Look, size: f32, colour: Color32, words: &str) -> Response {
    let rich = RichText::new(words).font(look.bold(size)).color(colour);
    ui.add(Label::new(rich).wrap())
}

/// A figure or its name: on one line whatever the room.
pub fn figure(ui: &mut Ui, font: FontId, colour: Color32, words: &str) {
    let rich = RichText::new(words).font(font).color(colour);
    ui.add(Label::new(rich).extend());
}

/// A card's ground.
pub fn card_frame(look: &Look) -> Frame {
    Frame::new()
        .fill(look.colours.card)
        .stroke(Stroke::new(1.0, look.colours.line))
        .corner_radius(look.room.corner)
        .inner_margin(Margin::same(look.room.inside as i8))
}

/// A card as wide as there is room, and at least so high, so that it keeps its size while what
/// it says changes.
pub fn card<R>(
    ui: &mut Ui,
    look: &Look,
    least_height: f32,
    contents: impl FnOnce(&mut Ui) -> R,
) -> R {
    card_frame(look)
        .show(ui, |ui| {
            ui.set_width(ui.available_width());
            ui.set_min_height((least_height - 2.0 * look.room.inside).max(0.0));
            contents(ui)
        })
        .inner
}
