//! The phase: the chosen body's disc at one scale for all, the way up that the eye and the
//! optics show it.

mod layout;
pub(super) mod model;
mod paint;

use super::says::Says;
use crate::app::command::{Command, Commands, OpticsView};
use crate::app::scene::Scene;
use eframe::egui::{CursorIcon, Response, Role, Sense, Ui, WidgetInfo};
use layout::Layout;
use model::Model;

/// Draws the phase card into the room that `ui` has.
///
/// The telescope's disc is a button: it goes on to the next way round.
pub fn show(ui: &mut Ui, scene: &Scene<'_>, commands: &mut Commands) -> Response {
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
    let layout = Layout::new(ui.painter(), scene, &model, card);
    let telescope = &layout.discs[2];
    let button = ui.interact(
        telescope.place,
        response.id.with("telescope"),
        Sense::click(),
    );
    button.widget_info(|| {
        let (name, note) = &telescope.captions;
        let label = says.text("phase-change", &[("name", name), ("note", note)]);
        WidgetInfo::labeled(Role::Button, true, label)
    });
    if button.hovered() {
        ui.ctx().set_cursor_icon(CursorIcon::PointingHand);
    }
    if button.clicked() {
        commands.push(Command::ChooseOpticsView(next(scene.optics_view)));
    }
    if ui.is_rect_visible(card) {
        let is_lit = button.hovered() || button.has_focus();
        paint::paint(ui.painter(), scene, &model, &layout, is_lit);
    }
    response
}

fn next(view: OpticsView) -> OpticsView {
    match view {
        OpticsView::Erect => OpticsView::Inverted,
        OpticsView::Inverted => OpticsView::Mirrored,
        OpticsView::Mirrored => OpticsView::Erect,
    }
}
