//! themes
