//! The skyline from the chosen spot, all round.

use super::Desk;
use crate::app::command::Commands;
use eframe::egui::Ui;

/// What it keeps between frames.
#[derive(Default)]
pub struct Strip {}

impl Strip {
    /// Shows it.
    pub fn show(&mut self, _ui: &mut Ui, _desk: &Desk<'_>, _commands: &mut Commands) {}
}
