//! GeoJSON to spots, obstacles and excluded areas.

use super::plain::{self, Form, Reading, length_m};
use super::tangent::TangentPlane;
use crate::measure::Angle;
use crate::place::file::read_text;
use crate::place::plan_point::footprint_flaw;
use crate::place::{Exclusion, Leafless, Obstacle, People, PlanPoint, Site, SiteError, Spot};
use geojson::{Feature, GeoJson, GeometryValue, JsonObject, JsonValue, Position};
use serde::de::DeserializeOwned;
use std::collections::HashSet;
use std::path::Path;

/// Most features that a file may hold.
const MOST_FEATURES: usize = 2500;
/// Most positions of one line.
const MOST_POSITIONS: usize = 2000;
/// Longest name that a site file takes, characters.
const LONGEST_NAME: usize = 80;
/// Nothing of a site is farther from its mark, m.
const FARTHEST_M: f64 = 10_000.0;

/// What a GeoJSON file holds for a site. Nothing of it is in the site yet.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Imported {
    /// Spots, with names that the site does not have yet.
    pub spots: Vec<Spot>,
    /// Obstacles.
    pub obstacles: Vec<Obstacle>,
    /// Areas where nobody is to stand.
    pub excluded: Vec<Exclusion>,
    /// What was assumed, changed or passed over, in the order of the features.
    pub remarks: Vec<Remarked>,
}

/// A remark on one feature of a file.
#[derive(Clone, Debug, PartialEq)]
pub struct Remarked {
    /// The feature's number in the file, from 1.
    pub feature: usize,
    /// Its name here; empty where it was passed over without one.
    pub label: String,
    /// What there is to say.
    pub remark: Remark,
}

/// What an import assumed, changed or passed over.
#[derive(Clone, Debug, PartialEq)]
pub enum Remark {
    /// No height is given.
    HeightAssumed {
        /// The height taken, m.
        height_m: f64,
    },
    /// The height comes from the number of storeys.
    HeightFromStoreys {
        /// The height taken, m.
        height_m: f64,
    },
    /// No diameter is given.
    WidthAssumed {
        /// The diameter taken, m.
        width_m: f64,
    },
    /// A building of which only the whole height is known.
    RoofTakenAsFlat,
    /// Nothing says what a line or an area is: taken as a wall or a shape.
    KindAssumed,
    /// A property that should be metres is not.
    LengthNotRead {
        /// Its name.
        property: String,
    },
    /// An area has holes, which were left out.
    HolesLeftOut,
    /// A name was too long, or not fit to be shown, or taken already.
    Renamed,
    /// The feature is something that neither blocks the view nor is stood on.
    PassedOver,
    /// The feature has no geometry.
    NoGeometry,
}

impl Imported {
    /// The site with all of it.
    ///
    /// # Errors
    /// The site would break a rule of its file ([`Site::check`]), as with too many obstacles or a
    /// spot within one.
    pub fn added_to(&self, site: &Site) -> Result<Site, SiteError> {
        let mut site = site.clone();
        site.spots.extend(self.spots.iter().cloned());
        site.obstacles.extend(self.obstacles.iter().cloned());
        site.excluded.extend(self.excluded.iter().cloned());
        site.check()?;
        Ok(site)
    }
}

/// Reads spots, obstacles and excluded areas from a GeoJSON file (RFC 7946).
///
/// A feature's `kind` says what it is, with the properties that [`super::to_geojson`] writes.
/// Without one the properties that mapping data commonly carry are read (`name`, `height`,
/// `building`, `natural=tree`, `barrier=wall` and so on); a bare point is a spot, a bare line a
/// wall, a bare area a shape. What had to be assumed stands in the remarks. A third coordinate
/// is passed over.
///
/// # Errors
/// One sentence naming the file and, where it is one feature's, its number: no GeoJSON, another
/// coordinate system, longitude and latitude exchanged, a place farther than 10 km, a geometry
/// that does not fit the kind, a footprint that cannot be, a number out of range, too many
/// features, too large a file.
pub fn read_geojson(path: &Path, site: &Site) -> Result<Imported, SiteError> {
    let text = read_text(path)?;
    from_geojson(&text, site)
        .map_err(|SiteError(sentence)| SiteError(format!("{}: {sentence}", path.display())))
}

/// The same from the text of the file.
///
/// # Errors
/// As [`read_geojson`], without the file's name.
pub fn from_geojson(text: &str, site: &Site) -> Result<Imported, SiteError> {
    let text = text.strip_prefix('\u{feff}').unwrap_or(text);
    let document: GeoJson = text.parse().map_err(|error| {
        SiteError(match error {
            geojson::Error::MalformedGeoJson(error) => format!("this is no GeoJSON: {error}"),
            error => format!("this is no GeoJSON: {error}"),
        })
    })?;
    let (features, foreign) = match document {
        GeoJson::FeatureCollection(all) => (all.features, all.foreign_members),
        GeoJson::Feature(feature) => {
            let foreign = feature.foreign_members.clone();
            (vec![feature], foreign)
        }
        GeoJson::Geometry(geometry) => {
            let foreign = geometry.foreign_members.clone();
            (vec![Feature::from(geometry)], foreign)
        }
    };
    check_system(foreign.as_ref().and_then(|members| members.get("crs")))?;
    if features.len() > MOST_FEATURES {
        return Err(SiteError(format!(
            "there are {} features, but may be at most {MOST_FEATURES}: cut out the grounds first",
            features.len()
        )));
    }
    let mut import = Import {
        plane: TangentPlane::at(site),
        people: site.people,
        names: site.spots.iter().map(|spot| spot.name.clone()).collect(),
        imported: Imported::default(),
    };
    for (k, feature) in features.into_iter().enumerate() {
        import
            .add(k + 1, feature)
            .map_err(|SiteError(sentence)| SiteError(format!("feature {}: {sentence}", k + 1)))?;
    }
    Ok(import.imported)
}

/// Refuses a coordinate system (a member of older files) that is not WGS84.
fn check_system(crs: Option<&JsonValue>) -> Result<(), SiteError> {
    let Some(crs) = crs.filter(|crs| !crs.is_null()) else {
        return Ok(());
    };
    let name = crs.pointer("/properties/name").and_then(JsonValue::as_str);
    let name = name.unwrap_or("another one");
    let is_wgs84 = ["CRS84", ":4326", "WGS84", "WGS 84"]
        .iter()
        .any(|part| name.ends_with(part));
    if is_wgs84 {
        Ok(())
    } else {
        Err(SiteError(format!(
            "the coordinates are in the system {name}: save the file in WGS84 longitude and \
             latitude"
        )))
    }
}

struct Import {
    plane: TangentPlane,
    people: People,
    /// Names of spots that are taken.
    names: HashSet<String>,
    imported: Imported,
}

/// A geometry on the plan.
struct Outline {
    form: Form,
    points: Vec<PlanPoint>,
    has_holes: bool,
}

impl Import {
    fn add(&mut self, number: usize, feature: Feature) -> Result<(), SiteError> {
        let properties = feature.properties.unwrap_or_default();
        let given = name_of(&properties, "label").or_else(|| name_of(&properties, "name"));
        let given = given.as_deref();
        let Some(geometry) = feature.geometry else {
            self.remark(number, given.unwrap_or_default(), [Remark::NoGeometry]);
            return Ok(());
        };
        let (form, rings) = rings(geometry.value)?;
        let reading = match text_of(&properties, "kind") {
            Some(kind) => Some(own(kind, &properties, form)?),
            None => plain::read(&properties, form),
        };
        let Some(reading) = reading else {
            self.remark(number, given.unwrap_or_default(), [Remark::PassedOver]);
            return Ok(());
        };
        let kind = reading.kind;
        let mut remarks = reading.remarks;
        let outline = self.outline(form, rings)?;
        if outline.has_holes {
            remarks.push(Remark::HolesLeftOut);
        }
        let label = self.label(kind, number, given, &mut remarks);
        self.put(kind, reading.fields, &label, &outline)?;
        self.remark(number, &label, remarks);
        Ok(())
    }

    fn remark(&mut self, feature: usize, label: &str, remarks: impl IntoIterator<Item = Remark>) {
        let remarked = remarks.into_iter().map(|remark| Remarked {
            feature,
            label: label.into(),
            remark,
        });
        self.imported.remarks.extend(remarked);
    }

    /// A name fit for the site file; for a spot one that is not taken.
    fn label(
        &mut self,
        kind: &str,
        number: usize,
        given: Option<&str>,
        remarks: &mut Vec<Remark>,
    ) -> String {
        let clean: String = given
            .unwrap_or_default()
            .chars()
            .map(|c| if c.is_control() { ' ' } else { c })
            .take(LONGEST_NAME)
            .collect();
        let clean = clean.trim();
        let mut label = if clean.is_empty() {
            format!("{kind} {number}")
        } else {
            clean.to_owned()
        };
        if kind == "spot" {
            let is_taken = |label: &String| self.names.contains(label);
            if is_taken(&label) {
                let stem: String = label.chars().take(LONGEST_NAME - 6).collect();
                // There are fewer names than numbers, so that one is free.
                let free = (2..)
                    .map(|k| format!("{stem} {k}"))
                    .find(|name| !is_taken(name));
                label = free.unwrap_or(label);
            }
            self.names.insert(label.clone());
        }
        if given.is_some_and(|given| given != label) {
            remarks.push(Remark::Renamed);
        }
        label
    }

    /// Makes the thing from its fields with the site file's own rules.
    fn put(
        &mut self,
        kind: &str,
        mut fields: JsonObject,
        label: &str,
        outline: &Outline,
    ) -> Result<(), SiteError> {
        let name = if kind == "spot" { "name" } else { "label" };
        fields.insert(name.into(), label.into());
        let pairs = || -> JsonValue {
            let points = outline.points.iter();
            points
                .map(|at| JsonValue::from(vec![at.east_m, at.north_m]))
                .collect()
        };
        match outline.form {
            Form::Point => {
                fields.insert("east_m".into(), outline.points[0].east_m.into());
                fields.insert("north_m".into(), outline.points[0].north_m.into());
            }
            Form::Line => {
                fields.insert("line_m".into(), pairs());
            }
            Form::Area => {
                fields.insert("corners_m".into(), pairs());
            }
        }
        match kind {
            "spot" => {
                let mut spot: Spot = made(JsonValue::Object(fields))?;
                spot.stand(&self.people);
                self.imported.spots.push(spot);
            }
            "excluded" => {
                let exclusion: Exclusion = made(JsonValue::Object(fields))?;
                if let Some(flaw) = footprint_flaw(&exclusion.corners_m) {
                    return Err(SiteError(format!("the area {label:?} cannot be: {flaw}")));
                }
                self.imported.excluded.push(exclusion);
            }
            _ => {
                let variant = match kind {
                    "tree" => "Tree",
                    "pole" => "Pole",
                    "wall" => "Wall",
                    "building" => "Building",
                    _ => "Shape",
                };
                let mut outer = JsonObject::new();
                outer.insert(variant.into(), JsonValue::Object(fields));
                let obstacle: Obstacle = made(JsonValue::Object(outer))?;
                if let Some(flaw) = obstacle.flaw() {
                    return Err(SiteError(format!("the {kind} {label:?} cannot be: {flaw}")));
                }
                self.imported.obstacles.push(obstacle);
            }
        }
        Ok(())
    }

    fn outline(&self, form: Form, rings: Vec<Vec<Position>>) -> Result<Outline, SiteError> {
        let has_holes = form == Form::Area && rings.len() > 1;
        let ring = rings.into_iter().next().unwrap_or_default();
        if ring.len() > MOST_POSITIONS {
            return Err(SiteError(format!(
                "its line has {} points, but may have at most {MOST_POSITIONS}: simplify it",
                ring.len()
            )));
        }
        let mut points = ring
            .iter()
            .map(|position| self.plan_point(position))
            .collect::<Result<Vec<_>, _>>()?;
        if form == Form::Area && points.len() > 1 && points.first() == points.last() {
            points.pop();
        }
        if points.is_empty() {
            return Err(SiteError("its geometry has no coordinates".into()));
        }
        Ok(Outline {
            form,
            points,
            has_holes,
        })
    }

    fn plan_point(&self, position: &Position) -> Result<PlanPoint, SiteError> {
        let &[first, second, ..] = position.as_slice() else {
            return Err(SiteError(
                "a position needs a longitude and a latitude".into(),
            ));
        };
        let distance_m = |longitude_deg: f64, latitude_deg: f64| {
            let is_place = longitude_deg.abs() <= 180.0 && latitude_deg.abs() <= 90.0;
            is_place.then(|| {
                self.plane.distance_m(
                    Angle::from_degrees(longitude_deg),
                    Angle::from_degrees(latitude_deg),
                )
            })
        };
        let away_m = distance_m(first, second);
        if away_m.is_some_and(|away_m| away_m <= FARTHEST_M) {
            return Ok(self
                .plane
                .plan_point(Angle::from_degrees(first), Angle::from_degrees(second)));
        }
        let is_swapped = distance_m(second, first).is_some_and(|away_m| away_m <= FARTHEST_M);
        Err(SiteError(match away_m {
            _ if is_swapped => format!(
                "[{first}, {second}] lies on the site only when exchanged: longitude comes first, \
                 then latitude"
            ),
            Some(away_m) => format!(
                "[{first}, {second}] lies {:.0} km from the site's mark, but nothing of a site is \
                 farther than {:.0} km",
                away_m / 1000.0,
                FARTHEST_M / 1000.0
            ),
            None => format!(
                "[{first}, {second}] is no longitude and latitude in degrees: save the file in \
                 WGS84"
            ),
        }))
    }
}

fn made<T: DeserializeOwned>(value: JsonValue) -> Result<T, SiteError> {
    serde_json::from_value(value).map_err(|error| SiteError(error.to_string()))
}

fn text_of<'a>(properties: &'a JsonObject, key: &str) -> Option<&'a str> {
    properties.get(key)?.as_str()
}

/// A name as text; tables of mapping software often number things.
fn name_of(properties: &JsonObject, key: &str) -> Option<String> {
    match properties.get(key)? {
        JsonValue::String(text) => Some(text.clone()),
        JsonValue::Number(number) => Some(number.to_string()),
        _ => None,
    }
}

/// The geometry's form and its lines. Of a collection only one of a single part is taken.
fn rings(value: GeometryValue) -> Result<(Form, Vec<Vec<Position>>), SiteError> {
    let name = value.type_name();
    let parts = |count: usize| {
        SiteError(format!(
            "it is a {name} of {count} parts: split it into features of one part each"
        ))
    };
    match value {
        GeometryValue::Point { coordinates } => Ok((Form::Point, vec![vec![coordinates]])),
        GeometryValue::LineString { coordinates } => Ok((Form::Line, vec![coordinates])),
        GeometryValue::Polygon { coordinates } => Ok((Form::Area, coordinates)),
        GeometryValue::MultiPoint { coordinates } => match coordinates.len() {
            1 => Ok((Form::Point, vec![coordinates])),
            count => Err(parts(count)),
        },
        GeometryValue::MultiLineString { coordinates } => match coordinates.len() {
            1 => Ok((Form::Line, coordinates)),
            count => Err(parts(count)),
        },
        GeometryValue::MultiPolygon { mut coordinates } => {
            match (coordinates.len(), coordinates.pop()) {
                (1, Some(polygon)) => Ok((Form::Area, polygon)),
                (count, _) => Err(parts(count)),
            }
        }
        GeometryValue::GeometryCollection { geometries } => Err(parts(geometries.len())),
    }
}

/// That what is no length, when a tree is bare, has the form that [`super::to_geojson`] gives it.
fn check_leafless(name: &str, value: &JsonValue) -> Result<(), SiteError> {
    let read = serde_json::from_value::<Leafless>(value.clone());
    read.map(|_| ()).map_err(|error| {
        SiteError(format!(
            "its {name} cannot be read ({error}): write it as {{\"from\": [11, 15], \"to\": [4, 20], \
             \"see_through\": 0.6}}"
        ))
    })
}

/// A feature with a kind of its own: what fields it may have, and which geometry it needs.
fn own(kind: &str, properties: &JsonObject, form: Form) -> Result<Reading, SiteError> {
    const KINDS: [(&str, Form, &[&str]); 7] = [
        ("spot", Form::Point, &["base_m", "eye_height_m", "radius_m"]),
        (
            "tree",
            Form::Point,
            &[
                "base_m", "height_m", "width_m", "gap_m", "trunk_m", "leafless",
            ],
        ),
        ("pole", Form::Point, &["base_m", "height_m", "width_m"]),
        ("wall", Form::Line, &["base_m", "height_m"]),
        ("building", Form::Area, &["base_m", "eaves_m", "ridge_m"]),
        ("shape", Form::Area, &["base_m", "height_m"]),
        ("excluded", Form::Area, &[]),
    ];
    let Some((kind, needed, names)) = KINDS.iter().find(|(name, ..)| *name == kind) else {
        let known: Vec<&str> = KINDS.iter().map(|(name, ..)| *name).collect();
        return Err(SiteError(format!(
            "its kind is {kind:?}; the kinds are {}",
            known.join(", ")
        )));
    };
    if form != *needed {
        let geometry = |form| match form {
            Form::Point => "Point",
            Form::Line => "LineString",
            Form::Area => "Polygon",
        };
        return Err(SiteError(format!(
            "a {kind} is drawn as a {}, but this one is a {}",
            geometry(*needed),
            geometry(form)
        )));
    }
    let mut fields = JsonObject::new();
    for name in *names {
        let Some(value) = properties.get(*name).filter(|value| !value.is_null()) else {
            continue;
        };
        let value = if name.ends_with("_m") {
            let length_m = length_m(value).ok_or_else(|| {
                SiteError(format!("its {name} is {value}, not a number of metres"))
            })?;
            JsonValue::from(length_m)
        } else {
            check_leafless(name, value)?;
            value.clone()
        };
        fields.insert((*name).into(), value);
    }
    Ok(plain::completed(kind, fields, properties))
}
