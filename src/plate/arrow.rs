//! Arrows as closed outlines: a tail that tapers to a point, a shaft, a notched head. Tail and tip lie exactly on
//! their points.

use kurbo::{Point, Vec2};

use super::style::{Head, Style};

/// What an arrow says by its form.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Form {
    /// Filled.
    Before,
    /// Hollow with a rim.
    After,
    /// Narrow, between the other two.
    Total,
}

/// An arrow's outlines, mm. Empty ones are left out.
#[derive(Clone, Debug, Default, PartialEq)]
pub(super) struct Arrow {
    /// Filled with the owner's ink, each a closed polygon.
    pub(super) body: Vec<Vec<Point>>,
    /// Filled with paper.
    pub(super) paper: Vec<Point>,
    /// A dot (or ring) at the tip of a short arrow: radii of ink and of the paper inside it.
    pub(super) dot: Option<(f64, f64)>,
    /// Half angle between the head's sides and its axis, as rise over run.
    pub(super) half_slope: f64,
}

impl Form {
    fn head(self, style: &Style) -> Head {
        match self {
            Self::Before => style.before_head,
            Self::After => style.after_head,
            Self::Total => style.total_head,
        }
    }

    fn shaft(self, style: &Style) -> f64 {
        match self {
            Self::Before => style.stroke.shaft,
            Self::After => style.stroke.hollow_shaft,
            Self::Total => style.stroke.total,
        }
    }

    /// Half the angle of its head, radians.
    pub(super) fn half_angle(self, style: &Style) -> f64 {
        let head = self.head(style);
        crate::num::atan2(head.width / 2.0, head.length)
    }
}

/// An arrow from `tail` to `tip`. `back` moves its head toward the tail, the shaft runs on to the tip.
pub(super) fn arrow(tail: Point, tip: Point, form: Form, back: f64, style: &Style) -> Arrow {
    let way = tip - tail;
    let length = way.hypot();
    if length < style.headless {
        return stub(tail, tip, form, style);
    }
    let head = shortened(form.head(style), length);
    let taper = style.taper.min(length / 4.0);
    let half = form.shaft(style) / 2.0;
    let unit = way / length;
    let back = if back + 2.0 * head.length < length {
        back
    } else {
        0.0
    };
    let neck = tip - unit * back;
    let outline = outline(tail, neck, unit, (half, taper), head);
    let paper = if form == Form::After {
        inwards(&outline, style.stroke.rim)
    } else {
        Vec::new()
    };
    let mut body = vec![outline];
    if back > 0.0 {
        body.push(spike(
            neck - unit * (head.length / 2.0),
            tip,
            unit,
            half,
            taper,
        ));
    }
    Arrow {
        body,
        paper,
        dot: None,
        half_slope: head.width / 2.0 / head.length,
    }
}

/// A head on a short arrow: both lengths shrink so that the head is half of it, the width less.
fn shortened(head: Head, length: f64) -> Head {
    const LEAST_WIDTH: f64 = 0.75;
    let k = (length / (2.0 * head.length)).min(1.0);
    Head {
        length: head.length * k,
        width: head.width * k.max(LEAST_WIDTH),
        notch: head.notch * k,
    }
}

fn outline(
    tail: Point,
    tip: Point,
    unit: Vec2,
    (half, taper): (f64, f64),
    head: Head,
) -> Vec<Point> {
    let across = Vec2::new(-unit.y, unit.x);
    let at = |from: Point, along: f64, side: f64| from + unit * along + across * side;
    let wing = head.width / 2.0;
    // Where the shaft's edge meets the hollowed back of the head.
    let neck = -head.length + head.notch * (1.0 - half / wing);
    vec![
        tip,
        at(tip, -head.length, wing),
        at(tip, neck, half),
        at(tail, taper, half),
        tail,
        at(tail, taper, -half),
        at(tip, neck, -half),
        at(tip, -head.length, -wing),
    ]
}

/// A shaft that runs from inside a head on to a point.
fn spike(from: Point, tip: Point, unit: Vec2, half: f64, taper: f64) -> Vec<Point> {
    let across = Vec2::new(-unit.y, unit.x) * half;
    let shoulder = tip - unit * taper;
    vec![
        from + across,
        shoulder + across,
        tip,
        shoulder - across,
        from - across,
    ]
}

/// Too short for a head: a thin stroke, and at its tip a dot or a ring.
fn stub(tail: Point, tip: Point, form: Form, style: &Style) -> Arrow {
    let way = tip - tail;
    let length = way.hypot();
    let body = if length > 0.0 {
        let across = Vec2::new(-way.y, way.x) * (style.stroke.axis / 2.0 / length);
        vec![vec![
            tail + across,
            tip + across,
            tip - across,
            tail - across,
        ]]
    } else {
        Vec::new()
    };
    let dot = match form {
        Form::Before | Form::Total => (style.dot, 0.0),
        Form::After => {
            let half = style.stroke.rim / 2.0;
            (style.ring + half, style.ring - half)
        }
    };
    Arrow {
        body,
        paper: Vec::new(),
        dot: Some(dot),
        half_slope: 0.0,
    }
}

/// The polygon with every edge moved inwards by `by`, corners mitred; empty where nothing is left.
fn inwards(points: &[Point], by: f64) -> Vec<Point> {
    let n = points.len();
    let area: f64 = (0..n)
        .map(|i| points[i].to_vec2().cross(points[(i + 1) % n].to_vec2()))
        .sum();
    let turn = area.signum();
    let edge = |i: usize| {
        let (a, b) = (points[i], points[(i + 1) % n]);
        let way = (b - a).normalize();
        (a + Vec2::new(-way.y, way.x) * (by * turn), way)
    };
    let inner: Vec<Point> = (0..n)
        .filter_map(|i| {
            let (a, u) = edge((i + n - 1) % n);
            let (b, v) = edge(i);
            let cross = u.cross(v);
            (cross != 0.0).then(|| a + u * ((b - a).cross(v) / cross))
        })
        .collect();
    if inner.len() == n && inner.iter().all(|p| p.is_finite()) {
        inner
    } else {
        Vec::new()
    }
}

/// A solid head without a shaft, its tip on a point.
pub(super) fn head(tip: Point, unit: Vec2, head: Head) -> Vec<Point> {
    let across = Vec2::new(-unit.y, unit.x) * (head.width / 2.0);
    let back = tip - unit * head.length;
    vec![tip, back + across, back + unit * head.notch, back - across]
}

/// Where the shaft under such a head ends, so that nothing of it stands out.
pub(super) fn shaft_end(tip: Point, unit: Vec2, head: Head) -> Point {
    // 0.08 mm inside the notch at usual size, so that no seam shows.
    const INSIDE: f64 = 0.96;
    tip - unit * ((head.length - head.notch) * INSIDE)
}

#[cfg(test)]
mod tests {
    use super::*;

    fn style() -> Style {
        Style::new(9.0)
    }

    #[test]
    fn tail_and_tip_lie_on_their_points() {
        let (tail, tip) = (Point::new(10.0, 80.0), Point::new(31.7, 12.3));
        for form in [Form::Before, Form::After, Form::Total] {
            let arrow = arrow(tail, tip, form, 0.0, &style());
            assert_eq!(arrow.body[0].len(), 8);
            assert_eq!((arrow.body[0][0], arrow.body[0][4]), (tip, tail));
        }
    }

    #[test]
    fn a_hollow_arrow_keeps_an_even_rim() {
        let arrow = arrow(
            Point::ORIGIN,
            Point::new(20.0, 0.0),
            Form::After,
            0.0,
            &style(),
        );
        let open = arrow
            .paper
            .iter()
            .map(|p| p.y)
            .filter(|y| y.abs() < 0.3)
            .fold(0.0, f64::max);
        // Half of 0.78 less a rim of 0.6 pt: an opening of 0.36 mm, as the tokens say.
        assert!((2.0 * open - (0.78 - 2.0 * 0.6 * 25.4 / 72.0)).abs() < 1e-12);
    }

    #[test]
    fn short_arrows_shrink_and_then_lose_their_head() {
        let length = |l: f64| {
            arrow(
                Point::ORIGIN,
                Point::new(l, 0.0),
                Form::Before,
                0.0,
                &style(),
            )
        };
        assert!((length(3.5).body[0][1].x - 1.75).abs() < 1e-12);
        assert!((length(3.5).body[0][1].y - 0.75 * 0.75).abs() < 1e-12);
        assert_eq!(length(2.5).dot, Some((0.5, 0.0)));
        assert!(length(0.0).body.is_empty());
    }
}
