//! Binoculars and telescopes.

use crate::common::assert_within;
use dimmet::light::{Eye, Eyes, Optics};

fn gain(aperture_mm: f64, magnification: f64, luminance: f64) -> f64 {
    let optics = Optics::new(aperture_mm, magnification, 0.8).unwrap();
    let eyes = Eyes::default().with_instrument(optics);
    eyes.gaze(Eye::Optics).limit(luminance, 0.0) - eyes.gaze(Eye::Visitor).limit(luminance, 0.0)
}

#[test] // derived: against a bright sky E ~ B, so that only the dilution M² counts
fn by_day_the_gain_is_5_log_of_the_magnification() {
    for (aperture, magnification) in [(50.0, 10.0), (50.0, 7.0), (90.0, 36.0)] {
        let expected = 5.0 * f64::log10(magnification);
        let actual = gain(aperture, magnification, 3000.0);
        assert_within(
            actual,
            expected,
            1.2,
            "5 log M, less where the diluted sky is no longer bright",
        );
        assert!(actual < expected + 0.1, "never more");
    }
}

/// Common practice: 10x50 binoculars show stars to about 10 under a dark sky, a 200 mm
/// telescope to about 14.
#[test]
fn by_night_the_limits_are_the_usual_ones() {
    let dark = dimmet::light::luminance_from_mag_arcsec2(21.5);
    for (aperture, magnification, expected) in [(50.0, 10.0, 10.2), (200.0, 100.0, 13.9)] {
        let optics = Optics::new(aperture, magnification, 0.8).unwrap();
        let eyes = Eyes::default().with_instrument(optics);
        let limit = eyes.gaze(Eye::Optics).limit(dark, 0.0);
        assert_within(limit, expected, 0.6, "limit of an instrument");
    }
}

#[test]
fn light_beside_the_pupil_is_lost() {
    // By day a pupil is 2.4 mm: beyond that exit pupil aperture brings nothing more.
    assert_within(
        gain(50.0, 7.0, 3000.0),
        gain(70.0, 7.0, 3000.0),
        1e-9,
        "7x50 and 7x70 by day",
    );
    assert!(
        gain(70.0, 7.0, 3e-4) > gain(30.0, 7.0, 3e-4) + 0.5,
        "by night it does"
    );
}
