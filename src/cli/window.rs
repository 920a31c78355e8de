//! What the window is asked to open on.

use super::arguments::{HalfName, WindowArguments};
use super::{Fault, Surroundings, resolve};
use crate::measure::TimeScales;
use crate::place::Site;
use crate::plan::Half;
use crate::sky::Body;
use chrono::{DateTime, NaiveDate, Utc};
use std::path::PathBuf;

/// What the window opens on; all but the renderer is valid.
#[derive(Clone, Debug)]
pub struct WindowRequest {
    /// How civil time leads to TT.
    pub scales: TimeScales,
    /// A time for the clock to start at, in place of the machine's.
    pub now: Option<DateTime<Utc>>,
    /// A site to open, with its file if it has one.
    pub site: Option<(Site, Option<PathBuf>)>,
    /// A spot's name on it.
    pub spot: Option<String>,
    /// An evening's date.
    pub date: Option<NaiveDate>,
    /// A half of that night.
    pub half: Option<Half>,
    /// A body.
    pub body: Option<Body>,
    /// The name of what draws, as it was typed: the window knows which there are.
    pub renderer: Option<String>,
}

impl WindowRequest {
    pub(super) fn resolve(
        arguments: &WindowArguments,
        is_clock_set: bool,
        scales: TimeScales,
        around: &Surroundings<'_>,
    ) -> Result<Self, Fault> {
        let words = around.words;
        let site = match &arguments.site {
            Some(text) => Some(resolve::site(words, text, around.sites_folder)?),
            None => None,
        };
        if let Some((site, _)) = &site {
            site.resolve_spot(arguments.spot.as_deref())?;
        }
        let date = match &arguments.date {
            Some(text) => Some(resolve::date(words, "--date", text)?),
            None => None,
        };
        let body = match &arguments.body {
            Some(text) => Some(resolve::body(words, "--body", text)?),
            None => None,
        };
        Ok(Self {
            scales,
            now: is_clock_set.then_some(around.now),
            site,
            spot: arguments.spot.clone(),
            date,
            half: arguments.half.map(|half| match half {
                HalfName::Dusk => Half::Dusk,
                HalfName::Dawn => Half::Dawn,
            }),
            body,
            renderer: arguments.renderer.clone(),
        })
    }
}
