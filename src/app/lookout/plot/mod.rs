//! The plot: the bright bodies' clearance against minutes from sunset or sunrise.

pub(super) mod model;

use super::model::Tracks;
use super::says::Says;
use super::{Kept, SpanKey};
use crate::app::command::{Command, Commands};
use crate::app::scene::Scene;
use eframe::egui::{
    Align2, CursorIcon, Pos2, Rangef, Rect, Response, RichText, Role, Sense, Stroke, StrokeKind,
    Ui, UiBuilder, WidgetInfo, pos2, vec2,
};
use egui_plot::{AxisHints, GridInput, GridMark, HLine, Line, LineStyle, Plot, PlotPoint, VLine};
use model::{Model, Origin};

/// The plot and what it keeps between frames.
#[derive(Default)]
pub struct ClearancePlot {
    model: Kept<SpanKey, Model>,
}

impl ClearancePlot {
    /// Draws the plot into the room that `ui` has.
    pub fn show(
        &mut self,
        ui: &mut Ui,
        scene: &Scene<'_>,
        tracks: &Tracks,
        commands: &mut Commands,
    ) -> Response {
        let model = self
            .model
            .get(SpanKey::of(scene), || Model::new(scene, tracks));
        let (look, says) = (&scene.look, Says::new(scene));
        let (card, _) = ui.allocate_exact_size(ui.available_size_before_wrap(), Sense::hover());
        let line = Stroke::new(1.0, look.colours.line);
        ui.painter()
            .rect_filled(card, look.room.corner, look.colours.card);
        ui.painter()
            .rect_stroke(card, look.room.corner, line, StrokeKind::Inside);
        // Room on the right for the half of the last number that stands beyond the frame.
        let inner = card
            .shrink2(vec2(look.room.inside, 6.0))
            .with_max_x(card.right() - 22.0);
        let mut child = ui.new_child(UiBuilder::new().max_rect(inner));
        let now_min = (tracks.at_s(scene.moment) - model.origin_s) / 60.0;
        let plot = frame(scene, says, &model).show(&mut child, |plot| {
            plot.set_plot_bounds_x(model.from_min..=model.to_min);
            plot.set_plot_bounds_y(lowest_deg(&model)..=1.3 * model.highest_deg);
            curves(plot, scene, says, &model);
            if (model.from_min..=model.to_min).contains(&now_min) {
                let cursor = Stroke::new(2.0, look.colours.text);
                plot.vline(VLine::new("", now_min).stroke(cursor).allow_hover(false));
            }
        });
        let names = plot.transform.frame();
        let screen = |point: PlotPoint| plot.transform.position_from_point(&point);
        self::names(ui, scene, says, &model, *names, screen);
        let response = plot.response;
        response
            .widget_info(|| WidgetInfo::labeled(Role::Canvas, true, says.text("plot-name", &[])));
        if response.hovered() || response.dragged() {
            ui.ctx().set_cursor_icon(CursorIcon::ResizeHorizontal);
        }
        if (response.clicked() || response.dragged())
            && let Some(pointer) = response.interact_pointer_pos()
        {
            let minutes = plot.transform.value_from_position(pointer).x;
            let minutes = minutes.clamp(model.from_min, model.to_min);
            let at_s = model.origin_s + 60.0 * minutes;
            let moment = tracks.whole_minute(scene.scales, scene.zone, at_s);
            commands.push(Command::SetMoment(moment));
        }
        response
    }
}

fn lowest_deg(model: &Model) -> f64 {
    -0.1 * model.highest_deg
}

/// The plot without anything in it: nothing that it shows can be moved, so nothing offers to.
fn frame<'a>(scene: &'a Scene<'a>, says: Says<'a>, model: &'a Model) -> Plot<'a> {
    let look = &scene.look;
    let font = look.font(look.sizes.least);
    let colour = look.colours.lesser;
    let axis_name = match model.origin {
        Origin::Sunset => "plot-minutes-sunset",
        Origin::Sunrise => "plot-minutes-sunrise",
        Origin::Start => "plot-minutes-start",
    };
    let hint = |axis: AxisHints<'a>| axis.tick_label_color(colour).tick_label_font(font.clone());
    let name = RichText::new(says.text(axis_name, &[]))
        .font(font.clone())
        .color(colour);
    let span_min = model.to_min - model.from_min;
    let x_step = [15.0, 30.0, 60.0, 120.0, 240.0]
        .into_iter()
        .find(|step| span_min / step <= 14.0)
        .unwrap_or(480.0);
    let y_step = if model.highest_deg > 40.0 { 20.0 } else { 10.0 };
    Plot::new("clearance")
        .custom_x_axes(vec![
            hint(AxisHints::new_x())
                .label(name)
                .formatter(move |mark, _| says.signed_minutes(mark.value)),
        ])
        .custom_y_axes(vec![
            hint(AxisHints::new_y())
                // Shown in a low plot too.
                .label_spacing(Rangef::new(6.0, 12.0))
                .formatter(move |mark, _| says.degrees(mark.value as i32)),
        ])
        .x_grid_spacer(move |input| marks(&input, x_step))
        .y_grid_spacer(move |input| marks(&input, y_step))
        .grid_color(look.colours.line)
        .grid_fade(0.0)
        .show_background(false)
        .show_crosshair(false)
        .allow_zoom(false)
        .allow_drag(false)
        .allow_scroll(false)
        .allow_boxed_zoom(false)
        .allow_axis_zoom_drag(false)
        .allow_double_click_reset(false)
        .label_formatter(|_| None)
        .sense(Sense::click_and_drag())
}

fn marks(input: &GridInput, step: f64) -> Vec<GridMark> {
    let (from, to) = input.bounds;
    let first = (from / step).ceil() as i64;
    let last = (to / step).floor() as i64;
    (first..=last)
        .map(|k| GridMark {
            value: k as f64 * step,
            step_size: step,
        })
        .collect()
}

/// The others in grey, the skyline dashed, the chosen body in amber over all.
fn curves<'a>(plot: &mut egui_plot::PlotUi<'a>, scene: &Scene<'_>, says: Says<'_>, model: &Model) {
    let colours = &scene.look.colours;
    let skyline = Stroke::new(1.0, colours.lesser);
    plot.hline(
        HLine::new("", 0.0)
            .stroke(skyline)
            .style(LineStyle::dashed_loose())
            .allow_hover(false),
    );
    for (k, curve) in model.curves.iter().enumerate().rev() {
        let stroke = match k {
            0 => Stroke::new(2.6, colours.chosen),
            _ => Stroke::new(1.2, colours.lesser.gamma_multiply(0.8)),
        };
        for piece in &curve.pieces {
            let line = Line::new(says.body(curve.body), piece.clone()).stroke(stroke);
            plot.line(line.allow_hover(false));
        }
    }
}

/// Each curve's name at the first of its points where it touches neither a curve nor another
/// name, the chosen body's first; one that finds no place is left out.
fn names(
    ui: &Ui,
    scene: &Scene<'_>,
    says: Says<'_>,
    model: &Model,
    frame: Rect,
    screen: impl Fn(PlotPoint) -> Pos2,
) {
    /// Points of a curve between places that are tried.
    const APART: usize = 6;
    let look = &scene.look;
    let painter = ui.painter().with_clip_rect(frame);
    let font = look.font(look.sizes.least);
    let title = painter.layout_no_wrap(
        says.text("plot-title", &[]),
        look.font(look.sizes.label),
        look.colours.lesser,
    );
    let title_at = Align2::RIGHT_TOP.anchor_size(frame.right_top() + vec2(-6.0, 0.0), title.size());
    painter.galley(title_at.min, title, look.colours.lesser);
    let on_screen: Vec<Vec<Pos2>> = model
        .curves
        .iter()
        .map(|curve| {
            let points = curve.pieces.iter().flatten();
            points
                .map(|[minutes, degrees]| screen(PlotPoint::new(*minutes, *degrees)))
                .collect()
        })
        .collect();
    let skyline_y = screen(PlotPoint::new(0.0, 0.0)).y;
    let mut taken = vec![title_at];
    for (k, curve) in model.curves.iter().enumerate() {
        let (colour, font) = match k {
            0 => (look.colours.chosen, look.bold(look.sizes.least)),
            _ => (look.colours.lesser, font.clone()),
        };
        let text = painter.layout_no_wrap(says.body(curve.body), font, colour);
        let size = text.size();
        let is_free = |rect: &Rect| {
            frame.contains_rect(*rect)
                && !rect.y_range().contains(skyline_y)
                && taken
                    .iter()
                    .all(|other| !other.expand(2.0).intersects(*rect))
                && on_screen
                    .iter()
                    .flatten()
                    .all(|point| !rect.contains(*point))
        };
        // From the end backwards: there the curves have drawn apart, and nothing is written yet.
        let place = on_screen[k]
            .iter()
            .rev()
            .step_by(APART)
            .flat_map(|at| {
                [-size.y - 3.0, 4.0]
                    .map(|below| Rect::from_min_size(pos2(at.x - 0.5 * size.x, at.y + below), size))
            })
            .find(is_free);
        if let Some(place) = place {
            painter.galley(place.min, text, colour);
            taken.push(place);
        }
    }
}
