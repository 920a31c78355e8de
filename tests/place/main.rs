//! Sites: files, skylines, obstacles, zones.
#![allow(clippy::unwrap_used)]

#[path = "../common/mod.rs"]
mod common;

mod compass;
mod demo;
mod disk;
mod geojson;
mod grounds;
mod heights;
mod measured;
mod obstacles;
mod openings;
mod photo;
mod skyline;
mod terrain;
mod text;
mod timed;
mod zones;
