//! What a night holds: from engine results to a host's questions.

mod absence;
mod coming;
mod interval;
mod neighbours;
mod night;
mod optics;
mod survey;
mod track;
mod windows;

pub use absence::Absence;
pub use coming::{Coming, coming};
pub use neighbours::{Aspect, Neighbour, Neighbours, neighbours};
pub use night::{
    Best, BodyNight, Cause, Edge, Half, Night, NightError, NightRequest, OpticsTimes, SkylineEvent,
    SunTimes, Window,
};
