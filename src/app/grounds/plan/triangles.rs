//! Filling what corners enclose, dents included.

use eframe::egui::{Color32, Mesh, Pos2};

/// The filled area of corners in order, either way round, as one mesh. Corners whose sides cross
/// are filled as far as they can be.
pub fn filled(corners: &[Pos2], colour: Color32) -> Mesh {
    let mut mesh = Mesh::default();
    for corner in corners {
        mesh.colored_vertex(*corner, colour);
    }
    for [a, b, c] in triangles(corners) {
        mesh.add_triangle(a, b, c);
    }
    mesh
}

/// Twice the area of a triangle, positive where its corners turn one way.
fn doubled_area(a: Pos2, b: Pos2, c: Pos2) -> f32 {
    (b - a).x * (c - a).y - (b - a).y * (c - a).x
}

/// Cuts corners off one after another, each with no other corner within or on the cut.
fn triangles(corners: &[Pos2]) -> Vec<[u32; 3]> {
    let mut left: Vec<usize> = (0..corners.len()).collect();
    let area: f32 = (1..corners.len().saturating_sub(1))
        .map(|k| doubled_area(corners[0], corners[k], corners[k + 1]))
        .sum();
    if area < 0.0 {
        left.reverse();
    }
    let mut found = Vec::new();
    while left.len() > 2 {
        let count = left.len();
        let ear = (0..count).find(|k| {
            let at = |by: usize| left[(k + count - 1 + by) % count];
            let [a, b, c] = [at(0), at(1), at(2)];
            let [pa, pb, pc] = [corners[a], corners[b], corners[c]];
            doubled_area(pa, pb, pc) > 0.0
                && left
                    .iter()
                    .filter(|other| ![a, b, c].contains(other))
                    .all(|other| {
                        let p = corners[*other];
                        doubled_area(pa, pb, p) < 0.0
                            || doubled_area(pb, pc, p) < 0.0
                            || doubled_area(pc, pa, p) < 0.0
                    })
        });
        // Corners in one line, or sides that cross: nothing to fill there.
        let k = ear.unwrap_or(0);
        let at = |by: usize| left[(k + count - 1 + by) % count] as u32;
        if ear.is_some() {
            found.push([at(0), at(1), at(2)]);
        }
        left.remove(k);
    }
    found
}

/// Lines that run up to the right through what corners enclose, so many points apart.
pub fn hatching(corners: &[Pos2], apart: f32) -> Vec<[Pos2; 2]> {
    // On such a line x + y is the same everywhere.
    let level = |p: &Pos2| p.x + p.y;
    let least = corners.iter().map(level).fold(f32::INFINITY, f32::min);
    let most = corners.iter().map(level).fold(f32::NEG_INFINITY, f32::max);
    const MOST_LINES: f32 = 2000.0;
    if !least.is_finite() || (most - least) / apart > MOST_LINES {
        return Vec::new();
    }
    let mut lines = Vec::new();
    let mut at = (least / apart).ceil() * apart;
    while at < most {
        let mut crossed: Vec<Pos2> = corners
            .iter()
            .zip(corners.iter().cycle().skip(1))
            .filter(|(a, b)| (level(a) <= at) != (level(b) <= at))
            .map(|(a, b)| *a + (*b - *a) * ((at - level(a)) / (level(b) - level(a))))
            .collect();
        crossed.sort_by(|a, b| a.x.total_cmp(&b.x));
        lines.extend(crossed.chunks_exact(2).map(|ends| [ends[0], ends[1]]));
        at += apart;
    }
    lines
}

#[cfg(test)]
mod tests {
    use super::{hatching, triangles};
    use eframe::egui::{Pos2, pos2};

    fn area(corners: &[Pos2]) -> f32 {
        let found = triangles(corners);
        let area = |[a, b, c]: &[u32; 3]| {
            let at = |k: &u32| corners[*k as usize];
            0.5 * super::doubled_area(at(a), at(b), at(c)).abs()
        };
        found.iter().map(area).sum()
    }

    #[test]
    fn a_dent_is_left_out_either_way_round() {
        // An L of three squares of 10 x 10.
        let mut corners = vec![
            pos2(0.0, 0.0),
            pos2(20.0, 0.0),
            pos2(20.0, 10.0),
            pos2(10.0, 10.0),
            pos2(10.0, 20.0),
            pos2(0.0, 20.0),
        ];
        assert_eq!(area(&corners), 300.0);
        corners.reverse();
        assert_eq!(area(&corners), 300.0);
        // The lines of the hatching cover the same area, each standing for 4 / sqrt 2 across.
        let lines = hatching(&corners, 4.0);
        let covered: f32 =
            lines.iter().map(|[a, b]| a.distance(*b)).sum::<f32>() * 4.0 / 2f32.sqrt();
        assert!((covered - 300.0).abs() < 20.0, "{covered}");
    }

    #[test]
    fn corners_in_one_line_and_too_few_fill_nothing() {
        assert_eq!(area(&[pos2(0.0, 0.0), pos2(5.0, 5.0), pos2(9.0, 9.0)]), 0.0);
        assert!(triangles(&[pos2(0.0, 0.0), pos2(5.0, 5.0)]).is_empty());
    }
}
