//! Where to stand: minutes for every square metre of the grounds.

use super::Desk;
use crate::app::command::Commands;
use eframe::egui::Ui;

/// What it keeps between frames.
#[derive(Default)]
pub struct Standing {}

impl Standing {
    /// Shows it.
    pub fn show(&mut self, _ui: &mut Ui, _desk: &Desk<'_>, _commands: &mut Commands) {}
}
