//! The scene as the author wrote it: names, references by name, numbers as typed. Nothing derived is kept here.

use std::sync::Arc;

use indexmap::IndexMap;

use crate::quantity::Typed;

/// Objects of one kind by name, in the author's order.
pub type List<T> = IndexMap<Arc<str>, Arc<Object<T>>>;

/// A scene. Units are names of units; a list holds each kind of object.
#[derive(Clone, Debug, PartialEq, Default)]
pub struct Scene {
    /// The version of the format, 1.
    pub format: u32,
    /// Its title.
    pub title: String,
    /// The name of the base frame.
    pub base: String,
    /// Units of bare numbers and of what is shown.
    pub units: Units,
    /// Species of the scene's own.
    pub species: List<SpeciesEntry>,
    /// Events.
    pub events: List<Event>,
    /// Worldlines.
    pub lines: List<Line>,
    /// Particles.
    pub particles: List<Particle>,
    /// Collisions.
    pub collisions: List<Collision>,
    /// Named frames.
    pub frames: List<Frame>,
    /// Plates.
    pub plates: List<Plate>,
}

/// An object: its form and what any object may carry.
#[derive(Clone, Debug, PartialEq, Default)]
pub struct Object<T> {
    /// What it is.
    pub form: T,
    /// What any object may carry.
    pub common: Common,
}

/// What any object may carry.
#[derive(Clone, Debug, PartialEq, Eq, Default)]
pub struct Common {
    /// LaTeX math to print for it; its name in upright text otherwise.
    pub label: Option<String>,
    /// A remark of the author's.
    pub note: Option<String>,
}

/// Symbols of the scene's units; `None` is the default (s, light's way in the time unit, GeV).
#[derive(Clone, Debug, PartialEq, Eq, Default)]
pub struct Units {
    /// Of time.
    pub time: Option<String>,
    /// Of length.
    pub length: Option<String>,
    /// Of energy, mass and momentum.
    pub energy: Option<String>,
}

/// In which frame a thing is as typed.
#[derive(Clone, Debug, PartialEq, Eq, Default)]
pub enum When {
    /// The base frame.
    #[default]
    Base,
    /// A frame by name (`frame: "courier"`), or the base by its name.
    Frame(String),
    /// A frame moving along x at a rapidity (`rapidity: 0.4`).
    Rapidity(Typed),
}

/// Which way along x.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Toward {
    /// Toward +x.
    Plus,
    /// Toward -x.
    Minus,
}

/// A velocity in one of its forms.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum Velocity {
    /// v/c.
    Beta(Typed),
    /// gamma; unsigned.
    Gamma(Typed),
    /// gamma beta.
    Celerity(Typed),
    /// Rapidity.
    Rapidity(Typed),
    /// k = e^rapidity.
    Doppler(Typed),
    /// 1 - beta; unsigned.
    BehindLight(Typed),
}

/// A species of the scene's own.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct SpeciesEntry {
    /// Its mass.
    pub mass: Typed,
    /// Its charge in units of e.
    pub charge: i32,
    /// Its mean life.
    pub mean_life: Option<Typed>,
}

/// An event.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum Event {
    /// By coordinates.
    At {
        /// Time.
        t: Typed,
        /// Place.
        x: Typed,
        /// In which frame.
        when: When,
    },
    /// On a line, at a clock reading.
    Along {
        /// The line.
        line: String,
        /// The reading of its clock.
        clock: Typed,
    },
    /// Where two lines meet.
    Meeting {
        /// The two lines.
        of: [String; 2],
    },
    /// Where light from an event meets a line.
    LightFrom {
        /// The event it leaves from.
        event: String,
        /// The line it meets.
        meets: String,
    },
}

/// A worldline.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum Line {
    /// Uniform motion through an event.
    Free {
        /// An event on it.
        through: String,
        /// How it moves.
        velocity: Velocity,
        /// The sign, for forms that carry none.
        toward: Option<Toward>,
        /// In which frame the velocity is so.
        when: When,
        /// An event and its clock's reading there; `through` and 0 otherwise.
        clock: Option<(String, Typed)>,
        /// The event at which it begins.
        from: Option<String>,
        /// The event at which it ends.
        until: Option<String>,
    },
    /// Free pieces from event to event, from the first to the last.
    Broken {
        /// The events, in order of time.
        through: Vec<String>,
        /// An event of those and its clock's reading there; the first and 0 otherwise.
        clock: Option<(String, Typed)>,
    },
    /// Light along x.
    Light {
        /// An event on it.
        through: String,
        /// Which way.
        toward: Toward,
        /// The event at which it begins.
        from: Option<String>,
        /// The event at which it ends.
        until: Option<String>,
    },
    /// The line of a particle.
    Follows {
        /// The particle.
        particle: String,
        /// An event on it.
        through: String,
        /// An event and its clock's reading there; `through` and 0 otherwise.
        clock: Option<(String, Typed)>,
        /// The event at which it begins.
        from: Option<String>,
        /// The event at which it ends.
        until: Option<String>,
    },
}

/// What is known of a particle's motion.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum State {
    /// Its velocity; with an angle, the total one.
    Velocity(Velocity),
    /// Kinetic energy.
    Kinetic(Typed),
    /// Total energy.
    Energy(Typed),
    /// Momentum.
    Momentum(Typed),
    /// Momentum by components.
    Components {
        /// Along x.
        px: Typed,
        /// Across.
        py: Typed,
    },
    /// As stored.
    Longitudinal {
        /// 1/2 ln(p+/p-).
        rapidity: Typed,
        /// Across.
        py: Typed,
    },
    /// At rest.
    AtRest,
    /// To be found by the closure of a collision.
    Closing,
}

/// A particle.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Particle {
    /// Its species.
    pub species: Option<String>,
    /// Its mass, where no species gives it.
    pub mass: Option<Typed>,
    /// Its motion.
    pub state: State,
    /// Direction of the motion, from +x.
    pub angle: Option<Typed>,
    /// The sign along the direction, for forms that carry none.
    pub toward: Option<Toward>,
    /// In which frame the state is so.
    pub when: When,
}

/// A collision.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Collision {
    /// Particles before.
    pub before: Vec<String>,
    /// Particles after.
    pub after: Vec<String>,
    /// The rule that fills in what is unknown.
    pub closure: Closure,
    /// The event it happens at.
    pub at: Option<String>,
}

/// The rule that fills in a collision's unknown particles.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Closure {
    /// Nothing is unknown: check the balance.
    Given,
    /// All that goes in becomes the one closing particle.
    Merge,
    /// The one closing particle is what is missing.
    Remainder,
}

/// A named frame.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Frame {
    /// How it is found.
    pub part: FramePart,
    /// The event that is (0, 0) in it; the base frame's origin otherwise.
    pub origin: Option<String>,
}

/// How a frame is found.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum FramePart {
    /// By a velocity, in the base frame or another.
    Moving {
        /// How it moves.
        velocity: Velocity,
        /// The sign, for forms that carry none.
        toward: Option<Toward>,
        /// Its direction from +x.
        angle: Option<Typed>,
        /// In which frame that is so.
        when: When,
    },
    /// The rest frame of a line (at an event, where the line bends) or of a particle.
    RestOf(LineOrParticle),
    /// The frame in which the total momentum of a collision or of some particles is 0.
    CentreOfMomentum {
        /// A collision's name, or particles.
        of: Whole,
    },
}

/// Whose total momentum.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum Whole {
    /// All that goes into a collision.
    Collision(String),
    /// Some particles.
    Particles(Vec<String>),
}

/// Whose rest frame.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum LineOrParticle {
    /// A line's, at an event.
    Line {
        /// The line.
        line: String,
        /// Where on it, needed where it bends.
        at: Option<String>,
    },
    /// A particle's.
    Particle(String),
}

/// A plate.
#[derive(Clone, Debug, PartialEq, Eq, Default)]
pub struct Plate {
    /// Its title.
    pub title: Option<String>,
    /// Width on paper; 86 mm otherwise.
    pub width: Option<Typed>,
    /// Height on paper; what the panels need otherwise.
    pub height: Option<Typed>,
    /// Size of its lettering; 9 pt otherwise.
    pub text: Option<Typed>,
    /// Its panels, left to right.
    pub panels: Vec<Panel>,
}

/// What a panel shows it as.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Default)]
pub enum View {
    /// t up, x right.
    #[default]
    Spacetime,
    /// E up, px right.
    EnergyMomentum,
}

/// How the momentum arrows stand.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Arrows {
    /// Each from the origin.
    FromOrigin,
    /// Chained, before and after closing on the same total.
    TipToTail,
}

/// What the upright axis of a spacetime panel counts.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum TimeAxis {
    /// Time, in the time unit.
    Time,
    /// c t, in the length unit.
    LightWay,
}

/// What part is shown; in the scene's units, `None` means fitted to the contents.
#[derive(Clone, Debug, PartialEq, Eq, Default)]
pub struct Range {
    /// Time, for a spacetime panel.
    pub t: Option<(Typed, Typed)>,
    /// Place, for a spacetime panel.
    pub x: Option<(Typed, Typed)>,
    /// Energy, for an energy-momentum panel.
    pub energy: Option<(Typed, Typed)>,
    /// Momentum along x, for an energy-momentum panel.
    pub px: Option<(Typed, Typed)>,
}

/// A panel of a plate. A list left out (`None`) means everything of its view; an empty one means nothing.
#[derive(Clone, Debug, PartialEq, Eq, Default)]
pub struct Panel {
    /// The kind of view.
    pub view: View,
    /// The viewing frame.
    pub when: When,
    /// Events shown.
    pub events: Option<Vec<String>>,
    /// Lines shown.
    pub lines: Option<Vec<String>>,
    /// Particles shown.
    pub particles: Option<Vec<String>>,
    /// The collision shown.
    pub collision: Option<String>,
    /// Events whose light cones are drawn.
    pub cones: Vec<String>,
    /// Frames and lines whose axes are drawn.
    pub axes: Vec<String>,
    /// Draw the calibration hyperbolas (spacetime; of whole units) or mass shells (energy-momentum; on if left out).
    pub hyperbolas: Option<bool>,
    /// Pairs of event and frame (or line): the line of simultaneity through the event.
    pub simultaneity: Vec<(String, String)>,
    /// How the arrows stand.
    pub arrows: Option<Arrows>,
    /// What the upright axis counts.
    pub time_axis: Option<TimeAxis>,
    /// What part is shown.
    pub range: Range,
}
