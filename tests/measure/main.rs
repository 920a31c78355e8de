//! Civil time and TT - UT1.

#[path = "../common/mod.rs"]
mod common;

mod civil;
mod delta_t;
