//! Where to stand, in words.

use super::{Words, decimal};
use crate::place::{PlanPoint, Site, Spot, Stature};
use crate::plan::standing::WhyLeftOut;
use crate::plan::{Patch, PatchStay};

impl Words {
    /// A number of minutes within a sentence, rounded to whole ones.
    fn minutes(&self, minutes: f64) -> String {
        let whole = decimal(minutes, 0);
        let count = match whole.as_str() {
            "0" => "none",
            "1" => "one",
            _ => "many",
        };
        self.text_with(
            "minutes-long",
            &[("minutes", whole.as_str()), ("count", count)],
        )
    }

    /// Why nobody is to stand at a place.
    pub fn left_out(&self, site: &Site, at: PlanPoint, why: WhyLeftOut) -> String {
        match why {
            WhyLeftOut::Outside => self.text("square-outside"),
            WhyLeftOut::Excluded => {
                let label = site.exclusion_at(at).map_or("", |part| &part.label);
                self.text_with("square-excluded", &[("label", label)])
            }
            WhyLeftOut::InObstacle => {
                let mut around = site.obstacles.iter();
                let label = around
                    .find(|obstacle| obstacle.surrounds(at))
                    .map(|obstacle| obstacle.label());
                let label = label.unwrap_or_default();
                self.text_with("square-in-obstacle", &[("label", label)])
            }
        }
    }

    /// Who of a crowd on a spot's patch is worst off, and who is in the middle: where they stand,
    /// how tall they are, how many minutes they have.
    pub fn patch(&self, spot: &Spot, patch: Option<&Patch>) -> String {
        let Some(patch) = patch else {
            return self.text("patch-nobody");
        };
        let one = |stay: &PatchStay| {
            [
                ("who", self.stature(stay.stature)),
                ("place", self.patch_place(spot, stay.at)),
                ("minutes", self.minutes(stay.stay.minutes)),
            ]
        };
        let worst = self.text_with("patch-worst", &one(&patch.worst));
        let median = self.text_with("patch-median", &one(&patch.median));
        format!("{worst} {median}")
    }

    /// Somebody of a stature within a sentence.
    fn stature(&self, stature: Stature) -> String {
        self.text(match stature {
            Stature::Adult => "patch-adult",
            Stature::Child => "patch-child",
            Stature::Wheelchair => "patch-wheelchair",
        })
    }

    fn patch_place(&self, spot: &Spot, at: PlanPoint) -> String {
        let middle = spot.plan_point();
        if middle == at {
            return self.text("patch-place-middle");
        }
        let bearing = middle.bearing(at);
        self.text_with(
            "patch-place",
            &[
                ("metres", decimal(middle.distance_m(at), 0)),
                ("direction", self.direction(bearing)),
                ("degrees", self.degrees(bearing, 0)),
            ],
        )
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::plan::standing::Stay;

    #[test]
    fn a_crowd_is_told_who_is_worst_off() {
        let words = Words::english();
        let one = |at, stature, minutes| PatchStay {
            at,
            stature,
            stay: Stay {
                minutes,
                ..Stay::default()
            },
        };
        let spot = Spot::mark();
        let patch = Patch {
            middle: None,
            worst: one(PlanPoint::new(0.0, 6.0), Stature::Child, 21.2),
            median: one(PlanPoint::new(0.0, 0.0), Stature::Adult, 27.0),
            places: 19,
        };
        assert_eq!(
            words.patch(&spot, Some(&patch)),
            "Worst off is a child 6 m to the north (0°) of the patch’s middle: 21 minutes. In the middle \
             of the ranking is an adult in the middle of the patch: 27 minutes."
        );
    }
}
