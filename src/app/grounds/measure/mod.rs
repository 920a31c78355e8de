//! The ways to measure what stands around a spot, as forms that end in a changed site.
//!
//! A form keeps what was written until the program ends, so that readings taken on the grounds
//! are not lost when the dialog is closed.

mod fields;
mod heights;
mod into_skyline;
mod noted;
mod photo;
mod readings;
mod shadow;
mod vanishing;

pub(super) use into_skyline::measured_of;

use super::Desk;
use crate::app::command::{Command, Commands};
use crate::app::palette::Look;
use crate::app::widgets::{bold, choice, error_line, text};
use crate::measure::Angle;
use crate::place::survey::SurveyError;
use crate::place::survey::compass::North;
use eframe::egui::Ui;

/// A way to measure.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Way {
    /// Compass and clinometer from the spot.
    #[default]
    Readings,
    /// Pacing or tape, with a stick, a shadow or an angle.
    Heights,
    /// The minute at which a body went behind something.
    Vanishing,
    /// The Sun's shadow of a pole as a compass.
    Shadow,
    /// An outline traced over a photograph.
    Photo,
}

impl Way {
    /// All of them, in the order in which they are offered.
    pub const ALL: [Self; 5] = [
        Self::Readings,
        Self::Heights,
        Self::Vanishing,
        Self::Shadow,
        Self::Photo,
    ];

    /// The wording of its name; its explanation is the same with `-hint`.
    pub const fn wording(self) -> &'static str {
        match self {
            Self::Readings => "measure-readings",
            Self::Heights => "measure-heights",
            Self::Vanishing => "measure-vanishing",
            Self::Shadow => "measure-shadow",
            Self::Photo => "measure-photo",
        }
    }
}

/// Everything written into the forms so far.
#[derive(Default)]
pub struct Measure {
    way: Way,
    /// Which north the compass counts from; the shadow's form can find it.
    compass: Compass,
    readings: readings::Readings,
    heights: heights::Heights,
    vanishing: vanishing::Vanishing,
    shadow: shadow::Shadow,
    photo: photo::Photo,
    /// What the last button did, or why it did nothing.
    outcome: Option<Outcome>,
}

/// What came of a button.
pub(super) enum Outcome {
    Done(String),
    Refused(String),
}

impl Outcome {
    /// Says it.
    pub(super) fn show(&self, ui: &mut Ui, look: &Look) {
        match self {
            Self::Done(said) => {
                text(ui, look, look.sizes.control, look.colours.chosen, said);
            }
            Self::Refused(why) => error_line(ui, look, Some(why)),
        }
    }
}

/// The north that bearings are counted from.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
struct Compass {
    is_magnetic: bool,
    declination_deg: f64,
}

impl Compass {
    fn north(&self) -> North {
        if self.is_magnetic {
            North::Magnetic {
                declination: Angle::from_degrees(self.declination_deg),
            }
        } else {
            North::True
        }
    }
}

impl Measure {
    /// Chooses a way.
    pub fn choose(&mut self, way: Way) {
        self.way = way;
        self.outcome = None;
    }

    /// Whether it wants the whole window.
    pub fn is_large(&self) -> bool {
        self.way == Way::Photo
    }

    /// Draws the chosen way's form.
    pub fn show(&mut self, ui: &mut Ui, desk: &Desk<'_>, commands: &mut Commands) {
        let (look, words) = (desk.look, desk.words);
        let title = words.text_with("measure-from", &[("spot", desk.state.spot().name.as_str())]);
        bold(ui, look, look.sizes.sentence, look.colours.text, &title);
        ui.horizontal_wrapped(|ui| {
            for way in Way::ALL {
                if choice(ui, look, self.way == way, &words.text(way.wording())).clicked() {
                    self.choose(way);
                }
            }
        });
        let hint = words.text(&format!("{}-hint", self.way.wording()));
        text(ui, look, look.sizes.label, look.colours.lesser, &hint);
        let outcome = match self.way {
            Way::Readings => self.readings.show(ui, desk, &mut self.compass, commands),
            Way::Heights => self.heights.show(ui, desk, &mut self.compass, commands),
            Way::Vanishing => self.vanishing.show(ui, desk, commands),
            Way::Shadow => self.shadow.show(ui, desk, &mut self.compass),
            Way::Photo => self.photo.show(ui, desk, &mut self.compass, commands),
        };
        if outcome.is_some() {
            self.outcome = outcome;
        }
        if let Some(outcome) = &self.outcome {
            outcome.show(ui, look);
        }
    }
}

/// A changed site put into use, and what to say of it.
pub(super) fn done(site: crate::place::Site, said: String, commands: &mut Commands) -> Outcome {
    match site.check() {
        Ok(()) => {
            commands.push(Command::EditSite(Box::new(site)));
            Outcome::Done(said)
        }
        Err(error) => Outcome::Refused(error.to_string()),
    }
}

impl From<SurveyError> for Outcome {
    fn from(error: SurveyError) -> Self {
        Self::Refused(error.to_string())
    }
}
