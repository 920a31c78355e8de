//! A site's surroundings with everything worked out that does not depend on the eye.

use super::blocker::Source;
use super::envelope::envelope;
use super::measured_use;
use super::silhouette::Silhouettes;
use super::solid::Solid;
use super::stretch::{Piece, highest_of, line_pieces, open_pieces};
use super::{FarSkyline, Obstacle, PlanPoint, Sector, Site, Skyline, Spot, Stature, Viewpoint};
use chrono::NaiveDate;
use std::collections::HashMap;
use std::sync::Arc;

/// What blocks the view on one date, ready for many eyes: made once for each edit of a site
/// ([`super::Grounds::prepared`]), then asked for each spot.
#[derive(Clone, Debug)]
pub struct PreparedGrounds<'a> {
    site: &'a Site,
    far: Option<&'a FarSkyline>,
    solids: Vec<(Solid, Source)>,
    names: Arc<[Arc<str>]>,
    measured_far: Vec<Piece>,
}

/// Terrain as it stands from about one place. Far ground moves little from step to step, so that
/// one view serves a patch of the grounds ([`PreparedGrounds::skyline_within`]).
#[derive(Clone, Debug)]
pub struct TerrainView {
    pieces: Vec<Piece>,
}

impl<'a> PreparedGrounds<'a> {
    pub(super) fn new(site: &'a Site, date: Option<NaiveDate>) -> Self {
        let mut numbers: HashMap<&str, u32> = HashMap::new();
        let mut names: Vec<Arc<str>> = Vec::new();
        let solids = site
            .obstacles
            .iter()
            .map(|obstacle| {
                let number = *numbers.entry(obstacle.label()).or_insert_with(|| {
                    names.push(obstacle.label().into());
                    names.len() as u32 - 1
                });
                (Solid::new(obstacle, site, date), Source::Obstacle(number))
            })
            .collect();
        Self {
            site,
            far: site.far.as_deref(),
            solids,
            names: names.into(),
            measured_far: measured_use::far_pieces(site),
        }
    }

    /// The skyline that somebody at a spot has: the highest of the measured skyline as far as it
    /// holds there ([`Site::measured_use`]), the obstacles and the terrain.
    pub fn skyline(&self, spot: &Spot, stature: Stature) -> Skyline {
        let viewpoint = self.site.viewpoint(spot, stature);
        let measured = measured_use::pieces_at(self.site, spot);
        let terrain = self.terrain_from(viewpoint);
        self.seen(viewpoint, None, &measured, &terrain)
    }

    /// The skyline from any point of the grounds: what was measured counts only where it is far.
    pub fn skyline_from(&self, viewpoint: Viewpoint) -> Skyline {
        let terrain = self.terrain_from(viewpoint);
        self.seen(viewpoint, None, &self.measured_far, &terrain)
    }

    /// [`PreparedGrounds::skyline_from`] for whoever looks at many points and at one part of the
    /// sky: true within `sector`, and of no meaning outside it. `terrain` is that of a place
    /// nearby ([`PreparedGrounds::terrain_from`]).
    pub fn skyline_within(
        &self,
        viewpoint: Viewpoint,
        sector: Sector,
        terrain: &TerrainView,
    ) -> Skyline {
        self.seen(viewpoint, Some(sector), &self.measured_far, terrain)
    }

    /// The terrain as seen from a point; level where the site has none.
    pub fn terrain_from(&self, viewpoint: Viewpoint) -> TerrainView {
        let pieces = self.far.map_or_else(open_pieces, |far| {
            let PlanPoint { east_m, north_m } = viewpoint.at;
            let points = far.points(east_m, north_m, viewpoint.height_m);
            line_pieces(&points, Source::Terrain)
        });
        TerrainView { pieces }
    }

    /// The obstacle that a point lies in, if it does.
    pub fn around(&self, at: PlanPoint) -> Option<&'a Obstacle> {
        self.obstacles()
            .find(|(obstacle, solid, _)| surrounds(obstacle, solid, at))
            .map(|(obstacle, ..)| obstacle)
    }

    fn obstacles(&self) -> impl Iterator<Item = (&'a Obstacle, &Solid, Source)> {
        let site: &'a Site = self.site;
        site.obstacles
            .iter()
            .zip(&self.solids)
            .map(|(obstacle, (solid, source))| (obstacle, solid, *source))
    }

    fn seen(
        &self,
        viewpoint: Viewpoint,
        sector: Option<Sector>,
        measured: &[Piece],
        terrain: &TerrainView,
    ) -> Skyline {
        let wedge = sector.and_then(|sector| Wedge::new(viewpoint.at, sector));
        let mut seen = Silhouettes::new(viewpoint);
        for (obstacle, solid, source) in self.obstacles() {
            let is_shown = wedge.as_ref().is_none_or(|wedge| wedge.touches(solid));
            if is_shown && !surrounds(obstacle, solid, viewpoint.at) {
                seen.add(solid, source);
            }
        }
        let mut floor = envelope(&mut seen.spans);
        for far in [measured, &terrain.pieces] {
            let is_open = far.len() == 1 && far[0].source == Source::Horizon;
            if !is_open {
                floor = highest_of(&floor, far);
            }
        }
        Skyline::from_parts(&floor, &mut seen.bands, self.names.clone())
    }
}

fn surrounds(obstacle: &Obstacle, solid: &Solid, at: PlanPoint) -> bool {
    /// More than any obstacle surrounds beyond its plan.
    const MARGIN_M: f64 = 1.0;
    let reach_m = solid.reach_m + MARGIN_M;
    let apart = solid.centre.minus(at);
    apart.dot(apart) <= reach_m * reach_m && obstacle.surrounds(at)
}

/// The part of the plan that lies in a sector narrower than half a turn.
struct Wedge {
    eye: PlanPoint,
    /// Directions of length one.
    from: PlanPoint,
    to: PlanPoint,
}

impl Wedge {
    fn new(eye: PlanPoint, sector: Sector) -> Option<Self> {
        let width_deg = (sector.to_deg - sector.from_deg).rem_euclid(360.0);
        let direction = |azimuth_deg: f64| {
            let (sin, cos) = azimuth_deg.to_radians().sin_cos();
            PlanPoint::new(sin, cos)
        };
        (0.0 < width_deg && width_deg < 180.0).then(|| Self {
            eye,
            from: direction(sector.from_deg),
            to: direction(sector.to_deg),
        })
    }

    /// Whether any of a solid can lie in it.
    fn touches(&self, solid: &Solid) -> bool {
        let towards = solid.centre.minus(self.eye);
        let clockwise_of_from_m = self.from.cross(towards);
        let before_to_m = towards.cross(self.to);
        clockwise_of_from_m >= -solid.reach_m && before_to_m >= -solid.reach_m
    }
}
