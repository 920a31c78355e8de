//! Putting measured points into the skyline of the spot that they were measured from.

use super::{Desk, Outcome, done};
use crate::app::command::Commands;
use crate::place::survey::compass::{Sweep, merged};
use crate::place::{MeasuredUse, Sector, Site, SkylinePoint, Spot};

/// New points for the chosen spot's measured skyline.
pub struct NewPoints {
    /// In ascending azimuth.
    pub points: Vec<SkylinePoint>,
    /// The part of the horizon that they describe.
    pub sweep: Sweep,
    /// Whether what was measured is so far away that it is the same from every spot.
    pub is_far: bool,
}

/// Puts them in.
pub fn put(desk: &Desk<'_>, new: NewPoints, commands: &mut Commands) -> Outcome {
    let mut site = desk.state.site().clone();
    let spot = desk.state.spot_index();
    let count = new.points.len().to_string();
    let sector = sector(new.sweep);
    // A spot's own skyline counts in place of what is far: it begins with that.
    let is_first = matches!(
        site.measured_use(desk.state.spot()),
        MeasuredUse::FarPartsOnly { .. }
    );
    let before = is_first.then(|| site.far_points());
    let (points, far) = measured_of(&mut site, spot);
    if let Some(before) = before {
        *points = before;
    }
    *points = merged(points, &new.points, new.sweep);
    if new.is_far {
        far.extend(sector);
    }
    let said = desk.words.text_with(
        "points-put-in",
        &[
            ("count", count.as_str()),
            ("spot", desk.state.spot().name.as_str()),
        ],
    );
    done(site, said, commands)
}

/// The sweep as a sector; single points make none.
fn sector(sweep: Sweep) -> Option<Sector> {
    match sweep {
        // From a point round to itself.
        Sweep::Whole => Some(Sector {
            from_deg: 0.0,
            to_deg: 0.0,
        }),
        Sweep::Sector { from_deg, to_deg } if from_deg != to_deg => {
            Some(Sector { from_deg, to_deg })
        }
        Sweep::Sector { .. } | Sweep::Points => None,
    }
}

/// The measured skyline that belongs to a spot, and where it is far: the site's own at the mark,
/// the spot's elsewhere.
pub fn measured_of(site: &mut Site, spot: usize) -> (&mut Vec<SkylinePoint>, &mut Vec<Sector>) {
    let has_own = |spot: &&mut Spot| !spot.skyline.is_empty() || !spot.is_mark();
    match site.spots.get_mut(spot).filter(has_own) {
        Some(spot) => (&mut spot.skyline, &mut spot.skyline_far),
        None => (&mut site.skyline, &mut site.skyline_far),
    }
}
