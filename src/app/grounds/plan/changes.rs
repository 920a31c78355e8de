//! Selecting, removing and copying, by whatever control.

use crate::app::command::{Command, Commands};
use crate::app::grounds::{Desk, Selection};
use crate::place::PlanPoint;

/// Selects a thing; a spot becomes the spot of the whole window.
pub fn select(
    selection: &mut Option<Selection>,
    thing: Option<Selection>,
    desk: &Desk<'_>,
    commands: &mut Commands,
) {
    *selection = thing;
    if let Some(Selection::Spot(index)) = thing
        && index != desk.state.spot_index()
    {
        commands.push(Command::ChooseSpot(index));
    }
}

/// Removes a thing; the spot of the window stays the same one where it can.
pub fn remove(
    thing: Selection,
    selection: &mut Option<Selection>,
    desk: &Desk<'_>,
    commands: &mut Commands,
) {
    let Some(rest) = thing.removed(desk.state.site()) else {
        return;
    };
    let is_right = rest.check_rules().is_ok();
    commands.push(Command::EditSite(Box::new(rest)));
    if is_right {
        *selection = None;
        let chosen = desk.state.spot_index();
        if let Selection::Spot(gone) = thing
            && gone < chosen
        {
            commands.push(Command::ChooseSpot(chosen - 1));
        }
    }
}

/// Copies a thing a little to the south-east and selects the copy.
pub fn duplicate(
    thing: Selection,
    selection: &mut Option<Selection>,
    desk: &Desk<'_>,
    commands: &mut Commands,
) {
    const ASIDE_M: f64 = 3.0;
    // Farther than it is wide, or a copied footprint would lie over the first.
    let site = desk.state.site();
    let aside_m = ASIDE_M.max(2.0 * thing.radius_m(site).unwrap_or(0.0));
    let by = PlanPoint::new(aside_m, -aside_m);
    if let Some((more, copy)) = thing.duplicated(site, by) {
        let is_right = more.check_rules().is_ok();
        commands.push(Command::EditSite(Box::new(more)));
        if is_right {
            select(selection, Some(copy), desk, commands);
        }
    }
}
