//! The document that puts measured against published: written here, and held to.

use crate::published::{
    LOWLAND, MOUNTAIN, PARANAL, SUN_ALTITUDES_DEG, lowland, mountain, zenith_mag,
};
use dimmet::light::mag_arcsec2_from_luminance;
use std::fmt::Write;
use std::path::{Path, PathBuf};

fn docs(name: &str) -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR"))
        .join("assets/light")
        .join(name)
}

/// Whether the documents are to be written anew.
fn is_update() -> bool {
    std::env::var_os("UPDATE_DOCS").is_some()
}

/// A table in Markdown.
pub fn table<const N: usize>(head: [&str; N], rows: &[[String; N]]) -> String {
    let line = |cells: Vec<&str>| format!("| {} |\n", cells.join(" | "));
    let mut text = line(head.to_vec()) + &line(vec!["---"; N]);
    for row in rows {
        text += &line(row.iter().map(String::as_str).collect());
    }
    text
}

/// Fails unless a section of `assets/light/measured.md` is this text.
#[track_caller]
pub fn assert_documented(section: &str, text: &str) {
    let path = docs("measured.md");
    let document = std::fs::read_to_string(&path).unwrap();
    let mark = format!("<!-- {section} -->\n");
    let start = document.find(&mark).unwrap() + mark.len();
    let end = start + document[start..].find("<!-- end -->").unwrap();
    if is_update() {
        let updated = format!("{}{text}{}", &document[..start], &document[end..]);
        std::fs::write(path, updated).unwrap();
    } else {
        assert_eq!(
            &document[start..end],
            text,
            "assets/light/measured.md, section {section}"
        );
    }
}

#[test]
fn the_zenith_is_documented() {
    let (low, high) = (lowland(), mountain());
    let rows: Vec<[String; 6]> = SUN_ALTITUDES_DEG
        .into_iter()
        .enumerate()
        .map(|(i, sun)| {
            [
                format!("{sun}"),
                format!("{:.1}", zenith_mag(&low, sun)),
                format!("{:.1}", mag_arcsec2_from_luminance(LOWLAND[i])),
                format!("{:.1}", zenith_mag(&high, sun)),
                format!("{:.1}", mag_arcsec2_from_luminance(MOUNTAIN[i])),
                PARANAL[i].map_or(String::new(), |mag| format!("{mag:.1}")),
            ]
        })
        .collect();
    let head = [
        "Sun, deg",
        "model, 30 m",
        "Maryland",
        "model, 2800 m",
        "Sacramento Peak",
        "Paranal",
    ];
    assert_documented("zenith", &table(head, &rows));
}

/// Places of the plot: Sun altitude 1 to -16 across, 6 to 23 mag/arcsec² down.
fn in_plot(sun_deg: f64, mag: f64) -> (f64, f64) {
    (60.0 + (1.0 - sun_deg) * 32.0, 20.0 + (mag - 6.0) * 20.0)
}

#[test]
fn the_zenith_is_plotted() {
    let mut svg = String::from(
        "<svg xmlns=\"http://www.w3.org/2000/svg\" viewBox=\"0 0 640 400\" \
         font-family=\"sans-serif\" font-size=\"12\">\n<rect width=\"640\" height=\"400\" \
         fill=\"white\"/>\n",
    );
    for sun in [0.0, -3.0, -6.0, -9.0, -12.0, -15.0] {
        let (x, y) = in_plot(sun, 23.0);
        writeln!(
            svg,
            "<text x=\"{x}\" y=\"{}\" text-anchor=\"middle\">{sun}</text>",
            y + 16.0
        )
        .unwrap();
        writeln!(svg, "<path d=\"M{x},20V{y}\" stroke=\"#ddd\"/>").unwrap();
    }
    for mag in [8.0, 12.0, 16.0, 20.0] {
        let (x, y) = in_plot(1.0, mag);
        writeln!(
            svg,
            "<text x=\"{}\" y=\"{}\" text-anchor=\"end\">{mag}</text>",
            x - 6.0,
            y + 4.0
        )
        .unwrap();
        writeln!(svg, "<path d=\"M{x},{y}H604\" stroke=\"#ddd\"/>").unwrap();
    }
    writeln!(
        svg,
        "<text x=\"332\" y=\"394\" text-anchor=\"middle\">Sun's altitude, degrees</text>"
    )
    .unwrap();
    writeln!(svg, "<text x=\"16\" y=\"190\" text-anchor=\"middle\" transform=\"rotate(-90 16 190)\">zenith, mag/arcsec²</text>").unwrap();
    let mut legend = 40.0;
    let mut entry = |svg: &mut String, mark: &str, text: &str| {
        writeln!(svg, "<g transform=\"translate(400 {legend})\">{mark}</g><text x=\"420\" y=\"{}\">{text}</text>", legend + 4.0).unwrap();
        legend += 18.0;
    };
    for (site, colour, name) in [
        (lowland(), "#c0642c", "model, 30 m"),
        (mountain(), "#2c6ac0", "model, 2800 m"),
    ] {
        let points: Vec<String> = (0..=64)
            .map(|i| {
                let sun = 0.5 - 0.25 * f64::from(i);
                let (x, y) = in_plot(sun, zenith_mag(&site, sun));
                format!("{x:.1},{y:.1}")
            })
            .collect();
        writeln!(
            svg,
            "<polyline points=\"{}\" fill=\"none\" stroke=\"{colour}\" stroke-width=\"1.5\"/>",
            points.join(" ")
        )
        .unwrap();
        entry(
            &mut svg,
            &format!("<path d=\"M-10,0H10\" stroke=\"{colour}\" stroke-width=\"1.5\"/>"),
            name,
        );
    }
    let koomen = |values: [f64; 6]| values.map(|value| Some(mag_arcsec2_from_luminance(value)));
    for (values, mark, name) in [
        (
            koomen(LOWLAND),
            "<circle r=\"4\" fill=\"#c0642c\"/>",
            "Koomen et al. 1952, Maryland",
        ),
        (
            koomen(MOUNTAIN),
            "<circle r=\"4\" fill=\"#2c6ac0\"/>",
            "Koomen et al. 1952, Sacramento Peak",
        ),
        (
            PARANAL,
            "<path d=\"M-4,-4L4,4M-4,4L4,-4\" stroke=\"black\"/>",
            "Patat et al. 2006, Paranal, V",
        ),
    ] {
        for (sun, mag) in SUN_ALTITUDES_DEG.into_iter().zip(values) {
            if let Some(mag) = mag {
                let (x, y) = in_plot(sun, mag);
                writeln!(svg, "<g transform=\"translate({x:.1} {y:.1})\">{mark}</g>").unwrap();
            }
        }
        entry(&mut svg, mark, name);
    }
    svg += "</svg>\n";
    if is_update() {
        std::fs::write(docs("zenith.svg"), svg).unwrap();
    } else {
        let kept = std::fs::read_to_string(docs("zenith.svg")).unwrap();
        assert_eq!(kept, svg, "assets/light/zenith.svg");
    }
}
