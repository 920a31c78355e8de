//! The plan of the site, north up, on which everything is drawn and moved.

use super::standing::Standing;
use super::{Desk, Selection};
use crate::app::command::Commands;
use eframe::egui::Ui;

/// What it keeps between frames.
#[derive(Default)]
pub struct Plan {}

impl Plan {
    /// Shows it, with the standing map under what is drawn.
    pub fn show(
        &mut self,
        _ui: &mut Ui,
        _desk: &Desk<'_>,
        _selection: &mut Option<Selection>,
        _standing: &Standing,
        _commands: &mut Commands,
    ) {
    }
}
