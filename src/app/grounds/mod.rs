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
mod plan;
mod selected;
mod standing;
mod strip;

use super::command::Commands;
use super::palette::Look;
use super::scene::Scene;
use super::state::State;
use super::window::DesktopWindow;
use crate::words::Words;
use eframe::egui::{ScrollArea, Ui, UiBuilder, vec2};

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

impl GroundsArea {
    fn show(&mut self, ui: &mut Ui, desk: &Desk<'_>, commands: &mut Commands) {
        super::pickers::picker_row(ui, desk.look, desk.words, desk.state, commands);
        let whole = ui.available_rect_before_wrap();
        let column = (0.42 * whole.width()).clamp(380.0, 720.0);
        let divide = whole.right() - column;
        let left = whole.with_max_x(divide - desk.look.room.between);
        let right = whole.with_min_x(divide);
        ui.scope_builder(UiBuilder::new().max_rect(left), |ui| {
            self.plan
                .show(ui, desk, &mut self.selection, &self.standing, commands);
        });
        ui.scope_builder(UiBuilder::new().max_rect(right), |ui| {
            ScrollArea::vertical()
                .id_salt("grounds")
                .auto_shrink(false)
                .show(ui, |ui| {
                    ui.spacing_mut().item_spacing = vec2(8.0, desk.look.room.inside);
                    self.strip.show(ui, desk, commands);
                    selected::show(ui, desk, &mut self.selection, commands);
                    self.standing.show(ui, desk, commands);
                    self.compare.show(ui, desk, commands);
                });
        });
    }
}
