//! The Sun's shadow of a pole as a compass.

use super::noted::NotedTime;
use super::{Compass, Desk, Outcome, fields};
use crate::app::widgets::{error_line, text};
use crate::measure::Angle;
use crate::place::survey::SurveyError;
use crate::place::survey::timed::{Noted, ShadowBearing, shadow_bearing};
use crate::words::decimal;
use eframe::egui::Ui;

/// What is written.
#[derive(Default)]
pub struct Shadow {
    at: NotedTime,
    reading_deg: f64,
}

impl Shadow {
    fn bearing(&self, desk: &Desk<'_>) -> Result<ShadowBearing, SurveyError> {
        let noted = Noted {
            moment: self.at.moment(desk)?,
            uncertainty_s: self.at.uncertainty_s,
        };
        shadow_bearing(
            desk.state.ephemeris(),
            &desk.state.site().observer(),
            &noted,
        )
    }

    /// Draws the form.
    pub fn show(&mut self, ui: &mut Ui, desk: &Desk<'_>, compass: &mut Compass) -> Option<Outcome> {
        let (look, words) = (desk.look, desk.words);
        let caution = words.text("shadow-caution");
        text(ui, look, look.sizes.control, look.colours.caution, &caution);
        self.at.show(ui, desk);
        let bearing = match self.bearing(desk) {
            Ok(bearing) => bearing,
            Err(error) => {
                error_line(ui, look, Some(&error.to_string()));
                return None;
            }
        };
        let lean = bearing.error_of_lean(Angle::from_degrees(1.0));
        let line = words.text_with::<&str>(
            "shadow-azimuth",
            &[
                ("azimuth", &decimal(bearing.azimuth.degrees(), 2)),
                ("off", &decimal(bearing.error.degrees(), 2)),
                ("lean", &decimal(lean.degrees(), 1)),
            ],
        );
        text(ui, look, look.sizes.control, look.colours.text, &line);
        let reading = &mut self.reading_deg;
        fields::number(
            ui,
            desk,
            "compass-along-shadow",
            "unit-degrees",
            reading,
            0.0..=360.0,
        );
        let declination = bearing.declination(Angle::from_degrees(self.reading_deg));
        let shown = decimal(declination.degrees(), 1);
        let line = words.text_with("shadow-declination", &[("declination", shown.as_str())]);
        text(ui, look, look.sizes.control, look.colours.text, &line);
        ui.button(words.text("use-declination")).clicked().then(|| {
            *compass = Compass {
                is_magnetic: true,
                declination_deg: declination.degrees(),
            };
            Outcome::Done(words.text("declination-used"))
        })
    }
}
