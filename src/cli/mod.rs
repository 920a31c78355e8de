//! The subcommands: parse, resolve, run, print.
//!
//! Results go to the output and nothing else does; messages go to the caller, who prints them
//! elsewhere. A subcommand that fails ends with one sentence and a code ([`Fault`]).

mod arguments;
mod civil_text;
mod daylight;
mod fault;
mod moment;
mod night;
mod page;
mod phenomena;
mod positions;
mod resolve;
mod skyline;
mod usage;
mod window;

pub use fault::Fault;
pub use night::coming_dusk;
pub use window::WindowRequest;

use crate::words::Words;
use arguments::{Arguments, Subcommands, WindowArguments};
use chrono::{DateTime, Utc};
use clap::FromArgMatches;
use std::ffi::OsString;
use std::io::{Read, Write};
use std::path::Path;

/// Stands first in each JSON document, as `dimmet`.
const JSON_VERSION: u32 = 1;

/// What a subcommand works with: everything that comes from the machine is given here.
pub struct Surroundings<'a> {
    /// The wording.
    pub words: &'a Words,
    /// The clock's time.
    pub now: DateTime<Utc>,
    /// Where site files are kept; `None`: nowhere.
    pub sites_folder: Option<&'a Path>,
    /// What `-` reads.
    pub input: &'a mut dyn Read,
    /// Where results go.
    pub output: &'a mut dyn Write,
    /// Where messages go.
    pub messages: &'a mut dyn Write,
}

/// What is left to do when the arguments have been dealt with.
#[derive(Clone, Debug)]
pub enum Next {
    /// Nothing.
    Done,
    /// The window is to be opened.
    OpenWindow(Box<WindowRequest>),
}

/// Runs the subcommand that the arguments (the program's name first) ask for.
///
/// # Errors
/// Bad usage, bad input, or an output that cannot be written.
pub fn run<I>(arguments: I, around: &mut Surroundings<'_>) -> Result<Next, Fault>
where
    I: IntoIterator<Item = OsString>,
{
    let words = around.words;
    let mut command = arguments::command(words);
    let parsed = command
        .try_get_matches_from_mut(arguments)
        .and_then(|matches| Arguments::from_arg_matches(&matches));
    let arguments = match parsed {
        Ok(arguments) => arguments,
        Err(error) if error.use_stderr() => return Err(usage::fault(&error)),
        // Help and version.
        Err(text) => {
            write!(around.output, "{}", text.render())?;
            around.output.flush()?;
            return Ok(Next::Done);
        }
    };
    let has_window_options = arguments.window != WindowArguments::default();
    if arguments.subcommand.is_some() && has_window_options {
        return Err(Fault::Input(words.text("cli-window-options")));
    }
    if let Some(text) = &arguments.clock.now {
        around.now = resolve::time(words, "--now", text)?.to_utc();
    }
    let scales = resolve::scales(words, arguments.clock.delta_t.as_deref())?;
    match &arguments.subcommand {
        Some(Subcommands::Positions(asked)) => positions::run(asked, scales, around)?,
        Some(Subcommands::Night(asked)) => night::run(asked, scales, around)?,
        Some(Subcommands::Daylight(asked)) => daylight::run(asked, scales, around)?,
        Some(Subcommands::Phenomena(asked)) => phenomena::run(asked, scales, around)?,
        Some(Subcommands::Skyline(asked)) => skyline::run(asked, around)?,
        Some(Subcommands::Completions { shell }) => {
            let mut script = Vec::new();
            clap_complete::generate(*shell, &mut command, "dimmet", &mut script);
            around.output.write_all(&script)?;
            around.output.flush()?;
        }
        None => {
            let is_clock_set = arguments.clock.now.is_some();
            let request = WindowRequest::resolve(&arguments.window, is_clock_set, scales, around)?;
            return Ok(Next::OpenWindow(Box::new(request)));
        }
    }
    Ok(Next::Done)
}

/// A number with no more than so many decimals.
fn rounded(value: f64, decimals: i32) -> f64 {
    let scale = 10_f64.powi(decimals);
    // Adding zero makes a negative zero positive.
    (value * scale).round() / scale + 0.0
}
