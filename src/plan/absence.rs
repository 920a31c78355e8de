//! Why a body has no window in a half-night.

use super::{BodyNight, Half, Night};
use crate::light::Eye;
use crate::measure::Moment;
use crate::sky::Body;

/// Why a body has no window in a half-night: the first of these that holds.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Absence {
    /// It is not a body for the unaided eye.
    NotForEyes,
    /// The Sun does not set.
    SunStaysUp,
    /// It is below the horizon all the time.
    Down,
    /// It is above the horizon only while the Sun is.
    UpWithTheSun,
    /// It is up, but never clear of the skyline.
    Blocked,
    /// It is clear of the skyline only while the sky is too bright.
    TooBright,
}

impl BodyNight {
    /// Why there is no window in that half.
    pub fn absence(&self, night: &Night, eye: Eye, half: Half) -> Absence {
        let (from, to) = night.half(half);
        let sun_stays_up = night.sun.set.is_none()
            && night.sun.rise.is_none()
            && night.sun.lowest.degrees() > -50.0 / 60.0;
        let up = self
            .rise
            .iter()
            .map(|at| (*at, true))
            .chain(self.set.iter().map(|at| (*at, false)));
        let (dark_from, dark_to) = match half {
            Half::Dusk => (night.sun.set.unwrap_or(from), to),
            Half::Dawn => (from, night.sun.rise.unwrap_or(to)),
        };
        let clear = self
            .skyline_events
            .iter()
            .map(|event| (event.moment, event.clears));
        let is_faint = matches!(self.body, Body::Uranus | Body::Neptune);
        if is_faint && eye != Eye::Optics {
            Absence::NotForEyes
        } else if sun_stays_up {
            Absence::SunStaysUp
        } else if !holds_within(self.is_up_at_start, up.clone(), from, to) {
            Absence::Down
        } else if !holds_within(self.is_up_at_start, up, dark_from, dark_to) {
            Absence::UpWithTheSun
        } else if !holds_within(self.is_clear_at_start, clear, from, to) {
            Absence::Blocked
        } else {
            Absence::TooBright
        }
    }
}

/// Whether something holds at any time between two instants, from its state at the night's start
/// and its changes (when, and whether it holds from then on).
fn holds_within(
    at_start: bool,
    changes: impl Iterator<Item = (Moment, bool)>,
    from: Moment,
    to: Moment,
) -> bool {
    let mut changes: Vec<_> = changes.collect();
    changes.sort_by(|a, b| a.0.seconds_since(b.0).total_cmp(&0.0));
    let before = changes.iter().rev().find(|change| change.0 <= from);
    let holds_at_from = before.map_or(at_start, |change| change.1);
    holds_at_from
        || changes
            .iter()
            .any(|change| change.1 && change.0 > from && change.0 < to)
}
