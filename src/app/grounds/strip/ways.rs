//! The bodies' ways across the sky in one half-night. They do not depend on what stands on the
//! grounds, so that they are kept while it is changed.

use crate::app::scene::Scene;
use crate::light::Standing;
use crate::measure::{Angle, Moment, search};
use crate::place::Skyline;
use crate::plan::Window;
use crate::sky::Body;

/// Seconds between points of a way: a degree of the sky's turning.
const STEP_S: f64 = 240.0;

/// Every bright body's way, in the order of [`Body::BRIGHT`].
#[derive(Clone, Debug, PartialEq)]
pub struct Ways {
    /// When the half-night starts.
    pub start: Moment,
    ways: Vec<(Body, Vec<Point>)>,
}

/// A body at one instant.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Point {
    /// Seconds after the half-night's start.
    pub at_s: f64,
    /// Azimuth.
    pub azimuth: Angle,
    /// Refracted altitude of the point that counts.
    pub altitude: Angle,
}

/// A part of the chosen body's way in one standing.
#[derive(Clone, Debug, PartialEq)]
pub struct Stretch {
    /// What the body is along it.
    pub standing: Standing,
    /// Its points, in time order.
    pub points: Vec<Point>,
}

impl Ways {
    /// The ways of a scene's half-night, sampled.
    pub fn new(scene: &Scene<'_>) -> Self {
        let (start, end) = scene.ends();
        let mut ways: Vec<(Body, Vec<Point>)> = Body::BRIGHT
            .iter()
            .map(|body| (*body, Vec::new()))
            .collect();
        for at_s in search::grid(0.0, end.seconds_since(start), STEP_S) {
            for (body, points) in &mut ways {
                points.push(point(scene, *body, start, at_s));
            }
        }
        Self { start, ways }
    }

    /// The ways themselves.
    pub fn all(&self) -> &[(Body, Vec<Point>)] {
        &self.ways
    }

    /// One body's way; empty for one that is not bright.
    pub fn of(&self, body: Body) -> &[Point] {
        let found = self.ways.iter().find(|(known, _)| *known == body);
        found.map_or(&[], |(_, points)| points)
    }

    /// The azimuths that the bodies which are seen at all pass while they are up, unwrapped:
    /// `from <= to`, degrees; `None` where none comes up.
    pub fn extent_deg(&self, body: Body) -> Option<(f64, f64)> {
        let mut found: Option<(f64, f64)> = None;
        let mut last_deg = 0.0;
        for point in self.of(body).iter().filter(|point| is_up(point)) {
            last_deg = match found {
                None => point.azimuth.degrees(),
                Some(_) => {
                    last_deg
                        + (point.azimuth - Angle::from_degrees(last_deg))
                            .signed()
                            .degrees()
                }
            };
            let (from, to) = found.unwrap_or((last_deg, last_deg));
            found = Some((from.min(last_deg), to.max(last_deg)));
        }
        found
    }
}

/// Where a body is at a time of the half-night.
pub fn point(scene: &Scene<'_>, body: Body, start: Moment, at_s: f64) -> Point {
    let epoch = scene.span.at(start.plus_seconds(at_s));
    let view = epoch.seen_by(scene.observer);
    let place = match body {
        Body::Moon => view.refracted_upper_limb(body),
        _ => view.refracted_place(body),
    };
    Point {
        at_s,
        azimuth: place.azimuth,
        altitude: place.altitude,
    }
}

/// Whether a point is above the horizon.
pub fn is_up(point: &Point) -> bool {
    point.altitude > Angle::ZERO
}

/// A way in its stretches above the horizon: plain within the windows, blocked behind the
/// skyline, else in too bright a sky. Neighbouring stretches share a point.
pub fn stretches(
    points: &[Point],
    start: Moment,
    windows: &[Window],
    skyline: &Skyline,
) -> Vec<Stretch> {
    let ends: Vec<(f64, f64)> = windows
        .iter()
        .map(|window| {
            let at_s = |moment: Moment| moment.seconds_since(start);
            (at_s(window.start.moment), at_s(window.end.moment))
        })
        .collect();
    let standing = |point: &Point| {
        if ends
            .iter()
            .any(|(from, to)| (*from..=*to).contains(&point.at_s))
        {
            Standing::Plain
        } else if !is_up(point) {
            Standing::Down
        } else if skyline.clearance(point.azimuth, point.altitude) <= Angle::ZERO {
            Standing::Blocked
        } else {
            Standing::WashedOut
        }
    };
    let mut all = points.to_vec();
    for at_s in ends.iter().flat_map(|(from, to)| [*from, *to]) {
        all.extend(between(points, at_s));
    }
    all.sort_by(|a, b| a.at_s.total_cmp(&b.at_s));
    let mut found: Vec<Stretch> = Vec::new();
    for pair in all.windows(2) {
        let middle = mix(&pair[0], &pair[1], 0.5);
        let standing = standing(&middle);
        match found.last_mut() {
            Some(last) if last.standing == standing && last.points.last() == Some(&pair[0]) => {
                last.points.push(pair[1]);
            }
            _ => found.push(Stretch {
                standing,
                points: vec![pair[0], pair[1]],
            }),
        }
    }
    found.retain(|stretch| stretch.standing != Standing::Down);
    found
}

fn between(points: &[Point], at_s: f64) -> Option<Point> {
    let after = points.partition_point(|point| point.at_s <= at_s);
    let (a, b) = (points.get(after.checked_sub(1)?)?, points.get(after)?);
    Some(mix(a, b, (at_s - a.at_s) / (b.at_s - a.at_s)))
}

fn mix(a: &Point, b: &Point, share: f64) -> Point {
    Point {
        at_s: a.at_s + (b.at_s - a.at_s) * share,
        azimuth: (a.azimuth + (b.azimuth - a.azimuth).signed() * share).wrapped(),
        altitude: a.altitude + (b.altitude - a.altitude) * share,
    }
}

#[cfg(test)]
mod tests {
    #![allow(clippy::unwrap_used)]
    use super::{Ways, stretches};
    use crate::app::lookout::staged::december_dawn;
    use crate::light::{Eye, Standing};
    use crate::plan::Half;
    use crate::sky::Body;

    #[test]
    fn the_plain_part_of_a_way_is_the_window() {
        let stage = december_dawn();
        let scene = stage.scene("2026-12-05T07:00:00");
        let ways = Ways::new(&scene);
        let windows = scene.night.body(Body::Venus).unwrap();
        let windows = windows.windows_in(Eye::Visitor, Half::Dawn);
        let found = stretches(ways.of(Body::Venus), ways.start, windows, scene.skyline);
        let plain: Vec<_> = found
            .iter()
            .filter(|stretch| stretch.standing == Standing::Plain)
            .collect();
        assert_eq!(plain.len(), windows.len());
        for (stretch, window) in plain.iter().zip(windows) {
            let (first, last) = (stretch.points[0], *stretch.points.last().unwrap());
            let at_s = |edge: crate::plan::Edge| edge.moment.seconds_since(ways.start);
            assert!((first.at_s - at_s(window.start)).abs() < 1e-6);
            assert!((last.at_s - at_s(window.end)).abs() < 1e-6);
        }
        let (from, to) = ways.extent_deg(Body::Venus).unwrap();
        // It rises south of east, and by noon, the end of the half, is past the south.
        assert!((90.0..120.0).contains(&from), "{from}");
        assert!((180.0..270.0).contains(&to), "{to}");
    }
}
