//! The work area Lookout: the half-night at one site, minute by minute.
//!
//! Each drawing stands in a folder of its own as model, layout and paint; [`Drawings`] holds
//! what they keep between frames and shows them, each in the room that its `ui` has. They only
//! record commands.

mod disc;
pub mod horizon;
pub mod model;
mod says;

use super::command::Commands;
use super::scene::Scene;
use crate::light::Eye;
use crate::plan::Half;
use crate::sky::Body;
use eframe::egui::{Response, Ui};
use model::Tracks;
use std::sync::Arc;

/// The drawings, with what they keep between frames.
#[derive(Default)]
pub struct Drawings {
    tracks: Kept<HalfKey, Tracks>,
    horizon: horizon::Horizon,
}

impl Drawings {
    /// The horizon view.
    pub fn horizon(&mut self, ui: &mut Ui, scene: &Scene<'_>, commands: &mut Commands) -> Response {
        let tracks = self.tracks(scene);
        self.horizon.show(ui, scene, &tracks, commands)
    }

    fn tracks(&mut self, scene: &Scene<'_>) -> Arc<Tracks> {
        self.tracks.get(HalfKey::of(scene), || Tracks::new(scene))
    }
}

/// Something made once for a key and shared until the key changes.
struct Kept<K, T>(Option<(K, Arc<T>)>);

impl<K, T> Default for Kept<K, T> {
    fn default() -> Self {
        Self(None)
    }
}

impl<K: PartialEq, T> Kept<K, T> {
    fn get(&mut self, key: K, make: impl FnOnce() -> T) -> Arc<T> {
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
