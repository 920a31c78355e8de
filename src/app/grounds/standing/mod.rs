//! Where to stand: minutes for every square metre of the grounds.
//!
//! The work runs on a thread of its own ([`job`]) and answers in parts, which are shown at once:
//! under the plan as colours with lines of equal minutes, and in a card as the best places.

mod heat;
mod job;
mod paint;
mod reading;

use super::Desk;
use crate::app::command::{Command, Commands};
use crate::app::palette::{Look, Theme};
use crate::app::scene::Scene;
use crate::app::widgets::{bold, card, choice, name_it, text};
use crate::app::worker::Worker;
use crate::light::Eye;
use crate::place::{PlanPoint, Spot};
use crate::plan::Half;
use crate::plan::standing::Contour;
use crate::sky::Body;
use crate::words::{Words, decimal};
use eframe::egui::{
    Context, Painter, ProgressBar, Rect, Role, Sense, TextureHandle, TextureOptions, Ui,
    WidgetInfo, vec2,
};
use job::{Asked, Found, News, Summing};
use paint::Line;
use std::cell::Cell;
use std::sync::Arc;
use std::time::Duration;

pub use paint::ToScreen;

/// Numbers of nights that can be asked for.
const NIGHTS: [u32; 4] = [1, 7, 14, 28];

/// How soon news are painted: the plan was painted before they came in.
const SOON: Duration = Duration::from_millis(5);

/// What it keeps between frames.
pub struct Standing {
    is_on: bool,
    nights: u32,
    summing: Summing,
    worker: Worker<News>,
    /// What the present map was asked for, and by which choices.
    asked: Option<(Key, Asked)>,
    map: Option<Map>,
    /// Why there is none.
    error: Option<String>,
    /// Whether the user has stopped the work.
    is_stopped: bool,
    /// Whether the next click on the map makes a spot.
    is_placing: bool,
    /// The point of the map under the pointer, and whether it was clicked: seen while painting.
    pointed: Cell<Option<(PlanPoint, bool)>>,
    /// What is read there.
    reading: Option<String>,
}

/// The choices that a map belongs to; cheap to compare in every frame.
#[derive(Clone, Copy, Debug, PartialEq)]
struct Key {
    plan_count: u64,
    half: Half,
    body: Body,
    eye: Eye,
    nights: u32,
    summing: Summing,
}

/// What is drawn of the answer.
struct Map {
    found: Found,
    /// Fewest and most minutes.
    range: (f64, f64),
    lines: Vec<Line>,
    texture: TextureHandle,
    theme: Theme,
}

impl Default for Standing {
    fn default() -> Self {
        Self {
            is_on: true,
            nights: 1,
            summing: Summing::default(),
            worker: Worker::default(),
            asked: None,
            map: None,
            error: None,
            is_stopped: false,
            is_placing: false,
            pointed: Cell::new(None),
            reading: None,
        }
    }
}

impl Map {
    fn new(ctx: &Context, look: &Look, words: &Words, found: Found) -> Self {
        let range = heat::range(&found.map).unwrap_or_default();
        let image = heat::image(&found.map, range, look);
        let line = |contour: &Contour| Line {
            text: words.text_with(
                "standing-minutes",
                &[("minutes", decimal(contour.minutes, 0))],
            ),
            points: contour.line.clone(),
        };
        Self {
            range,
            lines: found.contours.iter().map(line).collect(),
            texture: ctx.load_texture("standing", image, TextureOptions::NEAREST),
            theme: look.theme,
            found,
        }
    }
}

impl Standing {
    /// Paints the map under the plan.
    pub fn paint_under(&self, painter: &Painter, to_screen: ToScreen<'_>, look: &Look) {
        let Some(map) = self.map.as_ref().filter(|_| self.is_on) else {
            self.pointed.set(None);
            return;
        };
        paint::squares(painter, to_screen, &map.found.map.raster, map.texture.id());
        paint::contours(painter, to_screen, look, &map.lines);
        self.pointed.set(pointed(painter, to_screen, map));
    }

    /// Whether the next click on the map makes a spot.
    pub fn is_placing(&self) -> bool {
        self.is_on && self.is_placing
    }

    /// What somebody at the point under the pointer has.
    pub fn reading(&self) -> Option<&str> {
        self.reading.as_deref()
    }

    /// Where the best places' numbers stand, which nothing is to cover.
    pub fn marks(&self, to_screen: ToScreen<'_>, spots: &[PlanPoint]) -> Vec<Rect> {
        let map = self.map.as_ref().filter(|_| self.is_on);
        map.map_or_else(Vec::new, |map| {
            paint::marks(to_screen, &map.found.best, spots)
        })
    }

    /// Paints what is written on the map over the plan: the minutes of the lines where neither
    /// a name nor a number stands, and the numbers.
    pub fn paint_over(
        &self,
        painter: &Painter,
        to_screen: ToScreen<'_>,
        look: &Look,
        (marks, mut taken): (&[Rect], Vec<Rect>),
    ) {
        let Some(map) = self.map.as_ref().filter(|_| self.is_on) else {
            return;
        };
        taken.extend_from_slice(marks);
        paint::figures(painter, to_screen, look, &map.lines, taken);
        paint::numbers(painter, look, marks);
    }

    /// Shows the card: choices, progress, legend, the best places.
    pub fn show(&mut self, ui: &mut Ui, desk: &Desk<'_>, commands: &mut Commands) {
        let Some(scene) = desk.scene else {
            self.worker.cancel();
            self.map = None;
            self.reading = None;
            return;
        };
        self.reading = None;
        self.take_news(ui.ctx(), desk);
        self.ask(ui.ctx(), desk);
        card(ui, desk.look, 0.0, |ui| {
            ui.spacing_mut().item_spacing = vec2(8.0, 8.0);
            self.heading(ui, desk);
            if !self.is_on {
                return;
            }
            self.nights_ui(ui, desk);
            self.progress_ui(ui, desk);
            if let Some(error) = &self.error {
                text(
                    ui,
                    desk.look,
                    desk.look.sizes.label,
                    desk.look.colours.caution,
                    error,
                );
            }
            self.answers(ui, desk, scene, commands);
        });
    }

    /// Takes in what the worker has told.
    fn take_news(&mut self, ctx: &Context, desk: &Desk<'_>) {
        let look = desk.look;
        match self.worker.news() {
            Some(Ok(found)) => {
                self.map = Some(Map::new(ctx, look, desk.words, found));
                self.error = None;
                ctx.request_repaint_after(SOON);
            }
            Some(Err(error)) => {
                self.map = None;
                self.error = Some(error.to_string());
            }
            None => {}
        }
        if let Some(map) = &mut self.map
            && map.theme != look.theme
        {
            let image = heat::image(&map.found.map, map.range, look);
            map.texture.set(image, TextureOptions::NEAREST);
            map.theme = look.theme;
        }
    }

    /// Begins the work wherever something has changed that the map depends on, but not while a
    /// change still goes on.
    fn ask(&mut self, ctx: &Context, desk: &Desk<'_>) {
        let state = desk.state;
        let (Ok(planned), true) = (state.planned(), self.is_on) else {
            return;
        };
        let key = Key {
            plan_count: planned.count,
            half: state.half(),
            body: state.body(),
            eye: state.eye(),
            nights: self.nights,
            summing: self.summing,
        };
        let is_known = self.asked.as_ref().is_some_and(|(known, _)| *known == key);
        if is_known || state.is_dragging() {
            return;
        }
        let asked = Asked {
            site: Arc::new(state.site_in_air().clone()),
            date: state.date(),
            nights: self.nights,
            summing: self.summing,
            half: state.half(),
            body: state.body(),
            eye: state.eye(),
            stature: state.stature(),
            scales: state.scales(),
        };
        if let Some((known, before)) = &mut self.asked
            && *before == asked
        {
            // Only the chosen spot differs.
            *known = key;
            return;
        }
        self.asked = Some((key, asked));
        self.start(ctx, desk);
    }

    fn start(&mut self, ctx: &Context, desk: &Desk<'_>) {
        let (Some((_, asked)), Ok(planned)) = (&self.asked, desk.state.planned()) else {
            return;
        };
        self.is_stopped = false;
        let (asked, ephemeris) = (asked.clone(), desk.state.ephemeris().clone());
        let shown = planned.night_sky.clone();
        let started = self.worker.start(ctx, "standing map", move |telling| {
            asked.work(&shown, &ephemeris, telling);
        });
        self.error = started.err().map(|error| error.to_string());
    }

    fn heading(&mut self, ui: &mut Ui, desk: &Desk<'_>) {
        let look = desk.look;
        ui.horizontal_wrapped(|ui| {
            let title = desk.words.text("standing-title");
            bold(ui, look, look.sizes.control, look.colours.text, &title);
            let name = desk.words.text("standing-map");
            if choice(ui, look, self.is_on, &name).clicked() {
                self.is_on = !self.is_on;
                self.asked = None;
                if !self.is_on {
                    self.worker.cancel();
                    self.is_placing = false;
                }
            }
            if self.is_on {
                let name = desk.words.text("standing-place");
                if choice(ui, look, self.is_placing, &name).clicked() {
                    self.is_placing = !self.is_placing;
                }
            }
        });
    }

    fn nights_ui(&mut self, ui: &mut Ui, desk: &Desk<'_>) {
        let look = desk.look;
        ui.horizontal_wrapped(|ui| {
            for nights in NIGHTS {
                let name = desk
                    .words
                    .text_with("standing-nights", &[("nights", nights)]);
                if choice(ui, look, self.nights == nights, &name).clicked() {
                    self.nights = nights;
                }
            }
            if self.nights > 1 {
                for (summing, id) in [
                    (Summing::Sum, "standing-sum"),
                    (Summing::Least, "standing-least"),
                ] {
                    let name = desk.words.text(id);
                    if choice(ui, look, self.summing == summing, &name).clicked() {
                        self.summing = summing;
                    }
                }
            }
        });
    }

    /// How far the work has come, with its cancel button; always as high, so that nothing jumps.
    fn progress_ui(&mut self, ui: &mut Ui, desk: &Desk<'_>) {
        const WIDTH: f32 = 160.0;
        let (look, words) = (desk.look, desk.words);
        ui.horizontal(|ui| {
            ui.set_min_height(30.0);
            if let Some(share) = self.worker.share() {
                let bar = ProgressBar::new(share as f32)
                    .desired_width(WIDTH)
                    .desired_height(12.0)
                    .fill(look.colours.chosen);
                let bar = ui.add(bar);
                name_it(
                    &bar,
                    Role::ProgressIndicator,
                    &words.text("standing-progress"),
                );
                let cancel = ui.button(words.text("standing-cancel"));
                if cancel.clicked() {
                    self.worker.cancel();
                    self.is_stopped = true;
                }
            } else if self.is_stopped {
                text(
                    ui,
                    look,
                    look.sizes.label,
                    look.colours.lesser,
                    &words.text("standing-stopped"),
                );
                if ui.button(words.text("standing-again")).clicked() {
                    self.start(ui.ctx(), desk);
                }
            } else {
                let size = vec2(ui.available_width(), 26.0);
                let (rect, response) = ui.allocate_exact_size(size, Sense::hover());
                if let Some(map) = &self.map {
                    paint::legend(ui.painter(), rect, look, words, map.range);
                    let (least, most) = map.range;
                    let name = words.text_with(
                        "standing-legend",
                        &[("least", decimal(least, 0)), ("most", decimal(most, 0))],
                    );
                    response.widget_info(|| WidgetInfo::labeled(Role::Canvas, true, &name));
                }
            }
        });
    }

    fn answers(
        &mut self,
        ui: &mut Ui,
        desk: &Desk<'_>,
        scene: &Scene<'_>,
        commands: &mut Commands,
    ) {
        let (Some(map), Some((_, asked)), Ok(planned)) =
            (&self.map, &self.asked, desk.state.planned())
        else {
            return;
        };
        let sky = &planned.night_sky;
        let look = desk.look;
        let (size, colour) = (look.sizes.label, look.colours.text);
        for (index, (at, stay)) in map.found.best.iter().enumerate() {
            let said = reading::place(desk, scene, (asked, sky), (*at, stay));
            best_ui(ui, desk, (index + 1, *at), &said, commands);
        }
        for line in reading::costs(desk, &map.found) {
            text(ui, look, size, colour, &line);
        }
        let line = desk.words.text("standing-point-at");
        text(ui, look, size, look.colours.lesser, &line);
        let pointed = self.pointed.get();
        // Read under the plan, where the pointer is: this card may be out of sight.
        self.reading =
            pointed.map(|(at, _)| reading::pointed(desk, scene, (asked, sky), &map.found, at));
        if let Some((at, true)) = pointed
            && self.is_placing
        {
            self.is_placing = false;
            stand(desk, at, commands);
        }
    }
}

/// One of the best places, with its button.
fn best_ui(
    ui: &mut Ui,
    desk: &Desk<'_>,
    (number, at): (usize, PlanPoint),
    said: &str,
    commands: &mut Commands,
) {
    let look = desk.look;
    ui.horizontal(|ui| {
        let name = desk.words.text_with(
            "standing-stand-here-named",
            &[("number", number.to_string())],
        );
        let button = ui.button(desk.words.text("standing-stand-here"));
        name_it(&button, Role::Button, &name);
        if button.clicked() {
            stand(desk, at, commands);
        }
        let line = desk.words.text_with(
            "standing-best",
            &[("number", number.to_string()), ("said", said.to_owned())],
        );
        text(ui, look, look.sizes.label, look.colours.text, &line);
    });
}

/// The point of the map under the pointer, and whether it is clicked.
fn pointed(painter: &Painter, to_screen: ToScreen<'_>, map: &Map) -> Option<(PlanPoint, bool)> {
    let ctx = painter.ctx();
    let (pointer, is_clicked) =
        ctx.input(|input| (input.pointer.hover_pos(), input.pointer.primary_clicked()));
    let pointer = pointer.filter(|at| painter.clip_rect().contains(*at))?;
    if ctx.layer_id_at(pointer) != Some(painter.layer_id()) {
        return None;
    }
    // North is up and both scales are one: two points tell everything.
    let [near, far] = paint::corners(&map.found.map.raster);
    let (from, to) = (to_screen(near), to_screen(far));
    let east = f64::from((pointer.x - from.x) / (to.x - from.x));
    let north = f64::from((pointer.y - from.y) / (to.y - from.y));
    let at = PlanPoint::new(
        near.east_m + east * (far.east_m - near.east_m),
        near.north_m + north * (far.north_m - near.north_m),
    );
    map.found.map.raster.square(at)?;
    Some((at, is_clicked))
}

/// Makes a spot at a point and chooses it.
fn stand(desk: &Desk<'_>, at: PlanPoint, commands: &mut Commands) {
    let mut site = desk.state.site().clone();
    let to_tenth = |metres: f64| (metres * 10.0).round() / 10.0;
    let at = PlanPoint::new(to_tenth(at.east_m), to_tenth(at.north_m));
    let names = (site.spots.len() + 1..).map(|number| {
        desk.words
            .text_with("new-spot-name", &[("number", number.to_string())])
    });
    let is_free = |name: &String| site.spots.iter().all(|spot| spot.name != *name);
    let Some(name) = names.into_iter().find(is_free) else {
        return;
    };
    let index = site.spots.len();
    let mut spot = Spot::at(&name, at);
    spot.eye_height_m = site.people.adult_m;
    site.spots.push(spot);
    let is_right = site.check_rules().is_ok();
    commands.push(Command::EditSite(Box::new(site)));
    // A refused change is said by the plan, and the chosen spot stays.
    if is_right {
        commands.push(Command::ChooseSpot(index));
    }
}
