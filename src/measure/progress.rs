//! How far long work has come, and whether it should stop.

use std::sync::Arc;
use std::sync::atomic::{AtomicBool, AtomicU64, Ordering};

/// How far a piece of long work has come, shared between the worker and whoever waits for it.
///
/// Clones speak of the same work. Reading and writing are single atomic operations, so a worker
/// may call these in its inner loop and a window may read them in every frame.
#[derive(Clone, Debug, Default)]
pub struct Progress(Arc<State>);

#[derive(Debug, Default)]
struct State {
    is_cancelled: AtomicBool,
    done: AtomicU64,
    total: AtomicU64,
}

impl Progress {
    /// Of work that has not begun.
    pub fn new() -> Self {
        Self::default()
    }

    /// Asks the work to stop at its next opportunity. It cannot be taken back.
    pub fn cancel(&self) {
        self.0.is_cancelled.store(true, Ordering::Relaxed);
    }

    /// Whether the work has been asked to stop.
    pub fn is_cancelled(&self) -> bool {
        self.0.is_cancelled.load(Ordering::Relaxed)
    }

    /// Says how many steps there are, and begins counting anew.
    pub fn set_total(&self, steps: u64) {
        self.0.done.store(0, Ordering::Relaxed);
        self.0.total.store(steps, Ordering::Relaxed);
    }

    /// Counts more steps as done.
    pub fn advance(&self, steps: u64) {
        self.0.done.fetch_add(steps, Ordering::Relaxed);
    }

    /// The share of the steps that is done, 0 to 1; 0 while their number is not known.
    pub fn share(&self) -> f64 {
        let total = self.0.total.load(Ordering::Relaxed);
        if total == 0 {
            return 0.0;
        }
        (self.0.done.load(Ordering::Relaxed) as f64 / total as f64).min(1.0)
    }
}

#[cfg(test)]
mod tests {
    use super::Progress;

    #[test]
    fn clones_share_one_count_and_one_cancel_flag() {
        let waiting = Progress::new();
        assert_eq!(waiting.share(), 0.0, "nothing is known yet");
        let working = waiting.clone();
        working.set_total(8);
        working.advance(3);
        working.advance(1);
        assert_eq!(waiting.share(), 0.5);
        working.advance(9);
        assert_eq!(waiting.share(), 1.0, "never more than all");
        working.set_total(2);
        assert_eq!(waiting.share(), 0.0, "counted anew");
        assert!(!working.is_cancelled());
        waiting.cancel();
        assert!(working.is_cancelled());
        assert!(!Progress::new().is_cancelled(), "other work goes on");
    }
}
