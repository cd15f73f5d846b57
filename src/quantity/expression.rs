//! Expressions: `3/5`, `sqrt(3)/2`, `497.611(13) MeV`, `12.5 +- 0.5 GeV/c`.
//!
//! `+ - * / ^` with the usual precedence, `^` to the right and above a sign before it (`-3^2` is -9, `2^3^2` is 512),
//! parentheses, the functions of [`function`], `pi` and `e` (Euler's number). There is no implied
//! product. A unit begins with the first name that follows a whole expression: a `/` before a digit, a parenthesis or a
//! known name divides, so `3/5 c` is 0.6 c. Angles are in radians in `sin`, `cos`, `tan` unless a `deg` follows inside
//! the parentheses: `sin(30 deg)`; `asin`, `acos`, `atan` give radians. An uncertainty is the digits in parentheses
//! right after a lone number (in units of its last digit; with a decimal point, as it is), or follows `+-` or its sign.
//! An exact result stays exact: all of arithmetic, `abs`, roots of perfect powers, sines of whole multiples of 30 deg.

use super::function::{self, Function};
use super::number::{BITS, Decimal, DecimalFault, fits};
use super::{Number, ReadFault};
use num_rational::BigRational;
use num_traits::{One, Signed, Zero};

/// Bytes an expression may have.
const BYTES: usize = 256;
/// How deep parentheses, signs and powers may nest.
const DEPTH: usize = 64;
/// The precedence of a sign: above a product, below a power.
const SIGN: u8 = 3;

/// A unit as written and where.
#[derive(Clone, Debug, PartialEq, Eq)]
pub(super) struct UnitText {
    /// As written, without blanks around it.
    pub(super) symbol: String,
    /// Characters before it.
    pub(super) column: usize,
}

/// What a text says.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Parsed {
    /// The value of the expression, finite.
    pub(super) value: Number,
    /// One standard deviation, in units of the value.
    pub(super) uncertainty: Option<Number>,
    /// Half a unit of the last digit of a lone decimal, else 0.
    pub(super) half_digit: Number,
    /// What follows the number.
    pub(super) unit: Option<UnitText>,
    /// What follows the uncertainty.
    pub(super) uncertainty_unit: Option<UnitText>,
}

type Read<T> = Result<T, ReadFault>;

#[derive(Clone, Copy, PartialEq, Eq)]
enum Operator {
    Plus,
    Minus,
    Times,
    Over,
    Power,
}

impl Operator {
    const fn precedence(self) -> u8 {
        match self {
            Self::Plus | Self::Minus => 1,
            Self::Times | Self::Over => 2,
            Self::Power => 4,
        }
    }
}

/// Reads a whole text.
pub(super) fn parse(text: &str) -> Read<Parsed> {
    if text.len() > BYTES {
        let column = text
            .char_indices()
            .take_while(|&(i, c)| i + c.len_utf8() <= BYTES)
            .count();
        return fault(
            column,
            "this is longer than 256 bytes",
            "work part of it out",
        );
    }
    Reader::new(text).whole()
}

pub(super) fn fault<T>(column: usize, what: impl Into<String>, mend: impl Into<String>) -> Read<T> {
    Err(ReadFault {
        column,
        what: what.into(),
        mend: mend.into(),
    })
}

struct Reader {
    chars: Vec<char>,
    at: usize,
    depth: usize,
    /// True until an operator, a function or a constant is met: then it is no lone number.
    lone: bool,
    half_digit: Number,
    /// The uncertainty in parentheses and the column of its `(`.
    bracketed: Option<(Number, usize)>,
}

impl Reader {
    fn new(text: &str) -> Self {
        Self {
            chars: text.chars().collect(),
            at: 0,
            depth: 0,
            lone: true,
            half_digit: Number::zero(),
            bracketed: None,
        }
    }

    fn whole(mut self) -> Read<Parsed> {
        let (value, inner) = self.value_and_spread()?;
        let (lone, half_digit, bracketed) =
            (self.lone, self.half_digit.clone(), self.bracketed.take());
        let unit = self.unit()?;
        let outer = self.spread()?;
        let uncertainty_unit = if outer.is_some() { self.unit()? } else { None };
        self.blanks();
        if let Some(c) = self.peek() {
            return self.stray(c);
        }
        if let (false, Some((_, column))) = (lone, &bracketed) {
            return fault(
                *column,
                "an uncertainty in parentheses belongs to a lone number",
                "write the result with its uncertainty, or `*` for a product",
            );
        }
        let uncertainty = [bracketed.map(|b| b.0), inner, outer];
        if uncertainty.iter().flatten().count() > 1 {
            return fault(0, "there are two uncertainties", "leave one of them out");
        }
        Ok(Parsed {
            value,
            uncertainty: uncertainty.into_iter().flatten().next(),
            half_digit: if lone { half_digit } else { Number::zero() },
            unit,
            uncertainty_unit,
        })
    }

    /// An expression; or one with its uncertainty, both in one pair of parentheses: `(497.611 +- 0.013)`.
    fn value_and_spread(&mut self) -> Read<(Number, Option<Number>)> {
        self.blanks();
        if self.peek() == Some('(') {
            self.at += 1;
            if let Ok(value) = self.expression(0)
                && let Some(spread) = self.spread()?
            {
                self.close(0)?;
                return Ok((value, Some(spread)));
            }
            let text: String = self.chars.iter().collect();
            *self = Self::new(&text);
        }
        Ok((self.expression(0)?, None))
    }

    /// `+- 0.013`, if it is there.
    fn spread(&mut self) -> Read<Option<Number>> {
        self.blanks();
        let Some(length) = self.spread_sign() else {
            return Ok(None);
        };
        let column = self.at;
        self.at += length;
        let (lone, half_digit) = (self.lone, self.half_digit.clone());
        let value = self.expression(0)?;
        (self.lone, self.half_digit) = (lone, half_digit);
        if value.is_negative() {
            return fault(
                column,
                "an uncertainty is not negative",
                "write it without the sign",
            );
        }
        Ok(Some(value))
    }

    /// How many characters the sign of an uncertainty takes here.
    fn spread_sign(&self) -> Option<usize> {
        ["\u{b1}", "+-", "+/-", "+\u{2212}"]
            .into_iter()
            .map(|sign| sign.chars().collect::<Vec<_>>())
            .find(|sign| self.chars[self.at..].starts_with(sign))
            .map(|sign| sign.len())
    }

    fn unit(&mut self) -> Read<Option<UnitText>> {
        self.blanks();
        let column = self.at;
        match self.peek() {
            Some(c) if begins_name(c) || c == '\u{b0}' || c == '%' => {}
            Some('/') => {
                return fault(
                    column,
                    "nothing can be divided here",
                    "write a number before the unit",
                );
            }
            _ => return Ok(None),
        }
        while self.at < self.chars.len() && self.spread_sign().is_none() {
            self.at += 1;
        }
        let symbol: String = self.chars[column..self.at].iter().collect();
        Ok(Some(UnitText {
            symbol: symbol.trim_end().to_owned(),
            column,
        }))
    }

    fn stray<T>(&self, c: char) -> Read<T> {
        let (what, mend) = match c {
            ')' => ("this `)` closes nothing".to_owned(), "take it out"),
            '(' => (
                "there is no operator before this `(`".to_owned(),
                "write `*` for a product",
            ),
            ',' => (
                "a comma does not belong in a number".to_owned(),
                "write `.` as the decimal sign",
            ),
            '0'..='9' | '.' => (
                "there is no operator before this number".to_owned(),
                "write `*` for a product",
            ),
            _ => (format!("`{c}` does not belong in a number"), "take it out"),
        };
        fault(self.at, what, mend)
    }

    /// Precedence climbing: operators of at least this precedence.
    fn expression(&mut self, least: u8) -> Read<Number> {
        self.depth += 1;
        if self.depth > DEPTH {
            return fault(
                self.at,
                "this nests deeper than 64",
                "work the inner part out",
            );
        }
        let mut left = self.prefix()?;
        while let Some(operator) = self.operator() {
            let column = self.at;
            let precedence = operator.precedence();
            if precedence < least {
                break;
            }
            self.at += 1;
            self.lone = false;
            let right = self.expression(if operator == Operator::Power {
                precedence
            } else {
                precedence + 1
            })?;
            left = apply(operator, &left, &right, column)?;
        }
        self.depth -= 1;
        Ok(left)
    }

    fn operator(&mut self) -> Option<Operator> {
        self.blanks();
        if self.spread_sign().is_some() {
            return None;
        }
        match self.peek()? {
            '+' => Some(Operator::Plus),
            '-' | '\u{2212}' => Some(Operator::Minus),
            '*' | '\u{d7}' | '\u{b7}' | '\u{22c5}' => Some(Operator::Times),
            '/' if self.divides() => Some(Operator::Over),
            '^' => Some(Operator::Power),
            _ => None,
        }
    }

    /// Whether the `/` here belongs to the expression and not to a unit.
    fn divides(&self) -> bool {
        let mut rest = self.chars[self.at + 1..]
            .iter()
            .copied()
            .skip_while(|c| c.is_whitespace());
        match rest.next() {
            Some(c) if begins_name(c) => {
                let name: String = std::iter::once(c)
                    .chain(rest.take_while(|&c| continues_name(c)))
                    .collect();
                function::constant(&name).is_some() || function::named(&name).is_some()
            }
            _ => true,
        }
    }

    fn prefix(&mut self) -> Read<Number> {
        self.blanks();
        let column = self.at;
        match self.peek() {
            None => fault(
                column,
                "a number is missing here",
                "write a number, as in `12.5`",
            ),
            Some('-' | '\u{2212}') => {
                self.at += 1;
                Ok(self.expression(SIGN)?.negated())
            }
            Some('+') => {
                self.at += 1;
                self.expression(SIGN)
            }
            Some('(') => {
                self.at += 1;
                let value = self.expression(0)?;
                self.close(column)?;
                Ok(value)
            }
            Some('0'..='9' | '.') => self.literal(),
            Some(c) if begins_name(c) => self.name(),
            Some(c @ (')' | '*' | '/' | '^')) => fault(
                column,
                format!("a number is missing before this `{c}`"),
                "write a number, as in `12.5`",
            ),
            Some(c) => self.stray(c),
        }
    }

    fn close(&mut self, opened: usize) -> Read<()> {
        self.blanks();
        match self.peek() {
            Some(')') => {
                self.at += 1;
                Ok(())
            }
            None => fault(opened, "this `(` is not closed", "write `)` where it ends"),
            Some(_) if self.spread_sign().is_some() => fault(
                self.at,
                "an uncertainty belongs at the end",
                "write the value first, then `+-`",
            ),
            Some(c) if begins_name(c) => fault(
                self.at,
                "a name cannot stand here",
                "write an operator before it, or a unit after all numbers",
            ),
            Some(c) => self.stray(c),
        }
    }

    /// A decimal, and the uncertainty of its last digits where one is written.
    fn literal(&mut self) -> Read<Number> {
        let start = self.at;
        let mut text = self.digits();
        if self.peek() == Some('.') {
            self.at += 1;
            text.push('.');
            text.push_str(&self.digits());
        }
        let bracket = self.bracketed_digits();
        text.push_str(&self.exponent());
        let read = match Decimal::read(&text) {
            Ok(read) => read,
            Err(DecimalFault::Malformed) => {
                return fault(
                    start,
                    "this is not a number",
                    "write it as in `12.5` or `1.2e-3`",
                );
            }
            Err(DecimalFault::TooLarge) => return too_large(start),
        };
        if let Some((digits, column)) = bracket {
            let one = if digits.contains('.') {
                exponent_of(&text)
            } else {
                read.last_digit.clone()
            };
            let Ok(spread) = Decimal::read(&digits) else {
                return fault(
                    column,
                    "this uncertainty is not a number",
                    "write digits, as in `497.611(13)`",
                );
            };
            self.bracketed = Some((spread.value.times(&one), column));
        }
        self.half_digit = read.half_digit();
        Ok(read.value)
    }

    /// Digits, with thin spaces between them as in print.
    fn digits(&mut self) -> String {
        let mut text = String::new();
        while let Some(c) = self.peek() {
            let next = self.chars.get(self.at + 1);
            let thin =
                matches!(c, '\u{2009}' | '\u{202f}') && next.is_some_and(char::is_ascii_digit);
            if c.is_ascii_digit() {
                text.push(c);
            } else if text.is_empty() || !thin {
                break;
            }
            self.at += 1;
        }
        text
    }

    /// `(13)` right after a number.
    fn bracketed_digits(&mut self) -> Option<(String, usize)> {
        let rest = &self.chars[self.at..];
        let end = rest
            .iter()
            .position(|&c| c == ')')
            .filter(|_| rest.first() == Some(&'('))?;
        let digits: String = rest[1..end].iter().collect();
        if digits.is_empty() || !digits.bytes().all(|b| b.is_ascii_digit() || b == b'.') {
            return None;
        }
        let column = self.at;
        self.at += end + 1;
        Some((digits, column))
    }

    /// `e-3`, if a digit follows; `eV` is left to the unit.
    fn exponent(&mut self) -> String {
        let rest = &self.chars[self.at..];
        let signed = usize::from(matches!(rest.get(1), Some('+' | '-' | '\u{2212}')));
        let marked = matches!(rest.first(), Some('e' | 'E'));
        if !marked || !rest.get(1 + signed).is_some_and(char::is_ascii_digit) {
            return String::new();
        }
        let sign = if signed == 1 && rest[1] != '+' {
            "-"
        } else {
            ""
        };
        self.at += 1 + signed;
        let mut digits = String::new();
        while let Some(c) = self.peek().filter(char::is_ascii_digit) {
            digits.push(c);
            self.at += 1;
        }
        format!("e{sign}{digits}")
    }

    /// A constant, or a function of an argument in parentheses.
    fn name(&mut self) -> Read<Number> {
        let column = self.at;
        while self.peek().is_some_and(continues_name) {
            self.at += 1;
        }
        let name: String = self.chars[column..self.at].iter().collect();
        self.lone = false;
        if let Some(value) = function::constant(&name) {
            return Ok(Number::Real(value));
        }
        let Some(function) = function::named(&name) else {
            return unknown_name(column, &name);
        };
        self.blanks();
        let opened = self.at;
        if self.peek() != Some('(') {
            return fault(
                opened,
                format!("`{name}` needs its argument in parentheses"),
                format!("write `{name}(..)`"),
            );
        }
        self.at += 1;
        let argument = self.expression(0)?;
        let degrees = self.angle_unit(&function)?;
        self.close(opened)?;
        function
            .of(&argument, degrees)
            .map_or_else(|domain| fault(column, domain, "check the argument"), Ok)
    }

    /// Whether the argument of a sine is in degrees; `rad` may be written too.
    fn angle_unit(&mut self, function: &Function) -> Read<bool> {
        self.blanks();
        let start = self.at;
        while self
            .peek()
            .is_some_and(|c| continues_name(c) || c == '\u{b0}')
        {
            self.at += 1;
        }
        let unit: String = self.chars[start..self.at].iter().collect();
        match unit.as_str() {
            "" => Ok(false),
            "deg" | "\u{b0}" if function.takes_angle() => Ok(true),
            "rad" if function.takes_angle() => Ok(false),
            _ => fault(
                start,
                format!("`{unit}` cannot stand in an argument"),
                "leave the unit out",
            ),
        }
    }

    fn peek(&self) -> Option<char> {
        self.chars.get(self.at).copied()
    }

    fn blanks(&mut self) {
        while self.peek().is_some_and(char::is_whitespace) {
            self.at += 1;
        }
    }
}

fn begins_name(c: char) -> bool {
    c.is_alphabetic() || c == '\u{b5}'
}

fn continues_name(c: char) -> bool {
    begins_name(c) || c.is_ascii_digit() || c == '_'
}

/// The power of ten that stands behind a decimal.
fn exponent_of(text: &str) -> Number {
    let power = text.split_once('e').map_or("0", |(_, power)| power);
    Number::decimal(&format!("1e{power}")).unwrap_or_else(Number::zero)
}

fn unknown_name<T>(column: usize, name: &str) -> Read<T> {
    let mend = if super::units::dimension_of(name).is_some() {
        format!("`{name}` is a unit: write the number first, as in `12 {name}`")
    } else if let Some(near) = crate::fault::nearest(name, function::names()) {
        format!("perhaps `{near}`")
    } else {
        format!(
            "known are pi, e, {}",
            function::names().collect::<Vec<_>>().join(", ")
        )
    };
    fault(
        column,
        format!("`{name}` is no number and no function"),
        mend,
    )
}

fn too_large<T>(column: usize) -> Read<T> {
    fault(
        column,
        "this needs more than 2,048 bits",
        "write it rounded, or in a larger unit",
    )
}

fn apply(operator: Operator, left: &Number, right: &Number, column: usize) -> Read<Number> {
    let result = match operator {
        Operator::Plus => left.plus(right),
        Operator::Minus => left.minus(right),
        Operator::Times => left.times(right),
        Operator::Over if right.is_zero() => {
            return fault(column, "this divides by zero", "check the divisor");
        }
        Operator::Over => left.over(right),
        Operator::Power => return power(left, right, column),
    };
    match &result {
        Number::Real(_) if left.is_exact() && right.is_exact() => too_large(column),
        Number::Real(x) if !x.is_finite() => too_great(column),
        _ => Ok(result),
    }
}

fn too_great<T>(column: usize) -> Read<T> {
    fault(
        column,
        "the result is too large for a number",
        "check the operands",
    )
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
        return whole_power(b, n).map_or_else(|| too_large(column), |r| Ok(Number::Rational(r)));
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
        return too_great(column);
    }
    Ok(Number::Real(result))
}

/// An exact power, `None` where it would not fit. Its size is estimated first, so that `9^9^9` ends at once.
fn whole_power(base: &BigRational, exponent: &BigRational) -> Option<BigRational> {
    let odd = exponent.numer().bit(0);
    if exponent.is_zero() || base.is_one() {
        return Some(BigRational::one());
    }
    if base.is_zero() {
        return Some(base.clone());
    }
    if base.abs().is_one() {
        return Some(if odd {
            base.clone()
        } else {
            BigRational::one()
        });
    }
    let n = i32::try_from(exponent.numer()).ok()?;
    let bits = base.numer().bits().max(base.denom().bits());
    let least = (bits - 1).checked_mul(u64::from(n.unsigned_abs()))?;
    if least >= BITS {
        return None;
    }
    Some(base.pow(n)).filter(fits)
}
