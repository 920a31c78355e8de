//! Changing the site: every change is a whole new site in place of the old one, so that undoing
//! is putting the old one back.

use super::{Motion, State};
use crate::place::{FarSkyline, Site};
use std::sync::Arc;

/// Changes kept for undoing.
const MOST_STEPS: usize = 500;

/// The sites that the present one came from, and those that were undone.
#[derive(Debug, Default)]
pub struct History {
    undo: Vec<Arc<Site>>,
    redo: Vec<Arc<Site>>,
    /// The site before the change that is still going on.
    before_drag: Option<Arc<Site>>,
    /// Whether the site differs from its file.
    is_unsaved: bool,
    /// Why the last change was refused.
    refusal: Option<String>,
}

impl State {
    /// Whether there is a change to undo.
    pub fn can_undo(&self) -> bool {
        !self.history.undo.is_empty()
    }
    /// Whether there is an undone change to do again.
    pub fn can_redo(&self) -> bool {
        !self.history.redo.is_empty()
    }
    /// Whether a change still goes on, as while something is dragged.
    pub fn is_dragging(&self) -> bool {
        self.history.before_drag.is_some()
    }
    /// Why the last change was refused, if it was.
    pub fn refusal(&self) -> Option<&str> {
        self.history.refusal.as_deref()
    }
    /// Whether the site differs from its file; and takes note that it is about to be written.
    pub fn take_unsaved(&mut self) -> bool {
        std::mem::take(&mut self.history.is_unsaved)
    }
    /// Takes note that the site could not be written.
    pub fn still_unsaved(&mut self) {
        self.history.is_unsaved = true;
    }

    /// Shows a change that goes on, as while something is dragged. A site that cannot be is
    /// refused and nothing changes.
    pub(super) fn drag_site(&mut self, site: Site) {
        self.motion = Motion::Still;
        if let Err(error) = site.check_rules() {
            self.history.refusal = Some(error.to_string());
            return;
        }
        self.history.refusal = None;
        if self.history.before_drag.is_none() {
            self.history.before_drag = Some(Arc::new(self.site().clone()));
        }
        self.put_site(site);
    }

    /// Ends the change that went on: from here on it can be undone, and wants saving.
    pub(super) fn end_drag(&mut self) {
        let Some(before) = self.history.before_drag.take() else {
            return;
        };
        if *before == *self.site() {
            return;
        }
        self.history.undo.push(before);
        if self.history.undo.len() > MOST_STEPS {
            self.history.undo.remove(0);
        }
        self.history.redo.clear();
        self.history.is_unsaved = true;
    }

    /// A change done in one step.
    pub(super) fn edit_site(&mut self, site: Site) {
        self.end_drag();
        self.drag_site(site);
        self.end_drag();
    }

    pub(super) fn undo(&mut self) {
        self.end_drag();
        if let Some(before) = self.history.undo.pop() {
            self.history.redo.push(Arc::new(self.site().clone()));
            self.put_back(&before);
        }
    }

    pub(super) fn redo(&mut self) {
        self.end_drag();
        if let Some(after) = self.history.redo.pop() {
            self.history.undo.push(Arc::new(self.site().clone()));
            self.put_back(&after);
        }
    }

    fn put_back(&mut self, site: &Site) {
        self.history.is_unsaved = true;
        self.history.refusal = None;
        self.put_site(site.clone());
    }

    /// Puts what the terrain makes of the skyline into the site; no change of it to be undone.
    pub fn set_far(&mut self, far: Option<Arc<FarSkyline>>) {
        let site = Site {
            far,
            ..self.site().clone()
        };
        self.sites.replace(self.site, site);
        self.choose_haze(self.haze);
        self.show_behind();
    }

    fn put_site(&mut self, site: Site) {
        // What an older step knew of the terrain may be less than is known now.
        let site = Site {
            far: self.site().far.clone(),
            ..site
        };
        let has_same_sky = same_sky(self.site(), &site);
        self.spot = self.spot.min(site.spots.len().saturating_sub(1));
        self.sites.replace(self.site, site);
        self.choose_haze(self.haze);
        if has_same_sky {
            self.show_behind();
        } else {
            self.show_edited();
        }
    }

    pub(super) fn forget_history(&mut self) {
        self.history = History::default();
    }
}

/// Whether two sites differ at most in what stands on the grounds and who stands where: then a
/// night that was gone through for one holds for the other.
fn same_sky(one: &Site, other: &Site) -> bool {
    one.latitude_deg == other.latitude_deg
        && one.longitude_deg == other.longitude_deg
        && one.elevation_m == other.elevation_m
        && one.time_zone == other.time_zone
        && one.air == other.air
        && one.sky == other.sky
        && one.eyes == other.eyes
        && one.kit == other.kit
}
