//! The menu bar.

use egui::{Align, Button, MenuBar, Rect, Ui, UiBuilder, pos2, vec2};

use super::action::{ACTIONS, Action, Menu};
use super::command::{Command, Wishes};
use super::context::Context;
use super::text;
use super::theme::{MARGIN, Type};
use super::widgets::{self, colours};

/// Paints the menu bar: menus at the left, the scene's name at the right.
pub(super) fn bar(ui: &mut Ui, rect: Rect, context: &Context<'_>, wishes: &mut Wishes) {
    let c = colours(ui);
    widgets::ground(ui, c.panel);
    let inner = Rect::from_min_max(rect.min + vec2(7.0, 2.0), rect.max - vec2(7.0, 2.0));
    let mut child = ui.new_child(UiBuilder::new().max_rect(inner).id_salt("menus"));
    let end = MenuBar::new().ui(&mut child, |ui| {
        ui.spacing_mut().button_padding = vec2(9.0, 2.0);
        ui.spacing_mut().item_spacing.x = 2.0;
        let buttons = Menu::ALL.map(|menu| {
            ui.menu_button(menu.word(), |ui| entries(ui, menu, context, wishes))
                .response
                .rect
                .right()
        });
        buttons.into_iter().fold(0.0, f32::max)
    });
    scene_name(ui, rect, end.inner, context);
    widgets::hairline(
        ui,
        rect.left_bottom() - vec2(0.0, 1.0),
        rect.right_bottom() - vec2(0.0, 1.0),
    );
}

fn scene_name(ui: &Ui, rect: Rect, from: f32, context: &Context<'_>) {
    let c = colours(ui);
    let y = rect.center().y;
    let right = rect.right() - MARGIN;
    let words = if context.document.path.is_some() {
        "saved"
    } else {
        "no scene"
    };
    let state = text::put(
        ui.painter(),
        pos2(right, y),
        Align::RIGHT,
        words,
        Type::Caption,
        c.quiet,
    );
    let room = (state.left() - 12.0 - from - 24.0).max(0.0);
    let name = text::cut_middle(
        ui.painter(),
        &context.document.name(),
        Type::BodyStrong,
        room,
    );
    let at = pos2(state.left() - 12.0, y);
    text::put(
        ui.painter(),
        at,
        Align::RIGHT,
        &name,
        Type::BodyStrong,
        c.text,
    );
}

fn entries(ui: &mut Ui, menu: Menu, context: &Context<'_>, wishes: &mut Wishes) {
    ui.set_min_width(200.0);
    ui.spacing_mut().button_padding = vec2(8.0, 3.0);
    for action in ACTIONS.iter().filter(|a| a.menu == menu) {
        entry(ui, action, context, wishes);
    }
    if menu == Menu::Frame {
        ticks(ui, context, wishes);
    }
}

fn entry(ui: &mut Ui, action: &Action, context: &Context<'_>, wishes: &mut Wishes) {
    if action.divided {
        ui.separator();
    }
    let command = (action.command)();
    let chosen = match command {
        Command::Theme(theme) => ui.ctx().options(|o| o.theme_preference) == theme,
        _ => false,
    };
    let mut button = Button::selectable(chosen, action.words);
    if let Some(keys) = &action.keys {
        button = button.shortcut_text(ui.ctx().format_shortcut(keys));
    }
    if ui.add_enabled((action.enabled)(context), button).clicked() {
        wishes.push(command);
    }
}

/// Every frame the rail has a tick for.
fn ticks(ui: &mut Ui, context: &Context<'_>, wishes: &mut Wishes) {
    ui.separator();
    egui::ScrollArea::vertical()
        .max_height(360.0)
        .show(ui, |ui| {
            for (words, when) in super::rail::destinations(context) {
                let words = words.replace(super::rail::ACROSS, "across");
                if ui
                    .add(Button::selectable(false, format!("Go to {words}")))
                    .clicked()
                {
                    wishes.push(Command::Frame(when));
                }
            }
        });
}
