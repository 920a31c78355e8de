//! The inset: a plan of the inner solar system to scale, with the line of sight and the
//! elongation.

pub(super) mod model;
mod paint;

use super::Kept;
use super::says::Says;
use crate::app::scene::Scene;
use crate::plan::{self, Neighbours};
use crate::sky::Body;
use eframe::egui::{Response, Role, Sense, Ui, WidgetInfo};
use model::Model;

/// The inset and what it keeps between frames.
#[derive(Default)]
pub struct Inset {
    neighbours: Kept<(u64, Body), Neighbours>,
}

impl Inset {
    /// Draws the inset into the room that `ui` has.
    pub fn show(&mut self, ui: &mut Ui, scene: &Scene<'_>) -> Response {
        let (rect, response) =
            ui.allocate_exact_size(ui.available_size_before_wrap(), Sense::hover());
        let says = Says::new(scene);
        let Some(model) = Model::new(scene) else {
            return response;
        };
        response.widget_info(|| {
            let label = says.text(
                "inset-name",
                &[
                    ("body", &says.body(model.body)),
                    ("elongation", &says.tenths(model.elongation)),
                ],
            );
            WidgetInfo::labeled(Role::Canvas, true, label)
        });
        // The events around the night's middle: nearer ones than a night are the same either way.
        let neighbours = self.neighbours.get((scene.night_count, scene.body), || {
            plan::neighbours(
                scene.ephemeris,
                scene.scales,
                scene.body,
                scene.night.middle,
            )
        });
        let events = model::around(&neighbours, scene, scene.moment);
        if ui.is_rect_visible(rect) {
            paint::paint(ui.painter(), scene, &model, events, rect);
        }
        response
    }
}
