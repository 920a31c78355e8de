//! Everything a person reads: wording (Project Fluent), numbers and times.
//!
//! Messages stand in `assets/words/en/*.ftl`. Numbers and times are turned into text in
//! [`number`] and [`time`] and handed to messages as text, so that they look alike everywhere.

mod daylight;
mod grounds;
mod night;
mod number;
mod phenomena;
mod terrain;
mod time;

pub use fluent_bundle::FluentValue;
pub use night::{HalfNight, spoken_cause};
pub use number::decimal;
pub use time::CivilClock;

use fluent_bundle::concurrent::FluentBundle;
use fluent_bundle::{FluentArgs, FluentResource};
use unic_langid::LanguageIdentifier;

/// The files of the English wording.
const ENGLISH: [&str; 11] = [
    include_str!("../../assets/words/en/core.ftl"),
    include_str!("../../assets/words/en/night.ftl"),
    include_str!("../../assets/words/en/cli.ftl"),
    include_str!("../../assets/words/en/window.ftl"),
    include_str!("../../assets/words/en/lookout.ftl"),
    include_str!("../../assets/words/en/daylight.ftl"),
    include_str!("../../assets/words/en/phenomena.ftl"),
    include_str!("../../assets/words/en/grounds.ftl"),
    include_str!("../../assets/words/en/measure.ftl"),
    include_str!("../../assets/words/en/plan.ftl"),
    include_str!("../../assets/words/en/spots.ftl"),
];

/// The wording of one language.
pub struct Words {
    bundle: FluentBundle<FluentResource>,
}

impl Words {
    /// The English wording.
    pub fn english() -> Self {
        let english = match "en".parse::<LanguageIdentifier>() {
            Ok(english) => english,
            Err(error) => unreachable!("\"en\" names English: {error}"),
        };
        let mut bundle = FluentBundle::new_concurrent(vec![english]);
        // The marks that keep directions of writing apart show as boxes in some fonts.
        bundle.set_use_isolating(false);
        for text in ENGLISH {
            let resource = match FluentResource::try_new(text.to_owned()) {
                Ok(resource) => resource,
                Err((_, errors)) => unreachable!("the shipped wording is well formed: {errors:?}"),
            };
            if let Err(errors) = bundle.add_resource(resource) {
                unreachable!("each message of the shipped wording stands once: {errors:?}");
            }
        }
        Self { bundle }
    }

    /// A message that takes no arguments.
    pub fn text(&self, id: &str) -> String {
        self.text_with::<&str>(id, &[])
    }

    /// A message with its arguments by name. An id that does not exist gives itself in angle
    /// quotes; a test walks the sources for such ids.
    pub fn text_with<'a, V>(&'a self, id: &str, arguments: &[(&'a str, V)]) -> String
    where
        V: Clone + Into<FluentValue<'a>>,
    {
        let Some(pattern) = self
            .bundle
            .get_message(id)
            .and_then(|message| message.value())
        else {
            return format!("«{id}»");
        };
        let arguments: FluentArgs<'_> = arguments
            .iter()
            .map(|(name, value)| (*name, value.clone().into()))
            .collect();
        let mut errors = Vec::new();
        let text = self
            .bundle
            .format_pattern(pattern, Some(&arguments), &mut errors);
        debug_assert!(errors.is_empty(), "the message {id} lacks: {errors:?}");
        text.into_owned()
    }

    /// Whether a message exists.
    pub fn has(&self, id: &str) -> bool {
        self.bundle.has_message(id)
    }
}

impl std::fmt::Debug for Words {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        f.debug_struct("Words")
            .field("locales", &self.bundle.locales)
            .finish()
    }
}

#[cfg(test)]
mod tests {
    use super::{ENGLISH, Words};
    use std::path::Path;

    fn sources(folder: &Path, text: &mut String) {
        for entry in std::fs::read_dir(folder).expect("a source folder") {
            let path = entry.expect("a folder entry").path();
            if path.is_dir() {
                sources(&path, text);
            } else if path.extension().is_some_and(|extension| extension == "rs")
                && !path.ends_with("words/mod.rs")
            {
                text.push_str(&std::fs::read_to_string(path).expect("a source file"));
            }
        }
    }

    #[test]
    fn every_id_that_the_sources_name_exists() {
        let words = Words::english();
        let mut text = String::new();
        sources(
            &Path::new(env!("CARGO_MANIFEST_DIR")).join("src"),
            &mut text,
        );
        let mut named = 0;
        for call in [".text(", ".text_with(", ".text_with::<&str>("] {
            for rest in text.split(call).skip(1) {
                let Some(id) = rest
                    .trim_start()
                    .strip_prefix('"')
                    .and_then(|r| r.split('"').next())
                else {
                    continue; // the id is worked out: the callers' own tests see those
                };
                named += 1;
                assert!(words.has(id), "no message is called {id}");
            }
        }
        assert!(
            named >= 10,
            "only {named} ids were found: does this still see the sources?"
        );
    }

    #[test]
    fn every_message_is_named_in_the_sources() {
        let mut text = String::new();
        sources(
            &Path::new(env!("CARGO_MANIFEST_DIR")).join("src"),
            &mut text,
        );
        // These are worked out from a number or a name.
        let made = [
            "body-",
            "compass-",
            "weekday-",
            "month-",
            "cli-about-",
            "cli-arg-",
            "cli-more-",
            "phenomena-kind-",
            "phenomena-value-",
            "contact-",
        ];
        for file in ENGLISH {
            for line in file.lines() {
                let Some((id, _)) = line.split_once(" =") else {
                    continue;
                };
                let is_id = id.chars().all(|c| c.is_ascii_alphanumeric() || c == '-');
                if !is_id || made.iter().any(|start| id.starts_with(start)) {
                    continue;
                }
                let stem = id.strip_suffix("-hint").unwrap_or(id);
                assert!(text.contains(&format!("\"{stem}")), "nothing says {id}");
            }
        }
    }
}
