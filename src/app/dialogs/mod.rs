//! The dialogs: a new site, finding a site file, help. One at a time.

mod find_file;
mod help;
mod new_site;

pub use find_file::{FindFile, Wanted};
pub use new_site::NewSite;

use super::command::{Command, Commands};
use super::grounds::Desk;
use super::grounds::exchange::Exchange;
use super::widgets::{card_frame, command_button};
use super::window::DesktopWindow;
use eframe::egui::{Align2, Context, Id, Modal, ScrollArea, Ui, vec2};
use std::path::Path;

/// From the window's top to a dialog that hangs there, points.
const TOP: f32 = 36.0;

/// An open dialog.
pub enum Dialog {
    /// The short path to a new site.
    NewSite(Box<NewSite>),
    /// The path to a site file.
    FindFile(FindFile),
    /// The ways to measure; what is written there is kept in the window.
    Measure,
    /// Bringing files in and handing them out.
    Exchange(Box<Exchange>),
    /// Keys and cautions.
    Help,
}

impl Dialog {
    /// An empty new site.
    pub fn new_site() -> Self {
        Self::NewSite(Box::new(NewSite::new()))
    }
    /// Finding a file, from a folder on.
    pub fn find_file(wanted: Wanted, folder: Option<&Path>) -> Self {
        Self::FindFile(FindFile::new(wanted, folder))
    }
}

impl DesktopWindow {
    /// Draws the open dialog, if there is one, over everything else.
    pub(super) fn dialog_ui(&mut self, ctx: &Context, commands: &mut Commands) {
        let look = self.palette.look(self.state.theme);
        let Some(mut dialog) = self.dialog.take() else {
            return;
        };
        let mut measure = std::mem::take(&mut self.measure);
        let scene = self.scene();
        let desk = Desk {
            state: &self.state,
            scene: scene.as_ref(),
            words: &self.words,
            look: &look,
        };
        let words = &self.words;
        let is_measure = matches!(dialog, Dialog::Measure);
        let is_large = is_measure && measure.is_large();
        let widest = match (is_measure, is_large) {
            (_, true) => 1400.0,
            (true, _) => 820.0,
            _ => 620.0,
        };
        let screen = ctx.content_rect();
        let id = Id::unique("dialog");
        // What grows and shrinks with what is chosen in it hangs from the top: its head stays.
        let area = match dialog {
            Dialog::Measure | Dialog::Exchange(_) => {
                Modal::default_area(id).anchor(Align2::CENTER_TOP, vec2(0.0, TOP))
            }
            _ => Modal::default_area(id),
        };
        let modal = Modal::new(id)
            .area(area)
            .frame(card_frame(&look).inner_margin(look.room.between))
            .show(ctx, |ui: &mut Ui| {
                ui.set_width((screen.width() - 96.0).clamp(280.0, widest));
                let most = (screen.height() - 140.0).max(160.0);
                // Both, or the dialog would grow towards its size from frame to frame.
                ScrollArea::vertical()
                    .max_height(most)
                    .min_scrolled_height(most)
                    .show(ui, |ui| {
                        if is_large {
                            // So that it does not move while marks are added.
                            ui.set_min_height(most);
                        }
                        match &mut dialog {
                            Dialog::NewSite(form) => form.show(ui, &look, words),
                            Dialog::FindFile(find) => find.show(ui, &look, words, commands),
                            Dialog::Measure => measure.show(ui, &desk, commands),
                            Dialog::Exchange(form) => form.show(ui, &desk, commands),
                            Dialog::Help => help::show(ui, &look, words),
                        }
                    });
                ui.horizontal(|ui| {
                    let act = match &dialog {
                        Dialog::NewSite(_) => Some(Command::SaveNewSite),
                        Dialog::FindFile(find) => Some(find.command(find.path())),
                        Dialog::Measure | Dialog::Exchange(_) | Dialog::Help => None,
                    };
                    if let Some(act) = act {
                        command_button(ui, words, act, commands);
                    }
                    command_button(ui, words, Command::CloseDialog, commands);
                });
            });
        if modal.should_close() {
            commands.push(Command::CloseDialog);
        }
        self.measure = measure;
        self.dialog = Some(dialog);
    }
}
