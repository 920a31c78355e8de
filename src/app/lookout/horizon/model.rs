//! What the horizon view shows at one moment.

use crate::app::lookout::lights::Lights;
use crate::app::lookout::model::{Sample, Tracks};
use crate::app::scene::Scene;
use crate::light::{Gaze, Glow, Standing, Target};
use crate::measure::Angle;
use crate::sky::{Body, View, stars};

/// Everything in the sky at the moment; places are refracted altitudes and azimuths of centres.
#[derive(Clone, Debug, PartialEq)]
pub struct Model {
    /// The chosen body.
    pub target: Mark,
    /// The altitude of the skyline's edge that it is nearest to.
    pub skyline: Angle,
    /// What hides it or stands there; `None` for a measured hill or the open horizon.
    pub obstacle: Option<String>,
    /// The other bright bodies, brightest first.
    pub others: Vec<Mark>,
    /// The Sun.
    pub sun: Mark,
    /// The stars that the scene's eye sees in that sky, from the list's brightest.
    pub stars: Vec<Star>,
}

/// A body in the sky.
#[derive(Clone, Debug, PartialEq)]
pub struct Mark {
    /// Which.
    pub body: Body,
    /// Where, and what it is for the eye.
    pub sample: Sample,
    /// V, where the formula says something.
    pub magnitude: Option<f64>,
    /// Sun-body-observer angle.
    pub phase_angle: Angle,
    /// The share of its disc that is lit, [0, 1].
    pub illuminated_fraction: f64,
    /// Where the middle of its bright limb lies, from straight up counter-clockwise.
    pub limb_from_up: Angle,
    /// Angular diameter.
    pub diameter: Angle,
}

/// A star in the sky.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Star {
    /// Its proper name, if it has one.
    pub name: Option<&'static str>,
    /// Where.
    pub azimuth: Angle,
    /// Refracted altitude.
    pub altitude: Angle,
    /// V.
    pub magnitude: f64,
    /// By how much it outshines the eye's threshold, magnitudes; 0 or more.
    pub margin_mag: f64,
}

impl Model {
    /// The sky at the scene's moment.
    pub fn new(scene: &Scene<'_>, tracks: &Tracks) -> Self {
        let epoch = scene.span.at(scene.moment);
        let view = epoch.seen_by(scene.observer);
        let lights = Lights::new(scene, &epoch);
        let at_s = tracks.at_s(scene.moment);
        let mark = |body| {
            let appearance = view.appearance(body);
            Mark {
                body,
                sample: Sample::new(scene, &epoch, &lights, body, at_s),
                magnitude: appearance.magnitude.value(),
                phase_angle: appearance.phase_angle,
                illuminated_fraction: appearance.illuminated_fraction,
                limb_from_up: view.bright_limb_from_zenith(body),
                diameter: appearance.diameter,
            }
        };
        let target = mark(scene.body);
        let others = Body::BRIGHT.iter().filter(|body| **body != scene.body);
        let mut others: Vec<Mark> = others.map(|body| mark(*body)).collect();
        let brightness = |mark: &Mark| mark.magnitude.unwrap_or(f64::INFINITY);
        others.sort_by(|a, b| brightness(a).total_cmp(&brightness(b)));
        Self {
            skyline: scene
                .skyline
                .nearest_edge(target.sample.azimuth, target.sample.altitude),
            obstacle: scene
                .skyline
                .hides(target.sample.azimuth, target.sample.altitude)
                .map(str::to_owned),
            sun: mark(Body::Sun),
            stars: seen_stars(&view, &lights.usual, &scene.sight.gaze(scene.eye)),
            target,
            others,
        }
    }

    /// Whether the chosen body's line down to the skyline is drawn.
    pub fn drops_line(&self) -> bool {
        matches!(
            self.target.sample.standing,
            Standing::Plain | Standing::WashedOut
        )
    }
}

/// The stars above the horizon that an eye sees.
fn seen_stars(view: &View<'_>, glow: &Glow<'_>, gaze: &Gaze) -> Vec<Star> {
    stars::bright_stars()
        .iter()
        .filter_map(|star| {
            let place = view.horizontal(view.star(star).direction);
            if place.altitude < Angle::from_degrees(-1.0) {
                return None;
            }
            let seen = view.refracted(place);
            let (altitude, azimuth) = (seen.altitude.radians(), seen.azimuth.radians());
            let target = Target::point(star.magnitude, altitude, azimuth);
            let margin_mag = glow.margin(&target, gaze).margin_mag;
            (margin_mag >= 0.0).then_some(Star {
                name: star.name.as_deref(),
                azimuth: seen.azimuth,
                altitude: seen.altitude,
                magnitude: star.magnitude,
                margin_mag,
            })
        })
        .collect()
}

#[cfg(test)]
mod tests {
    #![allow(clippy::unwrap_used)]
    use super::Model;
    use crate::app::lookout::model::Tracks;
    use crate::app::lookout::staged::Stage;
    use crate::measure::search;
    use crate::plan::Half;
    use crate::sky::Body;

    /// Star sights are taken while the Sun is 3 to 9 degrees down (common practice): the first
    /// of the first-magnitude stars comes out in between.
    #[test]
    fn a_first_magnitude_star_comes_out_when_star_sights_begin() {
        let stage = Stage::new("Fennick Common", "2026-12-04", Half::Dusk, Body::Saturn);
        let mut scene = stage.scene("2026-12-04T17:00:00");
        let tracks = Tracks::new(&scene);
        let first = search::grid(0.0, tracks.length_s, 60.0)
            .into_iter()
            .find_map(|at_s| {
                scene.moment = tracks.moment(at_s);
                let model = Model::new(&scene, &tracks);
                let has_one = model
                    .stars
                    .iter()
                    .any(|star| (0.5..1.5).contains(&star.magnitude));
                has_one.then_some(model.sun.sample.sun_altitude.degrees())
            });
        let sun_deg = first.unwrap();
        assert!((-9.0..=-3.0).contains(&sun_deg), "Sun at {sun_deg}");
    }
}
