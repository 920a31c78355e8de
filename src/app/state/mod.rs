//! What is chosen and what is shown. Knows nothing of windows: commands change it, the frame
//! reads it, tests drive it either way.

mod editing;
mod going;

use super::area::Area;
use super::command::{Command, OpticsView, Speed};
use super::palette::Theme;
use super::planned::Planned;
use super::sites::Sites;
use crate::light::Eye;
use crate::measure::{DateOutOfRange, Moment, TimeScales, Ut1};
use crate::place::{Haze, Instrument, Orientation, Site, Spot, Stature};
use crate::plan::{Half, NightError, Window};
use crate::sky::{Body, Ephemeris};
use chrono::{DateTime, NaiveDate, NaiveDateTime, Utc};
use editing::History;
use going::Goal;
use std::sync::Arc;

/// Tells the time; given by the caller, so that a rehearsal or a test can set it.
pub type Clock = Arc<dyn Fn() -> DateTime<Utc> + Send + Sync>;

/// Whether the moment stands still.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Motion {
    /// It does.
    #[default]
    Still,
    /// It follows the clock.
    Following,
    /// It runs.
    Running(Speed),
}

/// What one starts with.
#[derive(Clone, Copy, Debug, Default)]
pub struct Choices {
    /// A body, else Venus.
    pub body: Option<Body>,
    /// Whose eye, else a visitor's.
    pub eye: Option<Eye>,
    /// An evening's date, else the coming night in which the body stands best.
    pub date: Option<NaiveDate>,
    /// A half of that night, else the one in which the body stands better.
    pub half: Option<Half>,
    /// Whose height, else an adult's.
    pub stature: Option<Stature>,
}

/// The choices and the night that follows from them.
pub struct State {
    clock: Clock,
    scales: TimeScales,
    ephemeris: Ephemeris,
    sites: Sites,
    site: usize,
    spot: usize,
    date: NaiveDate,
    half: Half,
    body: Body,
    eye: Eye,
    stature: Stature,
    haze: Option<Haze>,
    /// The site in the chosen haze, where one is chosen.
    site_in_haze: Option<Site>,
    moment: Moment,
    /// The civil time wanted, on the site's clock: that of the moment wherever the night could
    /// be planned, and what was asked for where it could not.
    wanted: NaiveDateTime,
    planned: Result<Planned, NightError>,
    plan_count: u64,
    motion: Motion,
    speed: Speed,
    history: History,
    /// The work area on view.
    pub area: Area,
    /// How the chosen optics show the disc.
    pub optics_view: OpticsView,
    /// How the window is coloured.
    pub theme: Theme,
}

impl State {
    /// Opens on the coming half-night in which the body stands best, at its best moment.
    pub fn open(
        clock: Clock,
        scales: TimeScales,
        sites: Sites,
        (site, spot): (usize, usize),
        choices: Choices,
    ) -> Self {
        let now = clock();
        let mut state = Self {
            scales,
            ephemeris: Ephemeris::new(),
            sites,
            site,
            spot,
            date: now.date_naive(),
            half: Half::Dusk,
            body: choices.body.unwrap_or(Body::Venus),
            eye: choices.eye.unwrap_or(Eye::Visitor),
            stature: choices.stature.unwrap_or_default(),
            moment: scales.moment_from_ut1(Ut1::from_days_since_j2000(0.0)),
            wanted: now.naive_utc(),
            planned: Err(NightError::OutOfRange(DateOutOfRange {
                date: now.date_naive().to_string(),
            })),
            plan_count: 0,
            motion: Motion::Still,
            speed: Speed::default(),
            history: History::default(),
            area: Area::default(),
            haze: None,
            site_in_haze: None,
            optics_view: OpticsView::default(),
            theme: Theme::default(),
            clock,
        };
        state.optics_view = state.view_of_kit();
        match choices.date {
            Some(date) => {
                state.show_night(date, Goal::Best(Half::Dusk));
                let half = choices.half.unwrap_or_else(|| state.better_half());
                state.go(Goal::Best(half));
            }
            None => state.show_coming(),
        }
        state
    }

    /// The way round in which the first telescope of the site's kit shows the sky; erect where
    /// there is none.
    fn view_of_kit(&self) -> OpticsView {
        let is_telescope =
            |instrument: &&Instrument| matches!(instrument, Instrument::Telescope { .. });
        let first = self.site().kit.iter().find(is_telescope);
        match first.map(Instrument::orientation) {
            Some(Orientation::Inverted) => OpticsView::Inverted,
            Some(Orientation::Mirrored) => OpticsView::Mirrored,
            Some(Orientation::Erect) | None => OpticsView::Erect,
        }
    }

    /// The site.
    pub fn site(&self) -> &Site {
        self.sites.site(self.site)
    }
    /// The spot on it.
    pub fn spot(&self) -> &Spot {
        let spots = &self.site().spots;
        // A site has at least one spot, and a choice never goes past the last.
        &spots[self.spot.min(spots.len() - 1)]
    }
    /// Its place in the site's list.
    pub fn spot_index(&self) -> usize {
        self.spot
    }
    /// The known sites.
    pub fn sites(&self) -> &Sites {
        &self.sites
    }
    /// The chosen site's place among them.
    pub fn site_index(&self) -> usize {
        self.site
    }
    /// The folder from which relative paths in the chosen site's file count: of a demo site the one
    /// that its copy will go to.
    pub fn site_folder(&self) -> Option<&std::path::Path> {
        let known = self.sites.list().get(self.site)?;
        match &known.file {
            Some(file) => file.parent(),
            None => self.sites.folder(),
        }
    }
    /// The half of the night.
    pub fn half(&self) -> Half {
        self.half
    }
    /// The evening's date.
    pub fn date(&self) -> NaiveDate {
        self.date
    }
    /// The chosen body.
    pub fn body(&self) -> Body {
        self.body
    }
    /// The site in the air that the night is planned for: the chosen haze, or the file's own.
    pub fn site_in_air(&self) -> &Site {
        self.site_in_haze.as_ref().unwrap_or_else(|| self.site())
    }
    /// The chosen haze; `None`: as the site file says.
    pub fn haze(&self) -> Option<Haze> {
        self.haze
    }
    /// Whose eye.
    pub fn eye(&self) -> Eye {
        self.eye
    }
    /// Whose height.
    pub fn stature(&self) -> Stature {
        self.stature
    }
    /// The instant shown.
    pub fn moment(&self) -> Moment {
        self.moment
    }
    /// Its civil date and time on the site's clock.
    pub fn local_time(&self) -> NaiveDateTime {
        self.wanted
    }
    /// The night, or why it cannot be planned.
    pub fn planned(&self) -> Result<&Planned, &NightError> {
        self.planned.as_ref()
    }
    /// Whether the moment moves.
    pub fn motion(&self) -> Motion {
        self.motion
    }
    /// The speed that it runs or would run at.
    pub fn speed(&self) -> Speed {
        self.speed
    }
    /// How civil time leads to TT.
    pub fn scales(&self) -> TimeScales {
        self.scales
    }
    /// The theories.
    pub fn ephemeris(&self) -> &Ephemeris {
        &self.ephemeris
    }

    /// Does what concerns the night, the choices and the theme; returns whatever is a matter of
    /// dialogs and files.
    pub fn run(&mut self, command: Command) -> Option<Command> {
        match command {
            Command::SetMoment(moment) => {
                self.motion = Motion::Still;
                self.set_moment(moment);
            }
            Command::StepMinutes(minutes) => self.step_minutes(minutes),
            Command::StepDays(days) => self.shift_days(i64::from(days)),
            Command::ChooseDate(date) => {
                self.shift_days((date - self.wanted.date()).num_days());
            }
            Command::ChooseHalf(half) => {
                self.motion = Motion::Still;
                self.go(Goal::Best(half));
            }
            Command::GoToBest => {
                self.motion = Motion::Still;
                self.go(Goal::Best(self.half));
            }
            Command::ThisMinute => {
                self.motion = Motion::Following;
                self.follow_clock();
            }
            Command::LetItRun(speed) => {
                self.speed = speed;
                self.motion = Motion::Running(speed);
            }
            Command::Stop => self.motion = Motion::Still,
            Command::RunOrStop => {
                self.motion = match self.motion {
                    Motion::Running(_) => Motion::Still,
                    Motion::Still | Motion::Following => Motion::Running(self.speed),
                };
            }
            Command::ChooseBody(body) => self.body = body,
            Command::ChooseEye(eye) => self.eye = eye,
            Command::ChooseSite(index) => self.choose_site(index),
            Command::ChooseSpot(index) => {
                self.spot = index.min(self.site().spots.len().saturating_sub(1));
                self.show_behind();
            }
            Command::ChooseStature(stature) => {
                self.stature = stature;
                self.show_behind();
            }
            Command::ChooseHaze(haze) => {
                self.choose_haze(haze);
                self.show_night(self.date, Goal::Local(self.half, self.wanted));
            }
            Command::ChooseOpticsView(view) => self.optics_view = view,
            Command::SetTheme(theme) => self.theme = theme,
            Command::ShowArea(area) => {
                // What was being dragged is out of sight: it stays where it is, and is saved.
                self.end_drag();
                self.area = area;
            }
            Command::DragSite(site) => self.drag_site(*site),
            Command::EndDrag => self.end_drag(),
            Command::EditSite(site) => self.edit_site(*site),
            Command::Undo => self.undo(),
            Command::Redo => self.redo(),
            other => return Some(other),
        }
        None
    }

    /// Lets so many seconds of the clock pass.
    pub fn pass(&mut self, seconds: f64) {
        match self.motion {
            Motion::Still => {}
            Motion::Following => self.follow_clock(),
            Motion::Running(speed) => {
                let Ok(planned) = &self.planned else { return };
                let (_, end) = planned.night.half(self.half);
                let on_s = seconds * 60.0 * f64::from(speed.minutes_per_second());
                let next = self.moment.plus_seconds(on_s);
                if next >= end {
                    self.motion = Motion::Still;
                }
                self.set_moment(next);
            }
        }
    }

    /// Gives the chosen site a file of its own: a demo site's changes are kept in a copy, and the
    /// demo site itself is put back.
    pub fn give_file(&mut self, file: std::path::PathBuf) {
        self.site = self.sites.copy_to(self.site, file);
    }

    /// Takes a site in, or anew, and chooses it.
    pub fn add_site(&mut self, site: Site, file: std::path::PathBuf) {
        let index = self.sites.add(site, file);
        self.choose_site(index);
    }

    /// The half of the night in which the chosen body stands better; dusk where it is not seen.
    fn better_half(&self) -> Half {
        let merit = |half| self.best_window(half).map(|window| window.best.merit);
        if merit(Half::Dawn) > merit(Half::Dusk) {
            Half::Dawn
        } else {
            Half::Dusk
        }
    }

    /// The chosen body's window of the greatest merit in a half.
    pub fn best_window(&self, half: Half) -> Option<Window> {
        let night = &self.planned.as_ref().ok()?.night;
        let windows = night.body(self.body)?.windows_in(self.eye, half);
        windows
            .iter()
            .max_by(|a, b| a.best.merit.total_cmp(&b.best.merit))
            .copied()
    }
}
