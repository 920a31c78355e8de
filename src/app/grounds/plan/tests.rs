//! The plan at work without a window.
