//! From what was typed to a quantity.

use super::{Dimension, Number, Unit};

/// A number as the author wrote it, kept so.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum Typed {
    /// A bare number: its decimal text.
    Bare(String),
    /// A string: expression, unit, uncertainty. The text between the quotes.
    Text(String),
}

/// What is wrong with a typed number.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct ReadFault {
    /// Characters from the start of the text (of the string's contents, for a string).
    pub column: usize,
    /// What is wrong.
    pub what: String,
    /// What would mend it.
    pub mend: String,
}

/// A number with its unit resolved: its value is in the unit that was asked for.
#[derive(Clone, Debug, PartialEq)]
pub struct Quantity {
    /// In the unit asked for.
    pub value: Number,
    /// One standard deviation, in the same unit, where one was typed: `497.611(13)`.
    pub uncertainty: Option<f64>,
    /// Half a unit of the last typed decimal digit, in the same unit; 0 for expressions that are exact (`3/5`) and
    /// for whole numbers.
    pub half_digit: f64,
}

/// Reads a typed number as a quantity in `unit`. A bare number (and a string without a unit) is taken in `unit`.
/// The unit's dimension says what is wanted: a unit of another kind is a fault that names the kind and the units
/// that would do.
pub fn read(typed: &Typed, unit: &Unit) -> Result<Quantity, ReadFault> {
    todo!()
}
