//! Cutting at a rectangle: straight pieces, polygons.

use kurbo::{Point, Rect, Vec2};

/// The part of `a + s d`, `from <= s <= to`, inside a closed rectangle, as an interval of `s` (Liang and Barsky 1984).
pub(super) fn span(a: Point, d: Vec2, (from, to): (f64, f64), r: Rect) -> Option<(f64, f64)> {
    let (mut lo, mut hi) = (from, to);
    for (p, q) in [
        (-d.x, a.x - r.x0),
        (d.x, r.x1 - a.x),
        (-d.y, a.y - r.y0),
        (d.y, r.y1 - a.y),
    ] {
        if p == 0.0 {
            if q < 0.0 {
                return None;
            }
        } else if p < 0.0 {
            lo = lo.max(q / p);
        } else {
            hi = hi.min(q / p);
        }
    }
    (lo <= hi && lo.is_finite() && hi.is_finite()).then_some((lo, hi))
}

/// A segment inside a closed rectangle; `None` where nothing of some length is left.
pub(super) fn segment(a: Point, b: Point, r: Rect) -> Option<(Point, Point)> {
    piece(a, b - a, (0.0, 1.0), r)
}

/// The whole straight line through a point inside a closed rectangle.
pub(super) fn line(a: Point, d: Vec2, r: Rect) -> Option<(Point, Point)> {
    piece(a, d, (f64::NEG_INFINITY, f64::INFINITY), r)
}

/// The ray from a point inside a closed rectangle.
pub(super) fn ray(a: Point, d: Vec2, r: Rect) -> Option<(Point, Point)> {
    piece(a, d, (0.0, f64::INFINITY), r)
}

fn piece(a: Point, d: Vec2, range: (f64, f64), r: Rect) -> Option<(Point, Point)> {
    let (lo, hi) = span(a, d, range, r)?;
    let at = |s: f64| into(a + d * s, r);
    (lo < hi).then(|| (at(lo), at(hi)))
}

/// A point within rounding of a rectangle, put into it.
pub(super) fn into(p: Point, r: Rect) -> Point {
    Point::new(p.x.clamp(r.x0, r.x1), p.y.clamp(r.y0, r.y1))
}

/// A polygon inside a rectangle, edge by edge (Sutherland and Hodgman 1974); empty where nothing is left.
pub(super) fn polygon(points: &[Point], r: Rect) -> Vec<Point> {
    type Edge = (fn(Point, Rect) -> f64, fn(Point, Rect) -> Point);
    let edges: [Edge; 4] = [
        (|p, r| p.x - r.x0, |p, r| Point::new(r.x0, p.y)),
        (|p, r| r.x1 - p.x, |p, r| Point::new(r.x1, p.y)),
        (|p, r| p.y - r.y0, |p, r| Point::new(p.x, r.y0)),
        (|p, r| r.y1 - p.y, |p, r| Point::new(p.x, r.y1)),
    ];
    let mut kept = points.to_vec();
    for (depth, snap) in edges {
        let given = std::mem::take(&mut kept);
        for (i, &p) in given.iter().enumerate() {
            let before = given[(i + given.len() - 1) % given.len()];
            let (here, there) = (depth(p, r), depth(before, r));
            if (here >= 0.0) != (there >= 0.0) {
                kept.push(snap(before.lerp(p, there / (there - here)), r));
            }
            if here >= 0.0 {
                kept.push(p);
            }
        }
    }
    kept.dedup();
    if kept.len() > 1 && kept.first() == kept.last() {
        kept.pop();
    }
    if kept.len() < 3 { Vec::new() } else { kept }
}

/// True where a point lies in a closed rectangle.
pub(super) fn holds(r: Rect, p: Point) -> bool {
    r.x0 <= p.x && p.x <= r.x1 && r.y0 <= p.y && p.y <= r.y1
}

#[cfg(test)]
mod tests {
    use super::*;

    const UNIT: Rect = Rect::new(0.0, 0.0, 1.0, 1.0);

    #[test]
    fn a_segment_is_cut_at_both_edges() {
        let (a, b) = segment(Point::new(-1.0, -1.0), Point::new(3.0, 3.0), UNIT).unwrap();
        assert_eq!((a, b), (Point::ORIGIN, Point::new(1.0, 1.0)));
    }

    #[test]
    fn a_segment_beside_the_rectangle_leaves_nothing() {
        assert_eq!(
            segment(Point::new(-1.0, 0.5), Point::new(0.5, 2.5), UNIT),
            None
        );
    }

    #[test]
    fn a_ray_points_one_way() {
        assert_eq!(ray(Point::new(2.0, 0.5), Vec2::new(1.0, 0.0), UNIT), None);
        assert!(ray(Point::new(2.0, 0.5), Vec2::new(-1.0, 0.0), UNIT).is_some());
    }

    #[test]
    fn a_triangle_cut_at_a_corner_keeps_its_area_inside() {
        // The half square below x + y = 1.5 has area 1 - 1/8.
        let cut = polygon(
            &[
                Point::new(-1.0, -1.0),
                Point::new(2.5, -1.0),
                Point::new(-1.0, 2.5),
            ],
            UNIT,
        );
        let n = cut.len();
        let twice: f64 = (0..n)
            .map(|i| {
                let (p, q) = (cut[i], cut[(i + 1) % n]);
                p.x * q.y - q.x * p.y
            })
            .sum();
        assert!((twice.abs() / 2.0 - 0.875).abs() < 1e-15);
    }
}
