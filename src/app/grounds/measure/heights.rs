//! Heights and places by pacing or tape, with an angle, a stick or a shadow.

use super::{Compass, Desk, Outcome, done, fields};
use crate::app::command::Commands;
use crate::app::widgets::{choice, text};
use crate::measure::Angle;
use crate::place::survey::SurveyError;
use crate::place::survey::height::{self, Estimate, Slips};
use crate::place::{Obstacle, Site};
use eframe::egui::{ComboBox, Ui};

/// How a height is measured.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
enum Method {
    #[default]
    Angle,
    TwoAngles,
    HeldStick,
    PlacedStick,
    Shadow,
}

impl Method {
    const ALL: [Self; 5] = [
        Self::Angle,
        Self::TwoAngles,
        Self::HeldStick,
        Self::PlacedStick,
        Self::Shadow,
    ];

    const fn wording(self) -> &'static str {
        match self {
            Self::Angle => "height-by-angle",
            Self::TwoAngles => "height-by-two-angles",
            Self::HeldStick => "height-by-held-stick",
            Self::PlacedStick => "height-by-placed-stick",
            Self::Shadow => "height-by-shadow",
        }
    }
}

/// What is written.
pub struct Heights {
    method: Method,
    /// Distances in paces of this length, m; `None`: in metres.
    pace_m: Option<f64>,
    distance: f64,
    altitude_deg: f64,
    far_altitude_deg: f64,
    stick_m: f64,
    eye_to_stick_m: f64,
    shadow_m: f64,
    stick_shadow_m: f64,
    bearing_deg: f64,
    width_deg: f64,
    obstacle: usize,
}

impl Default for Heights {
    fn default() -> Self {
        Self {
            method: Method::default(),
            pace_m: None,
            distance: 30.0,
            altitude_deg: 20.0,
            far_altitude_deg: 12.0,
            stick_m: 1.0,
            eye_to_stick_m: 2.0,
            shadow_m: 10.0,
            stick_shadow_m: 1.0,
            bearing_deg: 270.0,
            width_deg: 5.0,
            obstacle: 0,
        }
    }
}

/// What half a metre and a degree make of it.
fn slips() -> Slips {
    Slips {
        distance_m: 0.5,
        angle: Angle::from_degrees(1.0),
    }
}

impl Heights {
    fn distance_m(&self) -> Result<f64, SurveyError> {
        match self.pace_m {
            Some(pace_m) => height::paced_m(self.distance, pace_m),
            None => Ok(self.distance),
        }
    }

    /// The height, and the distance where the foot could not be reached.
    fn measured(&self, eye_m: f64) -> Result<(Estimate, Option<Estimate>), SurveyError> {
        let altitude = Angle::from_degrees(self.altitude_deg);
        let distance_m = self.distance_m()?;
        let slips = slips();
        let height = match self.method {
            Method::Angle => height::by_angle(distance_m, altitude, eye_m, &slips)?,
            Method::HeldStick => {
                height::by_held_stick(distance_m, self.stick_m, self.eye_to_stick_m, eye_m, &slips)?
            }
            Method::PlacedStick => height::by_placed_stick(
                distance_m,
                self.stick_m,
                self.eye_to_stick_m,
                eye_m,
                &slips,
            )?,
            Method::Shadow => {
                height::by_shadow(self.shadow_m, self.stick_m, self.stick_shadow_m, &slips)?
            }
            Method::TwoAngles => {
                let far = Angle::from_degrees(self.far_altitude_deg);
                let unreached = height::by_two_angles(distance_m, far, altitude, eye_m, &slips)?;
                return Ok((unreached.height, Some(unreached.distance)));
            }
        };
        Ok((height, None))
    }

    /// Draws the form.
    pub fn show(
        &mut self,
        ui: &mut Ui,
        desk: &Desk<'_>,
        compass: &mut Compass,
        commands: &mut Commands,
    ) -> Option<Outcome> {
        let words = desk.words;
        ui.horizontal_wrapped(|ui| {
            for method in Method::ALL {
                let name = words.text(method.wording());
                if choice(ui, desk.look, self.method == method, &name).clicked() {
                    self.method = method;
                }
            }
        });
        let hint = words.text(&format!("{}-hint", self.method.wording()));
        text(
            ui,
            desk.look,
            desk.look.sizes.label,
            desk.look.colours.lesser,
            &hint,
        );
        self.method_fields(ui, desk);
        let eye_m = desk.state.spot().eye_height_m;
        let measured = self.measured(eye_m);
        match &measured {
            Ok((height, distance)) => {
                let size = desk.look.sizes.control;
                let colour = desk.look.colours.text;
                let line = fields::estimate(desk, "height-measured", height);
                text(ui, desk.look, size, colour, &line);
                if let Some(distance) = distance {
                    let line = fields::estimate(desk, "distance-measured", distance);
                    text(ui, desk.look, size, colour, &line);
                }
            }
            Err(error) => {
                crate::app::widgets::error_line(ui, desk.look, Some(&error.to_string()));
            }
        }
        let (height, distance) = measured.ok()?;
        let to_obstacle = self.give_to_obstacle(ui, desk, height.length_m, commands);
        ui.separator();
        let place = self.new_tree(ui, desk, compass, (height.length_m, distance), commands);
        to_obstacle.or(place)
    }

    fn method_fields(&mut self, ui: &mut Ui, desk: &Desk<'_>) {
        let is_shadow = self.method == Method::Shadow;
        let has_stick = is_shadow || matches!(self.method, Method::HeldStick | Method::PlacedStick);
        if !is_shadow {
            self.distance_field(ui, desk);
        }
        let mut field = |name, unit, value: &mut f64, high| {
            fields::number(ui, desk, name, unit, value, 0.0..=high);
        };
        if self.method == Method::TwoAngles {
            field(
                "altitude-far",
                "unit-degrees",
                &mut self.far_altitude_deg,
                89.0,
            );
            field(
                "altitude-near",
                "unit-degrees",
                &mut self.altitude_deg,
                89.0,
            );
        }
        if self.method == Method::Angle {
            field(
                "altitude-of-top",
                "unit-degrees",
                &mut self.altitude_deg,
                89.0,
            );
        }
        if has_stick {
            field("stick-length", "unit-metres", &mut self.stick_m, 10.0);
        }
        if has_stick && !is_shadow {
            field(
                "eye-to-stick",
                "unit-metres",
                &mut self.eye_to_stick_m,
                500.0,
            );
        }
        if is_shadow {
            field(
                "stick-shadow",
                "unit-metres",
                &mut self.stick_shadow_m,
                500.0,
            );
            field("object-shadow", "unit-metres", &mut self.shadow_m, 2000.0);
        }
    }

    fn distance_field(&mut self, ui: &mut Ui, desk: &Desk<'_>) {
        let words = desk.words;
        ui.horizontal_wrapped(|ui| {
            for (pace_m, name) in [(None, "in-metres"), (Some(0.75), "in-paces")] {
                let is_chosen = self.pace_m.is_some() == pace_m.is_some();
                if choice(ui, desk.look, is_chosen, &words.text(name)).clicked() && !is_chosen {
                    self.pace_m = pace_m;
                }
            }
            if let Some(pace_m) = &mut self.pace_m {
                fields::number(ui, desk, "pace-length", "unit-metres", pace_m, 0.2..=2.0);
            }
        });
        let (name, unit) = match (self.method, self.pace_m) {
            (Method::TwoAngles, None) => ("line-walked", "unit-metres"),
            (Method::TwoAngles, Some(_)) => ("line-walked", "unit-paces"),
            (_, None) => ("distance-to-foot", "unit-metres"),
            (_, Some(_)) => ("distance-to-foot", "unit-paces"),
        };
        fields::number(ui, desk, name, unit, &mut self.distance, 0.0..=10_000.0);
    }

    /// Gives the height to one of the site's obstacles.
    fn give_to_obstacle(
        &mut self,
        ui: &mut Ui,
        desk: &Desk<'_>,
        height_m: f64,
        commands: &mut Commands,
    ) -> Option<Outcome> {
        let site = desk.state.site();
        if site.obstacles.is_empty() {
            return None;
        }
        self.obstacle = self.obstacle.min(site.obstacles.len() - 1);
        let is_wanted = ui
            .horizontal_wrapped(|ui| {
                obstacle_picker(ui, desk, &mut self.obstacle);
                ui.button(desk.words.text("give-height")).clicked()
            })
            .inner;
        is_wanted.then(|| {
            let mut site: Site = site.clone();
            let obstacle = &mut site.obstacles[self.obstacle];
            let label = obstacle.label().to_owned();
            set_height(obstacle, height_m);
            let said = desk
                .words
                .text_with("height-given", &[("label", label.as_str())]);
            done(site, said, commands)
        })
    }

    /// Puts a tree of that height where bearing and distance lead.
    fn new_tree(
        &mut self,
        ui: &mut Ui,
        desk: &Desk<'_>,
        compass: &mut Compass,
        (height_m, unreached): (f64, Option<Estimate>),
        commands: &mut Commands,
    ) -> Option<Outcome> {
        if self.method == Method::Shadow {
            return None;
        }
        fields::north(ui, desk, compass);
        let is_wanted = ui
            .horizontal_wrapped(|ui| {
                let bearing = &mut self.bearing_deg;
                fields::number(
                    ui,
                    desk,
                    "bearing-to-it",
                    "unit-degrees",
                    bearing,
                    0.0..=360.0,
                );
                let width = &mut self.width_deg;
                fields::number(ui, desk, "angle-across", "unit-degrees", width, 0.1..=170.0);
                ui.button(desk.words.text("put-tree-there")).clicked()
            })
            .inner;
        is_wanted.then(|| {
            let placed = || -> Result<(Obstacle, f64), SurveyError> {
                let distance_m = match unreached {
                    Some(distance) => distance.length_m,
                    None => self.distance_m()?,
                };
                let azimuth = compass
                    .north()
                    .azimuth(Angle::from_degrees(self.bearing_deg));
                let position = height::position(desk.state.spot(), azimuth, distance_m, &slips())?;
                let width =
                    height::width(distance_m, Angle::from_degrees(self.width_deg), &slips())?;
                let tree = Obstacle::Tree {
                    label: desk.words.text("new-tree"),
                    east_m: rounded(position.at.east_m),
                    north_m: rounded(position.at.north_m),
                    base_m: None,
                    height_m: rounded(height_m),
                    width_m: rounded(width.length_m).max(0.1),
                    gap_m: None,
                    trunk_m: None,
                    leafless: None,
                };
                Ok((tree, position.combined_m()))
            };
            match placed() {
                Ok((tree, off_m)) => {
                    let mut site = desk.state.site().clone();
                    site.obstacles.push(tree);
                    let off = crate::words::decimal(off_m, 1);
                    let said = desk.words.text_with("tree-put", &[("off", off.as_str())]);
                    done(site, said, commands)
                }
                Err(error) => error.into(),
            }
        })
    }
}

/// To the centimetre: nobody paces finer.
fn rounded(length_m: f64) -> f64 {
    (100.0 * length_m).round() / 100.0
}

/// A menu of the site's obstacles.
pub fn obstacle_picker(ui: &mut Ui, desk: &Desk<'_>, chosen: &mut usize) {
    let site = desk.state.site();
    let name = |index: usize| {
        let label = site.obstacles.get(index).map_or("", Obstacle::label);
        format!("{} · {label}", index + 1)
    };
    let heading = desk.words.text("obstacle-picked");
    let picker = ComboBox::from_id_salt("obstacle")
        .selected_text(name(*chosen))
        .show_ui(ui, |ui| {
            for index in 0..site.obstacles.len() {
                ui.selectable_value(chosen, index, name(index));
            }
        });
    crate::app::widgets::name_it(&picker.response, eframe::egui::Role::ComboBox, &heading);
}

/// Sets the height of an obstacle's top: of a roof its ridge, or the eaves where it has none.
pub fn set_height(obstacle: &mut Obstacle, height: f64) {
    let height = rounded(height);
    match obstacle {
        Obstacle::Tree { height_m, .. }
        | Obstacle::Pole { height_m, .. }
        | Obstacle::Wall { height_m, .. }
        | Obstacle::Shape { height_m, .. } => *height_m = height,
        Obstacle::Building {
            ridge_m: Some(ridge_m),
            ..
        } => *ridge_m = height,
        Obstacle::Building { eaves_m, .. } => *eaves_m = height,
    }
}
