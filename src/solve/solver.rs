//! The walk over a scene's objects in order, each solved from those before it.

use std::sync::Arc;

use indexmap::IndexMap;

use super::graph::{self, Node, Order};
use super::units::ReadUnits;
use super::{
    RapidityTick, Solved, SolvedCollision, SolvedEvent, SolvedFrame, SolvedLine, SolvedParticle,
    checks, collisions, events, frames, lines, particles,
};
use crate::fault::{Fault, Kind, ObjectId};
use crate::geometry::Displacement;
use crate::quantity::{Number, Quantity, Typed, Unit, read};
use crate::scene::Scene;

/// Largest relative rapidity of any two things in one scene.
const WIDEST: f64 = 600.0;

/// Solves a scene. `unread` names objects that stand in the file and could not be read: what refers to them is left
/// out without a fault of its own.
pub fn solve(scene: &Scene, unread: &[ObjectId]) -> Solved {
    let (units, mut faults) = ReadUnits::of(scene);
    let closers = graph::closers(scene);
    let mut order = Order::of(scene, &closers, unread);
    faults.append(&mut order.faults);
    let mut solver = Solver {
        scene,
        units,
        closers,
        events: vec![None; scene.events.len()],
        lines: vec![None; scene.lines.len()],
        particles: vec![None; scene.particles.len()],
        collisions: vec![None; scene.collisions.len()],
        frames: vec![None; scene.frames.len()],
        faults,
        span: (0.0, 0.0),
    };
    let of_species = particles::species_faults(&solver);
    solver.faults.extend(of_species);
    let nodes = std::mem::take(&mut order.nodes);
    for node in nodes {
        if order.out.contains(&node) {
            continue;
        }
        if order.needs(node).any(|needed| order.out.contains(&needed)) || !solver.has_units(node) {
            order.out.insert(node);
            continue;
        }
        if let Err(fault) = solver.one(node) {
            solver.faults.extend(fault.map(|f| *f));
            order.out.insert(node);
        }
    }
    checks::trims(&mut solver);
    let out = order.out.iter().map(|&node| graph::id_of(scene, node));
    let left_out = out.chain(unread.iter().cloned()).collect();
    solver.finish(left_out)
}

/// Why an object is left out: a fault of its own, or nothing more to say.
pub(super) type Spoiled = Option<Box<Fault>>;

/// What is solved so far.
#[derive(Debug)]
pub(super) struct Solver<'a> {
    pub(super) scene: &'a Scene,
    pub(super) units: ReadUnits,
    pub(super) closers: Vec<graph::Closer>,
    pub(super) events: Vec<Option<SolvedEvent>>,
    pub(super) lines: Vec<Option<SolvedLine>>,
    pub(super) particles: Vec<Option<SolvedParticle>>,
    pub(super) collisions: Vec<Option<SolvedCollision>>,
    pub(super) frames: Vec<Option<SolvedFrame>>,
    pub(super) faults: Vec<Fault>,
    /// The lowest and highest rapidity so far; the base is at 0.
    span: (f64, f64),
}

impl Solver<'_> {
    fn has_units(&self, node: Node) -> bool {
        match node.kind {
            Kind::Event => self.units.spacetime_sound,
            Kind::Particle => self.units.energy_sound,
            Kind::Line
            | Kind::Collision
            | Kind::Frame
            | Kind::Scene
            | Kind::Species
            | Kind::Plate => true,
        }
    }

    fn one(&mut self, node: Node) -> Result<(), Spoiled> {
        let id = graph::id_of(self.scene, node);
        let i = node.index;
        match node.kind {
            Kind::Event => {
                let event = events::solve(self, &id)?;
                self.events[i] = Some(event);
            }
            Kind::Line => {
                let line = lines::solve(self, &id)?;
                self.widen(&id, lines::rapidities(&line).into_iter().map(|tick| tick.0))?;
                self.lines[i] = Some(line);
            }
            Kind::Particle => {
                // A closing particle's vector has been put here by its collision.
                if self.particles[i].is_none() {
                    let particle = particles::solve(self, &id)?;
                    self.widen(&id, particle.momentum.rapidity())?;
                    self.particles[i] = Some(particle);
                }
            }
            Kind::Collision => {
                let (collision, closed) = collisions::solve(self, &id, i)?;
                if let Some((particle, solved)) = closed {
                    self.widen(&id, solved.momentum.rapidity())?;
                    self.particles[particle] = Some(solved);
                }
                self.collisions[i] = Some(collision);
            }
            Kind::Frame => {
                let frame = frames::solve(self, &id)?;
                self.widen(&id, [frame.boost.rapidity().value()])?;
                self.frames[i] = Some(frame);
            }
            Kind::Scene | Kind::Species | Kind::Plate => {}
        }
        Ok(())
    }

    /// Takes rapidities into the scene's span, which must stay narrow enough for exact numbers.
    fn widen(
        &mut self,
        id: &ObjectId,
        rapidities: impl IntoIterator<Item = f64>,
    ) -> Result<(), Spoiled> {
        let mut span = self.span;
        for rapidity in rapidities {
            span = (span.0.min(rapidity), span.1.max(rapidity));
            if span.1 - span.0 > WIDEST {
                let what =
                    format!("its rapidity {rapidity} is more than {WIDEST} from another thing's");
                let mend = "keep all rapidities of a scene within 600 of one another";
                return Err(fault(id, "", what, mend));
            }
        }
        self.span = span;
        Ok(())
    }

    /// A typed number in a unit, or the fault of its field.
    pub(super) fn quantity(
        id: &ObjectId,
        field: &str,
        typed: &Typed,
        unit: &Unit,
    ) -> Result<Quantity, Spoiled> {
        read(typed, unit).map_err(|f| {
            Some(Box::new(
                Fault::new(id.clone(), field, f.what, f.mend).at(f.column),
            ))
        })
    }

    /// The event of a name, as solved. None where it is left out.
    pub(super) fn event(&self, name: &str) -> Result<&SolvedEvent, Spoiled> {
        self.scene
            .events
            .get_index_of(name)
            .and_then(|i| self.events[i].as_ref())
            .ok_or(None)
    }

    /// The line of a name.
    pub(super) fn line(&self, name: &str) -> Result<&SolvedLine, Spoiled> {
        self.scene
            .lines
            .get_index_of(name)
            .and_then(|i| self.lines[i].as_ref())
            .ok_or(None)
    }

    /// The particle of a name.
    pub(super) fn particle(&self, name: &str) -> Result<&SolvedParticle, Spoiled> {
        self.scene
            .particles
            .get_index_of(name)
            .and_then(|i| self.particles[i].as_ref())
            .ok_or(None)
    }

    /// The collision of a name.
    pub(super) fn collision(&self, name: &str) -> Result<&SolvedCollision, Spoiled> {
        self.scene
            .collisions
            .get_index_of(name)
            .and_then(|i| self.collisions[i].as_ref())
            .ok_or(None)
    }

    /// The frame of a name.
    pub(super) fn frame(&self, name: &str) -> Result<&SolvedFrame, Spoiled> {
        self.scene
            .frames
            .get_index_of(name)
            .and_then(|i| self.frames[i].as_ref())
            .ok_or(None)
    }

    fn finish(self, left_out: Vec<ObjectId>) -> Solved {
        let scene = self.scene;
        Solved {
            title: scene.title.clone(),
            base: scene.base.as_str().into(),
            units: self.units.solved,
            events: sound(&scene.events, self.events),
            lines: sound(&scene.lines, self.lines),
            particles: sound(&scene.particles, self.particles),
            collisions: sound(&scene.collisions, self.collisions),
            frames: sound(&scene.frames, self.frames),
            faults: self.faults,
            left_out,
        }
    }
}

fn sound<T, S>(list: &crate::scene::List<T>, solved: Vec<Option<S>>) -> IndexMap<Arc<str>, S> {
    list.keys()
        .zip(solved)
        .filter_map(|(name, s)| Some((name.clone(), s?)))
        .collect()
}

/// A fault of one field, as solving passes it on.
#[expect(
    clippy::unnecessary_wraps,
    reason = "it is always one of the two ways to be left out"
)]
pub(super) fn fault(
    id: &ObjectId,
    field: &str,
    what: impl Into<String>,
    mend: impl Into<String>,
) -> Spoiled {
    Some(Box::new(Fault::new(id.clone(), field, what, mend)))
}

/// What is between two pairs of coordinates (t and x): differences are formed before rounding.
pub(super) fn exact_difference(a: &(Number, Number), b: &(Number, Number)) -> Displacement {
    let (t, x) = (a.0.minus(&b.0), a.1.minus(&b.1));
    Displacement::new(t.minus(&x).to_f64(), t.plus(&x).to_f64(), 0.0)
}

/// From event `b` to event `a`, from the numbers before rounding where both have them.
pub(super) fn difference(a: &SolvedEvent, b: &SolvedEvent) -> Displacement {
    match (&a.exact, &b.exact) {
        (Some(a), Some(b)) => exact_difference(a, b),
        _ => a.at - b.at,
    }
}

/// Everything that has a rapidity, for the rail.
pub(super) fn ticks(solved: &Solved) -> Vec<RapidityTick> {
    let mut ticks = vec![RapidityTick {
        object: ObjectId::new(Kind::Frame, &solved.base),
        rapidity: 0.0,
        across: 0.0,
        is_base: true,
    }];
    let mut add = |kind, name: &Arc<str>, rapidity, across| {
        let object = ObjectId {
            kind,
            name: name.clone(),
        };
        ticks.push(RapidityTick {
            object,
            rapidity,
            across,
            is_base: false,
        });
    };
    for (name, line) in &solved.lines {
        for (rapidity, celerity) in lines::rapidities(line) {
            add(
                Kind::Line,
                name,
                rapidity,
                celerity / crate::num::hypot(1.0, celerity),
            );
        }
    }
    for (name, particle) in &solved.particles {
        let momentum = particle.momentum;
        if let (Some(rapidity), true) = (momentum.rapidity(), momentum.mass() > 0.0) {
            add(
                Kind::Particle,
                name,
                rapidity,
                momentum.py() / momentum.transverse_mass(),
            );
        }
    }
    for (name, frame) in &solved.frames {
        let (rapidity, across) = frames::along_and_across(frame.boost);
        add(Kind::Frame, name, rapidity, across);
    }
    ticks
}
