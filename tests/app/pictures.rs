//! Pictures of the whole window, where there is a driver to draw them with.
#![allow(clippy::print_stderr)] // A skipped check says so.

use crate::desk::{Desk, NOW, click};
use dimmet::app::DesktopWindow;
use egui_kittest::Harness;
use std::panic::{AssertUnwindSafe, catch_unwind, resume_unwind};

/// Set to `required` where a driver is installed for certain: then nothing is skipped.
const PICTURES: &str = "DIMMET_PICTURES";

type Pixels = Vec<[u8; 4]>;

/// The window's pixels, or `None` where nothing can draw them.
fn picture(harness: &mut Harness<'_, DesktopWindow>) -> Option<Pixels> {
    // Without any adapter the renderer panics; there is no way to ask first.
    match catch_unwind(AssertUnwindSafe(|| harness.render())) {
        Ok(image) => {
            let image = image.expect("a picture");
            Some(image.pixels().map(|pixel| pixel.0).collect())
        }
        Err(panic) => {
            let words = panic.downcast_ref::<String>().map(String::as_str);
            let words = words
                .or(panic.downcast_ref::<&str>().copied())
                .unwrap_or("");
            let is_for_want_of_a_driver = words.contains("adapter");
            if !is_for_want_of_a_driver || std::env::var(PICTURES).as_deref() == Ok("required") {
                resume_unwind(panic);
            }
            eprintln!("skipped: no graphics driver to draw a picture with");
            None
        }
    }
}

#[test]
fn the_red_theme_shows_nothing_but_red() {
    let desk = Desk::new();
    let mut harness = desk.open_sized(1280.0, 800.0, desk.start(NOW));
    click(&mut harness, "Red light");
    let Some(pixels) = picture(&mut harness) else {
        return;
    };
    // The drawn pointer is the test tool's own and white: it stands on the switch.
    let stray = pixels
        .iter()
        .filter(|[_, g, b, _]| *g > 0 || *b > 0)
        .count();
    assert!(stray < 400, "{stray} pixels with green or blue");
    let brightest = pixels.iter().map(|[r, ..]| *r).max();
    assert!(
        brightest > Some(100),
        "it is not simply black: {brightest:?}"
    );
}

#[test]
fn each_theme_fills_the_window_with_its_own_ground() {
    let desk = Desk::new();
    let mut harness = desk.open();
    for (theme, ground) in [("Dark", [0x0d, 0x12, 0x20]), ("Light", [0xf6, 0xf1, 0xe6])] {
        click(&mut harness, theme);
        let Some(pixels) = picture(&mut harness) else {
            return;
        };
        assert_eq!(pixels[0][..3], ground, "{theme}: the first pixel");
        let mut colours: Vec<_> = pixels.clone();
        colours.sort_unstable();
        colours.dedup();
        assert!(
            colours.len() > 500,
            "{theme}: only {} colours",
            colours.len()
        );
    }
}
