//! The desk's actions: one table of words, keys and when they hold. Menus, shortcuts and the page of shortcuts read it.

use egui::{Key, KeyboardShortcut, Modifiers, ThemePreference};

use super::command::Command;
use super::context::Context;
use super::view::{Camera, Help};
use crate::scene::When;

/// The menus, left to right.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Menu {
    File,
    View,
    Frame,
    Help,
}

impl Menu {
    pub(super) const ALL: [Self; 4] = [Self::File, Self::View, Self::Frame, Self::Help];

    /// Its word.
    pub(super) fn word(self) -> &'static str {
        match self {
            Self::File => "File",
            Self::View => "View",
            Self::Frame => "Frame",
            Self::Help => "Help",
        }
    }
}

/// Something the desk can be told to do.
pub(super) struct Action {
    pub(super) menu: Menu,
    pub(super) words: &'static str,
    pub(super) keys: Option<KeyboardShortcut>,
    /// A line stands above it in its menu.
    pub(super) divided: bool,
    pub(super) enabled: fn(&Context<'_>) -> bool,
    pub(super) command: fn() -> Command,
}

const fn ctrl(key: Key) -> KeyboardShortcut {
    KeyboardShortcut::new(Modifiers::COMMAND, key)
}

fn always(_: &Context<'_>) -> bool {
    true
}

fn has_scene(context: &Context<'_>) -> bool {
    context.document.path.is_some()
}

fn is_off_base(context: &Context<'_>) -> bool {
    context.shown.when != When::Base && context.shown.rapidity() != 0.0
}

fn is_moved(context: &Context<'_>) -> bool {
    context.view.camera != Camera::Fit
}

const fn action(
    menu: Menu,
    words: &'static str,
    keys: Option<KeyboardShortcut>,
    command: fn() -> Command,
) -> Action {
    Action {
        menu,
        words,
        keys,
        divided: false,
        enabled: always,
        command,
    }
}

/// Every action.
pub(super) const ACTIONS: &[Action] = &[
    action(Menu::File, "Open…", Some(ctrl(Key::O)), || {
        Command::Choose
    }),
    Action {
        enabled: has_scene,
        ..action(Menu::File, "Close scene", Some(ctrl(Key::W)), || {
            Command::Close
        })
    },
    Action {
        divided: true,
        ..action(Menu::File, "Quit", Some(ctrl(Key::Q)), || Command::Quit)
    },
    Action {
        enabled: is_moved,
        ..action(Menu::View, "Fit plate", Some(ctrl(Key::Num0)), || {
            Command::Fit
        })
    },
    action(Menu::View, "True size", Some(ctrl(Key::Num1)), || {
        Command::TrueSize
    }),
    action(Menu::View, "Zoom in", Some(ctrl(Key::Plus)), || {
        Command::ZoomBy(1.25)
    }),
    action(Menu::View, "Zoom out", Some(ctrl(Key::Minus)), || {
        Command::ZoomBy(0.8)
    }),
    Action {
        divided: true,
        ..action(Menu::View, "Light", None, || {
            Command::Theme(ThemePreference::Light)
        })
    },
    action(Menu::View, "Dark", None, || {
        Command::Theme(ThemePreference::Dark)
    }),
    action(Menu::View, "As the system", None, || {
        Command::Theme(ThemePreference::System)
    }),
    Action {
        enabled: is_off_base,
        ..action(Menu::Frame, "Go to base", None, || {
            Command::Frame(When::Base)
        })
    },
    action(
        Menu::Help,
        "Shortcuts",
        Some(KeyboardShortcut::new(Modifiers::NONE, Key::Questionmark)),
        || Command::Help(Help::Shortcuts),
    ),
    action(Menu::Help, "Words used here", None, || {
        Command::Help(Help::Words)
    }),
    Action {
        divided: true,
        ..action(Menu::Help, "About Conewright", None, || {
            Command::Help(Help::About)
        })
    },
];

/// The commands whose keys were pressed. Keys without Ctrl are left to a field that is being typed in.
pub(super) fn pressed(ctx: &egui::Context, context: &Context<'_>) -> Vec<Command> {
    let typing = ctx.egui_wants_keyboard_input();
    ACTIONS
        .iter()
        .filter(|a| (a.enabled)(context))
        .filter(|a| {
            a.keys.is_some_and(|keys| {
                let free = !typing || keys.modifiers.command;
                free && ctx.input_mut(|i| hit(i, keys))
            })
        })
        .map(|a| (a.command)())
        .collect()
}

fn hit(input: &mut egui::InputState, keys: KeyboardShortcut) -> bool {
    // Plus is Shift + Equals on many keyboards.
    let plus = keys.logical_key == Key::Plus
        && input.consume_shortcut(&KeyboardShortcut::new(keys.modifiers, Key::Equals));
    plus || input.consume_shortcut(&keys)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn no_two_actions_share_keys_or_words() {
        for (i, a) in ACTIONS.iter().enumerate() {
            for b in &ACTIONS[i + 1..] {
                assert_ne!(a.words, b.words);
                assert!(
                    a.keys.is_none() || a.keys != b.keys,
                    "{} {}",
                    a.words,
                    b.words
                );
            }
        }
    }
}
