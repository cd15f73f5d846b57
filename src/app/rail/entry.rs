//! The rail's first row: which frame, and its rapidity in four forms.

use egui::{Align, Area, Frame, Id, Order, Rect, Ui, pos2, vec2};

use super::layout::ACROSS;
use super::{Entry, Layout, ROW, RailCommand, at_rapidity};
use crate::app::command::{Command, Wishes};
use crate::app::context::Context;
use crate::app::text;
use crate::app::theme::{CONTROL, MARGIN, Type, WIDE};
use crate::app::widgets::{self, Entered, colours};
use crate::quantity::{Decimals, fixed, grouped, shortest, significant};
use crate::scene::When;
use crate::task::{SpeedForm, Speeds, rapidity_from, speeds};

/// The narrowest window in which the row says what it is.
const LABELLED: f32 = 1000.0;
/// The narrowest window in which it says from where the frame is seen.
const SEEN: f32 = 1180.0;
/// Width of the chooser of frames.
const CHOOSER: f32 = 136.0;

const FORMS: [(SpeedForm, &str); 4] = [
    (SpeedForm::Beta, "β"),
    (SpeedForm::Gamma, "γ"),
    (SpeedForm::Rapidity, "rapidity"),
    (SpeedForm::Doppler, "k"),
];

/// Paints the row and reads it.
pub(super) fn row(ui: &mut Ui, layout: &Layout, context: &Context<'_>, wishes: &mut Wishes) {
    let c = colours(ui);
    let wide = layout.rect.width() >= WIDE;
    let gap = if wide { 20.0 } else { 12.0 };
    let y = layout.rect.top() + ROW;
    let mut x = layout.rect.left() + MARGIN;
    // In a narrow window the words give way before the numbers do.
    if layout.rect.width() >= LABELLED {
        let at = pos2(x, y);
        let label = text::put(
            ui.painter(),
            at,
            Align::LEFT,
            "Viewing frame",
            Type::Body,
            c.quiet,
        );
        x = (label.right() + 10.0).round();
    }
    let rect = Rect::from_min_size(pos2(x, y - CONTROL / 2.0), vec2(CHOOSER, CONTROL));
    frames(ui, rect, layout, context, wishes);
    x = rect.right() + gap;
    if layout.rect.width() >= SEEN {
        let at = pos2(rect.right() + 8.0, y);
        let words = text::cut_end(ui.painter(), &seen_from(context), Type::Body, 220.0);
        let place = text::put(ui.painter(), at, Align::LEFT, &words, Type::Body, c.quiet);
        x = place.right() + gap + 4.0;
    }
    let values = speeds(layout.rapidity);
    for (form, name) in FORMS {
        let label = text::put(
            ui.painter(),
            pos2(x.round(), y),
            Align::LEFT,
            name,
            Type::Body,
            c.quiet,
        );
        let left = (label.right() + 7.0).round();
        let size = vec2(widgets::field_width(layout.rect.width()), CONTROL);
        let rect = Rect::from_min_size(pos2(left, y - CONTROL / 2.0), size);
        field(ui, rect, (form, name), &values, context, wishes);
        x = rect.right() + gap;
    }
    buttons(ui, layout, context, wishes, y);
}

fn buttons(ui: &mut Ui, layout: &Layout, context: &Context<'_>, wishes: &mut Wishes, y: f32) {
    let zoomed = context.view.rail.range.is_some() || context.view.rail.opened.is_some();
    let at_base = is_base(context);
    let mut right = layout.rect.right() - MARGIN;
    for (words, enabled) in [("Whole rail", zoomed), ("To base", !at_base)] {
        let width = text::width(ui.painter(), words, Type::Body).ceil() + 24.0;
        let rect = Rect::from_min_max(
            pos2(right - width, y - CONTROL / 2.0),
            pos2(right, y + CONTROL / 2.0),
        );
        if widgets::button(ui, rect, words, enabled).clicked() {
            wishes.push(match words {
                "To base" => Command::Frame(When::Base),
                _ => Command::Rail(RailCommand::Range(None)),
            });
        }
        right = rect.left() - 8.0;
    }
}

fn is_base(context: &Context<'_>) -> bool {
    let base = &*context.document.opened.solved.base;
    let frame = context.shown.ledger.as_ref().map(|l| &l.frame);
    frame.is_none_or(|f| f.name.as_deref() == Some(base))
}

/// "seen from hall", with the motion across where there is any.
fn seen_from(context: &Context<'_>) -> String {
    let base = &context.document.opened.solved.base;
    let Some(frame) = context.shown.ledger.as_ref().map(|l| &l.frame) else {
        return String::new();
    };
    if is_base(context) {
        return "the base frame".to_owned();
    }
    let across = context.shown.things.iter().find(|t| {
        t.object.kind == crate::fault::Kind::Frame && Some(&*t.object.name) == frame.name.as_deref()
    });
    match across.filter(|t| t.across.abs() >= 0.005) {
        Some(tick) => {
            let speed = fixed(tick.across.abs(), Decimals(2));
            format!("seen from {base}, {ACROSS} {speed} c")
        }
        None => format!("seen from {base}"),
    }
}

fn frames(ui: &mut Ui, rect: Rect, layout: &Layout, context: &Context<'_>, wishes: &mut Wishes) {
    let solved = &context.document.opened.solved;
    let mut entries = vec![solved.base.to_string()];
    entries.extend(solved.frames.keys().map(ToString::to_string));
    let chosen = context.frame_name();
    let mut rapidities: Vec<Option<f64>> = vec![None; entries.len()];
    for tick in &layout.ticks {
        let rest = rest_name(tick, context);
        if let Some(name) = rest {
            entries.push(name);
            rapidities.push(Some(tick.rapidity));
        }
    }
    let picked = widgets::chooser(ui, rect, "Viewing frame", &chosen, &entries);
    let Some(i) = picked else { return };
    wishes.push(Command::Frame(match rapidities[i] {
        Some(rapidity) => at_rapidity(rapidity),
        None if i == 0 => When::Base,
        None => When::Frame(entries[i].clone()),
    }));
}

/// "rest of beam", for a tick where no named frame stands.
pub(super) fn rest_name(tick: &super::Tick, context: &Context<'_>) -> Option<String> {
    let things = || tick.members.iter().map(|&i| &context.shown.things[i]);
    if things().any(|t| t.object.kind == crate::fault::Kind::Frame) {
        return None;
    }
    things()
        .find(|t| t.across.abs() < 0.005)
        .map(|t| format!("rest of {}", t.object.name))
}

fn field(
    ui: &mut Ui,
    rect: Rect,
    (form, name): (SpeedForm, &str),
    values: &Speeds,
    context: &Context<'_>,
    wishes: &mut Wishes,
) {
    let entry = context.view.rail.entry.as_ref().filter(|e| e.form == form);
    let value = shown(form, values);
    let fault = entry.and_then(|e| e.fault.as_deref());
    let typing = entry.map(|e| e.text.as_str());
    let (response, entered) = widgets::field(ui, rect, name, &value, typing, fault.is_some());
    if let Some(fault) = fault {
        reason(ui, rect, fault);
    }
    let response = response.on_hover_text(precise(form, values));
    let command = match entered {
        None => return,
        Some(Entered::Left) => RailCommand::Entry(None),
        Some(Entered::Editing(text)) => RailCommand::Entry(Some(Entry {
            form,
            text,
            fault: None,
        })),
        Some(Entered::Done(text)) if plain(&text) == plain(&value) || text.trim().is_empty() => {
            RailCommand::Entry(None)
        }
        Some(Entered::Done(text)) => match rapidity_from(form, &plain(&text), values.rapidity) {
            Ok(rapidity) => {
                wishes.push(Command::Frame(at_rapidity(rapidity)));
                RailCommand::Entry(None)
            }
            Err(fault) => {
                response.request_focus();
                RailCommand::Entry(Some(Entry {
                    form,
                    text,
                    fault: Some(fault),
                }))
            }
        },
    };
    wishes.push(Command::Rail(command));
}

/// What was typed, without the thin spaces and the long minus of what was shown.
fn plain(text: &str) -> String {
    text.chars()
        .filter(|c| *c != '\u{2009}')
        .map(|c| if c == '\u{2212}' { '-' } else { c })
        .collect::<String>()
        .trim()
        .to_owned()
}

/// A form's value with six decimals, or as many as have room.
fn shown(form: SpeedForm, values: &Speeds) -> String {
    let value = value(form, values);
    let size = value.abs();
    let text = match form {
        // Six decimals would show 1: say how far from it instead.
        SpeedForm::Beta if 1.0 - size < 5e-7 => {
            let e = crate::num::exp(-2.0 * values.rapidity.abs());
            let behind = shorter(2.0 * e / (1.0 + e), 2);
            let sign = if value < 0.0 { "-1 + " } else { "1 - " };
            return format!("{sign}{behind}").replace('-', "\u{2212}");
        }
        _ if size != 0.0 && size < 1e-3 => shorter(value, 4),
        _ if size < 1e3 => fixed(value, Decimals(6)),
        _ if size < 1e7 => significant(value, 9),
        _ => shorter(value, 5),
    };
    grouped(&text)
}

/// Some digits and a power of ten.
fn shorter(value: f64, digits: usize) -> String {
    let text = format!("{value:.*e}", digits - 1);
    match text.split_once('e') {
        Some((lead, power)) => format!("{lead}e{power}"),
        None => text,
    }
}

fn value(form: SpeedForm, values: &Speeds) -> f64 {
    match form {
        SpeedForm::Beta => values.beta,
        SpeedForm::Gamma => values.gamma,
        SpeedForm::Rapidity => values.rapidity,
        SpeedForm::Doppler => values.doppler,
    }
}

fn precise(form: SpeedForm, values: &Speeds) -> String {
    shortest(value(form, values))
}

/// Why an entry does not hold, under its field.
fn reason(ui: &Ui, rect: Rect, fault: &str) {
    let c = colours(ui);
    Area::new(Id::unique("entry fault"))
        .order(Order::Tooltip)
        .fixed_pos(rect.left_bottom() + vec2(0.0, 4.0))
        .show(ui.ctx(), |ui| {
            Frame::new()
                .fill(c.panel)
                .stroke(egui::Stroke::new(1.0, c.fault))
                .corner_radius(crate::app::theme::RADIUS)
                .inner_margin(8)
                .show(ui, |ui| {
                    ui.set_max_width(280.0);
                    let words = egui::RichText::new(fault)
                        .font(Type::Caption.font())
                        .color(c.fault);
                    ui.label(words);
                });
        });
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn six_decimals_in_threes() {
        let values = speeds(0.560386);
        assert_eq!(shown(SpeedForm::Rapidity, &values), "0.560\u{2009}386");
    }

    #[test]
    fn a_speed_near_light_is_never_shown_as_light() {
        // 1 - tanh 18 = 2 e^-36 / (1 + e^-36) = 4.64e-16 (e^-36 = 2.3195e-16).
        let values = speeds(18.0);
        assert_eq!(shown(SpeedForm::Beta, &values), "1 \u{2212} 4.6e\u{2212}16");
        let values = speeds(-18.0);
        assert_eq!(
            shown(SpeedForm::Beta, &values),
            "\u{2212}1 + 4.6e\u{2212}16"
        );
    }

    #[test]
    fn what_is_shown_is_read_again() {
        for rapidity in [-2.0, -0.3, 0.0, 0.7, 3.0] {
            let values = speeds(rapidity);
            for (form, name) in FORMS {
                let back = rapidity_from(form, &plain(&shown(form, &values)), rapidity).unwrap();
                assert!(
                    (back - rapidity).abs() < 1e-4,
                    "{name} of {rapidity}: {back}"
                );
            }
        }
    }
}
