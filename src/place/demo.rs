//! The invented demo sites.

use super::Site;
use std::sync::LazyLock;

const FILES: [&str; 3] = [
    include_str!("../../assets/sites/fennick-common.site.ron"),
    include_str!("../../assets/sites/tarrow-bay-school.site.ron"),
    include_str!("../../assets/sites/ternskjell-quay.site.ron"),
];

/// The demo sites, always known by name: a mid-northern park, a southern coastal school and a
/// town where the Sun does not always set. Places, names and people are invented.
pub fn demo_sites() -> &'static [Site] {
    static SITES: LazyLock<Vec<Site>> = LazyLock::new(|| {
        FILES
            .iter()
            .map(|text| Site::from_ron(text).expect("a demo site that the tests have read"))
            .collect()
    });
    &SITES
}

/// A demo site by its name (upper and lower case alike) or its [`slug`].
pub fn demo_site(name: &str) -> Option<&'static Site> {
    let wanted = slug(name);
    demo_sites().iter().find(|site| slug(&site.name) == wanted)
}

/// A name as a file or an option spells it: lower case, with one hyphen for whatever is neither
/// letter nor digit. "Fennick Common" becomes "fennick-common".
pub fn slug(name: &str) -> String {
    let lower = name.to_lowercase();
    let words = lower.split(|c: char| !c.is_alphanumeric());
    words
        .filter(|word| !word.is_empty())
        .collect::<Vec<_>>()
        .join("-")
}
