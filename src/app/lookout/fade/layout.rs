//! Where everything of the fade goes.

use super::model::{Absence, End, Lane, Mark, MarkKind, Model, Stray};
use crate::app::lookout::model::{Tick, Tracks};
use crate::app::lookout::says::Says;
use crate::app::palette::Look;
use eframe::egui::text::{LayoutJob, TextWrapping};
use eframe::egui::{Color32, FontId, Galley, Painter, Pos2, Rangef, Rect, pos2, vec2};
use std::sync::Arc;

/// Where things go, in points of the screen.
pub struct Layout {
    /// All of it.
    pub whole: Rect,
    /// The band painted with the sky's colours; its width is the shown span.
    pub band: Rect,
    /// Marks of the Sun's times on the band, with their names where there is room.
    pub marks: Vec<(f32, Option<Arc<Galley>>)>,
    /// Ticks under the band, with the whole hours' (or half hours') times.
    pub ticks: Vec<(f32, bool, Option<Arc<Galley>>)>,
    /// The lanes, from top to bottom; where there is nothing to see in a lane but the chosen
    /// body's, it is none but a part of `absent`.
    pub lanes: Vec<(usize, LaneLayout)>,
    /// The bodies that are not seen, each with the reason, on one line below the lanes.
    pub absent: Option<(Pos2, Arc<Galley>)>,
    from_s: f64,
    to_s: f64,
}

/// One lane.
pub struct LaneLayout {
    /// Where; its lower edge is clearance 0.
    pub rect: Rect,
    /// The body's name, left of it.
    pub name: (Pos2, Arc<Galley>),
    /// What is written in it.
    pub notes: Vec<(Pos2, Arc<Galley>)>,
}

impl Layout {
    /// Lays the fade out in `whole`.
    pub fn new(
        model: &Model,
        tracks: &Tracks,
        says: Says<'_>,
        look: &Look,
        painter: &Painter,
        whole: Rect,
    ) -> Self {
        let builder = Builder {
            model,
            tracks,
            says,
            look,
            painter,
        };
        let letters = look.sizes.label;
        let names = builder.names();
        let gutter = names.iter().map(|name| name.size().x).fold(0.0, f32::max) + 12.0;
        let bubble = bubble_height(look);
        let ruler = letters + 12.0;
        let room = (whole.height() - bubble - ruler).max(40.0);
        let band_height = (0.22 * room).clamp(letters + 8.0, 46.0);
        let top = whole.top() + bubble;
        let band = Rect::from_min_max(
            pos2(whole.left() + gutter, top),
            pos2(whole.right(), top + band_height),
        );
        let mut layout = Self {
            whole,
            band,
            marks: Vec::new(),
            ticks: Vec::new(),
            lanes: Vec::new(),
            absent: None,
            from_s: model.from_s,
            to_s: model.to_s,
        };
        layout.marks = builder.marks(&layout);
        layout.ticks = builder.ticks(&layout);
        let below = Rangef::new(band.bottom() + ruler, whole.bottom());
        layout.absent = builder.absent(&layout, below.max);
        let absent_top = layout
            .absent
            .as_ref()
            .map_or(below.max, |(at, _)| at.y - 3.0);
        layout.lanes = builder.lanes(&layout, names, Rangef::new(below.min, absent_top));
        layout
    }

    /// The screen's x of a time.
    pub fn x(&self, at_s: f64) -> f32 {
        let share = (at_s - self.from_s) / (self.to_s - self.from_s);
        self.band.left() + share as f32 * self.band.width()
    }

    /// The time at the screen's x, kept within the shown span.
    pub fn at_s(&self, x: f32) -> f64 {
        let share = f64::from((x - self.band.left()) / self.band.width()).clamp(0.0, 1.0);
        self.from_s + share * (self.to_s - self.from_s)
    }
}

/// Room above the band for the time that is shown.
pub fn bubble_height(look: &Look) -> f32 {
    look.sizes.control + 12.0
}

struct Builder<'a> {
    model: &'a Model,
    tracks: &'a Tracks,
    says: Says<'a>,
    look: &'a Look,
    painter: &'a Painter,
}

impl Builder<'_> {
    fn galley(&self, text: String, font: FontId, colour: Color32) -> Arc<Galley> {
        self.painter.layout_no_wrap(text, font, colour)
    }

    fn label(&self, text: String, colour: Color32) -> Arc<Galley> {
        self.galley(text, self.look.font(self.look.sizes.label), colour)
    }

    /// The bodies' names, the chosen one's in bold.
    fn names(&self) -> Vec<Arc<Galley>> {
        let (look, sizes) = (self.look, self.look.sizes);
        let name = |(k, lane): (usize, &Lane)| match k {
            0 => self.galley(
                self.says.body(lane.body),
                look.bold(sizes.label),
                look.colours.text,
            ),
            _ => self.label(self.says.body(lane.body), look.colours.lesser),
        };
        self.model.lanes.iter().enumerate().map(name).collect()
    }

    /// Names stand right of their marks, up to the next one; the sunset's name goes first.
    fn marks(&self, layout: &Layout) -> Vec<(f32, Option<Arc<Galley>>)> {
        let edges: Vec<f32> = self
            .model
            .marks
            .iter()
            .map(|mark| layout.x(mark.at_s))
            .collect();
        let ends = edges.iter().skip(1).copied().chain([layout.band.right()]);
        edges
            .iter()
            .zip(ends)
            .zip(&self.model.marks)
            .map(|((x, end), mark)| {
                let name = self.label(mark_name(self.says, *mark), self.look.colours.sky_text);
                let fits = x + 6.0 + name.size().x < end - 2.0;
                (*x, fits.then_some(name))
            })
            .collect()
    }

    /// Times at whole hours, and at half hours where there is room for them.
    fn ticks(&self, layout: &Layout) -> Vec<(f32, bool, Option<Arc<Galley>>)> {
        let hours = self.model.ticks.iter().filter(|tick| tick.minute % 30 == 0);
        let step = hours.map(|tick| layout.x(tick.at_s)).collect::<Vec<_>>();
        let room = step
            .windows(2)
            .map(|pair| pair[1] - pair[0])
            .fold(f32::INFINITY, f32::min);
        let text = |tick: &Tick| {
            let time = self.says.time(self.tracks.moment(tick.at_s));
            self.label(time, self.look.colours.lesser)
        };
        self.model
            .ticks
            .iter()
            .map(|tick| {
                let x = layout.x(tick.at_s);
                let time = (tick.minute % 30 == 0).then(|| text(tick));
                let time = time.filter(|time| {
                    let half = 0.5 * time.size().x;
                    let is_inside =
                        x - half >= layout.band.left() && x + half <= layout.band.right();
                    is_inside && (tick.minute == 0 || room > 2.0 * half + 14.0)
                });
                (x, tick.minute == 0, time)
            })
            .collect()
    }

    /// The lanes that are drawn, with their places in the model; the chosen body's always.
    fn shown(&self) -> impl Iterator<Item = (usize, &Lane)> {
        let lanes = self.model.lanes.iter().enumerate();
        lanes.filter(|(k, lane)| *k == 0 || lane.absence.is_none())
    }

    /// The other bodies, each with why it is not seen; one line, shortened where it must be.
    fn absent(&self, layout: &Layout, bottom: f32) -> Option<(Pos2, Arc<Galley>)> {
        let others = self.model.lanes.iter().skip(1);
        let reasons: Vec<String> = others
            .filter_map(|lane| {
                let id = absence_name(lane.absence?);
                let why = self.says.text(id, &[]);
                let body = self.says.body(lane.body);
                Some(
                    self.says
                        .text("lane-absent", &[("body", &body), ("why", &why)]),
                )
            })
            .collect();
        if reasons.is_empty() {
            return None;
        }
        let line = reasons.join(&self.says.text("lane-absent-between", &[]));
        let mut job = LayoutJob::simple_singleline(
            line,
            self.look.font(self.look.sizes.least),
            self.look.colours.lesser,
        );
        job.wrap = TextWrapping::truncate_at_width(layout.band.width());
        let text = self.painter.layout_job(job);
        Some((pos2(layout.band.left(), bottom - text.size().y), text))
    }

    /// The chosen body's lane is the tallest.
    fn lanes(
        &self,
        layout: &Layout,
        names: Vec<Arc<Galley>>,
        below: Rangef,
    ) -> Vec<(usize, LaneLayout)> {
        const GAP: f32 = 4.0;
        let weight = |k: usize| if k == 0 { 2.0 } else { 1.0 };
        let count = self.shown().count() as f32;
        let weights: f32 = self.shown().map(|(k, _)| weight(k)).sum();
        let share = (below.span() - count * GAP).max(0.0) / weights;
        // A lane alone must not become a wall.
        let share = share.min(3.0 * self.look.sizes.label);
        let mut y = below.min;
        let mut placed = Vec::new();
        let mut taken = Vec::new();
        for (k, lane) in self.shown() {
            let rect = Rect::from_min_max(
                pos2(layout.band.left(), y + GAP),
                pos2(layout.band.right(), y + GAP + weight(k) * share),
            );
            let name = names[k].clone();
            let at = pos2(layout.whole.left(), rect.bottom() - name.size().y + 1.0);
            let lane = LaneLayout {
                rect,
                name: (at, name),
                notes: self.notes(layout, lane, rect, &mut taken),
            };
            placed.push((k, lane));
            y = rect.bottom();
        }
        placed
    }

    /// Ends of windows: what ends one stands right of it, what starts one left of it; else why
    /// there is none. What finds no room is dropped.
    fn notes(
        &self,
        layout: &Layout,
        lane: &Lane,
        rect: Rect,
        taken: &mut Vec<Rect>,
    ) -> Vec<(Pos2, Arc<Galley>)> {
        const GAP: f32 = 7.0;
        let colours = &self.look.colours;
        if let Some(absence) = lane.absence {
            let text = self.label(self.says.text(absence_name(absence), &[]), colours.lesser);
            let at = pos2(rect.left() + GAP, rect.bottom() - text.size().y - 1.0);
            return vec![(at, text)];
        }
        let mut placed: Vec<(Pos2, Arc<Galley>)> = Vec::new();
        // Of two that want one place the last end is the one to keep.
        for (k, end) in lane.ends.iter().enumerate().rev() {
            let x = layout.x(end.at_s);
            let before = k.checked_sub(1).and_then(|k| lane.ends.get(k));
            let before = before.map_or(rect.left(), |end| layout.x(end.at_s));
            let after = lane
                .ends
                .get(k + 1)
                .map_or(rect.right(), |end| layout.x(end.at_s));
            // Outside its window the whole text, else as much of it as there is room for; at the
            // rim an end's text stands inside its own window rather than nowhere.
            let words = self.end(end);
            let outside = words.iter().map(|words| (words, end.is_end));
            let inside = words
                .iter()
                .filter(|_| end.is_end)
                .map(|words| (words, false));
            let note = outside.chain(inside).find_map(|(words, is_right)| {
                let text = self.label(words.clone(), colours.text);
                let width = text.size().x;
                let (left, right) = if is_right { (x, after) } else { (before, x) };
                if width + 2.0 * GAP > right - left {
                    return None;
                }
                let at_x = if is_right { x + GAP } else { x - GAP - width };
                let at = pos2(at_x, rect.bottom() - text.size().y - 1.0);
                let place = Rect::from_min_size(at, text.size());
                let is_free = taken.iter().all(|other: &Rect| {
                    // Lines of neighbouring lanes may touch, words in one line may not.
                    !other.expand2(vec2(4.0, -2.0)).intersects(place)
                });
                is_free.then(|| {
                    taken.push(place);
                    (at, text)
                })
            });
            placed.extend(note);
        }
        placed
    }

    /// What is said of a window's end, the longest first: the cause with the time and how far it
    /// may stray, the cause with the time, the time with how far it may stray, the time.
    fn end(&self, end: &End) -> Vec<String> {
        let time = self.says.time(self.tracks.moment(end.at_s));
        let strayed = end
            .stray
            .map(|stray| self.strayed(&time, stray, end.is_end));
        let words = |time: &str| {
            let obstacle = end.obstacle.as_deref();
            self.says.edge(end.spoken, end.is_end, obstacle, time)
        };
        let Some(plain) = words(&time) else {
            return Vec::new();
        };
        let full = strayed.as_deref().and_then(words);
        full.into_iter()
            .chain([plain])
            .chain(strayed)
            .chain([time])
            .collect()
    }

    /// A time with how far it may stray.
    fn strayed(&self, time: &str, stray: Stray, is_end: bool) -> String {
        let told = |at_s| self.says.time(self.tracks.moment(at_s));
        let (id, from, to) = match stray {
            Stray::Between(from_s, to_s) => ("lane-stray", told(from_s), told(to_s)),
            Stray::OrNotAtAll(to_s) if is_end => ("lane-stray-end", String::new(), told(to_s)),
            Stray::OrNotAtAll(from_s) => ("lane-stray-start", told(from_s), String::new()),
        };
        let arguments = [("time", time), ("from", &from), ("to", &to)];
        self.says.text(id, &arguments)
    }
}

fn mark_name(says: Says<'_>, mark: Mark) -> String {
    let id = match mark.kind {
        MarkKind::Sunset => "fade-sunset",
        MarkKind::Sunrise => "fade-sunrise",
        MarkKind::Civil => "fade-civil",
        MarkKind::Nautical => "fade-nautical",
        MarkKind::Astronomical => "fade-astronomical",
    };
    says.text(id, &[])
}

fn absence_name(absence: Absence) -> &'static str {
    match absence {
        Absence::Down => "lane-not-up",
        Absence::Hidden => "lane-hidden",
        Absence::WashedOut => "lane-too-bright",
    }
}
