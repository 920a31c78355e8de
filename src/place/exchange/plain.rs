//! What the properties that mapping data commonly carry say of a feature.

use super::import::Remark;
use geojson::{JsonObject, JsonValue};

/// What a feature is, by the site file's names: `spot`, `tree` and so on, with fields.
pub(super) struct Reading {
    pub kind: &'static str,
    pub fields: JsonObject,
    pub remarks: Vec<Remark>,
}

/// The shape of a feature's geometry.
#[derive(Clone, Copy, PartialEq)]
pub(super) enum Form {
    Point,
    Line,
    Area,
}

/// Height of a storey with its floor, m (common practice).
const STOREY_M: f64 = 3.0;
/// Diameters of a crown and a post where none is given, m (common practice).
const CROWN_M: f64 = 6.0;
const POST_M: f64 = 0.2;

/// A property, value and form, what it is here, and the height assumed where none is given, m
/// (common practice: what such things measure on the average in gardens and streets). A `*`
/// stands for any value but `no`.
const KNOWN: [(&str, &str, Form, &str, f64); 20] = [
    ("building", "*", Form::Area, "building", 6.0),
    ("natural", "tree", Form::Point, "tree", 8.0),
    ("natural", "tree_row", Form::Line, "wall", 8.0),
    ("natural", "wood", Form::Area, "shape", 15.0),
    ("landuse", "forest", Form::Area, "shape", 15.0),
    ("natural", "scrub", Form::Area, "shape", 3.0),
    ("barrier", "hedge", Form::Line, "wall", 2.0),
    ("barrier", "hedge", Form::Area, "shape", 2.0),
    ("barrier", "wall", Form::Line, "wall", 2.0),
    ("barrier", "wall", Form::Area, "shape", 2.0),
    ("barrier", "fence", Form::Line, "wall", 1.5),
    ("barrier", "retaining_wall", Form::Line, "wall", 1.0),
    ("barrier", "city_wall", Form::Line, "wall", 6.0),
    ("highway", "street_lamp", Form::Point, "pole", 5.0),
    ("man_made", "flagpole", Form::Point, "pole", 8.0),
    ("man_made", "mast", Form::Point, "pole", 15.0),
    ("power", "pole", Form::Point, "pole", 9.0),
    ("natural", "water", Form::Area, "excluded", 0.0),
    ("amenity", "parking", Form::Area, "excluded", 0.0),
    ("water", "*", Form::Area, "excluded", 0.0),
];

/// Properties that make a feature something which neither blocks the view nor is stood on.
const OTHER_THINGS: [&str; 16] = [
    "aerialway",
    "aeroway",
    "amenity",
    "barrier",
    "boundary",
    "building",
    "highway",
    "landuse",
    "leisure",
    "man_made",
    "natural",
    "place",
    "power",
    "railway",
    "route",
    "waterway",
];

/// Reads a feature without a `kind` of its own. `None` for what is something else.
pub(super) fn read(properties: &JsonObject, form: Form) -> Option<Reading> {
    let is_set = |key: &str, value: &str| match properties.get(key) {
        Some(JsonValue::String(text)) => text == value || (value == "*" && text != "no"),
        Some(JsonValue::Bool(is_so)) => value == "*" && *is_so,
        Some(JsonValue::Number(_)) => value == "*",
        _ => false,
    };
    let known = KNOWN
        .iter()
        .find(|(key, value, of, ..)| *of == form && is_set(key, value));
    let (kind, assumed_m, is_assumed) = match known {
        Some((.., kind, assumed_m)) => (*kind, *assumed_m, false),
        None if OTHER_THINGS.iter().any(|key| is_set(key, "*")) => return None,
        None => match form {
            Form::Point => ("spot", 0.0, false),
            Form::Line => ("wall", 2.0, true),
            Form::Area => ("shape", 3.0, true),
        },
    };
    let mut reading = Reading {
        kind,
        fields: JsonObject::new(),
        remarks: Vec::new(),
    };
    if is_assumed {
        reading.remarks.push(Remark::KindAssumed);
    }
    reading.measure(properties, assumed_m);
    Some(reading)
}

/// Completes a feature that says its kind: measures that it lacks are read from the common
/// properties or assumed.
pub(super) fn completed(
    kind: &'static str,
    fields: JsonObject,
    properties: &JsonObject,
) -> Reading {
    let assumed_m = match kind {
        "tree" => 8.0,
        "pole" => 5.0,
        "building" => 6.0,
        "shape" => 3.0,
        _ => 2.0,
    };
    let mut reading = Reading {
        kind,
        fields,
        remarks: Vec::new(),
    };
    reading.measure(properties, assumed_m);
    reading
}

impl Reading {
    fn put(&mut self, field: &str, value_m: f64) {
        self.fields.insert(field.into(), value_m.into());
    }

    /// Fills in the measures that its kind must have and that it lacks.
    fn measure(&mut self, properties: &JsonObject, assumed_m: f64) {
        match self.kind {
            "spot" | "excluded" => {}
            "building" => {
                if self.fields.contains_key("eaves_m") {
                    return;
                }
                let height_m = self.height_m(properties, assumed_m);
                let roof_m = self.length_m(properties, "roof:height");
                if let Some(roof_m) = roof_m.filter(|roof_m| *roof_m > 0.0 && *roof_m < height_m) {
                    self.put("eaves_m", height_m - roof_m);
                    self.put("ridge_m", height_m);
                } else {
                    self.put("eaves_m", height_m);
                    self.remarks.push(Remark::RoofTakenAsFlat);
                }
            }
            "tree" | "pole" => {
                self.put_height(properties, assumed_m);
                if self.fields.contains_key("width_m") {
                    return;
                }
                let (key, width_m) = match self.kind {
                    "tree" => ("diameter_crown", CROWN_M),
                    _ => ("diameter", POST_M),
                };
                let given_m = self.length_m(properties, key);
                if given_m.is_none() {
                    self.remarks.push(Remark::WidthAssumed { width_m });
                }
                self.put("width_m", given_m.unwrap_or(width_m));
            }
            _ => self.put_height(properties, assumed_m),
        }
    }

    fn put_height(&mut self, properties: &JsonObject, assumed_m: f64) {
        if !self.fields.contains_key("height_m") {
            let height_m = self.height_m(properties, assumed_m);
            self.put("height_m", height_m);
        }
    }

    fn height_m(&mut self, properties: &JsonObject, assumed_m: f64) -> f64 {
        for key in ["height", "building:height", "est_height"] {
            if let Some(height_m) = self.length_m(properties, key) {
                return height_m;
            }
        }
        let storeys = ["building:levels", "levels"]
            .iter()
            .find_map(|key| length_m(properties.get(*key)?))
            .filter(|storeys| self.kind == "building" && *storeys > 0.0);
        match storeys {
            Some(storeys) => {
                let height_m = STOREY_M * storeys;
                self.remarks.push(Remark::HeightFromStoreys { height_m });
                height_m
            }
            None => {
                self.remarks.push(Remark::HeightAssumed {
                    height_m: assumed_m,
                });
                assumed_m
            }
        }
    }

    /// A property in metres, if it can be read as such; if not, that is remarked.
    fn length_m(&mut self, properties: &JsonObject, key: &str) -> Option<f64> {
        let value = properties.get(key).filter(|value| !value.is_null())?;
        let read = length_m(value);
        if read.is_none() {
            self.remarks.push(Remark::LengthNotRead {
                property: key.into(),
            });
        }
        read
    }
}

/// Metres as a number, or as text with or without the unit.
pub(super) fn length_m(value: &JsonValue) -> Option<f64> {
    match value {
        JsonValue::Number(number) => number.as_f64(),
        JsonValue::String(text) => {
            let text = text.trim();
            let bare = text.strip_suffix('m').unwrap_or(text).trim();
            bare.parse().ok().filter(|length: &f64| length.is_finite())
        }
        _ => None,
    }
}
