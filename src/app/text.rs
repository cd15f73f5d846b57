//! Text set on the desk: centred on its capitals, on whole points.

use std::sync::Arc;

use egui::{Align, Color32, Galley, Painter, Pos2, Rect, Stroke, pos2, vec2};

use super::rail::ACROSS;
use super::theme::Type;

/// From the middle of the capitals to the baseline, in sizes of the type.
const CAPITALS: f32 = 0.357;
/// Width of the painted sign of motion across, in sizes of the type.
const ACROSS_WIDTH: f32 = 0.75;

fn galley(painter: &Painter, text: &str, set: Type, colour: Color32) -> Arc<Galley> {
    painter.layout_no_wrap(text.to_owned(), set.font(), colour)
}

/// From the top of a galley to the baseline of its first row.
pub(super) fn baseline(galley: &Galley) -> f32 {
    galley
        .rows
        .first()
        .and_then(|row| row.row.glyphs.first().map(|g| row.pos.y + g.pos.y))
        .unwrap_or(0.0)
}

/// The width of a text.
pub(super) fn width(painter: &Painter, text: &str, set: Type) -> f32 {
    let signs = text.matches(ACROSS).count() as f32 * ACROSS_WIDTH * set.font().size;
    let letters: f32 = text
        .split(ACROSS)
        .filter(|part| !part.is_empty())
        .map(|part| galley(painter, part, set, Color32::PLACEHOLDER).size().x)
        .sum();
    letters + signs
}

/// Paints a text with the middle of its capitals at `at.y`, and its left end, middle or right end at `at.x`. Gives its
/// box.
pub(super) fn put(
    painter: &Painter,
    at: Pos2,
    align: Align,
    text: &str,
    set: Type,
    colour: Color32,
) -> Rect {
    let size = set.font().size;
    let across = width(painter, text, set);
    let left = match align {
        Align::LEFT => at.x,
        Align::Center => (at.x - across / 2.0).round(),
        Align::RIGHT => at.x - across,
    };
    let base = (at.y + CAPITALS * size).round();
    let mut x = left;
    for (i, part) in text.split(ACROSS).enumerate() {
        if i > 0 {
            across_sign(painter, pos2(x, base), size, colour);
            x += ACROSS_WIDTH * size;
        }
        if !part.is_empty() {
            let galley = galley(painter, part, set, colour);
            let top = base - baseline(&galley);
            let advance = galley.size().x;
            painter.galley(pos2(x, top), galley, colour);
            x += advance;
        }
    }
    Rect::from_min_size(pos2(left, at.y - size * 0.6), vec2(across, size * 1.2))
}

fn across_sign(painter: &Painter, at: Pos2, size: f32, colour: Color32) {
    let stroke = Stroke::new(1.0, colour);
    let (left, right) = (at.x + 1.0, at.x + ACROSS_WIDTH * size - 1.0);
    let middle = f32::midpoint(left, right).floor() + 0.5;
    let foot = at.y - 0.5;
    painter.line_segment([pos2(left, foot), pos2(right, foot)], stroke);
    painter.line_segment(
        [pos2(middle, foot), pos2(middle, foot - size * 0.7)],
        stroke,
    );
}

/// A text cut at its end to fit a width.
pub(super) fn cut_end(painter: &Painter, text: &str, set: Type, room: f32) -> String {
    cut(
        text,
        |short| width(painter, short, set) <= room,
        |kept| {
            let head: String = text.chars().take(kept).collect();
            format!("{}…", head.trim_end())
        },
    )
}

/// A text cut in its middle to fit a width.
pub(super) fn cut_middle(painter: &Painter, text: &str, set: Type, room: f32) -> String {
    let count = text.chars().count();
    cut(
        text,
        |short| width(painter, short, set) <= room,
        |kept| {
            let head: String = text.chars().take(kept.div_ceil(2)).collect();
            let tail: String = text.chars().skip(count - kept / 2).collect();
            format!("{head}…{tail}")
        },
    )
}

fn cut(text: &str, fits: impl Fn(&str) -> bool, shorten: impl Fn(usize) -> String) -> String {
    if fits(text) {
        return text.to_owned();
    }
    let (mut low, mut high) = (0, text.chars().count());
    while low + 1 < high {
        let middle = usize::midpoint(low, high);
        if fits(&shorten(middle)) {
            low = middle;
        } else {
            high = middle;
        }
    }
    shorten(low)
}

/// Several lines of text wrapped to a width, from the top left. Gives the box.
pub(super) fn wrapped(
    painter: &Painter,
    at: Pos2,
    room: f32,
    text: &str,
    set: Type,
    colour: Color32,
) -> Rect {
    let galley = painter.layout(text.to_owned(), set.font(), colour, room);
    let size = galley.size();
    painter.galley(at, galley, colour);
    Rect::from_min_size(at, size)
}
