//! How hazy the air is: chosen in words, with their figures, for the nights that are shown.

use crate::desk::{Desk, click};
use dimmet::place::Haze;
use dimmet::plan::Half;
use egui_kittest::kittest::Queryable;

#[test]
fn thicker_air_is_chosen_in_words_and_makes_the_window_shorter() {
    let desk = Desk::new();
    let mut harness = desk.open();
    click(&mut harness, "Mars");
    let last_seen = |harness: &egui_kittest::Harness<'_, dimmet::app::DesktopWindow>| {
        let window = harness.state().state().best_window(Half::Dawn);
        window.expect("a window").end.moment
    };
    let usual = last_seen(&harness);
    // The demo park states 0.28 mag; 0.60 is what "murky" stands for at sea level.
    harness.get_by_label_contains("extinction 0.28 mag");
    click(&mut harness, "Air: the site’s air");
    click(&mut harness, "murky air: 0.60 mag");
    let state = harness.state().state();
    assert_eq!(state.haze(), Some(Haze::Murky));
    harness.get_by_label_contains("extinction 0.60 mag");
    assert!(last_seen(&harness) < usual, "murky air hides Mars earlier");

    click(&mut harness, "Air: murky air");
    click(&mut harness, "the site’s air: 0.28 mag");
    assert_eq!(last_seen(&harness), usual);
}
