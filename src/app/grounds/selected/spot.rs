//! A spot: its name, its eye, its patch, and which instruments stand there.

use super::{Field, Form, name, row};
use crate::app::command::{Command, Commands};
use crate::app::grounds::Desk;
use crate::app::widgets::{check_box, text};
use crate::place::{Site, Spot};
use eframe::egui::Ui;

pub fn show(ui: &mut Ui, desk: &Desk<'_>, form: &mut Form, index: usize, commands: &mut Commands) {
    let site = desk.state.site();
    let Some(spot) = site.spots.get(index) else {
        return;
    };
    let of = format!("spot {index}");
    let field = |label| Field::new(label, &of);
    form.read(
        ui,
        desk,
        commands,
        field("field-name"),
        (&spot.name, ""),
        name,
        |site, name| rename(site, index, name),
    );
    let with = move |change: fn(&mut Spot, Option<f64>)| {
        move |site: &mut Site, value: Option<f64>| {
            if let Some(spot) = site.spots.get_mut(index) {
                change(spot, value);
            }
        }
    };
    row::<3>(ui, |column, ui| match column {
        0 => form.number(
            ui,
            desk,
            commands,
            field("field-eye-height"),
            spot.eye_height_m,
            |site, eye_m| {
                if let Some(spot) = site.spots.get_mut(index) {
                    spot.eye_height_m = eye_m;
                }
            },
        ),
        1 => form.optional(
            ui,
            desk,
            commands,
            (field("field-patch"), &desk.words.text("patch-none")),
            spot.radius_m,
            with(|spot, radius_m| spot.radius_m = radius_m),
        ),
        _ => form.optional(
            ui,
            desk,
            commands,
            (field("field-base"), &desk.words.text("base-as-slopes")),
            spot.base_m,
            with(|spot, base_m| spot.base_m = base_m),
        ),
    });
    kit(ui, desk, spot, commands);
}

/// Another name; instruments that stand there stay there.
fn rename(site: &mut Site, index: usize, name: String) {
    let Some(spot) = site.spots.get_mut(index) else {
        return;
    };
    let before = std::mem::replace(&mut spot.name, name.clone());
    for instrument in &mut site.kit {
        if instrument.spot() == Some(before.as_str()) {
            instrument.set_spot(Some(name.clone()));
        }
    }
}

/// A box to tick for every instrument of the site.
fn kit(ui: &mut Ui, desk: &Desk<'_>, spot: &Spot, commands: &mut Commands) {
    let (site, look) = (desk.state.site(), desk.look);
    if site.kit.is_empty() {
        return;
    }
    let title = desk.words.text("kit-here");
    text(ui, look, look.sizes.label, look.colours.lesser, &title);
    for (index, instrument) in site.kit.iter().enumerate() {
        let was_here = instrument.spot() == Some(spot.name.as_str());
        let mut is_here = was_here;
        let label = match instrument.spot().filter(|_| !was_here) {
            Some(other) => desk.words.text_with::<&str>(
                "kit-elsewhere",
                &[("instrument", instrument.label()), ("spot", other)],
            ),
            None => instrument.label().to_owned(),
        };
        check_box(ui, look, &mut is_here, &label);
        if is_here != was_here {
            let mut site = site.clone();
            site.kit[index].set_spot(is_here.then(|| spot.name.clone()));
            commands.push(Command::EditSite(Box::new(site)));
        }
    }
}
