//! The columns of positions, alike in CSV and JSON, single and in tables.
//!
//! Numbers are written by hand with a fixed count of decimals, since tables hold millions.

use super::row::Row;
use crate::light::Eye;
use crate::sky::Body;

/// A column that holds a number.
#[derive(Clone, Copy, Debug)]
pub(super) struct Column {
    pub name: &'static str,
    decimals: u32,
    /// Whether the number is an angle in [0°, 360°), which must not round up to 360.
    is_turn: bool,
}

const fn column(name: &'static str, decimals: u32) -> Column {
    Column {
        name,
        decimals,
        is_turn: false,
    }
}

const fn turn(name: &'static str) -> Column {
    Column {
        name,
        decimals: 7,
        is_turn: true,
    }
}

/// The columns after `body`, in order, up to the margins.
pub(super) const COLUMNS: [Column; 22] = [
    column("jd_tt", 9),
    column("delta_t_s", 4),
    column("alt_deg", 7),
    column("alt_refracted_deg", 7),
    turn("az_deg"),
    turn("ra_deg"),
    column("dec_deg", 7),
    turn("geo_ra_deg"),
    column("geo_dec_deg", 7),
    column("distance_au", 10),
    column("elongation_deg", 7),
    column("phase_angle_deg", 7),
    column("illuminated_fraction", 6),
    column("diameter_arcsec", 4),
    column("magnitude", 4),
    turn("bright_limb_deg"),
    column("topo_diameter_arcsec", 4),
    column("topo_illuminated_fraction", 6),
    turn("topo_bright_limb_deg"),
    column("sky_cd_m2", 7),
    column("extinction_mag", 4),
    column("limit_mag", 4),
];

/// The margins for each of [`Eye::ALL`]: members of one object in JSON, columns whose names begin
/// with its name in CSV.
const MARGINS: [Column; Eye::ALL.len()] = [
    column("passer_by", 4),
    column("visitor", 4),
    column("keen", 4),
    column("optics", 4),
];

/// The name of the margins' object.
const MARGIN: &str = "margin_mag";

/// Added to the days since 2000 as whole numbers: nine decimals of a Julian date are more than
/// an `f64` holds.
const J2000_JULIAN_DATE: i64 = 2_451_545;

impl Row {
    /// The values of [`COLUMNS`], the Julian date from J2000; `None` where one is not defined:
    /// the Sun has no phase, a magnitude formula may say nothing, and what is down is not seen.
    fn values(&self) -> [Option<f64>; COLUMNS.len()] {
        let (geocentric, topocentric) = (&self.geocentric, &self.topocentric);
        let (from_centre, from_site) = (&self.appearance, &self.topo_appearance);
        let of_phase = |value: f64| (self.body != Body::Sun).then_some(value);
        [
            Some(self.moment.tt().days_since_j2000()),
            Some(self.moment.delta_t_s()),
            Some(self.place.altitude.degrees()),
            Some(self.refracted_altitude.degrees()),
            Some(self.place.azimuth.degrees()),
            Some(topocentric.right_ascension().degrees()),
            Some(topocentric.declination().degrees()),
            Some(geocentric.right_ascension().degrees()),
            Some(geocentric.declination().degrees()),
            Some(geocentric.distance_au),
            of_phase(from_centre.elongation.degrees()),
            of_phase(from_centre.phase_angle.degrees()),
            of_phase(from_centre.illuminated_fraction),
            Some(from_centre.diameter.arcsec()),
            from_centre.magnitude.value(),
            of_phase(from_centre.bright_limb.degrees()),
            Some(from_site.diameter.arcsec()),
            of_phase(from_site.illuminated_fraction),
            of_phase(from_site.bright_limb.degrees()),
            self.seen.map(|seen| seen.sky_cd_m2),
            self.seen.map(|seen| seen.extinction_mag),
            self.seen.map(|seen| seen.limit_mag),
        ]
    }

    /// The values of [`MARGINS`].
    fn margins(&self) -> [Option<f64>; MARGINS.len()] {
        match &self.seen {
            Some(seen) => seen.margins_mag.map(Some),
            None => [None; MARGINS.len()],
        }
    }

    /// Each column in turn: what `start` writes, then the number if it is defined.
    fn write_each(&self, out: &mut Vec<u8>, start: impl Fn(&mut Vec<u8>, Column, bool)) {
        for (index, (column, value)) in COLUMNS.into_iter().zip(self.values()).enumerate() {
            start(out, column, value.is_some());
            let Some(value) = value else { continue };
            let scale = 10_i64.pow(column.decimals);
            let mut scaled = (value * scale as f64).round() as i64;
            if index == 0 {
                scaled += J2000_JULIAN_DATE * scale;
            } else if column.is_turn {
                scaled = scaled.rem_euclid(360 * scale);
            }
            write_decimal(out, scaled, column.decimals);
        }
    }

    /// A line of CSV from `body` on.
    pub fn write_csv(&self, out: &mut Vec<u8>) {
        out.extend_from_slice(self.body.name().as_bytes());
        self.write_each(out, |out, _, _| out.push(b','));
        for (column, value) in MARGINS.into_iter().zip(self.margins()) {
            out.push(b',');
            write_rounded(out, column, value);
        }
        out.push(b'\n');
    }

    /// The members of a JSON object from `body` on, without braces.
    pub fn write_json(&self, out: &mut Vec<u8>) {
        for part in ["\"body\":\"", self.body.name(), "\""] {
            out.extend_from_slice(part.as_bytes());
        }
        self.write_each(out, |out, column, is_defined| {
            write_member(out, b",", column.name, is_defined);
        });
        write_member(out, b",", MARGIN, true);
        let mut start: &[u8] = b"{";
        for (column, value) in MARGINS.into_iter().zip(self.margins()) {
            write_member(out, start, column.name, value.is_some());
            write_rounded(out, column, value);
            start = b",";
        }
        out.push(b'}');
    }
}

/// The start of a member of a JSON object, and its whole where it is not defined.
fn write_member(out: &mut Vec<u8>, start: &[u8], name: &str, is_defined: bool) {
    out.extend_from_slice(start);
    for part in ["\"", name, "\":"] {
        out.extend_from_slice(part.as_bytes());
    }
    if !is_defined {
        out.extend_from_slice(b"null");
    }
}

/// A number with its column's decimals; nothing where it is not defined.
fn write_rounded(out: &mut Vec<u8>, column: Column, value: Option<f64>) {
    if let Some(value) = value {
        let scale = 10_i64.pow(column.decimals);
        write_decimal(out, (value * scale as f64).round() as i64, column.decimals);
    }
}

/// The line of column names from `body` on.
pub(super) fn write_csv_header(out: &mut Vec<u8>) {
    out.extend_from_slice(b"body");
    for column in COLUMNS {
        out.push(b',');
        out.extend_from_slice(column.name.as_bytes());
    }
    for column in MARGINS {
        for part in [",", MARGIN, "_", column.name] {
            out.extend_from_slice(part.as_bytes());
        }
    }
    out.push(b'\n');
}

/// So many 10^-decimals as a decimal number, with at least one digit before the point.
fn write_decimal(out: &mut Vec<u8>, scaled: i64, decimals: u32) {
    let mut text = [0; 24];
    let mut start = text.len();
    let mut rest = scaled.unsigned_abs();
    let mut written = 0;
    while rest > 0 || written <= decimals {
        if written == decimals && decimals > 0 {
            start -= 1;
            text[start] = b'.';
        }
        start -= 1;
        text[start] = b'0' + (rest % 10) as u8;
        rest /= 10;
        written += 1;
    }
    if scaled < 0 {
        out.push(b'-');
    }
    out.extend_from_slice(&text[start..]);
}

#[cfg(test)]
mod tests {
    use super::write_decimal;
    use proptest::prelude::*;

    fn decimal(scaled: i64, decimals: u32) -> String {
        let mut out = Vec::new();
        write_decimal(&mut out, scaled, decimals);
        String::from_utf8(out).expect("digits")
    }

    #[test]
    fn numbers_keep_their_zeros_and_their_sign() {
        assert_eq!(decimal(0, 7), "0.0000000");
        assert_eq!(decimal(-5, 2), "-0.05");
        assert_eq!(decimal(1234, 2), "12.34");
        assert_eq!(decimal(42, 0), "42");
        assert_eq!(decimal(2_451_545_123_456_789, 9), "2451545.123456789");
        assert_eq!(decimal(i64::MIN, 9), "-9223372036.854775808");
    }

    proptest! {
        #[test]
        fn a_number_reads_back_as_itself(scaled in -4_000_000_000_000_i64..4_000_000_000_000) {
            let read: f64 = decimal(scaled, 7).parse().expect("a number");
            prop_assert_eq!((read * 1e7).round() as i64, scaled);
        }
    }
}
