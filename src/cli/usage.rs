//! Wrong usage in one sentence.

use super::Fault;

/// The parser's complaint without its reminders of usage and help.
pub(super) fn fault(error: &clap::Error) -> Fault {
    let text = error.render().to_string();
    let words: Vec<&str> = text
        .lines()
        .map(str::trim)
        .take_while(|line| !line.starts_with("Usage:") && !line.starts_with("For more information"))
        .filter(|line| !line.is_empty())
        .collect();
    let sentence = words.join(" ");
    Fault::Input(
        sentence
            .strip_prefix("error: ")
            .unwrap_or(&sentence)
            .to_owned(),
    )
}
