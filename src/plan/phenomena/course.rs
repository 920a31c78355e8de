//! A body's way in the Earth's sky, looked at in even steps.

use super::search::{self, Lost, Stretch, Turn};
use super::sight::Sight;
use super::{Event, Kind, Side, Value};
use crate::measure::search::Crossing;
use crate::measure::{Angle, Moment, TimeScales, Tt};
use crate::sky::{Appearance, Body, Ephemeris, Epoch, OutsideEphemeris, Span};

/// Days between looks. No event comes twice within three of them: the closest are the Moon's
/// conjunctions and oppositions (two weeks apart), Mercury's stations (three weeks), Venus's
/// greatest illuminated extents on both sides of an inferior conjunction (ten weeks) and the
/// outer planets' stations (two months, Mars). Longitude from the Sun, elongation, distance and
/// ring opening turn no oftener than that.
pub const fn step_days(body: Body) -> f64 {
    match body {
        Body::Moon => 1.0,
        Body::Mercury => 2.0,
        Body::Venus | Body::Mars => 4.0,
        _ => 6.0,
    }
}

/// What is read off the sky at one instant, from the Earth's centre.
#[derive(Clone, Copy, Debug)]
pub struct Look {
    /// Apparent ecliptic longitude east of the Sun's.
    pub longitude_from_sun: Angle,
    /// Apparent right ascension east of the Sun's.
    pub right_ascension_from_sun: Angle,
    /// Apparent right ascension.
    pub right_ascension: Angle,
    /// The Sun's distance, au.
    pub sun_distance_au: f64,
    /// How far Saturn's rings are open, north positive; 0 for other bodies.
    pub ring_opening: Angle,
    /// The rest.
    pub appearance: Appearance,
}

/// A body's way through a stretch of time.
pub struct Course {
    span: Span,
    scales: TimeScales,
    /// Whose.
    pub body: Body,
    stretch: Stretch,
    ticks: Vec<f64>,
    looks: Vec<Look>,
}

impl Course {
    /// Looks at the body through the stretch and a little around it.
    ///
    /// # Errors
    /// The stretch leaves the ephemeris.
    pub fn new(
        ephemeris: &Ephemeris,
        scales: TimeScales,
        body: Body,
        stretch: Stretch,
    ) -> Result<Self, OutsideEphemeris> {
        let (from, to) = stretch.with_room(step_days(body));
        let tt = Tt::from_days_since_j2000;
        let mut course = Self {
            span: ephemeris.cover(tt(from), tt(to), &[body])?,
            scales,
            body,
            stretch,
            ticks: stretch.ticks(step_days(body)),
            looks: Vec::new(),
        };
        course.looks = course.ticks.iter().map(|at| course.look(*at)).collect();
        Ok(course)
    }

    /// The instant of days of TT since J2000.
    pub fn moment(&self, days: f64) -> Moment {
        self.scales.moment_from_tt(Tt::from_days_since_j2000(days))
    }

    /// Reads something off the sky at an instant.
    pub fn at<T>(&self, days: f64, read: impl FnOnce(&Epoch<'_>) -> T) -> T {
        read(&self.span.at(self.moment(days)))
    }

    /// Looks at an instant.
    pub fn look(&self, days: f64) -> Look {
        self.at(days, |epoch| {
            let body = epoch.geocentric(self.body);
            let sun = epoch.geocentric(Body::Sun);
            let longitude = |direction| epoch.ecliptic(direction).0;
            Look {
                longitude_from_sun: longitude(body.direction) - longitude(sun.direction),
                right_ascension_from_sun: body.right_ascension() - sun.right_ascension(),
                right_ascension: body.right_ascension(),
                sun_distance_au: sun.distance_au,
                ring_opening: match self.body {
                    Body::Saturn => epoch.ring_opening(),
                    _ => Angle::ZERO,
                },
                appearance: epoch.appearance(self.body),
            }
        })
    }

    /// Zeros in the stretch of something that is read off each look.
    pub fn zeros(&self, read: impl Fn(&Look) -> f64) -> Result<Vec<Crossing>, Lost> {
        let mut found = self.zeros_around(read)?;
        found.retain(|crossing| self.holds(crossing.at));
        Ok(found)
    }

    /// Zeros in the stretch and up to two steps before and after it.
    pub fn zeros_around(&self, read: impl Fn(&Look) -> f64) -> Result<Vec<Crossing>, Lost> {
        let values: Vec<f64> = self.looks.iter().map(&read).collect();
        search::zeros(|at| read(&self.look(at)), &self.ticks, &values)
    }

    /// Whether an instant lies in the stretch.
    pub fn holds(&self, days: f64) -> bool {
        self.stretch.has(days)
    }

    /// The sky from the Earth's centre along the way.
    pub fn sight(&self) -> Sight<'_> {
        Sight {
            span: &self.span,
            scales: self.scales,
            lookout: None,
        }
    }

    /// Turns in the stretch of something that is read off each look.
    pub fn turns(&self, read: impl Fn(&Look) -> f64) -> Result<Vec<Turn>, Lost> {
        self.sought_turns(|a, b| read(b) - read(a), |_, _| true)
    }

    /// Turns in the stretch of an angle that is read off each look and may run past 360°.
    pub fn turns_of_angle(&self, read: impl Fn(&Look) -> Angle) -> Result<Vec<Turn>, Lost> {
        self.sought_turns(|a, b| (read(b) - read(a)).signed().radians(), |_, _| true)
    }

    /// Maxima in the stretch of something that is read off each look, among looks that count.
    pub fn maxima(
        &self,
        read: impl Fn(&Look) -> f64,
        counts: impl Fn(&Look) -> bool,
    ) -> Result<Vec<f64>, Lost> {
        let is_sought = |middle: usize, is_maximum: bool| {
            is_maximum && self.looks[middle - 1..=middle + 1].iter().all(&counts)
        };
        let found = self.sought_turns(|a, b| read(b) - read(a), is_sought)?;
        Ok(found.iter().map(|turn| turn.at).collect())
    }

    fn sought_turns(
        &self,
        growth: impl Fn(&Look, &Look) -> f64,
        is_sought: impl Fn(usize, bool) -> bool,
    ) -> Result<Vec<Turn>, Lost> {
        let growths: Vec<f64> = self
            .looks
            .windows(2)
            .map(|pair| growth(&pair[0], &pair[1]))
            .collect();
        let change = |a: f64, b: f64| growth(&self.look(a), &self.look(b));
        let mut found = search::turns(change, &self.ticks, &growths, is_sought)?;
        found.retain(|turn| self.holds(turn.at));
        Ok(found)
    }

    /// An event on this way.
    pub fn event(&self, kind: Kind, days: f64, value: Value) -> Event {
        Event::new(kind, self.body, self.moment(days), value)
    }
}

impl Look {
    /// The side of the Sun.
    pub fn side(&self) -> Side {
        if self.appearance.is_east_of_sun {
            Side::East
        } else {
            Side::West
        }
    }

    /// Lit area of the disc in the sky, square arcseconds: k π/4 s², s the equatorial diameter.
    pub fn lit_area_arcsec2(&self) -> f64 {
        let diameter_arcsec = self.appearance.diameter.arcsec();
        let disc = std::f64::consts::FRAC_PI_4 * diameter_arcsec * diameter_arcsec;
        disc * self.appearance.illuminated_fraction
    }
}
