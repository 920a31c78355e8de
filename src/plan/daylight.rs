//! Finding a bright planet in full day: apart from the night's plan, and asked for on purpose.
//!
//! The unaided eye looks from the shade of a solid building only: leaves move and let the Sun
//! through, a strip of hedge or wall is low and left sideways in a step, and a skyline measured
//! by hand does not say what it is made of. The shade must outlast the slot. For instruments
//! there is no time here.

use super::{Lamps, NightError, Sight, target};
use crate::light::Eye;
use crate::measure::{Angle, DateOutOfRange, Moment, TimeScales, check_date, civil};
use crate::place::{Grounds, Obstacle, Site, Skyline, Spot, Stature};
use crate::sky::{Body, Ephemeris, Horizontal, Observer, Span, View};
use chrono::NaiveDate;

/// By day the Sun stands higher than this, refracted.
const DAY: Angle = Angle::from_degrees(5.0);
/// How far beyond the end of a slot the shade must last, whole minutes.
const BEYOND_MIN: usize = 15;
/// How far the Sun's disc keeps within a building's outline, on every side.
const ROOM: Angle = Angle::from_degrees(1.0);
/// The Sun's apparent radius at its largest, rounded up.
const SUN_RADIUS: Angle = Angle::from_arcmin(16.3);
/// A tube has the Sun in it from this angle off its axis on.
const IN_TUBE: Angle = Angle::from_degrees(5.0);
/// Everything is looked at once a minute: what passes in less does not end a slot, and the Sun
/// moves by a quarter of [`ROOM`].
const STEP_S: f64 = 60.0;
const MINUTES_A_DAY: usize = 1440;

/// What a day is asked for.
#[derive(Clone, Copy, Debug)]
pub struct DaylightRequest<'a> {
    /// The site.
    pub site: &'a Site,
    /// Where on it the eye stands.
    pub spot: &'a Spot,
    /// The civil date.
    pub date: NaiveDate,
    /// How civil time leads to TT.
    pub scales: TimeScales,
    /// How the sky is lit and whose eyes look.
    pub sight: &'a Sight,
    /// Which body; for the Sun there is nothing to find.
    pub body: Body,
}

/// A body by day, from one spot.
#[derive(Clone, Debug, PartialEq)]
pub struct Daylight {
    /// The body.
    pub body: Body,
    /// The date.
    pub date: NaiveDate,
    /// Whether the Sun stands higher than 5° at all.
    pub has_day: bool,
    /// When a keen eye would see it, were the Sun no danger: the Sun higher than 5°, the margin
    /// 0 or more, the body clear of the skyline. Not times to look at.
    pub plain: Vec<Stretch>,
    /// When an eye in the shade of a building sees it, by building and time.
    pub slots: Vec<Slot>,
}

/// From one whole minute of the day to a later one.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Stretch {
    /// From.
    pub start: Moment,
    /// Until.
    pub end: Moment,
}

/// A time for the unaided eye in the shade of one building.
#[derive(Clone, Debug, PartialEq)]
pub struct Slot {
    /// When.
    pub stretch: Stretch,
    /// The building's label.
    pub building: String,
    /// Until when the Sun is known to stay behind it: 15 minutes beyond the slot.
    pub shaded_until: Moment,
    /// Where the body stands in the middle of the slot.
    pub place: Whereabouts,
    /// What becomes of a tube pointed at the body as the slot begins and left untracked.
    pub drift: Drift,
}

/// Where a body stands by day.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Whereabouts {
    /// When.
    pub moment: Moment,
    /// Refracted altitude.
    pub altitude: Angle,
    /// Azimuth.
    pub azimuth: Angle,
    /// By how much a keen eye sees it, magnitudes.
    pub margin_mag: f64,
    /// From the Sun.
    pub from_sun: Apart,
    /// From the Moon; `None` where it is down or is the body itself.
    pub from_moon: Option<Apart>,
}

/// How one place in the sky stands to another, as someone facing it has them.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Apart {
    /// The angle between them.
    pub separation: Angle,
    /// How far to the right, negative to the left: along the horizontal, as fists measure it.
    pub right: Angle,
    /// How far above, negative below.
    pub above: Angle,
}

/// What becomes of a tube that is pointed at a body and left untracked.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Drift {
    /// The body is east of the Sun: the Sun moves away from the tube.
    Away,
    /// The body is west of the Sun, and the Sun comes within 5° of where the tube points.
    Into(Moment),
    /// The body is west of the Sun, which passes more than 5° off or sets before.
    Past,
}

/// What one minute holds.
struct Minute {
    moment: Moment,
    sun: Horizontal,
    is_day: bool,
    is_plain: bool,
}

/// Who looks for what.
struct Search<'a> {
    request: &'a DaylightRequest<'a>,
    span: &'a Span,
    observer: &'a Observer,
    skyline: &'a Skyline,
}

impl Daylight {
    /// Looks through a day, minute by minute.
    ///
    /// # Errors
    /// The date does not exist in the zone, or lies outside the supported years.
    pub fn find(ephemeris: &Ephemeris, request: &DaylightRequest<'_>) -> Result<Self, NightError> {
        let (date, zone) = (request.date, request.site.zone());
        check_date(date).map_err(NightError::OutOfRange)?;
        let start =
            civil::start_of_date(date, zone).ok_or(NightError::NoSuchDate { date, zone })?;
        let start = request
            .scales
            .moment_from_civil(start)
            .map_err(NightError::OutOfRange)?;
        let span = ephemeris
            .cover(
                start.tt(),
                // A tube can wait for the Sun into the next day where it does not set.
                start.tt().plus_days(2.1),
                &[request.body, Body::Moon],
            )
            .map_err(|_| {
                NightError::OutOfRange(DateOutOfRange {
                    date: date.to_string(),
                })
            })?;
        let grounds = Grounds::new(request.site, Some(date));
        let skyline = grounds.skyline(request.spot, Stature::Adult);
        let search = Search {
            request,
            span: &span,
            observer: &request.site.observer(),
            skyline: &skyline,
        };
        let minutes: Vec<Minute> = (0..=MINUTES_A_DAY + BEYOND_MIN)
            .map(|minute| search.minute(start.plus_seconds(minute as f64 * STEP_S)))
            .collect();
        let of_date = minutes.iter().take(MINUTES_A_DAY + 1);
        let plain = runs(of_date.map(|minute| minute.is_plain));
        Ok(Self {
            body: request.body,
            date,
            has_day: minutes.iter().any(|minute| minute.is_day),
            plain: plain.iter().map(|run| stretch(&minutes, *run)).collect(),
            slots: search.slots(&minutes),
        })
    }
}

impl Search<'_> {
    fn minute(&self, moment: Moment) -> Minute {
        let epoch = self.span.at(moment);
        let view = epoch.seen_by(self.observer);
        let sun = view.refracted_place(Body::Sun);
        let is_day = sun.altitude > DAY;
        let is_plain = is_day && self.request.body != Body::Sun && {
            let place = view.refracted_place(self.request.body);
            self.skyline.clearance(place.azimuth, place.altitude) > Angle::ZERO
                && self.margin_mag(&view) >= 0.0
        };
        Minute {
            moment,
            sun: Horizontal {
                altitude: sun.altitude,
                azimuth: sun.azimuth,
            },
            is_day,
            is_plain,
        }
    }

    /// A keen eye's margin; where no brightness is known it is never seen.
    fn margin_mag(&self, view: &View<'_>) -> f64 {
        let sight = self.request.sight;
        target(view, self.request.body).map_or(f64::NEG_INFINITY, |target| {
            let glow = Lamps::of(view).glow(&sight.sky);
            glow.margin(&target, &sight.gaze(Eye::Keen)).margin_mag
        })
    }

    fn slots(&self, minutes: &[Minute]) -> Vec<Slot> {
        let mut slots = Vec::new();
        for (building, outline) in buildings(self.request.site, self.request.spot) {
            let shaded: Vec<bool> = minutes
                .iter()
                .map(|minute| is_behind(&outline, minute.sun))
                .collect();
            let is_safe = shaded
                .windows(BEYOND_MIN + 1)
                .map(|ahead| ahead.iter().all(|is_shaded| *is_shaded));
            let both = is_safe
                .zip(minutes)
                .map(|(is_safe, minute)| is_safe && minute.is_plain);
            for run in runs(both) {
                slots.push(self.slot(minutes, run, &building));
            }
        }
        slots.sort_by(|a, b| {
            let from = |slot: &Slot| slot.stretch.start.tt().days_since_j2000();
            from(a).total_cmp(&from(b))
        });
        slots
    }

    fn slot(&self, minutes: &[Minute], (first, last): (usize, usize), building: &str) -> Slot {
        Slot {
            stretch: stretch(minutes, (first, last)),
            building: building.to_owned(),
            shaded_until: minutes[last + BEYOND_MIN].moment,
            place: self.whereabouts(minutes[(first + last) / 2].moment),
            drift: self.drift(minutes[first].moment),
        }
    }

    fn whereabouts(&self, moment: Moment) -> Whereabouts {
        let epoch = self.span.at(moment);
        let view = epoch.seen_by(self.observer);
        let seen = |body| {
            let place = view.refracted_place(body);
            Horizontal {
                altitude: place.altitude,
                azimuth: place.azimuth,
            }
        };
        let (place, moon) = (seen(self.request.body), seen(Body::Moon));
        let is_moon_up = self.request.body != Body::Moon && moon.altitude > Angle::ZERO;
        Whereabouts {
            moment,
            altitude: place.altitude,
            azimuth: place.azimuth,
            margin_mag: self.margin_mag(&view),
            from_sun: Apart::of(place, seen(Body::Sun)),
            from_moon: is_moon_up.then(|| Apart::of(place, moon)),
        }
    }

    /// A tube keeps its altitude and azimuth while the sky turns.
    fn drift(&self, pointed: Moment) -> Drift {
        let epoch = self.span.at(pointed);
        let view = epoch.seen_by(self.observer);
        if view.appearance(self.request.body).is_east_of_sun {
            return Drift::Away;
        }
        let axis = view.place(self.request.body);
        let sun_at = |moment: Moment| {
            let epoch = self.span.at(moment);
            epoch.seen_by(self.observer).place(Body::Sun)
        };
        (0..=MINUTES_A_DAY)
            .map(|minute| pointed.plus_seconds(minute as f64 * STEP_S))
            .map(|moment| (moment, sun_at(moment)))
            .take_while(|(_, sun)| sun.altitude > -SUN_RADIUS)
            .find(|(_, sun)| separation(axis, *sun) <= IN_TUBE)
            .map_or(Drift::Past, |(moment, _)| Drift::Into(moment))
    }
}

impl Apart {
    /// How `place` stands to `other`.
    fn of(place: Horizontal, other: Horizontal) -> Self {
        let middle = (place.altitude + other.altitude).radians() / 2.0;
        let turned = (place.azimuth - other.azimuth).signed();
        Self {
            separation: separation(place, other),
            right: Angle::from_radians(turned.radians() * middle.cos()),
            above: place.altitude - other.altitude,
        }
    }
}

/// The angle between two places above the horizon (haversines: exact for small ones).
fn separation(a: Horizontal, b: Horizontal) -> Angle {
    let half = |angle: Angle| (angle.radians() / 2.0).sin().powi(2);
    let square = half(a.altitude - b.altitude)
        + a.altitude.cos() * b.altitude.cos() * half(a.azimuth - b.azimuth);
    Angle::from_radians(2.0 * square.min(1.0).sqrt().asin())
}

/// The outline of each building by itself, by its label; never of anything else.
fn buildings(site: &Site, spot: &Spot) -> Vec<(String, Skyline)> {
    let is_building = |obstacle: &&Obstacle| matches!(obstacle, Obstacle::Building { .. });
    let bare = Spot {
        skyline: Vec::new(),
        skyline_far: Vec::new(),
        ..spot.clone()
    };
    let outline = |building: &Obstacle| {
        let alone = Site {
            skyline: Vec::new(),
            skyline_far: Vec::new(),
            spots: vec![bare.clone()],
            far: None,
            obstacles: vec![building.clone()],
            ..site.clone()
        };
        (building.label().to_owned(), alone.skyline(&bare))
    };
    let buildings = site.obstacles.iter().filter(is_building);
    buildings.map(outline).collect()
}

/// Whether the Sun's whole disc and a degree around it are behind an outline.
fn is_behind(outline: &Skyline, sun: Horizontal) -> bool {
    /// How far on either side of a break its two sides are looked at.
    const BESIDE: Angle = Angle::from_arcsec(0.1);
    let radius = SUN_RADIUS + ROOM;
    let top = sun.altitude + radius;
    // Near the zenith no building is.
    if top >= Angle::from_degrees(90.0) {
        return false;
    }
    let reach = Angle::from_radians((radius.sin() / sun.altitude.cos()).min(1.0).asin());
    // Between breaks an outline bulges upwards: it is lowest at the ends of its pieces.
    let near = outline
        .breaks()
        .iter()
        .filter(|edge| (**edge - sun.azimuth).signed().abs() <= reach)
        .flat_map(|edge| [*edge - BESIDE, *edge + BESIDE]);
    near.chain([sun.azimuth - reach, sun.azimuth, sun.azimuth + reach])
        .map(|azimuth| outline.altitude(azimuth.wrapped()))
        .all(|roof| roof > Angle::ZERO && roof > top)
}

/// First and last index of each unbroken run of more than one that holds.
fn runs(holds: impl Iterator<Item = bool>) -> Vec<(usize, usize)> {
    let mut runs: Vec<(usize, usize)> = Vec::new();
    for (index, _) in holds.enumerate().filter(|(_, holds)| *holds) {
        match runs.last_mut() {
            Some((_, last)) if *last + 1 == index => *last = index,
            _ => runs.push((index, index)),
        }
    }
    runs.retain(|(first, last)| first < last);
    runs
}

fn stretch(minutes: &[Minute], (first, last): (usize, usize)) -> Stretch {
    Stretch {
        start: minutes[first].moment,
        end: minutes[last].moment,
    }
}
