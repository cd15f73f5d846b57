//! The ledger under the sheet: the numbers of the viewing frame, ready to be quoted.

mod columns;

use std::collections::BTreeMap;

use egui::{
    Align, Pos2, Rect, Response, Role, ScrollArea, Sense, Stroke, Ui, UiBuilder, WidgetInfo, pos2,
    vec2,
};

use super::command::{Command, Wishes};
use super::context::Context;
use super::icon::{self, Icon};
use super::text;
use super::theme::{MARGIN_SMALL, Type};
use super::view::TableKind;
use super::widgets::{self, colours};
use crate::fault::{Kind, ObjectId, Weight};
use crate::ledger::{CollisionRow, Row, Table};
use crate::quantity::grouped;
use columns::{Columns, head};

/// Height of a head row.
const HEAD: f32 = 22.0;
/// The two signs' meanings are left out below this width.
const SIGNS: f32 = 900.0;

/// Paints the ledger.
pub(super) fn ledger(
    ui: &mut Ui,
    rect: Rect,
    row: f32,
    context: &Context<'_>,
    wishes: &mut Wishes,
) {
    let c = colours(ui);
    widgets::ground(ui, c.panel);
    widgets::hairline(ui, rect.left_top(), rect.right_top());
    bar(ui, rect, context, wishes);
    let kind = context.view.table;
    let inner = Rect::from_min_max(
        rect.min + vec2(MARGIN_SMALL, 40.0),
        rect.max - vec2(MARGIN_SMALL, 2.0),
    );
    let table = context.shown.tables.iter().find(|t| t.name == kind.table());
    match table {
        Some(table) => numbers(ui, inner, row, table, context, wishes),
        None => none(ui, inner, kind, context),
    }
}

fn bar(ui: &mut Ui, rect: Rect, context: &Context<'_>, wishes: &mut Wishes) {
    let c = colours(ui);
    let top = rect.top() + 8.0;
    let items: Vec<(&str, bool)> = TableKind::ALL.iter().map(|k| (k.word(), true)).collect();
    let chosen = TableKind::ALL
        .iter()
        .position(|k| *k == context.view.table)
        .unwrap_or(0);
    let (pressed, end) =
        widgets::segment(ui, pos2(rect.left() + MARGIN_SMALL, top), &items, chosen);
    if let Some(i) = pressed {
        wishes.push(Command::Table(TableKind::ALL[i]));
    }
    if context.view.table != TableKind::Collisions || rect.width() < SIGNS.min(640.0) {
        return;
    }
    let y = top + 12.0;
    conserved(ui, pos2(end + 18.0, y), true);
    let at = pos2(end + 28.0, y);
    text::put(
        ui.painter(),
        at,
        Align::LEFT,
        "conserved",
        Type::Body,
        c.quiet,
    );
}

/// Two upright strokes, equal down a column; a slanted one through them where it is not so.
fn conserved(ui: &Ui, at: Pos2, equal: bool) {
    let c = colours(ui);
    let ink = if equal { c.accent } else { c.fault };
    for x in [-2.25, 2.25] {
        let stroke = Rect::from_center_size(pos2(at.x + x, at.y), vec2(1.5, 10.0));
        ui.painter().rect_filled(stroke, 0, ink);
    }
    if !equal {
        let ends = [pos2(at.x - 5.0, at.y + 5.0), pos2(at.x + 5.0, at.y - 5.0)];
        ui.painter().line_segment(ends, Stroke::new(1.5, ink));
    }
}

/// What stands where a kind has no rows.
fn none(ui: &Ui, rect: Rect, kind: TableKind, context: &Context<'_>) {
    let c = colours(ui);
    let word = kind.word().to_lowercase();
    let y = rect.top() + 34.0;
    let first = format!("No {word} yet.");
    text::put(
        ui.painter(),
        pos2(rect.left(), y),
        Align::LEFT,
        &first,
        Type::Body,
        c.text,
    );
    let second = match kind {
        TableKind::Events => {
            "Each event of the scene has a row of numbers here, as the viewing frame has it."
        }
        TableKind::Intervals => "Two events give an interval, the same for every observer.",
        TableKind::Collisions => {
            "A collision's sums before and after stand here next to each other."
        }
        TableKind::Particles => "Energy, momentum, mass and speed of each particle stand here.",
        TableKind::Lines => "Speed, rapidity and proper time of each line stand here.",
    };
    let second = if context.document.is_empty() || kind != TableKind::Events {
        second
    } else {
        "The scene has no event that could be found."
    };
    text::put(
        ui.painter(),
        pos2(rect.left(), y + 22.0),
        Align::LEFT,
        second,
        Type::Body,
        c.quiet,
    );
}

fn numbers(
    ui: &mut Ui,
    rect: Rect,
    height: f32,
    table: &Table,
    context: &Context<'_>,
    wishes: &mut Wishes,
) {
    let lost = lost(table, context);
    let columns = Columns::new(table, rect.width(), |words, strong| {
        text::width(
            ui.painter(),
            words,
            if strong { Type::BodyStrong } else { Type::Body },
        )
    });
    heads(ui, rect, table, &columns, context);
    let below = Rect::from_min_max(
        pos2(rect.left() - 8.0, rect.top() + 2.0 * HEAD),
        rect.max + vec2(8.0, 0.0),
    );
    let mut child = ui.new_child(UiBuilder::new().max_rect(below).id_salt("rows"));
    child.shrink_clip_rect(below);
    child.spacing_mut().item_spacing.y = 0.0;
    let collisions = collisions(table, context);
    let all = table.rows.len() + lost.len();
    ScrollArea::both()
        .auto_shrink(false)
        .show_rows(&mut child, height, all, |ui, visible| {
            for i in visible {
                let Some(row) = table.rows.get(i) else {
                    if let Some(object) = lost.get(i - table.rows.len()) {
                        faulty(ui, height, object, context, wishes);
                    }
                    continue;
                };
                let response = line(ui, height, row, &columns, context, wishes);
                let place = response.rect;
                if row.is_sum {
                    explain(&response, row, table);
                }
                signs(ui, table, i, place, &columns, &collisions);
            }
        });
}

/// The collisions of the ledger by name, for the table of their sums.
fn collisions<'a>(table: &Table, context: &Context<'a>) -> BTreeMap<&'a str, &'a CollisionRow> {
    let ledger = context.shown.ledger.as_ref();
    let rows = ledger.filter(|_| table.name == "collisions");
    rows.into_iter()
        .flat_map(|ledger| &ledger.collisions)
        .map(|collision| (collision.name.as_str(), collision))
        .collect()
}

/// Objects of a table's kind that have no numbers.
fn lost(table: &Table, context: &Context<'_>) -> Vec<ObjectId> {
    let kind = match table.name {
        "events" => Kind::Event,
        "lines" => Kind::Line,
        "particles" => Kind::Particle,
        "collisions" => Kind::Collision,
        _ => return Vec::new(),
    };
    let left_out = context.document.opened.solved.left_out.iter();
    left_out.filter(|o| o.kind == kind).cloned().collect()
}

/// Frame name over its columns under a bar, then the columns' heads, then a rule.
fn heads(ui: &Ui, rect: Rect, table: &Table, columns: &Columns, context: &Context<'_>) {
    let c = colours(ui);
    let painter = ui.painter().with_clip_rect(rect.expand2(vec2(8.0, 6.0)));
    let (from, to) = (
        rect.left() + columns.numbers_from(),
        rect.left() + columns.end(),
    );
    let top = rect.top() + 1.0;
    painter.rect_filled(
        Rect::from_min_max(pos2(from, top - 2.0), pos2(to, top)),
        0,
        c.accent,
    );
    let y = rect.top() + HEAD / 2.0 + 1.0;
    let name = context.frame_name();
    let name = text::put(
        &painter,
        pos2(to, y),
        Align::RIGHT,
        &name,
        Type::BodyStrong,
        c.text,
    );
    let is_base = context
        .shown
        .ledger
        .as_ref()
        .and_then(|l| l.frame.name.as_deref())
        == Some(&*context.document.opened.solved.base);
    let part = if is_base {
        "base frame"
    } else {
        "viewing frame"
    };
    text::put(
        &painter,
        pos2(name.left() - 8.0, y),
        Align::RIGHT,
        part,
        Type::Caption,
        c.quiet,
    );
    let y = rect.top() + HEAD * 1.5;
    for (column, place) in table.columns.iter().zip(&columns.places) {
        let (align, x) = match place.align {
            crate::ledger::Align::Left => (Align::LEFT, place.left),
            crate::ledger::Align::Right => (Align::RIGHT, place.right),
        };
        let words = head(column);
        text::put(
            &painter,
            pos2(rect.left() + x, y),
            align,
            &words,
            Type::Caption,
            c.quiet,
        );
    }
    let rule = rect.top() + 2.0 * HEAD - 0.5;
    painter.line_segment(
        [pos2(rect.left(), rule), pos2(rect.right(), rule)],
        Stroke::new(1.0, c.rule),
    );
}

fn line(
    ui: &mut Ui,
    height: f32,
    row: &Row,
    columns: &Columns,
    context: &Context<'_>,
    wishes: &mut Wishes,
) -> Response {
    let c = colours(ui);
    let width = ui.available_width().max(columns.end() + 16.0);
    let (rect, response) = ui.allocate_exact_size(vec2(width, height), Sense::click());
    let words: Vec<&str> = row.cells.iter().map(|c| c.text.as_str()).collect();
    response.widget_info(|| WidgetInfo::labeled(Role::Row, true, words.join(" ").trim()));
    let selected = row.object.is_some() && row.object == context.view.selected;
    let hovered = row.object.is_some() && row.object == context.view.hovered;
    if selected {
        widgets::selected_row(ui, rect);
    } else if response.hovered() || hovered {
        ui.painter().rect_filled(rect, 4, c.hover);
    }
    let left = rect.left() + 8.0;
    if row.rule_above {
        let y = rect.top() - 0.5;
        let ends = [
            pos2(left, y),
            pos2(left + columns.end().max(width - 16.0), y),
        ];
        ui.painter().line_segment(ends, Stroke::new(1.0, c.rule));
    }
    for (i, (cell, place)) in row.cells.iter().zip(&columns.places).enumerate() {
        let tag = i == 0 && columns.words > 1 && !row.is_sum;
        let strong = row.is_sum || (selected && i + 1 == columns.words);
        let (set, ink) = if tag {
            (Type::Body, c.quiet)
        } else {
            (Type::body(strong), c.text)
        };
        match place.align {
            crate::ledger::Align::Left => {
                let cut = text::cut_end(ui.painter(), &cell.text, set, place.right - place.left);
                let at = pos2(left + place.left, rect.center().y);
                text::put(ui.painter(), at, Align::LEFT, &cut, set, ink);
            }
            crate::ledger::Align::Right => {
                let at = pos2(left + place.right, rect.center().y);
                text::put(
                    ui.painter(),
                    at,
                    Align::RIGHT,
                    &grouped(&cell.text),
                    set,
                    ink,
                );
            }
        }
    }
    widgets::focus_ring(ui, &response, rect.shrink(3.0));
    if let (true, Some(object)) = (response.clicked(), &row.object) {
        wishes.push(Command::Select(Some(object.clone())));
    }
    if response.hovered() && row.object.is_some() && row.object != context.view.hovered {
        wishes.push(Command::Hover(row.object.clone()));
    }
    response
}

/// What the sums of a collision say, when the pointer rests on one.
fn explain(response: &Response, row: &Row, table: &Table) {
    let Some(object) = &row.object else { return };
    let head = format!("{}: ", object.name);
    let notes: Vec<String> = table
        .notes
        .iter()
        .filter_map(|note| note.strip_prefix(&head))
        .map(super::findings::capital)
        .collect();
    if !notes.is_empty() {
        response.clone().on_hover_text(notes.join("\n"));
    }
}

/// Between the two sums: what is the same before and after, as the ledger judges it.
fn signs(
    ui: &Ui,
    table: &Table,
    row: usize,
    place: Rect,
    columns: &Columns,
    collisions: &BTreeMap<&str, &CollisionRow>,
) {
    if collisions.is_empty() || row == 0 {
        return;
    }
    let (before, after) = (&table.rows[row - 1], &table.rows[row]);
    if !(before.is_sum && after.is_sum && before.rule_above) || before.object != after.object {
        return;
    }
    let name = before.object.as_ref().map(|o| &*o.name);
    let Some(collision) = name.and_then(|name| collisions.get(name)) else {
        return;
    };
    let kept = |off: f64| collision.balanced || off.abs() <= collision.tolerance;
    for (column, at) in table.columns.iter().zip(&columns.places) {
        let equal = match column.head.as_str() {
            "E" => kept(collision.difference.energy),
            "px" => kept(collision.difference.momentum[0]),
            "py" => kept(collision.difference.momentum[1]),
            // The mass of the sum is kept when E, px and py are; the sum of the masses need not be.
            "mass of sum" => collision.balanced,
            _ => continue,
        };
        let x = place.left() + 8.0 + at.right + 9.0;
        conserved(ui, pos2(x, place.top()), equal);
    }
}

/// A row without numbers: its name, and one sentence.
fn faulty(ui: &mut Ui, height: f32, object: &ObjectId, context: &Context<'_>, wishes: &mut Wishes) {
    let c = colours(ui);
    let (rect, response) =
        ui.allocate_exact_size(vec2(ui.available_width(), height), Sense::click());
    let root = context
        .shown
        .faults_of(object)
        .find(|f| f.weight == Weight::Fault);
    let words = match root {
        Some(fault) => super::findings::capital(&fault.what),
        None => "hangs on something that is to be mended first".to_owned(),
    };
    response
        .widget_info(|| WidgetInfo::labeled(Role::Row, true, format!("{} {words}", object.name)));
    if context.view.selected.as_ref() == Some(object) {
        widgets::selected_row(ui, rect);
    } else if response.hovered() {
        ui.painter().rect_filled(rect, 4, c.hover);
    }
    let y = rect.center().y;
    let ink = if root.is_some() { c.fault } else { c.quiet };
    let at = pos2(rect.left() + 8.0, y);
    let name = text::put(
        ui.painter(),
        at,
        Align::LEFT,
        &object.name,
        Type::BodyStrong,
        ink,
    );
    icon::paint(
        ui.painter(),
        Icon::Fault,
        pos2(name.right() + 18.0, y),
        15.0,
        ink,
    );
    let room = rect.right() - name.right() - 44.0;
    let words = text::cut_end(ui.painter(), &words, Type::Body, room);
    text::put(
        ui.painter(),
        pos2(name.right() + 34.0, y),
        Align::LEFT,
        &words,
        Type::Body,
        ink,
    );
    if response.clicked() {
        wishes.push(Command::Select(Some(object.clone())));
    }
}
