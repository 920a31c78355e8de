//! Help: the cautions in full, and what the keys do.

use crate::app::command::keys;
use crate::app::grounds::plan_keys;
use crate::app::palette::Look;
use crate::app::widgets::{bold, figure, text};
use crate::words::Words;
use eframe::egui::{Grid, ModifierNames, Ui, vec2};

/// Between the lines of the keys, points.
const LINE_HEIGHT: f32 = 16.0;

/// The cautions' wordings, in the order of reading.
const CAUTIONS: [&str; 5] = [
    "caution-caps",
    "caution-filters",
    "caution-viewers",
    "caution-finders",
    "caution-rules",
];

/// Draws it.
pub fn show(ui: &mut Ui, look: &Look, words: &Words) {
    let colours = &look.colours;
    let size = look.sizes.control;
    ui.spacing_mut().interact_size.y = LINE_HEIGHT;
    bold(
        ui,
        look,
        look.sizes.sentence,
        colours.caution,
        &words.text("cautions"),
    );
    for caution in CAUTIONS {
        text(
            ui,
            look,
            look.sizes.control,
            colours.text,
            &words.text(caution),
        );
    }
    ui.add_space(look.room.inside);
    bold(
        ui,
        look,
        look.sizes.sentence,
        colours.text,
        &words.text("keys"),
    );
    Grid::new("keys")
        .spacing(vec2(look.room.between, 6.0))
        .show(ui, |ui| {
            for (shortcut, command) in keys() {
                let name = shortcut.format(&ModifierNames::NAMES, false);
                figure(ui, look.bold(size), colours.text, &name);
                let what = words.text(command.wording().unwrap_or_default());
                figure(ui, look.font(size), colours.text, &what);
                ui.end_row();
            }
            figure(ui, look.bold(size), colours.text, &words.text("zoom-keys"));
            figure(ui, look.font(size), colours.text, &words.text("zoom"));
            ui.end_row();
            for (keys, what) in [
                ("turn-view-keys", "turn-view"),
                ("widen-view-keys", "widen-view"),
                ("move-point-keys", "move-point"),
                ("delete-point-keys", "delete-point"),
            ] {
                figure(ui, look.bold(size), colours.text, &words.text(keys));
                figure(ui, look.font(size), colours.text, &words.text(what));
                ui.end_row();
            }
        });
    ui.add_space(look.room.inside);
    bold(
        ui,
        look,
        look.sizes.sentence,
        colours.text,
        &words.text("plan-keys"),
    );
    Grid::new("plan keys")
        .spacing(vec2(look.room.between, 6.0))
        .show(ui, |ui| {
            for (keys, what) in plan_keys::HELP {
                figure(ui, look.bold(size), colours.text, &words.text(keys));
                figure(ui, look.font(size), colours.text, &words.text(what));
                ui.end_row();
            }
        });
    ui.add_space(look.room.inside);
    let notice = crate::place::zone::BORDERS_NOTICE;
    text(ui, look, look.sizes.label, colours.lesser, notice);
}
