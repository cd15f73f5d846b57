//! Labels meet no ink and no other label.

use std::fmt::Write as _;

use conewright::marks::{Ink, Paint, Shape, Sheet};
use kurbo::{BezPath, PathEl, Point, Rect, Shape as _};

use super::{Draws, labels, laid, to_chord};

/// A scene by chance: a few events, lines, signals, frames, a collision.
fn invented(draws: &mut Draws) -> String {
    let mut text = String::from(
        "Scene(format: 1, base: \"b\", units: (time: \"s\", length: \"Mm\", energy: \"GeV\"), events: {",
    );
    let events = 2 + draws.below(6);
    for i in 0..events {
        let (t, x) = (draws.between(-2.0, 20.0), draws.between(-3000.0, 3000.0));
        let label = ["P", "Q", "R_1", "S", "T", "U", "V", "W"][usize::try_from(i).unwrap()];
        let _ = write!(
            text,
            "\"e{i}\": At(t: {t:.3}, x: {x:.1}, label: \"{label}\"), "
        );
    }
    text.push_str("}, lines: {");
    let lines = 1 + draws.below(5);
    for i in 0..lines {
        let beta = draws.between(-0.9, 0.9);
        let through = draws.below(events);
        let _ = write!(
            text,
            "\"line {i}\": Free(through: \"e{through}\", velocity: Beta({beta:.3})), "
        );
    }
    let toward = if draws.below(2) == 0 { "Plus" } else { "Minus" };
    let _ = write!(
        text,
        "\"ray\": Light(through: \"e0\", toward: {toward}) }}, frames: {{ "
    );
    let beta = draws.between(-0.8, 0.8);
    let _ = write!(
        text,
        "\"f\": Moving(velocity: Beta({beta:.3})) }}, particles: {{ "
    );
    let (p, q) = (draws.between(-3.0, 3.0), draws.between(-3.0, 3.0));
    let _ = write!(
        text,
        "\"a\": (species: \"p\", state: Components(px: {p:.3}, py: 0)), \"c\": (species: \"gamma\", state: Momentum(\"{q:.3} GeV/c\")), \"m\": (state: Closing) }},
        collisions: {{ \"x\": (before: [\"a\", \"c\"], after: [\"m\"], closure: Merge) }}, "
    );
    let (axes, arcs) = (draws.below(2) == 0, draws.below(2) == 0);
    let axes = if axes { "axes: [\"f\"]," } else { "" };
    let cut = if draws.below(2) == 0 {
        "simultaneity: [(\"e1\", \"f\")],"
    } else {
        ""
    };
    let arrows = if draws.below(2) == 0 {
        "TipToTail"
    } else {
        "FromOrigin"
    };
    let width = 120 + 10 * draws.below(8);
    let frame = if draws.below(3) == 0 {
        "frame: \"f\","
    } else {
        ""
    };
    let _ = write!(
        text,
        "plates: {{ \"p\": (width: \"{width} mm\", panels: [
            (view: Spacetime, {frame} cones: [\"e0\"], {axes} {cut} hyperbolas: {arcs}),
            (view: EnergyMomentum, {frame} collision: \"x\", arrows: {arrows}),
        ]) }})"
    );
    text
}

/// Straight pieces of a path.
fn chords(path: &BezPath) -> Vec<(Point, Point)> {
    let mut found = Vec::new();
    let mut last = Point::ORIGIN;
    let mut start = Point::ORIGIN;
    kurbo::flatten(path, 0.01, |element| match element {
        PathEl::MoveTo(p) => (last, start) = (p, p),
        PathEl::LineTo(p) => {
            found.push((last, p));
            last = p;
        }
        PathEl::ClosePath => {
            found.push((last, start));
            last = start;
        }
        PathEl::QuadTo(..) | PathEl::CurveTo(..) => unreachable!("flattened"),
    });
    found
}

fn segments_cross((a, b): (Point, Point), (p, q): (Point, Point)) -> bool {
    let side = |o: Point, d: Point, s: Point| (d - o).cross(s - o);
    side(a, b, p) * side(a, b, q) < 0.0 && side(p, q, a) * side(p, q, b) < 0.0
}

/// A mark's ink.
struct Set {
    chords: Vec<(Point, Point)>,
    /// Half a stroke's width.
    half: f64,
    area: Rect,
    is_label: bool,
    fill: Option<BezPath>,
}

impl Set {
    /// The tint under a light cone is ground, not ink.
    fn of(shape: &Shape) -> Option<Self> {
        const TINT: Ink = Ink(0xFA, 0xF5, 0xE6);
        let (path, half, fill) = match shape {
            Shape::Path {
                paint: Paint::Fill(TINT),
                ..
            } => return None,
            Shape::Path {
                path,
                paint: Paint::Fill(_),
            } => (path.clone(), 0.0, Some(path.clone())),
            Shape::Path {
                path,
                paint: Paint::Stroke(stroke),
            } => (path.clone(), stroke.width / 2.0, None),
            Shape::Label { .. } => (shape.outline(), 0.0, None),
        };
        let is_label = matches!(shape, Shape::Label { .. });
        Some(Self {
            chords: chords(&path),
            half,
            area: shape.ink_box(),
            is_label,
            fill,
        })
    }

    fn touches(&self, other: &Self) -> bool {
        if self
            .area
            .inflate(0.01, 0.01)
            .intersect(other.area)
            .is_zero_area()
        {
            return false;
        }
        let half = other.half;
        let reach = self.area.inflate(half + 0.01, half + 0.01);
        let is_near = |(p, q): &(Point, Point)| {
            !reach
                .intersect(Rect::from_points(*p, *q).inflate(1e-6, 1e-6))
                .is_zero_area()
        };
        let near: Vec<_> = other.chords.iter().copied().filter(is_near).collect();
        let close = |c: (Point, Point), o: (Point, Point)| {
            half > 0.0 && (to_chord(c.0, o.0, o.1) < half || to_chord(o.0, c.0, c.1) < half)
        };
        let is_inside = |p: Point| other.fill.as_ref().is_some_and(|fill| fill.contains(p));
        self.chords
            .iter()
            .any(|&c| is_inside(c.0) || near.iter().any(|&o| segments_cross(c, o) || close(c, o)))
    }
}

/// How many pairs of a label and other ink (or another label) touch on a sheet.
fn overlaps(sheet: &Sheet) -> usize {
    let sets: Vec<Set> = sheet
        .marks
        .iter()
        .filter_map(|mark| Set::of(&mark.shape))
        .collect();
    let mut count = 0;
    for (i, label) in sets.iter().enumerate().filter(|(_, set)| set.is_label) {
        for (j, other) in sets.iter().enumerate() {
            let meets = if other.is_label {
                j > i && !label.area.intersect(other.area).is_zero_area()
            } else {
                label.touches(other)
            };
            count += usize::from(meets);
        }
    }
    count
}

#[test]
fn no_label_meets_ink_on_two_hundred_invented_scenes() {
    let mut draws = Draws(0x5eed_0002);
    let (mut placed, mut missing) = (0, 0);
    for round in 0..200 {
        let text = invented(&mut draws);
        let laid = laid(&text, "p");
        assert_eq!(overlaps(&laid.sheet), 0, "round {round}: {text}");
        placed += labels(&laid.sheet).len();
        missing += laid
            .faults
            .iter()
            .filter(|f| f.what.contains("no free place"))
            .count();
    }
    assert!(placed > 4000, "{placed}");
    assert!(
        missing * 20 < placed,
        "{missing} of {placed} labels found no place"
    );
}
