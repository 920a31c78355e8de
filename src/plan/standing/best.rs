//! The best places of a standing map, and the way to more minutes.

use super::{StandingMap, Stay};
use crate::measure::Angle;
use crate::place::PlanPoint;

/// Fewer minutes than this make no difference between two places.
const SAME_MINUTES: f64 = 0.1;

/// The nearest place that gives more.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Gain {
    /// The place.
    pub to: PlanPoint,
    /// How far off it is, m.
    pub distance_m: f64,
    /// In which azimuth.
    pub bearing: Angle,
    /// How many minutes more it gives.
    pub minutes: f64,
    /// What it gives.
    pub stay: Stay,
}

impl StandingMap {
    /// Up to so many places of the most minutes, none nearer than a distance to another. Of
    /// places that are as good as each other the one nearest to the site's mark comes first;
    /// places that give nothing are none.
    pub fn best_places(&self, count: usize, apart_m: f64) -> Vec<(PlanPoint, Stay)> {
        let mark = PlanPoint::new(0.0, 0.0);
        let steps = |stay: &Stay| (stay.minutes / SAME_MINUTES).round();
        let mut ranked: Vec<(PlanPoint, Stay)> =
            self.stays().filter(|(_, stay)| steps(stay) > 0.0).collect();
        ranked.sort_by(|a, b| {
            let by_distance = a.0.distance_m(mark).total_cmp(&b.0.distance_m(mark));
            steps(&b.1).total_cmp(&steps(&a.1)).then(by_distance)
        });
        let mut best: Vec<(PlanPoint, Stay)> = Vec::new();
        for place in ranked {
            if best.len() == count {
                break;
            }
            if best
                .iter()
                .all(|other| other.0.distance_m(place.0) >= apart_m)
            {
                best.push(place);
            }
        }
        best
    }

    /// The most minutes that any place gives.
    pub fn most_minutes(&self) -> f64 {
        self.stays()
            .fold(0.0, |most, (_, stay)| most.max(stay.minutes))
    }

    /// What it costs to stand somewhere else than at the best place, minutes; never below 0.
    pub fn cost_of(&self, stay: &Stay) -> f64 {
        (self.most_minutes() - stay.minutes).max(0.0)
    }

    /// The nearest place that gives at least so many minutes more than somebody at `from` has:
    /// how far, and which way. `None`: there is none.
    pub fn gain(&self, from: PlanPoint, here: &Stay, minutes: f64) -> Option<Gain> {
        let more = |stay: &Stay| stay.minutes - here.minutes;
        self.stays()
            .filter(|(_, stay)| more(stay) >= minutes)
            .min_by(|a, b| a.0.distance_m(from).total_cmp(&b.0.distance_m(from)))
            .map(|(to, stay)| Gain {
                to,
                distance_m: from.distance_m(to),
                bearing: from.bearing(to),
                minutes: more(&stay),
                stay,
            })
    }
}
