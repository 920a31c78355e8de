//! The picture under the plan: read on a thread of its own, kept no larger than a graphics card
//! takes, and placed by two known points.

use super::camera::Camera;
use super::geometry::{minus, plus};
use crate::app::palette::{Look, Theme};
use crate::app::picture::{MOST_SIDE, Picture, PictureFlaw, read};
use crate::place::{Backdrop, PicturePoint, PlanPoint};
use crate::words::Words;
use eframe::egui::{Color32, Context, Mesh, Painter, Shape, TextureHandle, TextureOptions, pos2};
use std::path::PathBuf;
use std::sync::mpsc::{Receiver, TryRecvError, channel};

/// A backdrop for a picture that nobody has placed yet: a hundred metres wide, its middle at the
/// mark.
pub fn placed(picture: PathBuf, [width, height]: [u32; 2]) -> Backdrop {
    const HALF_M: f64 = 50.0;
    let down_px = 0.5 * f64::from(height);
    let point = |right_px, east_m| PicturePoint {
        right_px,
        down_px,
        at: PlanPoint::new(east_m, 0.0),
    };
    Backdrop {
        picture,
        first: point(0.0, -HALF_M),
        second: point(f64::from(width), HALF_M),
    }
}

/// How a picture lies in the plan: turned and scaled, never stretched.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Placing {
    first: PicturePoint,
    /// Metres east and north for a pixel to the right.
    right: PlanPoint,
}

impl Placing {
    /// By a backdrop's two points; `None` where they are one in the picture or in the plan.
    pub fn new(backdrop: &Backdrop) -> Option<Self> {
        let (first, second) = (backdrop.first, backdrop.second);
        // As complex numbers: metres over pixels, with up positive in both.
        let pixels = PlanPoint::new(
            second.right_px - first.right_px,
            first.down_px - second.down_px,
        );
        let metres = minus(second.at, first.at);
        let squared = pixels.east_m * pixels.east_m + pixels.north_m * pixels.north_m;
        let is_known = squared > 1.0 && metres.east_m.hypot(metres.north_m) > 0.01;
        is_known.then(|| Self {
            first,
            right: PlanPoint::new(
                (metres.east_m * pixels.east_m + metres.north_m * pixels.north_m) / squared,
                (metres.north_m * pixels.east_m - metres.east_m * pixels.north_m) / squared,
            ),
        })
    }

    /// Where a pixel lies in the plan.
    pub fn to_plan(self, right_px: f64, down_px: f64) -> PlanPoint {
        let up = PlanPoint::new(-self.right.north_m, self.right.east_m);
        let along = plus(self.first.at, self.right, right_px - self.first.right_px);
        plus(along, up, self.first.down_px - down_px)
    }

    /// The pixel, to the right and down, that lies at a point of the plan.
    pub fn to_picture(self, at: PlanPoint) -> (f64, f64) {
        let from = minus(at, self.first.at);
        let squared = self.right.east_m.powi(2) + self.right.north_m.powi(2);
        let right = from.east_m * self.right.east_m + from.north_m * self.right.north_m;
        let up = from.north_m * self.right.east_m - from.east_m * self.right.north_m;
        (
            self.first.right_px + right / squared,
            self.first.down_px - up / squared,
        )
    }
}

/// The picture under the plan and what is kept of it.
pub struct Underlay {
    /// How much of it shows, 0 to 1.
    pub opacity: f32,
    path: Option<PathBuf>,
    waiting: Option<Receiver<Result<Picture, PictureFlaw>>>,
    picture: Option<Picture>,
    /// Why there is none.
    flaw: Option<PictureFlaw>,
    texture: Option<(Theme, TextureHandle)>,
}

impl Default for Underlay {
    fn default() -> Self {
        Self {
            opacity: 0.6,
            path: None,
            waiting: None,
            picture: None,
            flaw: None,
            texture: None,
        }
    }
}

impl Underlay {
    /// Why the picture is not shown, in one sentence.
    pub fn flaw(&self, words: &Words) -> Option<String> {
        let (flaw, path) = (self.flaw.as_ref()?, self.path.as_ref()?);
        Some(flaw.sentence(words, path))
    }

    /// Reads the picture that the site names, if it is not the one in hand; looks whether it has
    /// come.
    pub fn follow(&mut self, ctx: &Context, path: Option<PathBuf>) {
        if path != self.path {
            self.path = path;
            self.picture = None;
            self.texture = None;
            self.flaw = None;
            self.waiting = self.path.clone().map(|path| {
                let (done, waiting) = channel();
                let ctx = ctx.clone();
                let largest = ctx.input(|input| input.max_texture_side);
                let most_side = MOST_SIDE.min(u32::try_from(largest).unwrap_or(MOST_SIDE));
                std::thread::spawn(move || {
                    // Nobody waits for it any more once another picture was named.
                    let _ = done.send(read(&path, most_side));
                    ctx.request_repaint();
                });
                waiting
            });
        }
        let answer = self.waiting.as_ref().map(Receiver::try_recv);
        match answer {
            None | Some(Err(TryRecvError::Empty)) => return,
            Some(Ok(Ok(picture))) => self.picture = Some(picture),
            Some(Ok(Err(flaw))) => self.flaw = Some(flaw),
            // The thread ended without an answer: the decoder gave up on a damaged file.
            Some(Err(TryRecvError::Disconnected)) => self.flaw = Some(PictureFlaw::NoPicture),
        }
        self.waiting = None;
    }

    /// Draws it.
    pub fn paint(
        &mut self,
        painter: &Painter,
        look: &Look,
        camera: Camera,
        backdrop: Option<&Backdrop>,
    ) {
        let (Some(picture), Some(placing)) = (&self.picture, backdrop.and_then(Placing::new))
        else {
            return;
        };
        let [width, height] = picture.size_px.map(f64::from);
        let is_current = self
            .texture
            .as_ref()
            .is_some_and(|(theme, _)| *theme == look.theme);
        if !is_current {
            let texture = painter.ctx().load_texture(
                "backdrop",
                picture.image_for(look),
                TextureOptions::LINEAR,
            );
            self.texture = Some((look.theme, texture));
        }
        let Some((_, texture)) = &self.texture else {
            return;
        };
        let mut mesh = Mesh::with_texture(texture.id());
        let tint = Color32::WHITE.gamma_multiply(self.opacity);
        for (right, down) in [(0.0, 0.0), (1.0, 0.0), (1.0, 1.0), (0.0, 1.0)] {
            let at = placing.to_plan(f64::from(right) * width, f64::from(down) * height);
            mesh.vertices.push(eframe::egui::epaint::Vertex {
                pos: camera.to_screen(at),
                uv: pos2(right, down),
                color: tint,
            });
        }
        mesh.add_triangle(0, 1, 2);
        mesh.add_triangle(0, 2, 3);
        painter.add(Shape::mesh(mesh));
    }
}
