//! The desktop window.
//!
//! A frame runs in this order: keys are taken out of the input ([`keys`]), time passes
//! ([`state::State::pass`]), the frame is drawn and only records [`command::Command`]s, and
//! these are run at its end. Planning happens in [`state`], when site, spot or date change.

pub mod area;
mod cards;
mod caution;
pub mod command;
mod dialogs;
mod frame;
pub mod grounds;
mod keys;
pub mod lookout;
mod measured;
pub mod palette;
mod pickers;
mod picture;
mod planned;
mod saving;
pub mod scene;
mod settings;
mod shapes;
mod sites;
mod start;
pub mod state;
mod terrain;
mod theme;
mod transport;
mod widgets;
mod window;
mod worker;

pub use start::{Renderer, Start, WindowError, run};
pub use window::DesktopWindow;
