//! Fitted spans for rows that come in any order of dates.

use crate::measure::Tt;
use crate::sky::{Body, Ephemeris, OutsideEphemeris, Span};
use std::collections::HashMap;

/// Spans of [`Spans::DAYS`] for one body and the Moon each, kept while rows ask for them again.
#[derive(Default)]
pub(super) struct Spans {
    ephemeris: Ephemeris,
    kept: HashMap<(i32, Body), Span>,
}

impl Spans {
    /// As long as most of the ephemeris's own pieces.
    const DAYS: f64 = 64.0;
    /// This bounds the memory: where more are asked for, all are forgotten first.
    const MOST: usize = 2000;

    /// A span around an instant that holds a body and the Moon.
    pub fn covering(&mut self, tt: Tt, body: Body) -> Result<&Span, OutsideEphemeris> {
        let number = (tt.days_since_j2000() / Self::DAYS).floor();
        let key = (number as i32, body);
        if !self.kept.contains_key(&key) {
            let from = Tt::from_days_since_j2000(number * Self::DAYS);
            let to = from.plus_days(Self::DAYS);
            let span = self.ephemeris.cover(from, to, &[body, Body::Moon])?;
            if self.kept.len() >= Self::MOST {
                self.kept.clear();
            }
            self.kept.insert(key, span);
        }
        Ok(&self.kept[&key])
    }
}
