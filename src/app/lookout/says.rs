//! Everything that the drawings say, each by one message of `assets/words/en/lookout.ftl`.

use crate::app::scene::Scene;
use crate::measure::{Angle, Moment, civil};
use crate::plan::{Aspect, Cause};
use crate::sky::Body;
use fluent_bundle::{FluentArgs, FluentBundle, FluentResource};

thread_local! {
    static BUNDLE: FluentBundle<FluentResource> = {
        let mut bundle = FluentBundle::new(vec!["en".parse().expect("en")]);
        bundle.set_use_isolating(false);
        let text = include_str!("../../../assets/words/en/lookout.ftl").to_owned();
        bundle.add_resource(FluentResource::try_new(text).expect("ftl")).expect("twice");
        bundle
    };
}

/// Says things in the scene's language.
#[derive(Clone, Copy)]
pub struct Says<'a> {
    scene: &'a Scene<'a>,
}

impl<'a> Says<'a> {
    /// Says things about a scene.
    pub fn new(scene: &'a Scene<'a>) -> Self {
        Self { scene }
    }
    /// A message with its arguments.
    pub fn text(&self, id: &str, args: &[(&str, &str)]) -> String {
        BUNDLE.with(|bundle| {
            let mut fluent = FluentArgs::new();
            for (name, value) in args {
                fluent.set(*name, *value);
            }
            let Some(pattern) = bundle.get_message(id).and_then(|m| m.value()) else {
                return format!("«{id}»");
            };
            bundle
                .format_pattern(pattern, Some(&fluent), &mut vec![])
                .into_owned()
        })
    }
    /// A message with its arguments and a counted number.
    pub fn counted(&self, id: &str, args: &[(&str, &str)], (name, count): (&str, f64)) -> String {
        BUNDLE.with(|bundle| {
            let mut fluent = FluentArgs::new();
            for (name, value) in args {
                fluent.set(*name, *value);
            }
            fluent.set(name, count);
            let Some(pattern) = bundle.get_message(id).and_then(|m| m.value()) else {
                return format!("«{id}»");
            };
            bundle
                .format_pattern(pattern, Some(&fluent), &mut vec![])
                .into_owned()
        })
    }
    /// A body's name.
    pub fn body(&self, body: Body) -> String {
        self.text(&format!("body-{}", body.name()), &[])
    }
    /// A local time, hours and minutes.
    pub fn time(&self, moment: Moment) -> String {
        let utc = self.scene.scales.civil(moment.plus_seconds(30.0)).0;
        civil::local(utc, self.scene.zone)
            .format("%-H:%M")
            .to_string()
    }
    /// A whole number of degrees.
    pub fn degrees(&self, degrees: i32) -> String {
        format!("{degrees}°").replace('-', "−")
    }
    /// An angle in degrees to a tenth.
    pub fn tenths(&self, angle: Angle) -> String {
        format!("{:.1}°", angle.degrees()).replace('-', "−")
    }
    /// A magnitude to a tenth.
    pub fn magnitude(&self, magnitude: f64) -> String {
        format!("{magnitude:.1}").replace('-', "−")
    }
    /// A share in whole percent.
    pub fn percent(&self, share: f64) -> String {
        format!("{:.0} %", share * 100.0)
    }
    /// A number of fists (10° at arm's length), to a half.
    pub fn fists(&self, angle: Angle) -> String {
        let halves = (angle.degrees() / 5.0).round() as i64;
        match (halves / 2, halves % 2) {
            (0, 1) => "½".to_owned(),
            (whole, 1) => format!("{whole}½"),
            (whole, _) => whole.to_string(),
        }
    }
    /// Arcseconds.
    pub fn arcsec(&self, angle: Angle) -> String {
        format!("{:.1}″", angle.arcsec())
    }
    /// Arcseconds without a fraction.
    pub fn whole_arcsec(&self, angle: Angle) -> String {
        format!("{:.0}″", angle.arcsec())
    }
    /// Arcminutes without a fraction.
    pub fn arcmin(&self, angle: Angle) -> String {
        format!("{:.0}′", angle.arcsec() / 60.0)
    }
    /// A magnification.
    pub fn power(&self, power: f64) -> String {
        format!("{power:.0}×")
    }
    /// Minutes with their sign.
    pub fn signed_minutes(&self, minutes: f64) -> String {
        let sign = if minutes > 0.5 { "+" } else { "" };
        format!("{sign}{minutes:.0}").replace('-', "−")
    }
    /// The name of one of the eight compass points, clockwise from north.
    pub fn compass(&self, point: usize) -> String {
        const IDS: [&str; 8] = [
            "compass-north",
            "compass-north-east",
            "compass-east",
            "compass-south-east",
            "compass-south",
            "compass-south-west",
            "compass-west",
            "compass-north-west",
        ];
        self.text(IDS[point % 8], &[])
    }
    /// Why a window ends (or starts), with the time.
    pub fn edge(
        &self,
        cause: Cause,
        is_end: bool,
        obstacle: Option<&str>,
        time: &str,
    ) -> Option<String> {
        let id = match (cause, is_end) {
            (Cause::Twilight, true) => "lane-too-bright-from",
            (Cause::Twilight, false) => "lane-dark-enough-from",
            (Cause::Skyline, true) => "lane-behind-from",
            (Cause::Skyline, false) => "lane-clears-at",
            (Cause::Horizon, true) => "lane-sets",
            (Cause::Horizon, false) => "lane-rises",
            (Cause::Half | Cause::Noon, _) => return None,
        };
        let obstacle = obstacle.map_or_else(
            || self.text("the-skyline", &[]),
            |label| self.text("the-obstacle", &[("label", label)]),
        );
        Some(self.text(id, &[("time", time), ("obstacle", &obstacle)]))
    }
    /// An aspect's name.
    pub fn aspect(&self, body: Body, aspect: Aspect) -> String {
        let id = match aspect {
            Aspect::Conjunction if body == Body::Moon => "aspect-new-moon",
            Aspect::Opposition if body == Body::Moon => "aspect-full-moon",
            Aspect::InferiorConjunction => "aspect-inferior-conjunction",
            Aspect::SuperiorConjunction => "aspect-superior-conjunction",
            Aspect::Conjunction => "aspect-conjunction",
            Aspect::Opposition => "aspect-opposition",
            Aspect::GreatestElongationEast => "aspect-greatest-elongation-east",
            Aspect::GreatestElongationWest => "aspect-greatest-elongation-west",
        };
        self.text(id, &[])
    }
}
