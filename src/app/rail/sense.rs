//! Hands and keys on the rail: read before anything is painted, so that all else follows within the frame.

use egui::accesskit::{Action, ActionData};
use egui::{
    CursorIcon, Event, EventFilter, Id, Key, Pos2, Rect, Role, Sense, Ui, WidgetInfo, pos2, vec2,
};

use super::layout::{Scale, key_step};
use super::{AXIS_CLOSE, Entry, Layout, NAMES, RailCommand, at_rapidity, frame_of, measure};
use crate::app::command::{Command, Wishes};
use crate::app::shown::Shown;
use crate::app::view::View;
use crate::app::widgets::{field_id, reduced_motion};
use crate::scene::When;
use crate::task::SpeedForm;

/// The handle holds on to a tick within this many points.
const HOLD: f32 = 3.0;

/// The handle's id.
pub(super) fn handle_id() -> Id {
    Id::unique("rail handle")
}

/// Reads what is done to the rail.
pub(in crate::app) fn sense(
    ui: &mut Ui,
    rect: Rect,
    shown: &Shown,
    view: &View,
    wishes: &mut Wishes,
) {
    let layout = Layout::new(rect, shown, &view.rail, &measure(ui));
    wheel(ui, &layout, wishes);
    ticks(ui, &layout, shown, wishes);
    handle(ui, &layout, shown, view, wishes);
}

fn wheel(ui: &Ui, layout: &Layout, wishes: &mut Wishes) {
    let band = Rect::from_min_max(
        layout.rect.left_top() + vec2(0.0, 36.0),
        layout.rect.right_bottom(),
    );
    let Some(pointer) = ui
        .input(|i| i.pointer.hover_pos())
        .filter(|p| band.contains(*p))
    else {
        return;
    };
    if ui.ctx().layer_id_at(pointer) != Some(ui.layer_id()) {
        return;
    }
    let turned = ui
        .input(|i| f64::from(i.smooth_scroll_delta().y) + f64::from(i.zoom_delta() - 1.0) * 200.0);
    if turned == 0.0 {
        return;
    }
    let scale = &layout.scale;
    let about = scale
        .rapidity(pointer.x - layout.rect.left())
        .clamp(scale.low, scale.high);
    let factor = crate::num::exp(-turned / 200.0);
    let span = ((scale.high - scale.low) * factor).clamp(1e-6, 1300.0);
    let part = (about - scale.low) / (scale.high - scale.low);
    let low = about - part * span;
    wishes.push(Command::Rail(RailCommand::Range(Some((low, low + span)))));
}

/// Where a tick or its name is hit.
struct Spot {
    tick: usize,
    rect: Rect,
    words: String,
    crowd: bool,
}

fn spots(layout: &Layout) -> Vec<Spot> {
    let left = layout.rect.left();
    let axis = layout.axis();
    let mut spots: Vec<Spot> = layout
        .names
        .iter()
        .map(|name| {
            let half = (name.width / 2.0).max(12.0);
            let from = (left + name.at - half).min(left + name.from - 6.0);
            let to = (left + name.at + half).max(left + name.to + 6.0);
            let words = match layout.ticks.get(name.ticks.start) {
                Some(tick) if !name.is_bracket() => tick.words(),
                Some(_) | None => name.text.clone(),
            };
            Spot {
                tick: name.ticks.start,
                rect: Rect::from_min_max(
                    pos2(from, layout.rect.top() + NAMES - 12.0),
                    pos2(to, axis - 1.0),
                ),
                words,
                crowd: name.is_bracket(),
            }
        })
        .collect();
    if let Some(close) = &layout.close {
        spots.extend(close.names.iter().map(|name| {
            let y = layout.rect.top() + super::paint::CLOSE_ROWS[name.row];
            Spot {
                tick: name.tick,
                rect: Rect::from_min_max(
                    pos2(left + name.left - 2.0, y - 7.5),
                    pos2(left + name.right + 2.0, y + 7.5),
                ),
                words: layout.ticks[name.tick].words(),
                crowd: false,
            }
        }));
    }
    spots
}

fn ticks(ui: &mut Ui, layout: &Layout, shown: &Shown, wishes: &mut Wishes) {
    for spot in spots(layout) {
        let id = ui.scope_id().with(("tick", spot.tick, spot.crowd));
        let response = ui
            .interact(spot.rect, id, Sense::click())
            .on_hover_cursor(CursorIcon::PointingHand);
        let tick = &layout.ticks[spot.tick];
        let words = if spot.crowd {
            spot.words.clone()
        } else {
            format!("go to {}", spot.words)
        };
        response.widget_info(|| WidgetInfo::labeled(Role::Button, true, &words));
        if !response.clicked() {
            continue;
        }
        wishes.push(Command::Rail(if spot.crowd {
            RailCommand::OpenCrowd(tick.rapidity)
        } else {
            go(ui, layout, spot.tick, shown)
        }));
    }
    if layout.close.is_some() {
        close_ticks(ui, layout, shown, wishes);
    }
}

/// Strokes of a close-up whose names had no room are still to be clicked.
fn close_ticks(ui: &mut Ui, layout: &Layout, shown: &Shown, wishes: &mut Wishes) {
    let Some(close) = &layout.close else { return };
    let axis = layout.rect.top() + AXIS_CLOSE;
    let band = Rect::from_min_max(
        pos2(layout.rect.left() + close.scale.left, axis - 24.0),
        pos2(layout.rect.left() + close.scale.right, axis),
    );
    let response = ui.interact(band, ui.scope_id().with("close-up ticks"), Sense::click());
    if let (true, Some(at)) = (response.clicked(), response.interact_pointer_pos())
        && let Some(tick) = nearest(layout, &close.scale, at, 12.0)
    {
        wishes.push(Command::Rail(go(ui, layout, tick, shown)));
    }
}

fn go(ui: &Ui, layout: &Layout, tick: usize, shown: &Shown) -> RailCommand {
    let now = ui.input(|i| i.time);
    RailCommand::Go {
        from: layout.rapidity,
        to: layout.ticks[tick].rapidity,
        start: if reduced_motion(ui) { now - 1.0 } else { now },
        when: frame_of(&layout.ticks[tick], shown),
    }
}

/// The tick nearest to a point, if it is near.
fn nearest(layout: &Layout, scale: &Scale, at: Pos2, reach: f32) -> Option<usize> {
    let off = |i: usize| (layout.rect.left() + scale.x(layout.ticks[i].rapidity) - at.x).abs();
    (0..layout.ticks.len())
        .filter(|&i| off(i) <= reach)
        .min_by(|&a, &b| off(a).total_cmp(&off(b)))
}

fn handle(ui: &mut Ui, layout: &Layout, shown: &Shown, view: &View, wishes: &mut Wishes) {
    let peg = layout.handle();
    let hit = Rect::from_center_size(peg.center(), vec2(24.0, 26.0));
    let response = ui
        .interact(hit, handle_id(), Sense::click_and_drag())
        .on_hover_cursor(CursorIcon::ResizeHorizontal);
    response.widget_info(|| WidgetInfo::slider(true, layout.rapidity, "Viewing frame rapidity"));
    let (scale, _) = layout.working();
    // The press counts, not the distance after which a press becomes a drag, and the last move counts that comes
    // with the release: nothing of the way is lost.
    let (pressed, down, origin, at) = ui.input(|i| {
        let p = &i.pointer;
        (
            p.primary_pressed(),
            p.primary_down(),
            p.press_origin(),
            p.latest_pos(),
        )
    });
    let mut grip = view.rail.held.map(|_| view.rail.grip);
    if let (true, true, Some(origin)) = (pressed, response.is_pointer_button_down_on(), origin) {
        let off = origin.x - peg.center().x;
        let axis = (layout.scale.low, layout.scale.high);
        wishes.push(Command::Rail(RailCommand::Take { axis, grip: off }));
        response.request_focus();
        grip = (at != Some(origin)).then_some(off);
    }
    if let (Some(grip), Some(at)) = (grip, at)
        && ui.input(|i| i.pointer.delta().x != 0.0)
    {
        let x = at.x - grip;
        let held = nearest(layout, scale, pos2(x, at.y), HOLD);
        let when = match held {
            Some(tick) => frame_of(&layout.ticks[tick], shown),
            None => at_rapidity(scale.pointed(x - layout.rect.left())),
        };
        wishes.push(Command::Frame(when));
    }
    if view.rail.held.is_some() && !down {
        wishes.push(Command::Rail(RailCommand::Release));
    }
    asked(ui, layout, wishes);
    if response.has_focus() {
        keys(ui, layout, shown, wishes);
    }
}

/// What a screen reader asks of the handle.
fn asked(ui: &Ui, layout: &Layout, wishes: &mut Wishes) {
    let step = key_step(layout.scale.high - layout.scale.low);
    ui.input(|i| {
        for request in i.accesskit_action_requests(handle_id(), Action::SetValue) {
            if let Some(ActionData::NumericValue(value)) = request.data
                && value.is_finite()
            {
                wishes.push(Command::Frame(at_rapidity(value)));
            }
        }
        for (action, by) in [(Action::Increment, step), (Action::Decrement, -step)] {
            let count = i.accesskit_action_requests(handle_id(), action).count();
            if count > 0 {
                wishes.push(Command::Frame(at_rapidity(
                    layout.rapidity + by * count as f64,
                )));
            }
        }
    });
}

fn keys(ui: &Ui, layout: &Layout, shown: &Shown, wishes: &mut Wishes) {
    let filter = EventFilter {
        horizontal_arrows: true,
        ..EventFilter::default()
    };
    ui.memory_mut(|m| m.set_focus_lock_filter(handle_id(), filter));
    let (scale, _) = layout.working();
    let step = key_step(scale.high - scale.low);
    for (key, sign) in [(Key::ArrowLeft, -1.0), (Key::ArrowRight, 1.0)] {
        let (count, fine, jump) = ui.input(|i| {
            let count = i.events.iter().filter(|e| pressed(e, key)).count();
            (count, i.modifiers.shift, i.modifiers.command)
        });
        if count == 0 {
            continue;
        }
        if jump {
            wishes.extend(beside(layout, sign).map(|t| Command::Rail(go(ui, layout, t, shown))));
            continue;
        }
        let size = if fine { step / 10.0 } else { step };
        let moved = layout.rapidity + sign * size * count as f64;
        // On the grid of the step, so that there and back again is there.
        let grid = size / 100.0;
        let rounded = (moved / grid).round() * grid;
        let per = (1.0 / grid).round();
        let exact = if per >= 1.0 {
            (rounded * per).round() / per
        } else {
            rounded
        };
        wishes.push(Command::Frame(at_rapidity(exact)));
    }
    if ui.input(|i| i.key_pressed(Key::Home)) {
        wishes.push(Command::Frame(When::Base));
    }
    let typed: String = ui.input(|i| {
        let texts = i.events.iter().filter_map(|e| match e {
            Event::Text(text) => Some(text.as_str()),
            _ => None,
        });
        texts.collect()
    });
    if typed.starts_with(|c: char| c.is_ascii_digit() || c == '-' || c == '.') {
        wishes.push(Command::Rail(RailCommand::Entry(Some(Entry {
            form: SpeedForm::Rapidity,
            // The field has the focus within this frame and takes what was typed itself.
            text: String::new(),
            fault: None,
        }))));
        ui.memory_mut(|m| m.request_focus(field_id("rapidity")));
    }
}

fn pressed(event: &Event, key: Key) -> bool {
    matches!(event, Event::Key { key: k, pressed: true, .. } if *k == key)
}

/// The next tick on one side of the handle.
fn beside(layout: &Layout, sign: f64) -> Option<usize> {
    let ahead = |i: &usize| (layout.ticks[*i].rapidity - layout.rapidity) * sign > 1e-9;
    let mut order: Vec<usize> = (0..layout.ticks.len()).filter(ahead).collect();
    if sign < 0.0 {
        order.reverse();
    }
    order.first().copied()
}
