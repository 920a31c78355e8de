//! Where to stand: the standing map, the skyline strip, the spots side by side.

use crate::desk::{Desk, NOW, click};
use dimmet::app::DesktopWindow;
use dimmet::app::area::Area;
use dimmet::app::command::Command;
use dimmet::app::state::State;
use dimmet::place::{Sector, Stature};
use eframe::egui::accesskit::Role;
use eframe::egui::{Event, Modifiers, PointerButton, Pos2, Rect, pos2};
use egui_kittest::Harness;
use egui_kittest::kittest::Queryable;
use std::time::{Duration, Instant};

type Window = Harness<'static, DesktopWindow>;

/// The work area on the usual afternoon, high enough for the whole column.
fn open(desk: &Desk) -> Window {
    let mut window = desk.open_sized(1600.0, 2600.0, desk.start(NOW));
    run(&mut window, Command::ShowArea(Area::Grounds));
    // With the first map the card grows to its size.
    wait_for(&mut window, "Legend: from");
    window.run();
    window
}

fn run(window: &mut Window, command: Command) {
    window.state_mut().run(command);
    window.run();
}

/// Steps until something is shown.
fn wait_for(window: &mut Window, what: &str) {
    let start = Instant::now();
    while window.query_by_label_contains(what).is_none() {
        assert!(start.elapsed() < Duration::from_secs(120), "no {what}");
        std::thread::sleep(Duration::from_millis(5));
        window.step();
    }
}

/// The numbers in what is said.
fn numbers(window: &Window, said: &str) -> Vec<f64> {
    let node = window.get_by_label_contains(said);
    let text = egui_kittest::kittest::NodeT::accesskit_node(&node)
        .label()
        .or_else(|| egui_kittest::kittest::NodeT::accesskit_node(&node).value())
        .unwrap_or_default();
    numbers_in(&text)
}

fn numbers_in(text: &str) -> Vec<f64> {
    text.split(|c: char| !c.is_ascii_digit())
        .filter_map(|digits| digits.parse().ok())
        .collect()
}

/// Minutes of the longest time in which the chosen body is seen from the chosen spot.
fn minutes(state: &State) -> f64 {
    let night = &state.planned().expect("a night").night;
    let body = night.body(state.body()).expect("a bright body");
    body.windows_in(state.eye(), state.half())
        .iter()
        .map(|window| window.end.moment.seconds_since(window.start.moment) / 60.0)
        .fold(0.0, f64::max)
}

fn strip(window: &Window) -> Rect {
    window
        .get_by_label_contains("all round. Drag turns it")
        .rect()
}

/// Both presses in one frame: between frames the harness lets more time pass than a double click
/// may take.
fn double_click(window: &mut Window, at: Pos2) {
    window.hover_at(at);
    window.run();
    let button = |pressed| Event::PointerButton {
        pos: at,
        button: PointerButton::Primary,
        pressed,
        modifiers: Modifiers::NONE,
    };
    let events = [true, false, true, false].map(button);
    window.input_mut().events.extend(events);
    window.run();
}

#[test]
fn the_map_appears_and_its_best_place_is_no_worse_than_the_chosen_spot() {
    let desk = Desk::new();
    let mut window = open(&desk);
    // From behind the pavilion there is much to gain.
    run(&mut window, Command::ChooseSpot(2));
    wait_for(&mut window, "Legend: from");
    let here = minutes(window.state().state());
    let legend = numbers(&window, "Legend: from");
    let [least, most] = legend[..] else {
        panic!("two figures: {legend:?}")
    };
    assert!(
        least < most && most + 0.5 >= here,
        "{legend:?}, here {here}"
    );
    let cost = numbers(&window, "fewer than at the best place");
    assert_eq!(cost.len(), 2, "{cost:?}");
    assert!((cost[0] - here).abs() <= 0.6, "{cost:?}, here {here}");
    assert!((cost[1] - (most - here)).abs() <= 1.1, "{cost:?}");

    let before = window.state().state().site().spots.len();
    click(&mut window, "Stand at best place 1");
    let state = window.state().state();
    assert_eq!(state.site().spots.len(), before + 1);
    assert_eq!(state.spot_index(), before, "the new spot is chosen");
    assert!((minutes(state) - most).abs() <= 0.6, "as the map said");
    assert!(minutes(state) >= here);
    run(&mut window, Command::Undo);
    assert_eq!(window.state().state().site().spots.len(), before);
}

#[test]
fn the_map_follows_a_change_of_the_grounds() {
    let desk = Desk::new();
    let mut window = open(&desk);
    wait_for(&mut window, "Legend: from");
    let before = numbers(&window, "Legend: from");
    let mut site = window.state().state().site().clone();
    site.obstacles.clear();
    run(&mut window, Command::EditSite(Box::new(site)));
    let start = Instant::now();
    loop {
        window.step();
        std::thread::sleep(Duration::from_millis(5));
        if window.query_by_label_contains("Legend: from").is_some() {
            let now = numbers(&window, "Legend: from");
            if now != before {
                assert_eq!(now[0], now[1], "an open ground is alike everywhere");
                break;
            }
        }
        assert!(start.elapsed() < Duration::from_secs(120), "no new map");
    }
}

#[test]
fn the_work_is_cancelled_and_goes_on() {
    let desk = Desk::new();
    let mut window = open(&desk);
    wait_for(&mut window, "Legend: from");
    window.get_by_label("28 nights").click();
    wait_for(&mut window, "Cancel");
    window.get_by_label("Cancel").click();
    wait_for(&mut window, "Stopped");
    std::thread::sleep(Duration::from_millis(200));
    window.run();
    assert!(
        window.query_by_label("Cancel").is_none(),
        "it stays stopped"
    );
    window.get_by_label("Go on").click();
    wait_for(&mut window, "Cancel");
    click(&mut window, "This night");
    wait_for(&mut window, "Legend: from");
}

#[test]
fn a_measured_point_is_added_and_dragged_and_the_sentence_follows() {
    let desk = Desk::new();
    let mut window = open(&desk);
    let sentence = |window: &mut Window| {
        run(window, Command::ShowArea(Area::Lookout));
        let node = window.get_by_label_contains("Visitors see Venus");
        let said = egui_kittest::kittest::NodeT::accesskit_node(&node).value();
        let said = said.unwrap_or_default();
        run(window, Command::ShowArea(Area::Grounds));
        assert!(!said.is_empty());
        said
    };
    let before = sentence(&mut window);
    let points = window.state().state().site().skyline.len();
    // South in the middle: Venus rises east of south-east. High above the hills, so that no
    // point of theirs is near.
    let strip_rect = strip(&window);
    let x = strip_rect.left() + strip_rect.width() * (118.5 / 360.0);
    let at = pos2(x, strip_rect.top() + 50.0);
    double_click(&mut window, at);
    let site = window.state().state().site();
    assert_eq!(site.skyline.len(), points + 1, "a double click adds one");
    let added = sentence(&mut window);
    assert_ne!(added, before);

    assert_eq!(strip(&window), strip_rect, "the notice moves nothing");
    window.hover_at(at);
    window.drag_at(at);
    window.hover_at(pos2(x, at.y + 20.0));
    window.hover_at(pos2(x, at.y + 60.0));
    window.run();
    assert!(window.state().state().is_dragging());
    window.drop_at(pos2(x, at.y + 60.0));
    window.run();
    assert!(!window.state().state().is_dragging());
    let dragged = sentence(&mut window);
    assert_ne!(dragged, added);
    run(&mut window, Command::Undo);
    assert_eq!(sentence(&mut window), added, "the drag is one step");
    run(&mut window, Command::Undo);
    assert_eq!(sentence(&mut window), before);
}

#[test]
fn the_lookout_moves_the_measured_skyline_only_while_it_is_switched_on() {
    let desk = Desk::new();
    let mut window = desk.open();
    let count = |window: &Window| window.state().state().site().skyline.len();
    let points = count(&window);
    let view = window.get_by_label_contains("Horizon view.").rect();
    // Below the path, clear of the hills' own points.
    let at = pos2(
        view.left() + 0.3 * view.width(),
        view.top() + 0.6 * view.height(),
    );
    double_click(&mut window, at);
    assert_eq!(count(&window), points, "it turns the view back");
    click(&mut window, "Move the measured skyline");
    double_click(&mut window, at);
    assert_eq!(count(&window), points + 1);
    // Not all that was measured is far: elsewhere the rest does not hold, and it is said.
    let mut site = window.state().state().site().clone();
    site.skyline_far = vec![Sector {
        from_deg: 0.0,
        to_deg: 90.0,
    }];
    run(&mut window, Command::EditSite(Box::new(site)));
    run(&mut window, Command::ChooseSpot(1));
    assert!(window.query_by_label("Move the measured skyline").is_none());
    window.get_by_label_contains("Only the far parts of the measured skyline hold at this spot");
}

#[test]
fn a_child_sees_no_more_than_an_adult_and_is_remembered() {
    let desk = Desk::new();
    let mut window = open(&desk);
    // A hedge before the east, where Venus comes up: high for a child, low for an adult.
    let mut site = window.state().state().site().clone();
    site.skyline.clear();
    site.obstacles = vec![dimmet::place::Obstacle::Wall {
        label: "hedge".to_owned(),
        line_m: [(3.0, -40.0), (3.0, 40.0)]
            .map(|(east, north)| dimmet::place::PlanPoint::new(east, north))
            .to_vec(),
        base_m: None,
        height_m: 2.1,
    }];
    run(&mut window, Command::EditSite(Box::new(site)));
    let of = |window: &mut Window, name: &str| {
        click(window, name);
        minutes(window.state().state())
    };
    let adult = of(&mut window, "adult 1.60 m");
    let wheelchair = of(&mut window, "wheelchair 1.20 m");
    let child = of(&mut window, "child 1.10 m");
    assert!(
        adult > wheelchair && wheelchair > child && child > 0.0,
        "{adult} {wheelchair} {child}"
    );
    assert_eq!(window.state().state().stature(), Stature::Child);
    // What is remembered is written every other second.
    window.run_steps(12);
    let saved = std::fs::read_to_string(desk.settings()).expect("settings");
    assert!(saved.contains("stature: child"), "{saved}");
}

#[test]
fn every_spot_is_compared_and_a_press_chooses_it() {
    let desk = Desk::new();
    let mut window = open(&desk);
    let spots: Vec<String> = window
        .state()
        .state()
        .site()
        .spots
        .iter()
        .map(|spot| spot.name.clone())
        .collect();
    assert_eq!(spots.len(), 3);
    for (index, spot) in spots.iter().enumerate() {
        let start = format!("{spot}: ");
        let row = || {
            egui_kittest::kittest::By::new()
                .role(Role::RadioButton)
                .label_contains(&start)
        };
        window.get(row()).click();
        window.run();
        let state = window.state().state();
        assert_eq!(state.spot_index(), index);
        let node = window.get(row());
        let said = numbers_in(
            &egui_kittest::kittest::NodeT::accesskit_node(&node)
                .label()
                .unwrap(),
        );
        // Start and end as hours and minutes, then the minutes between them.
        assert!((said[4] - minutes(state)).abs() <= 0.6, "{spot}: {said:?}");
    }
}

#[test]
fn an_instrument_is_put_at_a_spot() {
    let desk = Desk::new();
    let mut window = open(&desk);
    window.get_by_label_contains("Put 10x50 at a spot").click();
    window.run();
    window
        .get_all_by_label("bandstand")
        .last()
        .expect("a line of the menu")
        .click();
    window.run();
    let kit = &window.state().state().site().kit;
    let spots: Vec<_> = kit.iter().map(|instrument| instrument.spot()).collect();
    assert_eq!(spots, [None, Some("bandstand")]);
    window.get_by_label_contains("bandstand: ");
}
