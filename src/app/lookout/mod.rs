//! The work area Lookout: the half-night at one site, minute by minute.
//!
//! Each drawing stands in a folder of its own as model, layout and paint, and offers
//! `show(ui, &Scene, &mut Commands)`: it takes the width and height that `ui` has and only
//! records commands.

/// What the drawings keep between frames.
#[derive(Default)]
pub struct Drawings {}
