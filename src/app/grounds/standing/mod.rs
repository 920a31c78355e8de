//! Where to stand: minutes for every square metre of the grounds.

use super::Desk;
use crate::app::command::Commands;
use crate::app::palette::Look;
use crate::place::PlanPoint;
use eframe::egui::{Painter, Pos2, Ui};

/// What it keeps between frames.
#[derive(Default)]
pub struct Standing {}

impl Standing {
    /// Shows it.
    pub fn show(&mut self, _ui: &mut Ui, _desk: &Desk<'_>, _commands: &mut Commands) {}

    /// Draws the map under what the plan draws.
    pub fn paint_under(
        &self,
        _painter: &Painter,
        _to_screen: &dyn Fn(PlanPoint) -> Pos2,
        _look: &Look,
    ) {
    }
}
