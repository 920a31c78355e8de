//! sites
