//! The fade: the time slider, painted with the sky's own colour at the chosen body's azimuth,
//! with a lane for every bright body hanging below.

mod layout;
pub(super) mod model;
mod paint;

use super::horizon::sky::{self, Picture};
use super::model::Tracks;
use super::says::Says;
use super::{Kept, KeptTexture, SpanKey};
use crate::app::command::{Command, Commands};
use crate::app::palette::Theme;
use crate::app::scene::Scene;
use crate::measure::Angle;
use crate::sky::Body;
use eframe::egui::accesskit::{Action, ActionData};
use eframe::egui::{
    Color32, ColorImage, CursorIcon, EventFilter, Response, Role, Sense, Stroke, StrokeKind,
    TextureId, Ui, WidgetInfo, lerp,
};
use layout::Layout;
use model::Model;

/// Columns and rows of the band's picture: a column every few minutes, stretched smoothly.
const SKY_SIZE: [usize; 2] = [96, 12];

/// The fade and what it keeps between frames.
#[derive(Default)]
pub struct Fade {
    model: Kept<SpanKey, Model>,
    sky: KeptTexture<(SpanKey, Theme)>,
}

impl Fade {
    /// Draws the fade into the room that `ui` has.
    pub fn show(
        &mut self,
        ui: &mut Ui,
        scene: &Scene<'_>,
        tracks: &Tracks,
        commands: &mut Commands,
    ) -> Response {
        let room = ui.available_size_before_wrap();
        let (whole, response) = ui.allocate_exact_size(room, Sense::click_and_drag());
        let model = self
            .model
            .get(SpanKey::of(scene), || Model::new(scene, tracks));
        let says = Says::new(scene);
        let layout = Layout::new(&model, tracks, says, &scene.look, ui.painter(), whole);
        describe(ui, &response, scene, tracks, &model);
        follow(ui, &response, &layout, scene, tracks, commands);
        if !ui.is_rect_visible(whole) {
            return response;
        }
        let sky = self.sky(ui, scene, tracks, &model);
        paint::paint(ui.painter(), &scene.look, &model, &layout, sky);
        let at_s = tracks.at_s(scene.moment);
        if let Some(pointer) = response.hover_pos().filter(|_| !response.dragged()) {
            let x = pointer.x.clamp(layout.band.left(), layout.band.right());
            let time = says.time(tracks.moment(layout.at_s(x)));
            paint::cursor(ui.painter(), &scene.look, &layout, x, &time, false);
        }
        if (model.from_s..=model.to_s).contains(&at_s) {
            let time = says.time(scene.moment);
            paint::cursor(
                ui.painter(),
                &scene.look,
                &layout,
                layout.x(at_s),
                &time,
                true,
            );
        }
        if response.has_focus() {
            let stroke = Stroke::new(2.0, scene.look.colours.chosen);
            let corner = scene.look.room.corner;
            ui.painter()
                .rect_stroke(layout.band, corner, stroke, StrokeKind::Outside);
        }
        response
    }

    /// The band's picture: the lowest part of the sky under and above the chosen body, minute by
    /// minute.
    fn sky(&mut self, ui: &Ui, scene: &Scene<'_>, tracks: &Tracks, model: &Model) -> TextureId {
        let key = (SpanKey::of(scene), scene.look.theme);
        let image = || band_image(scene, tracks, model);
        self.sky.get(ui, key, image)
    }
}

/// Each column is the sky of its own time, exposed for itself, so the band darkens as the view
/// above does.
fn band_image(scene: &Scene<'_>, tracks: &Tracks, model: &Model) -> ColorImage {
    const HIGHEST_DEG: f64 = 24.0;
    /// The Moon's own glare would be a string of beads across its band.
    const BESIDE_THE_MOON: Angle = Angle::from_degrees(15.0);
    let beside = match scene.body {
        Body::Moon => BESIDE_THE_MOON,
        _ => Angle::ZERO,
    };
    let [columns, rows] = SKY_SIZE;
    let samples = tracks.body(scene.body);
    let mut pixels = vec![Color32::BLACK; columns * rows];
    for column in 0..columns {
        let share = (column as f64 + 0.5) / columns as f64;
        let at_s = lerp(model.from_s..=model.to_s, share);
        // The nearest minute: an azimuth must not be blended across north.
        let nearest = samples.partition_point(|sample| sample.at_s < at_s);
        let azimuth = samples
            .get(nearest.min(samples.len().saturating_sub(1)))
            .map_or(Angle::ZERO, |sample| sample.azimuth)
            + beside;
        let glow = sky::glow(scene, tracks.moment(at_s));
        let picture = Picture::new(&glow, &scene.look);
        for row in 0..rows {
            let altitude_deg = HIGHEST_DEG * (1.0 - (row as f64 + 0.5) / rows as f64);
            let altitude = Angle::from_degrees(altitude_deg);
            pixels[row * columns + column] = picture.colour(altitude, azimuth);
        }
    }
    ColorImage::new(SKY_SIZE, pixels)
}

/// Dragging and clicking set the moment; so does a screen reader.
fn follow(
    ui: &Ui,
    response: &Response,
    layout: &Layout,
    scene: &Scene<'_>,
    tracks: &Tracks,
    commands: &mut Commands,
) {
    let whole_minute = |at_s| tracks.whole_minute(scene.scales, scene.zone, at_s);
    if response.hovered() || response.dragged() {
        ui.ctx().set_cursor_icon(CursorIcon::ResizeHorizontal);
    }
    if response.clicked() {
        response.request_focus();
    }
    if (response.dragged() || response.clicked())
        && let Some(pointer) = response.interact_pointer_pos()
    {
        commands.push(Command::SetMoment(whole_minute(layout.at_s(pointer.x))));
    }
    if response.has_focus() {
        // The arrows step through time here rather than to the next control.
        let filter = EventFilter {
            horizontal_arrows: true,
            ..EventFilter::default()
        };
        ui.memory_mut(|memory| memory.set_focus_lock_filter(response.id, filter));
    }
    ui.input(|input| {
        let asked = |action| input.num_accesskit_action_requests(response.id, action) as i32;
        let steps = asked(Action::Increment) - asked(Action::Decrement);
        if steps != 0 {
            commands.push(Command::StepMinutes(steps));
        }
        for request in input.accesskit_action_requests(response.id, Action::SetValue) {
            if let Some(ActionData::NumericValue(minutes)) = request.data {
                commands.push(Command::SetMoment(whole_minute(60.0 * minutes)));
            }
        }
    });
}

/// What a screen reader is told: a slider in minutes of the half-night, read out as a time.
fn describe(ui: &Ui, response: &Response, scene: &Scene<'_>, tracks: &Tracks, model: &Model) {
    let says = Says::new(scene);
    let minutes = tracks.at_s(scene.moment) / 60.0;
    response.widget_info(|| WidgetInfo {
        value: Some(minutes),
        ..WidgetInfo::labeled(Role::Slider, true, says.text("fade-name", &[]))
    });
    ui.ctx().accesskit_node_builder(response.id, |node| {
        node.set_min_numeric_value(model.from_s / 60.0);
        node.set_max_numeric_value(model.to_s / 60.0);
        node.set_numeric_value_step(1.0);
        let sun_altitude = tracks.sun_altitude(60.0 * minutes);
        node.set_value(says.text(
            "fade-value",
            &[
                ("time", &says.time(scene.moment)),
                ("sun", &says.tenths(sun_altitude)),
            ],
        ));
        node.add_action(Action::SetValue);
        node.add_action(Action::Increment);
        node.add_action(Action::Decrement);
    });
}
