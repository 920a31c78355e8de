//! Dated events in words.

use super::{Words, decimal};
use crate::plan::phenomena::{Event, Value};

impl Words {
    /// What an event means, in a visitor's words.
    pub fn event(&self, event: &Event) -> String {
        let name = event.kind.name().replace('_', "-").to_lowercase();
        let id = format!("phenomena-kind-{name}");
        self.text_with(&id, &[("body", self.body(event.body))])
    }

    /// A value with its unit.
    pub fn event_value(&self, value: Value) -> String {
        let places = match value {
            Value::Elongation(_) | Value::RingOpening(_) | Value::Magnitude(_) => 2,
            Value::LitAreaArcsec2(_) => 0,
            Value::SeparationArcsec(_) => 1,
            Value::DistanceAu(_) => 4,
        };
        let id = format!("phenomena-value-{}", value.unit());
        self.text_with(&id, &[("number", decimal(value.number(), places))])
    }
}
