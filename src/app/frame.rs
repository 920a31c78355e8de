//! Where everything stands in the window.
//!
//! Wide: the pickers, the view, the fade and the plot on the left; the sentence, the caution and
//! the figures in a column on the right. Narrow (below [`WIDE`] points): one column that
//! scrolls, the caution fixed above it.

use super::area::Area;
use super::cards::{
    appearing_card, caution_card, facts_card, instead_of_view, notice_line, sentence_card,
};
use super::command::{Command, Commands};
use super::palette::{Look, Theme};
use super::pickers::picker_row;
use super::transport::transport_ui;
use super::widgets::{bold, card_frame, choice, command_button, figure};
use super::window::DesktopWindow;
use crate::measure::CivilScale;
use crate::place::Stature;
use crate::words::decimal;
use eframe::egui::{
    Align, Align2, Area as Overlay, Button, Id, Label, Layout, Order, Rect, RichText, Role,
    ScrollArea, Sense, Stroke, Ui, UiBuilder, WidgetInfo, pos2, vec2,
};

/// From this width on, points, the right column stands beside the view.
const WIDE: f32 = 1200.0;
/// From this width on, points, the pickers leave the right column its whole height.
const ROW_BESIDE: f32 = 1500.0;
/// Below this width, points, inset and phase stand one below the other.
const COLUMN: f32 = 500.0;
/// From this height below the facts on, points, the right column holds the order of appearing
/// with inset and phase.
const ROOM_FOR_ORDER: f32 = 440.0;
/// Height of inset and phase where they stand beside one another.
const BESIDE_HEIGHT: f32 = 250.0;
/// The sentence card's height in the right column: four lines.
const SENTENCE_HEIGHT: f32 = 112.0;
/// The caution card's height where it has the column's width.
const CAUTION_HEIGHT: f32 = 100.0;

/// Heights of the three drawings on the left.
struct Heights {
    view: f32,
    fade: f32,
    plot: f32,
}

impl Heights {
    /// Shares out what there is; never less than can be read, so that the column may scroll.
    fn new(available: f32, gap: f32) -> Self {
        let fade = (0.29 * available).clamp(172.0, 220.0);
        let plot = (0.17 * available).clamp(100.0, 150.0);
        let view = (available - fade - plot - 2.0 * gap).max(220.0);
        Self { view, fade, plot }
    }
}

/// Heights of inset and phase in the right column.
fn column_heights(available: f32) -> (f32, f32) {
    let phase = (0.38 * available).clamp(126.0, 190.0);
    ((available - phase).clamp(160.0, 420.0), phase)
}

impl DesktopWindow {
    /// The whole window.
    pub(super) fn frame_ui(&mut self, ui: &mut Ui, commands: &mut Commands) {
        let look = self.palette.look(self.state.theme);
        let whole = ui.max_rect();
        ui.painter().rect_filled(whole, 0.0, look.colours.ground);
        let is_wide = whole.width() >= WIDE;
        let around = if is_wide {
            look.room.outer
        } else {
            look.room.inside
        };
        let inner = whole.shrink2(vec2(around, look.room.inside));
        let status_height = look.sizes.label + 8.0;
        let status = Rect::from_min_max(
            pos2(inner.left(), inner.bottom() - status_height),
            inner.max,
        );
        let rest = inner.with_max_y(status.top() - 4.0);
        ui.scope_builder(UiBuilder::new().max_rect(rest), |ui| {
            ui.spacing_mut().item_spacing = vec2(8.0, look.room.inside);
            self.top_bar(ui, &look, commands);
            if self.state.area == Area::Grounds {
                self.grounds_ui(ui, commands);
            } else if is_wide {
                self.wide(ui, &look, commands);
            } else {
                self.narrow(ui, &look, commands);
            }
        });
        self.said(ui, &look, rest, commands);
        ui.scope_builder(UiBuilder::new().max_rect(status), |ui| {
            self.status_line(ui, &look)
        });
    }

    /// Work that goes on and the oldest notice, over the foot of the window: nothing moves because
    /// there is something to say.
    fn said(&self, ui: &Ui, look: &Look, foot: Rect, commands: &mut Commands) {
        const WIDEST: f32 = 1000.0;
        let notice = self.notices.first();
        if notice.is_none() && !self.terrain.has_something_to_say() {
            return;
        }
        let width = foot.width().min(WIDEST);
        Overlay::new(Id::unique("notice"))
            .order(Order::Foreground)
            .pivot(Align2::CENTER_BOTTOM)
            .fixed_pos(foot.center_bottom())
            .show(ui.ctx(), |ui| {
                ui.set_width(width);
                if self.terrain.has_something_to_say() {
                    card_frame(look).show(ui, |ui| {
                        self.terrain.show(ui, look, &self.words, commands);
                    });
                }
                if let Some(notice) = notice {
                    notice_line(ui, look, notice, |ui| {
                        command_button(ui, &self.words, Command::DismissNotice, commands);
                    });
                }
            });
    }

    fn top_bar(&self, ui: &mut Ui, look: &Look, commands: &mut Commands) {
        ui.horizontal(|ui| {
            ui.spacing_mut().item_spacing.x = 8.0;
            let name = self.words.text("program");
            bold(ui, look, look.sizes.name, look.colours.chosen, &name);
            ui.add_space(look.room.inside);
            for area in Area::ALL {
                self.area_tab(ui, look, area, commands);
            }
            ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
                command_button(ui, &self.words, Command::ShowHelp, commands);
                ui.add_space(look.room.inside);
                for theme in Theme::ALL.into_iter().rev() {
                    let command = Command::SetTheme(theme);
                    let name = self.words.text(command.wording().unwrap_or_default());
                    if choice(ui, look, self.state.theme == theme, &name).clicked() {
                        commands.push(command);
                    }
                }
            });
        });
    }

    /// A work area's tab, underlined while it is on view.
    fn area_tab(&self, ui: &mut Ui, look: &Look, area: Area, commands: &mut Commands) {
        let command = Command::ShowArea(area);
        let name = self.words.text(command.wording().unwrap_or_default());
        let is_shown = self.state.area == area;
        let colour = if is_shown {
            look.colours.text
        } else {
            look.colours.lesser
        };
        let text = RichText::new(&name)
            .font(look.bold(look.sizes.sentence))
            .color(colour);
        let tab = ui.add(Button::new(text).frame(false));
        tab.widget_info(|| WidgetInfo::selected(Role::Tab, true, is_shown, &name));
        if is_shown {
            let under = tab.rect.translate(vec2(0.0, 2.0));
            ui.painter().hline(
                under.x_range(),
                under.bottom(),
                Stroke::new(2.0, look.colours.chosen),
            );
        }
        if tab.clicked() {
            commands.push(command);
        }
    }

    fn wide(&mut self, ui: &mut Ui, look: &Look, commands: &mut Commands) {
        let is_row_above = ui.available_width() < ROW_BESIDE;
        if is_row_above {
            picker_row(ui, look, &self.words, &self.state, commands);
        }
        let whole = ui.available_rect_before_wrap();
        let column = (0.245 * whole.width()).clamp(356.0, 420.0);
        let divide = whole.right() - column;
        let left = whole.with_max_x(divide - look.room.between);
        let right = whole.with_min_x(divide);
        ui.scope_builder(UiBuilder::new().max_rect(left), |ui| {
            if !is_row_above {
                picker_row(ui, look, &self.words, &self.state, commands);
            }
            let transport_height = ui.spacing().interact_size.y + 4.0;
            let gap = look.room.inside;
            let heights = Heights::new(ui.available_height() - transport_height - gap, gap);
            ScrollArea::vertical()
                .id_salt("left")
                .auto_shrink(false)
                .show(ui, |ui| {
                    self.drawings(ui, look, &heights, commands);
                });
        });
        ui.scope_builder(UiBuilder::new().max_rect(right), |ui| {
            if let Some(scene) = self.scene() {
                sentence_card(ui, look, self.sentence(), SENTENCE_HEIGHT);
                let motion = self.state.motion();
                caution_card(ui, &scene, &self.words, motion, CAUTION_HEIGHT);
            }
            ScrollArea::vertical()
                .id_salt("right")
                .auto_shrink(false)
                .show(ui, |ui| {
                    self.figures(ui, look, commands);
                });
        });
    }

    fn narrow(&mut self, ui: &mut Ui, look: &Look, commands: &mut Commands) {
        if let Some(scene) = self.scene() {
            caution_card(ui, &scene, &self.words, self.state.motion(), 0.0);
        }
        ScrollArea::vertical()
            .id_salt("all")
            .auto_shrink(false)
            .show(ui, |ui| {
                picker_row(ui, look, &self.words, &self.state, commands);
                if self.scene().is_some() {
                    sentence_card(ui, look, self.sentence(), 0.0);
                }
                let heights = Heights {
                    view: (0.5 * ui.available_width()).clamp(240.0, 420.0),
                    fade: 180.0,
                    plot: 130.0,
                };
                self.drawings(ui, look, &heights, commands);
                self.figures(ui, look, commands);
            });
    }

    /// View, transport, fade and plot, or the sentence that stands in their place.
    fn drawings(&mut self, ui: &mut Ui, look: &Look, heights: &Heights, commands: &mut Commands) {
        if let Err(error) = self.state.planned() {
            instead_of_view(ui, look, &error.to_string());
            return;
        }
        let mut drawings = std::mem::take(&mut self.drawings);
        if let Some(scene) = self.scene() {
            place(ui, heights.view, |ui| {
                drawings.horizon(ui, &scene, commands);
            });
            transport_ui(ui, look, &self.words, &self.state, commands);
            place(ui, heights.fade, |ui| {
                drawings.fade(ui, &scene, commands);
            });
            place(ui, heights.plot, |ui| {
                drawings.plot(ui, &scene, commands);
            });
        }
        self.drawings = drawings;
    }

    /// Facts, order of appearing, inset and phase: one below the other in a column, beside one
    /// another elsewhere. Where the column is low the order goes below the rest.
    fn figures(&mut self, ui: &mut Ui, look: &Look, commands: &mut Commands) {
        let mut drawings = std::mem::take(&mut self.drawings);
        if let Some(scene) = self.scene() {
            facts_card(ui, &scene, &self.words);
            let sightings = drawings.appearing(&scene);
            let gap = look.room.inside;
            let is_column = ui.available_width() < COLUMN;
            let has_room = !is_column || ui.available_height() > ROOM_FOR_ORDER;
            if has_room {
                appearing_card(ui, &scene, &self.words, &sightings);
            }
            if is_column {
                let (inset, phase) = column_heights(ui.available_height() - gap);
                place(ui, inset, |ui| {
                    drawings.inset(ui, &scene);
                });
                place(ui, phase, |ui| {
                    drawings.phase(ui, &scene, commands);
                });
            } else {
                ui.columns(2, |columns| {
                    place(&mut columns[0], BESIDE_HEIGHT, |ui| {
                        drawings.inset(ui, &scene);
                    });
                    place(&mut columns[1], BESIDE_HEIGHT, |ui| {
                        drawings.phase(ui, &scene, commands);
                    });
                });
            }
            if !has_room {
                appearing_card(ui, &scene, &self.words, &sightings);
            }
        }
        self.drawings = drawings;
    }

    /// Whether civil time means UT1 at the moment shown.
    fn is_counted_from_ut1(&self) -> bool {
        let (_, scale) = self.state.scales().civil(self.state.moment());
        scale == CivilScale::Ut1
    }

    /// Whose height the skyline is for.
    fn stature(&self) -> String {
        let stature = self.state.stature();
        let height_m = self.state.site().people.eye_height_m(stature);
        let id = Command::ChooseStature(stature).wording();
        self.words
            .text_with(id.unwrap_or_default(), &[("height", decimal(height_m, 2))])
    }

    /// The air on the right, and on the left as much of the keys as there is room for.
    fn status_line(&self, ui: &mut Ui, look: &Look) {
        let (font, colour) = (look.font(look.sizes.least), look.colours.lesser);
        ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
            let air = self.words.air(self.state.site_in_air());
            figure(ui, font.clone(), colour, &air);
            if self.state.stature() != Stature::Adult {
                figure(ui, font.clone(), colour, &self.stature());
            }
            if self.is_counted_from_ut1() {
                figure(ui, font.clone(), colour, &self.words.text("clock-is-ut1"));
            }
            ui.with_layout(Layout::left_to_right(Align::Center), |ui| {
                let id = match self.state.area {
                    Area::Lookout => "status-keys",
                    Area::Grounds => "status-keys-plan",
                };
                let keys = RichText::new(self.words.text(id));
                ui.add(Label::new(keys.font(font).color(colour)).truncate());
            });
        });
    }
}

/// Gives a drawing a rectangle of the whole width and a fixed height.
fn place(ui: &mut Ui, height: f32, draw: impl FnOnce(&mut Ui)) {
    let size = vec2(ui.available_width(), height);
    let (rect, _) = ui.allocate_exact_size(size, Sense::hover());
    let mut child = ui.new_child(UiBuilder::new().max_rect(rect));
    child.shrink_clip_rect(rect);
    draw(&mut child);
}
