//! What is worth saying of the terrain that a site's skyline was made from.

use super::Words;
use super::number::decimal;
use crate::place::{FarSkyline, PlanPoint, Site};

/// Less than this of the terrain may be unknown without a word.
const WORTH_A_WORD: f64 = 0.01;
/// From spots farther than this from the mark its terrain is only roughly theirs, m.
const ROUGH_FROM_M: f64 = 1000.0;

impl Words {
    /// What somebody should check: ground elsewhere than the site file has it, terrain that the
    /// tiles do not hold, voids in them, spots too far off for what was seen from the mark. Often
    /// nothing.
    pub fn terrain_remarks(&self, site: &Site, far: &FarSkyline) -> Vec<String> {
        let disagreement = far.disagreement_m(site.elevation_m).map(|off_m| {
            self.text_with::<&str>(
                "terrain-disagrees",
                &[
                    ("site", &site.name),
                    ("ground", &decimal(far.ground_m(), 0)),
                    ("stated", &decimal(site.elevation_m, 0)),
                    ("off", &decimal(off_m.abs(), 0)),
                ],
            )
        });
        let missing = [
            ("terrain-uncovered", far.uncovered_share()),
            ("terrain-voids", far.void_share()),
        ];
        let missing = missing
            .into_iter()
            .filter(|(_, share)| *share > WORTH_A_WORD)
            .map(|(id, share)| {
                let share = self.percent(share);
                self.text_with::<&str>(id, &[("site", &site.name), ("share", &share)])
            });
        let distance_m = |at: PlanPoint| at.distance_m(PlanPoint::new(0.0, 0.0));
        let far_off = site.spots.iter().filter_map(|spot| {
            let away_m = distance_m(spot.plan_point());
            (away_m > ROUGH_FROM_M).then(|| {
                self.text_with::<&str>(
                    "terrain-far-spot",
                    &[
                        ("site", &site.name),
                        ("spot", &spot.name),
                        ("away", &decimal(away_m / 1000.0, 1)),
                    ],
                )
            })
        });
        disagreement
            .into_iter()
            .chain(missing)
            .chain(far_off)
            .collect()
    }
}
