//! Worldlines and light signals on a spacetime panel.

use std::sync::Arc;

use kurbo::{BezPath, Point, Rect, Vec2};

use super::arrow::head;
use super::axes::wish;
use super::beside::{self, Spot};
use super::canvas::{Canvas, Layer, Rank};
use super::clip;
use super::inks::is_light;
use super::job::Job;
use super::outline;
use super::style::{INK, OCHRE};
use crate::fault::{Kind, ObjectId};
use crate::geometry::{Displacement, Leg, Side};
use crate::marks::Ink;
use crate::num::tanh;
use crate::solve::{SolvedLine, Viewing};

/// A line as a panel's frame has it: corners, and where it runs on beyond the first and the last.
#[derive(Clone, Debug)]
pub(super) struct Track {
    /// Its object.
    pub(super) object: ObjectId,
    label: Option<String>,
    is_light: bool,
    /// Ends and corners in the plane, at least one.
    pub(super) points: Vec<Point>,
    /// True where the first or the last point is an end or a corner, not just some point of the line.
    pub(super) is_marked: bool,
    before: Option<Vec2>,
    after: Option<Vec2>,
    /// True where it moves across x.
    pub(super) has_across: bool,
}

impl Track {
    /// A solved line as a frame has it.
    pub(super) fn of(name: &Arc<str>, line: &SolvedLine, from: &Viewing) -> Option<Self> {
        let rapidity = from.boost.rapidity().value();
        let start = line.from.as_ref().map(|end| end.1);
        let end = line.until.as_ref().map(|end| end.1);
        let low = start.map_or(f64::NEG_INFINITY, Displacement::t);
        let high = end.map_or(f64::INFINITY, Displacement::t);
        let corners = line
            .world
            .corners()
            .iter()
            .copied()
            .filter(|c| low < c.t() && c.t() < high);
        let mut known: Vec<_> = start.into_iter().chain(corners).chain(end).collect();
        let is_marked = !known.is_empty();
        if !is_marked {
            known.push(line.world.at_time(0.0));
        }
        let points = known
            .iter()
            .map(|&d| super::job::seen(d, from))
            .collect::<Option<Vec<_>>>()?;
        if points.len() > 1 && high < low {
            return None;
        }
        let way = |leg: Option<&Leg>| {
            Some(match *leg? {
                Leg::Free {
                    rapidity: own,
                    across: _,
                } => Vec2::new(tanh(own.value() - rapidity), 1.0),
                Leg::Light(Side::Plus) => Vec2::new(1.0, 1.0),
                Leg::Light(Side::Minus) => Vec2::new(-1.0, 1.0),
            })
        };
        let legs = line.world.legs();
        Some(Self {
            object: ObjectId {
                kind: Kind::Line,
                name: name.clone(),
            },
            label: line.label.clone(),
            is_light: is_light(line),
            points,
            is_marked,
            before: if start.is_some() {
                None
            } else {
                way(legs.first()).map(|d| -d)
            },
            after: if end.is_some() {
                None
            } else {
                way(legs.last())
            },
            has_across: legs.iter().any(|leg| match leg {
                Leg::Free {
                    rapidity: _,
                    across,
                } => *across != 0.0,
                Leg::Light(_) => false,
            }),
        })
    }

    /// Its parts inside a rectangle of the plane, each a polyline.
    fn inside(&self, r: Rect) -> Vec<Vec<Point>> {
        let mut parts: Vec<Vec<Point>> = Vec::new();
        let mut add = |piece: Option<(Point, Point)>| {
            let Some((a, b)) = piece else { return };
            match parts.last_mut() {
                Some(part) if part.last() == Some(&a) => part.push(b),
                _ => parts.push(vec![a, b]),
            }
        };
        if let (Some(way), Some(&first)) = (self.before, self.points.first()) {
            add(clip::ray(first, way, r).map(|(a, b)| (b, a)));
        }
        for pair in self.points.windows(2) {
            add(clip::segment(pair[0], pair[1], r));
        }
        if let (Some(way), Some(&last)) = (self.after, self.points.last()) {
            add(clip::ray(last, way, r));
        }
        parts
    }

    /// Its visible parts on paper, cut at the field widened by some mm.
    fn on_paper(&self, canvas: &Canvas<'_>, wider: f64) -> Vec<Vec<Point>> {
        let window = canvas.window;
        let by = wider / window.scale();
        let parts = self.inside(window.plane.inflate(by, by));
        parts
            .iter()
            .map(|part| part.iter().map(|&p| window.mm(p)).collect())
            .collect()
    }

    /// Draws a worldline. False for light, which is drawn once all other ink is down.
    pub(super) fn draw(&self, job: &mut Job<'_>, canvas: &mut Canvas<'_>) -> bool {
        if self.is_light {
            return false;
        }
        let (ink, dash) = job.inks.line(&self.object.name, canvas.style);
        let width = canvas.style.stroke.world;
        let field = canvas.window.field;
        let mut path = BezPath::new();
        for part in self.on_paper(canvas, 2.0 * width) {
            let pieces =
                dash.map_or_else(|| vec![part.clone()], |dash| outline::dashes(&part, dash));
            for piece in pieces {
                path.extend(&outline::thick(&piece, width, Some(field)));
            }
        }
        let group = canvas.group(&self.object.to_string());
        canvas.fill(Layer::World, group, path, ink);
        self.name(job, canvas, (ink, width / 2.0));
        true
    }

    /// Draws a light signal with a head mid-way, where that meets no other ink.
    pub(super) fn draw_signal(&self, job: &mut Job<'_>, canvas: &mut Canvas<'_>, others: &[Self]) {
        let group = canvas.group(&self.object.to_string());
        let (size, width) = (canvas.style.signal_head, canvas.style.stroke.signal);
        let crossing: Vec<(Point, Point)> = others
            .iter()
            .filter(|other| other.is_light && other.object != self.object)
            .flat_map(|other| other.on_paper(canvas, 0.0))
            .filter_map(|part| Some((*part.first()?, *part.last()?)))
            .collect();
        for part in self.on_paper(canvas, 0.0) {
            let (Some(&a), Some(&b)) = (part.first(), part.last()) else {
                continue;
            };
            let unit = (b - a).normalize();
            if (b - a).hypot() > 2.0 * size.length {
                let shapes = canvas
                    .style
                    .head_at
                    .map(|part| head(a.lerp(b, part), unit, size));
                let free = shapes.iter().position(|shape| {
                    let rect = around(shape);
                    canvas.clearance(rect) >= canvas.style.clear_ink
                        && !crossing
                            .iter()
                            .any(|&(p, q)| clip::segment(p, q, rect).is_some())
                });
                let best = &shapes[free.unwrap_or(0)];
                canvas.fill(Layer::Signal, group, outline::closed(best), OCHRE);
            }
            canvas.line(Layer::Signal, group, (a, b), (OCHRE, width));
        }
        self.name(job, canvas, (INK, width / 2.0));
    }

    /// Its name stands right of its upper end.
    fn name(&self, job: &mut Job<'_>, canvas: &mut Canvas<'_>, (ink, half): (Ink, f64)) {
        if self.is_light && self.label.is_none() {
            return;
        }
        let parts = self.on_paper(canvas, 0.0);
        let Some(part) = parts.last() else { return };
        let style = canvas.style;
        let group = canvas.group(&self.object.to_string());
        let label = job.names.of(&self.object, self.label.as_deref());
        let first = style.name_below_end + canvas.size(&label).y / 2.0;
        let spots = down(part, first, style.name_step);
        let candidates = beside::beside(canvas, &label, &spots, beside::Side::Right, half);
        wish(
            canvas,
            Rank::Name,
            (group, Some(self.object.clone())),
            (label, ink),
            candidates,
        );
    }
}

/// Most spots tried along a line.
const MOST_SPOTS: usize = 48;
/// What each spot farther from the upper end costs, ems.
const DOWN_ORDER: f64 = 0.1;

/// Spots along a polyline from its upper end down.
fn down(part: &[Point], first: f64, step: f64) -> Vec<Spot> {
    let upward: Vec<Point> = match (part.first(), part.last()) {
        (Some(a), Some(b)) if a.y < b.y => part.to_vec(),
        _ => part.iter().rev().copied().collect(),
    };
    let length: f64 = upward.windows(2).map(|w| (w[1] - w[0]).hypot()).sum();
    let first = first.min(length / 2.0);
    let mut spots = Vec::new();
    let mut passed = 0.0;
    let mut next = first;
    for w in upward.windows(2) {
        let along = w[1] - w[0];
        let long = along.hypot();
        while next <= passed + long && spots.len() < MOST_SPOTS && next <= length {
            let foot = w[0] + along * ((next - passed) / long);
            spots.push(Spot {
                foot,
                along,
                order: DOWN_ORDER * spots.len() as f64,
            });
            next += step;
        }
        passed += long;
    }
    spots
}

fn around(points: &[Point]) -> Rect {
    let first = points.first().copied().unwrap_or_default();
    points
        .iter()
        .fold(Rect::from_points(first, first), |r, &p| r.union_pt(p))
}
