//! How far apart two neighbouring ticks are, under the pointer.

use egui::{Align, CornerRadius, Pos2, Rect, Shape, Stroke, Ui, pos2, vec2};

use super::paint::{Brush, NUMBERS};
use crate::app::text;
use crate::app::theme::Type;
use crate::quantity::{Decimals, fixed, grouped};
use crate::task::speeds;

/// Where the dimension line stands.
const DIMENSION: f32 = 65.0;

/// How far apart the two ticks about the pointer are.
pub(super) fn dimension(ui: &Ui, brush: &Brush<'_>) {
    let layout = brush.layout;
    let (scale, axis) = layout.working();
    let band = Rect::from_min_max(
        pos2(layout.rect.left(), axis - 20.0),
        pos2(layout.rect.right(), axis + 4.0),
    );
    let Some(pointer) = ui
        .input(|i| i.pointer.hover_pos())
        .filter(|p| band.contains(*p))
    else {
        return;
    };
    if ui.ctx().layer_id_at(pointer) != Some(ui.layer_id()) || layout.close.is_some() {
        return;
    }
    let at = scale.rapidity(pointer.x - layout.rect.left());
    let Some(after) = layout
        .ticks
        .iter()
        .position(|t| t.rapidity > at)
        .filter(|&i| i > 0)
    else {
        return;
    };
    let (low, high) = (
        layout.ticks[after - 1].rapidity,
        layout.ticks[after].rapidity,
    );
    let (from, to) = (brush.x(scale.x(low)), brush.x(scale.x(high)));
    let words = apart(high - low);
    let width = text::width(brush.painter, &words, Type::Caption);
    let fits = to - from > width + 44.0;
    let y = layout.rect.top() + DIMENSION;
    if fits {
        let (left, right) = (from + 5.0, to - 5.0);
        let middle = f32::midpoint(left, right);
        let half = width / 2.0 + 6.0;
        arrow(brush, pos2(middle - half, y), pos2(left, y));
        arrow(brush, pos2(middle + half, y), pos2(right, y));
        let at = pos2(middle, y);
        text::put(
            brush.painter,
            at,
            Align::Center,
            &words,
            Type::Caption,
            brush.c.accent,
        );
    } else {
        let low = layout.rect.left() + 8.0 + width / 2.0;
        let high = layout.rect.right() - 8.0 - width / 2.0;
        let mut x = f32::midpoint(from, to).clamp(low, high);
        let handle = layout.handle();
        let reach = width / 2.0 + 12.0;
        if (x - handle.center().x).abs() < reach + handle.width() / 2.0 {
            x = if x < handle.center().x {
                handle.left() - reach
            } else {
                handle.right() + reach
            };
        }
        let at = pos2(x, axis + NUMBERS);
        let back = Rect::from_center_size(at, vec2(width + 12.0, 17.0));
        brush
            .painter
            .rect_filled(back, CornerRadius::same(4), brush.c.panel);
        text::put(
            brush.painter,
            at,
            Align::Center,
            &words,
            Type::Caption,
            brush.c.accent,
        );
    }
}

fn apart(rapidity: f64) -> String {
    let beta = grouped(&fixed(speeds(rapidity).beta, Decimals(6)));
    format!("{} apart, β {beta}", grouped(&fixed(rapidity, Decimals(6))))
}

fn arrow(brush: &Brush<'_>, from: Pos2, to: Pos2) {
    let y = from.y.floor() + 0.5;
    let stroke = Stroke::new(1.0, brush.c.accent);
    brush
        .painter
        .line_segment([pos2(from.x, y), pos2(to.x, y)], stroke);
    let back = 6.0 * (from.x - to.x).signum();
    let head = vec![
        pos2(to.x, y),
        pos2(to.x + back, y - 3.0),
        pos2(to.x + back, y + 3.0),
    ];
    brush
        .painter
        .add(Shape::convex_polygon(head, brush.c.accent, Stroke::NONE));
}
