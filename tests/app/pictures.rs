//! Pictures of the whole window, where there is a driver to draw them with.

use crate::desk::{Desk, NOW};

#[test]
fn look() {
    for (w, h) in [(1600.0, 1000.0), (1280.0, 800.0), (900.0, 700.0)] {
        let desk = Desk::new();
        let mut harness = desk.open_sized(w, h, desk.start(NOW));
        let image = harness.render().unwrap();
        image.save(format!("/tmp/shell-{w}.png")).unwrap();
    }
}
