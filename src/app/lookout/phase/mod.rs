//! The phase: the chosen body's disc at one scale for all, the way up that the eye and the
//! optics show it.

mod model;
mod paint;

use super::says::Says;
use crate::app::scene::Scene;
use eframe::egui::{Response, Role, Sense, Ui, WidgetInfo};
use model::Model;

/// Draws the phase card into the room that `ui` has.
pub fn show(ui: &mut Ui, scene: &Scene<'_>) -> Response {
    let room = ui.available_size_before_wrap();
    let (card, response) = ui.allocate_exact_size(room, Sense::hover());
    let model = Model::new(scene);
    let says = Says::new(scene);
    response.widget_info(|| {
        let label = says.text(
            "phase-name",
            &[
                ("body", &says.body(model.body)),
                ("lit", &says.percent(model.illuminated_fraction)),
                ("diameter", &says.arcsec(model.diameter)),
            ],
        );
        WidgetInfo::labeled(Role::Canvas, true, label)
    });
    if ui.is_rect_visible(card) {
        paint::paint(ui.painter(), scene, &model, card);
    }
    response
}
