//! Hyperbolas as cubics. One branch of `|t^2 - x^2| = s^2` about a centre, cut at a rectangle by solving for the
//! rapidities at its edges, then fitted by as few cubic pieces as the paper needs.

use kurbo::{BezPath, Point, Rect};

use crate::num::{acosh, asinh, cosh, exp, hypot, sinh, tanh};

/// Which branch.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Branch {
    /// Timelike, future: `t = s cosh`, `x = s sinh`. A mass shell is one, with E for t.
    Up,
    /// Timelike, past.
    Down,
    /// Spacelike, toward +x: `x = s cosh`, `t = s sinh`.
    Right,
    /// Spacelike, toward -x.
    Left,
}

/// A branch of a hyperbola in the plane: x right, t (or E) up, equal scales.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Hyperbola {
    /// Where its asymptotes cross.
    pub(super) centre: Point,
    /// From the centre to the vertex, above 0.
    pub(super) size: f64,
    /// Which branch.
    pub(super) branch: Branch,
}

/// Most pieces of a curve inside one rectangle.
const MOST_PIECES: usize = 8;

impl Hyperbola {
    /// The point at a rapidity.
    pub(super) fn at(&self, rapidity: f64) -> Point {
        self.place(self.size * cosh(rapidity), self.size * sinh(rapidity))
    }

    /// From (along the branch's axis, across) to the plane.
    fn place(&self, along: f64, across: f64) -> Point {
        let c = self.centre;
        match self.branch {
            Branch::Up => Point::new(c.x + across, c.y + along),
            Branch::Down => Point::new(c.x + across, c.y - along),
            Branch::Right => Point::new(c.x + along, c.y + across),
            Branch::Left => Point::new(c.x - along, c.y + across),
        }
    }

    /// The rectangle as (along, across): lower and upper bounds of each.
    fn bounds(&self, r: Rect) -> [f64; 4] {
        let c = self.centre;
        match self.branch {
            Branch::Up => [r.y0 - c.y, r.y1 - c.y, r.x0 - c.x, r.x1 - c.x],
            Branch::Down => [c.y - r.y1, c.y - r.y0, r.x0 - c.x, r.x1 - c.x],
            Branch::Right => [r.x0 - c.x, r.x1 - c.x, r.y0 - c.y, r.y1 - c.y],
            Branch::Left => [c.x - r.x1, c.x - r.x0, r.y0 - c.y, r.y1 - c.y],
        }
    }

    /// The parts inside a rectangle, as intervals of rapidity, at most two, ascending.
    pub(super) fn inside(&self, r: Rect) -> Vec<(f64, f64)> {
        let [low, high, left, right] = self.bounds(r);
        let s = self.size;
        if s <= 0.0 || high < s || !s.is_finite() {
            return Vec::new();
        }
        let reach = acosh(high / s);
        let from = asinh(left / s).max(-reach);
        let to = asinh(right / s).min(reach);
        if !(from < to && from.is_finite() && to.is_finite()) {
            return Vec::new();
        }
        if low <= s {
            return vec![(from, to)];
        }
        let gap = acosh(low / s);
        [(from, to.min(-gap)), (from.max(gap), to)]
            .into_iter()
            .filter(|&(a, b)| a < b)
            .collect()
    }

    /// The parts inside a rectangle, of those between two rapidities.
    pub(super) fn inside_between(&self, r: Rect, (from, to): (f64, f64)) -> Vec<(f64, f64)> {
        self.inside(r)
            .into_iter()
            .map(|(a, b)| (a.max(from), b.min(to)))
            .filter(|&(a, b)| a < b)
            .collect()
    }

    /// The rapidity of the point some distance (in the plane) from the one at `rapidity`, toward larger rapidities for
    /// a positive distance.
    pub(super) fn away(&self, rapidity: f64, distance: f64) -> f64 {
        let start = self.at(rapidity);
        let way = distance.signum();
        let far = distance.abs();
        // The point moves by at least s per unit of rapidity, so this bound is far enough.
        let (mut near, mut beyond) = (0.0, 2.0 * asinh(far / self.size) + far / self.size.max(far));
        for _ in 0..BISECTIONS {
            let middle = f64::midpoint(near, beyond);
            if (self.at(way.mul_add(middle, rapidity)) - start).hypot() < far {
                near = middle;
            } else {
                beyond = middle;
            }
        }
        way.mul_add(near, rapidity)
    }

    /// The pieces between two rapidities as one path in the plane, within `tolerance` (in the plane) of the curve.
    pub(super) fn path(&self, (from, to): (f64, f64), tolerance: f64) -> BezPath {
        let cuts = self.cuts(from, to, tolerance);
        let mut path = BezPath::new();
        path.move_to(self.at(from));
        for pair in cuts.windows(2) {
            let [_, p1, p2, p3] = self.cubic(pair[0], pair[1]);
            path.curve_to(p1, p2, p3);
        }
        path
    }

    /// One cubic: ends and end directions of the curve.
    fn cubic(&self, from: f64, to: f64) -> [Point; 4] {
        let handle = handle(to - from) * self.size;
        let (a, b) = (self.at(from), self.at(to));
        let lean = |rapidity: f64, by: f64| {
            let start = self.place(0.0, 0.0);
            let end = self.place(by * sinh(rapidity), by * cosh(rapidity));
            end - start
        };
        [a, a + lean(from, handle), b + lean(to, -handle), b]
    }

    /// Rapidities at which pieces meet: each as long as the tolerance allows, then evened out.
    fn cuts(&self, from: f64, to: f64, tolerance: f64) -> Vec<f64> {
        let mut tolerance = tolerance;
        loop {
            let mut cuts = vec![from];
            let mut at = from;
            while at < to && cuts.len() <= MOST_PIECES {
                at = self.farthest(at, to, tolerance);
                cuts.push(at);
            }
            if at >= to {
                return cuts;
            }
            tolerance *= 2.0;
        }
    }

    /// The end of the longest piece from a rapidity that keeps the tolerance.
    fn farthest(&self, from: f64, to: f64, tolerance: f64) -> f64 {
        if self.deviation(from, to) <= tolerance {
            return to;
        }
        let (mut good, mut bad) = (0.0, to - from);
        for _ in 0..PIECE_BISECTIONS {
            let middle = f64::midpoint(good, bad);
            if self.deviation(from, from + middle) <= tolerance {
                good = middle;
            } else {
                bad = middle;
            }
        }
        if good == 0.0 { from + bad } else { from + good }
    }

    /// How far the cubic leaves the curve, in the plane. In the frame of the piece's middle the radial error is
    /// `s (e - 1)`; on paper it is divided by the length of the normal there.
    fn deviation(&self, from: f64, to: f64) -> f64 {
        let h = to - from;
        let middle = f64::midpoint(from, to);
        let (c, s) = (cosh(h / 2.0), sinh(h / 2.0));
        let handle = handle(h);
        let (along, across) = (handle.mul_add(-s, c), handle.mul_add(c, -s));
        let (shrink, grow) = (exp(-middle), exp(middle));
        let mut worst = 0.0_f64;
        for i in 1..SAMPLES {
            let w = i as f64 / SAMPLES as f64;
            let v = 1.0 - w;
            let (e0, e1, e2, e3) = (v * v * v, 3.0 * v * v * w, 3.0 * v * w * w, w * w * w);
            let a = (e0 + e3).mul_add(c, (e1 + e2) * along);
            let x = (e3 - e0).mul_add(s, (e1 - e2) * across);
            // Null components in the middle's frame, then at their place on paper.
            let (u, v) = ((a - x) * shrink, (a + x) * grow);
            let off = ((a - x) * (a + x) - 1.0).abs();
            let slope = hypot(u, v) * std::f64::consts::SQRT_2;
            worst = worst.max(off / slope);
        }
        worst * self.size
    }
}

/// The handles of a piece that spans `h` of rapidity, in units of the derivative by rapidity: 4/3 tanh(h/4) puts the
/// middle on the curve (in the frame of its middle it is symmetric, and a boost is linear), but no handle reaches past
/// where the end tangents meet, so that a long piece stays between them and its chord.
fn handle(h: f64) -> f64 {
    (4.0 / 3.0 * tanh(h / 4.0)).min(tanh(h / 2.0))
}

/// Enough to fix a length on paper.
const BISECTIONS: usize = 36;
/// Enough to fix a piece's length to a hundredth.
const PIECE_BISECTIONS: usize = 12;
/// Points at which a piece is compared with the curve.
const SAMPLES: usize = 12;
