//! The threshold of an eye that knows where to look.

use crate::common::assert_within;
use crate::document::{assert_documented, table};
use dimmet::light::threshold::{extended_lx, point_lx};
use dimmet::light::{Eye, Eyes};

/// Tousey and Koomen 1953 (J. Opt. Soc. Am. 43, 177), Table I: log of the background in cd/ft²,
/// and the magnitude of a star just seen against it, as they give it.
const TOUSEY_KOOMEN: [(f64, f64); 8] = [
    (2.5, -3.70),
    (1.5, -1.53),
    (0.5, 0.49),
    (-0.5, 2.35),
    (-1.5, 3.82),
    (-2.5, 4.73),
    (-3.5, 4.89),
    (-4.5, 5.81),
];

const CD_M2_PER_CD_FT2: f64 = 10.7639;

#[test] // 0.2 mag: their observers, Blackwell's and Knoll's differ by as much
fn a_visitor_sees_what_tousey_and_koomens_observers_saw() {
    let visitor = Eyes::default().gaze(Eye::Visitor);
    let rows = TOUSEY_KOOMEN.map(|(log_background, magnitude)| {
        let luminance = CD_M2_PER_CD_FT2 * 10f64.powf(log_background);
        let what = format!("Tousey and Koomen 1953, Table I, {luminance:.2e} cd/m²");
        let limit = visitor.limit(luminance, 0.0);
        assert_within(limit, magnitude, 0.2, &what);
        [
            format!("{luminance:.2e}"),
            format!("{limit:.2}"),
            format!("{magnitude:.2}"),
        ]
    });
    let head = ["background, cd/m²", "model", "Tousey and Koomen"];
    assert_documented("threshold", &table(head, &rows));
}

#[test] // Crumey 2014, eq. 54, for 20 < µ < 22: m = 0.3834 µ - 1.4400 - 2.5 log F
fn the_dark_sky_limit_is_crumeys_shorter_formula() {
    for f in [1.4, 2.4] {
        let eyes = Eyes::default().with_factor(Eye::Keen, f).unwrap();
        for mu in [20.0, 20.5, 21.0, 21.5, 22.0] {
            let limit = eyes
                .gaze(Eye::Keen)
                .limit(dimmet::light::luminance_from_mag_arcsec2(mu), 0.0);
            let published = 0.3834 * mu - 1.4400 - 2.5 * f.log10();
            assert_within(limit, published, 0.05, "Crumey 2014, eq. 54");
        }
    }
}

#[test]
fn a_brighter_background_never_asks_for_less_light() {
    let mut before = 0.0;
    for step in 0..20_000 {
        let luminance = 10f64.powf(-6.0 + f64::from(step) * 5e-4);
        let threshold = point_lx(luminance);
        assert!(
            threshold >= before,
            "{luminance} cd/m²: {threshold} after {before}"
        );
        before = threshold;
    }
}

#[test] // Ricco's and the contrast law, the two ends of Crumey 2014's curve
fn a_small_disc_is_a_point_and_a_large_one_a_contrast() {
    for luminance in [2e-4, 0.05, 1.0, 100.0, 3000.0] {
        let point = point_lx(luminance);
        assert_within(
            extended_lx(luminance, 1e-4) / point,
            1.0,
            0.03,
            "far below the eye's grain",
        );
        let [large, larger] = [1e9, 2e9].map(|area| extended_lx(luminance, area));
        assert_within(
            larger / large,
            2.0,
            0.05,
            "twice the area of a large target",
        );
        assert!(
            extended_lx(luminance, 1.0) > point,
            "spread light is harder to see"
        );
    }
}

/// Blackwell 1946 (J. Opt. Soc. Am. 36, 624), as read by many: in daylight a 4 arcmin disc is
/// seen (half of trials) at a contrast of about 0.03 to 0.05, 1 arcmin at about 0.4 to 0.6; a
/// large disc at 0.003. From memory of his figures, hence the factor of 2.
#[test]
fn contrast_thresholds_in_daylight_are_blackwells() {
    const STERADIAN: f64 = 1.181_834e7;
    let luminance = 343.0;
    for (diameter_arcmin, least, most) in
        [(0.8, 0.25, 1.0), (4.0, 0.015, 0.06), (120.0, 0.0015, 0.006)]
    {
        let area: f64 = std::f64::consts::PI * f64::powi(diameter_arcmin / 2.0, 2);
        let contrast = extended_lx(luminance, area) / (luminance * area / STERADIAN);
        assert!(
            (least..=most).contains(&contrast),
            "{diameter_arcmin}': contrast {contrast}"
        );
    }
}
