//! Finding a file: a path to write, and the folder's files of that kind to choose from.

use crate::app::command::{Command, Commands};
use crate::app::palette::Look;
use crate::app::sites;
use crate::app::widgets::{bold, field, text};
use crate::words::Words;
use eframe::egui::{ScrollArea, Ui};
use std::path::{Path, PathBuf};

/// Entries that the list shows at most.
const MOST_ENTRIES: usize = 500;

/// What kind of file is looked for.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Wanted {
    /// A site file.
    Site,
    /// A picture for under the plan.
    Backdrop,
}

impl Wanted {
    /// The wording of the dialog's title.
    const fn title(self) -> &'static str {
        match self {
            Self::Site => "find-site-file",
            Self::Backdrop => "find-backdrop",
        }
    }

    /// What is said where the folder holds none.
    const fn none(self) -> &'static str {
        match self {
            Self::Site => "no-site-files",
            Self::Backdrop => "no-pictures",
        }
    }

    /// How the names of such files end, in small letters.
    const fn suffixes(self) -> &'static [&'static str] {
        match self {
            Self::Site => &[sites::SUFFIX],
            Self::Backdrop => &[".png", ".jpg", ".jpeg"],
        }
    }

    /// What is done with the file found.
    fn command(self, path: PathBuf) -> Command {
        match self {
            Self::Site => Command::OpenSiteFile(path),
            Self::Backdrop => Command::OpenBackdrop(path),
        }
    }

    fn is_named_so(self, path: &Path) -> bool {
        let name = name_of(path).to_lowercase();
        self.suffixes().iter().any(|suffix| name.ends_with(suffix))
    }
}

/// What has been written, and what stands in that folder.
pub struct FindFile {
    wanted: Wanted,
    written: String,
    listed: Option<PathBuf>,
    folders: Vec<PathBuf>,
    files: Vec<PathBuf>,
    /// Why the file could not be read.
    pub error: Option<String>,
}

impl FindFile {
    /// From a folder on.
    pub fn new(wanted: Wanted, folder: Option<&Path>) -> Self {
        Self {
            wanted,
            written: folder
                .map(|folder| folder.join("").to_string_lossy().into_owned())
                .unwrap_or_default(),
            listed: None,
            folders: Vec::new(),
            files: Vec::new(),
            error: None,
        }
    }

    /// The path as written.
    pub fn path(&self) -> PathBuf {
        PathBuf::from(self.written.trim())
    }

    /// What is done with a file.
    pub fn command(&self, path: PathBuf) -> Command {
        self.wanted.command(path)
    }

    /// Draws the path and the list.
    pub fn show(&mut self, ui: &mut Ui, look: &Look, words: &Words, commands: &mut Commands) {
        let title = words.text(self.wanted.title());
        bold(ui, look, look.sizes.sentence, look.colours.text, &title);
        let label = words.text("file-path");
        field(ui, look, &label, &mut self.written, self.error.as_deref());
        self.list();
        let Some(folder) = self.listed.clone() else {
            let none = words.text("no-such-folder");
            text(ui, look, look.sizes.label, look.colours.lesser, &none);
            return;
        };
        let mut goal = None;
        ScrollArea::vertical().max_height(260.0).show(ui, |ui| {
            if let Some(parent) = folder.parent()
                && ui
                    .selectable_label(false, words.text("folder-above"))
                    .clicked()
            {
                goal = Some(parent.join(""));
            }
            for path in &self.folders {
                if ui
                    .selectable_label(false, format!("{}/", name_of(path)))
                    .clicked()
                {
                    goal = Some(path.join(""));
                }
            }
            for path in &self.files {
                if ui.selectable_label(false, name_of(path)).clicked() {
                    goal = Some(path.clone());
                    commands.push(self.wanted.command(path.clone()));
                }
            }
            if self.files.is_empty() {
                let none = words.text(self.wanted.none());
                text(ui, look, look.sizes.label, look.colours.lesser, &none);
            }
        });
        if let Some(goal) = goal {
            self.written = goal.to_string_lossy().into_owned();
            self.error = None;
        }
    }

    /// Reads the folder of what is written, once for each folder.
    fn list(&mut self) {
        let written = self.path();
        let folder = if written.is_dir() {
            Some(written)
        } else {
            written
                .parent()
                .filter(|folder| folder.is_dir())
                .map(Path::to_owned)
        };
        if folder == self.listed {
            return;
        }
        self.folders.clear();
        self.files.clear();
        let entries = folder
            .as_ref()
            .and_then(|folder| std::fs::read_dir(folder).ok());
        for entry in entries.into_iter().flatten().flatten().take(MOST_ENTRIES) {
            let path = entry.path();
            let is_hidden = name_of(&path).starts_with('.');
            if path.is_dir() && !is_hidden {
                self.folders.push(path);
            } else if self.wanted.is_named_so(&path) {
                self.files.push(path);
            }
        }
        self.folders.sort();
        self.files.sort();
        self.listed = folder;
    }
}

fn name_of(path: &Path) -> String {
    path.file_name()
        .unwrap_or_default()
        .to_string_lossy()
        .into_owned()
}
