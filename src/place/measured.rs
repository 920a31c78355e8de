//! The skyline as measured from a site's mark, in the site file and in tables.

use super::{SiteError, limits};
use serde::de::{Error, SeqAccess, Visitor};
use serde::{Deserialize, Deserializer, Serialize};
use std::fmt;
use std::io::Read;
use std::path::Path;

/// One point of a measured skyline; the file writes it `(azimuth, altitude)`.
#[derive(Clone, Copy, Debug, PartialEq, Serialize, Deserialize)]
#[serde(from = "PointInFile", into = "(f64, f64)")]
pub struct SkylinePoint {
    /// Azimuth from true north through east, degrees, [0, 360).
    pub azimuth_deg: f64,
    /// Altitude above the level through the eye, degrees, [-10, 90].
    pub altitude_deg: f64,
}

#[derive(Deserialize)]
struct PointInFile(
    #[serde(deserialize_with = "limits::azimuth_deg")] f64,
    #[serde(deserialize_with = "limits::altitude_deg")] f64,
);

impl From<PointInFile> for SkylinePoint {
    fn from(PointInFile(azimuth_deg, altitude_deg): PointInFile) -> Self {
        Self {
            azimuth_deg,
            altitude_deg,
        }
    }
}

impl From<SkylinePoint> for (f64, f64) {
    fn from(point: SkylinePoint) -> Self {
        (point.azimuth_deg, point.altitude_deg)
    }
}

impl fmt::Display for SkylinePoint {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "({}, {})", self.azimuth_deg, self.altitude_deg)
    }
}

/// Reads points whose azimuths ascend; refuses the first that does not, where it stands.
pub(super) fn ascending<'de, D: Deserializer<'de>>(from: D) -> Result<Vec<SkylinePoint>, D::Error> {
    struct Ascending;

    impl<'de> Visitor<'de> for Ascending {
        type Value = Vec<SkylinePoint>;

        fn expecting(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
            f.write_str("a list of (azimuth, altitude) points in degrees")
        }

        fn visit_seq<A: SeqAccess<'de>>(self, mut list: A) -> Result<Self::Value, A::Error> {
            let mut points: Vec<SkylinePoint> = Vec::new();
            while let Some(point) = list.next_element::<SkylinePoint>()? {
                if let Some(before) = points.last() {
                    if point.azimuth_deg == before.azimuth_deg {
                        return Err(A::Error::custom(format_args!(
                            "the skyline points {before} and {point} stand at one azimuth: keep one"
                        )));
                    }
                    if point.azimuth_deg < before.azimuth_deg {
                        return Err(A::Error::custom(format_args!(
                            "the skyline point {point} comes after {before}: list the points in \
                             ascending azimuth"
                        )));
                    }
                }
                points.push(point);
            }
            Ok(points)
        }
    }

    from.deserialize_seq(Ascending)
}

/// Most points that a table may hold: ten to each arcminute of the horizon.
const MOST_POINTS: usize = 216_000;

/// Reads a measured skyline from a comma-separated file.
///
/// The first line names the columns; `az_deg` and `alt_deg` must be among them, further columns
/// are passed over, and so are lines that begin with `#`. Rows may come in any order and are
/// returned in ascending azimuth.
///
/// # Errors
/// One sentence naming the file, and line and column or both lines of a doubled azimuth.
pub fn read_skyline_table(path: &Path) -> Result<Vec<SkylinePoint>, SiteError> {
    let text = super::file::read_text(path)?;
    skyline_from_table(text.as_bytes())
        .map_err(|SiteError(sentence)| SiteError(format!("{}: {sentence}", path.display())))
}

/// The same from anything readable.
///
/// # Errors
/// As [`read_skyline_table`], without the file's name.
pub fn skyline_from_table(table: impl Read) -> Result<Vec<SkylinePoint>, SiteError> {
    let mut rows = csv::ReaderBuilder::new()
        .comment(Some(b'#'))
        .trim(csv::Trim::All)
        .flexible(true)
        .from_reader(table);
    let header = rows.headers().map_err(|error| unreadable(&error))?.clone();
    let azimuth_column = column_of(&header, "az_deg")?;
    let altitude_column = column_of(&header, "alt_deg")?;
    let mut points: Vec<(SkylinePoint, u64)> = Vec::new();
    for row in rows.records() {
        let row = row.map_err(|error| unreadable(&error))?;
        let line = row.position().map_or(0, csv::Position::line);
        if points.len() == MOST_POINTS {
            return Err(SiteError(format!(
                "line {line}: a skyline may have at most {MOST_POINTS} points"
            )));
        }
        let azimuth_deg = number(&row, line, azimuth_column, "az_deg", |azimuth| {
            (0.0..360.0).contains(&azimuth)
        })?;
        let altitude_deg = number(&row, line, altitude_column, "alt_deg", |altitude| {
            (-10.0..=90.0).contains(&altitude)
        })?;
        points.push((
            SkylinePoint {
                azimuth_deg,
                altitude_deg,
            },
            line,
        ));
    }
    points.sort_by(|(a, _), (b, _)| a.azimuth_deg.total_cmp(&b.azimuth_deg));
    if let Some([first, second]) = points
        .array_windows()
        .find(|[(a, _), (b, _)]| a.azimuth_deg == b.azimuth_deg)
    {
        return Err(SiteError(format!(
            "lines {} and {} stand at one azimuth, {}: keep one",
            first.1, second.1, first.0.azimuth_deg
        )));
    }
    if points.is_empty() {
        return Err(SiteError(
            "there is no row of figures below the column names".into(),
        ));
    }
    Ok(points.into_iter().map(|(point, _)| point).collect())
}

fn column_of(header: &csv::StringRecord, name: &str) -> Result<usize, SiteError> {
    header
        .iter()
        .position(|column| column == name)
        .ok_or_else(|| {
            SiteError(format!(
                "line 1: there is no column `{name}`: the first line must name the columns, \
             az_deg,alt_deg"
            ))
        })
}

fn number(
    row: &csv::StringRecord,
    line: u64,
    column: usize,
    name: &str,
    is_within: impl Fn(f64) -> bool,
) -> Result<f64, SiteError> {
    let at = format!("line {line}, column {} ({name})", column + 1);
    let text = row
        .get(column)
        .ok_or_else(|| SiteError(format!("{at}: the row ends before it")))?;
    let value: f64 = text
        .parse()
        .map_err(|_| SiteError(format!("{at}: {text:?} is not a number")))?;
    if is_within(value) {
        Ok(value)
    } else {
        let range = if name == "az_deg" {
            "at least 0 and below 360"
        } else {
            "between -10 and 90"
        };
        Err(SiteError(format!("{at}: {value} must be {range} degrees")))
    }
}

fn unreadable(error: &csv::Error) -> SiteError {
    match error.position() {
        Some(position) => SiteError(format!("line {}: {error}", position.line())),
        None => SiteError(error.to_string()),
    }
}
