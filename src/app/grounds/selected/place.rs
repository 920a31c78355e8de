//! Where a thing stands: east and north, or distance and bearing, of every one of its points.

use super::{Field, Form, exists, row};
use crate::app::command::Commands;
use crate::app::grounds::plan::things::Form as Stands;
use crate::app::grounds::{Desk, Selection};
use crate::app::widgets::{choice, text};
use crate::place::{PlanPoint, Site};
use eframe::egui::{Align2, ScrollArea, Sense, Ui, vec2};

/// How positions are shown.
#[derive(Default)]
pub struct Shown {
    from: From,
}

/// Room for a point's number, points of the screen.
const NUMBER_WIDTH: f32 = 18.0;

/// From where positions count.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
enum From {
    /// Metres east and north of the mark.
    #[default]
    EastNorth,
    /// Distance and bearing from the mark.
    Mark,
    /// Distance and bearing from the chosen spot.
    Spot,
}

impl Shown {
    /// Fields for all of a thing's points.
    pub fn show(
        &mut self,
        ui: &mut Ui,
        desk: &Desk<'_>,
        form: &mut Form,
        thing: Selection,
        commands: &mut Commands,
    ) {
        /// Rows of corners in sight; more scroll.
        const MOST_HEIGHT: f32 = 210.0;
        let site = desk.state.site();
        if !exists(site, thing) {
            return;
        }
        ui.horizontal_wrapped(|ui| {
            ui.spacing_mut().item_spacing.x = 6.0;
            for (from, id) in [
                (From::EastNorth, "from-east-north"),
                (From::Mark, "from-mark"),
                (From::Spot, "from-spot"),
            ] {
                let name = desk.words.text(id);
                if choice(ui, desk.look, self.from == from, &name).clicked() {
                    self.from = from;
                }
            }
        });
        let points = thing.points(site);
        let is_one = thing.form(site) == Stands::Point;
        if !is_one {
            self.heads(ui, desk);
        }
        let fields = |ui: &mut Ui, form: &mut Form, commands: &mut Commands| {
            for (index, at) in points.iter().enumerate() {
                if is_one {
                    self.point(ui, desk, form, (thing, index, *at), commands);
                    continue;
                }
                ui.horizontal_top(|ui| {
                    let number = (index + 1).to_string();
                    number_ui(ui, desk, &number);
                    ui.vertical(|ui| {
                        self.point(ui, desk, form, (thing, index, *at), commands);
                    });
                });
            }
        };
        if points.len() > 4 {
            ScrollArea::vertical()
                .id_salt("corners")
                .max_height(MOST_HEIGHT)
                .show(ui, |ui| fields(ui, form, commands));
        } else {
            fields(ui, form, commands);
        }
    }

    /// What the two columns of the points are.
    fn heads(&self, ui: &mut Ui, desk: &Desk<'_>) {
        let labels = match self.from {
            From::EastNorth => ["field-east", "field-north"],
            From::Mark | From::Spot => ["field-distance", "field-bearing"],
        };
        ui.horizontal(|ui| {
            ui.add_space(NUMBER_WIDTH + ui.spacing().item_spacing.x);
            ui.vertical(|ui| {
                row::<2>(ui, |column, ui| {
                    let look = desk.look;
                    let label = desk.words.text(labels[column]);
                    text(ui, look, look.sizes.label, look.colours.lesser, &label);
                });
            });
        });
    }

    fn point(
        &self,
        ui: &mut Ui,
        desk: &Desk<'_>,
        form: &mut Form,
        (thing, index, at): (Selection, usize, PlanPoint),
        commands: &mut Commands,
    ) {
        let of = format!("{thing:?} {:?}", self.from);
        let is_one = thing.form(desk.state.site()) == Stands::Point;
        let point = (!is_one).then_some(index + 1);
        let field = |label| Field {
            label,
            of: &of,
            point,
        };
        let origin = match self.from {
            From::EastNorth | From::Mark => PlanPoint::new(0.0, 0.0),
            From::Spot => desk.state.spot().plan_point(),
        };
        let put = move |site: &mut Site, at: PlanPoint| {
            let mut points = thing.points(site);
            if let Some(point) = points.get_mut(index) {
                *point = at;
            }
            thing.set_points(site, &points);
        };
        let (distance_m, bearing_deg) = (origin.distance_m(at), origin.bearing(at).degrees());
        row::<2>(ui, |column, ui| match (self.from, column) {
            (From::EastNorth, 0) => {
                let field = field("field-east");
                form.number(ui, desk, commands, field, at.east_m, |site, east_m| {
                    put(site, PlanPoint::new(east_m, at.north_m));
                });
            }
            (From::EastNorth, _) => {
                let field = field("field-north");
                form.number(ui, desk, commands, field, at.north_m, |site, north_m| {
                    put(site, PlanPoint::new(at.east_m, north_m));
                });
            }
            (_, 0) => {
                let field = field("field-distance");
                form.number(ui, desk, commands, field, distance_m, |site, to_m| {
                    put(site, away(origin, to_m, bearing_deg));
                });
            }
            _ => {
                let field = field("field-bearing");
                form.number(ui, desk, commands, field, bearing_deg, |site, to_deg| {
                    put(site, away(origin, distance_m, to_deg));
                });
            }
        });
    }
}

/// A point's number, level with its fields.
fn number_ui(ui: &mut Ui, desk: &Desk<'_>, number: &str) {
    /// As high as a line to write in.
    const HEIGHT: f32 = 28.0;
    let (rect, _) = ui.allocate_exact_size(vec2(NUMBER_WIDTH, HEIGHT), Sense::hover());
    let look = desk.look;
    ui.painter().text(
        rect.left_center(),
        Align2::LEFT_CENTER,
        number,
        look.font(look.sizes.label),
        look.colours.lesser,
    );
}

/// The point at a distance and a bearing from another.
pub fn away(origin: PlanPoint, distance_m: f64, bearing_deg: f64) -> PlanPoint {
    let (east, north) = bearing_deg.to_radians().sin_cos();
    PlanPoint::new(
        origin.east_m + distance_m * east,
        origin.north_m + distance_m * north,
    )
}
