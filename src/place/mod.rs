//! Sites: the site file, spots, the skyline, the time zone.

mod demo;
mod obstacle;
mod site;
mod skyline;
pub mod zone;

pub use demo::demo_sites;
pub use obstacle::Obstacle;
pub use site::{Site, SiteError, Spot};
pub use skyline::Skyline;
