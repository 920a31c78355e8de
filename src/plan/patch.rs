//! The answer for a crowd: not everybody stands in the middle, and not everybody is tall.

use super::standing::{Cell, Standing, Stay};
use crate::measure::Angle;
use crate::place::{PlanPoint, Spot, Stature};

/// Somebody of a crowd: where, how tall, and what is seen from there.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct PatchStay {
    /// The place.
    pub at: PlanPoint,
    /// Whose eyes.
    pub stature: Stature,
    /// What they have.
    pub stay: Stay,
}

/// What a crowd on a patch has of a body.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Patch {
    /// An adult in its middle; `None` where nobody is to stand there.
    pub middle: Option<Stay>,
    /// Whoever has the fewest minutes; of equals the one met first from the middle outwards.
    pub worst: PatchStay,
    /// Whoever is in the middle when all are ranked by their minutes (of an even number the
    /// lesser).
    pub median: PatchStay,
    /// How many places were looked at, each with every stature.
    pub places: usize,
}

/// What a crowd on a spot's patch has: people of every stature on its places.
///
/// `None`: nobody is to stand on any of them.
pub fn patch(standing: &Standing<'_>, spot: &Spot) -> Option<Patch> {
    let spots: Vec<Spot> = places(spot)
        .into_iter()
        .filter(|at| !matches!(standing.cell(*at), Cell::LeftOut(_)))
        .map(|at| Spot {
            east_m: at.east_m,
            north_m: at.north_m,
            ..spot.clone()
        })
        .collect();
    let mut crowd: Vec<PatchStay> = spots
        .iter()
        .flat_map(|spot| {
            Stature::ALL.map(|stature| PatchStay {
                at: spot.plan_point(),
                stature,
                stay: standing.stay_at_spot(spot, stature),
            })
        })
        .collect();
    let middle = crowd
        .iter()
        .find(|one| one.at == spot.plan_point() && one.stature == Stature::Adult)
        .map(|one| one.stay);
    // A stable sort: equals stay in their order.
    crowd.sort_by(|a, b| a.stay.minutes.total_cmp(&b.stay.minutes));
    Some(Patch {
        middle,
        worst: *crowd.first()?,
        median: *crowd.get((crowd.len() - 1) / 2)?,
        places: spots.len(),
    })
}

/// The places of a spot's patch: its middle, and two rings.
fn places(spot: &Spot) -> Vec<PlanPoint> {
    let middle = spot.plan_point();
    let mut places = vec![middle];
    let Some(radius_m) = spot.radius_m else {
        return places;
    };
    for (part, count) in [(0.5, 6), (1.0, 12)] {
        places.extend((0..count).map(|k| {
            let bearing = Angle::from_degrees(360.0 / f64::from(count) * f64::from(k));
            PlanPoint::new(
                middle.east_m + part * radius_m * bearing.sin(),
                middle.north_m + part * radius_m * bearing.cos(),
            )
        }));
    }
    places
}
