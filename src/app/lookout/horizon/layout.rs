//! Where everything of the horizon view goes.

use super::camera::Camera;
use super::captions::{Captions, Label};
use super::model::{Mark, Model};
use super::path::{self, PathTick, Stretch};
use super::rulers::{RulerMark, Rulers};
use crate::app::lookout::model::{Tick, Tracks};
use crate::app::lookout::says::Says;
use crate::app::scene::Scene;
use crate::light::Standing;
use crate::measure::Angle;
use crate::sky::Body;
use eframe::egui::{Painter, Pos2, Rect, pos2};

/// Height of the strip with the azimuth ruler, in heights of a label's letters.
pub const RULER_LINES: f32 = 2.4;

/// Where things go, in points of the screen.
pub struct Layout {
    /// The part of the sky that is shown.
    pub camera: Camera,
    /// The strip with the azimuth ruler, below the sky.
    pub ruler: Rect,
    /// Every ten degrees of altitude: height, how long its tick is, text.
    pub altitudes: Vec<RulerMark>,
    /// Every ten degrees of azimuth.
    pub azimuths: Vec<RulerMark>,
    /// The chosen body's path.
    pub stretches: Vec<Stretch>,
    /// Its ticks.
    pub ticks: Vec<PathTick>,
    /// Where the chosen body is, if it is above the horizon.
    pub target: Option<Pos2>,
    /// The line from the chosen body down to the skyline.
    pub drop: Option<[Pos2; 2]>,
    /// The other bodies and how large they are drawn.
    pub others: Vec<(Pos2, f32)>,
    /// The Sun.
    pub sun: Pos2,
    /// The labels that found a place.
    pub labels: Vec<Label>,
}

/// A body's radius on the screen.
pub fn radius(camera: &Camera, mark: &Mark) -> f32 {
    let true_size = 0.5 * mark.diameter.degrees() * camera.points_per_deg;
    match mark.body {
        // The Moon's and the Sun's true size would show no phase.
        Body::Moon | Body::Sun => (true_size as f32).max(9.0),
        _ => (3.6 - 0.45 * mark.magnitude.unwrap_or(0.0) as f32).clamp(2.4, 6.0),
    }
}

impl Layout {
    /// Lays the model out.
    pub fn new(
        scene: &Scene<'_>,
        model: &Model,
        tracks: &Tracks,
        ticks: &[Tick],
        camera: Camera,
        painter: &Painter,
        corner: Option<Rect>,
    ) -> Self {
        let look = scene.look;
        let sky = camera.rect;
        let ruler = Rect::from_min_max(
            sky.left_bottom(),
            pos2(sky.right(), sky.bottom() + RULER_LINES * look.sizes.label),
        );
        let mut captions = Captions::new(scene, painter, camera);
        let rulers = Rulers {
            says: Says::new(scene),
            look,
            painter,
            camera,
        };
        let samples = tracks.body(scene.body);
        let stretches = path::stretches(&camera, samples);
        let ticks = path::path_ticks(&camera, samples, ticks);
        captions.keep_off(&stretches);
        captions.keep_off_corner(corner);

        let place = |mark: &Mark| camera.pos(mark.sample.azimuth, mark.sample.altitude);
        let is_up = model.target.sample.standing != Standing::Down;
        let target = is_up.then(|| place(&model.target));
        let drop = target.filter(|_| model.drops_line()).map(|top| {
            let foot = camera.pos(model.target.sample.azimuth, model.skyline);
            [top, foot]
        });
        let others: Vec<(Pos2, f32)> = model
            .others
            .iter()
            .map(|mark| (place(mark), radius(&camera, mark)))
            .collect();
        if let Some(at) = target {
            captions.target(model, at);
        }
        if let Some(drop) = drop {
            captions.clearance(model, drop);
        }
        captions.others(model, &others);
        captions.hours(tracks, &ticks);
        captions.obstacles();
        captions.stars(model);
        Self {
            camera,
            ruler,
            altitudes: rulers.altitudes(),
            azimuths: rulers.azimuths(),
            stretches,
            ticks,
            target,
            drop,
            others,
            sun: place(&model.sun),
            labels: captions.arrange(),
        }
    }
}

/// The outline of the skyline across the view, from left to right, both sides of every jump.
pub fn outline(camera: &Camera, skyline: &[(Angle, Angle)]) -> Vec<Pos2> {
    let turns = TURNS_DEG.iter();
    turns
        .flat_map(|turn_deg| in_view(camera, skyline, *turn_deg))
        .collect()
}

/// What of two lines through the same azimuths lies in the view, once for each turn in which
/// some of it does.
pub fn outlines(camera: &Camera, lines: [&[(Angle, Angle)]; 2]) -> Vec<[Vec<Pos2>; 2]> {
    TURNS_DEG
        .iter()
        .map(|turn_deg| lines.map(|line| in_view(camera, line, *turn_deg)))
        .filter(|[first, _]| !first.is_empty())
        .collect()
}

/// The view may begin before north and end behind it.
const TURNS_DEG: [f64; 2] = [0.0, 360.0];

fn in_view(camera: &Camera, line: &[(Angle, Angle)], turn_deg: f64) -> Vec<Pos2> {
    let half_deg = 0.5 * camera.width_deg() + 1.0;
    let start_deg = (camera.middle_deg - half_deg).rem_euclid(360.0);
    line.iter()
        .map(|(azimuth, altitude)| {
            let beside_deg = azimuth.degrees() + turn_deg - start_deg - half_deg;
            (beside_deg, altitude.degrees())
        })
        .filter(|(beside_deg, _)| beside_deg.abs() <= half_deg)
        .map(|(beside_deg, altitude_deg)| camera.pos_beside(beside_deg, altitude_deg))
        .collect()
}
