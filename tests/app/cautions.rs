//! The caution follows the Sun, and is never out of sight.

use crate::desk::{Desk, NOW, click};
use dimmet::app::DesktopWindow;
use dimmet::app::command::Command;
use dimmet::app::state::Choices;
use dimmet::measure::{Moment, civil};
use dimmet::plan::Half;
use dimmet::sky::Body;
use eframe::egui::Key;
use egui_kittest::Harness;
use egui_kittest::kittest::Queryable;

fn open(
    desk: &Desk,
    site: usize,
    date: &str,
    half: Half,
    body: Body,
) -> Harness<'static, DesktopWindow> {
    let mut start = desk.start(NOW);
    start.site = Some((dimmet::place::demo_sites()[site].clone(), None));
    start.choices = Choices {
        body: Some(body),
        date: date.parse().ok(),
        half: Some(half),
        ..Choices::default()
    };
    desk.open_sized(1280.0, 800.0, start)
}

/// Goes to so many minutes after an instant of the plan.
fn go(harness: &mut Harness<'_, DesktopWindow>, moment: Moment, minutes: f64) {
    harness
        .state_mut()
        .run(Command::SetMoment(moment.plus_seconds(60.0 * minutes)));
    harness.run();
}

fn clock(harness: &Harness<'_, DesktopWindow>, moment: Moment) -> String {
    let state = harness.state().state();
    let instant = state.scales().civil(moment.plus_seconds(1.0)).0;
    civil::local(instant, state.site().zone())
        .format("%-H:%M")
        .to_string()
}

#[test]
fn at_dusk_caps_stay_on_until_the_optics_time() {
    let desk = Desk::new();
    let mut harness = open(&desk, 0, "2026-04-11", Half::Dusk, Body::Venus);
    let night = &harness.state().state().planned().expect("a night").night;
    let (set, from) = (
        night.sun.set.expect("a sunset"),
        night.optics.from.expect("a time"),
    );
    let title = format!("Caps stay on until at least {}", clock(&harness, from));
    go(&mut harness, set, -60.0);
    harness.get_by_label(&title);
    harness.get_by_label_contains("The Sun is up.");
    go(&mut harness, set, 3.0);
    harness.get_by_label(&title);
    harness.get_by_label_contains("The Sun has only just gone.");
    go(&mut harness, from, -0.5);
    harness.get_by_label(&title);
    go(&mut harness, from, 0.5);
    assert!(
        harness.query_by_label(&title).is_none(),
        "the optics time has come"
    );
    harness.get_by_label_contains("The Sun is down");
}

#[test]
fn at_dawn_everything_is_capped_by_the_optics_time() {
    let desk = Desk::new();
    let mut harness = open(&desk, 0, "2026-12-04", Half::Dawn, Body::Venus);
    let night = &harness.state().state().planned().expect("a night").night;
    let (rise, until) = (
        night.sun.rise.expect("a sunrise"),
        night.optics.until.expect("a time"),
    );
    let cap_by = clock(&harness, until);
    go(&mut harness, until, -120.0);
    harness.get_by_label(&format!("The Sun is down: optics until {cap_by}"));
    go(&mut harness, until, -20.0);
    harness.get_by_label(&format!("Cap every instrument by {cap_by}"));
    go(&mut harness, until, 1.0);
    harness.get_by_label("The Sun is about to rise: caps are on");
    go(&mut harness, rise, 5.0);
    harness.get_by_label("The Sun is up: caps stay on");
}

#[test]
fn where_the_sun_does_not_go_down_there_is_no_optics_time() {
    let desk = Desk::new();
    let harness = open(&desk, 2, "2026-06-21", Half::Dusk, Body::Venus);
    harness.get_by_label("No optics time tonight: caps stay on");
}

#[test]
fn near_the_sun_it_is_sterner() {
    let desk = Desk::new();
    // Venus at inferior conjunction on 24 October 2026 (reference table of phenomena).
    let mut harness = open(&desk, 0, "2026-10-24", Half::Dusk, Body::Venus);
    harness.get_by_label_contains("nobody sweeps for it with any optics");
    click(&mut harness, "Jupiter");
    assert!(
        harness
            .query_by_label_contains("nobody sweeps for it")
            .is_none()
    );
}

#[test]
fn the_countdown_runs_with_the_clock() {
    let desk = Desk::new();
    let mut harness = open(&desk, 0, "2026-04-11", Half::Dusk, Body::Venus);
    let night = &harness.state().state().planned().expect("a night").night;
    let from = night.optics.from.expect("a time");
    go(&mut harness, from, -90.0);
    assert!(
        harness.query_by_label_contains("In 1 h").is_none(),
        "no countdown at rest"
    );
    harness.key_press(Key::Space);
    harness.run_steps(3);
    harness.get_by_label_contains("In 1 h");
}
