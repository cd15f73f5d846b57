//! The rows of the ledger, as `ledger --as json` writes them.

use serde::Serialize;

/// All the numbers of a scene in one frame. Units are those of `units`; angles in degrees.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Ledger {
    /// The frame.
    pub frame: FrameRow,
    /// Symbols of the units.
    pub units: UnitsRow,
    /// Events.
    pub events: Vec<EventRow>,
    /// Lines.
    pub lines: Vec<LineRow>,
    /// Particles.
    pub particles: Vec<ParticleRow>,
    /// Collisions.
    pub collisions: Vec<CollisionRow>,
    /// Intervals.
    pub intervals: Vec<IntervalRow>,
    /// Faults and findings.
    pub faults: Vec<FaultRow>,
}

/// The viewing frame relative to the base.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct FrameRow {
    /// Its name; null for a bare rapidity.
    pub name: Option<String>,
    /// Rapidity, signed along x.
    pub rapidity: f64,
    /// Direction, degrees; 0 along x.
    pub direction: f64,
    /// Speed, signed along x.
    pub beta: f64,
    /// gamma.
    pub gamma: f64,
}

/// Symbols of the units.
#[derive(Clone, Debug, PartialEq, Eq, Serialize)]
pub struct UnitsRow {
    /// Of t, u, v, proper time; squared intervals are in its square.
    pub time: String,
    /// Of x and y.
    pub length: String,
    /// Of energy, mass, momentum.
    pub energy: String,
}

/// An event.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct EventRow {
    /// Name.
    pub name: String,
    /// Time.
    pub t: f64,
    /// Place along.
    pub x: f64,
    /// Place across.
    pub y: f64,
    /// t - x, in time.
    pub u: f64,
    /// t + x, in time.
    pub v: f64,
}

/// A line.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct LineRow {
    /// Name.
    pub name: String,
    /// dx/dt, signed; null where it bends.
    pub beta: Option<f64>,
    /// Longitudinal rapidity; null where it bends and for light.
    pub rapidity: Option<f64>,
    /// Between its ends; null without both.
    pub proper_time: Option<f64>,
}

/// A particle.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct ParticleRow {
    /// Name.
    pub name: String,
    /// Standard deviation of the mass where one is known; it limits the digits that are shown.
    #[serde(skip)]
    pub mass_uncertainty: Option<f64>,
    /// Mass.
    pub mass: f64,
    /// E.
    pub energy: f64,
    /// px, py.
    pub momentum: [f64; 2],
    /// E - px.
    pub p_minus: f64,
    /// E + px.
    pub p_plus: f64,
    /// E - m.
    pub kinetic: f64,
    /// Speed.
    pub beta: f64,
    /// px / E.
    pub beta_x: f64,
    /// 1 - beta.
    pub one_minus_beta: f64,
    /// gamma; null for light.
    pub gamma: Option<f64>,
    /// Longitudinal rapidity.
    pub rapidity: Option<f64>,
    /// Pseudorapidity.
    pub pseudorapidity: Option<f64>,
    /// Transverse mass.
    pub transverse_mass: f64,
    /// Direction, degrees; null at rest.
    pub angle: Option<f64>,
}

/// A sum of vectors.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct SumRow {
    /// E.
    pub energy: f64,
    /// px, py.
    pub momentum: [f64; 2],
    /// Sum of the masses.
    pub mass_sum: f64,
    /// Mass of the sum.
    pub invariant_mass: f64,
}

/// After minus before.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct DifferenceRow {
    /// E.
    pub energy: f64,
    /// px, py.
    pub momentum: [f64; 2],
}

/// A collision.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct CollisionRow {
    /// Name.
    pub name: String,
    /// Sum before.
    pub before: SumRow,
    /// Sum after.
    pub after: SumRow,
    /// After minus before.
    pub difference: DifferenceRow,
    /// Within the tolerance.
    pub balanced: bool,
    /// How far the components may differ in the base frame; there it is decided whether they balance.
    pub tolerance: f64,
    /// Invariant mass before.
    pub root_s: f64,
    /// Sum of masses before minus after.
    pub q_value: f64,
    /// Names of what goes in.
    pub going_in: Vec<String>,
    /// Names of what comes out.
    pub coming_out: Vec<String>,
}

/// The interval between two events.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct IntervalRow {
    /// The first event.
    pub from: String,
    /// The second event.
    pub to: String,
    /// `timelike`, `lightlike`, `spacelike`.
    pub kind: &'static str,
    /// t^2 - x^2 - y^2, in the time unit's square.
    pub squared: f64,
    /// Proper time (time unit) if timelike, else proper distance (length unit).
    pub length: f64,
}

/// A fault or finding.
#[derive(Clone, Debug, PartialEq, Eq, Serialize)]
pub struct FaultRow {
    /// `event turn`.
    pub object: String,
    /// Line in the file.
    pub line: Option<usize>,
    /// Column.
    pub column: Option<usize>,
    /// What is wrong.
    pub what: String,
    /// What would mend it.
    pub mend: String,
}
