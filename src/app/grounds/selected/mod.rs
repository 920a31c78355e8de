//! What is known of the thing selected on the plan, in exact numbers; of the site where nothing
//! is.

mod form;
mod obstacle;
mod place;
mod site;
mod spot;

use super::plan::{self, Plan, things};
use super::{Desk, Selection};
use crate::app::command::Commands;
use crate::app::palette::Look;
use crate::app::widgets::{bold, card};
use crate::place::{Obstacle, Site};
use eframe::egui::{Align, Layout, Ui};
use form::{Field, Form};

/// What it keeps between frames.
#[derive(Default)]
pub struct Selected {
    form: Form,
    place: place::Shown,
}

impl Selected {
    /// Shows it.
    pub fn show(
        &mut self,
        ui: &mut Ui,
        desk: &Desk<'_>,
        selection: &mut Option<Selection>,
        plan: &mut Plan,
        commands: &mut Commands,
    ) {
        card(ui, desk.look, 0.0, |ui| {
            ui.spacing_mut().item_spacing.y = 8.0;
            head(ui, desk, selection, commands);
            let site = desk.state.site();
            match *selection {
                None => {
                    site::show(ui, desk, &mut self.form, plan, commands);
                }
                Some(thing @ Selection::Spot(index)) => {
                    spot::show(ui, desk, &mut self.form, index, commands);
                    self.place.show(ui, desk, &mut self.form, thing, commands);
                }
                Some(thing @ Selection::Obstacle(index)) => {
                    obstacle::show(ui, desk, &mut self.form, index, commands);
                    self.place.show(ui, desk, &mut self.form, thing, commands);
                }
                Some(thing @ Selection::Exclusion(index)) => {
                    let of = format!("excluded {index}");
                    let field = Field::new("field-label", &of);
                    let label = thing.label(site).unwrap_or_default();
                    let change = |site: &mut Site, label: String| {
                        if let Some(area) = site.excluded.get_mut(index) {
                            area.label = label;
                        }
                    };
                    self.form
                        .read(ui, desk, commands, field, (label, ""), name, change);
                    self.place.show(ui, desk, &mut self.form, thing, commands);
                }
                Some(Selection::Outline) => {
                    self.place
                        .show(ui, desk, &mut self.form, Selection::Outline, commands);
                }
            }
        });
    }
}

/// What it is, with the buttons that copy and delete it.
fn head(ui: &mut Ui, desk: &Desk<'_>, selection: &mut Option<Selection>, commands: &mut Commands) {
    let look: &Look = desk.look;
    let site = desk.state.site();
    ui.horizontal(|ui| {
        let title = desk.words.text(title(site, *selection));
        ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
            if let Some(thing) = *selection {
                let is_last = matches!(thing, Selection::Spot(_)) && site.spots.len() < 2;
                ui.add_enabled_ui(!is_last, |ui| {
                    let id = if is_last {
                        "delete-last-spot"
                    } else {
                        "delete-hint"
                    };
                    let delete = ui.button(desk.words.text("delete"));
                    let delete = delete
                        .on_hover_text(desk.words.text(id))
                        .on_disabled_hover_text(desk.words.text(id));
                    if delete.clicked() {
                        plan::remove(thing, selection, desk, commands);
                    }
                });
                if thing != Selection::Outline {
                    let hint = desk.words.text("duplicate-hint");
                    let button = ui.button(desk.words.text("duplicate")).on_hover_text(hint);
                    if button.clicked() {
                        plan::duplicate(thing, selection, desk, commands);
                    }
                }
            }
            ui.with_layout(Layout::left_to_right(Align::Center), |ui| {
                bold(ui, look, look.sizes.sentence, look.colours.text, &title);
            });
        });
    });
}

fn title(site: &Site, selection: Option<Selection>) -> &'static str {
    match selection {
        None => "selected-none",
        Some(Selection::Spot(_)) => "tool-spot",
        Some(Selection::Exclusion(_)) => "tool-excluded",
        Some(Selection::Outline) => "selected-outline",
        Some(Selection::Obstacle(index)) => match site.obstacles.get(index) {
            Some(Obstacle::Tree { .. }) => "tool-tree",
            Some(Obstacle::Building { .. }) => "tool-building",
            Some(Obstacle::Wall { .. }) => "tool-wall",
            Some(Obstacle::Pole { .. }) => "tool-pole",
            Some(Obstacle::Shape { .. }) | None => "tool-shape",
        },
    }
}

/// A name as written, without room around it.
fn name(text: &str) -> Result<String, &'static str> {
    let name = text.trim();
    if name.is_empty() {
        Err("label-error")
    } else {
        Ok(name.to_owned())
    }
}

/// So many columns of fields side by side.
fn row<const N: usize>(ui: &mut Ui, mut draw: impl FnMut(usize, &mut Ui)) {
    ui.columns_const::<N, _>(|columns| {
        for (index, ui) in columns.iter_mut().enumerate() {
            draw(index, ui);
        }
    });
}

/// Whether the thing is one of the site's: what is selected may just have gone.
fn exists(site: &Site, thing: Selection) -> bool {
    things::all(site).contains(&thing)
}
