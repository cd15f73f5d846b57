//! The energy-momentum panel: E up, px right, arrows from the origin or tip to tail, mass shells, light lines.

use std::sync::Arc;

use kurbo::{BezPath, Line, PathEl, Point, Rect, Vec2};

use super::arrow::{Form, arrow};
use super::axes::{Axes, Axis, wish};
use super::beside::{Side, Spot, beside, spots};
use super::canvas::{Canvas, Layer, Rank};
use super::clip;
use super::curve::{Branch, Hyperbola};
use super::fit::Wanted;
use super::job::{Job, letter};
use super::names::number;
use super::place::{Candidate, between};
use super::spacetime::{primed, primes_of};
use super::style::{CLARET, CURVE_TOLERANCE, GUIDE, INK, OCHRE, TEAL};
use super::vectors::{Sum, Vector, of_collision, of_particles};
use super::window::Window;
use super::words::kind;
use crate::fault::{Fault, Kind};
use crate::label::Label;
use crate::marks::Ink;
use crate::num::hypot;
use crate::quantity::{Dimension, significant};
use crate::scene::{Arrows, Panel};
use crate::solve::{Solved, Viewing};

/// An energy-momentum panel's contents.
#[derive(Clone, Debug)]
pub(super) struct Energy {
    vectors: Vec<Vector>,
    sum: Option<Sum>,
    arrows: Arrows,
    has_words: bool,
    has_shells: bool,
    axes: Axes,
    is_projection: bool,
    /// What the panel wants to show.
    pub(super) wanted: Wanted,
}

/// Digits of an invariant mass.
const MASS_DIGITS: usize = 4;

impl Energy {
    /// Gathers what a panel shows.
    pub(super) fn of(job: &mut Job<'_>, index: usize, panel: &Panel, from: &Viewing) -> Self {
        let field = format!("panels.{index}");
        let collision = collision(job, &field, panel);
        let usual = if collision.is_some() {
            Arrows::TipToTail
        } else {
            Arrows::FromOrigin
        };
        let arrows = panel.arrows.unwrap_or(usual);
        let (vectors, sum) = match &collision {
            Some(name) => of_collision(job, name, from, arrows),
            None => of_particles(job, &field, panel, from, arrows),
        };
        let is_projection =
            vectors.iter().any(|v| v.has_across) || sum.as_ref().is_some_and(|s| s.has_across);
        if is_projection {
            job.projection(
                &field,
                format!(
                    "panel {} shows E and px alone: momentum across is drawn in projection",
                    letter(index)
                ),
            );
        }
        let energy = job.solved.units.energy.clone();
        let momentum = energy.for_dimension(Dimension::Momentum);
        let range = &panel.range;
        let y = job.range(
            range.energy.as_ref(),
            &energy,
            &format!("{field}.range.energy"),
        );
        let x = job.range(range.px.as_ref(), &momentum, &format!("{field}.range.px"));
        let mut contents = Rect::ZERO;
        for p in vectors
            .iter()
            .flat_map(|v| [v.tail, v.tip])
            .chain(sum.iter().map(|s| s.tip))
        {
            contents = contents.union_pt(p);
        }
        let primes = primes_of(job, from);
        let symbol = if is_projection {
            format!("{}_x c", primed("p", primes))
        } else {
            format!("{}c", primed("p", primes))
        };
        let axis = |symbol: String| Axis {
            symbol,
            unit: energy.latex(),
            factor: 1.0,
        };
        Self {
            arrows,
            has_words: collision.is_some(),
            has_shells: panel.hyperbolas != Some(false),
            axes: Axes {
                x: axis(symbol),
                y: axis(primed("E", primes)),
                has_arcs: false,
                has_halves: true,
            },
            wanted: Wanted { x, y, contents },
            vectors,
            sum,
            is_projection,
        }
    }

    /// Its own axes.
    pub(super) fn axes(&self) -> &Axes {
        &self.axes
    }

    /// What it shows, in words.
    pub(super) fn words(&self) -> Vec<String> {
        let of = |form: Form| -> Vec<&str> {
            self.vectors
                .iter()
                .filter(|v| v.form == form)
                .map(|v| &*v.object.name)
                .collect()
        };
        let (before, after) = (of(Form::Before), of(Form::After));
        if self.has_words {
            let pair = [("before the collision, ", &before), ("after it, ", &after)];
            return pair
                .into_iter()
                .filter_map(|(lead, names)| Some(format!("{lead}{}", kind("particle", names)?)))
                .collect();
        }
        kind("particle", &before).into_iter().collect()
    }

    /// Draws it.
    pub(super) fn draw(&self, job: &mut Job<'_>, canvas: &mut Canvas<'_>) {
        let ticks = self.axes.ticks(canvas);
        let group = canvas.group("axes");
        light(job, canvas);
        if self.has_shells {
            self.shells(job, canvas);
        }
        self.axes.draw(canvas, &mut job.names, &ticks, group);
        if let Some(sum) = &self.sum {
            self.total(job, canvas, sum);
        }
        for vector in &self.vectors {
            self.vector(job, canvas, vector);
        }
        if self.has_words {
            self.sides(job, canvas);
        }
        if self.is_projection {
            job.remark(canvas, "projection on E and px");
        }
    }

    fn vector(&self, job: &mut Job<'_>, canvas: &mut Canvas<'_>, vector: &Vector) {
        let window = canvas.window;
        let (tail, tip) = (window.mm(vector.tail), window.mm(vector.tip));
        let group = canvas.group(&vector.object.to_string());
        let layer = match vector.form {
            Form::Before => Layer::Before,
            Form::After => Layer::After,
            Form::Total => Layer::Total,
        };
        let drawn = arrow(tail, tip, vector.form, 0.0, canvas.style);
        canvas.arrow(layer, group, tip, &drawn, vector.ink);
        let label = job
            .solved
            .particles
            .get(&vector.object.name)
            .and_then(|p| p.label.as_deref());
        let label = job.names.of(&vector.object, label);
        let candidates = match clip::segment(tail, tip, window.field) {
            Some(ends) => self.name_places(canvas, &label, ends, vector.form, self.name_parts()),
            None => Vec::new(),
        };
        let candidates = if candidates.is_empty() && clip::holds(window.field, tip) {
            let spot = Spot {
                foot: tip,
                along: Vec2::new(0.0, 1.0),
                order: 0.0,
            };
            beside(canvas, &label, &[spot], Side::Right, canvas.style.dot)
        } else {
            candidates
        };
        if candidates.is_empty() {
            job.names.fault(
                Fault::new(
                    vector.object.clone(),
                    "",
                    format!(
                        "its arrow lies outside the range of a panel of {}",
                        job.plate
                    ),
                    "widen the range, or take the particle off the panel's list",
                )
                .finding(),
            );
            return;
        }
        let blame = Some(vector.object.clone());
        wish(
            canvas,
            Rank::Name,
            (group, blame),
            (label, vector.ink),
            candidates,
        );
    }

    /// Where along its arrow a name is looked for: in a fan near the tip, where its arrows are apart.
    fn name_parts(&self) -> &'static [f64] {
        match self.arrows {
            Arrows::FromOrigin => &FAN_PARTS,
            Arrows::TipToTail => &CHAIN_PARTS,
        }
    }

    /// Places beside an arrow, outside the closed figure first.
    fn name_places(
        &self,
        canvas: &Canvas<'_>,
        label: &Label,
        (a, b): (Point, Point),
        form: Form,
        parts: &[f64],
    ) -> Vec<Candidate> {
        let half = match form {
            Form::Before => canvas.style.stroke.shaft,
            Form::After => canvas.style.stroke.hollow_shaft,
            Form::Total => canvas.style.stroke.total,
        } / 2.0;
        let sides = match &self.sum {
            Some(sum) if self.arrows == Arrows::TipToTail => {
                let window = canvas.window;
                let (foot, tip) = (window.mm(Point::ORIGIN), window.mm(sum.tip));
                let middle = a.midpoint(b);
                let turn = (tip - foot).cross(middle - foot);
                if turn > 0.0 || (turn == 0.0 && form != Form::Before) {
                    Side::Right
                } else {
                    Side::Left
                }
            }
            _ if b.x < a.x => Side::Left,
            _ => Side::Right,
        };
        beside(canvas, label, &spots((a, b), parts), sides, half)
    }

    fn total(&self, job: &mut Job<'_>, canvas: &mut Canvas<'_>, sum: &Sum) {
        let window = canvas.window;
        let group = canvas.group(&format!("total of {}", sum.object));
        let (foot, tip) = (window.mm(Point::ORIGIN), window.mm(sum.tip));
        if sum.has_arrow {
            let back = if self.is_crowded(canvas, tip, tip - foot) {
                canvas.style.head_back
            } else {
                0.0
            };
            let drawn = arrow(foot, tip, Form::Total, back, canvas.style);
            canvas.arrow(Layer::Total, group, tip, &drawn, INK);
            if let Some(ends) = clip::segment(foot, tip, window.field) {
                let label = job.names.word("total");
                let half = canvas.style.stroke.total / 2.0;
                let places = spots(ends, &[0.7, 0.62, 0.78, 0.54, 0.46, 0.38, 0.3, 0.84]);
                let candidates = beside(canvas, &label, &places, Side::Right, half);
                wish(canvas, Rank::Word, (group, None), (label, INK), candidates);
            }
        }
        if self.has_shells && sum.mass > 0.0 {
            let pen = (INK, canvas.style.stroke.axis);
            shell(canvas, group, sum.mass, pen);
            let symbol = if sum.has_across {
                r"M_{\mathrm{T}}c^2"
            } else {
                "Mc^2"
            };
            let unit = job.solved.units.energy.latex();
            let value = number(&significant(sum.mass, MASS_DIGITS));
            let label = job
                .names
                .math(&format!(r"{symbol}\,{{=}}\,{value}\,{unit}"));
            let places = along_shell(canvas, sum.mass, sum.tip.x);
            let candidates = beside(canvas, &label, &places, Side::Below, pen.1 / 2.0);
            let candidates = nearest_to_own(canvas, sum.mass, &self.masses(), candidates);
            wish(
                canvas,
                Rank::Curve,
                (group, Some(sum.object.clone())),
                (label, INK),
                candidates,
            );
        }
    }

    /// Whether the total's head would stand on another's that ends at the same tip.
    fn is_crowded(&self, canvas: &Canvas<'_>, tip: Point, way: Vec2) -> bool {
        const SPARE_DEGREES: f64 = 5.0;
        let style = canvas.style;
        let spare = SPARE_DEGREES.to_radians();
        self.vectors.iter().any(|vector| {
            let (tail, own) = (canvas.window.mm(vector.tail), canvas.window.mm(vector.tip));
            let along = own - tail;
            let apart = crate::num::atan2(along.cross(way).abs(), along.dot(way));
            (own - tip).hypot() < style.before_head.length
                && along.hypot() >= style.headless
                && apart < vector.form.half_angle(style) + Form::Total.half_angle(style) + spare
        })
    }

    /// The particles whose shells are drawn: those whose arrows start at the origin, each mass once.
    fn shelled(&self) -> Vec<&Vector> {
        let mut found: Vec<&Vector> = self
            .vectors
            .iter()
            .filter(|v| v.tail == Point::ORIGIN && v.transverse_mass > 0.0)
            .filter(|v| {
                !self
                    .sum
                    .as_ref()
                    .is_some_and(|s| is_same(s.mass, v.transverse_mass))
            })
            .collect();
        found.sort_by(|a, b| a.transverse_mass.total_cmp(&b.transverse_mass));
        found.dedup_by(|b, a| is_same(a.transverse_mass, b.transverse_mass));
        found
    }

    /// The masses of all shells.
    fn masses(&self) -> Vec<f64> {
        let own = self.shelled().into_iter().map(|v| v.transverse_mass);
        let mut found: Vec<f64> = own.chain(self.sum.iter().map(|s| s.mass)).collect();
        found.sort_by(f64::total_cmp);
        found
    }

    /// Shells of the particles.
    fn shells(&self, job: &mut Job<'_>, canvas: &mut Canvas<'_>) {
        let masses = self.masses();
        for vector in self.shelled() {
            let mass = vector.transverse_mass;
            let group = canvas.group(&format!("shell of {}", vector.object));
            shell(canvas, group, mass, (GUIDE, canvas.style.stroke.fine));
            if mass * canvas.window.scale() < canvas.style.name[0] {
                // Its vertex is lost in the light lines: a name would name those.
                continue;
            }
            let label = job.names.math(&shell_label(job.solved, vector));
            let places = along_shell(canvas, mass, 0.0);
            let candidates = beside(canvas, &label, &places, Side::Above, 0.0);
            let candidates = nearest_to_own(canvas, mass, &masses, candidates);
            let blame = (!canvas.style.is_large()).then(|| vector.object.clone());
            wish(
                canvas,
                Rank::Curve,
                (group, blame),
                (label, INK),
                candidates,
            );
        }
    }

    /// `before` and `after` beside their last arrows.
    fn sides(&self, job: &mut Job<'_>, canvas: &mut Canvas<'_>) {
        for (form, text, ink) in [
            (Form::Before, "before", CLARET),
            (Form::After, "after", TEAL),
        ] {
            let own: Vec<&Vector> = self.vectors.iter().filter(|v| v.form == form).collect();
            let group = canvas.group(text);
            let label = job.names.word(text);
            let mut candidates = Vec::new();
            for (i, vector) in own.iter().rev().enumerate() {
                let ends = (canvas.window.mm(vector.tail), canvas.window.mm(vector.tip));
                let Some(ends) = clip::segment(ends.0, ends.1, canvas.window.field) else {
                    continue;
                };
                let places = self.name_places(canvas, &label, ends, form, &WORD_PARTS);
                let later = i as f64 * canvas.style.em;
                candidates.extend(places.into_iter().map(|c| Candidate {
                    cost: c.cost + later,
                    ..c
                }));
            }
            wish(canvas, Rank::Word, (group, None), (label, ink), candidates);
        }
    }
}

/// Where along an arrow of a chain, and of a fan, its name is looked for.
const CHAIN_PARTS: [f64; 10] = [0.45, 0.38, 0.52, 0.31, 0.6, 0.68, 0.24, 0.76, 0.17, 0.84];
const FAN_PARTS: [f64; 10] = [0.8, 0.74, 0.86, 0.68, 0.92, 0.62, 0.55, 0.48, 0.4, 0.32];
/// Where along an arrow the word for its side is looked for.
const WORD_PARTS: [f64; 9] = [0.68, 0.75, 0.6, 0.82, 0.52, 0.44, 0.36, 0.28, 0.2];
/// Masses that differ by less have one shell.
const SAME_MASS: f64 = 1e-9;

/// The panel's collision: the one it names, or the scene's only one where it lists no particles.
fn collision(job: &mut Job<'_>, field: &str, panel: &Panel) -> Option<Arc<str>> {
    let solved = job.solved;
    if let Some(name) = &panel.collision {
        let known: Vec<Arc<str>> = solved.collisions.keys().cloned().collect();
        let found = known.iter().find(|k| ***k == **name).cloned();
        if found.is_none() && !job.is_left_out(Kind::Collision, name) {
            job.unknown("collision", name, &format!("{field}.collision"), &known);
        }
        return found;
    }
    let only = if solved.collisions.len() == 1 {
        solved.collisions.keys().next()
    } else {
        None
    };
    only.filter(|_| panel.particles.is_none()).cloned()
}

/// The light lines from the origin, and the word beside the right-hand one.
fn light(job: &mut Job<'_>, canvas: &mut Canvas<'_>) {
    let window = canvas.window;
    let group = canvas.group("light");
    let pen = (OCHRE, canvas.style.stroke.fine);
    let label = job.names.word("light");
    let mut candidates = Vec::new();
    for (way, order) in [(Vec2::new(1.0, 1.0), 0.0), (Vec2::new(-1.0, 1.0), 1.0)] {
        let Some((a, b)) = clip::ray(Point::ORIGIN, way, window.plane) else {
            continue;
        };
        let ends = (window.mm(a), window.mm(b));
        canvas.line(Layer::Light, group, ends, pen);
        let places = spots(ends, &[0.86, 0.8, 0.74, 0.68, 0.92, 0.6, 0.5, 0.4]);
        let beside = beside(canvas, &label, &places, Side::Below, 0.0);
        candidates.extend(beside.into_iter().map(|c| Candidate {
            cost: c.cost + order * canvas.style.em,
            ..c
        }));
    }
    wish(canvas, Rank::Word, (group, None), (label, INK), candidates);
}

/// Draws a mass shell.
fn shell(canvas: &mut Canvas<'_>, group: usize, mass: f64, pen: (Ink, f64)) {
    let window = canvas.window;
    for path in shell_paths(window, mass) {
        canvas.stroke(Layer::Curve, group, path, pen, Vec::new());
    }
}

/// A mass shell's parts inside the field, mm.
fn shell_paths(window: Window, mass: f64) -> Vec<BezPath> {
    let curve = Hyperbola {
        centre: Point::ORIGIN,
        size: mass,
        branch: Branch::Up,
    };
    curve
        .inside(window.plane)
        .into_iter()
        .map(|part| window.path(&curve.path(part, CURVE_TOLERANCE / window.scale())))
        .collect()
}

/// Those places of a shell's label that are nearer to it than to the shells next to it.
fn nearest_to_own(
    canvas: &Canvas<'_>,
    mass: f64,
    masses: &[f64],
    candidates: Vec<Candidate>,
) -> Vec<Candidate> {
    let lines = |mass: f64| -> Vec<Line> {
        let mut found = Vec::new();
        for path in shell_paths(canvas.window, mass) {
            let mut last = Point::ORIGIN;
            kurbo::flatten(path, SHELL_FLATNESS, |element| match element {
                PathEl::LineTo(p) => found.push(Line::new(std::mem::replace(&mut last, p), p)),
                PathEl::MoveTo(p) | PathEl::QuadTo(_, p) | PathEl::CurveTo(_, _, p) => last = p,
                PathEl::ClosePath => {}
            });
        }
        found
    };
    let below = masses
        .iter()
        .rev()
        .find(|m| **m < mass && !is_same(**m, mass));
    let above = masses.iter().find(|m| **m > mass && !is_same(**m, mass));
    let others: Vec<Line> = below
        .into_iter()
        .chain(above)
        .flat_map(|m| lines(*m))
        .collect();
    if others.is_empty() {
        return candidates;
    }
    let own = lines(mass);
    let far = |lines: &[Line], c: &Candidate| {
        let off = lines.iter().map(|line| between(line.p0, line.p1, c.rect));
        off.fold(f64::INFINITY, f64::min)
    };
    candidates
        .into_iter()
        .filter(|c| far(&own, c) < far(&others, c))
        .collect()
}

/// How closely shells are taken as chords to compare distances, mm.
const SHELL_FLATNESS: f64 = 0.2;

/// Whether two masses have one shell.
fn is_same(a: f64, b: f64) -> bool {
    (a - b).abs() <= SAME_MASS * a
}

/// Spots along a shell inside the field, those nearest to some momentum first.
fn along_shell(canvas: &Canvas<'_>, mass: f64, px: f64) -> Vec<Spot> {
    let window = canvas.window;
    let plane = window.plane;
    let step = canvas.style.name_step / window.scale();
    let count = super::whole::count(plane.width() / step).min(MOST_SPOTS);
    let mut found = Vec::new();
    for i in 0..=count {
        let p = plane.width().mul_add(i as f64 / count as f64, plane.x0);
        let energy = hypot(mass, p);
        let here = Point::new(p, energy);
        if clip::holds(plane, here) {
            let along = Vec2::new(1.0, -p / energy);
            let order = (p - px).abs() * window.scale() / canvas.style.em * SHELL_ORDER;
            found.push(Spot {
                foot: window.mm(here),
                along,
                order,
            });
        }
    }
    found
}

/// Most spots along a shell.
const MOST_SPOTS: usize = 96;
/// What a spot costs for each em it is away, ems.
const SHELL_ORDER: f64 = 0.15;

/// `m_p`: the particle's label without what stands high, as a subscript.
fn shell_label(solved: &Solved, vector: &Vector) -> String {
    let name = &vector.object.name;
    let label = solved.particles.get(name).and_then(|p| p.label.clone());
    let simple = label.map(|l| without_scripts(&l)).filter(|l| !l.is_empty());
    let index = simple.unwrap_or_else(|| crate::label::plain(name).source);
    if vector.has_across {
        format!(r"m_{{\mathrm{{T}},{index}}}")
    } else {
        format!("m_{{{index}}}")
    }
}

/// LaTeX math up to its first script: scripts of scripts would be too small to read.
fn without_scripts(latex: &str) -> String {
    let mut depth = 0_i32;
    for (i, c) in latex.char_indices() {
        match c {
            '{' => depth += 1,
            '}' => depth -= 1,
            '^' | '_' | '\'' if depth == 0 => return latex[..i].to_owned(),
            '^' | '_' => return String::new(),
            _ => {}
        }
    }
    latex.to_owned()
}
