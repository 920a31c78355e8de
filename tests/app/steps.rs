//! The moment: what the window opens on, and the keys and controls that move it.

use crate::desk::{Desk, NOW, click, local_time};
use dimmet::app::state::{Choices, Motion};
use dimmet::plan::Half;
use dimmet::sky::Body;
use eframe::egui::{Key, Modifiers};
use egui_kittest::kittest::Queryable;

/// Seconds between the moment shown and another.
fn seconds_from(state: &dimmet::app::state::State, moment: dimmet::measure::Moment) -> f64 {
    state.moment().seconds_since(moment)
}

#[test]
fn it_opens_on_the_coming_half_in_which_the_body_stands_best_at_its_best_moment() {
    let desk = Desk::new();
    let harness = desk.open();
    let state = harness.state().state();
    // Venus is a morning star in December 2026: it passed inferior conjunction on 24 October
    // (reference table of phenomena from DE440).
    assert_eq!(state.body(), Body::Venus);
    assert_eq!(state.half(), Half::Dawn);
    let best = state.best_window(Half::Dawn).expect("a window").best.moment;
    let off_s = seconds_from(state, best);
    assert!(off_s.abs() <= 30.0, "{off_s} s from the best moment");
    assert_eq!(
        &local_time(state)[..14],
        "Sat 2026-12-05",
        "a dawn shows its own date"
    );
    harness.get_by_label("Date: Sat 5 Dec 2026");
}

#[test]
fn a_date_alone_opens_on_the_better_half() {
    let desk = Desk::new();
    for (date, half) in [("2026-04-11", Half::Dusk), ("2026-12-04", Half::Dawn)] {
        let mut start = desk.start(NOW);
        start.choices.date = date.parse().ok();
        let harness = desk.open_sized(1280.0, 800.0, start);
        // Venus is an evening star in April 2026 and a morning star in December.
        assert_eq!(harness.state().state().half(), half, "{date}");
    }
}

#[test]
fn arrow_keys_step_by_one_and_by_ten_minutes() {
    let desk = Desk::new();
    let mut harness = desk.open();
    let start = harness.state().state().moment();
    harness.key_press(Key::ArrowRight);
    harness.run();
    assert_eq!(seconds_from(harness.state().state(), start).round(), 60.0);
    harness.key_press_modifiers(Modifiers::SHIFT, Key::ArrowLeft);
    harness.run();
    assert_eq!(seconds_from(harness.state().state(), start).round(), -540.0);
    click(&mut harness, "Ten minutes on");
    assert_eq!(seconds_from(harness.state().state(), start).round(), 60.0);
}

#[test]
fn steps_lead_from_one_half_of_the_night_into_the_next() {
    let desk = Desk::new();
    let mut harness = desk.open();
    click(&mut harness, "Dusk");
    assert_eq!(harness.state().state().half(), Half::Dusk);
    // From before sunset to past midnight.
    for _ in 0..60 {
        harness.key_press_modifiers(Modifiers::SHIFT, Key::ArrowRight);
    }
    harness.run();
    let state = harness.state().state();
    assert_eq!(state.half(), Half::Dawn, "{}", local_time(state));
    let date = state.date();
    // From the dawn into the next night's dusk.
    for _ in 0..90 {
        harness.key_press_modifiers(Modifiers::SHIFT, Key::ArrowRight);
    }
    harness.run();
    let state = harness.state().state();
    assert_eq!(state.half(), Half::Dusk, "{}", local_time(state));
    assert_eq!(Some(state.date()), date.succ_opt());
}

#[test]
fn page_keys_step_by_a_day_and_home_goes_to_the_best_moment() {
    let desk = Desk::new();
    let mut harness = desk.open();
    let before = local_time(harness.state().state());
    harness.key_press(Key::PageDown);
    harness.run();
    let after = local_time(harness.state().state());
    assert_eq!(after, before.replace("Sat 2026-12-05", "Sun 2026-12-06"));
    click(&mut harness, "Day before");
    assert_eq!(local_time(harness.state().state()), before);
    harness.key_press_modifiers(Modifiers::SHIFT, Key::ArrowLeft);
    harness.key_press(Key::Home);
    harness.run();
    assert_eq!(local_time(harness.state().state()), before);
}

#[test]
fn this_minute_shows_the_clock_s_time_and_follows_it() {
    let desk = Desk::new();
    let mut harness = desk.open();
    harness.key_press(Key::T);
    harness.run_steps(2);
    let state = harness.state().state();
    assert_eq!(state.motion(), Motion::Following);
    assert_eq!(
        local_time(state),
        "Fri 2026-12-04 15:00",
        "the park keeps Greenwich time"
    );
    assert_eq!(state.half(), Half::Dusk);
    harness.key_press(Key::ArrowRight);
    harness.run();
    assert_eq!(
        harness.state().state().motion(),
        Motion::Still,
        "a step ends it"
    );
}

#[test]
fn time_runs_and_stops() {
    let desk = Desk::new();
    let mut harness = desk.open();
    let start = harness.state().state().moment();
    harness.key_press(Key::Space);
    harness.run_steps(9);
    let running = harness.state().state();
    assert!(matches!(running.motion(), Motion::Running(_)));
    assert!(seconds_from(running, start) > 60.0, "it has run");
    harness.key_press(Key::Space);
    harness.run();
    assert_eq!(harness.state().state().motion(), Motion::Still);
    harness
        .get_by_label("Let it run at 20 minutes a second")
        .click();
    // At twenty minutes a second, a dawn is over in a minute.
    harness.run_steps(600);
    let state = harness.state().state();
    assert_eq!(
        state.motion(),
        Motion::Still,
        "it stops where the half ends"
    );
    let (_, end) = state.planned().expect("a night").night.half(Half::Dawn);
    assert_eq!(seconds_from(state, end), 0.0);
}

#[test]
fn space_runs_after_a_click_and_presses_what_tab_has_reached() {
    let desk = Desk::new();
    let mut harness = desk.open();
    click(&mut harness, "Mars");
    harness.key_press(Key::Space);
    harness.run_steps(2);
    assert!(matches!(
        harness.state().state().motion(),
        Motion::Running(_)
    ));
    harness.key_press(Key::Space);
    harness.run();
    harness.get_by_label("Jupiter").focus();
    harness.run();
    harness.key_press(Key::Space);
    harness.run();
    assert_eq!(harness.state().state().body(), Body::Jupiter);
    assert_eq!(harness.state().state().motion(), Motion::Still);
}

#[test]
fn choosing_a_body_keeps_the_moment_and_plans_nothing() {
    let desk = Desk::new();
    let mut harness = desk.open();
    let before = harness.state().state();
    let (moment, count) = (before.moment(), before.planned().expect("a night").count);
    for body in ["Mercury", "Mars", "Jupiter", "Saturn", "Moon", "Venus"] {
        click(&mut harness, body);
        let state = harness.state().state();
        assert_eq!(state.body().name(), body.to_lowercase());
        assert_eq!(state.moment(), moment, "{body}");
        assert_eq!(state.planned().expect("a night").count, count, "{body}");
    }
}

#[test]
fn a_date_can_be_written() {
    let desk = Desk::new();
    let mut harness = desk.open();
    let write = |harness: &mut egui_kittest::Harness<'_, dimmet::app::DesktopWindow>,
                 text: &str| {
        let name = "Date as year-month-day";
        harness.get_by_label(name).focus();
        harness.run();
        harness.key_press_modifiers(Modifiers::COMMAND, Key::A);
        harness.get_by_label(name).type_text(text);
        harness.run();
        harness.key_press(Key::Enter);
        harness.run();
    };
    click(&mut harness, "Date: Sat 5 Dec 2026");
    let before = harness.state().state().moment();
    harness.key_press(Key::ArrowLeft);
    harness.run();
    assert_eq!(
        harness.state().state().moment(),
        before,
        "keys are the field's while it is open"
    );
    write(&mut harness, "soon");
    harness.get_by_label_contains("Write the date as year-month-day");
    write(&mut harness, "2027-01-09");
    assert_eq!(&local_time(harness.state().state())[..14], "Sat 2027-01-09");
    assert_eq!(harness.state().state().half(), Half::Dawn);
}

#[test]
fn a_date_outside_the_years_is_one_sentence_and_loses_nothing() {
    let desk = Desk::new();
    let mut start = desk.start(NOW);
    start.choices = Choices {
        body: Some(Body::Mars),
        date: "2400-12-29".parse().ok(),
        half: Some(Half::Dusk),
        ..Choices::default()
    };
    let mut harness = desk.open_sized(1280.0, 800.0, start);
    assert!(harness.state().state().planned().is_ok());
    for _ in 0..4 {
        harness.key_press(Key::PageDown);
    }
    harness.run();
    harness.get_by_label_contains("lies outside the supported years 1600 to 2400");
    assert_eq!(harness.state().state().body(), Body::Mars);
    for _ in 0..4 {
        harness.key_press(Key::PageUp);
    }
    harness.run();
    assert!(harness.state().state().planned().is_ok());
    assert_eq!(harness.state().state().date().to_string(), "2400-12-29");
}

#[test]
fn before_1972_it_says_that_civil_time_is_ut1() {
    let desk = Desk::new();
    for (date, is_ut1) in [("1882-12-06", true), ("2026-12-06", false)] {
        let mut start = desk.start(NOW);
        start.choices.date = date.parse().ok();
        let harness = desk.open_sized(1280.0, 800.0, start);
        let said = harness
            .query_by_label_contains("counted from UT1")
            .is_some();
        assert_eq!(said, is_ut1, "{date}");
    }
}
