//! The line at the bottom: what is under the pointer, where it is, and whether all balances.

#![expect(
    clippy::cast_possible_truncation,
    clippy::cast_sign_loss,
    reason = "the screen is in f32 points and whole pixels"
)]

use egui::{Align, Pos2, Rect, Ui, pos2, vec2};

use super::canvas::Lie;
use super::command::{Command, Wishes};
use super::context::Context;
use super::facts;
use super::icon::{self, Icon};
use super::text;
use super::theme::{MARGIN, Type};
use super::widgets::{self, colours};
use crate::fault::ObjectId;
use crate::quantity::{Decimals, fixed, grouped, significant};
use crate::scene::View as Kind;

/// Paints the status line. `pointer` is where the pointer is on the screen, and how the paper lies.
pub(super) fn status(
    ui: &mut Ui,
    rect: Rect,
    pointer: Option<(Pos2, Lie)>,
    context: &Context<'_>,
    wishes: &mut Wishes,
) {
    let c = colours(ui);
    widgets::ground(ui, c.panel);
    widgets::hairline(ui, rect.left_top(), rect.right_top());
    let y = rect.center().y + 0.5;
    let balance = balance(context);
    let (words_ink, ink) = match (balance.alarm, balance.icon) {
        (true, _) => (c.fault, c.fault),
        (false, Some(Icon::Sound)) => (c.text, c.accent),
        (false, _) => (c.text, c.quiet),
    };
    let words = text::width(ui.painter(), &balance.words, Type::Body);
    let left = rect.right() - MARGIN - words;
    let hit = Rect::from_min_max(
        pos2(left - 26.0, rect.top() + 2.0),
        rect.right_bottom() - vec2(8.0, 2.0),
    );
    let response = widgets::press(ui, hit, &balance.words, balance.goes.is_some());
    if response.hovered() && balance.goes.is_some() {
        ui.painter().rect_filled(hit, 4, c.hover);
    }
    let at = pos2(left, y);
    text::put(
        ui.painter(),
        at,
        Align::LEFT,
        &balance.words,
        Type::Body,
        words_ink,
    );
    let mut end = left - 8.0;
    if let Some(icon) = balance.icon {
        icon::paint(ui.painter(), icon, pos2(left - 14.0, y), 16.0, ink);
        end = left - 30.0;
    }
    if response.clicked() {
        wishes.push(Command::Select(balance.goes));
    }
    let here = pointer.and_then(|(at, lie)| under(context, &lie, at));
    if let Some((frame, place)) = here {
        let wide = text::width(ui.painter(), &place, Type::Body);
        text::put(
            ui.painter(),
            pos2(end - 16.0, y),
            Align::RIGHT,
            &place,
            Type::Body,
            c.text,
        );
        let before = pos2(end - 16.0 - wide - 6.0, y);
        let label = text::put(
            ui.painter(),
            before,
            Align::RIGHT,
            &frame,
            Type::Caption,
            c.quiet,
        );
        divider(ui, rect, end - 4.0);
        end = label.left() - 8.0;
        divider(ui, rect, end - 4.0);
    } else {
        divider(ui, rect, end - 4.0);
    }
    said(ui, rect, y, end - 16.0, context);
}

fn divider(ui: &Ui, rect: Rect, x: f32) {
    widgets::hairline(
        ui,
        pos2(x.round(), rect.top() + 7.0),
        pos2(x.round(), rect.bottom() - 7.0),
    );
}

/// At the left: why a file did not open, else what is under the pointer or selected.
fn said(ui: &Ui, rect: Rect, y: f32, end: f32, context: &Context<'_>) {
    let c = colours(ui);
    let left = rect.left() + MARGIN;
    if let Some(refused) = &context.document.refused {
        icon::paint(
            ui.painter(),
            Icon::Fault,
            pos2(left + 8.0, y),
            16.0,
            c.fault,
        );
        let words = text::cut_end(ui.painter(), refused, Type::Body, end - left - 24.0);
        text::put(
            ui.painter(),
            pos2(left + 24.0, y),
            Align::LEFT,
            &words,
            Type::Body,
            c.fault,
        );
        return;
    }
    let object = context
        .view
        .hovered
        .as_ref()
        .or(context.view.selected.as_ref());
    let (head, rest) = match object {
        Some(object) => (
            object.to_string(),
            facts::coordinates(object, context).unwrap_or_default(),
        ),
        None if context.document.is_empty() => (
            String::new(),
            "Open a scene, or drop its file on this window.".to_owned(),
        ),
        None => (
            String::new(),
            "Click an object to select it, drag on bare paper to move the sheet.".to_owned(),
        ),
    };
    let mut x = left;
    if !head.is_empty() {
        let head = text::cut_end(ui.painter(), &head, Type::BodyStrong, end - left);
        let place = text::put(
            ui.painter(),
            pos2(x, y),
            Align::LEFT,
            &head,
            Type::BodyStrong,
            c.text,
        );
        x = place.right() + 12.0;
    }
    if end - x > 40.0 {
        let rest = text::cut_end(ui.painter(), &rest, Type::Body, end - x);
        text::put(
            ui.painter(),
            pos2(x, y),
            Align::LEFT,
            &rest,
            Type::Body,
            c.quiet,
        );
    }
}

/// Whether all is well, in words.
struct Balance {
    words: String,
    /// Said in the colour of faults.
    alarm: bool,
    /// A sign before it.
    icon: Option<Icon>,
    /// What a click goes to.
    goes: Option<ObjectId>,
}

fn balance(context: &Context<'_>) -> Balance {
    let faults = &context.shown.faults;
    if let Some(first) = faults.first() {
        let words = match faults.len() {
            1 => format!("1 finding: {}", first.object),
            count => format!("{count} findings, first {}", first.object),
        };
        let alarm = faults
            .iter()
            .any(|f| f.weight == crate::fault::Weight::Fault);
        return Balance {
            words,
            alarm,
            icon: Some(Icon::Fault),
            goes: Some(first.object.clone()),
        };
    }
    let Some(ledger) = &context.shown.ledger else {
        return Balance {
            words: String::new(),
            alarm: false,
            icon: None,
            goes: None,
        };
    };
    let off = ledger.collisions.iter().find(|c| !c.balanced);
    if let Some(collision) = off {
        let d = &collision.difference;
        let parts = [
            ("E", d.energy, ""),
            ("px", d.momentum[0], "/c"),
            ("py", d.momentum[1], "/c"),
        ];
        let worst = parts
            .into_iter()
            .max_by(|a, b| a.1.abs().total_cmp(&b.1.abs()));
        let (name, by, per) = worst.unwrap_or(("E", 0.0, ""));
        let by = grouped(&significant(by.abs(), 3));
        let words = format!(
            "{} does not balance: {name} off by {by} {}{per}",
            collision.name, ledger.units.energy
        );
        let goes = Some(ObjectId::new(
            crate::fault::Kind::Collision,
            &collision.name,
        ));
        return Balance {
            words,
            alarm: true,
            icon: Some(Icon::Fault),
            goes,
        };
    }
    let words = match ledger.collisions.len() {
        0 => "no collisions".to_owned(),
        1 => "1 collision, balanced".to_owned(),
        count => format!("{count} collisions, all balanced"),
    };
    let icon = (!ledger.collisions.is_empty()).then_some(Icon::Sound);
    Balance {
        words,
        alarm: false,
        icon,
        goes: None,
    }
}

/// Where the pointer is, in the frame of the panel under it.
fn under(context: &Context<'_>, lie: &Lie, pointer: Pos2) -> Option<(String, String)> {
    let mm = lie.mm(pointer);
    let panel = context
        .shown
        .panels()
        .iter()
        .find(|p| p.field.contains(mm))?;
    let at = panel.from_plane.inverse() * mm;
    if !at.x.is_finite() || !at.y.is_finite() {
        return None;
    }
    let units = &context.document.opened.solved.units;
    // As fine as a point of the screen.
    let grain = 1.0 / (panel.from_plane.determinant().abs().sqrt() * f64::from(lie.scale));
    let decimals = (-crate::num::log10(grain)).ceil().clamp(0.0, 9.0) as usize;
    let number = |value: f64| grouped(&fixed(value, Decimals(decimals)));
    let base = panel.viewing.name.as_deref() == Some(&*context.document.opened.solved.base);
    let prime = if base { "" } else { "′" };
    let frame = format!("in {}", context.panel_frame(&panel.viewing));
    let place = match panel.view {
        Kind::Spacetime => {
            let x = at.x * units.light_way;
            let (time, length) = (&units.time.symbol, &units.length.symbol);
            format!(
                "t{prime} {} {time}, x{prime} {} {length}",
                number(at.y),
                number(x)
            )
        }
        Kind::EnergyMomentum => {
            let energy = &units.energy.symbol;
            format!(
                "E{prime} {} {energy}, px{prime} {} {energy}/c",
                number(at.y),
                number(at.x)
            )
        }
    };
    Some((frame, place))
}
