//! All events of a span, stretch by stretch, in threads.

use super::alignments::alignments;
use super::appulses::appulses;
use super::course::Course;
use super::search::{Lost, Stretch};
use super::transits::transits;
use super::{Circle, Event, Lookout, PhenomenaError};
use super::{crescents, distances, elongations, moon, rings, stations};
use crate::measure::{Moment, Progress, TimeScales};
use crate::sky::{Body, Ephemeris, Epoch};
use std::collections::BTreeMap;
use std::num::NonZeroUsize;
use std::sync::atomic::{AtomicUsize, Ordering};
use std::sync::mpsc;

/// What one thread works on before it hands on what it found, days: short enough that the first
/// events come at once, long enough that the looks around the ends cost little.
const STRETCH_DAYS: f64 = 730.5;

/// Which events.
#[derive(Clone, Copy, Debug)]
pub struct PhenomenaRequest<'a> {
    /// The span's first instant.
    pub from: Moment,
    /// The first instant past it.
    pub to: Moment,
    /// How TT leads to UT1.
    pub scales: TimeScales,
    /// Whose, alone or with another; the Moon has events with planets from a lookout, and the Sun
    /// none of its own.
    pub bodies: &'a [Body],
    /// The place whose circumstances are wanted too.
    pub lookout: Option<Lookout<'a>>,
    /// How many threads work at it.
    pub threads: NonZeroUsize,
}

/// Hands each event of the span on, in order of time, as soon as it and all before it are known.
/// Stops early, without an error, when the progress is cancelled.
///
/// # Errors
/// The span is empty or leaves the ephemeris, or a search fails; the events handed on before are
/// right.
pub fn phenomena(
    ephemeris: &Ephemeris,
    request: &PhenomenaRequest<'_>,
    progress: &Progress,
    mut hand_on: impl FnMut(Event),
) -> Result<(), PhenomenaError> {
    let stretches = stretches(request)?;
    progress.set_total(stretches.len() as u64);
    let next = AtomicUsize::new(0);
    let (sender, receiver) = mpsc::channel();
    let work = |sender: mpsc::Sender<_>| {
        while !progress.is_cancelled() {
            let number = next.fetch_add(1, Ordering::Relaxed);
            let Some(stretch) = stretches.get(number) else {
                return;
            };
            let found = events(ephemeris, request, *stretch);
            if sender.send((number, found)).is_err() {
                return; // an earlier stretch failed
            }
        }
    };
    std::thread::scope(|scope| {
        for _ in 0..request.threads.get() {
            let sender = sender.clone();
            scope.spawn(|| work(sender));
        }
        drop(sender);
        let mut waiting = BTreeMap::new();
        let mut due = 0;
        for (number, found) in receiver {
            waiting.insert(number, found);
            while let Some(found) = waiting.remove(&due) {
                due += 1;
                let events: Vec<Event> = found?;
                events.into_iter().for_each(&mut hand_on);
                progress.advance(1);
            }
        }
        Ok(())
    })
}

/// The span cut up.
fn stretches(request: &PhenomenaRequest<'_>) -> Result<Vec<Stretch>, PhenomenaError> {
    let from = request.from.tt().days_since_j2000();
    let to = request.to.tt().days_since_j2000();
    if !(from.is_finite() && to.is_finite() && from < to) {
        return Err(PhenomenaError::Empty);
    }
    // Refused as a whole, not after the part that is covered; this fits nothing beyond the ends.
    for end in [request.from, request.to] {
        Ephemeris::new().cover(end.tt(), end.tt(), &[])?;
    }
    let count = ((to - from) / STRETCH_DAYS).ceil() as usize;
    let start = |k: usize| (from + k as f64 * STRETCH_DAYS).min(to);
    Ok((0..count)
        .map(|k| Stretch {
            from_days: start(k),
            to_days: start(k + 1),
        })
        .collect())
}

/// All events of one stretch, in order of time.
fn events(
    ephemeris: &Ephemeris,
    request: &PhenomenaRequest<'_>,
    stretch: Stretch,
) -> Result<Vec<Event>, PhenomenaError> {
    let mut found = Vec::new();
    for body in request.bodies {
        if !matches!(body, Body::Sun | Body::Moon) {
            let course = Course::new(ephemeris, request.scales, *body, stretch)?;
            let lost = |lost| PhenomenaError::lost(*body, lost);
            let mut events = of_body(&course).map_err(lost)?;
            if matches!(body, Body::Mercury | Body::Venus) {
                events.extend(transits(&course, request.lookout).map_err(lost)?);
            }
            if let Some(lookout) = request.lookout {
                for event in &mut events {
                    let local = |epoch: &Epoch<'_>| lookout.circumstances_at(epoch, *body);
                    let days = event.moment.tt().days_since_j2000();
                    event.local = Some(course.at(days, local));
                }
            }
            found.extend(events);
        }
    }
    let (bodies, scales) = (request.bodies, request.scales);
    let lookout = request.lookout;
    found.extend(appulses(ephemeris, scales, stretch, bodies, lookout)?);
    if let Some(lookout) = lookout {
        let events = moon::with_planets(ephemeris, scales, stretch, bodies, lookout)?;
        found.extend(events);
    }
    found.sort_by(|a: &Event, b: &Event| a.moment.seconds_since(b.moment).total_cmp(&0.0));
    Ok(found)
}

/// One kind of search along a course.
type Search = fn(&Course) -> Result<Vec<Event>, Lost>;

/// A planet's events of every kind but transits.
fn of_body(course: &Course) -> Result<Vec<Event>, Lost> {
    const ALL: [Search; 3] = [
        |course| alignments(course, Circle::Longitude),
        |course| alignments(course, Circle::RightAscension),
        stations::stations,
    ];
    const MERCURY: [Search; 2] = [elongations::greatest_elongations, crescents::dichotomies];
    const VENUS: [Search; 5] = [
        elongations::greatest_elongations,
        crescents::dichotomies,
        crescents::greatest_illuminated_extents,
        crescents::magnitude_minima,
        distances::distances,
    ];
    const MARS: [Search; 1] = [distances::distances];
    const SATURN: [Search; 1] = [rings::rings];
    let own: &[Search] = match course.body {
        Body::Mercury => &MERCURY,
        Body::Venus => &VENUS,
        Body::Mars => &MARS,
        Body::Saturn => &SATURN,
        _ => &[],
    };
    let mut found = Vec::new();
    for search in ALL.iter().chain(own) {
        found.extend(search(course)?);
    }
    Ok(found)
}
