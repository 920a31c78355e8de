//! A body's disc with its lit part.

use crate::measure::Angle;
use eframe::egui::{Color32, Mesh, Painter, Pos2, Shape, Stroke, Vec2, vec2};

/// Which way the middle of the bright limb lies on the screen, as a unit vector, from its angle
/// counter-clockwise from straight up.
pub fn towards_limb(from_up: Angle) -> Vec2 {
    let (sin, cos) = from_up.sin_cos();
    vec2(-sin as f32, -cos as f32)
}

/// The edge of the lit part: `steps + 1` pairs of a point of the bright limb and the point of the
/// terminator across from it, from cusp to cusp, for a disc of radius 1 about the origin.
///
/// The terminator is half an ellipse seen from the side: as far beyond the middle as the cosine
/// of the phase angle (Meeus, *Astronomical Algorithms*, 2nd ed., chapter 41).
pub fn lit_edge(phase_angle: Angle, towards_limb: Vec2, steps: usize) -> Vec<(Vec2, Vec2)> {
    let across = towards_limb.rot90();
    let reach = -phase_angle.cos() as f32;
    (0..=steps)
        .map(|k| {
            let along = std::f32::consts::PI * (k as f32 / steps as f32 - 0.5);
            let (sin, cos) = along.sin_cos();
            let cross = across * sin;
            (
                towards_limb * cos + cross,
                towards_limb * (reach * cos) + cross,
            )
        })
        .collect()
}

/// Paints a disc: the unlit part, and the lit part over it.
pub fn paint(
    painter: &Painter,
    centre: Pos2,
    radius: f32,
    (phase_angle, towards_limb): (Angle, Vec2),
    (lit, unlit): (Color32, Color32),
) {
    painter.circle_filled(centre, radius, unlit);
    let steps = (radius * 1.5).clamp(16.0, 96.0) as usize;
    let edge: Vec<(Pos2, Pos2)> = lit_edge(phase_angle, towards_limb, steps)
        .into_iter()
        .map(|(limb, terminator)| (centre + limb * radius, centre + terminator * radius))
        .collect();
    let mut mesh = Mesh::default();
    for (limb, terminator) in &edge {
        mesh.colored_vertex(*limb, lit);
        mesh.colored_vertex(*terminator, lit);
    }
    for k in 0..steps as u32 {
        mesh.add_triangle(2 * k, 2 * k + 1, 2 * k + 2);
        mesh.add_triangle(2 * k + 1, 2 * k + 3, 2 * k + 2);
    }
    painter.add(Shape::mesh(mesh));
    // A mesh has hard edges; a hair line along each is drawn softly. Two open lines: a corner at
    // the cusps would be drawn out to a spike.
    let soft = Stroke::new(0.8, lit);
    let (limb, terminator): (Vec<Pos2>, Vec<Pos2>) = edge.into_iter().unzip();
    painter.add(Shape::line(limb, soft));
    painter.add(Shape::line(terminator, soft));
}

#[cfg(test)]
mod tests {
    use super::{lit_edge, towards_limb};
    use crate::measure::Angle;

    /// Area of the lit part over that of the disc.
    fn lit_share(phase_deg: f64) -> f32 {
        let limb = towards_limb(Angle::from_degrees(40.0));
        let edge = lit_edge(Angle::from_degrees(phase_deg), limb, 400);
        let outline: Vec<_> = edge
            .iter()
            .map(|(limb, _)| *limb)
            .chain(edge.iter().rev().map(|(_, terminator)| *terminator))
            .collect();
        let twice: f32 = (0..outline.len())
            .map(|k| {
                let (a, b) = (outline[k], outline[(k + 1) % outline.len()]);
                a.x * b.y - a.y * b.x
            })
            .sum();
        0.5 * twice.abs() / std::f32::consts::PI
    }

    #[test]
    fn the_lit_area_is_the_illuminated_fraction() {
        for phase_deg in [0.0_f64, 50.0, 90.0, 120.0, 170.0] {
            let fraction = 0.5 * (1.0 + phase_deg.to_radians().cos());
            let share = f64::from(lit_share(phase_deg));
            assert!(
                (share - fraction).abs() < 1e-3,
                "{phase_deg}: {share} {fraction}"
            );
        }
    }

    #[test]
    fn a_limb_a_quarter_turn_counter_clockwise_from_up_lies_on_the_left() {
        let left = towards_limb(Angle::from_degrees(90.0));
        assert!(
            (left.x + 1.0).abs() < 1e-6 && left.y.abs() < 1e-6,
            "{left:?}"
        );
        let up = towards_limb(Angle::ZERO);
        assert!((up.y + 1.0).abs() < 1e-6, "{up:?}");
    }
}
