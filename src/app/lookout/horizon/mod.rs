//! The horizon view: azimuth against altitude, with the chosen body's path over the skyline.

mod camera;
mod captions;
mod corner;
mod layout;
pub(super) mod model;
mod paint;
mod path;
mod rulers;
pub mod sky;

use super::model::{Tracks, ticks};
use super::says::Says;
use super::{Kept, KeptTexture, SpanKey};
use crate::app::command::{Command, Commands};
use crate::app::measured::{Handles, Owned};
use crate::app::palette::Theme;
use crate::app::scene::Scene;
use crate::measure::{Angle, Moment};
use crate::plan::Half;
use crate::sky::Body;
use camera::{Camera, Sector, Turn};
use eframe::egui::{
    CursorIcon, EventFilter, Key, Modifiers, Rect, Response, Role, Sense, Stroke, StrokeKind,
    TextureId, Ui, WidgetInfo, pos2,
};
use layout::Layout;
use model::Model;
use sky::Picture;

/// How fine the skyline's outline is.
const OUTLINE_STEP: Angle = Angle::from_degrees(0.5);

/// The horizon view and what it keeps between frames.
#[derive(Default)]
pub struct Horizon {
    turn: Turn,
    /// What the view was turned for; another body or half is framed anew.
    turned_for: Option<(Half, Body)>,
    sector: Kept<SpanKey, (Sector, Vec<super::model::Tick>)>,
    shapes: Kept<u64, Shapes>,
    sky: KeptTexture<SkyKey>,
    /// The points of the measured skyline, while they are to be moved.
    handles: Handles,
    moves_measured: bool,
    /// What was framed when a point was taken hold of: it stays while the point moves.
    held: Option<Framed>,
}

/// What a view is framed for, and the ticks of its path.
type Framed = std::sync::Arc<(Sector, Vec<super::model::Tick>)>;

/// What is drawn of a skyline: (azimuth, altitude).
pub(super) struct Shapes {
    /// What stands on the ground.
    floor: Vec<(Angle, Angle)>,
    /// What hangs over it, each with its upper edge first and its lower edge backwards after it.
    crowns: Vec<Vec<(Angle, Angle)>>,
}

/// What the sky's picture depends on.
#[derive(Clone, Copy, PartialEq)]
struct SkyKey {
    sky_count: u64,
    moment: Moment,
    camera: Camera,
    theme: Theme,
}

impl Horizon {
    /// Draws the view into the room that `ui` has.
    pub fn show(
        &mut self,
        ui: &mut Ui,
        scene: &Scene<'_>,
        tracks: &Tracks,
        commands: &mut Commands,
    ) -> Response {
        let (card, response) =
            ui.allocate_exact_size(ui.available_size_before_wrap(), Sense::click_and_drag());
        let says = Says::new(scene);
        response.widget_info(|| {
            WidgetInfo::labeled(Role::Canvas, true, says.text("horizon-name", &[]))
        });
        if !ui.is_rect_visible(card) {
            return response;
        }
        if self.turned_for.replace((scene.half, scene.body)) != Some((scene.half, scene.body)) {
            self.turn = Turn::default();
        }
        let span = super::model::shown_span(scene);
        let kept = self.sector.get(SpanKey::of(scene), || {
            let sector = Sector::new(tracks.body(scene.body), &tracks.sun, span);
            let ticks = ticks(tracks, scene.scales, scene.zone, 0.0, tracks.length_s);
            (sector, ticks)
        });
        let kept = match (&self.held, self.handles.is_dragging()) {
            (Some(held), true) => held.clone(),
            _ => self.held.insert(kept).clone(),
        };
        let (sector, ticks) = &*kept;
        let ruler = layout::RULER_LINES * scene.look.sizes.label;
        let sky = Rect::from_min_max(card.min, pos2(card.right(), card.bottom() - ruler));
        let (camera, turn) = Camera::new(sector, self.turn, sky);
        self.turn = turn;
        let owned = owned(scene);
        let moved = owned.filter(|_| self.moves_measured);
        let is_held = moved.is_some_and(|owned| {
            self.handles
                .handle(ui, &response, &owned, &camera, commands)
        });
        if !is_held {
            self.steer(ui, &response, &camera);
        }

        let model = Model::new(scene, tracks);
        let note = corner::room(&scene.look, sky, owned.is_some(), scene);
        let layout = Layout::new(scene, &model, tracks, ticks, camera, ui.painter(), note);
        let shapes = self.shapes.get(scene.night_count, || Shapes {
            floor: scene.skyline.floor_outline(OUTLINE_STEP),
            crowns: scene.skyline.crowns(OUTLINE_STEP),
        });
        let sky = self.sky(ui, scene, camera);
        paint::paint(ui.painter(), &scene.look, &model, &layout, sky, &shapes);
        if response.has_focus() {
            let stroke = Stroke::new(2.0, scene.look.colours.chosen);
            ui.painter()
                .rect_stroke(card, scene.look.room.corner, stroke, StrokeKind::Inside);
        }
        choose_body(ui, &response, &model, &layout, commands);
        if let Some(owned) = moved {
            let inside = ui.painter().with_clip_rect(camera.rect);
            // Switched on, it shows at once what can be taken hold of.
            self.handles
                .paint(&inside, &scene.look, &response, &owned, &camera, true);
        }
        if let Some(room) = note {
            corner::show(ui, scene, room, owned.is_some(), &mut self.moves_measured);
        }
        response
    }

    /// How far the view is turned, widened and tilted.
    #[cfg(test)]
    pub(super) fn turn(&self) -> Turn {
        self.turn
    }

    /// Turning, tilting and widening by hand; what goes beyond a limit is taken back next time
    /// the view is framed.
    fn steer(&mut self, ui: &Ui, response: &Response, camera: &Camera) {
        /// Degrees and share of one press of a key.
        const KEY_DEG: f64 = 5.0;
        const KEY_SHARE: f64 = 1.15;
        /// Of the wheel, for a view e times as wide.
        const POINTS_PER_E: f64 = 400.0;
        if response.double_clicked() {
            self.turn = Turn::default();
        }
        if response.dragged() {
            let moved = response.drag_delta();
            self.turn.turn_deg -= f64::from(moved.x) / camera.points_per_deg;
            self.turn.tilt_deg += f64::from(moved.y) / camera.points_per_deg;
        }
        if response.dragged() {
            ui.ctx().set_cursor_icon(CursorIcon::Grabbing);
        } else if response.hovered() {
            ui.ctx().set_cursor_icon(CursorIcon::Grab);
        }
        if response.hovered() {
            // The wheel is taken out of the input, so that the page around does not move as well.
            let (wheel, pinch) = ui.input_mut(|input| {
                let wheel = std::mem::take(&mut input.smooth_scroll_delta.y);
                (f64::from(wheel), f64::from(input.zoom_delta()))
            });
            self.turn.widening *= (-wheel / POINTS_PER_E).exp() / pinch;
        }
        self.steer_by_keys(ui, response, KEY_DEG, KEY_SHARE);
    }

    fn steer_by_keys(&mut self, ui: &Ui, response: &Response, step_deg: f64, share: f64) {
        if !response.has_focus() {
            return;
        }
        let filter = EventFilter {
            horizontal_arrows: true,
            vertical_arrows: true,
            ..EventFilter::default()
        };
        ui.memory_mut(|memory| memory.set_focus_lock_filter(response.id, filter));
        let turn = &mut self.turn;
        ui.input_mut(|input| {
            let mut pressed =
                |modifiers, key| f64::from(input.count_and_consume_key(modifiers, key) as u32);
            let command = Modifiers::COMMAND;
            turn.turn_deg +=
                step_deg * (pressed(command, Key::ArrowRight) - pressed(command, Key::ArrowLeft));
            turn.tilt_deg += step_deg
                * (pressed(Modifiers::NONE, Key::ArrowUp)
                    - pressed(Modifiers::NONE, Key::ArrowDown));
            let wider = pressed(Modifiers::NONE, Key::Minus);
            let narrower =
                pressed(Modifiers::NONE, Key::Plus) + pressed(Modifiers::NONE, Key::Equals);
            turn.widening *= share.powf(wider - narrower);
        });
    }

    /// The sky's picture, made anew only when the site, the moment, the view or the theme changed.
    fn sky(&mut self, ui: &Ui, scene: &Scene<'_>, camera: Camera) -> TextureId {
        let key = SkyKey {
            sky_count: scene.sky_count,
            moment: scene.moment,
            camera,
            theme: scene.look.theme,
        };
        let image = || Picture::new(&sky::glow(scene, scene.moment), &scene.look).image(&camera);
        self.sky.get(ui, key, image)
    }
}

/// The measured skyline that belongs to the scene's spot.
fn owned<'a>(scene: &Scene<'a>) -> Option<Owned<'a>> {
    let mut spots = scene.site.spots.iter();
    let spot = spots.position(|spot| spot.name == scene.spot.name)?;
    Owned::at(scene.site, spot)
}

/// A click on a body chooses it.
fn choose_body(
    ui: &Ui,
    response: &Response,
    model: &Model,
    layout: &Layout,
    commands: &mut Commands,
) {
    const REACH: f32 = 14.0;
    let Some(pointer) = response.hover_pos() else {
        return;
    };
    let near = model
        .others
        .iter()
        .zip(&layout.others)
        .filter(|(_, (at, _))| layout.camera.rect.contains(*at))
        .map(|(mark, (at, _))| (mark.body, at.distance(pointer)))
        .filter(|(_, distance)| *distance < REACH)
        .min_by(|a, b| a.1.total_cmp(&b.1));
    if let Some((body, _)) = near {
        ui.ctx().set_cursor_icon(CursorIcon::PointingHand);
        if response.clicked() {
            commands.push(Command::ChooseBody(body));
        }
    }
}
