//! The points as handles: dragged, nudged, added by a double click, taken away.

use super::edit::{Owned, STEP_DEG};
use crate::app::command::{Command, Commands};
use crate::app::palette::Look;
use crate::measure::Angle;
use crate::place::SkylinePoint;
use eframe::egui::{CursorIcon, EventFilter, Key, Modifiers, Painter, Pos2, Response, Stroke, Ui};

/// From how far the pointer takes hold of a handle, points.
const REACH: f32 = 10.0;
/// From how far the handles show, points.
const NEAR: f32 = 60.0;

/// How a drawing places the sky on the screen.
pub trait Place {
    /// Where an azimuth and an altitude fall; may be off the drawing.
    fn pos(&self, azimuth: Angle, altitude: Angle) -> Pos2;
    /// The azimuth and the altitude at a point of the screen.
    fn sky(&self, pos: Pos2) -> (Angle, Angle);
}

/// What a drawing's handles keep between frames.
#[derive(Clone, Copy, Debug, Default)]
pub struct Handles {
    /// The point last taken hold of, by its place in the list.
    chosen: Option<usize>,
    /// Whether it is being dragged.
    is_dragging: bool,
}

impl Handles {
    /// Does what pointer and keys ask for; whether the pointer is theirs, so that the drawing
    /// itself is not to be turned by it.
    pub fn handle(
        &mut self,
        ui: &Ui,
        response: &Response,
        owned: &Owned<'_>,
        place: &impl Place,
        commands: &mut Commands,
    ) -> bool {
        let count = owned.points().len();
        self.chosen = self.chosen.filter(|chosen| *chosen < count);
        let under = response
            .hover_pos()
            .and_then(|pointer| nearest(owned, place, pointer, REACH));
        if response.drag_started() {
            let pressed = ui.input(|input| input.pointer.press_origin());
            let taken = pressed.and_then(|pointer| nearest(owned, place, pointer, REACH));
            self.is_dragging = taken.is_some();
            self.chosen = taken.or(self.chosen);
        }
        if self.is_dragging {
            self.drag(ui, response, owned, place, commands);
            return true;
        }
        if under.is_some() {
            ui.ctx().set_cursor_icon(CursorIcon::Move);
        }
        if response.double_clicked() && under.is_none() {
            return self.add(response, owned, place, commands);
        }
        if response.clicked() {
            self.chosen = under;
        }
        if response.secondary_clicked()
            && let Some(index) = under
        {
            self.remove(owned, index, commands);
        }
        self.keys(ui, response, owned, commands);
        under.is_some()
    }

    fn drag(
        &mut self,
        ui: &Ui,
        response: &Response,
        owned: &Owned<'_>,
        place: &impl Place,
        commands: &mut Commands,
    ) {
        ui.ctx().set_cursor_icon(CursorIcon::Grabbing);
        let pointer = response.interact_pointer_pos();
        let moved = self.chosen.zip(pointer).and_then(|(index, pointer)| {
            let (azimuth, altitude) = place.sky(pointer);
            owned.moved(index, point(azimuth, altitude))
        });
        if let Some(site) = moved.filter(|site| response.dragged() && site != owned.site()) {
            commands.push(Command::DragSite(Box::new(site)));
        }
        if response.drag_stopped() || !ui.input(|input| input.pointer.any_down()) {
            self.is_dragging = false;
            commands.push(Command::EndDrag);
        }
    }

    /// Whether there was room for it.
    fn add(
        &mut self,
        response: &Response,
        owned: &Owned<'_>,
        place: &impl Place,
        commands: &mut Commands,
    ) -> bool {
        let added = response.interact_pointer_pos().and_then(|pointer| {
            let (azimuth, altitude) = place.sky(pointer);
            owned.added(point(azimuth, altitude))
        });
        if let Some((site, index)) = added {
            self.chosen = Some(index);
            commands.push(Command::EditSite(Box::new(site)));
            return true;
        }
        false
    }

    fn remove(&mut self, owned: &Owned<'_>, index: usize, commands: &mut Commands) {
        if let Some(site) = owned.without(index) {
            commands.push(Command::EditSite(Box::new(site)));
            self.chosen = None;
        }
    }

    /// Nudges by a tenth of a degree with Ctrl and the arrows; Delete takes the point away.
    fn keys(&mut self, ui: &Ui, response: &Response, owned: &Owned<'_>, commands: &mut Commands) {
        let Some(index) = self.chosen.filter(|_| response.has_focus()) else {
            return;
        };
        let filter = EventFilter {
            horizontal_arrows: true,
            vertical_arrows: true,
            ..EventFilter::default()
        };
        ui.memory_mut(|memory| memory.set_focus_lock_filter(response.id, filter));
        let (right, up, is_deleted) = ui.input_mut(|input| {
            let mut pressed = |modifiers, key| {
                f64::from(u32::try_from(input.count_and_consume_key(modifiers, key)).unwrap_or(0))
            };
            let command = Modifiers::COMMAND;
            let right = pressed(command, Key::ArrowRight) - pressed(command, Key::ArrowLeft);
            let up = pressed(command, Key::ArrowUp) - pressed(command, Key::ArrowDown);
            let deleted =
                pressed(Modifiers::NONE, Key::Delete) + pressed(Modifiers::NONE, Key::Backspace);
            (right, up, deleted > 0.0)
        });
        if is_deleted {
            self.remove(owned, index, commands);
        } else if right != 0.0 || up != 0.0 {
            let from = owned.points()[index];
            let to = SkylinePoint {
                azimuth_deg: from.azimuth_deg + STEP_DEG * right,
                altitude_deg: from.altitude_deg + STEP_DEG * up,
            };
            if let Some(site) = owned.moved(index, to) {
                commands.push(Command::EditSite(Box::new(site)));
            }
        }
    }

    /// Draws the handles: all of them always, or only while the pointer is near the measured line
    /// or the drawing has the focus.
    pub fn paint(
        &self,
        painter: &Painter,
        look: &Look,
        response: &Response,
        owned: &Owned<'_>,
        place: &impl Place,
        always: bool,
    ) {
        let pointer = response.hover_pos();
        let is_near = pointer.is_some_and(|at| nearest(owned, place, at, NEAR).is_some());
        if !always && !is_near && !self.is_dragging && !response.has_focus() {
            return;
        }
        let under = pointer.and_then(|at| nearest(owned, place, at, REACH));
        for (index, known) in owned.points().iter().enumerate() {
            let at = place_of(place, known);
            let is_chosen = self.chosen == Some(index);
            let is_held = is_chosen || under == Some(index);
            let radius = if is_held { 6.0 } else { 4.0 };
            let fill = if is_chosen {
                look.colours.chosen
            } else {
                look.colours.sky_shade
            };
            painter.circle_filled(at, radius, fill);
            painter.circle_stroke(at, radius, Stroke::new(1.5, look.colours.sky_text));
        }
    }

    /// Whether a point is being dragged.
    pub fn is_dragging(&self) -> bool {
        self.is_dragging
    }

    /// The point last taken hold of.
    pub fn chosen(&self, owned: &Owned<'_>) -> Option<SkylinePoint> {
        owned.points().get(self.chosen?).copied()
    }
}

fn point(azimuth: Angle, altitude: Angle) -> SkylinePoint {
    SkylinePoint {
        azimuth_deg: azimuth.wrapped().degrees(),
        altitude_deg: altitude.degrees(),
    }
}

fn place_of(place: &impl Place, point: &SkylinePoint) -> Pos2 {
    place.pos(
        Angle::from_degrees(point.azimuth_deg),
        Angle::from_degrees(point.altitude_deg),
    )
}

/// The handle nearest to the pointer within a distance.
fn nearest(owned: &Owned<'_>, place: &impl Place, pointer: Pos2, reach: f32) -> Option<usize> {
    let distances = owned
        .points()
        .iter()
        .map(|point| place_of(place, point).distance(pointer));
    distances
        .enumerate()
        .filter(|(_, distance)| *distance < reach)
        .min_by(|a, b| a.1.total_cmp(&b.1))
        .map(|(index, _)| index)
}
