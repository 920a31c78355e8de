//! What a night holds: from engine results to a host's questions.

mod absence;
mod appearing;
mod bright;
mod coming;
mod compare;
mod daylight;
mod interval;
mod lit;
mod neighbours;
mod night;
mod night_sky;
mod optics;
mod passage;
mod patch;
mod path;
pub mod phenomena;
mod sight;
pub mod standing;
mod survey;
mod track;
mod windows;

pub use absence::Absence;
pub use appearing::{AppearingRequest, Found, Sighting, appearing};
pub use coming::{Coming, coming};
pub use compare::{CompareRequest, SpotNight, SpotWindow, compare};
pub use daylight::{Apart, Daylight, DaylightRequest, Drift, Slot, Stretch, Whereabouts};
pub use neighbours::{Aspect, Neighbour, Neighbours, neighbours};
pub use night::{
    Best, BodyNight, Cause, Edge, Half, Night, NightError, NightRequest, OpticsTimes, SkylineEvent,
    Stray, SunTimes, Window,
};
pub use night_sky::NightSky;
pub use patch::{Patch, PatchStay, patch};
pub use sight::{Lamps, Luck, Sight, target};
