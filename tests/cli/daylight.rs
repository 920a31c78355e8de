//! `dimmet daylight`.

use crate::program::run;

/// The school's mark has its gymnasium east of it, and Venus was 42° west of the Sun.
const ASKED: [&str; 5] = [
    "daylight",
    "--site",
    "tarrow-bay-school",
    "--date",
    "2026-12-05",
];

#[test]
fn the_page_leads_with_the_cautions() {
    let page = run(&ASKED).succeeds();
    assert!(page.starts_with("Caution: never look at the Sun"), "{page}");
    let instruments = page.find("Instruments by day need a supervised");
    let slot = page.find("from the shade of gymnasium");
    assert!(instruments.is_some() && instruments < slot, "{page}");
    assert!(!page.contains('«') && !page.contains('{'), "{page}");
}

#[test]
fn json_has_the_cautions_and_the_slots() {
    let document = run(&[&ASKED[..], &["--format", "json"]].concat()).json();
    assert_eq!(document["cautions"].as_array().map(Vec::len), Some(3));
    assert_eq!(document["body"], "venus");
    let slots = document["slots"].as_array().expect("a list");
    assert!(!slots.is_empty());
    for slot in slots {
        assert_eq!(slot["building"], "gymnasium");
        assert_eq!(slot["is_west_of_sun"], true);
        let margin = slot["place"]["margin_mag_keen"].as_f64();
        assert!(margin.is_some_and(|margin| margin >= 0.0), "{slot}");
    }
}

#[test]
fn the_sun_and_tables_are_refused() {
    let asked = |rest: &[&str]| run(&[&ASKED[..], rest].concat());
    asked(&["--body", "sun"]).refused(&["--body", "never looked at"]);
    asked(&["--format", "csv"]).refused(&["--format", "csv"]);
    asked(&["--spot", "nowhere"]).refused(&["nowhere", "mark"]);
}
