//! In which order an eye finds the Moon, the planets and the bright stars as the sky darkens,
//! and loses them as it brightens.

use super::night::{Half, Night};
use super::sight::{Lamps, Sight};
use crate::light::{Eye, Glow, Target};
use crate::measure::{Angle, Moment, search};
use crate::place::Skyline;
use crate::sky::stars::{Star, bright_stars};
use crate::sky::{Body, Observer, Span, View};

/// The faintest stars that are asked about, V: some fifty of the whole sky, all that a beginner
/// is shown.
const FAINTEST_V: f64 = 2.0;

/// Seconds between looks at the stars. In five minutes the sky's light changes by a magnitude or
/// two, which is what a dusk of fifty stars is told apart by; what lies between is bisected.
const STEP_S: f64 = 300.0;

/// Times are found to this many seconds.
const TOLERANCE_S: f64 = 10.0;

/// Whose half-night, seen from where.
#[derive(Clone, Copy, Debug)]
pub struct AppearingRequest<'a> {
    /// The night, planned for `eye`; it holds the Moon's and the planets' windows.
    pub night: &'a Night,
    /// Which half of it.
    pub half: Half,
    /// Whose eye.
    pub eye: Eye,
    /// The Sun, the Moon and the Earth over the night.
    pub span: &'a Span,
    /// Where from.
    pub observer: &'a Observer,
    /// What blocks the view there.
    pub skyline: &'a Skyline,
    /// How the sky is lit and whose eyes look.
    pub sight: &'a Sight,
}

/// What is found.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Found {
    /// The Moon or a planet.
    Body(Body),
    /// A star.
    Star(&'static Star),
}

/// When the eye first finds something at dusk, or last sees it at dawn.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Sighting {
    /// What.
    pub found: Found,
    /// When.
    pub moment: Moment,
    /// Whether it is plain already when the search begins at sunset, or still when it ends at
    /// sunrise; `moment` is that instant then.
    pub is_beyond: bool,
}

/// At dusk the first `most` things that the eye finds between sunset and the end of astronomical
/// twilight, in that order; at dawn the last that it holds between the twilight's beginning and
/// sunrise, the very last first. What is plain beyond sunset or sunrise comes first, in the order
/// Moon, planets, stars. Behind an instrument only the time in which optics may be uncapped
/// counts. Empty where the Sun neither sets nor rises in the half, or no optics time is in it.
pub fn appearing(request: &AppearingRequest<'_>, most: usize) -> Vec<Sighting> {
    let Some((bright_end, dark_end)) = ends(request) else {
        return Vec::new();
    };
    let search = Search {
        request,
        bright_end,
        length_s: dark_end.seconds_since(bright_end).abs(),
        towards_dark: if request.half == Half::Dusk {
            1.0
        } else {
            -1.0
        },
    };
    let mut sightings: Vec<(f64, Found)> = search.bodies();
    sightings.extend(search.stars(most));
    sightings.sort_by(|a, b| a.0.total_cmp(&b.0));
    sightings
        .into_iter()
        .take(most)
        .map(|(into_s, found)| Sighting {
            found,
            moment: search.moment(into_s),
            is_beyond: into_s <= 0.0,
        })
        .collect()
}

/// The bright end and the dark end of the time that is searched.
fn ends(request: &AppearingRequest<'_>) -> Option<(Moment, Moment)> {
    let night = request.night;
    let (sun, optics) = (&night.sun, &night.optics);
    let (bright, dark, capped) = match request.half {
        Half::Dusk => (sun.set, sun.astronomical_dusk, optics.from),
        Half::Dawn => (sun.rise, sun.astronomical_dawn, optics.until),
    };
    let bright = match request.eye {
        Eye::Optics => capped?,
        Eye::PasserBy | Eye::Visitor | Eye::Keen => bright?,
    };
    Some((bright, dark.unwrap_or(night.middle)))
}

/// The search runs from the bright end into the dark, whichever way time goes; so one thing
/// found first is found first at dusk and lost last at dawn.
struct Search<'a> {
    request: &'a AppearingRequest<'a>,
    bright_end: Moment,
    length_s: f64,
    towards_dark: f64,
}

impl Search<'_> {
    fn moment(&self, into_s: f64) -> Moment {
        self.bright_end.plus_seconds(self.towards_dark * into_s)
    }

    fn past_bright_end_s(&self, moment: Moment) -> f64 {
        self.towards_dark * moment.seconds_since(self.bright_end)
    }

    /// The Moon and the planets, from the night's windows.
    fn bodies(&self) -> Vec<(f64, Found)> {
        let request = self.request;
        let first = |body: Body| {
            let night = request.night.body(body)?;
            let windows = night.windows_in(request.eye, request.half);
            let into_s = windows
                .iter()
                .filter_map(|window| {
                    let (a, b) = (
                        self.past_bright_end_s(window.start.moment),
                        self.past_bright_end_s(window.end.moment),
                    );
                    (a.max(b) > 0.0).then_some(a.min(b).max(0.0))
                })
                .fold(f64::INFINITY, f64::min);
            (into_s <= self.length_s).then_some((into_s, Found::Body(body)))
        };
        let moon_first = [Body::Moon].into_iter();
        let planets = Body::BRIGHT.into_iter().filter(|body| *body != Body::Moon);
        moon_first.chain(planets).filter_map(first).collect()
    }

    /// The stars, looked for step by step until there are enough.
    fn stars(&self, most: usize) -> Vec<(f64, Found)> {
        let mut waiting: Vec<&'static Star> = bright_stars()
            .iter()
            .filter(|star| star.magnitude < FAINTEST_V)
            .collect();
        let mut found = Vec::new();
        let mut before_s = 0.0;
        for into_s in search::grid(0.0, self.length_s, STEP_S) {
            self.with_sky(into_s, |view, glow| {
                waiting.retain(|star| {
                    let is_plain = self.is_plain(star, view, glow);
                    if is_plain {
                        let first_s = self.first_between(star, before_s, into_s);
                        found.push((first_s, Found::Star(star)));
                    }
                    !is_plain
                });
            });
            if found.len() >= most {
                break;
            }
            before_s = into_s;
        }
        found
    }

    /// When a star that is plain at `plain_s` but not at `not_s` becomes so.
    fn first_between(&self, star: &Star, mut not_s: f64, mut plain_s: f64) -> f64 {
        while plain_s - not_s > TOLERANCE_S {
            let middle_s = 0.5 * (not_s + plain_s);
            if self.with_sky(middle_s, |view, glow| self.is_plain(star, view, glow)) {
                plain_s = middle_s;
            } else {
                not_s = middle_s;
            }
        }
        plain_s
    }

    fn with_sky<T>(&self, into_s: f64, look: impl FnOnce(&View<'_>, &Glow<'_>) -> T) -> T {
        let epoch = self.request.span.at(self.moment(into_s));
        let view = epoch.seen_by(self.request.observer);
        let glow = Lamps::of(&view).glow(&self.request.sight.sky);
        look(&view, &glow)
    }

    fn is_plain(&self, star: &Star, view: &View<'_>, glow: &Glow<'_>) -> bool {
        let place = view.refracted(view.horizontal(view.star(star).direction));
        let clearance = self
            .request
            .skyline
            .clearance(place.azimuth, place.altitude);
        if place.altitude < Angle::ZERO || clearance <= Angle::ZERO {
            return false;
        }
        let target = Target::point(
            star.magnitude,
            place.altitude.radians(),
            place.azimuth.radians(),
        );
        let gaze = self.request.sight.gaze(self.request.eye);
        glow.margin(&target, &gaze).margin_mag >= 0.0
    }
}

#[cfg(test)]
mod tests {
    use super::{AppearingRequest, Found, Sighting, appearing};
    use crate::light::Eye;
    use crate::measure::{Angle, TimeScales};
    use crate::place::{Site, Skyline, demo_site};
    use crate::plan::{Half, Night, NightRequest, Sight};
    use crate::sky::{Body, Ephemeris, Observer, Span};

    struct Evening {
        observer: Observer,
        skyline: Skyline,
        sight: Sight,
        night: Night,
        span: Span,
    }

    impl Evening {
        fn new(site: &Site, skyline: Skyline, date: &str) -> Self {
            let (observer, ephemeris) = (site.observer(), Ephemeris::new());
            let sight = Sight::of_site(site).unwrap();
            let request = NightRequest {
                observer: &observer,
                skyline: &skyline,
                zone: site.zone(),
                date: date.parse().unwrap(),
                scales: TimeScales::new(),
                sight: &sight,
                eyes: &Eye::ALL,
                bodies: &Body::BRIGHT,
            };
            let night = Night::plan(&ephemeris, &request).unwrap();
            let span = ephemeris
                .cover(night.start.tt(), night.end.tt(), &Body::ALL)
                .unwrap();
            Self {
                observer,
                skyline,
                sight,
                night,
                span,
            }
        }

        fn december() -> Self {
            let site = demo_site("Fennick Common").unwrap();
            Self::new(site, site.skyline(&site.spots[0]), "2026-12-04")
        }

        fn appearing(&self, half: Half, eye: Eye, most: usize) -> Vec<Sighting> {
            let request = AppearingRequest {
                night: &self.night,
                half,
                eye,
                span: &self.span,
                observer: &self.observer,
                skyline: &self.skyline,
                sight: &self.sight,
            };
            appearing(&request, most)
        }
    }

    #[test]
    fn a_december_dusk_is_told_in_order_of_time() {
        let evening = Evening::december();
        let found = evening.appearing(Half::Dusk, Eye::Visitor, 8);
        assert_eq!(found.len(), 8, "{found:?}");
        let sun = &evening.night.sun;
        let (set, dark) = (sun.set.unwrap(), sun.astronomical_dusk.unwrap());
        for pair in found.windows(2) {
            assert!(pair[0].moment <= pair[1].moment, "{pair:?}");
        }
        for sighting in &found {
            assert!(sighting.moment >= set && sighting.moment <= dark);
            // A planet comes out where its window starts.
            if let Found::Body(body) = sighting.found {
                let night = evening.night.body(body).unwrap();
                let window = &night.windows_in(Eye::Visitor, Half::Dusk)[0];
                let off_s = sighting.moment.seconds_since(window.start.moment);
                assert!(off_s.abs() < 1e-3 || sighting.is_beyond, "{body} {off_s}");
            }
        }
        // Fewer are the first of more.
        assert_eq!(evening.appearing(Half::Dusk, Eye::Visitor, 3), found[..3]);
    }

    #[test]
    fn a_dawn_is_told_from_the_last_backwards() {
        let evening = Evening::december();
        let lost = evening.appearing(Half::Dawn, Eye::Visitor, 8);
        assert_eq!(lost.len(), 8, "{lost:?}");
        for pair in lost.windows(2) {
            assert!(pair[0].moment >= pair[1].moment, "{pair:?}");
        }
        // Venus at magnitude -4.9 outlasts all but the Moon.
        let bodies = lost.iter().take(2).map(|sighting| sighting.found);
        assert!(
            bodies
                .clone()
                .any(|found| found == Found::Body(Body::Venus)),
            "{lost:?}"
        );
    }

    #[test]
    fn a_passer_by_never_finds_anything_before_a_practised_eye() {
        const BISECTED_TO_S: f64 = 10.0;
        let evening = Evening::december();
        for (half, sign) in [(Half::Dusk, 1.0), (Half::Dawn, -1.0)] {
            let keen = evening.appearing(half, Eye::Keen, usize::MAX);
            let passer_by = evening.appearing(half, Eye::PasserBy, usize::MAX);
            assert!(passer_by.len() > 5 && keen.len() >= passer_by.len());
            for late in &passer_by {
                let early = keen.iter().find(|early| early.found == late.found).unwrap();
                let by_s = sign * late.moment.seconds_since(early.moment);
                assert!(by_s > -BISECTED_TO_S, "{late:?} {early:?}");
            }
        }
    }

    // Common practice: over most of the sky the stars come out in the order of their brightness;
    // those that stand low, in thick air or before the afterglow, come late.
    #[test]
    fn well_above_the_horizon_brighter_stars_come_first() {
        const WELL_ABOVE: Angle = Angle::from_degrees(20.0);
        const CLEARLY_MAG: f64 = 0.5;
        let site = demo_site("Fennick Common").unwrap();
        let evening = Evening::new(site, Skyline::open(), "2026-12-04");
        let found = evening.appearing(Half::Dusk, Eye::Visitor, usize::MAX);
        let high = |sighting: &Sighting| {
            let Found::Star(star) = sighting.found else {
                return None;
            };
            let epoch = evening.span.at(sighting.moment);
            let view = epoch.seen_by(&evening.observer);
            let place = view.horizontal(view.star(star).direction);
            (place.altitude > WELL_ABOVE).then_some(star.magnitude)
        };
        let magnitudes: Vec<f64> = found.iter().filter_map(high).collect();
        assert!(magnitudes.len() >= 6, "{magnitudes:?}");
        for (k, earlier) in magnitudes.iter().enumerate() {
            for later in &magnitudes[k + 1..] {
                assert!(later - earlier > -CLEARLY_MAG, "{magnitudes:?}");
            }
        }
    }

    #[test]
    fn behind_an_instrument_nothing_is_told_before_the_optics_time() {
        let evening = Evening::december();
        let (from, until) = (
            evening.night.optics.from.unwrap(),
            evening.night.optics.until.unwrap(),
        );
        let dusk = evening.appearing(Half::Dusk, Eye::Optics, 8);
        assert!(!dusk.is_empty() && dusk.iter().all(|sighting| sighting.moment >= from));
        let dawn = evening.appearing(Half::Dawn, Eye::Optics, 8);
        assert!(!dawn.is_empty() && dawn.iter().all(|sighting| sighting.moment <= until));
    }
}
