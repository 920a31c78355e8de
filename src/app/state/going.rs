//! Going from one moment to another: within the half-night, into the neighbouring one, to other
//! days and to other sites. The only place where nights are planned.

use super::super::planned::Planned;
use super::{Motion, State};
use crate::app::planned::Standpoint;
use crate::measure::{Moment, civil};
use crate::place::{Grounds, Haze};
use crate::plan::{self, Half, NightError};
use chrono::{Days, DurationRound, NaiveDate, NaiveDateTime, TimeDelta};

/// Nights searched, on opening, for the first one with a window of the chosen body.
const NIGHTS_AHEAD: u32 = 40;
/// Dates in a row that a zone can skip.
const SKIPPED_DATES: i64 = 2;

/// Where in a night to go.
pub(super) enum Goal {
    /// The best moment of a half.
    Best(Half),
    /// A civil time in a half.
    Local(Half, NaiveDateTime),
    /// An instant, in whatever night it lies.
    Moment(Moment),
}

impl State {
    pub(super) fn choose_site(&mut self, index: usize) {
        self.motion = Motion::Still;
        self.site = index.min(self.sites.len().saturating_sub(1));
        self.spot = 0;
        self.forget_history();
        self.choose_haze(None);
        self.optics_view = self.view_of_kit();
        self.show_night(self.date, Goal::Best(self.half));
    }

    pub(super) fn choose_haze(&mut self, haze: Option<Haze>) {
        self.haze = haze;
        self.site_in_haze = haze.map(|haze| self.site().with_haze(haze));
    }

    pub(super) fn step_minutes(&mut self, minutes: i32) {
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
        rounded(self.wanted, TimeDelta::minutes(1))
    }

    /// The same half and civil time on another day; on past dates that the zone skipped.
    pub(super) fn shift_days(&mut self, days: i64) {
        self.motion = Motion::Still;
        let onward = days.signum();
        for extra in 0..=SKIPPED_DATES {
            let by = TimeDelta::days(days + onward * extra);
            let (Some(date), Some(wanted)) = (
                self.date.checked_add_signed(by),
                self.wanted.checked_add_signed(by),
            ) else {
                return;
            };
            if extra == SKIPPED_DATES || civil::date_exists(date, self.site().zone()) {
                self.show_night(date, Goal::Local(self.half, wanted));
                return;
            }
        }
    }

    pub(super) fn follow_clock(&mut self) {
        match self.scales.moment_from_civil((self.clock)()) {
            Ok(now) => self.go(Goal::Moment(now)),
            Err(error) => {
                self.motion = Motion::Still;
                self.planned = Err(NightError::OutOfRange(error));
            }
        }
    }

    pub(super) fn show_coming(&mut self) {
        let now = (self.clock)();
        let zone = self.site().zone();
        let date = civil::local_date(now, zone);
        let Ok(now) = self.scales.moment_from_civil(now) else {
            self.show_night(date, Goal::Best(Half::Dusk));
            return;
        };
        match self.coming(date, now) {
            Ok(Some(coming)) => self.show_night(coming.night.date, Goal::Best(coming.half)),
            Ok(None) => self.show_night(date, Goal::Best(Half::Dusk)),
            Err(error) => {
                self.date = date;
                self.planned = Err(error);
            }
        }
    }

    fn coming(&self, date: NaiveDate, now: Moment) -> Result<Option<plan::Coming>, NightError> {
        let standpoint = self.standpoint(date)?;
        let request = plan::NightRequest {
            bodies: &[self.body],
            eyes: &[self.eye],
            ..standpoint.request(date, self.scales)
        };
        plan::coming(
            &self.ephemeris,
            &request,
            self.body,
            self.eye,
            now,
            NIGHTS_AHEAD,
        )
    }

    fn standpoint(&self, date: NaiveDate) -> Result<Standpoint, NightError> {
        Standpoint::new(self.site_in_air(), self.spot(), self.stature, date)
    }

    fn plan(&mut self, date: NaiveDate) -> Result<Planned, NightError> {
        self.plan_count += 1;
        let standpoint = self.standpoint(date)?;
        standpoint.plan(&self.ephemeris, (date, self.scales), self.plan_count)
    }

    /// Plans a night and goes to the goal within it.
    pub(super) fn show_night(&mut self, date: NaiveDate, goal: Goal) {
        if let Goal::Local(_, wanted) = goal {
            self.wanted = wanted;
        }
        self.date = date;
        self.planned = self.plan(date);
        self.go(goal);
    }

    /// Plans the shown night anew after a change of the site, and stays at the moment shown.
    pub(super) fn show_edited(&mut self) {
        self.show_night(self.date, Goal::Local(self.half, self.wanted));
    }

    /// Plans the shown night anew for another skyline under the same sky, as after a change of
    /// what stands on the grounds, of the spot or of the stature: within a frame.
    pub(super) fn show_behind(&mut self) {
        let Ok(planned) = &self.planned else {
            self.show_edited();
            return;
        };
        let grounds = Grounds::new(self.site_in_air(), Some(planned.night.date));
        let skyline = grounds.skyline(self.spot(), self.stature);
        self.plan_count += 1;
        self.planned = Ok(planned.behind(skyline, self.plan_count));
        self.go(Goal::Local(self.half, self.wanted));
    }

    /// Goes to a goal; to another night where the goal is an instant outside the present one.
    pub(super) fn go(&mut self, goal: Goal) {
        let Ok(planned) = &self.planned else {
            match goal {
                Goal::Best(half) | Goal::Local(half, _) => self.half = half,
                Goal::Moment(moment) => self.go_to_night_of(moment),
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
            match self.plan(date) {
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
    pub(super) fn set_moment(&mut self, moment: Moment) {
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
        let local = civil::local(instant, planned.zone).naive_local();
        // The moment is kept to a fraction of a microsecond: a whole minute must not read as
        // the minute before.
        self.wanted = rounded(local, TimeDelta::milliseconds(1));
    }
}

/// A civil time to the nearest whole of a unit.
fn rounded(local: NaiveDateTime, unit: TimeDelta) -> NaiveDateTime {
    local.duration_round(unit).unwrap_or(local)
}
