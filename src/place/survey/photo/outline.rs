//! From an outline in pixels to the points of a skyline.

use super::super::compass::Sweep;
use super::super::{SurveyError, skyline_point, within};
use super::{Picture, Pixel};
use crate::measure::Angle;
use crate::place::SkylinePoint;

/// Most points that an outline may have.
const MOST_POINTS: usize = 4000;
/// Most stretches that it is cut into so that its straight lines stay straight in the picture.
const MOST_STRETCHES: usize = 60_000;
/// Narrower stretches are upright, degrees.
const UPRIGHT_DEG: f64 = 1e-5;
/// So far beside a jump its lower side stands, degrees.
const BESIDE_JUMP_DEG: f64 = 0.001;

/// What an outline makes of the skyline.
#[derive(Clone, Debug, PartialEq)]
pub struct Traced {
    /// Its points, in ascending azimuth.
    pub points: Vec<SkylinePoint>,
    /// The part of the horizon that it covers, for [`super::super::compass::merged`].
    pub sweep: Sweep,
}

/// (azimuth, altitude), degrees; the azimuth runs on through north.
type Point = (f64, f64);

/// A straight line between two points, the first with the smaller azimuth.
type Stretch = (Point, Point);

impl Picture {
    /// The skyline along an outline that was drawn over the picture from point to point.
    ///
    /// Where the outline overhangs, the highest counts. Points that lie within `tolerance` of
    /// the line between their neighbours are left out; the whole keeps within twice that of the
    /// outline, measured across it. What leaves [-10°, 90°] is taken to those limits.
    ///
    /// # Errors
    /// Fewer than two points, too many, no numbers, an outline that only goes up and down, or a
    /// tolerance outside [0.001°, 5°].
    pub fn trace(&self, outline: &[Pixel], tolerance: Angle) -> Result<Traced, SurveyError> {
        let tolerance_deg = within("the tolerance", tolerance.degrees(), 0.001, 5.0, "degrees")?;
        if !(2..=MOST_POINTS).contains(&outline.len()) {
            return Err(SurveyError(format!(
                "the outline has {} points, but must have between 2 and {MOST_POINTS}",
                outline.len()
            )));
        }
        for at in outline {
            within("a point of the outline", at.x, -1e6, 1e6, "pixels")?;
            within("a point of the outline", at.y, -1e6, 1e6, "pixels")?;
        }
        let line = self.unrolled(outline, tolerance_deg);
        let stretches = stretches(&line);
        let (Some(first), Some(end_deg)) = (
            stretches.first(),
            stretches
                .iter()
                .map(|stretch| stretch.1.0)
                .max_by(f64::total_cmp),
        ) else {
            return Err(SurveyError(
                "the outline only goes up and down: draw it along the skyline".into(),
            ));
        };
        let start_deg = first.0.0;
        let points = thinned(&highest(&stretches), tolerance_deg);
        let mut points = points
            .into_iter()
            .map(|(azimuth_deg, altitude_deg)| {
                skyline_point(
                    Angle::from_degrees(azimuth_deg),
                    Angle::from_degrees(altitude_deg.clamp(-10.0, 90.0)),
                )
            })
            .collect::<Result<Vec<_>, _>>()?;
        points.sort_by(|a, b| a.azimuth_deg.total_cmp(&b.azimuth_deg));
        points.dedup_by(|later, earlier| later.azimuth_deg == earlier.azimuth_deg);
        let sweep = if end_deg - start_deg >= 360.0 - 2.0 * BESIDE_JUMP_DEG {
            Sweep::Whole
        } else {
            Sweep::Sector {
                from_deg: start_deg.rem_euclid(360.0),
                to_deg: end_deg.rem_euclid(360.0),
            }
        };
        Ok(Traced { points, sweep })
    }

    /// The outline as directions, cut so finely that each piece is straight in azimuth and
    /// altitude to a quarter of the tolerance. The azimuth runs on through north.
    fn unrolled(&self, outline: &[Pixel], tolerance_deg: f64) -> Vec<Point> {
        let degrees = |at: Pixel| {
            let direction = self.direction(at);
            (direction.azimuth.degrees(), direction.altitude.degrees())
        };
        let after = |from: Point, to: Point| {
            let turned = Angle::from_degrees(to.0 - from.0).signed().degrees();
            (from.0 + turned, to.1)
        };
        let mut line = vec![degrees(outline[0])];
        for ends in outline.windows(2) {
            // Halved until the middle lies on the line; a stack, so that no depth is too deep.
            let mut rest = vec![(ends[0], ends[1], 0)];
            while let Some((a, b, depth)) = rest.pop() {
                let middle = Pixel {
                    x: 0.5 * (a.x + b.x),
                    y: 0.5 * (a.y + b.y),
                };
                let from = line[line.len() - 1];
                let half = after(from, degrees(middle));
                let to = after(half, degrees(b));
                let off_deg =
                    (half.0 - 0.5 * (from.0 + to.0)).hypot(half.1 - 0.5 * (from.1 + to.1));
                if off_deg <= 0.25 * tolerance_deg || depth >= 12 || line.len() > MOST_STRETCHES {
                    line.push(to);
                } else {
                    rest.push((middle, b, depth + 1));
                    rest.push((a, middle, depth + 1));
                }
            }
        }
        line
    }
}

/// The line's stretches that are not upright, by the azimuth at which they begin; what goes
/// round by more than a turn is taken back by one.
fn stretches(line: &[Point]) -> Vec<Stretch> {
    let start_deg = line
        .iter()
        .map(|point| point.0)
        .fold(f64::INFINITY, f64::min);
    let mut stretches = Vec::with_capacity(line.len());
    for ends in line.windows(2) {
        let (a, b) = if ends[0].0 <= ends[1].0 {
            (ends[0], ends[1])
        } else {
            (ends[1], ends[0])
        };
        if b.0 - a.0 < UPRIGHT_DEG {
            continue;
        }
        let turns = ((a.0 - start_deg) / 360.0).floor();
        let back = |point: Point| (point.0 - 360.0 * turns, point.1);
        let (a, b) = (back(a), back(b));
        let seam_deg = start_deg + 360.0;
        if b.0 > seam_deg {
            let seam = (seam_deg, altitude_at(&(a, b), seam_deg));
            stretches.push((a, seam));
            stretches.push(((start_deg, seam.1), (b.0 - 360.0, b.1)));
        } else {
            stretches.push((a, b));
        }
    }
    stretches.retain(|(a, b)| b.0 - a.0 >= UPRIGHT_DEG);
    stretches.sort_by(|a, b| a.0.0.total_cmp(&b.0.0));
    stretches
}

/// The stretch's altitude; beyond its ends, theirs.
fn altitude_at((a, b): &Stretch, azimuth_deg: f64) -> f64 {
    let share = ((azimuth_deg - a.0) / (b.0 - a.0)).clamp(0.0, 1.0);
    a.1 + share * (b.1 - a.1)
}

/// The highest of the stretches at every azimuth, in strictly ascending azimuth.
fn highest(stretches: &[Stretch]) -> Vec<Point> {
    let mut cuts: Vec<f64> = stretches.iter().flat_map(|(a, b)| [a.0, b.0]).collect();
    cuts.sort_by(f64::total_cmp);
    cuts.dedup_by(|later, earlier| *later - *earlier < UPRIGHT_DEG);
    let mut top: Vec<Point> = Vec::new();
    let mut active: Vec<&Stretch> = Vec::new();
    let mut next = 0;
    for ends in cuts.windows(2) {
        let (from, to) = (ends[0], ends[1]);
        while next < stretches.len() && stretches[next].0.0 < from + UPRIGHT_DEG {
            active.push(&stretches[next]);
            next += 1;
        }
        active.retain(|stretch| stretch.1.0 > to - UPRIGHT_DEG);
        for point in highest_between(&active, from, to) {
            push(&mut top, point);
        }
    }
    top
}

/// The corners of the highest of lines that all reach from one azimuth to the other.
fn highest_between(lines: &[&Stretch], from: f64, to: f64) -> Vec<Point> {
    let mut corners = Vec::new();
    let mut at = from;
    let slope = |line: &Stretch| (line.1.1 - line.0.1) / (line.1.0 - line.0.0);
    let higher = |a: &&&Stretch, b: &&&Stretch| {
        let altitude = altitude_at(a, at).total_cmp(&altitude_at(b, at));
        altitude.then(slope(a).total_cmp(&slope(b)))
    };
    let Some(mut line) = lines.iter().max_by(higher) else {
        return corners;
    };
    corners.push((at, altitude_at(line, at)));
    loop {
        // The first line that comes up through this one.
        let crossing = lines
            .iter()
            .filter(|other| slope(other) > slope(line))
            .map(|other| {
                let gap = altitude_at(line, at) - altitude_at(other, at);
                (at + gap / (slope(other) - slope(line)), other)
            })
            .filter(|(azimuth, _)| *azimuth < to)
            .min_by(|a, b| a.0.total_cmp(&b.0).then(slope(b.1).total_cmp(&slope(a.1))));
        let Some((azimuth, other)) = crossing else {
            break;
        };
        at = azimuth.max(at);
        line = other;
        corners.push((at, altitude_at(line, at)));
    }
    corners.push((to, altitude_at(line, to)));
    corners
}

/// Adds a point. At a jump the lower side moves a hair away, so that no two share an azimuth;
/// where there is no room for it, the higher counts.
fn push(top: &mut Vec<Point>, point: Point) {
    let before_deg = top.iter().rev().nth(1).map(|before| before.0);
    let Some(last) = top.last_mut() else {
        top.push(point);
        return;
    };
    let has_room = before_deg.is_none_or(|before| last.0 - BESIDE_JUMP_DEG > before);
    if point.0 - last.0 >= UPRIGHT_DEG {
        top.push(point);
    } else if point.0 < last.0 || (point.1 > last.1 && !has_room) {
        last.1 = last.1.max(point.1);
    } else if point.1 - last.1 > 1e-9 {
        last.0 -= BESIDE_JUMP_DEG;
        top.push(point);
    } else if last.1 - point.1 > 1e-9 {
        top.push((point.0 + BESIDE_JUMP_DEG, point.1));
    }
}

/// The points that are needed so that the line stays within the tolerance in altitude
/// (Douglas and Peucker 1973, Cartographica 10, 112, measured upright).
fn thinned(line: &[Point], tolerance_deg: f64) -> Vec<Point> {
    let mut is_kept = vec![false; line.len()];
    let mut rest = vec![(0, line.len().saturating_sub(1))];
    while let Some((from, to)) = rest.pop() {
        is_kept[from] = true;
        is_kept[to] = true;
        let chord = (line[from], line[to]);
        let off_deg = |k: &usize| (line[*k].1 - altitude_at(&chord, line[*k].0)).abs();
        let farthest = (from + 1..to).max_by(|a, b| off_deg(a).total_cmp(&off_deg(b)));
        if let Some(k) = farthest.filter(|k| off_deg(k) > tolerance_deg) {
            rest.push((from, k));
            rest.push((k, to));
        }
    }
    let kept = line.iter().zip(is_kept).filter(|(_, is_kept)| *is_kept);
    kept.map(|(point, _)| *point).collect()
}
