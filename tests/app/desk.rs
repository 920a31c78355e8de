//! A window at a fixed time, with folders of its own.

use chrono::{DateTime, Utc};
use dimmet::app::state::{Choices, State};
use dimmet::app::{DesktopWindow, Start};
use dimmet::measure::TimeScales;
use egui_kittest::Harness;
use egui_kittest::kittest::Queryable;
use std::path::PathBuf;
use std::sync::Arc;

/// Where a test's window keeps its files.
pub struct Desk {
    folder: tempfile::TempDir,
}

/// A Saturday afternoon on which Venus stands well in the coming dawn.
pub const NOW: &str = "2026-12-04T15:00:00Z";

impl Desk {
    pub fn new() -> Self {
        Self {
            folder: tempfile::tempdir().expect("a temporary folder"),
        }
    }

    pub fn sites(&self) -> PathBuf {
        self.folder.path().join("sites")
    }

    pub fn settings(&self) -> PathBuf {
        self.folder.path().join("settings.ron")
    }

    pub fn start(&self, now: &str) -> Start {
        let now: DateTime<Utc> = now.parse().expect("a time");
        Start {
            clock: Arc::new(move || now),
            scales: TimeScales::new(),
            settings_file: Some(self.settings()),
            sites_folder: Some(self.sites()),
            site: None,
            spot: None,
            choices: Choices::default(),
            renderer: None,
        }
    }

    /// The window on the usual afternoon.
    pub fn open(&self) -> Harness<'static, DesktopWindow> {
        self.open_sized(1280.0, 800.0, self.start(NOW))
    }

    pub fn open_sized(
        &self,
        width: f32,
        height: f32,
        start: Start,
    ) -> Harness<'static, DesktopWindow> {
        let mut harness = Harness::builder()
            .with_size([width, height])
            // The standing map comes from its own thread and is waited for.
            .with_max_steps(60)
            .build_eframe(|cc| DesktopWindow::new(cc, start).expect("the shipped palette"));
        harness.run();
        harness
    }
}

/// Clicks what is called so.
pub fn click(harness: &mut Harness<'_, DesktopWindow>, label: &str) {
    harness.get_by_label(label).click();
    harness.run();
}

/// What is chosen and shown, and its civil time as text.
pub fn local_time(state: &State) -> String {
    state.local_time().format("%a %Y-%m-%d %H:%M").to_string()
}
