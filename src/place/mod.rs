//! Sites: the site file, spots, the skyline, the time zone.
//!
//! [`Site::read`] and [`Site::save`] are the way in and out; [`Site::observer`],
//! [`Site::skyline`] and [`Site::zone`] are what a night is planned with. Azimuths are from true
//! north, and a site's plan is flat: east and north of its mark in metres.

mod air;
mod areas;
mod blocker;
mod check;
mod demo;
mod envelope;
pub mod exchange;
mod eyes;
mod features;
mod file;
mod ground;
mod grounds;
mod kit;
mod leafless;
mod limits;
mod locate;
mod measured;
mod measured_use;
mod obstacle;
mod patch;
mod plan_point;
mod prepared;
mod roof;
mod silhouette;
mod site;
mod skyline;
mod solid;
mod stack;
mod stretch;
pub mod survey;
mod terrain;
pub mod zone;

pub use air::{Extinction, Haze, SiteAir, SiteSky, standard_pressure_hpa};
pub use areas::{Backdrop, Exclusion, PicturePoint, Sector};
pub use blocker::Blocker;
pub use demo::{demo_site, demo_sites, slug};
pub use eyes::SiteEyes;
pub use features::Feature;
pub use file::LARGEST_FILE_BYTES;
pub use ground::{People, Slope, Stature, Viewpoint};
pub use grounds::Grounds;
pub use kit::{Eyepiece, Instrument, Orientation};
pub use leafless::{Leafless, YearDay};
pub use measured::{SkylinePoint, read_skyline_table, skyline_from_table};
pub use measured_use::MeasuredUse;
pub use obstacle::Obstacle;
pub use plan_point::PlanPoint;
pub use prepared::{PreparedGrounds, TerrainView};
pub use site::{Site, SiteError, Spot};
pub use skyline::Skyline;
pub use terrain::{
    FarSkyline, LARGEST_RADIUS_M, Relief, Terrain, TerrainRequest, USUAL_REFRACTION_K, cache_path,
    far_skyline_cached, terrain_path,
};
