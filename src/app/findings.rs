//! What is to be mended, at the foot of the list.

use egui::{Align, Rect, Role, ScrollArea, Sense, Ui, UiBuilder, WidgetInfo, pos2, vec2};

use super::command::{Command, Wishes};
use super::context::Context;
use super::icon::{self, Icon};
use super::text;
use super::theme::{MARGIN_SMALL, Type};
use super::widgets::{self, colours};
use crate::fault::{Fault, Weight};

/// They take at least this much height.
const LEAST: f32 = 84.0;
/// Room is made for this many.
const LISTED: usize = 4;

/// The sentence of a fault and what would mend it.
fn sentence(fault: &Fault) -> String {
    let what = capital(&fault.what);
    if fault.mend.is_empty() {
        format!("{what}.")
    } else {
        format!("{what}. Mend: {}.", fault.mend)
    }
}

/// With a capital letter.
pub(super) fn capital(words: &str) -> String {
    let mut letters = words.chars();
    letters.next().map_or_else(String::new, |first| {
        first.to_uppercase().chain(letters).collect()
    })
}

const INDENT: f32 = 34.0;

fn text_height(ui: &Ui, words: &str, room: f32) -> f32 {
    let galley = ui.painter().layout(
        words.to_owned(),
        Type::Caption.font(),
        egui::Color32::PLACEHOLDER,
        room,
    );
    galley.size().y
}

/// The height they take of a column.
pub(super) fn height(ui: &Ui, rect: Rect, context: &Context<'_>) -> f32 {
    let room = rect.width() - INDENT - MARGIN_SMALL;
    let listed: f32 = context
        .shown
        .faults
        .iter()
        .take(LISTED)
        .map(|f| text_height(ui, &sentence(f), room) + 24.0)
        .sum();
    (listed + 36.0).max(LEAST).min(rect.height() / 2.0)
}

/// Paints them.
pub(super) fn findings(ui: &mut Ui, rect: Rect, context: &Context<'_>, wishes: &mut Wishes) {
    let c = colours(ui);
    let faults = &context.shown.faults;
    let y = rect.top() + 18.0;
    let left = rect.left() + 14.0;
    text::put(
        ui.painter(),
        pos2(left, y),
        Align::LEFT,
        "Findings",
        Type::BodyStrong,
        c.text,
    );
    let count = pos2(rect.right() - 14.0, y);
    text::put(
        ui.painter(),
        count,
        Align::RIGHT,
        &faults.len().to_string(),
        Type::Caption,
        c.quiet,
    );
    let inner = Rect::from_min_max(pos2(rect.left(), y + 14.0), rect.max - vec2(0.0, 4.0));
    let mut child = ui.new_child(UiBuilder::new().max_rect(inner).id_salt("found"));
    child.shrink_clip_rect(inner);
    if faults.is_empty() {
        sound(&child, inner, context);
        return;
    }
    ScrollArea::vertical()
        .auto_shrink(false)
        .show(&mut child, |ui| {
            ui.spacing_mut().item_spacing.y = 2.0;
            for (i, fault) in faults.iter().enumerate() {
                finding(ui, i, fault, wishes);
            }
        });
}

fn sound(ui: &Ui, rect: Rect, context: &Context<'_>) {
    let c = colours(ui);
    let y = rect.top() + 8.0;
    icon::paint(
        ui.painter(),
        Icon::Sound,
        pos2(rect.left() + 20.0, y),
        15.0,
        c.accent,
    );
    let at = pos2(rect.left() + INDENT, y);
    text::put(
        ui.painter(),
        at,
        Align::LEFT,
        "Nothing to mend",
        Type::Caption,
        c.text,
    );
    let words = if context.document.is_empty() {
        "Faults will be listed here."
    } else {
        match context
            .shown
            .ledger
            .as_ref()
            .map_or(0, |l| l.collisions.len())
        {
            0 => "no collisions to balance",
            1 => "the collision balances",
            _ => "all collisions balance",
        }
    };
    let at = pos2(rect.left() + INDENT, y + 18.0);
    text::put(ui.painter(), at, Align::LEFT, words, Type::Caption, c.quiet);
}

fn finding(ui: &mut Ui, index: usize, fault: &Fault, wishes: &mut Wishes) {
    let c = colours(ui);
    let room = ui.available_width() - INDENT - MARGIN_SMALL;
    let words = sentence(fault);
    let height = text_height(ui, &words, room) + 22.0;
    let (rect, _) = ui.allocate_exact_size(vec2(ui.available_width(), height), Sense::hover());
    let response = ui.interact(rect, ui.scope_id().with(("finding", index)), Sense::click());
    let name = format!("finding: {}: {words}", fault.object);
    response.widget_info(|| WidgetInfo::labeled(Role::Button, true, &name));
    if response.hovered() {
        ui.painter()
            .rect_filled(rect.shrink2(vec2(4.0, 0.0)), 4, c.hover);
    }
    let ink = match fault.weight {
        Weight::Fault => c.fault,
        Weight::Finding | Weight::Remark => c.quiet,
    };
    let y = rect.top() + 10.0;
    icon::paint(
        ui.painter(),
        Icon::Fault,
        pos2(rect.left() + 20.0, y),
        15.0,
        ink,
    );
    let head = text::cut_end(ui.painter(), &fault.object.to_string(), Type::Caption, room);
    text::put(
        ui.painter(),
        pos2(rect.left() + INDENT, y),
        Align::LEFT,
        &head,
        Type::Caption,
        ink,
    );
    let at = pos2(rect.left() + INDENT, rect.top() + 18.0);
    text::wrapped(ui.painter(), at, room, &words, Type::Caption, c.quiet);
    widgets::focus_ring(ui, &response, rect.shrink(3.0));
    let place = fault
        .place
        .map(|p| format!("line {}, column {}", p.line, p.column));
    let response = match place {
        Some(place) => response.on_hover_text(place),
        None => response,
    };
    if response.clicked() {
        wishes.push(Command::Select(Some(fault.object.clone())));
    }
}
