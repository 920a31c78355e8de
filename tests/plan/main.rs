//! The night's plan against reference tables and against what must hold by itself.

mod daylight;
mod edges;
mod reference;
mod rise_set;
mod windows;
