//! The cards beside the view: the sentence to read aloud, the caution, the facts.

use super::caution::{Caution, OpticsState};
use super::palette::Look;
use super::scene::Scene;
use super::state::Motion;
use super::widgets::{bold, card, card_frame, figure, text};
use crate::measure::Angle;
use crate::plan::{Found, Half, Sighting};
use crate::sky::{Body, refraction};
use crate::words::Words;
use eframe::egui::{
    Align, Align2, Color32, Layout, Rect, Response, Role, Sense, Stroke, Ui, UiBuilder, WidgetInfo,
    vec2,
};

/// The sentence, at the size to be read aloud from; at the controls' size where it is long.
pub fn sentence_card(ui: &mut Ui, look: &Look, sentence: &str, least_height: f32) {
    const MOST_LINES: usize = 5;
    card(ui, look, least_height, |ui| {
        let (large, colour) = (look.sizes.sentence, look.colours.text);
        let width = ui.available_width();
        let galley = ui
            .painter()
            .layout(sentence.to_owned(), look.font(large), colour, width);
        let is_long = galley.rows.len() > MOST_LINES;
        let size = if is_long { look.sizes.control } else { large };
        text(ui, look, size, colour, sentence);
    });
}

/// The caution. While optics stay capped it carries a bar in the caution's colour.
pub fn caution_card(
    ui: &mut Ui,
    scene: &Scene<'_>,
    words: &Words,
    motion: Motion,
    least_height: f32,
) {
    let look = &scene.look;
    let caution = Caution::new(scene);
    let (title, body) = caution_text(scene, &caution, words, motion);
    let colour = if caution.is_capped() || caution.is_near_the_sun {
        look.colours.caution
    } else {
        look.colours.text
    };
    let response = card_frame(look)
        .show(ui, |ui| {
            ui.set_width(ui.available_width());
            ui.set_min_height((least_height - 2.0 * look.room.inside).max(0.0));
            ui.spacing_mut().item_spacing.y = 4.0;
            bold(ui, look, look.sizes.sentence, colour, &title);
            text(ui, look, look.sizes.label, look.colours.text, &body);
        })
        .response;
    bar(ui, &response, colour, look);
}

fn bar(ui: &Ui, card: &Response, colour: Color32, look: &Look) {
    const WIDTH: f32 = 5.0;
    let mut bar = card.rect;
    bar.set_width(WIDTH);
    let corner = look.room.corner as u8;
    let corners = eframe::egui::CornerRadius {
        nw: corner,
        sw: corner,
        ne: 0,
        se: 0,
    };
    ui.painter().rect_filled(bar, corners, colour);
}

/// Title and text of the caution.
fn caution_text(
    scene: &Scene<'_>,
    caution: &Caution,
    words: &Words,
    motion: Motion,
) -> (String, String) {
    let time = |moment| words.time(scene.clock(), moment);
    let timed = |id: &str, moment| words.text_with::<&str>(id, &[("time", &time(moment))]);
    let (title, first) = match caution.optics {
        OpticsState::NoTime => (
            words.text("caution-no-time"),
            words.text("caution-no-time-text"),
        ),
        OpticsState::SunUp { until: Some(from) } => (
            timed("caution-until", from),
            words.text("caution-sun-up-dusk-text"),
        ),
        OpticsState::SunUp { until: None } => (
            words.text("caution-sun-up"),
            words.text("caution-sun-up-text"),
        ),
        OpticsState::JustSet { until } => (
            timed("caution-until", until),
            words.text("caution-just-set-text"),
        ),
        OpticsState::Open {
            cap_by: Some(by),
            is_near: true,
        } => (timed("caution-cap-by", by), sunrise_text(scene, words)),
        OpticsState::Open {
            cap_by: Some(by),
            is_near: false,
        } => (
            timed("caution-open-until", by),
            words.text("caution-open-text"),
        ),
        OpticsState::Open { cap_by: None, .. } => {
            (words.text("caution-open"), words.text("caution-open-text"))
        }
        OpticsState::AboutToRise { .. } => (
            words.text("caution-about-to-rise"),
            sunrise_text(scene, words),
        ),
    };
    let mut parts = Vec::new();
    if motion != Motion::Still {
        parts.extend(caution.changes_in_s.map(|s| words.countdown(s)));
    }
    parts.push(first);
    if caution.is_near_the_sun {
        let degrees = words.degrees(caution.elongation, 0);
        let body = words.body_in_sentence(scene.body);
        parts.push(
            words.text_with::<&str>("caution-near-sun", &[("body", &body), ("angle", &degrees)]),
        );
    }
    parts.push(words.text("caution-always"));
    (title, parts.join(" "))
}

fn sunrise_text(scene: &Scene<'_>, words: &Words) -> String {
    match scene.night.sun.rise {
        Some(rise) => {
            let time = words.time(scene.clock(), rise);
            words.text_with::<&str>("caution-sunrise-text", &[("time", &time)])
        }
        None => words.text("caution-sun-up-text"),
    }
}

/// One fact: the wording of its name, and its value.
type Fact = (&'static str, String);

/// The figures of the chosen body at the moment shown.
pub fn facts(scene: &Scene<'_>, words: &Words) -> [Fact; 8] {
    let epoch = scene.span.at(scene.moment);
    let view = epoch.seen_by(scene.observer);
    let place = view.place(scene.body);
    let appearance = view.appearance(scene.body);
    let altitude = refraction::refracted(place.altitude, &scene.observer.air);
    let limb = match scene.body {
        Body::Moon => appearance.diameter / 2.0,
        _ => Angle::ZERO,
    };
    let clearance = scene.skyline.clearance(place.azimuth, altitude + limb);
    let sun = view.place(Body::Sun).altitude;
    [
        ("fact-altitude", words.degrees(altitude, 1)),
        ("fact-azimuth", words.azimuth(place.azimuth)),
        ("fact-clearance", words.degrees(clearance, 1)),
        ("fact-sun", words.degrees(sun, 1)),
        ("fact-elongation", words.elongation(&appearance)),
        ("fact-lit", words.percent(appearance.illuminated_fraction)),
        ("fact-disc", words.disc(appearance.diameter)),
        ("fact-magnitude", words.magnitude(appearance.magnitude)),
    ]
}

/// The facts in two columns.
pub fn facts_card(ui: &mut Ui, scene: &Scene<'_>, words: &Words) {
    const ROW_HEIGHT: f32 = 18.0;
    /// The azimuth with its compass point is the widest figure.
    const LEFT_SHARE: f32 = 0.53;
    let look = &scene.look;
    let facts = facts(scene, words);
    let (left, right) = facts.split_at(facts.len() / 2);
    card(ui, look, 0.0, |ui| {
        let size = vec2(ui.available_width(), ROW_HEIGHT);
        ui.spacing_mut().item_spacing.y = 4.0;
        for (left, right) in left.iter().zip(right) {
            let (row, _) = ui.allocate_exact_size(size, Sense::hover());
            let divide = row.left() + LEFT_SHARE * row.width();
            let half_gap = 0.5 * look.room.inside;
            fact_ui(ui, look, words, row.with_max_x(divide - half_gap), left);
            fact_ui(ui, look, words, row.with_min_x(divide + half_gap), right);
        }
    });
}

fn fact_ui(ui: &mut Ui, look: &Look, words: &Words, rect: Rect, (name, value): &Fact) {
    let layout = Layout::left_to_right(Align::Center);
    let mut ui = ui.new_child(UiBuilder::new().max_rect(rect).layout(layout));
    let font = look.font(look.sizes.label);
    figure(&mut ui, font, look.colours.lesser, &words.text(name));
    ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
        figure(ui, look.bold(look.sizes.control), look.colours.text, value);
    });
}

/// In which order the chosen eye finds things at dusk, or holds them at dawn: in two columns,
/// the first to be read down.
pub fn appearing_card(ui: &mut Ui, scene: &Scene<'_>, words: &Words, sightings: &[Sighting]) {
    const ROW_HEIGHT: f32 = 16.0;
    let look = &scene.look;
    let title = match scene.half {
        Half::Dusk => "appearing-dusk",
        Half::Dawn => "appearing-dawn",
    };
    card(ui, look, 0.0, |ui| {
        ui.spacing_mut().item_spacing.y = 4.0;
        let (size, lesser) = (look.sizes.label, look.colours.lesser);
        text(ui, look, size, lesser, &words.text(title));
        if sightings.is_empty() {
            let none = words.text("appearing-none");
            text(ui, look, size, look.colours.text, &none);
        }
        let (left, right) = sightings.split_at(sightings.len().div_ceil(2));
        let room = vec2(ui.available_width(), ROW_HEIGHT);
        for (k, sighting) in left.iter().enumerate() {
            let (row, _) = ui.allocate_exact_size(room, Sense::hover());
            let (middle, half_gap) = (row.center().x, 0.75 * look.room.inside);
            let before = row.with_max_x(middle - half_gap);
            sighting_ui(ui, scene, words, before, sighting);
            if let Some(sighting) = right.get(k) {
                let after = row.with_min_x(middle + half_gap);
                sighting_ui(ui, scene, words, after, sighting);
            }
        }
    });
}

fn sighting_ui(ui: &mut Ui, scene: &Scene<'_>, words: &Words, rect: Rect, sighting: &Sighting) {
    let look = &scene.look;
    let name = match sighting.found {
        Found::Body(body) => words.body(body),
        Found::Star(star) => star.to_string(),
    };
    let mut time = words.time(scene.clock(), sighting.moment);
    if sighting.is_beyond {
        let id = match scene.half {
            Half::Dusk => "appearing-by",
            Half::Dawn => "appearing-past",
        };
        time = words.text_with::<&str>(id, &[("time", &time)]);
    }
    let is_chosen = sighting.found == Found::Body(scene.body);
    let colour = if is_chosen {
        look.colours.chosen
    } else {
        look.colours.text
    };
    let painter = ui.painter();
    let (name_font, time_font) = (look.font(look.sizes.label), look.bold(look.sizes.label));
    painter.text(
        rect.left_center(),
        Align2::LEFT_CENTER,
        &name,
        name_font,
        colour,
    );
    painter.text(
        rect.right_center(),
        Align2::RIGHT_CENTER,
        &time,
        time_font,
        look.colours.text,
    );
    // Read as one.
    let row = ui.interact(rect, ui.scope_id().with(&name), Sense::hover());
    row.widget_info(|| WidgetInfo::labeled(Role::Label, true, format!("{name} {time}")));
}

/// One sentence in place of the view, when there is no night to show.
pub fn instead_of_view(ui: &mut Ui, look: &Look, sentence: &str) {
    card(ui, look, 160.0, |ui| {
        text(ui, look, look.sizes.sentence, look.colours.text, sentence);
    });
}

/// A line along the top that says what went wrong, with a way to take it away.
pub fn notice_line(ui: &mut Ui, look: &Look, notice: &str, dismiss: impl FnOnce(&mut Ui)) {
    card_frame(look)
        .stroke(Stroke::new(1.0, look.colours.caution))
        .show(ui, |ui| {
            ui.set_width(ui.available_width());
            ui.horizontal(|ui| {
                ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
                    dismiss(ui);
                    ui.with_layout(Layout::left_to_right(Align::Center), |ui| {
                        text(ui, look, look.sizes.control, look.colours.text, notice);
                    });
                });
            });
        });
}
