//! The work area Lookout: the half-night at one site, minute by minute.
//!
//! Each drawing stands in a folder of its own as model, layout and paint, and offers
//! `show(ui, &Scene, &mut Commands)`: it takes the width and height that `ui` has and only
//! records commands.

mod disc;
pub mod horizon;
pub mod model;

use eframe::egui;
use std::sync::Arc;

/// What a drawing keeps between frames: made anew when its key changes, shared until then.
fn kept<K, T>(ctx: &egui::Context, name: &str, key: K, make: impl FnOnce() -> T) -> Arc<T>
where
    K: Clone + PartialEq + Send + Sync + 'static,
    T: Send + Sync + 'static,
{
    let id = egui::Id::unique(("lookout", name));
    let known = ctx.data(|data| data.get_temp::<(K, Arc<T>)>(id));
    if let Some((known_key, value)) = known
        && known_key == key
    {
        return value;
    }
    let value = Arc::new(make());
    ctx.data_mut(|data| data.insert_temp(id, (key, value.clone())));
    value
}
