//! The plan of the site: drawn, moved, taken back, typed and saved, by mouse and by keys.

use crate::desk::{Desk, click};
use dimmet::app::DesktopWindow;
use dimmet::app::area::Area;
use dimmet::app::command::Command;
use dimmet::place::{Obstacle, PlanPoint, Site};
use eframe::egui::accesskit::Role;
use eframe::egui::{Event, Key, Modifiers, PointerButton, Pos2, Vec2, pos2, vec2};
use egui_kittest::Harness;
use egui_kittest::kittest::Queryable;

type Window = Harness<'static, DesktopWindow>;

const PLAN: &str = "Plan of the site";

/// A site of one spot and nothing else, so that nothing but the test's own things is snapped to.
const BARE: &str = r#"Site(name: "Bare Field", latitude_deg: 51.0, longitude_deg: -3.0,
    time_zone: "Europe/London",
    obstacles: [Tree(label: "oak", east_m: -30.0, north_m: -20.0, height_m: 12.0, width_m: 8.0)],
    outline_m: [(-40.0, -40.0), (40.0, -40.0), (40.0, 40.0), (-40.0, 40.0)])"#;

fn open(desk: &Desk) -> Window {
    open_high(desk, 800.0)
}

/// So high that all of the right column is in sight.
fn open_high(desk: &Desk, height: f32) -> Window {
    std::fs::create_dir_all(desk.sites()).unwrap();
    let file = desk.sites().join("bare-field.site.ron");
    std::fs::write(&file, BARE).unwrap();
    let mut start = desk.start(crate::desk::NOW);
    start.site = Some((Site::read(&file).unwrap(), Some(file)));
    let mut window = desk.open_sized(1280.0, height, start);
    window.state_mut().run(Command::ShowArea(Area::Grounds));
    window.run();
    window
}

fn site(window: &Window) -> &Site {
    window.state().state().site()
}

fn saved(desk: &Desk) -> Site {
    Site::read(&desk.sites().join("bare-field.site.ron")).unwrap()
}

/// Where a point of the plan is drawn while everything is shown: the outline of 80 m fills the
/// plan's height, and the mark is its middle.
fn on_screen(window: &Window, east_m: f64, north_m: f64) -> Pos2 {
    let rect = window.get_by_label(PLAN).rect();
    let scale = f64::from(rect.width().min(rect.height())) / (1.16 * 80.0);
    rect.center() + vec2((scale * east_m) as f32, (-scale * north_m) as f32)
}

fn button(window: &mut Window, pos: Pos2, pressed: bool, modifiers: Modifiers) {
    window.event(Event::PointerButton {
        pos,
        button: PointerButton::Primary,
        pressed,
        modifiers,
    });
    window.step();
}

fn click_at(window: &mut Window, east_m: f64, north_m: f64) {
    let pos = on_screen(window, east_m, north_m);
    window.event(Event::PointerMoved(pos));
    window.step();
    button(window, pos, true, Modifiers::NONE);
    button(window, pos, false, Modifiers::NONE);
    // So that two clicks do not count as a double one.
    for _ in 0..40 {
        window.step();
    }
}

/// Presses at one point, moves on in steps, and does not let go yet.
fn pull(window: &mut Window, from: (f64, f64), to: (f64, f64), modifiers: Modifiers) {
    let (from, to) = (
        on_screen(window, from.0, from.1),
        on_screen(window, to.0, to.1),
    );
    window.event(Event::ModifiersChanged(modifiers));
    window.event(Event::PointerMoved(from));
    window.step();
    button(window, from, true, modifiers);
    for share in [0.3, 0.7, 1.0] {
        window.event(Event::PointerMoved(from.lerp(to, share)));
        window.step();
    }
    window.step();
}

fn drag(window: &mut Window, from: (f64, f64), to: (f64, f64), modifiers: Modifiers) {
    pull(window, from, to, modifiers);
    let pos = on_screen(window, to.0, to.1);
    button(window, pos, false, modifiers);
    window.event(Event::ModifiersChanged(Modifiers::NONE));
    window.run();
}

/// Takes a tool of the bar.
fn take(window: &mut Window, name: &str) {
    window
        .get_by_role_and_label(Role::RadioButton, name)
        .click();
    window.run();
}

fn press(window: &mut Window, key: Key) {
    press_with(window, Modifiers::NONE, key);
}

fn press_with(window: &mut Window, modifiers: Modifiers, key: Key) {
    window.key_press_modifiers(modifiers, key);
    window.run();
}

fn write(window: &mut Window, label: &str, text: &str) {
    window.get_by_label(label).focus();
    window.run();
    window.key_press_modifiers(Modifiers::COMMAND, Key::A);
    window.get_by_label(label).type_text(text);
    window.run();
    press(window, Key::Enter);
}

fn points(window: &Window, index: usize) -> Vec<(f64, f64)> {
    let points = site(window).obstacles[index].points();
    points
        .into_iter()
        .map(|at| (at.east_m, at.north_m))
        .collect()
}

#[test]
fn a_wall_is_drawn_moved_taken_back_measured_and_deleted() {
    let desk = Desk::new();
    let mut window = open(&desk);
    take(&mut window, "Wall");
    click_at(&mut window, 10.0, 10.0);
    click_at(&mut window, 10.0, 25.0);
    press(&mut window, Key::Enter);
    // On the grid, due north.
    assert_eq!(points(&window, 1), [(10.0, 10.0), (10.0, 25.0)]);
    assert_eq!(saved(&desk), *site(&window), "it is in the file");

    drag(&mut window, (10.0, 14.0), (20.0, 14.0), Modifiers::NONE);
    assert_eq!(points(&window, 1), [(20.0, 10.0), (20.0, 25.0)], "moved");
    press_with(&mut window, Modifiers::COMMAND, Key::Z);
    assert_eq!(points(&window, 1), [(10.0, 10.0), (10.0, 25.0)], "undone");
    assert_eq!(saved(&desk), *site(&window), "undoing is saved too");
    press_with(&mut window, Modifiers::COMMAND, Key::Y);
    assert_eq!(points(&window, 1), [(20.0, 10.0), (20.0, 25.0)], "redone");

    write(&mut window, "Height, m", "3.4");
    let height = |window: &Window| match site(window).obstacles[1] {
        Obstacle::Wall { height_m, .. } => height_m,
        _ => panic!("the wall"),
    };
    assert_eq!(height(&window), 3.4);
    write(&mut window, "Height, m", "high");
    window.get_by_label("Write a number, for example 4.5.");
    write(&mut window, "Height, m", "-3");
    window.get_by_label_contains("must lie between 0.01 and 1000 metres");
    assert_eq!(height(&window), 3.4, "what cannot be changes nothing");
    write(&mut window, "East, m (point 2)", "24.5");
    assert_eq!(points(&window, 1)[1], (24.5, 25.0));

    click(&mut window, "Delete");
    assert_eq!(site(&window).obstacles.len(), 1);
    assert_eq!(saved(&desk), *site(&window));
}

#[test]
fn sides_that_cross_are_refused_in_one_sentence_and_change_nothing() {
    let desk = Desk::new();
    let mut window = open(&desk);
    let before = site(&window).clone();
    take(&mut window, "Building");
    for (east_m, north_m) in [(0.0, 10.0), (20.0, 10.0), (5.0, 30.0), (20.0, 25.0)] {
        click_at(&mut window, east_m, north_m);
    }
    press(&mut window, Key::Enter);
    window.get_by_label_contains("its sides cross each other");
    assert_eq!(*site(&window), before);
    assert!(!window.state().state().can_undo());
    // The corners are still there: the last two are put elsewhere, and then it stands.
    press(&mut window, Key::Backspace);
    press(&mut window, Key::Backspace);
    click_at(&mut window, 20.0, 30.0);
    click_at(&mut window, 0.0, 30.0);
    click_at(&mut window, 0.0, 10.0);
    assert_eq!(
        points(&window, 1),
        [(0.0, 10.0), (20.0, 10.0), (20.0, 30.0), (0.0, 30.0)],
        "closed on its first corner"
    );
    assert!(window.query_by_label_contains("cross each other").is_none());
}

#[test]
fn a_spot_in_a_crown_is_refused_and_the_last_spot_stays() {
    let desk = Desk::new();
    let mut window = open(&desk);
    take(&mut window, "Spot");
    click_at(&mut window, -30.0, -20.0);
    window.get_by_label_contains("stands inside the obstacle");
    assert_eq!(site(&window).spots.len(), 1);
    press(&mut window, Key::Escape);
    press(&mut window, Key::Escape);
    click_at(&mut window, 0.0, 0.0);
    press(&mut window, Key::Delete);
    assert_eq!(site(&window).spots.len(), 1, "a site keeps one");

    take(&mut window, "Spot");
    click_at(&mut window, 20.0, 0.0);
    assert_eq!(
        site(&window).spots[1].plan_point(),
        PlanPoint::new(20.0, 0.0)
    );
    let state = window.state().state();
    assert_eq!(state.spot_index(), 1, "the spot of the whole window");
    click_at(&mut window, 0.0, 0.0);
    assert_eq!(window.state().state().spot_index(), 0);
}

#[test]
fn a_place_is_read_under_the_plan_and_standing_in_a_crown_is_refused() {
    let desk = Desk::new();
    let mut window = open_high(&desk, 1600.0);
    let start = std::time::Instant::now();
    while window.query_by_label_contains("Legend: from").is_none() {
        assert!(start.elapsed().as_secs() < 120, "no map");
        std::thread::sleep(std::time::Duration::from_millis(5));
        window.step();
    }
    // Under the plan, since the column may be scrolled.
    let pos = on_screen(&window, 20.0, 10.0);
    window.event(Event::PointerMoved(pos));
    window.run();
    let read = window.get_by_label_contains("There, 20").rect();
    assert!(read.top() >= window.get_by_label(PLAN).rect().bottom());
    click(&mut window, "Stand where I click");
    click_at(&mut window, -30.0, -20.0);
    window.get_by_label_contains("Nothing was changed");
    let state = window.state().state();
    assert_eq!(state.site().spots.len(), 1);
    assert_eq!(state.spot_index(), 0, "no spot that is not there");
    assert!(
        window.query_by_label("Crown width, m").is_none(),
        "the click selects nothing"
    );
    click(&mut window, "Stand where I click");
    click_at(&mut window, 20.0, 10.0);
    let state = window.state().state();
    assert_eq!(state.spot_index(), 1, "the new spot");
    assert!((state.spot().east_m - 20.0).abs() < 0.5);
}

#[test]
fn the_plan_stays_where_it_is_while_spots_are_chosen() {
    let desk = Desk::new();
    // The length of the spots' names decides how the pickers wrap here.
    let mut window = desk.open_sized(1280.0, 800.0, desk.start(crate::desk::NOW));
    window.state_mut().run(Command::ShowArea(Area::Grounds));
    window.run();
    let before = window.get_by_label(PLAN).rect();
    for index in 0..window.state().state().site().spots.len() {
        window.state_mut().run(Command::ChooseSpot(index));
        window.run();
        assert_eq!(window.get_by_label(PLAN).rect(), before, "spot {index}");
    }
}

#[test]
fn the_line_at_the_bottom_holds_the_keys_of_the_area() {
    let desk = Desk::new();
    let mut window = open(&desk);
    window.get_by_label_contains("On the plan: 1–9, 0 tools");
    assert!(window.query_by_label_contains("Space let it run").is_none());
    window.state_mut().run(Command::ShowArea(Area::Lookout));
    window.run();
    window.get_by_label_contains("Space let it run");
    assert!(window.query_by_label_contains("On the plan:").is_none());
}

#[test]
fn positions_snap_to_corners_and_lines_unless_alt_or_the_box_says_not() {
    let desk = Desk::new();
    let mut window = open(&desk);
    take(&mut window, "Pole");
    // 0.7 m beside the outline's corner.
    click_at(&mut window, 39.5, 39.4);
    assert_eq!(points(&window, 1), [(40.0, 40.0)], "the corner");
    take(&mut window, "Pole");
    click_at(&mut window, 40.6, 12.3);
    assert_eq!(points(&window, 2)[0].0, 40.0, "the outline's side");
    drag(&mut window, (-30.0, -20.0), (-39.6, -39.5), Modifiers::ALT);
    let [(east_m, north_m)] = points(&window, 0)[..] else {
        panic!("the oak's axis");
    };
    assert!((east_m + 39.6).abs() < 0.11 && (north_m + 39.5).abs() < 0.11);
    click(&mut window, "Snap");
    take(&mut window, "Pole");
    click_at(&mut window, 39.5, -39.4);
    let [(east_m, north_m)] = points(&window, 3)[..] else {
        panic!("the pole's axis");
    };
    assert!((east_m - 39.5).abs() < 0.11 && (north_m + 39.4).abs() < 0.11);
}

#[test]
fn a_rectangle_is_dragged_and_keeps_its_angles_while_a_corner_is_pulled() {
    let desk = Desk::new();
    let mut window = open(&desk);
    take(&mut window, "Building");
    drag(&mut window, (5.0, 5.0), (25.0, 15.0), Modifiers::NONE);
    assert_eq!(
        points(&window, 1),
        [(5.0, 5.0), (25.0, 5.0), (25.0, 15.0), (5.0, 15.0)]
    );
    drag(&mut window, (25.0, 15.0), (30.0, 20.0), Modifiers::NONE);
    assert_eq!(
        points(&window, 1),
        [(5.0, 5.0), (30.0, 5.0), (30.0, 20.0), (5.0, 20.0)]
    );
    // With Ctrl the corner goes alone; a pulled middle of a side becomes a corner.
    drag(&mut window, (30.0, 20.0), (35.0, 25.0), Modifiers::COMMAND);
    assert_eq!(points(&window, 1)[2], (35.0, 25.0));
    assert_eq!(points(&window, 1)[1], (30.0, 5.0));
    drag(&mut window, (17.5, 5.0), (17.5, -5.0), Modifiers::ALT);
    assert_eq!(points(&window, 1).len(), 5);
    let (_, north_m) = points(&window, 1)[1];
    assert!((north_m + 5.0).abs() < 0.11, "{north_m}");
}

#[test]
fn the_plan_works_by_keys_alone() {
    let desk = Desk::new();
    let mut window = open(&desk);
    let moment = window.state().state().moment();
    window.get_by_label(PLAN).focus();
    window.run();
    // A tree: the cross begins in the middle, 12 m east and 3 m north from there.
    press(&mut window, Key::Num2);
    press_with(&mut window, Modifiers::SHIFT, Key::ArrowRight);
    for key in [
        Key::ArrowRight,
        Key::ArrowRight,
        Key::ArrowUp,
        Key::ArrowUp,
        Key::ArrowUp,
    ] {
        press(&mut window, key);
    }
    press(&mut window, Key::Space);
    assert_eq!(points(&window, 1), [(12.0, 3.0)]);
    // It is selected: the arrows move it, finely and by metres, each as one step.
    press(&mut window, Key::ArrowLeft);
    press_with(&mut window, Modifiers::SHIFT, Key::ArrowDown);
    assert_eq!(points(&window, 1), [(11.9, 2.0)]);
    assert_eq!(saved(&desk), *site(&window));
    press_with(&mut window, Modifiers::COMMAND, Key::Z);
    assert_eq!(points(&window, 1), [(11.9, 3.0)]);
    press_with(&mut window, Modifiers::COMMAND, Key::D);
    assert_eq!(site(&window).obstacles.len(), 3);
    press(&mut window, Key::Delete);
    assert_eq!(site(&window).obstacles.len(), 2);
    // Tab goes through the things: the mark, the oak.
    press(&mut window, Key::Tab);
    press(&mut window, Key::Tab);
    press(&mut window, Key::Delete);
    assert_eq!(site(&window).obstacles.len(), 1, "the oak is gone");
    let on_s = window.state().state().moment().seconds_since(moment);
    assert!(on_s.abs() < 0.01, "none of it has moved the time: {on_s} s");
    press(&mut window, Key::Escape);
    press(&mut window, Key::ArrowRight);
    let on_s = window.state().state().moment().seconds_since(moment);
    assert_eq!(
        on_s.round(),
        60.0,
        "without the focus the arrows are the time's"
    );
}

#[test]
fn keys_set_points_a_metre_apart_however_small_the_plan_is_shown() {
    let desk = Desk::new();
    let mut window = open(&desk);
    window.get_by_label(PLAN).focus();
    window.run();
    press(&mut window, Key::Num4);
    // Away from the mark, in which no wall may stand.
    press_with(&mut window, Modifiers::SHIFT, Key::ArrowRight);
    press(&mut window, Key::Space);
    press(&mut window, Key::ArrowRight);
    press(&mut window, Key::Space);
    press(&mut window, Key::ArrowUp);
    press(&mut window, Key::Space);
    press(&mut window, Key::Enter);
    assert_eq!(points(&window, 1), [(10.0, 0.0), (11.0, 0.0), (11.0, 1.0)]);
}

#[test]
fn a_drag_shows_at_once_but_is_written_only_when_it_ends() {
    let desk = Desk::new();
    let mut window = open(&desk);
    let before = saved(&desk);
    pull(&mut window, (-30.0, -20.0), (-20.0, -10.0), Modifiers::NONE);
    assert_eq!(
        points(&window, 0),
        [(-20.0, -10.0)],
        "shown while it goes on"
    );
    // Whatever ends the program now loses this drag and nothing else.
    assert_eq!(saved(&desk), before);
    let pos = on_screen(&window, -20.0, -10.0);
    button(&mut window, pos, false, Modifiers::NONE);
    window.run();
    assert_eq!(saved(&desk), *site(&window));
    assert_ne!(saved(&desk), before);
    // One step, however many frames it took.
    press_with(&mut window, Modifiers::COMMAND, Key::Z);
    assert_eq!(*site(&window), before);
    // Escape in mid-drag puts everything back, and there is nothing to undo.
    pull(&mut window, (-30.0, -20.0), (-20.0, -10.0), Modifiers::NONE);
    press(&mut window, Key::Escape);
    assert_eq!(*site(&window), before);
    assert!(!window.state().state().can_undo());
}

#[test]
fn a_file_that_cannot_be_written_is_said_once_and_the_change_stays() {
    let desk = Desk::new();
    let mut window = open(&desk);
    // A folder in the file's place refuses whoever runs the test.
    let file = desk.sites().join("bare-field.site.ron");
    std::fs::remove_file(&file).unwrap();
    std::fs::create_dir(&file).unwrap();
    take(&mut window, "Pole");
    click_at(&mut window, 12.0, 12.0);
    window.get_by_label_contains("The last change is not in the file yet");
    assert_eq!(site(&window).obstacles.len(), 2, "the change stays");
    std::fs::remove_dir(&file).unwrap();
    press_with(&mut window, Modifiers::COMMAND, Key::D);
    assert_eq!(saved(&desk), *site(&window), "the next change saves both");
}

#[test]
fn the_wheel_zooms_at_the_pointer_and_the_ground_is_dragged() {
    let desk = Desk::new();
    let mut window = open(&desk);
    let pos = on_screen(&window, 20.0, 20.0);
    window.event(Event::PointerMoved(pos));
    window.step();
    window.event(Event::MouseWheel {
        unit: eframe::egui::MouseWheelUnit::Point,
        delta: Vec2::new(0.0, 200.0),
        phase: eframe::egui::TouchPhase::Move,
        source: eframe::egui::MouseWheelSource::Wheel,
        modifiers: Modifiers::NONE,
    });
    window.run();
    take(&mut window, "Pole");
    window.event(Event::PointerMoved(pos));
    window.step();
    button(&mut window, pos, true, Modifiers::NONE);
    button(&mut window, pos, false, Modifiers::NONE);
    window.run();
    assert_eq!(
        points(&window, 1),
        [(20.0, 20.0)],
        "the point under the pointer stayed"
    );
    // Somewhere else the plan is larger now.
    press(&mut window, Key::E);
    let nearer = on_screen(&window, 20.0, 20.0);
    assert_eq!(nearer, pos, "and all of it is shown again as before");
    drag(&mut window, (0.0, 20.0), (-10.0, 20.0), Modifiers::NONE);
    assert_eq!(
        site(&window).obstacles.len(),
        2,
        "dragging ground changes nothing"
    );
    take(&mut window, "Pole");
    click_at(&mut window, 0.0, 30.0);
    assert_eq!(
        points(&window, 2),
        [(10.0, 30.0)],
        "the ground was dragged 10 m west"
    );
}

#[test]
fn a_picture_is_placed_by_two_known_points() {
    let desk = Desk::new();
    let mut window = open_high(&desk, 1800.0);
    let file = desk.sites().join("aerial.png");
    image_of(200, 100).save(&file).unwrap();
    window.state_mut().run(Command::OpenBackdrop(file));
    window.run();
    let backdrop = site(&window).backdrop.clone().unwrap();
    assert_eq!(
        backdrop.picture.to_string_lossy(),
        "aerial.png",
        "beside the site's file"
    );
    // At first 100 m wide around the mark: 30 m east is pixel 160 of 200.
    take(&mut window, "First known point");
    click_at(&mut window, -30.0, 0.0);
    take(&mut window, "Second known point");
    click_at(&mut window, 30.0, 0.0);
    let backdrop = site(&window).backdrop.clone().unwrap();
    let px = |point: dimmet::place::PicturePoint| (point.right_px, point.down_px);
    assert_eq!(px(backdrop.first), (40.0, 50.0));
    assert_eq!(px(backdrop.second), (160.0, 50.0));
    write(&mut window, "Second from first, m", "24");
    write(&mut window, "Its bearing, °", "0");
    let second = site(&window).backdrop.clone().unwrap().second.at;
    assert!(
        second.distance_m(PlanPoint::new(-30.0, 24.0)) < 1e-9,
        "{second:?}"
    );
    assert_eq!(saved(&desk), *site(&window));
    click(&mut window, "Take it away");
    assert_eq!(site(&window).backdrop, None);
}

#[test]
fn pictures_that_cannot_be_used_are_refused_in_one_sentence() {
    let desk = Desk::new();
    let mut window = open(&desk);
    let before = site(&window).clone();
    let file = |name: &str| desk.sites().join(name);
    std::fs::write(file("letter.png"), "Dear all,").unwrap();
    // 200 megapixels by its header; nothing of it is decoded, since there is nothing else.
    let header = png_header(20_000, 10_000);
    std::fs::write(file("huge.png"), header).unwrap();
    for (name, sentence) in [
        ("letter.png", "is no PNG or JPEG picture"),
        ("huge.png", "has 200 megapixels, but may have at most 100"),
        ("missing.png", "cannot be read"),
    ] {
        window.state_mut().run(Command::OpenBackdrop(file(name)));
        window.run();
        window.get_by_label_contains(sentence);
        window.state_mut().run(Command::DismissNotice);
        window.run();
        assert_eq!(*site(&window), before, "{name}");
    }
}

fn image_of(width: u32, height: u32) -> image::RgbImage {
    image::RgbImage::from_fn(width, height, |x, y| image::Rgb([x as u8, y as u8, 90]))
}

/// A PNG with a header and no pixels (PNG specification, third edition, 5.2 and 11.2.1).
fn png_header(width: u32, height: u32) -> Vec<u8> {
    let mut header = b"IHDR".to_vec();
    header.extend(width.to_be_bytes());
    header.extend(height.to_be_bytes());
    header.extend([8, 2, 0, 0, 0]);
    let mut png = vec![0x89, b'P', b'N', b'G', 0x0d, 0x0a, 0x1a, 0x0a];
    for chunk in [header, b"IDAT".to_vec()] {
        png.extend((chunk.len() as u32 - 4).to_be_bytes());
        png.extend(&chunk);
        png.extend(crc32(&chunk).to_be_bytes());
    }
    png
}

/// The check sum of a chunk (the same, annex D).
fn crc32(bytes: &[u8]) -> u32 {
    !bytes.iter().fold(u32::MAX, |crc, byte| {
        (0..8).fold(crc ^ u32::from(*byte), |crc, _| {
            (crc >> 1) ^ (0xedb8_8320 * (crc & 1))
        })
    })
}

#[test]
fn nothing_is_cut_off_at_the_sizes_that_are_used() {
    let desk = Desk::new();
    for (width, height) in [(1600.0, 1000.0), (1280.0, 800.0), (1000.0, 760.0)] {
        let mut window = desk.open_sized(width, height, desk.start(crate::desk::NOW));
        window.state_mut().run(Command::ShowArea(Area::Grounds));
        window.run();
        let plan = window.get_by_label(PLAN).rect();
        assert!(plan.width() > 400.0 && plan.height() > 240.0, "{plan:?}");
        for name in [
            "Select",
            "Tape",
            "Excluded area",
            "Undo",
            "Show everything",
            "Snap",
        ] {
            let rect = window.get_by_label(name).rect();
            assert!(
                rect.right() <= width && rect.left() >= 0.0 && rect.bottom() <= plan.top(),
                "{name} at {width}: {rect:?}"
            );
        }
        let inside = pos2(plan.right(), plan.bottom());
        assert!(inside.x <= width && inside.y <= height, "{inside:?}");
    }
}
