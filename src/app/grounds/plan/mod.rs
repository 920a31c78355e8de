//! The plan of the site, north up, on which everything is drawn and moved.
//!
//! [`model`] says what is shown in metres, [`layout`] where names go, [`paint`] draws. [`pointer`]
//! and [`keys`] change the site: always as a whole new site in a command.

pub mod backdrop;
mod bar;
pub mod camera;
mod changes;
mod drag;
mod foot;
mod geometry;
pub mod keys;
mod layout;
mod model;
mod paint;
mod pointer;
mod rulers;
mod snap;
#[cfg(test)]
mod tests;
pub mod things;
mod tools;
mod triangles;

use super::standing::Standing;
use super::{Desk, Selection};
use crate::app::command::{Command, Commands};
use crate::place::{PlanPoint, Site, Spot};
use backdrop::Underlay;
use camera::{Camera, View};
pub use changes::{duplicate, remove, select};
use drag::Drag;
use eframe::egui::{
    Painter, Pos2, Rect, Role, Sense, Stroke, StrokeKind, Ui, Vec2, WidgetInfo, vec2,
};
use model::{Figure, Model, Thing};
use snap::{Snap, Snapped};
use things::Extent;
use tools::Takes;
pub use tools::Tool;

/// What it keeps between frames.
pub struct Plan {
    /// The part shown; `None`: everything, to be fitted anew.
    view: Option<View>,
    /// The size for which everything was fitted, and the view that came of it: while that one is
    /// shown, another size fits everything anew.
    fitted: Option<(Vec2, View)>,
    /// The site that this was for: another begins anew.
    site: Option<(String, f64, f64)>,
    tool: Tool,
    /// Points set by the tool so far.
    points: Vec<PlanPoint>,
    /// Where a key would set the next point; `None` while the pointer does it.
    cross: Option<PlanPoint>,
    drag: Option<Drag>,
    /// Where a drag with a drawing tool began.
    drawn_from: Option<PlanPoint>,
    /// Whether arrow keys have moved something and are still down.
    is_nudging: bool,
    /// Whether positions are drawn to things.
    pub snaps: bool,
    /// Where the pointer is, and to what that was drawn.
    snapped: Option<Snapped>,
    /// Whether the next click is the standing map's: it makes a spot, and selects nothing.
    is_standing: bool,
    /// The picture under the plan.
    pub underlay: Underlay,
    /// A refusal that was read.
    read_refusal: Option<String>,
}

impl Default for Plan {
    fn default() -> Self {
        Self {
            view: None,
            fitted: None,
            site: None,
            tool: Tool::Select,
            points: Vec::new(),
            cross: None,
            drag: None,
            drawn_from: None,
            is_nudging: false,
            snaps: true,
            snapped: None,
            is_standing: false,
            underlay: Underlay::default(),
            read_refusal: None,
        }
    }
}

impl Plan {
    /// Shows it, with the standing map under what is drawn.
    pub fn show(
        &mut self,
        ui: &mut Ui,
        desk: &Desk<'_>,
        selection: &mut Option<Selection>,
        standing: &Standing,
        commands: &mut Commands,
    ) {
        self.follow(desk.state.site(), selection);
        self.is_standing = standing.is_placing();
        let path = backdrop_path(desk);
        self.underlay.follow(ui.ctx(), path);
        self.bar(ui, desk, commands);
        let room = ui.available_rect_before_wrap();
        let foot = foot::height(desk.look);
        let rect = room.with_max_y((room.bottom() - foot).max(room.top() + 80.0));
        let camera = self.camera(desk.state.site(), rect);
        self.keys(ui, camera, desk, selection, commands);

        let response = ui.interact(rect, keys::id(), Sense::click_and_drag());
        let name = desk.words.text("plan-name");
        response.widget_info(|| WidgetInfo::labeled(Role::Canvas, true, &name));
        self.pointer(ui, &response, camera, desk, selection, commands);
        let camera = self.camera(desk.state.site(), rect);

        let painter = ui.painter().with_clip_rect(rect.intersect(ui.clip_rect()));
        self.paint(&painter, camera, desk, *selection, standing);
        let is_focused = response.has_focus();
        let border = if is_focused {
            Stroke::new(2.0, desk.look.colours.chosen)
        } else {
            Stroke::new(1.0, desk.look.colours.line)
        };
        ui.painter()
            .rect_stroke(rect, desk.look.room.corner, border, StrokeKind::Inside);
        self.refusal(ui, rect, desk);
        let below = Rect::from_min_max(rect.left_bottom(), room.right_bottom());
        let is_free = self.tool == Tool::Select && self.drag.is_none();
        let reading = standing.reading().filter(|_| is_free);
        self.foot(ui, below, desk, *selection, reading);
        ui.advance_cursor_after_rect(room);
    }

    /// Takes a tool; what was begun with another is given up.
    pub fn take(&mut self, tool: Tool) {
        self.tool = tool;
        self.points.clear();
        self.cross = None;
        self.drawn_from = None;
        self.snapped = None;
    }

    /// The tool in hand.
    pub fn tool(&self) -> Tool {
        self.tool
    }

    /// Begins anew with another site, and lets go of what is not there any more.
    fn follow(&mut self, site: &Site, selection: &mut Option<Selection>) {
        let shown = (site.name.clone(), site.latitude_deg, site.longitude_deg);
        if self.site.as_ref() != Some(&shown) {
            self.site = Some(shown);
            self.view = None;
            self.drag = None;
            self.take(Tool::Select);
            *selection = None;
        }
        *selection = selection.filter(|thing| thing.exists(site));
        let is_gone = |drag: &Drag| !drag.thing.exists(site);
        if self.drag.as_ref().is_some_and(is_gone) {
            self.drag = None;
        }
    }

    /// What is shown in a rectangle of the screen.
    fn camera(&mut self, site: &Site, rect: Rect) -> Camera {
        let is_for_another_size = self
            .fitted
            .is_some_and(|(size, view)| size != rect.size() && self.view == Some(view));
        let view = match self.view {
            Some(view) if !is_for_another_size => view,
            _ => {
                let view = View::of_everything(&Extent::of(site), rect);
                self.fitted = Some((rect.size(), view));
                view
            }
        };
        self.view = Some(view);
        Camera { rect, view }
    }

    /// Sends a change done in one step.
    fn edit(&mut self, site: Site, commands: &mut Commands) {
        self.read_refusal = None;
        commands.push(Command::EditSite(Box::new(site)));
    }

    /// Sends a change that goes on.
    fn change(&mut self, site: Site, commands: &mut Commands) {
        self.read_refusal = None;
        commands.push(Command::DragSite(Box::new(site)));
    }

    /// Makes a thing of the points set. Where it cannot be, the points stay, so that the last can
    /// be taken back.
    fn finish(
        &mut self,
        desk: &Desk<'_>,
        selection: &mut Option<Selection>,
        keeps_tool: bool,
        commands: &mut Commands,
    ) {
        let site = desk.state.site();
        if let Some(site) = self.with_picture_point(site) {
            self.edit(site, commands);
            self.take(Tool::Select);
            return;
        }
        let Some((site, made)) = self.tool.made(site, &self.points, desk.words) else {
            return;
        };
        let is_right = site.check_rules().is_ok();
        self.edit(site, commands);
        if is_right {
            self.points.clear();
            self.drawn_from = None;
            select(selection, Some(made), desk, commands);
            if !keeps_tool {
                self.take(Tool::Select);
            }
        }
    }

    /// The site with the point of the picture that was pointed out as one of its two known ones.
    fn with_picture_point(&self, site: &Site) -> Option<Site> {
        let at = *self.points.first()?;
        let backdrop = site.backdrop.as_ref()?;
        let (right_px, down_px) = backdrop::Placing::new(backdrop)?.to_picture(at);
        let mut changed = site.clone();
        let backdrop = changed.backdrop.as_mut()?;
        let point = match self.tool {
            Tool::FirstPicturePoint => &mut backdrop.first,
            Tool::SecondPicturePoint => &mut backdrop.second,
            _ => return None,
        };
        (point.right_px, point.down_px, point.at) = (right_px.round(), down_px.round(), at);
        Some(changed)
    }

    /// What a position is drawn to while a tool is in hand.
    fn snap(&self, site: &Site, camera: Camera, snaps: bool) -> Snap {
        let is_plain = matches!(
            self.tool,
            Tool::Spot | Tool::FirstPicturePoint | Tool::SecondPicturePoint
        );
        // The new spot is none of the site's yet: it is drawn to nothing but the grid.
        let changed = is_plain.then_some(Selection::Spot(usize::MAX));
        let snap = Snap::new(site, changed, camera, snaps);
        match self.tool.takes() {
            Takes::Line | Takes::Corners => snap
                .with_rays(tools::rays_from(&self.points))
                .with_corners(&self.points),
            Takes::Pair => snap.with_rays(tools::rays_from(&self.points)),
            Takes::Things | Takes::Point | Takes::Circle => snap,
        }
    }

    fn paint(
        &mut self,
        painter: &Painter,
        camera: Camera,
        desk: &Desk<'_>,
        selection: Option<Selection>,
        standing: &Standing,
    ) {
        let (look, state) = (desk.look, desk.state);
        let site = state.site();
        painter.rect_filled(camera.rect, look.room.corner, look.colours.card);
        self.underlay
            .paint(painter, look, camera, site.backdrop.as_ref());
        rulers::grid(painter, look, camera);
        let to_screen = |at: PlanPoint| -> Pos2 { camera.to_screen(at) };
        standing.paint_under(painter, &to_screen, look);
        let model = Model::new(site, state.spot_index(), state.date());
        paint::things(painter, look, camera, &model, selection);
        let caption = |thing: &Thing| match thing.figure {
            Figure::Spot { eye_m, .. } => {
                let eye = crate::words::decimal(eye_m, 1);
                desk.words
                    .text_with::<&str>("plan-spot", &[("name", &thing.label), ("eye", &eye)])
            }
            _ => thing.label.clone(),
        };
        let spots: Vec<PlanPoint> = site.spots.iter().map(Spot::plan_point).collect();
        let marks = standing.marks(&to_screen, &spots);
        let circles = spots.iter().map(|spot| paint::spot_rect(to_screen(*spot)));
        // Numbers before names before the figures of the map.
        let mut taken: Vec<Rect> = marks.iter().copied().chain(circles).collect();
        let labels = layout::labels(painter, look, camera, &model, selection, &taken, &caption);
        paint::labels(painter, look, &labels);
        taken.extend(labels.iter().map(layout::Label::hem));
        standing.paint_over(painter, &to_screen, look, (&marks, taken));
        if let (Some(thing), Tool::Select) = (selection, self.tool) {
            paint::handles(painter, look, &drag::handles(site, thing, camera));
        }
        if matches!(
            self.tool,
            Tool::FirstPicturePoint | Tool::SecondPicturePoint
        ) || selection.is_none()
        {
            self.paint_picture_points(painter, camera, desk);
        }
        self.paint_draft(painter, camera, desk);
        rulers::scale_and_north(painter, look, camera, desk.words);
    }

    /// The two known points of the picture, numbered.
    fn paint_picture_points(&self, painter: &Painter, camera: Camera, desk: &Desk<'_>) {
        let Some(backdrop) = &desk.state.site().backdrop else {
            return;
        };
        for (name, point) in [("1", backdrop.first), ("2", backdrop.second)] {
            let at = camera.to_screen(point.at);
            foot::picture_point(painter, desk.look, at, name);
        }
    }

    fn paint_draft(&self, painter: &Painter, camera: Camera, desk: &Desk<'_>) {
        let next = self
            .cross
            .or(self.snapped.as_ref().map(|snapped| snapped.at));
        let takes = self.tool.takes();
        match (takes, self.drawn_from, next) {
            (Takes::Corners, Some(from), Some(to)) if self.points.is_empty() => {
                let corners = geometry::rectangle(from, to);
                paint::draft(painter, desk.look, camera, &corners, None, true);
            }
            (Takes::Circle, Some(from), Some(to)) => {
                let radius = camera.points(from.distance_m(to));
                let stroke = Stroke::new(2.0, desk.look.colours.chosen);
                painter.circle_stroke(camera.to_screen(from), radius, stroke);
            }
            (Takes::Line | Takes::Pair, Some(from), Some(to)) if self.points.is_empty() => {
                paint::draft(painter, desk.look, camera, &[from], Some(to), false);
            }
            (Takes::Pair, ..) if self.points.len() == 2 => {
                paint::draft(painter, desk.look, camera, &self.points, None, false);
            }
            _ => {
                let closes = takes == Takes::Corners;
                let next = next.filter(|_| !self.points.is_empty());
                paint::draft(painter, desk.look, camera, &self.points, next, closes);
            }
        }
        if let Some(at) = self.cross {
            paint::cross(painter, desk.look, camera.to_screen(at));
        }
        let is_pointing = self.drag.is_some() || self.tool != Tool::Select;
        if let Some(snapped) = self.snapped.as_ref().filter(|_| is_pointing) {
            foot::snap_sign(painter, desk, camera, snapped);
        }
    }
}

/// The picture's file; a relative path counts from the site file's folder, of a demo site from
/// the folder that its copy will go to.
fn backdrop_path(desk: &Desk<'_>) -> Option<std::path::PathBuf> {
    let picture = &desk.state.site().backdrop.as_ref()?.picture;
    Some(match desk.state.site_folder() {
        Some(folder) => folder.join(picture),
        None => picture.clone(),
    })
}

/// Room for the bar's controls, points.
const BAR_GAP: eframe::egui::Vec2 = vec2(6.0, 6.0);
