//! What solving gives.

use std::sync::Arc;

use indexmap::IndexMap;

use crate::dynamics::{Momentum, Total};
use crate::fault::{Fault, ObjectId};
use crate::geometry::{Boost, Displacement, Worldline};
use crate::quantity::{Number, Unit};
use crate::scene::Closure;

/// The units of what is shown, and their ratio.
#[derive(Clone, Debug, PartialEq)]
pub struct SolvedUnits {
    /// Of time.
    pub time: Unit,
    /// Of length along x.
    pub length: Unit,
    /// Of energy; masses and momenta are in the same over c^2 and c.
    pub energy: Unit,
    /// How many length units light goes in a time unit.
    pub light_way: f64,
}

/// What was typed of a particle in the base frame, to be shown there as it was; `None` for what was not typed.
#[derive(Clone, Copy, Debug, PartialEq, Default)]
pub struct Stated {
    /// Kinetic energy, energy units.
    pub kinetic: Option<f64>,
    /// Total energy, energy units.
    pub energy: Option<f64>,
    /// px, energy units.
    pub px: Option<f64>,
    /// py, energy units.
    pub py: Option<f64>,
    /// Direction, degrees in (-180, 180].
    pub angle: Option<f64>,
    /// Speed.
    pub beta: Option<f64>,
    /// px / E.
    pub beta_x: Option<f64>,
    /// 1 - beta.
    pub one_minus_beta: Option<f64>,
    /// gamma.
    pub gamma: Option<f64>,
}

/// An event, in the base frame.
#[derive(Clone, Debug, PartialEq)]
pub struct SolvedEvent {
    /// From the base frame's origin, in time units.
    pub at: Displacement,
    /// How far u, v and y may be off for rounding, in time units. An event given in a fast frame keeps the digits of
    /// each null component, however large the other one is.
    pub rounding: Displacement,
    /// t and x (in time units) before any rounding, for an event typed in the base frame.
    pub exact: Option<(Number, Number)>,
    /// t in time units and x in length units as typed, for an event typed in the base frame.
    pub stated: Option<(f64, f64)>,
    /// Its label, LaTeX math; its name in upright text if `None`.
    pub label: Option<String>,
}

/// A worldline, in the base frame.
#[derive(Clone, Debug, PartialEq)]
pub struct SolvedLine {
    /// Untrimmed.
    pub world: Worldline,
    /// The event at which it begins, if it is trimmed there.
    pub from: Option<(Arc<str>, Displacement)>,
    /// The event at which it ends, if it is trimmed there.
    pub until: Option<(Arc<str>, Displacement)>,
    /// The particle it follows.
    pub follows: Option<Arc<str>>,
    /// dx/dt as typed in the base frame.
    pub stated_beta: Option<f64>,
    /// Its label.
    pub label: Option<String>,
}

/// A particle, in the base frame.
#[derive(Clone, Debug, PartialEq)]
pub struct SolvedParticle {
    /// Its vector, energy units.
    pub momentum: Momentum,
    /// Its species.
    pub species: Option<String>,
    /// Standard deviation of its mass where one is known, energy units.
    pub mass_uncertainty: Option<f64>,
    /// What was typed of it in the base frame.
    pub stated: Stated,
    /// Largest error of its energy and momentum that half a last typed digit makes, energy units.
    pub typed_error: f64,
    /// Its label: the scene's, else the species' one.
    pub label: Option<String>,
}

/// A collision, in the base frame.
#[derive(Clone, Debug, PartialEq)]
pub struct SolvedCollision {
    /// Names of what goes in.
    pub before: Vec<Arc<str>>,
    /// Names of what comes out.
    pub after: Vec<Arc<str>>,
    /// Its closure.
    pub closure: Closure,
    /// The event it happens at.
    pub at: Option<Arc<str>>,
    /// Sum before.
    pub total_before: Total,
    /// Sum after.
    pub total_after: Total,
    /// How far E, px and py may differ in the base frame, energy units, and still balance: rounding, and half a last
    /// typed digit of each number where no closure has found a particle.
    pub tolerance: f64,
    /// Its label.
    pub label: Option<String>,
}

/// A named frame.
#[derive(Clone, Debug, PartialEq)]
pub struct SolvedFrame {
    /// From the base frame to it.
    pub boost: Boost,
    /// The event that is (0, 0) in it, from the base frame's origin.
    pub origin: Displacement,
    /// How far that may be off for rounding.
    pub origin_rounding: Displacement,
    /// The same before any rounding, for an event typed in the base frame.
    pub origin_exact: Option<(Number, Number)>,
    /// The event's name, where it has one of its own.
    pub origin_name: Option<Arc<str>>,
    /// Its label.
    pub label: Option<String>,
}

/// The frame things are looked at from.
#[derive(Clone, Debug, PartialEq)]
pub struct Viewing {
    /// Its name: of a frame or of the base; none for a bare rapidity.
    pub name: Option<Arc<str>>,
    /// From the base frame to it.
    pub boost: Boost,
    /// Its origin.
    pub origin: Displacement,
    /// The same before any rounding, where that is known.
    pub origin_exact: Option<(Number, Number)>,
}

/// A solved scene: whatever could be computed, and the faults of the rest.
#[derive(Clone, Debug)]
pub struct Solved {
    /// The scene's title.
    pub title: String,
    /// The base frame's name.
    pub base: Arc<str>,
    /// Units.
    pub units: SolvedUnits,
    /// Events that are sound, in the author's order.
    pub events: IndexMap<Arc<str>, SolvedEvent>,
    /// Lines that are sound.
    pub lines: IndexMap<Arc<str>, SolvedLine>,
    /// Particles that are sound.
    pub particles: IndexMap<Arc<str>, SolvedParticle>,
    /// Collisions that are sound.
    pub collisions: IndexMap<Arc<str>, SolvedCollision>,
    /// Frames that are sound.
    pub frames: IndexMap<Arc<str>, SolvedFrame>,
    /// Root faults and findings, unplaced.
    pub faults: Vec<Fault>,
    /// Every object that is left out: those at fault and those that hang on them.
    pub left_out: Vec<ObjectId>,
}

/// Something that stands at a rapidity.
#[derive(Clone, Debug, PartialEq)]
pub struct RapidityTick {
    /// What it is; the base frame is `frame` of its own name.
    pub object: ObjectId,
    /// Its longitudinal rapidity.
    pub rapidity: f64,
    /// Its speed across in its own longitudinal rest frame (0 for motion along x only).
    pub across: f64,
    /// True for the base frame.
    pub is_base: bool,
}
