//! Writing a changed site to its file: after every finished change, whole or not at all.

use super::window::DesktopWindow;
use crate::place::{Site, SiteError};
use std::path::{Path, PathBuf};

impl DesktopWindow {
    /// Writes the changed site to its file; a demo site's changes go to a copy in the sites
    /// folder.
    pub(super) fn save_site(&mut self) {
        let known = self.state.sites().list().get(self.state.site_index());
        let file = known.and_then(|known| known.file.clone());
        let is_copy = file.is_none();
        let Some(file) = file.or_else(|| self.file_for_copy()) else {
            self.state.still_unsaved();
            self.say_once(self.words.text("site-has-no-file"));
            return;
        };
        let saved = make_folder(&file)
            .and_then(|()| keep_hand_written(&file))
            .and_then(|kept| self.state.site().save(&file).map(|()| kept));
        if let Ok(Some(kept)) = &saved {
            let kept = [("file", kept.to_string_lossy())];
            let text = self.words.text_with("hand-written-kept", &kept);
            self.notices.push(text);
        }
        match saved {
            Ok(_) if is_copy => {
                let text = self.words.text_with::<&str>(
                    "demo-site-copied",
                    &[
                        ("site", self.state.site().name.as_str()),
                        ("file", &file.to_string_lossy()),
                    ],
                );
                self.state.give_file(file);
                self.notices.push(text);
            }
            Ok(_) => {}
            Err(error) => {
                self.state.still_unsaved();
                let reason = error.to_string();
                let text = self
                    .words
                    .text_with::<&str>("site-not-saved", &[("reason", &reason)]);
                self.say_once(text);
            }
        }
    }

    /// A file in the sites folder that is not there yet.
    fn file_for_copy(&self) -> Option<PathBuf> {
        let folder = self.state.sites().folder()?;
        let name = &self.state.site().name;
        (1..1000)
            .map(|number| match number {
                1 => folder.join(super::sites::file_name(name)),
                _ => folder.join(super::sites::file_name(&format!("{name} {number}"))),
            })
            .find(|file| !file.exists())
    }

    /// Says something that would otherwise be said with every further change.
    fn say_once(&mut self, text: String) {
        if !self.notices.contains(&text) {
            self.notices.push(text);
        }
    }
}

fn make_folder(file: &std::path::Path) -> Result<(), SiteError> {
    let Some(folder) = file.parent() else {
        return Ok(());
    };
    std::fs::create_dir_all(folder)
        .map_err(|error| SiteError(format!("cannot make {}: {error}", folder.display())))
}

/// A file that somebody wrote by hand, with remarks or in an order of their own, is kept as it
/// was beside the one that takes its place: the window writes the site, not the remarks. Returns
/// where.
fn keep_hand_written(file: &Path) -> Result<Option<PathBuf>, SiteError> {
    let Ok(text) = std::fs::read_to_string(file) else {
        // Nothing there yet, or nothing that could be read: then it is not written over either.
        return Ok(None);
    };
    let is_own = Site::from_ron(&text).and_then(|site| site.to_ron()) == Ok(text);
    let mut name = file.file_name().unwrap_or_default().to_os_string();
    name.push(".before");
    let kept = file.with_file_name(name);
    if is_own {
        return Ok(None);
    }
    std::fs::copy(file, &kept).map_err(|error| {
        SiteError(format!(
            "cannot keep the file as it was as {}: {error}",
            kept.display()
        ))
    })?;
    Ok(Some(kept))
}
