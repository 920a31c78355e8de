//! "Venus went behind the oak at 19:42": one exact point of the skyline.

use super::heights::{obstacle_picker, set_height};
use super::into_skyline::{NewPoints, put};
use super::noted::NotedTime;
use super::{Desk, Outcome, done};
use crate::app::command::Commands;
use crate::app::widgets::{choice, error_line, text};
use crate::measure::Angle;
use crate::place::survey::SurveyError;
use crate::place::survey::compass::Sweep;
use crate::place::survey::timed::{Noted, TimedPoint, met_skyline};
use crate::sky::Body;
use crate::words::decimal;
use eframe::egui::Ui;

/// What is written.
#[derive(Default)]
pub struct Vanishing {
    body: Option<Body>,
    at: NotedTime,
    obstacle: usize,
}

impl Vanishing {
    fn body(&self, desk: &Desk<'_>) -> Body {
        self.body.unwrap_or_else(|| desk.state.body())
    }

    fn point(&self, desk: &Desk<'_>) -> Result<TimedPoint, SurveyError> {
        let noted = Noted {
            moment: self.at.moment(desk)?,
            uncertainty_s: self.at.uncertainty_s,
        };
        let observer = desk.state.site().observer();
        met_skyline(desk.state.ephemeris(), &observer, self.body(desk), &noted)
    }

    /// Draws the form.
    pub fn show(
        &mut self,
        ui: &mut Ui,
        desk: &Desk<'_>,
        commands: &mut Commands,
    ) -> Option<Outcome> {
        let (look, words) = (desk.look, desk.words);
        ui.horizontal_wrapped(|ui| {
            for body in std::iter::once(Body::Sun).chain(Body::BRIGHT) {
                if choice(ui, look, self.body(desk) == body, &words.body(body)).clicked() {
                    self.body = Some(body);
                }
            }
        });
        self.at.show(ui, desk);
        if self.body(desk) == Body::Sun {
            let caution = words.text("vanishing-sun-caution");
            text(ui, look, look.sizes.control, look.colours.caution, &caution);
        }
        let point = match self.point(desk) {
            Ok(point) => point,
            Err(error) => {
                error_line(ui, look, Some(&error.to_string()));
                return None;
            }
        };
        let line = words.text_with::<&str>(
            "vanishing-point",
            &[
                ("azimuth", &decimal(point.azimuth.degrees(), 2)),
                ("altitude", &decimal(point.altitude.degrees(), 2)),
                ("azimuth-off", &decimal(point.azimuth_error.degrees(), 2)),
                ("altitude-off", &decimal(point.altitude_error.degrees(), 2)),
            ],
        );
        text(ui, look, look.sizes.control, look.colours.text, &line);
        let into = ui.button(words.text("put-into-skyline")).clicked();
        let into = into.then(|| match point.skyline_point() {
            Ok(skyline_point) => put(
                desk,
                NewPoints {
                    points: vec![skyline_point],
                    sweep: Sweep::Points,
                    is_far: false,
                },
                commands,
            ),
            Err(error) => error.into(),
        });
        let given = self.give_height(ui, desk, &point, commands);
        into.or(given)
    }

    /// The height that the point gives to a known obstacle at its known place.
    fn give_height(
        &mut self,
        ui: &mut Ui,
        desk: &Desk<'_>,
        point: &TimedPoint,
        commands: &mut Commands,
    ) -> Option<Outcome> {
        const SLIP_M: f64 = 0.5;
        let site = desk.state.site();
        if site.obstacles.is_empty() {
            return None;
        }
        self.obstacle = self.obstacle.min(site.obstacles.len() - 1);
        let is_wanted = ui
            .horizontal_wrapped(|ui| {
                obstacle_picker(ui, desk, &mut self.obstacle);
                ui.button(desk.words.text("height-from-vanishing"))
                    .clicked()
            })
            .inner;
        is_wanted.then(|| {
            let spot = desk.state.spot();
            let obstacle = &site.obstacles[self.obstacle];
            let Some(distance_m) = distance_along(desk, obstacle, point.azimuth) else {
                let refusal = [("label", obstacle.label())];
                return Outcome::Refused(desk.words.text_with("obstacle-not-there", &refusal));
            };
            let above_ground_m = site.ground_m(spot) + spot.eye_height_m;
            match point.height(distance_m, above_ground_m.max(0.0), SLIP_M) {
                Ok(height) => {
                    let mut site = site.clone();
                    let obstacle = &mut site.obstacles[self.obstacle];
                    let at = obstacle.points();
                    let slope = site.slope;
                    let base = obstacle.base_mut();
                    let base_m =
                        base.unwrap_or_else(|| at.first().map_or(0.0, |p| slope.height_m(*p)));
                    set_height(obstacle, height.length_m - base_m);
                    let label = obstacle.label().to_owned();
                    let said = desk.words.text_with::<&str>(
                        "height-given-within",
                        &[
                            ("label", &label),
                            ("height", &decimal(height.length_m - base_m, 1)),
                            ("off", &decimal(height.combined_m(), 1)),
                        ],
                    );
                    done(site, said, commands)
                }
                Err(error) => error.into(),
            }
        })
    }
}

/// How far from the spot an obstacle stands in a direction: to the axis of a tree or a pole that
/// is met within its width, to the nearest side of anything else.
fn distance_along(
    desk: &Desk<'_>,
    obstacle: &crate::place::Obstacle,
    azimuth: Angle,
) -> Option<f64> {
    use crate::place::{Obstacle, PlanPoint};
    let here = desk.state.spot().plan_point();
    let points = obstacle.points();
    match obstacle {
        Obstacle::Tree { width_m, .. } | Obstacle::Pole { width_m, .. } => {
            let axis = points.first()?;
            let distance_m = here.distance_m(*axis);
            let off = (here.bearing(*axis) - azimuth).signed();
            let half = (0.5 * width_m).atan2(distance_m);
            (off.radians().abs() <= half).then_some(distance_m)
        }
        _ => {
            let is_closed = !matches!(obstacle, Obstacle::Wall { .. });
            let count = points.len();
            let sides = if is_closed { count } else { count - 1 };
            let hit =
                |index: usize| ray_hit_m(here, azimuth, points[index], points[(index + 1) % count]);
            fn ray_hit_m(
                from: PlanPoint,
                azimuth: Angle,
                a: PlanPoint,
                b: PlanPoint,
            ) -> Option<f64> {
                let (sin, cos) = azimuth.sin_cos();
                let (ae, an) = (a.east_m - from.east_m, a.north_m - from.north_m);
                let (de, dn) = (b.east_m - a.east_m, b.north_m - a.north_m);
                let turn = sin * dn - cos * de;
                let along_m = (ae * dn - an * de) / turn;
                let share = (ae * cos - an * sin) / turn;
                (along_m > 0.0 && (0.0..=1.0).contains(&share)).then_some(along_m)
            }
            (0..sides).filter_map(hit).min_by(f64::total_cmp)
        }
    }
}
