//! The layer rule of `src/lib.rs`, held to: each module uses only the layers above it in the
//! list, only `app` names the window library, and only `main.rs` reads the clock, the zone or
//! the environment.

use std::path::{Path, PathBuf};

const LAYERS: [&str; 9] = [
    "measure", "sky", "place", "light", "plan", "words", "publish", "cli", "app",
];

fn rust_files(folder: &Path, found: &mut Vec<PathBuf>) {
    for entry in std::fs::read_dir(folder).expect("a source folder") {
        let path = entry.expect("a folder entry").path();
        if path.is_dir() {
            rust_files(&path, found);
        } else if path.extension().is_some_and(|extension| extension == "rs") {
            found.push(path);
        }
    }
}

/// Each library source file's layer, name and text without comments.
fn sources() -> Vec<(usize, String, String)> {
    let root = Path::new(env!("CARGO_MANIFEST_DIR")).join("src");
    let mut files = Vec::new();
    rust_files(&root, &mut files);
    files
        .into_iter()
        .filter_map(|path| {
            let name = path
                .strip_prefix(&root)
                .expect("below src")
                .to_string_lossy()
                .into_owned();
            let first = name
                .split(['/', '\\', '.'])
                .next()
                .expect("a first part")
                .to_owned();
            let layer = LAYERS.iter().position(|layer| *layer == first)?;
            let text = std::fs::read_to_string(&path).expect("a readable source file");
            let code: Vec<&str> = text
                .lines()
                .filter(|l| !l.trim_start().starts_with("//"))
                .collect();
            Some((layer, name, code.join("\n")))
        })
        .collect()
}

#[test]
fn a_module_uses_only_the_layers_above_it() {
    let mut uses = 0;
    for (layer, name, code) in sources() {
        for (target, target_name) in LAYERS.iter().enumerate() {
            if code.contains(&format!("crate::{target_name}")) {
                uses += 1;
                assert!(target <= layer, "{name} uses the lower layer {target_name}");
            }
        }
        assert!(
            !code.contains("use crate::{"),
            "{name}: one `use crate::LAYER` a line, so that this check sees it"
        );
    }
    assert!(
        uses > 50,
        "the check found only {uses} uses: does it still see the sources?"
    );
}

#[test]
fn only_the_window_names_the_window_library() {
    for (layer, name, code) in sources() {
        if LAYERS[layer] != "app" {
            for word in ["egui", "eframe", "winit"] {
                assert!(!code.contains(word), "{name} names {word}");
            }
        }
    }
}

#[test]
fn nothing_below_main_reads_the_clock_the_zone_or_the_environment() {
    for (_, name, code) in sources() {
        for word in [
            "Utc::now",
            "Local::now",
            "SystemTime",
            "Instant::now",
            "std::env",
            "env::var",
        ] {
            let is_found = code
                .split(|c: char| !(c.is_alphanumeric() || c == ':' || c == '_'))
                .any(|token| token == word || token.ends_with(&format!("::{word}")));
            assert!(!is_found, "{name} uses {word}");
        }
    }
}
