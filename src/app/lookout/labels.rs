//! Labels that give way to one another.

use eframe::egui::{Rect, Vec2, pos2};

/// Who gives way: of two labels that cannot both stand, the later rank is shifted or dropped.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
#[allow(missing_docs)]
pub enum Rank {
    Target,
    Moon,
    Planet,
    Hour,
    Obstacle,
    HalfHour,
    Star,
}

/// A label that wants a place.
#[derive(Clone, Debug, PartialEq)]
pub struct Wanted {
    /// Its rank.
    pub rank: Rank,
    /// How large it is.
    pub size: Vec2,
    /// The places of its upper left corner it could stand at, the best first.
    pub places: Vec<eframe::egui::Pos2>,
}

/// Free room around every label.
const ROOM: f32 = 3.0;

/// Gives every label a place: inside `bounds`, clear of every label placed before it, and clear
/// of `taken` (things drawn) where one of its places allows; only a target stands on things
/// drawn rather than not at all. `None`: dropped.
pub fn arrange(wanted: &[Wanted], bounds: Rect, taken: &[Rect]) -> Vec<Option<Rect>> {
    let mut order: Vec<usize> = (0..wanted.len()).collect();
    order.sort_by_key(|k| wanted[*k].rank);
    let mut places: Vec<Option<Rect>> = vec![None; wanted.len()];
    for k in order {
        let label = &wanted[k];
        let free = |rect: &Rect| {
            bounds.contains_rect(*rect)
                && places
                    .iter()
                    .flatten()
                    .all(|other| !other.expand(ROOM).intersects(*rect))
        };
        let candidates = || {
            label
                .places
                .iter()
                .map(|corner| Rect::from_min_size(*corner, label.size))
                .filter(free)
        };
        let clear = candidates().find(|rect| taken.iter().all(|thing| !thing.intersects(*rect)));
        places[k] = match label.rank {
            Rank::Target => clear.or_else(|| candidates().next()),
            _ => clear,
        };
    }
    places
}

/// Eight places around a point, `gap` away from it: beside it first, then above and below, then
/// the corners.
pub fn around(at: eframe::egui::Pos2, size: Vec2, gap: f32) -> Vec<eframe::egui::Pos2> {
    let (left, right) = (at.x - gap - size.x, at.x + gap);
    let (above, below) = (at.y - gap - size.y, at.y + gap);
    let (beside_y, middle_x) = (at.y - 0.5 * size.y, at.x - 0.5 * size.x);
    vec![
        pos2(right, beside_y),
        pos2(left, beside_y),
        pos2(middle_x, above),
        pos2(middle_x, below),
        pos2(right, above),
        pos2(left, above),
        pos2(right, below),
        pos2(left, below),
    ]
}

#[cfg(test)]
mod tests {
    use super::{Rank, Wanted, around, arrange};
    use eframe::egui::{Rect, pos2, vec2};

    fn label(rank: Rank, x: f32, y: f32) -> Wanted {
        let size = vec2(60.0, 14.0);
        Wanted {
            rank,
            size,
            places: around(pos2(x, y), size, 8.0),
        }
    }

    fn bounds() -> Rect {
        Rect::from_min_max(pos2(0.0, 0.0), pos2(300.0, 200.0))
    }

    #[test]
    fn the_lower_rank_is_shifted() {
        let wanted = [
            label(Rank::Star, 100.0, 100.0),
            label(Rank::Target, 104.0, 100.0),
        ];
        let placed = arrange(&wanted, bounds(), &[]);
        let (star, target) = (placed[0].expect("star"), placed[1].expect("target"));
        assert_eq!(
            target.min,
            pos2(112.0, 93.0),
            "the target has its first choice"
        );
        assert!(!star.intersects(target), "{star:?} {target:?}");
    }

    #[test]
    fn of_many_at_one_place_the_last_ranks_are_dropped_and_none_overlap() {
        let ranks = [
            Rank::Star,
            Rank::Obstacle,
            Rank::Moon,
            Rank::Planet,
            Rank::Target,
        ];
        let wanted: Vec<_> = (0..20).map(|k| label(ranks[k % 5], 150.0, 100.0)).collect();
        let placed = arrange(&wanted, bounds(), &[]);
        let standing: Vec<Rect> = placed.iter().flatten().copied().collect();
        for (k, a) in standing.iter().enumerate() {
            assert!(
                standing[k + 1..].iter().all(|b| !a.intersects(*b)),
                "{standing:?}"
            );
        }
        let count = |rank| {
            (0..20)
                .filter(|k| wanted[*k].rank == rank && placed[*k].is_some())
                .count()
        };
        assert_eq!(
            (count(Rank::Target), count(Rank::Star)),
            (2, 0),
            "beside it there is room for two: {placed:?}"
        );
    }

    #[test]
    fn only_the_target_stands_on_things_drawn() {
        let everywhere = [bounds()];
        let wanted = [
            label(Rank::Target, 100.0, 100.0),
            label(Rank::Moon, 200.0, 50.0),
        ];
        let placed = arrange(&wanted, bounds(), &everywhere);
        assert!(placed[0].is_some() && placed[1].is_none(), "{placed:?}");
    }

    #[test]
    fn no_label_leaves_the_bounds() {
        let wanted = [label(Rank::Moon, 299.0, 1.0)];
        let placed = arrange(&wanted, bounds(), &[])[0].expect("placed");
        assert!(bounds().contains_rect(placed), "{placed:?}");
    }
}
