//! Which half-night to open on.

use super::{Half, Night, NightError, NightRequest, Window};
use crate::light::Eye;
use crate::measure::Moment;
use crate::sky::{Body, Ephemeris};

/// A half-night and the moment in it to show a body at.
#[derive(Clone, Debug)]
pub struct Coming {
    /// The night.
    pub night: Night,
    /// Which half of it.
    pub half: Half,
    /// The body's window there.
    pub window: Window,
}

/// The coming half-night in which `body` stands best: of the dusk and the dawn that are next
/// after `now`, the one with the greater merit of its best moment; where neither has a window,
/// the first later half-night that has one, up to `nights` nights on.
///
/// `request.date` is the date of `now`. `None`: no window so soon.
///
/// # Errors
/// Any night that cannot be planned.
pub fn coming(
    ephemeris: &Ephemeris,
    request: &NightRequest<'_>,
    body: Body,
    eye: Eye,
    now: Moment,
    nights: u32,
) -> Result<Option<Coming>, NightError> {
    // The night of the date before can still be under way.
    let Some(mut date) = request.date.pred_opt() else {
        return Ok(None);
    };
    let (mut dusk, mut dawn) = (None, None);
    for night_count in 0..=nights {
        match Night::plan(ephemeris, &NightRequest { date, ..*request }) {
            Ok(night) => {
                let offer = |half| offer(&night, half, body, eye, now);
                dusk = dusk.or_else(|| offer(Half::Dusk));
                dawn = dawn.or_else(|| offer(Half::Dawn));
            }
            // A date that the zone skipped has no night of its own.
            Err(NightError::NoSuchDate { .. }) => {}
            Err(error) => return Err(error),
        }
        let has_seen_both_halves = night_count >= 1;
        if has_seen_both_halves && (dusk.is_some() || dawn.is_some()) {
            break;
        }
        let Some(next) = date.succ_opt() else { break };
        date = next;
    }
    Ok([dusk, dawn]
        .into_iter()
        .flatten()
        .max_by(|a, b| a.window.best.merit.total_cmp(&b.window.best.merit)))
}

/// The half's window of the greatest merit, if its end is still to come.
fn offer(night: &Night, half: Half, body: Body, eye: Eye, now: Moment) -> Option<Coming> {
    let windows = night.body(body)?.windows_in(eye, half);
    windows
        .iter()
        .filter(|window| window.end.moment > now)
        .max_by(|a, b| a.best.merit.total_cmp(&b.best.merit))
        .map(|window| Coming {
            night: night.clone(),
            half,
            window: *window,
        })
}
