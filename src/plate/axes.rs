//! The viewing frame's own axes: strokes past the field with heads, ticks, numbers, titles.

use std::sync::Arc;

use kurbo::{Point, Rect, Vec2};

use super::arrow::{head, shaft_end};
use super::canvas::{Canvas, Layer, Rank, Seek, Wish};
use super::names::{Names, number};
use super::outline;
use super::place::Candidate;
use super::style::{INK, Style};
use super::ticks::Ticks;
use super::window::Window;
use crate::fault::ObjectId;
use crate::label::Label;
use crate::marks::Ink;

/// One axis: what it counts.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Axis {
    /// The quantity, LaTeX math: `ct'`.
    pub(super) symbol: String,
    /// Its unit, LaTeX math.
    pub(super) unit: String,
    /// Units of the axis per unit of the plane.
    pub(super) factor: f64,
}

/// The axes of a panel.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Axes {
    /// Level.
    pub(super) x: Axis,
    /// Upright.
    pub(super) y: Axis,
    /// Arcs start at the ticks, so numbers stand at their lower left.
    pub(super) has_arcs: bool,
    /// Half ticks may be drawn.
    pub(super) has_halves: bool,
}

/// Ticks of both axes, in their units.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct AxisTicks {
    /// Level.
    pub(super) x: Ticks,
    /// Upright.
    pub(super) y: Ticks,
}

/// Ticks may stand closer than usual in a small field: so many at least on its shorter side.
const FEWEST: f64 = 4.0;
/// Yet not closer than this part of the usual distance.
const CLOSEST: f64 = 0.55;

impl Axis {
    /// `ct / m`; a compound unit or a power of ten stands in parentheses.
    pub(super) fn title(&self, power: i32) -> String {
        let Self {
            symbol,
            unit,
            factor: _,
        } = self;
        let compound = unit.contains(r"\,") || unit.contains('/');
        match (power, compound) {
            (0, false) => format!(r"{symbol}\,/\,{unit}"),
            (0, true) => format!(r"{symbol}\,/\,({unit})"),
            _ => format!(r"{symbol}\,/\,(10^{{{power}}}\,{unit})"),
        }
    }
}

impl Axes {
    /// The ticks inside a window.
    pub(super) fn ticks(&self, canvas: &Canvas<'_>) -> AxisTicks {
        self.ticks_in(&canvas.window, canvas.style)
    }

    /// The same, before there is a canvas.
    pub(super) fn ticks_in(&self, window: &Window, style: &Style) -> AxisTicks {
        let (plane, field) = (window.plane, window.field);
        let usual = style.tick_apart;
        let side = field.width().min(field.height());
        let apart = usual.min(side / FEWEST).max(CLOSEST * usual) / window.scale();
        let between = |low: f64, high: f64, factor: f64| {
            Ticks::between(low * factor, high * factor, apart * factor)
        };
        AxisTicks {
            x: between(plane.x0, plane.x1, self.x.factor),
            y: between(plane.y0, plane.y1, self.y.factor),
        }
    }

    /// Draws them and asks for places for their numbers and titles.
    pub(super) fn draw(
        &self,
        canvas: &mut Canvas<'_>,
        names: &mut Names,
        ticks: &AxisTicks,
        group: usize,
    ) {
        let (plane, field) = (canvas.window.plane, canvas.window.field);
        let crossing = Point::new(
            0.0_f64.clamp(plane.x0, plane.x1),
            0.0_f64.clamp(plane.y0, plane.y1),
        );
        let at = canvas.window.mm(crossing);
        let past = canvas.style.past_field;
        let top = Point::new(at.x, field.y0 - past);
        let right = Point::new(field.x1 + past, at.y);
        let pen = (INK, canvas.style.stroke.axis);
        headed(
            canvas,
            Layer::Axis,
            group,
            (Point::new(at.x, field.y1), top),
            pen,
        );
        headed(
            canvas,
            Layer::Axis,
            group,
            (Point::new(field.x0, at.y), right),
            pen,
        );
        let x_places = places(&ticks.x, self.x.factor, |v| {
            canvas.window.mm(Point::new(v, crossing.y))
        });
        let y_places = places(&ticks.y, self.y.factor, |v| {
            canvas.window.mm(Point::new(crossing.x, v))
        });
        for (_, p) in &x_places {
            tick(canvas, group, *p, Vec2::new(0.0, 1.0), false);
        }
        for (_, p) in &y_places {
            tick(canvas, group, *p, Vec2::new(1.0, 0.0), false);
        }
        if self.has_halves {
            self.halves(canvas, ticks, crossing, group);
        }
        let is_origin = crossing == Point::ORIGIN;
        for (upright, ticks, places) in [(true, &ticks.y, &y_places), (false, &ticks.x, &x_places)]
        {
            for &(count, p) in places {
                if count != 0 || !is_origin {
                    let label = names.math(&number(&ticks.text(count)));
                    let candidates = self.number_places(canvas, &label, p, upright);
                    wish(
                        canvas,
                        Rank::Number,
                        (group, None),
                        (label, INK),
                        candidates,
                    );
                }
            }
        }
        self.titles(canvas, names, ticks, (top, right), group);
    }

    fn halves(&self, canvas: &mut Canvas<'_>, ticks: &AxisTicks, crossing: Point, group: usize) {
        let (plane, scale) = (canvas.window.plane, canvas.window.scale());
        for (upright, axis, ticks, low, high) in [
            (true, &self.y, &ticks.y, plane.y0, plane.y1),
            (false, &self.x, &ticks.x, plane.x0, plane.x1),
        ] {
            let f = axis.factor;
            if ticks.step.times(1) / f * scale <= canvas.style.half_from || ticks.marks.is_empty() {
                continue;
            }
            for v in ticks.step.halves(low * f, high * f) {
                let (p, across) = if upright {
                    (Point::new(crossing.x, v / f), Vec2::new(1.0, 0.0))
                } else {
                    (Point::new(v / f, crossing.y), Vec2::new(0.0, 1.0))
                };
                let p = canvas.window.mm(p);
                tick(canvas, group, p, across, true);
            }
        }
    }

    fn number_places(
        &self,
        canvas: &Canvas<'_>,
        label: &Label,
        p: Point,
        upright: bool,
    ) -> Vec<Candidate> {
        let style = canvas.style;
        let size = canvas.size(label);
        let order = style.em;
        let [left, below] = if upright {
            style.upright_number
        } else {
            style.level_number
        };
        let corner = |x: f64, y: f64| Rect::from_origin_size((x, y), (size.x, size.y));
        let mut found = Vec::new();
        if self.has_arcs {
            found.push(Candidate {
                rect: corner(p.x - left - size.x, p.y + below),
                cost: 0.0,
                leader: None,
            });
        }
        let first = if self.has_arcs { order } else { 0.0 };
        for (i, slide) in [0.0, -0.5, 0.5, -1.0, 1.0].into_iter().enumerate() {
            let by = slide * style.slide;
            let cost = first + order * SLIDE_COST * i as f64;
            let near = if upright {
                (p.x - style.centred_number - size.x, p.y - size.y / 2.0 + by)
            } else {
                let half = style.tick / 2.0 + style.stroke.axis / 2.0;
                let clear = half + style.clear_ink + HAIR;
                (p.x - size.x / 2.0 + by, p.y + clear.max(below))
            };
            found.push(Candidate {
                rect: corner(near.0, near.1),
                cost,
                leader: None,
            });
            if upright {
                let rect = corner(p.x + style.centred_number, near.1);
                found.push(Candidate {
                    rect,
                    cost: cost + 2.0 * order,
                    leader: None,
                });
            }
        }
        let [beside_left, beside_right] = [p.x - left - size.x, p.x + left];
        let above = p.y - below - size.y;
        let corners = [
            (beside_left, p.y + below),
            (beside_right, p.y + below),
            (beside_left, above),
            (beside_right, above),
        ];
        // Above a level axis a number would be taken for one of something else.
        let count = if upright { corners.len() } else { 2 };
        for (k, &(x, y)) in corners[..count].iter().enumerate() {
            found.push(Candidate {
                rect: corner(x, y),
                cost: (3.0 + k as f64) * order,
                leader: None,
            });
        }
        found
    }

    fn titles(
        &self,
        canvas: &mut Canvas<'_>,
        names: &mut Names,
        ticks: &AxisTicks,
        (top, right): (Point, Point),
        group: usize,
    ) {
        let style = canvas.style;
        let step = style.em;
        let label = names.math(&self.y.title(ticks.y.power));
        let [gap, below] = style.upright_title;
        let width = canvas.size(&label).x;
        let candidates =
            [(top.x - gap - width, 0.0), (top.x + gap, 2.0)].map(|(x, cost)| Candidate {
                rect: on_baseline(canvas, &label, x, top.y + below),
                cost: cost * step,
                leader: None,
            });
        wish(
            canvas,
            Rank::Title,
            (group, None),
            (label, INK),
            candidates.to_vec(),
        );

        let label = names.math(&self.x.title(ticks.x.power));
        let [past, below] = style.level_title;
        let width = canvas.size(&label).x;
        let height = canvas.size(&label).y;
        // A title with a raised exponent hangs lower, so that it clears the axis as others do.
        let raised = step * (label.ink.y1 - USUAL_HEIGHT).max(0.0);
        let mut candidates = Vec::new();
        for i in 0..TITLE_SHIFTS {
            let x = right.x + past - width - step * f64::from(i);
            for (y, cost) in [
                (right.y + below + raised, 0.0),
                (right.y - below + height / 2.0, 2.0),
            ] {
                let rect = on_baseline(canvas, &label, x, y);
                candidates.push(Candidate {
                    rect,
                    cost: (cost + f64::from(i)) * step,
                    leader: None,
                });
            }
        }
        wish(canvas, Rank::Title, (group, None), (label, INK), candidates);
    }
}

/// A number under its tick clears it by this much more than it must, mm.
const HAIR: f64 = 1e-6;
/// What a number's slide along its axis costs, ems.
const SLIDE_COST: f64 = 0.1;
/// How far above its baseline a title without exponents reaches, ems: a solidus.
const USUAL_HEIGHT: f64 = 0.75;
/// Places tried for a level axis' title, one em apart.
const TITLE_SHIFTS: i32 = 8;

/// The box of a label's ink with its left end and baseline given.
pub(super) fn on_baseline(canvas: &Canvas<'_>, label: &Label, x: f64, baseline: f64) -> Rect {
    let size = canvas.size(label);
    let bottom = baseline - canvas.style.em * label.ink.y0;
    Rect::new(x, bottom - size.y, x + size.x, bottom)
}

/// Asks for one of some places.
pub(super) fn wish(
    canvas: &mut Canvas<'_>,
    rank: Rank,
    (group, blame): (usize, Option<ObjectId>),
    (label, ink): (Arc<Label>, Ink),
    candidates: Vec<Candidate>,
) {
    canvas.wish(Wish {
        rank,
        group,
        blame,
        label,
        ink,
        seek: Seek::Places(candidates),
    });
}

fn places(ticks: &Ticks, factor: f64, mm: impl Fn(f64) -> Point) -> Vec<(i64, Point)> {
    ticks
        .marks
        .iter()
        .map(|tick| (tick.count, mm(tick.value / factor)))
        .collect()
}

fn tick(canvas: &mut Canvas<'_>, group: usize, p: Point, across: Vec2, is_half: bool) {
    let style = canvas.style;
    let (length, width) = if is_half {
        (style.half_tick, style.stroke.fine)
    } else {
        (style.tick, style.stroke.axis)
    };
    let half = across * (length / 2.0);
    canvas.line(Layer::Tick, group, (p - half, p + half), (INK, width));
}

/// A stroke with a head at its end.
pub(super) fn headed(
    canvas: &mut Canvas<'_>,
    layer: Layer,
    group: usize,
    (from, tip): (Point, Point),
    (ink, width): (Ink, f64),
) {
    let unit = (tip - from).normalize();
    let size = canvas.style.axis_head;
    canvas.line(
        layer,
        group,
        (from, shaft_end(tip, unit, size)),
        (ink, width),
    );
    canvas.fill(layer, group, outline::closed(&head(tip, unit, size)), ink);
}
