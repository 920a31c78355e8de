//! Angles, vectors, time scales, civil time, searches and the progress of long work. Knows no
//! astronomy.

mod angle;
mod chebyshev;
pub mod civil;
pub mod delta_t;
mod instant;
mod progress;
pub mod search;
mod vector;

pub use angle::Angle;
pub use chebyshev::Chebyshev;
pub use instant::{CivilScale, DateOutOfRange, Moment, TimeScales, Tt, Ut1, check_date};
pub use progress::Progress;
pub use vector::{Matrix, Vector};
