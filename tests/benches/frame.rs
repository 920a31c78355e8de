//! How long a frame's own work takes while the time is scrubbed at 1600x1000: 4 ms; and while an
//! obstacle is dragged on the plan of the site: 8 ms.
//!
//! Everything but the painting of the finished shapes: the window's `ui`, with the tree for
//! screen readers that the harness always asks for.

use chrono::{DateTime, Utc};
use dimmet::app::area::Area;
use dimmet::app::command::Command;
use dimmet::app::state::Choices;
use dimmet::app::{DesktopWindow, Start};
use dimmet::measure::TimeScales;
use dimmet::place::PlanPoint;
use eframe::egui::{Event, Key, Modifiers};
use egui_kittest::Harness;
use std::sync::Arc;

fn main() {
    divan::main();
}

fn open() -> Harness<'static, DesktopWindow> {
    let now: DateTime<Utc> = "2026-12-04T15:00:00Z".parse().expect("a time");
    let start = Start {
        clock: Arc::new(move || now),
        scales: TimeScales::new(),
        settings_file: None,
        sites_folder: None,
        site: None,
        spot: None,
        choices: Choices::default(),
        renderer: None,
    };
    let mut harness = Harness::builder()
        .with_size([1600.0, 1000.0])
        .with_max_steps(12)
        .build_eframe(|cc| DesktopWindow::new(cc, start).expect("the shipped palette"));
    harness.run();
    harness
}

/// The moment goes on and back by ten minutes, so that every frame draws another sky.
#[divan::bench]
fn scrubbing(bencher: divan::Bencher) {
    let mut harness = open();
    let mut is_forward = false;
    bencher.bench_local(|| {
        is_forward = !is_forward;
        let key = if is_forward {
            Key::ArrowRight
        } else {
            Key::ArrowLeft
        };
        harness.event(Event::Key {
            key,
            physical_key: None,
            pressed: true,
            repeat: false,
            modifiers: Modifiers::SHIFT,
        });
        harness.step();
    });
}

/// Nothing changes.
#[divan::bench]
fn standing_still(bencher: divan::Bencher) {
    let mut harness = open();
    bencher.bench_local(|| harness.step());
}

fn open_grounds() -> Harness<'static, DesktopWindow> {
    let mut harness = open();
    harness.state_mut().run(Command::ShowArea(Area::Grounds));
    harness.run();
    harness
}

/// The work area Grounds, drawn anew without a change.
#[divan::bench]
fn grounds_standing_still(bencher: divan::Bencher) {
    let mut harness = open_grounds();
    bencher.bench_local(|| harness.step());
}

/// The first obstacle of the demo site goes to and fro, held by the pointer; each frame plans the
/// shown night behind another skyline.
#[divan::bench]
fn dragging_in_grounds(bencher: divan::Bencher) {
    let mut harness = open_grounds();
    let site = harness.state().state().site().clone();
    let mut is_aside = false;
    bencher.bench_local(|| {
        is_aside = !is_aside;
        let mut moved = site.clone();
        let points: Vec<_> = moved.obstacles[0]
            .points()
            .into_iter()
            .map(|at| PlanPoint::new(at.east_m + if is_aside { 0.5 } else { -0.5 }, at.north_m))
            .collect();
        moved.obstacles[0].set_points(&points);
        harness.state_mut().run(Command::DragSite(Box::new(moved)));
        harness.step();
    });
}
