//! Where to stand, in words.

use super::{CivilClock, Words, decimal, spoken_cause};
use crate::place::{PlanPoint, Site, Spot, Stature};
use crate::plan::standing::{Cell, Gain, StandingMap, Stay, WhyLeftOut};
use crate::plan::{Absence, Night, Patch, PatchStay, SpotNight, SpotWindow};

impl Words {
    /// A number of minutes within a sentence, rounded to whole ones.
    pub fn minutes(&self, minutes: f64) -> String {
        let whole = decimal(minutes, 0);
        let count = match whole.as_str() {
            "0" => "none",
            "1" => "one",
            _ => "many",
        };
        self.text_with(
            "minutes-long",
            &[("minutes", whole.as_str()), ("count", count)],
        )
    }

    /// How many metres, and which way, to gain some minutes; or that no place gives so many more.
    pub fn standing_gain(&self, gain: Option<&Gain>, asked_minutes: f64) -> String {
        let Some(gain) = gain else {
            let minutes = self.minutes(asked_minutes);
            return self.text_with("stand-no-gain", &[("minutes", minutes)]);
        };
        self.text_with(
            "stand-gain",
            &[
                ("metres", decimal(gain.distance_m, 0)),
                ("direction", self.direction(gain.bearing)),
                ("degrees", self.degrees(gain.bearing, 0)),
                ("minutes", self.minutes(gain.minutes)),
            ],
        )
    }

    /// What it costs to stand at a place in place of the best one.
    pub fn standing_cost(&self, map: &StandingMap, here: &Stay) -> String {
        let cost = map.cost_of(here);
        if cost < 0.5 {
            return self.text("stand-no-cost");
        }
        self.text_with("stand-cost", &[("minutes", self.minutes(cost))])
    }

    /// What a square of the standing map gives, for the pointer over it: `nights` is how many
    /// the map was made for.
    pub fn standing_square(
        &self,
        clock: CivilClock,
        site: &Site,
        (at, cell): (PlanPoint, &Cell),
        nights: usize,
    ) -> String {
        match cell {
            Cell::Waiting => self.text("square-waiting"),
            Cell::LeftOut(why) => self.left_out(site, at, *why),
            Cell::Stay(stay) if stay.minutes == 0.0 => self.text("square-nothing"),
            Cell::Stay(stay) if nights > 1 => self.text_with(
                "square-nights",
                &[
                    ("minutes", self.minutes(stay.minutes)),
                    ("least", self.minutes(stay.least_minutes)),
                ],
            ),
            Cell::Stay(stay) => stay.window.map_or_else(
                || self.text("square-nothing"),
                |(start, end)| {
                    self.text_with(
                        "square-window",
                        &[
                            ("start", self.time(clock, start)),
                            ("end", self.time(clock, end)),
                            ("minutes", self.minutes(stay.minutes)),
                        ],
                    )
                },
            ),
        }
    }

    /// Why nobody is to stand at a place.
    pub fn left_out(&self, site: &Site, at: PlanPoint, why: WhyLeftOut) -> String {
        match why {
            WhyLeftOut::Outside => self.text("square-outside"),
            WhyLeftOut::Excluded => {
                let label = site.exclusion_at(at).map_or("", |part| &part.label);
                self.text_with("square-excluded", &[("label", label)])
            }
            WhyLeftOut::InObstacle => {
                let mut around = site.obstacles.iter();
                let label = around
                    .find(|obstacle| obstacle.surrounds(at))
                    .map(|obstacle| obstacle.label());
                let obstacle = self.obstacle_by_label(label);
                self.text_with("square-in-obstacle", &[("obstacle", obstacle)])
            }
        }
    }

    /// From when to when a body is seen from a spot, what ends that, and what stands there.
    pub fn spot_night(&self, clock: CivilClock, night: &Night, spot: &SpotNight<'_>) -> String {
        let mut sentences = match spot.windows.as_slice() {
            [] => vec![self.never_from_here(spot.absence)],
            [first, again @ ..] => {
                let mut sentences = vec![self.spot_window(clock, night, first)];
                sentences.extend(again.iter().map(|seen| {
                    self.text_with(
                        "from-here-again",
                        &[
                            ("start", self.time(clock, seen.window.start.moment)),
                            ("end", self.time(clock, seen.window.end.moment)),
                            ("minutes", self.minutes(seen.minutes)),
                        ],
                    )
                }));
                sentences
            }
        };
        if !spot.kit.is_empty() {
            let labels: Vec<&str> = spot.kit.iter().map(|kit| kit.label()).collect();
            sentences.push(self.text_with("here-is-kit", &[("kit", labels.join(", "))]));
        }
        sentences.join(" ")
    }

    /// One window from a spot and what ends it.
    pub fn spot_window(&self, clock: CivilClock, night: &Night, seen: &SpotWindow) -> String {
        let end = seen.window.end;
        self.text_with(
            "from-here",
            &[
                ("start", self.time(clock, seen.window.start.moment)),
                ("end", self.time(clock, end.moment)),
                ("minutes", self.minutes(seen.minutes)),
                ("endCause", spoken_cause(night, end).to_owned()),
                (
                    "obstacle",
                    self.obstacle_by_label(seen.end_blocker.as_deref()),
                ),
            ],
        )
    }

    fn never_from_here(&self, absence: Option<Absence>) -> String {
        let why = match absence {
            Some(Absence::NotForEyes) => "faint",
            Some(Absence::SunStaysUp) => "sun-up",
            Some(Absence::Down) => "down",
            Some(Absence::UpWithTheSun) => "up-with-sun",
            Some(Absence::Blocked) => "blocked",
            Some(Absence::TooBright) | None => "too-bright",
        };
        self.text_with("from-here-none", &[("why", why)])
    }

    fn obstacle_by_label(&self, label: Option<&str>) -> String {
        match label {
            Some(label) => self.text_with("the-obstacle", &[("label", label)]),
            None => self.text("the-skyline"),
        }
    }

    /// Who of a crowd on a spot's patch is worst off, and who is in the middle: where they stand,
    /// how tall they are, how many minutes they have.
    pub fn patch(&self, spot: &Spot, patch: Option<&Patch>) -> String {
        let Some(patch) = patch else {
            return self.text("patch-nobody");
        };
        let one = |stay: &PatchStay| {
            [
                ("who", self.stature(stay.stature)),
                ("place", self.patch_place(spot, stay.at)),
                ("minutes", self.minutes(stay.stay.minutes)),
            ]
        };
        let worst = self.text_with("patch-worst", &one(&patch.worst));
        let median = self.text_with("patch-median", &one(&patch.median));
        format!("{worst} {median}")
    }

    /// Somebody of a stature within a sentence.
    pub fn stature(&self, stature: Stature) -> String {
        self.text(match stature {
            Stature::Adult => "patch-adult",
            Stature::Child => "patch-child",
            Stature::Wheelchair => "patch-wheelchair",
        })
    }

    fn patch_place(&self, spot: &Spot, at: PlanPoint) -> String {
        let middle = spot.plan_point();
        if middle == at {
            return self.text("patch-place-middle");
        }
        let bearing = middle.bearing(at);
        self.text_with(
            "patch-place",
            &[
                ("metres", decimal(middle.distance_m(at), 0)),
                ("direction", self.direction(bearing)),
                ("degrees", self.degrees(bearing, 0)),
            ],
        )
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::light::Eye;
    use crate::measure::{Angle, Moment, TimeScales};
    use crate::plan::{Best, Cause, Edge, Stray, Window};

    fn moment(text: &str) -> Moment {
        let civil = text.parse().expect("a time in RFC 3339");
        TimeScales::new()
            .moment_from_civil(civil)
            .expect("a supported date")
    }

    fn clock() -> CivilClock {
        CivilClock {
            scales: TimeScales::new(),
            zone: chrono_tz::Tz::UTC,
        }
    }

    fn night(at: Moment) -> Night {
        Night {
            date: chrono::NaiveDate::default(),
            start: at,
            middle: at,
            end: at,
            sun: Default::default(),
            bodies: Vec::new(),
            optics: Default::default(),
        }
    }

    fn seen(cause: Cause, end_blocker: Option<&str>) -> SpotWindow {
        let (start, end) = (
            moment("2027-03-01T18:12:00Z"),
            moment("2027-03-01T18:41:00Z"),
        );
        let stray = Stray {
            earliest: None,
            latest: None,
        };
        SpotWindow {
            window: Window {
                eye: Eye::Visitor,
                start: Edge {
                    moment: start,
                    cause: Cause::Twilight,
                },
                start_stray: stray,
                end: Edge { moment: end, cause },
                end_stray: stray,
                best: Best {
                    moment: start,
                    azimuth: Angle::ZERO,
                    altitude: Angle::ZERO,
                    clearance: Angle::ZERO,
                    margin_mag: 1.0,
                    merit: 0.1,
                },
            },
            minutes: 29.0,
            start_blocker: None,
            end_blocker: end_blocker.map(str::to_owned),
        }
    }

    #[test]
    fn a_window_from_a_spot_reads_as_a_host_says_it() {
        let words = Words::english();
        let night = night(moment("2027-03-01T12:00:00Z"));
        let say = |cause, blocker| words.spot_window(clock(), &night, &seen(cause, blocker));
        assert_eq!(
            say(Cause::Skyline, Some("oak")),
            "From here: 18:12 to 18:41, 29 minutes, then behind the oak."
        );
        assert_eq!(
            say(Cause::Twilight, None),
            "From here: 18:12 to 18:41, 29 minutes, then the sky is too bright."
        );
        assert_eq!(
            say(Cause::Half, None),
            "From here: 18:12 to 18:41, 29 minutes, and on past the middle of the night."
        );
    }

    #[test]
    fn the_way_to_more_minutes_is_told_in_metres_and_compass_points() {
        let words = Words::english();
        let gain = Gain {
            to: PlanPoint::new(-13.0, -5.0),
            distance_m: 13.9,
            bearing: Angle::from_degrees(247.0),
            minutes: 10.2,
            stay: Stay::default(),
        };
        assert_eq!(
            words.standing_gain(Some(&gain), 10.0),
            "Stand 14 m to the west-south-west (247°) and you gain 10 minutes."
        );
        assert_eq!(
            words.standing_gain(None, 1.0),
            "Nowhere on these grounds gives 1 minute more than here."
        );
    }

    #[test]
    fn a_crowd_is_told_who_is_worst_off() {
        let words = Words::english();
        let one = |at, stature, minutes| PatchStay {
            at,
            stature,
            stay: Stay {
                minutes,
                ..Stay::default()
            },
        };
        let spot = Spot::mark();
        let patch = Patch {
            middle: None,
            worst: one(PlanPoint::new(0.0, 6.0), Stature::Child, 21.2),
            median: one(PlanPoint::new(0.0, 0.0), Stature::Adult, 27.0),
            places: 19,
        };
        assert_eq!(
            words.patch(&spot, Some(&patch)),
            "Worst off is a child 6 m to the north (0°) of the patch’s middle: 21 minutes. In the middle \
             of the ranking is an adult in the middle of the patch: 27 minutes."
        );
    }
}
