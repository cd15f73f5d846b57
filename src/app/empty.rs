//! The sheet's region while there is no scene.

use egui::{Align, Rect, Ui, pos2, vec2};

use super::action::ACTIONS;
use super::command::{Command, Wishes};
use super::icon::{self, Icon};
use super::text;
use super::theme::Type;
use super::widgets::{self, colours};

const WIDTH: f32 = 400.0;

/// Paints the page.
pub(super) fn page(ui: &mut Ui, rect: Rect, wishes: &mut Wishes) {
    let c = colours(ui);
    widgets::ground(ui, c.ground);
    let left = (rect.center().x - WIDTH / 2.0).round();
    let top = (rect.center().y - 90.0).round();
    text::put(
        ui.painter(),
        pos2(left, top),
        Align::LEFT,
        "An empty scene",
        Type::Title,
        c.text,
    );
    let words = "Open a scene to see it from any frame, or drop its file here.";
    text::wrapped(
        ui.painter(),
        pos2(left, top + 24.0),
        300.0,
        words,
        Type::Body,
        c.text,
    );
    let row = Rect::from_min_size(pos2(left, top + 84.0), vec2(WIDTH, 48.0));
    let response = widgets::press(ui, row, "Open a scene", true);
    widgets::frame(ui, row, widgets::state_fill(&response, c), c.edge, 1.0);
    icon::paint(
        ui.painter(),
        Icon::Open,
        pos2(row.left() + 24.0, row.center().y),
        20.0,
        c.text,
    );
    let x = row.left() + 46.0;
    text::put(
        ui.painter(),
        pos2(x, row.top() + 16.0),
        Align::LEFT,
        "Open a scene",
        Type::BodyStrong,
        c.text,
    );
    let hint = "or drop a scene file on this window";
    text::put(
        ui.painter(),
        pos2(x, row.top() + 33.0),
        Align::LEFT,
        hint,
        Type::Caption,
        c.quiet,
    );
    let keys = ACTIONS
        .iter()
        .find(|a| (a.command)() == Command::Choose)
        .and_then(|a| a.keys);
    if let Some(keys) = keys {
        let words = ui.ctx().format_shortcut(&keys);
        let at = pos2(row.right() - 14.0, row.top() + 16.0);
        text::put(
            ui.painter(),
            at,
            Align::RIGHT,
            &words,
            Type::Caption,
            c.quiet,
        );
    }
    widgets::focus_ring(ui, &response, row);
    if response.clicked() {
        wishes.push(Command::Choose);
    }
}
