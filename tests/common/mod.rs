//! What every test binary shares.

/// Fails unless `actual` is within `tolerance` of `expected`; `what` names the quantity and the
/// source of the expected value.
#[track_caller]
pub fn assert_within(actual: f64, expected: f64, tolerance: f64, what: &str) {
    let difference = (actual - expected).abs();
    assert!(
        difference <= tolerance,
        "{what}: {actual} is {difference:e} from {expected}, tolerance {tolerance:e}"
    );
}
