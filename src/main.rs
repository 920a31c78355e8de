//! Arguments to the window or a subcommand; reads the clock and the folders once.

#[cfg(feature = "desktop")]
use chrono::DateTime;
use chrono::Utc;
use dimmet::cli::{self, Fault, Next, Surroundings, WindowRequest};
use dimmet::words::Words;
use directories::ProjectDirs;
use std::io;
use std::process::ExitCode;
#[cfg(feature = "desktop")]
use std::{sync::Arc, time::Instant};

fn main() -> ExitCode {
    let words = Words::english();
    let folders = ProjectDirs::from("", "", "dimmet");
    let sites_folder = folders.as_ref().map(|f| f.data_dir().join("sites"));
    let mut around = Surroundings {
        words: &words,
        now: Utc::now(),
        sites_folder: sites_folder.as_deref(),
        input: &mut io::stdin().lock(),
        output: &mut io::stdout().lock(),
        messages: &mut io::stderr(),
    };
    let outcome = match cli::run(std::env::args_os(), &mut around) {
        Ok(Next::Done) => Ok(()),
        Ok(Next::OpenWindow(request)) => open_window(*request, folders.as_ref(), &mut around),
        Err(fault) => Err(fault),
    };
    match outcome {
        Ok(()) => ExitCode::SUCCESS,
        Err(fault) => {
            if let Some(sentence) = fault.sentence(&words) {
                tell(
                    &mut around,
                    &words.text_with("cli-message", &[("sentence", sentence)]),
                );
            }
            ExitCode::from(fault.exit_code())
        }
    }
}

/// Opens the window; where none can be opened, says so and prints the coming dusk.
fn open_window(
    request: WindowRequest,
    folders: Option<&ProjectDirs>,
    around: &mut Surroundings<'_>,
) -> Result<(), Fault> {
    let scales = request.scales;
    let Err(reason) = window(request, folders, around)? else {
        return Ok(());
    };
    let sentence = around.words.text_with("no-display", &[("reason", reason)]);
    tell(around, &sentence);
    cli::coming_dusk(scales, around)
}

/// Runs the window; the inner error is why none can be opened.
#[cfg(feature = "desktop")]
fn window(
    request: WindowRequest,
    folders: Option<&ProjectDirs>,
    around: &Surroundings<'_>,
) -> Result<Result<(), String>, Fault> {
    use dimmet::app::{self, Start, state::Choices};
    let renderer = match request.renderer {
        Some(name) => Some(name.parse().map_err(|unknown: String| {
            let arguments = [("place", "--renderer".to_owned()), ("error", unknown)];
            Fault::Input(around.words.text_with("cli-refused", &arguments))
        })?),
        None => None,
    };
    let closed = app::run(Start {
        clock: clock(request.now),
        scales: request.scales,
        settings_file: folders.map(|folders| folders.config_dir().join("settings.ron")),
        sites_folder: around.sites_folder.map(Into::into),
        site: request.site,
        spot: request.spot,
        choices: Choices {
            body: request.body,
            date: request.date,
            half: request.half,
            ..Choices::default()
        },
        renderer,
    });
    Ok(closed.map_err(|error| plain_reason(&error.reason).to_owned()))
}

/// A reason without the place in the window library's sources that it starts with, and without
/// its full stop: it stands within a sentence.
#[cfg(feature = "desktop")]
fn plain_reason(reason: &str) -> &str {
    let past_source = reason
        .split_once(".rs:")
        .and_then(|(_, rest)| rest.split_once(": "));
    past_source
        .map_or(reason, |(_, rest)| rest)
        .trim_end_matches('.')
}

/// The machine's clock, or one that runs on from a given time.
#[cfg(feature = "desktop")]
fn clock(start: Option<DateTime<Utc>>) -> Arc<dyn Fn() -> DateTime<Utc> + Send + Sync> {
    let Some(start) = start else {
        return Arc::new(Utc::now);
    };
    let started = Instant::now();
    Arc::new(move || start + started.elapsed())
}

#[cfg(not(feature = "desktop"))]
fn window(
    _request: WindowRequest,
    _folders: Option<&ProjectDirs>,
    around: &Surroundings<'_>,
) -> Result<Result<(), String>, Fault> {
    Ok(Err(around.words.text("no-window-built")))
}

/// Says something beside the output; a message that nobody can read is not worth failing for.
fn tell(around: &mut Surroundings<'_>, sentence: &str) {
    let _ = writeln!(around.messages, "{sentence}");
}
