//! What can be typed. Values stay texts here; [`super::resolve`] turns them into what they mean,
//! so that every refusal is worded in one place. The help texts are Fluent messages named after
//! the subcommand (`cli-about-…`) and the argument (`cli-arg-…`).

use crate::words::Words;
use clap::{Args, Command, CommandFactory, Parser, Subcommand, ValueEnum};
use clap_complete::Shell;

/// The program's arguments.
#[derive(Clone, Debug, Parser)]
#[command(name = "dimmet", version)]
pub struct Arguments {
    #[command(flatten)]
    pub clock: ClockArguments,
    #[command(flatten)]
    pub window: WindowArguments,
    #[command(subcommand)]
    pub subcommand: Option<Subcommands>,
}

/// How a page is printed that is no table.
#[derive(Clone, Copy, Debug, PartialEq, Eq, ValueEnum)]
#[allow(missing_docs)]
pub enum PageFormat {
    Text,
    Json,
}

/// What stands in for the machine's clock and for the program's own TT - UT1.
#[derive(Args, Clone, Debug)]
pub struct ClockArguments {
    #[arg(long, value_name = "TIME", global = true)]
    pub now: Option<String>,
    #[arg(
        long,
        value_name = "SECONDS",
        global = true,
        allow_hyphen_values = true
    )]
    pub delta_t: Option<String>,
}

/// What the window opens on.
#[derive(Args, Clone, Debug, Default, PartialEq, Eq)]
pub struct WindowArguments {
    #[arg(long, value_name = "FILE|NAME")]
    pub site: Option<String>,
    #[arg(long, value_name = "NAME")]
    pub spot: Option<String>,
    #[arg(long, value_name = "YYYY-MM-DD")]
    pub date: Option<String>,
    #[arg(long, value_name = "HALF")]
    pub half: Option<HalfName>,
    #[arg(long, value_name = "NAME")]
    pub body: Option<String>,
    #[arg(long, value_name = "NAME")]
    pub renderer: Option<String>,
}

/// A half of a night.
#[derive(Clone, Copy, Debug, PartialEq, Eq, ValueEnum)]
#[allow(missing_docs)]
pub enum HalfName {
    Dusk,
    Dawn,
}

/// The subcommands.
#[derive(Clone, Debug, Subcommand)]
#[allow(missing_docs)]
pub enum Subcommands {
    Positions(PositionsArguments),
    Night(NightArguments),
    Daylight(DaylightArguments),
    Phenomena(PhenomenaArguments),
    Skyline(SkylineArguments),
    Completions { shell: Shell },
}

/// How results are printed.
#[derive(Clone, Copy, Debug, PartialEq, Eq, ValueEnum)]
#[allow(missing_docs)]
pub enum Format {
    Text,
    Json,
    Csv,
}

/// `dimmet positions`.
#[derive(Args, Clone, Debug)]
pub struct PositionsArguments {
    #[arg(long, value_name = "TIME", required_unless_present = "table")]
    pub at: Option<String>,
    #[arg(
        long,
        value_name = "DEGREES",
        required_unless_present = "table",
        allow_hyphen_values = true
    )]
    pub lat: Option<String>,
    #[arg(
        long,
        value_name = "DEGREES",
        required_unless_present = "table",
        allow_hyphen_values = true
    )]
    pub lon: Option<String>,
    #[arg(long, value_name = "METRES", allow_hyphen_values = true)]
    pub elevation: Option<String>,
    #[arg(long, value_name = "NAME")]
    pub body: Vec<String>,
    #[arg(
        long,
        value_name = "FILE.csv|-",
        conflicts_with_all = ["at", "lat", "lon", "elevation", "body"]
    )]
    pub table: Option<String>,
    #[arg(long, value_name = "FORMAT")]
    pub format: Option<Format>,
}

/// Whose eyes stand at a spot.
#[derive(Clone, Copy, Debug, PartialEq, Eq, ValueEnum)]
#[allow(missing_docs)]
pub enum StatureName {
    Adult,
    Child,
    Wheelchair,
}

/// `dimmet night`.
#[derive(Args, Clone, Debug)]
pub struct NightArguments {
    #[arg(long, value_name = "FILE|NAME")]
    pub site: String,
    #[arg(long, value_name = "YYYY-MM-DD")]
    pub date: String,
    #[arg(long, value_name = "NAME")]
    pub spot: Option<String>,
    #[arg(long, value_name = "WHOSE")]
    pub stature: Option<StatureName>,
    #[arg(long, value_name = "FORMAT")]
    pub format: Option<Format>,
}

/// `dimmet skyline`.
#[derive(Args, Clone, Debug)]
pub struct SkylineArguments {
    #[arg(long, value_name = "FILE|NAME")]
    pub site: String,
    #[arg(long, value_name = "NAME")]
    pub spot: Option<String>,
    #[arg(long, value_name = "WHOSE")]
    pub stature: Option<StatureName>,
    #[arg(id = "leaf-date", long = "date", value_name = "YYYY-MM-DD")]
    pub date: Option<String>,
    #[arg(long, value_name = "DEGREES")]
    pub step: Option<String>,
    #[arg(long, value_name = "FORMAT")]
    pub format: Option<Format>,
}

/// `dimmet phenomena`.
#[derive(Args, Clone, Debug)]
pub struct PhenomenaArguments {
    #[arg(long, value_name = "YYYY-MM-DD")]
    pub from: String,
    #[arg(long, value_name = "YYYY-MM-DD")]
    pub to: String,
    #[arg(id = "planet", long = "body", value_name = "NAME")]
    pub body: Vec<String>,
    #[arg(id = "local-site", long = "site", value_name = "FILE|NAME")]
    pub site: Option<String>,
    #[arg(long, value_name = "NAME", requires = "local-site")]
    pub spot: Option<String>,
    #[arg(long, value_name = "FORMAT")]
    pub format: Option<Format>,
}

/// `dimmet daylight`.
#[derive(Args, Clone, Debug)]
pub struct DaylightArguments {
    #[arg(long, value_name = "FILE|NAME")]
    pub site: String,
    #[arg(long, value_name = "YYYY-MM-DD")]
    pub date: String,
    #[arg(long, value_name = "NAME")]
    pub body: Option<String>,
    #[arg(long, value_name = "NAME")]
    pub spot: Option<String>,
    #[arg(long, value_name = "FORMAT")]
    pub format: Option<PageFormat>,
}

/// The command with its help texts.
pub fn command(words: &Words) -> Command {
    described(Arguments::command().about(words.text("cli-about")), words)
}

fn described(command: Command, words: &Words) -> Command {
    let names: Vec<String> = command
        .get_subcommands()
        .map(|sub| sub.get_name().to_owned())
        .collect();
    let command = command.mut_args(|argument| {
        let id = format!("cli-arg-{}", argument.get_id().as_str().replace('_', "-"));
        // Help and version describe themselves.
        if words.has(&id) {
            argument.help(words.text(&id))
        } else {
            argument
        }
    });
    names.into_iter().fold(command, |command, name| {
        let about = words.text(&format!("cli-about-{name}"));
        let more = format!("cli-more-{name}");
        command.mut_subcommand(name, |sub| {
            let sub = if words.has(&more) {
                sub.long_about([about.clone(), words.text(&more)].join(".\n\n"))
            } else {
                sub
            };
            described(sub.about(about), words)
        })
    })
}
