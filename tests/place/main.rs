//! Sites: files, skylines, obstacles, zones.

#[path = "../common/mod.rs"]
mod common;

mod demo;
mod disk;
mod grounds;
mod measured;
mod obstacles;
mod openings;
mod skyline;
mod text;
mod zones;
