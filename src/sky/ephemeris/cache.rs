//! The pieces that have been fitted, shared among all spans and threads.

use super::Ephemeris;
use super::piece::Quantity;
use crate::measure::Chebyshev;
use std::collections::HashMap;
use std::ops::RangeInclusive;
use std::sync::{Arc, PoisonError, RwLock};

/// One store for each quantity, each behind its own lock. Locks are held to look up and to put
/// in, never while fitting: two threads may fit the same piece, and either result serves.
///
/// Nothing is forgotten, and only pieces of the covered years are kept: all nine bodies over all
/// eight centuries are 101 000 pieces, some 40 MB.
#[derive(Debug, Default)]
pub struct Cache {
    stores: [RwLock<Store>; Quantity::COUNT],
}

/// Pieces by their index.
type Store = HashMap<i32, Arc<Chebyshev>>;

impl Cache {
    /// The pieces of a range, in order; fits those that are not kept.
    pub fn pieces(&self, quantity: Quantity, range: RangeInclusive<i32>) -> Vec<Arc<Chebyshev>> {
        let kept: Vec<(i32, Option<Arc<Chebyshev>>)> = {
            let store = self.stores[quantity.number()]
                .read()
                .unwrap_or_else(PoisonError::into_inner);
            range
                .map(|index| (index, store.get(&index).cloned()))
                .collect()
        };
        kept.into_iter()
            .map(|(index, piece)| piece.unwrap_or_else(|| self.fitted(quantity, index)))
            .collect()
    }

    /// One piece; fits it if it is not kept.
    pub fn piece(&self, quantity: Quantity, index: i32) -> Arc<Chebyshev> {
        let kept = self.stores[quantity.number()]
            .read()
            .unwrap_or_else(PoisonError::into_inner)
            .get(&index)
            .cloned();
        kept.unwrap_or_else(|| self.fitted(quantity, index))
    }

    fn fitted(&self, quantity: Quantity, index: i32) -> Arc<Chebyshev> {
        let piece = Arc::new(quantity.fit(index));
        // One piece beyond either end, for the room that a span has.
        let first = quantity.index_at(Ephemeris::FIRST) - 1;
        let last = quantity.index_at(Ephemeris::LAST) + 1;
        if (first..=last).contains(&index) {
            self.stores[quantity.number()]
                .write()
                .unwrap_or_else(PoisonError::into_inner)
                .insert(index, Arc::clone(&piece));
        }
        piece
    }
}

#[cfg(test)]
mod tests {
    use super::Cache;
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
        assert!(
            Arc::ptr_eq(&first[2], &cache.piece(NEPTUNE, 5)),
            "and piece 5"
        );
        assert!(!Arc::ptr_eq(&first[1], &first[2]), "pieces differ");
    }

    #[test]
    fn pieces_outside_the_covered_years_are_not_kept() {
        let cache = Cache::default();
        let kept = |cache: &Cache| cache.stores[NEPTUNE.number()].read().expect("lock").len();
        for index in [-2_000, -1_200, 1_200, i32::MAX] {
            cache.piece(NEPTUNE, index);
        }
        assert_eq!(kept(&cache), 0, "outside");
        cache.piece(NEPTUNE, -1_100);
        assert_eq!(kept(&cache), 1, "within");
    }
}
