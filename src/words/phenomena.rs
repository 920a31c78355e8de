//! Dated events in words.

use super::{Words, decimal};
use crate::plan::phenomena::{Event, Target, Value};
use crate::sky::Body;

impl Words {
    /// What an event means, in a visitor's words.
    pub fn event(&self, event: &Event) -> String {
        let name = event.kind.name().replace('_', "-").to_lowercase();
        let id = format!("phenomena-kind-{name}");
        let other = match event.other {
            None => String::new(),
            Some(Target::Body(body)) => self.body_in_sentence(body),
            Some(Target::Star(star)) => star.to_string(),
        };
        let body = match event.body {
            Body::Moon => self.text("the-moon-first"),
            planet => self.body(planet),
        };
        self.text_with(&id, &[("body", body), ("other", other)])
    }

    /// A value with its unit.
    pub fn event_value(&self, value: Value) -> String {
        let places = match value {
            Value::Elongation(_) | Value::RingOpening(_) | Value::Magnitude(_) => 2,
            Value::LitAreaArcsec2(_) => 0,
            Value::SeparationArcsec(_) | Value::SeparationArcmin(_) => 1,
            Value::DistanceAu(_) => 4,
        };
        let id = format!("phenomena-value-{}", value.unit());
        self.text_with(&id, &[("number", decimal(value.number(), places))])
    }
}
