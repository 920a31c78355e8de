//! Dated events: conjunctions, elongations, stations and what else almanacs list.
//!
//! Every kind is searched on a grid of whole steps from J2000 ([`search`]), so that what is
//! found does not depend on how the time is cut up: [`phenomena`] cuts it into stretches of two
//! years, works on them in threads, and hands the events on in order of time as soon as they
//! are there.

mod alignments;
mod appulses;
mod course;
mod crescents;
mod distances;
mod elongations;
mod error;
mod event;
mod gather;
mod local;
mod moon;
mod rings;
mod search;
mod sight;
mod stations;
mod transits;

pub use error::PhenomenaError;
pub use event::{Circle, Contact, ContactName, Event, Kind, Side, Target, Value};
pub use gather::{PhenomenaRequest, phenomena};
pub use local::{Circumstances, Lookout};
pub use moon::MOON_RADIUS_KM;
pub use transits::SUN_SEMIDIAMETER_ARCSEC;

pub(super) use alignments::alignments;
pub(super) use course::Course;
pub(super) use elongations::greatest_elongations;
pub(super) use search::Stretch;
