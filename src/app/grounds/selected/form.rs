//! Fields that hold a number or a name of the site: what is written counts once it is finished,
//! and what cannot be is said beneath and changes nothing.

use super::super::Desk;
use crate::app::command::{Command, Commands};
use crate::app::widgets::{error_line, line, number};
use crate::place::Site;
use crate::words::decimal;
use eframe::egui::{Id, Key, RichText, Ui};

/// What is being written, and what was wrong with it.
#[derive(Default)]
pub struct Form {
    /// The field with the focus and its text.
    writing: Option<(Id, String)>,
    /// The field that was wrong last, and why.
    flaw: Option<(Id, String)>,
}

/// A field's place: its wording, and which of several alike it is.
#[derive(Clone, Copy)]
pub struct Field<'a> {
    /// The wording of its label.
    pub label: &'a str,
    /// What it belongs to: another thing's field of the same name is another field.
    pub of: &'a str,
    /// In a table the label stands once above; each field is still read with its point.
    pub point: Option<usize>,
}

impl<'a> Field<'a> {
    /// A field under its label.
    pub const fn new(label: &'a str, of: &'a str) -> Self {
        Self {
            label,
            of,
            point: None,
        }
    }
}

impl Form {
    /// A number in its unit; the change is sent once it is written.
    pub fn number(
        &mut self,
        ui: &mut Ui,
        desk: &Desk<'_>,
        commands: &mut Commands,
        field: Field<'_>,
        value: f64,
        change: impl FnOnce(&mut Site, f64),
    ) {
        let shown = shortest(value);
        let Some((id, written)) = self.line(ui, desk, field, &shown, "") else {
            return;
        };
        match number(&written) {
            Some(value) => self.send(desk, commands, id, |site| change(site, value)),
            None => self.flaw = Some((id, desk.words.text("number-error"))),
        }
    }

    /// The same for a number that may be left out; empty, it shows what holds then.
    #[allow(clippy::too_many_arguments)]
    pub fn optional(
        &mut self,
        ui: &mut Ui,
        desk: &Desk<'_>,
        commands: &mut Commands,
        (field, instead): (Field<'_>, &str),
        value: Option<f64>,
        change: impl FnOnce(&mut Site, Option<f64>),
    ) {
        let shown = value.map(shortest).unwrap_or_default();
        let Some((id, written)) = self.line(ui, desk, field, &shown, instead) else {
            return;
        };
        let value = number(&written);
        if value.is_some() || written.trim().is_empty() {
            self.send(desk, commands, id, |site| change(site, value));
        } else {
            self.flaw = Some((id, desk.words.text("number-error")));
        }
    }

    /// Text that is read into something by a function, whose failure has its own wording.
    #[allow(clippy::too_many_arguments)]
    pub fn read<T>(
        &mut self,
        ui: &mut Ui,
        desk: &Desk<'_>,
        commands: &mut Commands,
        field: Field<'_>,
        (shown, instead): (&str, &str),
        read: impl FnOnce(&str) -> Result<T, &'static str>,
        change: impl FnOnce(&mut Site, T),
    ) {
        let Some((id, written)) = self.line(ui, desk, field, shown, instead) else {
            return;
        };
        match read(&written) {
            Ok(value) => self.send(desk, commands, id, |site| change(site, value)),
            Err(flaw) => self.flaw = Some((id, desk.words.text(flaw))),
        }
    }

    /// Sends a change, if the site can be so.
    pub fn send(
        &mut self,
        desk: &Desk<'_>,
        commands: &mut Commands,
        id: Id,
        change: impl FnOnce(&mut Site),
    ) {
        let mut site = desk.state.site().clone();
        change(&mut site);
        match site.check() {
            Ok(()) => commands.push(Command::EditSite(Box::new(site))),
            Err(error) => {
                let reason = error.to_string();
                let text = desk
                    .words
                    .text_with::<&str>("plan-refused", &[("reason", &reason)]);
                self.flaw = Some((id, text));
            }
        }
    }

    /// The field itself; what was written once it is finished and differs.
    fn line(
        &mut self,
        ui: &mut Ui,
        desk: &Desk<'_>,
        field: Field<'_>,
        shown: &str,
        instead: &str,
    ) -> Option<(Id, String)> {
        let look = desk.look;
        let id = Id::unique(("site field", field.label, field.of, field.point));
        let name = desk.words.text(field.label);
        let mut text = match &self.writing {
            Some((writing, text)) if *writing == id => text.clone(),
            _ => shown.to_owned(),
        };
        let edit = line(&mut text)
            .id(id)
            .hint_text(instead)
            .desired_width(f32::INFINITY);
        let response = match field.point {
            None => {
                ui.scope(|ui| {
                    ui.spacing_mut().item_spacing.y = 3.0;
                    let label = RichText::new(name)
                        .font(look.font(look.sizes.label))
                        .color(look.colours.lesser);
                    let label = ui.label(label);
                    ui.add(edit).labelled_by(label.id)
                })
                .inner
            }
            Some(point) => {
                let number = point.to_string();
                let named = desk
                    .words
                    .text_with::<&str>("field-of-point", &[("field", &name), ("number", &number)]);
                let response = ui.add(edit);
                ui.ctx()
                    .accesskit_node_builder(response.id, |node| node.set_label(named));
                response
            }
        };
        let flaw = self.flaw.as_ref().filter(|(of, _)| *of == id);
        error_line(ui, look, flaw.map(|(_, flaw)| flaw.as_str()));
        if response.changed() {
            self.writing = Some((id, text.clone()));
        }
        if !response.lost_focus() {
            return None;
        }
        let is_mine = self.writing.as_ref().is_some_and(|(of, _)| *of == id);
        if is_mine {
            self.writing = None;
            self.flaw = None;
        }
        let is_given_up = ui.input(|input| input.key_pressed(Key::Escape));
        (is_mine && !is_given_up && text != shown).then_some((id, text))
    }
}

/// A number to the millimetre, without zeros at its end.
fn shortest(value: f64) -> String {
    let text = decimal(value, 3);
    text.trim_end_matches('0').trim_end_matches('.').to_owned()
}
