//! A noted time on the site's clock.

use super::Desk;
use crate::app::widgets::line;
use crate::measure::{Moment, civil};
use crate::place::survey::SurveyError;
use chrono::{NaiveDate, NaiveDateTime, NaiveTime};
use eframe::egui::{RichText, Ui};

/// Date and time as written.
#[derive(Default)]
pub struct NotedTime {
    date: String,
    time: String,
    /// How far clock and eye may be off, seconds.
    pub uncertainty_s: f64,
}

impl NotedTime {
    /// The moment shown in the window, to begin with.
    fn fill(&mut self, desk: &Desk<'_>) {
        if self.date.is_empty() && self.time.is_empty() {
            let now = desk.state.local_time();
            self.date = now.format("%Y-%m-%d").to_string();
            self.time = now.format("%H:%M:%S").to_string();
            self.uncertainty_s = 10.0;
        }
    }

    /// Draws its fields.
    pub fn show(&mut self, ui: &mut Ui, desk: &Desk<'_>) {
        self.fill(desk);
        let look = desk.look;
        ui.horizontal_wrapped(|ui| {
            for (name, text, width) in [
                ("noted-date", &mut self.date, 110.0),
                ("noted-time", &mut self.time, 90.0),
            ] {
                let label = RichText::new(desk.words.text(name))
                    .font(look.font(look.sizes.label))
                    .color(look.colours.lesser);
                let label = ui.label(label);
                ui.add(line(text).desired_width(width))
                    .labelled_by(label.id);
            }
            let uncertainty = &mut self.uncertainty_s;
            super::fields::number(
                ui,
                desk,
                "noted-within",
                "unit-seconds",
                uncertainty,
                0.0..=1800.0,
            );
        });
    }

    /// The moment.
    ///
    /// # Errors
    /// The date or the time cannot be read, does not exist on the site's clock, or lies outside
    /// the supported years.
    pub fn moment(&self, desk: &Desk<'_>) -> Result<Moment, SurveyError> {
        let refuse = |id: &str, written: &str| {
            SurveyError(desk.words.text_with(id, &[("written", written)]))
        };
        let date = NaiveDate::parse_from_str(self.date.trim(), "%Y-%m-%d")
            .map_err(|_| refuse("noted-date-unread", &self.date))?;
        let time = ["%H:%M:%S", "%H:%M"]
            .iter()
            .find_map(|form| NaiveTime::parse_from_str(self.time.trim(), form).ok())
            .ok_or_else(|| refuse("noted-time-unread", &self.time))?;
        let local = NaiveDateTime::new(date, time);
        let utc = civil::utc_from_local(local, desk.state.site().zone())
            .map_err(|error| SurveyError(error.to_string()))?;
        desk.state
            .scales()
            .moment_from_civil(utc)
            .map_err(|error| SurveyError(error.to_string()))
    }
}
