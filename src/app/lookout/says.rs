//! What the drawings say, by the scene's wording and on the site's clock.

use crate::app::command::Command;
use crate::app::scene::Scene;
use crate::light::Eye;
use crate::measure::{Angle, Moment};
use crate::plan::Aspect;
use crate::sky::Body;
use crate::words::{CivilClock, FluentValue, Words, decimal};

/// Says things of a scene.
#[derive(Clone, Copy)]
pub struct Says<'a> {
    /// The wording.
    pub words: &'a Words,
    clock: CivilClock,
}

impl<'a> Says<'a> {
    /// Says things of a scene.
    pub fn new(scene: &Scene<'a>) -> Self {
        Self {
            words: scene.words,
            clock: scene.clock(),
        }
    }
    /// A message with its arguments.
    pub fn text(&self, id: &str, arguments: &[(&str, &str)]) -> String {
        self.words.text_with(id, arguments)
    }
    /// A body's name.
    pub fn body(&self, body: Body) -> String {
        self.words.body(body)
    }
    /// A local time, hours and minutes.
    pub fn time(&self, moment: Moment) -> String {
        self.words.time(self.clock, moment)
    }
    /// A whole number of degrees.
    pub fn degrees(&self, degrees: i32) -> String {
        self.words
            .degrees(Angle::from_degrees(f64::from(degrees)), 0)
    }
    /// An angle in degrees to a tenth.
    pub fn tenths(&self, angle: Angle) -> String {
        self.words.degrees(angle, 1)
    }
    /// A magnitude to a tenth.
    pub fn magnitude(&self, magnitude: f64) -> String {
        decimal(magnitude, 1)
    }
    /// A share in whole percent.
    pub fn percent(&self, share: f64) -> String {
        self.words.percent(share)
    }
    /// A height in fists.
    pub fn fists(&self, angle: Angle) -> String {
        self.words.fists(angle)
    }
    /// A small angle in arcseconds.
    pub fn arcsec(&self, angle: Angle) -> String {
        self.words.disc(angle)
    }
    /// A whole number with its sign.
    pub fn signed(&self, number: f64) -> String {
        let id = if number > 0.5 {
            "plot-positive"
        } else {
            "plot-negative"
        };
        self.text(id, &[("number", &decimal(number, 0))])
    }
    /// An eye's name.
    pub fn eye(&self, eye: Eye) -> String {
        let id = Command::ChooseEye(eye).wording();
        self.words.text(id.unwrap_or_default())
    }
    /// The name of one of the eight compass points, clockwise from north.
    pub fn compass(&self, point: usize) -> String {
        self.words
            .direction(Angle::from_degrees(45.0 * point as f64))
    }
    /// What stands on the skyline there.
    pub fn obstacle(&self, label: Option<&str>) -> String {
        match label {
            Some(label) => self.text("the-obstacle", &[("label", label)]),
            None => self.words.text("the-skyline"),
        }
    }
    /// Why a window ends (or starts), by its [`spoken_cause`](crate::words::spoken_cause), with
    /// the time; nothing where only the half-night does.
    pub fn edge(
        &self,
        cause: &str,
        is_end: bool,
        obstacle: Option<&str>,
        time: &str,
    ) -> Option<String> {
        let id = match (cause, is_end) {
            ("sunset", _) => "lane-sunset",
            ("sunrise", _) => "lane-sunrise",
            ("optics", true) => "lane-caps-on",
            ("optics", false) => "lane-caps-off",
            ("twilight", true) => "lane-too-bright-from",
            ("twilight", false) => "lane-dark-enough-from",
            ("haze", true) => "lane-into-haze",
            ("haze", false) => "lane-out-of-haze",
            ("moonlight", true) => "lane-moonlight-from",
            ("moonlight", false) => "lane-moonlight-until",
            ("skyline", true) => "lane-behind-from",
            ("skyline", false) => "lane-clears-at",
            ("horizon", true) => "lane-sets",
            ("horizon", false) => "lane-rises",
            _ => return None,
        };
        let obstacle = self.obstacle(obstacle);
        Some(self.text(id, &[("time", time), ("obstacle", &obstacle)]))
    }
    /// An event and how many days it lies before (negative) or after today.
    pub fn dated(&self, body: Body, aspect: Aspect, days: i64) -> String {
        let aspect_id = match aspect {
            Aspect::Conjunction if body == Body::Moon => "aspect-new-moon",
            Aspect::Opposition if body == Body::Moon => "aspect-full-moon",
            Aspect::InferiorConjunction => "aspect-inferior-conjunction",
            Aspect::SuperiorConjunction => "aspect-superior-conjunction",
            Aspect::Conjunction => "aspect-conjunction",
            Aspect::Opposition => "aspect-opposition",
            Aspect::GreatestElongationEast => "aspect-greatest-elongation-east",
            Aspect::GreatestElongationWest => "aspect-greatest-elongation-west",
        };
        let id = match days {
            ..=-1 => "inset-days-ago",
            0 => "inset-today",
            1.. => "inset-days-on",
        };
        let aspect = self.words.text(aspect_id);
        self.words.text_with(
            id,
            &[
                ("aspect", FluentValue::from(aspect)),
                ("days", FluentValue::from(days.abs())),
            ],
        )
    }
}
