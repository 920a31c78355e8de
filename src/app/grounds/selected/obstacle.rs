//! An obstacle: its label and its measures.

use super::{Field, Form, name, row};
use crate::app::command::Commands;
use crate::app::grounds::Desk;
use crate::app::widgets::check_box;
use crate::place::{Leafless, Obstacle, Site, YearDay};
use eframe::egui::{Id, Ui};

/// Which number of an obstacle.
#[derive(Clone, Copy)]
enum Measure {
    Height,
    Width,
    Eaves,
}

/// Which number that may be left out.
#[derive(Clone, Copy)]
enum Optional {
    Base,
    Gap,
    Trunk,
    Ridge,
}

pub fn show(ui: &mut Ui, desk: &Desk<'_>, form: &mut Form, index: usize, commands: &mut Commands) {
    let Some(obstacle) = desk.state.site().obstacles.get(index) else {
        return;
    };
    let of = format!("obstacle {index}");
    let label = Field::new("field-label", &of);
    let shown = obstacle.label();
    form.read(
        ui,
        desk,
        commands,
        label,
        (shown, ""),
        name,
        |site, label| {
            if let Some(obstacle) = site.obstacles.get_mut(index) {
                *obstacle.label_mut() = label;
            }
        },
    );
    let mut fields = Fields {
        desk,
        form,
        commands,
        index,
        of: &of,
        obstacle,
    };
    match obstacle {
        Obstacle::Tree { leafless, .. } => {
            row::<3>(ui, |column, ui| match column {
                0 => fields.measure(ui, "field-height", Measure::Height),
                1 => fields.measure(ui, "field-crown", Measure::Width),
                _ => fields.optional(ui, "field-base", "base-as-slopes", Optional::Base),
            });
            row::<2>(ui, |column, ui| match column {
                0 => fields.optional(ui, "field-gap", "gap-none", Optional::Gap),
                _ => fields.optional(ui, "field-trunk", "trunk-usual", Optional::Trunk),
            });
            fields.leafless(ui, *leafless);
        }
        Obstacle::Pole { .. } => row::<3>(ui, |column, ui| match column {
            0 => fields.measure(ui, "field-height", Measure::Height),
            1 => fields.measure(ui, "field-width", Measure::Width),
            _ => fields.optional(ui, "field-base", "base-as-slopes", Optional::Base),
        }),
        Obstacle::Building { .. } => row::<3>(ui, |column, ui| match column {
            0 => fields.measure(ui, "field-eaves", Measure::Eaves),
            1 => fields.optional(ui, "field-ridge", "ridge-none", Optional::Ridge),
            _ => fields.optional(ui, "field-base", "base-as-slopes", Optional::Base),
        }),
        Obstacle::Wall { .. } | Obstacle::Shape { .. } => {
            row::<2>(ui, |column, ui| match column {
                0 => fields.measure(ui, "field-height", Measure::Height),
                _ => fields.optional(ui, "field-base", "base-as-slopes", Optional::Base),
            });
        }
    }
}

/// The fields of one obstacle.
struct Fields<'a> {
    desk: &'a Desk<'a>,
    form: &'a mut Form,
    commands: &'a mut Commands,
    index: usize,
    of: &'a str,
    obstacle: &'a Obstacle,
}

impl Fields<'_> {
    fn measure(&mut self, ui: &mut Ui, label: &str, measure: Measure) {
        let mut shown = self.obstacle.clone();
        let Some(value) = measure_of(&mut shown, measure).copied() else {
            return;
        };
        let (index, field) = (self.index, Field::new(label, self.of));
        self.form
            .number(ui, self.desk, self.commands, field, value, |site, value| {
                if let Some(old) = at(site, index).and_then(|o| measure_of(o, measure)) {
                    *old = value;
                }
            });
    }

    fn optional(&mut self, ui: &mut Ui, label: &str, instead: &str, which: Optional) {
        let mut shown = self.obstacle.clone();
        let Some(value) = optional_of(&mut shown, which).copied() else {
            return;
        };
        let instead = self.desk.words.text(instead);
        let (index, field) = (self.index, Field::new(label, self.of));
        let desk = self.desk;
        self.form.optional(
            ui,
            desk,
            self.commands,
            (field, &instead),
            value,
            |site, value| {
                if let Some(old) = at(site, index).and_then(|o| optional_of(o, which)) {
                    *old = value;
                }
            },
        );
    }

    /// When a tree stands without leaves, and how much shows through it then.
    fn leafless(&mut self, ui: &mut Ui, leafless: Option<Leafless>) {
        let (desk, index) = (self.desk, self.index);
        let mut is_bare = leafless.is_some();
        check_box(ui, desk.look, &mut is_bare, &desk.words.text("leafless"));
        if is_bare != leafless.is_some() {
            // From mid-November to mid-April, as oaks and limes of the temperate north stand.
            let usual = Leafless {
                from: YearDay { month: 11, day: 15 },
                to: YearDay { month: 4, day: 15 },
                see_through: 0.6,
            };
            let id = Id::unique(("leafless", self.of));
            self.form.send(desk, self.commands, id, |site| {
                set_leafless(site, index, |leafless| {
                    *leafless = is_bare.then_some(usual);
                });
            });
        }
        let Some(leafless) = leafless else { return };
        let (form, commands) = (&mut *self.form, &mut *self.commands);
        let field = |label| Field::new(label, self.of);
        row::<3>(ui, |column, ui| {
            let (label, shown) = match column {
                0 => ("field-leafless-from", leafless.from),
                1 => ("field-leafless-to", leafless.to),
                _ => {
                    let share = leafless.see_through;
                    let label = field("field-see-through");
                    form.number(ui, desk, commands, label, share, |site, share| {
                        set_leafless(site, index, |leafless| {
                            if let Some(leafless) = leafless {
                                leafless.see_through = share;
                            }
                        });
                    });
                    return;
                }
            };
            let text = format!("{:02}-{:02}", shown.month, shown.day);
            let put = |site: &mut Site, day| {
                set_leafless(site, index, |leafless| match (leafless, column) {
                    (Some(leafless), 0) => leafless.from = day,
                    (Some(leafless), _) => leafless.to = day,
                    (None, _) => {}
                });
            };
            form.read(ui, desk, commands, field(label), (&text, ""), year_day, put);
        });
    }
}

fn at(site: &mut Site, index: usize) -> Option<&mut Obstacle> {
    site.obstacles.get_mut(index)
}

fn measure_of(obstacle: &mut Obstacle, measure: Measure) -> Option<&mut f64> {
    match (obstacle, measure) {
        (
            Obstacle::Tree { height_m, .. }
            | Obstacle::Pole { height_m, .. }
            | Obstacle::Shape { height_m, .. }
            | Obstacle::Wall { height_m, .. },
            Measure::Height,
        ) => Some(height_m),
        (Obstacle::Tree { width_m, .. } | Obstacle::Pole { width_m, .. }, Measure::Width) => {
            Some(width_m)
        }
        (Obstacle::Building { eaves_m, .. }, Measure::Eaves) => Some(eaves_m),
        _ => None,
    }
}

fn optional_of(obstacle: &mut Obstacle, which: Optional) -> Option<&mut Option<f64>> {
    match (obstacle, which) {
        (obstacle, Optional::Base) => Some(obstacle.base_mut()),
        (Obstacle::Tree { gap_m, .. }, Optional::Gap) => Some(gap_m),
        (Obstacle::Tree { trunk_m, .. }, Optional::Trunk) => Some(trunk_m),
        (Obstacle::Building { ridge_m, .. }, Optional::Ridge) => Some(ridge_m),
        _ => None,
    }
}

fn set_leafless(site: &mut Site, index: usize, change: impl FnOnce(&mut Option<Leafless>)) {
    if let Some(Obstacle::Tree { leafless, .. }) = at(site, index) {
        change(leafless);
    }
}

/// A day of the year written as month-day.
fn year_day(text: &str) -> Result<YearDay, &'static str> {
    let (month, day) = text.trim().split_once('-').ok_or("year-day-error")?;
    let part = |text: &str| text.trim().parse::<u32>().map_err(|_| "year-day-error");
    YearDay::try_from((part(month)?, part(day)?)).map_err(|_| "year-day-error")
}
