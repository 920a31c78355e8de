//! Changes of a measured skyline, each a whole changed site.

use crate::place::{MeasuredUse, Site, SkylinePoint};

/// The finest step of azimuth and altitude, degrees: no clinometer reads finer.
pub const STEP_DEG: f64 = 0.1;

/// A measured skyline that belongs to a spot in full.
#[derive(Clone, Copy, Debug)]
pub struct Owned<'a> {
    site: &'a Site,
    /// The spot that keeps it; `None`: the site itself, for its mark.
    spot: Option<usize>,
}

impl<'a> Owned<'a> {
    /// The one that belongs to a spot, by its place in the site's list: the spot's own, or the
    /// mark's at the mark (where there may be none yet). `None` for a spot that has only the far
    /// parts of another's.
    pub fn at(site: &'a Site, spot: usize) -> Option<Self> {
        let of_spot = site.spots.get(spot)?;
        match site.measured_use(of_spot) {
            MeasuredUse::Own => Some(Self {
                site,
                spot: Some(spot),
            }),
            MeasuredUse::Mark => Some(Self { site, spot: None }),
            MeasuredUse::Nothing if of_spot.is_mark() => Some(Self { site, spot: None }),
            _ => None,
        }
    }

    /// The site that it belongs to.
    pub fn site(&self) -> &'a Site {
        self.site
    }

    /// Its points, in ascending azimuth.
    pub fn points(&self) -> &'a [SkylinePoint] {
        match self.spot {
            Some(spot) => &self.site.spots[spot].skyline,
            None => &self.site.skyline,
        }
    }

    fn with(&self, points: Vec<SkylinePoint>) -> Site {
        let mut site = self.site.clone();
        match self.spot {
            Some(spot) => site.spots[spot].skyline = points,
            None => site.skyline = points,
        }
        site
    }

    /// The site with one point moved: to the nearest tenth of a degree, and no farther than the
    /// neighbouring points.
    pub fn moved(&self, index: usize, to: SkylinePoint) -> Option<Site> {
        let mut points = self.points().to_vec();
        let before = index.checked_sub(1).map(|k| points[k].azimuth_deg);
        let after = points.get(index + 1).map(|point| point.azimuth_deg);
        let least = before.map_or(0.0, |azimuth| azimuth + STEP_DEG);
        let most = after.map_or(360.0 - STEP_DEG, |azimuth| azimuth - STEP_DEG);
        let point = points.get_mut(index)?;
        // Seen from the point, not from north: a drag across north does not throw it round.
        let turned = (to.azimuth_deg - point.azimuth_deg + 180.0).rem_euclid(360.0) - 180.0;
        *point = SkylinePoint {
            azimuth_deg: rounded(point.azimuth_deg + turned).clamp(least, most.max(least)),
            altitude_deg: rounded(to.altitude_deg).clamp(-10.0, 90.0),
        };
        Some(self.with(points))
    }

    /// The site with a point more, and that point's place in the list. The first of all comes
    /// with the level on either side, so that it does not raise the whole horizon. `None` where
    /// there is a point in that azimuth.
    pub fn added(&self, point: SkylinePoint) -> Option<(Site, usize)> {
        /// How far from the first point the level begins.
        const FOOT_DEG: f64 = 10.0;
        let azimuth_deg = rounded(point.azimuth_deg).rem_euclid(360.0);
        let altitude_deg = rounded(point.altitude_deg).clamp(-10.0, 90.0);
        let mut points = self.points().to_vec();
        let is_near =
            |known: &SkylinePoint| (known.azimuth_deg - azimuth_deg).abs() < 0.5 * STEP_DEG;
        if points.iter().any(is_near) {
            return None;
        }
        if points.is_empty() {
            points.extend([-FOOT_DEG, FOOT_DEG].map(|aside| SkylinePoint {
                azimuth_deg: rounded(azimuth_deg + aside).rem_euclid(360.0),
                altitude_deg: 0.0,
            }));
        }
        points.push(SkylinePoint {
            azimuth_deg,
            altitude_deg,
        });
        points.sort_by(|a, b| a.azimuth_deg.total_cmp(&b.azimuth_deg));
        let index = points.iter().position(is_near)?;
        Some((self.with(points), index))
    }

    /// The site without one of the points.
    pub fn without(&self, index: usize) -> Option<Site> {
        let mut points = self.points().to_vec();
        (index < points.len()).then(|| {
            points.remove(index);
            self.with(points)
        })
    }
}

/// The wording of what holds of a skyline that was measured elsewhere; `None` where nothing was,
/// or where it was measured here.
pub fn elsewhere(used: MeasuredUse) -> Option<&'static str> {
    match used {
        MeasuredUse::FarPartsOnly {
            is_any_left_out: true,
        } => Some("measured-far-only"),
        MeasuredUse::FarPartsOnly {
            is_any_left_out: false,
        } => Some("measured-all-far"),
        MeasuredUse::LeftOut => Some("measured-elsewhere"),
        MeasuredUse::Own | MeasuredUse::Mark | MeasuredUse::Nothing => None,
    }
}

/// To the nearest step; written so that a file shows no more decimals than were meant.
fn rounded(degrees: f64) -> f64 {
    (degrees * 10.0).round() / 10.0
}

#[cfg(test)]
mod tests {
    #![allow(clippy::unwrap_used)]
    use super::Owned;
    use crate::place::{Site, SkylinePoint, demo_site};

    fn point(azimuth_deg: f64, altitude_deg: f64) -> SkylinePoint {
        SkylinePoint {
            azimuth_deg,
            altitude_deg,
        }
    }

    fn common() -> Site {
        demo_site("Fennick Common").unwrap().clone()
    }

    #[test]
    fn the_mark_s_skyline_is_the_mark_s_and_no_other_spot_s() {
        let mut site = common();
        assert!(Owned::at(&site, 0).is_some());
        assert!(Owned::at(&site, 1).is_none());
        site.spots[1].skyline = vec![point(10.0, 3.0)];
        assert_eq!(Owned::at(&site, 1).unwrap().points().len(), 1);
        assert!(Owned::at(&site, 9).is_none(), "no such spot");
    }

    #[test]
    fn a_point_moves_by_tenths_and_never_past_its_neighbours() {
        let site = common();
        let owned = Owned::at(&site, 0).unwrap();
        let moved = owned.moved(1, point(55.04, 7.26)).unwrap();
        assert_eq!(moved.skyline[1], point(55.0, 7.3));
        let far = owned.moved(1, point(170.0, 120.0)).unwrap();
        assert_eq!(far.skyline[1].altitude_deg, 90.0);
        assert!(far.skyline[1].azimuth_deg < far.skyline[2].azimuth_deg);
        let around = owned.moved(0, point(350.0, 1.0)).unwrap();
        assert_eq!(
            around.skyline[0].azimuth_deg, 0.0,
            "north is as far as it goes"
        );
        for site in [moved, far, around] {
            site.check().unwrap();
        }
    }

    #[test]
    fn points_are_added_in_order_and_taken_away() {
        let site = common();
        let owned = Owned::at(&site, 0).unwrap();
        let (added, index) = owned.added(point(60.0, 9.0)).unwrap();
        assert_eq!((index, added.skyline.len()), (2, site.skyline.len() + 1));
        added.check().unwrap();
        assert!(owned.added(point(52.0, 1.0)).is_none(), "one is there");
        let again = Owned::at(&added, 0).unwrap().without(index).unwrap();
        assert_eq!(again, site);
    }

    #[test]
    fn the_first_point_leaves_the_rest_of_the_horizon_level() {
        let mut site = common();
        site.skyline.clear();
        site.obstacles.clear();
        let (added, _) = Owned::at(&site, 0).unwrap().added(point(5.0, 9.0)).unwrap();
        added.check().unwrap();
        let skyline = added.skyline(&added.spots[0]);
        let at = |azimuth| skyline.altitude(crate::measure::Angle::from_degrees(azimuth));
        assert!((at(5.0).degrees() - 9.0).abs() < 1e-9);
        assert_eq!(at(180.0).degrees(), 0.0);
    }
}
