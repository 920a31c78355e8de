//! A skyline as it is drawn and named.

use super::Skyline;
use super::blocker::Source;
use super::stretch::Shape;
use crate::measure::{Angle, search};
use std::f64::consts::TAU;
use std::sync::Arc;

/// A visible stretch of one labelled obstacle, for naming it in a view.
#[derive(Clone, Debug, PartialEq)]
pub struct Feature {
    /// The obstacle's label.
    pub label: Arc<str>,
    /// Azimuth of the stretch's middle, [0°, 360°).
    pub azimuth: Angle,
    /// How much azimuth it takes.
    pub width: Angle,
    /// Its highest altitude, as far as it is seen.
    pub top: Angle,
}

/// Radians between points of what is drawn, not finer than anything can show.
fn step_rad(step: Angle) -> f64 {
    const FINEST: f64 = 1e-4;
    step.radians().max(FINEST)
}

/// One of a skyline's edges once round.
pub(super) fn line(
    skyline: &Skyline,
    step: Angle,
    edge: impl Fn(usize) -> Shape,
) -> Vec<(Angle, Angle)> {
    let stack = skyline.stack();
    let mut points = Vec::new();
    for (index, column) in stack.columns.iter().enumerate() {
        let (shape, to) = (edge(index), stack.end(index));
        for at in search::grid(column.from, to, step_rad(step)) {
            // The last of a grid may overshoot its end by rounding.
            let at = at.min(to);
            let point = point(&shape, at);
            if points.last() != Some(&point) {
                points.push(point);
            }
        }
    }
    points
}

fn point(shape: &Shape, at: f64) -> (Angle, Angle) {
    (
        Angle::from_radians(at),
        Angle::from_radians(shape.altitude(at).max(0.0)),
    )
}

/// What hangs without sky in it, over one column: lower and upper edge.
fn hanging(skyline: &Skyline, index: usize) -> Vec<(Shape, Shape)> {
    let mut hanging: Vec<(Shape, Shape)> = Vec::new();
    for layer in skyline.stack().layers(index) {
        match hanging.last_mut() {
            Some((_, top)) if *top == layer.bottom => *top = layer.top,
            _ => hanging.push((layer.bottom, layer.top)),
        }
    }
    hanging
}

/// Closed outlines of what hangs over the floor.
pub(super) fn crowns(skyline: &Skyline, step: Angle) -> Vec<Vec<(Angle, Angle)>> {
    let stack = skyline.stack();
    let mut crowns: Vec<Strip> = Vec::new();
    // Which of them the last column's parts belong to.
    let mut open: Vec<usize> = Vec::new();
    for (index, column) in stack.columns.iter().enumerate() {
        let hanging = hanging(skyline, index);
        // Where one splits or two join, all begin anew.
        if hanging.len() != open.len() {
            open = (crowns.len()..crowns.len() + hanging.len()).collect();
            crowns.extend(hanging.iter().map(|_| Strip::default()));
        }
        for (crown, (bottom, top)) in open.iter().zip(hanging) {
            for at in search::grid(column.from, stack.end(index), step_rad(step)) {
                let at = at.min(stack.end(index));
                crowns[*crown].upper.push(point(&top, at));
                crowns[*crown].lower.push(point(&bottom, at));
            }
        }
    }
    crowns.into_iter().map(Strip::outline).collect()
}

#[derive(Default)]
struct Strip {
    upper: Vec<(Angle, Angle)>,
    lower: Vec<(Angle, Angle)>,
}

impl Strip {
    fn outline(mut self) -> Vec<(Angle, Angle)> {
        self.upper.extend(self.lower.into_iter().rev());
        self.upper
    }
}

/// Neighbouring columns that show one obstacle.
struct Run {
    from: f64,
    to: f64,
    top: f64,
    source: Source,
}

/// The labelled stretches in ascending azimuth.
pub(super) fn features(skyline: &Skyline) -> Vec<Feature> {
    let mut done: Vec<Run> = Vec::new();
    let mut open: Vec<Run> = Vec::new();
    let stack = skyline.stack();
    for (index, column) in stack.columns.iter().enumerate() {
        let (from, to) = (column.from, stack.end(index));
        let layers = stack
            .layers(index)
            .iter()
            .map(|layer| (layer.top, layer.source));
        for (shape, source) in layers.chain([(column.floor, column.source)]) {
            if !matches!(source, Source::Obstacle(_)) {
                continue;
            }
            let top = shape.highest(from, to);
            match open.iter_mut().find(|run| run.source == source) {
                Some(run) => {
                    run.to = to;
                    run.top = run.top.max(top);
                }
                None => open.push(Run {
                    from,
                    to,
                    top,
                    source,
                }),
            }
        }
        done.extend(open.extract_if(.., |run| run.to < to));
    }
    done.extend(open);
    join_across_north(&mut done);
    let mut features: Vec<Feature> = done
        .into_iter()
        .filter_map(|run| {
            Some(Feature {
                label: skyline.blocker_of(run.source).label()?.into(),
                azimuth: Angle::from_radians(0.5 * (run.from + run.to)).wrapped(),
                width: Angle::from_radians(run.to - run.from),
                top: Angle::from_radians(run.top),
            })
        })
        .collect();
    features.sort_by(|a, b| a.azimuth.radians().total_cmp(&b.azimuth.radians()));
    features
}

/// A run across north was cut there.
fn join_across_north(runs: &mut Vec<Run>) {
    let starting: Vec<Run> = runs
        .extract_if(.., |run| run.from == 0.0 && run.to < TAU)
        .collect();
    for first in starting {
        let ending = |run: &&mut Run| run.to == TAU && run.from > 0.0 && run.source == first.source;
        match runs.iter_mut().find(ending) {
            Some(last) => {
                last.to += first.to;
                last.top = last.top.max(first.top);
            }
            None => runs.push(first),
        }
    }
}
