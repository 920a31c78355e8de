//! What belongs to the whole site: its slope, its people, the terrain, the picture under the plan.

use super::place::away;
use super::{Field, Form, row};
use crate::app::command::{Command, Commands};
use crate::app::grounds::Desk;
use crate::app::grounds::plan::{Plan, Tool};
use crate::app::widgets::{bold, choice, command_button, error_line, text};
use crate::place::{Backdrop, PicturePoint, Site};
use eframe::egui::{Slider, Ui};
use std::path::PathBuf;

const OF: &str = "site";

fn field(label: &str) -> Field<'_> {
    Field::new(label, OF)
}

pub fn show(
    ui: &mut Ui,
    desk: &Desk<'_>,
    form: &mut Form,
    plan: &mut Plan,
    commands: &mut Commands,
) {
    let (site, look) = (desk.state.site(), desk.look);
    let note = desk.words.text("selected-none-note");
    text(ui, look, look.sizes.label, look.colours.lesser, &note);
    row::<3>(ui, |column, ui| match column {
        0 => {
            let value = site.slope.east_percent;
            form.number(
                ui,
                desk,
                commands,
                field("field-slope-east"),
                value,
                |s, v| {
                    s.slope.east_percent = v;
                },
            );
        }
        1 => {
            let value = site.slope.north_percent;
            form.number(
                ui,
                desk,
                commands,
                field("field-slope-north"),
                value,
                |s, v| {
                    s.slope.north_percent = v;
                },
            );
        }
        _ => {
            let value = site.blocking_density;
            form.number(ui, desk, commands, field("field-density"), value, |s, v| {
                s.blocking_density = v;
            });
        }
    });
    row::<3>(ui, |column, ui| {
        let (label, value, change): (_, _, fn(&mut Site, f64)) = match column {
            0 => ("field-adult", site.people.adult_m, Site::set_adult_eye_m),
            1 => ("field-child", site.people.child_m, |s, v| {
                s.people.child_m = v
            }),
            _ => ("field-wheelchair", site.people.wheelchair_m, |s, v| {
                s.people.wheelchair_m = v;
            }),
        };
        form.number(ui, desk, commands, field(label), value, change);
    });
    row::<2>(ui, |column, ui| {
        if column == 0 {
            let shown = site.terrain.as_ref().map(|path| path.to_string_lossy());
            let shown = shown.as_deref().unwrap_or_default();
            let none = desk.words.text("terrain-none");
            let read = |text: &str| -> Result<Option<PathBuf>, &'static str> {
                let text = text.trim();
                Ok((!text.is_empty()).then(|| PathBuf::from(text)))
            };
            let label = field("field-terrain");
            form.read(
                ui,
                desk,
                commands,
                label,
                (shown, &none),
                read,
                |s, path| {
                    s.terrain = path;
                },
            );
        } else {
            let value = site.terrain_k;
            form.number(
                ui,
                desk,
                commands,
                field("field-terrain-k"),
                value,
                |s, v| {
                    s.terrain_k = v;
                },
            );
        }
    });
    backdrop(ui, desk, form, plan, commands);
}

/// The picture under the plan, and the two points that place it.
fn backdrop(
    ui: &mut Ui,
    desk: &Desk<'_>,
    form: &mut Form,
    plan: &mut Plan,
    commands: &mut Commands,
) {
    let (look, words) = (desk.look, desk.words);
    let title = words.text("backdrop");
    bold(ui, look, look.sizes.control, look.colours.text, &title);
    let Some(backdrop) = &desk.state.site().backdrop else {
        command_button(ui, words, Command::FindBackdrop, commands);
        return;
    };
    let file = backdrop.picture.to_string_lossy();
    text(ui, look, look.sizes.label, look.colours.lesser, &file);
    error_line(ui, look, plan.underlay.flaw(words).as_deref());
    ui.horizontal_wrapped(|ui| {
        command_button(ui, words, Command::FindBackdrop, commands);
        let hint = words.text("backdrop-remove-hint");
        if ui
            .button(words.text("backdrop-remove"))
            .on_hover_text(hint)
            .clicked()
        {
            let mut site = desk.state.site().clone();
            site.backdrop = None;
            commands.push(Command::EditSite(Box::new(site)));
        }
        let slider = Slider::new(&mut plan.underlay.opacity, 0.0..=1.0).show_value(false);
        // Else the slider's rail has the card's own colour.
        ui.visuals_mut().widgets.inactive.bg_fill = look.colours.lesser;
        ui.add(slider.text(words.text("backdrop-opacity")));
    });
    let note = words.text("backdrop-note");
    text(ui, look, look.sizes.label, look.colours.lesser, &note);
    known_point(ui, desk, form, (plan, Tool::FirstPicturePoint), commands);
    known_point(ui, desk, form, (plan, Tool::SecondPicturePoint), commands);
    between(ui, desk, form, backdrop, commands);
}

/// One known point: a button to point it out, and where it lies.
fn known_point(
    ui: &mut Ui,
    desk: &Desk<'_>,
    form: &mut Form,
    (plan, tool): (&mut Plan, Tool),
    commands: &mut Commands,
) {
    let Some(backdrop) = &desk.state.site().backdrop else {
        return;
    };
    let name = desk.words.text(tool.wording());
    let is_taken = plan.tool() == tool;
    let hint = desk.words.text(&format!("{}-hint", tool.wording()));
    let button = choice(ui, desk.look, is_taken, &name).on_hover_text(hint);
    if button.clicked() {
        plan.take(if is_taken { Tool::Select } else { tool });
    }
    let mut shown = backdrop.clone();
    let at = point(&mut shown, tool).at;
    let of = tool.wording();
    let labels = match tool {
        Tool::SecondPicturePoint => ["field-second-east", "field-second-north"],
        _ => ["field-first-east", "field-first-north"],
    };
    let put = move |site: &mut Site, change: &dyn Fn(&mut PicturePoint)| {
        if let Some(backdrop) = &mut site.backdrop {
            change(point(backdrop, tool));
        }
    };
    row::<2>(ui, |column, ui| {
        if column == 0 {
            let field = Field::new(labels[0], of);
            form.number(ui, desk, commands, field, at.east_m, |site, east_m| {
                put(site, &|point| point.at.east_m = east_m);
            });
        } else {
            let field = Field::new(labels[1], of);
            form.number(ui, desk, commands, field, at.north_m, |site, north_m| {
                put(site, &|point| point.at.north_m = north_m);
            });
        }
    });
}

/// The second point by its distance and bearing from the first.
fn between(
    ui: &mut Ui,
    desk: &Desk<'_>,
    form: &mut Form,
    backdrop: &Backdrop,
    commands: &mut Commands,
) {
    let first = backdrop.first.at;
    let distance_m = first.distance_m(backdrop.second.at);
    let bearing_deg = first.bearing(backdrop.second.at).degrees();
    let put = move |site: &mut Site, distance_m: f64, bearing_deg: f64| {
        if let Some(backdrop) = &mut site.backdrop {
            backdrop.second.at = away(first, distance_m, bearing_deg);
        }
    };
    row::<2>(ui, |column, ui| {
        if column == 0 {
            let label = field("field-second-distance");
            form.number(ui, desk, commands, label, distance_m, |site, to_m| {
                put(site, to_m, bearing_deg);
            });
        } else {
            let label = field("field-second-bearing");
            form.number(ui, desk, commands, label, bearing_deg, |site, to_deg| {
                put(site, distance_m, to_deg);
            });
        }
    });
}

fn point(backdrop: &mut Backdrop, tool: Tool) -> &mut PicturePoint {
    match tool {
        Tool::SecondPicturePoint => &mut backdrop.second,
        _ => &mut backdrop.first,
    }
}
