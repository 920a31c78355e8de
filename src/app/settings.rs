//! What the window remembers from one time to the next, in a small RON file of its own.

use super::area::Area;
use super::palette::Theme;
use crate::light::Eye;
use crate::place::Stature;
use crate::sky::Body;
use serde::{Deserialize, Serialize};
use std::io::{ErrorKind, Read, Write};
use std::path::{Path, PathBuf};

/// The version that is written, and the newest that is read.
const VERSION: u32 = 1;
/// The largest file that is read: a written one takes under 1 kB.
const LONGEST_BYTES: u64 = 64 * 1024;

/// What is remembered.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(default, deny_unknown_fields)]
pub struct Settings {
    pub(super) version: u32,
    /// Name of the chosen site.
    pub site: Option<String>,
    /// Its file, where it has one.
    pub site_file: Option<PathBuf>,
    /// The chosen spot.
    pub spot: Option<String>,
    /// The chosen body.
    pub body: Body,
    /// Whose eye.
    pub eye: Eye,
    /// Whose height.
    pub stature: Stature,
    /// The theme.
    pub theme: Theme,
    /// The work area on view.
    pub area: Area,
    /// Size of everything, 1 being usual.
    pub zoom: f32,
    /// Width and height of the window, points at zoom 1.
    pub window: (f32, f32),
    /// Whether the window fills the screen.
    pub is_maximized: bool,
}

impl Default for Settings {
    fn default() -> Self {
        Self {
            version: VERSION,
            site: None,
            site_file: None,
            spot: None,
            body: Body::Venus,
            eye: Eye::Visitor,
            stature: Stature::default(),
            theme: Theme::default(),
            area: Area::default(),
            zoom: 1.0,
            window: (1280.0, 800.0),
            is_maximized: false,
        }
    }
}

/// A settings file that could not be used.
#[derive(Clone, Debug, PartialEq)]
pub struct SetAside {
    /// The file as it was found.
    pub file: PathBuf,
    /// Where it was moved to; `None` where it could not be moved.
    pub kept_as: Option<PathBuf>,
    /// What is wrong with it.
    pub reason: String,
}

impl Settings {
    /// Reads the file; no file means the defaults. A file that cannot be used is moved aside,
    /// so that nothing of it is lost when the defaults are written.
    pub fn load(file: &Path) -> (Self, Option<SetAside>) {
        match read(file) {
            Ok(found) => (found.unwrap_or_default().within_limits(), None),
            Err(reason) => {
                let mut name = file.file_name().unwrap_or_default().to_os_string();
                name.push(".broken");
                let aside = file.with_file_name(name);
                let kept_as = std::fs::rename(file, &aside).is_ok().then_some(aside);
                let set_aside = SetAside {
                    file: file.to_owned(),
                    kept_as,
                    reason,
                };
                (Self::default(), Some(set_aside))
            }
        }
    }

    /// Reads the file and touches nothing; the defaults where it cannot be used.
    pub fn peek(file: &Path) -> Self {
        let found = read(file).ok().flatten();
        found.unwrap_or_default().within_limits()
    }

    /// Writes the file; a failed write leaves the old one.
    ///
    /// # Errors
    /// The folder cannot be made or the file cannot be written.
    pub fn save(&self, file: &Path) -> std::io::Result<()> {
        if let Some(folder) = file.parent() {
            std::fs::create_dir_all(folder)?;
        }
        let pretty = ron::ser::PrettyConfig::default();
        let text = ron::ser::to_string_pretty(self, pretty).map_err(std::io::Error::other)?;
        let mut writer = atomic_write_file::AtomicWriteFile::open(file)?;
        writer.write_all(text.as_bytes())?;
        writer.commit()
    }

    /// Numbers brought into the range that a window can have.
    fn within_limits(mut self) -> Self {
        let held = |value: f32, low: f32, high: f32, usual: f32| {
            if value.is_finite() {
                value.clamp(low, high)
            } else {
                usual
            }
        };
        let usual = Self::default();
        self.zoom = held(self.zoom, 0.5, 4.0, usual.zoom);
        self.window = (
            held(self.window.0, 480.0, 8000.0, usual.window.0),
            held(self.window.1, 360.0, 8000.0, usual.window.1),
        );
        self
    }
}

fn read(file: &Path) -> Result<Option<Settings>, String> {
    let opened = match std::fs::File::open(file) {
        Err(error) if error.kind() == ErrorKind::NotFound => return Ok(None),
        other => other.map_err(|error| error.to_string())?,
    };
    let mut text = String::new();
    opened
        .take(LONGEST_BYTES)
        .read_to_string(&mut text)
        .map_err(|error| error.to_string())?;
    let settings: Settings = ron::from_str(&text).map_err(|error| error.to_string())?;
    if settings.version > VERSION {
        return Err(format!(
            "version {} is newer than this program's {VERSION}",
            settings.version
        ));
    }
    Ok(Some(settings))
}

#[cfg(test)]
mod tests {
    use super::Settings;
    use crate::app::palette::Theme;

    #[test]
    fn what_is_saved_is_read_back() {
        let folder = tempfile::tempdir().expect("a temporary folder");
        let file = folder.path().join("deeper/settings.ron");
        let settings = Settings {
            site: Some("Hill \"top\"".to_owned()),
            theme: Theme::Red,
            zoom: 1.5,
            ..Settings::default()
        };
        settings.save(&file).expect("a writable folder");
        assert_eq!(Settings::load(&file), (settings, None));
    }

    #[test]
    fn a_broken_file_is_set_aside_and_kept() {
        let folder = tempfile::tempdir().expect("a temporary folder");
        let file = folder.path().join("settings.ron");
        for broken in ["(zoom: ", "(version: 99)", "(unknown: 1)", "\u{1}"] {
            std::fs::write(&file, broken).expect("a writable folder");
            let (settings, aside) = Settings::load(&file);
            assert_eq!(settings, Settings::default(), "{broken}");
            let kept = aside.and_then(|aside| aside.kept_as).expect("moved aside");
            assert_eq!(std::fs::read_to_string(kept).expect("kept"), broken);
            assert!(!file.exists(), "{broken}");
        }
    }

    #[test]
    fn impossible_numbers_are_brought_into_range() {
        let folder = tempfile::tempdir().expect("a temporary folder");
        let file = folder.path().join("settings.ron");
        std::fs::write(&file, "(zoom: NaN, window: (1e30, -5.0))").expect("a writable folder");
        let (settings, aside) = Settings::load(&file);
        assert_eq!(aside, None, "it reads");
        assert_eq!(settings.zoom, 1.0, "zoom");
        assert_eq!(settings.window, (8000.0, 360.0), "window");
    }
}
