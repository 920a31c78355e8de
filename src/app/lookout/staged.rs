//! A scene for the drawings' tests: a demo site, a night, a moment.
#![allow(clippy::unwrap_used)]

use crate::app::command::OpticsView;
use crate::app::palette::{Palette, Theme};
use crate::app::scene::Scene;
use crate::light::Eye;
use crate::measure::{TimeScales, civil};
use crate::place::{Site, Skyline, demo_site};
use crate::plan::{Half, Night, NightRequest, Sight};
use crate::sky::{Body, Ephemeris, Observer, Span};
use crate::words::Words;
use chrono::NaiveDateTime;

/// What a scene borrows.
pub struct Stage {
    ephemeris: Ephemeris,
    site: Site,
    observer: Observer,
    skyline: Skyline,
    night: Night,
    sight: Sight,
    span: Span,
    palette: Palette,
    words: Words,
    half: Half,
    body: Body,
}

impl Stage {
    /// The half of a night, named by its evening's date, at a demo site's mark.
    pub fn new(site: &str, evening: &str, half: Half, body: Body) -> Self {
        let site = demo_site(site).unwrap().clone();
        let (observer, skyline) = (site.observer(), site.skyline(&site.spots[0]));
        let ephemeris = Ephemeris::new();
        let sight = Sight::of_site(&site).unwrap();
        let request = NightRequest {
            observer: &observer,
            skyline: &skyline,
            zone: site.zone(),
            date: evening.parse().unwrap(),
            scales: TimeScales::new(),
            sight: &sight,
            eyes: &Eye::ALL,
            bodies: &Body::BRIGHT,
        };
        let night = Night::plan(&ephemeris, &request).unwrap();
        let span = ephemeris
            .cover(night.start.tt(), night.end.tt(), &Body::ALL)
            .unwrap();
        Self {
            ephemeris,
            observer,
            skyline,
            night,
            sight,
            span,
            palette: Palette::shipped().unwrap(),
            words: Words::english(),
            half,
            body,
            site,
        }
    }

    /// The scene at a local time.
    pub fn scene(&self, local: &str) -> Scene<'_> {
        let local: NaiveDateTime = local.parse().unwrap();
        let utc = civil::utc_from_local(local, self.site.zone()).unwrap();
        let scales = TimeScales::new();
        Scene {
            site: &self.site,
            spot: &self.site.spots[0],
            observer: &self.observer,
            skyline: &self.skyline,
            night: &self.night,
            half: self.half,
            body: self.body,
            eye: Eye::Visitor,
            sight: &self.sight,
            moment: scales.moment_from_civil(utc).unwrap(),
            span: &self.span,
            zone: self.site.zone(),
            ephemeris: &self.ephemeris,
            scales,
            words: &self.words,
            optics_view: OpticsView::Mirrored,
            look: self.palette.look(Theme::Dark),
            night_count: 1,
            sky_count: 1,
        }
    }
}

/// A dawn with Venus high in the south-east over the park's pavilion.
pub fn december_dawn() -> Stage {
    Stage::new("Fennick Common", "2026-12-04", Half::Dawn, Body::Venus)
}
