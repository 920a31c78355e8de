//! Compass and clinometer readings, in a table.

use super::into_skyline::{NewPoints, put};
use super::{Compass, Desk, Outcome, fields};
use crate::app::command::Commands;
use crate::app::widgets::{choice, figure, name_it};
use crate::place::SkylinePoint;
use crate::place::survey::SurveyError;
use crate::place::survey::compass::{Reading, ReadingError, Sweep, Tilt};
use crate::words::decimal;
use eframe::egui::{DragValue, Grid, Role, Ui, vec2};

/// The readings as written.
pub struct Readings {
    rows: Vec<(f64, f64)>,
    is_percent: bool,
    is_far: bool,
    is_whole_circle: bool,
}

impl Default for Readings {
    fn default() -> Self {
        Self {
            rows: vec![(0.0, 0.0); 3],
            is_percent: false,
            is_far: false,
            is_whole_circle: false,
        }
    }
}

impl Readings {
    fn reading(&self, row: (f64, f64)) -> Reading {
        Reading {
            bearing_deg: row.0,
            tilt: if self.is_percent {
                Tilt::Percent(row.1)
            } else {
                Tilt::Degrees(row.1)
            },
        }
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
        fields::north(ui, desk, compass);
        ui.horizontal_wrapped(|ui| {
            for (is_percent, name) in [(false, "tilt-degrees"), (true, "tilt-percent")] {
                if choice(
                    ui,
                    desk.look,
                    self.is_percent == is_percent,
                    &words.text(name),
                )
                .clicked()
                {
                    self.is_percent = is_percent;
                }
            }
        });
        self.table(ui, desk, compass);
        ui.horizontal_wrapped(|ui| {
            if ui.button(words.text("reading-add")).clicked() {
                let next = self.rows.last().map_or(0.0, |last| (last.0 + 10.0) % 360.0);
                self.rows.push((next, 0.0));
            }
            ui.checkbox(&mut self.is_whole_circle, words.text("readings-all-round"));
            ui.checkbox(&mut self.is_far, words.text("readings-far"));
        });
        ui.button(words.text("put-into-skyline"))
            .clicked()
            .then(|| self.put(desk, compass, commands))
    }

    fn table(&mut self, ui: &mut Ui, desk: &Desk<'_>, compass: &Compass) {
        let (look, words) = (desk.look, desk.words);
        let (font, lesser) = (look.font(look.sizes.label), look.colours.lesser);
        let mut removed = None;
        let is_percent = self.is_percent;
        let errors: Vec<String> = self
            .rows
            .iter()
            .map(|row| error_of(desk, &self.reading(*row), compass))
            .collect();
        Grid::new("readings")
            .spacing(vec2(look.room.inside, 4.0))
            .show(ui, |ui| {
                for name in ["reading-bearing", "reading-altitude", "reading-within"] {
                    figure(ui, font.clone(), lesser, &words.text(name));
                }
                ui.end_row();
                for (index, (row, error)) in self.rows.iter_mut().zip(&errors).enumerate() {
                    let number = (index + 1).to_string();
                    let (low, high, unit) = if is_percent {
                        (-100.0, 2000.0, " %")
                    } else {
                        (-10.0, 90.0, "°")
                    };
                    let bearing = ui.add(
                        DragValue::new(&mut row.0)
                            .range(0.0..=360.0)
                            .speed(0.5)
                            .suffix("°"),
                    );
                    let name =
                        words.text_with("reading-bearing-of", &[("number", number.as_str())]);
                    name_it(&bearing, Role::SpinButton, &name);
                    let tilt = ui.add(
                        DragValue::new(&mut row.1)
                            .range(low..=high)
                            .speed(0.1)
                            .suffix(unit),
                    );
                    let name =
                        words.text_with("reading-altitude-of", &[("number", number.as_str())]);
                    name_it(&tilt, Role::SpinButton, &name);
                    figure(ui, font.clone(), lesser, error);
                    let away = ui.small_button("✕");
                    let name = words.text_with("reading-remove", &[("number", number.as_str())]);
                    name_it(&away, Role::Button, &name);
                    if away.on_hover_text(name).clicked() {
                        removed = Some(index);
                    }
                    ui.end_row();
                }
            });
        if let Some(index) = removed {
            self.rows.remove(index);
        }
    }

    fn put(&self, desk: &Desk<'_>, compass: &Compass, commands: &mut Commands) -> Outcome {
        match self.points(compass) {
            Ok(points) if points.is_empty() => Outcome::Refused(desk.words.text("readings-none")),
            Ok(points) => {
                let sweep = if self.is_whole_circle {
                    Sweep::Whole
                } else {
                    Sweep::around(&points)
                };
                let new = NewPoints {
                    points,
                    sweep,
                    is_far: self.is_far,
                };
                put(desk, new, commands)
            }
            Err(error) => error.into(),
        }
    }

    fn points(&self, compass: &Compass) -> Result<Vec<SkylinePoint>, SurveyError> {
        let point = |row: &(f64, f64)| self.reading(*row).point(compass.north());
        self.rows.iter().map(point).collect()
    }
}

/// What a hand-held compass and clinometer leave open.
fn error_of(desk: &Desk<'_>, reading: &Reading, compass: &Compass) -> String {
    let error = reading.error(compass.north(), &ReadingError::default());
    desk.words.text_with::<&str>(
        "reading-error",
        &[
            ("azimuth", &decimal(error.azimuth.degrees(), 1)),
            ("altitude", &decimal(error.altitude.degrees(), 1)),
        ],
    )
}
