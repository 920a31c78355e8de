//! The one sentence a host could read aloud about a body in a half-night.

use super::{CivilClock, FluentValue, Words};
use crate::light::Eye;
use crate::measure::Angle;
use crate::place::Skyline;
use crate::plan::{Absence, BodyNight, Cause, Edge, Half, Night, Window};
use crate::sky::Body;

/// A body in a half-night, with what is needed to speak of it.
#[derive(Clone, Copy, Debug)]
pub struct HalfNight<'a> {
    /// The night.
    pub night: &'a Night,
    /// Which half of it.
    pub half: Half,
    /// The body.
    pub body: Body,
    /// Whose eye.
    pub eye: Eye,
    /// What blocks the view, for its labels.
    pub skyline: &'a Skyline,
    /// The site's clock.
    pub clock: CivilClock,
}

impl Words {
    /// What a host could read aloud: when and where visitors see the body, why it begins and
    /// ends, and the best moment; or why they do not see it.
    pub fn half_night(&self, about: &HalfNight<'_>) -> String {
        let Some(body) = about.night.body(about.body) else {
            return String::new();
        };
        let sentences: Vec<String> = match body.windows_in(about.eye, about.half) {
            [] => vec![self.absence(about, body)],
            [first, again @ ..] => {
                let again = again.iter().map(|window| self.window_again(about, window));
                std::iter::once(self.window(about, body, first))
                    .chain(again)
                    .collect()
            }
        };
        sentences.join(" ")
    }

    fn window(&self, about: &HalfNight<'_>, body: &BodyNight, window: &Window) -> String {
        let place_at = |edge: Edge| {
            let same = |event: &&crate::plan::SkylineEvent| event.moment == edge.moment;
            let event = body.skyline_events.iter().find(same)?;
            Some((event.azimuth, event.altitude))
        };
        let time = |edge: Edge| FluentValue::from(self.time(about.clock, edge.moment));
        let cause = |edge: Edge| FluentValue::from(spoken_cause(about.night, edge));
        let best = &window.best;
        self.text_with(
            "half-night-window",
            &[
                ("body", self.body_in_sentence(about.body).into()),
                ("eye", about.eye.name().into()),
                ("startCause", cause(window.start)),
                ("start", time(window.start)),
                (
                    "startObstacle",
                    self.obstacle(about, place_at(window.start)).into(),
                ),
                ("endCause", cause(window.end)),
                ("end", time(window.end)),
                (
                    "endObstacle",
                    self.obstacle(about, place_at(window.end)).into(),
                ),
                ("best", self.time(about.clock, best.moment).into()),
                ("altitude", self.degrees(best.altitude, 0).into()),
                ("direction", self.direction(best.azimuth).into()),
                ("room", room(best.clearance).into()),
                ("fists", self.fists(best.clearance).into()),
                (
                    "bestObstacle",
                    self.obstacle(about, Some((best.azimuth, best.altitude)))
                        .into(),
                ),
            ],
        )
    }

    fn window_again(&self, about: &HalfNight<'_>, window: &Window) -> String {
        let time = |moment| self.time(about.clock, moment);
        self.text_with(
            "half-night-window-again",
            &[
                ("start", time(window.start.moment)),
                ("end", time(window.end.moment)),
                ("best", time(window.best.moment)),
            ],
        )
    }

    /// What hides a place (azimuth and altitude) or stands there: an obstacle by its label, or the
    /// skyline.
    pub fn obstacle(&self, about: &HalfNight<'_>, place: Option<(Angle, Angle)>) -> String {
        match place.and_then(|(azimuth, altitude)| about.skyline.hides(azimuth, altitude)) {
            Some(label) => self.text_with("the-obstacle", &[("label", label)]),
            None => self.text("the-skyline"),
        }
    }

    fn absence(&self, about: &HalfNight<'_>, body: &BodyNight) -> String {
        let id = match body.absence(about.night, about.eye, about.half) {
            Absence::NotForEyes => "half-night-not-for-eyes",
            Absence::SunStaysUp => "half-night-sun-up",
            Absence::Down => "half-night-down",
            Absence::UpWithTheSun => "half-night-up-with-sun",
            Absence::Blocked => "half-night-blocked",
            Absence::TooBright => "half-night-too-bright",
        };
        let half = match about.half {
            Half::Dusk => "half-dusk-phrase",
            Half::Dawn => "half-dawn-phrase",
        };
        let name = self.body_in_sentence(about.body);
        // A sentence begins with it in most of these.
        let name = match about.body {
            Body::Moon if id != "half-night-sun-up" => self.text("the-moon-first"),
            _ => name,
        };
        self.text_with(
            id,
            &[
                ("body", name),
                ("half", self.text(half)),
                ("obstacle", self.text("the-skyline")),
            ],
        )
    }
}

/// Whether a clearance would round to no fists at all.
fn room(clearance: Angle) -> &'static str {
    if clearance.degrees() < 2.5 {
        "close"
    } else {
        "clear"
    }
}

/// An end's cause as the sentence tells it: where eyes are sent out and called back by the Sun
/// itself or by the optics times, that is said in place of the sky's brightness: `sunset`,
/// `sunrise` or `optics`, else the cause's name.
pub fn spoken_cause(night: &Night, edge: Edge) -> &'static str {
    let at = |moment| moment == Some(edge.moment);
    match edge.cause {
        Cause::Twilight if at(night.sun.set) => "sunset",
        Cause::Twilight if at(night.sun.rise) => "sunrise",
        Cause::Twilight if at(night.optics.from) || at(night.optics.until) => "optics",
        cause => cause.name(),
    }
}
