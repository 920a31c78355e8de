//! Site files on disk: every bad place is one sentence naming the path, and nothing is lost.

use dimmet::place::{LARGEST_FILE_BYTES, Site, SkylinePoint, demo_sites};
use std::fs;
use std::path::Path;

fn read_refusal(path: &Path) -> String {
    let sentence = Site::read(path)
        .expect_err("the file must be refused")
        .to_string();
    assert!(
        sentence.contains(&path.display().to_string()),
        "{sentence} must name the file"
    );
    assert!(!sentence.contains('\n'), "{sentence} must be one sentence");
    sentence
}

fn save_refusal(site: &Site, path: &Path) -> String {
    let sentence = site
        .save(path)
        .expect_err("it cannot be written")
        .to_string();
    assert!(
        sentence.contains(&path.display().to_string()),
        "{sentence} must name the file"
    );
    sentence
}

#[test]
fn a_saved_site_reads_back_and_leaves_nothing_beside_it() {
    let folder = tempfile::tempdir().expect("a folder");
    let path = folder.path().join("new.site.ron");
    for site in demo_sites() {
        site.save(&path).expect("written");
        assert_eq!(&Site::read(&path).expect("read"), site);
    }
    let files = fs::read_dir(folder.path()).expect("listed").count();
    assert_eq!(files, 1, "one file and no temporary ones");
}

#[test]
fn a_failed_write_leaves_the_old_file() {
    let folder = tempfile::tempdir().expect("a folder");
    let path = folder.path().join("kept.site.ron");
    let mut site = demo_sites()[0].clone();
    site.save(&path).expect("written");
    let before = fs::read(&path).expect("read");
    site.latitude_deg = f64::NAN;
    site.save(&path).expect_err("not a valid site");
    assert_eq!(fs::read(&path).expect("read"), before);
    assert_eq!(fs::read_dir(folder.path()).expect("listed").count(), 1);
}

#[test]
fn places_that_cannot_be_written_are_named() {
    let folder = tempfile::tempdir().expect("a folder");
    let site = &demo_sites()[0];
    let into_nowhere = folder.path().join("missing").join("x.site.ron");
    assert!(save_refusal(site, &into_nowhere).contains("there is no folder"));
    assert!(save_refusal(site, folder.path()).contains("it is a folder"));
    let file = folder.path().join("file");
    fs::write(&file, "x").expect("written");
    assert!(save_refusal(site, &file.join("x.site.ron")).contains("there is no folder"));
    #[cfg(target_os = "linux")]
    save_refusal(site, Path::new("/proc/dimmet.site.ron"));
}

#[test]
fn a_site_too_large_to_be_read_again_is_not_written() {
    let folder = tempfile::tempdir().expect("a folder");
    let file = folder.path().join("site.ron");
    let mut site = demo_sites()[0].clone();
    site.save(&file).expect("saved");
    let before = fs::read(&file).expect("readable");
    // As many points as a table may hold, each with many digits.
    site.skyline = (0..216_000)
        .map(|k| SkylinePoint {
            azimuth_deg: f64::from(k) / 600.0,
            altitude_deg: 3.0 + f64::from(k % 977) / 811.0,
        })
        .collect();
    let sentence = site.save(&file).expect_err("too large").to_string();
    assert!(sentence.contains("larger than 4 MB"), "{sentence}");
    assert_eq!(fs::read(&file).expect("readable"), before);
    // A quarter of them fits, and comes back.
    site.skyline.truncate(54_000);
    site.save(&file).expect("saved");
    assert_eq!(Site::read(&file).expect("readable"), site);
}

#[test]
fn places_that_cannot_be_read_are_named() {
    let folder = tempfile::tempdir().expect("a folder");
    assert!(read_refusal(folder.path()).contains("it is a folder"));
    assert!(read_refusal(&folder.path().join("missing.ron")).contains("there is no such file"));
    #[cfg(target_os = "linux")]
    {
        assert!(read_refusal(Path::new("/dev/zero")).contains("not a plain file"));
        // A plain file of length 0 whose first byte cannot be read.
        read_refusal(Path::new("/proc/self/mem"));
    }
}

#[test]
fn a_huge_file_is_refused_without_being_read() {
    let folder = tempfile::tempdir().expect("a folder");
    let path = folder.path().join("huge.site.ron");
    let file = fs::File::create(&path).expect("created");
    file.set_len(50 * 1024 * 1024).expect("50 MB");
    assert!(read_refusal(&path).contains("larger than 4 MB"));
    // At the limit it is read, and then refused for what it holds.
    file.set_len(LARGEST_FILE_BYTES).expect("4 MB");
    assert!(!read_refusal(&path).contains("larger"));
}

#[test]
fn a_binary_file_is_refused_at_its_first_wrong_byte() {
    let folder = tempfile::tempdir().expect("a folder");
    let path = folder.path().join("picture.site.ron");
    fs::write(&path, b"Site(\xff\xd8\xff\xe0").expect("written");
    assert!(read_refusal(&path).contains("not a text file (byte 6 is not UTF-8)"));
}

#[test]
fn what_is_wrong_in_a_file_is_named_with_the_file() {
    let folder = tempfile::tempdir().expect("a folder");
    let path = folder.path().join("bad.site.ron");
    fs::write(&path, "Site(\n  name: \"x\",\n  latitude_deg: 91.0,\n)").expect("written");
    assert_eq!(
        read_refusal(&path),
        format!(
            "{}: line 3, column 17: latitude_deg is 91, but must lie between -90 and 90 degrees",
            path.display()
        )
    );
}
