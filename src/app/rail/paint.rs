//! Painting the rail.

#![expect(
    clippy::cast_possible_truncation,
    reason = "the screen is in f32 points"
)]

use egui::{
    Align, Color32, CornerRadius, Painter, Pos2, Rect, Shape, Stroke, StrokeKind, Ui, pos2, vec2,
};

use super::layout::{self, CloseUp, Graduation, Name, TickKind, graduate};
use super::sense::handle_id;
use super::{AXIS_CLOSE, Layout, NAMES, dimension, entry, measure};
use crate::app::command::Wishes;
use crate::app::context::Context;
use crate::app::text;
use crate::app::theme::{FOCUS, Palette, Type};
use crate::app::widgets::{self, colours};
use crate::quantity::{Decimals, fixed};

/// Middles of a close-up's rows of names, from the lowest.
pub(super) const CLOSE_ROWS: [f32; 3] = [125.0, 110.0, 95.0];
/// Where leaders begin and end to slant.
const SLANT: (f32, f32) = (140.0, 154.0);
const TICK: f32 = 16.0;
const TICK_ABOVE: f32 = 10.0;
/// From an axis down to the middle of its numbers.
pub(super) const NUMBERS: f32 = 17.0;
/// Numbers nearer to the handle are left out.
const CLEAR: f32 = 26.0;

/// A painter with what it needs to know.
pub(super) struct Brush<'a> {
    pub(super) painter: &'a Painter,
    pub(super) c: &'static Palette,
    pub(super) layout: &'a Layout,
    standing: Option<usize>,
}

/// Paints the rail and reads its first row.
pub(in crate::app) fn paint(ui: &mut Ui, rect: Rect, context: &Context<'_>, wishes: &mut Wishes) {
    let layout = Layout::new(rect, context.shown, &context.view.rail, &measure(ui));
    let c = colours(ui);
    widgets::ground(ui, c.panel);
    entry::row(ui, &layout, context, wishes);
    let painter = ui.painter().clone();
    let brush = Brush {
        painter: &painter,
        c,
        layout: &layout,
        standing: layout.standing(),
    };
    brush.ends();
    brush.axis();
    if let Some(close) = &layout.close {
        brush.close_up(close);
    }
    brush.names();
    dimension::dimension(ui, &brush);
    brush.handle();
    if context.document.is_empty() {
        brush.hint();
    }
    handle_node(ui, &layout, context);
    if ui.memory(|m| m.has_focus(handle_id())) {
        let ring = layout.handle().expand(4.0);
        let stroke = Stroke::new(FOCUS, c.accent);
        painter.rect_stroke(ring, CornerRadius::same(4), stroke, StrokeKind::Middle);
    }
    let (left, right) = (rect.left_bottom(), rect.right_bottom());
    widgets::hairline(ui, left - vec2(0.0, 1.0), right - vec2(0.0, 1.0));
}

/// The handle as a screen reader has it, with the value it has now.
fn handle_node(ui: &Ui, layout: &Layout, context: &Context<'_>) {
    let words = format!(
        "{}, rapidity {}",
        context.frame_name().replace(layout::ACROSS, "across"),
        fixed(layout.rapidity, Decimals(6))
    );
    ui.ctx().accesskit_node_builder(handle_id(), |node| {
        node.set_numeric_value(layout.rapidity);
        node.set_min_numeric_value(layout.scale.low);
        node.set_max_numeric_value(layout.scale.high);
        node.set_value(words);
        node.set_description(
            "Left and Right move it, Control goes from tick to tick, Home to the base frame",
        );
    });
}

impl Brush<'_> {
    pub(super) fn x(&self, x: f32) -> f32 {
        self.layout.rect.left() + x
    }

    fn y(&self, y: f32) -> f32 {
        self.layout.rect.top() + y
    }

    /// A stroke's middle on whole points for its width.
    fn crisp(x: f32, width: f32) -> f32 {
        if width as i32 % 2 == 1 {
            x.floor() + 0.5
        } else {
            x.round()
        }
    }

    fn upright(&self, x: f32, from: f32, to: f32, stroke: Stroke) {
        let x = Self::crisp(x, stroke.width);
        self.painter
            .line_segment([pos2(x, from), pos2(x, to)], stroke);
    }

    /// The walls that no frame reaches, and the dots that say how far they are.
    fn ends(&self) {
        let axis = self.layout.axis();
        let whole = self.layout.close.is_none();
        let half = if whole { 16.0 } else { 12.0 };
        let (left, right) = (self.layout.rect.left(), self.layout.rect.right());
        for (wall, toward) in [(left + layout::EDGE, 1.0), (right - layout::EDGE, -1.0)] {
            let body = Rect::from_center_size(pos2(wall, axis), vec2(4.0, 2.0 * half));
            self.painter
                .rect_filled(body, CornerRadius::ZERO, self.c.text);
            let mut at = 4.0;
            while at < layout::END - layout::EDGE - 2.0 {
                let from = wall + toward * at;
                let dot = Rect::from_two_pos(
                    pos2(from, axis - 1.0),
                    pos2(from + toward * 2.0, axis + 1.0),
                );
                self.painter
                    .rect_filled(dot, CornerRadius::ZERO, self.c.text);
                at += 6.0;
            }
            let (align, speed) = if toward > 0.0 {
                (Align::LEFT, "β = \u{2212}1")
            } else {
                (Align::RIGHT, "β = 1")
            };
            let x = wall + toward * 8.0;
            let above = axis - if whole { 14.0 } else { 11.0 };
            text::put(
                self.painter,
                pos2(x, above),
                align,
                "light",
                Type::Caption,
                self.c.text,
            );
            if whole {
                let below = pos2(x, axis + NUMBERS);
                text::put(
                    self.painter,
                    below,
                    align,
                    speed,
                    Type::Caption,
                    self.c.quiet,
                );
            }
        }
    }

    fn axis(&self) {
        let layout = self.layout;
        let axis = layout.axis();
        let (from, to) = (self.x(layout.scale.left), self.x(layout.scale.right));
        let bar = Rect::from_min_max(pos2(from, axis - 1.0), pos2(to, axis + 1.0));
        self.painter
            .rect_filled(bar, CornerRadius::ZERO, self.c.text);
        let open = layout.close.as_ref().map(|c| c.ticks.clone());
        if open.is_none() {
            self.graduation(&graduate(&layout.scale), axis, true);
        }
        let high = if open.is_some() { TICK_ABOVE } else { TICK };
        let visible = |r: f64| (layout.scale.low..=layout.scale.high).contains(&r);
        let places: Vec<f32> = layout
            .ticks
            .iter()
            .filter(|t| visible(t.rapidity))
            .map(|t| layout.scale.x(t.rapidity))
            .collect();
        for (from, to) in layout::bars(places.into_iter())
            .into_iter()
            .filter(|b| b.1 > b.0)
        {
            self.merged(from, to, axis - high, axis);
        }
        for (i, tick) in layout.ticks.iter().enumerate() {
            if visible(tick.rapidity) {
                let colour = self.tick_colour(i);
                let bare = layout
                    .names
                    .iter()
                    .any(|n| n.is_bracket() && n.ticks.contains(&i));
                let kind = if bare { TickKind::Line } else { tick.kind };
                let x = self.x(layout.scale.x(tick.rapidity));
                self.tick(kind, pos2(x, axis - 1.0), high - 1.0, colour);
            }
        }
    }

    fn tick_colour(&self, tick: usize) -> Color32 {
        if self.standing == Some(tick) {
            self.c.accent
        } else {
            self.c.text
        }
    }

    fn merged(&self, from: f32, to: f32, top: f32, bottom: f32) {
        let bar = Rect::from_min_max(
            pos2(self.x(from) - 0.5, top),
            pos2(self.x(to) + 0.5, bottom),
        );
        self.painter
            .rect_filled(bar, CornerRadius::ZERO, self.c.text);
    }

    /// A tick by the kind of what stands there.
    fn tick(&self, kind: TickKind, foot: Pos2, high: f32, colour: Color32) {
        let stroke = Stroke::new(1.0, colour);
        let x = Self::crisp(foot.x, 1.0);
        let top = foot.y - high;
        match kind {
            TickKind::Line => self.upright(x, top, foot.y, stroke),
            TickKind::Particle => {
                self.upright(x, top + 4.0, foot.y, stroke);
                let head = vec![
                    pos2(x, top),
                    pos2(x + 3.5, top + 7.0),
                    pos2(x - 3.5, top + 7.0),
                ];
                self.painter
                    .add(Shape::convex_polygon(head, colour, Stroke::NONE));
            }
            TickKind::Frame => {
                self.upright(x, top + 7.0, foot.y, stroke);
                let square = Rect::from_min_size(pos2(x - 3.5, top), vec2(7.0, 7.0));
                self.painter.rect(
                    square,
                    CornerRadius::ZERO,
                    self.c.panel,
                    stroke,
                    StrokeKind::Inside,
                );
            }
            TickKind::Base => {
                self.upright(x, top + 7.0, foot.y, stroke);
                let square = Rect::from_min_size(pos2(x - 4.5, top), vec2(8.0, 8.0));
                self.painter.rect_filled(
                    square.translate(vec2(0.5, 0.0)),
                    CornerRadius::ZERO,
                    colour,
                );
            }
        }
    }

    fn graduation(&self, graduation: &Graduation, axis: f32, number_strokes: bool) {
        let stroke = Stroke::new(1.0, self.c.quiet);
        let handle = self.layout.handle_x();
        let handle_here = (self.layout.handle().top() - axis).abs() < 4.0;
        for x in &graduation.strokes {
            self.upright(self.x(*x), axis + 1.0, axis + 5.0, stroke);
        }
        for (x, number) in &graduation.numbers {
            let x = self.x(*x);
            if number_strokes || !handle_here {
                self.upright(x, axis + 1.0, axis + 9.0, stroke);
            }
            if handle_here && (x - handle).abs() < CLEAR {
                continue;
            }
            let at = pos2(x, axis + NUMBERS);
            text::put(
                self.painter,
                at,
                Align::Center,
                number,
                Type::Caption,
                self.c.quiet,
            );
        }
    }

    fn names(&self) {
        for name in &self.layout.names {
            let here = self.standing.is_some_and(|tick| name.ticks.contains(&tick));
            if name.is_bracket() {
                self.bracket(name);
            }
            let colour = if here { self.c.accent } else { self.c.text };
            let at = pos2(self.x(name.at), self.y(NAMES));
            text::put(
                self.painter,
                at,
                Align::Center,
                &name.text,
                Type::caption(here),
                colour,
            );
        }
    }

    fn is_open(&self, name: &Name) -> bool {
        self.layout
            .close
            .as_ref()
            .is_some_and(|c| c.ticks == name.ticks)
    }

    fn bracket(&self, name: &Name) {
        let axis = self.layout.axis();
        let (from, to) = (self.x(name.from) - 3.0, self.x(name.to) + 3.0);
        let (from, to) = (from.floor() + 0.5, to.floor() + 0.5);
        if self.is_open(name) {
            let stroke = Stroke::new(1.0, self.c.accent);
            let around = Rect::from_min_max(pos2(from, axis - 13.0), pos2(to, axis + 7.0));
            self.painter
                .rect_stroke(around, CornerRadius::ZERO, stroke, StrokeKind::Middle);
            return;
        }
        let stroke = Stroke::new(1.0, self.c.text);
        let top = axis - 19.5;
        let shape = vec![
            pos2(from, top + 4.0),
            pos2(from, top),
            pos2(to, top),
            pos2(to, top + 4.0),
        ];
        self.painter.add(Shape::line(shape, stroke));
    }

    fn close_up(&self, close: &CloseUp) {
        let axis = self.y(AXIS_CLOSE);
        let (left, right) = (
            self.x(close.scale.left) + 0.5,
            self.x(close.scale.right) - 0.5,
        );
        let accent = Stroke::new(1.0, self.c.accent);
        if let Some(name) = self.layout.names.iter().find(|n| self.is_open(n)) {
            let from = self.layout.axis() + 7.0;
            let corner = self.y(84.0);
            let ends = [(name.from - 3.0, left), (name.to + 3.0, right)];
            for (bracket, side) in ends {
                let path = vec![
                    pos2(self.x(bracket).floor() + 0.5, from),
                    pos2(side, corner),
                    pos2(side, axis),
                ];
                self.painter.add(Shape::line(path, accent));
            }
        }
        let bar = Rect::from_min_max(pos2(left, axis - 1.0), pos2(right, axis + 1.0));
        self.painter
            .rect_filled(bar, CornerRadius::ZERO, self.c.text);
        self.graduation(&graduate(&close.scale), axis, true);
        for &(from, to) in &close.bars {
            if to > from {
                self.merged(from, to, axis - 10.0, axis);
            }
        }
        for i in close.ticks.clone() {
            let x = self.x(close.scale.x(self.layout.ticks[i].rapidity));
            let stroke = Stroke::new(1.0, self.tick_colour(i));
            self.upright(x, axis - 10.0, axis - 1.0, stroke);
        }
        for name in &close.names {
            self.close_name(name, axis);
        }
    }

    fn close_name(&self, name: &layout::CloseName, axis: f32) {
        let here = self.standing == Some(name.tick);
        let stroke = Stroke::new(1.0, if here { self.c.accent } else { self.c.quiet });
        let middle = self.y(CLOSE_ROWS[name.row]);
        let (hang, foot) = (
            Self::crisp(self.x(name.leader), 1.0),
            Self::crisp(self.x(name.x), 1.0),
        );
        let leader = vec![
            pos2(hang, middle + 8.0),
            pos2(hang, self.y(SLANT.0)),
            pos2(foot, self.y(SLANT.1)),
            pos2(foot, axis - 1.0),
        ];
        self.painter.add(Shape::line(leader, stroke));
        let colour = if here { self.c.accent } else { self.c.text };
        let at = pos2(self.x(name.right), middle);
        text::put(
            self.painter,
            at,
            Align::RIGHT,
            &name.text,
            Type::caption(here),
            colour,
        );
    }

    fn handle(&self) {
        let peg = self.layout.handle();
        let (_, axis) = self.layout.working();
        let x = peg.center().x.round();
        let accent = self.c.accent;
        let high = if self.layout.close.is_some() {
            10.0
        } else {
            TICK
        };
        let line = Rect::from_min_max(pos2(x - 1.0, axis - high), pos2(x + 1.0, axis));
        // A named frame's or the base's square keeps its form above the hairline.
        let form = self.standing.map(|i| self.layout.ticks[i].kind);
        let top = match form {
            Some(TickKind::Frame | TickKind::Base) => line.top() + 7.0,
            Some(TickKind::Particle) => line.top() + 5.0,
            Some(TickKind::Line) | None => line.top(),
        };
        self.painter
            .rect_filled(line.with_min_y(top), CornerRadius::ZERO, accent);
        let (left, right) = (x - 7.0, x + 7.0);
        let (top, bottom) = (axis + 2.0, axis + 22.0);
        let shape = vec![
            pos2(x, top),
            pos2(right, top + 6.0),
            pos2(right, bottom),
            pos2(left, bottom),
            pos2(left, top + 6.0),
        ];
        self.painter
            .add(Shape::convex_polygon(shape, accent, Stroke::NONE));
        for grip in [-2.5, 1.5] {
            let stroke =
                Rect::from_min_max(pos2(x + grip, top + 9.0), pos2(x + grip + 1.0, top + 15.0));
            self.painter
                .rect_filled(stroke, CornerRadius::ZERO, self.c.on_accent);
        }
    }

    fn hint(&self) {
        let Some(last) = self.layout.names.last() else {
            return;
        };
        let at = pos2(self.x(last.at + last.width / 2.0) + 16.0, self.y(NAMES));
        let words = "Every line, massive particle and named frame will stand here at its rapidity.";
        text::put(
            self.painter,
            at,
            Align::LEFT,
            words,
            Type::Caption,
            self.c.quiet,
        );
    }
}
