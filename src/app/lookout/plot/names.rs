//! What is written in the plot: what the dashed line means, which part is daylight, and the
//! eyes' names at the ends of their curves.

use super::colour;
use super::model::Model;
use crate::app::lookout::says::Says;
use crate::app::palette::Look;
use crate::app::scene::Scene;
use crate::light::Eye;
use eframe::egui::{Align2, FontId, Galley, Pos2, Rect, Ui, Vec2, pos2};
use std::sync::Arc;

/// Between a curve's end and its name.
const GAP: f32 = 6.0;

/// Room right of the frame for the longest name.
pub fn room(ui: &Ui, look: &Look, says: Says<'_>) -> f32 {
    let font = look.bold(look.sizes.least);
    let width = |eye| {
        let name = says.text("plot-off-the-top", &[("eye", &says.eye(eye))]);
        let galley = ui
            .painter()
            .layout_no_wrap(name, font.clone(), look.colours.lesser);
        galley.size().x
    };
    Eye::ALL.into_iter().map(width).fold(0.0, f32::max) + 2.0 * GAP
}

/// Writes into and beside the plot's frame.
pub fn paint(
    ui: &Ui,
    scene: &Scene<'_>,
    says: Says<'_>,
    model: &Model,
    frame: Rect,
    screen: impl Fn([f64; 2]) -> Pos2,
) {
    let look = &scene.look;
    let painter = ui.painter();
    let names = eyes(ui, scene, says, model, frame, &screen);
    let written = names.iter().flat_map(|(at, name)| {
        let place = Rect::from_min_size(*at, name.size());
        [place.left_center(), place.center(), place.right_center()]
    });
    let points: Vec<Pos2> = model
        .curves
        .iter()
        .flat_map(|curve| curve.pieces.iter().flatten())
        .map(|point| screen(*point))
        .chain(written)
        .collect();
    let text = |id: &str, font: FontId| {
        painter.layout_no_wrap(says.text(id, &[]), font, look.colours.lesser)
    };
    let threshold = text("plot-threshold", look.font(look.sizes.least));
    let zero = screen([model.from_min, 0.0]).y;
    let sides = [
        (Align2::LEFT_BOTTOM, frame.left() + GAP),
        (Align2::RIGHT_BOTTOM, frame.right() - GAP),
        (Align2::LEFT_TOP, frame.left() + GAP),
        (Align2::RIGHT_TOP, frame.right() - GAP),
    ];
    let places = sides.map(|(side, x)| side.anchor_size(pos2(x, zero), threshold.size()));
    let threshold_at = first_free(&points, places).unwrap_or(places[0]);
    painter.galley(threshold_at.min, threshold, look.colours.lesser);
    if let Some((from, to)) = model.daylight_min {
        let daylight = text("plot-sun-up", look.font(look.sizes.least));
        let [from, to] = [from, to].map(|minutes| screen([minutes, model.highest_mag]));
        let place = Align2::CENTER_TOP.anchor_size(from.lerp(to, 0.5), daylight.size());
        if first_free(&points, [place]).is_some() {
            painter.galley(place.min, daylight, look.colours.lesser);
        }
    }
    for (at, name) in names {
        painter.galley(at, name, look.colours.lesser);
    }
}

/// The first of some places that no curve runs through.
fn first_free<const PLACES: usize>(points: &[Pos2], places: [Rect; PLACES]) -> Option<Rect> {
    let is_free = |place: &Rect| !points.iter().any(|point| place.contains(*point));
    places.into_iter().find(is_free)
}

/// The eyes' names right of where their curves end, pushed apart where these end close together.
fn eyes(
    ui: &Ui,
    scene: &Scene<'_>,
    says: Says<'_>,
    model: &Model,
    frame: Rect,
    screen: impl Fn([f64; 2]) -> Pos2,
) -> Vec<(Pos2, Arc<Galley>)> {
    let look = &scene.look;
    let ends: Vec<(Eye, [f64; 2])> = model
        .curves
        .iter()
        .filter_map(|curve| Some((curve.eye, *curve.pieces.last()?.last()?)))
        .collect();
    let mut names: Vec<(Pos2, Arc<Galley>)> = ends
        .into_iter()
        .map(|(eye, end)| {
            let name = if end[1] > model.highest_mag {
                says.text("plot-off-the-top", &[("eye", &says.eye(eye))])
            } else {
                says.eye(eye)
            };
            let font = if eye == scene.eye {
                look.bold(look.sizes.least)
            } else {
                look.font(look.sizes.least)
            };
            let galley = ui.painter().layout_no_wrap(name, font, colour(look, eye));
            (screen(end) + Vec2::new(GAP, -0.5 * galley.size().y), galley)
        })
        .collect();
    names.sort_by(|(a, _), (b, _)| a.y.total_cmp(&b.y));
    let heights: Vec<f32> = names.iter().map(|(_, name)| name.size().y).collect();
    let mut tops: Vec<f32> = names.iter().map(|(at, _)| at.y).collect();
    push_apart(&mut tops, &heights, frame.top(), frame.bottom() + 2.0);
    for ((at, _), top) in names.iter_mut().zip(tops) {
        at.y = top;
    }
    names
}

/// Moves things that stand below one another (upper edges ascending) until none covers another
/// and all lie between `from` and `to`; where there is too little room they go past `to`.
fn push_apart(tops: &mut [f32], heights: &[f32], from: f32, to: f32) {
    let mut least = to;
    for (top, height) in tops.iter_mut().zip(heights).rev() {
        *top = top.min(least - height);
        least = *top;
    }
    let mut least = from;
    for (top, height) in tops.iter_mut().zip(heights) {
        *top = top.max(least);
        least = *top + height;
    }
}

#[cfg(test)]
mod tests {
    use super::push_apart;

    #[test]
    fn names_that_end_together_stand_apart_within_the_frame() {
        for tops in [
            [10.0, 50.0, 80.0],
            [-300.0, -5.0, 4.0],
            [91.0, 93.0, 400.0],
            [40.0, 41.0, 42.0],
        ] {
            let mut moved = tops;
            push_apart(&mut moved, &[12.0; 3], 0.0, 100.0);
            assert!(moved[0] >= 0.0 && moved[2] <= 88.0, "{tops:?} {moved:?}");
            for pair in moved.windows(2) {
                assert!(pair[1] - pair[0] >= 12.0, "{tops:?} {moved:?}");
            }
        }
        let mut apart = [10.0, 50.0, 80.0];
        push_apart(&mut apart, &[12.0; 3], 0.0, 100.0);
        assert_eq!(apart, [10.0, 50.0, 80.0], "nothing is moved without need");
    }
}
