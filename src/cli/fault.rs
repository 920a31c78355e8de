//! Why a subcommand ends without its result.

use crate::place::SiteError;
use crate::plan::NightError;
use crate::words::Words;
use std::io::{self, ErrorKind};

/// Why a subcommand ends early, with one sentence for a person and a code for a script.
#[derive(Debug)]
pub enum Fault {
    /// Bad usage or bad input.
    Input(String),
    /// The results cannot be written.
    Output(io::Error),
}

impl Fault {
    /// The program's exit code: 2 for bad usage or bad input, 1 for anything else, and 0 where
    /// the reader of the output has simply had enough.
    pub fn exit_code(&self) -> u8 {
        match self {
            Self::Input(_) => 2,
            Self::Output(error) if error.kind() == ErrorKind::BrokenPipe => 0,
            Self::Output(_) => 1,
        }
    }

    /// What to tell the user, if anything.
    pub fn sentence(&self, words: &Words) -> Option<String> {
        match self {
            Self::Input(sentence) => Some(sentence.clone()),
            Self::Output(error) if error.kind() == ErrorKind::BrokenPipe => None,
            Self::Output(error) => {
                Some(words.text_with("cli-output-failed", &[("reason", error.to_string())]))
            }
        }
    }
}

/// Only writing the output gives a bare one; reading names its file at once.
impl From<io::Error> for Fault {
    fn from(error: io::Error) -> Self {
        Self::Output(error)
    }
}

impl From<SiteError> for Fault {
    fn from(error: SiteError) -> Self {
        Self::Input(error.to_string())
    }
}

impl From<NightError> for Fault {
    fn from(error: NightError) -> Self {
        Self::Input(error.to_string())
    }
}
