//! Each instrument of the kit and the spot that it stands at.

use crate::app::command::{Command, Commands};
use crate::app::grounds::Desk;
use crate::app::widgets::{figure, name_it};
use eframe::egui::containers::menu::MenuButton;
use eframe::egui::{Role, ScrollArea, Ui};

/// One menu to each instrument.
pub fn menus(ui: &mut Ui, desk: &Desk<'_>, commands: &mut Commands) {
    let kit = &desk.state.site().kit;
    if kit.is_empty() {
        return;
    }
    let look = desk.look;
    ui.horizontal_wrapped(|ui| {
        let font = look.font(look.sizes.label);
        figure(
            ui,
            font,
            look.colours.lesser,
            &desk.words.text("kit-stands"),
        );
        for index in 0..kit.len() {
            menu(ui, desk, index, commands);
        }
    });
}

fn menu(ui: &mut Ui, desk: &Desk<'_>, index: usize, commands: &mut Commands) {
    let (words, site) = (desk.words, desk.state.site());
    let instrument = &site.kit[index];
    let nowhere = words.text("kit-nowhere");
    let shown = instrument.spot().unwrap_or(&nowhere);
    let arguments = [("instrument", instrument.label()), ("spot", shown)];
    let name = words.text_with("kit-at", &arguments);
    let (button, _) = MenuButton::new(format!("{name} ▾")).ui(ui, |ui| {
        ui.set_min_width(180.0);
        ui.spacing_mut().button_padding.x = 8.0;
        ScrollArea::vertical().max_height(260.0).show(ui, |ui| {
            let spots = site.spots.iter().map(|spot| Some(spot.name.as_str()));
            for place in std::iter::once(None).chain(spots) {
                let is_chosen = instrument.spot() == place;
                let line = place.unwrap_or(&nowhere);
                if ui.selectable_label(is_chosen, line).clicked() {
                    let mut site = site.clone();
                    site.kit[index].set_spot(place.map(str::to_owned));
                    commands.push(Command::EditSite(Box::new(site)));
                    ui.close();
                }
            }
        });
    });
    name_it(
        &button,
        Role::Button,
        &words.text_with("kit-menu", &arguments),
    );
}
