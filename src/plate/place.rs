//! Places for labels. Each label names a few places beside what it belongs to, in order of preference; the one taken
//! meets no ink and no other label, and has the least distance + order - clearance. A grid of cells keeps many labels
//! fast. Moving several labels together for one more is left to a later labeller, which would stand here.

use kurbo::{Point, Rect, Vec2};

use super::style::{HAIR, Style};
use super::whole;

/// A straight piece of ink with its half width, mm.
#[derive(Clone, Copy, Debug, PartialEq)]
struct Piece {
    a: Point,
    b: Point,
    half: f64,
    /// Thick enough to part a label from what it names.
    is_heavy: bool,
}

/// One place a label may take.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Candidate {
    /// The box of the label's ink, mm.
    pub(super) rect: Rect,
    /// Distance and order of preference together, mm.
    pub(super) cost: f64,
    /// Where what it names begins: no heavy ink may lie between there and the label, and thin ink had better not.
    pub(super) leader: Option<Point>,
}

/// Ink and labels of a panel, by cells.
#[derive(Clone, Debug)]
pub(super) struct Places {
    bounds: Rect,
    columns: usize,
    rows: usize,
    ink: Vec<Vec<usize>>,
    text: Vec<Vec<usize>>,
    dots: Dots,
    pieces: Vec<Piece>,
    labels: Vec<Rect>,
    clear_ink: f64,
    clear_label: f64,
    /// How much clearance counts, mm.
    reach: f64,
    /// What thin ink between a label and what it names costs, mm.
    thin_between: f64,
}

/// Small cells that hold a point of ink: where ink is dense they tell at once that a box meets some.
#[derive(Clone, Debug)]
struct Dots {
    bounds: Rect,
    columns: usize,
    rows: usize,
    is_inked: Vec<bool>,
}

/// Side of a small cell, mm.
const DOT: f64 = 0.5;
/// Most small cells along one side.
const MOST_DOTS: usize = 1024;

impl Dots {
    fn new(bounds: Rect) -> Self {
        let count = |side: f64| whole::count((side / DOT).ceil()).clamp(1, MOST_DOTS);
        let (columns, rows) = (count(bounds.width()), count(bounds.height()));
        Self {
            bounds,
            columns,
            rows,
            is_inked: vec![false; columns * rows],
        }
    }

    /// A point in cells from the upper left corner.
    fn cells(&self, p: Point) -> Point {
        Point::new(
            (p.x - self.bounds.x0) / self.bounds.width() * self.columns as f64,
            (p.y - self.bounds.y0) / self.bounds.height() * self.rows as f64,
        )
    }

    /// Takes up points of a straight piece, one in each cell or so.
    fn take(&mut self, a: Point, b: Point) {
        let Some((a, b)) = super::clip::segment(a, b, self.bounds) else {
            return;
        };
        let (a, b) = (self.cells(a), self.cells(b));
        let steps = whole::count((b - a).hypot()) + 1;
        for i in 0..=steps {
            let p = a.lerp(b, i as f64 / steps as f64);
            let (column, row) = (whole::count(p.x), whole::count(p.y));
            if column < self.columns && row < self.rows {
                self.is_inked[row * self.columns + column] = true;
            }
        }
    }

    /// Whether some cell that lies wholly in a box holds ink.
    fn any(&self, rect: Rect) -> bool {
        let (low, high) = (
            self.cells(rect.origin()),
            self.cells(Point::new(rect.x1, rect.y1)),
        );
        let columns = whole::count(low.x.ceil())..whole::count(high.x).min(self.columns);
        (whole::count(low.y.ceil())..whole::count(high.y).min(self.rows)).any(|row| {
            columns
                .clone()
                .any(|column| self.is_inked[row * self.columns + column])
        })
    }
}

/// Side of a cell, mm.
const CELL: f64 = 4.0;
/// Most cells along one side.
const MOST_CELLS: usize = 256;
/// Clearance beyond the least that still counts for a place, in ems.
const CLEARANCE_WORTH: f64 = 0.4;
/// What thin ink between a label and what it names costs, ems.
const THIN_BETWEEN: f64 = 0.8;

impl Places {
    /// None taken, inside a panel.
    pub(super) fn new(panel: Rect, style: &Style) -> Self {
        let count = |side: f64| whole::count((side / CELL).ceil()).clamp(1, MOST_CELLS);
        let (columns, rows) = (count(panel.width()), count(panel.height()));
        Self {
            bounds: panel,
            columns,
            rows,
            ink: vec![Vec::new(); columns * rows],
            text: vec![Vec::new(); columns * rows],
            dots: Dots::new(panel),
            pieces: Vec::new(),
            labels: Vec::new(),
            clear_ink: style.clear_ink,
            clear_label: style.clear_label,
            reach: style.clear_ink + CLEARANCE_WORTH * style.em,
            thin_between: THIN_BETWEEN * style.em,
        }
    }

    fn column(&self, x: f64) -> usize {
        let part = (x - self.bounds.x0) / self.bounds.width() * self.columns as f64;
        whole::count(part).min(self.columns - 1)
    }

    fn row(&self, y: f64) -> usize {
        let part = (y - self.bounds.y0) / self.bounds.height() * self.rows as f64;
        whole::count(part).min(self.rows - 1)
    }

    /// Takes up a straight piece of ink.
    pub(super) fn add_ink(&mut self, a: Point, b: Point, half: f64, is_heavy: bool) {
        if !(a.is_finite() && b.is_finite()) {
            return;
        }
        self.dots.take(a, b);
        let index = self.pieces.len();
        self.pieces.push(Piece {
            a,
            b,
            half,
            is_heavy,
        });
        let height = self.bounds.height() / self.rows as f64;
        let (low, high) = (a.y.min(b.y) - half, a.y.max(b.y) + half);
        for row in self.row(low)..=self.row(high) {
            let top = self.bounds.y0 + height * row as f64 - half;
            let (x0, x1) = reach_between(a, b, top, top + height + 2.0 * half);
            for column in self.column(x0 - half)..=self.column(x1 + half) {
                self.ink[row * self.columns + column].push(index);
            }
        }
    }

    /// Takes up a label.
    pub(super) fn add_label(&mut self, rect: Rect) {
        let index = self.labels.len();
        self.labels.push(rect);
        for row in self.row(rect.y0)..=self.row(rect.y1) {
            for column in self.column(rect.x0)..=self.column(rect.x1) {
                self.text[row * self.columns + column].push(index);
            }
        }
    }

    /// How far a box is from all ink, up to the reach; 0 where they meet.
    pub(super) fn clearance(&self, rect: Rect) -> f64 {
        let mut least = self.reach;
        let near = rect.inflate(least, least);
        for row in self.row(near.y0)..=self.row(near.y1) {
            for column in self.column(near.x0)..=self.column(near.x1) {
                for &i in &self.ink[row * self.columns + column] {
                    let piece = &self.pieces[i];
                    if beyond(piece, rect, least) {
                        continue;
                    }
                    least = least.min(between(piece.a, piece.b, rect) - piece.half);
                    if least <= 0.0 {
                        return 0.0;
                    }
                }
            }
        }
        least
    }

    /// What it costs that ink lies between a label and what it names; `None` where that is heavy.
    fn parting(&self, leader: Option<Point>, rect: Rect) -> Option<f64> {
        let Some(start) = leader else {
            return Some(0.0);
        };
        let end = Point::new(
            start.x.clamp(rect.x0, rect.x1),
            start.y.clamp(rect.y0, rect.y1),
        );
        let (y0, y1) = (start.y.min(end.y), start.y.max(end.y));
        let (x0, x1) = (start.x.min(end.x), start.x.max(end.x));
        let mut cost = 0.0;
        let columns = self.column(x0)..=self.column(x1);
        let cells = (self.row(y0)..=self.row(y1))
            .flat_map(|row| columns.clone().map(move |column| (row, column)));
        for (row, column) in cells {
            for &i in &self.ink[row * self.columns + column] {
                let piece = &self.pieces[i];
                if !cross(start, end, piece.a, piece.b) {
                    continue;
                }
                if piece.is_heavy {
                    return None;
                }
                cost = self.thin_between;
            }
        }
        Some(cost)
    }

    fn meets_label(&self, rect: Rect) -> bool {
        let near = rect.inflate(self.clear_label - HAIR, self.clear_label - HAIR);
        (self.row(near.y0)..=self.row(near.y1)).any(|row| {
            (self.column(near.x0)..=self.column(near.x1)).any(|column| {
                self.text[row * self.columns + column]
                    .iter()
                    .any(|&i| gap(self.labels[i], rect) < self.clear_label - HAIR)
            })
        })
    }

    /// Directions (angles, counter-clockwise to the eye) in which strokes leave a point, those within `near` of it.
    pub(super) fn strokes_through(&self, p: Point, near: f64) -> Vec<f64> {
        let cell = &self.ink[self.row(p.y) * self.columns + self.column(p.x)];
        let mut found = Vec::new();
        for &i in cell {
            let Piece {
                a,
                b,
                half,
                is_heavy: _,
            } = self.pieces[i];
            if to_segment(p, a, b) > near + half {
                continue;
            }
            for end in [a, b] {
                if (end - p).hypot() > 2.0 * near {
                    found.push(super::canvas::angle_of(end - p));
                }
            }
        }
        found
    }

    fn inside(&self, rect: Rect) -> bool {
        let b = self.bounds;
        b.x0 <= rect.x0 && rect.x1 <= b.x1 && b.y0 <= rect.y0 && rect.y1 <= b.y1
    }

    /// What the most clearance takes off a place's score, mm.
    pub(super) fn worth(&self) -> f64 {
        self.reach - self.clear_ink
    }

    /// The best free place of some, with its score.
    pub(super) fn best(&self, candidates: &[Candidate]) -> Option<(f64, Rect)> {
        let worth = self.worth();
        let mut order: Vec<usize> = (0..candidates.len()).collect();
        order.sort_by(|&i, &j| candidates[i].cost.total_cmp(&candidates[j].cost));
        let mut best: Option<(f64, Rect)> = None;
        for i in order {
            let Candidate { rect, cost, leader } = candidates[i];
            if best.is_some_and(|(score, _)| cost - worth >= score) {
                break;
            }
            if !self.inside(rect) || self.dots.any(rect) || self.meets_label(rect) {
                continue;
            }
            let clear = self.clearance(rect) - self.clear_ink;
            if clear < -HAIR {
                continue;
            }
            let Some(parting) = self.parting(leader, rect) else {
                continue;
            };
            let score = cost + parting - clear;
            if best.is_none_or(|(least, _)| score < least) {
                best = Some((score, rect));
            }
        }
        best
    }
}

/// The x that a segment covers between two heights.
fn reach_between(a: Point, b: Point, y0: f64, y1: f64) -> (f64, f64) {
    let (low, high) = if a.y <= b.y { (a, b) } else { (b, a) };
    let rise = high.y - low.y;
    let at = |y: f64| {
        if rise <= 0.0 {
            return None;
        }
        Some(low.lerp(high, ((y - low.y) / rise).clamp(0.0, 1.0)).x)
    };
    match (at(y0), at(y1)) {
        (Some(p), Some(q)) => (p.min(q), p.max(q)),
        _ => (a.x.min(b.x), a.x.max(b.x)),
    }
}

fn beyond(piece: &Piece, r: Rect, by: f64) -> bool {
    let by = by + piece.half;
    piece.a.x.max(piece.b.x) < r.x0 - by
        || piece.a.x.min(piece.b.x) > r.x1 + by
        || piece.a.y.max(piece.b.y) < r.y0 - by
        || piece.a.y.min(piece.b.y) > r.y1 + by
}

/// Whether two segments cross.
fn cross(a: Point, b: Point, p: Point, q: Point) -> bool {
    let side = |o: Point, d: Point, s: Point| (d - o).cross(s - o);
    side(a, b, p) * side(a, b, q) < 0.0 && side(p, q, a) * side(p, q, b) < 0.0
}

/// From a segment to a box; 0 where they meet.
pub(super) fn between(a: Point, b: Point, r: Rect) -> f64 {
    if super::clip::span(a, b - a, (0.0, 1.0), r).is_some() {
        return 0.0;
    }
    let corners = [
        Point::new(r.x0, r.y0),
        Point::new(r.x1, r.y0),
        Point::new(r.x0, r.y1),
        Point::new(r.x1, r.y1),
    ];
    corners
        .into_iter()
        .map(|c| to_segment(c, a, b))
        .chain([to_box(a, r), to_box(b, r)])
        .fold(f64::INFINITY, f64::min)
}

fn to_segment(p: Point, a: Point, b: Point) -> f64 {
    let d = b - a;
    let length = d.hypot2();
    let s = if length > 0.0 {
        ((p - a).dot(d) / length).clamp(0.0, 1.0)
    } else {
        0.0
    };
    (p - (a + d * s)).hypot()
}

/// From a point to a box; 0 inside.
pub(super) fn to_box(p: Point, r: Rect) -> f64 {
    let d = Vec2::new(
        (r.x0 - p.x).max(p.x - r.x1).max(0.0),
        (r.y0 - p.y).max(p.y - r.y1).max(0.0),
    );
    d.hypot()
}

/// Between two boxes; 0 where they meet.
fn gap(a: Rect, b: Rect) -> f64 {
    let d = Vec2::new(
        (a.x0 - b.x1).max(b.x0 - a.x1).max(0.0),
        (a.y0 - b.y1).max(b.y0 - a.y1).max(0.0),
    );
    d.hypot()
}

/// A box of some size whose nearest point is `distance` from `p`, its middle in the direction `way` (of length 1).
pub(super) fn box_at(p: Point, way: Vec2, size: Vec2, distance: f64) -> Rect {
    let (a, b) = (size.x / 2.0, size.y / 2.0);
    let (x, y) = (way.x.abs(), way.y.abs());
    // Nearest by a vertical side, by a level one, else by a corner.
    let across = (a + distance) / x;
    let up = (b + distance) / y;
    let reach = if across * y <= b {
        across
    } else if up * x <= a {
        up
    } else {
        let along = a.mul_add(x, b * y);
        along
            + (along * along - (a * a + b * b - distance * distance))
                .max(0.0)
                .sqrt()
    };
    Rect::from_center_size(p + way * reach, (size.x, size.y))
}

/// A box of some size beside a straight stroke: `distance` from the stroke's middle line, on the side of the unit
/// normal `side`, its middle across from `foot`.
pub(super) fn box_beside(foot: Point, side: Vec2, size: Vec2, distance: f64) -> Rect {
    let support = size.x.mul_add(side.x.abs(), size.y * side.y.abs()) / 2.0;
    Rect::from_center_size(foot + side * (distance + support), (size.x, size.y))
}

#[cfg(test)]
mod tests {
    use super::*;

    impl Places {
        fn is_free(&self, rect: Rect) -> bool {
            self.best(&[Candidate {
                rect,
                cost: 0.0,
                leader: None,
            }])
            .is_some()
        }
    }

    fn places() -> Places {
        Places::new(Rect::new(0.0, 0.0, 80.0, 60.0), &Style::new(9.0))
    }

    #[test]
    fn a_label_keeps_its_distance_to_ink() {
        let mut places = places();
        places.add_ink(Point::new(0.0, 30.0), Point::new(80.0, 30.0), 0.25, true);
        assert!(!places.is_free(Rect::new(10.0, 30.6, 14.0, 33.0)));
        assert!(places.is_free(Rect::new(10.0, 30.8, 14.0, 33.0)));
        assert_eq!(places.clearance(Rect::new(10.0, 29.0, 14.0, 33.0)), 0.0);
    }

    #[test]
    fn a_long_slanted_stroke_is_met_in_every_cell() {
        let mut places = places();
        places.add_ink(Point::new(1.0, 2.0), Point::new(79.0, 58.0), 0.1, false);
        for i in 0..100 {
            let p = Point::new(1.0, 2.0).lerp(Point::new(79.0, 58.0), f64::from(i) / 99.0);
            assert!(places.clearance(Rect::from_center_size(p, (0.2, 0.2))) == 0.0);
        }
    }

    #[test]
    fn the_second_label_takes_the_next_place() {
        let mut places = places();
        let near = Rect::new(10.0, 10.0, 14.0, 12.0);
        let next = Rect::new(10.0, 20.0, 14.0, 22.0);
        let candidates = [(near, 0.0), (next, 1.0)].map(|(rect, cost)| Candidate {
            rect,
            cost,
            leader: None,
        });
        let rect = |places: &Places| places.best(&candidates).map(|(_, rect)| rect);
        assert_eq!(rect(&places), Some(near));
        places.add_label(near);
        assert_eq!(rect(&places), Some(next));
        places.add_label(next);
        assert_eq!(rect(&places), None);
    }

    #[test]
    fn heavy_ink_parts_a_label_from_what_it_names() {
        let mut places = places();
        let rect = Rect::new(10.0, 20.0, 14.0, 22.0);
        let across = [Candidate {
            rect,
            cost: 0.0,
            leader: Some(Point::new(12.0, 25.0)),
        }];
        places.add_ink(Point::new(0.0, 24.0), Point::new(80.0, 24.0), 0.1, false);
        assert_eq!(places.best(&across).map(|(_, r)| r), Some(rect));
        places.add_ink(Point::new(0.0, 24.0), Point::new(80.0, 24.0), 0.2, true);
        assert_eq!(places.best(&across), None);
    }

    #[test]
    fn a_box_stands_at_its_distance() {
        let p = Point::new(3.0, 4.0);
        for (x, y) in [(1.0, 0.0), (0.6, 0.8), (-0.8, 0.6), (0.0, -1.0)] {
            let r = box_at(p, Vec2::new(x, y), Vec2::new(5.0, 2.0), 1.45);
            assert!((to_box(p, r) - 1.45).abs() < 1e-6);
        }
    }
}
