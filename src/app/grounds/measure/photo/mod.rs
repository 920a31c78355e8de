//! Tracing the skyline over a photograph: known directions and the level tie the picture to the
//! sky, an outline drawn over it becomes skyline points.

mod marks;
mod paint;

use super::into_skyline::{NewPoints, put};
use super::{Compass, Desk, Outcome, fields};
use crate::app::command::Commands;
use crate::app::palette::Theme;
use crate::app::picture::{MOST_SIDE, Picture, PictureFlaw, read};
use crate::app::widgets::{choice, error_line, line, text};
use crate::app::worker::Worker;
use crate::measure::Angle;
use crate::place::survey::SurveyError;
use crate::place::survey::photo::{
    Level, PhotoFit, PhotoMark, PictureKind, PictureSize, Pixel, Projection, fit,
};
use crate::words::decimal;
use eframe::egui::{Key, TextureHandle, Ui};
use std::path::PathBuf;

/// What a click on the picture does.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
enum Touch {
    /// Marks a known direction.
    #[default]
    Mark,
    /// Marks a point of the level.
    Level,
    /// Adds a point to the outline.
    Outline,
}

impl Touch {
    const ALL: [Self; 3] = [Self::Mark, Self::Level, Self::Outline];

    const fn wording(self) -> &'static str {
        match self {
            Self::Mark => "photo-mark",
            Self::Level => "photo-level",
            Self::Outline => "photo-outline",
        }
    }
}

/// The kinds of picture, with their wording.
const KINDS: [(PictureKind, &str); 3] = [
    (PictureKind::Single, "photo-single"),
    (
        PictureKind::Panorama(Projection::Cylindrical),
        "photo-panorama",
    ),
    (
        PictureKind::Panorama(Projection::Equirectangular),
        "photo-panorama-even",
    ),
];

/// A known direction as written.
#[derive(Clone, Copy, Debug, PartialEq)]
struct Mark {
    at: Pixel,
    bearing_deg: f64,
    /// Used where it is known.
    altitude_deg: f64,
    is_altitude_known: bool,
}

/// The picture and what is marked on it.
pub struct Photo {
    path: String,
    error: Option<String>,
    picture: Option<Picture>,
    /// The file that is being read.
    reading: Option<PathBuf>,
    worker: Worker<Result<Picture, PictureFlaw>>,
    /// It as the theme shows it.
    texture: Option<(Theme, TextureHandle)>,
    kind: PictureKind,
    marks: Vec<Mark>,
    level: Vec<Pixel>,
    outline: Vec<Pixel>,
    touch: Touch,
    is_far: bool,
    view: paint::View,
}

impl Default for Photo {
    fn default() -> Self {
        Self {
            path: String::new(),
            error: None,
            picture: None,
            reading: None,
            worker: Worker::default(),
            texture: None,
            kind: PictureKind::Single,
            marks: Vec::new(),
            level: Vec::new(),
            outline: Vec::new(),
            touch: Touch::default(),
            is_far: false,
            view: paint::View::default(),
        }
    }
}

/// The outline's points are true to this.
const TOLERANCE: Angle = Angle::from_arcmin(3.0);

impl Photo {
    /// Draws the form.
    pub fn show(
        &mut self,
        ui: &mut Ui,
        desk: &Desk<'_>,
        compass: &mut Compass,
        commands: &mut Commands,
    ) -> Option<Outcome> {
        self.file_row(ui, desk);
        let [width, height] = self.picture.as_ref().map(|picture| picture.size_px)?;
        let size = PictureSize { width, height };
        let words = desk.words;
        ui.horizontal_wrapped(|ui| {
            for (kind, name) in KINDS {
                if choice(ui, desk.look, self.kind == kind, &words.text(name)).clicked() {
                    self.kind = kind;
                }
            }
        });
        ui.horizontal_wrapped(|ui| {
            for touch in Touch::ALL {
                let name = words.text(touch.wording());
                if choice(ui, desk.look, self.touch == touch, &name).clicked() {
                    self.touch = touch;
                }
            }
            if ui.button(words.text("photo-take-back")).clicked() {
                self.take_back();
            }
        });
        let hint = words.text(&format!("{}-hint", self.touch.wording()));
        let lesser = desk.look.colours.lesser;
        text(ui, desk.look, desk.look.sizes.label, lesser, &hint);
        let fitted = self.fit(size, compass);
        self.picture_ui(ui, desk, fitted.as_ref().ok());
        fields::north(ui, desk, compass);
        self.marks_table(ui, desk, fitted.as_ref().ok());
        match fitted {
            Ok(fitted) => self.finish(ui, desk, &fitted, commands),
            // Nobody has gone wrong who has not marked anything yet: the hint says what to do.
            Err(_) if self.marks.len() < 2 => None,
            Err(error) => {
                error_line(ui, desk.look, Some(&error.to_string()));
                None
            }
        }
    }

    fn file_row(&mut self, ui: &mut Ui, desk: &Desk<'_>) {
        let label = desk.words.text("photo-file");
        ui.horizontal(|ui| {
            let label = ui.label(label);
            let room = (ui.available_width() - 100.0).max(120.0);
            let field = ui
                .add(line(&mut self.path).desired_width(room))
                .labelled_by(label.id);
            let is_entered = field.lost_focus() && ui.input(|input| input.key_pressed(Key::Enter));
            if ui.button(desk.words.text("photo-load")).clicked() || is_entered {
                let path = PathBuf::from(self.path.trim());
                self.start_reading(ui, path);
            }
        });
        self.look_for_picture(desk);
        if self.reading.is_some() {
            let said = desk.words.text("photo-reading");
            text(
                ui,
                desk.look,
                desk.look.sizes.label,
                desk.look.colours.lesser,
                &said,
            );
        }
        error_line(ui, desk.look, self.error.as_deref());
    }

    /// Decodes the picture beside the window: a large one takes seconds.
    fn start_reading(&mut self, ui: &Ui, path: PathBuf) {
        let file = path.clone();
        let started = self.worker.start(ui.ctx(), "photograph", move |telling| {
            telling.tell(read(&file, MOST_SIDE));
        });
        self.error = started.err().map(|error| error.to_string());
        self.reading = self.error.is_none().then_some(path);
    }

    fn look_for_picture(&mut self, desk: &Desk<'_>) {
        let Some(path) = self.reading.clone() else {
            return;
        };
        let flaw = match self.worker.news() {
            Some(Ok(picture)) => return self.take(picture),
            Some(Err(flaw)) => flaw,
            None if self.worker.share().is_some() => return,
            // The decoder gave up on a damaged file without a word.
            None => PictureFlaw::NoPicture,
        };
        self.reading = None;
        self.error = Some(flaw.sentence(desk.words, &path));
    }

    /// Begins anew with a picture: what was marked on another one means nothing here.
    fn take(&mut self, picture: Picture) {
        *self = Self {
            path: std::mem::take(&mut self.path),
            picture: Some(picture),
            kind: self.kind,
            is_far: self.is_far,
            ..Self::default()
        };
    }

    fn take_back(&mut self) {
        match self.touch {
            Touch::Mark => drop(self.marks.pop()),
            Touch::Level => drop(self.level.pop()),
            Touch::Outline => drop(self.outline.pop()),
        }
    }

    fn fit(&self, size: PictureSize, compass: &Compass) -> Result<PhotoFit, SurveyError> {
        let north = compass.north();
        let marks: Vec<PhotoMark> = self
            .marks
            .iter()
            .map(|mark| PhotoMark {
                at: mark.at,
                azimuth: north.azimuth(Angle::from_degrees(mark.bearing_deg)),
                altitude: mark
                    .is_altitude_known
                    .then(|| Angle::from_degrees(mark.altitude_deg)),
            })
            .collect();
        let level = if self.level.is_empty() {
            Level::Picture
        } else {
            Level::Points(self.level.clone())
        };
        fit(self.kind, size, &marks, &level)
    }

    /// What the fit is worth, and the button that takes the outline over.
    fn finish(
        &mut self,
        ui: &mut Ui,
        desk: &Desk<'_>,
        fitted: &PhotoFit,
        commands: &mut Commands,
    ) -> Option<Outcome> {
        let words = desk.words;
        let pixel = decimal(fitted.pixel.degrees(), 3);
        let id = if fitted.spare == 0 {
            "photo-fit-unchecked"
        } else {
            "photo-fit"
        };
        let said = words.text_with(id, &[("pixel", pixel.as_str())]);
        let colour = desk.look.colours.text;
        text(ui, desk.look, desk.look.sizes.control, colour, &said);
        ui.checkbox(&mut self.is_far, words.text("readings-far"));
        ui.button(words.text("put-into-skyline"))
            .clicked()
            .then(|| match fitted.picture.trace(&self.outline, TOLERANCE) {
                Ok(traced) => put(
                    desk,
                    NewPoints {
                        points: traced.points,
                        sweep: traced.sweep,
                        is_far: self.is_far,
                    },
                    commands,
                ),
                Err(error) => error.into(),
            })
    }
}
