//! Worldlines: free, broken and light. Accelerated legs will be one more kind of leg.

use super::{Displacement, GeometryError, Rapidity, Side};

/// One piece of a worldline: what moves along it between (or beyond) its anchor events.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Leg {
    /// Uniform motion: rapidity along x and, for a line that follows a particle with py, its speed across
    /// as dy/dt. Clocks read gamma of the whole motion.
    Free {
        /// Longitudinal rapidity `1/2 ln(dv/du)`.
        rapidity: Rapidity,
        /// `gamma dy/dt`, the celerity across (py / m).
        across: f64,
    },
    /// Light along x.
    Light(Side),
}

/// A worldline of straight legs through given events. The first and last legs run on without end; trimming is
/// not its business.
#[derive(Clone, Debug, PartialEq)]
pub struct Worldline {
    /// Where leg `i` meets leg `i + 1`; with one leg, empty.
    corners: Vec<Displacement>,
    legs: Vec<Leg>,
    /// An event on the line and what its clock reads there (light has no clock; the reading is then 0).
    anchor: Displacement,
    reading: f64,
}

impl Worldline {
    /// One leg through an event, its clock reading `reading` there.
    pub fn straight(leg: Leg, anchor: Displacement, reading: f64) -> Self {
        todo!()
    }
    /// Straight legs from event to event (at least two), each timelike and forward in time; the clock reads
    /// `reading` at the event of index `at`.
    pub fn broken(
        through: &[Displacement],
        at: usize,
        reading: f64,
    ) -> Result<Self, GeometryError> {
        todo!()
    }
    /// The legs, first to last.
    pub fn legs(&self) -> &[Leg] {
        &self.legs
    }
    /// The corners between legs.
    pub fn corners(&self) -> &[Displacement] {
        &self.corners
    }
    /// The event at which the line's clock reads `reading`. An error for light.
    pub fn at_clock(&self, reading: f64) -> Result<Displacement, GeometryError> {
        todo!()
    }
    /// What the line's clock reads at an event that lies on it (the nearest point by t, otherwise). An error for light.
    pub fn clock_at(&self, event: Displacement) -> Result<f64, GeometryError> {
        todo!()
    }
    /// The line's event at a time t.
    pub fn at_time(&self, t: f64) -> Displacement {
        todo!()
    }
    /// How far the event lies off the line, as |dx| + |dy| at its t, with the rounding bound of that number.
    pub fn distance(&self, event: Displacement) -> (f64, f64) {
        todo!()
    }
    /// The leg that an event on the line lies on; at a corner, the later one.
    pub fn leg_at(&self, event: Displacement) -> Leg {
        todo!()
    }
    /// Where two lines meet: the only place, else an error in words.
    pub fn meeting(&self, other: &Self) -> Result<Displacement, GeometryError> {
        todo!()
    }
    /// Where light sent from an event toward the future meets the line; the event itself when it lies on it.
    pub fn light_from(&self, event: Displacement) -> Result<Displacement, GeometryError> {
        todo!()
    }
    /// Proper time between two events on the line.
    pub fn proper_time(
        &self,
        from: Displacement,
        until: Displacement,
    ) -> Result<f64, GeometryError> {
        todo!()
    }
}
