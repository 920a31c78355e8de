//! Bringing skylines and plans in from files, and handing them out.

use super::Desk;
use super::measure::{Outcome, done, measured_of};
use crate::app::command::Commands;
use crate::app::widgets::{bold, field, text};
use crate::place::exchange::{
    Imported, Remark, Remarked, read_geojson, write_geojson, write_skyline_table,
};
use crate::place::{SiteError, read_skyline_table};
use crate::words::{Words, decimal};
use eframe::egui::Ui;
use std::path::{Path, PathBuf};

/// What is written, and what came of it.
#[derive(Default)]
pub struct Exchange {
    path: String,
    outcome: Option<Outcome>,
    remarks: Vec<Remarked>,
    /// The file that is there already and would be written over.
    asked_about: Option<PathBuf>,
}

/// What a button does.
#[derive(Clone, Copy)]
enum Act {
    SkylineIn,
    PlanIn,
    SkylineOut,
    PlanOut,
}

impl Act {
    const ALL: [Self; 4] = [
        Self::SkylineIn,
        Self::PlanIn,
        Self::SkylineOut,
        Self::PlanOut,
    ];

    const fn wording(self) -> &'static str {
        match self {
            Self::SkylineIn => "skyline-in",
            Self::PlanIn => "geojson-in",
            Self::SkylineOut => "skyline-out",
            Self::PlanOut => "geojson-out",
        }
    }

    const fn writes(self) -> bool {
        matches!(self, Self::SkylineOut | Self::PlanOut)
    }
}

/// Remarks that are listed at most.
const MOST_REMARKS: usize = 40;

impl Exchange {
    /// Draws the form.
    pub fn show(&mut self, ui: &mut Ui, desk: &Desk<'_>, commands: &mut Commands) {
        let (look, words) = (desk.look, desk.words);
        let title = words.text("exchange");
        bold(ui, look, look.sizes.sentence, look.colours.text, &title);
        let label = words.text("file-path");
        field(ui, look, &label, &mut self.path, None);
        let mut wanted = None;
        for act in Act::ALL {
            ui.horizontal_wrapped(|ui| {
                if ui.button(words.text(act.wording())).clicked() {
                    wanted = Some(act);
                }
                let hint = words.text(&format!("{}-hint", act.wording()));
                text(ui, look, look.sizes.label, look.colours.lesser, &hint);
            });
        }
        if let Some(act) = wanted {
            self.remarks.clear();
            let path = PathBuf::from(self.path.trim());
            self.outcome = Some(self.run(act, &path, desk, commands));
        }
        if let Some(outcome) = &self.outcome {
            outcome.show(ui, look);
        }
        for remark in self.remarks.iter().take(MOST_REMARKS) {
            let line = said(words, remark);
            text(ui, look, look.sizes.label, look.colours.lesser, &line);
        }
        if let Some(more) = self.remarks.len().checked_sub(MOST_REMARKS + 1) {
            let more = (more + 1).to_string();
            let line = words.text_with("remarks-more", &[("count", more.as_str())]);
            text(ui, look, look.sizes.label, look.colours.lesser, &line);
        }
    }

    fn run(&mut self, act: Act, path: &Path, desk: &Desk<'_>, commands: &mut Commands) -> Outcome {
        if act.writes() && path.is_file() && self.asked_about.as_deref() != Some(path) {
            self.asked_about = Some(path.to_owned());
            let file = path.to_string_lossy();
            let ask = [("file", file.as_ref())];
            return Outcome::Refused(desk.words.text_with("write-over", &ask));
        }
        self.asked_about = None;
        let done = match act {
            Act::SkylineIn => skyline_in(path, desk, commands),
            Act::PlanIn => self.plan_in(path, desk, commands),
            Act::SkylineOut => skyline_out(path, desk),
            Act::PlanOut => plan_out(path, desk),
        };
        done.unwrap_or_else(|error| Outcome::Refused(error.to_string()))
    }

    fn plan_in(
        &mut self,
        path: &Path,
        desk: &Desk<'_>,
        commands: &mut Commands,
    ) -> Result<Outcome, SiteError> {
        let imported: Imported = read_geojson(path, desk.state.site())?;
        let site = imported.added_to(desk.state.site())?;
        let counts = [
            imported.spots.len(),
            imported.obstacles.len(),
            imported.excluded.len(),
        ]
        .map(|count| count.to_string());
        let [spots, obstacles, excluded] = counts.each_ref().map(String::as_str);
        let said = desk.words.text_with(
            "geojson-taken",
            &[
                ("spots", spots),
                ("obstacles", obstacles),
                ("excluded", excluded),
            ],
        );
        self.remarks = imported.remarks;
        Ok(done(site, said, commands))
    }
}

fn skyline_in(path: &Path, desk: &Desk<'_>, commands: &mut Commands) -> Result<Outcome, SiteError> {
    let points = read_skyline_table(path)?;
    let count = points.len().to_string();
    let mut site = desk.state.site().clone();
    *measured_of(&mut site, desk.state.spot_index()).0 = points;
    let spot = desk.state.spot().name.as_str();
    let said = [("count", count.as_str()), ("spot", spot)];
    let said = desk.words.text_with("points-put-in", &said);
    Ok(done(site, said, commands))
}

fn skyline_out(path: &Path, desk: &Desk<'_>) -> Result<Outcome, SiteError> {
    let mut site = desk.state.site().clone();
    let points = measured_of(&mut site, desk.state.spot_index()).0;
    write_skyline_table(points, path)?;
    Ok(written(path, desk))
}

fn plan_out(path: &Path, desk: &Desk<'_>) -> Result<Outcome, SiteError> {
    write_geojson(desk.state.site(), path)?;
    Ok(written(path, desk))
}

fn written(path: &Path, desk: &Desk<'_>) -> Outcome {
    let file = path.to_string_lossy();
    let said = [("file", file.as_ref())];
    Outcome::Done(desk.words.text_with("file-written", &said))
}

/// A remark as a sentence.
fn said(words: &Words, remarked: &Remarked) -> String {
    let number = remarked.feature.to_string();
    let label = remarked.label.as_str();
    let (id, value) = match &remarked.remark {
        Remark::HeightAssumed { height_m } => ("remark-height-assumed", decimal(*height_m, 1)),
        Remark::HeightFromStoreys { height_m } => ("remark-from-storeys", decimal(*height_m, 1)),
        Remark::WidthAssumed { width_m } => ("remark-width-assumed", decimal(*width_m, 1)),
        Remark::RoofTakenAsFlat => ("remark-roof-flat", String::new()),
        Remark::KindAssumed => ("remark-kind-assumed", String::new()),
        Remark::LengthNotRead { property } => ("remark-length-not-read", property.clone()),
        Remark::HolesLeftOut => ("remark-holes", String::new()),
        Remark::Renamed => ("remark-renamed", String::new()),
        Remark::PassedOver => ("remark-passed-over", String::new()),
        Remark::NoGeometry => ("remark-no-geometry", String::new()),
    };
    words.text_with::<&str>(
        id,
        &[("number", &number), ("label", label), ("value", &value)],
    )
}
