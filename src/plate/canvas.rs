//! A panel being drawn: marks by layer, the groups they belong to, the ink they put down, the labels still to be set.

use std::sync::Arc;

use kurbo::{BezPath, PathEl, Point, Rect, Vec2};

use super::arrow::Arrow;
use super::clip;
use super::outline;
use super::place::{Candidate, Places, box_at};
use super::style::{INK, PAPER, Style};
use super::window::{Groups, Window};
use crate::fault::ObjectId;
use crate::label::Label;
use crate::marks::{Cap, Ink, Join, Mark, Paint, Shape, Stroke};
use crate::num::{atan2, cos, sin};

/// What lies over what, lowest first.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub(super) enum Layer {
    Tint,
    Curve,
    Light,
    Tick,
    Axis,
    TiltedAxis,
    Simultaneity,
    Signal,
    World,
    Total,
    After,
    Before,
    Event,
    Text,
}

impl Layer {
    /// Lines and arrows that part a name from what it names.
    fn is_heavy(self) -> bool {
        match self {
            Self::Signal | Self::World | Self::Total | Self::After | Self::Before => true,
            Self::Tint
            | Self::Curve
            | Self::Light
            | Self::Tick
            | Self::Axis
            | Self::TiltedAxis
            | Self::Simultaneity
            | Self::Event
            | Self::Text => false,
        }
    }
}

/// In which order labels choose their places: those with least choice first.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub(super) enum Rank {
    Title,
    Number,
    Symbol,
    Event,
    Name,
    Curve,
    Word,
}

/// Where a label looks for a place.
#[derive(Clone, Debug)]
pub(super) enum Seek {
    /// One of these.
    Places(Vec<Candidate>),
    /// Around a point, away from the strokes through it.
    Around(Point),
}

/// A label still to be set.
#[derive(Clone, Debug)]
pub(super) struct Wish {
    /// When it chooses.
    pub(super) rank: Rank,
    /// Its group.
    pub(super) group: usize,
    /// The object at fault where there is no place for it; none where it may be left out.
    pub(super) blame: Option<ObjectId>,
    /// The label.
    pub(super) label: Arc<Label>,
    /// Its ink.
    pub(super) ink: Ink,
    /// Where it may stand.
    pub(super) seek: Seek,
}

/// A panel being drawn.
#[derive(Debug)]
pub(super) struct Canvas<'a> {
    /// The tokens.
    pub(super) style: &'a Style,
    /// Where it stands.
    pub(super) window: Window,
    letter: char,
    groups: &'a mut Groups,
    drawn: Vec<(Layer, Mark)>,
    places: Places,
    wishes: Vec<Wish>,
    /// The word "light" has been asked for; once a panel is enough.
    pub(super) has_light_word: bool,
}

/// Chords of a cubic for which its ink is taken.
const CHORDS: usize = 12;
/// Places tried for a remark along an edge.
const REMARK_PLACES: i32 = 12;
/// Directions tried around a point.
const WAYS: usize = 24;

impl<'a> Canvas<'a> {
    /// An empty panel.
    pub(super) fn new(
        style: &'a Style,
        window: Window,
        letter: char,
        groups: &'a mut Groups,
    ) -> Self {
        let places = Places::new(window.outer, style);
        Self {
            style,
            window,
            letter,
            groups,
            drawn: Vec::new(),
            places,
            wishes: Vec::new(),
            has_light_word: false,
        }
    }

    /// The group of some title on this panel.
    pub(super) fn group(&mut self, title: &str) -> usize {
        self.groups.of(self.letter, title)
    }

    /// A filled path; ink unless it lies on the lowest layer.
    pub(super) fn fill(&mut self, layer: Layer, group: usize, path: BezPath, ink: Ink) {
        if path.elements().is_empty() {
            return;
        }
        if layer != Layer::Tint {
            self.take_ink(&path, 0.0, layer);
        }
        let shape = Shape::Path {
            path,
            paint: Paint::Fill(ink),
        };
        self.drawn.push((layer, Mark { group, shape }));
    }

    /// A stroke with square ends.
    pub(super) fn stroke(
        &mut self,
        layer: Layer,
        group: usize,
        path: BezPath,
        (ink, width): (Ink, f64),
        dash: Vec<f64>,
    ) {
        if path.elements().len() < 2 {
            return;
        }
        self.take_ink(&path, width / 2.0, layer);
        let stroke = Stroke {
            ink,
            width,
            dash,
            cap: Cap::Butt,
            join: Join::Mitre,
        };
        let shape = Shape::Path {
            path,
            paint: Paint::Stroke(stroke),
        };
        self.drawn.push((layer, Mark { group, shape }));
    }

    /// A solid straight stroke.
    pub(super) fn line(
        &mut self,
        layer: Layer,
        group: usize,
        (a, b): (Point, Point),
        pen: (Ink, f64),
    ) {
        self.stroke(layer, group, outline::open(&[a, b]), pen, Vec::new());
    }

    /// A momentum arrow, cut at the field.
    pub(super) fn arrow(
        &mut self,
        layer: Layer,
        group: usize,
        tip: Point,
        arrow: &Arrow,
        ink: Ink,
    ) {
        let field = self.window.field;
        for body in &arrow.body {
            self.fill(
                layer,
                group,
                outline::closed(&clip::polygon(body, field)),
                ink,
            );
        }
        self.fill(
            layer,
            group,
            outline::closed(&clip::polygon(&arrow.paper, field)),
            PAPER,
        );
        if let Some((radius, paper)) = arrow.dot
            && clip::holds(field, tip)
        {
            self.fill(layer, group, outline::disc(tip, radius), ink);
            if paper > 0.0 {
                self.fill(layer, group, outline::disc(tip, paper), PAPER);
            }
        }
    }

    fn take_ink(&mut self, path: &BezPath, half: f64, layer: Layer) {
        let is_heavy = layer.is_heavy();
        let (mut start, mut last) = (Point::ORIGIN, Point::ORIGIN);
        for &element in path.elements() {
            match element {
                PathEl::MoveTo(p) => (start, last) = (p, p),
                PathEl::LineTo(p) | PathEl::QuadTo(_, p) => {
                    self.places.add_ink(last, p, half, is_heavy);
                    last = p;
                }
                PathEl::CurveTo(p, q, r) => {
                    let from = last;
                    for i in 1..=CHORDS {
                        let next = cubic_at([from, p, q, r], i as f64 / CHORDS as f64);
                        self.places.add_ink(last, next, half, is_heavy);
                        last = next;
                    }
                }
                PathEl::ClosePath => {
                    self.places.add_ink(last, start, half, is_heavy);
                    last = start;
                }
            }
        }
    }

    /// How far a box is from the ink put down so far, up to some reach.
    pub(super) fn clearance(&self, rect: Rect) -> f64 {
        self.places.clearance(rect)
    }

    /// The size of a label's ink, mm.
    pub(super) fn size(&self, label: &Label) -> Vec2 {
        Vec2::new(label.ink.width(), label.ink.height()) * self.style.em
    }

    /// Asks for a place for a label.
    pub(super) fn wish(&mut self, wish: Wish) {
        self.wishes.push(wish);
    }

    /// Sets all labels; gives back those that found no place, with the object each belongs to.
    pub(super) fn set_labels(&mut self) -> Vec<(Rank, Option<ObjectId>)> {
        let mut wishes = std::mem::take(&mut self.wishes);
        wishes.sort_by_key(|wish| wish.rank);
        let mut missing = Vec::new();
        for wish in wishes {
            let size = self.size(&wish.label);
            if size.x <= 0.0 || size.y <= 0.0 {
                continue;
            }
            let found = match &wish.seek {
                Seek::Places(candidates) => self.places.best(candidates).map(|(_, rect)| rect),
                Seek::Around(p) => self.around(*p, size),
            };
            match found {
                Some(rect) => self.set(wish.group, wish.label, wish.ink, rect),
                None => missing.push((wish.rank, wish.blame)),
            }
        }
        missing
    }

    /// Sets a label so that its ink fills a box.
    fn set(&mut self, group: usize, label: Arc<Label>, ink: Ink, rect: Rect) {
        let em = self.style.em;
        let at = Point::new(rect.x0 - em * label.ink.x0, rect.y1 + em * label.ink.y0);
        self.places.add_label(rect);
        self.drawn.push((
            Layer::Text,
            Mark {
                group,
                shape: Shape::Label { label, at, em, ink },
            },
        ));
    }

    /// Asks for a place for a remark along the field's lower edge, else its upper one.
    pub(super) fn remark(&mut self, group: usize, label: Arc<Label>) {
        let field = self.window.field;
        let (size, gap) = (self.size(&label), self.style.air / 4.0);
        let mut candidates = Vec::new();
        for i in 0..REMARK_PLACES {
            let part = f64::from(i) / f64::from(REMARK_PLACES - 1);
            let x = field.x1 - gap - size.x - part * (field.width() - size.x - 2.0 * gap);
            for (y, cost) in [(field.y1 - gap - size.y, 0.0), (field.y0 + gap, 1.0)] {
                let rect = Rect::from_origin_size((x, y), (size.x, size.y));
                let cost = (cost + part) * self.style.em;
                candidates.push(Candidate {
                    rect,
                    cost,
                    leader: None,
                });
            }
        }
        let seek = Seek::Places(candidates);
        self.wish(Wish {
            rank: Rank::Word,
            group,
            blame: None,
            label,
            ink: INK,
            seek,
        });
    }

    /// The best place around a point: rings of growing distance, on each the directions away from the strokes through
    /// the point first.
    fn around(&self, p: Point, size: Vec2) -> Option<Rect> {
        let [nearest, step, farthest] = self.style.letter;
        let strokes = self.places.strokes_through(p, self.style.event);
        let turn = |w: usize| TAU * w as f64 / WAYS as f64;
        let ways: Vec<(Vec2, f64)> = (0..WAYS)
            .map(turn)
            .chain(between(&strokes))
            .map(|angle| {
                let away = strokes
                    .iter()
                    .map(|d| apart(angle, *d))
                    .fold(HALF_PI, f64::min);
                let order = (HALF_PI - away) / HALF_PI + TIE * apart(angle, PREFERRED);
                (
                    Vec2::new(cos(angle), -sin(angle)),
                    order * ORDER_WORTH * self.style.em,
                )
            })
            .collect();
        let off = self.style.event + self.style.clear_ink / 2.0;
        let rings = super::whole::count((farthest - nearest) / step + 0.5);
        let mut best: Option<(f64, Rect)> = None;
        for ring in 0..=rings {
            let far = step * ring as f64;
            if best.is_some_and(|(score, _)| far - self.places.worth() >= score) {
                break;
            }
            let candidates: Vec<Candidate> = ways
                .iter()
                .map(|&(way, order)| Candidate {
                    rect: box_at(p, way, size, nearest + far),
                    cost: far + order,
                    leader: Some(p + way * off),
                })
                .collect();
            let found = self.places.best(&candidates);
            if let Some((score, _)) = found
                && best.is_none_or(|(least, _)| score < least)
            {
                best = found;
            }
        }
        best.map(|(_, rect)| rect)
    }

    /// The marks in drawing order.
    pub(super) fn finish(mut self) -> Vec<Mark> {
        self.drawn.sort_by_key(|(layer, _)| *layer);
        self.drawn.into_iter().map(|(_, mark)| mark).collect()
    }
}

const HALF_PI: f64 = std::f64::consts::FRAC_PI_2;
/// The side an event's letter takes where nothing speaks against it: upper right.
const PREFERRED: f64 = std::f64::consts::FRAC_PI_4;
/// How little that counts.
const TIE: f64 = 0.05;
/// What the worst direction costs, ems.
const ORDER_WORTH: f64 = 0.6;

/// The directions half-way between neighbours of some, in order.
fn between(strokes: &[f64]) -> Vec<f64> {
    let mut sorted: Vec<f64> = strokes.iter().map(|angle| angle.rem_euclid(TAU)).collect();
    sorted.sort_by(f64::total_cmp);
    sorted.dedup_by(|a, b| *a - *b < SAME_WAY);
    let next = sorted.iter().cycle().skip(1);
    sorted
        .iter()
        .zip(next)
        .map(|(&a, &b)| a + (b - a).rem_euclid(TAU) / 2.0)
        .take(MOST_BETWEEN)
        .collect()
}

/// Strokes that differ by less leave in one direction.
const SAME_WAY: f64 = 0.01;
/// Most directions between strokes that are tried.
const MOST_BETWEEN: usize = 24;
const TAU: f64 = std::f64::consts::TAU;

/// The angle between two directions, at most pi.
fn apart(a: f64, b: f64) -> f64 {
    let turn = (a - b).rem_euclid(TAU);
    turn.min(TAU - turn)
}

fn cubic_at([a, b, c, d]: [Point; 4], w: f64) -> Point {
    let v = 1.0 - w;
    let sum = a.to_vec2() * (v * v * v)
        + b.to_vec2() * (3.0 * v * v * w)
        + c.to_vec2() * (3.0 * v * w * w)
        + d.to_vec2() * (w * w * w);
    sum.to_point()
}

/// The direction of a vector on the sheet (y down), as an angle counter-clockwise to the eye.
pub(super) fn angle_of(way: Vec2) -> f64 {
    atan2(-way.y, way.x)
}
