//! The pointer on the plan: pans, zooms, selects, moves, draws.

use super::camera::Camera;
use super::drag::{Drag, Grip, Manner, handle_at};
use super::geometry::rectangle;
use super::tools::Takes;
use super::{Plan, Tool, select, things};
use crate::app::command::{Command, Commands};
use crate::app::grounds::{Desk, Selection};
use crate::place::PlanPoint;
use eframe::egui::{CursorIcon, PointerButton, Pos2, Response, Ui};

/// How near to a thing a click takes it, points of the screen.
const REACH: f32 = 6.0;
/// A press that moved no farther than this is a click, points.
const STILL: f32 = 4.0;

/// What a click cannot tell apart.
fn near_m(camera: Camera) -> f64 {
    2.0 * f64::from(STILL) / camera.view.points_per_m
}

impl Plan {
    pub(super) fn pointer(
        &mut self,
        ui: &Ui,
        response: &Response,
        camera: Camera,
        desk: &Desk<'_>,
        selection: &mut Option<Selection>,
        commands: &mut Commands,
    ) {
        let (origin, is_pressed, modifiers, has_moved) = ui.input(|input| {
            (
                input.pointer.press_origin(),
                input.pointer.any_pressed(),
                input.modifiers,
                input.pointer.delta() != eframe::egui::Vec2::ZERO,
            )
        });
        if response.contains_pointer() && is_pressed {
            response.request_focus();
            self.read_refusal = desk.state.refusal().map(str::to_owned);
        }
        if has_moved && response.hovered() {
            self.cross = None;
        }
        let manner = Manner {
            snaps: self.snaps && !modifiers.alt,
            is_free: modifiers.command,
        };
        self.pan_and_zoom(ui, response, camera);
        if self.is_standing {
            self.snapped = None;
            if response.hovered() {
                ui.ctx().set_cursor_icon(CursorIcon::Crosshair);
            }
            return;
        }
        let pointer = response.interact_pointer_pos().or(response.hover_pos());
        if self.tool == Tool::Select {
            self.work_on_things(
                ui,
                response,
                camera,
                desk,
                selection,
                commands,
                (origin, manner),
            );
            return;
        }
        self.snapped = pointer.map(|pos| {
            self.snap(desk.state.site(), camera, manner.snaps)
                .at(camera.to_plan(pos))
        });
        if response.hovered() {
            ui.ctx().set_cursor_icon(CursorIcon::Crosshair);
        }
        if response.drag_started_by(PointerButton::Primary) {
            self.drawn_from = origin.map(|pos| {
                self.snap(desk.state.site(), camera, manner.snaps)
                    .at(camera.to_plan(pos))
                    .at
            });
        }
        let Some(at) = self.snapped.as_ref().map(|snapped| snapped.at) else {
            return;
        };
        let keeps_tool = modifiers.shift;
        let is_done = if response.drag_stopped_by(PointerButton::Primary) {
            let from = self.drawn_from.take();
            self.drawn(from, at, camera)
        } else if response.clicked_by(PointerButton::Primary) {
            self.set_point(at, near_m(camera))
        } else {
            false
        };
        if is_done {
            self.finish(desk, selection, keeps_tool, commands);
        }
    }

    /// Sets the tool's next point; whether the thing is done with it. A point no farther than
    /// `near_m` from the last or the first is that one again.
    pub(super) fn set_point(&mut self, at: PlanPoint, near_m: f64) -> bool {
        let is_near = |point: &PlanPoint| point.distance_m(at) <= near_m;
        match self.tool.takes() {
            Takes::Things => false,
            Takes::Point | Takes::Circle => {
                self.points = vec![at];
                true
            }
            Takes::Pair => {
                if self.points.len() > 1 {
                    self.points.clear();
                }
                self.points.push(at);
                false
            }
            takes @ (Takes::Line | Takes::Corners) => {
                let least = if takes == Takes::Line { 2 } else { 3 };
                let is_enough = self.points.len() >= least;
                let is_last = self.points.last().is_some_and(is_near);
                let closes = takes == Takes::Corners && self.points.first().is_some_and(is_near);
                if !is_last && !closes {
                    self.points.push(at);
                }
                is_enough && (is_last || closes)
            }
        }
    }

    /// What a drag with the tool has drawn; whether the thing is done with it.
    fn drawn(&mut self, from: Option<PlanPoint>, to: PlanPoint, camera: Camera) -> bool {
        let far =
            from.filter(|from| camera.to_screen(*from).distance(camera.to_screen(to)) > STILL);
        let Some(from) = far else {
            return self.set_point(to, near_m(camera));
        };
        match (self.tool.takes(), self.points.is_empty()) {
            (Takes::Circle, _) => {
                self.points = vec![from, to];
                true
            }
            (Takes::Corners, true) => {
                self.points = rectangle(from, to);
                true
            }
            (Takes::Line, true) => {
                self.points = vec![from, to];
                false
            }
            (Takes::Pair, _) => {
                self.points = vec![from, to];
                false
            }
            _ => self.set_point(to, near_m(camera)),
        }
    }

    fn pan_and_zoom(&mut self, ui: &Ui, response: &Response, camera: Camera) {
        /// Of the wheel, for a plan e times as large.
        const POINTS_PER_E: f64 = 400.0;
        let by_hand = [PointerButton::Middle, PointerButton::Secondary]
            .into_iter()
            .any(|button| response.dragged_by(button));
        if by_hand {
            self.view = Some(camera.panned(response.drag_delta()));
            ui.ctx().set_cursor_icon(CursorIcon::Grabbing);
        }
        let Some(pointer) = response.hover_pos().filter(|_| response.contains_pointer()) else {
            return;
        };
        // The wheel is taken out of the input, so that the page around does not move as well.
        let (wheel, pinch) = ui.input_mut(|input| {
            let wheel = std::mem::take(&mut input.smooth_scroll_delta.y);
            (f64::from(wheel), f64::from(input.zoom_delta()))
        });
        let times = (wheel / POINTS_PER_E).exp() * pinch;
        if times != 1.0 {
            self.view = Some(camera.zoomed(pointer, times));
        }
    }

    /// Selecting, moving and reshaping.
    #[allow(clippy::too_many_arguments)]
    fn work_on_things(
        &mut self,
        ui: &Ui,
        response: &Response,
        camera: Camera,
        desk: &Desk<'_>,
        selection: &mut Option<Selection>,
        commands: &mut Commands,
        (origin, manner): (Option<Pos2>, Manner),
    ) {
        let site = desk.state.site();
        let reach_m = f64::from(REACH) / camera.view.points_per_m;
        let thing_at = |pos: Pos2| things::at(site, camera.to_plan(pos), reach_m);
        let grip_at = |pos: Pos2, selection: Option<Selection>| {
            let held = selection.and_then(|thing| {
                let grip = handle_at(site, thing, camera, pos)?;
                Some((thing, grip))
            });
            // Wide areas are moved only once they are selected, so that the ground in them can
            // be dragged.
            let is_movable = |thing: &Selection| match thing {
                Selection::Spot(_) | Selection::Obstacle(_) => true,
                Selection::Exclusion(_) | Selection::Outline => selection == Some(*thing),
            };
            held.or_else(|| {
                let thing = thing_at(pos).filter(is_movable)?;
                Some((thing, Grip::Whole))
            })
        };
        if response.drag_started_by(PointerButton::Primary)
            && let Some(origin) = origin
            && let Some((thing, grip)) = grip_at(origin, *selection)
        {
            select(selection, Some(thing), desk, commands);
            self.drag = Some(Drag::begin(site, thing, grip, camera.to_plan(origin)));
        }
        let pointer = response.interact_pointer_pos().or(response.hover_pos());
        self.snapped = None;
        if let Some(drag) = self.drag.take() {
            if let Some(pos) = pointer {
                let (changed, snapped) = drag.to(camera.to_plan(pos), camera, manner);
                self.snapped = snapped;
                if changed != *site {
                    self.change(changed, commands);
                }
            }
            ui.ctx().set_cursor_icon(CursorIcon::Grabbing);
            if response.drag_stopped() || !response.dragged() {
                commands.push(Command::EndDrag);
                self.snapped = None;
            } else {
                self.drag = Some(drag);
            }
            return;
        }
        if response.dragged_by(PointerButton::Primary) {
            self.view = Some(camera.panned(response.drag_delta()));
            ui.ctx().set_cursor_icon(CursorIcon::Grabbing);
            return;
        }
        let Some(pos) = response.hover_pos() else {
            return;
        };
        match grip_at(pos, *selection) {
            Some((_, Grip::Whole)) => ui.ctx().set_cursor_icon(CursorIcon::PointingHand),
            Some(_) => ui.ctx().set_cursor_icon(CursorIcon::Grab),
            None => {}
        }
        if response.double_clicked()
            && let Some((thing, Grip::Corner(index))) = grip_at(pos, *selection)
        {
            self.without_corner(thing, index, desk, commands);
        } else if response.clicked_by(PointerButton::Primary) {
            let on_handle = selection.is_some_and(|t| handle_at(site, t, camera, pos).is_some());
            if !on_handle {
                select(selection, thing_at(pos), desk, commands);
            }
        }
    }

    /// Takes one corner out.
    fn without_corner(
        &mut self,
        thing: Selection,
        index: usize,
        desk: &Desk<'_>,
        commands: &mut Commands,
    ) {
        let mut site = desk.state.site().clone();
        let mut points = thing.points(&site);
        if index < points.len() {
            points.remove(index);
            thing.set_points(&mut site, &points);
            self.edit(site, commands);
        }
    }
}
