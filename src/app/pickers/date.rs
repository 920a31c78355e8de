//! The date: the day before, the day after, a month to choose from, or written out.

use crate::app::command::{Command, Commands};
use crate::app::palette::Look;
use crate::app::state::State;
use crate::app::widgets::{error_line, figure, line, name_it, sign_button, text};
use crate::words::Words;
use chrono::{Datelike, Days, Months, NaiveDate};
use eframe::egui::containers::menu::{MenuButton, MenuConfig};
use eframe::egui::{Button, Grid, Id, PopupCloseBehavior, Role, Stroke, Ui, Vec2, vec2};

/// Width of the list, points: seven days and the gaps between them.
const WIDTH: f32 = 7.0 * DAY.x + 6.0 * GAP;
const DAY: Vec2 = vec2(36.0, 28.0);
const GAP: f32 = 2.0;

/// What is being chosen while the list is open; kept in the window library's memory.
#[derive(Clone, Debug, Default)]
pub struct DateDraft {
    /// The date that was shown when it was opened.
    shown: Option<NaiveDate>,
    /// Any day of the month on view.
    month: NaiveDate,
    written: String,
    error: Option<String>,
}

/// The date with its arrows.
pub fn date_picker(
    ui: &mut Ui,
    look: &Look,
    words: &Words,
    state: &State,
    commands: &mut Commands,
) {
    let date = state.local_time().date();
    sign_button(ui, words, "◂", Command::StepDays(-1), commands);
    let shown = words.weekday_date(date);
    let config = MenuConfig::new().close_behavior(PopupCloseBehavior::CloseOnClickOutside);
    let (button, _) = MenuButton::new(&shown).config(config).ui(ui, |ui| {
        let id = Id::unique("date draft");
        let mut draft: DateDraft = ui.data(|data| data.get_temp(id)).unwrap_or_default();
        if draft.shown != Some(date) {
            draft = DateDraft {
                shown: Some(date),
                month: date,
                written: date.to_string(),
                error: None,
            };
        }
        if let Some(chosen) = draft_ui(ui, look, words, &mut draft) {
            commands.push(Command::ChooseDate(chosen));
            ui.close();
        }
        ui.data_mut(|data| data.insert_temp(id, draft));
    });
    name_it(
        &button,
        Role::Button,
        &words.text_with::<&str>("date-picker", &[("date", &shown)]),
    );
    sign_button(ui, words, "▸", Command::StepDays(1), commands);
}

fn draft_ui(ui: &mut Ui, look: &Look, words: &Words, draft: &mut DateDraft) -> Option<NaiveDate> {
    ui.set_width(WIDTH);
    let mut chosen = None;
    let name = words.text("date-field");
    let label = text(ui, look, look.sizes.label, look.colours.lesser, &name);
    let field = ui
        .add(line(&mut draft.written).desired_width(f32::INFINITY))
        .labelled_by(label.id);
    if field.lost_focus() && ui.input(|input| input.key_pressed(eframe::egui::Key::Enter)) {
        match draft.written.trim().parse() {
            Ok(date) => chosen = Some(date),
            Err(_) => draft.error = Some(words.text("date-field-error")),
        }
    }
    error_line(ui, look, draft.error.as_deref());
    ui.horizontal(|ui| {
        let back = ui.button("◂");
        name_it(&back, Role::Button, &words.text("previous-month"));
        if back.clicked() {
            draft.month = draft
                .month
                .checked_sub_months(Months::new(1))
                .unwrap_or(draft.month);
        }
        let on = ui.button("▸");
        name_it(&on, Role::Button, &words.text("next-month"));
        if on.clicked() {
            draft.month = draft
                .month
                .checked_add_months(Months::new(1))
                .unwrap_or(draft.month);
        }
        text(
            ui,
            look,
            look.sizes.control,
            look.colours.text,
            &words.month_year(draft.month),
        );
    });
    month_ui(ui, look, words, draft).or(chosen)
}

/// A month, weeks from Monday.
fn month_ui(ui: &mut Ui, look: &Look, words: &Words, draft: &DateDraft) -> Option<NaiveDate> {
    let first = draft.month.with_day(1)?;
    let mut chosen = None;
    let before = u64::from(first.weekday().num_days_from_monday());
    let mut day = first.checked_sub_days(Days::new(before))?;
    Grid::new("month").spacing(vec2(GAP, GAP)).show(ui, |ui| {
        let font = look.font(look.sizes.label);
        for number in 1..=7 {
            let weekday = words.text(&format!("weekday-{number}"));
            ui.vertical_centered(|ui| figure(ui, font.clone(), look.colours.lesser, &weekday));
        }
        ui.end_row();
        for _week in 0..6 {
            for _weekday in 0..7 {
                let is_shown = draft.shown == Some(day);
                let colour = if day.month() == first.month() {
                    look.colours.text
                } else {
                    look.colours.lesser
                };
                let figures = eframe::egui::RichText::new(day.day().to_string()).color(colour);
                let mut button = Button::new(figures).min_size(DAY).selected(is_shown);
                if is_shown {
                    button = button.stroke(Stroke::new(1.5, look.colours.chosen));
                }
                let response = ui.add(button);
                name_it(&response, Role::Button, &words.weekday_date(day));
                if response.clicked() {
                    chosen = Some(day);
                }
                day = day.checked_add_days(Days::new(1)).unwrap_or(day);
            }
            ui.end_row();
        }
    });
    chosen
}
