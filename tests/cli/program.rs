//! Runs the built program away from any display and any person's folders.

use serde_json::Value;
use std::io::Write;
use std::path::Path;
use std::process::{Command, Output, Stdio};

/// What a run of the program gave.
pub struct Run {
    pub code: i32,
    pub out: String,
    pub err: String,
}

/// The program with these arguments, not yet started.
pub fn command(arguments: &[&str], home: &Path) -> Command {
    let mut command = Command::new(env!("CARGO_BIN_EXE_dimmet"));
    command
        .args(arguments)
        .env_clear()
        .env("HOME", home)
        .stdin(Stdio::null());
    command
}

pub fn run(arguments: &[&str]) -> Run {
    run_with_input(arguments, b"")
}

pub fn run_with_input(arguments: &[&str], input: &[u8]) -> Run {
    let home = tempfile::tempdir().expect("a folder");
    let mut child = command(arguments, home.path())
        .stdin(Stdio::piped())
        .stdout(Stdio::piped())
        .stderr(Stdio::piped())
        .spawn()
        .expect("the program starts");
    let mut stdin = child.stdin.take().expect("a pipe");
    let input = input.to_vec();
    let feeding = std::thread::spawn(move || {
        // A program that refuses its input stops reading it.
        let _ = stdin.write_all(&input);
    });
    let output = child.wait_with_output().expect("the program ends");
    feeding.join().expect("the input was handed over");
    Run::new(output)
}

impl Run {
    fn new(output: Output) -> Self {
        let text = |bytes: Vec<u8>| String::from_utf8(bytes).expect("text");
        Self {
            code: output.status.code().expect("no signal ended it"),
            out: text(output.stdout),
            err: text(output.stderr),
        }
    }

    /// The output of a run that went well and had nothing to say beside it.
    pub fn succeeds(self) -> String {
        assert_eq!((self.code, self.err.as_str()), (0, ""), "it should succeed");
        self.out
    }

    /// The output as JSON, which starts with the document's version.
    pub fn json(self) -> Value {
        let text = self.succeeds();
        let start: String = text
            .chars()
            .filter(|c| !c.is_whitespace())
            .take(12)
            .collect();
        assert_eq!(
            start, "{\"dimmet\":1,",
            "the version stands first: {text:.60}"
        );
        serde_json::from_str(&text).expect("JSON and nothing else")
    }

    /// One sentence on stderr that holds `parts`, nothing on stdout, code 2.
    pub fn refused(self, parts: &[&str]) {
        let sentence = self.err.trim_end();
        assert_eq!(self.code, 2, "code for: {sentence}");
        assert_eq!(self.out, "", "output beside: {sentence}");
        assert!(sentence.starts_with("dimmet: "), "{sentence}");
        assert!(!sentence.contains('\n'), "one sentence: {sentence}");
        assert!(!sentence.contains("panicked"), "{sentence}");
        for part in parts {
            assert!(sentence.contains(part), "{part} is missing in: {sentence}");
        }
    }
}
