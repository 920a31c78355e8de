//! What is chosen and what is shown. Knows nothing of windows: commands change it, the frame
//! reads it, tests drive it either way.

use super::command::{Command, OpticsView, Speed};
use super::palette::Theme;
use super::planned::{Planned, Standpoint};
use super::sites::Sites;
use crate::light::Eye;
use crate::measure::{DateOutOfRange, Moment, TimeScales, civil};
use crate::place::{Site, Spot};
use crate::plan::{self, Half, NightError, Window};
use crate::sky::{Body, Ephemeris};
use chrono::{DateTime, Days, NaiveDate, NaiveDateTime, TimeDelta, Utc};
use std::sync::Arc;

/// Tells the time; given by the caller, so that a rehearsal or a test can set it.
pub type Clock = Arc<dyn Fn() -> DateTime<Utc> + Send + Sync>;

/// Nights searched, on opening, for the first one with a window of the chosen body.
const NIGHTS_AHEAD: u32 = 40;
/// Dates in a row that a zone can skip.
const SKIPPED_DATES: u64 = 2;

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
    /// An evening's date, else the coming night in which the body stands best.
    pub date: Option<NaiveDate>,
    /// A half of that night.
    pub half: Option<Half>,
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
    moment: Moment,
    /// The civil time wanted, on the site's clock: that of the moment wherever the night could
    /// be planned, and what was asked for where it could not.
    wanted: NaiveDateTime,
    planned: Result<Planned, NightError>,
    plan_count: u64,
    motion: Motion,
    speed: Speed,
    /// How the chosen optics show the disc.
    pub optics_view: OpticsView,
    /// How the window is coloured.
    pub theme: Theme,
}

/// Where in a night to go.
enum Goal {
    Best(Half),
    Local(Half, NaiveDateTime),
    Moment(Moment),
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
            moment: scales.moment_from_ut1(crate::measure::Ut1::from_days_since_j2000(0.0)),
            wanted: now.naive_utc(),
            planned: Err(NightError::OutOfRange(DateOutOfRange {
                date: now.date_naive().to_string(),
            })),
            plan_count: 0,
            motion: Motion::Still,
            speed: Speed::default(),
            optics_view: OpticsView::default(),
            theme: Theme::default(),
            clock,
        };
        match choices.date {
            Some(date) => {
                let half = choices.half.unwrap_or(Half::Dusk);
                state.show_night(date, Goal::Best(half));
            }
            None => state.show_coming(),
        }
        state
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
    /// Whose eye.
    pub fn eye(&self) -> Eye {
        Eye::Visitor
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
            Command::ChooseSite(index) => self.choose_site(index),
            Command::ChooseSpot(index) => {
                self.spot = index;
                self.show_night(self.date, Goal::Local(self.half, self.wanted));
            }
            Command::ChooseOpticsView(view) => self.optics_view = view,
            Command::SetTheme(theme) => self.theme = theme,
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

    /// Takes a site in, or anew, and chooses it.
    pub fn add_site(&mut self, site: Site, file: std::path::PathBuf) {
        let index = self.sites.add(site, file);
        self.choose_site(index);
    }

    fn choose_site(&mut self, index: usize) {
        self.motion = Motion::Still;
        self.site = index.min(self.sites.len().saturating_sub(1));
        self.spot = 0;
        self.show_night(self.date, Goal::Best(self.half));
    }

    fn step_minutes(&mut self, minutes: i32) {
        self.motion = Motion::Still;
        if self.planned.is_err() {
            return;
        }
        // Whole minutes of the clock, wherever the pointer had left the moment.
        let target = self.wanted_minute() + TimeDelta::minutes(i64::from(minutes));
        let late_s = (target - self.wanted).as_seconds_f64();
        let target = self.moment.plus_seconds(late_s);
        self.go(Goal::Moment(target));
    }

    fn wanted_minute(&self) -> NaiveDateTime {
        use chrono::DurationRound;
        self.wanted
            .duration_round(TimeDelta::minutes(1))
            .unwrap_or(self.wanted)
    }

    /// The same half and civil time on another day; on past dates that the zone skipped.
    fn shift_days(&mut self, days: i64) {
        self.motion = Motion::Still;
        let onward = days.signum();
        for extra in 0..=SKIPPED_DATES as i64 {
            let by = TimeDelta::days(days + onward * extra);
            let (Some(date), Some(wanted)) = (
                self.date.checked_add_signed(by),
                self.wanted.checked_add_signed(by),
            ) else {
                return;
            };
            if extra == SKIPPED_DATES as i64 || civil::date_exists(date, self.site().zone()) {
                self.show_night(date, Goal::Local(self.half, wanted));
                return;
            }
        }
    }

    fn follow_clock(&mut self) {
        match self.scales.moment_from_civil((self.clock)()) {
            Ok(now) => self.go(Goal::Moment(now)),
            Err(error) => self.planned = Err(NightError::OutOfRange(error)),
        }
    }

    fn show_coming(&mut self) {
        let now = (self.clock)();
        let zone = self.site().zone();
        let date = civil::local_date(now, zone);
        let Ok(now) = self.scales.moment_from_civil(now) else {
            self.show_night(date, Goal::Best(Half::Dusk));
            return;
        };
        let standpoint = Standpoint::new(self.site(), self.spot());
        let bodies = [self.body];
        let request = plan::NightRequest {
            bodies: &bodies,
            ..standpoint.request(date, self.scales, self.eye())
        };
        match plan::coming(&self.ephemeris, &request, self.body, now, NIGHTS_AHEAD) {
            Ok(Some(coming)) => self.show_night(coming.night.date, Goal::Best(coming.half)),
            Ok(None) => self.show_night(date, Goal::Best(Half::Dusk)),
            Err(error) => {
                self.date = date;
                self.planned = Err(error);
            }
        }
    }

    /// Plans a night and goes to the goal within it.
    fn show_night(&mut self, date: NaiveDate, goal: Goal) {
        if let Goal::Local(_, wanted) = goal {
            self.wanted = wanted;
        }
        self.date = date;
        self.plan_count += 1;
        let standpoint = Standpoint::new(self.site(), self.spot());
        let what = (date, self.scales, self.eye());
        self.planned = standpoint.plan(&self.ephemeris, what, self.plan_count);
        self.go(goal);
    }

    /// Goes to a goal; to another night where the goal is an instant outside the present one.
    fn go(&mut self, goal: Goal) {
        let Ok(planned) = &self.planned else {
            if let Goal::Best(half) | Goal::Local(half, _) = goal {
                self.half = half;
            }
            return;
        };
        let night = &planned.night;
        match goal {
            Goal::Best(half) => {
                self.half = half;
                let best = self.best_moment(half);
                self.set_moment(best);
                let late_s = (self.wanted_minute() - self.wanted).as_seconds_f64();
                self.set_moment(self.moment.plus_seconds(late_s));
            }
            Goal::Local(half, wanted) => {
                self.half = half;
                let civil = civil::LocalTime::find(wanted, planned.zone).first();
                if let Ok(moment) = self.scales.moment_from_civil(civil) {
                    self.set_moment(moment);
                }
            }
            Goal::Moment(moment) if moment >= night.start && moment <= night.end => {
                let (start, end) = night.half(self.half);
                if moment < start || moment > end {
                    self.half = match self.half {
                        Half::Dusk => Half::Dawn,
                        Half::Dawn => Half::Dusk,
                    };
                }
                self.set_moment(moment);
            }
            Goal::Moment(moment) => self.go_to_night_of(moment),
        }
    }

    /// Goes to the night that holds an instant: nights follow one another without a gap.
    fn go_to_night_of(&mut self, moment: Moment) {
        let (instant, _) = self.scales.civil(moment);
        let date = civil::local_date(instant, self.site().zone());
        let near = [
            Some(date),
            date.pred_opt(),
            date.checked_add_days(Days::new(1)),
        ];
        for date in near.into_iter().flatten() {
            self.plan_count += 1;
            let standpoint = Standpoint::new(self.site(), self.spot());
            let what = (date, self.scales, self.eye());
            match standpoint.plan(&self.ephemeris, what, self.plan_count) {
                Ok(planned) => {
                    if moment >= planned.night.start && moment <= planned.night.end {
                        self.date = date;
                        self.half = if moment < planned.night.middle {
                            Half::Dusk
                        } else {
                            Half::Dawn
                        };
                        self.planned = Ok(planned);
                        self.set_moment(moment);
                        return;
                    }
                }
                Err(NightError::NoSuchDate { .. }) => {}
                Err(error) => {
                    self.date = date;
                    self.planned = Err(error);
                    return;
                }
            }
        }
    }

    /// The chosen body's window of the greatest merit in a half.
    pub fn best_window(&self, half: Half) -> Option<Window> {
        let night = &self.planned.as_ref().ok()?.night;
        let windows = night.body(self.body)?.windows_in(half);
        windows
            .iter()
            .max_by(|a, b| a.best.merit.total_cmp(&b.best.merit))
            .copied()
    }

    /// The best moment of a half; without a window the end of civil twilight, or else the
    /// half's end nearest to the dark.
    fn best_moment(&self, half: Half) -> Moment {
        if let Some(window) = self.best_window(half) {
            return window.best.moment;
        }
        let Ok(planned) = &self.planned else {
            return self.moment;
        };
        let sun = &planned.night.sun;
        let twilight = match half {
            Half::Dusk => sun.civil_dusk.or(sun.set),
            Half::Dawn => sun.civil_dawn.or(sun.rise),
        };
        twilight.unwrap_or(planned.night.middle)
    }

    /// Sets the moment, held within the half-night.
    fn set_moment(&mut self, moment: Moment) {
        let Ok(planned) = &self.planned else { return };
        let (start, end) = planned.night.half(self.half);
        self.moment = if moment < start {
            start
        } else if moment > end {
            end
        } else {
            moment
        };
        let (instant, _) = self.scales.civil(self.moment);
        self.wanted = civil::local(instant, planned.zone).naive_local();
    }
}
