//! Every theme, size and state draws without a missing sign, an unnamed control or a panic.

use crate::desk::{Desk, NOW, click};
use dimmet::app::state::Choices;
use dimmet::plan::Half;
use dimmet::sky::Body;
use eframe::egui::Key;
use egui_kittest::kittest::Queryable;

#[test]
fn every_size_and_zoom_draws_in_every_theme() {
    for (width, height) in [
        (1600.0, 1000.0),
        (1280.0, 800.0),
        (900.0, 700.0),
        (480.0, 360.0),
    ] {
        for zoom in [1.0, 2.0] {
            let desk = Desk::new();
            let mut harness = desk.open_sized(width, height, desk.start(NOW));
            harness.ctx.set_zoom_factor(zoom);
            for theme in ["Light", "Red light", "Dark"] {
                click(&mut harness, theme);
            }
            // A message that the wording lacks shows its name in brackets.
            assert_eq!(harness.query_all_by_label_contains("[").count(), 0);
            assert!(
                harness
                    .query_by_label_contains("The Sun is down: optics until")
                    .is_some(),
                "the caution is in sight at {width}x{height}, zoom {zoom}"
            );
        }
    }
}

#[test]
fn every_body_draws_in_both_halves_at_every_demo_site_through_the_year() {
    for site in dimmet::place::demo_sites() {
        for date in ["2026-03-20", "2026-06-21", "2026-12-21"] {
            let desk = Desk::new();
            let mut start = desk.start(NOW);
            start.site = Some((site.clone(), None));
            start.choices = Choices {
                body: Some(Body::Moon),
                date: date.parse().ok(),
                half: Some(Half::Dusk),
                ..Choices::default()
            };
            let mut harness = desk.open_sized(1280.0, 800.0, start);
            for half in ["Dawn", "Dusk"] {
                click(&mut harness, half);
                for body in ["Venus", "Mercury", "Mars", "Jupiter", "Saturn", "Moon"] {
                    click(&mut harness, body);
                }
            }
            assert!(
                harness.state().state().planned().is_ok(),
                "{} {date}",
                site.name
            );
        }
    }
}

#[test]
fn help_shows_every_key_and_every_caution() {
    let desk = Desk::new();
    let mut harness = desk.open();
    harness.key_press(Key::F1);
    harness.run();
    for words in [
        "Solar filters belong at the front",
        "ISO 12312-2",
        "Finders and children’s binoculars are optics.",
    ] {
        harness.get_by_label_contains(words);
    }
    for (shortcut, _) in dimmet::app::command::keys() {
        let name = shortcut.format(&eframe::egui::ModifierNames::NAMES, false);
        assert!(
            harness.query_by_label(&name).is_some(),
            "{name} is explained"
        );
    }
    click(&mut harness, "Close");
    assert!(harness.query_by_label("Close").is_none());
}

#[test]
fn tab_reaches_every_control() {
    let desk = Desk::new();
    let mut harness = desk.open();
    let mut reached = std::collections::BTreeSet::new();
    for _ in 0..80 {
        harness.key_press(Key::Tab);
        harness.run();
        let focused = harness.ctx.memory(|memory| memory.focused());
        reached.extend(focused.map(|id| id.value()));
    }
    // Theme 3, help, site, date 3, half 2, body 6, steps 4, best, this minute, speeds 3.
    assert!(
        reached.len() >= 26,
        "only {} controls are reached",
        reached.len()
    );
}
