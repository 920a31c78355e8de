//! Plane geometry of the plan: points are metres east and north of the mark.

use crate::place::PlanPoint;

/// `a - b`.
pub fn minus(a: PlanPoint, b: PlanPoint) -> PlanPoint {
    PlanPoint::new(a.east_m - b.east_m, a.north_m - b.north_m)
}

/// `a + factor b`.
pub fn plus(a: PlanPoint, b: PlanPoint, factor: f64) -> PlanPoint {
    PlanPoint::new(a.east_m + factor * b.east_m, a.north_m + factor * b.north_m)
}

/// The scalar product.
pub fn dot(a: PlanPoint, b: PlanPoint) -> f64 {
    a.east_m * b.east_m + a.north_m * b.north_m
}

/// Positive where `b` lies counter-clockwise of `a`, seen from above.
pub fn cross(a: PlanPoint, b: PlanPoint) -> f64 {
    a.east_m * b.north_m - a.north_m * b.east_m
}

/// Half-way between two points.
pub fn middle(a: PlanPoint, b: PlanPoint) -> PlanPoint {
    plus(a, minus(b, a), 0.5)
}

/// The mean of points; the mark where there are none.
pub fn mean(points: &[PlanPoint]) -> PlanPoint {
    let sum = points.iter().fold(PlanPoint::new(0.0, 0.0), |sum, point| {
        plus(sum, *point, 1.0)
    });
    let share = 1.0 / points.len().max(1) as f64;
    PlanPoint::new(share * sum.east_m, share * sum.north_m)
}

/// The vector of length one in the same direction; `None` for a vector without length.
pub fn unit(a: PlanPoint) -> Option<PlanPoint> {
    let length_m = a.east_m.hypot(a.north_m);
    (length_m > 1e-9).then(|| PlanPoint::new(a.east_m / length_m, a.north_m / length_m))
}

/// A quarter of a turn counter-clockwise.
pub fn quarter_turned(a: PlanPoint) -> PlanPoint {
    PlanPoint::new(-a.north_m, a.east_m)
}

/// A point turned about another, clockwise seen from above, degrees.
pub fn turned(point: PlanPoint, about: PlanPoint, clockwise_deg: f64) -> PlanPoint {
    let (sin, cos) = clockwise_deg.to_radians().sin_cos();
    let from = minus(point, about);
    PlanPoint::new(
        about.east_m + cos * from.east_m + sin * from.north_m,
        about.north_m - sin * from.east_m + cos * from.north_m,
    )
}

/// The sides of a line of points; of a closed one the last leads back to the first.
pub fn sides(points: &[PlanPoint], is_closed: bool) -> Vec<(PlanPoint, PlanPoint)> {
    let mut sides: Vec<_> = points.windows(2).map(|ends| (ends[0], ends[1])).collect();
    if let (true, [first, _, .., last]) = (is_closed, points) {
        sides.push((*last, *first));
    }
    sides
}

/// The point of a side that lies nearest to another point.
pub fn nearest_on(at: PlanPoint, (a, b): (PlanPoint, PlanPoint)) -> PlanPoint {
    let along = minus(b, a);
    let length_squared = dot(along, along);
    if length_squared == 0.0 {
        return a;
    }
    let share = (dot(minus(at, a), along) / length_squared).clamp(0.0, 1.0);
    plus(a, along, share)
}

/// Whether corners enclose a point (even-odd rule).
pub fn is_within(at: PlanPoint, corners: &[PlanPoint]) -> bool {
    let crossed = sides(corners, true).into_iter().filter(|(a, b)| {
        (a.north_m <= at.north_m) != (b.north_m <= at.north_m) && {
            let share = (at.north_m - a.north_m) / (b.north_m - a.north_m);
            a.east_m + share * (b.east_m - a.east_m) > at.east_m
        }
    });
    crossed.count() % 2 == 1
}

/// Where two lines, each a point and a direction, cross; `None` where they run alike.
pub fn crossing(
    (a, along_a): (PlanPoint, PlanPoint),
    (b, along_b): (PlanPoint, PlanPoint),
) -> Option<PlanPoint> {
    let turn = cross(along_a, along_b);
    // Lines within a hundredth of a radian of one another cross nowhere near.
    (turn.abs() > 0.01).then(|| plus(a, along_a, cross(minus(b, a), along_b) / turn))
}

/// Whether four corners make a rectangle, to a hundredth of a radian.
pub fn is_rectangle(corners: &[PlanPoint]) -> bool {
    let units: Option<Vec<PlanPoint>> = sides(corners, true)
        .into_iter()
        .map(|(a, b)| unit(minus(b, a)))
        .collect();
    match units.as_deref() {
        Some(units @ [_, _, _, _]) => {
            (0..4).all(|k| dot(units[k], units[(k + 1) % 4]).abs() < 0.01)
        }
        _ => false,
    }
}

/// A rectangle with one corner put elsewhere, while the opposite corner and the directions of its
/// sides stay.
pub fn resized_rectangle(corners: &[PlanPoint], corner: usize, to: PlanPoint) -> Vec<PlanPoint> {
    let mut resized = corners.to_vec();
    let (next, opposite, previous) = ((corner + 1) % 4, (corner + 2) % 4, (corner + 3) % 4);
    let fixed = corners[opposite];
    let diagonal = minus(to, fixed);
    for neighbour in [next, previous] {
        if let Some(along) = unit(minus(corners[neighbour], fixed)) {
            resized[neighbour] = plus(fixed, along, dot(diagonal, along));
        }
    }
    resized[corner] = to;
    resized
}

/// The four corners of an upright rectangle from one corner to the opposite one.
pub fn rectangle(a: PlanPoint, b: PlanPoint) -> Vec<PlanPoint> {
    vec![
        a,
        PlanPoint::new(b.east_m, a.north_m),
        b,
        PlanPoint::new(a.east_m, b.north_m),
    ]
}

/// A point to the nearest whole of a step, m, and no farther out than a site file may say.
pub fn rounded(point: PlanPoint, step_m: f64) -> PlanPoint {
    const FARTHEST_M: f64 = 10_000.0;
    // Divided, so that a tenth reads as 0.1 and not as 0.1000000001.
    let per_m = (1.0 / step_m).round().max(1.0);
    let round = |value: f64| {
        let rounded = (value * per_m).round() / per_m;
        // No minus before a zero.
        rounded.clamp(-FARTHEST_M, FARTHEST_M) + 0.0
    };
    PlanPoint::new(round(point.east_m), round(point.north_m))
}
