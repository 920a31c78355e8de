//! Sites: files, skylines, obstacles, zones.

#[path = "../common/mod.rs"]
mod common;

mod compass;
mod demo;
mod disk;
mod geojson;
mod heights;
mod measured;
mod obstacles;
mod photo;
mod skyline;
mod terrain;
mod text;
mod timed;
mod zones;
