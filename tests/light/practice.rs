//! The trade's own rules of thumb (common practice).

use crate::published::{moonless, sky};
use dimmet::light::{Eye, Eyes, Glow, SkyLight, Target};

fn usual() -> SkyLight {
    sky(0.11, 100.0, 21.0)
}

/// Part of the sky above 10 deg, by area, in which an eye sees a point of some magnitude.
fn part_of_sky(glow: &Glow<'_>, eye: Eye, magnitude: f64) -> f64 {
    let gaze = Eyes::default().gaze(eye);
    let (mut seen, mut all) = (0.0, 0.0);
    for i in 0..40 {
        let altitude = (10.0 + 2.0 * f64::from(i) + 1.0).to_radians();
        for j in 0..36 {
            let azimuth = (5.0 + 10.0 * f64::from(j)).to_radians();
            all += altitude.cos();
            if glow
                .margin(&Target::point(magnitude, altitude, azimuth), &gaze)
                .margin_mag
                >= 0.0
            {
                seen += altitude.cos();
            }
        }
    }
    seen / all
}

#[test] // by sunset only Venus and Jupiter for one whom nobody tells
fn a_passer_by_finds_only_venus_and_jupiter_by_sunset() {
    let site = usual();
    let gaze = Eyes::default().gaze(Eye::PasserBy);
    // 20 deg up and 30 deg from the Sun's azimuth; opposite the Sun for Jupiter at its best.
    let best = |glow: &Glow<'_>, magnitude: f64| {
        [(20.0, 30.0), (30.0, 60.0), (30.0, 90.0), (30.0, 150.0)]
            .map(|(altitude, azimuth): (f64, f64)| {
                glow.margin(
                    &Target::point(magnitude, altitude.to_radians(), azimuth.to_radians()),
                    &gaze,
                )
                .margin_mag
            })
            .into_iter()
            .fold(f64::MIN, f64::max)
    };
    let at_sunset = moonless(&site, -0.83);
    let soon = moonless(&site, -3.0);
    assert!(best(&at_sunset, -4.0) > 0.0, "Venus at sunset");
    assert!(best(&at_sunset, 0.0) < 0.0, "no star at sunset");
    assert!(best(&at_sunset, -1.0) < 0.0, "nor Mercury or Mars");
    assert!(best(&soon, -2.3) > 0.0, "Jupiter within minutes of it");
}

#[test]
fn stars_brighter_than_1_show_over_most_of_the_sky_at_minus_6() {
    let site = usual();
    let part = part_of_sky(&moonless(&site, -6.0), Eye::Visitor, 1.0);
    assert!(part > 0.5, "magnitude 1 in {part} of the sky");
    let part = part_of_sky(&moonless(&site, -3.0), Eye::Visitor, 1.0);
    assert!(part < 0.5, "at -3 already {part}");
}

#[test]
fn stars_brighter_than_4_show_at_minus_12() {
    let site = usual();
    let part = part_of_sky(&moonless(&site, -12.0), Eye::Visitor, 4.0);
    assert!(part > 0.5, "magnitude 4 in {part} of the sky");
    let part = part_of_sky(&moonless(&site, -6.0), Eye::Visitor, 4.0);
    assert!(part < 0.2, "at -6 already {part}");
}

#[test] // navigators' stars, magnitude 1.5 and brighter, through a sextant's small telescope
fn star_sights_can_be_taken_from_minus_3_to_minus_9() {
    let site = sky(0.11, 5.0, 21.5);
    let sextant = dimmet::light::Optics::new(30.0, 4.0, 0.7).unwrap();
    let gaze = Eyes::default().with_instrument(sextant).gaze(Eye::Optics);
    let margin = |sun: f64| {
        moonless(&site, sun)
            .margin(&Target::point(1.5, 0.8, 1.6), &gaze)
            .margin_mag
    };
    assert!(margin(-3.0) > 0.0, "{} at -3", margin(-3.0));
    assert!(margin(-9.0) > 0.0, "{} at -9", margin(-9.0));
    assert!(margin(2.0) < 1.5, "{} while the Sun is up", margin(2.0));
}

#[test]
fn venus_shows_by_day_in_clear_air_away_from_the_sun_and_not_in_haze_near_it() {
    let gaze = Eyes::default().gaze(Eye::Keen);
    let venus = |site: &SkyLight, from_sun_deg: f64| {
        // The Sun 40 deg up, Venus as high.
        let altitude = 40f64.to_radians();
        let half: f64 = (from_sun_deg / 2.0).to_radians();
        let azimuth = 2.0 * (half.sin() / altitude.cos()).asin();
        moonless(site, 40.0)
            .margin(&Target::point(-4.5, altitude, azimuth), &gaze)
            .margin_mag
    };
    let clear = sky(0.06, 300.0, 21.0);
    let hazy = sky(0.46, 50.0, 21.0);
    assert!(venus(&clear, 45.0) > 0.5, "clear: {}", venus(&clear, 45.0));
    assert!(
        venus(&hazy, 8.0) < 0.0,
        "hazy, 8 deg from the Sun: {}",
        venus(&hazy, 8.0)
    );
}
