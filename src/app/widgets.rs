//! The desk's controls, painted by its own rules at a given place. Each has an accessible name.

use egui::{
    Align, Color32, CornerRadius, Id, Key, Popup, PopupCloseBehavior, Rect, Response, Role, Sense,
    Stroke, StrokeKind, TextEdit, Ui, WidgetInfo, pos2, vec2,
};

use super::icon::{self, Icon};
use super::text;
use super::theme::{self, CONTROL, FOCUS, Palette, RADIUS, Type, palette};

/// The colours of a ui's theme.
pub(super) fn colours(ui: &Ui) -> &'static Palette {
    palette(ui.visuals())
}

/// The ring of keyboard focus, 2 outside a control.
pub(super) fn focus_ring(ui: &Ui, response: &Response, rect: Rect) {
    if response.has_focus() && keyboard_leads(ui) {
        let ring = rect.expand(FOCUS + FOCUS / 2.0);
        let stroke = Stroke::new(FOCUS, colours(ui).accent);
        let radius = CornerRadius::same(RADIUS + 2);
        ui.painter()
            .rect_stroke(ring, radius, stroke, StrokeKind::Middle);
    }
}

/// Focus that came by a click needs no ring.
fn keyboard_leads(ui: &Ui) -> bool {
    !ui.input(|i| i.pointer.any_down())
}

/// A button with a word on it.
pub(super) fn button(ui: &mut Ui, rect: Rect, words: &str, enabled: bool) -> Response {
    let response = press(ui, rect, words, enabled);
    let c = colours(ui);
    let (fill, ink, edge) = if enabled {
        (state_fill(&response, c), c.text, c.edge)
    } else {
        (c.panel, c.disabled, c.hairline)
    };
    frame(ui, rect, fill, edge, 1.0);
    text::put(
        ui.painter(),
        rect.center(),
        Align::Center,
        words,
        Type::Body,
        ink,
    );
    focus_ring(ui, &response, rect);
    response
}

/// A button with an icon on it.
pub(super) fn icon_button(ui: &mut Ui, rect: Rect, icon: Icon, words: &str) -> Response {
    let response = press(ui, rect, words, true);
    let c = colours(ui);
    frame(ui, rect, state_fill(&response, c), c.edge, 1.0);
    icon::paint(ui.painter(), icon, rect.center(), 16.0, c.text);
    focus_ring(ui, &response, rect);
    response.on_hover_text(words)
}

/// Senses a press at a place; a disabled one senses nothing.
pub(super) fn press(ui: &mut Ui, rect: Rect, words: &str, enabled: bool) -> Response {
    let sense = if enabled {
        Sense::click()
    } else {
        Sense::hover()
    };
    let response = ui.interact(rect, ui.scope_id().with(("press", words)), sense);
    response.widget_info(|| WidgetInfo::labeled(Role::Button, enabled, words));
    response
}

/// The fill of a control by its state.
pub(super) fn state_fill(response: &Response, c: &Palette) -> Color32 {
    if response.is_pointer_button_down_on() {
        c.wash
    } else if response.hovered() {
        c.hover
    } else {
        c.panel
    }
}

/// A box with an edge inside it.
pub(super) fn frame(ui: &Ui, rect: Rect, fill: Color32, edge: Color32, width: f32) {
    let radius = CornerRadius::same(RADIUS);
    ui.painter().rect(
        rect,
        radius,
        fill,
        Stroke::new(width, edge),
        StrokeKind::Inside,
    );
}

/// A row of choices of which one holds. Gives the one that was pressed and the right end.
pub(super) fn segment(
    ui: &mut Ui,
    left_top: egui::Pos2,
    items: &[(&str, bool)],
    chosen: usize,
) -> (Option<usize>, f32) {
    let mut pressed = None;
    let mut x = left_top.x;
    let mut cells = Vec::new();
    for (i, (words, enabled)) in items.iter().enumerate() {
        let across = text::width(ui.painter(), words, Type::body(true)).ceil() + 20.0;
        let rect = Rect::from_min_size(pos2(x, left_top.y), vec2(across, CONTROL));
        let response = press(ui, rect, words, *enabled);
        response
            .widget_info(|| WidgetInfo::selected(Role::RadioButton, *enabled, i == chosen, *words));
        if response.clicked() {
            pressed = Some(i);
        }
        cells.push((rect, response));
        x += across;
    }
    let c = colours(ui);
    let whole = Rect::from_min_max(left_top, pos2(x, left_top.y + CONTROL));
    frame(ui, whole, c.panel, c.edge, 1.0);
    for (i, (rect, response)) in cells.iter().enumerate() {
        let strong = i == chosen;
        if strong {
            frame(ui, *rect, c.wash, c.accent, 1.5);
        } else if response.hovered() && items[i].1 {
            ui.painter()
                .rect_filled(rect.shrink(1.0), CornerRadius::same(RADIUS), c.hover);
        }
        let ink = if items[i].1 { c.text } else { c.disabled };
        text::put(
            ui.painter(),
            rect.center(),
            Align::Center,
            items[i].0,
            Type::body(strong),
            ink,
        );
        focus_ring(ui, response, *rect);
    }
    (pressed, x)
}

/// A button that shows what is chosen and opens a list of what can be. Gives the index of a new choice.
pub(super) fn chooser(
    ui: &mut Ui,
    rect: Rect,
    name: &str,
    chosen: &str,
    entries: &[String],
) -> Option<usize> {
    let response = ui.interact(rect, ui.scope_id().with(("chooser", name)), Sense::click());
    response.widget_info(|| {
        let mut info = WidgetInfo::labeled(Role::ComboBox, true, name);
        info.current_text_value = Some(chosen.to_owned());
        info
    });
    let c = colours(ui);
    frame(
        ui,
        rect,
        if response.hovered() { c.hover } else { c.field },
        c.edge,
        1.0,
    );
    let room = rect.width() - 34.0;
    let shown = text::cut_end(ui.painter(), chosen, Type::BodyStrong, room);
    let at = pos2(rect.left() + 9.0, rect.center().y);
    text::put(
        ui.painter(),
        at,
        Align::LEFT,
        &shown,
        Type::BodyStrong,
        c.text,
    );
    let arrow = pos2(rect.right() - 14.0, rect.center().y);
    icon::paint(ui.painter(), Icon::Down, arrow, 14.0, c.text);
    focus_ring(ui, &response, rect);
    let mut picked = None;
    Popup::menu(&response)
        .width(rect.width())
        .close_behavior(PopupCloseBehavior::CloseOnClick)
        .show(|ui| {
            egui::ScrollArea::vertical()
                .max_height(320.0)
                .show(ui, |ui| {
                    for (i, entry) in entries.iter().enumerate() {
                        let label = entry.replace(super::rail::ACROSS, "across");
                        if ui.selectable_label(entry == chosen, label).clicked() {
                            picked = Some(i);
                        }
                    }
                });
        });
    picked
}

/// What came of an entry field.
#[derive(Clone, Debug, PartialEq)]
pub(super) enum Entered {
    /// The text is being changed.
    Editing(String),
    /// Enter, or left with a changed text.
    Done(String),
    /// Escape, or left unchanged.
    Left,
}

/// An entry field: shows `value` until it has the focus, then what is being typed.
pub(super) fn field(
    ui: &mut Ui,
    rect: Rect,
    name: &str,
    value: &str,
    typing: Option<&str>,
    at_fault: bool,
) -> (Response, Option<Entered>) {
    let c = colours(ui);
    let id = field_id(name);
    let (edge, width) = if at_fault {
        (c.fault, 2.0)
    } else {
        (c.edge, 1.0)
    };
    frame(ui, rect, c.field, edge, width);
    let mut text = typing.unwrap_or(value).to_owned();
    let before = text.clone();
    // Capitals in the middle stand higher than the middle of the line.
    let inner = rect.shrink2(vec2(8.0, 2.0)).translate(vec2(0.0, -1.0));
    let edit = TextEdit::singleline(&mut text)
        .id(id)
        .frame(egui::Frame::NONE)
        .margin(egui::Margin::ZERO)
        .font(Type::Body.font())
        .text_color(c.text)
        .desired_width(inner.width())
        .align(egui::Align2::RIGHT_CENTER);
    let response = ui.put(inner, edit).accessible_name(name);
    focus_ring(ui, &response, rect);
    if response.gained_focus() && typing.is_none() {
        select_all(ui, id, &text);
    }
    let entered = if response.lost_focus() {
        let escaped = ui.input(|i| i.key_pressed(Key::Escape));
        Some(match typing {
            Some(_) if !escaped => Entered::Done(text),
            Some(_) | None => Entered::Left,
        })
    } else if text != before || (response.gained_focus() && typing.is_none()) {
        Some(Entered::Editing(text))
    } else {
        None
    };
    (response, entered)
}

/// The id of the entry field of that name.
pub(super) fn field_id(name: &str) -> Id {
    Id::unique(("field", name))
}

fn select_all(ui: &Ui, id: Id, text: &str) {
    let mut state = TextEdit::load_state(ui.ctx(), id).unwrap_or_default();
    let end = egui::text::CCursor::new(text.chars().count());
    let all = egui::text::CCursorRange::two(egui::text::CCursor::new(0), end);
    state.cursor.set_char_range(Some(all));
    TextEdit::store_state(ui.ctx(), id, state);
}

/// A selected row: wash, with an accent bar at its left end.
pub(super) fn selected_row(ui: &Ui, rect: Rect) {
    let c = colours(ui);
    ui.painter()
        .rect_filled(rect, CornerRadius::same(RADIUS), c.wash);
    let bar = Rect::from_min_max(
        rect.left_top() + vec2(0.0, 4.0),
        pos2(rect.left() + 3.0, rect.bottom() - 4.0),
    );
    ui.painter()
        .rect_filled(bar, CornerRadius::same(1), c.accent);
}

/// Tells a screen reader whether a node is selected.
pub(super) fn mark_selected(ui: &Ui, id: Id, selected: bool) {
    ui.ctx()
        .accesskit_node_builder(id, |node| node.set_selected(selected));
}

/// A line that divides, on whole points.
pub(super) fn hairline(ui: &Ui, from: egui::Pos2, to: egui::Pos2) {
    let shift = if from.y == to.y {
        vec2(0.0, 0.5)
    } else {
        vec2(0.5, 0.0)
    };
    let stroke = Stroke::new(1.0, colours(ui).hairline);
    ui.painter()
        .line_segment([from + shift, to + shift], stroke);
}

/// A sheet over the desk.
pub(super) fn modal(ui: &Ui, name: &str) -> egui::Modal {
    let frame = egui::Frame::popup(ui.style()).inner_margin(theme::MARGIN);
    egui::Modal::new(Id::unique(name)).frame(frame)
}

/// A child ui that fills a rectangle and paints nowhere else.
pub(super) fn region(ui: &mut Ui, name: &str, rect: Rect) -> Ui {
    let mut child = ui.new_child(egui::UiBuilder::new().max_rect(rect).id_salt(name));
    child.shrink_clip_rect(rect);
    let id = child.unique_id();
    child.ctx().accesskit_node_builder(id, |node| {
        node.set_role(Role::Group);
        node.set_label(name);
    });
    child
}

/// Fills a region with the panel's colour.
pub(super) fn ground(ui: &Ui, colour: Color32) {
    ui.painter()
        .rect_filled(ui.max_rect(), CornerRadius::ZERO, colour);
}

/// Everything moves at once when animations are off.
pub(super) fn reduced_motion(ui: &Ui) -> bool {
    ui.style().animation_time <= 0.0
}

/// The width an entry field takes beside a window of some width.
pub(super) fn field_width(window: f32) -> f32 {
    if window < theme::WIDE { 84.0 } else { 92.0 }
}
