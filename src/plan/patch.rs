//! The answer for a crowd: not everybody stands in the middle, and not everybody is tall.

use super::standing::{Standing, Stay};
use crate::place::{MeasuredUse, PlanPoint, Spot, Stature};

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

/// What a crowd on a spot's patch has: people of every stature on its places ([`Site::patch`]),
/// all on the spot's own ground (a terrace, a slope) and behind the skyline measured there.
///
/// `None`: there is no place on it.
///
/// [`Site::patch`]: crate::place::Site::patch
pub fn patch(standing: &Standing<'_>, spot: &Spot) -> Option<Patch> {
    let site = standing.request().site;
    // What was measured from a patch's middle holds for all of it.
    let skyline = match site.measured_use(spot) {
        MeasuredUse::Mark => &site.skyline,
        _ => &spot.skyline,
    };
    let spots: Vec<Spot> = site
        .patch(spot)
        .into_iter()
        .map(|at| Spot {
            east_m: at.east_m,
            north_m: at.north_m,
            skyline: skyline.clone(),
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
