//! The sheet: the plate's own marks on paper, panel tabs, what is selected and what the pointer is over.

mod lie;
mod objects;
mod picture;

use egui::{
    Align, Color32, CornerRadius, CursorIcon, PointerButton, Pos2, Rect, Response, Role, Sense,
    Shape, Stroke, StrokeKind, Ui, WidgetInfo, pos2, vec2,
};

pub(super) use lie::{Lie, MM_TRUE, bounded};
pub(super) use picture::Picture;

use super::command::{Command, Wishes};
use super::context::Context;
use super::icon::Icon;
use super::text;
use super::theme::{CONTROL, FOCUS, MARGIN, ON_PAPER, Type};
use super::widgets::{self, colours};
use crate::plate::PanelPlace;
use crate::scene::View as Kind;

/// Middle of the bar over the sheet.
const BAR: f32 = 20.0;
/// Height of a panel's tab.
const TAB: f32 = 24.0;
/// Length of a corner bracket's arms.
const ARM: f32 = 14.0;

/// Paints the sheet's region and reads it.
pub(super) fn canvas(
    ui: &mut Ui,
    rect: Rect,
    context: &Context<'_>,
    picture: &mut Picture,
    wishes: &mut Wishes,
) {
    let c = colours(ui);
    widgets::ground(ui, c.ground);
    let Some(laid) = &context.shown.laid else {
        return;
    };
    let lie = lie(rect, context, ui.pixels_per_point());
    let paper = ui.interact(rect, ui.scope_id().with("paper"), Sense::click_and_drag());
    paper.widget_info(|| WidgetInfo::labeled(Role::Canvas, true, &laid.sheet.title));
    let clip = ui.painter().with_clip_rect(rect);
    clip.rect_filled(lie.paper, CornerRadius::ZERO, Color32::WHITE);
    picture.paint(ui, &clip, rect, &lie, context);
    clip.rect_stroke(
        lie.paper,
        CornerRadius::ZERO,
        Stroke::new(1.0, c.rule),
        StrokeKind::Outside,
    );
    if let Some(panel) = context.shown.panels().get(context.view.panel) {
        brackets(&clip, lie.rect(panel.outer).intersect(lie.paper));
    }
    navigate(ui, &paper, rect, &lie, wishes);
    objects::nodes(ui, rect, &lie, context, wishes);
    objects::point(&paper, &lie, context, wishes);
    tabs(ui, &lie, context, wishes);
    bar(ui, rect, &lie, context, wishes);
}

/// Four corners on the active panel's edge, clear of the panel's letter.
fn brackets(painter: &egui::Painter, panel: Rect) {
    let inner = panel.shrink(FOCUS / 2.0);
    let stroke = Stroke::new(FOCUS, ON_PAPER);
    for (x, y) in [(-1.0, -1.0), (1.0, -1.0), (1.0, 1.0), (-1.0, 1.0)] {
        let corner = pos2(
            if x < 0.0 { inner.left() } else { inner.right() }.round(),
            if y < 0.0 { inner.top() } else { inner.bottom() }.round(),
        );
        let across = corner - vec2(x * ARM, 0.0);
        let along = corner - vec2(0.0, y * ARM);
        painter.add(Shape::line(vec![across, corner, along], stroke));
    }
}

/// "Spacetime in station"
fn panel_words(panel: &PanelPlace, context: &Context<'_>) -> String {
    let view = match panel.view {
        Kind::Spacetime => "Spacetime",
        Kind::EnergyMomentum => "Energy-momentum",
    };
    let frame = context.panel_frame(&panel.viewing);
    if panel.viewing.name.is_none() && !frame.starts_with("rest of") {
        format!("{view} at {frame}")
    } else {
        format!("{view} in {frame}")
    }
}

/// Tabs hang on the paper's top edge, at the left of their panels.
fn tabs(ui: &mut Ui, lie: &Lie, context: &Context<'_>, wishes: &mut Wishes) {
    let c = colours(ui);
    let panels = context.shown.panels();
    for (i, panel) in panels.iter().enumerate() {
        let active = i == context.view.panel;
        let set = Type::caption(active);
        let left = lie.rect(panel.outer).left().max(lie.paper.left()) + 11.0;
        let end = panels
            .get(i + 1)
            .map_or(lie.paper.right(), |p| lie.rect(p.outer).left());
        let letter = format!("({})  ", panel.letter);
        let room = (end - left - 30.0).max(20.0);
        let words = format!("{letter}{}", panel_words(panel, context));
        let shown = text::cut_end(ui.painter(), &words, set, room);
        let width = text::width(ui.painter(), &shown, set).ceil() + 20.0;
        let rect = Rect::from_min_size(pos2(left.round(), lie.paper.top() - TAB), vec2(width, TAB));
        let response = widgets::press(
            ui,
            rect,
            &words.replace(super::rail::ACROSS, "across"),
            true,
        );
        let (fill, ink) = match active {
            true => (c.accent, c.on_accent),
            false if response.hovered() => (c.hover, c.text),
            false => (c.panel, c.text),
        };
        let radius = CornerRadius {
            nw: 4,
            ne: 4,
            sw: 0,
            se: 0,
        };
        ui.painter().rect_filled(rect, radius, fill);
        text::put(ui.painter(), rect.center(), Align::Center, &shown, set, ink);
        widgets::focus_ring(ui, &response, rect);
        if response.clicked() {
            wishes.push(Command::Panel(i));
        }
    }
}

/// The bar over the sheet: which plate, its size, zoom.
fn bar(ui: &mut Ui, rect: Rect, lie: &Lie, context: &Context<'_>, wishes: &mut Wishes) {
    let Some(laid) = &context.shown.laid else {
        return;
    };
    let c = colours(ui);
    let back = Rect::from_min_size(rect.min, vec2(rect.width(), 40.0));
    if lie.paper.top() - TAB < back.bottom() {
        ui.painter().rect_filled(back, CornerRadius::ZERO, c.ground);
    }
    let y = rect.top() + BAR;
    let entries: Vec<String> = plates(context);
    let chosen = entries.get(context.view.plate).cloned().unwrap_or_default();
    let width = (text::width(ui.painter(), &chosen, Type::BodyStrong) + 44.0).clamp(84.0, 200.0);
    let chooser = Rect::from_min_size(
        pos2(rect.left() + MARGIN, y - CONTROL / 2.0),
        vec2(width, CONTROL),
    );
    if let Some(i) = widgets::chooser(ui, chooser, "Plate", &chosen, &entries) {
        wishes.push(Command::Plate(i));
    }
    let size = format!("{:.0} × {:.0} mm", laid.sheet.width, laid.sheet.height);
    let at = pos2(chooser.right() + 11.0, y);
    text::put(ui.painter(), at, Align::LEFT, &size, Type::Body, c.quiet);
    zoom(ui, rect, y, lie, wishes);
}

fn plates(context: &Context<'_>) -> Vec<String> {
    let names: Vec<String> = context
        .document
        .opened
        .scene
        .plates
        .keys()
        .map(ToString::to_string)
        .collect();
    if names.is_empty() {
        vec!["everything".to_owned()]
    } else {
        names
    }
}

fn zoom(ui: &mut Ui, rect: Rect, y: f32, lie: &Lie, wishes: &mut Wishes) {
    let c = colours(ui);
    let top = y - CONTROL / 2.0;
    let right = rect.right() - MARGIN;
    let fit = Rect::from_min_max(pos2(right - 40.0, top), pos2(right, top + CONTROL));
    if widgets::button(ui, fit, "Fit", true).clicked() {
        wishes.push(Command::Fit);
    }
    let plus = Rect::from_min_size(
        pos2(fit.left() - 8.0 - CONTROL, top),
        vec2(CONTROL, CONTROL),
    );
    if widgets::icon_button(ui, plus, Icon::Plus, "Zoom in").clicked() {
        wishes.push(Command::ZoomBy(1.25));
    }
    let share = format!("{:.0} %", lie.scale / MM_TRUE * 100.0);
    let middle = pos2(plus.left() - 28.0, y);
    text::put(
        ui.painter(),
        middle,
        Align::Center,
        &share,
        Type::Body,
        c.text,
    );
    let minus = plus.translate(vec2(-56.0 - CONTROL, 0.0));
    if widgets::icon_button(ui, minus, Icon::Minus, "Zoom out").clicked() {
        wishes.push(Command::ZoomBy(0.8));
    }
}

/// Pan by dragging bare paper or with the middle button; zoom at the pointer.
fn navigate(ui: &Ui, paper: &Response, rect: Rect, lie: &Lie, wishes: &mut Wishes) {
    if paper.dragged_by(PointerButton::Middle) || paper.dragged_by(PointerButton::Primary) {
        if paper.drag_delta() != egui::Vec2::ZERO {
            wishes.push(Command::Pan(paper.drag_delta()));
        }
        ui.ctx().set_cursor_icon(CursorIcon::Grabbing);
    }
    let Some(pointer) = paper.hover_pos() else {
        return;
    };
    let (wheel, pinch) = ui.input(|i| (i.smooth_scroll_delta().y, i.zoom_delta()));
    let factor = pinch * (wheel / 240.0).exp();
    if factor != 1.0 {
        wishes.push(Command::Zoom {
            scale: lie.scale * factor,
            about: pointer - middle(rect),
        });
    }
}

/// How the paper lies in the sheet's region.
pub(super) fn lie(rect: Rect, context: &Context<'_>, pixels_per_point: f32) -> Lie {
    let (width, height) = context
        .shown
        .laid
        .as_ref()
        .map_or((86.0, 86.0), |laid| (laid.sheet.width, laid.sheet.height));
    Lie::new(rect, (width, height), context.view.camera, pixels_per_point)
}

fn middle(rect: Rect) -> Pos2 {
    lie::room(rect).center()
}
