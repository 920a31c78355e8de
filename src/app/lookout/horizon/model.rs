//! What the horizon view shows at one moment.

use crate::app::lookout::model::{Sample, Tracks};
use crate::app::scene::Scene;
use crate::light::Standing;
use crate::measure::Angle;
use crate::sky::{Body, View, stars};

/// Everything in the sky at the moment; places are refracted altitudes and azimuths of centres.
#[derive(Clone, Debug, PartialEq)]
pub struct Model {
    /// The chosen body.
    pub target: Mark,
    /// The altitude of the skyline under it.
    pub skyline: Angle,
    /// What stands there; `None` for a measured hill or the open horizon.
    pub obstacle: Option<String>,
    /// The other bright bodies, brightest first.
    pub others: Vec<Mark>,
    /// The Sun.
    pub sun: Mark,
    /// The stars that the sky lets through, brightest first.
    pub stars: Vec<Star>,
    /// The faintest star that shows, V.
    pub faintest: f64,
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
}

impl Model {
    /// The sky at the scene's moment.
    pub fn new(scene: &Scene<'_>, tracks: &Tracks) -> Self {
        let epoch = scene.span.at(scene.moment);
        let view = epoch.seen_by(scene.observer);
        let sun_altitude = view.place(Body::Sun).altitude;
        let at_s = tracks.at_s(scene.moment);
        let mark = |body| {
            let appearance = view.appearance(body);
            Mark {
                body,
                sample: Sample::new(scene, &epoch, body, sun_altitude, at_s),
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
        let faintest = super::sky::faintest_star(sun_altitude);
        Self {
            skyline: scene.skyline.altitude(target.sample.azimuth),
            obstacle: scene
                .skyline
                .label(target.sample.azimuth)
                .map(str::to_owned),
            sun: mark(Body::Sun),
            stars: stars_to(&view, faintest),
            target,
            others,
            faintest,
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

/// The stars above the horizon that are no fainter than `faintest`.
fn stars_to(view: &View<'_>, faintest: f64) -> Vec<Star> {
    stars::bright_stars()
        .iter()
        .take_while(|star| star.magnitude <= faintest)
        .filter_map(|star| {
            let place = view.horizontal(view.star(star).direction);
            let seen = view.refracted(place);
            (place.altitude > Angle::from_degrees(-1.0)).then_some(Star {
                name: star.name.as_deref(),
                azimuth: seen.azimuth,
                altitude: seen.altitude,
                magnitude: star.magnitude,
            })
        })
        .collect()
}
