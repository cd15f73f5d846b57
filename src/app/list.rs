//! The list of objects, and what is to be mended in them.

use egui::{Align, Rect, Role, ScrollArea, Sense, Ui, WidgetInfo, pos2, vec2};

use super::command::{Command, Wishes};
use super::context::Context;
use super::facts;
use super::findings;
use super::icon::{self, Icon};
use super::text;
use super::theme::Type;
use super::widgets::{self, colours};
use crate::fault::{Kind, ObjectId, Weight};

/// Paints list and findings.
pub(super) fn list(ui: &mut Ui, rect: Rect, row: f32, context: &Context<'_>, wishes: &mut Wishes) {
    let c = colours(ui);
    widgets::ground(ui, c.panel);
    let foot = findings::height(ui, rect, context);
    let split = (rect.bottom() - foot).round();
    let above = Rect::from_min_max(rect.min, pos2(rect.right(), split));
    let below = Rect::from_min_max(pos2(rect.left(), split), rect.max);
    let mut upper = widgets::region(ui, "Objects", above.shrink2(vec2(0.0, 4.0)));
    ScrollArea::vertical()
        .auto_shrink(false)
        .show(&mut upper, |ui| {
            ui.spacing_mut().item_spacing.y = 0.0;
            ui.add_space(4.0);
            for (kind, names) in kinds(context) {
                section(ui, row, kind, &names, context, wishes);
            }
        });
    let mut lower = widgets::region(ui, "Findings", below);
    findings::findings(&mut lower, below, context, wishes);
    widgets::hairline(ui, below.left_top(), below.right_top());
    widgets::hairline(
        ui,
        rect.right_top() - vec2(1.0, 0.0),
        rect.right_bottom() - vec2(1.0, 0.0),
    );
}

/// Kinds with the names of theirs, those the scene uses most first.
fn kinds(context: &Context<'_>) -> Vec<(Kind, Vec<String>)> {
    let scene = &context.document.opened.scene;
    let mut frames = vec![scene.base.clone()];
    frames.extend(scene.frames.keys().map(ToString::to_string));
    let mut kinds = vec![
        (
            Kind::Event,
            scene.events.keys().map(ToString::to_string).collect(),
        ),
        (
            Kind::Line,
            scene.lines.keys().map(ToString::to_string).collect(),
        ),
        (
            Kind::Particle,
            scene.particles.keys().map(ToString::to_string).collect(),
        ),
        (
            Kind::Collision,
            scene.collisions.keys().map(ToString::to_string).collect(),
        ),
        (Kind::Frame, frames),
        (
            Kind::Plate,
            scene
                .plates
                .keys()
                .map(ToString::to_string)
                .collect::<Vec<_>>(),
        ),
    ];
    let unread = context.document.opened.solved.left_out.iter();
    for object in unread {
        let list = kinds.iter_mut().find(|(kind, _)| *kind == object.kind);
        if let Some((_, names)) = list
            && !names.iter().any(|n| **n == *object.name)
        {
            names.push(object.name.to_string());
        }
    }
    // What the scene is about comes first; empty kinds last.
    let count = |kind: Kind| {
        kinds
            .iter()
            .find(|(k, _)| *k == kind)
            .map_or(0, |(_, n)| n.len())
    };
    let momenta = count(Kind::Particle) + count(Kind::Collision);
    let momenta_first = momenta > count(Kind::Event) + count(Kind::Line);
    let rank = move |kind: Kind| match kind {
        Kind::Particle | Kind::Collision => usize::from(!momenta_first),
        Kind::Event | Kind::Line => usize::from(momenta_first),
        Kind::Frame | Kind::Plate | Kind::Species | Kind::Scene => 2,
    };
    kinds.sort_by_key(|(kind, names)| (names.is_empty(), rank(*kind)));
    kinds
}

fn heading(kind: Kind) -> &'static str {
    match kind {
        Kind::Event => "Events",
        Kind::Line => "Lines",
        Kind::Particle => "Particles",
        Kind::Collision => "Collisions",
        Kind::Frame => "Frames",
        Kind::Plate => "Plates",
        Kind::Species => "Species",
        Kind::Scene => "Scene",
    }
}

fn section(
    ui: &mut Ui,
    row: f32,
    kind: Kind,
    names: &[String],
    context: &Context<'_>,
    wishes: &mut Wishes,
) {
    let c = colours(ui);
    let folded = context.view.folded.contains(&kind);
    let (rect, response) =
        ui.allocate_exact_size(vec2(ui.available_width(), row + 4.0), Sense::click());
    let words = heading(kind);
    response.widget_info(|| {
        WidgetInfo::selected(Role::Button, true, !folded, format!("{words} in the list"))
    });
    let y = rect.center().y + 1.0;
    if response.hovered() {
        ui.painter()
            .rect_filled(rect.shrink2(vec2(4.0, 2.0)), 4, c.hover);
    }
    let turn = if folded { Icon::Closed } else { Icon::Down };
    icon::paint(
        ui.painter(),
        turn,
        pos2(rect.left() + 16.0, y),
        12.0,
        c.quiet,
    );
    let at = pos2(rect.left() + 26.0, y);
    text::put(
        ui.painter(),
        at,
        Align::LEFT,
        words,
        Type::CaptionStrong,
        c.quiet,
    );
    let count = pos2(rect.right() - 14.0, y);
    text::put(
        ui.painter(),
        count,
        Align::RIGHT,
        &names.len().to_string(),
        Type::Caption,
        c.quiet,
    );
    widgets::focus_ring(ui, &response, rect.shrink(3.0));
    if response.clicked() {
        wishes.push(Command::Fold(kind));
    }
    if folded {
        return;
    }
    if names.is_empty() {
        let (rect, _) = ui.allocate_exact_size(vec2(ui.available_width(), row), Sense::hover());
        let at = pos2(rect.left() + 26.0, rect.center().y);
        text::put(
            ui.painter(),
            at,
            Align::LEFT,
            "none",
            Type::Caption,
            c.quiet,
        );
    }
    for run in runs(names) {
        match run {
            Run::One(name) => item(ui, row, &ObjectId::new(kind, name), context, wishes),
            Run::Numbered(stem, names) => {
                let object = ObjectId::new(kind, stem);
                let open = numbered(ui, row, &object, names, context, wishes);
                for name in names.iter().filter(|_| open) {
                    item(ui, row, &ObjectId::new(kind, name), context, wishes);
                }
            }
        }
    }
}

/// One name, or many that differ by a running number, with what they begin with.
enum Run<'a> {
    One(&'a str),
    Numbered(&'a str, &'a [String]),
}

/// From this many on, names that differ by a running number are folded.
const NUMBERED: usize = 6;

fn stem(name: &str) -> &str {
    name.trim_end_matches(|c: char| c.is_ascii_digit())
}

fn runs(names: &[String]) -> Vec<Run<'_>> {
    let mut runs = Vec::new();
    for group in names
        .chunk_by(|a, b| stem(a) == stem(b) && stem(a).len() < a.len() && stem(b).len() < b.len())
    {
        match group {
            [first, ..] if group.len() >= NUMBERED => runs.push(Run::Numbered(stem(first), group)),
            _ => runs.extend(group.iter().map(|n| Run::One(n))),
        }
    }
    runs
}

/// "buoy 01 to 40": gives whether its names are to be listed.
fn numbered(
    ui: &mut Ui,
    height: f32,
    stem: &ObjectId,
    names: &[String],
    context: &Context<'_>,
    wishes: &mut Wishes,
) -> bool {
    let c = colours(ui);
    let open = context.view.unfolded.contains(stem);
    let (rect, response) =
        ui.allocate_exact_size(vec2(ui.available_width(), height), Sense::click());
    let last = names.last().map_or("", |n| &n[stem.name.len()..]);
    let words = format!("{} to {last}", names.first().map_or("", String::as_str));
    response.widget_info(|| WidgetInfo::selected(Role::Button, true, open, &words));
    let holds = |object: &Option<ObjectId>| {
        object
            .as_ref()
            .is_some_and(|o| o.kind == stem.kind && names.iter().any(|n| **n == *o.name))
    };
    let row = Rect::from_min_max(rect.min + vec2(4.0, 0.0), rect.max - vec2(4.0, 0.0));
    if !open && holds(&context.view.selected) {
        widgets::selected_row(ui, row);
    } else if response.hovered() {
        ui.painter().rect_filled(row, 4, c.hover);
    }
    let y = rect.center().y;
    let turn = if open { Icon::Down } else { Icon::Closed };
    icon::paint(
        ui.painter(),
        turn,
        pos2(rect.left() + 16.0, y),
        12.0,
        c.quiet,
    );
    icon::paint(
        ui.painter(),
        Icon::of(stem.kind),
        pos2(rect.left() + 34.0, y),
        16.0,
        c.text,
    );
    let room = rect.right() - 14.0 - rect.left() - 48.0;
    let words = text::cut_end(ui.painter(), &words, Type::Body, room);
    text::put(
        ui.painter(),
        pos2(rect.left() + 48.0, y),
        Align::LEFT,
        &words,
        Type::Body,
        c.text,
    );
    widgets::focus_ring(ui, &response, row);
    if response.clicked() {
        wishes.push(Command::Unfold(stem.clone()));
    }
    open
}

fn item(ui: &mut Ui, height: f32, object: &ObjectId, context: &Context<'_>, wishes: &mut Wishes) {
    let c = colours(ui);
    let (rect, response) =
        ui.allocate_exact_size(vec2(ui.available_width(), height), Sense::click());
    let selected = context.view.selected.as_ref() == Some(object);
    response.widget_info(|| {
        WidgetInfo::selected(
            Role::ListItem,
            true,
            selected,
            format!("{object} in the list"),
        )
    });
    widgets::mark_selected(ui, response.id, selected);
    let row = Rect::from_min_max(rect.min + vec2(4.0, 0.0), rect.max - vec2(4.0, 0.0));
    if selected {
        widgets::selected_row(ui, row);
    } else if response.hovered() || context.view.hovered.as_ref() == Some(object) {
        ui.painter().rect_filled(row, 4, c.hover);
    }
    let y = rect.center().y;
    let at_fault = context
        .shown
        .faults_of(object)
        .any(|f| f.weight == Weight::Fault);
    let ink = if at_fault { c.fault } else { c.text };
    icon::paint(
        ui.painter(),
        Icon::of(object.kind),
        pos2(rect.left() + 34.0, y),
        16.0,
        ink,
    );
    let set = Type::body(selected);
    let end = rect.right() - 14.0;
    let left = rect.left() + 48.0;
    let painter = ui.painter().clone();
    if at_fault {
        icon::paint(&painter, Icon::Fault, pos2(end - 8.0, y), 16.0, c.fault);
        let name = text::cut_end(&painter, &object.name, set, end - 22.0 - left);
        text::put(&painter, pos2(left, y), Align::LEFT, &name, set, ink);
    } else {
        let fact = facts::aside(object, context);
        let wanted = text::width(&painter, &object.name, set).min(end - left);
        let room = (end - left - wanted - 10.0).max(0.0);
        let name = text::cut_end(&painter, &object.name, set, end - left);
        text::put(&painter, pos2(left, y), Align::LEFT, &name, set, ink);
        if room > 24.0 {
            let fact = text::cut_end(&painter, &fact, Type::Caption, room);
            text::put(
                &painter,
                pos2(end, y),
                Align::RIGHT,
                &fact,
                Type::Caption,
                c.quiet,
            );
        }
    }
    widgets::focus_ring(ui, &response, row);
    if response.clicked() {
        wishes.push(Command::Select(Some(object.clone())));
    }
    if response.hovered() && context.view.hovered.as_ref() != Some(object) {
        wishes.push(Command::Hover(Some(object.clone())));
    }
}
