//! Draws the strip.

use super::frame::Frame;
use super::ways::{self, Point, Stretch, Ways};
use crate::app::grounds::Desk;
use crate::app::lookout::labels::{self, Rank, Wanted};
use crate::app::lookout::shaded;
use crate::app::measured::Place;
use crate::app::scene::Scene;
use crate::app::shapes::{self, Band};
use crate::light::Standing;
use crate::measure::Angle;
use crate::sky::Body;
use eframe::egui::{
    Align2, Color32, Mesh, Painter, Pos2, Rect, Shape, Stroke, StrokeKind, pos2, vec2,
};

/// A jump of azimuth, degrees, that only the strip's own edge makes.
const JUMP_DEG: f64 = 90.0;

/// The sky, everything in it, and the shapes before it.
pub fn paint(
    painter: &Painter,
    desk: &Desk<'_>,
    scene: &Scene<'_>,
    frame: &Frame,
    ways: &Ways,
    bands: &[Band],
) {
    let inside = painter.with_clip_rect(frame.rect.intersect(painter.clip_rect()));
    sky(&inside, desk, frame);
    for (body, points) in ways.all() {
        if *body != scene.body {
            other_way(&inside, desk, frame, points);
        }
    }
    let colours = &desk.look.colours;
    let shapes = shapes::mesh(
        bands,
        colours.skyline,
        (frame.view.middle_deg, frame.half_deg()),
        frame.bottom_deg(),
        |beside, altitude| frame.pos_beside(beside, altitude),
    );
    inside.add(Shape::mesh(shapes));
    let windows = scene
        .night
        .body(scene.body)
        .map_or(&[][..], |night| night.windows_in(scene.eye, scene.half));
    let points = ways.of(scene.body);
    for stretch in ways::stretches(points, ways.start, windows, scene.skyline) {
        chosen_way(&inside, desk, frame, &stretch);
    }
    let marks = bodies(&inside, desk, scene, frame, ways);
    let figures = altitudes(&inside, desk, frame);
    names(&inside, desk, scene, frame, (&marks, &figures));
    painter.rect_stroke(
        frame.rect,
        0.0,
        Stroke::new(1.0, colours.line),
        StrokeKind::Inside,
    );
}

fn sky(painter: &Painter, desk: &Desk<'_>, frame: &Frame) {
    let colours = &desk.look.colours;
    let mut mesh = Mesh::default();
    let rect = frame.rect;
    mesh.colored_vertex(rect.left_top(), colours.strip_high);
    mesh.colored_vertex(rect.right_top(), colours.strip_high);
    mesh.colored_vertex(rect.left_bottom(), colours.strip_low);
    mesh.colored_vertex(rect.right_bottom(), colours.strip_low);
    mesh.add_triangle(0, 1, 2);
    mesh.add_triangle(2, 1, 3);
    painter.add(Shape::mesh(mesh));
}

/// A way on the screen, in pieces: it is cut where it leaves on one side and comes back on the
/// other.
fn lines(frame: &Frame, points: &[Point]) -> Vec<Vec<Pos2>> {
    let mut lines: Vec<Vec<Pos2>> = Vec::new();
    let mut last_deg = f64::INFINITY;
    for point in points {
        let beside_deg = frame.beside_deg(point.azimuth);
        let pos = frame.pos_beside(beside_deg, point.altitude.degrees());
        match lines.last_mut() {
            Some(line) if (beside_deg - last_deg).abs() < JUMP_DEG => line.push(pos),
            _ => lines.push(vec![pos]),
        }
        last_deg = beside_deg;
    }
    lines
}

fn other_way(painter: &Painter, desk: &Desk<'_>, frame: &Frame, points: &[Point]) {
    let colour = desk.look.colours.body.gamma_multiply(0.22);
    for part in points.chunk_by(|a, b| ways::is_up(a) == ways::is_up(b)) {
        if part.first().is_some_and(ways::is_up) {
            for line in lines(frame, part) {
                painter.add(Shape::line(line, Stroke::new(1.0, colour)));
            }
        }
    }
}

fn chosen_way(painter: &Painter, desk: &Desk<'_>, frame: &Frame, stretch: &Stretch) {
    let colours = &desk.look.colours;
    for line in lines(frame, &stretch.points) {
        match stretch.standing {
            Standing::Plain => {
                let edge = Stroke::new(5.0, colours.sky_shade.gamma_multiply(0.35));
                painter.add(Shape::line(line.clone(), edge));
                painter.add(Shape::line(line, Stroke::new(3.5, colours.seen)));
            }
            Standing::WashedOut => {
                let stroke = Stroke::new(1.4, colours.too_bright);
                painter.extend(Shape::dashed_line(&line, stroke, 7.0, 5.0));
            }
            Standing::Blocked => {
                let colour = colours.hidden.gamma_multiply(0.85);
                painter.extend(Shape::dotted_line(&line, colour, 8.0, 1.3));
            }
            Standing::Down => {}
        }
    }
}

/// Where the bodies stand at the moment; gives their places for the names.
fn bodies(
    painter: &Painter,
    desk: &Desk<'_>,
    scene: &Scene<'_>,
    frame: &Frame,
    ways: &Ways,
) -> Vec<(Body, Pos2)> {
    let at_s = scene.moment.seconds_since(ways.start);
    let mut marks = Vec::new();
    for (body, _) in ways.all() {
        let point = ways::point(scene, *body, ways.start, at_s);
        if !ways::is_up(&point) {
            continue;
        }
        let at = frame.pos(point.azimuth, point.altitude);
        let is_blocked = scene.skyline.clearance(point.azimuth, point.altitude) <= Angle::ZERO;
        let is_chosen = *body == scene.body;
        let (radius, colour) = match (is_chosen, is_blocked) {
            (true, _) => (5.5, desk.look.colours.body),
            (false, false) => (3.0, desk.look.colours.body.gamma_multiply(0.6)),
            (false, true) => continue,
        };
        if is_blocked {
            painter.circle_stroke(at, radius, Stroke::new(1.5, desk.look.colours.hidden));
        } else {
            painter.circle_filled(at, radius, colour);
        }
        if frame.rect.contains(at) {
            marks.push((*body, at));
        }
    }
    marks
}

/// Names of the bodies over the sky, and of what stands there inside the shapes; none over the
/// figures of the altitudes where there is room beside them.
fn names(
    painter: &Painter,
    desk: &Desk<'_>,
    scene: &Scene<'_>,
    frame: &Frame,
    (marks, figures): (&[(Body, Pos2)], &[Rect]),
) {
    let look = desk.look;
    let font = || look.font(look.sizes.least);
    let mut wanted = Vec::new();
    let mut texts = Vec::new();
    for (body, at) in marks {
        let colour = look.colours.sky_text;
        let text = painter.layout_no_wrap(desk.words.body(*body), font(), colour);
        wanted.push(Wanted {
            rank: if *body == scene.body {
                Rank::Target
            } else {
                Rank::Planet
            },
            size: text.size(),
            places: labels::around(*at, text.size(), 8.0),
        });
        texts.push((text, true));
    }
    for feature in scene.skyline.features() {
        let width = (feature.width.degrees() * frame.points_per_deg()) as f32;
        let top = frame.pos(feature.azimuth, feature.top);
        let foot = frame.rect.bottom();
        let label = feature.label.to_string();
        let inside = painter.layout_no_wrap(label.clone(), font(), look.colours.skyline_name);
        let size = inside.size();
        // Inside the shape where there is room for it, else over its top.
        let is_inside = size.x + 4.0 < width && foot - top.y > size.y + 6.0;
        let text = if is_inside {
            inside
        } else {
            painter.layout_no_wrap(label, font(), look.colours.sky_text)
        };
        let places = if is_inside {
            vec![
                pos2(top.x - 0.5 * size.x, foot - size.y - 3.0),
                pos2(top.x - 0.5 * size.x, foot - 2.0 * size.y - 5.0),
            ]
        } else {
            let x = top.x - 0.5 * size.x;
            vec![
                pos2(x, top.y - size.y - 3.0),
                pos2(x, top.y - 2.0 * size.y - 5.0),
            ]
        };
        wanted.push(Wanted {
            rank: Rank::Obstacle,
            size,
            places,
        });
        texts.push((text, !is_inside));
    }
    let bounds = frame.rect.shrink(2.0);
    for (place, (text, is_on_sky)) in labels::arrange(&wanted, bounds, figures)
        .into_iter()
        .zip(texts)
    {
        match place {
            Some(rect) if is_on_sky => shaded(painter, look, rect.min, &text),
            Some(rect) => {
                painter.galley(rect.min, text, look.colours.skyline_name);
            }
            None => {}
        }
    }
}

/// Every ten degrees of altitude; gives the figures' places.
fn altitudes(painter: &Painter, desk: &Desk<'_>, frame: &Frame) -> Vec<Rect> {
    let look = desk.look;
    let mut places = Vec::new();
    let step = if frame.top_deg > 50.0 { 20 } else { 10 };
    for degrees in (step..90).step_by(step) {
        let at = frame.pos_beside(-frame.half_deg(), degrees as f64);
        if at.y < frame.rect.top() + 8.0 {
            break;
        }
        painter.hline(
            at.x..=at.x + 6.0,
            at.y,
            Stroke::new(1.0, look.colours.sky_text),
        );
        let text = desk.words.degrees(Angle::from_degrees(degrees as f64), 0);
        let text = painter.layout_no_wrap(text, look.font(look.sizes.least), Color32::WHITE);
        let corner = pos2(at.x + 9.0, at.y - 0.5 * text.size().y);
        shaded(painter, look, corner, &text);
        places.push(Rect::from_min_size(corner, text.size()));
    }
    places
}

/// The ruler of azimuths below the strip: compass points, and degrees where there is room.
pub fn ruler(painter: &Painter, desk: &Desk<'_>, frame: &Frame, ruler: Rect) {
    let look = desk.look;
    let mut taken: Vec<Rect> = Vec::new();
    // Whole quarters first, then eighths, then the finer marks that find room.
    let finer = [(10, 4.0), (5, 8.0), (1, 40.0)]
        .into_iter()
        .filter(|(_, least)| frame.points_per_deg() > *least)
        .map(|(step_deg, _)| (step_deg, false));
    let coarse = [(90, true), (45, true), (30, false)];
    for (step_deg, is_point) in coarse.into_iter().chain(finer) {
        for azimuth_deg in (0..360).step_by(step_deg) {
            let azimuth = Angle::from_degrees(azimuth_deg as f64);
            let beside_deg = frame.beside_deg(azimuth);
            if beside_deg.abs() > frame.half_deg() {
                continue;
            }
            let (text, font, colour) = if is_point {
                let point = desk.words.compass_point(azimuth_deg / 45 * 2);
                (point, look.bold(look.sizes.label), look.colours.text)
            } else {
                let degrees = desk.words.degrees(azimuth, 0);
                (degrees, look.font(look.sizes.least), look.colours.lesser)
            };
            let at = frame.pos_beside(beside_deg, 0.0).x;
            let text = painter.layout_no_wrap(text, font, colour);
            let place = Align2::CENTER_TOP.anchor_size(pos2(at, ruler.top() + 6.0), text.size());
            let is_free = place.left() >= ruler.left()
                && place.right() <= ruler.right()
                && taken.iter().all(|other| !other.intersects(place));
            if !is_free {
                continue;
            }
            taken.push(place.expand2(vec2(10.0, 0.0)));
            painter.vline(
                at,
                ruler.top()..=ruler.top() + 4.0,
                Stroke::new(1.0, look.colours.lesser),
            );
            painter.galley(place.min, text, colour);
        }
    }
}
