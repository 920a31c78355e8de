//! The table of known directions.

use super::super::Desk;
use super::Photo;
use crate::app::widgets::{figure, name_it};
use crate::place::survey::photo::PhotoFit;
use crate::words::decimal;
use eframe::egui::{DragValue, Grid, Role, Ui, WidgetInfo, vec2};

impl Photo {
    /// Draws it, with how far the fit misses each.
    pub(super) fn marks_table(&mut self, ui: &mut Ui, desk: &Desk<'_>, fitted: Option<&PhotoFit>) {
        if self.marks.is_empty() {
            return;
        }
        let (look, words) = (desk.look, desk.words);
        let (font, lesser) = (look.font(look.sizes.label), look.colours.lesser);
        let mut removed = None;
        Grid::new("marks")
            .spacing(vec2(look.room.inside, 4.0))
            .show(ui, |ui| {
                for name in [
                    "mark-bearing",
                    "mark-from-plan",
                    "mark-altitude",
                    "mark-missed",
                ] {
                    figure(ui, font.clone(), lesser, &words.text(name));
                }
                ui.end_row();
                for (index, mark) in self.marks.iter_mut().enumerate() {
                    let number = (index + 1).to_string();
                    let named = |id: &str| words.text_with(id, &[("number", number.as_str())]);
                    let bearing = ui.add(
                        DragValue::new(&mut mark.bearing_deg)
                            .range(0.0..=360.0)
                            .speed(0.1)
                            .prefix(format!("{number}: "))
                            .suffix("°"),
                    );
                    name_it(&bearing, Role::SpinButton, &named("mark-bearing-of"));
                    let menu = ui.menu_button("▾", |ui| {
                        let here = desk.state.spot().plan_point();
                        for obstacle in &desk.state.site().obstacles {
                            let Some(at) = obstacle.points().first().copied() else {
                                continue;
                            };
                            let bearing_deg = here.bearing(at).degrees();
                            let shown =
                                format!("{} {}°", obstacle.label(), decimal(bearing_deg, 1));
                            if ui.button(shown).clicked() {
                                mark.bearing_deg = bearing_deg;
                                ui.close();
                            }
                        }
                    });
                    name_it(&menu.response, Role::Button, &named("mark-from-plan-of"));
                    ui.horizontal(|ui| {
                        let known = ui.checkbox(&mut mark.is_altitude_known, "");
                        let name = named("mark-altitude-known-of");
                        let is_known = mark.is_altitude_known;
                        known.widget_info(|| {
                            WidgetInfo::selected(Role::CheckBox, true, is_known, &name)
                        });
                        ui.add_enabled_ui(mark.is_altitude_known, |ui| {
                            let altitude = ui.add(
                                DragValue::new(&mut mark.altitude_deg)
                                    .range(-30.0..=89.0)
                                    .speed(0.1)
                                    .suffix("°"),
                            );
                            name_it(&altitude, Role::SpinButton, &named("mark-altitude-of"));
                        });
                    });
                    // With nothing to spare every mark fits, whatever is written.
                    let missed = fitted
                        .filter(|fitted| fitted.spare > 0)
                        .and_then(|fitted| fitted.residuals.get(index))
                        .map_or_else(
                            || "–".to_owned(),
                            |missed| format!("{}°", decimal(missed.size().degrees(), 2)),
                        );
                    figure(ui, font.clone(), lesser, &missed);
                    let away = ui.small_button("✕");
                    name_it(&away, Role::Button, &named("mark-remove"));
                    if away.clicked() {
                        removed = Some(index);
                    }
                    ui.end_row();
                }
            });
        if let Some(index) = removed {
            self.marks.remove(index);
        }
    }
}
