//! What a dark sky and twilight let an eye see at the zenith.

use crate::common::assert_within;
use crate::document::{assert_documented, table};
use crate::published::{SUN_ALTITUDES_DEG, lowland, moonless, mountain, sky, zenith};
use dimmet::light::{Eye, Eyes, luminance_from_mag_arcsec2};

/// Limiting magnitude at the zenith, place known: Koomen et al. 1952's luminances through
/// Tousey and Koomen 1953's thresholds.
const MOUNTAIN_LIMIT: [f64; 6] = [-0.3, 1.4, 4.0, 4.8, 5.5, 5.8];
const LOWLAND_LIMIT: [f64; 6] = [-0.9, 0.9, 3.4, 4.8, 5.3, 5.7];

#[test]
fn the_zenith_shows_stars_as_the_two_published_data_sets_say() {
    let visitor = Eyes::default().gaze(Eye::Visitor);
    let mut rows = SUN_ALTITUDES_DEG.map(|sun| vec![format!("{sun}")]);
    for (name, site, published) in [
        ("lowland", lowland(), LOWLAND_LIMIT),
        ("mountain", mountain(), MOUNTAIN_LIMIT),
    ] {
        for (i, (sun, expected)) in SUN_ALTITUDES_DEG.into_iter().zip(published).enumerate() {
            let limit = visitor.limit(zenith(&moonless(&site, sun)), 0.0);
            let what = format!("{name}, Sun {sun}, Koomen 1952 and T&K 1953");
            assert_within(limit, expected, 0.5, &what);
            rows[i].extend([format!("{limit:.1}"), format!("{expected:.1}")]);
        }
    }
    let rows = rows.map(|row| <[String; 5]>::try_from(row).unwrap());
    let head = [
        "Sun, deg",
        "model, lowland",
        "published",
        "model, mountain",
        "published",
    ];
    assert_documented("limits", &table(head, &rows));
}

#[test] // the site file's own figure
fn the_darkest_zenith_is_the_sites() {
    for dark in [17.5, 20.4, 21.9] {
        let site = sky(0.11, 100.0, dark);
        let expected = luminance_from_mag_arcsec2(dark);
        assert_within(
            zenith(&moonless(&site, -40.0)) / expected,
            1.0,
            1e-4,
            "zenith at Sun -40",
        );
    }
}

/// Common practice: at 10 deg of altitude the natural sky is brighter than at the zenith by
/// some 0.5 to 1 mag.
#[test]
fn the_night_sky_brightens_towards_the_horizon() {
    let site = sky(0.06, 1000.0, 21.7);
    let glow = moonless(&site, -40.0);
    let ratio = glow.luminance(10f64.to_radians(), 1.0).night
        / glow.luminance(std::f64::consts::FRAC_PI_2, 1.0).night;
    let mag = 2.5 * ratio.log10();
    assert!((0.5..=1.0).contains(&mag), "{mag} mag");
}
