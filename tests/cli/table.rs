//! `positions --table`: forms of tables, order, refusals in the middle, pipes that close.

use crate::program::{command, run, run_with_input};
use std::fmt::Write as _;
use std::io::{BufRead, BufReader, Write};
use std::process::Stdio;

const HEADER: &str = "id,utc,lat_deg,lon_deg,elevation_m,delta_t_s,body";
const ROW: &str = "a,2026-12-05T17:40:00Z,51.05,-3.42,96,,venus";

fn table(text: &str) -> crate::program::Run {
    run_with_input(&["positions", "--table", "-"], text.as_bytes())
}

fn ids(output: &str) -> Vec<String> {
    let mut reader = csv::Reader::from_reader(output.as_bytes());
    let id = |row: Result<csv::StringRecord, _>| row.expect("a row")[0].to_owned();
    reader.records().map(id).collect()
}

#[test]
fn a_row_is_what_the_single_call_gives() {
    let single = [
        "positions",
        "--at",
        "2026-12-05T17:40:00Z",
        "--lat",
        "51.05",
        "--lon",
        "-3.42",
        "--elevation",
        "96",
        "--body",
        "venus",
        "--format",
        "csv",
    ];
    let single = run(&single).succeeds();
    let expected: String = single
        .lines()
        .zip(["id,", "a,"])
        .map(|(line, id)| format!("{id}{line}\n"))
        .collect();
    assert_eq!(table(&format!("{HEADER}\n{ROW}\n")).succeeds(), expected);
}

#[test]
fn forms_of_the_same_table_give_the_same() {
    let plain = table(&format!("{HEADER}\n{ROW}\n")).succeeds();
    let forms = [
        format!("\u{feff}{HEADER}\n{ROW}\n"),
        format!("{HEADER}\r\n{ROW}\r\n"),
        format!("{HEADER}\n{ROW}"),
        format!("{HEADER}\n\n{ROW}\n\n"),
        format!("{HEADER}\n{}\n", ROW.replace("17:40:00Z", "17:40:00.000")),
        format!("{HEADER}\n{}\n", ROW.replace("T17:40:00Z", " 17:40")),
        format!("{HEADER}\n\"a\",\"2026-12-05T17:40:00Z\", 51.05 ,-3.42,96,\"\",\"venus\"\n"),
        format!("note,{HEADER}\n\"x, y\",{ROW}\n"),
        "body,lon_deg,lat_deg,utc,elevation_m,id\nvenus,-3.42,51.05,2026-12-05T17:40:00,96,a\n"
            .to_owned(),
    ];
    for form in forms {
        assert_eq!(table(&form).succeeds(), plain, "{form:?}");
    }
}

#[test]
fn ut1_and_a_stated_delta_t_lead_to_tt() {
    let text = "id,ut1,lat_deg,lon_deg,elevation_m,delta_t_s,body\n\
                1,2000-01-01T12:00:00,0,0,0,86.4,mars\n";
    let out = table(text).succeeds();
    let line = out.lines().nth(1).expect("a row");
    // 86.4 s are a thousandth of a day after J2000.0, JD 2451545.
    assert!(
        line.starts_with("1,mars,2451545.001000000,86.4000,"),
        "{line}"
    );
}

#[test]
fn order_and_awkward_ids_are_kept_in_csv_and_json() {
    let mut text = format!("{HEADER}\n");
    let mut expected = Vec::new();
    for (index, body) in ["venus", "moon", "saturn", "venus", "sun"]
        .iter()
        .cycle()
        .take(500)
        .enumerate()
    {
        let id = format!("{index}, \"é\"");
        let day = 1 + index * 7 % 28;
        writeln!(
            text,
            "\"{}\",20{:02}-05-{day:02}T01:00:00,10,20,0,,{body}",
            id.replace('"', "\"\""),
            index % 40 + 10,
        )
        .expect("text");
        expected.push(id);
    }
    assert_eq!(ids(&table(&text).succeeds()), expected);
    let json = ["positions", "--table", "-", "--format", "json"];
    let document = run_with_input(&json, text.as_bytes()).json();
    let rows = document["bodies"].as_array().expect("a list");
    let in_json: Vec<&str> = rows.iter().filter_map(|row| row["id"].as_str()).collect();
    assert_eq!(in_json, expected);
}

#[test]
fn an_empty_table_has_no_rows() {
    assert_eq!(table(&format!("{HEADER}\n")).succeeds().lines().count(), 1);
    let json = ["positions", "--table", "-", "--format", "json"];
    let document = run_with_input(&json, HEADER.as_bytes()).json();
    assert_eq!(document["bodies"].as_array().map(Vec::len), Some(0));
}

#[test]
fn bad_rows_name_their_line_and_column() {
    for (from, to, parts) in [
        ("51.05", "91", ["line 3", "column lat_deg"]),
        ("51.05", "NaN", ["line 3", "column lat_deg"]),
        ("-3.42", "-inf", ["line 3", "column lon_deg"]),
        ("-3.42", "", ["line 3", "column lon_deg"]),
        (",96,", ",high,", ["line 3", "column elevation_m"]),
        (",,venus", ",x,venus", ["line 3", "column delta_t_s"]),
        ("venus", "Vulcan", ["line 3", "column body"]),
        ("17:40:00Z", "17:61:00Z", ["line 3", "column utc"]),
        ("17:40:00Z", "17:40:00+01:00", ["line 3", "column utc"]),
        ("2026-12-05", "1599-12-05", ["line 3", "column utc"]),
        (",,venus", ",venus", ["line 3", "6 fields"]),
        ("51.05", "\u{1b}[31m\u{7}", ["line 3", "\\u{1b}"]),
    ] {
        let bad = ROW.replace(from, to);
        let run = table(&format!("{HEADER}\n{ROW}\n{bad}\n{ROW}\n"));
        assert_eq!(run.code, 2, "{bad}");
        assert_eq!(ids(&run.out), ["a"], "the row before {bad} was written");
        let sentence = run.err.trim_end();
        assert!(!sentence.contains('\n'), "{sentence}");
        for part in parts {
            assert!(sentence.contains(part), "{part} is missing in: {sentence}");
        }
        // Where it comes first nothing is written.
        table(&format!("{HEADER}\n{bad}\n")).refused(&["line 2"]);
    }
}

#[test]
fn a_bad_row_in_the_middle_of_many_loses_no_good_one_before_it() {
    const BEFORE: usize = 20_000;
    let good = format!("{ROW}\n").repeat(BEFORE);
    let bad = ROW.replace("51.05", "fifty");
    let text = format!("{HEADER}\n{good}{bad}\n{good}");
    let run = table(&text);
    assert_eq!((run.code, run.out.lines().count()), (2, BEFORE + 1));
    let place = format!("line {}, column lat_deg", BEFORE + 2);
    assert!(run.err.contains(&place), "{}", run.err);
    assert!(run.out.ends_with('\n'), "no half row");

    let json = ["positions", "--table", "-", "--format", "json"];
    let run = run_with_input(&json, text.as_bytes());
    let document: serde_json::Value = serde_json::from_str(&run.out).expect("whole JSON");
    assert_eq!(document["complete"], false);
    assert_eq!(document["bodies"].as_array().map(Vec::len), Some(BEFORE));
}

#[test]
fn tables_that_are_none() {
    let row = format!("\n{ROW}\n");
    table("").refused(&["stdin", "id"]);
    table(&(HEADER.replace("utc", "when") + &row)).refused(&["line 1", "column utc"]);
    table(&(HEADER.replace("lat_deg", "body") + &row)).refused(&["line 1", "lat_deg"]);
    table(&(HEADER.replace("elevation_m", "body") + &row)).refused(&["column body", "twice"]);
    run_with_input(&["positions", "--table", "-"], &[0xff, 0, 0x80, b'\n', 7])
        .refused(&["stdin", "line 1"]);
    run(&["positions", "--table", "-", "--format", "text"]).refused(&["--format", "csv"]);
    run(&["positions", "--table", "no-such.csv"]).refused(&["no-such.csv"]);
    let folder = tempfile::tempdir().expect("a folder");
    let path = folder.path().to_str().expect("a plain path");
    run(&["positions", "--table", path]).refused(&["folder"]);
}

#[test]
fn a_row_without_end_is_refused_and_not_read_into_memory() {
    let folder = tempfile::tempdir().expect("a folder");
    let endless = "0".repeat(3_000_000);
    let open_quote = format!("\"{}", format!("{ROW}\n").repeat(60_000));
    for (name, rows) in [("endless.csv", endless), ("quote.csv", open_quote)] {
        let path = folder.path().join(name);
        std::fs::write(&path, format!("{HEADER}\n{rows}")).expect("written");
        let path = path.to_str().expect("a plain path");
        run(&["positions", "--table", path]).refused(&[name, "longer than 1048576 bytes"]);
    }
}

#[test]
fn a_reader_that_has_had_enough_is_no_failure() {
    let home = tempfile::tempdir().expect("a folder");
    let file = home.path().join("many.csv");
    std::fs::write(
        &file,
        format!("{HEADER}\n{}", format!("{ROW}\n").repeat(20_000)),
    )
    .expect("written");
    let path = file.to_str().expect("a plain path");
    let mut child = command(&["positions", "--table", path], home.path())
        .stdout(Stdio::piped())
        .stderr(Stdio::piped())
        .spawn()
        .expect("the program starts");
    let mut first = String::new();
    BufReader::with_capacity(64, child.stdout.take().expect("a pipe"))
        .read_line(&mut first)
        .expect("a line");
    let output = child.wait_with_output().expect("the program ends");
    assert!(first.starts_with("id,body,"), "{first}");
    assert_eq!(output.status.code(), Some(0));
    assert!(
        output.stderr.is_empty(),
        "{:?}",
        String::from_utf8_lossy(&output.stderr)
    );
}

#[cfg(target_os = "linux")]
#[test]
fn a_full_disk_is_a_failure_of_its_own() {
    let full = std::fs::OpenOptions::new().write(true).open("/dev/full");
    let home = tempfile::tempdir().expect("a folder");
    let mut child = command(&["positions", "--table", "-"], home.path())
        .stdin(Stdio::piped())
        .stdout(full.expect("the device that is always full"))
        .stderr(Stdio::piped())
        .spawn()
        .expect("the program starts");
    let mut stdin = child.stdin.take().expect("a pipe");
    write!(stdin, "{HEADER}\n{ROW}\n").expect("handed over");
    drop(stdin);
    let output = child.wait_with_output().expect("the program ends");
    assert_eq!(output.status.code(), Some(1));
    assert!(!output.stderr.is_empty(), "it says why");
}
