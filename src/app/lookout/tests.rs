//! The drawings' models as text, and the drawings at work without a renderer.
#![allow(clippy::unwrap_used)]

use super::model::{Tracks, shown_span, ticks};
use super::says::Says;
use super::staged::{Stage, december_dawn};
use super::{Drawings, fade, horizon, inset, phase, plot};
use crate::app::command::{Command, Commands};
use crate::app::scene::Scene;
use crate::app::theme::install_fonts;
use crate::light::{Eye, Standing};
use crate::plan::{Half, neighbours};
use crate::sky::Body;
use eframe::egui::accesskit::Role;
use eframe::egui::{Key, Modifiers, Pos2, Ui};
use egui_kittest::Harness;
use egui_kittest::kittest::{NodeT, Queryable};
use std::fmt::Write;

fn fade_text(scene: &Scene<'_>) -> String {
    let tracks = Tracks::new(scene);
    let model = fade::model::Model::new(scene, &tracks);
    let says = Says::new(scene);
    let time = |at_s| says.time(tracks.moment(at_s));
    let mut text = format!("{} to {}\n", time(model.from_s), time(model.to_s));
    for mark in &model.marks {
        writeln!(text, "{} {:?}", time(mark.at_s), mark.kind).unwrap();
    }
    for lane in &model.lanes {
        write!(text, "{}:", lane.body).unwrap();
        for end in &lane.ends {
            let word = if end.is_end { "to" } else { "from" };
            let obstacle = end.obstacle.as_deref().unwrap_or("-");
            write!(
                text,
                " {word} {} {}{} {obstacle};",
                time(end.at_s),
                end.spoken,
                match end.stray {
                    None => String::new(),
                    Some(fade::model::Stray::Between(from, to)) =>
                        format!(" {}-{}", time(from), time(to)),
                    Some(fade::model::Stray::OrNotAtAll(at)) => format!(" {} or not", time(at)),
                }
            )
            .unwrap();
        }
        if let Some(absence) = lane.absence {
            write!(text, " {absence:?}").unwrap();
        }
        text.push('\n');
    }
    text
}

fn horizon_text(scene: &Scene<'_>) -> String {
    let model = horizon::model::Model::new(scene, &Tracks::new(scene));
    let mut text = String::new();
    let marks = std::iter::once(&model.target).chain(&model.others);
    for mark in marks.chain([&model.sun]) {
        let sample = &mark.sample;
        writeln!(
            text,
            "{} {:.1} up at {:.1}, clear by {:.1}, {:?}, {:.2} lit, limb {:.0}",
            mark.body,
            sample.altitude.degrees(),
            sample.azimuth.degrees(),
            sample.clearance.degrees(),
            sample.standing,
            mark.illuminated_fraction,
            mark.limb_from_up.degrees(),
        )
        .unwrap();
    }
    let named = model.stars.iter().filter_map(|star| star.name);
    let named: Vec<&str> = named.take(4).collect();
    writeln!(
        text,
        "over {:?}, {} stars: {}",
        model.obstacle,
        model.stars.len(),
        named.join(", ")
    )
    .unwrap();
    text
}

// The texts below are what the engine gives; it is checked against JPL DE440 where it is made.
#[test]
fn fade_of_a_december_dawn() {
    let stage = december_dawn();
    let text = fade_text(&stage.scene("2026-12-05T07:02:00"));
    let expected = "\
4:14 to 9:00
5:59 Astronomical
6:39 Nautical
7:21 Civil
8:00 Sunrise
venus: from 4:34 skyline -; to 8:00 sunrise -;
mercury: WashedOut
mars: to 7:43 twilight 7:37-7:48 -;
jupiter: to 8:00 sunrise -;
saturn: Down
moon: from 5:01 skyline -; to 8:00 sunrise -;
";
    assert_eq!(text, expected, "{text}");
}

#[test]
fn horizon_of_a_december_dawn() {
    let stage = december_dawn();
    let text = horizon_text(&stage.scene("2026-12-05T07:10:00"));
    let expected = "\
venus 23.5 up at 146.4, clear by 16.1, Plain, 0.31 lit, limb 133
moon 17.1 up at 150.4, clear by 10.2, Plain, 0.13 lit, limb 124
jupiter 45.7 up at 222.1, clear by 39.6, Plain, 0.99 lit, limb 84
mercury 3.8 up at 126.3, clear by -0.4, Blocked, 0.90 lit, limb 139
mars 47.6 up at 212.6, clear by 41.9, Plain, 0.90 lit, limb 91
saturn -36.8 up at 347.2, clear by -38.7, Down, 1.00 lit, limb 238
sun -6.9 up at 116.5, clear by -11.1, Down, 1.00 lit, limb 0
over Some(\"pavilion\"), 136 stars: Arcturus, Vega, Capella, Procyon
";
    assert_eq!(text, expected, "{text}");
}

#[test]
fn fade_of_a_june_dusk_behind_the_oak() {
    let stage = Stage::new("Fennick Common", "2026-06-20", Half::Dusk, Body::Venus);
    let text = fade_text(&stage.scene("2026-06-20T22:30:00"));
    let expected = "\
20:32 to 1:15
21:32 Sunset
22:19 Civil
23:30 Nautical
venus: from 21:32 sunset -; to 21:36 skyline oak; from 22:36 skyline oak; to 23:27 skyline hedge;
mercury: WashedOut
mars: Down
jupiter: from 21:53 twilight 21:44-22:07 -; to 22:47 skyline hedge;
saturn: Down
moon: from 21:32 sunset -; to 0:18 skyline hedge;
";
    assert_eq!(text, expected, "{text}");
}

#[test]
fn without_sunset_the_whole_half_is_shown() {
    let stage = Stage::new("Ternskjell Quay", "2026-06-20", Half::Dusk, Body::Moon);
    let scene = stage.scene("2026-06-20T22:30:00");
    let (start, end) = scene.ends();
    assert_eq!(shown_span(&scene), (0.0, end.seconds_since(start)));
    let text = fade_text(&scene);
    let expected = "\
13:01 to 1:01
moon: WashedOut
venus: WashedOut
mercury: WashedOut
mars: WashedOut
jupiter: WashedOut
saturn: WashedOut
";
    assert_eq!(text, expected, "{text}");
}

#[test]
fn ticks_stay_whole_local_tens_where_the_clock_is_turned() {
    // Melbourne turns its clock forward at 2:00 on 2026 October 4.
    let stage = Stage::new("Tarrow Bay School", "2026-10-03", Half::Dawn, Body::Venus);
    let scene = stage.scene("2026-10-04T04:00:00");
    let tracks = Tracks::new(&scene);
    let says = Says::new(&scene);
    let all = ticks(&tracks, scene.scales, scene.zone, 0.0, tracks.length_s);
    let around: Vec<String> = all
        .iter()
        .map(|tick| says.time(tracks.moment(tick.at_s)))
        .skip_while(|time| time != "1:40")
        .take(4)
        .collect();
    assert_eq!(around, ["1:40", "1:50", "3:00", "3:10"]);
    for tick in &all {
        let time = says.time(tracks.moment(tick.at_s));
        assert!(
            time.ends_with(&format!("{:02}", tick.minute)),
            "{time} {tick:?}"
        );
    }
}

#[test]
fn a_pointer_sets_whole_minutes_within_the_half() {
    let stage = december_dawn();
    let scene = stage.scene("2026-12-05T07:02:00");
    let tracks = Tracks::new(&scene);
    let at_s = tracks.at_s(scene.moment);
    for off_s in [-29.0, -3.0, 0.0, 29.0] {
        let moment = tracks.whole_minute(scene.scales, scene.zone, at_s + off_s);
        assert!(moment.seconds_since(scene.moment).abs() < 1e-3, "{off_s}");
    }
    let end = tracks.whole_minute(scene.scales, scene.zone, tracks.length_s + 500.0);
    assert!(end.seconds_since(tracks.start) <= tracks.length_s);
}

#[test]
fn inset_and_phase_of_a_december_dawn() {
    let stage = december_dawn();
    let scene = stage.scene("2026-12-05T07:02:00");
    let model = inset::model::Model::new(&scene).unwrap();
    // Venus west of the Sun stands to the right of it for one who faces it from the north.
    assert!(
        model.place.right_au > 0.25 && model.place.up_au < 0.0,
        "{model:?}"
    );
    // The line of sight and the line to the Sun meet in the elongation, but for the latitude.
    let (to_sun, to_place) = (
        -model.earth.up_au,
        (model.place.right_au, model.place.up_au - model.earth.up_au),
    );
    let drawn_deg = to_place.0.atan2(to_place.1).to_degrees();
    assert!(
        to_sun > 0.98 && (drawn_deg - model.elongation.degrees()).abs() < 0.5,
        "{drawn_deg}"
    );

    let around = neighbours(
        scene.ephemeris,
        scene.scales,
        scene.body,
        scene.night.middle,
    );
    let (last, next) = inset::model::around(&around, &scene, scene.moment);
    let says = Says::new(&scene);
    let said = |dated: Option<inset::model::Dated>| {
        let dated = dated.unwrap();
        says.dated(scene.body, dated.event.aspect, dated.days)
    };
    // Venus: inferior conjunction 2026 October 24, greatest elongation 2027 January 3.
    assert_eq!(said(last), "inferior conjunction 42 days ago");
    assert_eq!(said(next), "greatest elongation west in 29 days");

    let phase = phase::model::Model::new(&scene);
    let sizes: Vec<f64> = [&phase.diameter, &phase.ring]
        .map(|angle| angle.arcsec())
        .into();
    assert!(
        (sizes[0] - 36.6).abs() < 0.1 && (sizes[1] - 60.0).abs() < 1e-9,
        "{sizes:?}"
    );
    // The lit side is turned to the Sun, which is coming up on the left.
    let [eye, _, telescope] = &phase.views;
    assert!(
        eye.towards_limb.x < 0.0 && eye.towards_limb.y > 0.0,
        "{eye:?}"
    );
    assert!(telescope.towards_limb.x > 0.0, "mirrored: {telescope:?}");
}

#[test]
fn the_plot_counts_minutes_from_the_suns_own_event() {
    let stage = december_dawn();
    let scene = stage.scene("2026-12-05T07:02:00");
    let tracks = Tracks::new(&scene);
    let model = plot::model::Model::new(&scene, &tracks);
    assert_eq!(model.origin, plot::model::Origin::Sunrise);
    let rise = scene.night.sun.rise.unwrap();
    assert!((model.origin_s - rise.seconds_since(tracks.start)).abs() < 1e-6);
    assert!((model.to_min - 60.0).abs() < 1e-6, "{}", model.to_min);
    let eyes: Vec<Eye> = model.curves.iter().map(|curve| curve.eye).collect();
    assert_eq!(eyes, Eye::ALL);
    let up = tracks
        .body(Body::Venus)
        .iter()
        .filter(|sample| sample.standing != Standing::Down);
    let drawn: usize = model.curves[1].pieces.iter().map(Vec::len).sum();
    assert!(drawn > 200 && drawn <= up.count(), "{drawn}");
}

#[test]
fn the_plots_curves_cross_zero_where_the_windows_end() {
    // Mars is lost before sunrise by every unaided eye.
    let stage = Stage::new("Fennick Common", "2026-12-04", Half::Dawn, Body::Mars);
    let scene = stage.scene("2026-12-05T07:02:00");
    let tracks = Tracks::new(&scene);
    let model = plot::model::Model::new(&scene, &tracks);
    for curve in &model.curves[..3] {
        let night = scene.night.body(Body::Mars).unwrap();
        let window = night.windows_in(curve.eye, Half::Dawn).last().unwrap();
        let end_s = window.end.moment.seconds_since(tracks.start);
        let end_min = (end_s - model.origin_s) / 60.0;
        let points = curve.pieces.last().unwrap();
        let last = points.iter().rfind(|[_, mag]| *mag >= 0.0).unwrap();
        let off_min = end_min - last[0];
        assert!((0.0..=1.02).contains(&off_min), "{:?} {off_min}", curve.eye);
    }
    // The chosen eye's own margin lies within its spread.
    let within = model.curves[1].pieces.iter().flatten();
    for ([_, mag], [_, least, greatest]) in within.zip(model.spread.iter().flatten()) {
        assert!(least < mag && mag < greatest, "{least} {mag} {greatest}");
    }
    // Nothing is said of optics once they must be capped.
    let until = scene.night.optics.until.unwrap();
    let until_min = (until.seconds_since(tracks.start) - model.origin_s) / 60.0;
    let last = model.curves[3].pieces.last().and_then(|piece| piece.last());
    let short_min = until_min - last.unwrap()[0];
    assert!((0.0..=1.02).contains(&short_min), "{short_min}");
}

/// The drawings in a window of their own, with what they asked for.
struct Shown {
    stage: Stage,
    drawings: Drawings,
    commands: Commands,
    has_fonts: bool,
}

impl Shown {
    fn ui(&mut self, ui: &mut Ui, which: fn(&mut Drawings, &mut Ui, &Scene<'_>, &mut Commands)) {
        let scene = self.stage.scene("2026-12-05T07:02:00");
        which(&mut self.drawings, ui, &scene, &mut self.commands);
    }
}

fn shown(which: fn(&mut Drawings, &mut Ui, &Scene<'_>, &mut Commands)) -> Harness<'static, Shown> {
    let state = Shown {
        stage: december_dawn(),
        drawings: Drawings::default(),
        commands: Vec::new(),
        has_fonts: false,
    };
    let mut harness = Harness::builder()
        .with_size([1000.0, 400.0])
        .build_ui_state(
            move |ui, shown: &mut Shown| {
                if shown.has_fonts {
                    shown.ui(ui, which);
                } else {
                    // Fonts are there from the next frame on.
                    install_fonts(ui.ctx());
                    ui.ctx().request_repaint();
                    shown.has_fonts = true;
                }
            },
            state,
        );
    harness.run();
    harness
}

fn drag(harness: &mut Harness<'_, Shown>, from: Pos2, to: Pos2) {
    harness.drag_at(from);
    harness.run();
    harness.hover_at(to);
    harness.run();
    harness.drop_at(to);
    harness.run();
}

#[test]
fn the_fade_is_a_named_slider_that_sets_whole_minutes() {
    let mut harness = shown(|drawings, ui, scene, commands| {
        drawings.fade(ui, scene, commands);
    });
    let slider = harness.get_by_role_and_label(Role::Slider, "Fade");
    let value = slider.accesskit_node().value().unwrap();
    assert!(value.starts_with("7:02"), "{value}");
    let place = slider.rect();
    drag(
        &mut harness,
        place.center(),
        place.center() + eframe::egui::vec2(200.0, 0.0),
    );
    let stage = december_dawn();
    let scene = stage.scene("2026-12-05T07:02:00");
    let (from_s, to_s) = shown_span(&scene);
    let commands = &harness.state().commands;
    assert!(!commands.is_empty());
    for command in commands {
        let Command::SetMoment(moment) = command else {
            panic!("{command:?}");
        };
        let at_s = moment.seconds_since(scene.ends().0);
        assert!(at_s > from_s - 31.0 && at_s < to_s + 31.0, "{at_s}");
        let from_a_minute_s = moment.seconds_since(scene.moment).rem_euclid(60.0);
        assert!(
            from_a_minute_s.min(60.0 - from_a_minute_s) < 1e-3,
            "{from_a_minute_s}"
        );
    }
}

#[test]
fn a_reader_of_the_screen_steps_through_time() {
    let mut harness = shown(|drawings, ui, scene, commands| {
        drawings.fade(ui, scene, commands);
    });
    harness
        .get_by_role_and_label(Role::Slider, "Fade")
        .increment_accesskit();
    harness.run();
    assert_eq!(harness.state().commands, [Command::StepMinutes(1)]);
}

#[test]
fn the_horizon_view_turns_by_drag_and_keys_and_goes_back() {
    let mut harness = shown(|drawings, ui, scene, commands| {
        drawings.horizon(ui, scene, commands);
    });
    let turned = |harness: &Harness<'_, Shown>| harness.state().drawings.horizon.turn().turn_deg;
    let view = harness.get_by_role(Role::Canvas);
    let middle = view.rect().center();
    view.focus();
    harness.run();
    drag(&mut harness, middle, middle - eframe::egui::vec2(60.0, 0.0));
    let dragged = turned(&harness);
    assert!(dragged > 1.0, "{dragged}");
    harness.key_press_modifiers(Modifiers::COMMAND, Key::ArrowRight);
    harness.run();
    assert!(
        (turned(&harness) - dragged - 5.0).abs() < 1e-6,
        "{}",
        turned(&harness)
    );
    harness.key_press(Key::Plus);
    harness.run();
    assert!(harness.state().drawings.horizon.turn().widening < 0.99);
    assert!(
        harness.state().commands.is_empty(),
        "{:?}",
        harness.state().commands
    );
}

#[test]
fn the_telescopes_disc_goes_on_to_the_next_way_round() {
    use crate::app::command::OpticsView;
    let mut harness = shown(|drawings, ui, scene, commands| {
        drawings.phase(ui, scene, commands);
    });
    let name = "90 mm refractor, 36\u{d7}, mirrored. Press for the next way round.";
    harness.get_by_role_and_label(Role::Button, name).click();
    harness.run();
    let expected = [Command::ChooseOpticsView(OpticsView::Erect)];
    assert_eq!(harness.state().commands, expected);
}

#[test]
fn plot_and_inset_say_what_they_are() {
    let harness = shown(|drawings, ui, scene, commands| {
        drawings.plot(ui, scene, commands);
    });
    harness.get_by_label_contains("Margin of Venus for each eye");
    let harness = shown(|drawings, ui, scene, _| {
        drawings.inset(ui, scene);
    });
    harness.get_by_label_contains("Venus stands 42.6\u{b0} from the Sun");
}
