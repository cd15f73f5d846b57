//! Thick lines as outlines, so that they can be cut flush with the field, and dashes stretched to end on a full one.

use kurbo::{BezPath, Point, Rect, Vec2};

use super::clip;
use super::style::HAIR;

/// The outline of a polyline of some width, corners mitred, ends square, cut at the field (where one is given).
/// Worldlines turn by less than a right angle, so that a mitre is at most 1.42 half widths long.
pub(super) fn thick(points: &[Point], width: f64, field: Option<Rect>) -> BezPath {
    let outline = both_sides(points, width / 2.0);
    closed(&field.map_or(outline.clone(), |field| clip::polygon(&outline, field)))
}

fn both_sides(points: &[Point], half: f64) -> Vec<Point> {
    let mut kept: Vec<Point> = Vec::with_capacity(points.len());
    for &p in points {
        if kept.last().is_none_or(|&q| (p - q).hypot() > HAIR) {
            kept.push(p);
        }
    }
    if kept.len() < 2 {
        return Vec::new();
    }
    let ways: Vec<Vec2> = kept.windows(2).map(|w| (w[1] - w[0]).normalize()).collect();
    let offset = |i: usize| {
        let before = ways[i.saturating_sub(1)];
        let after = ways[i.min(ways.len() - 1)];
        let sum = left(before) + left(after);
        // The mitre's tip: along the sum of the normals, at a half width from both strokes.
        sum * (half * 2.0 / sum.hypot2().max(HAIR))
    };
    let mut outline: Vec<Point> = (0..kept.len()).map(|i| kept[i] + offset(i)).collect();
    outline.extend((0..kept.len()).rev().map(|i| kept[i] - offset(i)));
    outline
}

fn left(way: Vec2) -> Vec2 {
    Vec2::new(-way.y, way.x)
}

/// A closed path through some points; empty for fewer than three.
pub(super) fn closed(points: &[Point]) -> BezPath {
    let mut path = BezPath::new();
    if let [first, rest @ ..] = points
        && rest.len() >= 2
    {
        path.move_to(*first);
        for &p in rest {
            path.line_to(p);
        }
        path.close_path();
    }
    path
}

/// An open path through some points.
pub(super) fn open(points: &[Point]) -> BezPath {
    let mut path = BezPath::new();
    if let [first, rest @ ..] = points {
        path.move_to(*first);
        for &p in rest {
            path.line_to(p);
        }
    }
    path
}

/// A dash pattern stretched (or shrunk) so that a stroke of some length starts and ends on a full dash; none where it
/// would be a single one.
pub(super) fn stretched([on, off]: [f64; 2], length: f64) -> Vec<f64> {
    let count = ((length + off) / (on + off)).round();
    if count < 2.0 {
        return Vec::new();
    }
    let stretch = length / (count * on + (count - 1.0) * off);
    vec![on * stretch, off * stretch]
}

/// A polyline cut into dashes, each a polyline.
pub(super) fn dashes(points: &[Point], pattern: [f64; 2]) -> Vec<Vec<Point>> {
    let length: f64 = points.windows(2).map(|w| (w[1] - w[0]).hypot()).sum();
    let pattern = stretched(pattern, length);
    let [on, off] = pattern[..] else {
        return vec![points.to_vec()];
    };
    let count = super::whole::count((length + off) / (on + off) + 0.5);
    (0..count)
        .map(|i| {
            let start = i as f64 * (on + off);
            between(points, start, start + on)
        })
        .collect()
}

/// The part of a polyline between two lengths along it.
fn between(points: &[Point], from: f64, to: f64) -> Vec<Point> {
    let mut part = Vec::new();
    let mut passed = 0.0;
    for w in points.windows(2) {
        let length = (w[1] - w[0]).hypot();
        let (a, b) = ((from - passed) / length, (to - passed) / length);
        if b > 0.0 && a < 1.0 {
            if part.is_empty() {
                part.push(w[0].lerp(w[1], a.max(0.0)));
            }
            part.push(w[0].lerp(w[1], b.min(1.0)));
        }
        passed += length;
    }
    part
}

/// A disc as four cubics (Bezier's constant for a quarter, 4/3 (sqrt 2 - 1)).
pub(super) fn disc(centre: Point, radius: f64) -> BezPath {
    const QUARTER: f64 = 0.552_284_749_830_793_4;
    let k = radius * QUARTER;
    let at = |x: f64, y: f64| centre + Vec2::new(x, y);
    let r = radius;
    let mut path = BezPath::new();
    path.move_to(at(r, 0.0));
    path.curve_to(at(r, k), at(k, r), at(0.0, r));
    path.curve_to(at(-k, r), at(-r, k), at(-r, 0.0));
    path.curve_to(at(-r, -k), at(-k, -r), at(0.0, -r));
    path.curve_to(at(k, -r), at(r, -k), at(r, 0.0));
    path.close_path();
    path
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn dashes_start_and_end_the_stroke() {
        let points = [
            Point::new(0.0, 0.0),
            Point::new(10.0, 0.0),
            Point::new(10.0, 9.3),
        ];
        let parts = dashes(&points, [2.0, 1.0]);
        assert_eq!(parts[0][0], points[0]);
        let end = *parts.last().unwrap().last().unwrap();
        assert!((end - points[2]).hypot() < 1e-12);
    }

    #[test]
    fn a_thick_corner_is_mitred() {
        // A right angle: the outer corner stands at half the width beyond, both ways.
        let points = [
            Point::new(0.0, 0.0),
            Point::new(4.0, 0.0),
            Point::new(4.0, 4.0),
        ];
        let outline = both_sides(&points, 0.5);
        assert!(
            outline
                .iter()
                .any(|p| (*p - Point::new(4.5, -0.5)).hypot() < 1e-12)
        );
        assert!(
            outline
                .iter()
                .any(|p| (*p - Point::new(3.5, 0.5)).hypot() < 1e-12)
        );
    }
}
