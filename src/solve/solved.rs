//! What solving gives.

use std::sync::Arc;

use indexmap::IndexMap;

use crate::dynamics::{Momentum, Total};
use crate::fault::{Fault, ObjectId};
use crate::geometry::{Boost, Displacement, Worldline};
use crate::quantity::{Number, Unit};
use crate::scene::{Closure, When};

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

/// A number as it was typed in the base frame, to be shown there as it was.
pub type Stated = Option<f64>;

/// An event, in the base frame.
#[derive(Clone, Debug, PartialEq)]
pub struct SolvedEvent {
    /// From the base frame's origin, in time units.
    pub at: Displacement,
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
    /// Its kinetic energy as typed in the base frame.
    pub stated_kinetic: Stated,
    /// Its total energy as typed in the base frame.
    pub stated_energy: Stated,
    /// px and py as typed in the base frame.
    pub stated_components: (Stated, Stated),
    /// Its direction as typed in the base frame, degrees.
    pub stated_angle: Stated,
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
    /// How far E, px and py may differ, energy units, and still balance: rounding, and half a last typed digit.
    pub tolerance: f64,
    /// Its label.
    pub label: Option<String>,
}

impl SolvedCollision {
    /// Whether E, px and py agree within the tolerance.
    pub fn balanced(&self) -> bool {
        todo!()
    }
}

/// A named frame.
#[derive(Clone, Debug, PartialEq)]
pub struct SolvedFrame {
    /// From the base frame to it.
    pub boost: Boost,
    /// The event that is (0, 0) in it, from the base frame's origin.
    pub origin: Displacement,
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

impl Solved {
    /// The base frame.
    pub fn base_view(&self) -> Viewing {
        todo!()
    }

    /// The frame that a panel or a command asks for; `None` if it names none that is sound.
    pub fn viewing(&self, when: &When) -> Option<Viewing> {
        todo!()
    }

    /// A frame moving along x at a rapidity relative to the base, with the base's origin.
    pub fn viewing_at(&self, rapidity: crate::geometry::Rapidity) -> Viewing {
        todo!()
    }

    /// An event as a frame has it, from that frame's origin, in time units. Exact numbers are subtracted before rounding.
    pub fn seen(&self, event: &SolvedEvent, from: &Viewing) -> Option<Displacement> {
        todo!()
    }

    /// Everything that has a rapidity along x relative to the base: lines, massive particles, named frames and the
    /// base itself, in the scene's order.
    pub fn rapidities(&self) -> Vec<RapidityTick> {
        todo!()
    }
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
