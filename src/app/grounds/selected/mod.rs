//! What is known of the thing selected on the plan, in exact numbers.

use super::{Desk, Selection};
use crate::app::command::Commands;
use eframe::egui::Ui;

/// Shows it.
pub fn show(
    _ui: &mut Ui,
    _desk: &Desk<'_>,
    _selection: &mut Option<Selection>,
    _commands: &mut Commands,
) {
}
