//! stand-in until the words layer is here
use fluent_bundle::{FluentArgs, FluentBundle, FluentResource};
pub struct Words { bundle: FluentBundle<FluentResource> }
impl Words {
    pub fn new() -> Self {
        let mut bundle = FluentBundle::new(vec!["en".parse().expect("en")]);
        bundle.set_use_isolating(false);
        let resource = FluentResource::try_new(include_str!("../../assets/words/en/window.ftl").to_owned()).expect("ftl");
        bundle.add_resource(resource).expect("twice");
        Self { bundle }
    }
    pub fn text(&self, id: &str) -> String { self.text_with(id, &[]) }
    pub fn text_with(&self, id: &str, args: &[(&str, &str)]) -> String {
        let mut fluent = FluentArgs::new();
        for (name, value) in args { fluent.set(*name, *value); }
        let Some(pattern) = self.bundle.get_message(id).and_then(|m| m.value()) else { return format!("«{id}»") };
        let mut errors = vec![];
        self.bundle.format_pattern(pattern, Some(&fluent), &mut errors).into_owned()
    }
}
