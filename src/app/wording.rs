//! stand-in until the words layer is here
use fluent_bundle::{FluentArgs, FluentBundle, FluentResource};
pub struct Words {
    bundle: FluentBundle<FluentResource>,
}
impl Words {
    pub fn new() -> Self {
        let mut bundle = FluentBundle::new(vec!["en".parse().expect("en")]);
        bundle.set_use_isolating(false);
        let resource =
            FluentResource::try_new(include_str!("../../assets/words/en/window.ftl").to_owned())
                .expect("ftl");
        bundle.add_resource(resource).expect("twice");
        Self { bundle }
    }
    pub fn text(&self, id: &str) -> String {
        self.text_with(id, &[])
    }
    pub fn text_with(&self, id: &str, args: &[(&str, &str)]) -> String {
        let mut fluent = FluentArgs::new();
        for (name, value) in args {
            fluent.set(*name, *value);
        }
        let Some(pattern) = self.bundle.get_message(id).and_then(|m| m.value()) else {
            return format!("«{id}»");
        };
        let mut errors = vec![];
        self.bundle
            .format_pattern(pattern, Some(&fluent), &mut errors)
            .into_owned()
    }
}
use super::scene::Scene;
use crate::measure::{Angle, Moment};
use crate::sky::{Appearance, Body, magnitude::Magnitude};
use chrono::{NaiveDate, NaiveDateTime};
impl Words {
    pub fn body(&self, body: Body) -> String {
        format!("{body:?}")
    }
    pub fn weekday_date(&self, d: NaiveDate) -> String {
        d.format("%a %-d %b %Y").to_string()
    }
    pub fn month_year(&self, d: NaiveDate) -> String {
        d.format("%B %Y").to_string()
    }
    pub fn weekday_date_time(&self, d: NaiveDateTime) -> String {
        d.format("%a %-d %b %Y  %-H:%M").to_string()
    }
    pub fn clock_time(&self, t: chrono::NaiveTime) -> String {
        t.format("%-H:%M").to_string()
    }
    pub fn time(&self, scene: &Scene<'_>, m: Moment) -> String {
        crate::measure::civil::local(scene.scales.civil(m).0, scene.zone)
            .format("%-H:%M")
            .to_string()
    }
    pub fn countdown(&self, s: f64) -> String {
        format!("In {} min {} s.", (s / 60.0) as i64, (s % 60.0) as i64)
    }
    pub fn degrees(&self, a: Angle, places: usize) -> String {
        format!("{:.places$}°", a.degrees()).replace('-', "−")
    }
    pub fn azimuth(&self, a: Angle) -> String {
        format!(
            "{:.1}° {}",
            a.degrees(),
            self.compass_point((a.degrees() / 22.5).round() as usize % 16)
        )
    }
    pub fn compass_point(&self, p: usize) -> String {
        [
            "N", "NNE", "NE", "ENE", "E", "ESE", "SE", "SSE", "S", "SSW", "SW", "WSW", "W", "WNW",
            "NW", "NNW",
        ][p % 16]
            .to_owned()
    }
    pub fn elongation(&self, a: &Appearance) -> String {
        format!(
            "{:.1}° {}",
            a.elongation.degrees(),
            if a.is_east_of_sun { "E" } else { "W" }
        )
    }
    pub fn percent(&self, f: f64) -> String {
        format!("{:.0} %", f * 100.0)
    }
    pub fn disc(&self, a: Angle) -> String {
        format!("{:.1}″", a.arcsec())
    }
    pub fn magnitude(&self, m: Magnitude) -> String {
        m.value()
            .map_or("–".into(), |v| format!("{v:.1}").replace('-', "−"))
    }
    pub fn air(&self, site: &crate::place::Site) -> String {
        format!("{:.1}", site.sky.dark_mag_arcsec2)
    }
    pub fn half_night_sentence(&self, scene: &Scene<'_>) -> String {
        let windows = scene
            .night
            .body(scene.body)
            .map(|b| b.windows_in(scene.half))
            .unwrap_or_default();
        windows
            .iter()
            .map(|w| {
                format!(
                    "Visitors see {} from {} until {}; best near {}.",
                    self.body(scene.body),
                    self.time(scene, w.start.moment),
                    self.time(scene, w.end.moment),
                    self.time(scene, w.best.moment)
                )
            })
            .collect::<Vec<_>>()
            .join(" ")
    }
}
