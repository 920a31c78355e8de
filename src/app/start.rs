//! Starting the window: with OpenGL, or else with wgpu.

use super::DesktopWindow;
use super::settings::Settings;
use super::state::{Choices, Clock};
use crate::measure::TimeScales;
use crate::place::Site;
use eframe::egui::ViewportBuilder;
use std::fmt;
use std::path::PathBuf;
use std::str::FromStr;

/// What the window starts with. Everything that comes from the machine is given here.
#[derive(Clone)]
pub struct Start {
    /// Tells the time.
    pub clock: Clock,
    /// How civil time leads to TT.
    pub scales: TimeScales,
    /// Where the window's state is kept; `None`: nowhere.
    pub settings_file: Option<PathBuf>,
    /// Where site files are kept; `None`: nowhere.
    pub sites_folder: Option<PathBuf>,
    /// A site to open, in place of the one remembered, with its file if it has one.
    pub site: Option<(Site, Option<PathBuf>)>,
    /// A spot's name on it.
    pub spot: Option<String>,
    /// What else to open on, in place of what is remembered.
    pub choices: Choices,
    /// A renderer to use, in place of trying each.
    pub renderer: Option<Renderer>,
}

/// What draws the window.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Renderer {
    /// OpenGL.
    Glow,
    /// Vulkan, Metal, Direct3D or OpenGL through wgpu.
    Wgpu,
}

impl Renderer {
    /// Both, in the order in which they are tried: OpenGL is several times faster in software.
    pub const ALL: [Self; 2] = [Self::Glow, Self::Wgpu];

    /// The name used on the command line.
    pub const fn name(self) -> &'static str {
        match self {
            Self::Glow => "glow",
            Self::Wgpu => "wgpu",
        }
    }
}

impl FromStr for Renderer {
    type Err = String;
    fn from_str(text: &str) -> Result<Self, String> {
        Self::ALL
            .into_iter()
            .find(|renderer| renderer.name() == text)
            .ok_or_else(|| format!("unknown renderer \"{text}\"; the renderers are glow and wgpu"))
    }
}

/// Why no window could be opened: the first renderer's reason, since a second attempt without
/// a display fails for having been tried twice.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct WindowError {
    /// In a few words.
    pub reason: String,
}

impl fmt::Display for WindowError {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "no window could be opened: {}", self.reason)
    }
}

impl std::error::Error for WindowError {}

/// What a person can do something about; the window library's own words where nothing better
/// is known.
fn reason(error: &eframe::Error) -> String {
    match error {
        eframe::Error::WinitEventLoop(_) => {
            "neither a Wayland nor an X11 display answers".to_owned()
        }
        other => other.to_string(),
    }
}

/// Opens the window and returns when it is closed.
///
/// # Errors
/// There is no display, or neither renderer works on it.
pub fn run(start: Start) -> Result<(), WindowError> {
    let settings = match &start.settings_file {
        // Read once more by the window itself, which also says what is wrong with it.
        Some(file) => Settings::peek(file),
        None => Settings::default(),
    };
    let viewport = ViewportBuilder::default()
        .with_title("Dimmet")
        .with_app_id("dimmet")
        .with_inner_size([settings.window.0, settings.window.1])
        .with_min_inner_size([480.0, 360.0])
        .with_maximized(settings.is_maximized);
    let mut first_failure = None;
    for renderer in Renderer::ALL {
        if start.renderer.is_some_and(|wanted| wanted != renderer) {
            continue;
        }
        let options = eframe::NativeOptions {
            viewport: viewport.clone(),
            renderer: match renderer {
                Renderer::Glow => eframe::Renderer::Glow,
                Renderer::Wgpu => eframe::Renderer::Wgpu,
            },
            ..Default::default()
        };
        let start = start.clone();
        let open = eframe::run_native(
            "dimmet",
            options,
            Box::new(|cc| Ok(Box::new(DesktopWindow::new(cc, start)?))),
        );
        match open {
            Ok(()) => return Ok(()),
            Err(error) => {
                first_failure.get_or_insert(WindowError {
                    reason: reason(&error),
                });
            }
        }
    }
    Err(first_failure.unwrap_or(WindowError {
        reason: "no renderer was tried".to_owned(),
    }))
}
