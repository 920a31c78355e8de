//! The skyline that terrain makes, for any spot of the grounds.

use crate::measure::Angle;
use std::f64::consts::TAU;

/// What terrain blocks, kept so that it can be shown from any spot of the grounds: in every
/// direction from the mark, the highest ground in each of several bands of distance.
///
/// Bands begin at [`FarSkyline::nearest_m`]; each reaches 1.4 times as far as the one before, from
/// 3 km on twice as far. Seen from the mark at the eye height asked
/// for, altitudes are those of the tiles to 0.02 deg, in directions 0.1 deg apart. From a spot
/// `r` metres away, or an eye `r` metres higher or lower, each kept piece of ground stands
/// exactly where it is seen from there; ground of the same band that was lower from the mark may
/// be missing, which makes the skyline too low by at most 0.3 `r`/`d` of the altitude (for
/// another eye height: 0.3 `r`/`d` radians), `d` being the distance of what blocks; from 3 km on
/// 0.5 in place of 0.3. So it serves
/// spots within some hundred metres of the mark.
#[derive(Clone, Debug, PartialEq)]
pub struct FarSkyline {
    /// Number of directions, evenly from north through east.
    pub(super) azimuths: usize,
    /// By bands from the nearest, then by directions; `None` where nothing is known.
    pub(super) crests: Vec<Option<Crest>>,
    pub(super) ground_m: f64,
    /// Drop of the surface below the horizontal for the square of a distance, 1/m.
    pub(super) drop_per_m: f64,
    pub(super) nearest_m: f64,
    pub(super) void_share: f64,
    pub(super) uncovered_share: f64,
}

/// The highest ground of one band in one direction.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Crest {
    /// From the mark, along the ground.
    pub distance_m: f32,
    /// Its elevation over that of the mark's ground.
    pub rise_m: f32,
}

/// Ground as seen from a spot.
#[derive(Clone, Copy)]
struct Glimpse {
    /// Azimuth, in steps between directions; not taken to one turn.
    step: f64,
    /// Tangent of the altitude.
    tangent: f64,
}

impl FarSkyline {
    /// (azimuth, altitude) in ascending azimuth from 0°, one for each direction, seen from a spot
    /// east and north of the mark with its eye so high over the ground at the mark.
    ///
    /// Altitudes are from the horizontal at the eye and may be below 0; they count the Earth's
    /// curvature and the bending of the ray, so no refraction is to be added. Where no ground is
    /// known the altitude is 0. Ground closer to the spot than a quarter of
    /// [`FarSkyline::nearest_m`] is left out: it is the spot's own.
    pub fn points(
        &self,
        east_m: f64,
        north_m: f64,
        eye_height_over_mark_ground_m: f64,
    ) -> Vec<(Angle, Angle)> {
        let spot = Spot {
            east_m,
            north_m,
            eye_m: eye_height_over_mark_ground_m,
            closest2: (0.25 * self.nearest_m).powi(2),
            drop_per_m: self.drop_per_m,
            steps_per_radian: self.azimuths as f64 / TAU,
        };
        let directions: Vec<(f64, f64)> = (0..self.azimuths)
            .map(|k| (k as f64 / spot.steps_per_radian).sin_cos())
            .collect();
        let mut tangents = vec![f64::NEG_INFINITY; self.azimuths];
        let mut glimpses = Vec::with_capacity(self.azimuths + 1);
        for band in self.crests.chunks(self.azimuths) {
            glimpses.clear();
            glimpses.extend(
                band.iter()
                    .zip(&directions)
                    .enumerate()
                    .map(|(k, (crest, direction))| spot.glimpse(k as f64, *direction, (*crest)?)),
            );
            // The first direction is also the one after the last.
            glimpses.push(glimpses[0].map(|first| Glimpse {
                step: first.step + self.azimuths as f64,
                ..first
            }));
            for &[here, next] in glimpses.array_windows() {
                if let Some(here) = here {
                    raise_between(&mut tangents, here, next.unwrap_or(here));
                }
            }
        }
        let step = Angle::from_radians(1.0 / spot.steps_per_radian);
        tangents
            .into_iter()
            .enumerate()
            .map(|(k, tangent)| {
                let is_known = tangent > f64::NEG_INFINITY;
                let altitude = if is_known { tangent.atan() } else { 0.0 };
                (step * k as f64, Angle::from_radians(altitude))
            })
            .collect()
    }

    /// The altitude in one direction, straight between those of [`FarSkyline::points`]; whoever
    /// wants many directions takes those.
    pub fn altitude(
        &self,
        azimuth: Angle,
        east_m: f64,
        north_m: f64,
        eye_height_over_mark_ground_m: f64,
    ) -> Angle {
        let points = self.points(east_m, north_m, eye_height_over_mark_ground_m);
        let at = azimuth.wrapped().radians() / TAU * self.azimuths as f64;
        let before = at.floor();
        let altitude = |k: usize| points[k % self.azimuths].1;
        let (low, high) = (altitude(before as usize), altitude(before as usize + 1));
        low + (high - low) * (at - before)
    }

    /// Elevation of the ground at the mark as the tiles have it, m.
    pub fn ground_m(&self) -> f64 {
        self.ground_m
    }

    /// By how much the tiles' ground lies above the elevation that the site file gives, m, if
    /// that is more than 30 m: then one of the two is likely wrong.
    pub fn disagreement_m(&self, site_elevation_m: f64) -> Option<f64> {
        const WORTH_A_WORD_M: f64 = 30.0;
        let difference_m = self.ground_m - site_elevation_m;
        (difference_m.abs() > WORTH_A_WORD_M).then_some(difference_m)
    }

    /// Ground nearer to the mark than this is not in the skyline, m.
    pub fn nearest_m(&self) -> f64 {
        self.nearest_m
    }

    /// The share of the way over the tiles that led over voids, 0 to 1. Voids do not block.
    pub fn void_share(&self) -> f64 {
        self.void_share
    }

    /// The share of the way, in all directions to the radius, that lies outside all tiles, 0 to 1.
    /// What is there does not block.
    pub fn uncovered_share(&self) -> f64 {
        self.uncovered_share
    }
}

/// Where ground is looked at from.
struct Spot {
    east_m: f64,
    north_m: f64,
    eye_m: f64,
    /// Square of the distance within which ground is left out, m².
    closest2: f64,
    drop_per_m: f64,
    steps_per_radian: f64,
}

impl Spot {
    fn glimpse(&self, step: f64, (sin, cos): (f64, f64), crest: Crest) -> Option<Glimpse> {
        let distance_m = f64::from(crest.distance_m);
        let east_m = distance_m * sin - self.east_m;
        let north_m = distance_m * cos - self.north_m;
        let distance2 = east_m * east_m + north_m * north_m;
        if distance2 < self.closest2 {
            return None;
        }
        let from_spot_m = distance2.sqrt();
        // How far it is turned from the direction that it has from the mark.
        let across_m = east_m * cos - north_m * sin;
        let along_m = east_m * sin + north_m * cos;
        Some(Glimpse {
            step: step + small_angle(across_m, along_m) * self.steps_per_radian,
            tangent: (f64::from(crest.rise_m) - self.eye_m) / from_spot_m
                - from_spot_m * self.drop_per_m,
        })
    }
}

/// `across.atan2(along)`, quick where it is small.
fn small_angle(across: f64, along: f64) -> f64 {
    // The next term of the series is below 1e-9 there.
    const SMALL: f64 = 0.02;
    if across.abs() < SMALL * along {
        let tangent = across / along;
        tangent - tangent * tangent * tangent / 3.0
    } else {
        across.atan2(along)
    }
}

/// Raises the directions between two neighbouring pieces of ground to the straight line that
/// joins them.
fn raise_between(tangents: &mut [f64], one: Glimpse, other: Glimpse) {
    let (low, high) = if one.step <= other.step {
        (one, other)
    } else {
        (other, one)
    };
    let width = high.step - low.step;
    // Neighbours that are seen in opposite directions stand around the spot, not before it.
    if width > 0.25 * tangents.len() as f64 {
        return;
    }
    let slope = if width > 0.0 {
        (high.tangent - low.tangent) / width
    } else {
        0.0
    };
    // This is the innermost loop: casts that round towards zero, and steps of the turn before or
    // after taken into this one by hand.
    let turn = tangents.len() as i64;
    let below = low.step as i64;
    let first = below + i64::from((below as f64) < low.step);
    for step in first.. {
        let beyond = step as f64 - low.step;
        if beyond > width {
            return;
        }
        let tangent = low.tangent + slope * beyond;
        let k = match step {
            ..0 => step + turn,
            _ if step >= turn => step - turn,
            _ => step,
        };
        if let Some(highest) = tangents.get_mut(k as usize) {
            *highest = highest.max(tangent);
        }
    }
}
