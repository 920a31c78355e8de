//! The young Moon, as an extended crescent, against sightings.

use crate::published::sky;
use dimmet::light::{Eye, Eyes, Optics, Target};
use dimmet::measure::{Angle, TimeScales, Tt};
use dimmet::sky::{Air, Body, Ephemeris, Observer};

/// Yallop 1997 (HM Nautical Almanac Office Technical Note 69, 295 sightings): q from the arc of
/// vision and the crescent's width in arcminutes, both degrees of airless altitude.
fn yallop_q(arc_of_vision_deg: f64, width_arcmin: f64) -> f64 {
    let w = width_arcmin;
    (arc_of_vision_deg - (11.8371 - 6.3226 * w + 0.7319 * w * w - 0.1018 * w * w * w)) / 10.0
}

/// Class A, easily visible to the unaided eye.
const EASY: f64 = 0.216;
/// Class F, not visible even with optical aid.
const INVISIBLE: f64 = -0.293;

struct Evening {
    q: f64,
    /// Best margins of the visitor, the keen eye and 10x50 binoculars.
    margins: [f64; 3],
    elongation_deg: f64,
}

/// The evenings around each new moon of ten years, seen from one latitude.
fn evenings(latitude_deg: f64) -> Vec<Evening> {
    let observer = Observer {
        latitude: Angle::from_degrees(latitude_deg),
        longitude: Angle::ZERO,
        elevation_m: 100.0,
        air: Air::default(),
    };
    let site = sky(0.08, 100.0, 21.7);
    let eyes = Eyes::default().with_instrument(Optics::default());
    let gazes = [Eye::Visitor, Eye::Keen, Eye::Optics].map(|eye| eyes.gaze(eye));
    let from = 9131.0;
    let days = 3650;
    let span = Ephemeris::new()
        .cover(
            Tt::from_days_since_j2000(from),
            Tt::from_days_since_j2000(from + f64::from(days) + 1.0),
            &[Body::Sun, Body::Moon],
        )
        .unwrap();
    let scales = TimeScales::new();
    let at = |days: f64| scales.moment_from_tt(Tt::from_days_since_j2000(days));
    let mut found = Vec::new();
    for number in 0..days {
        // The Moon near the Sun this evening, and east of it.
        let noon = from + f64::from(number);
        let epoch = span.at(at(noon + 0.27));
        let seen = epoch.appearance(Body::Moon);
        if seen.elongation.degrees() > 25.0 || !seen.is_east_of_sun {
            continue;
        }
        let altitudes = |days: f64| {
            let epoch = span.at(at(days));
            let view = epoch.seen_by(&observer);
            [Body::Sun, Body::Moon].map(|body| view.place(body).altitude.degrees())
        };
        let minute = 1.0 / 1440.0;
        let first_below = |index: usize, limit: f64, from: f64| {
            (0..600)
                .map(|m| from + f64::from(m) * minute)
                .find(|t| altitudes(*t)[index] < limit)
        };
        let Some(sunset) = first_below(0, -50.0 / 60.0, noon + 0.15) else {
            continue;
        };
        let Some(moonset) = first_below(1, -34.0 / 60.0, sunset) else {
            continue;
        };
        if moonset <= sunset + minute {
            continue;
        }
        // Yallop's best time: four ninths of the lag after sunset.
        let best = sunset + 4.0 / 9.0 * (moonset - sunset);
        let epoch = span.at(at(best));
        let view = epoch.seen_by(&observer);
        let [sun, moon] = [Body::Sun, Body::Moon].map(|body| view.place(body));
        let geocentric = epoch.appearance(Body::Moon);
        let apparent_radius = view.appearance(Body::Moon).diameter.degrees() * 30.0;
        let width = apparent_radius * (1.0 - geocentric.elongation.cos());
        // Geocentric arc of vision: parallax of the Moon put back.
        let parallax_deg = 57.0 / 60.0 * moon.altitude.cos();
        let q = yallop_q(
            (moon.altitude - sun.altitude).degrees() + parallax_deg,
            width,
        );
        let mut margins = [-99f64; 3];
        let mut time = sunset;
        while time < moonset {
            let epoch = span.at(at(time));
            let view = epoch.seen_by(&observer);
            let sun = view.place(Body::Sun);
            let place = view.refracted_place(Body::Moon);
            let seen = view.appearance(Body::Moon);
            let target = Target::point(
                seen.magnitude.value().unwrap(),
                place.altitude.radians(),
                place.azimuth.radians(),
            )
            .with_disc(seen.diameter.arcsec(), seen.illuminated_fraction)
            .without_moonlight();
            let glow = site.at(sun.altitude.radians(), sun.azimuth.radians(), None);
            for (best, gaze) in margins.iter_mut().zip(&gazes) {
                *best = best.max(glow.margin(&target, gaze).margin_mag);
            }
            time += 2.0 * minute;
        }
        found.push(Evening {
            q,
            margins,
            elongation_deg: geocentric.elongation.degrees(),
        });
    }
    found
}

#[test]
fn young_moons_are_seen_and_missed_as_yallop_classed_them() {
    let all: Vec<Evening> = [0.0, 25.0, 40.0, 52.0]
        .into_iter()
        .flat_map(evenings)
        .collect();
    for (name, low, high) in [
        ("A", EASY, 9.0),
        ("B", -0.014, EASY),
        ("C", -0.160, -0.014),
        ("D", -0.232, -0.160),
        ("E", INVISIBLE, -0.232),
        ("F", -9.0, INVISIBLE),
    ] {
        let class: Vec<&Evening> = all.iter().filter(|e| e.q > low && e.q <= high).collect();
        let part = |eye: usize| class.iter().filter(|e| e.margins[eye] >= 0.0).count();
        let mean =
            |eye: usize| class.iter().map(|e| e.margins[eye]).sum::<f64>() / class.len() as f64;
        let range = class
            .iter()
            .map(|e| e.elongation_deg)
            .fold((99f64, 0f64), |(a, b), e| (a.min(e), b.max(e)));
        println!(
            "{name}: {} evenings, visitor {} ({:.1}), keen {} ({:.1}), optics {} ({:.1}) elong {range:.1?}",
            class.len(),
            part(0),
            mean(0),
            part(1),
            mean(1),
            part(2),
            mean(2)
        );
    }
}
