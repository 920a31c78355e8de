//! The labels of the horizon view.

use super::camera::Camera;
use super::model::Model;
use super::path::{PathTick, Stretch};
use crate::app::lookout::labels::{self, Rank, Wanted};
use crate::app::lookout::model::Tracks;
use crate::app::lookout::says::Says;
use crate::app::palette::Look;
use crate::app::scene::Scene;
use crate::light::Standing;
use crate::measure::Angle;
use crate::place::Feature;
use crate::sky::Body;
use eframe::egui::{Color32, FontId, Galley, Painter, Pos2, Rect, Vec2, pos2, vec2};
use std::sync::Arc;

/// A label in its place.
pub struct Label {
    /// Where.
    pub rect: Rect,
    /// Its lines, from top to bottom.
    pub lines: Vec<Arc<Galley>>,
    /// Whether its lines end at the right edge, or else begin at the left one.
    pub is_right_aligned: bool,
    /// Whether it stands on the sky and needs a dark shade around its letters.
    pub is_on_sky: bool,
}

/// Gathers the labels and gives them their places.
pub struct Captions<'a> {
    scene: &'a Scene<'a>,
    says: Says<'a>,
    look: Look,
    painter: &'a Painter,
    camera: Camera,
    wanted: Vec<Wanted>,
    lines: Vec<Vec<Arc<Galley>>>,
    /// The point that each label belongs to.
    anchors: Vec<Pos2>,
    taken: Vec<Rect>,
}

impl<'a> Captions<'a> {
    /// None yet.
    pub fn new(scene: &'a Scene<'a>, painter: &'a Painter, camera: Camera) -> Self {
        Self {
            scene,
            says: Says::new(scene),
            look: scene.look,
            painter,
            camera,
            wanted: Vec::new(),
            lines: Vec::new(),
            anchors: Vec::new(),
            taken: Vec::new(),
        }
    }

    fn galley(&self, text: String, font: FontId, colour: Color32) -> Arc<Galley> {
        self.painter.layout_no_wrap(text, font, colour)
    }

    /// Keeps labels off the path and off the altitude ruler.
    pub fn keep_off(&mut self, stretches: &[Stretch]) {
        const HALF_LINE: f32 = 3.0;
        for stretch in stretches {
            for pair in stretch.points.windows(2) {
                if self.camera.rect.contains(pair[0]) || self.camera.rect.contains(pair[1]) {
                    self.taken
                        .push(Rect::from_two_pos(pair[0], pair[1]).expand(HALF_LINE));
                }
            }
        }
    }

    /// Keeps labels off what stands in the view's corner.
    pub fn keep_off_corner(&mut self, corner: Option<Rect>) {
        self.taken.extend(corner);
    }

    fn want(
        &mut self,
        rank: Rank,
        lines: Vec<Arc<Galley>>,
        anchor: Pos2,
        places: impl FnOnce(Vec2) -> Vec<Pos2>,
    ) {
        let width = lines.iter().map(|line| line.size().x).fold(0.0, f32::max);
        let size = vec2(width, lines.iter().map(|line| line.size().y).sum());
        self.wanted.push(Wanted {
            rank,
            size,
            places: places(size),
        });
        self.lines.push(lines);
        self.anchors.push(anchor);
    }

    /// The chosen body's name and circumstances.
    pub fn target(&mut self, model: &Model, at: Pos2) {
        let (says, look) = (self.says, self.look);
        let mark = &model.target;
        let name = match mark.magnitude {
            Some(magnitude) => says.text(
                "horizon-target",
                &[
                    ("body", &says.body(mark.body)),
                    ("magnitude", &says.magnitude(magnitude)),
                ],
            ),
            None => says.body(mark.body),
        };
        let clearance = mark.sample.clearance;
        let id = match mark.sample.standing {
            Standing::Plain if clearance.degrees() >= 2.5 => "horizon-target-clear",
            Standing::Plain => "horizon-target-close",
            Standing::WashedOut => "horizon-target-washed-out",
            Standing::Blocked | Standing::Down => "horizon-target-blocked",
        };
        let circumstances = says.text(
            id,
            &[
                ("altitude", &says.tenths(mark.sample.altitude)),
                ("fists", &says.fists(clearance)),
                ("obstacle", &says.obstacle(model.obstacle.as_deref())),
            ],
        );
        let colour = look.colours.sky_text;
        let lines = vec![
            self.galley(name, look.bold(look.sizes.control), colour),
            self.galley(circumstances, look.font(look.sizes.label), colour),
        ];
        self.taken
            .push(Rect::from_center_size(at, Vec2::splat(28.0)));
        self.want(Rank::Target, lines, at, |size| {
            let mut places = vec![
                pos2(at.x - 20.0 - size.x, at.y - 6.0 - size.y),
                pos2(at.x + 20.0, at.y - 6.0 - size.y),
            ];
            for gap in [18.0, 36.0, 60.0] {
                places.extend(labels::around(at, size, gap));
            }
            places
        });
    }

    /// The clearance, beside the line that drops to the skyline.
    pub fn clearance(&mut self, model: &Model, [top, foot]: [Pos2; 2]) {
        const LEAST: f32 = 44.0;
        self.taken.push(Rect::from_two_pos(top, foot).expand(2.0));
        if foot.y - top.y < LEAST {
            return;
        }
        let text = self.says.text(
            "horizon-clearance",
            &[(
                "clearance",
                &self.says.tenths(model.target.sample.clearance),
            )],
        );
        let font = self.look.font(self.look.sizes.label);
        let line = self.galley(text, font, self.look.colours.sky_text);
        let low = foot.min(pos2(foot.x, self.camera.rect.bottom()));
        self.want(Rank::Target, vec![line], low, |size| {
            [0.62, 0.8, 0.45, 0.3]
                .iter()
                .flat_map(|share| {
                    let y = top.y + share * (low.y - top.y) - 0.5 * size.y;
                    [pos2(foot.x + 7.0, y), pos2(foot.x - 7.0 - size.x, y)]
                })
                .collect()
        });
    }

    /// The other bodies' names.
    pub fn others(&mut self, model: &Model, places: &[(Pos2, f32)]) {
        for (mark, (at, radius)) in model.others.iter().zip(places) {
            let shows = matches!(mark.sample.standing, Standing::Plain | Standing::WashedOut);
            if !shows || !self.camera.rect.contains(*at) {
                continue;
            }
            let says = self.says;
            let (rank, text) = match mark.body {
                Body::Moon => {
                    let lit = says.percent(mark.illuminated_fraction);
                    (Rank::Moon, says.text("horizon-moon", &[("lit", &lit)]))
                }
                body => (Rank::Planet, says.body(body)),
            };
            let colour = match mark.sample.standing {
                Standing::Plain => self.look.colours.sky_text,
                _ => self.look.colours.sky_text.gamma_multiply(0.75),
            };
            let font = self.look.font(self.look.sizes.label);
            let line = self.galley(text, font, colour);
            self.taken
                .push(Rect::from_center_size(*at, Vec2::splat(2.0 * radius)));
            let gap = radius + 5.0;
            self.want(rank, vec![line], *at, |size| labels::around(*at, size, gap));
        }
    }

    /// The times along the path: hours before half hours.
    pub fn hours(&mut self, tracks: &Tracks, ticks: &[PathTick]) {
        /// Half hours are written only where hours stand so far apart.
        const LEAST_HOUR: f32 = 118.0;
        let hours = ticks.iter().filter(|tick| tick.tick.minute == 0);
        let hours: Vec<Pos2> = hours.map(|tick| tick.at).collect();
        let hour = hours.windows(2).map(|pair| pair[0].distance(pair[1]));
        let has_halves = hour.fold(0.0, f32::max) > LEAST_HOUR || hours.len() < 3;
        let step = if has_halves { 30 } else { 60 };
        for tick in ticks.iter().filter(|tick| tick.tick.minute % step == 0) {
            let rank = match tick.tick.minute {
                0 => Rank::Hour,
                _ => Rank::HalfHour,
            };
            let text = self.says.time(tracks.moment(tick.tick.at_s));
            let font = self.look.font(self.look.sizes.label);
            let line = self.galley(text, font, self.look.colours.sky_text);
            let (at, across) = (tick.at, tick.across);
            self.want(rank, vec![line], at, |size| {
                [1.0, -1.0]
                    .iter()
                    .map(|side| {
                        // Far enough along the normal for the text's box to clear the line.
                        let reach = 9.0 + 0.5 * (across.x.abs() * size.x + across.y.abs() * size.y);
                        at + across * (side * reach) - 0.5 * size
                    })
                    .collect()
            });
        }
    }

    /// Names inside the shapes, below their tops.
    pub fn obstacles(&mut self) {
        let camera = self.camera;
        for feature in self.scene.skyline.features() {
            let font = self.look.font(self.look.sizes.label);
            let colour = self.look.colours.skyline_name;
            let line = self.galley(feature.label.to_string(), font, colour);
            let crest = self.lowest_crest(&feature, line.size().x + 8.0);
            let top = camera.pos(feature.azimuth, crest);
            let width = (feature.width.degrees() * camera.points_per_deg) as f32;
            let foot_y = camera.rect.bottom();
            if line.size().x + 4.0 > width {
                continue;
            }
            self.want(Rank::Obstacle, vec![line], top, |size| {
                [5.0, 18.0, 32.0]
                    .iter()
                    .map(|below| pos2(top.x - 0.5 * size.x, top.y + below))
                    .filter(|place| place.y + size.y + 2.0 < foot_y)
                    .collect()
            });
        }
    }

    /// The lowest that a feature comes over a label's width, as far as it is seen there.
    fn lowest_crest(&self, feature: &Feature, width: f32) -> Angle {
        let half_deg = 0.5 * f64::from(width) / self.camera.points_per_deg;
        let across = [-1.0, -0.75, -0.5, -0.25, 0.0, 0.25, 0.5, 0.75, 1.0];
        let crests = across.map(|share| {
            let at = feature.azimuth + Angle::from_degrees(share * half_deg);
            let top = self.scene.skyline.top_of(&feature.label, at);
            top.unwrap_or_else(|| self.scene.skyline.altitude(at))
                .radians()
        });
        Angle::from_radians(crests.into_iter().fold(f64::INFINITY, f64::min))
    }

    /// The names of the brightest stars that stand clear of the skyline.
    pub fn stars(&mut self, model: &Model) {
        const NAMED_TO: f64 = 1.7;
        for star in &model.stars {
            let at = self.camera.pos(star.azimuth, star.altitude);
            let clearance = self.scene.skyline.clearance(star.azimuth, star.altitude);
            let is_clear = clearance > Angle::ZERO;
            let (Some(name), true) = (star.name, is_clear && self.camera.rect.contains(at)) else {
                continue;
            };
            if star.magnitude > NAMED_TO {
                continue;
            }
            let font = self.look.font(self.look.sizes.least);
            let colour = self.look.colours.sky_text.gamma_multiply(0.72);
            let line = self.galley(name.to_owned(), font, colour);
            self.want(Rank::Star, vec![line], at, |size| {
                labels::around(at, size, 6.0)
            });
        }
    }

    /// The labels that find a place.
    pub fn arrange(self) -> Vec<Label> {
        let bounds = self.camera.rect.shrink(4.0);
        let mut taken = self.taken;
        let ruler_width = self.look.sizes.label * 7.5;
        taken.push(Rect::from_min_max(
            bounds.left_top(),
            pos2(bounds.left() + ruler_width, bounds.bottom()),
        ));
        let places = labels::arrange(&self.wanted, bounds, &taken);
        places
            .into_iter()
            .zip(self.lines)
            .zip(self.wanted.iter().zip(self.anchors))
            .filter_map(|((rect, lines), (wanted, anchor))| {
                let rect = rect?;
                Some(Label {
                    rect,
                    lines,
                    is_right_aligned: rect.right() < anchor.x,
                    is_on_sky: wanted.rank != Rank::Obstacle,
                })
            })
            .collect()
    }
}
