//! The plan of the orbits at one moment, and the events around it.

use crate::app::scene::Scene;
use crate::measure::{Angle, Moment, Vector, civil};
use crate::plan::{Neighbour, Neighbours};
use crate::sky::Body;
use std::f64::consts::TAU;

/// The plan, seen from north of the ecliptic and turned so that the Earth stands straight below
/// the Sun: what is left of the Sun here stands left of it for a northern observer facing it.
#[derive(Clone, Debug, PartialEq)]
pub struct Model {
    /// The chosen body.
    pub body: Body,
    /// What the plan is centred on.
    pub centre: Centre,
    /// How far the plan reaches from its centre, au.
    pub reach_au: f64,
    /// Orbits, the chosen body's first.
    pub orbits: Vec<Vec<Plan>>,
    /// The Earth.
    pub earth: Plan,
    /// The chosen body.
    pub place: Plan,
    /// Angle from the Sun, seen from the Earth.
    pub elongation: Angle,
}

/// What stands in the middle.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Centre {
    /// The Sun.
    Sun,
    /// The Earth, with the Sun far off straight up: the Moon's plan.
    Earth,
}

/// A place on the plan: au to the right and up from its centre.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
#[allow(missing_docs)]
pub struct Plan {
    pub right_au: f64,
    pub up_au: f64,
}

/// An event and how many civil days it lies before (negative) or after the moment.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Dated {
    /// What.
    pub event: Neighbour,
    /// Days from the moment's civil date to the event's.
    pub days: i64,
}

impl Model {
    /// The plan at the scene's moment; `None` for the Sun, which has none.
    pub fn new(scene: &Scene<'_>) -> Option<Self> {
        const POINTS: usize = 180;
        let epoch = scene.span.at(scene.moment);
        let elongation = epoch.appearance(scene.body).elongation;
        let earth = epoch.heliocentric_ecliptic(None);
        let body = epoch.heliocentric_ecliptic(Some(scene.body));
        let turn = Turn::new(earth);
        match scene.body {
            Body::Sun => None,
            Body::Moon => {
                let place = turn.plan(body - earth);
                let reach_au = (body - earth).length();
                let circle = (0..POINTS).map(|k| {
                    let (sin, cos) = (TAU * k as f64 / POINTS as f64).sin_cos();
                    Plan {
                        right_au: reach_au * cos,
                        up_au: reach_au * sin,
                    }
                });
                Some(Self {
                    body: scene.body,
                    centre: Centre::Earth,
                    reach_au: 1.2 * reach_au,
                    orbits: vec![circle.collect()],
                    earth: Plan::default(),
                    place,
                    elongation,
                })
            }
            planet => {
                let orbit = |body| -> Vec<Plan> {
                    let points = epoch.orbit(body, POINTS);
                    points.into_iter().map(|point| turn.plan(point)).collect()
                };
                let context = context(planet).iter().map(|other| orbit(*other));
                let orbits: Vec<Vec<Plan>> = std::iter::once(orbit(Some(planet)))
                    .chain(context)
                    .collect();
                let reach_au = orbits.iter().flatten().map(Plan::centre_distance_au);
                Some(Self {
                    body: planet,
                    centre: Centre::Sun,
                    reach_au: reach_au.fold(1.0, f64::max),
                    orbits,
                    earth: turn.plan(earth),
                    place: turn.plan(body),
                    elongation,
                })
            }
        }
    }
}

impl Plan {
    /// Distance from the plan's centre, au.
    pub fn centre_distance_au(&self) -> f64 {
        self.right_au.hypot(self.up_au)
    }
}

/// The other orbits on a planet's plan: the Earth's (`None`) and those that lie inside the
/// larger of the two.
fn context(planet: Body) -> &'static [Option<Body>] {
    const OUTWARDS: [Option<Body>; 6] = [
        None,
        Some(Body::Venus),
        Some(Body::Mercury),
        Some(Body::Mars),
        Some(Body::Jupiter),
        Some(Body::Saturn),
    ];
    match planet {
        Body::Mercury => &OUTWARDS[..2],
        Body::Venus => &[None, Some(Body::Mercury)],
        Body::Mars => &OUTWARDS[..3],
        Body::Jupiter => &[None, Some(Body::Mars)],
        Body::Saturn => &[None, Some(Body::Mars), Some(Body::Jupiter)],
        _ => &[None, Some(Body::Jupiter), Some(Body::Saturn)],
    }
}

/// Turns the ecliptic so that the Earth lies straight below the Sun.
struct Turn {
    sin: f64,
    cos: f64,
}

impl Turn {
    fn new(earth: Vector) -> Self {
        let distance = earth.x.hypot(earth.y);
        Self {
            sin: earth.y / distance,
            cos: earth.x / distance,
        }
    }

    fn plan(&self, place: Vector) -> Plan {
        // Along the Earth's direction is down; a quarter turn on, the way it moves, is right.
        Plan {
            right_au: self.cos * place.y - self.sin * place.x,
            up_au: -(self.cos * place.x + self.sin * place.y),
        }
    }
}

/// The last and the next event around a moment: of conjunctions and greatest elongations (or
/// oppositions) one is the last and the other the next, for they take turns.
pub fn around(
    neighbours: &Neighbours,
    scene: &Scene<'_>,
    moment: Moment,
) -> (Option<Dated>, Option<Dated>) {
    let date = |moment| civil::local_date(scene.scales.civil(moment).0, scene.zone);
    let dated = |event: Neighbour| Dated {
        event,
        days: (date(event.moment) - date(moment)).num_days(),
    };
    let is_past = |event: &Neighbour| event.moment <= moment;
    let all = [
        neighbours.last_conjunction,
        neighbours.last_height,
        neighbours.next_conjunction,
        neighbours.next_height,
    ];
    let by_time = |a: &Neighbour, b: &Neighbour| a.moment.seconds_since(b.moment).total_cmp(&0.0);
    let events = || all.iter().flatten().copied();
    (
        events().filter(is_past).max_by(by_time).map(dated),
        events()
            .filter(|event| !is_past(event))
            .min_by(by_time)
            .map(dated),
    )
}

#[cfg(test)]
mod tests {
    use super::{Plan, Turn};
    use crate::measure::Vector;

    #[test]
    fn the_earth_lies_below_and_moves_to_the_right() {
        let earth = Vector::new(-0.6, 0.8, 0.0);
        let turn = Turn::new(earth);
        let Plan { right_au, up_au } = turn.plan(earth);
        assert!(
            right_au.abs() < 1e-12 && (up_au + 1.0).abs() < 1e-12,
            "{right_au} {up_au}"
        );
        // A little further along the orbit, counter-clockwise as seen from the north.
        let later = turn.plan(earth + Vector::new(-0.8, -0.6, 0.0) * 0.1);
        assert!(later.right_au > 0.05, "{later:?}");
    }
}
