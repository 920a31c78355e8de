//! Sites' parts in the files of other programs: GeoJSON and skyline tables.
//!
//! [`read_geojson`] and [`write_geojson`] carry spots, obstacles and excluded areas as RFC 7946
//! has it, [`write_skyline_table`] is the way back from [`super::read_skyline_table`].

mod export;
mod import;
mod plain;
mod table;
mod tangent;

pub use export::{to_geojson, write_geojson};
pub use import::{Imported, Remark, Remarked, from_geojson, read_geojson};
pub use table::{skyline_to_table, write_skyline_table};
pub use tangent::TangentPlane;
