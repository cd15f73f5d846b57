//! Places for names beside strokes, and words for values.

use kurbo::{Point, Vec2};

use super::canvas::Canvas;
use super::place::{Candidate, box_beside};
use crate::label::Label;

/// Where along a stroke and on which side a name is looked for.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Spot {
    /// A point of the stroke, mm.
    pub(super) foot: Point,
    /// The stroke's direction there.
    pub(super) along: Vec2,
    /// Order of preference, ems.
    pub(super) order: f64,
}

/// Which side of a stroke is tried first.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Side {
    /// Right of it to the eye, then left.
    Right,
    /// Left, then right.
    Left,
    /// Above, then below.
    Above,
    /// Below, then above.
    Below,
}

/// What the second side costs, ems.
const OTHER_SIDE: f64 = 0.7;
/// How far off its stroke's edge the way to a name begins, mm.
const OFF_STROKE: f64 = 0.1;
/// Steps of growing distance.
const DISTANCES: usize = 6;

/// Places beside some spots, nearest first.
pub(super) fn beside(
    canvas: &Canvas<'_>,
    label: &Label,
    spots: &[Spot],
    first: Side,
    half: f64,
) -> Vec<Candidate> {
    let size = canvas.size(label);
    let em = canvas.style.em;
    let top = canvas.window.field.y0;
    let [nearest, _, farthest] = canvas.style.name;
    let mut found = Vec::with_capacity(spots.len() * 2 * DISTANCES);
    for spot in spots {
        let unit = spot.along.normalize();
        let normal = Vec2::new(-unit.y, unit.x);
        let toward = match first {
            Side::Right => normal.x,
            Side::Left => -normal.x,
            Side::Above => -normal.y,
            Side::Below => normal.y,
        };
        let side = if toward >= 0.0 { normal } else { -normal };
        for i in 0..DISTANCES {
            let far = (farthest - nearest) * i as f64 / (DISTANCES - 1) as f64;
            for (side, cost) in [(side, 0.0), (-side, OTHER_SIDE)] {
                let rect = box_beside(spot.foot, side, size, nearest + half + far);
                // Above the field stand titles and symbols alone.
                if rect.y0 < top && spot.foot.y >= top {
                    continue;
                }
                found.push(Candidate {
                    rect,
                    cost: far + (spot.order + cost) * em,
                    leader: Some(spot.foot + side * (half + OFF_STROKE)),
                });
            }
        }
    }
    found
}

/// Spots along a straight stroke at parts of its length, in order of preference.
pub(super) fn spots((a, b): (Point, Point), parts: &[f64]) -> Vec<Spot> {
    let along = b - a;
    if along.hypot2() == 0.0 {
        return Vec::new();
    }
    parts
        .iter()
        .enumerate()
        .map(|(i, &part)| Spot {
            foot: a.lerp(b, part),
            along,
            order: SPOT_ORDER * i as f64,
        })
        .collect()
}

/// What each later spot costs more, ems.
const SPOT_ORDER: f64 = 0.12;
