//! The sites that can be chosen: the demo sites and those in the sites folder.

use crate::place::{Site, SiteError, demo_sites, slug};
use std::path::{Path, PathBuf};

/// Ends the name of every site file.
pub const SUFFIX: &str = ".site.ron";

/// A site and where it came from.
#[derive(Clone, Debug)]
pub struct KnownSite {
    /// The site.
    pub site: Site,
    /// Its file; `None` for a demo site.
    pub file: Option<PathBuf>,
}

/// All known sites; never empty, since the demo sites are always among them.
#[derive(Clone, Debug)]
pub struct Sites {
    known: Vec<KnownSite>,
    folder: Option<PathBuf>,
    fallback: Site,
}

impl Sites {
    /// The demo sites and those in the folder, by file name; and why files there are no sites.
    /// A folder that is not there yet holds none.
    pub fn load(folder: Option<PathBuf>) -> (Self, Vec<SiteError>) {
        let demo = demo_sites();
        let mut known: Vec<KnownSite> = demo
            .iter()
            .map(|site| KnownSite {
                site: site.clone(),
                file: None,
            })
            .collect();
        let mut refused = Vec::new();
        for file in folder.as_deref().map(site_files).unwrap_or_default() {
            match Site::read(&file) {
                Ok(site) => known.push(KnownSite {
                    site,
                    file: Some(file),
                }),
                Err(error) => refused.push(error),
            }
        }
        let sites = Self {
            known,
            folder,
            fallback: demo[0].clone(),
        };
        (sites, refused)
    }

    /// All of them, in the order in which they are listed.
    pub fn list(&self) -> &[KnownSite] {
        &self.known
    }
    /// How many.
    pub fn len(&self) -> usize {
        self.known.len()
    }
    /// Never.
    pub fn is_empty(&self) -> bool {
        self.known.is_empty()
    }
    /// One of them; past the end, the first demo site.
    pub fn site(&self, index: usize) -> &Site {
        self.known.get(index).map_or(&self.fallback, |k| &k.site)
    }
    /// Where new sites are kept.
    pub fn folder(&self) -> Option<&Path> {
        self.folder.as_deref()
    }
    /// The place of a site by its file, or by its name where it has none.
    pub fn position(&self, name: &str, file: Option<&Path>) -> Option<usize> {
        self.known
            .iter()
            .position(|k| k.file.as_deref() == file && (file.is_some() || k.site.name == name))
    }
    /// Puts a changed site in place of one of them; past the end, nothing happens.
    pub fn replace(&mut self, index: usize, site: Site) {
        if let Some(known) = self.known.get_mut(index) {
            known.site = site;
        }
    }
    /// Gives one of them a file; of a demo site a copy gets it, and the demo site is put back as
    /// it ships. Returns the place of what has the file.
    pub fn copy_to(&mut self, index: usize, file: PathBuf) -> usize {
        let site = self.site(index).clone();
        let demo = demo_sites().get(index).filter(|_| {
            let known = self.known.get(index);
            known.is_some_and(|known| known.file.is_none())
        });
        if let Some(demo) = demo {
            self.replace(index, demo.clone());
        }
        self.add(site, file)
    }
    /// Takes a site in, in place of what came from the same file before; returns its place.
    pub fn add(&mut self, site: Site, file: PathBuf) -> usize {
        let same = self
            .known
            .iter()
            .position(|k| k.file.as_ref() == Some(&file));
        let known = KnownSite {
            site,
            file: Some(file),
        };
        match same {
            Some(index) => {
                self.known[index] = known;
                index
            }
            None => {
                self.known.push(known);
                self.known.len() - 1
            }
        }
    }
}

/// The site files in a folder, by name; none where the folder cannot be listed.
pub fn site_files(folder: &Path) -> Vec<PathBuf> {
    let Ok(entries) = std::fs::read_dir(folder) else {
        return Vec::new();
    };
    let mut files: Vec<PathBuf> = entries
        .filter_map(|entry| Some(entry.ok()?.path()))
        .filter(|path| is_site_file(path) && path.is_file())
        .collect();
    files.sort();
    files
}

/// Whether a path is named like a site file.
pub fn is_site_file(path: &Path) -> bool {
    path.file_name()
        .is_some_and(|name| name.to_string_lossy().ends_with(SUFFIX))
}

/// The file name that a site of this name gets.
pub fn file_name(site_name: &str) -> String {
    let stem = slug(site_name);
    let stem = if stem.is_empty() { "site" } else { &stem };
    format!("{stem}{SUFFIX}")
}

#[cfg(test)]
mod tests {
    use super::file_name;

    #[test]
    fn a_name_never_leads_out_of_the_folder() {
        assert_eq!(file_name("Fennick Common"), "fennick-common.site.ron");
        assert_eq!(file_name("../.."), "site.site.ron");
        assert_eq!(file_name("/a/b"), "a-b.site.ron");
    }
}
