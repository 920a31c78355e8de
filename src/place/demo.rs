//! The invented demo sites.
use super::Site;

/// The demo sites, always known by name.
pub fn demo_sites() -> &'static [Site] {
    &[]
}
