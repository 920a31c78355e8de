//! Choosing, making and opening sites; what is remembered.

use crate::desk::{Desk, NOW, click};
use dimmet::app::DesktopWindow;
use dimmet::place::Site;
use eframe::egui::{Key, Modifiers};
use egui_kittest::Harness;
use egui_kittest::kittest::Queryable;

fn write(harness: &mut Harness<'_, DesktopWindow>, label: &str, text: &str) {
    harness.get_by_label(label).focus();
    harness.run();
    harness.key_press_modifiers(Modifiers::COMMAND, Key::A);
    harness.get_by_label(label).type_text(text);
    harness.run();
}

const LATITUDE: &str = "Latitude in degrees, for example 51.05 or 33.9 S";
const LONGITUDE: &str = "Longitude in degrees, for example −3.42 or 18.4 E";

#[test]
fn a_site_is_chosen_from_the_list() {
    let desk = Desk::new();
    let mut harness = desk.open();
    let names: Vec<String> = dimmet::place::demo_sites()
        .iter()
        .map(|s| s.name.clone())
        .collect();
    click(&mut harness, &format!("Site and spot: {} · mark", names[0]));
    click(&mut harness, &names[1]);
    assert_eq!(harness.state().state().site().name, names[1]);
}

#[test]
fn a_new_site_is_written_saved_and_chosen() {
    let desk = Desk::new();
    let mut harness = desk.open();
    harness.key_press(Key::N);
    harness.run();
    write(&mut harness, "Name", "Teston Mound");
    write(&mut harness, LATITUDE, "51.25");
    write(&mut harness, LONGITUDE, "0.44");
    write(&mut harness, "Fists 1", "0.8");
    write(&mut harness, "Fists 3", "1.5");
    click(&mut harness, "Save site");
    let state = harness.state().state();
    assert_eq!(state.site().name, "Teston Mound");
    assert_eq!(
        state.site().zone().name(),
        "Europe/London",
        "suggested from the place"
    );
    let read = Site::read(&desk.sites().join("teston-mound.site.ron")).expect("its file");
    assert_eq!(&read, state.site());
    let points: Vec<(f64, f64)> = read
        .skyline
        .iter()
        .map(|p| (p.azimuth_deg, p.altitude_deg))
        .collect();
    assert_eq!(
        points,
        [(90.0, 8.0), (270.0, 15.0)],
        "east and west, in degrees"
    );
}

#[test]
fn what_is_wrong_with_a_new_site_is_said_beside_it_and_nothing_is_lost() {
    let desk = Desk::new();
    let mut harness = desk.open();
    harness.key_press(Key::N);
    harness.run();
    write(&mut harness, LATITUDE, "95");
    write(&mut harness, LONGITUDE, "NaN");
    write(&mut harness, "Fists 2", "many");
    click(&mut harness, "Save site");
    for sentence in [
        "Give the site a name.",
        "Write the latitude as a number from −90 to 90",
        "Write the longitude as a number from −180 to 180",
        "Choose the site’s time zone from the list.",
        "Write the height as a number of fists from 0 to 9",
    ] {
        harness.get_by_label_contains(sentence);
    }
    assert!(!desk.sites().exists(), "nothing was written");
    assert_eq!(
        harness.get_by_label(LATITUDE).value().as_deref(),
        Some("95")
    );
    assert_eq!(
        harness.get_by_label("Fists 2").value().as_deref(),
        Some("many")
    );
    harness.key_press(Key::Escape);
    harness.run();
    assert!(
        harness.query_by_label("Save site").is_none(),
        "Escape closes it"
    );
}

#[test]
fn a_second_site_of_one_name_does_not_overwrite_the_first() {
    let desk = Desk::new();
    std::fs::create_dir_all(desk.sites()).expect("a folder");
    let file = desk.sites().join("hill.site.ron");
    std::fs::write(&file, "broken, but somebody's").expect("a file");
    let mut harness = desk.open();
    assert_eq!(
        harness.state().notices().len(),
        1,
        "the broken file is reported"
    );
    assert!(harness.state().notices()[0].contains("hill.site.ron"));
    harness.key_press(Key::N);
    harness.run();
    write(&mut harness, "Name", "Hill");
    write(&mut harness, LATITUDE, "10");
    write(&mut harness, LONGITUDE, "10");
    click(&mut harness, "Save site");
    harness.get_by_label_contains("There is a site file of that name already");
    assert_eq!(
        std::fs::read_to_string(&file).expect("kept"),
        "broken, but somebody's"
    );
}

#[test]
fn a_site_file_is_opened_from_any_folder() {
    let desk = Desk::new();
    let elsewhere = tempfile::tempdir().expect("a folder");
    let file = elsewhere.path().join("far.site.ron");
    let text = r#"(name: "Far End", latitude_deg: -33.9, longitude_deg: 18.4,
        time_zone: "Africa/Johannesburg", terrain: "hills.tif")"#;
    std::fs::write(&file, text).expect("a file");
    let mut harness = desk.open();
    harness.key_press(Key::O);
    harness.run();
    write(
        &mut harness,
        "Path",
        &elsewhere.path().join("none.site.ron").to_string_lossy(),
    );
    click(&mut harness, "Open");
    assert!(
        harness.query_by_label_contains("none.site.ron:").is_some(),
        "the error is shown"
    );
    click(&mut harness, "far.site.ron");
    assert_eq!(harness.state().state().site().name, "Far End");
    // The work goes on beside the window: what it says comes with a later frame.
    let says_why = |harness: &Harness<'_, DesktopWindow>| {
        harness.query_by_label_contains("hills.tif").is_some()
    };
    for _ in 0..200 {
        if says_why(&harness) {
            break;
        }
        std::thread::sleep(std::time::Duration::from_millis(10));
        harness.step();
    }
    assert!(says_why(&harness), "the missing tile is named");

    // Remembered, although it lies outside the sites folder.
    eframe::App::on_exit(harness.state_mut(), None);
    let again = desk.open();
    assert_eq!(again.state().state().site().name, "Far End");
}

#[test]
fn the_window_remembers_body_and_theme() {
    let desk = Desk::new();
    let mut harness = desk.open();
    click(&mut harness, "Saturn");
    click(&mut harness, "Light");
    eframe::App::on_exit(harness.state_mut(), None);
    drop(harness);
    let again = desk.open();
    assert_eq!(again.state().state().body().name(), "saturn");
    assert_eq!(
        again.state().state().theme,
        dimmet::app::palette::Theme::Light
    );
}

#[test]
fn broken_settings_are_set_aside_with_a_notice() {
    let desk = Desk::new();
    std::fs::write(desk.settings(), "(zoom: [").expect("a file");
    let mut harness = desk.open_sized(1280.0, 800.0, desk.start(NOW));
    harness.get_by_label_contains("The settings could not be used");
    let kept = desk.settings().with_file_name("settings.ron.broken");
    assert_eq!(std::fs::read_to_string(kept).expect("kept"), "(zoom: [");
    click(&mut harness, "Got it");
    assert!(harness.state().notices().is_empty());
}

#[test]
fn a_hand_written_file_is_kept_when_the_window_first_writes_the_site() {
    let desk = Desk::new();
    let folder = tempfile::tempdir().expect("a folder");
    let file = folder.path().join("hill.site.ron");
    let text = "// The gate is locked at ten.\n(name: \"Hill\", latitude_deg: 50.0, \
                longitude_deg: 8.0, time_zone: \"Europe/Berlin\")";
    std::fs::write(&file, text).expect("a file");
    let mut start = desk.start(NOW);
    start.site = Some((Site::read(&file).expect("a site"), Some(file.clone())));
    let mut harness = desk.open_sized(1280.0, 800.0, start);
    let kept = folder.path().join("hill.site.ron.before");
    for (name, notices) in [("Hill Top", 1), ("Hill Foot", 1)] {
        let mut site = harness.state().state().site().clone();
        site.spots[0].name = name.to_owned();
        harness
            .state_mut()
            .run(dimmet::app::command::Command::EditSite(Box::new(site)));
        harness.run();
        // Kept once: what the window wrote itself needs no keeping.
        assert_eq!(harness.state().notices().len(), notices, "{name}");
        assert_eq!(std::fs::read_to_string(&kept).expect("kept"), text);
        let written = Site::read(&file).expect("written");
        assert_eq!(written.spots[0].name, name);
    }
}
