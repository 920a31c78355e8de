//! The chosen body's path through the half-night, on the screen.

use super::camera::Camera;
use crate::app::lookout::model::{Sample, Tick, between};
use crate::light::Standing;
use crate::measure::Angle;
use eframe::egui::{Pos2, Vec2, vec2};

/// A stretch of the path in one standing.
#[derive(Clone, Debug, PartialEq)]
pub struct Stretch {
    /// What the body is along it.
    pub standing: Standing,
    /// Its points, in time order.
    pub points: Vec<Pos2>,
}

/// The path's stretches, without what lies below the horizon. A stretch begins at the point at
/// which the last one ends, except where the path leaves the view on one side and comes back on
/// the other.
pub fn stretches(camera: &Camera, samples: &[Sample]) -> Vec<Stretch> {
    /// A step of azimuth that only a jump from one edge of the view to the other makes, or a
    /// passage over the zenith, which has no line here.
    const JUMP_DEG: f64 = 90.0;
    let mut found: Vec<Stretch> = Vec::new();
    let mut last: Option<(f64, Pos2)> = None;
    for sample in samples {
        if sample.standing == Standing::Down {
            last = None;
            continue;
        }
        let beside_deg = camera.beside_deg(sample.azimuth);
        let pos = camera.pos_beside(beside_deg, sample.altitude.degrees());
        let joined = last.filter(|(last_deg, _)| (beside_deg - last_deg).abs() < JUMP_DEG);
        match (joined, found.last_mut()) {
            (Some(_), Some(stretch)) if stretch.standing == sample.standing => {
                stretch.points.push(pos);
            }
            (Some((_, before)), Some(stretch)) => {
                // The change falls between two samples: half a minute is a hair's breadth.
                let middle = before.lerp(pos, 0.5);
                stretch.points.push(middle);
                found.push(Stretch {
                    standing: sample.standing,
                    points: vec![middle, pos],
                });
            }
            _ => found.push(Stretch {
                standing: sample.standing,
                points: vec![pos],
            }),
        }
        last = Some((beside_deg, pos));
    }
    found.retain(|stretch| stretch.points.len() > 1);
    found
}

/// A tick across the path.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct PathTick {
    /// When.
    pub tick: Tick,
    /// Where on the path.
    pub at: Pos2,
    /// Across the path, upwards, of length 1.
    pub across: Vec2,
    /// What the body is there.
    pub standing: Standing,
}

/// The ticks that fall on the path above the horizon and inside the view.
pub fn path_ticks(camera: &Camera, samples: &[Sample], ticks: &[Tick]) -> Vec<PathTick> {
    ticks
        .iter()
        .filter_map(|tick| {
            let after = samples.partition_point(|sample| sample.at_s <= tick.at_s);
            let (a, b) = (samples.get(after.checked_sub(1)?)?, samples.get(after)?);
            let share = (tick.at_s - a.at_s) / (b.at_s - a.at_s);
            let azimuth = a.azimuth + (b.azimuth - a.azimuth).signed() * share;
            let altitude = between(&[*a, *b], tick.at_s, |sample| sample.altitude);
            let at = camera.pos(azimuth, altitude);
            let along = camera.pos(b.azimuth, b.altitude) - camera.pos(a.azimuth, a.altitude);
            let across = match along.normalized() {
                unit if unit == Vec2::ZERO => vec2(0.0, -1.0),
                unit if unit.x >= 0.0 => vec2(unit.y, -unit.x),
                unit => vec2(-unit.y, unit.x),
            };
            let shows =
                a.standing != Standing::Down && altitude > Angle::ZERO && camera.rect.contains(at);
            shows.then_some(PathTick {
                tick: *tick,
                at,
                across,
                standing: a.standing,
            })
        })
        .collect()
}

#[cfg(test)]
mod tests {
    #![allow(clippy::unwrap_used)]
    use super::{path_ticks, stretches};
    use crate::app::lookout::horizon::camera::Camera;
    use crate::app::lookout::model::{Sample, Tick};
    use crate::light::Standing;
    use crate::measure::Angle;
    use eframe::egui::{Rect, pos2};

    fn camera() -> Camera {
        Camera {
            rect: Rect::from_min_max(pos2(0.0, 0.0), pos2(800.0, 400.0)),
            middle_deg: 0.0,
            bottom_deg: 0.0,
            points_per_deg: 10.0,
        }
    }

    fn sample(minute: usize, azimuth_deg: f64, standing: Standing) -> Sample {
        Sample {
            at_s: 60.0 * minute as f64,
            azimuth: Angle::from_degrees(azimuth_deg).wrapped(),
            altitude: Angle::from_degrees(20.0),
            counting: Angle::ZERO,
            clearance: Angle::ZERO,
            sun_altitude: Angle::ZERO,
            margins_mag: [0.0; 4],
            spread_mag: (0.0, 0.0),
            standing,
        }
    }

    #[test]
    fn a_path_across_north_stays_in_one_stretch() {
        let samples: Vec<_> = (0..10)
            .map(|k| sample(k, 358.0 + 0.5 * k as f64, Standing::Plain))
            .collect();
        let found = stretches(&camera(), &samples);
        assert_eq!(found.len(), 1, "{found:?}");
        assert!(found[0].points.windows(2).all(|pair| pair[1].x > pair[0].x));
    }

    #[test]
    fn a_path_behind_the_viewer_is_cut_where_it_changes_sides() {
        let samples: Vec<_> = (0..10)
            .map(|k| sample(k, 178.0 + 0.5 * k as f64, Standing::Plain))
            .collect();
        assert_eq!(stretches(&camera(), &samples).len(), 2);
    }

    #[test]
    fn standings_follow_one_another_without_a_gap() {
        let standings = [
            Standing::Blocked,
            Standing::Plain,
            Standing::WashedOut,
            Standing::Down,
        ];
        let samples: Vec<_> = (0..16)
            .map(|k| sample(k, 10.0 - 0.2 * k as f64, standings[k / 4]))
            .collect();
        let found = stretches(&camera(), &samples);
        let kinds: Vec<_> = found.iter().map(|stretch| stretch.standing).collect();
        assert_eq!(kinds, standings[..3]);
        for pair in found.windows(2) {
            assert_eq!(pair[0].points.last(), pair[1].points.first());
        }
    }

    #[test]
    fn ticks_lie_on_the_path_and_point_up() {
        let samples: Vec<_> = (0..30)
            .map(|k| sample(k, 10.0 - 0.2 * k as f64, Standing::Plain))
            .collect();
        let tick = Tick {
            at_s: 600.0,
            minute: 0,
        };
        let found = path_ticks(&camera(), &samples, &[tick]);
        assert_eq!(found.len(), 1);
        assert!((found[0].at.x - 480.0).abs() < 1e-3, "{found:?}");
        assert!(found[0].across.y < -0.99, "{found:?}");
    }
}
