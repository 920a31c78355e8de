//! The young Moon, as an extended crescent, against sightings.

use crate::document::{assert_documented, table};
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
            let target = Target::moon(
                seen.magnitude.value().unwrap(),
                seen.phase_angle.degrees(),
                seen.diameter.arcsec(),
                place.altitude.radians(),
                place.azimuth.radians(),
            );
            let glow = site.at(sun.altitude.radians(), sun.azimuth.radians(), None);
            for (best, gaze) in margins.iter_mut().zip(&gazes) {
                *best = best.max(glow.margin(&target, gaze).margin_mag);
            }
            time += 2.0 * minute;
        }
        found.push(Evening { q, margins });
    }
    found
}

/// Evenings of one class, and how many of them an eye has the Moon in.
fn class(all: &[Evening], eye: usize, q: std::ops::Range<f64>) -> (usize, usize) {
    let class: Vec<&Evening> = all
        .iter()
        .filter(|evening| q.contains(&evening.q))
        .collect();
    let seen = class
        .iter()
        .filter(|evening| evening.margins[eye] >= 0.0)
        .count();
    (class.len(), seen)
}

#[test]
fn young_moons_are_seen_and_missed_as_yallop_classed_them() {
    let latitudes = [0.0, 25.0, 40.0, 52.0];
    let all: Vec<Evening> = latitudes.into_iter().flat_map(evenings).collect();
    let (visitor, keen) = (0, 1);
    let (count, seen) = class(&all, visitor, EASY..9.0);
    assert!(count > 300 && seen == count, "class A: {seen} of {count}");
    // By the unaided eye. (10x50 binoculars would show two in five of them, which Yallop's
    // class denies: shadowed cusps and unsteady air are not in the model.)
    for (eye, most) in [(visitor, 0.05), (keen, 0.15)] {
        let (count, seen) = class(&all, eye, -9.0..INVISIBLE);
        let part = seen as f64 / count as f64;
        assert!(count > 200 && part < most, "class F: {seen} of {count}");
        let (_, seen) = class(&all, eye, -9.0..INVISIBLE - 0.15);
        assert_eq!(seen, 0, "well within class F");
    }
    // Between the two the Moon is seen less and less often.
    let parts = [EASY, -0.014, -0.160, -0.232, INVISIBLE]
        .windows(2)
        .map(|edge| {
            let (count, seen) = class(&all, visitor, edge[1]..edge[0]);
            seen as f64 / count as f64
        });
    let parts: Vec<f64> = parts.collect();
    assert!(
        parts.windows(2).all(|pair| pair[0] >= pair[1]),
        "classes B to E: {parts:.2?}"
    );
    let edges = [
        ("A", 9.0),
        ("B", EASY),
        ("C", -0.014),
        ("D", -0.160),
        ("E", -0.232),
        ("F", INVISIBLE),
    ];
    let rows: Vec<[String; 5]> = (0..6)
        .map(|i| {
            let (name, high) = edges[i];
            let low = edges.get(i + 1).map_or(-9.0, |(_, low)| *low);
            let [visitor, keen, optics] = [0, 1, 2].map(|eye| class(&all, eye, low..high));
            let seen = [visitor, keen, optics].map(|(_, seen)| seen.to_string());
            let [visitor_seen, keen_seen, optics_seen] = seen;
            [
                name.to_owned(),
                visitor.0.to_string(),
                visitor_seen,
                keen_seen,
                optics_seen,
            ]
        })
        .collect();
    let head = ["class", "evenings", "visitor", "keen", "10x50"];
    assert_documented("moon", &table(head, &rows));
}
