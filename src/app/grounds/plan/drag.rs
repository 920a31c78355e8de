//! Handles of the thing selected, and what dragging one, or the thing itself, makes of the site.

use super::camera::Camera;
use super::geometry::{
    is_rectangle, mean, middle, minus, plus, quarter_turned, resized_rectangle, rounded, sides,
    turned, unit,
};
use super::snap::{Snap, Snapped};
use super::things::Form;
use crate::app::grounds::Selection;
use crate::place::{PlanPoint, Site};
use eframe::egui::{Pos2, vec2};

/// Where a thing is taken hold of.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Grip {
    /// Anywhere: it moves as a whole.
    Whole,
    /// A corner, or a point of its line.
    Corner(usize),
    /// The middle of a side, by its first corner: a new corner comes there.
    Side(usize),
    /// The rim of the circle around its point.
    Rim,
    /// The handle that turns it.
    Turn,
}

/// How near to a handle a press takes it, points of the screen.
pub const HANDLE_REACH: f32 = 9.0;

/// The handles of a thing and where they are drawn, those on top last.
pub fn handles(site: &Site, thing: Selection, camera: Camera) -> Vec<(Grip, Pos2)> {
    /// A side shorter than this on the screen has no handle in its middle.
    const LEAST_SIDE: f32 = 36.0;
    /// From the northernmost point up to the handle that turns.
    const TURN_ABOVE: f32 = 28.0;
    let points = thing.points(site);
    let mut handles = Vec::new();
    match thing.form(site) {
        Form::Point => {
            if let (Some(radius_m), Some(at)) = (thing.radius_m(site), points.first()) {
                let radius = camera.points(radius_m);
                // A pole's rim would lie under its own point.
                if radius > HANDLE_REACH {
                    let rim = camera.to_screen(*at) + vec2(radius, 0.0);
                    handles.push((Grip::Rim, rim));
                }
            }
        }
        form => {
            let is_closed = form == Form::Corners;
            for (index, (a, b)) in sides(&points, is_closed).into_iter().enumerate() {
                let (from, to) = (camera.to_screen(a), camera.to_screen(b));
                if from.distance(to) >= LEAST_SIDE {
                    handles.push((Grip::Side(index), camera.to_screen(middle(a, b))));
                }
            }
            if is_closed {
                let centre = camera.to_screen(mean(&points));
                let top = points.iter().map(|at| camera.to_screen(*at).y);
                let top = top.fold(f32::INFINITY, f32::min);
                handles.push((Grip::Turn, Pos2::new(centre.x, top - TURN_ABOVE)));
            }
            for (index, at) in points.iter().enumerate() {
                handles.push((Grip::Corner(index), camera.to_screen(*at)));
            }
        }
    }
    handles
}

/// The handle at a position of the screen.
pub fn handle_at(site: &Site, thing: Selection, camera: Camera, at: Pos2) -> Option<Grip> {
    handles(site, thing, camera)
        .into_iter()
        .rev()
        .filter(|(_, pos)| pos.distance(at) <= HANDLE_REACH)
        .min_by(|a, b| a.1.distance(at).total_cmp(&b.1.distance(at)))
        .map(|(grip, _)| grip)
}

/// A change that goes on while the pointer is held down.
#[derive(Clone, Debug)]
pub struct Drag {
    /// The site when it began; the change is always made from that.
    pub before: Site,
    /// What is changed.
    pub thing: Selection,
    grip: Grip,
    from: PlanPoint,
}

/// How the pointer's position is taken.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Manner {
    /// Whether it is drawn to things.
    pub snaps: bool,
    /// Whether a rectangle's corner moves alone.
    pub is_free: bool,
}

impl Drag {
    /// Takes hold of a thing at a point.
    pub fn begin(site: &Site, thing: Selection, grip: Grip, from: PlanPoint) -> Self {
        Self {
            before: site.clone(),
            thing,
            grip,
            from,
        }
    }

    /// The site with the pointer at a point, and what the position was drawn to.
    pub fn to(&self, to: PlanPoint, camera: Camera, manner: Manner) -> (Site, Option<Snapped>) {
        let snap = Snap::new(&self.before, Some(self.thing), camera, manner.snaps);
        let points = self.thing.points(&self.before);
        match self.grip {
            Grip::Whole => self.moved(&points, to, &snap),
            Grip::Corner(index) => self.reshaped(points, index, to, snap, manner),
            Grip::Side(index) => {
                let mut points = points;
                let index = (index + 1).min(points.len());
                points.insert(index, to);
                self.reshaped(points, index, to, snap, manner)
            }
            Grip::Rim => {
                let mut site = self.before.clone();
                if let Some(centre) = points.first() {
                    let step = 1.0 / camera.step_m();
                    let radius_m = (centre.distance_m(to) * step).round() / step;
                    self.thing.set_radius(&mut site, radius_m);
                }
                (site, None)
            }
            Grip::Turn => (self.turned(&points, to, manner), None),
        }
    }

    /// By its point nearest to where it was taken: that one is drawn to things.
    fn moved(&self, points: &[PlanPoint], to: PlanPoint, snap: &Snap) -> (Site, Option<Snapped>) {
        let by = minus(to, self.from);
        let nearest = points
            .iter()
            .min_by(|a, b| a.distance_m(self.from).total_cmp(&b.distance_m(self.from)));
        let Some(held) = nearest else {
            return (self.before.clone(), None);
        };
        let snapped = snap.at(plus(*held, by, 1.0));
        let by = minus(snapped.at, *held);
        let points: Vec<PlanPoint> = points
            .iter()
            .map(|point| rounded(plus(*point, by, 1.0), 0.001))
            .collect();
        let mut site = self.before.clone();
        self.thing.set_points(&mut site, &points);
        (site, Some(snapped))
    }

    fn reshaped(
        &self,
        mut points: Vec<PlanPoint>,
        index: usize,
        to: PlanPoint,
        snap: Snap,
        manner: Manner,
    ) -> (Site, Option<Snapped>) {
        let is_closed = self.thing.form(&self.before) == Form::Corners;
        let keeps_angles = is_closed && !manner.is_free && is_rectangle(&points);
        let snap = if keeps_angles {
            snap
        } else {
            snap.with_rays(right_angles(&points, index, is_closed))
        };
        let snapped = snap.at(to);
        if keeps_angles {
            points = resized_rectangle(&points, index, snapped.at)
                .into_iter()
                .map(|point| rounded(point, 0.001))
                .collect();
        } else if let Some(point) = points.get_mut(index) {
            *point = snapped.at;
        }
        let mut site = self.before.clone();
        self.thing.set_points(&mut site, &points);
        (site, Some(snapped))
    }

    /// About the mean of its corners, by whole steps of five degrees where it snaps.
    fn turned(&self, points: &[PlanPoint], to: PlanPoint, manner: Manner) -> Site {
        let centre = mean(points);
        let by_deg = (centre.bearing(to) - centre.bearing(self.from)).degrees();
        let step_deg = if manner.snaps { 5.0 } else { 0.1 };
        let by_deg = (by_deg / step_deg).round() * step_deg;
        let points: Vec<PlanPoint> = points
            .iter()
            .map(|point| rounded(turned(*point, centre, by_deg), 0.001))
            .collect();
        let mut site = self.before.clone();
        self.thing.set_points(&mut site, &points);
        site
    }
}

/// The lines on which a corner makes a right angle with, or goes straight on from, the sides that
/// end at its neighbours.
fn right_angles(
    points: &[PlanPoint],
    index: usize,
    is_closed: bool,
) -> Vec<(PlanPoint, PlanPoint)> {
    let count = points.len() as isize;
    let neighbour = |by: isize| {
        let at = index as isize + by;
        let at = if is_closed { at.rem_euclid(count) } else { at };
        usize::try_from(at).ok().and_then(|at| points.get(at))
    };
    let mut rays = Vec::new();
    for (near, far) in [(1, 2), (-1, -2)] {
        let (Some(near), Some(far)) = (neighbour(near), neighbour(far)) else {
            continue;
        };
        if let Some(along) = unit(minus(*near, *far)) {
            rays.push((*near, quarter_turned(along)));
            rays.push((*near, along));
        }
    }
    rays
}
