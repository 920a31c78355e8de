//! The short path to a new site: name, coordinates, zone, three skyline points in fists.

use crate::app::palette::Look;
use crate::app::sites;
use crate::app::widgets::{bold, error_line, field, line, number, text};
use crate::measure::Angle;
use crate::place::{Site, SkylinePoint, zone};
use crate::words::Words;
use chrono_tz::Tz;
use eframe::egui::{ComboBox, ScrollArea, Ui};
use std::path::{Path, PathBuf};

/// A fist at arm's length covers so many degrees.
const FIST_DEG: f64 = 10.0;
/// Zone names that the list shows at once.
const MOST_ZONES: usize = 60;

/// A new site as far as it is written, with what is wrong with it.
pub struct NewSite {
    name: String,
    latitude: String,
    longitude: String,
    zone_filter: String,
    zone: Option<Tz>,
    /// Coordinates that the zone was last suggested for.
    suggested_for: Option<(f64, f64)>,
    /// Compass points in sixteenths of a turn, and heights in fists.
    points: [(usize, String); 3],
    errors: Errors,
}

#[derive(Default)]
struct Errors {
    name: Option<String>,
    latitude: Option<String>,
    longitude: Option<String>,
    zone: Option<String>,
    points: [Option<String>; 3],
    whole: Option<String>,
}

impl Errors {
    fn are_none(&self) -> bool {
        let single = [
            &self.name,
            &self.latitude,
            &self.longitude,
            &self.zone,
            &self.whole,
        ];
        single.into_iter().chain(&self.points).all(Option::is_none)
    }
}

impl NewSite {
    /// Empty, with the skyline's points to the east, south and west.
    pub fn new() -> Self {
        const EAST_SOUTH_WEST: [usize; 3] = [4, 8, 12];
        Self {
            name: String::new(),
            latitude: String::new(),
            longitude: String::new(),
            zone_filter: String::new(),
            zone: None,
            suggested_for: None,
            points: EAST_SOUTH_WEST.map(|point| (point, String::new())),
            errors: Errors::default(),
        }
    }

    /// Draws the form.
    pub fn show(&mut self, ui: &mut Ui, look: &Look, words: &Words) {
        bold(
            ui,
            look,
            look.sizes.sentence,
            look.colours.text,
            &words.text("new-site-title"),
        );
        field(
            ui,
            look,
            &words.text("site-name"),
            &mut self.name,
            self.errors.name.as_deref(),
        );
        ui.columns(2, |columns| {
            let error = self.errors.latitude.as_deref();
            field(
                &mut columns[0],
                look,
                &words.text("latitude"),
                &mut self.latitude,
                error,
            );
            let error = self.errors.longitude.as_deref();
            field(
                &mut columns[1],
                look,
                &words.text("longitude"),
                &mut self.longitude,
                error,
            );
        });
        self.suggest_zone();
        self.zone_ui(ui, look, words);
        let colour = look.colours.lesser;
        text(
            ui,
            look,
            look.sizes.label,
            colour,
            &words.text("skyline-in-fists"),
        );
        for index in 0..self.points.len() {
            self.point_ui(ui, look, words, index);
        }
        error_line(ui, look, self.errors.whole.as_deref());
    }

    fn suggest_zone(&mut self) {
        let coordinates = latitude_deg(&self.latitude).zip(longitude_deg(&self.longitude));
        if coordinates.is_none() || coordinates == self.suggested_for {
            return;
        }
        self.suggested_for = coordinates;
        if let Some((latitude, longitude)) = coordinates {
            let place = (
                Angle::from_degrees(latitude),
                Angle::from_degrees(longitude),
            );
            self.zone = zone::suggestion(place.0, place.1).or(self.zone);
        }
    }

    fn zone_ui(&mut self, ui: &mut Ui, look: &Look, words: &Words) {
        let label = words.text("time-zone");
        let name = text(ui, look, look.sizes.label, look.colours.lesser, &label);
        let shown = self.zone.map_or_else(
            || words.text("time-zone-choose"),
            |zone| zone.name().to_owned(),
        );
        ComboBox::from_id_salt("zone")
            .selected_text(shown)
            .width(ui.available_width())
            .close_behavior(eframe::egui::PopupCloseBehavior::CloseOnClickOutside)
            .show_ui(ui, |ui| {
                let filter = words.text("time-zone-filter");
                let filter = text(ui, look, look.sizes.label, look.colours.lesser, &filter);
                ui.add(line(&mut self.zone_filter)).labelled_by(filter.id);
                let wanted = self.zone_filter.trim().to_lowercase().replace(' ', "_");
                ScrollArea::vertical().max_height(220.0).show(ui, |ui| {
                    let matching = zone::names().filter(|n| n.to_lowercase().contains(&wanted));
                    for name in matching.take(MOST_ZONES) {
                        let zone = zone::parse(name).ok();
                        if ui.selectable_label(zone == self.zone, name).clicked() {
                            self.zone = zone;
                            ui.close();
                        }
                    }
                });
            })
            .response
            .labelled_by(name.id);
        error_line(ui, look, self.errors.zone.as_deref());
    }

    fn point_ui(&mut self, ui: &mut Ui, look: &Look, words: &Words, index: usize) {
        let number = (index + 1).to_string();
        let (compass, fists) = &mut self.points[index];
        ui.horizontal(|ui| {
            let direction = words.text_with::<&str>("skyline-direction", &[("number", &number)]);
            let label = text(ui, look, look.sizes.label, look.colours.lesser, &direction);
            ComboBox::from_id_salt(("direction", index))
                .selected_text(words.direction(azimuth(*compass)))
                .width(160.0)
                .show_ui(ui, |ui| {
                    for point in 0..16 {
                        ui.selectable_value(compass, point, words.direction(azimuth(point)));
                    }
                })
                .response
                .labelled_by(label.id);
            let height = words.text_with::<&str>("skyline-fists", &[("number", &number)]);
            let label = text(ui, look, look.sizes.label, look.colours.lesser, &height);
            ui.add(line(fists).desired_width(70.0))
                .labelled_by(label.id);
        });
        error_line(ui, look, self.errors.points[index].as_deref());
    }

    /// Makes the site and writes its file into the folder. `None`: something is wrong, and is
    /// said beside its field.
    pub fn save(&mut self, folder: Option<&Path>, words: &Words) -> Option<(Site, PathBuf)> {
        self.errors = Errors::default();
        let site = self.site(words)?;
        let Some(folder) = folder else {
            self.errors.whole = Some(words.text("no-sites-folder"));
            return None;
        };
        let file = folder.join(sites::file_name(&site.name));
        if file.exists() {
            let file = file.to_string_lossy();
            self.errors.name =
                Some(words.text_with::<&str>("site-file-exists", &[("file", &file)]));
            return None;
        }
        let saved = std::fs::create_dir_all(folder)
            .map_err(|error| error.to_string())
            .and_then(|()| site.save(&file).map_err(|error| error.to_string()));
        match saved {
            Ok(()) => Some((site, file)),
            Err(reason) => {
                self.errors.whole = Some(reason);
                None
            }
        }
    }

    fn site(&mut self, words: &Words) -> Option<Site> {
        let errors = &mut self.errors;
        let latitude = latitude_deg(&self.latitude);
        let longitude = longitude_deg(&self.longitude);
        if latitude.is_none() {
            errors.latitude = Some(words.text("latitude-error"));
        }
        if longitude.is_none() {
            errors.longitude = Some(words.text("longitude-error"));
        }
        if self.zone.is_none() {
            errors.zone = Some(words.text("time-zone-error"));
        }
        if self.name.trim().is_empty() {
            errors.name = Some(words.text("site-name-error"));
        }
        let mut skyline: Vec<SkylinePoint> = Vec::new();
        for (index, (compass, fists)) in self.points.iter().enumerate() {
            if fists.trim().is_empty() {
                continue; // Left out: three are offered, none is needed.
            }
            let azimuth_deg = azimuth(*compass).degrees();
            let is_doubled = skyline.iter().any(|p| p.azimuth_deg == azimuth_deg);
            match number(fists).filter(|fists| (0.0..=9.0).contains(fists)) {
                Some(_) if is_doubled => {
                    errors.points[index] = Some(words.text("skyline-doubled-error"));
                }
                Some(fists) => skyline.push(SkylinePoint {
                    azimuth_deg,
                    altitude_deg: fists * FIST_DEG,
                }),
                None => errors.points[index] = Some(words.text("skyline-fists-error")),
            }
        }
        skyline.sort_by(|a, b| a.azimuth_deg.total_cmp(&b.azimuth_deg));
        if !errors.are_none() {
            return None;
        }
        let made = Site::new(self.name.trim(), latitude?, longitude?, self.zone?);
        let made = made.map(|site| Site { skyline, ..site });
        made.and_then(|site| site.check().map(|()| site))
            .map_err(|error| self.errors.whole = Some(error.to_string()))
            .ok()
    }
}

/// The azimuth of a compass point in sixteenths of a turn.
fn azimuth(point: usize) -> Angle {
    Angle::from_degrees(22.5 * point as f64)
}

/// Degrees with an optional letter for the hemisphere, north or south.
fn latitude_deg(text: &str) -> Option<f64> {
    degrees(text, ('N', 'S')).filter(|deg| deg.abs() <= 90.0)
}

/// The same, east or west.
fn longitude_deg(text: &str) -> Option<f64> {
    degrees(text, ('E', 'W')).filter(|deg| deg.abs() <= 180.0)
}

fn degrees(text: &str, (positive, negative): (char, char)) -> Option<f64> {
    let text = text.trim().to_uppercase();
    let (figures, sign) = match (text.strip_suffix(positive), text.strip_suffix(negative)) {
        (Some(figures), _) => (figures, Some(1.0)),
        (_, Some(figures)) => (figures, Some(-1.0)),
        (None, None) => (text.as_str(), None),
    };
    let value = number(figures.trim_end().trim_end_matches('°'))?;
    match sign {
        // "-33 S" says south twice or not at all: refused.
        Some(_) if value.is_sign_negative() => None,
        Some(sign) => Some(sign * value),
        None => Some(value),
    }
}

#[cfg(test)]
mod tests {
    use super::{latitude_deg, longitude_deg};

    #[test]
    fn coordinates_are_read_with_sign_or_letter() {
        assert_eq!(latitude_deg("51.05"), Some(51.05));
        assert_eq!(latitude_deg("33.9 S"), Some(-33.9));
        assert_eq!(latitude_deg("33.9° s"), Some(-33.9));
        assert_eq!(longitude_deg("−3.42"), Some(-3.42));
        assert_eq!(longitude_deg("18.4E"), Some(18.4));
    }

    #[test]
    fn what_is_no_coordinate_is_refused() {
        for text in [
            "", "N", "north", "91", "-90.01", "NaN", "inf", "1e1", "-33 S", "5 E", "٣",
        ] {
            assert_eq!(latitude_deg(text), None, "{text:?}");
        }
        for text in ["180.5", "-181", "4 N"] {
            assert_eq!(longitude_deg(text), None, "{text:?}");
        }
    }
}
