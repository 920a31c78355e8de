//! The upper right corner of the horizon view: the switch that lets the measured skyline be moved,
//! or else what of it holds at the spot.

use crate::app::lookout::shaded;
use crate::app::measured::elsewhere;
use crate::app::palette::Look;
use crate::app::scene::Scene;
use crate::app::widgets::choice;
use eframe::egui::{Align, Layout, Rect, Role, Sense, Ui, UiBuilder, WidgetInfo, pos2, vec2};

/// How far the corner's things stand from the view's edges, points.
const ASIDE: f32 = 8.0;

/// The room that the corner takes; `None` where it has nothing to say.
pub fn room(look: &Look, sky: Rect, is_own: bool, scene: &Scene<'_>) -> Option<Rect> {
    let has_words = elsewhere(scene.site.measured_use(scene.spot)).is_some();
    if !is_own && !has_words {
        return None;
    }
    let size = if is_own {
        vec2(17.0 * look.sizes.control, 30.0)
    } else {
        vec2(30.0 * look.sizes.label, 1.6 * look.sizes.label)
    };
    let size = size.min(vec2(sky.width() - 2.0 * ASIDE, size.y));
    let right_top = pos2(sky.right() - ASIDE, sky.top() + ASIDE);
    Some(Rect::from_min_size(
        pos2(right_top.x - size.x, right_top.y),
        size,
    ))
}

/// Shows it.
pub fn show(ui: &mut Ui, scene: &Scene<'_>, room: Rect, is_own: bool, moves_measured: &mut bool) {
    let (look, words) = (&scene.look, scene.words);
    if is_own {
        let layout = Layout::right_to_left(Align::Min);
        let mut corner = ui.new_child(UiBuilder::new().max_rect(room).layout(layout));
        let name = words.text("move-measured");
        let hint = words.text("move-measured-hint");
        let switch = choice(&mut corner, look, *moves_measured, &name).on_hover_text(hint);
        if switch.clicked() {
            *moves_measured = !*moves_measured;
        }
        return;
    }
    let Some(id) = elsewhere(scene.site.measured_use(scene.spot)) else {
        return;
    };
    let said = words.text(id);
    let font = look.font(look.sizes.least);
    let painter = ui.painter().with_clip_rect(room.expand(ASIDE));
    let galley = painter.layout_no_wrap(said.clone(), font, look.colours.sky_text);
    let at = pos2(room.right() - galley.size().x, room.top());
    shaded(&painter, look, at, &galley);
    let label = ui.interact(room, ui.scope_id().with("measured"), Sense::hover());
    label.widget_info(|| WidgetInfo::labeled(Role::Label, true, &said));
}
