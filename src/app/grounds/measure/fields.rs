//! The fields that the forms are made of.

use super::{Compass, Desk};
use crate::app::widgets::choice;
use crate::place::survey::height::Estimate;
use crate::words::decimal;
use eframe::egui::{DragValue, RichText, Ui};
use std::ops::RangeInclusive;

/// A number with its name before it and its unit behind it.
pub fn number(
    ui: &mut Ui,
    desk: &Desk<'_>,
    name: &str,
    unit: &str,
    value: &mut f64,
    range: RangeInclusive<f64>,
) {
    let look = desk.look;
    ui.horizontal(|ui| {
        let label = RichText::new(desk.words.text(name))
            .font(look.font(look.sizes.label))
            .color(look.colours.lesser);
        let label = ui.label(label);
        let suffix = format!(" {}", desk.words.text(unit));
        let drag = DragValue::new(value)
            .range(range)
            .speed(0.1)
            .max_decimals(3)
            .suffix(suffix);
        ui.add(drag).labelled_by(label.id);
    });
}

/// Which north a compass counts from, with the declination that the user states.
pub fn north(ui: &mut Ui, desk: &Desk<'_>, compass: &mut Compass) {
    ui.horizontal_wrapped(|ui| {
        for (is_magnetic, name) in [(false, "north-true"), (true, "north-magnetic")] {
            let name = desk.words.text(name);
            if choice(ui, desk.look, compass.is_magnetic == is_magnetic, &name).clicked() {
                compass.is_magnetic = is_magnetic;
            }
        }
        if compass.is_magnetic {
            let declination = &mut compass.declination_deg;
            number(
                ui,
                desk,
                "declination",
                "unit-degrees-east",
                declination,
                -180.0..=180.0,
            );
        }
    });
}

/// A length with what half a metre and a degree make of it.
pub fn estimate(desk: &Desk<'_>, name: &str, estimate: &Estimate) -> String {
    let metres = |length_m: f64| {
        if length_m.is_finite() {
            decimal(length_m, if length_m < 10.0 { 2 } else { 1 })
        } else {
            "∞".to_owned()
        }
    };
    desk.words.text_with::<&str>(
        name,
        &[
            ("length", &metres(estimate.length_m)),
            ("by-distance", &metres(estimate.by_distance_m)),
            ("by-angle", &metres(estimate.by_angle_m)),
            ("together", &metres(estimate.combined_m())),
        ],
    )
}
