//! Axes of other frames on a spacetime panel, the arcs that carry units over to them, lines of simultaneity.

use kurbo::{Point, Rect, Vec2};

use super::axes::{AxisTicks, headed, wish};
use super::beside::{Side, Spot, beside, spots};
use super::canvas::{Canvas, Layer, Rank};
use super::clip;
use super::curve::{Branch, Hyperbola};
use super::job::Job;
use super::names::number;
use super::outline;
use super::place::{Candidate, box_beside};
use super::style::{CURVE_TOLERANCE, GUIDE};
use super::ticks::Ticks;
use super::whole::integer;
use crate::fault::ObjectId;
use crate::marks::Ink;
use crate::num::{cosh, sinh, tanh};

/// Another frame on a panel.
#[derive(Clone, Debug)]
pub(super) struct Tilted {
    /// The frame, or the line whose rest frame it is.
    pub(super) object: ObjectId,
    /// Its origin in the panel's plane.
    pub(super) origin: Point,
    /// Its rapidity relative to the panel's frame.
    pub(super) rapidity: f64,
    /// Its ink.
    pub(super) ink: Ink,
    /// Symbols of its time and space axis, LaTeX math.
    pub(super) symbols: [String; 2],
}

/// Most ticks on one tilted axis.
const MOST_TICKS: i64 = 60;
/// Large lettering: beyond so many units only every second has an arc.
const ARCS_IN_LARGE: i64 = 4;

/// One of a frame's two axes.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
enum Which {
    Time,
    Space,
}

impl Which {
    /// The point one unit along an axis of that kind, at a rapidity.
    fn unit(self, rapidity: f64) -> Vec2 {
        match self {
            Self::Time => Vec2::new(sinh(rapidity), cosh(rapidity)),
            Self::Space => Vec2::new(cosh(rapidity), sinh(rapidity)),
        }
    }

    /// The same direction with its larger component 1.
    fn way(self, rapidity: f64) -> Vec2 {
        match self {
            Self::Time => Vec2::new(tanh(rapidity), 1.0),
            Self::Space => Vec2::new(1.0, tanh(rapidity)),
        }
    }

    fn partner(self) -> Self {
        match self {
            Self::Time => Self::Space,
            Self::Space => Self::Time,
        }
    }

    fn branch(self) -> Branch {
        match self {
            Self::Time => Branch::Up,
            Self::Space => Branch::Right,
        }
    }
}

impl Tilted {
    /// True where it shares the panel's origin, so that arcs join equal units.
    fn is_centred(&self, canvas: &Canvas<'_>) -> bool {
        self.origin.to_vec2().hypot() * canvas.window.scale() < super::style::HAIR
    }

    /// Draws both axes with ticks; their numbers stand where arcs end, or beside the ticks. `factors` are units of
    /// the axis per unit of the plane: of time, of space.
    pub(super) fn draw(
        &self,
        job: &mut Job<'_>,
        canvas: &mut Canvas<'_>,
        ticks: &AxisTicks,
        factors: [f64; 2],
        has_arcs: bool,
    ) {
        let group = canvas.group(&self.object.to_string());
        let arcs = has_arcs && self.is_centred(canvas);
        for (which, ticks, factor, symbol) in [
            (Which::Time, &ticks.y, factors[0], &self.symbols[0]),
            (Which::Space, &ticks.x, factors[1], &self.symbols[1]),
        ] {
            let Some((from, tip)) = self.ends(canvas, which) else {
                continue;
            };
            headed(
                canvas,
                Layer::TiltedAxis,
                group,
                (from, tip),
                (self.ink, canvas.style.stroke.axis),
            );
            self.symbol(job, canvas, which, (from, tip), symbol);
            for count in self.counts(canvas, which, ticks, factor) {
                let size = ticks.step.times(count) / factor;
                let p = self.tick(canvas, which, size, group);
                let label = job.names.math(&number(&ticks.text(count)));
                let label_size = canvas.size(&label);
                let candidates = if arcs && size > 0.0 {
                    self.arc_places(canvas, which, size, label_size)
                } else {
                    self.tick_places(canvas, which, p, label_size)
                };
                wish(
                    canvas,
                    Rank::Number,
                    (group, None),
                    (label, self.ink),
                    candidates,
                );
            }
        }
    }

    /// From the frame's origin (or the field's edge) to the head's tip.
    fn ends(&self, canvas: &Canvas<'_>, which: Which) -> Option<(Point, Point)> {
        let window = canvas.window;
        let way = which.way(self.rapidity);
        let (a, b) = if clip::holds(window.plane, self.origin) {
            clip::ray(self.origin, way, window.plane)?
        } else {
            clip::line(self.origin, way, window.plane)?
        };
        let (from, edge) = (window.mm(a), window.mm(b));
        let along = edge - from;
        if along.hypot() < 2.0 * canvas.style.axis_head.length {
            return None;
        }
        // Only above and right of the field is there room for a head.
        let rim = canvas.style.clear_edge;
        let past = if edge.y <= window.field.y0 + rim || edge.x >= window.field.x1 - rim {
            canvas.style.past_field
        } else {
            0.0
        };
        Some((from, edge + along.normalize() * past))
    }

    /// Counts of the ticks strictly inside the field; only the positive ones where the origin is in it.
    fn counts(&self, canvas: &Canvas<'_>, which: Which, ticks: &Ticks, factor: f64) -> Vec<i64> {
        let plane = canvas.window.plane;
        let unit = which.unit(self.rapidity) * (ticks.step.times(1) / factor);
        let Some((low, high)) =
            clip::span(self.origin, unit, (f64::NEG_INFINITY, f64::INFINITY), plane)
        else {
            return Vec::new();
        };
        let low = if clip::holds(plane, self.origin) {
            0.0
        } else {
            low
        };
        if low.abs().max(high.abs()) > 1e9 {
            return Vec::new();
        }
        let (first, last) = (integer(low.floor()) + 1, integer(high.ceil()) - 1);
        (first..=last.min(first + MOST_TICKS))
            .filter(|count| *count != 0)
            .collect()
    }

    /// Draws a tick parallel to the partner axis; gives back its middle, mm.
    fn tick(&self, canvas: &mut Canvas<'_>, which: Which, size: f64, group: usize) -> Point {
        let style = canvas.style;
        let p = canvas
            .window
            .mm(self.origin + which.unit(self.rapidity) * size);
        let half = self.tick_way(which) * (style.tick * self.stretch(canvas) / 2.0);
        canvas.line(
            Layer::TiltedAxis,
            group,
            (p - half, p + half),
            (self.ink, style.stroke.axis),
        );
        p
    }

    /// How much longer its ticks are than a level axis': (1 + b^2) / (1 - b^2) = cosh 2 eta.
    fn stretch(&self, canvas: &Canvas<'_>) -> f64 {
        cosh((2.0 * self.rapidity).abs().min(10.0)).min(canvas.style.tick_stretch)
    }

    /// On paper.
    fn tick_way(&self, which: Which) -> Vec2 {
        let way = which.partner().way(self.rapidity);
        Vec2::new(way.x, -way.y).normalize()
    }

    fn arc_places(
        &self,
        canvas: &Canvas<'_>,
        which: Which,
        size: f64,
        label: Vec2,
    ) -> Vec<Candidate> {
        let window = canvas.window;
        let style = canvas.style;
        let arc = Hyperbola {
            centre: self.origin,
            size,
            branch: which.branch(),
        };
        let outward = if self.rapidity < 0.0 { -1.0 } else { 1.0 };
        let mut found = Vec::new();
        for (i, part) in [1.0, 1.12, 1.25, 0.9].into_iter().enumerate() {
            let far = outward * part * style.arc_number / window.scale();
            let middle = window.mm(arc.at(arc.away(self.rapidity, far)));
            let rect = Rect::from_center_size(middle, (label.x, label.y));
            found.push(Candidate {
                rect,
                cost: NUMBER_ORDER * i as f64 * style.em,
                leader: None,
            });
        }
        // Inside the overhang the number stands on one side of its arc.
        for (i, part) in INNER_PARTS.into_iter().enumerate() {
            let far = -outward * part * style.arc_number / window.scale();
            let at = arc.away(self.rapidity, far);
            let foot = window.mm(arc.at(at));
            let along = window.mm(arc.at(arc.away(at, far / 4.0))) - foot;
            let normal = Vec2::new(-along.y, along.x).normalize();
            for side in [normal, -normal] {
                let rect = box_beside(foot, side, label, style.clear_ink + style.stroke.fine);
                let cost = NUMBER_ORDER * (found.len() + i) as f64 * style.em;
                found.push(Candidate {
                    rect,
                    cost,
                    leader: None,
                });
            }
        }
        let last = found.len() as f64 * NUMBER_ORDER * style.em;
        let p = window.mm(self.origin + which.unit(self.rapidity) * size);
        found.extend(
            self.tick_places(canvas, which, p, label)
                .into_iter()
                .map(|c| Candidate {
                    cost: c.cost + last,
                    ..c
                }),
        );
        found
    }

    /// Beside a tick: right of a time axis or below a space axis first.
    fn tick_places(
        &self,
        canvas: &Canvas<'_>,
        which: Which,
        p: Point,
        label: Vec2,
    ) -> Vec<Candidate> {
        let style = canvas.style;
        let way = self.tick_way(which);
        let outward = match which {
            Which::Time if way.x < 0.0 => -way,
            Which::Space if way.y < 0.0 => -way,
            Which::Time | Which::Space => way,
        };
        let along = which.way(self.rapidity);
        let along = Vec2::new(along.x, -along.y).normalize();
        let half = style.tick * self.stretch(canvas) / 2.0;
        let mut found = Vec::new();
        for (i, (side, slide)) in [
            (1.0, 0.0),
            (-1.0, 0.0),
            (1.0, -0.5),
            (1.0, 0.5),
            (-1.0, -0.5),
            (-1.0, 0.5),
        ]
        .into_iter()
        .enumerate()
        {
            let foot = p + along * (slide * style.em);
            let rect = box_beside(
                foot,
                outward * side,
                label,
                half + style.clear_ink + style.stroke.axis,
            );
            found.push(Candidate {
                rect,
                cost: NUMBER_ORDER * i as f64 * style.em,
                leader: None,
            });
        }
        found
    }

    /// Its symbol: left of a time head, above a space head.
    fn symbol(
        &self,
        job: &mut Job<'_>,
        canvas: &mut Canvas<'_>,
        which: Which,
        ends: (Point, Point),
        symbol: &str,
    ) {
        let label = job.names.math(symbol);
        let style = canvas.style;
        let (from, tip) = ends;
        let size = canvas.size(&label);
        let beside_head = match which {
            Which::Time => Rect::from_origin_size(
                (
                    tip.x - style.symbol_at[0] - size.x,
                    tip.y - style.symbol_at[1],
                ),
                (size.x, size.y),
            ),
            Which::Space => Rect::from_origin_size(
                (
                    tip.x + style.symbol_at[1] - size.x,
                    tip.y - style.symbol_at[0] - size.y,
                ),
                (size.x, size.y),
            ),
        };
        let mut candidates = vec![Candidate {
            rect: beside_head,
            cost: 0.0,
            leader: None,
        }];
        let way = (tip - from).normalize();
        let feet: Vec<Spot> = (0..SYMBOL_SPOTS)
            .map(|i| Spot {
                foot: tip - way * (style.axis_head.length / 2.0 + style.em * f64::from(i)),
                along: way,
                order: 0.5 + 0.3 * f64::from(i),
            })
            .collect();
        let sides = match which {
            Which::Time => Side::Left,
            Which::Space => Side::Above,
        };
        candidates.extend(beside(canvas, &label, &feet, sides, 0.0));
        let group = canvas.group(&self.object.to_string());
        let is_base = self.object.name == job.solved.base;
        let blame = if is_base {
            job.plate.clone()
        } else {
            self.object.clone()
        };
        wish(
            canvas,
            Rank::Symbol,
            (group, Some(blame)),
            (label, self.ink),
            candidates,
        );
    }
}

/// What each later place of a number costs, ems.
const NUMBER_ORDER: f64 = 0.25;
/// Where along its arc, back from the tick, a number is looked for.
const INNER_PARTS: [f64; 3] = [0.5, 0.75, 1.0];
/// Where along a line of simultaneity its name is looked for.
const CUT_PARTS: [f64; 18] = [
    0.88, 0.84, 0.8, 0.92, 0.76, 0.72, 0.68, 0.64, 0.6, 0.56, 0.5, 0.44, 0.38, 0.32, 0.26, 0.2,
    0.14, 0.1,
];
/// Places tried for a symbol along its axis.
const SYMBOL_SPOTS: i32 = 5;

/// Draws the calibration arcs between the base axes and the tilted ones, or whole hyperbolas where there are none.
pub(super) fn arcs(
    canvas: &mut Canvas<'_>,
    frames: &[Tilted],
    ticks: &AxisTicks,
    factors: [f64; 2],
) {
    let group = canvas.group("calibration hyperbolas");
    let pen = (GUIDE, canvas.style.stroke.fine);
    let window = canvas.window;
    let centred: Vec<&Tilted> = frames
        .iter()
        .filter(|frame| frame.is_centred(canvas))
        .collect();
    for (which, ticks, factor) in [
        (Which::Time, &ticks.y, factors[0]),
        (Which::Space, &ticks.x, factors[1]),
    ] {
        let step = ticks.step.times(1) / factor;
        let reach = [
            window.plane.x0,
            window.plane.x1,
            window.plane.y0,
            window.plane.y1,
        ]
        .into_iter()
        .fold(0.0, |m: f64, v| m.max(v.abs()));
        let last = integer(reach / step).clamp(0, MOST_TICKS);
        for count in 1..=last {
            if canvas.style.is_large() && last > ARCS_IN_LARGE && count % 2 == 1 {
                continue;
            }
            let size = ticks.step.times(count) / factor;
            let branches: &[Branch] = match (which, frames.is_empty()) {
                (Which::Time, true) => &[Branch::Up, Branch::Down],
                (Which::Space, true) => &[Branch::Right, Branch::Left],
                (Which::Time | Which::Space, false) => &[which.branch()],
            };
            for &branch in branches {
                let arc = Hyperbola {
                    centre: Point::ORIGIN,
                    size,
                    branch,
                };
                let parts = if frames.is_empty() {
                    arc.inside(window.plane)
                } else {
                    let reached = centred
                        .iter()
                        .filter(|f| clip::holds(window.plane, arc.at(f.rapidity)));
                    let rapidities: Vec<f64> = reached.map(|f| f.rapidity).collect();
                    between(canvas, &arc, &rapidities)
                };
                for part in parts {
                    let path = window.path(&arc.path(part, CURVE_TOLERANCE / window.scale()));
                    canvas.stroke(Layer::Curve, group, path, pen, Vec::new());
                }
            }
        }
    }
}

/// The part of an arc from past the base axis to past the outermost tilted ones, inside the field.
fn between(canvas: &Canvas<'_>, arc: &Hyperbola, rapidities: &[f64]) -> Vec<(f64, f64)> {
    let window = canvas.window;
    let [past_base, past_tilted] = canvas.style.overhang.map(|mm| mm / window.scale());
    let low = rapidities.iter().copied().fold(0.0, f64::min);
    let high = rapidities.iter().copied().fold(0.0, f64::max);
    if low == high {
        return Vec::new();
    }
    let from = arc.away(low, if low < 0.0 { -past_tilted } else { -past_base });
    let to = arc.away(high, if high > 0.0 { past_tilted } else { past_base });
    arc.inside_between(window.plane, (from, to))
}

/// A line of simultaneity of a frame through an event.
#[derive(Clone, Debug)]
pub(super) struct Cut {
    /// The event.
    pub(super) event: ObjectId,
    /// The frame.
    pub(super) observer: ObjectId,
    /// The event in the panel's plane.
    pub(super) at: Point,
    /// The frame's rapidity relative to the panel's.
    pub(super) rapidity: f64,
    /// The frame's ink.
    pub(super) ink: Ink,
    /// `ct' = 1.66 Gm`, LaTeX math.
    pub(super) label: String,
}

impl Cut {
    /// Draws it dashed, named near its right end.
    pub(super) fn draw(&self, job: &mut Job<'_>, canvas: &mut Canvas<'_>) {
        let window = canvas.window;
        let Some((a, b)) = clip::line(self.at, Which::Space.way(self.rapidity), window.plane)
        else {
            return;
        };
        let (a, b) = (window.mm(a), window.mm(b));
        let title = format!(
            "simultaneity of {} in {}",
            self.event.name, self.observer.name
        );
        let group = canvas.group(&title);
        let style = canvas.style;
        let dash = outline::stretched(style.dash, (b - a).hypot());
        let pen = (self.ink, style.stroke.axis);
        canvas.stroke(
            Layer::Simultaneity,
            group,
            outline::open(&[a, b]),
            pen,
            dash,
        );
        let label = job.names.math(&self.label);
        let places = spots((a, b), &CUT_PARTS);
        let candidates = beside(canvas, &label, &places, Side::Below, 0.0);
        wish(
            canvas,
            Rank::Curve,
            (group, Some(job.plate.clone())),
            (label, self.ink),
            candidates,
        );
    }
}
