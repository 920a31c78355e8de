//! The window as the window library sees it: passes time, draws, runs commands, remembers.

use super::command::{Command, Commands};
use super::dialogs::{Dialog, Wanted};
use super::grounds::measure::Measure;
use super::grounds::{GroundsArea, backdrop};
use super::keys::TakeKeys;
use super::lookout::Drawings;
use super::palette::{Palette, Theme};
use super::scene::{Scene, SceneKey};
use super::settings::Settings;
use super::sites::Sites;
use super::start::Start;
use super::state::{Motion, State};
use super::terrain::Terrain;
use super::theme;
use crate::place::Site;
use crate::words::Words;
use eframe::egui::{self, Context};
use std::path::PathBuf;
use std::sync::Arc;
use std::sync::atomic::{AtomicBool, Ordering};
use std::sync::mpsc::{Receiver, channel};
use std::time::Duration;

/// The longest step, seconds, that time runs by in one frame: after a sleep it does not leap.
const LONGEST_STEP_S: f64 = 0.25;

/// Seconds between writes of what is remembered, while it keeps changing.
const SAVE_EVERY_S: f64 = 2.0;

/// The desktop window.
pub struct DesktopWindow {
    pub(super) state: State,
    pub(super) words: Words,
    pub(super) palette: Palette,
    pub(super) dialog: Option<Dialog>,
    /// What went wrong beside the view, oldest first; one is shown at a time.
    pub(super) notices: Vec<String>,
    pub(super) drawings: Drawings,
    pub(super) grounds: GroundsArea,
    pub(super) measure: Measure,
    pub(super) terrain: Terrain,
    /// The half-night's sentence, made when it changes.
    sentence: Option<(SceneKey, String)>,
    applied_theme: Option<Theme>,
    is_red: Arc<AtomicBool>,
    are_keys_blocked: Arc<AtomicBool>,
    keys: Receiver<Command>,
    settings_file: Option<PathBuf>,
    saved: Settings,
    latest: Settings,
    saved_at_s: f64,
}

impl DesktopWindow {
    /// The window before its first frame.
    ///
    /// # Errors
    /// The shipped palette is not one: a mistake in the program.
    pub fn new(
        cc: &eframe::CreationContext<'_>,
        start: Start,
    ) -> Result<Self, Box<dyn std::error::Error + Send + Sync>> {
        let palette = Palette::shipped()?;
        let words = Words::english();
        let mut notices = Vec::new();
        let (settings, set_aside) = match &start.settings_file {
            Some(file) => Settings::load(file),
            None => Default::default(),
        };
        if let Some(aside) = set_aside {
            let file = aside.kept_as.unwrap_or(aside.file);
            notices.push(words.text_with::<&str>(
                "settings-set-aside",
                &[("reason", &aside.reason), ("file", &file.to_string_lossy())],
            ));
        }
        let (mut sites, refused) = Sites::load(start.sites_folder.clone());
        notices.extend(refused.into_iter().map(|error| error.to_string()));
        let chosen = choose_site(&mut sites, &start, &settings);
        let mut choices = start.choices;
        choices.body = choices.body.or(Some(settings.body));
        choices.eye = choices.eye.or(Some(settings.eye));
        choices.stature = choices.stature.or(Some(settings.stature));
        let mut state = State::open(start.clock, start.scales, sites, chosen, choices);
        state.theme = settings.theme;
        state.area = settings.area;

        let ctx = &cc.egui_ctx;
        theme::install_fonts(ctx);
        ctx.set_zoom_factor(settings.zoom);
        let is_red = Arc::new(AtomicBool::new(false));
        ctx.add_plugin(theme::RedLight {
            is_on: is_red.clone(),
        });
        let are_keys_blocked = Arc::new(AtomicBool::new(false));
        let (commands, keys) = channel();
        ctx.add_plugin(TakeKeys {
            commands,
            is_blocked: are_keys_blocked.clone(),
        });
        Ok(Self {
            state,
            words,
            palette,
            dialog: None,
            notices,
            drawings: Drawings::default(),
            grounds: GroundsArea::default(),
            measure: Measure::default(),
            terrain: Terrain::default(),
            sentence: None,
            applied_theme: None,
            is_red,
            are_keys_blocked,
            keys,
            settings_file: start.settings_file,
            latest: settings.clone(),
            saved: settings,
            saved_at_s: f64::NEG_INFINITY,
        })
    }

    /// What is chosen and shown.
    pub fn state(&self) -> &State {
        &self.state
    }

    /// Whatever went wrong and was not dismissed yet.
    pub fn notices(&self) -> &[String] {
        &self.notices
    }

    /// The scene of this frame; `None` where the night cannot be planned.
    pub(super) fn scene(&self) -> Option<Scene<'_>> {
        let planned = self.state.planned().ok()?;
        Some(Scene {
            site: self.state.site(),
            spot: self.state.spot(),
            observer: &planned.observer,
            skyline: &planned.skyline,
            night: &planned.night,
            half: self.state.half(),
            body: self.state.body(),
            eye: self.state.eye(),
            moment: self.state.moment(),
            span: &planned.span,
            zone: planned.zone,
            sight: &planned.sight,
            ephemeris: self.state.ephemeris(),
            scales: self.state.scales(),
            words: &self.words,
            optics_view: self.state.optics_view,
            look: self.palette.look(self.state.theme),
            night_count: planned.count,
            sky_count: planned.sky_count,
        })
    }

    /// The half-night in one sentence.
    pub(super) fn sentence(&self) -> &str {
        self.sentence.as_ref().map_or("", |(_, sentence)| sentence)
    }

    fn make_sentence(&mut self) {
        let made_for = self.sentence.as_ref().map(|(key, _)| *key);
        let fresh = self.scene().and_then(|scene| {
            (made_for != Some(scene.key()))
                .then(|| (scene.key(), self.words.half_night(&scene.half_night())))
        });
        if fresh.is_some() {
            self.sentence = fresh;
        }
    }

    /// Runs a command, as its control or key would.
    pub fn run(&mut self, command: Command) {
        if let Some(command) = self.state.run(command) {
            self.run_in_window(command);
        }
        if self.state.take_unsaved() {
            self.save_site();
        }
    }

    /// What is a matter of dialogs and files.
    fn run_in_window(&mut self, command: Command) {
        match command {
            Command::NewSite => self.dialog = Some(Dialog::new_site()),
            Command::FindSiteFile => {
                self.dialog = Some(Dialog::find_file(Wanted::Site, self.state.sites().folder()));
            }
            Command::FindBackdrop => {
                let folder = self.state.site_folder();
                self.dialog = Some(Dialog::find_file(Wanted::Backdrop, folder));
            }
            Command::OpenBackdrop(file) => self.open_backdrop(file),
            Command::OpenSiteFile(file) => match Site::read(&file) {
                Ok(site) => {
                    self.state.add_site(site, file);
                    self.dialog = None;
                }
                Err(error) => match &mut self.dialog {
                    Some(Dialog::FindFile(find)) => find.error = Some(error.to_string()),
                    _ => self.notices.push(error.to_string()),
                },
            },
            Command::SaveNewSite => self.save_new_site(),
            Command::Measure => self.dialog = Some(Dialog::Measure),
            Command::Exchange => self.dialog = Some(Dialog::Exchange(Box::default())),
            Command::StopTerrain => self.terrain.stop(),
            Command::LookAlongTerrain => self.terrain.look_again(),
            Command::ShowHelp => self.dialog = Some(Dialog::Help),
            Command::CloseDialog => self.dialog = None,
            Command::DismissNotice => {
                self.notices.drain(..self.notices.len().min(1));
            }
            _ => {}
        }
    }

    /// Puts a picture under the plan of the chosen site, by a relative path where it lies in the
    /// site file's folder.
    fn open_backdrop(&mut self, file: PathBuf) {
        match super::picture::size_px(&file) {
            Ok(size_px) => {
                let folder = self.state.site_folder();
                let relative = folder.and_then(|folder| file.strip_prefix(folder).ok());
                let picture = relative.map_or_else(|| file.clone(), ToOwned::to_owned);
                let mut site = self.state.site().clone();
                site.backdrop = Some(backdrop::placed(picture, size_px));
                self.dialog = None;
                self.state.run(Command::EditSite(Box::new(site)));
            }
            Err(flaw) => {
                let sentence = flaw.sentence(&self.words, &file);
                match &mut self.dialog {
                    Some(Dialog::FindFile(find)) => find.error = Some(sentence),
                    _ => self.notices.push(sentence),
                }
            }
        }
    }

    fn save_new_site(&mut self) {
        let Some(Dialog::NewSite(form)) = &mut self.dialog else {
            return;
        };
        let folder = self.state.sites().folder().map(ToOwned::to_owned);
        if let Some((site, file)) = form.save(folder.as_deref(), &self.words) {
            self.state.add_site(site, file);
            self.dialog = None;
        }
    }

    /// What should be remembered now.
    fn settings_now(&self, ctx: &Context) -> Settings {
        let known = self.state.sites().list().get(self.state.site_index());
        let viewport = ctx.input(|input| {
            let viewport = input.viewport();
            (viewport.inner_rect, viewport.maximized)
        });
        let (inner, maximized) = viewport;
        let is_maximized = maximized.unwrap_or(false);
        let zoom = ctx.zoom_factor();
        // A maximized window remembers the size that it had before.
        let window = match inner {
            Some(rect) if !is_maximized => (rect.width() * zoom, rect.height() * zoom),
            _ => self.saved.window,
        };
        Settings {
            site: Some(self.state.site().name.clone()),
            site_file: known.and_then(|known| known.file.clone()),
            spot: Some(self.state.spot().name.clone()),
            body: self.state.body(),
            eye: self.state.eye(),
            stature: self.state.stature(),
            theme: self.state.theme,
            area: self.state.area,
            zoom,
            window,
            is_maximized,
            ..Settings::default()
        }
    }

    /// Writes the settings if they have changed.
    fn remember(&mut self) {
        let Some(file) = &self.settings_file else {
            return;
        };
        if self.latest == self.saved {
            return;
        }
        if let Err(error) = self.latest.save(file) {
            let file = file.to_string_lossy();
            let reason = error.to_string();
            self.notices.push(self.words.text_with::<&str>(
                "settings-not-saved",
                &[("file", &file), ("reason", &reason)],
            ));
            // Said once, not in every frame.
            self.settings_file = None;
        }
        self.saved = self.latest.clone();
    }

    fn apply_theme(&mut self, ctx: &Context) {
        if self.applied_theme == Some(self.state.theme) {
            return;
        }
        theme::apply(ctx, &self.palette.look(self.state.theme));
        let is_red = self.state.theme == Theme::Red;
        self.is_red.store(is_red, Ordering::Relaxed);
        self.applied_theme = Some(self.state.theme);
    }
}

/// The site and spot asked for, or else those remembered, or else the first.
fn choose_site(sites: &mut Sites, start: &Start, settings: &Settings) -> (usize, usize) {
    let site = match &start.site {
        Some((site, Some(file))) => sites.add(site.clone(), file.clone()),
        Some((site, None)) => sites.position(&site.name, None).unwrap_or(0),
        None => {
            let name = settings.site.as_deref().unwrap_or_default();
            let file = settings.site_file.as_deref();
            match (sites.position(name, file), file) {
                (Some(index), _) => index,
                // A file outside the folder that was opened last time.
                (None, Some(file)) => match Site::read(file) {
                    Ok(site) => sites.add(site, file.to_owned()),
                    Err(_) => 0,
                },
                (None, None) => 0,
            }
        }
    };
    let spot = start.spot.as_ref().or(settings.spot.as_ref());
    let spots = &sites.site(site).spots;
    let index = spot.and_then(|name| spots.iter().position(|spot| spot.name == *name));
    (site, index.unwrap_or(0))
}

impl eframe::App for DesktopWindow {
    fn logic(&mut self, ctx: &Context, _frame: &mut eframe::Frame) {
        self.apply_theme(ctx);
        while let Ok(command) = self.keys.try_recv() {
            self.run(command);
        }
        let said = self.terrain.follow(ctx, &mut self.state, &self.words);
        self.notices.extend(said);
        let seconds = f64::from(ctx.input(|input| input.stable_dt)).min(LONGEST_STEP_S);
        self.state.pass(seconds);
        match self.state.motion() {
            Motion::Still => {}
            Motion::Following => ctx.request_repaint_after(Duration::from_secs(1)),
            Motion::Running(_) => ctx.request_repaint(),
        }
        self.latest = self.settings_now(ctx);
        let now_s = ctx.input(|input| input.time);
        if now_s - self.saved_at_s > SAVE_EVERY_S {
            self.remember();
            self.saved_at_s = now_s;
        } else if self.latest != self.saved && self.settings_file.is_some() {
            ctx.request_repaint_after(Duration::from_secs_f64(SAVE_EVERY_S));
        }
    }

    fn ui(&mut self, ui: &mut egui::Ui, _frame: &mut eframe::Frame) {
        let mut commands = Commands::new();
        self.make_sentence();
        self.frame_ui(ui, &mut commands);
        self.dialog_ui(ui.ctx(), &mut commands);
        for command in commands {
            self.run(command);
        }
        self.apply_theme(ui.ctx());
        self.are_keys_blocked
            .store(self.dialog.is_some(), Ordering::Relaxed);
    }

    fn on_exit(&mut self, _gl: Option<&eframe::glow::Context>) {
        // A change that could not be written before gets a last try.
        if self.state.take_unsaved() {
            self.save_site();
        }
        self.remember();
    }

    fn clear_color(&self, _visuals: &egui::Visuals) -> [f32; 4] {
        let ground = self.palette.look(self.state.theme).colours.ground;
        let shown = match self.state.theme {
            Theme::Red => super::palette::red_of_same_brightness(ground),
            Theme::Dark | Theme::Light => ground,
        };
        shown.to_normalized_gamma_f32()
    }
}
