//! The real window, driven without a display by what its controls are called.
#![allow(clippy::unwrap_used)]

mod air;
mod cautions;
mod desk;
mod eyes;
mod grounds;
mod measure;
mod pictures;
mod sites;
mod standing;
mod steps;
mod themes;
