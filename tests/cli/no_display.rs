//! The program where no window can be opened.

use crate::program::run;

#[test]
fn without_a_display_it_says_so_and_prints_the_coming_dusk() {
    let run = run(&["--now", "2026-12-05T15:00:00Z"]);
    assert_eq!(run.code, 0, "{}", run.err);
    assert_eq!(
        run.err.trim_end().lines().count(),
        1,
        "one sentence: {}",
        run.err
    );
    assert!(
        !run.err.contains(".rs"),
        "no source file is named: {}",
        run.err
    );
    for part in [
        "Fennick Common",
        "Dusk, Sat 5 Dec 2026",
        "Visitors see",
        "Caps stay on",
    ] {
        assert!(run.out.contains(part), "{part} is missing in:\n{}", run.out);
    }
    assert!(!run.out.contains("Dawn"), "only the dusk:\n{}", run.out);
}

#[test]
fn a_dusk_that_is_under_way_is_the_coming_one_until_it_ends() {
    let dusk_of = |now: &str| {
        let page = run(&["--now", now]).out;
        let line = page.lines().find(|line| line.starts_with("Dusk, "));
        line.unwrap_or_else(|| panic!("no dusk in:\n{page}"))
            .to_owned()
    };
    // The Sun is lowest there at 00:04 on the 6th.
    assert_eq!(dusk_of("2026-12-05T23:50:00Z"), "Dusk, Sat 5 Dec 2026");
    assert_eq!(dusk_of("2026-12-06T00:10:00Z"), "Dusk, Sun 6 Dec 2026");
}
