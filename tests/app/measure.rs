//! Measuring from the window: what is written ends in the site, and can be undone.

use crate::desk::{Desk, NOW, click};
use dimmet::app::DesktopWindow;
use dimmet::app::command::Command;
use dimmet::place::Obstacle;
use egui_kittest::Harness;
use egui_kittest::kittest::Queryable;

fn opened(desk: &Desk) -> Harness<'static, DesktopWindow> {
    let mut harness = desk.open_sized(1600.0, 1000.0, desk.start(NOW));
    click(&mut harness, "Grounds");
    click(&mut harness, "Measure");
    harness
}

/// Writes a number into a field by its name.
fn write(harness: &mut Harness<'_, DesktopWindow>, name: &str, value: f64) {
    harness.get_by_label(name).set_value_accesskit(value);
    harness.run();
}

#[test]
fn readings_from_magnetic_north_become_skyline_points() {
    let desk = Desk::new();
    let mut harness = opened(&desk);
    let before = harness.state().state().site().skyline.clone();
    click(&mut harness, "From magnetic north");
    write(&mut harness, "Declination", -2.0);
    for (number, (bearing_deg, altitude_deg)) in [(242.0, 7.0), (252.0, 9.5), (262.0, 8.0)]
        .into_iter()
        .enumerate()
    {
        let number = number + 1;
        write(
            &mut harness,
            &format!("Bearing of reading {number}"),
            bearing_deg,
        );
        write(
            &mut harness,
            &format!("Altitude of reading {number}"),
            altitude_deg,
        );
    }
    click(&mut harness, "Put into the skyline");
    let site = harness.state().state().site().clone();
    let altitude = |azimuth_deg: f64| {
        let found = site
            .skyline
            .iter()
            .find(|point| (point.azimuth_deg - azimuth_deg).abs() < 1e-9);
        found.map(|point| point.altitude_deg)
    };
    // Magnetic north lies 2 degrees west of true north: every bearing counts 2 degrees less.
    assert_eq!(altitude(240.0), Some(7.0));
    assert_eq!(altitude(250.0), Some(9.5));
    assert_eq!(altitude(260.0), Some(8.0));
    assert_eq!(altitude(246.0), None, "replaced within the sweep");
    assert_eq!(altitude(180.0), Some(4.0), "kept outside it");
    harness.state_mut().run(Command::CloseDialog);
    harness.state_mut().run(Command::Undo);
    assert_eq!(harness.state().state().site().skyline, before);
}

#[test]
fn a_height_by_angle_goes_to_the_chosen_obstacle() {
    let desk = Desk::new();
    let mut harness = opened(&desk);
    click(&mut harness, "Height");
    write(&mut harness, "Distance", 40.0);
    write(&mut harness, "Altitude of the top", 45.0);
    click(&mut harness, "Give it this height");
    let site = harness.state().state().site();
    let Some(Obstacle::Tree { height_m, .. }) = site.obstacles.first() else {
        panic!("the demo's first obstacle is a tree")
    };
    // 40 m · tan 45° and the eye's 1.6 m (hand trigonometry).
    assert!((height_m - 41.6).abs() < 1e-9, "{height_m}");
}

#[test]
fn a_noted_time_that_cannot_be_is_refused_and_changes_nothing() {
    let desk = Desk::new();
    let mut harness = opened(&desk);
    let before = harness.state().state().site().clone();
    click(&mut harness, "Noted time");
    let date = harness.get_by_label("Date");
    date.focus();
    harness.run();
    harness
        .get_by_role_and_label(eframe::egui::Role::TextInput, "Date")
        .type_text("x");
    harness.run();
    assert!(
        harness.query_by_label_contains("cannot be read").is_some(),
        "one sentence"
    );
    assert!(harness.query_by_label("Put into the skyline").is_none());
    assert_eq!(*harness.state().state().site(), before);
}

#[test]
fn an_outline_traced_over_a_panorama_becomes_the_skyline() {
    let desk = Desk::new();
    let folder = tempfile::tempdir().expect("a temporary folder");
    let file = folder.path().join("west.png");
    image::RgbImage::new(800, 200).save(&file).expect("saved");
    let mut harness = opened(&desk);
    click(&mut harness, "Photograph");
    harness.get_by_label("Picture").focus();
    harness.run();
    harness
        .get_by_role_and_label(eframe::egui::Role::TextInput, "Picture")
        .type_text(file.to_str().expect("a plain path"));
    harness.run();
    harness.key_press(eframe::egui::Key::Enter);
    harness.run();
    harness.get_by_label("Known directions");
    click(&mut harness, "Load");
    for _ in 0..500 {
        if harness.query_by_label("The photograph").is_some() {
            break;
        }
        std::thread::sleep(std::time::Duration::from_millis(10));
        harness.step();
    }
    click(&mut harness, "Panorama, even upwards");
    // The picture fills the canvas across or up, whichever is less, and stands in its middle.
    let touch = |harness: &mut Harness<'_, DesktopWindow>, x: f32, y: f32| {
        let canvas = harness.get_by_label("The photograph").rect();
        let scale = (canvas.width() / 800.0).min(canvas.height() / 200.0);
        let at = canvas.center() + eframe::egui::vec2(x - 400.0, y - 100.0) * scale;
        harness.hover_at(at);
        harness.drag_at(at);
        harness.drop_at(at);
        harness.run();
    };
    touch(&mut harness, 100.0, 100.0);
    touch(&mut harness, 700.0, 100.0);
    write(&mut harness, "Bearing of mark 1", 240.0);
    write(&mut harness, "Bearing of mark 2", 270.0);
    click(&mut harness, "Outline");
    for (x, y) in [(100.0, 40.0), (400.0, 20.0), (700.0, 60.0)] {
        touch(&mut harness, x, y);
    }
    click(&mut harness, "Put into the skyline");
    let site = harness.state().state().site().clone();
    let spot = site.spots[0].clone();
    let mut bare = site;
    bare.obstacles.clear();
    let seen = bare.skyline(&spot);
    // 30 degrees over 600 pixels; the level is the middle row, 100 pixels down.
    for (azimuth_deg, altitude_deg) in [(240.1, 3.0), (255.0, 4.0), (269.9, 2.0)] {
        let altitude = seen.altitude(dimmet::measure::Angle::from_degrees(azimuth_deg));
        assert!(
            (altitude.degrees() - altitude_deg).abs() < 0.1,
            "{azimuth_deg}: {} for {altitude_deg}",
            altitude.degrees()
        );
    }
}

#[test]
fn the_suns_shadow_sets_the_declination() {
    let desk = Desk::new();
    let mut harness = opened(&desk);
    click(&mut harness, "Sun’s shadow");
    overwrite(&mut harness, "Date", "2026-12-05");
    overwrite(&mut harness, "Time", "12:00");
    write(&mut harness, "The compass, laid along it, reads", 1.0);
    // At 3.42 degrees west the Sun passes the meridian at 12:04.3 by this clock (12:13.7 less the
    // equation of time, 9.4 minutes on this date); 4.3 minutes before, it stands
    // 4.3 min · 0.25 deg/min · cos(-22.4 deg) / sin(73.4 deg) = 1.0 deg short of south.
    let said = "So the declination, with this compass’s own error, is −2.0° east.";
    assert!(harness.query_by_label(said).is_some(), "hand calculation");
    click(&mut harness, "Use this declination");
    click(&mut harness, "Compass and clinometer");
    assert!(harness.query_by_label("Declination").is_some(), "in use");
}

/// Writes a text in place of what stands in a field.
fn overwrite(harness: &mut Harness<'_, DesktopWindow>, name: &str, text: &str) {
    let role = eframe::egui::Role::TextInput;
    harness.get_by_role_and_label(role, name).focus();
    harness.run();
    harness.key_press_modifiers(eframe::egui::Modifiers::COMMAND, eframe::egui::Key::A);
    harness.get_by_role_and_label(role, name).type_text(text);
    harness.run();
}
