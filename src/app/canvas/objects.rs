//! The objects on paper: found by the pointer, by keys and by a screen reader.

use egui::{Pos2, Rect, Response, Role, Sense, Stroke, Ui, WidgetInfo};
use kurbo::{ParamCurveNearest as _, Point, Shape as _};

use super::Lie;
use crate::app::command::{Command, Wishes};
use crate::app::context::Context;
use crate::app::facts;
use crate::app::theme::{FOCUS, ON_PAPER};
use crate::fault::ObjectId;
use crate::marks::{Paint, Shape, Sheet};

/// How near the pointer must come, points.
const REACH: f64 = 10.0;
/// At least this much of an object is there to be hit, points.
const SIDE: f32 = 20.0;

/// What the pointer does on paper.
pub(super) fn point(paper: &Response, lie: &Lie, context: &Context<'_>, wishes: &mut Wishes) {
    let Some(laid) = &context.shown.laid else {
        return;
    };
    let under = |at: Pos2| hit(&laid.sheet, context, lie.mm(at), f64::from(lie.scale));
    if paper.clicked()
        && let Some(at) = paper.interact_pointer_pos()
    {
        let mm = lie.mm(at);
        let inside = context
            .shown
            .panels()
            .iter()
            .position(|p| p.outer.contains(mm));
        wishes.extend(inside.map(Command::Panel));
        wishes.push(Command::Select(under(at)));
    }
    let hovered = match paper.hover_pos() {
        Some(at) if !paper.dragged() => under(at),
        _ => None,
    };
    let on_paper = paper.hovered() || paper.dragged();
    if on_paper && hovered != context.view.hovered {
        wishes.push(Command::Hover(hovered));
    }
}

/// The object whose ink is nearest to a place in mm, if it is near enough.
fn hit(sheet: &Sheet, context: &Context<'_>, at: Point, scale: f64) -> Option<ObjectId> {
    let reach = REACH / scale;
    let mut best: Option<(f64, usize)> = None;
    for mark in &sheet.marks {
        if context
            .shown
            .objects
            .get(mark.group)
            .is_none_or(Option::is_none)
        {
            continue;
        }
        let Some(off) = distance(&mark.shape, at, reach) else {
            continue;
        };
        // What was drawn last is on top: it wins where two are as near.
        if best.is_none_or(|(least, _)| off <= least) {
            best = Some((off, mark.group));
        }
    }
    best.and_then(|(_, group)| context.shown.objects[group].clone())
}

/// From a place to a shape's ink, mm; none beyond reach.
fn distance(shape: &Shape, at: Point, reach: f64) -> Option<f64> {
    let near = shape.ink_box().inflate(reach, reach);
    if !near.contains(at) {
        return None;
    }
    let off = match shape {
        // A name counts like what it names, but what is drawn comes first.
        Shape::Label { .. } => outside(shape.ink_box(), at) + reach * 0.3,
        Shape::Path {
            path,
            paint: Paint::Fill(_),
        } if path.contains(at) && path.bounding_box().area() < 40.0 => 0.0,
        Shape::Path { path, .. } => path
            .segments()
            .map(|s| s.nearest(at, 1e-3).distance_sq.sqrt())
            .fold(f64::INFINITY, f64::min),
    };
    (off <= reach).then_some(off)
}

fn outside(rect: kurbo::Rect, at: Point) -> f64 {
    let dx = (rect.x0 - at.x).max(at.x - rect.x1).max(0.0);
    let dy = (rect.y0 - at.y).max(at.y - rect.y1).max(0.0);
    (dx * dx + dy * dy).sqrt()
}

/// One node for each group that shows an object: found by name, focused with Tab, selected with Enter.
pub(super) fn nodes(
    ui: &mut Ui,
    rect: Rect,
    lie: &Lie,
    context: &Context<'_>,
    wishes: &mut Wishes,
) {
    let Some(laid) = &context.shown.laid else {
        return;
    };
    let builder = egui::UiBuilder::new().max_rect(rect).id_salt("objects");
    let mut child = ui.new_child(builder);
    let id = child.unique_id();
    child.ctx().accesskit_node_builder(id, |node| {
        node.set_role(Role::Group);
        node.set_label("Objects on paper");
    });
    for (group, place) in places(&laid.sheet, lie).into_iter().enumerate() {
        let (Some(place), Some(Some(object))) = (place, context.shown.objects.get(group)) else {
            continue;
        };
        node(
            &mut child,
            group,
            place.intersect(rect),
            object,
            context,
            wishes,
        );
    }
}

/// Where each group's drawing stands on the screen: its strokes and fills, or its labels where it has nothing else.
fn places(sheet: &Sheet, lie: &Lie) -> Vec<Option<Rect>> {
    let mut drawn: Vec<Option<Rect>> = vec![None; sheet.groups.len()];
    let mut named = drawn.clone();
    for mark in &sheet.marks {
        let list = match mark.shape {
            Shape::Path { .. } => &mut drawn,
            Shape::Label { .. } => &mut named,
        };
        if let Some(place) = list.get_mut(mark.group) {
            let ink = lie.rect(mark.shape.ink_box());
            *place = Some(place.map_or(ink, |p| p.union(ink)));
        }
    }
    drawn.into_iter().zip(named).map(|(d, n)| d.or(n)).collect()
}

fn node(
    ui: &mut Ui,
    group: usize,
    place: Rect,
    object: &ObjectId,
    context: &Context<'_>,
    wishes: &mut Wishes,
) {
    let id = ui.scope_id().with(("object", group));
    let missing = (egui::vec2(SIDE, SIDE) - place.size()).max(egui::Vec2::ZERO);
    let response = ui.interact(
        place.expand2(missing / 2.0),
        id,
        Sense::focusable_noninteractive(),
    );
    let selected = context.view.selected.as_ref() == Some(object);
    response.widget_info(|| WidgetInfo::selected(Role::Button, true, selected, object.to_string()));
    let value = facts::coordinates(object, context);
    ui.ctx().accesskit_node_builder(id, |node| {
        node.set_role(Role::Button);
        node.set_selected(selected);
        node.add_action(egui::accesskit::Action::Click);
        if let Some(value) = value {
            node.set_value(value);
        }
    });
    let asked = ui.input(|i| i.has_accesskit_action_request(id, egui::accesskit::Action::Click));
    let entered = response.has_focus()
        && ui.input(|i| i.key_pressed(egui::Key::Enter) || i.key_pressed(egui::Key::Space));
    if asked || entered {
        wishes.push(Command::Select(Some(object.clone())));
    }
    if response.has_focus() {
        let ring = place.expand(2.0);
        let stroke = Stroke::new(FOCUS, ON_PAPER);
        ui.painter()
            .rect_stroke(ring, 4, stroke, egui::StrokeKind::Outside);
    }
}
