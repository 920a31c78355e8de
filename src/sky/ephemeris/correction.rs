//! What VSOP87A lacks against JPL DE440, for Mars to Neptune.

use crate::measure::{Angle, Vector};

const TEXT: &str = include_str!("../../../assets/series/corrections.txt");
/// The polynomials' variable is the time from J2000 over this many thousands of years.
const SPAN_MILLENNIA: f64 = 0.403;

/// A relative displacement along the radius vector and towards growing ecliptic longitude and
/// latitude: polynomials in time by 1 and by sines and cosines of multiples of the planet's
/// mean longitude. `assets/series/fit_corrections.py` fits it.
#[derive(Debug)]
pub struct Correction {
    longitude_at_j2000_rad: f64,
    rate_rad_per_millennium: f64,
    rows: Vec<Row>,
}

#[derive(Debug)]
struct Row {
    direction: Direction,
    factor: Factor,
    /// From the constant upwards.
    coefficients_arcsec: Vec<f64>,
}

#[derive(Clone, Copy, Debug)]
enum Direction {
    Radius,
    Longitude,
    Latitude,
}

#[derive(Clone, Copy, Debug)]
enum Factor {
    One,
    Cosine(f64),
    Sine(f64),
}

/// The correction of a planet, if it has one.
///
/// # Panics
/// A line of the compiled-in table is malformed; the tests read them all.
pub fn of(planet: &str) -> Option<Correction> {
    let mut lines = TEXT
        .lines()
        .map(|line| line.split_ascii_whitespace().collect::<Vec<_>>())
        .filter(|columns| columns.first() == Some(&planet));
    let elements = numbers(lines.next()?.get(1..)?);
    let [longitude_at_j2000_rad, rate_rad_per_millennium] = elements[..] else {
        return None;
    };
    let rows = lines
        .map(|columns| row(&columns).expect("a line of the compiled-in corrections"))
        .collect();
    Some(Correction {
        longitude_at_j2000_rad,
        rate_rad_per_millennium,
        rows,
    })
}

fn numbers(columns: &[&str]) -> Vec<f64> {
    columns
        .iter()
        .map(|column| {
            column
                .parse()
                .expect("a number of the compiled-in corrections")
        })
        .collect()
}

fn row(columns: &[&str]) -> Option<Row> {
    let direction = match *columns.get(1)? {
        "radius" => Direction::Radius,
        "longitude" => Direction::Longitude,
        "latitude" => Direction::Latitude,
        _ => return None,
    };
    let factor = *columns.get(2)?;
    let factor = if factor == "1" {
        Factor::One
    } else if let Some(multiple) = factor.strip_prefix("cos") {
        Factor::Cosine(multiple.parse().ok()?)
    } else {
        Factor::Sine(factor.strip_prefix("sin")?.parse().ok()?)
    };
    Some(Row {
        direction,
        factor,
        coefficients_arcsec: numbers(columns.get(3..)?),
    })
}

impl Correction {
    /// A heliocentric place in the ecliptic of J2000, corrected.
    pub fn applied(&self, place: Vector, millennia: f64) -> Vector {
        let mean_longitude = self.longitude_at_j2000_rad + self.rate_rad_per_millennium * millennia;
        let time = millennia / SPAN_MILLENNIA;
        let (mut along_radius, mut along_longitude, mut along_latitude) = (0.0, 0.0, 0.0);
        for row in &self.rows {
            let polynomial = row
                .coefficients_arcsec
                .iter()
                .rev()
                .fold(0.0, |sum, coefficient| sum * time + coefficient);
            let factor = match row.factor {
                Factor::One => 1.0,
                Factor::Cosine(multiple) => (multiple * mean_longitude).cos(),
                Factor::Sine(multiple) => (multiple * mean_longitude).sin(),
            };
            let sum = match row.direction {
                Direction::Radius => &mut along_radius,
                Direction::Longitude => &mut along_longitude,
                Direction::Latitude => &mut along_latitude,
            };
            *sum += Angle::from_arcsec(polynomial * factor).radians();
        }
        let radius = place.unit();
        let longitude = Vector::new(-radius.y, radius.x, 0.0).unit();
        let latitude = radius.cross(longitude);
        let displacement =
            radius * along_radius + longitude * along_longitude + latitude * along_latitude;
        place + displacement * place.length()
    }
}
