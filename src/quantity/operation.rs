//! The operators of an expression.

use super::expression::{Read, fault};
use super::number::{BITS, fits};
use super::{Number, ReadFault};
use num_rational::BigRational;
use num_traits::{One, Signed, Zero};

#[derive(Clone, Copy, PartialEq, Eq)]
pub(super) enum Operator {
    Plus,
    Minus,
    Times,
    Over,
    Power,
}

/// The precedence of a sign before an operand: above a product, below a power.
pub(super) const SIGN: u8 = 3;

impl Operator {
    /// The operator that a character stands for.
    pub(super) const fn of(c: char) -> Option<Self> {
        match c {
            '+' => Some(Self::Plus),
            '-' | '\u{2212}' => Some(Self::Minus),
            '*' | '\u{d7}' | '\u{b7}' | '\u{22c5}' => Some(Self::Times),
            '/' => Some(Self::Over),
            '^' => Some(Self::Power),
            _ => None,
        }
    }

    pub(super) const fn precedence(self) -> u8 {
        match self {
            Self::Plus | Self::Minus => 1,
            Self::Times | Self::Over => 2,
            Self::Power => 4,
        }
    }

    /// The least precedence that the operators on its right may have.
    pub(super) const fn right(self) -> u8 {
        match self {
            Self::Power => self.precedence(),
            Self::Plus | Self::Minus | Self::Times | Self::Over => self.precedence() + 1,
        }
    }

    /// The result; exact where both operands are, or a fault at `column`.
    pub(super) fn apply(self, left: &Number, right: &Number, column: usize) -> Read<Number> {
        let result = match self {
            Self::Plus => left.plus(right),
            Self::Minus => left.minus(right),
            Self::Times => left.times(right),
            Self::Over if right.is_zero() => {
                return fault(column, "this divides by zero", "check the divisor");
            }
            Self::Over => left.over(right),
            Self::Power => return power(left, right, column),
        };
        match &result {
            Number::Real(_) if left.is_exact() && right.is_exact() => Err(too_large(column)),
            Number::Real(x) if !x.is_finite() => Err(too_great(column)),
            _ => Ok(result),
        }
    }
}

/// The fault of an exact number that would not fit.
pub(super) fn too_large(column: usize) -> ReadFault {
    ReadFault {
        column,
        what: "this needs more than 2,048 bits".to_owned(),
        mend: "write it rounded, or in a larger unit".to_owned(),
    }
}

fn too_great(column: usize) -> ReadFault {
    ReadFault {
        column,
        what: "the result is too large for a number".to_owned(),
        mend: "check the operands".to_owned(),
    }
}

fn power(base: &Number, exponent: &Number, column: usize) -> Read<Number> {
    if base.is_zero() && exponent.is_negative() {
        return fault(
            column,
            "this divides by zero: 0 to a negative power",
            "check the exponent",
        );
    }
    if let (Number::Rational(b), Number::Rational(n)) = (base, exponent)
        && n.is_integer()
    {
        return whole_power(b, n)
            .map(Number::Rational)
            .ok_or_else(|| too_large(column));
    }
    let result = crate::num::pow(base.to_f64(), exponent.to_f64());
    if result.is_nan() {
        return fault(
            column,
            "a negative number has no real power of this exponent",
            "check the base",
        );
    }
    if result.is_infinite() {
        Err(too_great(column))
    } else {
        Ok(Number::Real(result))
    }
}

/// An exact power, `None` where it would not fit. Its size is estimated first, so that `9^9^9` ends at once.
fn whole_power(base: &BigRational, exponent: &BigRational) -> Option<BigRational> {
    if exponent.is_zero() || base.is_one() {
        return Some(BigRational::one());
    }
    if base.is_zero() {
        return Some(base.clone());
    }
    if base.abs().is_one() {
        let odd = exponent.numer().bit(0);
        return Some(if odd {
            base.clone()
        } else {
            BigRational::one()
        });
    }
    let n = i32::try_from(exponent.numer()).ok()?;
    let bits = base.numer().bits().max(base.denom().bits());
    // A power n of a number of b bits has more than (b - 1) n.
    let least = (bits - 1).checked_mul(u64::from(n.unsigned_abs()))?;
    if least >= BITS {
        return None;
    }
    Some(base.pow(n)).filter(fits)
}
