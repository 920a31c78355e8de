//! GeoTIFF elevation files.

use super::geokeys::{self, GeoKeys};
use super::raster::{Placement, Raster, System, Window};
use super::tiles::{self, Steps};
use crate::place::SiteError;
use std::fs::File;
use std::io::{BufReader, ErrorKind};
use std::path::Path;
use tiff::decoder::{Decoder, DecodingResult, Limits};
use tiff::tags::Tag;
use tiff::{ColorType, TiffError, TiffFormatError};

/// The most cells a file may say it has: a country at 10 m.
const MOST_CELLS: u64 = 4_000_000_000;
/// The most that one strip or block of a file may unpack to, bytes.
const LARGEST_CHUNK_BYTES: usize = 256 * 1024 * 1024;

type Reader = Decoder<BufReader<File>>;

/// Where a file's elevations lie. Only its head is read.
///
/// # Errors
/// The file is no TIFF, holds a picture, is too large or does not say where it lies in a way
/// that is understood here.
pub(super) fn placement(path: &Path) -> Result<Placement, SiteError> {
    let mut file = open(path)?;
    let refused = |why: &str| SiteError(format!("{} {why}", path.display()));
    let (columns, rows) = file.dimensions().map_err(|error| named(path, error))?;
    if columns < 2 || rows < 2 || u64::from(columns) * u64::from(rows) > MOST_CELLS {
        return Err(refused(&format!(
            "has {columns} x {rows} cells; a file of 2 x 2 to {MOST_CELLS} cells is read, so cut \
             out the part around the site"
        )));
    }
    match file.colortype().map_err(|error| named(path, error))? {
        ColorType::Gray(8 | 16 | 32 | 64) => {}
        _ => {
            return Err(refused(
                "is a picture, not a file of elevations; save one band of numbers without colours",
            ));
        }
    }
    let keys = match file.find_tag(Tag::GeoKeyDirectoryTag) {
        Ok(Some(value)) => value.into_u16_vec().map_err(|error| named(path, error))?,
        Ok(None) => return Err(refused(NO_GEOREFERENCE)),
        Err(error) => return Err(named(path, error)),
    };
    let keys = geokeys::parse(&keys).map_err(|why| refused(&why))?;
    let transform = transform(path, &mut file)?.ok_or_else(|| refused(NO_GEOREFERENCE))?;
    inverse(&transform, &keys, (columns as usize, rows as usize))
        .ok_or_else(|| refused("has a georeference in which all cells lie on one line"))
}

const NO_GEOREFERENCE: &str = "does not say where it lies (it has no georeference); save it as \
                               GeoTIFF from mapping software";

/// `x = t[0] + t[1] column + t[2] row`, then `y` likewise, of raster coordinates.
type Transform = [f64; 6];

fn transform(path: &Path, file: &mut Reader) -> Result<Option<Transform>, SiteError> {
    let mut numbers = |tag| match file.find_tag(tag) {
        Ok(None) => Ok(Vec::new()),
        Ok(Some(value)) => value.into_f64_vec().map_err(|error| named(path, error)),
        Err(error) => Err(named(path, error)),
    };
    let matrix = numbers(Tag::ModelTransformationTag)?;
    let scale = numbers(Tag::ModelPixelScaleTag)?;
    let tie = numbers(Tag::ModelTiepointTag)?;
    let transform = if let [a, b, _, x, c, d, _, y, ..] = matrix[..] {
        [x, a, b, y, c, d]
    } else if let ([x_scale, y_scale, ..], [column, row, _, x, y, _]) = (&scale[..], &tie[..]) {
        let left = x - column * x_scale;
        let top = y + row * y_scale;
        [left, *x_scale, 0.0, top, 0.0, -y_scale]
    } else {
        return Ok(None);
    };
    Ok(transform.iter().all(|n| n.is_finite()).then_some(transform))
}

/// Column and row from the system's coordinates; `None` if the transform has no inverse.
fn inverse(transform: &Transform, keys: &GeoKeys, size: (usize, usize)) -> Option<Placement> {
    let [x, x_column, x_row, y, y_column, y_row] = *transform;
    let determinant = x_column * y_row - x_row * y_column;
    let scale = (x_column.hypot(y_column)) * (x_row.hypot(y_row));
    if !determinant.is_finite() || determinant.abs() <= 1e-9 * scale {
        return None;
    }
    // The posting of an area is its middle.
    let half = if keys.is_point { 0.0 } else { 0.5 };
    let column = [y_row / determinant, -x_row / determinant];
    let row = [-y_column / determinant, x_column / determinant];
    let from_origin = |[by_x, by_y]: [f64; 2]| [-by_x * x - by_y * y - half, by_x, by_y];
    let system = match keys.system {
        System::Geographic { .. } => System::Geographic {
            about_deg: x + x_column * size.0 as f64 / 2.0 + x_row * size.1 as f64 / 2.0,
        },
        utm => utm,
    };
    Some(Placement {
        system,
        column: from_origin(column),
        row: from_origin(row),
        size,
    })
}

/// Reads a window of a file, one strip or block at a time; `None` when cancelled.
///
/// # Errors
/// The file is cut short, damaged or packed in a way that is not read here.
pub(super) fn read(
    path: &Path,
    placement: Placement,
    window: Window,
    steps: &mut Steps,
) -> Result<Option<Raster>, SiteError> {
    let mut file = open(path)?;
    let no_data = no_data(&mut file);
    let mut raster = Raster::unknown(placement, window)
        .map_err(|SiteError(why)| SiteError(format!("{}: {why}", path.display())))?;
    let (width, height) = file.chunk_dimensions();
    let (width, height) = (width as usize, height as usize);
    if width == 0 || height == 0 {
        return Err(SiteError(format!(
            "{} is damaged: its strips or blocks have no size",
            path.display()
        )));
    }
    let across = placement.size.0.div_ceil(width);
    let columns = window.first_column / width..=(window.first_column + window.columns - 1) / width;
    let rows = window.first_row / height..=(window.first_row + window.rows - 1) / height;
    let first_row = *rows.start();
    let bands = rows.end() - first_row + 1;
    for chunk_row in rows {
        for chunk_column in columns.clone() {
            if !steps.reach(chunk_row - first_row, bands) {
                return Ok(None);
            }
            let index = (chunk_row * across + chunk_column) as u32;
            let values = file.read_chunk(index).map_err(|error| named(path, error))?;
            let elevations_m = elevations(values, no_data).ok_or_else(|| {
                SiteError(format!(
                    "{} holds numbers of a rare kind; save it with 16-bit whole numbers or 32-bit \
                     floating-point numbers",
                    path.display()
                ))
            })?;
            let line = width.min(placement.size.0 - chunk_column * width);
            for (k, row) in elevations_m.chunks(line).enumerate() {
                raster.set_row(chunk_row * height + k, chunk_column * width, row);
            }
        }
    }
    Ok(Some(raster))
}

/// The number that stands for an unknown elevation, where the file names one.
fn no_data(file: &mut Reader) -> Option<f64> {
    let text = file.find_tag(Tag::GdalNodata).ok()??.into_string().ok()?;
    text.trim_matches(['\0', ' ']).parse().ok()
}

fn elevations(values: DecodingResult, no_data: Option<f64>) -> Option<Vec<f32>> {
    let known = |value: f64| {
        if Some(value) == no_data {
            f32::NAN
        } else {
            value as f32
        }
    };
    macro_rules! metres {
        ($values:expr) => {
            $values
                .into_iter()
                .map(|value| known(f64::from(value)))
                .collect()
        };
    }
    Some(match values {
        DecodingResult::U8(values) => metres!(values),
        DecodingResult::I8(values) => metres!(values),
        DecodingResult::U16(values) => metres!(values),
        DecodingResult::I16(values) => metres!(values),
        DecodingResult::U32(values) => metres!(values),
        DecodingResult::I32(values) => metres!(values),
        DecodingResult::F32(values) => metres!(values),
        DecodingResult::F64(values) => metres!(values),
        _ => return None,
    })
}

fn open(path: &Path) -> Result<Reader, SiteError> {
    let file = File::open(path).map_err(|error| tiles::unreadable(path, &error))?;
    let mut limits = Limits::default();
    limits.decoding_buffer_size = LARGEST_CHUNK_BYTES;
    limits.intermediate_buffer_size = LARGEST_CHUNK_BYTES;
    // Room for the list of strips of the largest file.
    limits.ifd_value_size = 16 * 1024 * 1024;
    Decoder::new(BufReader::new(file))
        .map(|decoder| decoder.with_limits(limits))
        .map_err(|error| named(path, error))
}

/// A sentence about a file that the decoder refuses.
fn named(path: &Path, error: TiffError) -> SiteError {
    let shown = path.display();
    SiteError(match error {
        TiffError::FormatError(
            TiffFormatError::TiffSignatureNotFound | TiffFormatError::TiffSignatureInvalid,
        ) => {
            format!("{shown} is not a TIFF file, whatever its name says; choose an elevation file")
        }
        TiffError::IoError(error) if error.kind() == ErrorKind::UnexpectedEof => {
            format!("{shown} is cut short; fetch it anew")
        }
        TiffError::IoError(error) => return tiles::unreadable(path, &error),
        TiffError::LimitsExceeded | TiffError::IntSizeError => format!(
            "{shown} unpacks to more than {} MB at once; save it in blocks or cut out the part \
             around the site",
            LARGEST_CHUNK_BYTES / 1024 / 1024
        ),
        error => format!(
            "{shown} is damaged or packed in an unknown way ({error}); save it anew, with deflate \
             or without compression"
        ),
    })
}
