//! Expressions: `3/5`, `sqrt(3)/2`, `497.611(13) MeV`, `12.5 +- 0.5 GeV/c`.
//!
//! `+ - * / ^` with the usual precedence, `^` to the right and above a sign before it (`-3^2` is -9, `2^3^2` is 512),
//! parentheses, the functions of [`function`], `pi` and `e` (Euler's number). There is no implied product. A unit
//! begins with the first name after a whole expression, and a `/` before such a name is no division: `3/5 c` is 0.6 c,
//! and the `/c` of `0.3 GeV/c` is the unit's. Angles are in radians in `sin`, `cos`, `tan` unless a `deg` follows
//! inside the parentheses (`sin(30 deg)`); `asin`, `acos`, `atan` give radians.
//!
//! An uncertainty is the digits in parentheses right after a lone number (in units of its last digit; with a decimal
//! point, as it is), or it follows `+-` or the sign U+00B1. An exact result stays exact: arithmetic, `abs`, roots of
//! perfect powers, sines of multiples of 30 deg.

use super::cursor::{Cursor, begins_name};
use super::function::{self, Function};
use super::number::{Decimal, DecimalFault};
use super::operation::{Operator, SIGN, too_large};
use super::{Number, ReadFault};

/// Bytes an expression may have.
const BYTES: usize = 256;
/// How deep parentheses, signs and powers may nest.
const DEPTH: usize = 64;

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

pub(super) type Read<T> = Result<T, ReadFault>;

pub(super) fn fault<T>(column: usize, what: impl Into<String>, mend: impl Into<String>) -> Read<T> {
    Err(ReadFault {
        column,
        what: what.into(),
        mend: mend.into(),
    })
}

/// Reads a whole text.
pub(super) fn parse(text: &str) -> Read<Parsed> {
    if text.len() > BYTES {
        let within = |&(i, c): &(usize, char)| i + c.len_utf8() <= BYTES;
        let column = text.char_indices().take_while(within).count();
        return fault(
            column,
            "this is longer than 256 bytes",
            "work part of it out",
        );
    }
    if let Some((reader, value, spread)) = Reader::enclosed(text)? {
        return reader.finish(value, Some(spread));
    }
    let mut reader = Reader::new(text);
    let value = reader.expression(0)?;
    reader.finish(value, None)
}

struct Reader {
    cursor: Cursor,
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
            cursor: Cursor::new(text),
            depth: 0,
            lone: true,
            half_digit: Number::zero(),
            bracketed: None,
        }
    }

    /// A value and its uncertainty in one pair of parentheses, if that is how the text begins: `(497.6 +- 0.1) MeV`.
    fn enclosed(text: &str) -> Read<Option<(Self, Number, Number)>> {
        let mut reader = Self::new(text);
        reader.cursor.blanks();
        let opened = reader.cursor.at;
        if !reader.cursor.skip('(') {
            return Ok(None);
        }
        let Ok(value) = reader.expression(0) else {
            return Ok(None);
        };
        let Some(spread) = reader.spread()? else {
            return Ok(None);
        };
        reader.close(opened)?;
        Ok(Some((reader, value, spread)))
    }

    /// What follows the value: its unit, its uncertainty, and nothing else.
    fn finish(mut self, value: Number, inner: Option<Number>) -> Read<Parsed> {
        let bracketed = self.bracketed.take();
        if let (false, Some((_, column))) = (self.lone, &bracketed) {
            return fault(
                *column,
                "an uncertainty in parentheses belongs to a lone number",
                "write `+-` behind the whole, or `*` for a product",
            );
        }
        let unit = self.unit()?;
        self.cursor.blanks();
        let sign = self.cursor.at;
        let outer = self.spread()?;
        if outer.is_some() && (inner.is_some() || bracketed.is_some()) {
            return fault(
                sign,
                "this is a second uncertainty",
                "leave one of them out",
            );
        }
        let uncertainty_unit = if outer.is_some() { self.unit()? } else { None };
        self.cursor.blanks();
        if let Some(c) = self.cursor.peek() {
            return self.stray(c);
        }
        Ok(Parsed {
            value,
            uncertainty: bracketed.map(|b| b.0).or(inner).or(outer),
            half_digit: if self.lone {
                self.half_digit
            } else {
                Number::zero()
            },
            unit,
            uncertainty_unit,
        })
    }

    /// `+- 0.013`, if it comes.
    fn spread(&mut self) -> Read<Option<Number>> {
        self.cursor.blanks();
        let column = self.cursor.at;
        let Some(length) = self.cursor.spread_sign() else {
            return Ok(None);
        };
        self.cursor.at += length;
        let (lone, half_digit) = (self.lone, self.half_digit.clone());
        let value = self.expression(0)?;
        (self.lone, self.half_digit) = (lone, half_digit);
        if let Some((_, column)) = self.bracketed {
            return fault(
                column,
                "an uncertainty has no uncertainty here",
                "leave it out",
            );
        }
        if value.is_negative() {
            return fault(
                column,
                "an uncertainty is not negative",
                "write it without the sign",
            );
        }
        Ok(Some(value))
    }

    fn unit(&mut self) -> Read<Option<UnitText>> {
        self.cursor.blanks();
        let column = self.cursor.at;
        let name = self.cursor.name_ahead();
        if function::constant(&name).is_some() || function::named(&name).is_some() {
            let what = format!("there is no operator before `{name}`");
            return fault(column, what, "write `*` for a product");
        }
        match self.cursor.peek() {
            Some('/') => fault(
                column,
                "neither a number nor a function follows this `/`",
                "a unit begins with a name, as in `0.3 GeV/c`",
            ),
            Some(c) if begins_name(c) => Ok(Some(UnitText {
                symbol: self.cursor.unit(),
                column,
            })),
            _ => Ok(None),
        }
    }

    fn stray<T>(&self, c: char) -> Read<T> {
        let (what, mend) = match c {
            ')' => ("this `)` closes nothing".to_owned(), "take it out"),
            ',' => (
                "a comma does not belong in a number".to_owned(),
                "write `.` as the decimal sign",
            ),
            '(' | '0'..='9' | '.' => (
                format!("there is no operator before this `{c}`"),
                "write `*` for a product",
            ),
            _ => (format!("`{c}` does not belong in a number"), "take it out"),
        };
        fault(self.cursor.at, what, mend)
    }

    /// Precedence climbing: operators of at least this precedence.
    fn expression(&mut self, least: u8) -> Read<Number> {
        self.depth += 1;
        if self.depth > DEPTH {
            return fault(
                self.cursor.at,
                "this nests deeper than 64",
                "work the inner part out",
            );
        }
        let mut left = self.operand()?;
        while let Some(operator) = self.operator_ahead().filter(|o| o.precedence() >= least) {
            let column = self.cursor.at;
            self.cursor.at += 1;
            self.lone = false;
            let right = self.expression(operator.right())?;
            left = operator.apply(&left, &right, column)?;
        }
        self.depth -= 1;
        Ok(left)
    }

    fn operator_ahead(&mut self) -> Option<Operator> {
        self.cursor.blanks();
        let operator = Operator::of(self.cursor.peek()?)?;
        let uncertain = self.cursor.spread_sign().is_some();
        let of_unit = operator == Operator::Over && !self.cursor.divides();
        (!uncertain && !of_unit).then_some(operator)
    }

    fn operand(&mut self) -> Read<Number> {
        self.cursor.blanks();
        let column = self.cursor.at;
        let Some(c) = self.cursor.peek() else {
            return fault(
                column,
                "a number is missing here",
                "write one, as in `12.5`",
            );
        };
        match c {
            '-' | '\u{2212}' | '+' => {
                self.cursor.at += 1;
                let value = self.expression(SIGN)?;
                Ok(if c == '+' { value } else { value.negated() })
            }
            '(' => {
                self.cursor.at += 1;
                let value = self.expression(0)?;
                self.close(column)?;
                Ok(value)
            }
            '0'..='9' | '.' => self.literal(),
            ')' | '*' | '/' | '^' => fault(
                column,
                format!("a number is missing before this `{c}`"),
                "write one, as in `12.5`",
            ),
            c if begins_name(c) => self.named_value(),
            c => self.stray(c),
        }
    }

    fn close(&mut self, opened: usize) -> Read<()> {
        self.cursor.blanks();
        if self.cursor.skip(')') {
            return Ok(());
        }
        let column = self.cursor.at;
        match self.cursor.peek() {
            None => fault(opened, "this `(` is not closed", "write `)` where it ends"),
            Some(_) if self.cursor.spread_sign().is_some() => fault(
                column,
                "an uncertainty belongs at the end",
                "write the whole value, then `+-`",
            ),
            Some(c) if begins_name(c) => {
                let name = self.cursor.name_ahead();
                let mend = "write an operator before it; a unit comes after the whole expression";
                fault(column, format!("`{name}` cannot stand here"), mend)
            }
            Some(c) => self.stray(c),
        }
    }

    /// A decimal, and the uncertainty of its last digits where one is written.
    fn literal(&mut self) -> Read<Number> {
        let start = self.cursor.at;
        let mut text = self.cursor.digits();
        if self.cursor.skip('.') {
            text.push('.');
            text.push_str(&self.cursor.digits());
        }
        let bracket = self.cursor.at;
        let uncertain = self.cursor.bracketed_digits();
        let exponent = self.cursor.exponent();
        let read = match Decimal::read(&format!("{text}{exponent}")) {
            Ok(read) => read,
            Err(DecimalFault::Malformed) => {
                return fault(
                    start,
                    "this is not a number",
                    "write it as in `12.5` or `1.2e-3`",
                );
            }
            Err(DecimalFault::TooLarge) => return Err(too_large(start)),
        };
        if let Some(digits) = uncertain {
            // With a point the digits are the uncertainty itself, else they count units of the last digit.
            let spread = if digits.contains('.') {
                Number::decimal(&format!("{digits}{exponent}"))
            } else {
                Number::decimal(&digits).map(|n| n.times(&read.last_digit))
            };
            let Some(spread) = spread else {
                return fault(
                    bracket,
                    "this uncertainty is not a number",
                    "write it as in `497.611(13)`",
                );
            };
            self.bracketed = Some((spread, bracket));
        }
        self.half_digit = read.half_digit();
        Ok(read.value)
    }

    /// A constant, or a function of what follows in parentheses.
    fn named_value(&mut self) -> Read<Number> {
        let column = self.cursor.at;
        let name = self.cursor.name();
        self.lone = false;
        if let Some(value) = function::constant(&name) {
            return Ok(Number::Real(value));
        }
        let Some(function) = function::named(&name) else {
            return unknown_name(column, &name);
        };
        self.cursor.blanks();
        let opened = self.cursor.at;
        if !self.cursor.skip('(') {
            let what = format!("`{name}` needs its argument in parentheses");
            return fault(opened, what, format!("write `{name}(..)`"));
        }
        let argument = self.expression(0)?;
        let degrees = self.angle_unit(function);
        self.close(opened)?;
        function
            .of(&argument, degrees)
            .or_else(|domain| fault(column, domain, "check the argument"))
    }

    /// Whether the argument of a sine is in degrees; `rad` may be written too.
    fn angle_unit(&mut self, function: Function) -> bool {
        self.cursor.blanks();
        let name = self.cursor.name_ahead();
        let degrees = matches!(name.as_str(), "deg" | "\u{b0}");
        if function.takes_angle() && (degrees || name == "rad") {
            self.cursor.name();
            return degrees;
        }
        false
    }
}

fn unknown_name<T>(column: usize, name: &str) -> Read<T> {
    let mend = if super::units::dimension_of(name).is_some() {
        format!("it is a unit: write the number first, as in `12 {name}`")
    } else if let Some(near) = crate::fault::nearest(name, function::names()) {
        format!("perhaps `{near}`")
    } else {
        let names = function::names().collect::<Vec<_>>().join(", ");
        format!("known are pi, e, {names}")
    };
    fault(
        column,
        format!("`{name}` is no number and no function"),
        mend,
    )
}
