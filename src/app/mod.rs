//! The desktop window.
