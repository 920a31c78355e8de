//! Sites: files, skylines, obstacles, zones.

#[path = "../common/mod.rs"]
mod common;

mod demo;
mod disk;
mod measured;
mod obstacles;
mod skyline;
mod terrain;
mod text;
mod zones;
