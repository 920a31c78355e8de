//! The invented sites of the reference tables, and reading the tables.

use chrono::{DateTime, NaiveDate, Utc};
use chrono_tz::Tz;
use dimmet::light::{Conditions, Eyes, Spread};
use dimmet::measure::Angle;
use dimmet::place::Extinction;
use dimmet::plan::Sight;
use dimmet::sky::{Air, Observer};
use std::collections::HashMap;
use std::sync::LazyLock;

/// The light over a lowland site: of no account for risings and skyline moments.
pub fn sight() -> &'static Sight {
    static SIGHT: LazyLock<Sight> = LazyLock::new(|| {
        let air = Extinction {
            rayleigh_mag: 0.107,
            ozone_mag: 0.031,
            aerosol_mag: 0.11,
        };
        let conditions = Conditions::new(air, 0.0, 20.5).expect("figures within range");
        Sight::new(conditions, Eyes::default(), Spread::default())
    });
    &SIGHT
}

pub struct ReferenceSite {
    pub observer: Observer,
    pub zone: Tz,
}

/// A table's rows by column name; comment lines start with `#`.
pub fn rows(text: &str) -> Vec<HashMap<String, String>> {
    csv::ReaderBuilder::new()
        .comment(Some(b'#'))
        .from_reader(text.as_bytes())
        .deserialize()
        .map(|row| row.expect("the reference table is well formed"))
        .collect()
}

pub fn number(row: &HashMap<String, String>, column: &str) -> f64 {
    row[column]
        .parse()
        .unwrap_or_else(|_| panic!("{column} is a number in {row:?}"))
}

pub fn date(row: &HashMap<String, String>) -> NaiveDate {
    row["local_date"].parse().expect("local_date is a date")
}

pub fn instant(text: &str) -> DateTime<Utc> {
    text.parse().expect("a time in RFC 3339")
}

pub fn sites() -> HashMap<String, ReferenceSite> {
    let site = |row: &HashMap<String, String>| {
        let hours = number(row, "utc_offset_min") / 60.0;
        // The IANA names of fixed offsets count westward.
        let zone = format!("Etc/GMT{:+}", -hours)
            .parse()
            .expect("a fixed zone");
        let observer = Observer {
            latitude: Angle::from_degrees(number(row, "lat_deg")),
            longitude: Angle::from_degrees(number(row, "lon_east_deg")),
            elevation_m: number(row, "elevation_m"),
            air: Air {
                pressure_hpa: number(row, "pressure_hpa"),
                temperature_c: number(row, "temperature_c"),
            },
        };
        (row["site"].clone(), ReferenceSite { observer, zone })
    };
    rows(include_str!("../data/sites.csv"))
        .iter()
        .map(site)
        .collect()
}
