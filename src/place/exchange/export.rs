//! Spots, obstacles and excluded areas as GeoJSON.

use super::tangent::TangentPlane;
use crate::place::file::write_text;
use crate::place::plan_point::sides;
use crate::place::{PlanPoint, Site, SiteError};
use geojson::{Feature, FeatureCollection, GeometryValue, JsonObject, JsonValue, Position};
use std::path::Path;

/// The site's spots, obstacles and excluded areas as the text of a GeoJSON file (RFC 7946).
///
/// Every feature says its `kind` (`spot`, `tree`, `pole`, `wall`, `building`, `shape`,
/// `excluded`), its `label`, and its measures by the names that the site file has for them.
/// Coordinates are WGS84 longitude and latitude to 9 decimals, a tenth of a millimetre. The
/// skylines measured from spots are not part of it: they have their own tables.
///
/// # Errors
/// A number of the site is not finite.
pub fn to_geojson(site: &Site) -> Result<String, SiteError> {
    let plane = TangentPlane::at(site);
    let mut features = Vec::new();
    for spot in &site.spots {
        let mut fields = fields_of(serde_json::to_value(spot))?;
        fields.retain(|name, _| !matches!(name.as_str(), "skyline" | "skyline_far"));
        let point = point(&plane, spot.plan_point());
        features.push(feature("spot", fields, point));
    }
    for obstacle in &site.obstacles {
        let outer = fields_of(serde_json::to_value(obstacle))?;
        // An obstacle is written as its kind with its fields below.
        let Some((kind, fields)) = outer.into_iter().next() else {
            continue;
        };
        let points = obstacle.points();
        let geometry = match kind.as_str() {
            "Wall" => GeometryValue::new_line_string(points.iter().map(|at| position(&plane, *at))),
            "Building" | "Shape" => polygon(&plane, &points),
            _ => point(&plane, points[0]),
        };
        features.push(feature(
            &kind.to_lowercase(),
            fields_of(Ok(fields))?,
            geometry,
        ));
    }
    for exclusion in &site.excluded {
        let fields = fields_of(serde_json::to_value(exclusion))?;
        features.push(feature(
            "excluded",
            fields,
            polygon(&plane, &exclusion.corners_m),
        ));
    }
    let collection = FeatureCollection {
        bbox: None,
        features,
        foreign_members: None,
    };
    let text = serde_json::to_string_pretty(&collection).map_err(unwritable)?;
    Ok(text + "\n")
}

/// Writes [`to_geojson`] to a file, whole or not at all.
///
/// # Errors
/// As [`to_geojson`], or the file cannot be written: one sentence naming it.
pub fn write_geojson(site: &Site, path: &Path) -> Result<(), SiteError> {
    write_text(path, &to_geojson(site)?)
}

fn unwritable(error: serde_json::Error) -> SiteError {
    SiteError(format!("the site cannot be written as GeoJSON: {error}"))
}

fn fields_of(value: serde_json::Result<JsonValue>) -> Result<JsonObject, SiteError> {
    match value.map_err(unwritable)? {
        JsonValue::Object(fields) => Ok(fields),
        _ => Ok(JsonObject::new()),
    }
}

/// What the geometry already says is left out of the properties.
fn feature(kind: &str, mut fields: JsonObject, geometry: GeometryValue) -> Feature {
    let label = fields.remove("name").or_else(|| fields.remove("label"));
    let mut properties = JsonObject::new();
    properties.insert("kind".into(), kind.into());
    properties.extend(label.map(|label| ("label".into(), label)));
    let is_geometry = |name: &str| matches!(name, "east_m" | "north_m" | "corners_m" | "line_m");
    properties.extend(fields.into_iter().filter(|(name, _)| !is_geometry(name)));
    Feature {
        geometry: Some(geometry.into()),
        properties: Some(properties),
        ..Feature::default()
    }
}

fn position(plane: &TangentPlane, at: PlanPoint) -> Position {
    let (longitude, latitude) = plane.coordinates(at);
    let rounded = |angle_deg: f64| (angle_deg * 1e9).round() / 1e9;
    Position::from([rounded(longitude.degrees()), rounded(latitude.degrees())])
}

fn point(plane: &TangentPlane, at: PlanPoint) -> GeometryValue {
    GeometryValue::new_point(position(plane, at))
}

/// A closed ring, counter-clockwise seen from above as RFC 7946 wants it.
fn polygon(plane: &TangentPlane, corners: &[PlanPoint]) -> GeometryValue {
    let clockwise: f64 = sides(corners).map(|(a, b)| a.cross(b)).sum();
    let mut ring: Vec<Position> = corners.iter().map(|at| position(plane, *at)).collect();
    if clockwise > 0.0 {
        ring.reverse();
    }
    ring.extend(ring.first().cloned());
    GeometryValue::new_polygon([ring])
}
