//! Numbers for people: true minus signs, units, as many digits as are known.

use super::Words;
use crate::measure::Angle;
use crate::place::Site;
use crate::sky::magnitude::Magnitude;
use crate::sky::{Appearance, Body};

/// A number with so many decimals and a true minus sign; no minus before a zero.
pub fn decimal(value: f64, places: usize) -> String {
    let text = format!("{value:.places$}");
    let is_zero = text.chars().all(|c| matches!(c, '-' | '0' | '.'));
    match text.strip_prefix('-') {
        Some(digits) if is_zero => digits.to_owned(),
        Some(digits) => format!("\u{2212}{digits}"),
        None => text,
    }
}

impl Words {
    /// A body's name.
    pub fn body(&self, body: Body) -> String {
        self.text(&format!("body-{}", body.name()))
    }

    /// A body's name within a sentence: the Sun and the Moon take an article.
    pub fn body_in_sentence(&self, body: Body) -> String {
        match body {
            Body::Sun => self.text("the-sun"),
            Body::Moon => self.text("the-moon"),
            planet => self.body(planet),
        }
    }

    /// An angle in degrees with so many decimals.
    pub fn degrees(&self, angle: Angle, places: usize) -> String {
        format!("{}°", decimal(angle.degrees(), places))
    }

    /// An azimuth in degrees to a tenth, with its compass point.
    pub fn azimuth(&self, azimuth: Angle) -> String {
        let point = self.text(&format!("compass-short-{}", compass_index(azimuth)));
        let degrees = self.degrees(azimuth.wrapped(), 1);
        self.text_with(
            "azimuth-with-point",
            &[("degrees", degrees), ("point", point)],
        )
    }

    /// The nearest of the sixteen compass points in words.
    pub fn direction(&self, azimuth: Angle) -> String {
        self.text(&format!("compass-{}", compass_index(azimuth)))
    }

    /// One of the sixteen compass points in letters, clockwise from north.
    pub fn compass_point(&self, point: usize) -> String {
        self.text(&format!("compass-short-{}", point % 16))
    }

    /// An elongation with its side of the Sun.
    pub fn elongation(&self, appearance: &Appearance) -> String {
        let side = if appearance.is_east_of_sun {
            "elongation-east"
        } else {
            "elongation-west"
        };
        self.text_with(side, &[("degrees", self.degrees(appearance.elongation, 1))])
    }

    /// A share of one in whole percent.
    pub fn percent(&self, share: f64) -> String {
        self.text_with("percent", &[("percent", decimal(share * 100.0, 0))])
    }

    /// A small angle in arcseconds to a tenth.
    pub fn disc(&self, diameter: Angle) -> String {
        self.text_with(
            "arcseconds",
            &[("arcseconds", decimal(diameter.arcsec(), 1))],
        )
    }

    /// A magnitude to a tenth, or a dash where there is none.
    pub fn magnitude(&self, magnitude: Magnitude) -> String {
        magnitude
            .value()
            .map_or_else(|| self.text("no-value"), |value| decimal(value, 1))
    }

    /// A height in fists at arm's length (10° each), to half a fist.
    pub fn fists(&self, angle: Angle) -> String {
        let halves = (angle.degrees() / 5.0).round().max(0.0) as u32;
        let fists = match (halves / 2, halves % 2) {
            (0, 1) => "½".to_owned(),
            (whole, 1) => format!("{whole}½"),
            (whole, _) => whole.to_string(),
        };
        let count = if halves == 1 || halves == 2 {
            "few"
        } else {
            "many"
        };
        self.text_with("fists", &[("fists", fists.as_str()), ("count", count)])
    }

    /// A site's air and sky in figures.
    pub fn air(&self, site: &Site) -> String {
        self.text_with(
            "air-and-sky",
            &[
                ("extinction", decimal(site.extinction().total_mag(), 2)),
                ("sky", decimal(site.sky.dark_mag_arcsec2, 1)),
            ],
        )
    }
}

/// The nearest of the sixteen compass points, clockwise from north.
fn compass_index(azimuth: Angle) -> usize {
    (azimuth.wrapped().degrees() / 22.5).round() as usize % 16
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn numbers_carry_a_true_minus_and_no_negative_zero() {
        assert_eq!(decimal(-4.94, 1), "\u{2212}4.9");
        assert_eq!(decimal(-0.04, 1), "0.0");
        assert_eq!(decimal(12.35, 0), "12");
    }

    #[test]
    fn directions_and_fists_read_as_a_host_says_them() {
        let words = Words::english();
        let degrees = Angle::from_degrees;
        assert_eq!(words.azimuth(degrees(146.2)), "146.2° SE");
        assert_eq!(words.azimuth(degrees(359.99)), "360.0° N");
        assert_eq!(words.direction(degrees(247.0)), "west-south-west");
        assert_eq!(words.direction(degrees(-1.0)), "north");
        assert_eq!(words.fists(degrees(14.8)), "1½ fists");
        assert_eq!(words.fists(degrees(9.0)), "1 fist");
        assert_eq!(words.fists(degrees(4.0)), "½ fist");
        assert_eq!(words.body_in_sentence(Body::Moon), "the Moon");
    }
}
