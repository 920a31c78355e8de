//! The work area Grounds: the plan of the site, the skyline from the chosen spot, where to stand.
//!
//! The plan stands on the left; on the right the skyline from the chosen spot, the spots side by
//! side, and what is known of the thing selected. Everything draws from a [`Desk`] and only
//! records commands; a change is a whole changed site in [`Command::EditSite`] or, while it goes
//! on, [`Command::DragSite`].
//!
//! [`Command::EditSite`]: super::command::Command::EditSite
//! [`Command::DragSite`]: super::command::Command::DragSite

mod compare;
pub mod exchange;
pub mod measure;
mod plan;
mod selected;
mod standing;
mod strip;

pub use plan::{backdrop, keys as plan_keys};

use super::command::{Command, Commands};
use super::palette::Look;
use super::scene::Scene;
use super::state::State;
use super::widgets::command_button;
use super::window::DesktopWindow;
use crate::words::Words;
use eframe::egui::{ScrollArea, Sense, Ui, UiBuilder, vec2};

/// What the user has selected on the plan.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Selection {
    /// A spot by its place in the site's list.
    Spot(usize),
    /// An obstacle by its place in the site's list.
    Obstacle(usize),
    /// An excluded area by its place in the site's list.
    Exclusion(usize),
    /// The outline of the grounds.
    Outline,
}

/// What the area keeps between frames.
#[derive(Default)]
pub struct GroundsArea {
    /// What is selected.
    selection: Option<Selection>,
    plan: plan::Plan,
    selected: selected::Selected,
    strip: strip::Strip,
    standing: standing::Standing,
    compare: compare::Compare,
}

/// What everything in the area is drawn from.
#[derive(Clone, Copy)]
pub struct Desk<'a> {
    /// The choices: site, spot, date, half, body, eye.
    pub state: &'a State,
    /// The shown half-night from the chosen spot; `None` where it cannot be planned.
    pub scene: Option<&'a Scene<'a>>,
    /// The wording.
    pub words: &'a Words,
    /// Colours and sizes.
    pub look: &'a Look,
}

impl DesktopWindow {
    /// The area.
    pub(super) fn grounds_ui(&mut self, ui: &mut Ui, commands: &mut Commands) {
        let mut area = std::mem::take(&mut self.grounds);
        let look = self.palette.look(self.state.theme);
        let scene = self.scene();
        let desk = Desk {
            state: &self.state,
            scene: scene.as_ref(),
            words: &self.words,
            look: &look,
        };
        area.show(ui, &desk, commands);
        self.grounds = area;
    }
}

/// From this width on, points, the right column stands beside the plan.
const WIDE: f32 = 1200.0;

impl GroundsArea {
    fn show(&mut self, ui: &mut Ui, desk: &Desk<'_>, commands: &mut Commands) {
        if ui.ctx().content_rect().width() >= WIDE {
            self.wide(ui, desk, commands);
        } else {
            self.narrow(ui, desk, commands);
        }
    }

    fn wide(&mut self, ui: &mut Ui, desk: &Desk<'_>, commands: &mut Commands) {
        super::pickers::picker_row(ui, desk.look, desk.words, desk.state, commands);
        let whole = ui.available_rect_before_wrap();
        let column = (0.42 * whole.width()).clamp(380.0, 720.0);
        let divide = whole.right() - column;
        let left = whole.with_max_x(divide - desk.look.room.between);
        let right = whole.with_min_x(divide);
        ui.scope_builder(UiBuilder::new().max_rect(left), |ui| {
            self.plan(ui, desk, commands);
        });
        ui.scope_builder(UiBuilder::new().max_rect(right), |ui| {
            ScrollArea::vertical()
                .id_salt("grounds")
                .auto_shrink(false)
                .show(ui, |ui| self.column(ui, desk, commands));
        });
    }

    /// One below the other, scrolling.
    fn narrow(&mut self, ui: &mut Ui, desk: &Desk<'_>, commands: &mut Commands) {
        let plan_height = (0.85 * ui.available_height()).max(400.0);
        ScrollArea::vertical()
            .id_salt("grounds")
            .auto_shrink(false)
            .show(ui, |ui| {
                super::pickers::picker_row(ui, desk.look, desk.words, desk.state, commands);
                let width = ui.available_width();
                let (rect, _) = ui.allocate_exact_size(vec2(width, plan_height), Sense::hover());
                ui.scope_builder(UiBuilder::new().max_rect(rect), |ui| {
                    self.plan(ui, desk, commands);
                });
                self.column(ui, desk, commands);
            });
    }

    fn plan(&mut self, ui: &mut Ui, desk: &Desk<'_>, commands: &mut Commands) {
        self.plan
            .show(ui, desk, &mut self.selection, &self.standing, commands);
    }

    fn column(&mut self, ui: &mut Ui, desk: &Desk<'_>, commands: &mut Commands) {
        ui.spacing_mut().item_spacing = vec2(8.0, desk.look.room.inside);
        ui.horizontal_wrapped(|ui| {
            command_button(ui, desk.words, Command::Measure, commands);
            command_button(ui, desk.words, Command::Exchange, commands);
        });
        self.strip.show(ui, desk, commands);
        // What is selected is being worked on; the site's own measures are wanted seldom.
        let is_site = self.selection.is_none();
        if !is_site {
            self.selected_ui(ui, desk, commands);
        }
        self.standing.show(ui, desk, commands);
        self.compare.show(ui, desk, commands);
        if is_site {
            self.selected_ui(ui, desk, commands);
        }
    }

    fn selected_ui(&mut self, ui: &mut Ui, desk: &Desk<'_>, commands: &mut Commands) {
        self.selected
            .show(ui, desk, &mut self.selection, &mut self.plan, commands);
    }
}
