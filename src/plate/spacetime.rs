//! The spacetime panel: t (or ct) up, x right, light at 45 degrees, seen from a frame that moves along x.

use std::sync::Arc;

use kurbo::{Point, Rect, Vec2};

use super::axes::{Axes, Axis, wish};
use super::beside::{Side, beside, spots};
use super::canvas::{Canvas, Layer, Rank, Seek, Wish};
use super::clip;
use super::fit::Wanted;
use super::job::{Job, Observer, along_x, drawable, letter};
use super::outline;
use super::style::{INK, OCHRE, TINT};
use super::tilted::{Cut, Tilted, arcs};
use super::track::Track;
use super::words::kind;
use crate::fault::{Fault, Kind, ObjectId};
use crate::quantity::significant;
use crate::scene::{Panel, TimeAxis};
use crate::solve::{SolvedUnits, Viewing};

/// A spacetime panel's contents, in its plane (time units both ways).
#[derive(Clone, Debug)]
pub(super) struct Spacetime {
    events: Vec<(ObjectId, Point)>,
    tracks: Vec<Track>,
    cones: Vec<(ObjectId, Point)>,
    frames: Vec<Tilted>,
    cuts: Vec<Cut>,
    has_arcs: bool,
    axes: Axes,
    is_projection: bool,
    /// What the panel wants to show.
    pub(super) wanted: Wanted,
}

/// The origin belongs to the contents unless it is farther from them than so many times their size.
const ORIGIN_NEAR: f64 = 3.0;
/// Digits of the time of a line of simultaneity.
const TIME_DIGITS: usize = 4;

impl Spacetime {
    /// Gathers what a panel shows. `None` (with a fault) where its frame moves across x.
    pub(super) fn of(
        job: &mut Job<'_>,
        index: usize,
        panel: &Panel,
        from: &Viewing,
    ) -> Option<Self> {
        let field = format!("panels.{index}");
        if along_x(from.boost).is_none() {
            job.fault(
                &format!("{field}.frame"),
                "a spacetime panel takes a boost along x, and this frame also moves across it",
                "choose a frame that moves along x alone, or an energy-momentum panel",
            );
            return None;
        }
        let events = events(job, index, panel, from);
        let tracks = tracks(job, index, panel, from);
        let cones = named_points(job, &panel.cones, &format!("{field}.cones"), from);
        let axes = axes(job, panel, from);
        let time_factor = axes.y.factor;
        let frames = frames(job, index, panel, from);
        let cuts = cuts(job, index, panel, (from, time_factor));
        let across = events.iter().any(|(id, _)| {
            job.solved
                .events
                .get(&id.name)
                .is_some_and(|event| event.at.y != 0.0)
        });
        let is_projection = across || tracks.iter().any(|track| track.has_across);
        if is_projection {
            job.projection(
                &field,
                format!(
                    "panel {} shows t and x alone: what moves across is drawn in projection",
                    letter(index)
                ),
            );
        }
        let units = job.solved.units.clone();
        let range = &panel.range;
        let t = job.range(range.t.as_ref(), &units.time, &format!("{field}.range.t"));
        let x = job.range(range.x.as_ref(), &units.length, &format!("{field}.range.x"));
        let x = x.map(|(a, b)| (a / units.light_way, b / units.light_way));
        let points: Vec<Point> = events
            .iter()
            .map(|event| event.1)
            .chain(cones.iter().map(|cone| cone.1))
            .chain(cuts.iter().map(|cut| cut.at))
            .chain(frames.iter().map(|frame| frame.origin))
            .chain(
                tracks
                    .iter()
                    .filter(|t| t.is_marked)
                    .flat_map(|t| t.points.iter().copied()),
            )
            .collect();
        let loose = tracks
            .iter()
            .flat_map(|t| t.points.iter().copied())
            .collect::<Vec<_>>();
        let contents = contents(if points.is_empty() { &loose } else { &points });
        let has_arcs = panel.hyperbolas == Some(true);
        let wanted = Wanted { x, y: t, contents };
        Some(Self {
            events,
            tracks,
            cones,
            frames,
            cuts,
            has_arcs,
            axes,
            is_projection,
            wanted,
        })
    }

    /// Its own axes.
    pub(super) fn axes(&self) -> &Axes {
        &self.axes
    }

    /// What it shows, in words.
    pub(super) fn words(&self) -> Vec<String> {
        let events: Vec<&str> = self.events.iter().map(|(id, _)| &*id.name).collect();
        let lines: Vec<&str> = self
            .tracks
            .iter()
            .map(|track| &*track.object.name)
            .collect();
        let cones: Vec<&str> = self.cones.iter().map(|(id, _)| &*id.name).collect();
        let frames: Vec<&str> = self
            .frames
            .iter()
            .map(|frame| &*frame.object.name)
            .collect();
        [
            kind("event", &events),
            kind("worldline", &lines),
            (!cones.is_empty()).then(|| format!("the light cone of {}", cones.join(", "))),
            (!frames.is_empty()).then(|| format!("the axes of {}", frames.join(", "))),
        ]
        .into_iter()
        .flatten()
        .collect()
    }

    /// Draws it.
    pub(super) fn draw(&self, job: &mut Job<'_>, canvas: &mut Canvas<'_>, index: usize) {
        let axes = Axes {
            has_arcs: self.has_arcs && !self.frames.is_empty(),
            ..self.axes.clone()
        };
        let ticks = axes.ticks(canvas);
        let factors = [axes.y.factor, axes.x.factor];
        for (id, at) in &self.cones {
            cone(job, canvas, id, *at);
        }
        if self.has_arcs {
            arcs(canvas, &self.frames, &ticks, factors);
        }
        let group = canvas.group("axes");
        axes.draw(canvas, &mut job.names, &ticks, group);
        for frame in &self.frames {
            frame.draw(job, canvas, &ticks, factors, self.has_arcs);
        }
        for cut in &self.cuts {
            cut.draw(job, canvas);
        }
        let signals: Vec<&Track> = self
            .tracks
            .iter()
            .filter(|track| !track.draw(job, canvas))
            .collect();
        self.draw_events(job, canvas, index);
        for signal in signals {
            signal.draw_signal(job, canvas, &self.tracks);
        }
        if self.is_projection {
            job.remark(canvas, "projection: motion across x is not shown");
        }
    }

    fn draw_events(&self, job: &mut Job<'_>, canvas: &mut Canvas<'_>, index: usize) {
        let window = canvas.window;
        for (id, at) in &self.events {
            if !clip::holds(window.plane, *at) {
                job.names.fault(
                    Fault::new(
                        id.clone(),
                        "",
                        format!(
                            "it lies outside the range of panel {} of {}",
                            letter(index),
                            job.plate
                        ),
                        "widen the range, or take the event off the panel's list",
                    )
                    .finding(),
                );
                continue;
            }
            let p = window.mm(*at);
            let group = canvas.group(&id.to_string());
            canvas.fill(
                Layer::Event,
                group,
                outline::disc(p, canvas.style.event),
                INK,
            );
            let label = job
                .solved
                .events
                .get(&id.name)
                .and_then(|event| event.label.as_deref());
            let label = job.names.of(id, label);
            let (seek, blame) = (Seek::Around(p), Some(id.clone()));
            canvas.wish(Wish {
                rank: Rank::Event,
                group,
                blame,
                label,
                ink: INK,
                seek,
            });
        }
    }
}

fn events(
    job: &mut Job<'_>,
    index: usize,
    panel: &Panel,
    from: &Viewing,
) -> Vec<(ObjectId, Point)> {
    let known = &job.solved.events;
    let field = format!("panels.{index}.events");
    let names = job.chosen(panel.events.as_deref(), Kind::Event, &field, known);
    points(job, names, from)
}

fn points(job: &mut Job<'_>, names: Vec<Arc<str>>, from: &Viewing) -> Vec<(ObjectId, Point)> {
    let mut found = Vec::new();
    for name in names {
        let id = ObjectId {
            kind: Kind::Event,
            name,
        };
        let Some(event) = job.solved.events.get(&id.name) else {
            continue;
        };
        match job.solved.seen(event, from).and_then(drawable) {
            Some(p) => found.push((id, p)),
            None => job.names.fault(
                Fault::new(
                    id,
                    "",
                    "it is too far off to be drawn from this frame",
                    "choose a slower frame",
                )
                .finding(),
            ),
        }
    }
    found
}

fn named_points(
    job: &mut Job<'_>,
    names: &[String],
    field: &str,
    from: &Viewing,
) -> Vec<(ObjectId, Point)> {
    let known = &job.solved.events;
    let names = job.chosen(Some(names), Kind::Event, field, known);
    points(job, names, from)
}

fn tracks(job: &mut Job<'_>, index: usize, panel: &Panel, from: &Viewing) -> Vec<Track> {
    let known = &job.solved.lines;
    let names = job.chosen(
        panel.lines.as_deref(),
        Kind::Line,
        &format!("panels.{index}.lines"),
        known,
    );
    let mut found = Vec::new();
    for name in names {
        let Some(line) = job.solved.lines.get(&name) else {
            continue;
        };
        if let Some(track) = Track::of(&name, line, from) {
            found.push(track);
        }
    }
    found
}

/// The units of the viewing frame's axes: light's way of time in the length unit, or time in its own.
fn axes(job: &mut Job<'_>, panel: &Panel, from: &Viewing) -> Axes {
    let units = &job.solved.units;
    let length = units.length.latex();
    let x = Axis {
        symbol: "x".into(),
        unit: length.clone(),
        factor: units.light_way,
    };
    let y = match time_axis(panel, units) {
        TimeAxis::LightWay => Axis {
            symbol: "ct".into(),
            unit: length,
            factor: units.light_way,
        },
        TimeAxis::Time => Axis {
            symbol: "t".into(),
            unit: units.time.latex(),
            factor: 1.0,
        },
    };
    let primes = primes_of(job, from);
    let with = |axis: Axis| Axis {
        symbol: primed(&axis.symbol, primes),
        ..axis
    };
    Axes {
        x: with(x),
        y: with(y),
        has_arcs: false,
        has_halves: panel.axes.is_empty() && panel.hyperbolas != Some(true),
    }
}

/// How many primes the symbols of a viewing frame have.
pub(super) fn primes_of(job: &mut Job<'_>, from: &Viewing) -> usize {
    let name = from.name.as_deref().unwrap_or_default().to_owned();
    let base = job.solved.base_view();
    let is_base = from.boost == base.boost && from.origin == base.origin;
    job.inks.primes(&name, from.boost.rapidity(), is_base)
}

/// A symbol with primes.
pub(super) fn primed(symbol: &str, primes: usize) -> String {
    format!("{symbol}{}", "'".repeat(primes))
}

fn frames(job: &mut Job<'_>, index: usize, panel: &Panel, from: &Viewing) -> Vec<Tilted> {
    let mut found = Vec::new();
    for (i, name) in panel.axes.iter().enumerate() {
        let field = format!("panels.{index}.axes.{i}");
        let Some(observer) = job.observer(name, &field) else {
            continue;
        };
        let Some((rapidity, ink, primes)) = relative(job, &observer, from, &field) else {
            continue;
        };
        let Some(origin) = super::job::seen(observer.view.origin, from) else {
            continue;
        };
        if rapidity == 0.0 && origin == Point::ORIGIN {
            continue;
        }
        let time = match time_axis(panel, &job.solved.units) {
            TimeAxis::LightWay => "ct",
            TimeAxis::Time => "t",
        };
        let symbols = [primed(time, primes), primed("x", primes)];
        found.push(Tilted {
            object: observer.object,
            origin,
            rapidity,
            ink,
            symbols,
        });
    }
    found
}

/// What a panel's upright axis counts: as it says, else time where lengths are light's way of the time unit.
fn time_axis(panel: &Panel, units: &SolvedUnits) -> TimeAxis {
    let is_way = units
        .time
        .light_way()
        .is_some_and(|way| way.symbol == units.length.symbol);
    let usual = if is_way {
        TimeAxis::Time
    } else {
        TimeAxis::LightWay
    };
    panel.time_axis.unwrap_or(usual)
}

/// An observer's rapidity relative to a viewing frame, its ink and primes; a fault where it moves across.
fn relative(
    job: &mut Job<'_>,
    observer: &Observer,
    from: &Viewing,
    field: &str,
) -> Option<(f64, crate::marks::Ink, usize)> {
    let Some(rapidity) = along_x(observer.view.boost) else {
        job.fault(
            field,
            format!(
                "{} also moves across x, so its axes do not lie in the plane",
                observer.object
            ),
            "name a frame that moves along x alone",
        );
        return None;
    };
    let ink = job.inks.frame(rapidity);
    let primes = job
        .inks
        .primes(&observer.object.name, rapidity, observer.is_base);
    Some((
        rapidity.value() - from.boost.rapidity().value(),
        ink,
        primes,
    ))
}

fn cuts(
    job: &mut Job<'_>,
    index: usize,
    panel: &Panel,
    (from, factor): (&Viewing, f64),
) -> Vec<Cut> {
    let solved = job.solved;
    let mut found = Vec::new();
    for (i, (event, frame)) in panel.simultaneity.iter().enumerate() {
        let field = format!("panels.{index}.simultaneity.{i}");
        let points = named_points(
            job,
            std::slice::from_ref(event),
            &format!("{field}.0"),
            from,
        );
        let Some((event, at)) = points.into_iter().next() else {
            continue;
        };
        let Some(observer) = job.observer(frame, &format!("{field}.1")) else {
            continue;
        };
        let Some((rapidity, ink, primes)) = relative(job, &observer, from, &field) else {
            continue;
        };
        let seen = solved
            .events
            .get(&event.name)
            .and_then(|e| solved.seen(e, &observer.view));
        let Some(seen) = seen else { continue };
        let (symbol, unit) = match time_axis(panel, &solved.units) {
            TimeAxis::LightWay => ("ct", solved.units.length.latex()),
            TimeAxis::Time => ("t", solved.units.time.latex()),
        };
        let time = super::names::number(&significant(seen.t() * factor, TIME_DIGITS));
        let label = format!(r"{}\,{{=}}\,{time}\,{unit}", primed(symbol, primes));
        found.push(Cut {
            event,
            observer: observer.object,
            at,
            rapidity,
            ink,
            label,
        });
    }
    found
}

/// The box around some points and, where it is near, the origin.
fn contents(points: &[Point]) -> Rect {
    let Some(&first) = points.first() else {
        return Rect::ZERO;
    };
    let all = points
        .iter()
        .fold(Rect::from_points(first, first), |r, &p| r.union_pt(p));
    let with = all.union_pt(Point::ORIGIN);
    let size = all.width().max(all.height());
    let far = with.width().max(with.height());
    if size == 0.0 || far <= (1.0 + ORIGIN_NEAR) * size {
        with
    } else {
        all
    }
}

/// A light cone: both insides tinted, edges in the ink of light.
fn cone(job: &mut Job<'_>, canvas: &mut Canvas<'_>, event: &ObjectId, apex: Point) {
    let window = canvas.window;
    let group = canvas.group(&format!("light cone of {}", event.name));
    let plane = window.plane;
    let reach = 2.0
        * [
            plane.x0 - apex.x,
            plane.x1 - apex.x,
            plane.y0 - apex.y,
            plane.y1 - apex.y,
        ]
        .into_iter()
        .fold(0.0, |m: f64, v| m.max(v.abs()));
    for up in [reach, -reach] {
        let triangle = [
            apex,
            apex + Vec2::new(-reach, up),
            apex + Vec2::new(reach, up),
        ];
        let inside: Vec<Point> = clip::polygon(&triangle, plane)
            .into_iter()
            .map(|p| window.mm(p))
            .collect();
        canvas.fill(Layer::Tint, group, outline::closed(&inside), TINT);
    }
    let pen = (OCHRE, canvas.style.stroke.fine);
    let label = job.names.word("light");
    let mut candidates = Vec::new();
    for (way, order) in [(Vec2::new(1.0, 1.0), 0.0), (Vec2::new(-1.0, 1.0), 1.0)] {
        let Some((a, b)) = clip::line(apex, way, plane) else {
            continue;
        };
        canvas.line(Layer::Light, group, (window.mm(a), window.mm(b)), pen);
        let Some((a, b)) = clip::ray(apex, way, plane) else {
            continue;
        };
        let places = spots(
            (window.mm(a), window.mm(b)),
            &[0.55, 0.62, 0.7, 0.48, 0.78, 0.85, 0.4, 0.32, 0.92],
        );
        candidates.extend(
            beside(canvas, &label, &places, Side::Below, 0.0)
                .into_iter()
                .map(|mut c| {
                    c.cost += order * canvas.style.em;
                    c
                }),
        );
    }
    if !canvas.has_light_word {
        canvas.has_light_word = true;
        wish(canvas, Rank::Word, (group, None), (label, INK), candidates);
    }
}
