//! Whose eye: the picker, what follows from it, and that it is remembered.

use crate::desk::{Desk, click};
use dimmet::app::DesktopWindow;
use dimmet::app::state::State;
use dimmet::light::Eye;
use dimmet::measure::Moment;
use dimmet::plan::Half;
use egui_kittest::Harness;
use egui_kittest::kittest::Queryable;

fn choose(harness: &mut Harness<'_, DesktopWindow>, from: &str, to: &str) {
    click(harness, &format!("Whose eye: {from}"));
    click(harness, to);
}

/// When the chosen eye loses the chosen body in the dawn.
fn last_seen(state: &State) -> Moment {
    let window = state.best_window(Half::Dawn).expect("a window");
    window.end.moment
}

#[test]
fn the_sentence_and_the_windows_follow_the_chosen_eye_without_a_new_plan() {
    let desk = Desk::new();
    let mut harness = desk.open();
    // Venus outlasts the night for every eye; Mars is lost before sunrise.
    click(&mut harness, "Mars");
    harness.get_by_label_contains("Visitors see Mars");
    let before = harness.state().state();
    let (moment, count) = (before.moment(), before.planned().expect("a night").count);
    let visitor = last_seen(before);

    choose(&mut harness, "visitor", "passer-by");
    let state = harness.state().state();
    assert_eq!(state.eye(), Eye::PasserBy);
    let passer_by = last_seen(state);
    assert!(passer_by < visitor, "a passer-by loses Mars before");
    harness.get_by_label_contains("Passers-by notice Mars");

    choose(&mut harness, "passer-by", "keen");
    let state = harness.state().state();
    assert!(
        last_seen(state) > visitor,
        "a practised eye holds it longer"
    );
    harness.get_by_label_contains("A practised eye sees Mars");
    assert_eq!(state.moment(), moment);
    assert_eq!(state.planned().expect("a night").count, count);
}

#[test]
fn each_eye_is_explained_in_the_menu() {
    let desk = Desk::new();
    let mut harness = desk.open();
    click(&mut harness, "Whose eye: visitor");
    for words in [
        "An untrained eye that nobody points",
        "An untrained eye that is pointed",
        "A practised eye that knows",
        "A visitor at the first instrument",
    ] {
        harness.get_by_label_contains(words);
    }
}

#[test]
fn the_eye_is_remembered() {
    let desk = Desk::new();
    let mut harness = desk.open();
    choose(&mut harness, "visitor", "optics");
    eframe::App::on_exit(harness.state_mut(), None);
    drop(harness);
    let again = desk.open();
    assert_eq!(again.state().state().eye(), Eye::Optics);
    again.get_by_label("Whose eye: optics");
}
