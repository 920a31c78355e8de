//! The work area Lookout: the half-night at one site, minute by minute.
//!
//! Each drawing stands in a folder of its own as model, layout and paint, and offers
//! `show(ui, &Scene, &mut Commands)`: it takes the width and height that `ui` has and only
//! records commands.

use super::command::Commands;
use super::scene::Scene;
use eframe::egui::Ui;

/// What the drawings keep between frames.
#[derive(Default)]
pub struct Drawings {}
impl Drawings {
    pub fn view(&mut self, ui: &mut Ui, _scene: &Scene<'_>, _commands: &mut Commands) {
        ui.label("view");
    }
    pub fn fade(&mut self, ui: &mut Ui, _scene: &Scene<'_>, _commands: &mut Commands) {
        ui.label("fade");
    }
    pub fn plot(&mut self, ui: &mut Ui, _scene: &Scene<'_>, _commands: &mut Commands) {
        ui.label("plot");
    }
    pub fn inset(&mut self, ui: &mut Ui, _scene: &Scene<'_>, _commands: &mut Commands) {
        ui.label("inset");
    }
}
