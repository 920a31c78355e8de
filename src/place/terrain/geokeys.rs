//! What a GeoTIFF says of its coordinates: the keys of OGC 19-008r4 that matter here.

use super::raster::System;
use super::utm::UtmZone;

/// The reference system and how rasters are meant.
pub(super) struct GeoKeys {
    pub system: System,
    /// Whether an elevation is that of a point, not of an area whose corner is given.
    pub is_point: bool,
}

const MODEL_TYPE: u16 = 1024;
const RASTER_TYPE: u16 = 1025;
const GEODETIC_SYSTEM: u16 = 2048;
const ANGULAR_UNITS: u16 = 2054;
const PROJECTED_SYSTEM: u16 = 3072;
const LINEAR_UNITS: u16 = 3076;
const VERTICAL_UNITS: u16 = 4099;

const PROJECTED: u16 = 1;
const GEOGRAPHIC: u16 = 2;
const PIXEL_IS_POINT: u16 = 2;
const METRE: u16 = 9001;
const DEGREES: [u16; 2] = [9102, 9122];

/// Latitude and longitude systems that lie within a few metres of each other: WGS84, ETRS89,
/// NAD83, GDA94 and NZGD2000, flat and with height.
const GEODETIC: [u16; 7] = [4326, 4979, 4258, 4937, 4269, 4283, 4167];

/// Reads the key directory.
///
/// # Errors
/// The coordinates are of a kind that is not read here: the end of a sentence that begins with
/// the file's name.
pub(super) fn parse(directory: &[u16]) -> Result<GeoKeys, String> {
    // Four numbers of header, then four a key: its name, where its value is kept (0: in the
    // last of the four), how many values, the value.
    let (entries, _) = directory.get(4..).unwrap_or_default().as_chunks();
    let short = |wanted: u16| {
        entries
            .iter()
            .find(|[key, kept_in, _, _]| *key == wanted && *kept_in == 0)
            .map(|[_, _, _, value]| *value)
    };
    let unit_is = |key: u16, known: &[u16]| short(key).is_none_or(|unit| known.contains(&unit));
    if !unit_is(VERTICAL_UNITS, &[METRE]) {
        return Err("has heights that are not in metres; save it with heights in metres".into());
    }
    let model = short(MODEL_TYPE).or_else(|| {
        let kind = |key, model| short(key).map(|_| model);
        kind(PROJECTED_SYSTEM, PROJECTED).or(kind(GEODETIC_SYSTEM, GEOGRAPHIC))
    });
    let system = match model {
        Some(GEOGRAPHIC) => short(GEODETIC_SYSTEM)
            .filter(|code| GEODETIC.contains(code) && unit_is(ANGULAR_UNITS, &DEGREES))
            .map(|_| System::Geographic { about_deg: 0.0 }),
        Some(PROJECTED) => short(PROJECTED_SYSTEM)
            .and_then(utm_zone)
            .filter(|_| unit_is(LINEAR_UNITS, &[METRE]))
            .map(System::Utm),
        _ => None,
    };
    let Some(system) = system else {
        let code = short(PROJECTED_SYSTEM)
            .or(short(GEODETIC_SYSTEM))
            .filter(|code| (1024..32767).contains(code));
        let which = code.map_or_else(
            || "coordinates of an unnamed kind".into(),
            |code| format!("coordinates of the kind EPSG:{code}"),
        );
        return Err(format!(
            "has {which}; save it in latitude and longitude (EPSG:4326) or in a UTM zone \
             (EPSG:326xx, 327xx or 258xx, metres)"
        ));
    };
    Ok(GeoKeys {
        system,
        is_point: short(RASTER_TYPE) == Some(PIXEL_IS_POINT),
    })
}

fn utm_zone(code: u16) -> Option<UtmZone> {
    let number = (code % 100) as u8;
    let is_south = code / 100 == 327;
    let is_known = match code / 100 {
        326 | 327 => (1..=60).contains(&number),
        258 => (28..=38).contains(&number),
        _ => false,
    };
    is_known.then_some(UtmZone { number, is_south })
}
