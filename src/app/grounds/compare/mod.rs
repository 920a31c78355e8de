//! The spots side by side for one night.

use super::Desk;
use crate::app::command::Commands;
use eframe::egui::Ui;

/// What it keeps between frames.
#[derive(Default)]
pub struct Compare {}

impl Compare {
    /// Shows it.
    pub fn show(&mut self, _ui: &mut Ui, _desk: &Desk<'_>, _commands: &mut Commands) {}
}
