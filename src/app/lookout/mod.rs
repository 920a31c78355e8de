//! The work area Lookout: the half-night at one site, minute by minute.
//!
//! Each drawing stands in a folder of its own as model, layout and paint; [`Drawings`] holds
//! what they keep between frames and shows them, each in the room that its `ui` has. They only
//! record commands.

mod disc;
pub mod fade;
pub mod horizon;
pub mod inset;
pub(in crate::app) mod labels;
mod lights;
pub mod model;
pub mod phase;
pub mod plot;
pub(in crate::app) mod says;
#[cfg(test)]
pub(in crate::app) mod staged;
#[cfg(test)]
mod tests;

use super::command::Commands;
use super::palette::{Look, Theme};
use super::scene::Scene;
use crate::light::Eye;
use crate::plan::{AppearingRequest, Half, Sighting, appearing};
use crate::sky::Body;
use eframe::egui::{
    ColorImage, Galley, Painter, Pos2, Rect, Response, TextureHandle, TextureId, TextureOptions,
    Ui, Vec2, vec2,
};
use model::Tracks;
use std::sync::Arc;

/// The drawings, with what they keep between frames.
#[derive(Default)]
pub struct Drawings {
    /// Made for a sky, whatever the skyline was then.
    sky_tracks: Kept<HalfKey, Tracks>,
    tracks: Kept<HalfKey, Tracks>,
    horizon: horizon::Horizon,
    fade: fade::Fade,
    plot: plot::MarginPlot,
    inset: inset::Inset,
    appearing: Kept<HalfKey, Vec<Sighting>>,
}

impl Drawings {
    /// The horizon view.
    pub fn horizon(&mut self, ui: &mut Ui, scene: &Scene<'_>, commands: &mut Commands) -> Response {
        let tracks = self.tracks(scene);
        self.horizon.show(ui, scene, &tracks, commands)
    }

    /// The time slider with the lanes.
    pub fn fade(&mut self, ui: &mut Ui, scene: &Scene<'_>, commands: &mut Commands) -> Response {
        let tracks = self.tracks(scene);
        self.fade.show(ui, scene, &tracks, commands)
    }

    /// The chosen body's margin for each eye against minutes.
    pub fn plot(&mut self, ui: &mut Ui, scene: &Scene<'_>, commands: &mut Commands) -> Response {
        let tracks = self.tracks(scene);
        self.plot.show(ui, scene, &tracks, commands)
    }

    /// The plan of the orbits.
    pub fn inset(&mut self, ui: &mut Ui, scene: &Scene<'_>) -> Response {
        self.inset.show(ui, scene)
    }

    /// The disc as the eye and the optics show it.
    pub fn phase(&mut self, ui: &mut Ui, scene: &Scene<'_>, commands: &mut Commands) -> Response {
        phase::show(ui, scene, commands)
    }

    /// What the chosen eye finds first in this dusk, or holds last in this dawn.
    pub fn appearing(&mut self, scene: &Scene<'_>) -> Arc<Vec<Sighting>> {
        /// As many as a card has room for.
        const MOST: usize = 8;
        self.appearing.get(HalfKey::of(scene), || {
            let request = AppearingRequest {
                night: scene.night,
                half: scene.half,
                eye: scene.eye,
                span: scene.span,
                observer: scene.observer,
                skyline: scene.skyline,
                sight: scene.sight,
            };
            appearing(&request, MOST)
        })
    }

    fn tracks(&mut self, scene: &Scene<'_>) -> Arc<Tracks> {
        let of_sky = HalfKey {
            night_count: scene.sky_count,
            ..HalfKey::of(scene)
        };
        let sky = self.sky_tracks.get(of_sky, || Tracks::new(scene));
        self.tracks.get(HalfKey::of(scene), || sky.behind(scene))
    }
}

/// One point to every side: where letters over the sky have their dark shade.
const AROUND: [Vec2; 4] = [
    vec2(-1.0, 0.0),
    vec2(1.0, 0.0),
    vec2(0.0, -1.0),
    vec2(0.0, 1.0),
];

/// Letters over the sky: with a dark shade around them, so that they read in every light.
pub(in crate::app) fn shaded(painter: &Painter, look: &Look, at: Pos2, text: &Arc<Galley>) {
    let shade = look.colours.sky_shade.gamma_multiply(0.7);
    if look.theme == Theme::Red {
        // Letters and sky differ in brightness alone: a rim is not enough.
        let ground = Rect::from_min_size(at, text.size()).expand2(vec2(3.0, 0.0));
        painter.rect_filled(ground, 2.0, shade);
    }
    for aside in AROUND {
        painter.galley_with_override_text_color(at + aside, text.clone(), shade);
    }
    painter.galley(at, text.clone(), look.colours.sky_text);
}

/// Something made once for a key and shared until the key changes.
pub(in crate::app) struct Kept<K, T>(Option<(K, Arc<T>)>);

impl<K, T> Default for Kept<K, T> {
    fn default() -> Self {
        Self(None)
    }
}

impl<K: PartialEq, T> Kept<K, T> {
    pub(in crate::app) fn get(&mut self, key: K, make: impl FnOnce() -> T) -> Arc<T> {
        match &self.0 {
            Some((known, value)) if *known == key => value.clone(),
            _ => {
                let value = Arc::new(make());
                self.0 = Some((key, value.clone()));
                value
            }
        }
    }
}

/// A texture painted for a key, and again only when the key changes.
struct KeptTexture<K>(Option<(K, TextureHandle)>);

impl<K> Default for KeptTexture<K> {
    fn default() -> Self {
        Self(None)
    }
}

impl<K: PartialEq> KeptTexture<K> {
    fn get(&mut self, ui: &Ui, key: K, image: impl FnOnce() -> ColorImage) -> TextureId {
        match &mut self.0 {
            Some((known, texture)) => {
                if *known != key {
                    *known = key;
                    texture.set(image(), TextureOptions::LINEAR);
                }
                texture.id()
            }
            None => {
                let texture = ui
                    .ctx()
                    .load_texture("sky", image(), TextureOptions::LINEAR);
                let id = texture.id();
                self.0 = Some((key, texture));
                id
            }
        }
    }
}

/// What depends on the half-night alone.
#[derive(Clone, Copy, Debug, PartialEq)]
struct HalfKey {
    night_count: u64,
    half: Half,
    eye: Eye,
}

impl HalfKey {
    fn of(scene: &Scene<'_>) -> Self {
        Self {
            night_count: scene.night_count,
            half: scene.half,
            eye: scene.eye,
        }
    }
}

/// What depends on the half-night and the chosen body.
#[derive(Clone, Copy, Debug, PartialEq)]
struct SpanKey {
    half: HalfKey,
    body: Body,
}

impl SpanKey {
    fn of(scene: &Scene<'_>) -> Self {
        Self {
            half: HalfKey::of(scene),
            body: scene.body,
        }
    }
}
