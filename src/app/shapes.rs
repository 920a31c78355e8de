//! The skyline's near-black shapes, with the sky that shows beneath crowns left open.

use crate::measure::Angle;
use crate::place::Skyline;
use eframe::egui::{Color32, Mesh, Pos2};

/// What blocks the view over a small step of azimuth, between two altitudes at either end.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Band {
    /// The step's two azimuths, in ascending order.
    pub azimuths: [Angle; 2],
    /// Lower edge at the two; `None` where it reaches down to the ground.
    pub low: Option<[Angle; 2]>,
    /// Upper edge at the two.
    pub high: [Angle; 2],
}

/// Everything that blocks the view, in steps of azimuth no wider than `step`.
pub fn bands(skyline: &Skyline, step: Angle) -> Vec<Band> {
    let outline = skyline.outline(step);
    let mut bands = Vec::new();
    for pair in outline.windows(2) {
        let [(from, high_from), (to, high_to)] = [pair[0], pair[1]];
        if to <= from {
            continue;
        }
        let azimuths = [from, to];
        let mut low = None;
        for [floor, ceiling] in openings(skyline, from, to) {
            bands.push(Band {
                azimuths,
                low,
                high: floor,
            });
            low = Some(ceiling);
        }
        bands.push(Band {
            azimuths,
            low,
            high: [high_from, high_to],
        });
    }
    bands
}

/// The openings over a step from low to high: floor and ceiling, each at both ends.
fn openings(skyline: &Skyline, from: Angle, to: Angle) -> Vec<[[Angle; 2]; 2]> {
    /// Just inside the step's ends, where a jump stands at neither.
    const INSIDE: f64 = 1e-6;
    let at = |share: f64| skyline.openings(from + (to - from) * share);
    let (mut first, mut last) = (at(INSIDE), at(1.0 - INSIDE));
    if first.len() != last.len() {
        first = at(0.5);
        last.clone_from(&first);
    }
    first
        .into_iter()
        .zip(last)
        .map(|(a, b)| [[a.0, b.0], [a.1, b.1]])
        .collect()
}

/// The bands that a view shows, as one mesh. `middle_deg` and `half_deg` say which azimuths the
/// view has, `pos` where degrees beside the middle and an altitude fall, and `ground_deg` how far
/// down the shapes reach.
pub fn mesh(
    bands: &[Band],
    colour: Color32,
    (middle_deg, half_deg): (f64, f64),
    ground_deg: f64,
    pos: impl Fn(f64, f64) -> Pos2,
) -> Mesh {
    let mut mesh = Mesh::default();
    let start_deg = (middle_deg - half_deg).rem_euclid(360.0);
    // The view may begin before north and end behind it.
    for turn_deg in [0.0, 360.0] {
        for band in bands {
            let beside = band
                .azimuths
                .map(|azimuth| azimuth.degrees() + turn_deg - start_deg - half_deg);
            if beside[1] < -half_deg || beside[0] > half_deg {
                continue;
            }
            let low = band
                .low
                .map_or([ground_deg; 2], |low| low.map(Angle::degrees));
            let first = mesh.vertices.len() as u32;
            for end in 0..2 {
                let beside_deg = beside[end].clamp(-half_deg, half_deg);
                let high_deg = band.high[end].degrees().max(low[end]);
                mesh.colored_vertex(pos(beside_deg, high_deg), colour);
                mesh.colored_vertex(pos(beside_deg, low[end]), colour);
            }
            mesh.add_triangle(first, first + 1, first + 2);
            mesh.add_triangle(first + 1, first + 3, first + 2);
        }
    }
    mesh
}

#[cfg(test)]
mod tests {
    #![allow(clippy::unwrap_used)]
    use super::{bands, mesh};
    use crate::measure::Angle;
    use crate::place::Skyline;
    use eframe::egui::{Color32, pos2};

    fn hill() -> Skyline {
        let points = [(90.0, 0.0), (100.0, 5.0), (110.0, 0.0)];
        Skyline::measured(&points.map(|(azimuth, altitude)| {
            (Angle::from_degrees(azimuth), Angle::from_degrees(altitude))
        }))
    }

    #[test]
    fn bands_go_all_round_without_a_gap() {
        let found = bands(&hill(), Angle::from_degrees(1.0));
        assert_eq!(found[0].azimuths[0], Angle::ZERO);
        assert!((found[found.len() - 1].azimuths[1].degrees() - 360.0).abs() < 1e-9);
        for pair in found.windows(2) {
            assert_eq!(pair[0].azimuths[1], pair[1].azimuths[0]);
            assert_eq!(pair[0].high[1], pair[1].high[0], "no jump on this hill");
        }
    }

    #[test]
    fn a_view_across_north_has_all_its_bands() {
        let found = bands(&hill(), Angle::from_degrees(1.0));
        let place = |beside: f64, altitude: f64| pos2(beside as f32, altitude as f32);
        // A quarter turn either way from north: 180 steps of a degree.
        let across = mesh(&found, Color32::BLACK, (0.0, 90.0), -2.0, place);
        let width: f32 = across
            .vertices
            .chunks(4)
            .map(|quad| quad[2].pos.x - quad[0].pos.x)
            .sum();
        assert!((width - 180.0).abs() < 1e-3, "{width}");
    }
}
