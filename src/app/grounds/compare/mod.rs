//! The spots side by side for one half-night, over one axis of time.

mod kit;
mod rows;

use super::Desk;
use crate::app::command::{Command, Commands};
use crate::app::lookout::Kept;
use crate::app::lookout::model::shown_span;
use crate::app::palette::Look;
use crate::app::scene::{Scene, SceneKey};
use crate::app::widgets::{bold, card, text};
use crate::light::Eye;
use crate::measure::Moment;
use crate::plan::Half;
use crate::sky::Body;
use chrono::Timelike;
use eframe::egui::{
    Align2, Color32, Rect, Role, Sense, Stroke, StrokeKind, Ui, WidgetInfo, pos2, vec2,
};
use rows::{Row, rows};
use std::sync::Arc;

/// So many spots are compared anew in every frame of a drag; more wait for its end.
const MOST_LIVE: usize = 12;
/// Height of a spot's two lines and its lane, points.
const ROW_HEIGHT: f32 = 54.0;
/// Height of the axis of time.
const AXIS_HEIGHT: f32 = 18.0;

/// What it keeps between frames.
#[derive(Default)]
pub struct Compare {
    rows: Kept<SceneKey, Vec<Row>>,
    last: Option<Arc<Vec<Row>>>,
}

/// The common axis of time.
#[derive(Clone, Copy, Debug)]
struct Axis {
    start: Moment,
    /// From and to, seconds after the start.
    span_s: (f64, f64),
    left: f32,
    right: f32,
}

impl Axis {
    fn x(&self, moment: Moment) -> f32 {
        let (from_s, to_s) = self.span_s;
        let share = (moment.seconds_since(self.start) - from_s) / (to_s - from_s).max(1.0);
        self.left + share.clamp(0.0, 1.0) as f32 * (self.right - self.left)
    }
}

impl Compare {
    /// Shows it.
    pub fn show(&mut self, ui: &mut Ui, desk: &Desk<'_>, commands: &mut Commands) {
        let (Some(scene), Ok(planned)) = (desk.scene, desk.state.planned()) else {
            return;
        };
        let is_waiting = desk.state.is_dragging() && scene.site.spots.len() > MOST_LIVE;
        let rows = match &self.last {
            Some(last) if is_waiting => last.clone(),
            _ => self
                .rows
                .get(scene.key(), || rows(desk, scene, &planned.night_sky)),
        };
        self.last = Some(rows.clone());
        let look = desk.look;
        card(ui, look, 0.0, |ui| {
            ui.spacing_mut().item_spacing = vec2(8.0, 6.0);
            let title = desk.words.text("compare-title");
            bold(ui, look, look.sizes.control, look.colours.text, &title);
            let about = about(desk, scene.body, scene.eye, scene.half);
            text(ui, look, look.sizes.label, look.colours.lesser, &about);
            let width = ui.available_width();
            let axis = axis(ui, desk, scene, &rows, width);
            let most = rows
                .iter()
                .fold(0.0, |most: f64, row| most.max(row.minutes));
            for (index, row) in rows.iter().enumerate() {
                // A spot that has just gone may still be among rows that wait.
                if index < scene.site.spots.len() {
                    row_ui(ui, desk, scene, &axis, (index, row, most), commands);
                }
            }
            kit::menus(ui, desk, commands);
        });
    }
}

fn about(desk: &Desk<'_>, body: Body, eye: Eye, half: Half) -> String {
    let words = desk.words;
    let name = |command: Command| words.text(command.wording().unwrap_or_default());
    words.text_with(
        "compare-about",
        &[
            ("body", words.body(body)),
            ("half", name(Command::ChooseHalf(half)).to_lowercase()),
            ("eye", name(Command::ChooseEye(eye))),
        ],
    )
}

/// The axis of time with its hours; wide enough for every spot's windows.
fn axis(ui: &mut Ui, desk: &Desk<'_>, scene: &Scene<'_>, rows: &[Row], width: f32) -> Axis {
    const BESIDE_S: f64 = 900.0;
    let (rect, _) = ui.allocate_exact_size(vec2(width, AXIS_HEIGHT), Sense::hover());
    let (start, end) = scene.ends();
    let windows = rows.iter().flat_map(|row| &row.windows);
    let found = windows.fold(None, |span: Option<(f64, f64)>, (from, to)| {
        let (from, to) = (from.seconds_since(start), to.seconds_since(start));
        let (low, high) = span.unwrap_or((from, to));
        Some((low.min(from), high.max(to)))
    });
    let span_s = match found {
        Some((from, to)) => (
            (from - BESIDE_S).max(0.0),
            (to + BESIDE_S).min(end.seconds_since(start)),
        ),
        None => shown_span(scene),
    };
    let axis = Axis {
        start,
        span_s,
        left: rect.left() + 8.0,
        right: rect.right() - 8.0,
    };
    let painter = ui.painter();
    let look = desk.look;
    let mut last_right = f32::NEG_INFINITY;
    for moment in hours(scene, &axis) {
        let x = axis.x(moment);
        let label = desk.words.time(scene.clock(), moment);
        let font = look.font(look.sizes.least);
        let galley = painter.layout_no_wrap(label, font, look.colours.lesser);
        let place = Align2::CENTER_TOP.anchor_size(pos2(x, rect.top()), galley.size());
        if place.left() < last_right + 8.0 || !rect.x_range().contains(place.right()) {
            continue;
        }
        last_right = place.right();
        painter.galley(place.min, galley, look.colours.lesser);
    }
    axis
}

/// The whole local hours on an axis.
fn hours(scene: &Scene<'_>, axis: &Axis) -> Vec<Moment> {
    const HOUR_S: f64 = 3600.0;
    let (from_s, to_s) = axis.span_s;
    let local = scene.clock().local(axis.start.plus_seconds(from_s));
    let into_s = f64::from(local.minute() * 60 + local.second());
    let first_s = from_s + (HOUR_S - into_s).rem_euclid(HOUR_S);
    (0..48)
        .map(|hour| first_s + HOUR_S * f64::from(hour))
        .take_while(|at_s| *at_s <= to_s)
        .map(|at_s| axis.start.plus_seconds(at_s))
        .collect()
}

/// A spot: name and times on one line, the rest on the next, its lane below; a click chooses it.
fn row_ui(
    ui: &mut Ui,
    desk: &Desk<'_>,
    scene: &Scene<'_>,
    axis: &Axis,
    (index, row, most): (usize, &Row, f64),
    commands: &mut Commands,
) {
    let look = desk.look;
    let size = vec2(ui.available_width(), ROW_HEIGHT);
    let (rect, response) = ui.allocate_exact_size(size, Sense::click());
    let is_chosen = index == desk.state.spot_index();
    let name = desk.words.text_with(
        "compare-row",
        &[
            ("spot", row.name.as_str()),
            ("times", &row.times),
            ("best", &row.best),
            ("why", &row.why),
            ("kit", &row.kit),
        ],
    );
    response.widget_info(|| WidgetInfo::selected(Role::RadioButton, true, is_chosen, &name));
    if response.clicked() {
        commands.push(Command::ChooseSpot(index));
    }
    let (fill, stroke) = ground(look, is_chosen, response.hovered());
    ui.painter()
        .rect(rect, look.room.corner, fill, stroke, StrokeKind::Inside);
    if response.has_focus() {
        let focus = Stroke::new(2.0, look.colours.chosen);
        ui.painter()
            .rect_stroke(rect, look.room.corner, focus, StrokeKind::Inside);
    }
    words(ui, desk, rect, row, most);
    lane(ui, desk, scene, axis, rect, row);
}

fn ground(look: &Look, is_chosen: bool, is_hovered: bool) -> (Color32, Stroke) {
    match (is_chosen, is_hovered) {
        (true, _) => (
            look.colours.chosen_ground,
            Stroke::new(1.5, look.colours.chosen),
        ),
        (false, true) => (look.colours.chosen_ground, Stroke::NONE),
        (false, false) => (Color32::TRANSPARENT, Stroke::new(1.0, look.colours.line)),
    }
}

fn words(ui: &Ui, desk: &Desk<'_>, rect: Rect, row: &Row, most: f64) {
    const SIDE: f32 = 8.0;
    let look = desk.look;
    let painter = ui.painter().with_clip_rect(rect.intersect(ui.clip_rect()));
    let (top, second) = (rect.top() + 5.0, rect.top() + 21.0);
    let left = rect.left() + SIDE;
    let right = rect.right() - SIDE;
    let is_longest = row.minutes > 0.0 && row.minutes >= most - 0.5;
    let times_colour = if is_longest {
        look.colours.chosen
    } else {
        look.colours.text
    };
    painter.text(
        pos2(left, top),
        Align2::LEFT_TOP,
        &row.name,
        look.bold(look.sizes.label),
        look.colours.text,
    );
    painter.text(
        pos2(right, top),
        Align2::RIGHT_TOP,
        &row.times,
        look.bold(look.sizes.label),
        times_colour,
    );
    let small = || look.font(look.sizes.least);
    let why = [row.best.as_str(), row.why.as_str()]
        .into_iter()
        .filter(|part| !part.is_empty())
        .collect::<Vec<_>>()
        .join(" · ");
    painter.text(
        pos2(right, second),
        Align2::RIGHT_TOP,
        why,
        small(),
        look.colours.lesser,
    );
    painter.text(
        pos2(left, second),
        Align2::LEFT_TOP,
        &row.kit,
        small(),
        look.colours.keen,
    );
}

/// The lane: amber while the body is seen, with the moment shown.
fn lane(ui: &Ui, desk: &Desk<'_>, scene: &Scene<'_>, axis: &Axis, rect: Rect, row: &Row) {
    let look = desk.look;
    let painter = ui.painter();
    let (top, bottom) = (rect.bottom() - 14.0, rect.bottom() - 5.0);
    let bar = |left: f32, right: f32| Rect::from_min_max(pos2(left, top), pos2(right, bottom));
    painter.rect_filled(bar(axis.left, axis.right), 2.0, look.colours.idle);
    for (from, to) in &row.windows {
        let seen = bar(axis.x(*from), axis.x(*to).max(axis.x(*from) + 1.5));
        painter.rect_filled(seen, 2.0, look.colours.seen);
    }
    for hour in hours(scene, axis) {
        let tick = Stroke::new(1.0, look.colours.card);
        painter.vline(axis.x(hour), top..=bottom, tick);
    }
    let at_s = scene.moment.seconds_since(axis.start);
    if (axis.span_s.0..=axis.span_s.1).contains(&at_s) {
        let now = Stroke::new(1.5, look.colours.text);
        painter.vline(axis.x(scene.moment), top - 2.0..=bottom + 2.0, now);
    }
}
