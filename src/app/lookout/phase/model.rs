//! What a body's disc looks like to the eye and in the site's instruments.

use crate::app::command::OpticsView;
use crate::app::lookout::disc;
use crate::app::scene::Scene;
use crate::measure::{Angle, Vector};
use crate::place::{Instrument, Orientation};
use crate::sky::{Body, View};
use eframe::egui::{Vec2, vec2};

/// The disc, and the three ways of looking at it.
#[derive(Clone, Debug, PartialEq)]
pub struct Model {
    /// The chosen body.
    pub body: Body,
    /// Its angular diameter.
    pub diameter: Angle,
    /// The share of it that is lit.
    pub illuminated_fraction: f64,
    /// Sun-body-observer angle.
    pub phase_angle: Angle,
    /// The circle that every disc is drawn in, one for all planets and one for the Moon: what
    /// makes sizes comparable from night to night and from planet to planet.
    pub ring: Angle,
    /// Saturn's rings.
    pub rings: Option<Rings>,
    /// To the eye, in a binocular, in the chosen telescope.
    pub views: [Seen; 3],
}

/// One way of looking.
#[derive(Clone, Debug, PartialEq)]
pub struct Seen {
    /// Through what.
    pub through: Through,
    /// How it turns the picture.
    pub view: OpticsView,
    /// Which way the bright limb's middle lies on the screen.
    pub towards_limb: Vec2,
    /// Which way Saturn's north pole lies on the screen.
    pub towards_pole: Vec2,
}

/// What is looked through.
#[derive(Clone, Debug, PartialEq)]
pub enum Through {
    /// Nothing.
    Eye,
    /// A binocular: its label, if the site has one.
    Binocular(Option<String>),
    /// A telescope: its label and magnification, if the site has one that shows the sky so.
    Telescope(Option<(String, f64)>),
}

/// Saturn's rings, in radii of its disc.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Rings {
    /// Sine of the Earth's latitude over the rings: positive while their north face is seen.
    pub opening_sine: f64,
    /// Outer edge of the A ring.
    pub outer: f64,
    /// Inner edge of the B ring.
    pub inner: f64,
}

/// Edges of the A and B rings over the equatorial radius: 136 775 km and 92 000 km over
/// 60 268 km. Source: NASA's Saturnian rings fact sheet, from memory.
const RING_EDGES: (f64, f64) = (2.269, 1.527);

/// Saturn's north pole, right ascension and declination (ICRS). Source: IAU WGCCRE 2015
/// (Archinal et al. 2018), at J2000; it moves by hundredths of a degree in a century.
const SATURN_POLE_DEG: (f64, f64) = (40.589, 83.537);

impl Model {
    /// The disc at the scene's moment.
    pub fn new(scene: &Scene<'_>) -> Self {
        const PLANETS_RING: Angle = Angle::from_arcsec(60.0);
        const MOONS_RING: Angle = Angle::from_arcmin(35.0);
        let epoch = scene.span.at(scene.moment);
        let view = epoch.seen_by(scene.observer);
        let appearance = view.appearance(scene.body);
        let limb = disc::towards_limb(view.bright_limb_from_zenith(scene.body));
        let pole = disc::towards_limb(pole_from_up(
            &view,
            epoch.frame().true_from_icrs,
            scene.body,
        ));
        let seen = |through, view| Seen {
            through,
            view,
            towards_limb: shown(view, limb),
            towards_pole: shown(view, pole),
        };
        Self {
            body: scene.body,
            diameter: appearance.diameter,
            illuminated_fraction: appearance.illuminated_fraction,
            phase_angle: appearance.phase_angle,
            ring: match scene.body {
                Body::Moon | Body::Sun => MOONS_RING,
                _ => PLANETS_RING,
            },
            rings: (scene.body == Body::Saturn).then(|| Rings {
                opening_sine: epoch.ring_opening().sin(),
                outer: RING_EDGES.0,
                inner: RING_EDGES.1,
            }),
            views: [
                seen(Through::Eye, OpticsView::Erect),
                seen(binocular(&scene.site.kit), OpticsView::Erect),
                seen(
                    telescope(&scene.site.kit, scene.optics_view),
                    scene.optics_view,
                ),
            ],
        }
    }
}

/// A direction on the sky as an instrument shows it.
fn shown(view: OpticsView, towards: Vec2) -> Vec2 {
    match view {
        OpticsView::Erect => towards,
        OpticsView::Inverted => -towards,
        OpticsView::Mirrored => vec2(-towards.x, towards.y),
    }
}

/// The direction of Saturn's pole from straight up, counter-clockwise; 0 for others.
fn pole_from_up(view: &View<'_>, true_from_icrs: crate::measure::Matrix, body: Body) -> Angle {
    if body != Body::Saturn {
        return Angle::ZERO;
    }
    let (ra, dec) = SATURN_POLE_DEG;
    let pole =
        true_from_icrs * Vector::from_spherical(Angle::from_degrees(ra), Angle::from_degrees(dec));
    let towards = view.topocentric(body).direction;
    // East of north is counter-clockwise on the sky.
    let north = Vector::new(0.0, 0.0, 1.0);
    let east = north.cross(towards).unit();
    let upwards = towards.cross(east);
    let position_angle = Angle::from_radians(pole.dot(east).atan2(pole.dot(upwards)));
    position_angle - view.parallactic_angle(towards)
}

fn binocular(kit: &[Instrument]) -> Through {
    let is_binocular =
        |instrument: &&Instrument| matches!(instrument, Instrument::Binocular { .. });
    let found = kit.iter().find(is_binocular);
    Through::Binocular(found.map(|instrument| instrument.label().to_owned()))
}

/// The first telescope of the kit that shows the sky as chosen, with its lowest magnification.
fn telescope(kit: &[Instrument], view: OpticsView) -> Through {
    let wanted = match view {
        OpticsView::Erect => Orientation::Erect,
        OpticsView::Inverted => Orientation::Inverted,
        OpticsView::Mirrored => Orientation::Mirrored,
    };
    let found = kit.iter().find(|instrument| {
        matches!(instrument, Instrument::Telescope { .. }) && instrument.orientation() == wanted
    });
    Through::Telescope(found.map(|instrument| {
        let powers = instrument.views().into_iter().map(|(power, _)| power);
        (
            instrument.label().to_owned(),
            powers.fold(f64::INFINITY, f64::min),
        )
    }))
}

#[cfg(test)]
mod tests {
    use super::{Through, shown, telescope};
    use crate::app::command::OpticsView;
    use crate::place::{Eyepiece, Instrument, Orientation};
    use eframe::egui::vec2;

    #[test]
    fn optics_turn_the_picture_as_they_are_named() {
        let up_left = vec2(-0.6, -0.8);
        assert_eq!(shown(OpticsView::Erect, up_left), vec2(-0.6, -0.8));
        assert_eq!(shown(OpticsView::Inverted, up_left), vec2(0.6, 0.8));
        assert_eq!(shown(OpticsView::Mirrored, up_left), vec2(0.6, -0.8));
    }

    #[test]
    fn only_a_telescope_that_shows_the_sky_so_gives_its_name() {
        let eyepiece = |focal_length_mm| Eyepiece {
            focal_length_mm,
            apparent_field_deg: 50.0,
        };
        let kit = [Instrument::Telescope {
            label: "90 mm refractor".into(),
            aperture_mm: 90.0,
            focal_length_mm: 900.0,
            eyepieces: vec![eyepiece(10.0), eyepiece(25.0)],
            view: Orientation::Mirrored,
            spot: None,
        }];
        assert_eq!(
            telescope(&kit, OpticsView::Mirrored),
            Through::Telescope(Some(("90 mm refractor".into(), 36.0)))
        );
        assert_eq!(
            telescope(&kit, OpticsView::Inverted),
            Through::Telescope(None)
        );
    }
}
