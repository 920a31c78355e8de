//! Looking along the terrain that the chosen site names, on a thread of its own.

use super::command::{Command, Commands};
use super::palette::Look;
use super::state::State;
use super::widgets::{command_button, figure};
use super::worker::Worker;
use crate::place::{FarSkyline, Site};
use crate::words::Words;
use eframe::egui::{Context, ProgressBar, Ui};
use std::path::PathBuf;
use std::sync::Arc;

/// What the work tells: the skyline, first in steps of two degrees and then in full, or why there
/// is none.
type News = Result<Arc<FarSkyline>, String>;

/// What a skyline from terrain depends on.
#[derive(Clone, Debug, PartialEq)]
struct Question {
    terrain: PathBuf,
    file: Option<PathBuf>,
    latitude_deg: f64,
    longitude_deg: f64,
    k: f64,
}

impl Question {
    /// `None` for a site that names no terrain.
    fn of(site: &Site, file: Option<PathBuf>) -> Option<Self> {
        Some(Self {
            terrain: site.terrain.clone()?,
            file,
            latitude_deg: site.latitude_deg,
            longitude_deg: site.longitude_deg,
            k: site.terrain_k,
        })
    }
}

/// The work, and what it is for.
#[derive(Default)]
pub struct Terrain {
    asked: Option<Question>,
    worker: Worker<News>,
    is_stopped: bool,
}

impl Terrain {
    /// Begins to look where the site's terrain changed, and takes in what was found. What there
    /// is to say comes back as sentences.
    pub fn follow(&mut self, ctx: &Context, state: &mut State, words: &Words) -> Vec<String> {
        let known = state.sites().list().get(state.site_index());
        let file = known.and_then(|known| known.file.clone());
        let question = Question::of(state.site(), file);
        let mut said = Vec::new();
        if question != self.asked {
            self.is_stopped = false;
            self.worker.cancel();
            if state.site().far.is_some() {
                state.set_far(None);
            }
            if let Some(question) = &question
                && let Err(error) = self.start(ctx, state.site().clone(), question)
            {
                said.push(error.to_string());
            }
            self.asked = question;
        }
        match self.worker.news() {
            Some(Ok(far)) => {
                // Of a first result in coarse steps nothing is said yet.
                if self.worker.share().is_none() {
                    said.extend(words.terrain_remarks(state.site(), &far));
                }
                state.set_far(Some(far));
            }
            Some(Err(sentence)) => said.push(sentence),
            None => {}
        }
        said
    }

    fn start(&mut self, ctx: &Context, site: Site, question: &Question) -> std::io::Result<()> {
        let file = question.file.clone();
        self.worker.start(ctx, "terrain", move |telling| {
            let found = site.find_far(file.as_deref(), &telling.progress, &mut |coarse| {
                telling.tell(Ok(Arc::new(coarse)));
            });
            match found {
                Ok(Some(far)) => telling.tell(Ok(Arc::new(far))),
                Ok(None) => {}
                Err(error) => telling.tell(Err(error.to_string())),
            }
        })
    }

    /// Stops looking; what was found so far stays.
    pub fn stop(&mut self) {
        self.worker.cancel();
        self.is_stopped = true;
    }

    /// Looks anew.
    pub fn look_again(&mut self) {
        self.asked = None;
    }

    /// Whether there is.
    pub fn has_something_to_say(&self) -> bool {
        self.is_stopped || self.worker.share().is_some()
    }

    /// How far the work is, with a button that stops it or begins it anew; nothing while there is
    /// nothing to say.
    pub fn show(&self, ui: &mut Ui, look: &Look, words: &Words, commands: &mut Commands) {
        let font = look.font(look.sizes.label);
        if let Some(share) = self.worker.share() {
            ui.horizontal(|ui| {
                figure(
                    ui,
                    font,
                    look.colours.lesser,
                    &words.text("terrain-looking"),
                );
                ui.add(ProgressBar::new(share as f32).desired_width(160.0));
                command_button(ui, words, Command::StopTerrain, commands);
            });
        } else if self.is_stopped {
            ui.horizontal(|ui| {
                figure(
                    ui,
                    font,
                    look.colours.lesser,
                    &words.text("terrain-stopped"),
                );
                command_button(ui, words, Command::LookAlongTerrain, commands);
            });
        }
    }
}
