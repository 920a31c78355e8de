//! The pieces that have been fitted, shared among all spans and threads.

use super::piece::Quantity;
use crate::measure::Chebyshev;
use std::collections::HashMap;
use std::ops::RangeInclusive;
use std::sync::{Arc, PoisonError, RwLock};

/// Pieces of one quantity in the young generation before it becomes the old one: at most
/// 2 x 2048 x 10 quantities x 0.4 kB, some 16 MB, are kept however many are asked for, and any
/// working set of a century of Moon pieces or several centuries of planets is never refitted.
const GENERATION: usize = 2048;

/// One store for each quantity, each behind its own lock. Locks are held to look up and to put
/// in, never while fitting: two threads may fit the same piece, and either result serves.
#[derive(Debug, Default)]
pub struct Cache {
    stores: [RwLock<Generations>; Quantity::COUNT],
}

/// Two generations instead of a list by use: dropping the old one forgets what has not been
/// asked for during a whole generation.
#[derive(Debug, Default)]
struct Generations {
    young: HashMap<i32, Arc<Chebyshev>>,
    old: HashMap<i32, Arc<Chebyshev>>,
}

impl Generations {
    fn insert(&mut self, index: i32, piece: &Arc<Chebyshev>) {
        if self.young.len() >= GENERATION {
            self.old = std::mem::take(&mut self.young);
        }
        self.young.insert(index, Arc::clone(piece));
    }
}

impl Cache {
    /// The pieces of a range, in order; fits those that are not kept.
    pub fn pieces(&self, quantity: Quantity, range: RangeInclusive<i32>) -> Vec<Arc<Chebyshev>> {
        let store = &self.stores[quantity.number()];
        let kept: Vec<(i32, Option<Arc<Chebyshev>>)> = {
            let store = store.read().unwrap_or_else(PoisonError::into_inner);
            range
                .map(|index| (index, store.young.get(&index).cloned()))
                .collect()
        };
        kept.into_iter()
            .map(|(index, piece)| piece.unwrap_or_else(|| self.renewed(quantity, index)))
            .collect()
    }

    /// One piece; fits it if it is not kept.
    pub fn piece(&self, quantity: Quantity, index: i32) -> Arc<Chebyshev> {
        let kept = self.stores[quantity.number()]
            .read()
            .unwrap_or_else(PoisonError::into_inner)
            .young
            .get(&index)
            .cloned();
        kept.unwrap_or_else(|| self.renewed(quantity, index))
    }

    /// A piece that the young generation lacks: from the old one, or fitted.
    fn renewed(&self, quantity: Quantity, index: i32) -> Arc<Chebyshev> {
        let store = &self.stores[quantity.number()];
        let old = store
            .read()
            .unwrap_or_else(PoisonError::into_inner)
            .old
            .get(&index)
            .cloned();
        let piece = old.unwrap_or_else(|| Arc::new(quantity.fit(index)));
        store
            .write()
            .unwrap_or_else(PoisonError::into_inner)
            .insert(index, &piece);
        piece
    }
}

#[cfg(test)]
mod tests {
    use super::{Cache, GENERATION};
    use crate::sky::ephemeris::piece::Quantity;
    use crate::sky::ephemeris::planets::Planet;
    use std::sync::Arc;

    const NEPTUNE: Quantity = Quantity::Planet(Planet::Neptune);

    #[test]
    fn a_piece_is_fitted_once() {
        let cache = Cache::default();
        let first = cache.pieces(NEPTUNE, 3..=5);
        let again = cache.pieces(NEPTUNE, 4..=6);
        assert_eq!((first.len(), again.len()), (3, 3), "pieces of the ranges");
        assert!(Arc::ptr_eq(&first[1], &again[0]), "piece 4 is shared");
        assert!(!Arc::ptr_eq(&first[1], &first[2]), "pieces differ");
    }

    #[test]
    fn the_store_stays_bounded_and_keeps_what_is_in_use() {
        let cache = Cache::default();
        let often = cache.pieces(NEPTUNE, 0..=0);
        let most = 2 * GENERATION + 300;
        for index in 1..most as i32 {
            cache.pieces(NEPTUNE, index..=index);
            if index % 500 == 0 {
                let now = cache.pieces(NEPTUNE, 0..=0);
                assert!(Arc::ptr_eq(&often[0], &now[0]), "kept at {index}");
            }
        }
        let store = cache.stores[NEPTUNE.number()].read().expect("lock");
        let kept = store.young.len() + store.old.len();
        assert!(kept <= 2 * GENERATION, "{kept} kept");
        assert!(kept < most, "{kept} kept of {most}");
    }
}
