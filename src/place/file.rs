//! Site files in RON: read, written.

use super::{Site, SiteError, Spot, check};
use atomic_write_file::AtomicWriteFile;
use ron::extensions::Extensions;
use ron::ser::PrettyConfig;
use std::fs::{self, File};
use std::io::{ErrorKind, Read, Write};
use std::path::Path;

/// The largest file that is read, bytes: forty times the longest skyline anybody has measured.
pub const LARGEST_FILE_BYTES: u64 = 4 * 1024 * 1024;

impl Site {
    /// Reads a site file.
    ///
    /// # Errors
    /// The file is missing, unreadable, a folder, too large, not text or not a valid site: one
    /// sentence naming the file and, where there is one, line and column.
    pub fn read(path: &Path) -> Result<Self, SiteError> {
        let text = read_text(path)?;
        Self::from_ron(&text)
            .map_err(|SiteError(sentence)| SiteError(format!("{}: {sentence}", path.display())))
    }

    /// Reads a site from the text of its file.
    ///
    /// # Errors
    /// As [`Site::read`], without the file's name.
    pub fn from_ron(text: &str) -> Result<Self, SiteError> {
        parse(text).map_err(|refusal| {
            SiteError(match refusal.position {
                Some((line, column)) => {
                    format!("line {line}, column {column}: {}", refusal.sentence)
                }
                None => refusal.sentence,
            })
        })
    }

    /// The text of the site's file; [`Site::from_ron`] gives the same site back.
    ///
    /// # Errors
    /// The site is not one that could be read back ([`Site::check`]).
    pub fn to_ron(&self) -> Result<String, SiteError> {
        reread(self)
    }

    /// Writes the site file, whole or not at all: until the new text is complete the old file
    /// stays as it was.
    ///
    /// # Errors
    /// The site is not valid, or the file cannot be written: one sentence naming it.
    pub fn save(&self, path: &Path) -> Result<(), SiteError> {
        write_text(path, &self.to_ron()?)
    }
}

/// Writes a text file, whole or not at all: until the new text is complete the old file stays as
/// it was.
pub(super) fn write_text(path: &Path, text: &str) -> Result<(), SiteError> {
    let write = || -> std::io::Result<()> {
        let mut file = AtomicWriteFile::open(path)?;
        file.write_all(text.as_bytes())?;
        file.commit()
    };
    if path.is_dir() {
        return Err(SiteError(format!(
            "cannot write {}: it is a folder; add a file name",
            path.display()
        )));
    }
    write().map_err(|error| {
        let folder = path
            .parent()
            .filter(|folder| !folder.as_os_str().is_empty());
        let sentence = match folder {
            Some(folder) if !folder.is_dir() => format!(
                "cannot write {}: there is no folder {}",
                path.display(),
                folder.display()
            ),
            _ => format!("cannot write {}: {}", path.display(), reason(&error)),
        };
        SiteError(sentence)
    })
}

/// Writes a site as text and makes sure that it can be read back.
pub(super) fn reread(site: &Site) -> Result<String, SiteError> {
    let layout = PrettyConfig::new()
        .struct_names(true)
        .new_line("\n")
        .indentor("    ")
        .depth_limit(2);
    let text = options()
        .to_string_pretty(site, layout)
        .map_err(|error| SiteError(format!("the site cannot be written: {error}")))?;
    if text.len() as u64 >= LARGEST_FILE_BYTES {
        return Err(SiteError(format!(
            "the site's file would be larger than {} MB and could not be read again: thin out its \
             measured skylines, or the corners of its obstacles",
            LARGEST_FILE_BYTES / 1024 / 1024
        )));
    }
    // The position is that of a text that nobody has seen.
    let reread = parse(&text).map_err(|refusal| SiteError(refusal.sentence))?;
    // What the terrain makes of it is worked out anew, not written.
    let written = Site {
        far: None,
        ..site.clone()
    };
    if reread == written {
        Ok(text + "\n")
    } else {
        Err(SiteError(
            "the site cannot be written so that it reads back the same: it needs at least one \
             spot"
                .into(),
        ))
    }
}

struct Refusal {
    /// Line and column, from 1.
    position: Option<(usize, usize)>,
    sentence: String,
}

fn parse(text: &str) -> Result<Site, Refusal> {
    let text = text.strip_prefix('\u{feff}').unwrap_or(text);
    let mut site: Site = options().from_str(text).map_err(|error| Refusal {
        position: Some((error.span.start.line, error.span.start.col)),
        // RON's own sentences quote with doubled backticks.
        sentence: error.code.to_string().replace("``", "`"),
    })?;
    if site.spots.is_empty() {
        site.spots.push(Spot {
            eye_height_m: site.people.adult_m,
            ..Spot::mark()
        });
    }
    for spot in &mut site.spots {
        spot.stand(&site.people);
    }
    match check::flaw(&site) {
        None => Ok(site),
        Some(flaw) => Err(Refusal {
            position: flaw.token.position(text),
            sentence: flaw.sentence,
        }),
    }
}

fn options() -> ron::Options {
    ron::Options::default().with_default_extension(Extensions::IMPLICIT_SOME)
}

/// A text file of at most [`LARGEST_FILE_BYTES`], without reading more than that.
pub(super) fn read_text(path: &Path) -> Result<String, SiteError> {
    let shown = path.display();
    let unreadable =
        |error: std::io::Error| SiteError(format!("cannot read {shown}: {}", reason(&error)));
    let about = fs::metadata(path).map_err(unreadable)?;
    if about.is_dir() {
        return Err(SiteError(format!(
            "cannot read {shown}: it is a folder, not a file"
        )));
    }
    if !about.is_file() {
        return Err(SiteError(format!(
            "cannot read {shown}: it is not a plain file"
        )));
    }
    let mut bytes = Vec::new();
    let mut file = File::open(path)
        .map_err(unreadable)?
        .take(LARGEST_FILE_BYTES + 1);
    if about.len() <= LARGEST_FILE_BYTES {
        file.read_to_end(&mut bytes).map_err(unreadable)?;
    }
    if about.len().max(bytes.len() as u64) > LARGEST_FILE_BYTES {
        return Err(SiteError(format!(
            "cannot read {shown}: it is larger than {} MB, which no file of this kind is",
            LARGEST_FILE_BYTES / 1024 / 1024
        )));
    }
    String::from_utf8(bytes).map_err(|error| {
        SiteError(format!(
            "cannot read {shown}: it is not a text file (byte {} is not UTF-8)",
            error.utf8_error().valid_up_to() + 1
        ))
    })
}

fn reason(error: &std::io::Error) -> String {
    match error.kind() {
        ErrorKind::NotFound => "there is no such file".into(),
        ErrorKind::PermissionDenied => "its permissions forbid it".into(),
        ErrorKind::ReadOnlyFilesystem => "that place is read-only".into(),
        ErrorKind::StorageFull => "there is no room left".into(),
        _ => error.to_string(),
    }
}
