//! Units and what they measure. With c = 1 inside, a mass, an energy and a momentum share one base unit (eV), and
//! a speed is a fraction of c.

use super::Number;

/// What a number measures.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Dimension {
    /// A plain number.
    Plain,
    /// A time; base unit s.
    Time,
    /// A length along x or y; base unit m.
    Length,
    /// An energy; base unit eV.
    Energy,
    /// A mass; base unit eV/c^2. Units of energy will do as well.
    Mass,
    /// A momentum; base unit eV/c. Units of energy will do as well.
    Momentum,
    /// A speed; base unit c. A plain number is a fraction of c.
    Speed,
    /// An angle; base unit degree.
    Angle,
    /// A size on paper; base unit mm. Also pt (1/72 in), cm, in.
    Paper,
}

/// A unit: its symbol as typed and printed, what it measures and its size in base units.
#[derive(Clone, Debug, PartialEq)]
pub struct Unit {
    /// As typed: `ns`, `MeV`, `GeV/c`.
    pub symbol: String,
    /// What it measures.
    pub dimension: Dimension,
    /// In base units; exact but for rad.
    pub size: Number,
}

impl Unit {
    /// The unit of that symbol for that dimension, `None` if there is none (or it measures something else).
    pub fn named(symbol: &str, dimension: Dimension) -> Option<Self> {
        todo!()
    }
    /// The base unit of a dimension.
    pub fn base(dimension: Dimension) -> Self {
        todo!()
    }
    /// The length that light goes in this unit of time (or `None` for another dimension): symbol `c ns`.
    pub fn light_way(&self) -> Option<Self> {
        todo!()
    }
    /// This unit of energy as one of another energy-like dimension: `MeV` -> `MeV/c` or `MeV/c^2`, size unchanged.
    pub fn for_dimension(&self, dimension: Dimension) -> Self {
        todo!()
    }
    /// A factor: how many of `other` one of this is.
    pub fn in_terms_of(&self, other: &Self) -> Number {
        todo!()
    }
    /// As LaTeX math: `\mathrm{MeV}/c`.
    pub fn latex(&self) -> String {
        todo!()
    }
}
