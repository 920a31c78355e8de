//! How a site's sky is lit and whose eyes look: made once per site, shared by every night.

use crate::light::{Conditions, Eye, Eyes, Gaze, Glow, LightError, Moonlight, Optics, SkyLight};
use crate::light::{Spread, Target};
use crate::place::Site;
use crate::sky::{Body, View};

/// How much light a site's sky has and how its people's eyes are taken, with the kindest and the
/// harshest that air and eyes are taken to be.
#[derive(Clone, Debug)]
pub struct Sight {
    /// The sky as the site file states its air.
    pub sky: SkyLight,
    eyes: Eyes,
    spread: Spread,
    kindest: SkyLight,
    harshest: SkyLight,
}

/// Whether air and eyes are as assumed, or at one end of their spread.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Luck {
    /// As assumed.
    Usual,
    /// Clearer air and sharper eyes.
    Kindest,
    /// Thicker air and duller eyes.
    Harshest,
}

impl Luck {
    pub(super) const ALL: [Self; 3] = [Self::Usual, Self::Kindest, Self::Harshest];
}

impl Sight {
    /// The sky under these conditions for these eyes.
    pub fn new(conditions: Conditions, eyes: Eyes, spread: Spread) -> Self {
        // The gaze is of no account here: only the air differs.
        let gaze = eyes.gaze(Eye::Visitor);
        Self {
            sky: SkyLight::new(conditions),
            kindest: SkyLight::new(spread.kindest(&conditions, &gaze).0),
            harshest: SkyLight::new(spread.harshest(&conditions, &gaze).0),
            eyes,
            spread,
        }
    }

    /// A site's sky, with its people's eyes and the first instrument of its kit at its lowest power.
    ///
    /// # Errors
    /// An instrument or a figure of the air that the light model cannot take.
    pub fn of_site(site: &Site) -> Result<Self, LightError> {
        let mut eyes = Eyes::default();
        let stated = &site.eyes;
        for (eye, factor) in [
            (Eye::PasserBy, stated.passer_by),
            (Eye::Visitor, stated.visitor),
            (Eye::Keen, stated.keen),
            (Eye::Optics, stated.optics),
        ] {
            if let Some(factor) = factor {
                eyes = eyes.with_factor(eye, factor)?;
            }
        }
        let views = site.kit.first().map(Optics::of).transpose()?;
        if let Some(optics) = views.as_ref().and_then(|views| views.first()) {
            eyes = eyes.with_instrument(*optics);
        }
        Ok(Self::new(
            Conditions::of_site(site)?,
            eyes,
            Spread::default(),
        ))
    }

    /// An eye, as assumed.
    pub fn gaze(&self, eye: Eye) -> Gaze {
        self.eyes.gaze(eye)
    }

    /// The sky with that luck in the air.
    pub fn sky_with(&self, luck: Luck) -> &SkyLight {
        match luck {
            Luck::Usual => &self.sky,
            Luck::Kindest => &self.kindest,
            Luck::Harshest => &self.harshest,
        }
    }

    /// An eye with that luck.
    pub fn gaze_with(&self, eye: Eye, luck: Luck) -> Gaze {
        let gaze = self.gaze(eye);
        match luck {
            Luck::Usual => gaze,
            Luck::Kindest => gaze.sharper_by(self.spread.eye_mag),
            Luck::Harshest => gaze.sharper_by(-self.spread.eye_mag),
        }
    }
}

/// What lights the sky at one instant over one place: the Sun and the Moon.
#[derive(Clone, Copy, Debug)]
pub struct Lamps {
    sun_altitude: f64,
    sun_azimuth: f64,
    moon: Option<Moonlight>,
}

impl Lamps {
    /// The Sun and the Moon as an observer has them.
    pub fn of(view: &View<'_>) -> Self {
        let sun = view.place(Body::Sun);
        let moon = view.refracted_place(Body::Moon);
        let magnitude = view.appearance(Body::Moon).magnitude.value();
        Self {
            sun_altitude: sun.altitude.radians(),
            sun_azimuth: sun.azimuth.radians(),
            moon: magnitude.map(|magnitude| Moonlight {
                altitude: moon.altitude.radians(),
                azimuth: moon.azimuth.radians(),
                magnitude,
            }),
        }
    }

    /// The sky that they light.
    pub fn glow<'a>(&self, sky: &'a SkyLight) -> Glow<'a> {
        sky.at(self.sun_altitude, self.sun_azimuth, self.moon)
    }
}

/// A body as something to be seen; `None` where its brightness is not known. The Moon's own glow
/// does not count against it.
pub fn target(view: &View<'_>, body: Body) -> Option<Target> {
    let appearance = view.appearance(body);
    let place = view.refracted_place(body);
    let (altitude, azimuth) = (place.altitude.radians(), place.azimuth.radians());
    let magnitude = appearance.magnitude.value()?;
    let diameter_arcsec = appearance.diameter.arcsec();
    Some(match body {
        Body::Moon => {
            let phase_angle_deg = appearance.phase_angle.degrees();
            Target::moon(
                magnitude,
                phase_angle_deg,
                diameter_arcsec,
                altitude,
                azimuth,
            )
        }
        _ => Target::point(magnitude, altitude, azimuth)
            .with_disc(diameter_arcsec, appearance.illuminated_fraction),
    })
}
