//! The picture with everything marked on it, and touching it.

use super::super::Desk;
use super::{Mark, Photo, Touch};
use crate::app::palette::Look;
use crate::measure::Angle;
use crate::place::survey::photo::{Direction, PhotoFit, Pixel};
use crate::words::{Words, decimal};
use eframe::egui::{
    Align2, Color32, Painter, Pos2, Rect, Response, Role, Sense, Shape, Stroke, TextureOptions, Ui,
    Vec2, WidgetInfo, pos2, vec2,
};

/// Nearer than this to a point, points, it is that point which is dragged.
const REACH: f32 = 10.0;

/// What the form's other parts take of the window's height, points.
const ROOM_FOR_FORM: f32 = 600.0;

/// Which part of the picture is on view.
#[derive(Clone, Copy, Debug)]
pub(super) struct View {
    /// 1: the whole picture.
    zoom: f32,
    /// The picture's point at the middle of the view, as a share of its sides.
    middle: Vec2,
    /// Which of the points being touched is dragged.
    dragged: Option<usize>,
}

impl Default for View {
    fn default() -> Self {
        Self {
            zoom: 1.0,
            middle: vec2(0.5, 0.5),
            dragged: None,
        }
    }
}

/// From the picture's pixels to the screen and back.
#[derive(Clone, Copy)]
struct Frame {
    origin: Pos2,
    scale: f32,
}

impl Frame {
    fn new(view: &View, area: Rect, size: Vec2) -> Self {
        let scale = view.zoom * (area.width() / size.x).min(area.height() / size.y);
        Self {
            origin: area.center() - view.middle * size * scale,
            scale,
        }
    }
    fn screen(&self, at: Pixel) -> Pos2 {
        self.origin + vec2(at.x as f32, at.y as f32) * self.scale
    }
    fn pixel(&self, at: Pos2) -> Pixel {
        let from = (at - self.origin) / self.scale;
        Pixel {
            x: f64::from(from.x),
            y: f64::from(from.y),
        }
    }
}

impl Photo {
    /// Shows the picture and lets it be marked.
    pub(super) fn picture_ui(&mut self, ui: &mut Ui, desk: &Desk<'_>, fitted: Option<&PhotoFit>) {
        let Some(picture) = &self.picture else { return };
        let size = vec2(picture.size_px[0] as f32, picture.size_px[1] as f32);
        let height = (ui.ctx().content_rect().height() - ROOM_FOR_FORM).clamp(200.0, 720.0);
        let area = vec2(ui.available_width(), height);
        let (area, response) = ui.allocate_exact_size(area, Sense::click_and_drag());
        let name = desk.words.text("photo-canvas");
        response.widget_info(|| WidgetInfo::labeled(Role::Canvas, true, &name));
        let theme = desk.look.theme;
        let texture = match &self.texture {
            Some((shown, texture)) if *shown == theme => texture.id(),
            _ => {
                let image = picture.image_for(desk.look);
                let texture = ui
                    .ctx()
                    .load_texture("photo", image, TextureOptions::LINEAR);
                let id = texture.id();
                self.texture = Some((theme, texture));
                id
            }
        };
        self.turn_view(ui, &response, area, size);
        let frame = Frame::new(&self.view, area, size);
        self.touch(&response, frame, size, fitted);
        let painter = ui.painter_at(area);
        painter.rect_filled(area, 0.0, desk.look.colours.ground);
        let whole = Rect::from_min_size(frame.origin, size * frame.scale);
        let uv = Rect::from_min_max(pos2(0.0, 0.0), pos2(1.0, 1.0));
        painter.image(texture, whole, uv, Color32::WHITE);
        if let Some(fitted) = fitted {
            scale(&painter, desk.look, desk.words, frame, fitted);
            paths(&painter, desk, frame, fitted);
        }
        self.points(&painter, desk.look, frame);
    }

    /// The wheel zooms at the pointer; the middle or right button drags the picture.
    fn turn_view(&mut self, ui: &Ui, response: &Response, area: Rect, size: Vec2) {
        let before = Frame::new(&self.view, area, size);
        if let Some(at) = response.hover_pos() {
            let (wheel, pinch) =
                ui.input(|input| (input.smooth_scroll_delta.y, input.zoom_delta()));
            let factor = pinch * (0.003 * wheel).exp();
            if factor != 1.0 {
                let held = (at - before.origin) / before.scale;
                self.view.zoom = (self.view.zoom * factor).clamp(1.0, 40.0);
                let after = Frame::new(&self.view, area, size);
                let moved = after.origin + held * after.scale - at;
                self.view.middle += moved / (size * after.scale);
            }
        }
        let is_panning = response.dragged_by(eframe::egui::PointerButton::Secondary)
            || response.dragged_by(eframe::egui::PointerButton::Middle);
        if is_panning {
            self.view.middle -= response.drag_delta() / (size * before.scale);
        }
        self.view.middle = self.view.middle.clamp(Vec2::ZERO, Vec2::splat(1.0));
    }

    /// A click adds a point; a drag moves the one that it began at.
    fn touch(&mut self, response: &Response, frame: Frame, size: Vec2, fitted: Option<&PhotoFit>) {
        let Some(pointer) = response.interact_pointer_pos() else {
            self.view.dragged = None;
            return;
        };
        let at = frame.pixel(pointer);
        let at = Pixel {
            x: at.x.clamp(0.0, f64::from(size.x)),
            y: at.y.clamp(0.0, f64::from(size.y)),
        };
        if response.drag_started_by(eframe::egui::PointerButton::Primary) {
            self.view.dragged = self.nearest(frame, pointer);
        }
        if response.dragged_by(eframe::egui::PointerButton::Primary)
            && let Some(index) = self.view.dragged
        {
            self.move_point(index, at);
        }
        if response.clicked() {
            let known = fitted.map(|fitted| fitted.picture.direction(at));
            self.add_point(at, known);
        }
    }

    fn nearest(&self, frame: Frame, pointer: Pos2) -> Option<usize> {
        let points: Vec<Pixel> = match self.touch {
            Touch::Mark => self.marks.iter().map(|mark| mark.at).collect(),
            Touch::Level => self.level.clone(),
            Touch::Outline => self.outline.clone(),
        };
        let distance = |at: &Pixel| frame.screen(*at).distance(pointer);
        (0..points.len())
            .filter(|index| distance(&points[*index]) < REACH)
            .min_by(|a, b| distance(&points[*a]).total_cmp(&distance(&points[*b])))
    }

    fn move_point(&mut self, index: usize, at: Pixel) {
        let point = match self.touch {
            Touch::Mark => self.marks.get_mut(index).map(|mark| &mut mark.at),
            Touch::Level => self.level.get_mut(index),
            Touch::Outline => self.outline.get_mut(index),
        };
        if let Some(point) = point {
            *point = at;
        }
    }

    fn add_point(&mut self, at: Pixel, known: Option<Direction>) {
        match self.touch {
            Touch::Mark => self.marks.push(Mark {
                at,
                bearing_deg: known.map_or(180.0, |known| known.azimuth.degrees()),
                altitude_deg: 0.0,
                is_altitude_known: false,
            }),
            Touch::Level => self.level.push(at),
            Touch::Outline => self.outline.push(at),
        }
    }

    fn points(&self, painter: &Painter, look: &Look, frame: Frame) {
        let colours = &look.colours;
        let outline: Vec<Pos2> = self.outline.iter().map(|at| frame.screen(*at)).collect();
        for at in &outline {
            painter.circle_filled(*at, 3.5, colours.chosen);
        }
        painter.add(Shape::line(outline, Stroke::new(2.5, colours.chosen)));
        for at in &self.level {
            let at = frame.screen(*at);
            painter.hline(
                at.x - 14.0..=at.x + 14.0,
                at.y,
                Stroke::new(2.5, colours.keen),
            );
        }
        for (index, mark) in self.marks.iter().enumerate() {
            let at = frame.screen(mark.at);
            let stroke = Stroke::new(2.0, colours.passer_by);
            painter.circle_stroke(at, 6.0, stroke);
            painter.vline(at.x, at.y - 22.0..=at.y - 6.0, stroke);
            label(
                painter,
                look,
                at - vec2(0.0, 24.0),
                &(index + 1).to_string(),
            );
        }
    }
}

/// Letters with a ground that reads over any picture.
fn label(painter: &Painter, look: &Look, at: Pos2, words: &str) {
    let font = look.font(look.sizes.label);
    let galley = painter.layout_no_wrap(words.to_owned(), font, look.colours.sky_text);
    let rect = Align2::CENTER_BOTTOM.anchor_size(at, galley.size());
    painter.rect_filled(
        rect.expand(2.0),
        2.0,
        look.colours.sky_shade.gamma_multiply(0.7),
    );
    painter.galley(rect.min, galley, look.colours.sky_text);
}

/// The level and the azimuths, every ten degrees, as the fit has them.
fn scale(painter: &Painter, look: &Look, words: &Words, frame: Frame, fitted: &PhotoFit) {
    let at = |azimuth_deg: f64, altitude_deg: f64| {
        let direction = Direction {
            azimuth: Angle::from_degrees(azimuth_deg).wrapped(),
            altitude: Angle::from_degrees(altitude_deg),
        };
        fitted.picture.pixel(direction).map(|at| frame.screen(at))
    };
    let shade = Stroke::new(1.0, look.colours.sky_text.gamma_multiply(0.5));
    for tens in 0..36 {
        let azimuth_deg = 10.0 * f64::from(tens);
        let rising: Vec<Pos2> = (0..=20)
            .filter_map(|k| at(azimuth_deg, f64::from(k)))
            .collect();
        if let Some(foot) = rising.first() {
            let name = if tens % 9 == 0 {
                words.compass_point((tens / 9 * 4) as usize)
            } else {
                format!("{}°", decimal(azimuth_deg, 0))
            };
            label(painter, look, *foot + vec2(0.0, 18.0), &name);
        }
        painter.add(Shape::line(rising, shade));
    }
    for altitude_deg in [0.0, 10.0, 20.0] {
        for start in 0..120 {
            let from = 3.0 * f64::from(start);
            if let (Some(a), Some(b)) = (at(from, altitude_deg), at(from + 3.0, altitude_deg))
                && a.distance(b) < 0.5 * painter.clip_rect().width()
            {
                painter.line_segment([a, b], shade);
            }
        }
    }
}

/// The chosen body's path through the shown half-night.
fn paths(painter: &Painter, desk: &Desk<'_>, frame: Frame, fitted: &PhotoFit) {
    const STEP_S: f64 = 300.0;
    let Some(scene) = desk.scene else { return };
    let (start, end) = scene.ends();
    let steps = (end.seconds_since(start) / STEP_S) as u32;
    let mut path: Vec<Pos2> = Vec::new();
    for step in 0..=steps {
        let epoch = scene.span.at(start.plus_seconds(STEP_S * f64::from(step)));
        let place = epoch.seen_by(scene.observer).refracted_place(scene.body);
        if place.altitude < Angle::ZERO {
            continue;
        }
        let direction = Direction {
            azimuth: place.azimuth,
            altitude: place.altitude,
        };
        if let Some(at) = fitted.picture.pixel(direction) {
            path.push(frame.screen(at));
        }
    }
    let dashes = Shape::dashed_line(&path, Stroke::new(2.0, desk.look.colours.seen), 6.0, 5.0);
    painter.extend(dashes);
}
