//! From what was typed to a quantity.

use super::expression::{Parsed, UnitText, fault, parse};
use super::number::{Decimal, DecimalFault};
use super::units::{dimension_of, probably};
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
/// that would do. The value is exact as long as it fits in `unit`, else rounded once.
///
/// # Errors
/// What does not read, with its column; a value that no f64 can hold in `unit` (infinite, or rounded to 0).
pub fn read(typed: &Typed, unit: &Unit) -> Result<Quantity, ReadFault> {
    let parsed = match typed {
        Typed::Bare(text) => bare(text)?,
        Typed::Text(text) => parse(text)?,
    };
    // A value and its uncertainty may each have a unit; where one has none it is in the other's.
    let (value_unit, spread_unit) = match (&parsed.unit, &parsed.uncertainty_unit) {
        (Some(value), None) => (Some(value), Some(value)),
        (None, spread) => (spread.as_ref(), spread.as_ref()),
        both => (both.0.as_ref(), both.1.as_ref()),
    };
    let scale = factor(value_unit, unit)?;
    let value = parsed.value.times(&scale);
    let rounded = value.to_f64();
    if !rounded.is_finite() || (rounded == 0.0 && !value.is_zero()) {
        let size = if rounded == 0.0 { "small" } else { "large" };
        return fault(
            0,
            format!("this is too {size} for a number"),
            "check its exponent and its unit",
        );
    }
    let spread_factor = factor(spread_unit, unit)?;
    let uncertainty = parsed.uncertainty.map(|u| u.times(&spread_factor).to_f64());
    if uncertainty.is_some_and(|u| !u.is_finite()) {
        return fault(
            0,
            "the uncertainty is too large for a number",
            "check its exponent and its unit",
        );
    }
    Ok(Quantity {
        value,
        uncertainty,
        half_digit: parsed.half_digit.times(&scale).to_f64(),
    })
}

fn bare(text: &str) -> Result<Parsed, ReadFault> {
    match Decimal::read(text) {
        Ok(decimal) => Ok(Parsed {
            half_digit: decimal.half_digit(),
            value: decimal.value,
            uncertainty: None,
            unit: None,
            uncertainty_unit: None,
        }),
        Err(DecimalFault::Malformed) => fault(
            0,
            "this is not a decimal number",
            "write it as in `12.5` or `1.2e-3`",
        ),
        Err(DecimalFault::TooLarge) => fault(
            0,
            "this needs more than 2,048 bits",
            "write it rounded, or in a larger unit",
        ),
    }
}

/// How many of `wanted` one of the written unit is.
fn factor(written: Option<&UnitText>, wanted: &Unit) -> Result<Number, ReadFault> {
    let Some(written) = written else {
        return Ok(Number::integer(1));
    };
    match Unit::named(&written.symbol, wanted.dimension) {
        Some(unit) => Ok(unit.in_terms_of(wanted)),
        None => wrong_unit(written, wanted.dimension),
    }
}

fn wrong_unit<T>(written: &UnitText, wanted: Dimension) -> Result<T, ReadFault> {
    let symbol = &written.symbol;
    let choices = wanted.choices();
    if let Some(other) = dimension_of(symbol) {
        let kind = other
            .words()
            .trim_start_matches("an ")
            .trim_start_matches("a ");
        let what = format!(
            "`{symbol}` is a unit of {kind}; {} is wanted",
            wanted.words()
        );
        return fault(written.column, what, format!("{choices} would do"));
    }
    let what = format!("there is no unit `{symbol}`; {} is wanted", wanted.words());
    let mend = match probably(symbol, wanted) {
        Some(meant) => format!("perhaps `{meant}`; {choices} would do"),
        None => format!("{choices} would do"),
    };
    fault(written.column, what, mend)
}
