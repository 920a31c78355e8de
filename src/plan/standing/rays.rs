//! A body's way across the sky while it is bright enough, as a table that is read thousands of
//! times.

use super::StandingRequest;
use crate::measure::{Angle, Moment, search};
use crate::place::{Grounds, PreparedGrounds, Sector, Skyline, TerrainView, Viewpoint};
use crate::plan::interval::cut;
use crate::plan::night::Cause;
use crate::plan::night_sky::NightSky;
use crate::plan::passage::{Passage, Way};
use crate::plan::path::Seen;
use crate::plan::sight::Luck;

/// Seconds between the table's rows at most. Straight lines between them stray from the sky's
/// turning by at most an eighth of the square of 20 s of it (0.00145 rad): 0.05 arcsec, which a
/// body climbs in 4 ms at the least steep that matters.
const STEP_S: f64 = 20.0;

/// Every row of so many is a sample of its own; the skyline’s breaks add theirs.
const ROWS_PER_SAMPLE: usize = 15;

/// One night's rays.
#[derive(Debug)]
pub(super) struct NightRays<'a> {
    pub grounds: PreparedGrounds<'a>,
    start: Moment,
    stretches: Vec<Rays>,
    sector: Sector,
}

/// What is left of a night behind a skyline; seconds after the night's start.
#[derive(Clone, Copy, Debug, Default)]
pub(super) struct Behind {
    pub longest_s: Option<(f64, f64)>,
    pub total_s: f64,
}

impl Behind {
    pub fn longest_minutes(&self) -> f64 {
        self.longest_s
            .map_or(0.0, |(from_s, to_s)| (to_s - from_s) / 60.0)
    }

    fn add(&mut self, from_s: f64, to_s: f64) {
        self.total_s += to_s - from_s;
        if to_s - from_s > 60.0 * self.longest_minutes() {
            self.longest_s = Some((from_s, to_s));
        }
    }
}

impl<'a> NightRays<'a> {
    /// The body's ways while it is bright enough for the eye in the half of the night.
    pub fn new(sky: &NightSky, request: &StandingRequest<'a>) -> Self {
        let night = &sky.bare;
        let (from, to) = night.half(request.half);
        let body = sky.body(request.body);
        let eye = body.and_then(|body| body.eye(request.eye));
        let stretches = body.zip(eye).map_or_else(Vec::new, |(body, eye)| {
            let bright = eye.bright[Luck::Usual as usize].iter();
            bright
                .filter_map(|interval| cut(*interval, from, to, Cause::Half))
                .map(|interval| {
                    let at_s = |moment: Moment| moment.seconds_since(night.start);
                    let (from_s, to_s) = (at_s(interval.start.moment), at_s(interval.end.moment));
                    Rays::new(&body.path, from_s, to_s)
                })
                .collect()
        });
        let grounds = Grounds::new(request.site, Some(night.date));
        Self {
            grounds: grounds.prepared(),
            start: night.start,
            sector: sector_of(&stretches),
            stretches,
        }
    }

    /// The skyline from a viewpoint as far as the body passes it, with terrain as it is seen from
    /// nearby.
    pub fn skyline(&self, viewpoint: Viewpoint, terrain: &TerrainView) -> Skyline {
        self.grounds.skyline_within(viewpoint, self.sector, terrain)
    }

    pub fn moment(&self, at_s: f64) -> Moment {
        self.start.plus_seconds(at_s)
    }

    /// What is left of them behind a skyline.
    pub fn behind(&self, skyline: &Skyline) -> Behind {
        let mut behind = Behind::default();
        for rays in &self.stretches {
            let passage = Passage::new(rays, skyline);
            let mut open_s = passage.starts_clear().then_some(rays.from_s);
            for crossing in passage.crossings() {
                open_s = match open_s {
                    Some(from_s) => {
                        behind.add(from_s, crossing.at);
                        None
                    }
                    None => Some(crossing.at),
                };
            }
            if let Some(from_s) = open_s {
                behind.add(from_s, rays.to_s);
            }
        }
        behind
    }
}

/// The azimuths that the rays take, with a degree to spare; the whole circle where they go more
/// than half round.
fn sector_of(stretches: &[Rays]) -> Sector {
    const SPARE_DEG: f64 = 1.0;
    let whole = Sector {
        from_deg: 0.0,
        to_deg: 0.0,
    };
    let azimuths = || stretches.iter().flat_map(|rays| rays.rows.iter());
    let Some((first, _)) = azimuths().next() else {
        return whole;
    };
    let (mut least, mut most) = (0.0_f64, 0.0_f64);
    for (azimuth, _) in azimuths() {
        let turned_deg = Angle::from_radians(azimuth - first).signed().degrees();
        least = least.min(turned_deg);
        most = most.max(turned_deg);
    }
    if most - least > 180.0 - 3.0 * SPARE_DEG {
        return whole;
    }
    let first_deg = first.to_degrees();
    Sector {
        from_deg: (first_deg + least - SPARE_DEG).rem_euclid(360.0),
        to_deg: (first_deg + most + SPARE_DEG).rem_euclid(360.0),
    }
}

/// A body's way through one stretch of time.
#[derive(Debug)]
struct Rays {
    from_s: f64,
    to_s: f64,
    step_s: f64,
    /// Azimuth, without jumps at north, and altitude, radians.
    rows: Vec<(f64, f64)>,
}

impl Rays {
    fn new(path: &impl Way, from_s: f64, to_s: f64) -> Self {
        let times_s = search::grid(from_s, to_s, STEP_S);
        let mut rows: Vec<(f64, f64)> = Vec::with_capacity(times_s.len());
        for at_s in &times_s {
            let seen = path.at(*at_s);
            let azimuth = match rows.last() {
                Some((last, _)) => {
                    let last = Angle::from_radians(*last);
                    last + (seen.azimuth - last).signed()
                }
                None => seen.azimuth,
            };
            rows.push((azimuth.radians(), seen.altitude.radians()));
        }
        Self {
            from_s,
            to_s,
            step_s: (to_s - from_s) / (rows.len() - 1) as f64,
            rows,
        }
    }
}

impl Way for Rays {
    fn times_s(&self) -> impl Iterator<Item = f64> {
        let inner = (0..self.rows.len() - 1).step_by(ROWS_PER_SAMPLE);
        inner
            .map(|k| self.from_s + k as f64 * self.step_s)
            .chain([self.to_s])
    }

    fn at(&self, at_s: f64) -> Seen {
        let place = (at_s - self.from_s) / self.step_s;
        let k = (place.max(0.0) as usize).min(self.rows.len() - 2);
        let share = place - k as f64;
        let (a, b) = (self.rows[k], self.rows[k + 1]);
        Seen {
            azimuth: Angle::from_radians(a.0 + share * (b.0 - a.0)).wrapped(),
            altitude: Angle::from_radians(a.1 + share * (b.1 - a.1)),
        }
    }
}
