//! What the window says: messages of `assets/words/en/window.ftl`, and its numbers and times.
//!
//! Every number and time is formatted here and nowhere else in the window's own parts, so that
//! a message only ever gets finished pieces.

use super::scene::Scene;
use crate::measure::{Angle, Moment, civil};
use crate::sky::{Appearance, Body, magnitude::Magnitude};
use chrono::{Datelike, NaiveDate, NaiveTime, Timelike};
use fluent_bundle::{FluentArgs, FluentBundle, FluentResource};

/// English wording.
pub struct Words {
    bundle: FluentBundle<FluentResource>,
}

/// The shipped wording is no Fluent file: a mistake in the program, found by a test.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct BrokenWording(String);

impl std::fmt::Display for BrokenWording {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        write!(f, "the window's wording cannot be used: {}", self.0)
    }
}

impl std::error::Error for BrokenWording {}

impl Words {
    /// The wording that the program ships.
    ///
    /// # Errors
    /// It cannot be read.
    pub fn shipped() -> Result<Self, BrokenWording> {
        let text = include_str!("../../assets/words/en/window.ftl").to_owned();
        let resource = FluentResource::try_new(text)
            .map_err(|(_, errors)| BrokenWording(format!("{errors:?}")))?;
        let language = "en"
            .parse()
            .map_err(|error| BrokenWording(format!("{error:?}")))?;
        let mut bundle = FluentBundle::new(vec![language]);
        // Left-to-right text only: the isolating marks would be drawn as boxes.
        bundle.set_use_isolating(false);
        bundle
            .add_resource(resource)
            .map_err(|errors| BrokenWording(format!("{errors:?}")))?;
        Ok(Self { bundle })
    }

    /// A message.
    pub fn text(&self, id: &str) -> String {
        self.text_with(id, &[])
    }

    /// A message with its pieces.
    pub fn text_with(&self, id: &str, pieces: &[(&str, &str)]) -> String {
        let mut args = FluentArgs::new();
        for (name, value) in pieces {
            args.set(*name, *value);
        }
        self.message(id, &args)
    }

    /// A message whose form depends on how many there are.
    pub fn counted(&self, id: &str, (name, count): (&str, u32)) -> String {
        let mut args = FluentArgs::new();
        args.set(name, count);
        self.message(id, &args)
    }

    /// A message that is missing shows its id, which the tests look for.
    fn message(&self, id: &str, args: &FluentArgs<'_>) -> String {
        let message = self.bundle.get_message(id);
        match message.and_then(|message| message.value()) {
            Some(pattern) => {
                let mut errors = Vec::new();
                let text = self.bundle.format_pattern(pattern, Some(args), &mut errors);
                text.into_owned()
            }
            None => format!("[{id}]"),
        }
    }

    /// A body's name.
    pub fn body(&self, body: Body) -> String {
        self.text(&format!("body-{}", body.name()))
    }

    /// A body within a sentence.
    pub fn body_aloud(&self, body: Body) -> String {
        self.text(&format!("aloud-{}", body.name()))
    }

    /// Weekday and civil date.
    pub fn weekday_date(&self, date: NaiveDate) -> String {
        let weekday = self.text(&format!("weekday-{}", date.weekday().number_from_monday()));
        let month = self.text(&format!("month-short-{}", date.month()));
        let (day, year) = (date.day().to_string(), date.year().to_string());
        let pieces = [
            ("weekday", weekday.as_str()),
            ("day", &day),
            ("month", &month),
            ("year", &year),
        ];
        self.text_with("weekday-date", &pieces)
    }

    /// Month and year.
    pub fn month_year(&self, date: NaiveDate) -> String {
        let month = self.text(&format!("month-{}", date.month()));
        let year = date.year().to_string();
        self.text_with("month-year", &[("month", &month), ("year", &year)])
    }

    /// Hours and minutes of a local time; whole minutes that have passed, as a clock shows them.
    pub fn clock_time(&self, time: NaiveTime) -> String {
        format!("{}:{:02}", time.hour(), time.minute())
    }

    /// The local time of an event, to the nearest minute.
    pub fn time(&self, scene: &Scene<'_>, moment: Moment) -> String {
        let (instant, _) = scene.scales.civil(moment.plus_seconds(30.0));
        self.clock_time(civil::local(instant, scene.zone).time())
    }

    /// How long until something changes.
    pub fn countdown(&self, seconds: f64) -> String {
        let whole_s = seconds.max(0.0).round() as u64;
        let (hours, minutes, rest_s) = (whole_s / 3600, whole_s / 60 % 60, whole_s % 60);
        let (hours, minutes) = (hours.to_string(), minutes.to_string());
        match whole_s {
            0..600 => {
                let seconds = format!("{rest_s:02}");
                self.text_with(
                    "countdown-seconds",
                    &[("minutes", &minutes), ("seconds", &seconds)],
                )
            }
            600..3600 => self.text_with("countdown-minutes", &[("minutes", &minutes)]),
            _ => self.text_with(
                "countdown-hours",
                &[("hours", &hours), ("minutes", &minutes)],
            ),
        }
    }

    /// Degrees with so many decimals and a true minus.
    pub fn degrees(&self, angle: Angle, decimals: usize) -> String {
        let figures = signed(angle.degrees(), decimals);
        self.text_with("degrees", &[("figures", &figures)])
    }

    /// Azimuth in degrees and as one of sixteen compass points.
    pub fn azimuth(&self, azimuth: Angle) -> String {
        let point = (azimuth.wrapped().degrees() / 22.5).round() as usize % 16;
        let degrees = self.degrees(azimuth.wrapped(), 1);
        let point = self.text(&format!("compass-short-{point}"));
        self.text_with("azimuth", &[("degrees", &degrees), ("point", &point)])
    }

    /// One of sixteen compass points in full, clockwise from north.
    pub fn compass_point(&self, point: usize) -> String {
        self.text(&format!("compass-{}", point % 16))
    }

    /// Elongation, and on which side of the Sun.
    pub fn elongation(&self, appearance: &Appearance) -> String {
        let degrees = self.degrees(appearance.elongation, 1);
        let side = if appearance.is_east_of_sun {
            "east"
        } else {
            "west"
        };
        self.text_with("elongation", &[("degrees", &degrees), ("side", side)])
    }

    /// A share in whole percent.
    pub fn percent(&self, share: f64) -> String {
        let figures = signed(100.0 * share, 0);
        self.text_with("percent", &[("figures", &figures)])
    }

    /// An apparent diameter: arcseconds, or arcminutes from two of them on.
    pub fn disc(&self, diameter: Angle) -> String {
        let arcsec = diameter.arcsec();
        if arcsec < 120.0 {
            self.text_with("arcsec", &[("figures", &signed(arcsec, 1))])
        } else {
            self.text_with("arcmin", &[("figures", &signed(arcsec / 60.0, 1))])
        }
    }

    /// A magnitude to a tenth.
    pub fn magnitude(&self, magnitude: Magnitude) -> String {
        match magnitude {
            Magnitude::Within(v) => signed(v, 1),
            Magnitude::Extrapolated(v) => {
                self.text_with("magnitude-extrapolated", &[("figures", &signed(v, 1))])
            }
            Magnitude::OutsideRange => self.text("magnitude-outside"),
        }
    }

    /// The site's air and sky.
    pub fn air(&self, site: &crate::place::Site) -> String {
        let extinction = signed(site.extinction().total_mag(), 2);
        let sky = signed(site.sky.dark_mag_arcsec2, 1);
        self.text_with("air", &[("extinction", &extinction), ("sky", &sky)])
    }
}

/// A number with so many decimals, a true minus, and no minus before a zero.
fn signed(value: f64, decimals: usize) -> String {
    let figures = format!("{:.decimals$}", value.abs());
    let is_zero = figures.chars().all(|c| matches!(c, '0' | '.'));
    if value < 0.0 && !is_zero {
        format!("−{figures}")
    } else {
        figures
    }
}
