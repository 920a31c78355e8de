//! TT - UT1 over the supported years.

use super::Tt;

/// TT - UT1, seconds.
pub fn delta_t_s(_tt: Tt) -> f64 {
    69.2
}
