//! Finding a bright planet in full day, in words.

use super::{CivilClock, Words};
use crate::measure::Angle;
use crate::plan::{Apart, Daylight, Drift, Slot};
use crate::sky::Body;

/// Less than a quarter of a fist is level, or straight above or below.
const LEVEL: Angle = Angle::from_degrees(2.5);

impl Words {
    /// When and where a body is found by day, or why it is not: a sentence or two for each slot.
    /// The cautions are not among them.
    pub fn daylight(&self, clock: CivilClock, daylight: &Daylight) -> Vec<String> {
        let body = match daylight.body {
            Body::Moon => self.text("the-moon-first"),
            planet => self.body(planet),
        };
        let about = |id: &str| vec![self.text_with(id, &[("body", body.as_str())])];
        if !daylight.has_day {
            return vec![self.text("daylight-no-day")];
        }
        if daylight.plain.is_empty() {
            return about("daylight-lost");
        }
        if daylight.slots.is_empty() {
            return about("daylight-no-shade");
        }
        let slots = daylight.slots.iter();
        slots
            .flat_map(|slot| self.daylight_slot(clock, &body, slot))
            .collect()
    }

    fn daylight_slot(&self, clock: CivilClock, body: &str, slot: &Slot) -> Vec<String> {
        let time = |moment| self.time(clock, moment);
        let place = &slot.place;
        let mut sentences = vec![
            self.text_with(
                "daylight-slot",
                &[
                    ("body", body.to_owned()),
                    ("start", time(slot.stretch.start)),
                    ("end", time(slot.stretch.end)),
                    ("building", slot.building.clone()),
                    ("until", time(slot.shaded_until)),
                ],
            ),
            self.text_with(
                "daylight-place",
                &[
                    ("time", time(place.moment)),
                    ("altitude", self.degrees(place.altitude, 0)),
                    ("direction", self.direction(place.azimuth)),
                    ("fromSun", self.apart(Body::Sun, &place.from_sun)),
                ],
            ),
        ];
        if let Some(apart) = &place.from_moon {
            let from = [("fromMoon", self.apart(Body::Moon, apart))];
            sentences.push(self.text_with("daylight-moon", &from));
        }
        let start = time(slot.stretch.start);
        match slot.drift {
            Drift::Away => {}
            Drift::Into(moment) => sentences.push(self.text_with(
                "daylight-drift",
                &[
                    ("body", body.to_owned()),
                    ("start", start),
                    ("time", time(moment)),
                ],
            )),
            Drift::Past => {
                sentences.push(self.text_with("daylight-drift-past", &[("body", body)]));
            }
        }
        sentences
    }

    /// How far from the Sun or the Moon, and which way in fists.
    fn apart(&self, other: Body, apart: &Apart) -> String {
        let side = |angle: Angle, [more, less]: [&'static str; 2]| {
            let name = if angle > Angle::ZERO { more } else { less };
            (angle.abs() >= LEVEL).then(|| (self.fists(angle.abs()), name))
        };
        let across = side(apart.right, ["right", "left"]);
        let up = side(apart.above, ["above", "below"]);
        let (across, across_side) = across.unwrap_or_else(|| (String::new(), "none"));
        let (up, up_side) = up.unwrap_or_else(|| (String::new(), "none"));
        self.text_with(
            "daylight-apart",
            &[
                ("degrees", self.degrees(apart.separation, 0)),
                ("other", self.body_in_sentence(other)),
                ("across", across),
                ("acrossSide", across_side.to_owned()),
                ("up", up),
                ("upSide", up_side.to_owned()),
            ],
        )
    }
}
