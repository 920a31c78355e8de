//! Every action of the user, recorded while the window is drawn and run afterwards.

use super::area::Area;
use super::palette::Theme;
use crate::light::Eye;
use crate::measure::Moment;
use crate::place::{Haze, Site, Stature};
use crate::plan::Half;
use crate::sky::Body;
use chrono::NaiveDate;
use eframe::egui::{Key, KeyboardShortcut, Modifiers};
use std::path::PathBuf;

/// One action.
#[derive(Clone, Debug, PartialEq)]
pub enum Command {
    /// Shows an instant of the present half-night; one outside it goes to the nearer end.
    SetMoment(Moment),
    /// Goes on (or back) by minutes, across into the neighbouring half-night where it must.
    StepMinutes(i32),
    /// Goes on (or back) by days, keeping the half.
    StepDays(i32),
    /// Shows another civil date (the moment's own, so that a dawn's date is the morning's).
    ChooseDate(NaiveDate),
    /// Shows the other half of the night.
    ChooseHalf(Half),
    /// Goes to the chosen body's best moment of this half-night.
    GoToBest,
    /// Goes to the clock's time and follows it.
    ThisMinute,
    /// Lets the time run.
    LetItRun(Speed),
    /// Stops it.
    Stop,
    /// Stops it if it runs, else lets it run at the speed last used.
    RunOrStop,
    /// Chooses the body.
    ChooseBody(Body),
    /// Chooses whose eye looks.
    ChooseEye(Eye),
    /// Chooses a site by its place in the list.
    ChooseSite(usize),
    /// Chooses a spot of the site by its place in the site's list.
    ChooseSpot(usize),
    /// Chooses whose height: the eye's height belongs to people.
    ChooseStature(Stature),
    /// Chooses how hazy the air is; `None`: as the site file says.
    ChooseHaze(Option<Haze>),
    /// Chooses how the optics show the disc.
    ChooseOpticsView(OpticsView),
    /// Shows a work area.
    ShowArea(Area),
    /// Puts a changed site in place of the chosen one, as one step that can be undone.
    EditSite(Box<Site>),
    /// The same while the change goes on, as while something is dragged.
    DragSite(Box<Site>),
    /// Ends such a change.
    EndDrag,
    /// Undoes the last change of the site.
    Undo,
    /// Does it again.
    Redo,
    /// Colours the window.
    SetTheme(Theme),
    /// Opens the short path to a new site.
    NewSite,
    /// Opens the path to a site file.
    FindSiteFile,
    /// Reads a site file and chooses it.
    OpenSiteFile(PathBuf),
    /// Opens the path to a picture for under the plan.
    FindBackdrop,
    /// Puts a picture under the plan.
    OpenBackdrop(PathBuf),
    /// Saves the new site being described, and chooses it.
    SaveNewSite,
    /// Opens the ways to measure the skyline.
    Measure,
    /// Opens bringing files in and handing them out.
    Exchange,
    /// Stops looking along the terrain.
    StopTerrain,
    /// Looks along it anew.
    LookAlongTerrain,
    /// Shows keys and cautions.
    ShowHelp,
    /// Closes whatever dialog is open.
    CloseDialog,
    /// Takes the notice at the top away.
    DismissNotice,
}

/// How fast time runs: minutes of the night in a second of the clock.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Speed {
    /// One minute.
    Slow,
    /// Five.
    #[default]
    Middle,
    /// Twenty.
    Fast,
}

impl Speed {
    /// All of them, from slow to fast.
    pub const ALL: [Self; 3] = [Self::Slow, Self::Middle, Self::Fast];

    /// Minutes of the night in a second of the clock.
    pub const fn minutes_per_second(self) -> u32 {
        match self {
            Self::Slow => 1,
            Self::Middle => 5,
            Self::Fast => 20,
        }
    }
}

/// Which way round optics show the sky.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, serde::Serialize, serde::Deserialize)]
#[serde(rename_all = "lowercase")]
pub enum OpticsView {
    /// As the eye: binoculars, terrestrial telescopes.
    #[default]
    Erect,
    /// Turned by half a turn: reflectors, refractors without a diagonal.
    Inverted,
    /// Erect with left and right exchanged: a diagonal with one mirror.
    Mirrored,
}

impl OpticsView {
    /// All of them, in the order in which they are offered.
    pub const ALL: [Self; 3] = [Self::Erect, Self::Inverted, Self::Mirrored];
}

/// What has been asked for in this frame, in order.
pub type Commands = Vec<Command>;

/// The keys that work while no text is being written. Held as one table, so that the help
/// cannot say anything else than what happens.
pub fn keys() -> [(KeyboardShortcut, Command); 17] {
    let plain = |key| KeyboardShortcut::new(Modifiers::NONE, key);
    let control = |key| KeyboardShortcut::new(Modifiers::COMMAND, key);
    let shift = |key| KeyboardShortcut::new(Modifiers::SHIFT, key);
    [
        (shift(Key::ArrowLeft), Command::StepMinutes(-10)),
        (shift(Key::ArrowRight), Command::StepMinutes(10)),
        (plain(Key::ArrowLeft), Command::StepMinutes(-1)),
        (plain(Key::ArrowRight), Command::StepMinutes(1)),
        (plain(Key::PageUp), Command::StepDays(-1)),
        (plain(Key::PageDown), Command::StepDays(1)),
        (plain(Key::Home), Command::GoToBest),
        (plain(Key::Space), Command::RunOrStop),
        (plain(Key::T), Command::ThisMinute),
        (plain(Key::N), Command::NewSite),
        (plain(Key::O), Command::FindSiteFile),
        (plain(Key::L), Command::ShowArea(Area::Lookout)),
        (plain(Key::G), Command::ShowArea(Area::Grounds)),
        (control(Key::Z), Command::Undo),
        (control(Key::Y), Command::Redo),
        (plain(Key::M), Command::Measure),
        (plain(Key::F1), Command::ShowHelp),
    ]
}

impl Command {
    /// The wording of the control that does it; its hint is the same with `-hint`. `None` for
    /// what has no control of its own to name.
    pub const fn wording(&self) -> Option<&'static str> {
        Some(match self {
            Self::StepMinutes(minutes) => match *minutes {
                ..=-10 => "back-ten-minutes",
                -9..=-1 => "back-one-minute",
                0..=9 => "on-one-minute",
                10.. => "on-ten-minutes",
            },
            Self::StepDays(..0) => "previous-day",
            Self::StepDays(_) => "next-day",
            Self::ChooseHalf(Half::Dusk) => "half-dusk",
            Self::ChooseHalf(Half::Dawn) => "half-dawn",
            Self::GoToBest => "go-to-best",
            Self::ThisMinute => "this-minute",
            Self::LetItRun(_) | Self::RunOrStop => "let-it-run",
            Self::Stop => "stop",
            Self::ShowArea(Area::Lookout) => "lookout",
            Self::ShowArea(Area::Grounds) => "grounds",
            Self::Undo => "undo",
            Self::Redo => "redo",
            Self::SetTheme(Theme::Dark) => "theme-dark",
            Self::SetTheme(Theme::Light) => "theme-light",
            Self::SetTheme(Theme::Red) => "theme-red",
            Self::ChooseOpticsView(OpticsView::Erect) => "optics-erect",
            Self::ChooseOpticsView(OpticsView::Inverted) => "optics-inverted",
            Self::ChooseOpticsView(OpticsView::Mirrored) => "optics-mirrored",
            Self::ChooseEye(Eye::PasserBy) => "eye-passer-by",
            Self::ChooseEye(Eye::Visitor) => "eye-visitor",
            Self::ChooseEye(Eye::Keen) => "eye-keen",
            Self::ChooseEye(Eye::Optics) => "eye-optics",
            Self::ChooseStature(Stature::Adult) => "stature-adult",
            Self::ChooseStature(Stature::Child) => "stature-child",
            Self::ChooseStature(Stature::Wheelchair) => "stature-wheelchair",
            Self::ChooseHaze(None) => "air-as-stated",
            Self::ChooseHaze(Some(Haze::VeryClear)) => "air-very-clear",
            Self::ChooseHaze(Some(Haze::Clear)) => "air-clear",
            Self::ChooseHaze(Some(Haze::Hazy)) => "air-hazy",
            Self::ChooseHaze(Some(Haze::Murky)) => "air-murky",
            Self::NewSite => "new-site",
            Self::FindSiteFile => "find-site-file",
            Self::OpenSiteFile(_) => "open-site-file",
            Self::FindBackdrop => "find-backdrop",
            Self::OpenBackdrop(_) => "open-backdrop",
            Self::SaveNewSite => "save-new-site",
            Self::Measure => "measure",
            Self::Exchange => "exchange",
            Self::StopTerrain => "stop-terrain",
            Self::LookAlongTerrain => "look-along-terrain",
            Self::ShowHelp => "help",
            Self::CloseDialog => "close",
            Self::DismissNotice => "dismiss-notice",
            Self::SetMoment(_)
            | Self::ChooseDate(_)
            | Self::ChooseBody(_)
            | Self::ChooseSite(_)
            | Self::ChooseSpot(_)
            | Self::EditSite(_)
            | Self::DragSite(_)
            | Self::EndDrag => return None,
        })
    }
}
