//! The plot: the chosen body's margin for each eye against minutes from sunset or sunrise.

pub(super) mod model;
mod names;

use super::model::Tracks;
use super::says::Says;
use super::{Kept, SpanKey};
use crate::app::command::{Command, Commands};
use crate::app::palette::Look;
use crate::app::scene::Scene;
use crate::light::Eye;
use eframe::egui::epaint::Mesh;
use eframe::egui::{
    Color32, CursorIcon, Pos2, Rangef, Rect, Response, RichText, Role, Sense, Shape, Stroke,
    StrokeKind, Ui, UiBuilder, WidgetInfo, pos2, vec2,
};
use egui_plot::{AxisHints, GridInput, GridMark, HLine, Line, LineStyle, Plot, PlotPoint, VLine};
use model::{Model, Origin};

/// The plot and what it keeps between frames.
#[derive(Default)]
pub struct MarginPlot {
    model: Kept<SpanKey, Model>,
}

impl MarginPlot {
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
        // Room on the right for the eyes' names.
        let inner = card
            .shrink2(vec2(look.room.inside, 6.0))
            .with_max_x(card.right() - names::room(ui, look, says));
        let mut child = ui.new_child(UiBuilder::new().max_rect(inner));
        let now_min = (tracks.at_s(scene.moment) - model.origin_s) / 60.0;
        let below = child.painter().add(Shape::Noop);
        let plot = frame(scene, says, &model).show(&mut child, |plot| {
            plot.set_plot_bounds_x(model.from_min..=model.to_min);
            plot.set_plot_bounds_y(model.lowest_mag..=model.highest_mag);
            curves(plot, scene, says, &model);
            if (model.from_min..=model.to_min).contains(&now_min) {
                let cursor = Stroke::new(2.0, look.colours.text);
                plot.vline(VLine::new("", now_min).stroke(cursor).allow_hover(false));
            }
        });
        let frame = *plot.transform.frame();
        let screen = |[minutes, mag]: [f64; 2]| {
            let point = PlotPoint::new(minutes, mag);
            plot.transform.position_from_point(&point)
        };
        let grounds = vec![
            daylight(&model, look, frame, screen),
            spread(&model, colour(look, scene.eye), frame, screen),
        ];
        child.painter().set(below, Shape::Vec(grounds));
        names::paint(ui, scene, says, &model, frame, screen);
        let response = plot.response;
        let body = says.body(scene.body);
        let name = says.text("plot-name", &[("body", &body)]);
        response.widget_info(|| WidgetInfo::labeled(Role::Canvas, true, &name));
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
    let minutes = says.text(axis_name, &[]);
    let name = RichText::new(says.text("plot-title", &[("minutes", &minutes)]))
        .font(font.clone())
        .color(colour);
    let span_min = model.to_min - model.from_min;
    let x_step = [15.0, 30.0, 60.0, 120.0, 240.0]
        .into_iter()
        .find(|step| span_min / step <= 14.0)
        .unwrap_or(480.0);
    let span_mag = model.highest_mag - model.lowest_mag;
    let y_step = if span_mag > 7.0 { 4.0 } else { 2.0 };
    Plot::new("margin")
        .custom_x_axes(vec![
            hint(AxisHints::new_x())
                .label(name)
                .formatter(move |mark, _| says.signed(mark.value)),
        ])
        .custom_y_axes(vec![
            hint(AxisHints::new_y())
                // Shown in a low plot too.
                .label_spacing(Rangef::new(6.0, 12.0))
                .formatter(move |mark, _| says.signed(mark.value)),
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

/// The colour of an eye's curve and name.
fn colour(look: &Look, eye: Eye) -> Color32 {
    match eye {
        Eye::PasserBy => look.colours.passer_by,
        Eye::Visitor => look.colours.chosen,
        Eye::Keen => look.colours.keen,
        Eye::Optics => look.colours.lesser,
    }
}

/// The threshold dashed, the chosen eye's curve the broadest and over all.
fn curves<'a>(plot: &mut egui_plot::PlotUi<'a>, scene: &Scene<'_>, says: Says<'_>, model: &Model) {
    let look = &scene.look;
    plot.hline(
        HLine::new("", 0.0)
            .stroke(Stroke::new(1.0, look.colours.lesser))
            .style(LineStyle::dashed_loose())
            .allow_hover(false),
    );
    let is_chosen = |curve: &&model::Curve| curve.eye == scene.eye;
    let others = model.curves.iter().filter(|curve| !is_chosen(curve));
    for curve in others.chain(model.curves.iter().filter(is_chosen)) {
        let width = if curve.eye == scene.eye { 2.6 } else { 1.4 };
        let stroke = Stroke::new(width, colour(look, curve.eye));
        for piece in &curve.pieces {
            let line = Line::new(says.eye(curve.eye), piece.clone()).stroke(stroke);
            plot.line(line.allow_hover(false));
        }
    }
}

/// The ground of the part in which the Sun is up.
fn daylight(model: &Model, look: &Look, frame: Rect, screen: impl Fn([f64; 2]) -> Pos2) -> Shape {
    let Some((from, to)) = model.daylight_min else {
        return Shape::Noop;
    };
    let [from, to] = [from, to].map(|minutes| screen([minutes, 0.0]).x);
    let ground = Rect::from_x_y_ranges(from..=to, frame.y_range());
    Shape::rect_filled(ground, 0.0, look.colours.line.gamma_multiply(0.6))
}

/// The chosen eye's spread as a band, cut off at the frame.
fn spread(model: &Model, colour: Color32, frame: Rect, screen: impl Fn([f64; 2]) -> Pos2) -> Shape {
    const SHADE: f32 = 0.22;
    let colour = colour.gamma_multiply(SHADE);
    let mut mesh = Mesh::default();
    for piece in &model.spread {
        for (k, [minutes, least, greatest]) in piece.iter().enumerate() {
            let first = mesh.vertices.len() as u32;
            for mag in [*least, *greatest] {
                let at = screen([*minutes, mag]);
                let held = pos2(at.x, at.y.clamp(frame.top(), frame.bottom()));
                mesh.colored_vertex(held, colour);
            }
            if k > 0 {
                mesh.add_triangle(first - 2, first - 1, first);
                mesh.add_triangle(first - 1, first, first + 1);
            }
        }
    }
    Shape::mesh(mesh)
}
