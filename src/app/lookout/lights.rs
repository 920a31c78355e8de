//! The sky's light at one instant of a scene: as assumed, and at both ends of its spread.

use crate::app::scene::Scene;
use crate::light::{Eye, Glow};
use crate::measure::Angle;
use crate::plan::{self, Lamps, Luck};
use crate::sky::{Body, Epoch, View};

/// The sky at one instant with each luck in the air.
pub struct Lights<'a> {
    scene: &'a Scene<'a>,
    /// Airless altitude of the Sun's centre.
    pub sun_altitude: Angle,
    /// The sky as assumed.
    pub usual: Glow<'a>,
    harshest: Glow<'a>,
    kindest: Glow<'a>,
}

impl<'a> Lights<'a> {
    /// The sky of an epoch.
    pub fn new(scene: &'a Scene<'a>, epoch: &Epoch<'_>) -> Self {
        let view = epoch.seen_by(scene.observer);
        let lamps = Lamps::of(&view);
        let glow = |luck| lamps.glow(scene.sight.sky_with(luck));
        Self {
            scene,
            sun_altitude: view.place(Body::Sun).altitude,
            usual: glow(Luck::Usual),
            harshest: glow(Luck::Harshest),
            kindest: glow(Luck::Kindest),
        }
    }

    /// A body's margins for each eye, in the order of [`Eye::ALL`], and those of the scene's eye
    /// in the harshest and the kindest air; zero for the Sun.
    pub fn margins(&self, view: &View<'_>, body: Body) -> ([f64; 4], (f64, f64)) {
        if body == Body::Sun {
            return ([0.0; 4], (0.0, 0.0));
        }
        let Some(target) = plan::target(view, body) else {
            return (
                [f64::NEG_INFINITY; 4],
                (f64::NEG_INFINITY, f64::NEG_INFINITY),
            );
        };
        let gazes = Eye::ALL.map(|eye| self.scene.sight.gaze(eye));
        let margins = self
            .usual
            .margins(&target, &gazes)
            .map(|margin| margin.margin_mag);
        let with = |glow: &Glow<'_>, luck| {
            glow.margin(&target, &self.scene.sight.gaze_with(self.scene.eye, luck))
                .margin_mag
        };
        let spread = (
            with(&self.harshest, Luck::Harshest),
            with(&self.kindest, Luck::Kindest),
        );
        (margins, spread)
    }
}
