//! Keys, taken before the window library uses them to move the focus.

use super::command::{self, Command, Commands};
use super::grounds::plan_keys;
use eframe::egui::{self, Context, Event, Key, Modifiers, RawInput};
use std::sync::Arc;
use std::sync::atomic::{AtomicBool, Ordering};
use std::sync::mpsc::Sender;

/// Takes the keys of [`command::keys`] out of the input, unless text is being written, a list
/// is open, or a dialog has them blocked.
pub struct TakeKeys {
    /// Where the commands go.
    pub commands: Sender<Command>,
    /// Set while a dialog is open.
    pub is_blocked: Arc<AtomicBool>,
}

impl egui::Plugin for TakeKeys {
    fn debug_name(&self) -> &'static str {
        "keys"
    }

    fn input_hook(&mut self, ctx: &Context, input: &mut RawInput) {
        if self.is_blocked.load(Ordering::Relaxed)
            || ctx.text_edit_focused()
            || egui::Popup::is_any_open(ctx)
        {
            return;
        }
        let focused = ctx.memory(|memory| memory.focused());
        let (has_focus, is_plan) = (focused.is_some(), focused == Some(plan_keys::id()));
        let mut taken = Commands::new();
        input.events.retain(|event| match event {
            Event::Key {
                key,
                pressed: true,
                modifiers,
                ..
            } => match command_for(*key, *modifiers, has_focus)
                // The plan of the site moves things by the arrows while it has the focus.
                .filter(|_| !(is_plan && plan_keys::is_used(*key, *modifiers)))
            {
                Some(command) => {
                    taken.push(command);
                    false
                }
                None => true,
            },
            _ => true,
        });
        for command in taken {
            // The window that receives them lives as long as the context.
            let _ = self.commands.send(command);
        }
    }
}

/// What a key does. Space presses a control that has the focus, and then does nothing else.
fn command_for(key: Key, modifiers: Modifiers, has_focus: bool) -> Option<Command> {
    if key == Key::Space && has_focus {
        return None;
    }
    command::keys()
        .into_iter()
        .find(|(shortcut, _)| {
            shortcut.logical_key == key && modifiers.matches_exact(shortcut.modifiers)
        })
        .map(|(_, command)| command)
}
