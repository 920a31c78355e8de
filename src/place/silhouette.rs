//! An obstacle's outline against the sky from one eye: straight edges over intervals of azimuth.

use super::PlanPoint;
use super::Viewpoint;
use super::blocker::Source;
use super::envelope::{Span, across_north, push_span};
use super::solid::{Crown, Form, Rim, Solid, Strip};
use super::stack::Band;
use super::stretch::Shape;
use std::f64::consts::PI;

/// What is seen from an eye.
#[derive(Debug)]
pub(super) struct Silhouettes {
    eye: Viewpoint,
    /// What stands on the ground.
    pub spans: Vec<Span>,
    /// What hangs over it.
    pub bands: Vec<Band>,
}

/// Radians; at a kilometre, a hundredth of a millimetre. What is narrower covers no azimuth.
const NARROWEST: f64 = 1e-8;

impl Silhouettes {
    pub(super) fn new(eye: Viewpoint) -> Self {
        Self {
            eye,
            spans: Vec::new(),
            bands: Vec::new(),
        }
    }

    /// Adds an obstacle that the eye does not stand in.
    pub(super) fn add(&mut self, solid: &Solid, source: Source) {
        // What ends below the eye hides no sky.
        if solid.top_m <= self.eye.height_m {
            return;
        }
        match &solid.form {
            Form::Edges(rims) => rims.iter().for_each(|rim| self.add_rim(rim, source)),
            Form::Upright { crown, stem } => {
                let Some(facing) = Facing::new(self.eye, solid.centre) else {
                    return;
                };
                if let Some(crown) = crown {
                    self.add_crown(&facing, crown, source);
                }
                if let Some(stem) = stem {
                    self.add_stem(&facing, stem, source);
                }
            }
        }
    }

    /// An edge and the eye span a plane, so that along the edge tan(altitude) is a combination
    /// of the azimuth's sine and cosine.
    fn add_rim(&mut self, rim: &Rim, source: Source) {
        let start = rim.start.plan.minus(self.eye.at);
        let end = rim.end.plan.minus(self.eye.at);
        let turn = start.cross(end);
        let (start_m, end_m) = (
            rim.start.height_m - self.eye.height_m,
            rim.end.height_m - self.eye.height_m,
        );
        if (rim.is_one_sided && turn > 0.0) || (start_m <= 0.0 && end_m <= 0.0) {
            return;
        }
        let (a, a_m, b, b_m) = if turn > 0.0 {
            (start, start_m, end, end_m)
        } else {
            (end, end_m, start, start_m)
        };
        let width = turn.abs().atan2(a.dot(b));
        // Seen end-on, or from inside its own vertical plane, it covers no azimuth.
        if !(NARROWEST..=PI - NARROWEST).contains(&width) {
            return;
        }
        let area = turn.abs();
        let shape = Shape::Edge {
            east: (a.north_m * b_m - b.north_m * a_m) / area,
            north: (b.east_m * a_m - a.east_m * b_m) / area,
        };
        let from = a.east_m.atan2(a.north_m);
        push_span(&mut self.spans, from, width, shape, source);
    }

    fn add_stem(&mut self, facing: &Facing, stem: &Strip, source: Source) {
        let up_m = stem.top_m - self.eye.height_m;
        let half = facing.aside(stem.half_width_m);
        if up_m > 0.0 && (NARROWEST..PI).contains(&(2.0 * half)) {
            let shape = facing.shape(up_m, 0.0);
            push_span(
                &mut self.spans,
                facing.azimuth - half,
                2.0 * half,
                shape,
                source,
            );
        }
    }

    /// Full width up to the shoulders, then straight to a flat top half as wide; cut off level
    /// where there is a gap beneath.
    fn add_crown(&mut self, facing: &Facing, crown: &Crown, source: Source) {
        /// How wide the top is, of the width.
        const TOP: f64 = 0.5;
        let half_top_m = TOP * crown.half_width_m;
        // How much wider it gets for each metre down.
        let widening = (crown.half_width_m - half_top_m) / (crown.top_m - crown.shoulder_m);
        let foot_m = crown
            .underside_m
            .unwrap_or(f64::NEG_INFINITY)
            .max(crown.shoulder_m);
        let half_m = half_top_m + widening * (crown.top_m - foot_m);
        let top_m = crown.top_m - self.eye.height_m;
        let bottom = crown
            .underside_m
            .map(|underside_m| underside_m - self.eye.height_m)
            .filter(|up_m| *up_m > 0.0)
            .map(|up_m| facing.shape(up_m, 0.0));
        let (inner, outer) = (facing.aside(half_top_m), facing.aside(half_m));
        let axis = facing.azimuth;
        // The shoulders' lines, continued to the axis.
        let apex_m = top_m + half_top_m / widening;
        for (from, width, shape) in [
            (
                axis - outer,
                outer - inner,
                facing.shape(apex_m, 1.0 / widening),
            ),
            (axis - inner, 2.0 * inner, facing.shape(top_m, 0.0)),
            (
                axis + inner,
                outer - inner,
                facing.shape(apex_m, -1.0 / widening),
            ),
        ] {
            if !(NARROWEST..PI).contains(&width) {
                continue;
            }
            let Some(bottom) = bottom else {
                push_span(&mut self.spans, from, width, shape, source);
                continue;
            };
            across_north(from, width, |from, to| {
                self.bands.push(Band {
                    from,
                    to,
                    bottom,
                    top: shape,
                    source,
                });
            });
        }
    }
}

/// An upright plane through an axis, square to the line of sight.
struct Facing {
    /// Of the axis.
    azimuth: f64,
    sin: f64,
    cos: f64,
    distance_m: f64,
}

impl Facing {
    /// `None` where the eye is on the axis.
    fn new(eye: Viewpoint, axis: PlanPoint) -> Option<Self> {
        let towards = axis.minus(eye.at);
        let distance_m = towards.length_m();
        (distance_m > 0.0).then(|| Self {
            azimuth: towards.east_m.atan2(towards.north_m),
            sin: towards.east_m / distance_m,
            cos: towards.north_m / distance_m,
            distance_m,
        })
    }

    /// The azimuth of a point so far clockwise of the axis, from the axis's; radians.
    fn aside(&self, aside_m: f64) -> f64 {
        aside_m.atan2(self.distance_m)
    }

    /// A straight edge in the plane that passes the axis at a height over the eye and rises so
    /// much for each metre clockwise. At an angle t from the axis it is `up + rise d tan t` high
    /// and `d / cos t` off.
    fn shape(&self, up_m: f64, rise: f64) -> Shape {
        let up = up_m / self.distance_m;
        Shape::Edge {
            east: up * self.sin + rise * self.cos,
            north: up * self.cos - rise * self.sin,
        }
    }
}
