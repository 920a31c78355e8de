//! What a night holds: from engine results to a host's questions.

mod night;

pub use night::{
    Best, BodyNight, Cause, Edge, Half, Night, NightError, NightRequest, OpticsTimes, SkylineEvent,
    SunTimes, Window,
};
